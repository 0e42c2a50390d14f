"""Integration of measured patterns against closed forms, and what is said of unusable tables."""

from __future__ import annotations

import math
from collections.abc import Callable

import numpy as np
import pytest
from numpy.typing import NDArray

from specs.physics.cuts import (
    beamwidth_deg,
    cut,
    front_to_back_db,
    principal_cuts,
    sidelobe_level_db,
)
from specs.physics.pattern import (
    PatternError,
    SpherePattern,
    average_gain_db,
    beam_efficiency,
    directivity_dbi,
    half_power_solid_angle,
    sphere_pattern,
)
from specs.physics.pattern_table import read_cuts, read_sphere
from specs.physics.reconstruction import directivity_from_cuts

Floats = NDArray[np.float64]
Power = Callable[[Floats, Floats, Floats], Floats]


def db(power: Floats) -> Floats:
    return 10 * np.log10(np.maximum(power, 1e-15))


def sphere(power: Power, step: float = 1.0, closed: bool = False) -> SpherePattern:
    theta = np.arange(0, 180 + step / 2, step)
    phi = np.arange(0, 360 + (step / 2 if closed else -step / 2), step)
    t, p = np.radians(theta)[:, None], np.radians(phi)[None, :]
    return sphere_pattern(
        theta, phi, db(power(np.sin(t) * np.cos(p), np.sin(t) * np.sin(p), np.cos(t) + 0 * p))
    )


def half_wave(x: Floats, y: Floats, z: Floats) -> Floats:
    return np.square(np.cos(np.pi / 2 * z)) / np.maximum(1 - z * z, 1e-15)


# (pattern, directivity as a ratio, source)
CLOSED = [
    (lambda x, y, z: 1 + 0 * z, 1.0, "isotropic"),
    (lambda x, y, z: 1 - z * z, 1.5, "short dipole (Balanis ch. 4)"),
    (lambda x, y, z: 1 - x * x, 1.5, "short dipole lying down"),
    (half_wave, 1.640922, "half-wave dipole 4/Cin(2π) (Balanis ch. 4)"),
    (lambda x, y, z: np.maximum(z, 0), 4.0, "cos θ over a half space: 2(n + 1)"),
    (lambda x, y, z: np.maximum(x, 0) ** 4, 10.0, "cos⁴ towards the horizon: 2(n + 1)"),
    (lambda x, y, z: ((1 + x) / 2) ** 2, 3.0, "Huygens source (Balanis ch. 12)"),
]


@pytest.mark.parametrize(("power", "ratio", "source"), CLOSED, ids=lambda v: str(v)[:30])
@pytest.mark.parametrize("closed", [False, True], ids=["phi to 359", "phi to 360"])
def test_directivity_of_closed_forms(power: Power, ratio: float, source: str, closed: bool) -> None:
    # A cosine cut off at 90° has a kink that a 1° grid resolves to 0.02 dB.
    found = directivity_dbi(sphere(power, closed=closed))
    assert found == pytest.approx(10 * math.log10(ratio), abs=0.02), source


def test_a_uniform_pattern_is_exactly_isotropic_on_any_grid() -> None:
    theta = np.array([0.0, 7, 31, 90, 122, 180])
    phi = np.array([0.0, 33, 60, 100, 140, 180, 222, 260, 300, 340])
    pattern = sphere_pattern(theta, phi, np.full((6, 10), -4.0))
    assert directivity_dbi(pattern) == pytest.approx(0.0, abs=1e-12)
    assert average_gain_db(pattern) == pytest.approx(-4.0)


def test_average_gain_is_the_efficiency_of_an_absolute_pattern() -> None:
    lossless = sphere(half_wave)
    levels = lossless.level_db + 2.15 - 1.0
    lossy = sphere_pattern(lossless.theta_deg, lossless.phi_deg, levels)
    assert average_gain_db(lossy) == pytest.approx(-1.0, abs=0.01)


