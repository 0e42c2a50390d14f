"""Ruling lines of a PDF page: thin filled rectangles, strokes, edges of rectangles.

Plots are left out: paths with curves or with very many segments hold no table.
"""

from __future__ import annotations

import ctypes
from collections.abc import Iterator
from dataclasses import dataclass, field
from itertools import pairwise

import numpy as np
import pypdfium2.raw as pdfium

from specs.claims.claim import BBox
from specs.errors import SheetTooLarge
from specs.reading.characters import Frame

THIN = 2.5
"""A filled rectangle with a side up to this many points is a ruling."""

MOST_SEGMENTS = 400
MOST_DEPTH = 6
_SHORTEST = 4.0


@dataclass(slots=True)
class Rulings:
    """Horizontal rulings as (y, x0, x1), vertical ones as (x, top, bottom); boxes of images."""

    horizontal: list[tuple[float, float, float]] = field(default_factory=list)
    vertical: list[tuple[float, float, float]] = field(default_factory=list)
    images: list[BBox] = field(default_factory=list)
    paths: int = 0

    def add_box(self, box: BBox) -> None:
        """Take in a painted rectangle: a ruling when thin, its four edges otherwise."""
        x0, top, x1, bottom = box
        if bottom - top <= THIN and x1 - x0 >= _SHORTEST:
            self.horizontal.append(((top + bottom) / 2, x0, x1))
        elif x1 - x0 <= THIN and bottom - top >= _SHORTEST:
            self.vertical.append(((x0 + x1) / 2, top, bottom))
        elif x1 - x0 >= _SHORTEST and bottom - top >= _SHORTEST:
            self.horizontal += [(top, x0, x1), (bottom, x0, x1)]
            self.vertical += [(x0, top, bottom), (x1, top, bottom)]

    def add_line(self, x0: float, y0: float, x1: float, y1: float) -> None:
        """Take in a straight stroke, if it is parallel to an axis."""
        if abs(y1 - y0) <= THIN and abs(x1 - x0) >= _SHORTEST:
            self.horizontal.append(((y0 + y1) / 2, min(x0, x1), max(x0, x1)))
        elif abs(x1 - x0) <= THIN and abs(y1 - y0) >= _SHORTEST:
            self.vertical.append(((x0 + x1) / 2, min(y0, y1), max(y0, y1)))


@dataclass(frozen=True, slots=True)
class _Matrix:
    a: float = 1.0
    b: float = 0.0
    c: float = 0.0
    d: float = 1.0
    e: float = 0.0
    f: float = 0.0

    def point(self, x: float, y: float) -> tuple[float, float]:
        return self.a * x + self.c * y + self.e, self.b * x + self.d * y + self.f

    def then(self, outer: _Matrix) -> _Matrix:
        return _Matrix(
            outer.a * self.a + outer.c * self.b,
            outer.b * self.a + outer.d * self.b,
            outer.a * self.c + outer.c * self.d,
            outer.b * self.c + outer.d * self.d,
            outer.a * self.e + outer.c * self.f + outer.e,
            outer.b * self.e + outer.d * self.f + outer.f,
        )


def rulings(page: pdfium.FPDF_PAGE, frame: Frame, most_objects: int) -> Rulings:
    """All rulings and images of a page. Raises ``SheetTooLarge`` for too many objects."""
    count = pdfium.FPDFPage_CountObjects(page)
    if count > most_objects:
        raise SheetTooLarge(f"A page holds {count} objects; {most_objects} are allowed.")
    found = Rulings()
    objects = (pdfium.FPDFPage_GetObject(page, i) for i in range(count))
    _walk(objects, _Matrix(), frame, found, 0)
    return found


