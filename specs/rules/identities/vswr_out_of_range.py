"""vswr-out-of-range: below 1, or so high that it specifies nothing."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.physics.mismatch import power_accepted
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import VSWR
from specs.rules.rule import Conflict, rule
from specs.rules.words import stated

HIGHEST_ORDINARY = 5.0


@rule(
    id="vswr-out-of-range",
    topic="identities",
    needs=(VSWR,),
    formula="VSWR = (1 + |Γ|)/(1 − |Γ|) ≥ 1",
    source="Pozar, Microwave Engineering, ch. 2 (from memory); common practice for the upper end",
    tiers=(("below 1", "impossible"), ("above 5 as a specification", "doubtful")),
)
def vswr_out_of_range(facts: Facts) -> Iterator[Conflict]:
    """VSWR below 1 or above 5.

    What it checks
    --------------
    A VSWR is at least 1, and a specified one not above 5.

    Why it must hold
    ----------------
    It is the ratio of the largest to the smallest voltage along the line. Above 5, less than 56 %
    of the power enters the antenna.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    VSWR: 0.9

    Accepted
    --------
    Frequency: 2400-2500 MHz
    VSWR: 1:1.5
    """
    for claim in facts.of(Quantity.VSWR):
        if claim.stated.low + claim.stated.half_step < 1.0:
            yield Conflict(
                severity=Severity.IMPOSSIBLE,
                claims=(claim.id,),
                message=(
                    f"The sheet states a VSWR of {stated(claim)}. A standing wave ratio is at "
                    "least 1, reached with a perfect match."
                ),
                question=f"What is the VSWR meant by '{claim.stated.text}'?",
                working=f"{claim.stated.low:g} < 1",
                bound=Bound(1.0, "", "perfect match"),
            )
        elif claim.stated.low - claim.stated.half_step > HIGHEST_ORDINARY and (
            claim.band_mhz is None or claim.band_mhz[0] < claim.band_mhz[1]
        ):
            share = 100 * float(power_accepted(claim.stated.low))
            yield Conflict(
                severity=Severity.DOUBTFUL,
                claims=(claim.id,),
                message=(
                    f"The sheet specifies a VSWR of {stated(claim)}. Then only {share:.0f} % of the "
                    "power enters the antenna; specifications are ordinarily below 5."
                ),
                question=f"Is a VSWR of {stated(claim)} really specified, and in which band?",
                working=f"1 − ((s − 1)/(s + 1))² = {share / 100:.2f}",
                bound=Bound(HIGHEST_ORDINARY, "", "ordinary specification"),
            )
