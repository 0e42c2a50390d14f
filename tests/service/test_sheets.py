"""Sheets by the API: reports, ids, names, limits, and every way in which a sheet is refused."""

from __future__ import annotations

import hashlib
from io import BytesIO
from pathlib import Path

import jsonschema
import pytest
from flask.testing import FlaskClient

from service.checking import plain_name
from specs.report.schemas import report_schema

from .conftest import SHEETS, Sender

OVERCLAIM = b"Gain: 9 dBi\nDirectivity: 2 dBi"


def test_a_sheet_gives_its_report(send: Sender, panel: bytes) -> None:
    answer = send.sheet(panel, "panel.pdf")
    assert answer.status_code == 201
    report = answer.get_json()
    jsonschema.validate(report, report_schema())
    assert report["verdict"] == "hold"
    assert report["sheet"]["name"] == "panel.pdf"
    assert report["sheet"]["sha256"] == hashlib.sha256(panel).hexdigest()


def test_an_honest_sheet_is_released(send: Sender, honest: bytes) -> None:
    assert send.sheet(honest).get_json()["verdict"] == "release"


def test_the_same_bytes_have_the_same_id(send: Sender, panel: bytes) -> None:
    first, second = send.sheet(panel, "a.pdf"), send.sheet(panel, "b.pdf")
    assert first.headers["Location"] == second.headers["Location"]
    kept = send.client.get(first.headers["Location"])
    assert kept.status_code == 200
    assert kept.get_json() == second.get_json()


def test_an_unknown_id_is_not_found(client: FlaskClient) -> None:
    for sheet_id in ("0" * 64, "..%2f..%2fetc", "x"):
        answer = client.get(f"/api/v1/sheets/{sheet_id}")
        assert answer.status_code == 404
        assert answer.mimetype == "application/problem+json"


def test_text_and_claims_are_sheets_too(send: Sender) -> None:
    assert send.sheet(OVERCLAIM, "a.txt").get_json()["verdict"] == "hold"
    claims = (
        b'{"schema": "beamproof.claims/1", "antennas": [{"label": "a", "claims": '
        b'[{"quantity": "gain", "text": "3 dBi"}]}]}'
    )
    assert send.sheet(claims, "claims.json").get_json()["sheet"]["read_by"] == "given"


@pytest.mark.parametrize(
    ("name", "shown"),
    [
        ("../../../etc/passwd", "passwd"),
        ("/absolute/sheet.txt", "sheet.txt"),
        ("a\u202egnp.txt", "agnp.txt"),
        ("<script>alert(1)<script>.txt", "<script>alert(1)<script>.txt"),
        ("..", "sheet"),
        ("   .txt", ".txt"),
        ("n" * 400 + ".txt", "n" * 115 + "….txt"),
        ("=cmd|'!A0.txt", "=cmd|'!A0.txt"),
    ],
)
def test_a_name_is_shown_and_never_a_path(
    send: Sender, name: str, shown: str, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.chdir(tmp_path)
    answer = send.sheet(b"Gain: 3 dBi", name)
    assert answer.status_code == 201, answer.text
    assert answer.get_json()["sheet"]["name"] == shown
    assert list(tmp_path.iterdir()) == []


def test_folders_of_other_systems_are_left_out_too() -> None:
    assert plain_name("..\\..\\windows\\system.txt") == "system.txt"
    assert plain_name("C:\\sheets\\a\x1b[31m.pdf") == "a[31m.pdf"


@pytest.mark.parametrize(
    ("data", "name", "status", "code"),
    [
        (b"", "empty.pdf", 422, "empty-sheet"),
        (b"\x00\x00 \n", "zeros.pdf", 422, "empty-sheet"),
        (b"PK\x03\x04 rest of an archive", "sheet.docx", 415, "unknown-format"),
        (b"\x89PNG\r\n\x1a\n", "scan.png", 415, "unknown-format"),
        (b"no PDF at all", "sheet.pdf", 422, "damaged-sheet"),
        (b"%PDF-1.7\ncut off", "sheet.pdf", 422, "damaged-sheet"),
        (b"x" * 300_001, "long.txt", 413, "sheet-too-large"),
        (b"{", "claims.json", 422, "claims-malformed"),
    ],
)
def test_what_cannot_be_read_is_refused_with_words(
    send: Sender, data: bytes, name: str, status: int, code: str
) -> None:
    answer = send.sheet(data, name)
    problem = answer.get_json()
    assert (answer.status_code, problem["code"]) == (status, code)
    assert answer.mimetype == "application/problem+json"
    assert problem["status"] == status
    assert problem["detail"]
    assert problem["advice"]
    assert problem["request_id"] == answer.headers["X-Request-ID"]


def test_a_scan_says_what_to_do(send: Sender) -> None:
    answer = send.sheet((SHEETS / "ka-h58-scanned.pdf").read_bytes())
    assert answer.status_code == 422
    assert answer.get_json()["code"] == "no-text-layer"


def test_a_body_far_too_large_is_refused(send: Sender) -> None:
    answer = send.sheet(b"x" * 450_000, "long.txt")
    assert answer.status_code == 413
    assert answer.mimetype == "application/problem+json"


def test_the_field_is_called_file(client: FlaskClient) -> None:
    answer = client.post("/api/v1/sheets", data={"sheet": (BytesIO(b"Gain: 3 dBi"), "a.txt")})
    assert answer.status_code == 422
    assert answer.get_json()["errors"] == [{"pointer": "/file", "detail": "Field required"}]


def test_a_field_that_is_no_file_is_refused(client: FlaskClient) -> None:
    answer = client.post(
        "/api/v1/sheets", data={"file": "Gain: 3 dBi"}, content_type="multipart/form-data"
    )
    assert answer.status_code == 422


def test_several_files_are_not_dropped_in_silence(client: FlaskClient) -> None:
    files = [(BytesIO(b"Gain: 3 dBi"), "a.txt"), (BytesIO(b"Gain: 4 dBi"), "b.txt")]
    answer = client.post("/api/v1/sheets", data={"file": files})
    assert answer.status_code == 422
    assert answer.get_json()["code"] == "several-files"


def test_a_form_is_needed(client: FlaskClient, panel: bytes) -> None:
    answer = client.post("/api/v1/sheets", data=panel, content_type="application/pdf")
    assert answer.status_code == 415
    assert "multipart/form-data" in answer.get_json()["detail"]
