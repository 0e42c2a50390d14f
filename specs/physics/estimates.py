"""Published estimates of gain from beamwidth, and of beamwidth from gain or size.

Context for a reader, never a limit: Kraus' 41 253 is exceeded by honest antennas (cos θ over a
half space reaches 57 600 square degrees). Each formula has a range, and is wrong outside of it.
"""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.decibels import from_db, to_db
from specs.physics.elementwise import Real, elementwise

KRAUS_DEG2 = 4 * np.pi * (180 / np.pi) ** 2
"""41 253 square degrees in a sphere."""

GAUSSIAN_DEG2 = 16 * np.log(2) * (180 / np.pi) ** 2
"""36 407: a narrow Gaussian beam without sidelobes. Derived."""

PRACTICAL_DEG2 = (26_000.0, 32_400.0)
"""Practical antennas with their losses (Stutzman & Thiele) to large lossless arrays (Elliott
1963; Balanis ch. 6). From memory."""

F1336_OMNI_RANGE_DBI = (8.0, 13.0)
"""Gains for which Rec. ITU-R F.1336 calls its omnidirectional beamwidth validated."""


@elementwise
def kraus_dbi(width1_deg: Real, width2_deg: Real) -> Real:
    """Directivity 41 253/(θ1θ2), dBi: one flat lobe and nothing else.

    Source: Kraus, *Antennas* (1950); from memory.

    >>> round(kraus_dbi(10.0, 10.0), 2)
    26.15
    """
    return to_db(KRAUS_DEG2 / (width1_deg * width2_deg))


@elementwise
def gaussian_dbi(width1_deg: Real, width2_deg: Real) -> Real:
    """Directivity 36 407/(θ1θ2), dBi, of a narrow Gaussian beam without sidelobes. Derived.

    >>> round(gaussian_dbi(10.0, 10.0), 2)
    25.61
    """
    return to_db(GAUSSIAN_DEG2 / (width1_deg * width2_deg))


@elementwise
def tai_pereira_dbi(width1_deg: Real, width2_deg: Real) -> Real:
    """Directivity 72 815/(θ1² + θ2²), dBi. Of no use when one width is over twice the other.

    Source: Tai & Pereira, IEEE Trans. AP-24(2), 235–236, 1976; from memory.

    >>> round(tai_pereira_dbi(10.0, 10.0), 2)
    25.61
    """
    return to_db(2 * GAUSSIAN_DEG2 / (np.square(width1_deg) + np.square(width2_deg)))


@elementwise
def practical_low_dbi(width1_deg: Real, width2_deg: Real) -> Real:
    """Gain 26 000/(θ1θ2), dBi: practical antennas with their losses (Stutzman & Thiele).

    >>> round(practical_low_dbi(10.0, 10.0), 2)
    24.15
    """
    return to_db(PRACTICAL_DEG2[0] / (width1_deg * width2_deg))


@elementwise
def practical_high_dbi(width1_deg: Real, width2_deg: Real) -> Real:
    """Gain 32 400/(θ1θ2), dBi: large planar arrays (Elliott 1963).

    >>> round(practical_high_dbi(10.0, 10.0), 2)
    25.11
    """
    return to_db(PRACTICAL_DEG2[1] / (width1_deg * width2_deg))


@elementwise
def mcdonald_dbi(vertical_deg: Real) -> Real:
    """Directivity 101.5/(θ − 0.00272θ²), dBi, of an omni with the sidelobes of a uniform stack.

    Within 0.06 dB of integrated uniform stacks with elements up to 0.7 λ apart.
    Source: McDonald, IEEE Trans. AP-26(2), 340–341, 1978; constants from memory.

    >>> round(mcdonald_dbi(10.0), 2)
    10.18
    """
    return to_db(101.5 / (vertical_deg - 0.00272 * np.square(vertical_deg)))


