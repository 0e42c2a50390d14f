"""Conversions against values from outside, their intervals, and what is said of bad requests."""

from __future__ import annotations

import doctest
import importlib
import math
import pkgutil

import pytest
from hypothesis import given
from hypothesis import strategies as st

import specs.conversion
from specs.conversion import convert, equivalents
from specs.conversion.relations import CONDITIONS, RELATIONS
from specs.conversion.scales import SCALES
from specs.errors import IncompatibleUnits, MissingCondition, UnitsError, UnknownUnit
from specs.errors import UnreadableFigure as Unreadable

# (text, to, nominal, unit, source of the value)
OUTSIDE = [
    ("7.5 dBd", "dBi", 9.65, "dBi", "convention: dBd + 2.15"),
    ("9.65 dBi", "dBd", 7.50, "dBd", "convention: dBd + 2.15"),
    ("2.15 dBi", "x", 1.6406, "x", "half-wave dipole 1.641 (Balanis ch. 4)"),
    ("100 x", "dBi", 20.0, "dBi", "definition of the decibel"),
    ("VSWR 1.5", "return loss", 13.979, "dB", "Pozar, Microwave Engineering, ch. 2"),
    ("2.0:1", "return loss", 9.542, "dB", "Pozar, Microwave Engineering, ch. 2"),
    ("2.0:1", "mismatch loss", 0.5115, "dB", "handbook table, from memory"),
    ("3:1", "reflection coefficient", 0.5, "", "handbook table, from memory"),
    ("return loss 6.02 dB", "VSWR", 3.0, "", "handbook table, from memory"),
    ("-9.542 dB", "VSWR", 2.0, "", "handbook table, from memory"),
    ("8 dBi at 1 GHz", "dB/m", 22.23, "dB/m", "EMC handbooks: 20 log f − G − 29.78"),
    ("22.23 dB/m at 1000 MHz", "dBi", 8.0, "dBi", "EMC handbooks: 20 log f − G − 29.78"),
    ("0 dBi at 1 GHz", "cm2", 71.5, "cm2", "λ²/4π (Schelkunoff & Friis)"),
    ("1.00 m2 at 1 GHz", "dBi", 21.46, "dBi", "4πA/λ² (Silver 1949)"),
    ("50 %", "dB", -3.0103, "dB", "definition of the decibel"),
    ("efficiency -1.0 dB", "%", 79.43, "%", "definition of the decibel"),
    ("EIRP 36 dBm", "ERP", 33.85, "dBm", "47 CFR 2.1: ERP is against a half-wave dipole"),
    ("EIRP 36 dBm", "EIRP in W", 3.981, "W", "47 CFR 15.247: 1 W + 6 dBi"),
    ("ERP 1 W", "EIRP in W", 1.64, "W", "dipole gain 1.64"),
    ("60° at -10 dB", "-3 dB beamwidth", 32.92, "deg", "Gaussian lobe: √0.301"),
    ("36 ohm with 4 ohm loss", "efficiency", 90.0, "%", "Rr/(Rr + Rl)"),
    ("450 MHz", "wavelength in m", 0.6662, "m", "c/f"),
    ("12 in", "mm", 304.8, "mm", "international inch"),
    ("2.4 GHz", "MHz", 2400.0, "MHz", "SI"),
    ("10.76 ft2", "m2", 0.99964, "m2", "international foot"),
    ("180 deg", "rad", math.pi, "rad", "definition"),
    ("9 dBic", "dBi", 9.0, "dBi", "total power"),
]


@pytest.mark.parametrize(("text", "to", "nominal", "unit", "source"), OUTSIDE)
def test_outside_values(text: str, to: str, nominal: float, unit: str, source: str) -> None:
    answer = convert(text, to)
    assert answer.nominal == pytest.approx(nominal, rel=3e-4, abs=6e-3), source
    assert answer.unit == unit
    assert answer.low <= answer.nominal <= answer.high
    assert answer.source
    assert answer.formula


def test_printed_digits_and_tolerance_make_the_interval() -> None:
    rounded = convert("7.5 dBd", "dBi")
    assert (rounded.low, rounded.high) == (pytest.approx(9.60), pytest.approx(9.70))
    tolerated = convert("16.0 dBd ±0.5", "dBi")
    assert (tolerated.low, tolerated.high) == (pytest.approx(17.65), pytest.approx(18.65))


