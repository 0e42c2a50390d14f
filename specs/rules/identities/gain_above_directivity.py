"""gain-above-directivity: no antenna gives out more than it takes in."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity, Statistic
from specs.rules.facts import Facts, pairs
from specs.rules.finding import Bound, Severity
from specs.rules.needs import DIRECTIVITY, GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import band_words, figure, gain_words, stated

SLACK_DB = 0.1
"""Margin beyond the printed intervals: two figures may come from two measurements."""


@rule(
    id="gain-above-directivity",
    topic="identities",
    needs=(GAIN, DIRECTIVITY),
    formula="G = η·D ≤ D",
    source="IEEE Std 145-2013, gain, radiation efficiency",
    tiers=(("more than 0.1 dB above, beyond the intervals", "impossible"),),
)
def gain_above_directivity(facts: Facts) -> Iterator[Conflict]:
    """Gain above directivity.

    What it checks
    --------------
    The gain is not above the directivity of the same antenna in the same band.

    Why it must hold
    ----------------
    Gain is directivity less the losses inside the antenna. A passive antenna has no negative loss.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Gain: 3.1 dBi
    Directivity: 2.0 dBi

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain: 1.6 dBi
    Directivity: 2.0 dBi
    """
    directivities = tuple(
        d for d in facts.of(Quantity.DIRECTIVITY) if d.statistic is not Statistic.AVERAGE
    )
    for gain, directivity in pairs(facts.gains, directivities):
        excess = gain.normalized.low - directivity.normalized.high
        if excess > SLACK_DB:
            yield Conflict(
                severity=Severity.IMPOSSIBLE,
                claims=(gain.id, directivity.id),
                message=(
                    f"The sheet states a gain of {gain_words(gain)} and a directivity of "
                    f"{gain_words(directivity)}{band_words(gain)}. A passive antenna cannot have more gain "
                    f"than directivity; the claim is {figure(excess, 'dB')} above."
                ),
                question=(
                    f"Gain {stated(gain)} exceeds directivity {stated(directivity)}. Which of the "
                    "two is right, and is an amplifier included?"
                ),
                working=f"{gain.normalized.low:.2f} dBi − {directivity.normalized.high:.2f} dBi = "
                f"{excess:.2f} dB > 0",
                margin_db=excess,
                bound=Bound(directivity.normalized.high, "dBi", "stated directivity"),
            )
