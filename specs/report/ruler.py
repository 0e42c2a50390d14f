"""The geometry of the margin ruler, once for text and picture.

One horizontal scale: the zones, the bound as a tall tick, the claim as a short interval with a dot
at its nominal.
"""

from __future__ import annotations

from dataclasses import dataclass

from specs.report.model import RulerEntry


@dataclass(frozen=True, slots=True)
class Span:
    """A stretch of the scale, in shares of its length (0 to 1), with its standing."""

    start: float
    end: float
    standing: str


@dataclass(frozen=True, slots=True)
class Scale:
    """A ruler laid out: ``low`` and ``high`` are the ends of the scale in the ruler's unit."""

    low: float
    high: float
    spans: tuple[Span, ...]
    bound: float
    claim: tuple[float, float]
    nominal: float

    def at(self, value: float) -> float:
        """Where a value stands, in shares of the length."""
        return min(max((value - self.low) / (self.high - self.low), 0.0), 1.0)


def laid_out(ruler: RulerEntry) -> Scale:
    """The scale of a ruler: wide enough for bound, claim and some of the ordinary range."""
    claim_low = ruler.nominal if ruler.low is None else ruler.low
    claim_high = ruler.nominal if ruler.high is None else ruler.high
    marks = [ruler.bound.value, claim_low, claim_high, ruler.nominal]
    edges = [z.high for z in ruler.zones if z.high is not None]
    marks += edges[:1]
    width = max(max(marks) - min(marks), 1.0)
    low, high = min(marks) - 0.6 * width, max(marks) + 0.25 * width
    scale = Scale(low, high, (), 0.0, (0.0, 0.0), 0.0)
    spans = tuple(
        Span(
            scale.at(low if z.low is None else z.low),
            scale.at(high if z.high is None else z.high),
            z.standing,
        )
        for z in ruler.zones
    )
    return Scale(
        low,
        high,
        tuple(s for s in spans if s.end > s.start),
        scale.at(ruler.bound.value),
        (scale.at(claim_low), scale.at(claim_high)),
        scale.at(ruler.nominal),
    )


_MARKS = {"ordinary": "=", "note": "-", "unclear": "-", "doubtful": "~", "implausible": ".",
          "impossible": " "}  # fmt: skip


def as_text(ruler: RulerEntry, width: int = 56) -> list[str]:
    """The ruler in three lines of text: claim, scale, legend."""
    scale = laid_out(ruler)
    line = [" "] * width
    for span in scale.spans:
        for column in range(int(span.start * width), max(int(span.end * width), 1)):
            line[min(column, width - 1)] = _MARKS[span.standing]
    line[min(int(scale.bound * width), width - 1)] = "|"
    claim = [" "] * width
    start, end = (min(int(s * width), width - 1) for s in scale.claim)
    for column in range(start, end + 1):
        claim[column] = "-"
    claim[min(int(scale.nominal * width), width - 1)] = "o"
    unit = f" {ruler.unit}".rstrip()
    legend = (
        f"o claim {ruler.nominal:.1f}{unit}   | {ruler.bound.name} {ruler.bound.value:.1f}{unit}"
    )
    return ["".join(claim).rstrip(), "".join(line).rstrip(), legend]
