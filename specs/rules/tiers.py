"""Tiers: which measure has which standing, and the ruler drawn from them."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence

from specs.claims import Claim
from specs.rules.finding import Bound, Ruler, Severity, Zone

Tiers = Sequence[tuple[float, Severity | None]]
"""(limit, standing) in rising order: up to ``limit`` the measure has this standing (None is
ordinary). The last limit is infinite."""

_ORDER = [None, *Severity]


def standing(measure: float, tiers: Tiers) -> Severity | None:
    """The standing of a measure; None when it is ordinary (or not a number)."""
    if math.isnan(measure):
        return None
    return next(severity for limit, severity in tiers if measure <= limit)


def softened(severity: Severity | None, steps: int) -> Severity | None:
    """A severity some steps lower; never below a note once there is a finding at all."""
    if severity is None or steps == 0:
        return severity
    scale = [Severity.NOTE, Severity.DOUBTFUL, Severity.IMPLAUSIBLE, Severity.IMPOSSIBLE]
    if severity not in scale:
        return severity
    return scale[max(scale.index(severity) - steps, 0)]


def ruler(
    claim: Claim, tiers: Tiers, to_claim_unit: Callable[[float], float], bound: Bound
) -> Ruler:
    """The margin ruler of a claim: the tiers carried to the unit of the claim."""
    zones: list[Zone] = []
    low = -math.inf
    for limit, severity in tiers:
        high = to_claim_unit(limit) if math.isfinite(limit) else math.inf
        zones.append(Zone(low, high, severity.value if severity else "ordinary"))
        low = high
    normal = claim.normalized
    return Ruler(normal.unit, tuple(zones), bound, normal.low, normal.high, normal.nominal)


def above(level_dbi: float) -> Callable[[float], float]:
    """The scale of tiers in dB above a level: a tier limit becomes a level in dBi."""
    return lambda excess_db: level_dbi + excess_db


def difference_tiers(
    note: float, doubtful: float, implausible: float, last: Severity = Severity.IMPLAUSIBLE
) -> Tiers:
    """Tiers of a difference: ordinary up to ``note``, a note up to ``doubtful``, and so on."""
    return (
        (note, None),
        (doubtful, Severity.NOTE),
        (implausible, Severity.DOUBTFUL),
        (math.inf, last),
    )


def interval_gap(a: tuple[float, float], b: tuple[float, float]) -> float:
    """The least difference between two intervals: 0 when they meet."""
    return max(a[0] - b[1], b[0] - a[1], 0.0)
