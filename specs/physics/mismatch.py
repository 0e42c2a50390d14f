"""Reflection at a port: reflection coefficient, VSWR, return loss, mismatch loss.

All four state one thing, the magnitude of the reflection coefficient.
Source: D. M. Pozar, *Microwave Engineering*, ch. 2 (from memory); definitions of IEEE Std 145.
"""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.elementwise import Real, elementwise


@elementwise
def reflection_from_vswr(vswr: Real) -> Real:
    """|Γ| = (s − 1)/(s + 1), for s from 1 to inf.

    >>> round(reflection_from_vswr(1.5), 12)
    0.2
    """
    return 1.0 - 2.0 / (vswr + 1.0)


@elementwise
def vswr_from_reflection(reflection: Real) -> Real:
    """s = (1 + |Γ|)/(1 − |Γ|), for |Γ| from 0 to 1 (total reflection gives inf).

    >>> round(vswr_from_reflection(0.2), 9)
    1.5
    """
    return (1.0 + reflection) / (1.0 - reflection)


@elementwise
def return_loss_from_reflection(reflection: Real) -> Real:
    """−20·log10|Γ|, dB, positive; inf for a perfect match.

    >>> return_loss_from_reflection(0.1)
    20.0
    """
    return -20.0 * np.log10(reflection)


@elementwise
def reflection_from_return_loss(return_loss_db: Real) -> Real:
    """|Γ| = 10^(−RL/20) of a return loss in dB, positive.

    >>> reflection_from_return_loss(20.0)
    0.1
    """
    return np.power(10.0, -return_loss_db / 20.0)


@elementwise
def mismatch_loss_from_reflection(reflection: Real) -> Real:
    """−10·log10(1 − |Γ|²), dB, positive: what the reflection takes from the power offered.

    >>> round(mismatch_loss_from_reflection(0.2), 3)
    0.177
    """
    return -10.0 * np.log10(1.0 - np.square(reflection))


@elementwise
def reflection_from_mismatch_loss(mismatch_loss_db: Real) -> Real:
    """|Γ| = √(1 − 10^(−L/10)) of a mismatch loss in dB, positive.

    >>> round(reflection_from_mismatch_loss(3.0103), 4)
    0.7071
    """
    return np.sqrt(1.0 - np.power(10.0, -mismatch_loss_db / 10.0))


@elementwise
def return_loss_from_vswr(vswr: Real) -> Real:
    """Return loss in dB of a VSWR.

    >>> round(return_loss_from_vswr(1.5), 2)
    13.98
    """
    return return_loss_from_reflection(reflection_from_vswr(vswr))


@elementwise
def vswr_from_return_loss(return_loss_db: Real) -> Real:
    """VSWR of a return loss in dB.

    >>> round(vswr_from_return_loss(14.0), 3)
    1.499
    """
    return vswr_from_reflection(reflection_from_return_loss(return_loss_db))


@elementwise
def mismatch_loss_from_vswr(vswr: Real) -> Real:
    """Mismatch loss in dB of a VSWR.

    >>> round(mismatch_loss_from_vswr(2.0), 3)
    0.512
    """
    return mismatch_loss_from_reflection(reflection_from_vswr(vswr))


@elementwise
def power_accepted(vswr: Real) -> Real:
    """Share of the offered power that is not reflected, 1 − |Γ|²: the most that total efficiency
    can be.

    >>> round(power_accepted(1.5), 12)
    0.96
    """
    return 1.0 - np.square(reflection_from_vswr(vswr))
