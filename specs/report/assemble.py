"""Sheet and judgements to the report."""

from __future__ import annotations

import math
from collections.abc import Sequence
from functools import cache
from importlib.metadata import version
from typing import Literal

from specs.claims import Antenna, Claim, Sheet, Unread
from specs.estimate import PlanningGain
from specs.report.model import (
    AntennaEntry,
    BoundEntry,
    ClaimEntry,
    CoverageEntry,
    EvidencePlace,
    FindingEntry,
    NormalizedFigure,
    NotRunEntry,
    PlanningGainEntry,
    Report,
    RuleFailureEntry,
    RulerEntry,
    SheetInfo,
    StatedFigure,
    Tool,
    UnreadEntry,
    Verdict,
    ZoneEntry,
)
from specs.rules import RULES_VERSION
from specs.rules.cautions import cautions
from specs.rules.engine import judge_whole_sheet
from specs.rules.finding import Bound, Finding, Judgement, Ruler
from specs.rules.verdict import verdict_of, worst


def build_report(
    sheet: Sheet,
    judgements: Sequence[Judgement],
    planning: Sequence[PlanningGain | None],
) -> Report:
    """The report on a sheet, given one judgement and planning gain for each antenna, in order."""
    entries = [
        _antenna(antenna, judgement, gain)
        for antenna, judgement, gain in zip(sheet.antennas, judgements, planning, strict=True)
    ]
    whole = judge_whole_sheet(sheet)
    verdict, reason = worst(
        [(e.verdict.value, e.reason) for e in entries], whole, bool(sheet.antennas)
    )
    return Report(
        sheet=SheetInfo(
            name=sheet.name,
            sha256=sheet.sha256,
            media_type=sheet.media_type,
            pages=sheet.pages,
            language=sheet.language,
            read_by=_read_by(sheet),
        ),
        antennas=entries,
        findings=[_finding(f) for f in whole],
        rule_failures=[
            RuleFailureEntry(rule=f.rule, antenna=f.antenna, error=f.error)
            for j in judgements
            for f in j.failures
        ],
        unread=[_unread(u) for u in sheet.unread],
        notes=list(sheet.notes),
        cautions=list(cautions(sheet)),
        verdict=Verdict(verdict),
        reason=reason,
        tool=Tool(version=_version(), rules_version=RULES_VERSION),
    )


@cache
def _version() -> str:
    # Looking a distribution up reads its metadata from disk: once is enough.
    return version("beamproof")


def _read_by(sheet: Sheet) -> Literal["text", "ocr", "given"]:
    if sheet.read_by == "ocr":
        return "ocr"
    return "given" if sheet.read_by == "given" else "text"


def _antenna(antenna: Antenna, judgement: Judgement, gain: PlanningGain | None) -> AntennaEntry:
    verdict, reason = verdict_of(judgement)
    return AntennaEntry(
        label=antenna.label,
        type=antenna.type,
        type_inferred=antenna.type_inferred,
        traits=sorted(antenna.traits),
        claims=[_claim(c) for c in antenna.claims],
        headline=[_claim(c) for c in antenna.headline],
        findings=[_finding(f) for f in judgement.findings],
        planning_gain=None if gain is None else _planning(gain),
        coverage=CoverageEntry(
            ran=list(judgement.coverage.ran),
            not_run=[
                NotRunEntry(rule=n.rule, missing=n.missing) for n in judgement.coverage.not_run
            ],
            not_applicable=list(judgement.coverage.not_applicable),
        ),
        verdict=Verdict(verdict),
        reason=reason,
    )


def _end(value: float) -> float | None:
    """An end of an interval; null when it is open. Rounded to what any sheet can mean."""
    return round(value, 6) if math.isfinite(value) else None


def _claim(claim: Claim) -> ClaimEntry:
    stated, normal = claim.stated, claim.normalized
    return ClaimEntry(
        id=claim.id,
        quantity=claim.quantity.value,
        statistic=claim.statistic.value if claim.statistic else None,
        plane=claim.plane.value if claim.plane else None,
        port=claim.port,
        polarization=claim.polarization,
        kind=claim.kind,
        band_mhz=claim.band_mhz,
        level_db=claim.level_db,
        condition=claim.condition,
        stated=StatedFigure(
            text=stated.text,
            low=stated.low,
            high=stated.high,
            relation=stated.relation.value,
            tolerance=stated.tolerance,
            unit=stated.unit,
        ),
        normalized=NormalizedFigure(
            low=_end(normal.low),
            high=_end(normal.high),
            nominal=round(normal.nominal, 6),
            unit=normal.unit,
            assumptions=list(normal.assumptions),
        ),
        evidence=[EvidencePlace(page=e.page, bbox=e.bbox, text=e.text) for e in claim.evidence],
        confidence=claim.confidence,
    )


def _finding(finding: Finding) -> FindingEntry:
    return FindingEntry(
        rule=finding.rule,
        severity=finding.severity.value,
        claims=list(finding.claims),
        margin_db=None if finding.margin_db is None else _end(finding.margin_db),
        bound=None if finding.bound is None else _bound(finding.bound),
        message=finding.message,
        question=finding.question,
        source=finding.source,
        formula=finding.formula,
        working=finding.working,
        assumption=finding.assumption,
        ruler=None if finding.ruler is None else _ruler(finding.ruler),
    )


def _bound(bound: Bound) -> BoundEntry:
    return BoundEntry(value=round(bound.value, 6), unit=bound.unit, name=bound.name)


def _ruler(ruler: Ruler) -> RulerEntry:
    return RulerEntry(
        unit=ruler.unit,
        zones=[
            ZoneEntry(low=_end(z.low), high=_end(z.high), standing=z.standing) for z in ruler.zones
        ],
        bound=_bound(ruler.bound),
        low=_end(ruler.low),
        high=_end(ruler.high),
        nominal=round(ruler.nominal, 6),
    )


def _planning(gain: PlanningGain) -> PlanningGainEntry:
    return PlanningGainEntry(
        low=round(gain.low, 2),
        high=round(gain.high, 2),
        nominal=round(gain.nominal, 2),
        unit="dBi",
        basis=list(gain.basis),
        shortfall_db=round(gain.shortfall_db, 2),
        range_factor=round(gain.range_factor, 4),
    )


def _unread(item: Unread) -> UnreadEntry:
    return UnreadEntry(
        text=item.text,
        reason=item.reason,
        page=item.page,
        bbox=item.bbox,
        quantity=item.quantity.value if item.quantity else None,
        antenna=item.antenna,
    )