def test_beam_efficiency_of_a_cosine_beam() -> None:
    # cos²θ over a half space: 1 − cos³α of the power lies within α (elementary integral).
    pattern = sphere(lambda x, y, z: np.maximum(z, 0) ** 2, step=0.5)
    expected = 1 - math.cos(math.radians(40.0)) ** 3
    assert beam_efficiency(pattern, 40.0) == pytest.approx(expected, abs=0.001)


def test_half_power_solid_angle_bounds_directivity() -> None:
    pattern = sphere(half_wave)
    assert directivity_dbi(pattern) <= 10 * math.log10(
        8 * math.pi / half_power_solid_angle(pattern)
    )


def test_cuts_of_a_half_wave_dipole() -> None:
    around, along = principal_cuts(sphere(half_wave))
    assert beamwidth_deg(around) == 360.0
    assert beamwidth_deg(along) == pytest.approx(78.08, abs=0.02)  # Balanis ch. 4: 78°
    assert front_to_back_db(along) == pytest.approx(0.0, abs=1e-6)


def test_cuts_of_a_beam_at_the_pole_and_at_the_horizon() -> None:
    # cosⁿ: the half-power angle is acos(2^(−1/n)); n = 8 gives 47.0°.
    width = 2 * math.degrees(math.acos(0.5 ** (1 / 8)))
    for power in (
        lambda x, y, z: np.maximum(z, 1e-4) ** 8,
        lambda x, y, z: np.maximum(x, 1e-4) ** 8,
    ):
        for found in principal_cuts(sphere(power)):
            assert beamwidth_deg(found) == pytest.approx(width, abs=0.05)
            assert front_to_back_db(found, 30.0) > 60


def test_first_sidelobe_of_a_uniform_aperture() -> None:
    # −13.26 dB (Silver 1949; Balanis ch. 12), width 50.76° λ/L.
    angle = np.arange(-90, 90.01, 0.05)
    pattern = cut(angle, db(np.square(np.sinc(10 * np.sin(np.radians(angle))))))
    assert sidelobe_level_db(pattern) == pytest.approx(-13.26, abs=0.02)
    assert beamwidth_deg(pattern) == pytest.approx(5.077, abs=0.01)


def test_cuts_may_start_anywhere() -> None:
    angle = np.arange(0.0, 360, 1)
    lobe = db(((1 + np.cos(np.radians(angle - 355))) / 2) ** 4)
    shifted = cut(angle, lobe)
    assert shifted.peak_deg == 355.0
    # ((1 + cos)/2)⁴ is half at acos(2·2^(−1/4) − 1) = 47.1°.
    half = math.degrees(math.acos(2 * 0.5**0.25 - 1))
    assert beamwidth_deg(shifted) == pytest.approx(2 * half, abs=0.05)


def test_an_open_cut_that_never_falls_has_no_width() -> None:
    assert math.isnan(beamwidth_deg(cut([-10, 0, 10], [-1, 0, -1])))
    assert math.isnan(front_to_back_db(cut([-10, 0, 10], [-1, 0, -1])))


# Patterns with the beam along x, known over the whole sphere.
WHOLE = {
    "half-wave dipole": half_wave,
    "cosine squared": lambda x, y, z: np.maximum(x, 0) ** 2,
    "cardioid": lambda x, y, z: ((1 + x) / 2) ** 2,
    "narrow cardioid": lambda x, y, z: ((1 + x) / 2) ** 30,
    "aperture 3 by 3": lambda x, y, z: (
        np.square(np.sinc(3 * y) * np.sinc(3 * z)) * np.square((1 + x) / 2)
    ),
    "aperture 1 by 8": lambda x, y, z: (
        np.square(np.sinc(y) * np.sinc(8 * z)) * np.square((1 + x) / 2)
    ),
    "collinear pair": lambda x, y, z: half_wave(x, y, z) * np.square(np.cos(np.pi * 0.75 * z)),
}


