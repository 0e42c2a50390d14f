"""vswr-return-loss-disagree: VSWR and return loss describe one reflection."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import Claim, Quantity
from specs.physics.mismatch import return_loss_from_vswr
from specs.rules.facts import Facts, pairs, same_band
from specs.rules.finding import Bound, Severity
from specs.rules.needs import RETURN_LOSS, VSWR
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import difference_tiers, interval_gap, standing
from specs.rules.words import figure, stated

TIERS = difference_tiers(0.5, 1.0, math.inf, Severity.DOUBTFUL)


@rule(
    id="vswr-return-loss-disagree",
    topic="identities",
    needs=(VSWR, RETURN_LOSS),
    formula="RL = −20 log10((s − 1)/(s + 1))",
    source="Pozar, Microwave Engineering, ch. 2 (from memory; table derived)",
    tiers=(("≤ 0.5 dB apart", "ordinary"), ("≤ 1", "note"), ("more", "doubtful"),
           ("return loss printed negative", "note")),
)  # fmt: skip
def vswr_return_loss_disagree(facts: Facts) -> Iterator[Conflict]:
    """VSWR and return loss of one port disagree.

    What it checks
    --------------
    The return loss computed from the stated VSWR equals the stated return loss.

    Why it must hold
    ----------------
    Both are functions of one reflection coefficient, so either fixes the other.

    Flagged
    -------
    Frequency: 2400-2500 MHz
    VSWR: 1.5:1
    Return loss: 20 dB

    Accepted
    --------
    Frequency: 2400-2500 MHz
    VSWR: 1.5:1
    Return loss: 14 dB
    """
    for vswr, loss in pairs(facts.of(Quantity.VSWR), facts.of(Quantity.RETURN_LOSS)):
        if not same_band(vswr, loss) or vswr.stated.low < 1.0:
            continue
        printed = abs(loss.stated.low), abs(loss.stated.high)
        step = loss.stated.half_step
        low, high = min(printed) - step, max(printed) + step
        expected = _return_loss(vswr)
        gap = interval_gap((low, high), expected)
        severity = standing(gap, TIERS)
        if severity is None:
            continue
        middle = float(return_loss_from_vswr(max(vswr.stated.low, 1.0001)))
        yield Conflict(
            severity=severity,
            claims=(vswr.id, loss.id),
            message=(
                f"VSWR {stated(vswr)} means a return loss of {figure(middle, 'dB')}, but the sheet "
                f"states {stated(loss)}; {figure(gap, 'dB')} apart after rounding."
            ),
            question=(
                f"Which holds: VSWR {stated(vswr)} or return loss {stated(loss)}? Are they typical "
                "or guaranteed, and for the same band?"
            ),
            working=f"−20·log10(({vswr.stated.low:g} − 1)/({vswr.stated.low:g} + 1)) = {middle:.2f} dB",
            margin_db=gap,
            bound=Bound(middle, "dB", "return loss of the stated VSWR"),
        )


def _return_loss(vswr: Claim) -> tuple[float, float]:
    """The return losses that the printed digits of a VSWR allow, low and high."""
    step = vswr.stated.half_step
    worst = vswr.stated.high + step
    best = max(vswr.stated.low - step, 1.0001)
    return float(return_loss_from_vswr(worst)), float(return_loss_from_vswr(best))
