"""A hostile file ends in a typed error or a report, in time, and the next good sheet is well."""

from __future__ import annotations

import json
import math
import os
import resource
import time
from collections.abc import Iterator
from pathlib import Path
from typing import Any

import pytest

from fixtures.hostile import CASES, Case
from specs.errors import SheetError
from specs.pipeline import Checker
from specs.reading import Limits

GOOD = Path(__file__).resolve().parents[2] / "fixtures" / "sheets" / "ka-d600-58-dish.pdf"
LIMITS = Limits(seconds=10.0)
"""Tighter than in service, so that the whole run stays short."""

SECONDS = 30.0
"""No file may hold the caller longer: the limit of reading, and air for a busy machine."""

GROWTH_MB = 400
"""How much the calling process may grow over the whole run; reading happens in a child."""


def resident_mb() -> float:
    pages = int(Path("/proc/self/statm").read_text().split()[1])
    return pages * os.sysconf("SC_PAGE_SIZE") / 2**20


@pytest.fixture(scope="module")
def checker() -> Iterator[Checker]:
    with Checker(limits=LIMITS) as made:
        check(made, GOOD)
        yield made


@pytest.fixture(scope="module")
def good_report(checker: Checker) -> dict[str, Any]:
    return as_data(check(checker, GOOD))


def check(checker: Checker, path: Path) -> Any:
    return checker.check(path.read_bytes(), path.name)


def as_data(report: Any) -> dict[str, Any]:
    data: dict[str, Any] = report.model_dump(mode="json", by_alias=True)
    return data


def numbers(data: Any) -> Iterator[float]:
    if isinstance(data, dict):
        for value in data.values():
            yield from numbers(value)
    elif isinstance(data, list):
        for value in data:
            yield from numbers(value)
    elif isinstance(data, float):
        yield data


def outcome(checker: Checker, path: Path) -> str:
    """The code of the typed error, or ``report``; any other exception passes through and fails."""
    failed: SheetError | None = None
    try:
        report = check(checker, path)
    except SheetError as error:
        failed = error
    if failed is not None:
        assert failed.message, "an error without a message helps nobody"
        assert failed.advice, "an error without advice helps nobody"
        assert "Traceback" not in str(failed)
        return failed.code
    data = as_data(report)
    text = json.dumps(data, allow_nan=False)  # as it would leave the service
    assert len(text) < 20_000_000, f"a report of {len(text)} characters"
    assert all(math.isfinite(number) for number in numbers(data))
    return "report"


@pytest.mark.parametrize("case", CASES, ids=lambda case: case.name)
def test_hostile_file(
    case: Case, checker: Checker, good_report: dict[str, Any], tmp_path: Path
) -> None:
    path = tmp_path / case.file
    path.write_bytes(case.make())
    start = time.perf_counter()
    got = outcome(checker, path)
    took = time.perf_counter() - start
    assert took < SECONDS, f"{took:.1f} s"
    assert "any" in case.allowed or got in case.allowed, f"{got}, not {sorted(case.allowed)}"
    after = as_data(check(checker, GOOD))
    assert after == good_report, "the next good sheet is read otherwise than before"


def test_the_caller_does_not_grow(checker: Checker, tmp_path: Path) -> None:
    bombs = [case for case in CASES if "bomb" in case.name or "million" in case.name]
    assert len(bombs) >= 5
    before = resident_mb()
    for number, case in enumerate(bombs):
        path = tmp_path / f"{number}-{case.file}"
        path.write_bytes(case.make())
        outcome(checker, path)
    assert resident_mb() - before < GROWTH_MB
    children_mb = resource.getrusage(resource.RUSAGE_CHILDREN).ru_maxrss / 1024
    assert children_mb < 2048, f"a reading process grew to {children_mb:.0f} MB"