def _walk(
    objects: Iterator[pdfium.FPDF_PAGEOBJECT],
    outer: _Matrix,
    frame: Frame,
    found: Rulings,
    depth: int,
) -> None:
    for item in objects:
        kind = pdfium.FPDFPageObj_GetType(item)
        if kind == pdfium.FPDF_PAGEOBJ_PATH:
            _path(item, outer, frame, found)
        elif kind == pdfium.FPDF_PAGEOBJ_IMAGE:
            box = _bounds(item, outer, frame)
            if box is not None:
                found.images.append(box)
        elif kind == pdfium.FPDF_PAGEOBJ_FORM and depth < MOST_DEPTH:
            inner = _matrix(item).then(outer)
            number = pdfium.FPDFFormObj_CountObjects(item)
            parts = (pdfium.FPDFFormObj_GetObject(item, i) for i in range(number))
            _walk(parts, inner, frame, found, depth + 1)


def _path(item: pdfium.FPDF_PAGEOBJECT, outer: _Matrix, frame: Frame, found: Rulings) -> None:
    found.paths += 1
    count = pdfium.FPDFPath_CountSegments(item)
    if not 2 <= count <= MOST_SEGMENTS:
        return
    fill, stroke = ctypes.c_int(), ctypes.c_int()
    pdfium.FPDFPath_GetDrawMode(item, fill, stroke)
    if not fill.value and not stroke.value:
        return
    matrix = _matrix(item).then(outer)
    points = _points(item, count)
    if points is None:
        return
    for run, closed in points:
        shown = [frame.point(*matrix.point(x, y)) for x, y in run]
        if len(shown) >= 4 and _is_rectangle(shown):
            xs, ys = [p[0] for p in shown], [p[1] for p in shown]
            found.add_box((min(xs), min(ys), max(xs), max(ys)))
            continue
        if stroke.value:
            for (x0, y0), (x1, y1) in pairwise(shown):
                found.add_line(x0, y0, x1, y1)
            if closed and len(shown) > 2:
                found.add_line(*shown[-1], *shown[0])


def _points(
    item: pdfium.FPDF_PAGEOBJECT, count: int
) -> list[tuple[list[tuple[float, float]], bool]] | None:
    """Runs of points of a path, each with whether it is closed; None for a path with curves."""
    runs: list[tuple[list[tuple[float, float]], bool]] = []
    x, y = ctypes.c_float(), ctypes.c_float()
    for index in range(count):
        segment = pdfium.FPDFPath_GetPathSegment(item, index)
        kind = pdfium.FPDFPathSegment_GetType(segment)
        if kind == pdfium.FPDF_SEGMENT_BEZIERTO:
            return None
        pdfium.FPDFPathSegment_GetPoint(segment, x, y)
        if kind == pdfium.FPDF_SEGMENT_MOVETO or not runs:
            runs.append(([(x.value, y.value)], False))
        else:
            runs[-1][0].append((x.value, y.value))
        if pdfium.FPDFPathSegment_GetClose(segment):
            runs[-1] = (runs[-1][0], True)
    return runs


def _is_rectangle(points: list[tuple[float, float]]) -> bool:
    if len(points) > 5:
        return False
    xs, ys = {round(p[0], 1) for p in points}, {round(p[1], 1) for p in points}
    return len(xs) <= 2 and len(ys) <= 2


def _matrix(item: pdfium.FPDF_PAGEOBJECT) -> _Matrix:
    raw = pdfium.FS_MATRIX()
    if not pdfium.FPDFPageObj_GetMatrix(item, raw):
        return _Matrix()
    return _Matrix(raw.a, raw.b, raw.c, raw.d, raw.e, raw.f)


def _bounds(item: pdfium.FPDF_PAGEOBJECT, outer: _Matrix, frame: Frame) -> BBox | None:
    left, bottom, right, top = (ctypes.c_float() for _ in range(4))
    if not pdfium.FPDFPageObj_GetBounds(item, left, bottom, right, top):
        return None
    corners = [outer.point(left.value, bottom.value), outer.point(right.value, top.value)]
    raw = np.array([[corners[0][0], corners[0][1], corners[1][0], corners[1][1]]])
    x0, y0, x1, y1 = frame.boxes(raw)[0].tolist()
    return (x0, y0, x1, y1)
