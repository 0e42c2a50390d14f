"""claim-not-readable: text that looks like a claim and could not be read."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.rule import Conflict, rule

_REASONS = frozenset({"not-a-figure", "low-confidence", "unknown-glyph", "unplaced"})
_MAIN = frozenset(
    {Quantity.GAIN, Quantity.DIRECTIVITY, Quantity.BEAMWIDTH, Quantity.EFFICIENCY,
     Quantity.FREQUENCY}
)  # fmt: skip


@rule(
    id="claim-not-readable",
    topic="sheet",
    scope="sheet",
    needs=(),
    formula="what looks like a claim is read, or listed as unread",
    source="common practice, no source",
    tiers=(("a main figure unread and not stated elsewhere", "unclear"), ("else", "note")),
)
def claim_not_readable(facts: Facts) -> Iterator[Conflict]:
    """Text that looks like a claim and could not be read.

    What it checks
    --------------
    Every labelled figure of the sheet was read with confidence.

    Why it must hold
    ----------------
    A figure that was not read was not judged.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    Gain: see chart 7

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain: 7 dBi
    """
    read = {c.quantity for a in facts.sheet.antennas for c in a.claims}
    for item in facts.sheet.unread:
        if item.reason not in _REASONS or item.quantity not in _MAIN:
            continue
        text = " ".join(item.text.split())[:80]
        name = item.quantity.value if item.quantity else "figure"
        yield Conflict(
            severity=Severity.NOTE if item.quantity in read else Severity.UNCLEAR,
            claims=(),
            message=f"'{text}' on page {item.page} looks like a {name} and could not be read.",
            question=f"Please state the {name} that '{text}' means, with its unit.",
        )
