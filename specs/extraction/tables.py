"""Segments and cells to boxes: what stands in a table cell, or free on the page.

A ruled cell refines; it is never a precondition. A rectangle that covers much of the page, holds
many lines, or lines of several pieces each, is a frame and its content is read as free rows. A cell
that stacks several labels (row rulings missing) is taken apart into rows.
"""

from __future__ import annotations

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
    found.sort(key=lambda b: (round(b.lines[0].baseline), b.x0))
    return found


def free_box(segment: Segment) -> Box:
    """A box of its own for a free segment."""
    return Box([segment], *segment.bbox, False, segment.text, read_label(segment.text))


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
    frame = _area(cell) > FRAME_SHARE * page_area or broken >= 2 or len(rows) > FRAME_LINES
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
