"""Reports as a CSV table: one row a claim, with the verdict and findings of its antenna."""

from __future__ import annotations

import csv
import io
from collections.abc import Iterable, Iterator

from specs.report.model import AntennaEntry, Report
from specs.report.phrases import printable

COLUMNS = (
    "sheet", "sha256", "antenna", "type", "verdict", "claim", "quantity", "statistic", "plane",
    "band_low_mhz", "band_high_mhz", "stated", "unit", "relation", "low", "high", "nominal",
    "normal_unit", "page", "confidence", "worst_severity", "rules", "margin_db",
)  # fmt: skip
_RANK = {"note": 0, "unclear": 1, "doubtful": 2, "implausible": 3, "impossible": 4}


def report_csv(reports: Iterable[Report]) -> str:
    """All claims of some reports as CSV with a head row.

    Cells that a spreadsheet would take for a formula are made plain text by an apostrophe.
    """
    out = io.StringIO()
    writer = csv.writer(out, lineterminator="\r\n")
    writer.writerow(COLUMNS)
    for report in reports:
        for antenna in report.antennas:
            for row in _rows(report, antenna):
                writer.writerow([guarded(cell) for cell in row])
    return out.getvalue()


def guarded(cell: object) -> object:
    """A cell that no spreadsheet runs as a formula; numbers stay numbers."""
    if not isinstance(cell, str):
        return cell
    plain = printable(cell)
    return "'" + plain if plain[:1] in ("=", "+", "-", "@", "\t") else plain


def _rows(report: Report, antenna: AntennaEntry) -> Iterator[list[object]]:
    for claim in antenna.claims:
        findings = [f for f in antenna.findings if claim.id in f.claims]
        worst = max((f.severity for f in findings), key=lambda s: _RANK[s], default="")
        margins = [f.margin_db for f in findings if f.margin_db is not None]
        low, high = claim.band_mhz or (None, None)
        yield [
            report.sheet.name, report.sheet.sha256, antenna.label, antenna.type or "",
            antenna.verdict.value, claim.id, claim.quantity, claim.statistic or "",
            claim.plane or "", low, high, claim.stated.text, claim.stated.unit,
            claim.stated.relation, claim.normalized.low, claim.normalized.high,
            claim.normalized.nominal, claim.normalized.unit,
            claim.evidence[0].page if claim.evidence else "", claim.confidence, worst,
            " ".join(dict.fromkeys(f.rule for f in findings)), max(margins, default=None),
        ]  # fmt: skip
