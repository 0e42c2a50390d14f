"""Planning gain: the interval that all the independent evidence on a sheet supports."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Support:
    """One piece of evidence on the gain: an interval in dBi and where it comes from, in words."""

    low: float
    high: float
    basis: str


@dataclass(frozen=True, slots=True)
class PlanningGain:
    """A defensible gain interval in dBi.

    ``shortfall_db`` is claimed nominal less planning nominal (0 where the claim holds);
    ``range_factor`` the free-space range left, 10^(-shortfall/20).
    """

    low: float
    high: float
    nominal: float
    basis: tuple[str, ...]
    shortfall_db: float
    range_factor: float
