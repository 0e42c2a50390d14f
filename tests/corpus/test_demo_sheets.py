"""The invented sheets: every claim and finding that is there, none that is not, and the verdict.

Expectations (fixtures/expected, see its README) were written from the sheets' sources and the
formulas of the rules; the product was not asked. Both directions count.
"""

from __future__ import annotations

import tomllib
from functools import cache
from pathlib import Path
from typing import Any

import pytest

import specs
from specs.errors import SheetError

FIXTURES = Path(__file__).resolve().parents[2] / "fixtures"
EXPECTED = {
    path.stem: tomllib.loads(path.read_text(encoding="utf-8"))
    for path in sorted((FIXTURES / "expected").glob("*.toml"))
}
READABLE = [name for name, sheet in EXPECTED.items() if "error" not in sheet]
UNREADABLE = [name for name, sheet in EXPECTED.items() if "error" in sheet]
UNITS = {
    "°": "deg",
    "degree": "deg",
    "degrees": "deg",
    "Ω": "ohm",
    "ohms": "ohm",
    "1": "",
    ":1": "",
}

Row = dict[str, Any]


@cache
def report_on(name: str) -> Row:
    report = specs.check_file(FIXTURES / "sheets" / EXPECTED[name]["sheet"])
    return report.model_dump(mode="json", by_alias=True)


def squeeze(label: str | None) -> str:
    return "".join((label or "").casefold().split())


def pair_antennas(name: str) -> tuple[list[tuple[Row, Row]], list[str]]:
    """Expected and found antennas side by side, and what is wrong with the labels."""
    wanted, found = EXPECTED[name]["antenna"], report_on(name)["antennas"]
    if len(wanted) == len(found) == 1:
        label = wanted[0].get("label")
        same = label is None or squeeze(label) == squeeze(found[0]["label"])
        wrong = [] if same else [f"antenna is called {found[0]['label']!r}, not {label!r}"]
        return [(wanted[0], found[0])], wrong
    by_label = {squeeze(antenna["label"]): antenna for antenna in found}
    pairs, wrong = [], []
    for antenna in wanted:
        twin = by_label.pop(squeeze(antenna["label"]), None)
        if twin is None:
            wrong.append(f"MISSING antenna {antenna['label']!r}")
        else:
            pairs.append((antenna, twin))
    wrong += [f"EXTRA antenna {antenna['label']!r}" for antenna in by_label.values()]
    return pairs, wrong


def show(want: Row) -> str:
    high = want.get("high", want.get("low"))
    value = f"{want.get('low')}" if high == want.get("low") else f"{want.get('low')} to {high}"
    words = [want["quantity"], want.get("plane"), value if "low" in want else None]
    words += [
        want.get("unit"),
        want.get("relation"),
        want.get("statistic"),
        str(want.get("kind", "")),
    ]
    return " ".join(str(word) for word in words if word)


def show_found(claim: Row) -> str:
    stated = claim["stated"]
    places = ", ".join(f"p{e['page']} {e['text']!r}" for e in claim["evidence"])
    return (
        f"{claim['quantity']} {claim.get('plane') or ''} {stated['low']}..{stated['high']} "
        f"{stated['unit']} ({stated['relation']}, band {claim.get('band_mhz')}) from {places}"
    )


def kind_of(claim: Row) -> str | None:
    if claim["quantity"] == "polarization":
        kind = claim.get("kind") or claim.get("polarization") or claim["stated"]["text"]
        return str(kind).casefold()
    return claim.get("kind")


def is_same_figure(want: Row, claim: Row) -> bool:
    if want["quantity"] != claim["quantity"]:
        return False
    if "low" not in want:
        return True
    stated = claim["stated"]
    unit = UNITS.get(stated["unit"], stated["unit"])
    return (
        stated["low"] == pytest.approx(want["low"])
        and stated["high"] == pytest.approx(want.get("high", want["low"]))
        and unit == want["unit"]
    )


def differences(want: Row, claim: Row, single_band: bool) -> list[str]:
    """What differs beside the figure itself: relation, statistic, plane, kind, band, nominal."""
    stated, wrong = claim["stated"], []
    one_sided = {"at_least": "minimum", "at_most": "maximum"}
    spread = want.get("high", want.get("low")) != want.get("low")
    relation = want.get("relation", "range" if spread else "equal")
    told = stated["relation"], claim.get("statistic")
    if "low" in want and told[0] != relation and one_sided.get(relation) != told[1]:
        wrong.append(f"relation {told[0]}, not {relation}")
    statistic = want.get("statistic")
    loose = {None, one_sided.get(relation)} if statistic is None else {statistic}
    if want["quantity"] == "gain" and statistic == "peak":
        loose.add("maximum")
    if told[1] not in loose:
        wrong.append(f"statistic {told[1]}, not {statistic}")
    if claim.get("plane") != want.get("plane"):
        wrong.append(f"plane {claim.get('plane')}, not {want.get('plane')}")
    kinds = want.get("kind")
    if kinds and kind_of(claim) not in ([kinds] if isinstance(kinds, str) else kinds):
        wrong.append(f"kind {kind_of(claim)}, not {kinds}")
    if stated.get("tolerance") != want.get("tolerance"):
        wrong.append(f"tolerance {stated.get('tolerance')}, not {want.get('tolerance')}")
    band, wanted_band = claim.get("band_mhz"), want.get("band")
    if wanted_band:
        if band != pytest.approx(wanted_band):
            wrong.append(f"band {band}, not {wanted_band}")
    elif band and not single_band and want["quantity"] != "frequency":
        wrong.append(f"band {band}, where none is stated")
    nominal = want.get("nominal", [want["low"], want["high"]] if spread else want.get("low"))
    got = claim["normalized"]["nominal"]
    if isinstance(nominal, list):
        if not nominal[0] <= got <= nominal[1]:
            wrong.append(f"normalised to {got}, not within {nominal}")
    elif nominal is not None and got != pytest.approx(nominal, abs=0.011):
        wrong.append(f"normalised to {got}, not {nominal}")
    return wrong


