"""Rows of a record to claims: figures with their unit, plane, band, evidence and confidence."""

from __future__ import annotations

import re
from dataclasses import dataclass, field, replace

from specs.claims import Band, BBox, Claim, Evidence, Quantity, Relation, Stated, Unread
from specs.claims.normalize import DEFAULT_UNIT, normalize, stated_from
from specs.errors import UnitsError
from specs.extraction.amplifier import amplifier_row, suspicious, under_amplifier
from specs.extraction.bands import (
    Bands,
    add_frequency,
    band_of,
    is_sample_list,
)
from specs.extraction.confidence import USUAL, confidence
from specs.extraction.heads import Head, head_of
from specs.extraction.pairing import FREQUENCIES, Pair, Value
from specs.extraction.polarizations import polarization_kind
from specs.extraction.records import Record, Row
from specs.extraction.sizes import extents
from specs.extraction.tables import Box
from specs.extraction.values import Reading, read_values


@dataclass(frozen=True, slots=True)
class Draft:
    """A claim before antennas are told apart: ``name`` is the variant it is printed for."""

    claim: Claim
    name: str | None
    facts: frozenset[str]


@dataclass(slots=True)
class Found:
    """What a record yields."""

    drafts: list[Draft] = field(default_factory=list)
    unread: list[Unread] = field(default_factory=list)


@dataclass(frozen=True, slots=True)
class Surroundings:
    """What the reader of a record knows of its page."""

    page: int
    boxes: list[Box]
    names: dict[int, str]
    used: set[int]
    labels: set[int]
    positioning: bool
    read_by: str


def read_record(record: Record, around: Surroundings) -> Found:
    """All claims of a record, and what looked like one and is not used."""
    found = Found()
    bands = Bands()
    amplified = under_amplifier(record, around.boxes, around.labels)
    company = sum(r.pair.label.quantity is not None for r in record.rows)
    heads: dict[int, Head] = {}
    readings: dict[int, list[Reading]] = {}
    for row in record.rows:
        for value in row.values:
            head = head_of(row.pair, value, around.boxes, around.names, around.used)
            heads[id(value)] = head
            unit = row.pair.unit or head.unit
            readings[id(value)] = read_values(row.pair.label, value.text, unit)
    for row in record.rows:
        if row.pair.label.quantity in FREQUENCIES and id(row) not in amplified:
            _join_min_max(row, heads, readings)
            for value in row.values:
                if _is_band_row(row.pair, readings[id(value)]):
                    add_frequency(bands, value, readings[id(value)])
    for row in record.rows:
        label = row.pair.label
        if label.quantity is None and not label.amplifier:
            continue
        if id(row) in amplified or amplifier_row(row):
            _set_aside(row, around, found)
            continue
        for value in row.values:
            facts = _facts(row, value, company, around)
            made = _special(row, value, around, facts, heads[id(value)])
            if made is None:
                made = _figures(row, value, heads[id(value)], readings[id(value)],
                                bands, record, around, facts, found)  # fmt: skip
            found.drafts.extend(made)
        if label.quantity is not None and not row.values:
            found.unread.append(_unread(row.pair.box, "no-value", around.page, label.quantity))
    return found


def _is_band_row(pair: Pair, readings: list[Reading]) -> bool:
    if pair.label.quantity is Quantity.FREQUENCY:
        return True
    # A 'bandwidth' that prints band edges is the band; a single figure is a width.
    return bool(readings) and all(r.figure.low < r.figure.high for r in readings)


def _join_min_max(row: Row, heads: dict[int, Head], readings: dict[int, list[Reading]]) -> None:
    """MIN 2300 and MAX 2390 of a frequency are one band."""
    by_statistic = {
        head.statistic.value: value
        for value in row.values
        if (head := heads[id(value)]).statistic is not None and len(readings[id(value)]) == 1
    }
    if not {"minimum", "maximum"} <= set(by_statistic):
        return
    low_value, high_value = by_statistic["minimum"], by_statistic["maximum"]
    low, high = readings[id(low_value)][0], readings[id(high_value)][0]
    if low.band is None or high.band is None or low.band[0] >= high.band[1]:
        return
    figure = replace(
        low.figure,
        text=f"{low.figure.text} - {high.figure.text}",
        high=high.figure.high,
        relation=Relation.RANGE,
    )
    joined = replace(low, figure=figure, relation=Relation.RANGE, band=(low.band[0], high.band[1]))
    heads[id(low_value)] = replace(heads[id(low_value)], statistic=None)
    readings[id(low_value)] = [joined]
    low_value.boxes = [*low_value.boxes, *high_value.boxes]
    low_value.columns = 1
    row.values = [low_value]


