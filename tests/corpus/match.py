"""When a claim that was read equals a fact that is true.

Level 1: quantity, value and unit family. Level 2: also band and plane. Level 3: also antenna.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Any

from fixtures.forge.truth import MAIN, Band, Fact, Trap

_TO_MHZ = {"Hz": 1e-6, "kHz": 1e-3, "MHz": 1.0, "GHz": 1e3}
_LEVELS = frozenset({"dBi", "dBd", "dBic", "dB"})


@dataclass(frozen=True, slots=True)
class Got:
    """A claim of the product in the scorer's terms."""

    quantity: str
    low: float
    high: float
    unit: str
    tolerance: float | None
    band: Band | None
    plane: str | None
    statistic: str | None
    relation: str
    antenna: str
    text: str
    confidence: float

    @property
    def value(self) -> tuple[str, float, float, str]:
        """What level 1 counts once."""
        return (self.quantity, round(self.low, 3), round(self.high, 3), self.unit)


def got(sheet: Any) -> list[Got]:
    """The main claims of a ``specs.claims.Sheet``."""
    out = []
    for antenna in sheet.antennas:
        for c in antenna.claims:
            if str(c.quantity) not in MAIN:
                continue
            s = c.stated
            k = _TO_MHZ.get(s.unit, 1.0) if str(c.quantity) == "frequency" else 1.0
            unit = "MHz" if s.unit in _TO_MHZ else s.unit
            out.append(
                Got(
                    str(c.quantity), s.low * k, s.high * k, unit,
                    None if s.tolerance is None else s.tolerance * k,
                    c.band_mhz, None if c.plane is None else str(c.plane),
                    None if c.statistic is None else str(c.statistic), str(s.relation),
                    antenna.label, c.evidence[0].text if c.evidence else s.text, c.confidence,
                )
            )  # fmt: skip
    return out


def _near(a: float, b: float) -> bool:
    return abs(a - b) <= max(0.0051, 2e-4 * abs(b))


def _unit_fits(quantity: str, printed: str, true: str) -> bool:
    if printed in _LEVELS or true in _LEVELS:
        return printed == true
    if quantity in ("vswr", "beamwidth", "efficiency"):
        return printed in (true, "")
    return printed == true


def same_value(g: Got, f: Fact | Trap) -> bool:
    """Level 1."""
    if g.quantity != f.quantity or not _unit_fits(g.quantity, g.unit, f.unit):
        return False
    ends = [(g.low, g.high)]
    if g.tolerance and g.quantity == "frequency":
        ends.append((g.low - g.tolerance, g.high + g.tolerance))
    return any(_near(a, f.low) and _near(b, f.high) for a, b in ends)


def same_band(g: Got, f: Fact) -> bool:
    """The band is right; a single band, or the union of all, need not be said."""
    if f.quantity == "frequency":
        return True
    union = (min(b[0] for b in f.bands), max(b[1] for b in f.bands)) if f.bands else None
    if f.band_mhz is None:
        return g.band is None or (union is not None and _band_near(g.band, union))
    if g.band is None:
        return len(f.bands) <= 1
    return _band_near(g.band, f.band_mhz)


def _band_near(a: Band, b: Band) -> bool:
    return all(abs(x - y) <= 1e-3 * abs(y) + 1e-9 for x, y in zip(a, b, strict=True))


def same_antenna(g: Got, f: Fact) -> bool:
    """The antenna is right: its name is the true one, or part of it, or holds it."""
    if f.antenna is None:
        return True
    a, b = (re.sub(r"[\W_]+", "", x.lower()) for x in (g.antenna, f.antenna))
    return bool(a) and (a in b or b in a)


def same(g: Got, f: Fact, level: int) -> bool:
    """The claim equals the fact at a level."""
    if not same_value(g, f):
        return False
    if level >= 2 and not (same_band(g, f) and g.plane == f.plane):
        return False
    return level < 3 or same_antenna(g, f)
