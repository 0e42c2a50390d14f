"""Gain against half-power beamwidths: rigorous limits and the two metrics of the rules.

Where a pattern stays above half of its peak it radiates at least half of the peak, so a −3 dB
region of solid angle Ω allows no more directivity than 8π/Ω. That needs no other assumption. The
limits below differ only in the shape of the region: an ellipse, anything convex, a band around
the horizon. Solid angles are exact on the sphere; the small-angle forms (105 050 and 165 012
square degrees) are wrong by up to 2 dB for wide beams and are not used.
Source: derived; checked in the tests by integration on the sphere.
"""

# mypy: no-warn-return-any
from __future__ import annotations

from typing import Any

import numpy as np

from specs.physics.decibels import from_db, to_db
from specs.physics.elementwise import Real, elementwise

RIGOROUS_METRIC = 2.0
"""No pattern exceeds this in ``beam_metric`` (elliptical −3 dB contour) or ``omni_metric``."""


@elementwise
def beam_metric(gain_dbi: Real, width1_deg: Real, width2_deg: Real) -> Real:
    """r = G·sin(θ1/4)·sin(θ2/4): gain against both beamwidths, pure number.

    At most 2 for an elliptical −3 dB contour; 1 for a flat-topped cone; ln 2 = 0.693 for a narrow
    Gaussian beam; 0.58 to 0.75 for apertures of any taper. Exact for cones of any width up to
    360°. Where the front-to-back ratio is 0 dB (two equal lobes) use ``bidirectional_metric``.

    >>> round(beam_metric(16.0, 65.0, 12.0), 3)
    0.583
    """
    return from_db(gain_dbi) * np.sin(np.radians(width1_deg) / 4) * np.sin(
        np.radians(width2_deg) / 4
    )  # fmt: skip


@elementwise
def bidirectional_metric(gain_dbi: Real, width1_deg: Real, width2_deg: Real) -> Real:
    """The beam metric of an antenna with two equal lobes: twice that of one beam, at most 2.

    >>> round(bidirectional_metric(3.0, 90.0, 90.0), 3)
    0.584
    """
    return 2.0 * beam_metric(gain_dbi, width1_deg, width2_deg)


@elementwise
def omni_metric(gain_dbi: Real, vertical_deg: Real) -> Real:
    """ro = G·sin(θv/2): gain against the vertical beamwidth of an omnidirectional antenna.

    At most 2; 1 for a flat-topped band; 0.939 for a narrow Gaussian; 1.033 for the half-wave
    dipole, 1.061 for the short one. Valid for widths up to 180°.

    >>> round(omni_metric(2.15, 78.0), 3)
    1.032
    """
    return from_db(gain_dbi) * np.sin(np.radians(vertical_deg) / 2)


@elementwise
def omni_over_ground_metric(gain_dbi: Real, elevation_deg: Real) -> Real:
    """G·sin(e)/2, in place of ro, over a large reflecting ground: at most 2.

    ``elevation_deg`` is the −3 dB point above the horizon. The power is all above the ground.

    >>> round(omni_over_ground_metric(5.16, 39.04), 3)
    1.033
    """
    return from_db(gain_dbi) * np.sin(np.radians(elevation_deg)) / 2


@elementwise
def elliptical_limit_dbi(width1_deg: Real, width2_deg: Real) -> Real:
    """Directivity that no antenna with an elliptical −3 dB contour exceeds, dBi.

    2/[sin(θ1/4)·sin(θ2/4)], from the equal-area ellipse; widths up to 360°. Other readings of
    'ellipse' (a cone through an ellipse, an ellipse in direction cosines) have up to 0.05 dB less
    area while both widths are at most 120°, 0.46 dB at 180°.

    >>> round(elliptical_limit_dbi(10.0, 10.0), 2)
    30.22
    """
    return to_db(2.0 / (np.sin(np.radians(width1_deg) / 4) * np.sin(np.radians(width2_deg) / 4)))


@elementwise
def convex_solid_angle(width1_deg: Real, width2_deg: Real) -> Real:
    """Least solid angle, sr, of a convex −3 dB region with these widths through its peak.

    The region holds the spherical quadrilateral of its four −3 dB points: four right triangles of
    excess 2·atan[tan(p/2)·tan(q/2)]. With the peak midway that is 8·atan[tan(θ1/4)·tan(θ2/4)];
    with the peak in a corner of the region 2·atan[tan(θ1/2)·tan(θ2/2)]; every other place of the
    peak lies between (checked in the tests), so the smaller of the two is rigorous. The corner
    matters only above 110°. nan above 180°: no convex region is that wide.

    >>> round(convex_solid_angle(90.0, 90.0), 4)
    1.3593
    """
    quarter1, quarter2 = np.tan(np.radians(width1_deg) / 4), np.tan(np.radians(width2_deg) / 4)
    both = quarter1 * quarter2
    # tan(2x) = 2·tan x/(1 − tan² x): the corner's tangents from those of the centre.
    corner = 4 * both / ((1 - quarter1 * quarter1) * (1 - quarter2 * quarter2))
    least: Any = np.minimum(8 * np.arctan(both), 2 * np.arctan(np.abs(corner)))
    least = np.where(np.maximum(quarter1, quarter2) <= 1.0, least, np.nan)
    return least[()]


@elementwise
def convex_limit_dbi(width1_deg: Real, width2_deg: Real) -> Real:
    """Directivity that no antenna with a convex −3 dB contour exceeds, dBi: 8π/Ω.

    Wherever the peak lies in the contour. inf when a width is above 180°.

    >>> round(convex_limit_dbi(10.0, 10.0), 2)
    32.17
    """
    limit: Any = to_db(np.divide(8 * np.pi, convex_solid_angle(width1_deg, width2_deg)))
    limit = np.where(np.isnan(limit), np.inf, limit)
    return limit[()]


@elementwise
def omni_limit_dbi(vertical_deg: Real, elevation_deg: float = 0.0) -> Real:
    """Directivity that no antenna with rotational symmetry exceeds, dBi.

    2/[cos ε·sin(θv/2)] with the −3 dB band of width θv centred on elevation ε; the band must not
    reach the zenith (|ε| + θv/2 ≤ 90°). An azimuth ripple of R dB peak to peak adds R dB.

    >>> round(omni_limit_dbi(30.0), 2)
    8.88
    """
    return to_db(2.0 / (np.cos(np.radians(elevation_deg)) * np.sin(np.radians(vertical_deg) / 2)))


@elementwise
def omni_over_ground_limit_dbi(elevation_deg: Real) -> Real:
    """Directivity over a large reflecting ground that no omnidirectional antenna exceeds, dBi.

    4/sin e, with the −3 dB point at elevation e above the horizon.

    >>> round(omni_over_ground_limit_dbi(39.04), 2)
    8.03
    """
    return to_db(4.0 / np.sin(np.radians(elevation_deg)))
