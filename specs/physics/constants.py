"""Constants of nature and of the trade, and the wavelength."""

# mypy: no-warn-return-any
from __future__ import annotations

from typing import Final

from specs.physics.elementwise import Real, elementwise

SPEED_OF_LIGHT: Final = 299_792_458.0
"""m/s, exact by the definition of the metre (SI)."""

FREE_SPACE_IMPEDANCE: Final = 376.730_313_668
"""Ω; CODATA 2018 (from memory; μ0·c, within 1e-9 of 4π·29.979 245 8)."""

HALF_WAVE_DIPOLE_DBI: Final = 2.150_88
"""Directivity of the thin half-wave dipole, 4/Cin(2π) = 1.640 922 (Balanis, *Antenna Theory*,
ch. 4; integrated again in the tests). The trade's convention is 2.15."""

SHORT_DIPOLE_DBI: Final = 1.760_913
"""Directivity of a short dipole or a small loop: 1.5."""

CIRCULAR_OVER_LINEAR_DB: Final = 3.010_300
"""Total power of a circular wave above one of its linear components: 10·log10 2."""


@elementwise
def wavelength_m(frequency_mhz: Real) -> Real:
    """Free-space wavelength in metres.

    >>> wavelength_m(299.792458)
    1.0
    """
    return SPEED_OF_LIGHT * 1e-6 / frequency_mhz


@elementwise
def in_wavelengths(length_mm: Real, frequency_mhz: Real) -> Real:
    """A length in free-space wavelengths.

    >>> round(in_wavelengths(300.0, 5800.0), 3)
    5.804
    """
    return length_mm * 1e-3 * frequency_mhz / (SPEED_OF_LIGHT * 1e-6)
