"""gain-above-beamwidth-limit: more gain than a beam that wide can have."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import Claim, Quantity, Statistic, Trait
from specs.physics.beamwidth import beam_metric, convex_limit_dbi, elliptical_limit_dbi
from specs.physics.decibels import to_db
from specs.physics.estimates import gaussian_dbi, kraus_dbi, practical_high_dbi
from specs.rules.facts import Facts, same_conditions
from specs.rules.finding import Bound, Severity
from specs.rules.needs import BEAM, GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, ruler, standing
from specs.rules.words import band_words, figure, gain_words, stated

NARROW_DEG = 40.0
VERY_WIDE_DEG = 125.0
_IMPOSSIBLE = (math.inf, Severity.IMPOSSIBLE)

NARROW: Tiers = ((0.80, None), (0.95, Severity.NOTE), (1.25, Severity.DOUBTFUL),
                 (2.0, Severity.IMPLAUSIBLE), _IMPOSSIBLE)  # fmt: skip
WIDE: Tiers = ((0.93, None), (1.05, Severity.NOTE), (1.30, Severity.DOUBTFUL),
               (2.0, Severity.IMPLAUSIBLE), _IMPOSSIBLE)  # fmt: skip
# True cosine patterns with n < 1, more than 125° wide, reach r = 1.13 (integrated in the tests).
VERY_WIDE: Tiers = ((1.05, None), (1.20, Severity.NOTE), (1.35, Severity.DOUBTFUL),
                    (2.0, Severity.IMPLAUSIBLE), _IMPOSSIBLE)  # fmt: skip


def tiers_for(width1_deg: float, width2_deg: float) -> Tiers:
    """The tiers of r = G·sin(θ1/4)·sin(θ2/4) for a beam of these widths."""
    widest = max(width1_deg, width2_deg)
    if widest <= NARROW_DEG:
        return NARROW
    return WIDE if widest <= VERY_WIDE_DEG else VERY_WIDE


def judged_gains(facts: Facts) -> tuple[Claim, ...]:
    """Gains, and directivities, that the beamwidths can be held against."""
    return (*facts.gains, *facts.of(Quantity.DIRECTIVITY))


@rule(
    id="gain-above-beamwidth-limit",
    topic="gain against beamwidth",
    needs=(GAIN, BEAM),
    applies=lambda facts: not facts.omnidirectional,
    formula="r = G·sin(θ1/4)·sin(θ2/4) ≤ 2, for any antenna",
    source=(
        "derived: D ≤ 8π/Ω of the −3 dB region, exact on the sphere; ordinary range from integrated "
        "apertures and arrays; context: Kraus 41 253, Gaussian 36 407, practical 26 000 to 32 400 "
        "square degrees (from memory)"
    ),
    tiers=(
        ("both widths ≤ 40°: r ≤ 0.80", "ordinary"), ("r ≤ 0.95", "note"),
        ("r ≤ 1.25", "doubtful"), ("r ≤ 2", "implausible"), ("above", "impossible"),
        ("a width > 40°: r ≤ 0.93", "ordinary"), ("r ≤ 1.05", "note"), ("r ≤ 1.30", "doubtful"),
        ("a width > 125°: r ≤ 1.05", "ordinary"), ("r ≤ 1.20", "note"), ("r ≤ 1.35", "doubtful"),
    ),
)  # fmt: skip
def gain_above_beamwidth_limit(facts: Facts) -> Iterator[Conflict]:
    """Gain above what the beamwidths allow.

    What it checks
    --------------
    The stated gain is not more than a beam of the stated half-power widths can have.

    Why it must hold
    ----------------
    Inside its −3 dB contour an antenna radiates at least half of its peak everywhere. The wider
    the contour, the more power that takes, and the less is left for gain. No loss and nothing
    outside the beam is assumed in the limit; ordinary antennas stay well below it.

    Flagged
    -------
    Sector panel
    Frequency: 5150-5850 MHz
    Gain: 23 dBi
    Horizontal beamwidth: 90°
    Vertical beamwidth: 8°

    Accepted
    --------
    Sector panel
    Frequency: 5150-5850 MHz
    Gain: 16 dBi
    Horizontal beamwidth: 90°
    Vertical beamwidth: 8°
    """
    two_lobes = Trait.BIDIRECTIONAL in facts.antenna.traits
    for gain in judged_gains(facts):
        for first, second in facts.beams:
            if not (same_conditions(gain, first) and same_conditions(gain, second)):
                continue
            conflict = _judged(gain, first, second, two_lobes)
            if conflict is not None:
                yield conflict


def _judged(gain: Claim, first: Claim, second: Claim, two_lobes: bool) -> Conflict | None:
    # The corner that favours the vendor: the least gain with the narrowest widths.
    width1 = max(first.normalized.low, 0.01)
    width2 = max(second.normalized.low, 0.01)
    least = gain.normalized.low
    lobes = 2.0 if two_lobes else 1.0
    measure = lobes * beam_metric(least, width1, width2)
    tiers = tiers_for(width1, width2)
    severity = standing(measure, tiers)
    if severity is None:
        return None
    beyond_convex = least > convex_limit_dbi(width1, width2) - to_db(lobes)
    if gain.statistic is Statistic.MINIMUM and severity is Severity.NOTE:
        return None
    unit = beam_metric(0.0, width1, width2) * lobes

    def to_dbi(metric: float) -> float:
        return float(to_db(metric / unit))

    limit = float(elliptical_limit_dbi(width1, width2) - to_db(lobes))
    ordinary = to_dbi(tiers[0][0])
    bound = (
        Bound(limit, "dBi", "limit for any antenna")
        if severity is Severity.IMPOSSIBLE
        else Bound(ordinary, "dBi", "top of the ordinary range")
    )
    margin = least - bound.value
    name = gain.quantity.value
    return Conflict(
        severity=severity,
        claims=(gain.id, first.id, second.id),
        message=(
            f"The sheet claims a {name} of {gain_words(gain)} with a {stated(first)} by "
            f"{stated(second)} beam{band_words(gain)}. "
            + (
                f"A beam that wide cannot exceed {figure(limit, 'dBi')} even with no loss and "
                f"nothing outside it, and ordinary antennas reach {figure(ordinary, 'dBi')}; the "
                f"claim is {figure(margin, 'dB')} above the limit."
                if severity is Severity.IMPOSSIBLE
                else f"Ordinary antennas with a beam that wide reach {figure(ordinary, 'dBi')} and "
                f"none can exceed {figure(limit, 'dBi')}; the claim is {figure(margin, 'dB')} above "
                "the ordinary range."
            )
        ),
        question=(
            f"With half-power beamwidths of {stated(first)} and {stated(second)} we can explain at "
            f"most {figure(ordinary, 'dBi')}. Can you send the measured patterns behind the {name} "
            f"of {stated(gain)}, and confirm its reference?"
        ),
        working=(
            f"r = 10^({least:.2f}/10)·sin({width1:.2f}°/4)·sin({width2:.2f}°/4)"
            f"{'·2' if two_lobes else ''} = {measure:.2f}; Kraus {kraus_dbi(width1, width2):.1f}, "
            f"Gaussian {gaussian_dbi(width1, width2):.1f}, practical "
            f"{practical_high_dbi(width1, width2):.1f} dBi"
        ),
        assumption=(
            "Impossible whatever the shape of the −3 dB contour, as long as it is convex."
            if beyond_convex
            else "Would hold only if the −3 dB contour were pinched between the two planes, or the "
            "beamwidths were half-angles or taken at another level."
        ),
        margin_db=margin,
        bound=bound,
        ruler=ruler(gain, tiers, to_dbi, bound),
    )
