"""Gain of omnidirectional antennas against their length."""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.constants import HALF_WAVE_DIPOLE_DBI
from specs.physics.decibels import from_db, to_db
from specs.physics.elementwise import Real, elementwise

HALF_WAVE_DIPOLE = from_db(HALF_WAVE_DIPOLE_DBI)


@elementwise
def omni_length_ceiling_dbi(length_wl: Real) -> Real:
    """Ceiling for an omnidirectional antenna of this length in free space, dBi.

    max(1.641, 2L/λ + 0.92): the sum over the rotationally symmetric spherical modes n ≤ kL/2,
    which it matches within 0.7 % (3.8 % at one mode), and never less than the half-wave dipole: a
    dipole of 0.1 to 0.35 λ has up to 1.94 dBi, more than its one mode of 1.76. Without
    superdirectivity. All dipoles, collinear stacks and line sources integrated in the tests lie
    below it, long stacks by only 0.02 dB. Source: derived.

    >>> round(omni_length_ceiling_dbi(0.5), 2), round(omni_length_ceiling_dbi(3.2), 2)
    (2.83, 8.65)
    """
    return to_db(np.maximum(HALF_WAVE_DIPOLE, 2 * length_wl + 0.92))


@elementwise
def omni_over_ground_ceiling_dbi(height_wl: Real) -> Real:
    """The same over a large reflecting ground, dBi: image length 2h, and twice the directivity.

    Source: image theory (Balanis, *Antenna Theory*, ch. 4). Quarter-wave monopole: 5.16 dBi.

    >>> round(omni_over_ground_ceiling_dbi(0.25), 2)
    5.84
    """
    return to_db(2.0) + omni_length_ceiling_dbi(2 * height_wl)


@elementwise
def collinear_dbi(length_wl: Real) -> Real:
    """Directivity of a long collinear array, dBi: 2L/λ, L above about 2 λ.

    Source: Kraus; Balanis (from memory; integrated in the tests).

    >>> collinear_dbi(5.0)
    10.0
    """
    return to_db(2 * length_wl)