@elementwise
def pozar_dbi(vertical_deg: Real) -> Real:
    """Directivity −172.4 + 191·√(0.818 + 1/θ), dBi, of an omni without sidelobes; 5° to 100°.

    Within 0.21 dB of integrated sinⁿ patterns from 6° to 90°.
    Source: Pozar, IEEE Antennas Propag. Mag. 35(5), 50–51, 1993; constants from memory.

    >>> round(pozar_dbi(30.0), 2)
    5.83
    """
    return to_db(-172.4 + 191.0 * np.sqrt(0.818 + 1.0 / vertical_deg))


@elementwise
def f1336_omni_beamwidth_deg(gain_dbi: Real) -> Real:
    """Vertical beamwidth 107.6·10^(−0.1·G0) of an omni, degrees; validated for 8 to 13 dBi.

    Source: Rec. ITU-R F.1336-5, recommends 2.

    >>> round(f1336_omni_beamwidth_deg(10.0), 2)
    10.76
    """
    return 107.6 / from_db(gain_dbi)


@elementwise
def f1336_omni_gain_dbi(vertical_deg: Real) -> Real:
    """The inverse of ``f1336_omni_beamwidth_deg``, dBi.

    >>> round(f1336_omni_gain_dbi(10.76), 2)
    10.0
    """
    return to_db(107.6 / vertical_deg)


@elementwise
def f1336_sector_elevation_deg(gain_dbi: Real, azimuth_deg: Real) -> Real:
    """Elevation beamwidth 31 000·10^(−0.1·G0)/φs of a sector antenna, degrees; φs up to 120°.

    Source: Rec. ITU-R F.1336-5, recommends 3.

    >>> round(f1336_sector_elevation_deg(16.0, 65.0), 2)
    11.98
    """
    return 31_000.0 / (from_db(gain_dbi) * azimuth_deg)


@elementwise
def f1336_low_gain_beamwidth_deg(gain_dbi: Real) -> Real:
    """Beamwidth √(27 000·10^(−0.1·G0)) of a round low-gain beam, degrees; under about 20 dBi.

    Source: Rec. ITU-R F.1336-5, recommends 4.1, NOTE 7; 1 to 3 GHz.

    >>> round(f1336_low_gain_beamwidth_deg(10.0), 1)
    52.0
    """
    return np.sqrt(27_000.0 / from_db(gain_dbi))


@elementwise
def f699_dish_gain_dbi(diameter_wl: Real) -> Real:
    """Gain 20·log10(D/λ) + 7.7 of a fixed-service dish, dBi (59.7 % of 4πA/λ²).

    Source: Rec. ITU-R F.699, recommends 3.

    >>> round(f699_dish_gain_dbi(33.356), 2)
    38.16
    """
    return 20 * np.log10(diameter_wl) + 7.7


@elementwise
def f699_dish_beamwidth_deg(diameter_wl: Real) -> Real:
    """Beamwidth 70·λ/D of a fixed-service dish, degrees.

    Source: Rec. ITU-R F.699, recommends 4.

    >>> round(f699_dish_beamwidth_deg(33.356), 2)
    2.1
    """
    return 70.0 / diameter_wl


@elementwise
def f699_gain_from_beamwidth_dbi(width_deg: Real) -> Real:
    """Gain 44.5 − 20·log10 θ of a fixed-service dish, dBi.

    Source: Rec. ITU-R F.699, recommends 4.

    >>> f699_gain_from_beamwidth_dbi(1.0)
    44.5
    """
    return 44.5 - 20 * np.log10(width_deg)


@elementwise
def gaussian_width_deg(width_deg: Real, level_db: Real) -> Real:
    """Half-power width of a Gaussian lobe that is ``width_deg`` wide ``level_db`` below its peak.

    The level falls with the square of the angle, so θ3 = θ·√(3.0103/level). From −10 dB the factor
    is √0.301 = 0.549. An assumption about the lobe, not an identity. Source: derived.

    >>> round(gaussian_width_deg(55.0, 10.0), 1)
    30.2
    """
    return width_deg * np.sqrt(to_db(2.0) / level_db)
