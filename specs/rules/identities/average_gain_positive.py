"""average-gain-positive: an average over the sphere above 0 dBi."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity, Statistic
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.rule import Conflict, Need, rule
from specs.rules.words import figure, stated

AVERAGE = Need(
    "an average gain",
    lambda f: any(g.statistic is Statistic.AVERAGE for g in f.of(Quantity.GAIN)),
)


@rule(
    id="average-gain-positive",
    topic="identities",
    needs=(AVERAGE,),
    formula="average of G over the sphere = η ≤ 1 (0 dBi)",
    source="IEEE Std 145-2013, gain, radiation efficiency",
    tiers=(("above 0 dBi, 'over the sphere' said", "impossible"),
           ("above 0 dBi, average of what not said", "unclear")),
)  # fmt: skip
def average_gain_positive(facts: Facts) -> Iterator[Conflict]:
    """Average gain above 0 dBi.

    What it checks
    --------------
    A gain averaged over the sphere is not above 0 dBi.

    Why it must hold
    ----------------
    The average of the gain over all directions is the efficiency. Sheets also call 'average' the
    mean of the peaks over the band, which may well be above 0 dBi; they must say so.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Average gain: 2.5 dBi

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Average gain: -2.5 dBi
    """
    for gain in facts.of(Quantity.GAIN):
        if gain.statistic is not Statistic.AVERAGE or gain.normalized.low <= 0:
            continue
        printed = " ".join(e.text for e in gain.evidence).lower()
        sphere = "sphere" in printed or "3d" in printed or "spherical" in printed
        yield Conflict(
            severity=Severity.IMPOSSIBLE if sphere else Severity.UNCLEAR,
            claims=(gain.id,),
            message=(
                f"The sheet states an average gain of {stated(gain)}. Averaged over the sphere a "
                "gain cannot exceed 0 dBi, for that average is the efficiency; the claim is "
                f"{figure(gain.normalized.low, 'dB')} above."
                + ("" if sphere else " It may be the mean of the peaks over the band.")
            ),
            question=f"Over what is the gain of {stated(gain)} averaged: sphere, cut, or band?",
            working=f"{gain.normalized.low:.2f} dBi > 0 dBi",
            margin_db=gain.normalized.low,
            bound=Bound(0.0, "dBi", "average over the sphere"),
        )
