"""Size ceilings, small-antenna limits, end-fire and Yagi figures, from first principles."""

from __future__ import annotations

import math
from collections.abc import Callable
from types import ModuleType

import numpy as np
import pytest
from numpy.typing import NDArray
from scipy import special

from specs.physics import aperture, endfire, helix, horn, omni, small, waveguide

Table = Callable[[str], list[dict[str, str]]]
Floats = NDArray[np.float64]


def test_small_antenna_table(table: Table) -> None:
    for row in table("b1_small_antenna_limits"):
        ka = float(row["ka"])
        q1, q2 = small.chu_quality(ka), small.chu_quality_two_modes(ka)
        assert small.ka_of_radius(float(row["a_over_lambda"])) == pytest.approx(ka, rel=1e-4)
        assert small.normal_gain_dbi(ka) == pytest.approx(float(row["max(3,D)_dBi"]), abs=6e-4)
        assert q1 == pytest.approx(float(row["Q_chu_linear"]), rel=1e-4)
        assert q2 == pytest.approx(float(row["Q_chu_circular"]), rel=1e-4)
        for value, column in [
            (small.matched_bandwidth(q1, 2.0), "fbw_vswr2_pct_linear"),
            (small.matched_bandwidth(q2, 2.0), "fbw_vswr2_pct_circular"),
            (small.bode_fano_bandwidth(q1, 2.0), "fbw_bodefano_vswr2_pct_linear"),
            (small.matched_bandwidth(0.5 * q1, 2.0), "fbw_vswr2_pct_eff50"),
        ]:
            assert 100 * value == pytest.approx(float(row[column]), rel=1e-4), column


def test_bode_fano_allows_four_times_the_simple_match() -> None:
    """4.04 at VSWR 2 (derived)."""
    ratio = small.bode_fano_bandwidth(50.0, 2.0) / small.matched_bandwidth(50.0, 2.0)
    assert ratio == pytest.approx(4.04, abs=0.01)


def test_matched_bandwidth_of_a_series_resonance() -> None:
    """Against the exact VSWR of R + jX with X = R·Q·(f − 1/f), Q = 50."""
    quality = 50.0
    f = np.linspace(1.0, 1.05, 500_001)
    z = 1 + 1j * quality * (f - 1 / f)
    gamma = np.abs((z - 1) / (z + 1))
    edge = float(f[np.searchsorted(gamma, 1 / 3)])
    width = edge - 1 / edge  # the band is symmetric in log f
    assert small.matched_bandwidth(quality, 2.0) == pytest.approx(width, rel=2e-3)


@pytest.mark.parametrize("modes", [1, 2, 3, 5, 8, 12, 20, 30, 40])
def test_harrington_by_integration(modes: int) -> None:
    """N² + 2N of the field that adds all modes up to N in phase (Harrington 1958).

    Legendre functions from scipy: an independent way to the catalogue's recurrence.
    """
    nodes, weights = np.polynomial.legendre.leggauss(4 * modes + 20)
    total, peak = np.zeros_like(nodes), 0.0
    for n in range(1, modes + 1):
        first = special.legendre(n).deriv()
        second = first.deriv()
        slope, curve = first(nodes), second(nodes) if n > 1 else 0 * nodes
        pi, tau = slope, nodes * slope - (1 - nodes**2) * curve
        total += (2 * n + 1) / (n * (n + 1)) * (pi + tau)
        peak += 2 * n + 1
    if modes <= 12:  # scipy's monomial polynomials lose digits beyond
        directivity = 2 * peak**2 / float(weights @ total**2)
        assert directivity == pytest.approx(modes**2 + 2 * modes, rel=1e-6)
    # And the sum itself: Σ(2n + 1) = N² + 2N.
    assert peak == modes**2 + 2 * modes
    if modes > 1:
        limit = small.normal_gain_dbi(float(modes))
        assert limit == pytest.approx(10 * math.log10(peak))


