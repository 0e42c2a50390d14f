"""The catalogue of true antennas: its integration is right, and no antenna breaks a limit."""

from __future__ import annotations

import math
from types import ModuleType

import numpy as np
import pytest
from scipy import integrate

from specs.physics import aperture, beamwidth, endfire, omni, small


def metric(antenna: object) -> float:
    kind, gain = antenna.kind, antenna.gain_dbi  # type: ignore[attr-defined]
    w1, w2 = antenna.hpbw1, antenna.hpbw2  # type: ignore[attr-defined]
    return {
        "dir": lambda: beamwidth.beam_metric(gain, w1, w2),
        "bidirectional": lambda: beamwidth.bidirectional_metric(gain, w1, w2),
        "omni": lambda: beamwidth.omni_metric(gain, w1),
        "omni-ground": lambda: beamwidth.omni_over_ground_metric(gain, w1),
    }[kind]()


def test_the_catalogue_is_large_and_complete(catalogue: ModuleType) -> None:
    antennas = catalogue.true_antennas()
    assert len(antennas) >= 700
    assert len({a.name for a in antennas}) == len(antennas)
    for antenna in antennas:
        assert math.isfinite(antenna.gain_dbi), antenna
        assert 0 < antenna.hpbw1 <= 360, antenna
        assert 0 < antenna.hpbw2 <= 360, antenna


KNOWN = [
    ("dipole, 0.50 λ", 2.151, 78.08, "Balanis ch. 4"),
    ("dipole, 1.00 λ", 3.82, 47.8, "Balanis ch. 4"),
    ("monopole, 0.25 λ", 5.161, 39.04, "image theory"),
    ("cosine power, n = 1", 6.021, 120.0, "2(n + 1)"),
    ("cosine power, n = 2", 7.782, 90.0, "2(n + 1)"),
    ("sine power, n = 1", 1.761, 90.0, "short dipole"),
    ("Harrington, 5 modes", 15.441, None, "N² + 2N, Harrington 1958"),
    ("Uzkov, 3 elements", 9.542, None, "N², Uzkov 1946"),
    ("end-fire line, ordinary, 10 λ, isotropic", 16.04, None, "4L/λ = 40.2"),
    ("disk, 50 λ, taper 0 on 0, blockage 0", 43.93, 1.179, "Silver 1949"),
    ("rectangle, 10 by 10 λ, uniform by uniform", 30.99, 5.08, "4πA/λ², 50.8 λ/L; edges +0.1"),
    ("dipole over plane, 0.25 λ", 7.48, None, "method of moments, NEC-2"),
]


@pytest.mark.parametrize(("name", "gain", "width", "source"), KNOWN)
def test_known_antennas(
    catalogue: ModuleType, name: str, gain: float, width: float | None, source: str
) -> None:
    antenna = next(a for a in catalogue.true_antennas() if a.name == name)
    assert antenna.gain_dbi == pytest.approx(gain, abs=0.09 if "rectangle" in name else 0.02), (
        source
    )
    if width is not None:
        assert antenna.hpbw1 == pytest.approx(width, rel=2e-3), source


def test_integration_against_an_adaptive_integrator(catalogue: ModuleType) -> None:
    """A rectangular aperture and a tilted column again, by scipy's adaptive quadrature."""
    antenna = next(
        a for a in catalogue.rectangles() if a.name.startswith("rectangle, 1 by 2 λ, cos")
    )

    def power(theta: float, phi: float) -> float:
        x, y = math.sin(theta) * math.cos(phi), math.sin(theta) * math.sin(phi)
        z = math.cos(theta)
        h = (np.sinc(x - 0.5) + np.sinc(x + 0.5)) / 2
        return float((h * np.sinc(2 * y)) ** 2 * ((1 + z) / 2) ** 2 * math.sin(theta))

    total, _ = integrate.dblquad(power, 0, math.pi / 2, 0, math.pi, epsabs=1e-7)
    peak = float(((np.sinc(-0.5) + np.sinc(0.5)) / 2) ** 2)
    assert antenna.gain_dbi == pytest.approx(10 * math.log10(math.pi * peak / total), abs=1e-4)


def test_no_true_antenna_breaks_a_rigorous_limit(catalogue: ModuleType) -> None:
    for antenna in catalogue.true_antennas():
        assert metric(antenna) < beamwidth.RIGOROUS_METRIC, antenna
        if antenna.kind == "dir" and max(antenna.hpbw1, antenna.hpbw2) <= 180:
            assert antenna.gain_dbi < beamwidth.convex_limit_dbi(antenna.hpbw1, antenna.hpbw2)


def test_the_spread_of_narrow_beams(catalogue: ModuleType) -> None:
    """Beams up to 40° that are not ordinary end-fire lines reach 0.746 and no more (derived)."""
    narrow = [
        a
        for a in catalogue.true_antennas()
        if a.kind == "dir"
        and max(a.hpbw1, a.hpbw2) <= 40
        and a.family not in ("end-fire line", "dipole row", "Harrington", "Uzkov")
    ]
    assert len(narrow) > 150
    assert max(metric(a) for a in narrow) == pytest.approx(0.746, abs=0.002)


def test_apertures_lie_below_their_ceilings(catalogue: ModuleType) -> None:
    seen = 0
    for antenna in catalogue.of_family("disk", "rectangle", "horn"):
        seen += 1
        ceiling = aperture.panel_ceiling_dbi(antenna.size["area"], antenna.size["perimeter"])
        assert antenna.gain_dbi < ceiling, antenna
        if "diameter" in antenna.size:
            assert antenna.gain_dbi < aperture.dish_ceiling_dbi(antenna.size["diameter"])
    assert seen > 240


def test_omnis_lie_below_their_length_ceilings(catalogue: ModuleType) -> None:
    closest = -math.inf
    for antenna in catalogue.of_family("dipole", "monopole", "collinear", "vertical line"):
        if antenna.kind == "omni-ground":
            ceiling = omni.omni_over_ground_ceiling_dbi(antenna.size["height"])
        else:
            ceiling = omni.omni_length_ceiling_dbi(antenna.size["length"])
        closest = max(closest, antenna.gain_dbi - ceiling)
    assert -0.05 < closest < 1e-4  # close, and never beyond: the half-wave dipole is the floor


def test_limits_are_reached_and_not_passed(catalogue: ModuleType) -> None:
    for antenna in catalogue.of_family("Harrington", "Uzkov"):
        if "radius" in antenna.size:
            ka = small.ka_of_radius(antenna.size["radius"])
            assert antenna.gain_dbi == pytest.approx(small.normal_gain_dbi(ka), abs=1e-6)
        else:
            limit = endfire.uzkov_dbi(antenna.size["elements"])
            assert antenna.gain_dbi == pytest.approx(limit, abs=1e-6)


def test_dipole_rows_lie_below_the_element_ceiling(catalogue: ModuleType) -> None:
    for antenna in catalogue.of_family("dipole row"):
        assert antenna.gain_dbi < endfire.yagi_element_ceiling_dbi(antenna.size["elements"])