def test_a_bare_db_covers_both_references() -> None:
    answer = convert("5.0 dB", "dBi")
    assert (answer.low, answer.high) == (pytest.approx(4.95), pytest.approx(7.20))
    assert any("reference not stated" in text for text in answer.assumptions)


def test_a_linear_component_hides_up_to_3_db() -> None:
    answer = convert("9.0 dBil", "dBi")
    assert answer.high - 9.05 == pytest.approx(3.0103)


def test_at_most_opens_the_other_end() -> None:
    loss = convert("VSWR < 1.5", "return loss")
    assert loss.high == math.inf
    assert loss.low == pytest.approx(13.32, abs=0.01)
    assert str(loss) == "at least 13.324 dB"


def test_at_least_may_run_to_infinity() -> None:
    answer = convert(">14 ohm with 4 ohm loss", "efficiency")
    assert (answer.low, answer.high) == (pytest.approx(77.14, abs=0.01), 100.0)


def test_a_frequency_band_widens_the_interval() -> None:
    spot = convert("12.0 dBi at 435 MHz", "m2")
    band = convert("12.0 dBi at 400-470 MHz", "m2")
    assert band.low < spot.low < spot.high < band.high


def test_a_frequency_may_be_given_apart_and_outranks_the_text() -> None:
    apart = convert("8 dBi", "dB/m", frequency="1 GHz")
    assert apart.nominal == pytest.approx(22.23, abs=0.005)
    assert convert("8 dBi at 450 MHz", "dB/m", frequency="1 GHz").nominal == apart.nominal


def test_the_formula_carries_the_numbers() -> None:
    steps = convert("7.5 dBd at 450 MHz", "dB/m").formula.splitlines()
    assert steps == [
        "7.5 dBd + 2.15 = 9.65 dBi",
        "20·log10(450 MHz) − 9.65 dBi − 29.774 = 13.641 dB/m",
    ]


def test_assumptions_are_said() -> None:
    assert "Gaussian" in convert("60° at -10 dB", "-3 dB").assumptions[0]
    assert "minus sign" in convert("return loss -14 dB", "VSWR").assumptions[0]
    assert "read as return loss" in convert("14 dB", "VSWR").assumptions[0]


def test_decimal_commas_and_printed_minus_signs() -> None:
    assert convert("7,5 dBd bei 450 MHz", "dBi").nominal == pytest.approx(9.65)
    assert convert("−3.0 dB", "%").nominal == pytest.approx(50.12, abs=0.01)
    assert convert("1:1.5", "return loss").nominal == pytest.approx(13.979, abs=1e-3)


BAD = [
    ("7.5 dBd", "dB/m", MissingCondition, "450 MHz"),
    ("36 ohm", "efficiency", MissingCondition, "--loss-resistance"),
    ("8 dBi", "dBj", UnknownUnit, "Did you mean dB"),
    ("8 dBi", "vswrr", UnknownUnit, "Did you mean 'vswr'"),
    ("8 foo", "dBi", UnknownUnit, "Did you mean"),
    ("8 dBi", "", UnknownUnit, "such as dBi"),
    ("8 x at x", "dBi", UnitsError, ""),
    ("8 dBi", "deg", IncompatibleUnits, "can be converted to: dBd"),
    ("8 dBm", "dBi", IncompatibleUnits, "can be converted to: dBW"),
    ("8 kg", "dBi", IncompatibleUnits, "a unit that belongs"),
    ("hello", "dBi", Unreadable, "as in '7.5 dBd at 450 MHz'"),
    ("", "dBi", Unreadable, "as in"),
    ("3 dBi and 4 dBi", "dBd", UnitsError, ""),
    ("VSWR 0.8", "return loss", Unreadable, "at least 1"),
    ("120 %", "dB", Unreadable, "from 0 to 100"),
    ("8 dBi at 0 MHz", "m2", Unreadable, "above zero"),
    ("8 dBi at 450 mm", "m2", IncompatibleUnits, "450 MHz"),
]


