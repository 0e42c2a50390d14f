"""circular-reference-mixed: dBic and dBi do not mean the same on a circular antenna."""

from __future__ import annotations

from collections.abc import Iterator

from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import ANY_GAIN, AXIAL
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated
from specs.units.levels import CIRCULAR_OFFSET_DB


@rule(
    id="circular-reference-mixed",
    topic="reference and unit",
    needs=(ANY_GAIN, AXIAL),
    formula="total = one linear component + 3.01 dB (perfect circular polarization)",
    source="IEEE Std 145-2013, partial gain; derived: 10 log10 2",
    tiers=(("dBic on a linear antenna", "unclear"),
           ("dBi, dBil or dBd on a circular antenna", "unclear")),
)  # fmt: skip
def circular_reference_mixed(facts: Facts) -> Iterator[Conflict]:
    """Reference that does not fit the polarization.

    What it checks
    --------------
    A circular antenna states its gain in dBic, or says that its dBi is of total power; a linear
    antenna does not state dBic.

    Why it must hold
    ----------------
    A gain in dBi on a circular antenna may be total power or one linear component of it. The two
    differ by 3.01 dB.

    Flagged
    -------
    Frequency: 1575-1610 MHz
    Gain: 4 dBi
    Polarization: RHCP

    Accepted
    --------
    Frequency: 1575-1610 MHz
    Gain: 4 dBic
    Polarization: RHCP
    """
    for gain in facts.gains:
        unit = gain.stated.unit
        if unit == "dBic" and facts.linear:
            yield Conflict(
                severity=Severity.UNCLEAR,
                claims=(gain.id,),
                message=(
                    f"The sheet states {stated(gain)}, a circular reference, for an antenna of "
                    "linear polarization. 3.01 dB may be at stake."
                ),
                question=f"Is the gain of {stated(gain)} meant against a linear isotropic source?",
            )
        elif facts.circular and unit in ("dBi", "dBil", "dBd"):
            top = gain.normalized.nominal + CIRCULAR_OFFSET_DB
            yield Conflict(
                severity=Severity.UNCLEAR,
                claims=(gain.id,),
                message=(
                    f"The sheet states {stated(gain)} for a circularly polarized antenna without "
                    "saying whether that is total power or one linear component. In total power "
                    f"it is {figure(gain.normalized.nominal, 'dBic')} or {figure(top, 'dBic')}."
                ),
                question=(
                    f"Is {stated(gain)} the gain in total power (dBic) or in one linear component?"
                ),
            )
