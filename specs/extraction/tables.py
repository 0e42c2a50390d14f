"""Segments and cells to boxes: what stands in a table cell, or free on the page.

A ruled cell refines; it is never a precondition. A rectangle that covers much of the page, holds
many lines, or lines of several pieces each, is a frame and its content is read as free rows. A cell
that stacks several labels (row rulings missing) is taken apart into rows.
"""

from __future__ import annotations

import re
from collections import defaultdict
from dataclasses import dataclass

from specs.claims import BBox
from specs.extraction.labels import Label, read_label
from specs.extraction.lines import Segment
from specs.reading.document import Page

FRAME_SHARE = 0.35
FRAME_LINES = 14


@dataclass(slots=True, eq=False)
class Box:
    """A cell with its lines, or a free segment.

    ``x0 .. bottom`` is the cell when ``ruled``, else the text; ``lines`` the segments from the top.
    ``text`` is the folded text of all lines, ``label`` what it names when read as a label.
    """

    lines: list[Segment]
    x0: float
    top: float
    x1: float
    bottom: float
    ruled: bool
    text: str
    label: Label | None

    @property
    def printed(self) -> str:
        """The text exactly as it stands, lines joined by a space."""
        return " ".join(line.printed for line in self.lines)

    @property
    def text_box(self) -> BBox:
        """The box of the text itself."""
        return (
            min(s.x0 for s in self.lines),
            min(s.top for s in self.lines),
            max(s.x1 for s in self.lines),
            max(s.bottom for s in self.lines),
        )

    @property
    def size(self) -> float:
        """Type size in points."""
        return self.lines[0].size


def boxes(page: Page, segments: list[Segment]) -> list[Box]:
    """All boxes of a page, from the top, left to right."""
    held: dict[int, list[Segment]] = defaultdict(list)
    free: list[Segment] = []
    cells = sorted(page.cells, key=_area)
    for segment in segments:
        index = _cell_of(segment, cells)
        if index is None:
            free.append(segment)
        else:
            held[index].append(segment)
    found: list[Box] = [free_box(s) for s in free]
    page_area = page.width * page.height
    for index, inside in held.items():
        found.extend(_cell_boxes(cells[index], inside, page_area))
    found = _with_heads_joined(found)
    found.sort(key=lambda b: (round(b.lines[0].baseline), b.x0))
    return found


def free_box(segment: Segment) -> Box:
    """A box of its own for a free segment."""
    return Box([segment], *segment.bbox, False, segment.text, read_label(segment.text))


def _with_heads_joined(found: list[Box]) -> list[Box]:
    """Labels broken over two or three free lines, joined where only the whole reads as a label."""
    free = [b for b in found if not b.ruled and len(b.text) <= 40 and not _numeric(b.text)]
    free.sort(key=lambda b: b.top)
    joined: dict[int, Box] = {}
    gone: set[int] = set()
    for first in free:
        if id(first) in gone:
            continue
        stack = [first]
        for below in free:
            if len(stack) < 4 and id(below) not in gone and _follows(stack[-1], below):
                stack.append(below)
        while len(stack) > 1:
            if (whole := _whole(stack)) is not None:
                joined[id(first)] = whole
                gone.update(id(b) for b in stack)
                break
            stack.pop()
    kept = [b for b in found if id(b) not in gone]
    return [*kept, *joined.values()]


def _numeric(text: str) -> bool:
    """Whether a text holds a digit, other than the level of a beamwidth or band edge."""
    return bool(
        re.search(r"\d", re.sub(r"[-–]?\b(?:3|6|10)\s?-?db", "", text, flags=re.IGNORECASE))
    )


def _follows(above: Box, below: Box) -> bool:
    """Whether a free line stands right under another, in its column, in the same type size."""
    gap = below.top - above.bottom
    height = above.lines[0].height
    across = min(above.x1, below.x1) - max(above.x0, below.x0)
    return (
        -0.4 * height < gap < 0.35 * height
        and below.top > above.top + 0.5 * height
        and across >= 0.5 * min(above.x1 - above.x0, below.x1 - below.x0)
        and abs(above.size - below.size) < 0.1 * above.size
    )


def _whole(stack: list[Box]) -> Box | None:
    """One box for a label set in several lines; None when the lines are labels of their own."""
    lines = [line for box in stack for line in box.lines]
    text = " ".join(line.text for line in lines)
    label = read_label(text)
    if label is None or label.rest or label.fuzzy:
        return None
    heads = {b.label.quantity for b in stack if b.label is not None and not b.label.fuzzy}
    complete = sum(b.label is not None and not b.label.fuzzy for b in stack)
    if len(heads) > 1 or (complete > 1 and label.foreign) or complete == len(stack) > 1:
        return None
    x0, top = min(b.x0 for b in stack), min(b.top for b in stack)
    x1, bottom = max(b.x1 for b in stack), max(b.bottom for b in stack)
    return Box(lines, x0, top, x1, bottom, False, text, label)


def _cell_of(segment: Segment, cells: list[BBox]) -> int | None:
    """The smallest cell that holds the middle of a segment and does not cut it in two."""
    x, y = (segment.x0 + segment.x1) / 2, (segment.top + segment.bottom) / 2
    for index, (x0, top, x1, bottom) in enumerate(cells):
        if x0 <= x <= x1 and top <= y <= bottom:
            slack = segment.size
            return index if segment.x0 >= x0 - slack and segment.x1 <= x1 + slack else None
    return None


def _area(cell: BBox) -> float:
    return (cell[2] - cell[0]) * (cell[3] - cell[1])


def _cell_boxes(cell: BBox, inside: list[Segment], page_area: float) -> list[Box]:
    rows: dict[float, list[Segment]] = defaultdict(list)
    for segment in inside:
        rows[round(segment.baseline, 1)].append(segment)
    broken = sum(len(row) > 1 for row in rows.values())
    # A cell of one line in several pieces is a stripe behind a row of an unruled table.
    stripe = broken == len(rows) == 1
    large = _area(cell) > FRAME_SHARE * page_area or len(rows) > FRAME_LINES
    frame = large or broken >= 2 or stripe
    if frame:
        return [free_box(s) for s in inside]
    lines = sorted(inside, key=lambda s: (s.baseline, s.x0))
    labels = [read_label(s.text) for s in lines]
    if len(lines) > 1:
        whole = read_label(" ".join(s.text for s in lines))
        several = sum(label is not None and not label.fuzzy for label in labels) >= 2
        inline = sum(label is not None and bool(label.rest) for label in labels) >= 2
        if several and (whole is None or whole.rest or inline or len(lines) > 3):
            return [Box([s], *_row(cell, s), True, s.text, read_label(s.text)) for s in lines]
    text = " ".join(s.text for s in lines)
    return [Box(lines, *cell, True, text, read_label(text))]


def _row(cell: BBox, segment: Segment) -> BBox:
    """The strip of a cell in which one of its lines stands."""
    return (cell[0], segment.top, cell[2], segment.bottom)
