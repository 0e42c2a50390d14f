"""omni-gain-above-beamwidth-limit: more gain than a band that high can have."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import AntennaType, Claim, Trait
from specs.physics.beamwidth import (
    omni_limit_dbi,
    omni_metric,
    omni_over_ground_limit_dbi,
    omni_over_ground_metric,
)
from specs.physics.decibels import to_db
from specs.physics.estimates import mcdonald_dbi, pozar_dbi
from specs.rules.beamwidth.gain_above_beamwidth_limit import judged_gains
from specs.rules.facts import Facts, same_conditions
from specs.rules.finding import Bound, Severity
from specs.rules.needs import GAIN, VERTICAL_WIDTH
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, ruler, standing
from specs.rules.words import band_words, figure, gain_words, stated

TIERS: Tiers = ((1.12, None), (1.40, Severity.DOUBTFUL), (2.0, Severity.IMPLAUSIBLE),
                (math.inf, Severity.IMPOSSIBLE))  # fmt: skip


def over_ground(facts: Facts) -> bool:
    """Whether the antenna stands on a large ground plane, so that it radiates into half of space.

    In the vendor's favour: over ground the limit is 3 dB higher.
    """
    return Trait.GROUND_PLANE in facts.antenna.traits or facts.antenna.type == AntennaType.MONOPOLE


@rule(
    id="omni-gain-above-beamwidth-limit",
    topic="gain against beamwidth",
    needs=(GAIN, VERTICAL_WIDTH),
    applies=lambda facts: facts.omnidirectional,
    formula="ro = G·sin(θv/2) ≤ 2; over a large ground plane G·sin(e)/2 ≤ 2",
    source=(
        "derived: D ≤ 8π/Ω of the −3 dB band, exact on the sphere; context: McDonald, IEEE Trans. "
        "AP-26, 1978, and Pozar, IEEE AP Magazine 35(5), 1993 (constants from memory)"
    ),
    tiers=(("ro ≤ 1.12", "ordinary"), ("ro ≤ 1.40", "doubtful"), ("ro ≤ 2", "implausible"),
           ("above", "impossible")),
)  # fmt: skip
def omni_gain_above_beamwidth_limit(facts: Facts) -> Iterator[Conflict]:
    """Omnidirectional gain above what the vertical beamwidth allows.

    What it checks
    --------------
    The stated gain of an omnidirectional antenna is not more than a band of the stated vertical
    half-power width can have.

    Why it must hold
    ----------------
    Power that goes all round can be gathered only by making the band flat. A half-wave dipole has
    2.15 dBi with 78°; twice the gain needs half the height of the band.

    Flagged
    -------
    Omnidirectional antenna
    Frequency: 863-870 MHz
    Gain: 10 dBi
    Vertical beamwidth: 32°

    Accepted
    --------
    Omnidirectional antenna
    Frequency: 863-870 MHz
    Gain: 5 dBi
    Vertical beamwidth: 32°
    """
    ground = over_ground(facts)
    for gain in judged_gains(facts):
        for width in facts.vertical_widths:
            if same_conditions(gain, width) and width.normalized.low > 0:
                conflict = _judged(gain, width, ground)
                if conflict is not None:
                    yield conflict


def _judged(gain: Claim, width: Claim, ground: bool) -> Conflict | None:
    least, narrow = gain.normalized.low, min(width.normalized.low, 180.0)
    if ground:
        # A width over ground is printed as the full width or as the elevation of its edge; the
        # edge at the full width would favour no one, so the edge is half of the printed width.
        edge = min(narrow / 2, 90.0)
        measure = omni_over_ground_metric(least, edge)
        unit = omni_over_ground_metric(0.0, edge)
        limit = float(omni_over_ground_limit_dbi(edge))
    else:
        measure, unit = omni_metric(least, narrow), omni_metric(0.0, narrow)
        limit = float(omni_limit_dbi(narrow))
    severity = standing(float(measure), TIERS)
    if severity is None:
        return None

    def to_dbi(metric: float) -> float:
        return float(to_db(metric / unit))

    ordinary = to_dbi(TIERS[0][0])
    impossible = severity is Severity.IMPOSSIBLE
    bound = (
        Bound(limit, "dBi", "limit for any omnidirectional antenna")
        if impossible
        else Bound(ordinary, "dBi", "top of the ordinary range")
    )
    margin = least - bound.value
    name = gain.quantity.value
    place = " over a ground plane" if ground else ""
    return Conflict(
        severity=severity,
        claims=(gain.id, width.id),
        message=(
            f"The sheet claims an omnidirectional {name} of {gain_words(gain)} with a vertical "
            f"beamwidth of {stated(width)}{band_words(gain)}{place}. "
            + (
                f"A band that high cannot exceed {figure(limit, 'dBi')} even with no loss, and "
                f"ordinary antennas reach {figure(ordinary, 'dBi')}; the claim is "
                f"{figure(margin, 'dB')} above the limit."
                if impossible
                else f"Ordinary antennas with a band that high reach {figure(ordinary, 'dBi')}; the "
                f"claim is {figure(margin, 'dB')} above that."
            )
        ),
        question=(
            f"A vertical beamwidth of {stated(width)} explains at most {figure(ordinary, 'dBi')}. "
            f"Is the {name} of {stated(gain)} measured, and against which reference? Please send "
            "the elevation pattern."
        ),
        working=(
            f"ro = 10^({least:.2f}/10)·sin({narrow:.2f}°/2) = {float(measure):.2f}"
            if not ground
            else f"ro = 10^({least:.2f}/10)·sin({narrow / 2:.2f}°)/2 = {float(measure):.2f}"
        )
        + f"; McDonald {mcdonald_dbi(narrow):.1f}, Pozar {pozar_dbi(narrow):.1f} dBi",
        assumption=(
            "Would hold if the beam were not round but directional, or the beamwidth a half-angle."
        ),
        margin_db=margin,
        bound=bound,
        ruler=ruler(gain, TIERS, to_dbi, bound),
    )