@pytest.mark.parametrize(("text", "to", "error", "words"), BAD)
def test_bad_requests_get_advice(text: str, to: str, error: type[UnitsError], words: str) -> None:
    with pytest.raises(error) as caught:
        convert(text, to)
    advice = str(caught.value)
    assert words in advice
    assert caught.value.advice


def test_equivalents_leave_out_what_lacks_a_condition() -> None:
    without = {(found.quantity, found.unit) for found in equivalents("7.5 dBd")}
    with_ = {(found.quantity, found.unit) for found in equivalents("7.5 dBd at 450 MHz")}
    assert ("gain", "dBi") in without
    assert ("antenna factor", "dB/m") not in without
    assert ("antenna factor", "dB/m") in with_
    assert ("effective area", "m2") in with_


def test_every_relation_joins_known_scales_and_names_its_source() -> None:
    known = {(scale.quantity, scale.unit) for scale in SCALES}
    for row in RELATIONS:
        assert row.start in known, row
        assert row.end in known, row
        assert row.source
        assert "{y}" in row.formula
        assert row.needs is None or row.needs in CONDITIONS


def test_no_pair_of_scales_is_related_twice() -> None:
    pairs = [(row.start, row.end) for row in RELATIONS]
    assert len(pairs) == len(set(pairs))


@given(st.sampled_from(RELATIONS), st.floats(0.02, 0.98), st.floats(1.0, 1e4))
def test_every_relation_is_undone_by_its_inverse(row, share: float, condition: float) -> None:  # type: ignore[no-untyped-def]
    inverse = next((r for r in RELATIONS if (r.start, r.end) == (row.end, row.start)), None)
    if inverse is None:
        assert row.start in {
            ("gain", "dB"), ("radiation resistance", "ohm"),
        }  # fmt: skip
        return
    valid = next(s.valid for s in SCALES if (s.quantity, s.unit) == row.start)
    low, high = max(valid[0], -30.0), min(valid[1], 30.0)
    value = low + share * (high - low)
    there = row.function(value, condition)
    assert inverse.function(there, condition) == pytest.approx(value, rel=1e-6, abs=1e-6)


@pytest.mark.parametrize(
    "module", [m.name for m in pkgutil.iter_modules(specs.conversion.__path__)]
)
def test_examples_are_true(module: str) -> None:
    loaded = importlib.import_module(f"specs.conversion.{module}")
    assert doctest.testmod(loaded).failed == 0


ODD = (
    "7.5 -3 0 1.5:1 1:0 99999999999 1e400 0.0000001 1,575 ± < > at @ with - – dBi dBd dB dBic dB/m "
    "x % ohm m2 ft MHz GHz deg ° -10 VSWR vswr gain return loss EIRP ERP W dBm beamwidth nan ∞ ½ ² "
    "efficiency to and , ; ( ) linear"
)
FIGURES = "7.5 -3 0 1.0 1.5:1 1e400 100 0.5 ≤1.5 <10 >14 3-6 16±0.5 7±9"
SPELLINGS = "dBi dBd dB dBil dB/m x % ohm m2 MHz GHz deg rad W dBm mm"
WORDS = st.sampled_from(ODD.split())
NUMBERS = st.sampled_from(FIGURES.split())
UNITS = st.sampled_from(["", *SPELLINGS.split()])
PLAIN = st.builds(
    "{}{} {}{}".format,
    st.sampled_from(["", "VSWR ", "return loss ", "EIRP ", "efficiency ", "beamwidth "]),
    NUMBERS,
    UNITS,
    st.sampled_from(["", " at 450 MHz", " at 400-470 MHz", " at -10 dB", " with 4 ohm loss"]),
)
GOALS = st.sampled_from(["dBi", "VSWR", "return loss", "%", "dB", "x", "m2", "ERP", "-3 dB", "mm"])


@given(
    PLAIN | st.lists(WORDS, max_size=7).map(" ".join),
    GOALS | st.lists(WORDS, max_size=3).map(" ".join),
)
def test_any_text_gives_an_answer_or_advice(text: str, to: str) -> None:
    try:
        answer = convert(text, to)
        found = equivalents(text)
    except UnitsError:
        return  # the words of the advice are checked above
    for one in (answer, *found):
        assert not math.isnan(one.nominal), one
        assert one.low <= one.nominal <= one.high * (1 + 1e-9), one
        assert str(one)
