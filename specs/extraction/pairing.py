"""Labels to their values: walk right along the row, else down the column.

Pairing is local. From each label the walk goes to the right along its own row and stops at the next
label; side columns, tables side by side and two pairs in a row need no segmentation of the page.
Of a label without a value to its right, in a row of several labels or at the head of a ruled
column, the values stand below.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, field

from specs.claims import Quantity
from specs.extraction.labels import Label
from specs.extraction.tables import Box
from specs.extraction.values import UNITS
from specs.extraction.vocabulary import phrase_at
from specs.units.figures import find_figures
from specs.units.spellings import measures, unit_of, unit_pattern

FREQUENCIES = frozenset({Quantity.FREQUENCY, Quantity.BANDWIDTH})


@dataclass(slots=True, eq=False)
class Value:
    """One value of a label: its folded text and the boxes it was read from.

    ``column`` is its place among the values of a row; ``below`` tells that it stands under the
    label, ``row`` then is the number of its row. ``band_text`` is a band in a cell between.
    """

    text: str
    boxes: list[Box]
    column: int = 0
    columns: int = 1
    below: bool = False
    row: int = 0
    inline: bool = False
    band_text: str | None = None


@dataclass(slots=True, eq=False)
class Pair:
    """A label, where it stands, and its values; ``unit`` is a unit found in a cell of its own."""

    label: Label
    box: Box
    values: list[Value] = field(default_factory=list)
    unit: str | None = None


def pairs(boxes: list[Box]) -> list[Pair]:
    """All labels of a page (foreign and model labels too) with their values, from the top."""
    labelled = [b for b in boxes if b.label is not None]
    taken: set[int] = set()
    nested: set[int] = set()
    found = [_pair_right(box, boxes, nested) for box in labelled]
    found = [pair for pair in found if id(pair.box) not in nested]
    taken.update(id(b) for p in found for v in p.values for b in v.boxes if not v.inline)
    _extend_stacks(found, boxes, taken)
    found.extend(_band_heads(found, boxes))
    for pair in found:
        if not pair.values and not pair.label.rest:
            _pair_below(pair, boxes, labelled, taken)
    found.extend(_frequency_stubs(found, boxes, labelled, taken))
    return found


def _band_heads(found: list[Pair], boxes: list[Box]) -> list[Pair]:
    """Rows of bands over a table, without the word frequency: they are frequency rows too."""
    known = {id(b) for p in found if p.label.quantity in FREQUENCIES
             for b in [p.box, *(b for v in p.values for b in v.boxes)]}  # fmt: skip
    bands = [b for b in boxes if id(b) not in known and only_band(b.text) and b.label is None]
    made: list[Pair] = []
    while bands:
        row = [b for b in bands if overlap(b, bands[0])]
        bands = [b for b in bands if b not in row]
        under = [p for p in found if p.label.quantity in UNITS and len(p.values) > 1
                 and p.box.top > row[0].top
                 and sum(same_column(v.boxes[0], b) for v in p.values for b in row) > 1
                 ]  # fmt: skip
        if len(row) < 2 or not under:
            continue
        values = [Value(b.text, [b], i, len(row)) for i, b in enumerate(row)]
        owner = next((p for p in found if any(v.boxes[0] in row for v in p.values)), None)
        if owner is not None:
            found.remove(owner)
        home = owner.box if owner is not None else _corner(row, under[0])
        made.append(Pair(Label("", Quantity.FREQUENCY, ""), home, values))
    return made


def _corner(row: list[Box], under: Pair) -> Box:
    """Where the missing label of a band row would stand: over the labels, beside the bands."""
    x0, _, x1, _ = under.box.text_box
    first = row[0]
    lines = first.lines
    return Box(lines, x0, first.top, x1, first.bottom, first.ruled, "", None)


def overlap(a: Box, b: Box) -> bool:
    """Row test: vertical overlap of at least half of the smaller height."""
    if a.ruled and b.ruled:
        top, bottom = max(a.top, b.top), min(a.bottom, b.bottom)
        return bottom - top >= 0.5 * min(a.bottom - a.top, b.bottom - b.top)
    (_, a_top, _, a_bottom), (_, b_top, _, b_bottom) = a.text_box, b.text_box
    if a.ruled and len(a.lines) == 1:
        a_top, a_bottom = min(a_top, a.top), max(a_bottom, a.bottom)
    if b.ruled and len(b.lines) == 1:
        b_top, b_bottom = min(b_top, b.top), max(b_bottom, b.bottom)
    top, bottom = max(a_top, b_top), min(a_bottom, b_bottom)
    return bottom - top >= 0.5 * min(a_bottom - a_top, b_bottom - b_top)


def same_column(a: Box, b: Box) -> bool:
    """Column test: horizontal overlap of at least half of the smaller width."""
    left, right = max(a.x0, b.x0), min(a.x1, b.x1)
    return right - left >= 0.5 * min(a.x1 - a.x0, b.x1 - b.x0)


def only_unit(text: str) -> str | None:
    """The unit when a text is nothing but a unit."""
    stripped = text.strip(" ()[].:")
    match = unit_pattern().fullmatch(stripped) if stripped else None
    return unit_of(stripped) if match else None


def only_band(text: str) -> bool:
    """Whether a text is nothing but frequencies with their unit."""
    figures = find_figures(text)
    if not figures or measures(figures[-1].unit) != "frequency":
        return False
    left = text
    for figure in reversed(figures):
        if figure.unit and measures(figure.unit) != "frequency":
            return False
        left = left[: figure.start] + left[figure.end :]
    return not left.strip(" @/,;&()-:|")


def _is_barrier(box: Box) -> bool:
    """A label ends the walk, unless it is a short value that only looks like one."""
    label = box.label
    if label is None:
        return False
    return not (label.fuzzy and bool(re.search(r"\d", box.text)))


def _nested(label: Label, other: Box) -> bool:
    """'Gain-dBi | Zenith gain>=4.5': a value that names its quantity again."""
    inner = other.label
    return inner is not None and inner.quantity is label.quantity is not None and bool(inner.rest)


def _pair_right(box: Box, boxes: list[Box], nested: set[int]) -> Pair:
    label = box.label
    assert label is not None
    pair = Pair(label, box)
    if label.rest:
        pair.values.append(Value(label.rest, [box], inline=True))
        return pair
    right = [b for b in boxes if b is not box and b.x0 >= _right_edge(box) - 1 and overlap(box, b)]
    for row in _sub_rows(right):
        if not _walk_row(pair, row, nested):
            break
    return pair


def _sub_rows(right: list[Box]) -> list[list[Box]]:
    """The boxes beside a tall label, row by row, each from left to right."""
    rows: list[list[Box]] = []
    for box in sorted(right, key=lambda b: b.text_box[1]):
        home = next((r for r in rows if overlap(r[0], box) and not _stacked_in(r, box)), None)
        if home is None:
            rows.append([box])
        else:
            home.append(box)
    for row in rows:
        row.sort(key=lambda b: b.x0)
    return rows


def _stacked_in(row: list[Box], box: Box) -> bool:
    """A box under another of the same column starts a new row."""
    return any(same_column(b, box) and b.text_box[3] <= box.text_box[1] + 1 for b in row)


def _walk_row(pair: Pair, row: list[Box], nested: set[int]) -> bool:
    """Walk one row to the right of a label; False when the row begins with another label."""
    label = pair.label
    columns: list[list[Box]] = []
    band_text: str | None = None
    prefix: list[Box] = []
    for other in row:
        if _is_barrier(other):
            if columns or not _nested(label, other):
                break
            nested.add(id(other))
        if label.quantity in UNITS and (unit := only_unit(other.text)) is not None:
            pair.unit = pair.unit or unit
        elif not columns and _is_condition(label, other):
            band_text = other.text
        # a sub-label or a name between label and value: 'Horizontal', 'A'
        elif not columns and not re.search(r"\d", other.text) and label.quantity in UNITS:
            prefix.append(other)
        elif columns and _new_subject(other):
            break
        elif columns and other.text.lstrip().startswith("±"):
            columns[-1].append(other)
        else:
            columns.append([other])
    if not columns and band_text is not None and label.quantity is Quantity.GAIN:
        return True
    for index, column in enumerate(columns):
        boxes = [*prefix, *column] if index == 0 else column
        text = " ".join(b.text for b in boxes)
        pair.values.append(Value(text, boxes, index, len(columns), band_text=band_text))
    return bool(columns) or not row or not _is_barrier(row[0])


def _is_condition(label: Label, other: Box) -> bool:
    """A cell of frequencies between a label and its value."""
    return label.quantity not in (
        Quantity.FREQUENCY, Quantity.BANDWIDTH, None,
    ) and only_band(other.text)  # fmt: skip


def _extend_stacks(found: list[Pair], boxes: list[Box], taken: set[int]) -> None:
    """Rows that go on beside one label: down, and up when the label stands at their middle."""
    labels = [p.box for p in found]
    free = [b for b in boxes if not b.ruled]
    for pair in found:
        if not pair.values or pair.values[0].inline or pair.box.ruled:
            continue
        for direction in (1, -1):
            _extend(pair, direction, free, labels, taken)


def _extend(
    pair: Pair, direction: int, free: list[Box], labels: list[Box], taken: set[int]
) -> None:
    edge = pair.values[-1 if direction > 0 else 0].boxes[0]
    left = min(v.boxes[0].x0 for v in pair.values)
    if edge.ruled:
        return
    step = 2.6 * edge.lines[0].height
    while True:
        beyond = [b for b in free if 0.5 < direction * (b.top - edge.top) <= step
                  and b.x0 > _right_edge(pair.box) - 1 and id(b) not in taken]  # fmt: skip
        if not beyond:
            return
        nearest = min(beyond, key=lambda b: abs(b.top - edge.top))
        row = sorted((b for b in beyond if overlap(b, nearest)), key=lambda b: b.x0)
        if any(overlap(b, la) and la.x0 < b.x0 for b in row[:1] for la in labels):
            return
        if row[0].x0 > left + row[0].size * 12 or not _goes_on(pair, row):
            return
        before = len(pair.values)
        if not _walk_row(pair, row, set()) or len(pair.values) == before:
            return
        added = pair.values[before:]
        del pair.values[before:]
        taken.update(id(b) for v in added for b in v.boxes)
        _join_row(pair, added, direction)
        edge = row[0]


def _goes_on(pair: Pair, row: list[Box]) -> bool:
    """Whether a row without a label can belong to the label above (or below) it.

    Bare numbers are leftovers of other rows; only values with letters or units go on.
    """
    first = row[0]
    if first.label is not None and not _nested(pair.label, first):
        return False
    aligned = any(abs(b.x0 - v.boxes[0].x0) < b.size for b in row for v in pair.values) or (
        len(row) > 1 and only_band(first.text)
    )
    text = " ".join(b.text for b in row)
    return aligned and bool(re.search(r"\d", text) and re.search(r"[^\W\d_]|[°%@]", text))


def _join_row(pair: Pair, added: list[Value], direction: int) -> None:
    """A further line of a value joins its text; a row with its own condition stands alone."""
    single = len(added) == 1 and len(pair.values) == 1
    if single and added[0].band_text is None and pair.values[0].band_text is None:
        value, more = pair.values[0], added[0]
        parts = [value, more] if direction > 0 else [more, value]
        value.text = _joined(parts[0].text, parts[1].text)
        value.boxes = [*parts[0].boxes, *parts[1].boxes]
    elif direction > 0:
        pair.values.extend(added)
    else:
        pair.values[:0] = added


def _joined(first: str, second: str) -> str:
    """Two lines of one value: a broken list goes on, else each line is an item."""
    if re.search(r"[-~/,;&]\s*$", first) or re.match(r"\s*[-~/,;&]", second):
        return f"{first} {second}"
    return f"{first} ; {second}"


def _right_edge(box: Box) -> float:
    return box.x1 if box.ruled else box.text_box[2]


_WORD = re.compile(r"[^\W\d_]{5,}")


def _new_subject(box: Box) -> bool:
    """Prose that follows a value on the same line: an unknown word and no digit."""
    if re.search(r"\d", box.text):
        return False
    word = _WORD.search(box.text)
    return word is not None and phrase_at(word[0].lower(), 0) is None


def _pair_below(pair: Pair, boxes: list[Box], labelled: list[Box], taken: set[int]) -> None:
    box = pair.box
    following = _below(box, boxes)
    if following and following[0].text.lstrip().startswith(":"):
        pair.values.append(Value(following[0].text.lstrip(" :"), [following[0]]))
        return
    bare = [b for b in labelled if b.label and not b.label.rest]
    in_row = [b for b in bare if b is not box and overlap(box, b)]
    ruled_below = bool(following) and box.ruled and following[0].ruled
    if len(in_row) < 1 and not ruled_below:
        return
    last = box
    for row, other in enumerate(following):
        if other.label is not None and not (other.label.rest and other.label.fuzzy):
            return
        gap = other.top - last.bottom if other.ruled else other.text_box[1] - last.text_box[3]
        if gap > 1.6 * max(other.lines[0].height, 1.0) + (2.0 if row else 4.0):
            return
        if id(other) in taken and row == 0:
            return
        if only_unit(other.text) is not None and row == 0:
            pair.unit = only_unit(other.text)
            last = other
            continue
        pair.values.append(Value(other.text, [other], below=True, row=len(pair.values)))
        last = other


def _frequency_stubs(
    found: list[Pair], boxes: list[Box], labelled: list[Box], taken: set[int]
) -> list[Pair]:
    """'MHz' alone at the head of a column, beside heads with values below, means frequency."""
    heads = [p for p in found if any(v.below for v in p.values)]
    if not heads or any(p.label.quantity is Quantity.FREQUENCY for p in heads):
        return []
    made: list[Pair] = []
    for box in boxes:
        unit = only_unit(box.text) if box.label is None else None
        if unit is None or measures(unit) != "frequency":
            continue
        if any(overlap(box, p.box) for p in heads):
            pair = Pair(Label(box.text, Quantity.FREQUENCY, "", unit=unit), box)
            _pair_below(pair, boxes, [*labelled, box], taken)
            made.append(pair)
    return made


def _below(box: Box, boxes: list[Box]) -> list[Box]:
    """Boxes under a box in its column, from the top."""
    bottom = box.bottom if box.ruled else box.text_box[3]
    under = [b for b in boxes if b is not box and b.top >= bottom - 2 and same_column(box, b)]
    under.sort(key=lambda b: b.top)
    return under
