"""efficiency-out-of-range: above 100 % or not above 0."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.physics.decibels import to_db
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import EFFICIENCY
from specs.rules.rule import Conflict, rule
from specs.rules.words import stated


@rule(
    id="efficiency-out-of-range",
    topic="identities",
    needs=(EFFICIENCY,),
    formula="0 < η ≤ 1",
    source="IEEE Std 145-2013, radiation efficiency: conservation of energy",
    tiers=(("above 100 % (0 dB), or not above 0", "impossible"),),
)
def efficiency_out_of_range(facts: Facts) -> Iterator[Conflict]:
    """Efficiency above 100 % or not above zero.

    What it checks
    --------------
    An efficiency lies above 0 and at most at 100 % (0 dB).

    Why it must hold
    ----------------
    It is the share of the accepted power that is radiated.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Efficiency: 105 %

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Efficiency: 65 %
    """
    for claim in facts.of(Quantity.EFFICIENCY):
        low, high = claim.normalized.low, claim.normalized.high
        if claim.kind == "aperture" or (high > 0 and low <= 100):
            continue
        above = low > 100
        yield Conflict(
            severity=Severity.IMPOSSIBLE,
            claims=(claim.id,),
            message=(
                f"The sheet states an efficiency of {stated(claim)}. "
                + ("No antenna radiates more power than it accepts, which is 100 % (0 dB)."
                   if above else "An antenna that radiates has an efficiency above 0.")
            ),
            question=f"What is the measured efficiency behind '{stated(claim)}', and of which kind?",
            working=f"{low:.2f} % > 100 %" if above else f"{high:.2f} % ≤ 0 %",
            margin_db=float(to_db(low / 100)) if above else None,
            bound=Bound(100.0 if above else 0.0, "%", "conservation of energy"),
        )  # fmt: skip
