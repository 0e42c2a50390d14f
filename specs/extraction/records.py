"""Pairs to records: which figures describe one antenna.

A record starts whenever a frequency label (or, without one, a gain label) repeats in the same
column of labels. A table whose values stand below its labels has one record a row when the rows are
models, and one record in all when they are frequencies.
"""

from __future__ import annotations

from dataclasses import dataclass, field

from specs.claims import Quantity
from specs.extraction.pairing import Pair, Value, overlap
from specs.extraction.tables import Box


@dataclass(slots=True, eq=False)
class Row:
    """One label with one set of values that belongs to one record.

    ``sampled`` marks a row of a table of frequencies: its figures hold at the frequency of the row.
    """

    page: int
    pair: Pair
    values: list[Value]
    sampled: bool = False


@dataclass(slots=True, eq=False)
class Record:
    """The rows of one antenna, or of several that share them; its name when one is printed."""

    page: int
    rows: list[Row] = field(default_factory=list)
    name: str | None = None
    x0: float = 0.0
    top: float = 0.0

    def has(self, quantity: Quantity) -> bool:
        """Whether some row of the record states a quantity."""
        return any(r.pair.label.quantity is quantity for r in self.rows)


_STARTERS = (Quantity.FREQUENCY, Quantity.GAIN)


def records(page: int, pairs: list[Pair], boxes: list[Box]) -> list[Record]:
    """The records of a page, in order of print."""
    across = [p for p in pairs if not any(v.below for v in p.values)]
    below = [p for p in pairs if any(v.below for v in p.values)]
    found = _stacked(page, across)
    found.extend(_catalogues(page, below, boxes))
    return _merge_side_columns(found)


def _stacked(page: int, pairs: list[Pair]) -> list[Record]:
    """Records of label/value rows: one for each column of labels, cut where a starter repeats."""
    columns: list[list[Pair]] = []
    for pair in pairs:
        home = next((c for c in columns if _aligned(c[-1].box, pair.box)), None)
        if home is None:
            columns.append([pair])
        else:
            home.append(pair)
    found: list[Record] = []
    for column in columns:
        column.sort(key=lambda p: p.box.text_box[1])
        current = _start(page, column[0])
        for pair in column:
            if _restarts(current, pair):
                found.append(current)
                current = _start(page, pair)
            current.rows.append(Row(page, pair, pair.values))
        found.append(current)
    return found


def _start(page: int, pair: Pair) -> Record:
    return Record(page, x0=pair.box.text_box[0], top=pair.box.text_box[1])


def _aligned(a: Box, b: Box) -> bool:
    """Labels of one column overlap in x, whichever way they are aligned."""
    (a0, _, a1, _), (b0, _, b1, _) = a.text_box, b.text_box
    return min(a1, b1) - max(a0, b0) > 0.3 * min(a1 - a0, b1 - b0)


def _restarts(record: Record, pair: Pair) -> bool:
    label = pair.label
    if label.amplifier or label.foreign:
        return False
    if label.model:
        return any(r.pair.label.quantity in _STARTERS for r in record.rows)
    if label.quantity is Quantity.FREQUENCY:
        repeats = [r for r in record.rows if r.pair.label.quantity is Quantity.FREQUENCY]
        if not repeats or record.rows[-1].pair.label.quantity is Quantity.FREQUENCY:
            return False
        # 'Frequency (TX)' beside 'Frequency (RX)' are two bands of one antenna
        return _same_words(repeats[-1].pair, pair)
    if label.quantity is Quantity.GAIN and not record.has(Quantity.FREQUENCY):
        repeats = [r for r in record.rows if r.pair.label.quantity is Quantity.GAIN]
        between = any(r.pair.label.quantity not in (Quantity.GAIN, None) for r in record.rows[-3:])
        return bool(repeats) and between and _same_words(repeats[-1].pair, pair)
    return False


def _same_words(a: Pair, b: Pair) -> bool:
    return a.label.text.lower() == b.label.text.lower()


def _merge_side_columns(found: list[Record]) -> list[Record]:
    """A column of labels without a frequency or gain belongs to the record beside or above it."""
    whole = [r for r in found if any(r.has(q) for q in _STARTERS)]
    for record in found:
        if record in whole:
            continue
        if not whole:
            whole.append(record)
            continue
        hosts = [r for r in whole if r.top <= record.top + 20 and r is not record] or whole
        host = max(hosts, key=lambda r: r.top)
        host.rows.extend(record.rows)
    merged: list[Record] = []
    for record in whole:
        other = next((r for r in merged if _complements(r, record)), None)
        if other is None:
            merged.append(record)
        else:
            other.rows.extend(record.rows)
    return merged


def _complements(a: Record, b: Record) -> bool:
    """Two columns of labels that share no quantity are two halves of one table."""
    if a.name or b.name:
        return False
    mine = {r.pair.label.quantity for r in a.rows if r.pair.label.quantity}
    theirs = {r.pair.label.quantity for r in b.rows if r.pair.label.quantity}
    both = mine & theirs & {Quantity.FREQUENCY, Quantity.GAIN, Quantity.VSWR}
    return not both and (a.has(Quantity.FREQUENCY) != b.has(Quantity.FREQUENCY))


def _catalogues(page: int, pairs: list[Pair], boxes: list[Box]) -> list[Record]:
    """Records of tables whose labels are column heads."""
    tables: list[list[Pair]] = []
    for pair in pairs:
        home = next((t for t in tables if overlap(t[0].box, pair.box)), None)
        if home is None:
            tables.append([pair])
        else:
            home.append(pair)
    found: list[Record] = []
    for table in tables:
        found.extend(_rows_of_table(page, table, boxes))
    return found


def _rows_of_table(page: int, table: list[Pair], boxes: list[Box]) -> list[Record]:
    models = next((p for p in table if p.label.model), None)
    lines: list[list[tuple[Pair, Value]]] = []
    for pair in table:
        for value in pair.values:
            home = next((li for li in lines if overlap(li[0][1].boxes[0], value.boxes[0])), None)
            if home is None:
                lines.append([(pair, value)])
            else:
                home.append((pair, value))
    lines.sort(key=lambda li: li[0][1].boxes[0].top)
    named = [_name_of(line, models, boxes) for line in lines]
    per_row = models is not None or sum(n is not None for n in named) > len(lines) / 2
    if per_row:
        return [
            Record(
                page,
                [Row(page, pair, [value]) for pair, value in line if not pair.label.model],
                name,
                x0=line[0][1].boxes[0].x0,
                top=line[0][1].boxes[0].top,
            )
            for line, name in zip(lines, named, strict=True)
        ]
    record = Record(page, x0=table[0].box.x0, top=table[0].box.top)
    for line in lines:
        for pair, value in line:
            record.rows.append(Row(page, pair, [value], sampled=True))
    return [record]


def _name_of(line: list[tuple[Pair, Value]], models: Pair | None, boxes: list[Box]) -> str | None:
    for pair, value in line:
        if pair is models:
            return value.boxes[0].printed.strip()
    if models is not None:
        return None
    first = min((value.boxes[0] for _, value in line), key=lambda b: b.x0)
    left = [b for b in boxes if b.x1 <= first.x0 + 1 and overlap(b, first) and b.label is None]
    letters = [b for b in left if any(c.isalpha() for c in b.text)]
    return letters[0].printed.strip() if letters else None
