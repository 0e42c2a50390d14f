"""Linear units, through pint's own small registry.

The only module that imports pint. It sees units in the one spelling of ``spellings.toml`` and
numbers already read; no printed text and no decibel ever gets here. Quantities do not leave it.
"""

from __future__ import annotations

import math
from functools import cache
from typing import TYPE_CHECKING, Any

from specs.errors import IncompatibleUnits

if TYPE_CHECKING:
    from pint import UnitRegistry

# One line per linear unit: our spelling = definition in pint's language.
_DEFINITIONS = """
metre = [length]
second = [time]
watt = [power]
ohm_ = [impedance]
radian = []
Hz_ = 1 / second
kHz_ = 1e3 * Hz_
MHz_ = 1e6 * Hz_
GHz_ = 1e9 * Hz_
mm_ = 1e-3 * metre
cm_ = 1e-2 * metre
m_ = metre
in_ = 25.4e-3 * metre
ft_ = 0.3048 * metre
km_ = 1e3 * metre
m2_ = metre ** 2
cm2_ = 1e-4 * metre ** 2
ft2_ = 0.09290304 * metre ** 2
W_ = watt
mW_ = 1e-3 * watt
kW_ = 1e3 * watt
kohm_ = 1e3 * ohm_
rad_ = [angle]
"""


@cache
def _registry() -> UnitRegistry[Any]:
    # Imported here because pint costs a quarter of a second, and dBi, degrees and MHz need none.
    from pint import UnitRegistry

    registry: UnitRegistry[Any] = UnitRegistry(None)
    registry.load_definitions(_DEFINITIONS.strip().splitlines())
    registry.define(f"deg_ = {math.pi / 180!r} * rad_")
    return registry


@cache
def factor(unit: str, to: str) -> float:
    """The factor from one linear unit to another, both in our spelling.

    Raises ``IncompatibleUnits`` when they measure different things.

    >>> factor("GHz", "MHz"), round(factor("in", "mm"), 9)
    (1000.0, 25.4)
    """
    if unit == to:
        return 1.0
    try:
        magnitude = _registry().Quantity(1.0, f"{unit}_").to(f"{to}_").magnitude
    except Exception as error:  # pint raises several unrelated classes here
        raise IncompatibleUnits(f"{unit} cannot be converted to {to}.") from error
    # A dozen digits are more than any sheet prints; this removes 999.9999999999999.
    return float(f"{float(magnitude):.12g}")


def to_unit(value: float, unit: str, to: str) -> float:
    """A value in another linear unit.

    >>> to_unit(2.4, "GHz", "MHz")
    2400.0
    """
    return value * factor(unit, to)