def associated_at_zero(n: int) -> float:
    """|P_n^1(0)| for odd n: n!!/(n − 1)!! (Abramowitz & Stegun 8.6.1, from memory)."""
    return math.prod(range(n, 0, -2)) / math.prod(range(n - 1, 0, -2))


@pytest.mark.parametrize("modes", [3, 5, 7, 13, 25])
def test_omni_ceiling_against_the_sum_of_modes(modes: int) -> None:
    """Broadside directivity of rotationally symmetric modes n ≤ N at kL/2 = N, within 0.7 %.

    Σ (2n + 1)/(n(n + 1))·[P_n^1(0)]²: only odd n add up at the horizon.
    """
    total = sum(
        (2 * n + 1) / (n * (n + 1)) * associated_at_zero(n) ** 2 for n in range(1, modes + 1, 2)
    )
    ceiling = 10 ** (omni.omni_length_ceiling_dbi(modes / math.pi) / 10)
    assert ceiling == pytest.approx(total, rel=0.007)


def test_omni_ceiling_never_lies_below_the_half_wave_dipole() -> None:
    assert omni.omni_length_ceiling_dbi(0.0) == pytest.approx(2.151, abs=0.001)
    assert omni.omni_over_ground_ceiling_dbi(0.0) == pytest.approx(5.161, abs=0.001)


# --- arrays -----------------------------------------------------------------------------------


def test_uzkov_from_the_power_matrix() -> None:
    """N² from the largest gain aᴴR⁻¹a of isotropic elements, R = sinc(kd), spacing 0.01 λ."""
    for count in (2, 3, 4):
        x = 2 * math.pi * 0.01 * np.arange(count)
        power = np.sinc((x[:, None] - x[None, :]) / math.pi)
        steer = np.exp(1j * x)
        gain = float(np.real(steer.conj() @ np.linalg.solve(power, steer)))
        assert gain == pytest.approx(count**2, rel=0.01)
        assert endfire.uzkov_dbi(count) == pytest.approx(10 * math.log10(count**2))
        assert gain <= count**2 * (1 + 1e-6)


def mutual_resistance(distance_wl: Floats) -> Floats:
    """Side-by-side half-wave dipoles, Ω (Carter 1932; Balanis ch. 8, from memory), η0 = 120π."""
    d = np.maximum(distance_wl, 1e-4)  # Ci is infinite at 0
    u0 = 2 * math.pi * d
    u1 = 2 * math.pi * (np.sqrt(d * d + 0.25) + 0.5)
    u2 = 2 * math.pi * (np.sqrt(d * d + 0.25) - 0.5)
    cosine = [special.sici(u)[1] for u in (u0, u1, u2)]
    resistance: Floats = 30 * (2 * cosine[0] - cosine[1] - cosine[2])
    return resistance


def best_gain_dbi(count: int, spacing: float) -> float:
    """Most end-fire gain of N parallel half-wave dipoles: 1.6409·R11·aᴴR⁻¹a."""
    place = spacing * np.arange(count)
    matrix = mutual_resistance(np.abs(place[:, None] - place[None, :]))
    own = 30 * (-float(special.digamma(1)) + math.log(2 * math.pi) - special.sici(2 * math.pi)[1])
    np.fill_diagonal(matrix, own)  # 30·Cin(2π) = 73.13 Ω
    steer = np.exp(2j * math.pi * place)
    gain = 1.640922 * own * float(np.real(steer.conj() @ np.linalg.solve(matrix, steer)))
    return 10 * math.log10(gain)


def test_mutual_resistance_is_right() -> None:
    assert mutual_resistance(np.array([0.0]))[0] == pytest.approx(73.13, abs=0.01)  # Balanis ch. 8
    # Balanis ch. 8, from memory: −12.5 Ω at half a wavelength.
    assert mutual_resistance(np.array([0.5]))[0] == pytest.approx(-12.5, abs=0.1)


