"""plane-unstated: one beamwidth without its plane."""

from __future__ import annotations

from collections.abc import Iterator

from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import BEAMWIDTH
from specs.rules.rule import Conflict, rule
from specs.rules.words import stated


@rule(
    id="plane-unstated",
    topic="reference and unit",
    needs=(BEAMWIDTH,),
    applies=lambda facts: not facts.omnidirectional,
    formula="a beam has two widths, each in its plane",
    source="IEEE Std 145-2013, half-power beamwidth",
    tiers=(("a beamwidth without its plane, no other plane stated", "unclear"),),
)
def plane_unstated(facts: Facts) -> Iterator[Conflict]:
    """Beamwidth without its plane.

    What it checks
    --------------
    Each beamwidth of a directional antenna says in which plane it is taken.

    Why it must hold
    ----------------
    A beam of 60° by 60° has eight times the solid angle of one of 60° by 7°, and so eight times
    less gain.

    Flagged
    -------
    Panel antenna
    Frequency: 2400-2500 MHz
    Gain: 14 dBi
    Beamwidth: 30°

    Accepted
    --------
    Panel antenna
    Frequency: 2400-2500 MHz
    Gain: 14 dBi
    Horizontal beamwidth: 30°
    Vertical beamwidth: 30°
    """
    if facts.beams:
        return
    for width in facts.beamwidths(None):
        yield Conflict(
            severity=Severity.UNCLEAR,
            claims=(width.id,),
            message=(
                f"The sheet states a beamwidth of {stated(width)} without its plane. The other "
                "plane may be as wide or much narrower, so the gain cannot be held against it."
            ),
            question=(
                f"In which plane is the half-power beamwidth {stated(width)}, and what is it in "
                "the other plane?"
            ),
        )
