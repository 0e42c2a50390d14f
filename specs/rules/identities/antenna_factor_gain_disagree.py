"""antenna-factor-gain-disagree: gain and antenna factor are one figure."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.physics.antenna_factor import gain_from_antenna_factor_dbi
from specs.rules.disagreement import LEVEL_TIERS_IN_WORDS, disagreement
from specs.rules.facts import Facts, pairs
from specs.rules.needs import ANTENNA_FACTOR, FREQUENCY, GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import band_words, gain_words, stated


@rule(
    id="antenna-factor-gain-disagree",
    topic="identities",
    needs=(GAIN, ANTENNA_FACTOR, FREQUENCY),
    formula="AF(dB/m) = 20 log10 f(MHz) − G(dBi) − 29.774 (50 Ω)",
    source="derived with η0 = 376.73 Ω and c; handbooks print 29.78 or 29.79",
    tiers=LEVEL_TIERS_IN_WORDS,
)
def antenna_factor_gain_disagree(facts: Facts) -> Iterator[Conflict]:
    """Gain and antenna factor that disagree.

    What it checks
    --------------
    The antenna factor belongs to the gain at some frequency of the band, into 50 Ω.

    Why it must hold
    ----------------
    Both describe how much power an antenna takes out of a field.

    Flagged
    -------
    Frequency: 1000 MHz
    Gain: 6.5 dBi
    Antenna factor: 27.7 dB/m

    Accepted
    --------
    Frequency: 1000 MHz
    Gain: 6.5 dBi
    Antenna factor: 23.7 dB/m
    """
    for gain, factor in pairs(facts.gains, facts.of(Quantity.ANTENNA_FACTOR)):
        band = factor.band_mhz or facts.band_of(gain)
        if band is None:
            continue
        low = float(gain_from_antenna_factor_dbi(factor.normalized.high, band[0]))
        high = float(gain_from_antenna_factor_dbi(factor.normalized.low, band[1]))
        conflict = disagreement(
            (gain, factor),
            gain,
            (low, high),
            f"The sheet states a gain of {gain_words(gain)} and an antenna factor of "
            f"{stated(factor)}{band_words(factor)}.",
            f"Gain {stated(gain)} and antenna factor {stated(factor)}{band_words(factor)} do not "
            "agree. Which is measured, and into which impedance?",
            f"20·log10 f − {factor.normalized.nominal:g} − 29.774 = {(low + high) / 2:.2f} dBi",
        )
        if conflict is not None:
            yield conflict
