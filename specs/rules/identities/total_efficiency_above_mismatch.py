"""total-efficiency-above-mismatch: more radiated than the mismatch lets in."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity, Relation, Statistic
from specs.physics.decibels import to_db
from specs.physics.mismatch import power_accepted
from specs.rules.facts import Facts, pairs, same_band
from specs.rules.finding import Bound, Severity
from specs.rules.needs import EFFICIENCY, VSWR
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated


@rule(
    id="total-efficiency-above-mismatch",
    topic="identities",
    needs=(EFFICIENCY, VSWR),
    formula="η_total ≤ 1 − |Γ|² at the typical VSWR",
    source="IEEE Std 145-2013, total efficiency, realized gain",
    tiers=(("beyond rounding", "implausible"), ("VSWR only as a maximum", "silent")),
)
def total_efficiency_above_mismatch(facts: Facts) -> Iterator[Conflict]:
    """Total efficiency above what the mismatch lets in.

    What it checks
    --------------
    A total efficiency is not above the share of power that the typical VSWR lets into the antenna.

    Why it must hold
    ----------------
    Total efficiency counts the reflection at the port as a loss. A VSWR stated only as a maximum
    proves nothing, for the true one may be better.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Total efficiency: 85 %
    VSWR: 3.0 typ

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Total efficiency: 85 %
    VSWR: 3.0 max
    """
    for efficiency, vswr in pairs(facts.of(Quantity.EFFICIENCY), facts.of(Quantity.VSWR)):
        typical = vswr.statistic in (Statistic.TYPICAL, Statistic.MINIMUM, Statistic.NOMINAL)
        if efficiency.kind != "total" or not typical or vswr.stated.low < 1:
            continue
        if vswr.stated.relation is Relation.AT_MOST or not same_band(efficiency, vswr):
            continue
        share = 100 * float(power_accepted(max(vswr.stated.low - vswr.stated.half_step, 1.0)))
        least = efficiency.normalized.low
        if least <= share:
            continue
        excess = float(to_db(least / share))
        yield Conflict(
            severity=Severity.IMPLAUSIBLE,
            claims=(efficiency.id, vswr.id),
            message=(
                f"The sheet states a total efficiency of {stated(efficiency)} at a VSWR of "
                f"{stated(vswr)}. That mismatch lets {share:.0f} % of the power into the antenna; "
                f"the claim is {figure(excess, 'dB', 2)} above."
            ),
            question=f"Is the efficiency of {stated(efficiency)} total, or without the mismatch?",
            working=f"1 − ((s − 1)/(s + 1))² = {share / 100:.3f} < {least / 100:.3f}",
            margin_db=excess,
            bound=Bound(share, "%", "share of power accepted"),
        )
