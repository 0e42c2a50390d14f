"""A whole pattern from its two principal cuts, by several published ways.

Two cuts do not determine a sphere. Each way below fills it in by a rule that is in use; the spread
of the directivities they give is an honest measure of what the cuts leave open.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from specs.physics.cuts import Cut, beamwidth_deg
from specs.physics.elementwise import Floats
from specs.physics.pattern import PatternError, SpherePattern, directivity_dbi, sphere_pattern

STEP_DEG = 2.0
"""Largest grid step of the filled-in sphere; finer cuts are sampled at their own step."""

FINEST_DEG = 0.5

FAN_RATIO = 2.0
"""Beams wider in one plane than this many times the other are fans, which the ways of
``FOR_ROUND_BEAMS`` fill from the wide cut: 3.5 dB too low for a sector column. Measured here."""


@dataclass(frozen=True, slots=True)
class CutDirectivity:
    """Directivity from two cuts, dBi: the range over the ways, their middle, and each by name."""

    low_dbi: float
    high_dbi: float
    nominal_dbi: float
    by_way: tuple[tuple[str, float], ...]


def directivity_from_cuts(azimuth: Cut, elevation: Cut) -> CutDirectivity:
    """Directivity of an antenna from its azimuth and elevation cuts, by every way in ``WAYS``.

    The azimuth cut must go all the way around. The elevation cut is 0° at the horizon in front and
    90° at the zenith, from −90 to 90 or all the way around. Raises ``PatternError`` otherwise.

    >>> import numpy as np
    >>> from specs.physics.cuts import cut
    >>> angle = np.arange(-180, 180, 5.0)
    >>> short_dipole = 20 * np.log10(np.maximum(np.abs(np.cos(np.radians(angle))), 1e-6))
    >>> found = directivity_from_cuts(cut(angle, 0 * angle), cut(angle, short_dipole))
    >>> round(found.nominal_dbi, 1)
    1.8
    """
    if not azimuth.closed:
        raise PatternError("The azimuth cut does not go all the way around.")
    if elevation.angle_deg[0] > -89.0 or elevation.angle_deg[-1] < 89.0:
        raise PatternError("The elevation cut does not run from −90 to 90°.")
    widths = sorted(beamwidth_deg(pattern) for pattern in (azimuth, elevation))
    alike = widths[1] < min(FAN_RATIO * widths[0], 180.0)
    found = tuple(
        (name, directivity_dbi(fill(azimuth, elevation, name)))
        for name in WAYS
        if alike or name not in FOR_ROUND_BEAMS
    )
    values = [value for _, value in found]
    low, high = min(values), max(values)
    return CutDirectivity(low, high, float(np.median(values)), found)


def fill(azimuth: Cut, elevation: Cut, way: str) -> SpherePattern:
    """The sphere filled in by one of ``WAYS``; levels relative to the peak.

    >>> import numpy as np
    >>> from specs.physics.cuts import cut
    >>> angle = np.arange(-180, 180, 10.0)
    >>> float(fill(cut(angle, 0 * angle), cut(angle, 0 * angle), "product").level_db.max())
    0.0
    """
    step = float(min(np.diff(azimuth.angle_deg).min(), np.diff(elevation.angle_deg).min()))
    step = 180.0 / round(180.0 / min(max(step, FINEST_DEG), STEP_DEG))
    theta = np.linspace(0.0, 180.0, round(180.0 / step) + 1)
    phi = np.arange(0.0, 360.0, step)
    level = WAYS[way](azimuth, elevation, 90.0 - theta[:, None], phi[None, :])
    return sphere_pattern(theta, phi, level)


def _relative(pattern: Cut, angle_deg: Floats) -> Floats:
    level: Floats = pattern.at(angle_deg) - float(pattern.level_db.max())
    return level


def _product(azimuth: Cut, elevation: Cut, up: Floats, around: Floats) -> Floats:
    return _relative(azimuth, around) + _relative(elevation, up)


def _limited(azimuth: Cut, elevation: Cut, up: Floats, around: Floats) -> Floats:
    """The sum of both, no lower than the lowest level of either cut."""
    floor = min(_lowest(azimuth), _lowest(elevation))
    level: Floats = np.maximum(_product(azimuth, elevation, up, around), floor)
    return level


def _lowest(pattern: Cut) -> float:
    return max(float(pattern.level_db.min() - pattern.level_db.max()), -60.0)


def _crosswise(azimuth: Cut, elevation: Cut, up: Floats, around: Floats) -> Floats:
    """Each cut weighted by how far the other has fallen; at the peak both agree."""
    a, e = _relative(azimuth, around), _relative(elevation, up)
    share_a, share_e = np.power(10.0, a / 10), np.power(10.0, e / 10)
    weight_a, weight_e = share_e * (1 - share_a), share_a * (1 - share_e)
    norm = np.hypot(weight_a, weight_e)
    safe = np.where(norm > 1e-12, norm, 1.0)
    blended = (a * weight_a + e * weight_e) / safe
    level: Floats = np.where(norm > 1e-12, np.minimum(blended, 0.0), a + e)
    return level


def _polar(azimuth: Cut, elevation: Cut, up: Floats, around: Floats) -> Floats:
    """Around the beam axis, from one cut to the other by the square of the bearing's cosine.

    Each of the four half-cuts serves its own side.
    """
    peak_up, peak_around = np.radians(elevation.peak_deg), azimuth.peak_deg
    rise, turn = np.radians(up), np.radians(around - peak_around)
    x, y, z = np.cos(rise) * np.cos(turn), np.cos(rise) * np.sin(turn), np.sin(rise) + 0 * turn
    ahead = x * np.cos(peak_up) + z * np.sin(peak_up)
    above = z * np.cos(peak_up) - x * np.sin(peak_up)
    away = np.degrees(np.arccos(np.clip(ahead, -1.0, 1.0)))
    across = np.hypot(y, above)
    share = np.where(across > 1e-9, np.square(y) / np.maximum(np.square(across), 1e-18), 0.5)
    side = _relative(azimuth, peak_around + np.sign(y) * away)
    along = elevation.peak_deg + np.where(above < 0, -away, away)
    if not elevation.closed:
        # Without a back half, the far side repeats what the azimuth cut says of it.
        back = np.abs(along) > 90.0
        rising = np.where(back, side, _relative(elevation, np.clip(along, -90.0, 90.0)))
    else:
        rising = _relative(elevation, along)
    level: Floats = share * side + (1 - share) * rising
    return level


WAYS: dict[str, Callable[[Cut, Cut, Floats, Floats], Floats]] = {
    "product": _product,
    "limited product": _limited,
    "crosswise": _crosswise,
    "polar": _polar,
}
"""Name -> rule. *product*: levels add (Rec. ITU-R F.1336 and most planning tools). *limited
product*: the same with a floor (3GPP TR 36.814, TR 38.901). *crosswise*: Vasiliadis, Dimitriou &
Sergiadis, IEEE Trans. AP-53(7), 2212–2219, 2005. *polar*: by angle from the beam, as in Gil et
al., IEEE Antennas Propag. Mag. 43(2), 132–142, 2001. All from memory, in our own form."""

FOR_ROUND_BEAMS = frozenset({"polar"})
"""Ways that suit beams of about equal width in both planes."""
