"""The forge tells the truth, tells it twice alike, and the product keeps its floors on it."""

# ruff: noqa: E501  (tables of figures)
from __future__ import annotations

import tomllib
from dataclasses import replace
from pathlib import Path
from types import SimpleNamespace
from typing import Any

import pytest

from fixtures.forge.compose import draft, families, forge
from fixtures.forge.layouts import HELD_OUT, TUNING
from fixtures.forge.producers.plain import print_plain
from fixtures.forge.store import sheets
from fixtures.forge.truth import MAIN, Fact, Forged
from tests.corpus.match import got
from tests.corpus.score import score

FLOORS = tomllib.loads(Path(__file__).with_name("floors.toml").read_text(encoding="utf-8"))
ALL = [("tuning", f) for f in TUNING] + [("heldout", f) for f in HELD_OUT]


def test_at_least_25_families_and_5_held_out() -> None:
    assert len(TUNING) >= 25
    assert len(HELD_OUT) >= 5
    assert not set(TUNING) & set(HELD_OUT)


@pytest.mark.parametrize(("split", "family"), ALL)
def test_same_seed_same_truth_and_text(split: str, family: str) -> None:
    _, _, one = draft(split, 5, family)
    _, _, two = draft(split, 5, family)
    assert one.facts == two.facts
    assert one.traps == two.traps
    assert print_plain(one) == print_plain(two)
    _, _, other = draft(split, 6, family)
    assert print_plain(one) != print_plain(other)


@pytest.mark.parametrize(("split", "family"), ALL)
def test_truth_is_well_formed(split: str, family: str) -> None:
    units = {"gain": {"dBi", "dBd", "dBic", "dB"}, "beamwidth": {"deg"}, "frequency": {"MHz"},
             "vswr": {""}, "efficiency": {"%"}, "front_to_back": {"dB"}, "return_loss": {"dB"}}  # fmt: skip
    for number in range(12):
        _, _, composed = draft(split, number, family)
        for f in composed.facts:
            assert f.quantity in MAIN
            assert f.unit in units[f.quantity]
            assert f.low <= f.high
            assert f.relation in ("equal", "at_least", "at_most", "range")
            if f.band_mhz:
                assert f.band_mhz[0] <= f.band_mhz[1]
            if f.quantity == "vswr":
                assert 1 <= f.low < 10
            if f.quantity == "efficiency":
                assert 0 < f.high <= 100
            if f.quantity == "beamwidth":
                assert 0 < f.high <= 360
        claimed = {(f.quantity, f.low, f.high, f.unit) for f in composed.facts}
        for t in composed.traps:
            assert (t.quantity, t.low, t.high, t.unit) not in claimed, t


@pytest.mark.parametrize(("split", "family"), ALL)
def test_every_figure_of_the_truth_is_printed(split: str, family: str) -> None:
    for number in range(8):
        _, _, composed = draft(split, number, family)
        text = print_plain(composed).replace("\u2011", "-").replace("−", "-").replace("–", "-")
        for f in composed.facts:
            digits = f"{abs(f.high):.4f}".rstrip("0").rstrip(".")
            forms = {digits, f"{abs(f.high):.1f}", f"{abs(f.high):.2f}"}
            if f.quantity == "frequency":
                forms |= {
                    f"{f.high / 1000:.5f}".rstrip("0").rstrip("."),
                    f"{(f.low + f.high) / 2:g}",
                }
            close = text.replace(". ", ".")  # a blank inside a number is a phenomenon of its own
            assert any(x in t or x.replace(".", ",") in t for x in forms for t in (text, close)), f


def _as_product(sheet: Forged, facts: list[Fact]) -> Any:
    claims = [
        SimpleNamespace(
            quantity=f.quantity, plane=f.plane, statistic=f.statistic, band_mhz=f.band_mhz,
            evidence=(), confidence=0.95,
            stated=SimpleNamespace(low=f.low, high=f.high, unit=f.unit, tolerance=f.tolerance,
                                   relation=f.relation, text=f.text),
        )
        for f in facts
    ]  # fmt: skip
    return SimpleNamespace(antennas=[SimpleNamespace(label="x", claims=claims)], unread=())


def test_scorer_gives_full_marks_to_the_truth_and_counts_each_fault() -> None:
    sample = next(s for s in sheets("tuning", 40, "ruled-table") if len(s.facts) >= 4)
    facts = [replace(f, bands=f.bands, band_mhz=f.band_mhz) for f in sample.facts]
    right = score([sample], lambda *_: _as_product(sample, facts)).tallies
    assert right[1]["all"].f1 == right[2]["all"].f1 == 1.0

    one_less = score([sample], lambda *_: _as_product(sample, facts[1:]))
    assert one_less.tallies[2]["all"].missed == 1
    assert one_less.faults[0].why == "not found"

    gain = next(f for f in facts if f.quantity == "gain")
    other_unit = [replace(f, unit="dBm") if f is gain else f for f in facts]
    wrong = score([sample], lambda *_: _as_product(sample, other_unit))
    assert (wrong.tallies[1]["all"].missed, wrong.tallies[1]["all"].extra) == (1, 1)

    other_plane = [replace(f, plane="E") if f is gain else f for f in facts]
    planes = score([sample], lambda *_: _as_product(sample, other_plane))
    assert planes.tallies[1]["all"].f1 == 1.0
    assert planes.tallies[2]["all"].missed == 1

    twice = score([sample], lambda *_: _as_product(sample, facts + facts))
    assert twice.tallies[2]["all"].f1 == 1.0


def test_scorer_reads_gigahertz_and_leaves_out_what_is_not_scored() -> None:
    claim = SimpleNamespace(
        quantity="frequency", plane=None, statistic=None, band_mhz=None, evidence=(), confidence=1.0,
        stated=SimpleNamespace(low=2.4, high=2.5, unit="GHz", tolerance=None, relation="range", text=""),
    )  # fmt: skip
    other = SimpleNamespace(**{**claim.__dict__, "quantity": "impedance"})
    sheet = SimpleNamespace(antennas=[SimpleNamespace(label="x", claims=[claim, other])], unread=())
    (read,) = got(sheet)
    assert (read.low, read.high) == pytest.approx((2400, 2500))
    assert read.unit == "MHz"


@pytest.mark.parametrize("producer", ["paper", "text", "markdown", "html"])
def test_every_producer_prints(producer: str, monkeypatch: pytest.MonkeyPatch) -> None:
    import fixtures.forge.compose as compose

    real = compose.draft

    def forced(split: str, number: int, family: str | None = None) -> Any:
        name, kit, composed = real(split, number, family)
        composed.producers = (producer,)
        return name, kit, composed

    monkeypatch.setattr(compose, "draft", forced)
    made = forge("tuning", 3, "with-plots")
    assert made.producer == producer
    assert made.data.startswith(b"%PDF") == (producer == "paper")
    assert len(made.data) > 300


def test_families_of_the_heldout_split_have_real_weight() -> None:
    known = families("heldout")
    own = sum(w for n, (_, w) in known.items() if n in HELD_OUT)
    assert own / sum(w for _, w in known.values()) > 0.3


@pytest.mark.parametrize("split", ["tuning", "heldout"])
def test_the_product_keeps_its_floor(split: str) -> None:
    import specs

    floor = FLOORS[split]
    result = score(sheets(split, floor["sheets"]), specs.read_sheet)
    assert not result.failed
    assert result.tallies[1]["all"].f1 >= floor["level_1"]
    assert result.tallies[2]["all"].f1 >= floor["level_2"]
    assert result.tallies[2]["all"].precision >= floor["precision_2"]
