"""Characters to words: broken at spaces, gaps, jumps of the baseline, and turns of size."""

from __future__ import annotations

import ctypes
from dataclasses import replace

import numpy as np
import numpy.typing as npt
import pypdfium2.raw as pdfium

from specs.reading.characters import Characters, Frame, Style, Styles
from specs.reading.document import Word

WORD_GAP_EM = 0.17
"""A wider gap between loose boxes is a space; 0.08 to 0.22 em read alike on real sheets."""

JUMP_EM = 0.3
BACK_EM = 0.5
UPRIGHT_DEGREES = 8.0
_HYPHENS = np.array([0x02, 0xAD, 0xFFFE])
"""PDFium's marks of a hyphen at the end of a line, and the soft hyphen."""

_SPACES = np.array([0x20, 0xA0, 0x09, 0x0A, 0x0D, 0x00, 0x3000, 0x2002, 0x2003, 0x2009, 0x202F])


def words(
    text_page: pdfium.FPDF_TEXTPAGE, chars: Characters, frame: Frame
) -> tuple[list[Word], list[Word]]:
    """(upright words, rotated words) of a page, in stream order."""
    if len(chars.codes) == 0:
        return [], []
    codes, boxes = chars.codes.copy(), chars.boxes
    codes[np.isin(codes, _HYPHENS)] = ord("-")
    blank = np.isin(codes, _SPACES)
    keep = np.flatnonzero(~blank & ~_doubled(codes, boxes, blank))
    if len(keep) == 0:
        return [], []
    breaks = _breaks(keep, boxes, blank)
    styles = Styles(text_page, frame)
    upright: list[Word] = []
    rotated: list[tuple[Style, Word]] = []
    starts = np.concatenate(([0], np.flatnonzero(breaks) + 1))
    ends = np.concatenate((starts[1:], [len(keep)]))
    heights = boxes[:, 3] - boxes[:, 1]
    for start, end in zip(starts.tolist(), ends.tolist(), strict=True):
        index = keep[start:end]
        style = styles.of(int(index[0]), float(heights[index[0]]))
        word = _word(text_page, index, codes, boxes, style, frame)
        if abs(style.angle) > UPRIGHT_DEGREES:
            rotated.append((style, word))
        else:
            upright.append(word)
    return _marks_raised(upright), _rotated_runs(rotated)


def _doubled(
    codes: npt.NDArray[np.int64], boxes: npt.NDArray[np.float64], blank: npt.NDArray[np.bool_]
) -> npt.NDArray[np.bool_]:
    """Characters drawn again with a small shift (fake bold)."""
    doubled = np.zeros(len(codes), dtype=bool)
    x0, top = boxes[:, 0], boxes[:, 1]
    width = boxes[:, 2] - x0
    height = boxes[:, 3] - top
    order = np.lexsort((x0, np.round(top / 3.0), codes))
    a, b = order[:-1], order[1:]
    same = (
        (codes[a] == codes[b])
        & (np.abs(x0[a] - x0[b]) < 0.3 * np.minimum(width[a], width[b]))
        & (np.abs(top[a] - top[b]) < 0.3 * np.minimum(height[a], height[b]))
        & (np.abs(height[a] - height[b]) < 0.1 * height[a] + 0.01)
        & ~blank[a]
    )
    # The parts of an ff ligature share one box and follow each other: those stay.
    ligature = (np.abs(a - b) == 1) & (codes[a] == ord("f")) & (x0[a] == x0[b])
    later = np.maximum(a, b)[same & ~ligature]
    doubled[later] = True
    return doubled


def _breaks(
    keep: npt.NDArray[np.int64],
    boxes: npt.NDArray[np.float64],
    blank: npt.NDArray[np.bool_],
) -> npt.NDArray[np.bool_]:
    """Whether a word ends between each kept character and the next."""
    left, right = keep[:-1], keep[1:]
    em = 0.86 * np.minimum(boxes[left, 3] - boxes[left, 1], boxes[right, 3] - boxes[right, 1])
    gap = boxes[right, 0] - boxes[left, 2]
    # A ligature's parts share one box: the second begins where the first does.
    shared = (boxes[right, 0] == boxes[left, 0]) & (boxes[right, 1] == boxes[left, 1])
    spaces = np.concatenate(([0], np.cumsum(blank)))
    spaced = spaces[right] - spaces[left] > 0
    jump = np.abs(boxes[right, 3] - boxes[left, 3]) > JUMP_EM * em
    backwards = boxes[right, 0] < boxes[left, 0] - BACK_EM * em
    heights = boxes[:, 3] - boxes[:, 1]
    resized = np.abs(heights[right] - heights[left]) > 0.25 * np.maximum(
        heights[right], heights[left]
    )
    broken: npt.NDArray[np.bool_] = (
        spaced | (gap > WORD_GAP_EM * em) | jump | backwards | resized
    ) & ~shared
    return broken


def _word(
    text_page: pdfium.FPDF_TEXTPAGE,
    index: npt.NDArray[np.int64],
    codes: npt.NDArray[np.int64],
    boxes: npt.NDArray[np.float64],
    style: Style,
    frame: Frame,
) -> Word:
    box = boxes[index]
    x0, top = box[:, 0].min(), box[:, 1].min()
    x1, bottom = box[:, 2].max(), box[:, 3].max()
    x, y = ctypes.c_double(), ctypes.c_double()
    pdfium.FPDFText_GetCharOrigin(text_page, int(index[0]), x, y)
    _, baseline = frame.point(x.value, y.value)
    text = "".join(map(chr, codes[index].tolist()))
    off_page = x1 < 0 or bottom < 0 or x0 > frame.width or top > frame.height
    return Word(
        text=text,
        x0=float(x0),
        top=float(top),
        x1=float(x1),
        bottom=float(bottom),
        baseline=float(baseline),
        size=float(style.size),
        visible=style.visible and not off_page,
        broken=any(_unmapped(code) for code in codes[index].tolist()),
    )


def _unmapped(code: int) -> bool:
    return code in (0xFFFD, 0xFFFF) or code < 0x20


def _marks_raised(found: list[Word]) -> list[Word]:
    """Mark footnote signs: small, short, and set above the baseline of the word in front."""
    for position in range(1, len(found)):
        before, word = found[position - 1], found[position]
        if (
            len(word.text) <= 3
            and word.size < 0.9 * before.size
            and 0.2 * before.size < before.baseline - word.baseline < 0.8 * before.size
            and -0.3 * before.size < word.x0 - before.x1 < 0.5 * before.size
        ):
            found[position] = replace(word, raised=True)
    return found


def _rotated_runs(found: list[tuple[Style, Word]]) -> list[Word]:
    """Neighbouring pieces of one rotated style, joined in the order of the stream."""
    runs: list[Word] = []
    last: Style | None = None
    for style, word in found:
        if runs and last == style and _near(runs[-1], word):
            runs[-1] = _joined(runs[-1], word)
        else:
            runs.append(word)
        last = style
    return runs


def _near(a: Word, b: Word) -> bool:
    reach = 0.4 * max(a.size, b.size)
    return (
        b.x0 <= a.x1 + reach and b.x1 >= a.x0 - reach
        and b.top <= a.bottom + reach and b.bottom >= a.top - reach
    )  # fmt: skip


def _joined(a: Word, b: Word) -> Word:
    return Word(
        a.text + b.text,
        min(a.x0, b.x0),
        min(a.top, b.top),
        max(a.x1, b.x1),
        max(a.bottom, b.bottom),
        a.baseline,
        a.size,
        visible=a.visible and b.visible,
        broken=a.broken or b.broken,
    )
