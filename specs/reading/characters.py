"""Characters of a PDF page as arrays, from PDFium.

Each foreign call costs about two microseconds, whatever it returns; so there is one call a
character (its loose box), one for the whole text, and the rest once a word. Loose (advance-width)
boxes, never ink boxes: with ink boxes the narrow digit 1 leaves a gap that looks like a space.
"""

from __future__ import annotations

import ctypes
import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt
import pypdfium2.raw as pdfium

Floats = npt.NDArray[np.float64]


@dataclass(slots=True)
class Characters:
    """All characters of a page in stream order.

    ``codes`` are Unicode code points; ``boxes`` has shape (n, 4) as (x0, top, x1, bottom) in points
    from the top left corner of the page as shown.
    """

    codes: npt.NDArray[np.int64]
    boxes: Floats


@dataclass(frozen=True, slots=True)
class Style:
    """What the characters of one text object share: size in points, angle in degrees, shown."""

    size: float
    angle: float
    visible: bool


@dataclass(frozen=True, slots=True)
class Frame:
    """The way from user space to the page as shown: x' = a·x + c·y + e, y' = b·x + d·y + f."""

    a: float
    b: float
    c: float
    d: float
    e: float
    f: float
    width: float
    height: float

    def boxes(self, raw: Floats) -> Floats:
        """Boxes (left, bottom, right, top) of user space as (x0, top, x1, bottom) of the page."""
        left, bottom, right, top = raw.T
        xa, xb = self.a * left + self.c * bottom, self.a * right + self.c * top
        ya, yb = self.b * left + self.d * bottom, self.b * right + self.d * top
        return np.column_stack(
            (
                np.minimum(xa, xb) + self.e,
                np.minimum(ya, yb) + self.f,
                np.maximum(xa, xb) + self.e,
                np.maximum(ya, yb) + self.f,
            )
        )

    def point(self, x: float, y: float) -> tuple[float, float]:
        """A point of user space on the page as shown."""
        return self.a * x + self.c * y + self.e, self.b * x + self.d * y + self.f

    @property
    def turn(self) -> float:
        """Angle in degrees by which the page is turned for showing."""
        return math.degrees(math.atan2(-self.b, self.a))


_SCALE = 100  # device units per point, so that integer device coordinates are fine enough


def frame_of(page: pdfium.FPDF_PAGE) -> Frame:
    """Crop box and rotation of a page, by asking PDFium where three points are shown."""
    width, height = pdfium.FPDF_GetPageWidthF(page), pdfium.FPDF_GetPageHeightF(page)
    sx, sy = round(width * _SCALE), round(height * _SCALE)

    def shown(x: float, y: float) -> tuple[float, float]:
        dx, dy = ctypes.c_int(), ctypes.c_int()
        pdfium.FPDF_PageToDevice(page, 0, 0, sx, sy, 0, x, y, dx, dy)
        return dx.value / _SCALE, dy.value / _SCALE

    reach = 1000.0
    e, f = shown(0.0, 0.0)
    ax, ay = shown(reach, 0.0)
    cx, cy = shown(0.0, reach)

    def unit(value: float) -> float:
        return round(value / reach, 3)

    return Frame(
        unit(ax - e), unit(ay - f), unit(cx - e), unit(cy - f), e, f, float(width), float(height)
    )


# PDFium's function under a prototype of plain addresses: it fills one array in place, where the
# typed prototype would cost an object a character.
_LOOSE_BOX = ctypes.CFUNCTYPE(ctypes.c_int, ctypes.c_void_p, ctypes.c_int, ctypes.c_void_p)(
    ctypes.cast(pdfium.FPDFText_GetLooseCharBox, ctypes.c_void_p).value or 0
)


def _address(handle: pdfium.FPDF_TEXTPAGE) -> int:
    return ctypes.cast(handle, ctypes.c_void_p).value or 0


def characters(text_page: pdfium.FPDF_TEXTPAGE, frame: Frame) -> Characters:
    """Codes and boxes of all characters of a page."""
    count = max(pdfium.FPDFText_CountChars(text_page), 0)
    raw = (pdfium.FS_RECTF * max(count, 1))()
    size = ctypes.sizeof(pdfium.FS_RECTF)
    page_address, box_address = _address(text_page), ctypes.addressof(raw)
    for index in range(count):
        _LOOSE_BOX(page_address, index, box_address + index * size)
    values = np.frombuffer(raw, dtype=np.float32).reshape(-1, 4)[:count].astype(np.float64)
    # FS_RECTF is (left, top, right, bottom) with the origin below
    boxes = frame.boxes(values[:, [0, 3, 2, 1]])
    return Characters(_codes(text_page, count), boxes)


def _codes(text_page: pdfium.FPDF_TEXTPAGE, count: int) -> npt.NDArray[np.int64]:
    buffer = (ctypes.c_ushort * (count + 1))()
    written = pdfium.FPDFText_GetText(text_page, 0, count, buffer)
    codes = np.frombuffer(bytes(buffer), dtype=np.uint16)[: max(written - 1, 0)].astype(np.int64)
    surrogates = bool(((codes >= 0xD800) & (codes < 0xE000)).any())
    if len(codes) == count and not surrogates:
        return np.asarray(codes)
    one = pdfium.FPDFText_GetUnicode
    return np.array([one(text_page, i) for i in range(count)], dtype=np.int64)


class Styles:
    """Styles of text objects, each asked once."""

    def __init__(self, text_page: pdfium.FPDF_TEXTPAGE, frame: Frame) -> None:
        self._text_page, self._frame = text_page, frame
        self._known: dict[int, Style] = {}

    def of(self, index: int, box_height: float) -> Style:
        """The style at a character; by its box height where there is no text object."""
        found = pdfium.FPDFText_GetTextObject(self._text_page, index)
        if not found:
            return Style(box_height * 0.86, 0.0, True)
        address = ctypes.addressof(found.contents)
        if address not in self._known:
            self._known[address] = self._ask(index, found, box_height)
        return self._known[address]

    def _ask(self, index: int, text_object: pdfium.FPDF_PAGEOBJECT, box_height: float) -> Style:
        matrix = pdfium.FS_MATRIX()
        pdfium.FPDFText_GetMatrix(self._text_page, index, matrix)
        nominal = pdfium.FPDFText_GetFontSize(self._text_page, index)
        size = abs(nominal) * math.hypot(matrix.c, matrix.d)
        angle = math.degrees(math.atan2(matrix.b, matrix.a)) + self._frame.turn
        mode = pdfium.FPDFTextObj_GetTextRenderMode(text_object)
        visible = mode not in (
            pdfium.FPDF_TEXTRENDERMODE_INVISIBLE, pdfium.FPDF_TEXTRENDERMODE_CLIP,
        )  # fmt: skip
        if not 0.3 * box_height < size < 3 * box_height:
            size = box_height * 0.86
        return Style(size, (angle + 180) % 360 - 180, visible)
