"""Markdown and HTML to a document: table cells become rectangles, other blocks lines.

Markdown is turned to HTML by markdown-it, HTML taken apart by BeautifulSoup over Python's own
parser; scripts, styles and front matter are left out.
"""

from __future__ import annotations

import hashlib
import re
from collections.abc import Iterator

from bs4 import BeautifulSoup
from bs4.element import NavigableString, Tag

from specs.claims.claim import BBox
from specs.errors import EmptySheet, SheetTooLarge
from specs.reading.document import Document, Page, Word
from specs.reading.grid import LINE, SIZE, line_words, text_width
from specs.reading.limits import Limits
from specs.reading.text import decoded

_DROPPED = ("script", "style", "head", "template", "noscript", "svg", "iframe", "object", "nav")
_BLOCKS = frozenset(
    "p div li h1 h2 h3 h4 h5 h6 dt dd section article header footer main ul ol dl body html"  # noqa: SIM905
    " blockquote pre figure figcaption aside address caption form fieldset td th tr".split()
)
_FRONT_MATTER = re.compile(r"\A---\n.*?\n---\n", re.DOTALL)
_HEADING_SIZE = {"h1": 18.0, "h2": 14.0, "h3": 12.0}
_MOST_CELLS = 20_000
_DEEPEST = 200


def read_markdown(data: bytes, name: str, limits: Limits) -> Document:
    """The blocks and tables of a Markdown text."""
    from markdown_it import MarkdownIt

    text = _FRONT_MATTER.sub("", decoded(data))
    _check_size(text, limits)
    html = MarkdownIt("commonmark", {"html": True, "breaks": True}).enable("table").render(text)
    return _document(html, data, name, "text/markdown")


def read_html(data: bytes, name: str, limits: Limits) -> Document:
    """The blocks and tables of an HTML page."""
    text = decoded(data)
    _check_size(text, limits)
    return _document(text, data, name, "text/html")


def _check_size(text: str, limits: Limits) -> None:
    if len(text) > limits.characters:
        raise SheetTooLarge(
            f"The page has {len(text)} characters; {limits.characters} are allowed."
        )


def _document(html: str, data: bytes, name: str, media_type: str) -> Document:
    if _depth(html) > _DEEPEST:
        raise SheetTooLarge(f"The page nests more than {_DEEPEST} elements.")
    soup = BeautifulSoup(html, "html.parser")
    for tag in soup.find_all(_DROPPED):
        tag.decompose()
    layout = _Layout()
    layout.block(soup)
    layout.flush()
    if not layout.words:
        raise EmptySheet("The page holds no text.")
    page = Page(
        1, max(layout.width, 1.0), layout.y + LINE, tuple(layout.words), tuple(layout.cells)
    )
    title = soup.title.get_text(" ", strip=True) if soup.title else None
    digest = hashlib.sha256(data).hexdigest()
    return Document(name, digest, media_type, (page,), title=title)


def _depth(html: str) -> int:
    """Nesting of elements, counted roughly and without recursion."""
    depth = deepest = 0
    for match in re.finditer(r"<(/?)(div|span|table|tr|td|ul|ol|li|b|i|p|section|font)\b", html):
        depth += -1 if match[1] else 1
        deepest = max(deepest, depth)
    return deepest


