"""The report: the JSON contract ``beamproof.report/1`` as models.

Names are fixed; more may be added. An open end of an interval (a one-sided claim) is null.
"""

from __future__ import annotations

from enum import StrEnum
from typing import Annotated, Literal

from pydantic import BaseModel, ConfigDict, Field, StringConstraints

SCHEMA = "beamproof.report/1"

BBox = tuple[float, float, float, float]
Sha256 = Annotated[str, StringConstraints(pattern=r"^[0-9a-f]{64}$")]
Severity = Literal["note", "unclear", "doubtful", "implausible", "impossible"]


class Verdict(StrEnum):
    """What the purchasing workflow may do.

    ``release``: checked, nothing above a note. ``query``: ask the vendor first. ``hold``: do not
    order on these figures.
    """

    RELEASE = "release"
    QUERY = "query"
    HOLD = "hold"


class _Model(BaseModel):
    model_config = ConfigDict(frozen=True, extra="forbid", allow_inf_nan=False)


class SheetInfo(_Model):
    """The document that was read."""

    name: str
    sha256: Sha256
    media_type: str
    pages: int
    language: str | None
    read_by: Literal["text", "ocr", "given"]


class EvidencePlace(_Model):
    """Where a claim was read: page from 1 (0 for given claims), box in points, verbatim text."""

    page: int
    bbox: BBox
    text: str


class StatedFigure(_Model):
    """The figure as printed, in the unit as printed."""

    text: str
    low: float
    high: float
    relation: Literal["equal", "at_least", "at_most", "range"]
    tolerance: float | None
    unit: str


class NormalizedFigure(_Model):
    """The figure on the one reference of its quantity; a null end is open."""

    low: float | None
    high: float | None
    nominal: float
    unit: str
    assumptions: list[str]


class ClaimEntry(_Model):
    """One claim."""

    id: str
    quantity: str
    statistic: Literal["peak", "typical", "minimum", "maximum", "average", "nominal"] | None
    plane: Literal["azimuth", "elevation", "E", "H"] | None
    port: str | None
    polarization: str | None
    kind: str | None
    band_mhz: tuple[float, float] | None
    level_db: float | None
    condition: str | None
    stated: StatedFigure
    normalized: NormalizedFigure
    evidence: list[EvidencePlace]
    confidence: float


class BoundEntry(_Model):
    """The limit a claim was held against."""

    value: float
    unit: str
    name: str


class ZoneEntry(_Model):
    """A stretch of the margin ruler; null ends are open."""

    low: float | None
    high: float | None
    standing: str


class RulerEntry(_Model):
    """The margin ruler: zones, bound, and the claim's interval (null ends are open)."""

    unit: str
    zones: list[ZoneEntry]
    bound: BoundEntry
    low: float | None
    high: float | None
    nominal: float


class FindingEntry(_Model):
    """What a rule says."""

    rule: str
    severity: Severity
    claims: list[str]
    margin_db: float | None
    bound: BoundEntry | None
    message: str
    question: str
    source: str
    formula: str
    working: str
    assumption: str
    ruler: RulerEntry | None


class PlanningGainEntry(_Model):
    """The gain to plan a link with, and what a shortfall costs."""

    low: float
    high: float
    nominal: float
    unit: Literal["dBi"]
    basis: list[str]
    shortfall_db: float
    range_factor: float


class NotRunEntry(_Model):
    """A rule that could not run, and the figure it lacked."""

    rule: str
    missing: str


class CoverageEntry(_Model):
    """Which rules judged the antenna. 'No finding' and 'not checked' never look alike."""

    ran: list[str]
    not_run: list[NotRunEntry]
    not_applicable: list[str]


class AntennaEntry(_Model):
    """One antenna with its claims and what the rules say of them."""

    label: str
    type: str | None
    type_inferred: bool
    traits: list[str]
    claims: list[ClaimEntry]
    headline: list[ClaimEntry]
    findings: list[FindingEntry]
    planning_gain: PlanningGainEntry | None
    coverage: CoverageEntry
    verdict: Verdict
    reason: str


class UnreadEntry(_Model):
    """Text that looked like a claim and was not used as one."""

    text: str
    reason: str
    page: int
    bbox: BBox
    quantity: str | None
    antenna: str | None


class RuleFailureEntry(_Model):
    """A rule that crashed, beside the findings."""

    rule: str
    antenna: str
    error: str


class Tool(_Model):
    """What made the report."""

    version: str
    rules_version: str


class Report(_Model):
    """A judged sheet."""

    model_config = ConfigDict(
        frozen=True, extra="forbid", allow_inf_nan=False, populate_by_name=True
    )

    # 'schema' is a name that pydantic keeps for itself, so it is an alias here.
    schema_: Literal["beamproof.report/1"] = Field(default="beamproof.report/1", alias="schema")
    sheet: SheetInfo
    antennas: list[AntennaEntry]
    findings: list[FindingEntry]
    rule_failures: list[RuleFailureEntry]
    unread: list[UnreadEntry]
    notes: list[str]
    cautions: list[str]
    verdict: Verdict
    reason: str
    tool: Tool
