"""gain-unit-wrong: a gain in dBm or volts is no gain."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import ANY_GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import stated
from specs.units.levels import REFERENCES


@rule(
    id="gain-unit-wrong",
    topic="reference and unit",
    needs=(ANY_GAIN,),
    formula="gain is a ratio: dBi, dBd or dBic",
    source="IEEE Std 145-2013, gain",
    tiers=(("gain in dBm, dBW, dBµV, V and the like", "unclear"),),
)
def gain_unit_wrong(facts: Facts) -> Iterator[Conflict]:
    """Gain in a unit that cannot state a gain.

    What it checks
    --------------
    The unit of a gain is one of a ratio against a reference antenna.

    Why it must hold
    ----------------
    dBm and dBW are powers, dBµV and V voltages. A gain printed so is a slip of the pen, and what
    was meant must be asked.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Gain: 12 dBm

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain: 12 dBi
    """
    for gain in facts.of(Quantity.GAIN):
        if gain.stated.unit in REFERENCES or gain.stated.unit == "x":
            continue
        yield Conflict(
            severity=Severity.UNCLEAR,
            claims=(gain.id,),
            message=(
                f"The sheet states the gain as {stated(gain)}. {gain.stated.unit} is no unit of "
                "gain; the figure is read as dB with its reference open, between dBi and dBd."
            ),
            question=f"The gain is printed as {stated(gain)}. Is {stated(gain).split()[0]} dBi meant?",
        )
