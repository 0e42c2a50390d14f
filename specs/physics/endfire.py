"""End-fire antennas: Yagis by elements and boom, line sources, the N² limit."""

# mypy: no-warn-return-any
from __future__ import annotations

from typing import Final

import numpy as np

from specs.physics.decibels import to_db
from specs.physics.elementwise import Real, elementwise

YAGI_CEILING_DBI: Final = {
    1: 2.16, 2: 7.52, 3: 10.57, 4: 12.83, 5: 14.62, 6: 16.10, 7: 17.37, 8: 18.47,
    9: 19.45, 10: 20.33, 11: 21.13, 12: 21.86,
}  # fmt: skip
"""Most directivity of N parallel half-wave dipoles with any currents, dBi, in free space, as the
spacing goes to zero. Derived: D = 1.6409·R11·aᴴR⁻¹a with sinusoidal currents, computed with 40
digits down to a spacing of 0.01 λ (0.05 λ for 12) and rounded up."""

NBS_YAGIS: Final = (
    (0.4, 3, 7.1), (0.8, 5, 9.2), (1.2, 6, 10.2),
    (2.2, 12, 12.25), (3.2, 17, 13.4), (4.2, 15, 14.2),
)  # fmt: skip
"""(boom in wavelengths, elements, gain in dBd) of the measured designs in Viezbicke, *Yagi Antenna
Design*, NBS Technical Note 688 (1976), Table 1; from memory, and reproduced by the method of
moments within −0.26 and +0.42 dB."""


@elementwise
def yagi_element_ceiling_dbi(elements: Real) -> Real:
    """Directivity that N half-wave elements in free space do not exceed, dBi; inf above 12.

    >>> yagi_element_ceiling_dbi(3)
    10.57
    """
    count = np.floor(elements)
    known: Real = np.interp(count, list(YAGI_CEILING_DBI), list(YAGI_CEILING_DBI.values()))
    beyond = np.where(count > max(YAGI_CEILING_DBI), np.inf, known)
    return np.where(count < 1, np.nan, beyond)[()]  # type: ignore[return-value]


@elementwise
def yagi_boom_dbi(boom_wl: Real) -> Real:
    """Gain of a well-built Yagi of this boom, dBi: 10·log10(9.0·B/λ + 5), B from 0.3 to 5 λ.

    A fit to the six designs of NBS Technical Note 688, within −0.1 and +0.5 dB. Source: derived.

    >>> round(yagi_boom_dbi(2.2), 2)
    13.94
    """
    return to_db(9.0 * boom_wl + 5.0)


@elementwise
def ordinary_endfire_dbi(length_wl: Real) -> Real:
    """Directivity of an ordinary end-fire line source, dBi: 4L/λ, L above about 2 λ.

    Source: Kraus; Balanis, *Antenna Theory*, ch. 6 (from memory; integrated in the tests).

    >>> round(ordinary_endfire_dbi(10.0), 2)
    16.02
    """
    return to_db(4 * length_wl)


@elementwise
def hansen_woodyard_dbi(length_wl: Real) -> Real:
    """Directivity of an end-fire line source with the phase of Hansen & Woodyard, dBi: 7.28·L/λ.

    Isotropic elements, L above about 3 λ. Source: Hansen & Woodyard, Proc. IRE 26, 333–345, 1938
    (from memory; integrated in the tests).

    >>> round(hansen_woodyard_dbi(10.0), 2)
    18.62
    """
    return to_db(7.28 * length_wl)


@elementwise
def uzkov_dbi(elements: Real) -> Real:
    """Most directivity of N isotropic elements in a line, dBi: N², end-fire, spacing to zero.

    Source: Uzkov, C. R. Acad. Sci. URSS 53, 35–38, 1946 (from memory; computed in the tests).

    >>> round(uzkov_dbi(3), 2)
    9.54
    """
    return to_db(np.square(elements))
