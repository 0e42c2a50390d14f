"""The neutral document: what any reader gives and extraction takes.

Coordinates are points from the top left corner of the page as shown (after rotation and crop).
A text, Markdown or HTML source is laid out on the same plane: a table cell is a rectangle, a line
a row of words, so that one reader of labels and values serves all.
"""

from __future__ import annotations

from dataclasses import dataclass

from specs.claims.claim import BBox


@dataclass(frozen=True, slots=True)
class Word:
    """A run of characters without a space, in its loose (advance-width) box.

    ``baseline`` is the y of the glyph origins from the top; ``size`` the type size in points.
    ``raised`` marks superscripts (footnote marks), ``visible`` is False for text that the page
    is known not to show, ``broken`` that a glyph has no known character.
    """

    text: str
    x0: float
    top: float
    x1: float
    bottom: float
    baseline: float
    size: float
    raised: bool = False
    visible: bool = True
    broken: bool = False


@dataclass(frozen=True, slots=True)
class Page:
    """One page.

    ``words`` in reading (stream) order, upright text only; ``rotated`` the rest.
    ``cells`` are the smallest closed rectangles of the rulings (or the cells of a markup table);
    ``vertical`` rulings as (x, top, bottom), ``horizontal`` as (y, x0, x1). ``images`` are boxes;
    ``painted`` counts paths and images, so that a blank page and a scan differ.
    """

    number: int
    width: float
    height: float
    words: tuple[Word, ...]
    cells: tuple[BBox, ...] = ()
    vertical: tuple[tuple[float, float, float], ...] = ()
    horizontal: tuple[tuple[float, float, float], ...] = ()
    images: tuple[BBox, ...] = ()
    rotated: tuple[Word, ...] = ()
    read_by: str = "text"
    painted: int = 0


@dataclass(frozen=True, slots=True)
class Document:
    """A sheet as read: pages of words with their boxes. ``notes`` are remarks for the reader."""

    name: str
    sha256: str
    media_type: str
    pages: tuple[Page, ...]
    title: str | None = None
    read_by: str = "text"
    notes: tuple[str, ...] = ()
