"""Level references, antenna factor, reflection and polarization against outside values."""

from __future__ import annotations

import math
from collections.abc import Callable

import pytest
from scipy import constants as codata
from scipy import integrate, special

from specs.physics import antenna_factor, constants, decibels, mismatch, polarization
from specs.units.levels import CIRCULAR_OFFSET_DB, DIPOLE_OFFSET_DB

Table = Callable[[str], list[dict[str, str]]]


def dipole_power(length: float, theta: float) -> float:
    """Thin dipole with sinusoidal current (Balanis, Antenna Theory, ch. 4)."""
    kl = math.pi * length
    return ((math.cos(kl * math.cos(theta)) - math.cos(kl)) / math.sin(theta)) ** 2


def dipole_directivity(length: float) -> float:
    total, _ = integrate.quad(lambda t: dipole_power(length, t) * math.sin(t), 1e-9, math.pi - 1e-9)
    return 2 * dipole_power(length, math.pi / 2) / total


def test_constants() -> None:
    assert codata.c == constants.SPEED_OF_LIGHT
    eta = codata.physical_constants["characteristic impedance of vacuum"][0]
    assert pytest.approx(eta, rel=1e-9) == constants.FREE_SPACE_IMPEDANCE


def test_half_wave_dipole_by_integration() -> None:
    ratio = dipole_directivity(0.5)
    assert ratio == pytest.approx(1.640922, abs=1e-6)
    # Second way: 4/Cin(2π) with Cin(x) = γ + ln x − Ci(x), γ = −ψ(1).
    _, ci = special.sici(2 * math.pi)
    cin = -float(special.digamma(1)) + math.log(2 * math.pi) - ci
    assert ratio == pytest.approx(4 / cin, rel=1e-9)
    assert pytest.approx(10 * math.log10(ratio), abs=1e-5) == constants.HALF_WAVE_DIPOLE_DBI
    assert pytest.approx(constants.HALF_WAVE_DIPOLE_DBI, abs=0.001) == DIPOLE_OFFSET_DB


def test_short_dipole_and_monopole_by_integration() -> None:
    short = dipole_directivity(1e-3)
    assert short == pytest.approx(1.5, abs=1e-6)
    assert pytest.approx(10 * math.log10(1.5), abs=1e-6) == constants.SHORT_DIPOLE_DBI
    # A monopole on an infinite ground has twice the directivity of the whole dipole (5.16 dBi).
    assert 10 * math.log10(2 * dipole_directivity(0.5)) == pytest.approx(5.161, abs=0.001)


@pytest.mark.parametrize(("length", "dbi"), [(1.0, 3.82), (1.25, 5.16)])
def test_longer_dipoles_by_integration(length: float, dbi: float) -> None:
    # Balanis ch. 4, from memory: 2.41 for the full wave, 3.28 for 1.25 λ.
    assert 10 * math.log10(dipole_directivity(length)) == pytest.approx(dbi, abs=0.01)


def test_circular_against_linear() -> None:
    assert pytest.approx(10 * math.log10(2)) == CIRCULAR_OFFSET_DB
    assert pytest.approx(CIRCULAR_OFFSET_DB, abs=1e-6) == constants.CIRCULAR_OVER_LINEAR_DB


def test_antenna_factor_constant() -> None:
    """29.774 dB for 50 Ω; handbooks print 29.77 to 29.79 (common practice)."""
    offset = 20 * math.log10(1000.0) - 8.0 - antenna_factor.antenna_factor_db(8.0, 1000.0)
    assert offset == pytest.approx(29.774, abs=0.0005)
    assert antenna_factor.antenna_factor_db(8.0, 1000.0) == pytest.approx(22.23, abs=0.005)


def test_antenna_factor_from_field_and_voltage() -> None:
    """From first principles: 1 V/m, effective area, power into 50 Ω, voltage."""
    gain_dbi, frequency_mhz = 6.5, 868.0
    wavelength = codata.c / (frequency_mhz * 1e6)
    eta = constants.FREE_SPACE_IMPEDANCE
    area = 10 ** (gain_dbi / 10) * wavelength**2 / (4 * math.pi)
    volts = math.sqrt(area / eta * 50)
    expected = -20 * math.log10(volts)
    assert antenna_factor.antenna_factor_db(gain_dbi, frequency_mhz) == pytest.approx(expected)
    # AF = 9.7305/(λ√G) (handbooks print 9.73).
    short = 20 * math.log10(9.7305 / (wavelength * math.sqrt(10 ** (gain_dbi / 10))))
    assert short == pytest.approx(expected, abs=0.001)


def test_vswr_table(table: Table) -> None:
    for row in table("c1_vswr"):
        vswr = float(row["vswr"])
        gamma = mismatch.reflection_from_vswr(vswr)
        assert gamma == pytest.approx(float(row["gamma"]), abs=6e-6)
        assert 100 * gamma**2 == pytest.approx(float(row["reflected_pct"]), abs=6e-4)
        assert mismatch.return_loss_from_vswr(vswr) == pytest.approx(
            float(row["return_loss_dB"]), abs=6e-4
        )
        assert mismatch.mismatch_loss_from_vswr(vswr) == pytest.approx(
            float(row["mismatch_loss_dB"]), abs=6e-5
        )
        if vswr > 1:
            loss = mismatch.return_loss_from_vswr(vswr)
            assert mismatch.vswr_from_return_loss(loss) == pytest.approx(vswr)


def test_polarization_table(table: Table) -> None:
    for row in table("c2_polarisation_mismatch"):
        one = float(row["axial_ratio_1_dB"])
        other = math.inf if row["axial_ratio_2_dB"] == "linear" else float(row["axial_ratio_2_dB"])
        least = polarization.least_polarization_loss_db(one, other)
        most = polarization.most_polarization_loss_db(one, other)
        assert least == pytest.approx(float(row["loss_min_dB"]), abs=6e-5)
        assert most == pytest.approx(float(row["loss_max_dB"]), abs=6e-5)


def test_polarization_from_jones_vectors() -> None:
    """|e1*·e2|² of two Jones vectors, an independent way to the same loss."""
    for one, other, tilt in [(0.0, 3.0, 20.0), (2.0, 6.0, 75.0), (1.0, 40.0, 45.0)]:
        expected = 10 * math.log10(_jones_match(one, other, tilt))
        loss = polarization.polarization_loss_db(one, other, tilt)
        assert loss == pytest.approx(-expected, abs=1e-9)
    crossed = polarization.polarization_loss_db(0.0, 0.0, 0.0, sense=-1.0)
    assert crossed > 100  # left against right hand


def _jones_match(one_db: float, other_db: float, tilt_deg: float) -> float:
    a = (1.0, 1j * 10 ** (-one_db / 20))
    b0 = (1.0, 1j * 10 ** (-other_db / 20))
    c, s = math.cos(math.radians(tilt_deg)), math.sin(math.radians(tilt_deg))
    b = (c * b0[0] - s * b0[1], s * b0[0] + c * b0[1])
    overlap = abs(a[0] * b[0] + a[1].conjugate() * b[1]) ** 2
    norm = (1 + abs(a[1]) ** 2) * (1 + abs(b0[1]) ** 2)
    return overlap / norm


def test_decibels_of_known_ratios() -> None:
    assert decibels.to_db(2.0) == pytest.approx(3.0103, abs=1e-5)
    assert decibels.from_db(-3.0103) == pytest.approx(0.5, abs=1e-6)