class _Layout:
    """Sets blocks and tables one under the other."""

    def __init__(self) -> None:
        self.words: list[Word] = []
        self.cells: list[BBox] = []
        self.y = 0.0
        self.width = 0.0
        self._line = ""
        self._size = SIZE

    def block(self, tag: Tag) -> None:
        """Lay out the children of an element."""
        for child in tag.children:
            if isinstance(child, NavigableString):
                if type(child) is NavigableString:
                    self._line += re.sub(r"[ \t\r\n\f]+", " ", str(child))
            elif isinstance(child, Tag):
                self._element(child)

    def _element(self, tag: Tag) -> None:
        if tag.name == "br":
            self.flush()
        elif tag.name == "table":
            self.flush()
            self._table(tag)
        elif tag.name == "pre":
            self.flush()
            for line in tag.get_text().splitlines():
                self._put(line)
        elif tag.name in _BLOCKS:
            self.flush()
            self._size = _HEADING_SIZE.get(tag.name, SIZE)
            self.block(tag)
            self.flush()
            self._size = SIZE
            self.y += 3.0
        elif tag.name == "sup" and re.fullmatch(r"[\d*)(†‡]{1,3}", tag.get_text(strip=True)):
            return  # a footnote mark
        else:
            self.block(tag)

    def flush(self) -> None:
        """End the current line."""
        line, self._line = self._line.strip(), ""
        if line:
            self._put(line)

    def _put(self, line: str) -> None:
        self.words.extend(line_words(line, 0.0, self.y, self._size))
        self.width = max(self.width, text_width(line, self._size))
        self.y += LINE * self._size / SIZE

    def _table(self, table: Tag) -> None:
        nested = list(table.find_all("table"))
        rows = _grid([tr for tr in table.find_all("tr") if tr.find_parent("table") is table])
        if not rows or len(rows) * max(len(r) for r in rows) > _MOST_CELLS:
            self.block(table)
            return
        texts = {id(cell): _cell_lines(cell) for row in rows for cell, _, _, _, _ in row}
        columns = max(c + cs for row in rows for _, _, c, _, cs in row)
        widths = [30.0] * columns
        for row in rows:
            for cell, _, column, _, span in row:
                need = max((text_width(t) for t in texts[id(cell)]), default=0.0) + 10.0
                if span == 1:
                    widths[column] = max(widths[column], need)
        for row in rows:
            for cell, _, column, _, span in row:
                need = max((text_width(t) for t in texts[id(cell)]), default=0.0) + 10.0
                lack = need - sum(widths[column : column + span])
                if lack > 0:
                    widths[column + span - 1] += lack
        xs = [sum(widths[:i]) for i in range(columns + 1)]
        heights = [
            max((len(texts[id(c)]) for c, _, _, rs, _ in row if rs == 1), default=1) * LINE + 4.0
            for row in rows
        ]
        ys = [self.y + sum(heights[:i]) for i in range(len(rows) + 1)]
        for row in rows:
            for cell, r, column, row_span, span in row:
                box = (xs[column], ys[r], xs[min(column + span, columns)],
                       ys[min(r + row_span, len(rows))])  # fmt: skip
                self.cells.append(box)
                lines = texts[id(cell)]
                top = (box[1] + box[3]) / 2 - len(lines) * LINE / 2
                for i, line in enumerate(lines):
                    self.words.extend(line_words(line, box[0] + 4.0, top + i * LINE))
        self.width = max(self.width, xs[-1])
        self.y = ys[-1] + LINE
        for inner in nested:
            inner.extract()


_Placed = tuple[Tag, int, int, int, int]


def _grid(rows: list[Tag]) -> list[list[_Placed]]:
    """Cells with (row, column, row span, column span), spans taken into account."""
    taken: set[tuple[int, int]] = set()
    placed: list[list[_Placed]] = []
    for r, tr in enumerate(rows):
        line: list[_Placed] = []
        column = 0
        for cell in tr.find_all(["td", "th"], recursive=False):
            while (r, column) in taken:
                column += 1
            row_span, span = _span(cell, "rowspan"), _span(cell, "colspan")
            taken.update((r + i, column + j) for i in range(row_span) for j in range(span))
            line.append((cell, r, column, row_span, span))
            column += span
        placed.append(line)
    return placed if any(placed) else []


def _span(cell: Tag, name: str) -> int:
    value = str(cell.get(name, "1")).strip()
    return max(1, min(int(value), 60)) if value.isdigit() else 1


def _cell_lines(cell: Tag) -> list[str]:
    lines = [re.sub(r"\s+", " ", part).strip() for part in _pieces(cell)]
    return [line for line in lines if line]


def _pieces(cell: Tag) -> Iterator[str]:
    """Text of a cell, broken where a block or a line break stands."""
    line = ""
    for item in cell.descendants:
        if isinstance(item, Tag):
            if item.name == "br" or item.name in _BLOCKS:
                yield line
                line = ""
        elif type(item) is NavigableString:
            parent = item.parent
            if (
                parent is not None
                and parent.name == "sup"
                and re.fullmatch(r"\s*[\d*)(†‡]{1,3}\s*", str(item))
            ):
                continue
            line += str(item)
    yield line
