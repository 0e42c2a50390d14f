"""waveguide-below-cutoff: a can too narrow or too wide for its band."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Trait
from specs.physics.waveguide import te11_cutoff_mhz, tm01_cutoff_mhz
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import FREQUENCY
from specs.rules.rule import Conflict, Need, rule
from specs.rules.words import figure, stated

NEAR = 0.03
DIAMETER = Need("the diameter of the waveguide", lambda f: f.size("diameter") is not None)


@rule(
    id="waveguide-below-cutoff",
    topic="gain against size",
    needs=(FREQUENCY, DIAMETER),
    applies=lambda facts: Trait.OPEN_WAVEGUIDE in facts.antenna.traits,
    formula="TE11 from d/λ = 0.586, TM01 from d/λ = 0.766",
    source="zeros 1.8412 of J1' and 2.4048 of J0 (Abramowitz & Stegun); computed in the tests",
    tiers=(("between the cut-offs", "ordinary"), ("within 3 %", "note"),
           ("above TM01", "doubtful"), ("below TE11 at the top of the band", "impossible")),
)  # fmt: skip
def waveguide_below_cutoff(facts: Facts) -> Iterator[Conflict]:
    """Open circular waveguide against its cut-off.

    What it checks
    --------------
    The band of a can antenna lies above the cut-off of its first mode and below that of the next.

    Why it must hold
    ----------------
    Below the TE11 cut-off no wave travels in the guide. Above the TM01 cut-off a second mode
    spoils the pattern.

    Flagged
    -------
    Can antenna (open waveguide)
    Frequency: 2400-2500 MHz
    Gain: 8 dBi
    Diameter: 65 mm

    Accepted
    --------
    Can antenna (open waveguide)
    Frequency: 2400-2500 MHz
    Gain: 8 dBi
    Diameter: 83 mm
    """
    diameter = facts.size("diameter")
    if diameter is None or not facts.bands:
        return
    bottom, top = min(b[0] for b in facts.bands), max(b[1] for b in facts.bands)
    first = float(te11_cutoff_mhz(diameter.normalized.high))
    second = float(tm01_cutoff_mhz(diameter.normalized.low))
    if top < first:
        severity, limit, name = Severity.IMPOSSIBLE, first, "TE11 cut-off"
        fact = f"below {figure(first, 'MHz', 0)} no wave travels in it"
    elif bottom < first * (1 + NEAR):
        severity, limit, name = Severity.NOTE, first, "TE11 cut-off"
        fact = f"its first mode starts only at {figure(first, 'MHz', 0)}"
    elif top > second:
        near = top <= second * (1 + NEAR)
        severity, limit, name = Severity.NOTE if near else Severity.DOUBTFUL, second, "TM01 cut-off"
        fact = f"above {figure(second, 'MHz', 0)} a second mode travels in it too"
    else:
        return
    yield Conflict(
        severity=severity,
        claims=(diameter.id,),
        message=(
            f"The sheet states a guide of {stated(diameter)} for {bottom:.0f} to {top:.0f} MHz; {fact}."
        ),
        question=f"Is {stated(diameter)} the inner diameter of the guide?",
        working=f"0.586·c/d = {first:.0f} MHz, 0.766·c/d = {second:.0f} MHz",
        bound=Bound(limit, "MHz", name),
    )
