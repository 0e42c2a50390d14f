"""band-and-bandwidth-disagree: the band edges and the bandwidth differ."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Claim, Quantity, Relation
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import BANDWIDTH, FREQUENCY
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated

MOST_OFF = 0.05


@rule(
    id="band-and-bandwidth-disagree",
    topic="identities",
    needs=(FREQUENCY, BANDWIDTH),
    formula="bandwidth = f_high − f_low",
    source="arithmetic",
    tiers=(("more than 5 % off", "doubtful"),),
)
def band_and_bandwidth_disagree(facts: Facts) -> Iterator[Conflict]:
    """Bandwidth that does not match the band edges.

    What it checks
    --------------
    A stated bandwidth is the difference of the stated band edges.

    Why it must hold
    ----------------
    It is a difference of two printed figures. A bandwidth narrower than the band often means that
    the antenna must be ordered for a part of it.

    Flagged
    -------
    Frequency: 440-490 MHz
    Bandwidth: 30 MHz
    Gain: 2 dBi

    Accepted
    --------
    Frequency: 440-470 MHz
    Bandwidth: 30 MHz
    Gain: 2 dBi
    """
    ranges = [c for c in facts.of(Quantity.FREQUENCY) if c.stated.relation is Relation.RANGE]
    for width in facts.of(Quantity.BANDWIDTH):
        if not ranges or any(_fits(width, r) for r in ranges):
            continue
        band = ranges[0]
        span = _span(band)
        yield Conflict(
            severity=Severity.DOUBTFUL,
            claims=(band.id, width.id),
            message=(
                f"The sheet states the band {stated(band)}, which is {figure(span, 'MHz')} wide, "
                f"and a bandwidth of {stated(width)}."
            ),
            question=(
                f"Does the antenna cover all of {stated(band)} at once, or {stated(width)} of it, "
                "tuned to order?"
            ),
            working=f"{figure(span, 'MHz')} ≠ {stated(width)}",
            bound=Bound(span, "MHz", "difference of the band edges"),
        )


def _span(band: Claim) -> float:
    """Width of a printed band in MHz, without its rounding."""
    scale = band.normalized.nominal / ((band.stated.high + band.stated.low) / 2)
    return (band.stated.high - band.stated.low) * scale


def _fits(width: Claim, band: Claim) -> bool:
    span = _span(band)
    return width.normalized.low <= span * (1 + MOST_OFF) and width.normalized.high >= span * (
        1 - MOST_OFF
    )
