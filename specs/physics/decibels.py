"""Decibels of power ratios."""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.elementwise import Real, elementwise


@elementwise
def to_db(ratio: Real) -> Real:
    """10·log10 of a power ratio; -inf for zero, nan below.

    >>> to_db(100.0)
    20.0
    """
    return 10.0 * np.log10(ratio)


@elementwise
def from_db(level_db: Real) -> Real:
    """The power ratio of a level in dB.

    >>> from_db(20.0)
    100.0
    """
    return np.power(10.0, level_db / 10.0)
