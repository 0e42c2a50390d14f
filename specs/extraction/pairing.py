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
from specs.extraction.vocabulary import phrase_at
from specs.units.figures import find_figures
from specs.units.spellings import measures, unit_of, unit_pattern


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
    found = [_pair_right(box, boxes, taken, nested) for box in labelled]
    found = [pair for pair in found if id(pair.box) not in nested]
    _extend_stacks(found, boxes, taken)
    for pair in found:
        if not pair.values and not pair.label.rest:
            _pair_below(pair, boxes, labelled, taken)
    return found


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


def _pair_right(box: Box, boxes: list[Box], taken: set[int], nested: set[int]) -> Pair:
    label = box.label
    assert label is not None
    pair = Pair(label, box)
    if label.rest:
        pair.values.append(Value(label.rest, [box], inline=True))
        return pair
    row = [b for b in boxes if b is not box and b.x0 >= _right_edge(box) - 1 and overlap(box, b)]
    row.sort(key=lambda b: (b.x0, b.top))
    columns: list[list[Box]] = []
    band_text: str | None = None
    for other in row:
        if _is_barrier(other):
            if columns or not _nested(label, other):
                break
            nested.add(id(other))
        unit = only_unit(other.text)
        if unit is not None:
            pair.unit = pair.unit or unit
            continue
        if not columns and label.quantity not in (Quantity.FREQUENCY, Quantity.BANDWIDTH, None):
            if only_band(other.text):
                band_text = other.text
                continue
            if _words_only(other) and label.quantity is not Quantity.POLARIZATION:
                continue
        if columns and _new_subject(other):
            break
        if columns and other.text.lstrip().startswith("±"):
            columns[-1].append(other)
            continue
        if columns and _same_stack(columns[-1][-1], other):
            columns[-1].append(other)
            continue
        columns.append([other])
    _keep_on_baseline(box, columns)
    for index, column in enumerate(columns):
        column.sort(key=lambda b: b.top)
        text = " ".join(b.text for b in column)
        pair.values.append(Value(text, column, index, len(columns), band_text=band_text))
        taken.update(id(b) for b in column)
    return pair


def _extend_stacks(found: list[Pair], boxes: list[Box], taken: set[int]) -> None:
    """Lines of a stack beside one label: down, and up when the label stands at their middle."""
    labels = [p.box for p in found]
    for pair in found:
        if not pair.values or pair.values[0].inline or pair.box.ruled:
            continue
        for value in pair.values:
            for direction in (1, -1):
                _extend(pair, value, direction, boxes, labels, taken)
            value.boxes.sort(key=lambda b: b.top)
            value.text = " ; ".join(b.text for b in value.boxes)


def _extend(
    pair: Pair, value: Value, direction: int, boxes: list[Box], labels: list[Box], taken: set[int]
) -> None:
    edge = value.boxes[-1 if direction > 0 else 0]
    if edge.ruled or edge.label is not None and edge is pair.box:
        return
    step = 1.7 * edge.lines[0].height
    free = [b for b in boxes if not b.ruled and id(b) not in taken and abs(b.x0 - edge.x0) < b.size]
    while True:
        beyond = [b for b in free if 0 < direction * (b.top - edge.top) <= step]
        beyond = [b for b in beyond if not any(overlap(b, la) and la.x1 <= b.x0 for la in labels)]
        if not beyond:
            return
        following = min(beyond, key=lambda b: abs(b.top - edge.top))
        if following.label is not None and not _nested(pair.label, following):
            return
        if not _stackable(following.text):
            return
        value.boxes.append(following)
        taken.add(id(following))
        edge = following


def _stackable(text: str) -> bool:
    """Only values with letters or units extend a stack: bare numbers are leftovers."""
    return bool(re.search(r"\d", text) and re.search(r"[^\W\d_]|[°%@]", text))


def _right_edge(box: Box) -> float:
    return box.x1 if box.ruled else box.text_box[2]


def _same_stack(above: Box, below: Box) -> bool:
    """Two free lines of one value, one under the other."""
    return same_column(above, below) and abs(above.x0 - below.x0) < 0.5 * above.size


def _keep_on_baseline(label: Box, columns: list[list[Box]]) -> None:
    """Where two free boxes compete for one column, the one on the label's baseline stays."""
    for column in columns:
        if len(column) < 2:
            continue
        bare = [b for b in column if re.fullmatch(r"[\d.,\s]+", b.text)]
        if bare and len(bare) < len(column):
            for box in bare:
                column.remove(box)


_WORD = re.compile(r"[^\W\d_]{5,}")


def _words_only(box: Box) -> bool:
    """A sub-label between label and value: words of the vocabulary without a figure."""
    if re.search(r"\d", box.text):
        return False
    return phrase_at(box.text.lower(), 0) is not None


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
    in_row = [b for b in labelled if b is not box and overlap(box, b) and not (b.label and b.label.rest)]
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


def _below(box: Box, boxes: list[Box]) -> list[Box]:
    """Boxes under a box in its column, from the top."""
    bottom = box.bottom if box.ruled else box.text_box[3]
    under = [b for b in boxes if b is not box and b.top >= bottom - 2 and same_column(box, b)]
    under.sort(key=lambda b: b.top)
    return under
