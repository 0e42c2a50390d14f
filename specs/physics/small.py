"""Gain and bandwidth of antennas against the sphere that encloses them.

``ka`` is 2π times the radius of that sphere in wavelengths. An antenna bolted to a board, a case
or a vehicle radiates from the whole structure: there the limits of the antenna alone bind nothing.
"""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.decibels import to_db
from specs.physics.elementwise import Real, elementwise


@elementwise
def ka_of_radius(radius_wl: Real) -> Real:
    """Electrical size ka = 2πa/λ of a sphere of radius a.

    >>> round(ka_of_radius(0.0795775), 4)
    0.5
    """
    return 2 * np.pi * radius_wl


@elementwise
def enclosing_radius(length: Real, width: Real, height: Real) -> Real:
    """Radius of the sphere around a box, in the unit of its sides (0 for a side that is none).

    >>> enclosing_radius(3.0, 4.0, 0.0)
    2.5
    """
    return np.sqrt(np.square(length) + np.square(width) + np.square(height)) / 2


@elementwise
def normal_gain_dbi(ka: Real) -> Real:
    """Largest gain without superdirectivity, dBi: max[3, (ka)² + 2ka].

    N² + 2N for all spherical modes up to N = ka; 3 for the crossed electric and magnetic dipole
    that any size allows. Source: Harrington, IRE Trans. AP-6, 219–225, 1958, as quoted in IEEE
    Antennas Propag. Mag. 51(4), 57, 2009; N² + 2N integrated in the tests.

    >>> round(normal_gain_dbi(2.0), 2), round(normal_gain_dbi(0.3), 2)
    (9.03, 4.77)
    """
    return to_db(np.maximum(3.0, np.square(ka) + 2 * ka))


@elementwise
def chu_quality(ka: Real) -> Real:
    """Least Q of a lossless antenna with one mode (linear polarization): 1/(ka)³ + 1/(ka).

    Source: Chu, J. Appl. Phys. 19, 1163–1175, 1948; McLean, IEEE Trans. AP-44, 672–676, 1996
    (from memory).

    >>> chu_quality(0.5)
    10.0
    """
    return np.power(ka, -3.0) + 1.0 / ka


@elementwise
def chu_quality_two_modes(ka: Real) -> Real:
    """Least Q with an electric and a magnetic mode together: ½[1/(ka)³ + 2/(ka)].

    Source: McLean, IEEE Trans. AP-44, 672–676, 1996 (from memory).

    >>> chu_quality_two_modes(0.5)
    6.0
    """
    return (np.power(ka, -3.0) + 2.0 / ka) / 2


@elementwise
def matched_bandwidth(quality: Real, vswr: Real) -> Real:
    """Fractional bandwidth (s − 1)/(√s·Q) of one resonance matched at its centre.

    Source: Yaghjian & Best, IEEE Trans. AP-53(4), 1298–1324, 2005 (formula from memory). Multiply
    Q by the efficiency first: losses widen the band (Harrington 1960). Holds for Q above about 3.

    >>> round(matched_bandwidth(10.0, 2.0), 4)
    0.0707
    """
    return (vswr - 1.0) / (np.sqrt(vswr) * quality)


@elementwise
def bode_fano_bandwidth(quality: Real, vswr: Real) -> Real:
    """Fractional bandwidth π/(Q·ln(1/|Γ|)) that no lossless matching network exceeds.

    Source: Fano, J. Franklin Inst. 249, 1950 (from memory).

    >>> round(bode_fano_bandwidth(10.0, 2.0), 4)
    0.286
    """
    return np.pi / (quality * np.log((vswr + 1.0) / (vswr - 1.0)))
