"""dual-units-disagree: one figure in two units that do not match."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Claim
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated
from specs.units.figures import Figure, find_figures
from specs.units.glyphs import fold
from specs.units.linear import factor
from specs.units.spellings import measures

_LINEAR = frozenset({"length", "frequency", "power", "area"})


@rule(
    id="dual-units-disagree",
    topic="identities",
    needs=(),
    formula="1 in = 25.4 mm; 1 ft = 304.8 mm; 1 GHz = 1000 MHz",
    source="international inch and foot (exact by definition)",
    tiers=(("beyond rounding", "doubtful"),),
)
def dual_units_disagree(facts: Facts) -> Iterator[Conflict]:
    """Two units of one figure that disagree.

    What it checks
    --------------
    Where a figure is printed in two units ('610 mm (24 in)'), both say the same within rounding.

    Why it must hold
    ----------------
    It is one length, frequency or power. When the two differ, one is a slip, and size rules may be
    judging the wrong one.

    Flagged
    -------
    Frequency: 863-870 MHz
    Gain: 5 dBi
    Length: 750 mm (24 in)

    Accepted
    --------
    Frequency: 863-870 MHz
    Gain: 5 dBi
    Length: 610 mm (24 in)
    """
    for claim in facts.antenna.claims:
        unit = claim.stated.unit
        if not unit or measures(unit) not in _LINEAR:
            continue
        for other in _other_units(claim):
            scale = factor(other.unit, unit)
            low, high = (
                (other.low - other.half_step) * scale,
                (other.high + other.half_step) * scale,
            )
            step = claim.stated.half_step
            if low <= claim.stated.high + step and high >= claim.stated.low - step:
                continue
            converted = other.low * scale
            yield Conflict(
                severity=Severity.DOUBTFUL,
                claims=(claim.id,),
                message=(
                    f"The sheet prints {stated(claim)} and {other.text.strip()} for one figure. "
                    f"{other.text.strip()} is {figure(converted, unit)}."
                ),
                question=f"Which is right: {stated(claim)} or {other.text.strip()}?",
                working=f"{other.low:g} {other.unit} = {converted:.4g} {unit}",
            )


def _other_units(claim: Claim) -> list[Figure]:
    """The same single figure repeated in parentheses in another unit."""
    text = fold(claim.stated.text)
    inside = text[text.find("(") + 1 : text.rfind(")")] if "(" in text and ")" in text else ""
    figures = find_figures(inside)
    products = "x" in inside or len(figures) != 1
    outside = find_figures(text[: text.find("(")]) if inside else []
    if products or len(outside) != 1:
        return []
    unit = claim.stated.unit
    return [f for f in figures if f.unit and f.unit != unit and measures(f.unit) == measures(unit)]
