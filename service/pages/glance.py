"""A report in one line: verdict, findings by severity, largest margin."""

from __future__ import annotations

from dataclasses import dataclass

from service.shelf import Kept
from specs.errors import BeamproofError
from specs.report.model import FindingEntry, Report
from specs.report.phrases import SEVERITIES, SHAPES, VERDICTS, number


@dataclass(frozen=True, slots=True)
class Count:
    """How many findings of one severity."""

    severity: str
    shape: str
    number: int


@dataclass(frozen=True, slots=True)
class Row:
    """One sheet of an intake: its result at a glance, or why there is none."""

    name: str
    id: str | None = None
    pages: int = 0
    verdict: str = ""
    meaning: str = ""
    antennas: int = 0
    claims: int = 0
    counts: tuple[Count, ...] = ()
    margin: str = ""
    failure: BeamproofError | None = None


def row_of(kept: Kept) -> Row:
    """The row of a sheet that was checked."""
    report = Report.model_validate_json(kept.report)
    findings = [*report.findings, *(f for a in report.antennas for f in a.findings)]
    return Row(
        name=report.sheet.name,
        id=kept.id,
        pages=report.sheet.pages,
        verdict=report.verdict.value,
        meaning=VERDICTS[report.verdict.value],
        antennas=len(report.antennas),
        claims=sum(len(a.claims) for a in report.antennas),
        counts=_counts(findings),
        margin=_margin(findings),
    )


def _counts(findings: list[FindingEntry]) -> tuple[Count, ...]:
    numbers = {s: sum(f.severity == s for f in findings) for s in SEVERITIES}
    return tuple(Count(s, SHAPES[s], n) for s, n in numbers.items() if n)


def _margin(findings: list[FindingEntry]) -> str:
    """The largest distance beyond a bound, in dB; '' when there is none."""
    margins = [f.margin_db for f in findings if f.margin_db is not None and f.margin_db > 0]
    return f"{number(round(max(margins), 1))} dB" if margins else ""
