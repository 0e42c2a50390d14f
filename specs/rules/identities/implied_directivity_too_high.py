"""implied-directivity-too-high: gain and efficiency together imply too much directivity."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity, Statistic
from specs.physics.decibels import to_db
from specs.rules.facts import Facts, pairs
from specs.rules.finding import Bound
from specs.rules.needs import EFFICIENCY, FREQUENCY, GAIN, SIZE
from specs.rules.rule import Conflict, rule
from specs.rules.size.gain_above_small_antenna_limit import TIERS as SMALL_TIERS
from specs.rules.size.gain_above_small_antenna_limit import enclosing_ceiling_dbi, steps_lower
from specs.rules.tiers import softened, standing
from specs.rules.words import band_words, figure, stated


@rule(
    id="implied-directivity-too-high",
    topic="identities",
    needs=(GAIN, EFFICIENCY, FREQUENCY, SIZE),
    formula="D = G / η ≤ max(3, (ka)² + 2ka)",
    source="Harrington, IRE Trans. AP-6, 1958 (from memory; N² + 2N integrated in the tests)",
    tiers=(("≤ 0.5 dB above the size ceiling", "note"), ("≤ 1.5", "doubtful"),
           ("≤ 3", "implausible"), ("more", "impossible"),
           ("mounted on a board, case or vehicle", "two tiers lower")),
)  # fmt: skip
def implied_directivity_too_high(facts: Facts) -> Iterator[Conflict]:
    """Directivity implied by gain and efficiency, against the size.

    What it checks
    --------------
    Peak gain divided by the efficiency of the same band is a directivity that an antenna of the
    stated size can have.

    Why it must hold
    ----------------
    A small antenna of 30 % efficiency and 5 dBi would have 10 dBi of directivity. Its size, or
    that of the board it sits on, rarely allows that.

    Flagged
    -------
    Helical antenna
    Frequency: 863-870 MHz
    Gain: 5 dBi
    Efficiency: 20 %
    Dimensions: 20 x 10 x 10 mm

    Accepted
    --------
    Helical antenna
    Frequency: 863-870 MHz
    Gain: -4 dBi
    Efficiency: 25 %
    Dimensions: 20 x 10 x 10 mm
    """
    for gain, efficiency in pairs(facts.gains, facts.of(Quantity.EFFICIENCY)):
        high = efficiency.normalized.high
        if efficiency.kind == "aperture" or high <= 0 or gain.statistic is Statistic.MINIMUM:
            continue
        ceiling = enclosing_ceiling_dbi(facts, gain)
        if ceiling is None:
            continue
        implied = gain.normalized.low - float(to_db(high / 100))
        excess = implied - ceiling
        severity = softened(standing(excess, SMALL_TIERS), steps_lower(facts))
        if severity is None:
            continue
        yield Conflict(
            severity=severity,
            claims=(gain.id, efficiency.id),
            message=(
                f"A peak gain of {stated(gain)} at an efficiency of {stated(efficiency)}"
                f"{band_words(gain)} implies a directivity of {figure(implied, 'dBi')}. An antenna "
                f"of the stated size reaches {figure(ceiling, 'dBi')} without superdirectivity; "
                f"the implied figure is {figure(excess, 'dB')} above."
            ),
            question=(
                f"Are the peak gain of {stated(gain)} and the efficiency of {stated(efficiency)} "
                "measured on the same board at the same frequency?"
            ),
            working=f"{gain.normalized.low:.2f} − 10·log10({high / 100:.3f}) = {implied:.2f} dBi",
            assumption="A board, case or vehicle that radiates with the antenna raises the ceiling.",
            margin_db=excess,
            bound=Bound(ceiling, "dBi", "ceiling for this size"),
        )
