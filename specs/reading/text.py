"""Plain text to a document: columns kept by the character grid."""

from __future__ import annotations

import hashlib
import re

from specs.errors import DamagedSheet, EmptySheet, SheetTooLarge
from specs.reading.document import Document, Page, Word
from specs.reading.grid import LINE, line_words, text_width
from specs.reading.limits import Limits

LINES_PER_PAGE = 400
TITLE_SIZE = 14.0
_HEADING = re.compile(r"#{1,2} (.{1,200})$")
_CONTROL = re.compile(r"[\x00-\x08\x0b\x0e-\x1f\x7f]")


def decoded(data: bytes) -> str:
    """Text of bytes: UTF-8, UTF-16 with its mark, else the Western code page.

    Raises ``DamagedSheet`` when the bytes are plainly no text.
    """
    if data.startswith((b"\xff\xfe", b"\xfe\xff")):
        text = data.decode("utf-16", errors="replace")
    else:
        try:
            text = data.decode("utf-8-sig")
        except UnicodeDecodeError:
            text = data.decode("cp1252", errors="replace")
    controls = len(_CONTROL.findall(text))
    if controls > 0.02 * len(text) + 2:
        raise DamagedSheet("The file is neither text nor any other kind that can be read.")
    return _CONTROL.sub(" ", text).replace("\r\n", "\n").replace("\r", "\n")


def read_text(data: bytes, name: str, limits: Limits) -> Document:
    """The lines of a text, one page for every 400 of them."""
    text = decoded(data)
    if len(text) > limits.characters:
        raise SheetTooLarge(
            f"The text has {len(text)} characters; {limits.characters} are allowed."
        )
    if not text.strip():
        raise EmptySheet("The text holds nothing but white space.")
    lines = [_columns(line) for line in re.split(r"\n|\f", text)]
    pages = [
        _page(number, lines[start : start + LINES_PER_PAGE])
        for number, start in enumerate(range(0, len(lines), LINES_PER_PAGE), start=1)
    ]
    if len(pages) > limits.pages:
        raise SheetTooLarge(f"The text has {len(lines)} lines.")
    return Document(name, hashlib.sha256(data).hexdigest(), "text/plain", tuple(pages))


def _columns(line: str) -> str:
    """Tabs and bars of drawn tables become column gaps."""
    line = line.replace("\t", "    ").expandtabs(4)
    if line.count("|") >= 2 or re.match(r"\s*[+|]?[-=+|]{4,}\s*$", line):
        line = re.sub(r"[|]|\+(?=[-=])|(?<=[-=])\+", "  ", line)
        if not re.search(r"[^\s\-=+]", line):
            return ""
    return line


def _page(number: int, lines: list[str]) -> Page:
    words: list[Word] = []
    for row, line in enumerate(lines):
        heading = _HEADING.match(line)
        if heading:
            words.extend(line_words(heading[1], 0.0, row * LINE, TITLE_SIZE))
        else:
            words.extend(line_words(line[:2000], 0.0, row * LINE))
    width = max((text_width(line[:2000]) for line in lines), default=0.0)
    return Page(number, max(width, 1.0), len(lines) * LINE, tuple(words))