@pytest.mark.parametrize(
    ("count", "spaced"),
    [(2, 7.06), (3, 10.05), (4, 12.28), (5, 14.05), (6, 15.5), (7, 16.8), (8, 17.9)],
)
def test_yagi_ceilings_from_the_resistance_matrix(count: int, spaced: float) -> None:
    """At 0.2 λ as computed before; closer, up to the ceiling and not beyond.

    At 0.1 λ the best array is still 0.12 to 0.15 dB below the limit of no spacing.
    """
    ceiling = endfire.yagi_element_ceiling_dbi(count)
    assert best_gain_dbi(count, 0.2) == pytest.approx(spaced, abs=0.03)
    assert best_gain_dbi(count, 0.1) == pytest.approx(ceiling - 0.13, abs=0.025)
    if count <= 3:  # beyond, the matrix is too near singular for double precision
        assert best_gain_dbi(count, 0.01) == pytest.approx(ceiling, abs=0.01)


def test_boom_fit_against_the_published_yagis() -> None:
    """Within −0.1 and +0.5 dB of NBS Technical Note 688 (published less fit)."""
    for boom, _, gain_dbd in endfire.NBS_YAGIS:
        assert -0.2 <= gain_dbd + 2.15 - endfire.yagi_boom_dbi(boom) <= 0.5


def test_simulated_yagis_lie_within_their_ceilings(table: Table) -> None:
    yagis = [row for row in table("g1_nec_cases") if row["elements"]]
    assert len(yagis) == 6
    for row in yagis:
        gain, boom = float(row["gain_dBi"]), float(row["boom_lambda"])
        assert -3.0 <= gain - endfire.yagi_boom_dbi(boom) <= 0.7
        assert gain <= endfire.yagi_element_ceiling_dbi(int(row["elements"]))


def line_source(length: float, extra: float) -> float:
    """End-fire line source of isotropic elements: D = 2·f(0)²/∫f² sin θ dθ, dBi."""
    theta = np.linspace(0, math.pi, 400_001)
    field = np.sinc(length * (np.cos(theta) - 1) - extra / math.pi)
    total = float(np.trapezoid(field**2 * np.sin(theta), theta))
    return 10 * math.log10(2 * field[0] ** 2 / total)


@pytest.mark.parametrize("length", [5.0, 10.0, 20.0])
def test_endfire_line_sources_by_integration(length: float) -> None:
    ordinary = line_source(length, 0.0)
    assert endfire.ordinary_endfire_dbi(length) == pytest.approx(ordinary, abs=0.06)
    extended = line_source(length, 2.94 / 2)
    assert endfire.hansen_woodyard_dbi(length) == pytest.approx(extended, abs=0.15)


# --- apertures, horns, helices, guides --------------------------------------------------------


@pytest.mark.parametrize(
    ("taper", "factor", "efficiency"),
    [(0, 58.96, 1.0), (1, 72.7, 0.75), (2, 84.4, 0.556)],
)
def test_round_apertures(
    catalogue: ModuleType, taper: int, factor: float, efficiency: float
) -> None:
    """Silver 1949; Balanis Table 12.2: 59.0, 72.7, 84.4 λ/D and 1, 0.75, 0.556."""
    name = f"disk, 50 λ, taper {taper} on 0, blockage 0"
    disk = next(found for found in catalogue.of_family("disk") if found.name == name)
    found = aperture.beamwidth_aperture_factor(disk.hpbw1, 50.0)
    assert found == pytest.approx(factor, rel=2e-3)
    assert aperture.dish_efficiency(disk.gain_dbi, 50.0) == pytest.approx(efficiency, rel=5e-3)


