"""gain-linear-unclear: a bare number as gain."""

from __future__ import annotations

from collections.abc import Iterator

from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import ANY_GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated


@rule(
    id="gain-linear-unclear",
    topic="reference and unit",
    needs=(ANY_GAIN,),
    formula="G(dBi) = 10 log10 G",
    source="IEEE Std 145-2013, gain",
    tiers=(("a bare number or 'x' as gain, no unit anywhere", "unclear"),),
)
def gain_linear_unclear(facts: Facts) -> Iterator[Conflict]:
    """Gain as a bare number.

    What it checks
    --------------
    A gain has a unit, at the number, in its label or at the head of its column.

    Why it must hold
    ----------------
    A gain of 7 may be 7 dBi, 7 dBd, or a power ratio of 7 (8.5 dBi).

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Gain: 7

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain (dBi): 7
    """
    for gain in facts.gains:
        if gain.stated.unit not in ("", "x"):
            continue
        yield Conflict(
            severity=Severity.UNCLEAR,
            claims=(gain.id,),
            message=(
                f"The sheet states a gain of {stated(gain)} without a unit. It is taken as "
                f"{figure(gain.normalized.low, 'dBi')} to {figure(gain.normalized.high, 'dBi')} "
                "until the vendor says more."
            ),
            question=f"In which unit is the gain of {stated(gain)} stated: dBi, dBd, or a ratio?",
        )
