"""bandwidth-above-small-antenna-limit: more bandwidth and efficiency than the size allows."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity, Relation
from specs.physics.small import (
    bode_fano_bandwidth,
    chu_quality,
    chu_quality_two_modes,
    ka_of_radius,
    matched_bandwidth,
)
from specs.rules.facts import SPEED_OF_LIGHT_MM_MHZ, Facts, pairs
from specs.rules.finding import Bound, Severity
from specs.rules.needs import EFFICIENCY, FREQUENCY, SIZE, VSWR
from specs.rules.rule import Conflict, rule
from specs.rules.size.gain_above_small_antenna_limit import steps_lower
from specs.rules.tiers import softened
from specs.rules.words import figure, stated


@rule(
    id="bandwidth-above-small-antenna-limit",
    topic="gain against size",
    needs=(EFFICIENCY, FREQUENCY, VSWR, SIZE),
    formula="η·B ≤ π/(Q·ln(1/|Γ|)), Q from Chu and McLean",
    source=(
        "Chu, J. Appl. Phys. 19, 1948; McLean, IEEE Trans. AP-44, 1996; Fano, J. Franklin Inst. "
        "249, 1950; Yaghjian & Best, IEEE Trans. AP-53, 2005 (formulas from memory)"
    ),
    tiers=(("≤ single-tuned", "ordinary"), ("between", "note"),
           ("beyond Bode–Fano with two modes", "implausible"),
           ("on a board, case or vehicle", "two tiers lower")),
)  # fmt: skip
def bandwidth_above_small_antenna_limit(facts: Facts) -> Iterator[Conflict]:
    """Bandwidth and efficiency against size.

    What it checks
    --------------
    The matched bandwidth times the efficiency is not more than the enclosing sphere allows.

    Why it must hold
    ----------------
    A small antenna stores far more energy than it radiates in a cycle; only losses or size widen
    its band.

    Flagged
    -------
    Helical antenna
    Frequency: 400-480 MHz
    Gain: 1 dBi
    Efficiency: 80 %
    VSWR: 2.0
    Dimensions: 30 x 20 x 20 mm

    Accepted
    --------
    Helical antenna
    Frequency: 433-434 MHz
    Gain: -8 dBi
    Efficiency: 15 %
    VSWR: 2.0
    Dimensions: 30 x 20 x 20 mm
    """
    longest = facts.longest_mm
    bands = [c for c in facts.of(Quantity.FREQUENCY) if c.stated.relation is Relation.RANGE]
    if longest is None:
        return
    for band in bands:
        low, high = band.normalized.low, band.normalized.high
        for efficiency, vswr in pairs(facts.of(Quantity.EFFICIENCY), facts.of(Quantity.VSWR)):
            ratio = vswr.stated.high + vswr.stated.half_step
            if ratio <= 1 or efficiency.normalized.low <= 0 or efficiency.kind == "aperture":
                continue
            middle = (low + high) / 2
            ka = float(ka_of_radius(longest / 2 * 1.12 * middle / SPEED_OF_LIGHT_MM_MHZ))
            if ka >= 1:
                continue
            claimed = (high - low) / middle * efficiency.normalized.low / 100
            single = float(matched_bandwidth(chu_quality(ka), ratio))
            most = float(bode_fano_bandwidth(chu_quality_two_modes(ka), ratio))
            if claimed <= single:
                continue
            raw = Severity.NOTE if claimed <= most else Severity.IMPLAUSIBLE
            severity = softened(raw, steps_lower(facts))
            if severity is None:
                continue
            yield Conflict(
                severity=severity,
                claims=(band.id, efficiency.id, vswr.id),
                message=(
                    f"The sheet states {stated(band)} at VSWR {stated(vswr)} with an efficiency of "
                    f"{stated(efficiency)} from a body of {figure(longest, 'mm', 0)}. Efficiency "
                    f"times relative bandwidth is {100 * claimed:.1f} %, where a body of that size "
                    f"allows {100 * single:.1f} % with a simple match and {100 * most:.1f} % at "
                    "the very most."
                ),
                question=(
                    "On which board and ground plane were bandwidth and efficiency measured, and "
                    "over the whole band at once?"
                ),
                working=f"ka = {ka:.2f}, Q = {float(chu_quality(ka)):.0f}, η·B = {claimed:.3f}",
                assumption="Would hold if a larger structure radiates with the antenna.",
                bound=Bound(100 * most, "%", "efficiency times bandwidth for this size"),
            )
