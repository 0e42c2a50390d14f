"""The check command: what it writes, where, and how it exits."""

from __future__ import annotations

import json
import os
import pty
import subprocess
import sys
from pathlib import Path

import pytest
from click.testing import CliRunner

from service.cli import main
from specs import check_claims
from specs.report.text import render_text

SHEET = "Frequency: 2400-2500 MHz\nGain: 7 dBi\n"
ESCAPE = "\x1b[31m"
HOSTILE = {
    "schema": "beamproof.claims/1",
    "antennas": [
        {
            "label": f"a{ESCAPE}",
            "type": f"b{ESCAPE}",
            "claims": [
                {"quantity": "polarization", "text": f"c{ESCAPE}"},
                {"quantity": "gain", "text": "7 dBi"},
            ],
        }
    ],
}


def run(*arguments: str | Path) -> subprocess.CompletedProcess[str]:
    command = [sys.executable, "-m", "service.cli", *map(str, arguments)]
    return subprocess.run(command, capture_output=True, text=True, check=False)


def test_no_field_of_a_report_can_drive_a_terminal() -> None:
    assert "\x1b" not in render_text(check_claims(HOSTILE))


def test_nothing_hostile_reaches_a_real_terminal(tmp_path: Path) -> None:
    # Through a pseudo-terminal, for click strips escapes from a pipe and would hide the fault.
    claims = tmp_path / f"name{ESCAPE}.json"
    claims.write_text(json.dumps(HOSTILE))
    ours, theirs = pty.openpty()
    process = subprocess.Popen(
        [sys.executable, "-m", "service.cli", "check", str(claims)],
        stdout=theirs,
        stderr=theirs,
        env={**os.environ, "NO_COLOR": "1"},
    )
    os.close(theirs)
    shown = b""
    while True:
        try:
            part = os.read(ours, 65536)
        except OSError:  # Linux answers so when the other end is closed
            break
        if not part:
            break
        shown += part
    os.close(ours)
    assert process.wait() in (0, 1, 2)
    assert b"7 dBi" in shown
    assert b"\x1b" not in shown


def test_two_sheets_of_one_name_are_both_kept(tmp_path: Path) -> None:
    for folder, band in (("a", "2400-2500"), ("b", "863-870")):
        (tmp_path / folder).mkdir()
        (tmp_path / folder / "s.txt").write_text(f"Frequency: {band} MHz\nGain: 7 dBi\n")
    out = tmp_path / "out"
    run("check", tmp_path / "a" / "s.txt", tmp_path / "b" / "s.txt", "--output", out)
    texts = [p.read_text() for p in sorted(out.iterdir())]
    assert len(texts) == 2
    assert any("2400" in t for t in texts)
    assert any("863" in t for t in texts)


def test_output_into_a_missing_folder_is_no_verdict(tmp_path: Path) -> None:
    sheet = tmp_path / "s.txt"
    sheet.write_text(SHEET)
    done = run("check", sheet, "--output", tmp_path / "none" / "x.txt")
    assert done.returncode == 64
    assert "cannot be written" in done.stderr
    assert "Traceback" not in done.stderr


def test_output_into_an_existing_folder_is_put_inside(tmp_path: Path) -> None:
    sheet = tmp_path / "s.txt"
    sheet.write_text(SHEET)
    out = tmp_path / "out"
    out.mkdir()
    assert run("check", sheet, "--output", out).returncode == 1
    assert "Gain" in (out / "s.txt.txt").read_text() or "gain" in (out / "s.txt.txt").read_text()


def test_a_crash_of_our_own_never_looks_like_a_verdict(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    sheet = tmp_path / "s.txt"
    sheet.write_text(SHEET)

    def broken(*_: object, **__: object) -> str:
        raise RuntimeError("a fault of ours")

    monkeypatch.setattr("specs.report.text.render_text", broken)
    done = CliRunner().invoke(main, ["check", str(sheet)])
    assert done.exit_code == 70
    assert "No verdict" in done.output


def test_one_bad_file_does_not_stop_the_rest(tmp_path: Path) -> None:
    (tmp_path / "bad.pdf").write_bytes(b"%PDF-1.4 nothing")
    (tmp_path / "good.txt").write_text(SHEET)
    done = run("check", tmp_path)
    assert done.returncode == 3
    assert "bad.pdf" in done.stderr
    assert "7 dBi" in done.stdout
