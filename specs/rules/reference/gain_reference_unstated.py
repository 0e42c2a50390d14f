"""gain-reference-unstated: a bare dB says nothing about the reference."""

from __future__ import annotations

from collections.abc import Iterator

from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import ANY_GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated


@rule(
    id="gain-reference-unstated",
    topic="reference and unit",
    needs=(ANY_GAIN,),
    formula="dBi = dBd + 2.15",
    source="IEEE Std 145-2013, gain; half-wave dipole 4/Cin(2π) = 1.641 (Balanis, ch. 4)",
    tiers=(("gain in bare dB", "unclear"),),
)
def gain_reference_unstated(facts: Facts) -> Iterator[Conflict]:
    """Gain in dB without its reference.

    What it checks
    --------------
    Every gain names its reference: dBi (isotropic), dBd (half-wave dipole) or dBic (circular).

    Why it must hold
    ----------------
    The same antenna is 2.15 dB 'better' in dBi than in dBd. Until the vendor names the
    reference, the figure is an interval that covers both.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Gain: 12 dB

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain: 12 dBi
    """
    for gain in facts.gains:
        if gain.stated.unit != "dB":
            continue
        low, high = gain.normalized.nominal, gain.normalized.nominal + 2.15
        yield Conflict(
            severity=Severity.UNCLEAR,
            claims=(gain.id,),
            message=(
                f"The sheet states a gain of {stated(gain)} without saying against what. It means "
                f"{figure(low, 'dBi')} against an isotropic source or {figure(high, 'dBi')} against "
                "a half-wave dipole, a difference of 2.15 dB."
            ),
            question=f"Is the gain of {stated(gain)} meant in dBi or in dBd?",
            working=f"{stated(gain)} = {figure(low, 'dBi')} or {figure(low, 'dBi')} + 2.15 dB",
            assumption="A rule that uses this gain takes the meaning that favours the vendor.",
        )
