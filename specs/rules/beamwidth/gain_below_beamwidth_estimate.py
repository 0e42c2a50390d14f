"""gain-below-beamwidth-estimate: far less gain than the beamwidths promise."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import Claim, Statistic
from specs.physics.beamwidth import beam_metric, omni_metric
from specs.physics.decibels import to_db
from specs.rules.facts import Facts, same_conditions
from specs.rules.finding import Bound, Severity
from specs.rules.needs import GAIN
from specs.rules.rule import Conflict, Need, rule
from specs.rules.words import band_words, figure, gain_words, stated

BEAM_NOTE, BEAM_DOUBTFUL = 0.20, 0.10
OMNI_NOTE, OMNI_DOUBTFUL = 0.30, 0.15
_BEAM_ESTIMATE, _OMNI_ESTIMATE = 0.60, 0.94

WIDTHS = Need(
    "half-power beamwidths (both planes, or the vertical one of an omnidirectional antenna)",
    lambda facts: bool(facts.vertical_widths if facts.omnidirectional else facts.beams),
)


@rule(
    id="gain-below-beamwidth-estimate",
    topic="gain against beamwidth",
    needs=(GAIN, WIDTHS),
    formula="r = G·sin(θ1/4)·sin(θ2/4), ordinarily 0.35 to 0.75; ro = G·sin(θv/2), 0.70 to 1.0",
    source="derived from integrated patterns; a badly tuned antenna can be this low",
    tiers=(("r 0.10 to 0.20", "note"), ("r < 0.10", "doubtful"),
           ("ro 0.15 to 0.30", "note"), ("ro < 0.15", "doubtful")),
)  # fmt: skip
def gain_below_beamwidth_estimate(facts: Facts) -> Iterator[Conflict]:
    """Gain far below what the beamwidths promise.

    What it checks
    --------------
    The gain is not so low for the stated beamwidths that one of the figures is likely misprinted.

    Why it must hold
    ----------------
    Nothing forbids a lossy antenna. But a gain 7 dB under the beamwidths is more often a
    half-angle printed as a full one, or a figure from another column.

    Flagged
    -------
    Panel antenna
    Frequency: 5725-5875 MHz
    Gain: 14 dBi
    Horizontal beamwidth: 9°
    Vertical beamwidth: 9°

    Accepted
    --------
    Panel antenna
    Frequency: 5725-5875 MHz
    Gain: 14 dBi
    Horizontal beamwidth: 32°
    Vertical beamwidth: 32°
    """
    for gain in facts.gains:
        if gain.statistic is Statistic.MINIMUM:
            continue
        if facts.omnidirectional:
            for width in facts.vertical_widths:
                if same_conditions(gain, width):
                    yield from _omni(gain, width)
        else:
            for first, second in facts.beams:
                if same_conditions(gain, first) and same_conditions(gain, second):
                    yield from _beam(gain, first, second)


def _beam(gain: Claim, first: Claim, second: Claim) -> Iterator[Conflict]:
    most = gain.normalized.high
    if math.isinf(most):
        return
    width1, width2 = first.normalized.high, second.normalized.high
    measure = float(beam_metric(most, width1, width2))
    severity = _low(measure, BEAM_NOTE, BEAM_DOUBTFUL)
    if severity is not None:
        expected = float(to_db(_BEAM_ESTIMATE / beam_metric(0.0, width1, width2)))
        beam = f"a {stated(first)} by {stated(second)} beam"
        working = (
            f"r = 10^({most:.2f}/10)·sin({width1:.2f}°/4)·sin({width2:.2f}°/4) = {measure:.2f}"
        )
        yield _conflict(gain, (first, second), severity, beam, expected, working)


def _omni(gain: Claim, width: Claim) -> Iterator[Conflict]:
    most = gain.normalized.high
    if math.isinf(most):
        return
    high = min(width.normalized.high, 180.0)
    measure = float(omni_metric(most, high))
    severity = _low(measure, OMNI_NOTE, OMNI_DOUBTFUL)
    if severity is not None:
        expected = float(to_db(_OMNI_ESTIMATE / omni_metric(0.0, high)))
        band = f"a vertical beamwidth of {stated(width)}"
        working = f"ro = 10^({most:.2f}/10)·sin({high:.2f}°/2) = {measure:.2f}"
        yield _conflict(gain, (width,), severity, band, expected, working)


def _low(measure: float, note: float, doubtful: float) -> Severity | None:
    if measure >= note:
        return None
    return Severity.NOTE if measure >= doubtful else Severity.DOUBTFUL


def _conflict(
    gain: Claim, widths: tuple[Claim, ...], severity: Severity, beam: str, expected: float,
    working: str,
) -> Conflict:  # fmt: skip
    short = expected - gain.normalized.high
    return Conflict(
        severity=severity,
        claims=(gain.id, *(w.id for w in widths)),
        message=(
            f"The sheet states {gain_words(gain)} with {beam}{band_words(gain)}. Antennas with such "
            f"a beam ordinarily have about {figure(expected, 'dBi')}; the claim is "
            f"{figure(short, 'dB')} below that."
        ),
        question=(
            "Are the beamwidths full angles between the half-power points, or half-angles? And is "
            f"the gain of {stated(gain)} for the same band?"
        ),
        working=working,
        assumption="A lossy or badly tuned antenna can be this low.",
        margin_db=short,
        bound=Bound(expected, "dBi", "ordinary for this beam"),
    )
