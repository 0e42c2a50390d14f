"""Bytes to a sheet: reading and extraction in one step."""

from __future__ import annotations

from specs.claims import Sheet
from specs.extraction.assemble import extract
from specs.reading import Limits, read


def read_sheet(data: bytes, name: str, limits: Limits | None = None) -> Sheet:
    """All claims of a document, read in this process: for bytes that are trusted.

    Raises a ``SheetError`` when the document cannot be read.
    """
    return extract(read(data, name, limits))
