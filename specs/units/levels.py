"""Levels: decibels with their reference.

A dB figure of gain means nothing without its reference. Every reference here is an interval of
offsets to dBi, because some references leave a meaning open.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

from specs.errors import IncompatibleUnits

DIPOLE_OFFSET_DB = 2.15
"""dBi less dBd by convention. The exact half-wave dipole has 4/Cin(2π) = 1.6409, or 2.1509 dBi
(Balanis, Antenna Theory, ch. 4); the trade uses 2.15."""

CIRCULAR_OFFSET_DB = 10 * math.log10(2)
"""Total power of a circular wave above one linear component: 3.0103 dB."""


@dataclass(frozen=True, slots=True)
class Reference:
    """A level reference: the least and the most that it lies above dBi, and what is assumed."""

    low_db: float
    high_db: float
    assumption: str | None = None


REFERENCES: dict[str, Reference] = {
    "dBi": Reference(0.0, 0.0),
    "dBd": Reference(DIPOLE_OFFSET_DB, DIPOLE_OFFSET_DB),
    "dBic": Reference(0.0, 0.0, "dBic is total power against an isotropic circular source"),
    "dBil": Reference(
        0.0,
        CIRCULAR_OFFSET_DB,
        "dBil states one linear component; total gain is up to 3.01 dB more",
    ),
    "": Reference(
        0.0, DIPOLE_OFFSET_DB, "no unit printed: read as dB with the reference not stated"
    ),
    "dB": Reference(
        0.0, DIPOLE_OFFSET_DB, "reference not stated: dBi (isotropic) or dBd (half-wave dipole)"
    ),
}


def to_dbi(low: float, high: float, unit: str) -> tuple[float, float, float, tuple[str, ...]]:
    """A gain or directivity on the isotropic reference.

    ``low`` and ``high`` are the ends in ``unit``: a level, 'x' for a plain ratio, or '' when no
    unit is printed anywhere (read as decibels whose reference is open).
    Returns (low, high, nominal, assumptions) in dBi; the nominal takes the figure at the lower
    meaning of an open reference. Raises ``IncompatibleUnits`` for anything that is no gain (dBm).

    >>> to_dbi(16.0, 16.0, "dBd")[:3]
    (18.15, 18.15, 18.15)
    """
    if unit == "x":
        if low <= 0 or high <= 0:
            raise IncompatibleUnits("A gain as a plain ratio must be above zero.")
        low_db, high_db = 10 * math.log10(low), 10 * math.log10(high)
        return low_db, high_db, (low_db + high_db) / 2, ("read as a plain power ratio",)
    reference = REFERENCES.get(unit)
    if reference is None:
        raise IncompatibleUnits(
            f"{unit} is not a unit of gain.", "Gain is stated in dBi, dBd, dBic, dBil or dB."
        )
    nominal = (low + high) / 2 + reference.low_db
    notes = (reference.assumption,) if reference.assumption else ()
    return (
        round(low + reference.low_db, 9),
        round(high + reference.high_db, 9),
        round(nominal, 9),
        notes,
    )
