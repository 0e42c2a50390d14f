"""The main job, end to end, on the invented sheets."""

from __future__ import annotations

import json
import subprocess
import sys
from pathlib import Path

import jsonschema
import pytest

from specs import check_claims, check_text
from specs.report.html import render_html
from specs.report.schemas import FOLDER, published, report_schema
from specs.report.table import guarded
from specs.report.text import render_text
from specs.rules import RULES

SHEETS = Path(__file__).parents[2] / "fixtures" / "sheets"


def run(*arguments: str) -> subprocess.CompletedProcess[str]:
    command = [sys.executable, "-m", "service.cli", *arguments]
    return subprocess.run(command, capture_output=True, text=True, check=False)


@pytest.mark.parametrize(
    ("name", "code", "rule"),
    [
        ("of-5800-17-sector-panel.pdf", 2, "gain-above-beamwidth-limit"),
        ("bw-868-10-omni.pdf", 2, "omni-gain-above-beamwidth-limit"),
        ("ph-d900-58-dish.pdf", 2, "gain-above-dish-aperture"),
        ("ph-yb24-13-backfire.pdf", 1, "gain-reference-unstated"),
    ],
)
def test_an_overclaim_sets_the_exit_code(name: str, code: int, rule: str) -> None:
    done = run("check", str(SHEETS / name), "--format", "json")
    assert done.returncode == code, done.stderr
    report = json.loads(done.stdout)
    jsonschema.validate(report, report_schema())
    assert rule in {f["rule"] for a in report["antennas"] for f in a["findings"]}


def test_an_honest_sheet_is_released() -> None:
    done = run("check", str(SHEETS / "ka-s24-65-sector.pdf"))
    assert done.returncode == 0, done.stdout + done.stderr


def test_a_scan_says_what_to_do() -> None:
    done = run("check", str(SHEETS / "ka-h58-scanned.pdf"))
    assert done.returncode == 3
    assert "no text" in done.stderr
    assert "Traceback" not in done.stderr


def test_the_published_schemas_are_current() -> None:
    for name, text in published().items():
        assert (FOLDER / name).read_text("utf-8") == text


def test_claims_given_as_json_are_judged() -> None:
    claims = [
        {"quantity": "gain", "text": "16.0 dBd ±0.5"},
        {"quantity": "beamwidth", "plane": "azimuth", "value": 90, "unit": "deg"},
        {"quantity": "beamwidth", "plane": "elevation", "value": 12, "unit": "deg"},
    ]
    antenna = {"label": "OF-5800-17", "type": "sector panel", "claims": claims}
    report = check_claims({"schema": "beamproof.claims/1", "antennas": [antenna]})
    gain = report.antennas[0].claims[0].normalized
    # dBd + 2.15 (half-wave dipole, Balanis ch. 4), widened by the stated tolerance
    assert (gain.low, gain.nominal, gain.high) == (17.65, 18.15, 18.65)
    assert report.verdict.value == "query"


@pytest.mark.parametrize("rule", [r for r in RULES if r.scope == "antenna"], ids=lambda r: r.id)
def test_the_accepted_example_of_a_rule_is_accepted(rule) -> None:  # type: ignore[no-untyped-def]
    report = check_text(rule.sections["Accepted"])
    assert not report.rule_failures
    severe = [f for a in report.antennas for f in a.findings if f.rule == rule.id]
    assert all(f.severity == "note" for f in severe), severe


# An invisible figure cannot be shown in plain text, so this one rule has no flagged example.
FLAGGED = [r for r in RULES if r.id != "hidden-text"]


@pytest.mark.parametrize("rule", FLAGGED, ids=lambda r: r.id)
def test_the_flagged_example_of_a_rule_is_flagged(rule) -> None:  # type: ignore[no-untyped-def]
    report = check_text(rule.sections["Flagged"])
    found = [*report.findings, *(f for a in report.antennas for f in a.findings)]
    assert rule.id in {f.rule for f in found}


def test_a_number_behind_unknown_words_is_no_claim() -> None:
    report = check_text("Frequency: 2400-2500 MHz\nGain: see chart 7")
    assert not [c for a in report.antennas for c in a.claims if c.quantity == "gain"]
    assert report.verdict.value == "query"


def test_sheet_text_is_escaped_and_formulas_are_guarded() -> None:
    report = check_text("<script>alert(1)</script>\nFrequency: 2400-2500 MHz\nGain: 7 dBi")
    page = render_html(report)
    assert "<script>" not in page
    assert "http://" not in page
    assert "https://" not in page
    assert guarded('=HYPERLINK("x")') == "'=HYPERLINK(\"x\")"
    assert "\x1b" not in render_text(report)
