"""same-claim-differs: one figure stated twice, differently."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import combinations

from specs.claims import Claim, Quantity
from specs.rules.facts import Facts, same_band, same_conditions
from specs.rules.finding import Severity
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import interval_gap
from specs.rules.words import stated

LEVEL_APART_DB = 3.0
SHARE_APART = 0.25
_LEVELS = frozenset({Quantity.GAIN, Quantity.DIRECTIVITY, Quantity.FRONT_TO_BACK})
_COMPARED = _LEVELS | {Quantity.BEAMWIDTH, Quantity.VSWR, Quantity.EFFICIENCY}


@rule(
    id="same-claim-differs",
    topic="identities",
    needs=(),
    formula="one antenna, band and statistic: one figure",
    source="arithmetic",
    tiers=(("beyond rounding", "doubtful"), ("more than 3 dB or 25 % apart", "implausible")),
)
def same_claim_differs(facts: Facts) -> Iterator[Conflict]:
    """The same figure stated twice with different values.

    What it checks
    --------------
    A quantity stated twice for one antenna, band, plane and statistic has one value; the title or
    product name agrees with the table.

    Why it must hold
    ----------------
    The antenna is one. Which of the two figures the vendor stands by must be asked.

    Flagged
    -------
    # 12 dBi panel antenna
    Frequency: 2400-2500 MHz
    Gain: 10 dBi

    Accepted
    --------
    # 10 dBi panel antenna
    Frequency: 2400-2500 MHz
    Gain: 10 dBi
    """
    claims = [c for c in facts.antenna.claims if c.quantity in _COMPARED]
    for a, b in combinations(claims, 2):
        if _comparable(a, b):
            yield from _compared(a, b, "twice")
    for headline in facts.antenna.headline:
        rivals = [c for c in claims if c.quantity is headline.quantity
                  and (c.plane is headline.plane or headline.plane is None)]  # fmt: skip
        if rivals and not any(_agree(headline, c) for c in rivals):
            nearest = min(
                rivals, key=lambda c: abs(c.normalized.nominal - headline.normalized.nominal)
            )
            yield from _compared(nearest, headline, "in the table and in the title")


def _comparable(a: Claim, b: Claim) -> bool:
    same = (a.quantity, a.plane, a.statistic, a.kind, a.level_db, a.condition, a.stated.relation)
    other = (b.quantity, b.plane, b.statistic, b.kind, b.level_db, b.condition, b.stated.relation)
    if same != other or not same_conditions(a, b) or not same_band(a, b):
        return False
    # A pair in dBi and dBd has a rule of its own.
    return a.stated.unit == b.stated.unit and (a.plane is not None or a.quantity is not _WIDTH)


_WIDTH = Quantity.BEAMWIDTH


def _agree(a: Claim, b: Claim) -> bool:
    # A title rounds: half a unit more than its printed digits is no contradiction.
    slack = 0.5 if a.stated.half_step >= 0.5 else 0.0
    gap = interval_gap((a.normalized.low, a.normalized.high), (b.normalized.low, b.normalized.high))
    return gap <= slack


def _compared(a: Claim, b: Claim, where: str) -> Iterator[Conflict]:
    gap = interval_gap((a.normalized.low, a.normalized.high), (b.normalized.low, b.normalized.high))
    if gap <= 0 or (where.startswith("in") and _agree(b, a)):
        return
    level = a.quantity in _LEVELS
    larger = max(abs(a.normalized.nominal), abs(b.normalized.nominal), 1e-9)
    far = gap > LEVEL_APART_DB if level else gap / larger > SHARE_APART
    name = a.quantity.value.replace("_", " ")
    yield Conflict(
        severity=Severity.IMPLAUSIBLE if far else Severity.DOUBTFUL,
        claims=tuple(c.id for c in (a, b) if c.id),
        message=(
            f"The sheet states the {name} {where}: {stated(a)} and {stated(b)}. One antenna has one."
        ),
        question=f"Which {name} holds: {stated(a)} or {stated(b)}?",
        margin_db=gap if level else None,
    )
