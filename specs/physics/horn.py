"""Horns: gain and beamwidths from the mouth."""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.decibels import to_db
from specs.physics.elementwise import Real, elementwise

OPTIMUM_PYRAMIDAL_EFFICIENCY = 0.51
"""Aperture efficiency of the optimum pyramidal horn (Stutzman & Thiele; Balanis, *Antenna Theory*,
ch. 13; from memory). An open TE10 waveguide mouth without phase error has 8/π² = 0.81."""


@elementwise
def optimum_pyramidal_gain_dbi(width_wl: Real, height_wl: Real) -> Real:
    """Gain of an optimum pyramidal horn with mouth A (H plane) by B (E plane), dBi.

    Calculated gain of standard horns is good to 0.3 dB (Slayton, NRL Report 4433, 1954; memory).

    >>> round(optimum_pyramidal_gain_dbi(8.0, 6.0), 2)
    24.88
    """
    return to_db(OPTIMUM_PYRAMIDAL_EFFICIENCY * 4 * np.pi * width_wl * height_wl)


@elementwise
def optimum_pyramidal_e_width_deg(height_wl: Real) -> Real:
    """E-plane beamwidth of an optimum pyramidal horn, degrees: 54·λ/B (Stutzman & Thiele).

    >>> optimum_pyramidal_e_width_deg(6.0)
    9.0
    """
    return 54.0 / height_wl


@elementwise
def optimum_pyramidal_h_width_deg(width_wl: Real) -> Real:
    """H-plane beamwidth of an optimum pyramidal horn, degrees: 78·λ/A (Stutzman & Thiele).

    >>> optimum_pyramidal_h_width_deg(8.0)
    9.75
    """
    return 78.0 / width_wl
