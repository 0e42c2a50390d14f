"""Two figures that must agree: the gap between their intervals, and its standing."""

from __future__ import annotations

import math

from specs.claims import Claim
from specs.rules.finding import Bound
from specs.rules.rule import Conflict
from specs.rules.tiers import Tiers, difference_tiers, interval_gap, standing
from specs.rules.words import figure

LEVEL_TIERS: Tiers = difference_tiers(0.3, 0.7, 1.5)
"""Tiers of levels that an identity ties together: 0.3 dB ordinary, 0.7 note, 1.5 doubtful."""

LEVEL_TIERS_IN_WORDS = (
    ("≤ 0.3 dB apart", "ordinary"), ("≤ 0.7", "note"), ("≤ 1.5", "doubtful"),
    ("more", "implausible"),
)  # fmt: skip


def disagreement(
    claims: tuple[Claim, ...],
    claimed: Claim,
    expected: tuple[float, float],
    because: str,
    question: str,
    working: str,
    tiers: Tiers = LEVEL_TIERS,
) -> Conflict | None:
    """The conflict of a claim with the interval that other claims give it; None if they agree.

    The gap is taken between the nearest ends of the two intervals, so rounding and tolerance
    never make a conflict.
    """
    normal = claimed.normalized
    gap = interval_gap((normal.low, normal.high), expected)
    severity = standing(gap, tiers)
    if severity is None or math.isinf(gap):
        return None
    middle = (expected[0] + expected[1]) / 2
    return Conflict(
        severity=severity,
        claims=tuple(dict.fromkeys(c.id for c in claims)),
        message=(
            f"{because} Together they give {figure(middle, normal.unit)} where the sheet states "
            f"{figure(normal.nominal, normal.unit)}; the two are {figure(gap, 'dB')} apart after "
            "rounding."
        ),
        question=question,
        working=working,
        margin_db=gap,
        bound=Bound(middle, normal.unit, "from the other figures"),
    )
