"""Exposure to radio fields in the far field: power density, distance, reference levels.

An estimate for a first look, not a finding of compliance: see ``CAUTION``.
"""

# mypy: no-warn-return-any
from __future__ import annotations

from dataclasses import dataclass
from typing import Final

import numpy as np

from specs.physics.elementwise import Real, elementwise

CAUTION: Final = (
    "S = PG/(4πR²) holds in the far field only, not closer than about 2D²/λ, and takes no account "
    "of reflections, of other transmitters or of averaging in time. Local rules and licensed "
    "practice decide."
)

GROUND_REFLECTION: Final = 4.0
"""Factor on the power density for a full reflection from the ground (2 on the distance). OET
Bulletin 65 also allows 2.56 (from memory)."""


@dataclass(frozen=True, slots=True)
class Level:
    """Reference level of power density from ``low_mhz`` to ``high_mhz``.

    ``scale``·f^``power`` in W/m², f in MHz.
    """

    low_mhz: float
    high_mhz: float
    scale: float
    power: float = 0.0


LEVELS: Final[dict[str, tuple[Level, ...]]] = {
    "FCC public": (
        Level(0.3, 1.34, 1000.0), Level(1.34, 30.0, 1800.0, -2.0), Level(30.0, 300.0, 2.0),
        Level(300.0, 1500.0, 1 / 150, 1.0), Level(1500.0, 100_000.0, 10.0),
    ),
    "FCC occupational": (
        Level(0.3, 3.0, 1000.0), Level(3.0, 30.0, 9000.0, -2.0), Level(30.0, 300.0, 10.0),
        Level(300.0, 1500.0, 1 / 30, 1.0), Level(1500.0, 100_000.0, 50.0),
    ),
    "ICNIRP 2020 public": (
        Level(30.0, 400.0, 2.0), Level(400.0, 2000.0, 1 / 200, 1.0), Level(2000.0, 300_000.0, 10.0),
    ),
    "ICNIRP 2020 occupational": (
        Level(30.0, 400.0, 10.0), Level(400.0, 2000.0, 1 / 40, 1.0), Level(2000.0, 300_000.0, 50.0),
    ),
}  # fmt: skip
"""Whole-body reference levels, W/m². Sources: 47 CFR 1.1310, Table 1 (averaged over 30 min public,
6 min occupational); ICNIRP, Health Phys. 118, 483–524, 2020 (these values from memory)."""


@elementwise
def power_density_w_per_m2(eirp_w: Real, distance_m: Real, reflection: float = 1.0) -> Real:
    """Far-field power density S = P·G/(4πR²) in W/m², EIRP in W, distance in m.

    >>> round(power_density_w_per_m2(100.0, 1.99), 2)
    2.01
    """
    return reflection * eirp_w / (4 * np.pi * np.square(distance_m))


@elementwise
def distance_m(eirp_w: Real, limit_w_per_m2: Real, reflection: float = 1.0) -> Real:
    """Distance at which the far-field estimate falls to a limit, m: √(P·G/(4πS)).

    >>> round(distance_m(100.0, 2.0), 2)
    1.99
    """
    return np.sqrt(reflection * eirp_w / (4 * np.pi * limit_w_per_m2))


@elementwise
def reference_level_w_per_m2(frequency_mhz: Real, code: str = "FCC public") -> Real:
    """Reference level at a frequency, W/m²; nan outside of the table.

    >>> round(reference_level_w_per_m2(915.0, code="FCC public"), 2)
    6.1
    """
    level = np.full(np.shape(frequency_mhz), np.nan)
    for part in LEVELS[code]:
        inside = (frequency_mhz >= part.low_mhz) & (frequency_mhz <= part.high_mhz)
        value = part.scale * np.power(frequency_mhz, part.power)
        level = np.where(inside & np.isnan(level), value, level)
    return level[()]  # type: ignore[return-value]


@elementwise
def far_field_distance_m(diameter_m: Real, wavelength_m: Real) -> Real:
    """Start of the far field, m: 2D²/λ, for an antenna larger than a wavelength (IEEE Std 145).

    >>> far_field_distance_m(1.0, 0.5)
    4.0
    """
    return 2.0 * np.square(diameter_m) / wavelength_m
