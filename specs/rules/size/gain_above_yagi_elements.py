"""gain-above-yagi-elements: more gain than that many elements can have."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import AntennaType, Quantity, Trait
from specs.physics.endfire import yagi_element_ceiling_dbi
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import ELEMENTS, GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, above, ruler, standing
from specs.rules.words import figure, gain_words, stated

TIERS: Tiers = ((-0.7, None), (0.0, Severity.NOTE), (0.5, Severity.DOUBTFUL),
                (3.0, Severity.IMPLAUSIBLE), (math.inf, Severity.IMPOSSIBLE))  # fmt: skip


@rule(
    id="gain-above-yagi-elements",
    topic="gain against size",
    needs=(GAIN, ELEMENTS),
    applies=lambda facts: facts.antenna.type == AntennaType.YAGI,
    formula="G ≤ 7.5, 10.6, 12.8, 14.6, 16.1, 17.4, 18.5 dBi for N = 2 to 8 half-wave elements",
    source="derived: N parallel half-wave dipoles with free currents, spacing to zero",
    tiers=(("within 0.7 dB below", "note"), ("≤ 0.5 dB above", "doubtful"),
           ("≤ 3 dB above", "implausible"), ("beyond", "impossible"), ("stacked", "note")),
)  # fmt: skip
def gain_above_yagi_elements(facts: Facts) -> Iterator[Conflict]:
    """Yagi gain against its number of elements.

    What it checks
    --------------
    The gain is not more than N half-wave elements can have with any currents at all.

    Why it must hold
    ----------------
    Each element adds one free current. The best currents, at vanishing spacing, give a ceiling
    that real Yagis stay a decibel or two below.

    Flagged
    -------
    Yagi antenna
    Frequency: 863-870 MHz
    Gain: 16 dBi
    Number of elements: 4

    Accepted
    --------
    Yagi antenna
    Frequency: 863-870 MHz
    Gain: 9 dBi
    Number of elements: 4
    """
    for count in facts.of(Quantity.ELEMENTS):
        ceiling = float(yagi_element_ceiling_dbi(count.normalized.nominal))
        if not math.isfinite(ceiling):
            continue
        for gain in facts.gains:
            excess = gain.normalized.low - ceiling
            severity = standing(excess, TIERS)
            if severity is None:
                continue
            if Trait.STACKED in facts.antenna.traits:
                severity = Severity.NOTE
            bound = Bound(ceiling, "dBi", f"ceiling of {count.normalized.nominal:.0f} elements")
            yield Conflict(
                severity=severity,
                claims=(gain.id, count.id),
                message=(
                    f"The sheet claims {gain_words(gain)} from {count.normalized.nominal:.0f} "
                    f"elements. So many half-wave elements reach {figure(ceiling, 'dBi')} at the "
                    f"very most; the claim is {figure(abs(excess), 'dB')} "
                    f"{'above' if excess > 0 else 'below that, closer than well-built ones come'}."
                ),
                question=(
                    f"How many elements are there, is the antenna stacked or over ground, and is "
                    f"{stated(gain)} in free space?"
                ),
                working=f"{gain.normalized.low:.2f} − {ceiling:.2f} = {excess:.2f} dB",
                assumption="Would hold for stacked antennas, or with the reflection of the ground.",
                margin_db=excess,
                bound=bound,
                ruler=ruler(gain, TIERS, above(ceiling), bound),
            )
