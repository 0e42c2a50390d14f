"""directivity-below-isotropic: no antenna radiates less than evenly at its best."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity, Statistic
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import DIRECTIVITY
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated


@rule(
    id="directivity-below-isotropic",
    topic="identities",
    needs=(DIRECTIVITY,),
    formula="D ≥ 1 (0 dBi)",
    source="IEEE Std 145-2013, directivity: the greatest of a pattern whose average is 1",
    tiers=(("peak directivity below 0 dBi", "impossible"),),
)
def directivity_below_isotropic(facts: Facts) -> Iterator[Conflict]:
    """Directivity below 0 dBi.

    What it checks
    --------------
    The peak directivity is at least 0 dBi.

    Why it must hold
    ----------------
    Directivity compares the best direction with the average over all. The best of anything is at
    least its average.

    Flagged
    -------
    Frequency: 863-870 MHz
    Directivity: -1.0 dBi

    Accepted
    --------
    Frequency: 863-870 MHz
    Directivity: 1.8 dBi
    """
    for claim in facts.of(Quantity.DIRECTIVITY):
        if claim.statistic in (Statistic.AVERAGE, Statistic.MINIMUM):
            continue
        short = -claim.normalized.high
        if short > 0:
            yield Conflict(
                severity=Severity.IMPOSSIBLE,
                claims=(claim.id,),
                message=(
                    f"The sheet states a directivity of {stated(claim)}. The best direction of any "
                    f"antenna has at least 0 dBi; the claim is {figure(short, 'dB', 2)} below."
                ),
                question=f"Is {stated(claim)} a gain (with losses) rather than a directivity?",
                working=f"{claim.normalized.high:.2f} dBi < 0 dBi",
                margin_db=short,
                bound=Bound(0.0, "dBi", "isotropic source"),
            )
