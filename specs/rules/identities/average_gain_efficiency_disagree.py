"""average-gain-efficiency-disagree: the average over the sphere is the efficiency."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Claim, Quantity, Statistic
from specs.physics.decibels import to_db
from specs.rules.disagreement import LEVEL_TIERS_IN_WORDS, disagreement
from specs.rules.facts import Facts, pairs
from specs.rules.identities.average_gain_positive import AVERAGE
from specs.rules.needs import EFFICIENCY
from specs.rules.rule import Conflict, rule
from specs.rules.words import stated


@rule(
    id="average-gain-efficiency-disagree",
    topic="identities",
    needs=(AVERAGE, EFFICIENCY),
    formula="average of G over the sphere (dBi) = 10 log10 η",
    source="IEEE Std 145-2013, gain, radiation efficiency",
    tiers=LEVEL_TIERS_IN_WORDS,
)
def average_gain_efficiency_disagree(facts: Facts) -> Iterator[Conflict]:
    """Average gain and efficiency that disagree.

    What it checks
    --------------
    An average gain below 0 dBi equals the efficiency in dB.

    Why it must hold
    ----------------
    Gain averaged over all directions is the share of power radiated.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Average gain: -1.0 dBi
    Average efficiency: 40 %

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Average gain: -4.0 dBi
    Average efficiency: 40 %
    """
    for gain, efficiency in pairs(_averages(facts), facts.of(Quantity.EFFICIENCY)):
        low, high = efficiency.normalized.low, efficiency.normalized.high
        if high <= 0 or efficiency.statistic not in (None, Statistic.AVERAGE):
            continue
        conflict = disagreement(
            (gain, efficiency),
            gain,
            (float(to_db(max(low, 1e-9) / 100)), float(to_db(high / 100))),
            f"The sheet states an efficiency of {stated(efficiency)} and an average gain of "
            f"{stated(gain)}.",
            f"Over what is the gain of {stated(gain)} averaged, and is the efficiency of "
            f"{stated(efficiency)} for the same band?",
            f"10·log10({efficiency.normalized.nominal / 100:.3f}) = "
            f"{float(to_db(efficiency.normalized.nominal / 100)):.2f} dB",
        )
        if conflict is not None:
            yield conflict


def _averages(facts: Facts) -> tuple[Claim, ...]:
    """Average gains that can be averages over the sphere: not above 0 dBi."""
    return tuple(
        g for g in facts.of(Quantity.GAIN)
        if g.statistic is Statistic.AVERAGE and g.normalized.low <= 0
    )  # fmt: skip
