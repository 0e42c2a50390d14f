"""Cut-off of round waveguides, for open guides and can feeds."""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.constants import SPEED_OF_LIGHT
from specs.physics.elementwise import Real, elementwise

TE11_DIAMETER_WL = 1.841_184 / np.pi
"""Least diameter in wavelengths that carries the TE11 mode, 0.586: first zero of J1' over π."""

TM01_DIAMETER_WL = 2.404_826 / np.pi
"""Diameter in wavelengths from which TM01 is carried too, 0.766: first zero of J0 over π. Between
the two lies the trade's thumb rule of 0.6 to 0.75 λ (common practice, no source)."""


@elementwise
def te11_cutoff_mhz(diameter_mm: Real) -> Real:
    """Frequency below which a round guide carries nothing, MHz: 1.8412·c/(πd), inner diameter.

    Source: Pozar, *Microwave Engineering*, ch. 3 (from memory; zeros computed in the tests).

    >>> round(te11_cutoff_mhz(100.0))
    1757
    """
    return TE11_DIAMETER_WL * SPEED_OF_LIGHT * 1e-3 / diameter_mm


@elementwise
def tm01_cutoff_mhz(diameter_mm: Real) -> Real:
    """Frequency above which a second mode spoils the pattern of a can feed, MHz: 2.4048·c/(πd).

    >>> round(tm01_cutoff_mhz(100.0))
    2295
    """
    return TM01_DIAMETER_WL * SPEED_OF_LIGHT * 1e-3 / diameter_mm
