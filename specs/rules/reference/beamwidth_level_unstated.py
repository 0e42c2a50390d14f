"""beamwidth-level-unstated: a width at another level than half power."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Claim, Quantity
from specs.physics.estimates import gaussian_width_deg
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import BEAMWIDTH
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated


def _at_other_levels(facts: Facts) -> list[Claim]:
    widths = facts.of(Quantity.BEAMWIDTH)
    return [w for w in widths if w.level_db is not None and w.level_db < -3.5]


@rule(
    id="beamwidth-level-unstated",
    topic="reference and unit",
    needs=(BEAMWIDTH,),
    formula="θ(−3 dB) = θ(−10 dB)·√0.301 for a Gaussian lobe",
    source="IEEE Std 145-2013, half-power beamwidth; ratio derived for a Gaussian lobe",
    tiers=(("a beamwidth at −6 or −10 dB", "note"),),
)
def beamwidth_level_unstated(facts: Facts) -> Iterator[Conflict]:
    """Beamwidth at another level than −3 dB.

    What it checks
    --------------
    Beamwidths are half-power (−3 dB) widths, and say so where the sheet also prints others.

    Why it must hold
    ----------------
    The −10 dB width of a beam is nearly twice its −3 dB width.

    Flagged
    -------
    Panel antenna
    Frequency: 2400-2500 MHz
    Gain: 14 dBi
    Horizontal beamwidth (-10 dB): 55°
    Vertical beamwidth: 30°

    Accepted
    --------
    Panel antenna
    Frequency: 2400-2500 MHz
    Gain: 14 dBi
    Horizontal beamwidth: 30°
    Vertical beamwidth: 30°
    """
    for width in _at_other_levels(facts):
        level = abs(width.level_db or 0.0)
        estimate = gaussian_width_deg(width.normalized.nominal, level)
        yield Conflict(
            severity=Severity.NOTE,
            claims=(width.id,),
            message=(
                f"The beamwidth of {stated(width)} is taken at −{level:g} dB, not at half power. It "
                "is not used against the gain. For a Gaussian lobe the −3 dB width would be about "
                f"{figure(estimate, 'deg', 0)}."
            ),
            question=f"What is the half-power (−3 dB) beamwidth that goes with {stated(width)}?",
            assumption="The conversion holds for a Gaussian lobe only.",
        )
