"""Polarization mismatch between two elliptically polarized antennas.

Axial ratios in dB: 0 is circular, inf linear.
"""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.elementwise import Real, elementwise


@elementwise
def polarization_loss_db(
    axial_ratio1_db: Real, axial_ratio2_db: Real, tilt_deg: Real, sense: float = 1.0
) -> Real:
    """Loss between two antennas, dB, positive; ``tilt_deg`` between the major axes.

    ``sense`` is 1 for the same hand and −1 for opposite hands. With u = 10^(−AR/20):
    p = ½ + [4u1u2 + (1 − u1²)(1 − u2²)·cos 2τ]/[2(1 + u1²)(1 + u2²)].
    Source: any text on polarization, e.g. Balanis ch. 2 (from memory; limits checked).

    >>> round(polarization_loss_db(0.0, float("inf"), 0.0), 3)
    3.01
    """
    u1 = np.power(10.0, -axial_ratio1_db / 20.0)
    u2 = sense * np.power(10.0, -axial_ratio2_db / 20.0)
    across = (1 - np.square(u1)) * (1 - np.square(u2)) * np.cos(2 * np.radians(tilt_deg))
    match = 0.5 + (4 * u1 * u2 + across) / (2 * (1 + np.square(u1)) * (1 + np.square(u2)))
    return -10 * np.log10(np.clip(match, 0.0, 1.0))


@elementwise
def least_polarization_loss_db(axial_ratio1_db: Real, axial_ratio2_db: Real) -> Real:
    """Loss with the major axes along each other and the same hand, dB.

    >>> round(least_polarization_loss_db(3.0, 0.0), 3)
    0.125
    """
    return polarization_loss_db(axial_ratio1_db, axial_ratio2_db, 0.0)  # type: ignore[arg-type]


@elementwise
def most_polarization_loss_db(axial_ratio1_db: Real, axial_ratio2_db: Real) -> Real:
    """Loss with the major axes crossed and the same hand, dB.

    >>> round(most_polarization_loss_db(3.0, float("inf")), 2)
    4.76
    """
    return polarization_loss_db(axial_ratio1_db, axial_ratio2_db, 90.0)  # type: ignore[arg-type]