@pytest.mark.parametrize(
    ("taper", "factor"),
    [("uniform", 50.76), ("cosine", 68.1), ("triangle", 73.0), ("cosine squared", 82.5)],
)
def test_line_sources(catalogue: ModuleType, taper: str, factor: float) -> None:
    """Silver 1949; Balanis Table 12.1: degrees times λ/L for long lines."""
    angle = np.linspace(0, 0.05, 200_001)
    power = np.square(catalogue.line(100.0, taper, np.sin(angle)))
    half = float(angle[np.argmax(power < power[0] / 2)])
    assert aperture.beamwidth_aperture_factor(math.degrees(2 * half), 100.0) == pytest.approx(
        factor, rel=2e-3
    )


def test_apertures_against_square_metres() -> None:
    # 1 m² at 1 GHz: 21.45 dBi with c = 3·10⁸ and 21.46 dBi exactly (4πA/λ²).
    assert aperture.gain_from_effective_area_dbi(1.0, 1000.0) == pytest.approx(21.456, abs=0.001)
    assert aperture.effective_area_m2(0.0, 1000.0) == pytest.approx(71.5e-4, rel=1e-3)
    # 1 m dish at 10 GHz: 4πA/λ² = 40.41 dBi.
    assert aperture.dish_gain_dbi(33.3564) == pytest.approx(40.41, abs=0.01)


def test_panel_ceiling_is_harrington_for_a_disk() -> None:
    for diameter in (0.5, 1.0, 3.0, 20.0):
        panel = aperture.panel_ceiling_dbi(math.pi * diameter**2 / 4, math.pi * diameter)
        ka = math.pi * diameter
        assert panel == pytest.approx(10 * math.log10(ka**2 + 2 * ka))


def test_optimum_horn() -> None:
    """Stutzman & Thiele: 6 by 8 λ gives 24.9 dBi, 9.0 by 9.75°, 26 994 square degrees."""
    assert horn.optimum_pyramidal_gain_dbi(8.0, 6.0) == pytest.approx(24.9, abs=0.05)
    area = horn.optimum_pyramidal_e_width_deg(6.0) * horn.optimum_pyramidal_h_width_deg(8.0)
    gain = 10 ** (horn.optimum_pyramidal_gain_dbi(8.0, 6.0) / 10)
    assert gain * area == pytest.approx(26_994, rel=1e-3)


def test_horns_of_the_catalogue_have_the_optimum_efficiency(catalogue: ModuleType) -> None:
    """Integrated horns with the optimum's phase errors: 0.49 to 0.52 on large mouths."""
    optimum = [
        h for h in catalogue.of_family("horn") if "0.25 and 0.375" in h.name and h.size["area"] > 19
    ]
    assert len(optimum) >= 4
    for found in optimum:
        efficiency = 10 ** (found.gain_dbi / 10) / (4 * math.pi * found.size["area"])
        assert 0.47 <= efficiency <= 0.53, found


def test_textbook_helix() -> None:
    """Kraus & Marhefka, Example 8-5.2: 16 turns, C = 1, S = 0.25: 16.8 dBi, 26°."""
    assert helix.kraus_helix_dbi(1.0, 0.25, 16) == pytest.approx(16.8, abs=0.05)
    assert helix.helix_beamwidth_deg(1.0, 0.25, 16) == pytest.approx(26.0, abs=0.05)
    # King & Wong measured 2 to 4 dB less than Kraus' formula (from memory).
    gap = helix.kraus_helix_dbi(1.0, 0.25, 16) - helix.king_wong_dbic(1.0, 0.25, 16)
    assert 2.0 < gap < 4.5


def test_waveguide_cutoffs_are_bessel_zeros() -> None:
    te11 = float(special.jnp_zeros(1, 1)[0]) / math.pi
    tm01 = float(special.jn_zeros(0, 1)[0]) / math.pi
    assert pytest.approx(te11, rel=1e-6) == waveguide.TE11_DIAMETER_WL
    assert pytest.approx(tm01, rel=1e-6) == waveguide.TM01_DIAMETER_WL
    # Pozar, from memory: a 10 cm guide is cut off below 1.757 GHz.
    assert waveguide.te11_cutoff_mhz(100.0) == pytest.approx(1757, abs=1)
