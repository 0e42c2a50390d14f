"""front-to-back-on-omni: an antenna that radiates all round has no back."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Plane, Quantity, Trait
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import AZIMUTH_WIDTH, FRONT_TO_BACK
from specs.rules.rule import Conflict, Need, rule
from specs.rules.words import stated

EITHER = Need(
    "a front-to-back ratio or an azimuth beamwidth",
    lambda f: FRONT_TO_BACK.met(f) or AZIMUTH_WIDTH.met(f),
)
MOST_RIPPLE_DB = 3.0


@rule(
    id="front-to-back-on-omni",
    topic="identities",
    needs=(EITHER,),
    applies=lambda facts: Trait.OMNIDIRECTIONAL in facts.antenna.traits,
    formula="omnidirectional: azimuth beamwidth 360°, front-to-back about 0 dB",
    source="IEEE Std 145-2013, omnidirectional antenna",
    tiers=(("front-to-back above 3 dB, or azimuth width below 360°", "doubtful"),),
)
def front_to_back_on_omni(facts: Facts) -> Iterator[Conflict]:
    """Front-to-back ratio on an omnidirectional antenna.

    What it checks
    --------------
    An antenna called omnidirectional states no front-to-back ratio, and no azimuth beamwidth below
    360°.

    Why it must hold
    ----------------
    It radiates alike all round, so it has no back. The figure comes from another antenna, or the
    antenna is not omnidirectional.

    Flagged
    -------
    Omnidirectional antenna
    Frequency: 440-470 MHz
    Gain: 5 dBi
    Front-to-back ratio: 20 dB

    Accepted
    --------
    Omnidirectional antenna
    Frequency: 440-470 MHz
    Gain: 5 dBi
    Horizontal beamwidth: 360°
    """
    for ratio in facts.of(Quantity.FRONT_TO_BACK):
        if ratio.normalized.low > MOST_RIPPLE_DB:
            yield _conflict(ratio.id, f"a front-to-back ratio of {stated(ratio)}")
    for width in facts.beamwidths(Plane.AZIMUTH):
        if width.normalized.high < 350:
            yield _conflict(width.id, f"an azimuth beamwidth of {stated(width)}")


def _conflict(claim_id: str, what: str) -> Conflict:
    return Conflict(
        severity=Severity.DOUBTFUL,
        claims=(claim_id,),
        message=(
            f"The sheet calls the antenna omnidirectional and states {what}. An antenna that "
            "radiates alike all round has neither."
        ),
        question=f"Is the antenna omnidirectional, or does {what} hold?",
    )
