"""The report as text for a terminal."""

from __future__ import annotations

import textwrap
from enum import Enum

from specs.report import ruler
from specs.report.model import AntennaEntry, FindingEntry, Report
from specs.report.phrases import (
    SHAPES,
    UNREAD_REASONS,
    VERDICTS,
    condition,
    link_consequence,
    normalized,
    printable,
    quantity,
    where,
)

_COLOURS = {"hold": "1;31", "query": "1;33", "release": "1;32", "impossible": "31",
            "implausible": "31", "doubtful": "33", "unclear": "36", "note": "2"}  # fmt: skip


def render_text(report: Report, colour: bool = False, width: int = 96) -> str:
    """The whole report as text; ``colour`` adds terminal colours to words that stand anyway."""
    return _Text(_cleaned(report), colour, width).render()


class _Text:
    def __init__(self, report: Report, colour: bool, width: int) -> None:
        self.report, self.colour, self.width = report, colour, width
        self.lines: list[str] = []

    def render(self) -> str:
        sheet = self.report.sheet
        self._add(f"{sheet.name}   {sheet.pages} page{'s' * (sheet.pages != 1)}")
        self._add(f"{self._painted(self.report.verdict.value.upper(), self.report.verdict.value)}"
                  f"   {VERDICTS[self.report.verdict.value]}")  # fmt: skip
        self._wrapped(self.report.reason, "")
        for antenna in self.report.antennas:
            self._antenna(antenna)
        self._whole_sheet()
        self._add("")
        self._add("Cautions")
        for caution in self.report.cautions:
            self._wrapped(caution, "  ")
        return "\n".join(self.lines) + "\n"

    def _add(self, line: str) -> None:
        self.lines.append(line.rstrip())

    def _wrapped(self, text: str, indent: str) -> None:
        self.lines.extend(
            textwrap.wrap(text, self.width, initial_indent=indent, subsequent_indent=indent)
        )

    def _painted(self, text: str, key: str) -> str:
        return f"\x1b[{_COLOURS[key]}m{text}\x1b[0m" if self.colour else text

    def _antenna(self, antenna: AntennaEntry) -> None:
        self._add("")
        kind = f"   {antenna.type}{' (inferred)' if antenna.type_inferred else ''}"
        kind = kind if antenna.type else ""
        verdict = self._painted(antenna.verdict.value, antenna.verdict.value)
        self._add(f"{antenna.label}{kind}   {verdict}")
        self._add("─" * self.width)
        self._claims(antenna)
        for finding in antenna.findings:
            self._finding(finding)
        self._planning(antenna)
        self._coverage(antenna)

    def _claims(self, antenna: AntennaEntry) -> None:
        rows = [
            (c.id, quantity(c), f"“{c.stated.text}”", normalized(c), condition(c), where(c))
            for c in antenna.claims
        ]
        if not rows:
            return
        widths = [min(max(len(r[i]) for r in rows), cap) for i, cap in enumerate(_CAPS)]
        for row in rows:
            cells = [_cut(cell, w).ljust(w) for cell, w in zip(row, widths, strict=True)]
            self._add("  " + "  ".join(cells))

    def _finding(self, finding: FindingEntry) -> None:
        self._add("")
        word = f"{SHAPES[finding.severity]} {finding.severity}"
        self._add(f"  {self._painted(word, finding.severity)}  {finding.rule}  "
                  f"[{', '.join(finding.claims)}]")  # fmt: skip
        self._wrapped(finding.message, "    ")
        if finding.ruler is not None:
            self.lines.extend("      " + line for line in ruler.as_text(finding.ruler))
        if finding.working:
            self._wrapped(f"Working: {finding.working}", "    ")
        if finding.assumption:
            self._wrapped(finding.assumption, "    ")
        self._wrapped(f"Ask: {finding.question}", "    ")

    def _planning(self, antenna: AntennaEntry) -> None:
        gain = antenna.planning_gain
        if gain is None:
            return
        self._add("")
        self._add(
            f"  Planning gain {gain.nominal:.1f} dBi ({gain.low:.1f} to {gain.high:.1f}): "
            f"{link_consequence(gain.shortfall_db, gain.range_factor)}"
        )
        for basis in gain.basis:
            self._wrapped(basis, "    ")

    def _coverage(self, antenna: AntennaEntry) -> None:
        coverage = antenna.coverage
        self._add("")
        self._wrapped(f"Checked: {', '.join(coverage.ran) or 'nothing'}", "  ")
        for item in coverage.not_run:
            self._wrapped(f"Not checked: {item.rule} (needs {item.missing})", "  ")
        if coverage.not_applicable:
            self._wrapped(f"Does not apply: {', '.join(coverage.not_applicable)}", "  ")

    def _whole_sheet(self) -> None:
        for finding in self.report.findings:
            self._finding(finding)
        for failure in self.report.rule_failures:
            self._add(f"  Rule {failure.rule} failed on {failure.antenna}: {failure.error}")
        if self.report.unread:
            self._add("")
            self._add("Unread: looked like a claim and was not used")
            for item in self.report.unread:
                reason = UNREAD_REASONS.get(item.reason, item.reason)
                self._wrapped(f"p. {item.page}  “{item.text}”  {reason}", "  ")
        for note in self.report.notes:
            self._wrapped(f"Note: {note}", "  ")


_CAPS = (5, 30, 30, 24, 16, 8)


def _cut(text: str, width: int) -> str:
    return text if len(text) <= width else text[: width - 1] + "…"


def _cleaned(report: Report) -> Report:
    """The report with every text made printable, so that no field can be forgotten."""
    return Report.model_validate(_printable(report.model_dump(by_alias=True)))


def _printable(value: object) -> object:
    if isinstance(value, str) and not isinstance(value, Enum):
        return printable(value)
    if isinstance(value, dict):
        return {key: _printable(item) for key, item in value.items()}
    if isinstance(value, list | tuple):
        return [_printable(item) for item in value]
    return value
