"""gain-above-boom-length: more gain than a Yagi of that length has."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import AntennaType, Trait
from specs.physics.endfire import yagi_boom_dbi
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import FREQUENCY, GAIN, LENGTH
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, above, ruler, standing
from specs.rules.words import figure, gain_words, stated

TIERS: Tiers = ((0.7, None), (1.5, Severity.NOTE), (3.0, Severity.DOUBTFUL),
                (math.inf, Severity.IMPLAUSIBLE))  # fmt: skip
SHORTEST_WL = 0.2


@rule(
    id="gain-above-boom-length",
    topic="gain against size",
    needs=(GAIN, FREQUENCY, LENGTH),
    applies=lambda facts: facts.antenna.type == AntennaType.YAGI,
    formula="G(dBi) = 10 log10(9.0·B/λ + 5), within −3 and +0.7 dB",
    source="fit made here to NBS Technical Note 688, Table 1 (from memory), and to computed Yagis",
    tiers=(("−3 to +0.7 dB", "ordinary"), ("≤ 1.5", "note"), ("≤ 3", "doubtful"),
           ("more", "implausible")),
)  # fmt: skip
def gain_above_boom_length(facts: Facts) -> Iterator[Conflict]:
    """Yagi gain against its boom.

    What it checks
    --------------
    The gain is not more than well-built Yagis of that boom length have.

    Why it must hold
    ----------------
    The gain of an end-fire antenna grows with its length and little else.

    Flagged
    -------
    Yagi antenna
    Frequency: 440-470 MHz
    Gain: 15 dBi
    Length: 900 mm

    Accepted
    --------
    Yagi antenna
    Frequency: 440-470 MHz
    Gain: 11 dBi
    Length: 900 mm
    """
    length = facts.size("length", "height", "depth")
    if length is None or math.isinf(length.normalized.high):
        return
    for gain in facts.gains:
        wavelength = facts.wavelength_mm(gain)
        if wavelength is None:
            continue
        boom = length.normalized.high / wavelength
        if boom < SHORTEST_WL:
            continue
        usual = float(yagi_boom_dbi(boom))
        excess = gain.normalized.low - usual
        severity = standing(excess, TIERS)
        if severity is None:
            continue
        if Trait.STACKED in facts.antenna.traits:
            severity = Severity.NOTE
        bound = Bound(usual, "dBi", "well-built Yagi of this boom")
        yield Conflict(
            severity=severity,
            claims=(gain.id, length.id),
            message=(
                f"The sheet claims {gain_words(gain)} from a Yagi {stated(length)} long, which is "
                f"{boom:.2f} wavelengths at {299792.458 / wavelength:.0f} MHz. Well-built Yagis of "
                f"that length have {figure(usual, 'dBi')}; the claim is {figure(excess, 'dB')} above."
            ),
            question=f"Is {stated(gain)} measured in free space, and in dBi or dBd?",
            working=f"10·log10(9.0·{boom:.2f} + 5) = {usual:.2f} dBi",
            assumption="Would hold for stacked antennas, or with the reflection of the ground.",
            margin_db=excess,
            bound=bound,
            ruler=ruler(gain, TIERS, above(usual), bound),
        )
