"""The pages as a browser without JavaScript sees them."""

from __future__ import annotations

import csv
import io
from pathlib import Path

import pytest
from flask.testing import FlaskClient

from service.pages.convert import EXAMPLES
from service.pages.intake import DEMO
from service.shelf import Kept, Shelf
from specs.rules import RULES

from .conftest import SHEETS, Sender


def test_one_sheet_ends_on_its_report(send: Sender, panel: bytes) -> None:
    answer = send.form((panel, "panel.pdf"))
    assert answer.status_code == 303
    page = send.client.get(answer.headers["Location"])
    assert page.status_code == 200
    assert "Do not order on these figures." in page.text
    assert "data:image/png;base64," in page.text
    assert 'class="service-bar"' in page.text
    assert page.text.count("<body>") == 1


def test_pasted_text_ends_on_its_report(send: Sender) -> None:
    answer = send.form(text="Gain: 9 dBi\nDirectivity: 2 dBi")
    page = send.client.get(answer.headers["Location"])
    assert "Do not order on these figures." in page.text


def test_several_sheets_end_on_their_rows(send: Sender, panel: bytes, honest: bytes) -> None:
    answer = send.form(
        (panel, "panel.pdf"), (honest, "h.pdf"), (b"", "none.pdf"), text="Gain: 3 dBi"
    )
    assert answer.status_code == 200
    assert answer.text.count('class="row"') == 4
    for words in ("Hold", "Release", "Not read.", "pasted-text.txt", "largest margin"):
        assert words in answer.text


def test_rows_are_a_piece_of_a_page(send: Sender, panel: bytes) -> None:
    answer = send.form((panel, "panel.pdf"), to="/rows")
    assert answer.text.strip().startswith('<li class="row">')


def test_results_are_found_again_by_their_address(send: Sender, panel: bytes) -> None:
    sheet_id = send.sheet(panel, "panel.pdf").get_json()["sheet"]["sha256"]
    page = send.client.get(f"/results?id={sheet_id}&id=none")
    assert "panel.pdf" in page.text
    assert "1 report is no longer kept" in page.text


def test_a_sheet_that_cannot_be_read_says_why_beside_the_form(send: Sender) -> None:
    answer = send.form(((SHEETS / "ka-h58-scanned.pdf").read_bytes(), "scan.pdf"))
    assert answer.status_code == 422
    assert "no text" in answer.text
    assert "<form" in answer.text


@pytest.mark.parametrize("to", ["/check", "/rows"])
def test_an_empty_form_says_what_is_missing(send: Sender, to: str) -> None:
    answer = send.form(to=to)
    assert answer.status_code == 422
    assert "paste the text" in answer.text


def test_too_many_files_and_too_much_text_are_refused(send: Sender) -> None:
    many = [(b"Gain: 3 dBi", f"{n}.txt") for n in range(41)]
    assert send.form(*many).status_code == 413
    assert send.form(text="x" * 200_000).status_code == 413


HOSTILE = "<img src=x onerror=alert(1)>"


def test_nothing_of_a_sheet_becomes_markup(send: Sender) -> None:
    text = f"# {HOSTILE}\nGain: 3 dBi {HOSTILE}\nVSWR: {HOSTILE}"
    name = f"{HOSTILE}.txt"
    report = send.client.get(send.form((text.encode(), name)).headers["Location"])
    rows = send.form((text.encode(), name), (b"", name))
    failed = send.form((b"", name))
    for page in (report, rows, failed):
        assert "<img src=x" not in page.text
    assert "&lt;img src=x" in rows.text


def test_nothing_of_a_question_becomes_markup(client: FlaskClient) -> None:
    for path in ("/convert?q=", "/rules/", "/reports/"):
        page = client.get(path + "%22%3E%3Cscript%3Ealert(1)%3C/script%3E")
        assert "<script>alert" not in page.text


def test_exports(send: Sender, panel: bytes) -> None:
    report = send.sheet(panel, "=1+1.pdf").get_json()
    base = f"/reports/{report['sheet']['sha256']}"
    assert send.client.get(base + ".json").get_json() == report
    rows = list(csv.DictReader(io.StringIO(send.client.get(base + ".csv").text)))
    assert len(rows) == len(report["antennas"][0]["claims"])
    assert rows[0]["sheet"] == "'=1+1.pdf"  # no formula in a spreadsheet
    assert "HOLD" in send.client.get(base + ".txt").text
    page = send.client.get(base + ".html")
    assert "service-bar" not in page.text
    for suffix in ("json", "csv", "txt", "html"):
        disposition = send.client.get(f"{base}.{suffix}").headers["Content-Disposition"]
        assert disposition.startswith('attachment; filename="beamproof-')


def test_the_demo_is_the_sheet_of_the_fixtures(client: FlaskClient) -> None:
    assert client.get("/demo/sheet.pdf").data == (SHEETS / DEMO).read_bytes()
    page = client.get("/demo", follow_redirects=True)
    assert "gain-above-beamwidth-limit" in page.text


@pytest.mark.parametrize("example", EXAMPLES)
def test_every_example_of_the_converter_has_equivalents(client: FlaskClient, example: str) -> None:
    page = client.get("/convert", query_string={"q": example})
    assert page.status_code == 200
    assert '<table class="equivalents">' in page.text


def test_the_converter_says_what_it_does_not_understand(client: FlaskClient) -> None:
    page = client.get("/convert?q=7.5+parsecs")
    assert page.status_code == 422
    assert 'role="alert"' in page.text


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_every_rule_has_its_page(client: FlaskClient, rule: object) -> None:
    page = client.get(f"/rules/{rule.id}")  # type: ignore[attr-defined]
    assert page.status_code == 200
    assert page.text.count("<h2>Flagged</h2>") == 1


def test_the_first_page_is_light(client: FlaskClient) -> None:
    parts = ["/", "/look/tokens.css", "/static/pages.css", "/static/intake.js", "/static/mark.svg"]
    assert sum(len(client.get(part).data) for part in parts) < 100_000


def test_the_shelf_lets_the_oldest_go() -> None:
    shelf = Shelf(most=2, most_bytes=100)
    for name in "abc":
        shelf.put(Kept(name, name, b"x" * 30, b""))
    assert shelf.get("a") is None
    assert shelf.get("b") is not None
    shelf.put(Kept("d", "d", b"x" * 60, b""))  # b was used last, so c goes
    assert shelf.get("c") is None
    assert shelf.get("b") is not None
    shelf.put(Kept("e", "e", b"x" * 101, b""))
    assert shelf.get("e") is None
    assert shelf.get("d") is not None


def test_nothing_is_written_to_disk(
    send: Sender, panel: bytes, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.chdir(tmp_path)
    send.form((panel, "panel.pdf"))
    assert list(tmp_path.iterdir()) == []
