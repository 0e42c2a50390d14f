"""PDF bytes to a document, by PDFium; by pdfplumber for a page that PDFium cannot give.

Runs inside the reading process. Pages are closed one by one, so that memory stays flat.
"""

from __future__ import annotations

import hashlib
import io
from collections.abc import Iterator
from contextlib import contextmanager

import pypdfium2 as pypdfium
import pypdfium2.raw as pdfium

from specs.errors import (
    DamagedSheet,
    EmptySheet,
    EncryptedSheet,
    NoTextLayer,
    SheetTooLarge,
    TooManyPages,
)
from specs.reading.cells import cells
from specs.reading.characters import characters, frame_of
from specs.reading.document import Document, Page, Word
from specs.reading.limits import Limits
from specs.reading.rulings import Rulings, rulings
from specs.reading.words import words

_UNMAPPED_SHARE = 1 / 3


def read_pdf(data: bytes, name: str, limits: Limits) -> Document:
    """The pages of a PDF. Raises a ``SheetError`` when there is nothing to read."""
    with opened(data) as document:
        count = len(document)
        if count == 0:
            raise EmptySheet("The PDF has no pages.")
        if count > limits.pages:
            raise TooManyPages(f"The PDF has {count} pages; {limits.pages} are allowed.")
        has_forms = _has_forms(document)
        pages: list[Page] = []
        total = 0
        for index in range(count):
            page = _page(document, index, limits, has_forms, data)
            total += sum(len(w.text) for w in page.words)
            if total > limits.characters:
                raise SheetTooLarge(f"The PDF holds more than {limits.characters} characters.")
            pages.append(page)
        title = document.get_metadata_value("Title") or None
    notes = _notes(pages)
    return Document(
        name=name,
        sha256=hashlib.sha256(data).hexdigest(),
        media_type="application/pdf",
        pages=tuple(pages),
        title=title,
        notes=notes,
    )


@contextmanager
def opened(data: bytes) -> Iterator[pypdfium.PdfDocument]:
    """A PDF held open. Raises ``EncryptedSheet`` or ``DamagedSheet``."""
    try:
        document = pypdfium.PdfDocument(data)
    except pypdfium.PdfiumError as error:
        if "assword" in str(error):
            raise EncryptedSheet("The PDF needs a password to be opened.") from error
        raise DamagedSheet("The file begins like a PDF and cannot be opened as one.") from error
    try:
        yield document
    finally:
        document.close()


def _has_forms(document: pypdfium.PdfDocument) -> bool:
    if document.get_formtype() == pdfium.FORMTYPE_NONE:
        return False
    document.init_forms()
    return True


def _page(
    document: pypdfium.PdfDocument, index: int, limits: Limits, has_forms: bool, data: bytes
) -> Page:
    page = pdfium.FPDF_LoadPage(document, index)
    if not page:
        return _by_pdfplumber(data, index)
    try:
        if has_forms and pdfium.FPDFPage_Flatten(page, pdfium.FLAT_NORMALDISPLAY) == 1:
            # Form fields become ordinary text, seen when the page is loaded anew.
            pdfium.FPDF_ClosePage(page)
            page = pdfium.FPDF_LoadPage(document, index)
        frame = frame_of(page)
        text_page = pdfium.FPDFText_LoadPage(page)
        if not text_page:
            return _by_pdfplumber(data, index)
        try:
            count = pdfium.FPDFText_CountChars(text_page)
            if count > limits.characters:
                raise SheetTooLarge(f"Page {index + 1} holds {count} characters.")
            upright, rotated = words(text_page, characters(text_page, frame), frame)
        finally:
            pdfium.FPDFText_ClosePage(text_page)
        ruled = rulings(page, frame, limits.objects_per_page)
    finally:
        pdfium.FPDF_ClosePage(page)
    return _assembled(index, frame.width, frame.height, upright, rotated, ruled)


