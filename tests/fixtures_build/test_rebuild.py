"""The sheets in the repository are what their sources print, byte for byte."""

from __future__ import annotations

import subprocess
import sys
import tomllib
from pathlib import Path

import pytest

ROOT = Path(__file__).resolve().parents[2]
SHEETS = ROOT / "fixtures" / "sheets"


@pytest.fixture(scope="module")
def rebuilt(tmp_path_factory: pytest.TempPathFactory) -> Path:
    into = tmp_path_factory.mktemp("sheets")
    command = [sys.executable, "-m", "fixtures.build", "--into", str(into)]
    subprocess.run(command, cwd=ROOT, check=True, capture_output=True)
    return into


def test_the_same_sheets_are_built(rebuilt: Path) -> None:
    assert {p.name for p in rebuilt.iterdir()} == {p.name for p in SHEETS.iterdir()}


@pytest.mark.parametrize("name", sorted(path.name for path in SHEETS.iterdir()))
def test_rebuild_is_byte_identical(rebuilt: Path, name: str) -> None:
    # compare lengths first: a difference in bytes of a PDF prints badly
    old, new = (SHEETS / name).read_bytes(), (rebuilt / name).read_bytes()
    assert len(old) == len(new)
    assert old == new, "run `python -m fixtures.build` and look at what changed"


def test_at_least_three_sheets_are_honest() -> None:
    files = (ROOT / "fixtures" / "expected").glob("*.toml")
    verdicts = [tomllib.loads(path.read_text(encoding="utf-8")).get("verdict") for path in files]
    assert verdicts.count("release") >= 3
    assert verdicts.count("hold") >= 3
    assert verdicts.count("query") >= 3
