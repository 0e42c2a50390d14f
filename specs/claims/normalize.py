"""A stated figure on the one reference of its quantity, as an interval.

The interval spans the printed digits, the stated tolerance, the relation and every meaning that
the sheet leaves open. Rules compare intervals and need no tolerance of their own.
"""

from __future__ import annotations

import math
from collections.abc import Callable

from specs.claims.claim import Normalized, Stated
from specs.claims.quantity import UNIT_OF, Quantity, Statistic
from specs.errors import IncompatibleUnits
from specs.units.figures import Figure, Relation
from specs.units.levels import to_dbi
from specs.units.linear import factor
from specs.units.spellings import measures

_FOREVER = math.inf

DEFAULT_UNIT: dict[Quantity, str] = {
    Quantity.BEAMWIDTH: "deg",
    Quantity.ELECTRICAL_TILT: "deg",
    Quantity.RETURN_LOSS: "dB",
    Quantity.FRONT_TO_BACK: "dB",
    Quantity.SIDELOBE_LEVEL: "dB",
    Quantity.CROSS_POLAR_DISCRIMINATION: "dB",
    Quantity.AXIAL_RATIO: "dB",
    Quantity.ISOLATION: "dB",
    Quantity.IMPEDANCE: "ohm",
    Quantity.POWER: "W",
    Quantity.EFFICIENCY: "%",
}
"""Units that go without saying for a quantity. A gain, a frequency or a size has none."""

_MEASURES: dict[Quantity, frozenset[str]] = {
    Quantity.BEAMWIDTH: frozenset({"angle"}),
    Quantity.ELECTRICAL_TILT: frozenset({"angle"}),
    Quantity.FREQUENCY: frozenset({"frequency"}),
    Quantity.BANDWIDTH: frozenset({"frequency"}),
    Quantity.SIZE: frozenset({"length"}),
    Quantity.POWER: frozenset({"power"}),
    Quantity.IMPEDANCE: frozenset({"impedance"}),
    Quantity.EFFECTIVE_AREA: frozenset({"area"}),
}


def stated_from(figure: Figure, unit: str | None = None) -> Stated:
    """The stated part of a claim, from a figure read; ``unit`` overrides a missing one."""
    return Stated(
        text=figure.text,
        low=figure.low,
        high=figure.high,
        relation=figure.relation,
        tolerance=figure.tolerance,
        unit=figure.unit or unit or "",
        half_step=figure.half_step,
    )


def normalize(quantity: Quantity, stated: Stated, statistic: Statistic | None = None) -> Normalized:
    """A stated figure in the unit of its quantity (``UNIT_OF``).

    A minimum is read as 'at least' and a maximum as 'at most' for quantities that are guaranteed
    (VSWR, return loss); a maximum gain is the peak and stays a figure.
    Raises ``IncompatibleUnits`` when the unit cannot state the quantity (a gain in dBm).
    """
    if quantity is Quantity.POLARIZATION:
        return Normalized(0.0, 0.0, 0.0, "")
    to_reference = _reference(quantity, stated.unit)
    margin = stated.half_step if stated.tolerance is None else stated.tolerance
    low, _, nominal, notes = to_reference(stated.low, stated.high)
    lowest, _, _, _ = to_reference(stated.low - margin, stated.high)
    _, highest, _, _ = to_reference(stated.low, stated.high + margin)
    relation = _guarantee(quantity, stated.relation, statistic)
    floor, ceiling = _LIMITS.get(quantity, (-_FOREVER, _FOREVER))
    if quantity in _LEVELS and relation is Relation.AT_MOST:
        # 'Up to 9 dBi' promises that 9 is reached somewhere: the claim is the peak.
        notes = (*notes, "'up to' is read as the peak")
    elif relation is Relation.AT_LEAST:
        highest = max(highest, ceiling)
    elif relation is Relation.AT_MOST:
        lowest = min(lowest, floor)
    if quantity is Quantity.VSWR and low >= 1.0:
        lowest = max(lowest, 1.0)
    return Normalized(lowest, highest, nominal, UNIT_OF[quantity], notes)


_LEVELS = frozenset({Quantity.GAIN, Quantity.DIRECTIVITY})

_LIMITS: dict[Quantity, tuple[float, float]] = {
    Quantity.VSWR: (1.0, _FOREVER),
    Quantity.EFFICIENCY: (0.0, 100.0),
    Quantity.BEAMWIDTH: (0.0, 360.0),
    Quantity.AXIAL_RATIO: (0.0, _FOREVER),
    Quantity.POWER: (0.0, _FOREVER),
    Quantity.SIZE: (0.0, _FOREVER),
    Quantity.FREQUENCY: (0.0, _FOREVER),
}

_GUARANTEED = frozenset(
    {Quantity.VSWR, Quantity.RETURN_LOSS, Quantity.AXIAL_RATIO, Quantity.ISOLATION,
     Quantity.FRONT_TO_BACK, Quantity.CROSS_POLAR_DISCRIMINATION, Quantity.POWER,
     Quantity.SIDELOBE_LEVEL}
)  # fmt: skip


def _guarantee(quantity: Quantity, relation: Relation, statistic: Statistic | None) -> Relation:
    if relation is Relation.EQUAL:
        if statistic is Statistic.MINIMUM:
            return Relation.AT_LEAST
        if statistic is Statistic.MAXIMUM and quantity in _GUARANTEED:
            return Relation.AT_MOST
    return relation


_Ends = tuple[float, float, float, tuple[str, ...]]


def _reference(quantity: Quantity, unit: str) -> Callable[[float, float], _Ends]:
    """The function that puts (low, high) as printed on the reference of the quantity."""
    unit = unit or DEFAULT_UNIT.get(quantity, "")
    if quantity in _LEVELS:
        return lambda low, high: to_dbi(low, high, unit)
    if quantity is Quantity.EFFICIENCY:
        return _efficiency(unit)
    if quantity in _MEASURES:
        if measures(unit) not in _MEASURES[quantity]:
            raise IncompatibleUnits(f"A {quantity.value} is not stated in '{unit}'.")
        return _scaled(factor(unit, UNIT_OF[quantity]))
    if unit != UNIT_OF[quantity] and not (quantity is Quantity.VSWR and unit == "V"):
        raise IncompatibleUnits(f"A {quantity.value.replace('_', ' ')} is not stated in '{unit}'.")
    return _scaled(1.0)


def _scaled(ratio: float) -> Callable[[float, float], _Ends]:
    return lambda low, high: (
        float(f"{low * ratio:.12g}"),
        float(f"{high * ratio:.12g}"),
        float(f"{(low + high) / 2 * ratio:.12g}"),
        (),
    )


def _efficiency(unit: str) -> Callable[[float, float], _Ends]:
    if unit == "%":
        return _scaled(1.0)
    if unit == "dB":
        return lambda low, high: (
            100 * 10 ** (low / 10),
            100 * 10 ** (high / 10),
            100 * 10 ** ((low + high) / 20),
            ("efficiency in dB is 10 log10 of the ratio",),
        )
    raise IncompatibleUnits(f"An efficiency is not stated in '{unit}'.")
