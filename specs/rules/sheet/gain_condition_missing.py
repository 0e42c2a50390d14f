"""gain-condition-missing: one gain for several bands, or no ground plane named."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import AntennaType, Trait
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import stated

ON_GROUND = frozenset({AntennaType.MONOPOLE, AntennaType.CHIP, AntennaType.WHIP})
FAR_APART = 1.5


@rule(
    id="gain-condition-missing",
    topic="sheet",
    needs=(GAIN,),
    formula="a gain holds at a frequency, on a structure",
    source="common practice, no source",
    tiers=(("several bands with one gain", "note"),
           ("monopole, whip or chip without its ground plane", "note")),
)  # fmt: skip
def gain_condition_missing(facts: Facts) -> Iterator[Conflict]:
    """A gain without the condition it holds under.

    What it checks
    --------------
    A multi-band antenna states a gain for each band, and a monopole, whip or chip names its test
    ground plane.

    Why it must hold
    ----------------
    Gain changes with the band and with what the antenna is mounted on.

    Flagged
    -------
    Frequency: 698-960 MHz
    Frequency: 1710-2700 MHz
    Gain: 5 dBi

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain: 5 dBi
    """
    first = facts.gains[0]
    lows, highs = [b[0] for b in facts.bands], [b[1] for b in facts.bands]
    spread = len(facts.bands) > 1 and max(lows) > FAR_APART * min(highs)
    if spread and len(facts.gains) == 1 and first.band_mhz is None:
        yield Conflict(
            severity=Severity.NOTE,
            claims=(first.id,),
            message=f"The sheet states one gain, {stated(first)}, for {len(facts.bands)} bands.",
            question="What is the gain in each band?",
        )
    if facts.antenna.type in ON_GROUND and Trait.GROUND_PLANE not in facts.antenna.traits:
        yield Conflict(
            severity=Severity.NOTE,
            claims=(first.id,),
            message=(
                f"The sheet states {stated(first)} for a {facts.antenna.type} without naming the "
                "ground plane or board of the measurement."
            ),
            question="On which ground plane or board was the gain measured?",
        )
