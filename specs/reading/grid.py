"""Words laid out on a character grid: the plane of sources that have no geometry of their own.

A character is half an em wide. So one space (0.5 em) is a space between words, and two or more
(1 em and up) a gap between columns, as the cut of extraction takes them.
"""

from __future__ import annotations

import re

from specs.reading.document import Word

SIZE = 10.0
CHAR = 5.0
LINE = 12.0
ASCENT = 8.0
_WORD = re.compile(r"\S+")


def line_words(text: str, x: float, y: float, size: float = SIZE) -> list[Word]:
    """The words of one line that starts at (x, y), y being its top. Wide characters take two."""
    char = CHAR * size / SIZE
    column = [0]
    for letter in text:
        column.append(column[-1] + (2 if ord(letter) >= 0x1100 and _wide(letter) else 1))
    return [
        Word(
            text=match[0],
            x0=x + column[match.start()] * char,
            top=y,
            x1=x + column[match.end()] * char,
            bottom=y + size,
            baseline=y + ASCENT * size / SIZE,
            size=size,
        )
        for match in _WORD.finditer(text)
    ]


def text_width(text: str, size: float = SIZE) -> float:
    """Width of a line of text on the grid."""
    wide = sum(ord(c) >= 0x1100 and _wide(c) for c in text)
    return (len(text) + wide) * CHAR * size / SIZE


def _wide(letter: str) -> bool:
    from unicodedata import east_asian_width

    return east_asian_width(letter) in "WF"
