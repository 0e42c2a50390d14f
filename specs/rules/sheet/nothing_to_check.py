"""nothing-to-check: no physical rule could run."""

from __future__ import annotations

from collections.abc import Iterator

from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.needs import BEAM, FREQUENCY, GAIN, SIZE, VERTICAL_WIDTH
from specs.rules.rule import Conflict, rule


@rule(
    id="nothing-to-check",
    topic="sheet",
    needs=(),
    formula="gain against beamwidth, size or efficiency: at least one pair",
    source="common practice, no source",
    tiers=(("no pair of figures to hold against each other", "unclear"),),
)
def nothing_to_check(facts: Facts) -> Iterator[Conflict]:
    """An antenna of which nothing could be checked.

    What it checks
    --------------
    At least one claim can be held against another.

    Why it must hold
    ----------------
    A gain that stands alone cannot be shown to be false, nor to be true.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Gain: 7 dBi

    Accepted
    --------
    Panel antenna
    Frequency: 2400-2500 MHz
    Gain: 9 dBi
    Horizontal beamwidth: 60°
    Vertical beamwidth: 60°
    """
    if _checkable(facts):
        return
    width = "the vertical beamwidth" if facts.omnidirectional else "both half-power beamwidths"
    wanted = [words for words, need in (
        ("the gain with its reference", GAIN), ("the frequency band", FREQUENCY),
        ("the size of the radiating part", SIZE),
    ) if not need.met(facts)]  # fmt: skip
    asked = ", ".join([*wanted, width])
    yield Conflict(
        severity=Severity.UNCLEAR,
        claims=(),
        message=(
            "Nothing on the sheet can be held against the claims of this antenna, so they are "
            "neither confirmed nor refuted."
        ),
        question=f"Please state {asked}.",
    )


def _checkable(facts: Facts) -> bool:
    if not facts.gains:
        return False
    beam = VERTICAL_WIDTH if facts.omnidirectional else BEAM
    sized = SIZE.met(facts) and FREQUENCY.met(facts)
    quantities = {c.quantity.value for c in facts.antenna.claims}
    tied = {"directivity", "efficiency", "effective_area", "antenna_factor", "elements"}
    return beam.met(facts) or sized or bool(quantities & tied)
