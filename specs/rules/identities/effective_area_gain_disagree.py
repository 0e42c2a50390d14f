"""effective-area-gain-disagree: gain and effective area are one figure."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.physics.aperture import gain_from_effective_area_dbi
from specs.rules.disagreement import LEVEL_TIERS_IN_WORDS, disagreement
from specs.rules.facts import Facts, pairs
from specs.rules.needs import EFFECTIVE_AREA, FREQUENCY, GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import gain_words, stated


@rule(
    id="effective-area-gain-disagree",
    topic="identities",
    needs=(GAIN, EFFECTIVE_AREA, FREQUENCY),
    formula="A_e = G·λ²/4π",
    source="IEEE Std 145-2013, effective area",
    tiers=LEVEL_TIERS_IN_WORDS,
)
def effective_area_gain_disagree(facts: Facts) -> Iterator[Conflict]:
    """Gain and effective area that disagree.

    What it checks
    --------------
    The effective area is the one that belongs to the gain at some frequency of the band.

    Why it must hold
    ----------------
    Effective area is gain times λ²/4π, for every antenna.

    Flagged
    -------
    Frequency: 1000 MHz
    Gain: 10 dBi
    Effective area: 0.2 m2

    Accepted
    --------
    Frequency: 1000 MHz
    Gain: 10 dBi
    Effective area: 0.072 m2
    """
    for gain, area in pairs(facts.gains, facts.of(Quantity.EFFECTIVE_AREA)):
        band = facts.band_of(gain)
        if band is None or area.normalized.low <= 0:
            continue
        expected = (
            float(gain_from_effective_area_dbi(area.normalized.low, band[0])),
            float(gain_from_effective_area_dbi(area.normalized.high, band[1])),
        )
        conflict = disagreement(
            (gain, area),
            gain,
            expected,
            f"The sheet states a gain of {gain_words(gain)} and an effective area of {stated(area)} "
            f"in {band[0]:g} to {band[1]:g} MHz.",
            f"Gain {stated(gain)} and effective area {stated(area)} do not agree. Which is measured?",
            f"4π·{area.normalized.nominal:g} m²/λ² = {sum(expected) / 2:.2f} dBi",
        )
        if conflict is not None:
            yield conflict
