"""Directivity, gain and efficiency: G = η·D, realized gain, solid angles.

Terms of IEEE Std 145: gain counts the losses in the antenna and not the mismatch; realized gain
counts both; efficiency is radiation efficiency unless called total.
"""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.decibels import from_db, to_db
from specs.physics.elementwise import Real, elementwise
from specs.physics.mismatch import mismatch_loss_from_vswr


@elementwise
def gain_from_directivity_dbi(directivity_dbi: Real, efficiency: Real) -> Real:
    """G = D + 10·log10 η, dBi; efficiency as a ratio (0 to 1).

    >>> round(gain_from_directivity_dbi(9.0, 0.8), 2)
    8.03
    """
    return directivity_dbi + to_db(efficiency)


@elementwise
def directivity_from_gain_dbi(gain_dbi: Real, efficiency: Real) -> Real:
    """D = G − 10·log10 η, dBi; efficiency as a ratio (0 to 1).

    >>> round(directivity_from_gain_dbi(8.03, 0.8), 2)
    9.0
    """
    return gain_dbi - to_db(efficiency)


@elementwise
def efficiency_from_levels(gain_dbi: Real, directivity_dbi: Real) -> Real:
    """η = 10^((G − D)/10), a ratio.

    >>> round(efficiency_from_levels(8.0, 9.0), 3)
    0.794
    """
    return from_db(gain_dbi - directivity_dbi)


@elementwise
def efficiency_from_resistances(radiation_ohm: Real, loss_ohm: Real) -> Real:
    """η = Rr/(Rr + Rl), a ratio: radiation and loss resistance at the same terminals.

    >>> round(efficiency_from_resistances(36.0, 4.0), 12)
    0.9
    """
    return 1.0 / (1.0 + loss_ohm / radiation_ohm)


@elementwise
def realized_gain_dbi(gain_dbi: Real, vswr: Real) -> Real:
    """Realized gain G·(1 − |Γ|²), dBi.

    >>> round(realized_gain_dbi(8.0, 2.0), 2)
    7.49
    """
    return gain_dbi - mismatch_loss_from_vswr(vswr)


@elementwise
def directivity_from_solid_angle_dbi(beam_solid_angle: Real) -> Real:
    """D = 4π/ΩA of the beam solid angle ΩA = ∮U/Umax dΩ in steradian, dBi.

    >>> directivity_from_solid_angle_dbi(4 * 3.141592653589793)
    0.0
    """
    return to_db(4 * np.pi / beam_solid_angle)


@elementwise
def half_power_limit_dbi(half_power_solid_angle: Real) -> Real:
    """Directivity that no antenna exceeds whose −3 dB region has this solid angle, dBi: 8π/Ω.

    Rigorous: the region alone holds Ω·Umax/2 of the power. Bounds nothing below 0 dBi.

    >>> round(half_power_limit_dbi(6.283185307), 2)
    6.02
    """
    return to_db(8 * np.pi / half_power_solid_angle)
