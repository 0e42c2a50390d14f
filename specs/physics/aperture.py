"""Gain against the area and size of an aperture.

4πA/λ² belongs to a large, uniformly lit aperture and is no theorem: a small aperture can exceed
it a little at its edges. The ceilings below leave room for that.
"""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.constants import wavelength_m
from specs.physics.decibels import from_db, to_db
from specs.physics.elementwise import Real, elementwise


@elementwise
def uniform_aperture_dbi(area_wl2: Real) -> Real:
    """Directivity of a large uniform plane aperture, dBi: 4πA/λ², A in square wavelengths.

    Source: Silver, *Microwave Antenna Theory and Design* (1949). True apertures of 1 λ square
    reach 0.8 dB more, 20 λ by 2 λ 0.2 dB more (integrated).

    >>> round(uniform_aperture_dbi(11.1265), 2)
    21.46
    """
    return to_db(4 * np.pi * area_wl2)


@elementwise
def dish_efficiency(gain_dbi: Real, diameter_wl: Real) -> Real:
    """Aperture efficiency η = G/(πd/λ)² that a gain needs on a round aperture (1 = 100 %).

    Built dishes: 0.50 to 0.70, shaped dual reflectors up to 0.80 or 0.85 (Balanis; Stutzman &
    Thiele, from memory; 0.43 to 0.70 for 99 % of 3070 listed microwave dishes).

    >>> round(dish_efficiency(38.16, 33.356), 3)
    0.596
    """
    return from_db(gain_dbi) / np.square(np.pi * diameter_wl)


@elementwise
def dish_gain_dbi(diameter_wl: Real, efficiency: float = 1.0) -> Real:
    """Gain of a round aperture of this efficiency, dBi: η(πd/λ)².

    >>> round(dish_gain_dbi(33.356, 0.6), 2)
    38.19
    """
    return to_db(efficiency * np.square(np.pi * diameter_wl))


@elementwise
def dish_ceiling_dbi(diameter_wl: Real) -> Real:
    """Gain above which a dish is called impossible, dBi.

    The larger of the normal gain (ka)² + 2ka of the enclosing sphere (Harrington 1958) and
    4πA/λ² + 0.5 dB. Beyond it an antenna would have to be superdirective by design.

    >>> round(dish_ceiling_dbi(33.356), 2)
    40.91
    """
    ka = np.pi * diameter_wl
    return np.maximum(to_db(ka * ka + 2 * ka), to_db(ka * ka) + 0.5)


@elementwise
def panel_ceiling_dbi(area_wl2: Real, perimeter_wl: Real) -> Real:
    """Ceiling for a flat aperture without superdirectivity, dBi: 4πA/λ² + 2P/λ.

    Equals Harrington's (ka)² + 2ka for a disk; a heuristic that every integrated aperture of any
    taper lies below. Source: derived.

    >>> round(panel_ceiling_dbi(1.0, 4.0), 2)
    13.13
    """
    return to_db(4 * np.pi * area_wl2 + 2 * perimeter_wl)


@elementwise
def beamwidth_aperture_factor(width_deg: Real, length_wl: Real) -> Real:
    """θ·L/λ in degrees: 50.8 for a uniform line, 59 for a uniform disk, 65 to 85 with tapers.

    L is the length of the aperture in the plane of the beamwidth. Small-angle; use for widths up
    to about 90°. Source: Silver; Balanis, *Antenna Theory*, ch. 12 (integrated in the tests).

    >>> beamwidth_aperture_factor(2.1, 33.356)
    70.0476
    """
    return width_deg * length_wl


@elementwise
def effective_area_m2(gain_dbi: Real, frequency_mhz: Real) -> Real:
    """Effective area Gλ²/4π in square metres. Exact (IEEE Std 145).

    >>> round(effective_area_m2(0.0, 1000.0), 6)
    0.007152
    """
    return from_db(gain_dbi) * np.square(wavelength_m(frequency_mhz)) / (4 * np.pi)


@elementwise
def gain_from_effective_area_dbi(area_m2: Real, frequency_mhz: Real) -> Real:
    """Gain in dBi of an effective area in square metres. Exact (IEEE Std 145).

    >>> round(gain_from_effective_area_dbi(1.0, 1000.0), 2)
    21.46
    """
    return to_db(4 * np.pi * area_m2 / np.square(wavelength_m(frequency_mhz)))