def _assembled(
    index: int,
    width: float,
    height: float,
    upright: list[Word],
    rotated: list[Word],
    ruled: Rulings,
) -> Page:
    return Page(
        number=index + 1,
        width=width,
        height=height,
        words=tuple(upright),
        cells=tuple(cells(ruled.horizontal, ruled.vertical)),
        vertical=tuple(ruled.vertical),
        horizontal=tuple(ruled.horizontal),
        images=tuple(ruled.images),
        rotated=tuple(rotated),
        painted=ruled.paths + len(ruled.images),
    )


def _by_pdfplumber(data: bytes, index: int) -> Page:
    """A page by pdfplumber's own parser: slower, and another reader of the same bytes."""
    import pdfplumber

    try:
        with pdfplumber.open(io.BytesIO(data), pages=[index + 1]) as document:
            page = document.pages[0].dedupe_chars()
            found = [
                Word(
                    text=w["text"],
                    x0=float(w["x0"]),
                    top=float(w["top"]),
                    x1=float(w["x1"]),
                    bottom=float(w["bottom"]),
                    baseline=float(w["bottom"]) - 0.2 * float(w["size"]),
                    size=float(w["size"]),
                    broken="(cid:" in w["text"],
                )
                for w in page.extract_words(x_tolerance_ratio=0.15, extra_attrs=["size"])
                if w["upright"]
            ]
            ruled = Rulings()
            for edge in page.edges:
                ruled.add_line(edge["x0"], edge["top"], edge["x1"], edge["bottom"])
            return _assembled(index, float(page.width), float(page.height), found, [], ruled)
    except Exception as error:  # pdfminer raises whatever a broken file makes it raise
        raise DamagedSheet(f"Page {index + 1} of the PDF cannot be read.") from error


def _notes(pages: list[Page]) -> tuple[str, ...]:
    """Remarks on pages without text. Raises ``NoTextLayer`` or ``EmptySheet`` if none has any."""
    textless = [p for p in pages if not p.words]
    if len(textless) == len(pages):
        if any(p.rotated for p in pages):
            raise NoTextLayer(
                "All text on the pages is turned or upside down, and was not read.",
                "Turn the pages upright, save them as a new PDF, and send that.",
            )
        if any(p.painted for p in pages):
            raise NoTextLayer("The pages hold pictures or outlines, and no text.")
        raise EmptySheet("The pages of the PDF are blank.")
    notes = []
    scans = [str(p.number) for p in textless if p.painted]
    if scans:
        notes.append(f"No text on page {', '.join(scans)}: pictures or outlines only.")
    broken = sum(w.broken for p in pages for w in p.words)
    if broken > _UNMAPPED_SHARE * sum(len(p.words) for p in pages):
        notes.append("Much of the text has no known characters: its fonts carry no map.")
    return tuple(notes)


def render_page(data: bytes, number: int, dpi: float = 110) -> bytes:
    """Page ``number`` (from 1) as PNG bytes. Raises ``SheetError``, or ``IndexError`` past the end.

    A point of the page is ``dpi / 72`` pixels. Very large pages are drawn smaller.
    """
    with opened(data) as document:
        if not 1 <= number <= len(document):
            raise IndexError(f"The PDF has {len(document)} pages; there is no page {number}.")
        page = document[number - 1]
        width, height = page.get_size()
        scale = min(dpi / 72, 4000 / max(width, height, 1.0))
        if document.get_formtype() != pdfium.FORMTYPE_NONE:
            document.init_forms()
        bitmap = page.render(scale=scale)
        image = io.BytesIO()
        bitmap.to_pil().save(image, "PNG", optimize=False)
        bitmap.close()
        page.close()
        return image.getvalue()


def page_sizes(data: bytes) -> list[tuple[float, float]]:
    """Width and height in points of each page as shown. Raises a ``SheetError``."""
    with opened(data) as document:
        return [document.get_page_size(index) for index in range(len(document))]
