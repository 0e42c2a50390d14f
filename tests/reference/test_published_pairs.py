"""Published pairs of gain and beamwidth, exposure limits, Recommendations of the ITU-R."""

from __future__ import annotations

from collections.abc import Callable
from types import ModuleType

import pytest

from specs.physics import beamwidth, estimates, exposure

Table = Callable[[str], list[dict[str, str]]]

METRIC = {
    "dir": beamwidth.beam_metric,
    "omni": lambda gain, width, _: beamwidth.omni_metric(gain, width),
    "omni-ground": lambda gain, width, _: beamwidth.omni_over_ground_metric(gain, width),
}


@pytest.mark.parametrize("name", ["d1_pass_cases", "d2_fail_cases"])
def test_metric_of_every_case(table: Table, name: str) -> None:
    for row in table(name):
        metric = METRIC[row["kind"]](
            float(row["gain_dBi"]), float(row["hpbw1_deg"]), float(row["hpbw2_deg"])
        )
        assert metric == pytest.approx(float(row["r"]), rel=2e-3), row["case"]


def test_honest_cases_lie_below_every_rigorous_limit(table: Table) -> None:
    rows = table("d1_pass_cases")
    assert len(rows) == 75
    for row in rows:
        gain, width1, width2 = (float(row[c]) for c in ("gain_dBi", "hpbw1_deg", "hpbw2_deg"))
        limit = {
            "dir": beamwidth.elliptical_limit_dbi(width1, width2),
            "omni": beamwidth.omni_limit_dbi(width1),
            "omni-ground": beamwidth.omni_over_ground_limit_dbi(width1),
        }[row["kind"]]
        assert gain < limit - 2.5, row["case"]


def test_overclaims_called_impossible_are_beyond_a_rigorous_limit(table: Table) -> None:
    for row in table("d2_fail_cases"):
        gain, width1, width2 = (float(row[c]) for c in ("gain_dBi", "hpbw1_deg", "hpbw2_deg"))
        if row["tier"] == "IMPOSSIBLE(convex)":
            assert gain > beamwidth.convex_limit_dbi(width1, width2), row["case"]
        elif row["tier"] == "IMPOSSIBLE(ellipse)":
            assert gain > beamwidth.elliptical_limit_dbi(width1, width2), row["case"]
        elif row["tier"] == "IMPOSSIBLE":
            assert gain > beamwidth.omni_limit_dbi(width1), row["case"]


@pytest.mark.parametrize("diameter", [10.0, 20.0, 50.0, 100.0, 200.0])
def test_f699_dishes(table: Table, diameter: float) -> None:
    """Rec. ITU-R F.699, recommends 3 and 4 (found): 28 853 square degrees, 59.7 % efficient."""
    row = next(
        r for r in table("d1_pass_cases") if r["case"] == f"ITU-R F.699 dish D/lambda={diameter:g}"
    )
    gain, width = (
        estimates.f699_dish_gain_dbi(diameter),
        estimates.f699_dish_beamwidth_deg(diameter),
    )
    assert gain == pytest.approx(float(row["gain_dBi"]), abs=5e-4)
    assert width == pytest.approx(float(row["hpbw1_deg"]), abs=5e-4)
    assert 10 ** (gain / 10) * width**2 == pytest.approx(28_853, rel=1e-3)
    # The two forms of the same Recommendation agree within 0.2 dB.
    assert estimates.f699_gain_from_beamwidth_dbi(width) == pytest.approx(gain, abs=0.2)


def test_f1336(table: Table) -> None:
    """Rec. ITU-R F.1336-5, recommends 2, 3 and 4.1 (found)."""
    for row in table("d1_pass_cases"):
        case, gain = row["case"], float(row["gain_dBi"])
        width1, width2 = float(row["hpbw1_deg"]), float(row["hpbw2_deg"])
        if case.startswith("ITU-R F.1336 omni"):
            assert estimates.f1336_omni_beamwidth_deg(gain) == pytest.approx(width1, rel=1e-3)
        elif case.startswith("ITU-R F.1336 sectoral"):
            found = estimates.f1336_sector_elevation_deg(gain, width1)
            assert found == pytest.approx(width2, rel=1e-3)
        elif case.startswith("ITU-R F.1336 low-gain"):
            found = estimates.f1336_low_gain_beamwidth_deg(gain)
            assert found == pytest.approx(width1, rel=1e-3)


