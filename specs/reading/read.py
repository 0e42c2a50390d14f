"""Bytes to a neutral document, whatever their kind."""

from __future__ import annotations

from specs.errors import SheetTooLarge
from specs.reading.document import Document
from specs.reading.formats import format_of
from specs.reading.limits import Limits


def read(data: bytes, name: str, limits: Limits | None = None) -> Document:
    """The document that bytes hold, read in this process.

    Raises a ``SheetError`` that says what is wrong and what to do. For untrusted bytes use
    ``Sandbox``.
    """
    limits = limits or Limits()
    # A name may hold bytes that are no text; a report must be text throughout.
    name = name.encode("utf-8", "replace").decode()
    if len(data) > limits.bytes:
        raise SheetTooLarge(f"The file has {len(data):,} bytes; {limits.bytes:,} are allowed.")
    kind = format_of(data, name)
    if kind == "pdf":
        from specs.reading.pdf import read_pdf

        return read_pdf(data, name, limits)
    if kind == "text":
        from specs.reading.text import read_text

        return read_text(data, name, limits)
    from specs.reading.markup import read_html, read_markdown

    return (read_html if kind == "html" else read_markdown)(data, name, limits)