def _special(
    row: Row, value: Value, around: Surroundings, facts: frozenset[str], head: Head
) -> list[Draft] | None:
    """Polarization (words) and size (products) are read apart; None for all other quantities."""
    label = row.pair.label
    if label.quantity is Quantity.POLARIZATION:
        kind = polarization_kind(value.text)
        if kind is None:
            return []
        text = " ".join(b.printed for b in value.boxes) if not value.inline else value.text
        stated = Stated(text, 0.0, 0.0, Relation.EQUAL, None, "")
        claim = Claim(
            id="",
            quantity=Quantity.POLARIZATION,
            stated=stated,
            normalized=normalize(Quantity.POLARIZATION, stated),
            kind=kind,
            evidence=(_evidence(row, value, around.page),),
            confidence=confidence(facts | {"usual range"}),
        )
        return [Draft(claim, head.name, facts)]
    if label.quantity is not Quantity.SIZE:
        return None
    drafts = []
    for extent in extents(label, value.text, row.pair.unit or head.unit):
        stated = replace(stated_from(extent.figure, extent.unit), text=_printed(value))
        claim = Claim(
            id="",
            quantity=Quantity.SIZE,
            stated=stated,
            normalized=normalize(Quantity.SIZE, stated),
            kind=extent.dimension,
            evidence=(_evidence(row, value, around.page),),
            confidence=confidence(facts | {"usual range"}),
        )
        drafts.append(Draft(claim, head.name, facts))
    return drafts


def _figures(
    row: Row,
    value: Value,
    head: Head,
    readings: list[Reading],
    bands: Bands,
    record: Record,
    around: Surroundings,
    facts: frozenset[str],
    found: Found,
) -> list[Draft]:
    label = row.pair.label
    assert label.quantity is not None
    if label.quantity in FREQUENCIES:
        return _frequency_claims(row, value, head, readings, around, facts)
    drafts: list[Draft] = []
    for reading in readings:
        if suspicious(record, reading.quantity, reading.figure.low, around.positioning):
            found.unread.append(_unread(value.boxes[0], "amplifier", around.page, Quantity.GAIN))
            continue
        band = band_of(reading, row, value, head, bands)
        claim, claim_facts = _claim(row, value, head, reading, band, around, facts)
        if claim is None:
            found.unread.append(
                _unread(value.boxes[0], "not-a-figure", around.page, label.quantity)
            )
            continue
        drafts.append(Draft(claim, _variant(reading, head, row), claim_facts))
    if not readings and re.search(r"\d", value.text) and not value.below:
        found.unread.append(_unread(value.boxes[0], "not-a-figure", around.page, label.quantity))
    return drafts


def _frequency_claims(
    row: Row,
    value: Value,
    head: Head,
    readings: list[Reading],
    around: Surroundings,
    facts: frozenset[str],
) -> list[Draft]:
    if not _is_band_row(row.pair, readings):
        if row.pair.label.quantity is Quantity.BANDWIDTH:
            made = [_claim(row, value, head, r, None, around, facts) for r in readings]
            return [Draft(c, head.name, f) for c, f in made if c is not None]
        return []
    spots = [r for r in readings if r.band and r.band[0] == r.band[1]]
    if is_sample_list(readings) or (row.sampled and spots):
        return []
    if value.columns >= 4 and spots:
        return []
    drafts = []
    for reading in readings:
        as_frequency = replace(reading, quantity=Quantity.FREQUENCY)
        claim, claim_facts = _claim(row, value, head, as_frequency, None, around, facts)
        if claim is not None:
            drafts.append(Draft(claim, _variant(reading, head, row), claim_facts))
    return drafts


def _variant(reading: Reading, head: Head, row: Row) -> str | None:
    return reading.name or head.name or (row.pair.label.names[0] if row.pair.label.names else None)