def is_one_band(frequencies: list[Row]) -> bool:
    """Whether all stated frequencies lie within one of them, so that naming it is no mistake."""
    ends = [(claim["low"], claim.get("high", claim["low"])) for claim in frequencies]
    widest = max(ends, key=lambda band: band[1] - band[0], default=(1.0, 0.0))
    return bool(ends) and all(widest[0] <= low and high <= widest[1] for low, high in ends)


def compare_claims(want_antenna: Row, found_antenna: Row) -> list[str]:
    wanted, left = list(want_antenna["claims"]), list(found_antenna["claims"])
    single_band = is_one_band([claim for claim in wanted if claim["quantity"] == "frequency"])
    wrong = []
    for want in wanted:
        twins = [claim for claim in left if is_same_figure(want, claim)]
        if not twins:
            wrong.append(f"MISSING {show(want)}")
            continue
        best = min(twins, key=lambda claim: len(differences(want, claim, single_band)))
        left.remove(best)
        wrong += [f"WRONG   {show(want)}: {what}" for what in differences(want, best, single_band)]
    allowed = want_antenna.get("headline", [])
    wrong += [
        f"EXTRA   {show_found(claim)}"
        for claim in left
        if not any(is_same_figure(want, claim) for want in allowed)
    ]
    return wrong


def compare_findings(want_antenna: Row, found_antenna: Row) -> list[str]:
    wanted = {(f["rule"], f["severity"]) for f in want_antenna["findings"]}
    found = {(f["rule"], f["severity"]): f for f in found_antenna["findings"]}
    maybe = {entry["rule"] for entry in want_antenna.get("maybe", [])}
    wrong = [f"MISSING {rule} ({severity})" for rule, severity in sorted(wanted - set(found))]
    wrong += [
        f"EXTRA   {rule} ({severity}): {found[rule, severity]['message']}"
        for rule, severity in sorted(set(found) - wanted)
        if rule not in maybe
    ]
    return wrong


def fail_with(name: str, wrong: list[str]) -> None:
    if wrong:
        unread = [f"unread  {u['text']!r} ({u.get('reason')})" for u in report_on(name)["unread"]]
        why = EXPECTED[name].get("why", "").strip()
        pytest.fail("\n".join([EXPECTED[name]["sheet"], *wrong, *unread, "--", why]), pytrace=False)


@pytest.mark.parametrize("name", READABLE)
def test_claims_are_those_on_the_sheet(name: str) -> None:
    pairs, wrong = pair_antennas(name)
    for want, found in pairs:
        label = want.get("label", "")
        wrong += [f"[{label}] {line}" for line in compare_claims(want, found)]
        if "type" in want and found.get("type") != want["type"]:
            wrong.append(f"[{label}] type {found.get('type')}, not {want['type']}")
    fail_with(name, wrong)


@pytest.mark.parametrize("name", READABLE)
def test_findings_are_those_that_physics_gives(name: str) -> None:
    pairs, wrong = pair_antennas(name)
    for want, found in pairs:
        wrong += [f"[{want.get('label', '')}] {line}" for line in compare_findings(want, found)]
    wrong += [f"a rule failed: {failure}" for failure in report_on(name)["rule_failures"]]
    fail_with(name, wrong)


@pytest.mark.parametrize("name", READABLE)
def test_verdict(name: str) -> None:
    pairs, wrong = pair_antennas(name)
    rows = [(EXPECTED[name], report_on(name)), *pairs]
    for want, found in rows:
        allowed = want["verdict"] if isinstance(want["verdict"], list) else [want["verdict"]]
        if found["verdict"] not in allowed:
            wrong.append(f"{want.get('label', 'sheet')}: {found['verdict']}, not {want['verdict']}")
    fail_with(name, wrong)


@pytest.mark.parametrize("name", UNREADABLE)
def test_what_cannot_be_read_says_so(name: str) -> None:
    with pytest.raises(SheetError) as caught:
        report_on(name)
    assert caught.value.code == EXPECTED[name]["error"]
    assert caught.value.message
    assert caught.value.advice


def test_every_sheet_has_its_expectation() -> None:
    sheets = {path.name for path in (FIXTURES / "sheets").iterdir()}
    assert sheets == {sheet["sheet"] for sheet in EXPECTED.values()}