@pytest.mark.parametrize("front_only", [False, True])
@pytest.mark.parametrize("name", WHOLE)
def test_two_cuts_bracket_the_true_directivity(name: str, front_only: bool) -> None:
    power = WHOLE[name]
    angle = np.arange(-180.0, 180, 1)
    a = np.radians(angle)
    keep = np.abs(angle) <= 90 if front_only else np.full(angle.shape, True)
    found = directivity_from_cuts(
        cut(angle, db(power(np.cos(a), np.sin(a), 0 * a))),
        cut(angle[keep], db(power(np.cos(a), 0 * a, np.sin(a)))[keep]),
    )
    truth = directivity_dbi(sphere(power))
    assert found.low_dbi - 0.05 <= truth <= found.high_dbi + 0.05
    assert found.high_dbi - found.low_dbi < 1.5
    assert found.low_dbi <= found.nominal_dbi <= found.high_dbi


def test_a_table_in_any_order_gives_the_sphere() -> None:
    rows = [
        f"{phi};{theta};{-12 * (theta / 90 - 1) ** 2:.3f}".replace(".", ",")
        for phi in range(0, 360, 10)
        for theta in range(180, -1, -10)
    ]
    text = "measured on the range\nPhi [deg];Theta [deg];Gain [dBi]\n" + "\n".join(rows)
    pattern = read_sphere(text)
    assert pattern.level_db.shape == (19, 36)
    assert pattern.peak[0] == 90.0


def test_a_pole_may_be_given_once() -> None:
    rows = ["theta\tphi\tdB", "0\t0\t-3", "180\t0\t-9"]
    rows += [f"{t}\t{p}\t0" for t in (45, 90, 135) for p in range(0, 360, 45)]
    assert read_sphere("\n".join(rows)).level_db[0].tolist() == [-3.0] * 8


def test_principal_cuts_from_a_table() -> None:
    azimuth, elevation = read_cuts(
        "Angle,Elevation,Azimuth\n-180,-20,-25\n-90,-10,-15\n0,0,0\n90,-10,-15\n"
    )
    assert azimuth.level_db[0] == -25.0
    assert elevation.level_db[0] == -20.0


UNUSABLE = [
    ("", "no rows"),
    ("theta,phi,dB\n", "no rows"),
    ("a,b\n1,2\n3,4", "no theta columns"),
    ("theta,phi,dB\n0,0,1\n90,0\n90,9,1\n", "do not have 3"),
    ("theta,phi,dB\n0,0,0\n90,90,0\n180,180,0", "missing"),
    ("theta,phi,dB\n0,0,0\n90,90,nan\n180,180,0", "Line 3 holds something beside numbers"),
    ("theta,phi,gain,level\n0,0,0,1\n90,90,0,1\n", "2 level columns"),
    ("theta,phi,dB\n" + "\n".join(f"{t},{p},0" for t in (0, 45, 90) for p in range(0, 360, 45)),
     "not from 0 to 180"),
    ("theta,phi,dB\n" + "\n".join(f"{t},{p},0" for t in (0, 90, 180) for p in range(0, 180, 45)),
     "not all the way around"),
]  # fmt: skip


@pytest.mark.parametrize(("text", "words"), UNUSABLE)
def test_unusable_tables_get_advice(text: str, words: str) -> None:
    with pytest.raises(PatternError, match=words) as caught:
        read_sphere(text)
    assert caught.value.advice


def test_unusable_cuts_get_advice() -> None:
    around = cut(np.arange(0, 360, 10), np.zeros(36))
    with pytest.raises(PatternError, match="not go all the way"):
        directivity_from_cuts(cut([-60, 0, 60], [-9, 0, -9]), around)
    with pytest.raises(PatternError, match="from −90 to 90"):
        directivity_from_cuts(around, cut([-60, 0, 60], [-9, 0, -9]))