def _claim(
    row: Row,
    value: Value,
    head: Head,
    reading: Reading,
    band: Band | None,
    around: Surroundings,
    facts: frozenset[str],
) -> tuple[Claim | None, frozenset[str]]:
    quantity = reading.quantity
    statistic = reading.statistic or head.statistic
    stated = Stated(
        text=_printed(value),
        low=reading.figure.low,
        high=reading.figure.high,
        relation=reading.relation,
        tolerance=reading.figure.tolerance,
        unit=reading.unit or DEFAULT_UNIT.get(quantity, ""),
        half_step=reading.figure.half_step,
    )
    try:
        normalized = normalize(quantity, stated, statistic)
    except (UnitsError, ValueError):
        if quantity is not Quantity.GAIN:
            return None, facts
        # A gain in dBm stays what is printed; a rule says so.
        normalized = normalize(quantity, replace(stated, unit="dB"), statistic)
    low, high = USUAL.get(quantity, (-1e9, 1e9))
    usual = low <= normalized.nominal <= high
    claim_facts = set(facts) | {"usual range" if usual else "unusual range"}
    if reading.unit_from in ("value", "list", "label") and reading.unit:
        claim_facts.add("unit printed")
    elif not reading.unit and quantity is Quantity.GAIN:
        claim_facts.add("unit missing")
    kind = row.pair.label.kind
    claim = Claim(
        id="",
        quantity=quantity,
        stated=stated,
        normalized=normalized,
        statistic=statistic,
        plane=reading.plane,
        kind=kind if quantity in (Quantity.EFFICIENCY, Quantity.GAIN, Quantity.FREQUENCY) else None,
        band_mhz=band,
        level_db=reading.level_db,
        condition=reading.condition,
        evidence=(_evidence(row, value, around.page),),
        confidence=confidence(frozenset(claim_facts)),
    )
    return claim, frozenset(claim_facts)


def _facts(row: Row, value: Value, company: int, around: Surroundings) -> frozenset[str]:
    facts = {"labelled"}
    if company >= 4:
        facts.add("company of known labels")
    if len(value.text) > 60:
        facts.add("long text")
    if len(re.findall(r"\d+(?:[.,]\d+)?", value.text)) > 6:
        facts.add("many numbers")
    if row.pair.label.fuzzy:
        facts.add("misspelt label")
    if value.below:
        facts.add("below a head")
    if around.read_by == "ocr":
        facts.add("read by recognition")
    if any(not w.visible for b in value.boxes for s in b.lines for w in s.words):
        facts.add("hidden")
    return frozenset(facts)


def _printed(value: Value) -> str:
    return " ".join(b.printed for b in value.boxes) if not value.inline else value.text


def _evidence(row: Row, value: Value, page: int) -> Evidence:
    parts = [row.pair.box, *value.boxes] if not value.inline else [row.pair.box]
    boxes = [b.text_box for b in dict.fromkeys(parts)]
    bbox = _around(boxes) if not value.below else value.boxes[0].text_box
    text = " ".join(b.printed for b in dict.fromkeys(parts))
    return Evidence(page, bbox, text)


def _around(boxes: list[BBox]) -> BBox:
    x0 = min(b[0] for b in boxes)
    top = min(b[1] for b in boxes)
    return (round(x0, 2), round(top, 2), round(max(b[2] for b in boxes), 2),
            round(max(b[3] for b in boxes), 2))  # fmt: skip


def _unread(box: Box, reason: str, page: int, quantity: Quantity | None) -> Unread:
    return Unread(box.printed, reason, page, _around([box.text_box]), quantity)


def _set_aside(row: Row, around: Surroundings, found: Found) -> None:
    """Figures of an amplifier: kept in sight, not used as the antenna's."""
    quantity = row.pair.label.quantity or Quantity.GAIN
    for value in row.values:
        if re.search(r"\d", value.text):
            text = (
                f"{row.pair.box.printed} {_printed(value)}"
                if not value.inline
                else row.pair.box.printed
            )
            box = _around([row.pair.box.text_box, *(b.text_box for b in value.boxes)])
            found.unread.append(Unread(text, "amplifier", around.page, box, quantity))
