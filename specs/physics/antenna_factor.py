"""Antenna factor: field strength over voltage at a matched load.

AF = E/V. A matched antenna of gain G delivers (E²/η0)·Gλ²/4π into the load R, so
AF² = 4π·η0/(R·G·λ²) and, for 50 Ω, AF(dB/m) = 20·log10 f(MHz) − G(dBi) − 29.774.
Source: any EMC handbook prints 29.77 to 29.79; derived here from c and η0.
"""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.constants import FREE_SPACE_IMPEDANCE, SPEED_OF_LIGHT
from specs.physics.elementwise import Real, elementwise


def _offset_db(load_ohm: float) -> float:
    """The constant of the formula: 29.774 dB for 50 Ω."""
    metres = SPEED_OF_LIGHT * 1e-6
    return float(10 * np.log10(load_ohm * metres**2 / (4 * np.pi * FREE_SPACE_IMPEDANCE)))


@elementwise
def antenna_factor_db(gain_dbi: Real, frequency_mhz: Real, load_ohm: float = 50.0) -> Real:
    """Antenna factor in dB/m of a gain at a frequency, into a matched load.

    >>> round(antenna_factor_db(8.0, 1000.0), 2)
    22.23
    """
    return 20 * np.log10(frequency_mhz) - gain_dbi - _offset_db(load_ohm)


@elementwise
def gain_from_antenna_factor_dbi(
    factor_db_per_m: Real, frequency_mhz: Real, load_ohm: float = 50.0
) -> Real:
    """Gain in dBi of an antenna factor in dB/m at a frequency, into a matched load.

    >>> round(gain_from_antenna_factor_dbi(22.23, 1000.0), 2)
    8.0
    """
    return 20 * np.log10(frequency_mhz) - factor_db_per_m - _offset_db(load_ohm)
