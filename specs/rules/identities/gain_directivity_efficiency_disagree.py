"""gain-directivity-efficiency-disagree: the three do not add up."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity, Statistic
from specs.physics.decibels import to_db
from specs.rules.disagreement import LEVEL_TIERS_IN_WORDS, disagreement
from specs.rules.facts import Facts, pairs, same_conditions
from specs.rules.needs import DIRECTIVITY, EFFICIENCY, GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import gain_words, stated


@rule(
    id="gain-directivity-efficiency-disagree",
    topic="identities",
    needs=(GAIN, DIRECTIVITY, EFFICIENCY),
    formula="G(dBi) = D(dBi) + 10 log10 η",
    source="IEEE Std 145-2013, gain, directivity, radiation efficiency",
    tiers=LEVEL_TIERS_IN_WORDS,
)
def gain_directivity_efficiency_disagree(facts: Facts) -> Iterator[Conflict]:
    """Gain, directivity and efficiency that do not add up.

    What it checks
    --------------
    Gain equals directivity less the loss that the efficiency states.

    Why it must hold
    ----------------
    Two of the three fix the third.

    Flagged
    -------
    Frequency: 863-870 MHz
    Gain: 1.8 dBi
    Directivity: 2.4 dBi
    Efficiency: 38 %

    Accepted
    --------
    Frequency: 863-870 MHz
    Gain: -1.8 dBi
    Directivity: 2.4 dBi
    Efficiency: 38 %
    """
    for gain, directivity in pairs(facts.gains, facts.of(Quantity.DIRECTIVITY)):
        if gain.statistic is Statistic.MINIMUM:
            continue
        for efficiency in facts.of(Quantity.EFFICIENCY):
            low, high = efficiency.normalized.low, efficiency.normalized.high
            if efficiency.kind == "aperture" or high <= 0 or not same_conditions(gain, efficiency):
                continue
            loss = float(to_db(max(low, 1e-9) / 100)), float(to_db(high / 100))
            expected = directivity.normalized.low + loss[0], directivity.normalized.high + loss[1]
            conflict = disagreement(
                (gain, directivity, efficiency),
                gain,
                expected,
                f"The sheet states a directivity of {gain_words(directivity)} and an efficiency of "
                f"{stated(efficiency)}.",
                f"Gain {stated(gain)}, directivity {stated(directivity)} and efficiency "
                f"{stated(efficiency)} do not agree. Which two are measured?",
                f"{directivity.normalized.nominal:.2f} + 10·log10("
                f"{efficiency.normalized.nominal / 100:.3f}) = {sum(expected) / 2:.2f} dBi",
            )
            if conflict is not None:
                yield conflict