def test_fixed_service_limits_are_not_beyond_physics(table: Table) -> None:
    """Gain and beamwidth limits of 47 CFR are alternatives; each pair is still possible."""
    pairs = [r for r in table("d3_fcc_101_115") if r["max_beamwidth_deg"] and r["min_gain_dbi"]]
    assert len(pairs) > 10
    for row in pairs:
        width = float(row["max_beamwidth_deg"])
        metric = beamwidth.beam_metric(float(row["min_gain_dbi"]), width, width)
        assert metric < 0.6 or row["freq_mhz"] == "24250-25250", row


def test_exposure_table(table: Table) -> None:
    """47 CFR 1.1310 (found) and ICNIRP 2020 (memory)."""
    columns = {
        "FCC_public": "FCC public",
        "FCC_occupational": "FCC occupational",
        "ICNIRP2020_public": "ICNIRP 2020 public",
        "ICNIRP2020_occupational": "ICNIRP 2020 occupational",
    }
    for row in table("e1_exposure_limits"):
        frequency = float(row["f_MHz"])
        for column, code in columns.items():
            if row[column]:
                found = exposure.reference_level_w_per_m2(frequency, code=code)
                assert found == pytest.approx(float(row[column]), rel=1e-3), (frequency, code)
        limit = exposure.reference_level_w_per_m2(frequency, code="FCC public")
        for eirp, reflection, column in [
            (4.0, 1.0, "R_FCC_public_m(4W_EIRP)"),
            (100.0, 1.0, "R_FCC_public_m(100W_EIRP)"),
            (100.0, exposure.GROUND_REFLECTION, "R_FCC_x4_reflection_m(100W_EIRP)"),
        ]:
            found = exposure.distance_m(eirp, limit, reflection)
            assert found == pytest.approx(float(row[column]), abs=0.0051)
            assert exposure.power_density_w_per_m2(eirp, found, reflection) == pytest.approx(limit)


def test_simulated_antennas(table: Table) -> None:
    """Method of moments (NEC-2): gains and widths give the metrics that the table lists."""
    for row in table("g1_nec_cases"):
        gain = float(row["gain_dBi"])
        if row["r"]:
            widths = float(row["HPBW_E"]), float(row["HPBW_H"])
            assert beamwidth.beam_metric(gain, *widths) == pytest.approx(float(row["r"]), rel=2e-3)
            assert gain < beamwidth.elliptical_limit_dbi(*widths)
        elif row["r_omni"] and "monopole" in row["case"]:
            found = beamwidth.omni_over_ground_metric(gain, float(row["HPBW_E"]))
            assert found == pytest.approx(float(row["r_omni"]), rel=2e-3)
        elif row["r_omni"]:
            found = beamwidth.omni_metric(gain, float(row["HPBW_E"]))
            assert found == pytest.approx(float(row["r_omni"]), rel=2e-3)


def test_mcdonald_against_integrated_uniform_stacks(catalogue: ModuleType) -> None:
    """Raises recalled constants: uniform stacks up to 0.7 λ apart, and uniform line sources."""
    uniform = [
        a
        for a in catalogue.of_family("collinear", "vertical line")
        if a.name.endswith("uniform") and not any(d in a.name for d in (" 0.85 ", " 0.95 "))
    ]
    assert len(uniform) > 15
    for antenna in uniform:
        assert estimates.mcdonald_dbi(antenna.hpbw1) == pytest.approx(antenna.gain_dbi, abs=0.06)


def test_pozar_against_integrated_sine_powers(catalogue: ModuleType) -> None:
    """Raises recalled constants: the fit is within 0.21 dB of sinⁿ patterns from 6° to 90°."""
    fitted = [a for a in catalogue.of_family("sine power") if a.hpbw1 > 6]
    assert len(fitted) > 10
    for antenna in fitted:
        assert estimates.pozar_dbi(antenna.hpbw1) == pytest.approx(antenna.gain_dbi, abs=0.21)
