"""How sure a claim is: a logistic sum of plain yes/no facts about how it was read.

The weights are set by hand after measured shares of right claims on real sheets, and are not yet
fitted: they rank claims, and are no calibrated probabilities. One line per fact.
"""

from __future__ import annotations

import math

from specs.claims import Quantity

USED_FROM = 0.5
"""Claims below this confidence are shown as unread candidates and not used by rules."""

WEIGHTS: dict[str, float] = {
    "base": 1.6,
    "labelled": 1.4,
    "from prose": -1.2,
    "unlabelled frequency": -1.8,
    "usual range": 1.2,
    "unusual range": -3.2,
    "unit printed": 0.6,
    "unit missing": -1.0,
    "repeated": 0.8,
    "company of known labels": 0.6,
    "long text": -0.8,
    "many numbers": -0.6,
    "misspelt label": -0.5,
    "below a head": -0.3,
    "hidden": -2.5,
    "read by recognition": -0.6,
}

USUAL: dict[Quantity, tuple[float, float]] = {
    Quantity.GAIN: (-25.0, 65.0),
    Quantity.DIRECTIVITY: (0.0, 70.0),
    Quantity.EFFICIENCY: (0.5, 150.0),
    Quantity.BEAMWIDTH: (0.2, 360.0),
    Quantity.FREQUENCY: (0.1, 300_000.0),
    Quantity.VSWR: (0.5, 12.0),
    Quantity.RETURN_LOSS: (-45.0, 45.0),
    Quantity.FRONT_TO_BACK: (0.5, 80.0),
}
"""The range in which a figure of a sheet can be meant, in its normal unit (common practice, no
source). It reaches past what physics allows: a VSWR of 0.9 is a claim to be flagged, not a
misreading to be hidden."""


def confidence(facts: frozenset[str]) -> float:
    """How likely a claim with these facts is right, from 0 to 1 (not calibrated).

    >>> confidence(frozenset({"labelled", "usual range", "unit printed"})) > 0.95
    True
    """
    total = WEIGHTS["base"] + sum(WEIGHTS[fact] for fact in facts)
    return round(1 / (1 + math.exp(-total)), 3)
