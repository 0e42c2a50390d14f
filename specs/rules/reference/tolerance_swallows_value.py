"""tolerance-swallows-value: a tolerance as large as the claim."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.rule import Conflict, Need, rule
from specs.rules.words import stated

MOST_GAIN_DB = 3.0
SOME = Need("a tolerance", lambda f: any(c.stated.tolerance for c in f.antenna.claims))


@rule(
    id="tolerance-swallows-value",
    topic="reference and unit",
    needs=(SOME,),
    formula="tolerance < 3 dB (gain); tolerance < half of the value (beamwidth)",
    source="common practice, no source",
    tiers=(("gain ±3 dB or more", "unclear"), ("beamwidth ± half of it or more", "unclear")),
)
def tolerance_swallows_value(facts: Facts) -> Iterator[Conflict]:
    """Tolerance as large as the value.

    What it checks
    --------------
    A gain is stated closer than ±3 dB, a beamwidth closer than half of itself.

    Why it must hold
    ----------------
    A wider tolerance lets the claim mean half or twice the power or angle, and nothing can be
    held against it.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Gain: 8 dBi ±3 dB

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain: 8 dBi ±0.5 dB
    """
    for claim in facts.antenna.claims:
        tolerance = claim.stated.tolerance
        if tolerance is None:
            continue
        gain = claim.quantity in (Quantity.GAIN, Quantity.DIRECTIVITY)
        wide = gain and tolerance >= MOST_GAIN_DB
        if claim.quantity is Quantity.BEAMWIDTH:
            wide = tolerance >= 0.5 * claim.stated.low
        if not wide:
            continue
        name = claim.quantity.value
        yield Conflict(
            severity=Severity.UNCLEAR,
            claims=(claim.id,),
            message=(
                f"The sheet states a {name} of {stated(claim)}. A tolerance that wide leaves the "
                f"{name} open."
            ),
            question=f"What {name} does the vendor guarantee, and what is its typical value?",
        )
