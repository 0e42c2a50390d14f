"""Small pictures of a report as inline SVG: the margin ruler, and gain against beamwidth."""

from __future__ import annotations

import math

from markupsafe import Markup, escape

from specs.physics.beamwidth import beam_metric, omni_metric
from specs.physics.decibels import to_db
from specs.report.model import AntennaEntry, ClaimEntry, RulerEntry
from specs.report.phrases import with_unit
from specs.report.ruler import laid_out

WIDTH = 560
_FILL = {"ordinary": "var(--bar)", "note": "url(#light)", "unclear": "url(#light)",
         "doubtful": "url(#dense)", "implausible": "none", "impossible": "none"}  # fmt: skip


def ruler_svg(ruler: RulerEntry) -> Markup:
    """The margin ruler; read aloud it is one sentence."""
    scale = laid_out(ruler)
    length = WIDTH - 20
    parts = [
        f'<rect x="{10 + s.start * length:.1f}" y="26" width="{(s.end - s.start) * length:.1f}" '
        f'height="10" fill="{_FILL[s.standing]}" stroke="var(--line)" stroke-width="0.5"/>'
        for s in scale.spans
    ]
    bound, nominal = 10 + scale.bound * length, 10 + scale.nominal * length
    low, high = (10 + s * length for s in scale.claim)
    name = f"{ruler.bound.name} {with_unit(round(ruler.bound.value, 1), ruler.unit)}"
    claim = f"claim {with_unit(round(ruler.nominal, 1), ruler.unit)}"
    sentence = f"On a scale in {ruler.unit}: {name}; {claim}."
    parts += [
        f'<line x1="{bound:.1f}" x2="{bound:.1f}" y1="18" y2="44" stroke="var(--ink)" '
        'stroke-width="2"/>',
        f'<line x1="{low:.1f}" x2="{max(high, low + 1):.1f}" y1="16" y2="16" stroke="var(--box)" '
        'stroke-width="3"/>',
        f'<circle cx="{nominal:.1f}" cy="16" r="4.5" fill="var(--box)"/>',
        _label(nominal, 9, claim, length),
        _label(bound, 58, name, length),
    ]
    return Markup(
        f'<svg role="img" aria-label="{escape(sentence)}" viewBox="0 0 {WIDTH} 66" '
        f'width="{WIDTH}">{_HATCHES}{"".join(parts)}</svg>'
    )


_HATCHES = (
    '<defs><pattern id="light" width="6" height="6" patternUnits="userSpaceOnUse" '
    'patternTransform="rotate(45)"><line x1="0" y1="0" x2="0" y2="6" stroke="var(--bar)" '
    'stroke-width="2"/></pattern><pattern id="dense" width="9" height="9" '
    'patternUnits="userSpaceOnUse" patternTransform="rotate(45)"><line x1="0" y1="0" x2="0" y2="9" '
    'stroke="var(--bar-soft)" stroke-width="2"/></pattern></defs>'
)


def _label(x: float, y: float, text: str, length: float) -> str:
    share = x / length
    anchor = "start" if share < 0.25 else "end" if share > 0.75 else "middle"
    return f'<text x="{x:.1f}" y="{y}" text-anchor="{anchor}">{escape(text)}</text>'


_LEFT, _TOP, _PLOT_W, _PLOT_H = 46, 12, 480, 220


