"""What a rule says of a claim: severity, margin, words, and the picture of the margin."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum


class Severity(StrEnum):
    """How bad it is, in the order of ``RANK``."""

    NOTE = "note"
    UNCLEAR = "unclear"
    DOUBTFUL = "doubtful"
    IMPLAUSIBLE = "implausible"
    IMPOSSIBLE = "impossible"

    @property
    def rank(self) -> int:
        """0 for a note to 4 for impossible."""
        return list(Severity).index(self)


@dataclass(frozen=True, slots=True)
class Bound:
    """The limit a claim was held against: value, unit and its name in words."""

    value: float
    unit: str
    name: str


@dataclass(frozen=True, slots=True)
class Zone:
    """A stretch of the ruler: from ``low`` to ``high`` a claim has this standing.

    ``standing`` is ``ordinary`` or a severity. Ends may be infinite.
    """

    low: float
    high: float
    standing: str


@dataclass(frozen=True, slots=True)
class Ruler:
    """The margin ruler: one scale with zones, the bound and the claim's interval on it."""

    unit: str
    zones: tuple[Zone, ...]
    bound: Bound
    low: float
    high: float
    nominal: float


@dataclass(frozen=True, slots=True)
class Finding:
    """A claim, or a set of claims, that offends a rule.

    ``margin_db`` is the distance from the most favourable corner of the claim to the bound in dB
    (None where the finding is not in dB); ``working`` the formula with the numbers put in;
    ``assumption`` what would save the claim.
    """

    rule: str
    severity: Severity
    claims: tuple[str, ...]
    message: str
    question: str
    source: str
    formula: str = ""
    working: str = ""
    assumption: str = ""
    margin_db: float | None = None
    bound: Bound | None = None
    ruler: Ruler | None = None


@dataclass(frozen=True, slots=True)
class NotRun:
    """A rule that could not judge an antenna, and the figure it lacked, in words."""

    rule: str
    missing: str


@dataclass(frozen=True, slots=True)
class Coverage:
    """Which rules judged an antenna, which could not, which do not apply to its type."""

    ran: tuple[str, ...]
    not_run: tuple[NotRun, ...]
    not_applicable: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class RuleFailure:
    """A rule that crashed: reported beside the findings, never among them."""

    rule: str
    antenna: str
    error: str


@dataclass(frozen=True, slots=True)
class Judgement:
    """All that the rules say of one antenna."""

    antenna: str
    findings: tuple[Finding, ...]
    coverage: Coverage
    failures: tuple[RuleFailure, ...] = ()