def beam_svg(antenna: AntennaEntry) -> Markup | None:
    """Gain against beamwidth with the limit, the ordinary band and this antenna; None if unknown.

    Horizontal axis: the width in degrees on a log scale (for a directional antenna the width of
    the cone with the same solid angle); vertical axis: gain in dBi.
    """
    point = _point(antenna)
    if point is None:
        return None
    omni, (width_low, width_high), (gain_low, gain_high) = point
    low, high = _range(width_low, width_high)
    widths = [low * (high / low) ** (i / 60) for i in range(61)]
    limit = [(w, _gain(omni, w, 2.0)) for w in widths]
    top = [(w, _gain(omni, w, 1.0 if omni else 0.75)) for w in widths]
    bottom = [(w, _gain(omni, w, 0.70 if omni else 0.35)) for w in widths]
    gains = [g for _, g in (*limit, *bottom)] + [gain_low, gain_high]
    floor, ceiling = math.floor(min(gains) / 5) * 5, math.ceil(max(gains) / 5) * 5

    def x(width: float) -> float:
        return _LEFT + _PLOT_W * math.log(width / low) / math.log(high / low)

    def y(gain: float) -> float:
        return _TOP + _PLOT_H * (ceiling - gain) / (ceiling - floor)

    band = " ".join(f"{x(w):.1f},{y(g):.1f}" for w, g in [*top, *reversed(bottom)])
    bound = " ".join(f"{x(w):.1f},{y(g):.1f}" for w, g in limit)
    parts = [
        f'<polygon points="{band}" fill="var(--bar-soft)"/>',
        f'<polyline points="{bound}" fill="none" stroke="var(--ink)" stroke-width="2"/>',
    ]
    for gain in range(floor, ceiling + 1, 5):
        parts.append(f'<line x1="{_LEFT}" x2="{_LEFT + _PLOT_W}" y1="{y(gain):.1f}" '
                     f'y2="{y(gain):.1f}" stroke="var(--line)" stroke-width="0.7"/>'
                     f'<text class="soft" x="{_LEFT - 6}" y="{y(gain) + 4:.1f}" '
                     f'text-anchor="end">{gain}</text>')  # fmt: skip
    for width in (1, 2, 5, 10, 20, 50, 90, 180):
        if low <= width <= high:
            parts.append(f'<line x1="{x(width):.1f}" x2="{x(width):.1f}" y1="{_TOP}" '
                         f'y2="{_TOP + _PLOT_H}" stroke="var(--line)" stroke-width="0.7"/>'
                         f'<text class="soft" x="{x(width):.1f}" y="{_TOP + _PLOT_H + 16}" '
                         f'text-anchor="middle">{width}°</text>')  # fmt: skip
    box_w = max(x(width_high) - x(width_low), 5)
    box_h = max(y(gain_low) - y(gain_high), 5)
    parts.append(f'<rect x="{x(width_low):.1f}" y="{y(gain_high):.1f}" width="{box_w:.1f}" '
                 f'height="{box_h:.1f}" fill="var(--box)"/>')  # fmt: skip
    name = "vertical beamwidth" if omni else "beamwidth of the round beam of the same solid angle"
    sentence = (
        f"Gain {gain_low:.1f} to {gain_high:.1f} dBi against a {name} of about {width_low:.1f} to "
        f"{width_high:.1f} degrees; the limit there is {_gain(omni, width_low, 2.0):.1f} dBi."
    )
    return Markup(
        f'<figure><svg role="img" aria-label="{escape(sentence)}" viewBox="0 0 560 256" '
        'width="560">'
        f'{"".join(parts)}</svg><figcaption class="small">Gain in dBi against the {name}. '
        "Line: limit for any antenna; shaded: ordinary antennas; filled: this antenna."
        "</figcaption></figure>"
    )


def _gain(omni: bool, width: float, metric: float) -> float:
    """The gain at which a beam of this width has this metric."""
    if omni:
        return float(to_db(metric / omni_metric(0.0, min(width, 180.0))))
    return float(to_db(metric / beam_metric(0.0, width, width)))


def _range(low: float, high: float) -> tuple[float, float]:
    return max(min(low / 4, 10.0), 0.2), min(max(high * 4, 90.0), 180.0)


_Point = tuple[bool, tuple[float, float], tuple[float, float]]


def _point(antenna: AntennaEntry) -> _Point | None:
    gains = [c for c in antenna.claims if c.quantity == "gain" and c.statistic != "average"]
    if not gains:
        return None
    gain = max(gains, key=lambda c: c.normalized.nominal)
    ends = _ends(gain)
    omni = "omnidirectional" in antenna.traits
    vertical = _width(antenna, gain, ("elevation", "E"))
    azimuth = _width(antenna, gain, ("azimuth", "H"))
    if omni:
        return None if vertical is None else (True, _ends(vertical), ends)
    if vertical is None or azimuth is None:
        return None
    (a, b), (c, d) = _ends(vertical), _ends(azimuth)
    return False, (_round(a, c), _round(b, d)), ends


def _round(first: float, second: float) -> float:
    """Width of the round cone with the solid angle of an elliptical one."""
    product = math.sin(math.radians(first) / 4) * math.sin(math.radians(second) / 4)
    return math.degrees(4 * math.asin(math.sqrt(product)))


def _ends(claim: ClaimEntry) -> tuple[float, float]:
    figure = claim.normalized
    low = figure.nominal if figure.low is None else figure.low
    high = figure.nominal if figure.high is None else figure.high
    return low, high


def _width(antenna: AntennaEntry, gain: ClaimEntry, planes: tuple[str, str]) -> ClaimEntry | None:
    widths = [
        c for c in antenna.claims
        if c.quantity == "beamwidth" and c.plane in planes and c.normalized.nominal > 0
    ]  # fmt: skip
    same = [w for w in widths if w.band_mhz == gain.band_mhz]
    return next(iter(same or widths), None)
