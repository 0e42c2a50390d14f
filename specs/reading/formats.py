"""Which kind of document the bytes are: by their content first, by the name second."""

from __future__ import annotations

import re
from pathlib import PurePath

from specs.errors import DamagedSheet, EmptySheet, UnknownFormat

_HTML = re.compile(rb"<!doctype html|<html[\s>]|<table[\s>]|<body[\s>]", re.IGNORECASE)
_KNOWN_BINARY: tuple[tuple[bytes, str], ...] = (
    (b"PK\x03\x04", "a ZIP archive or office document"),
    (b"\xd0\xcf\x11\xe0", "an old office document"),
    (b"\x89PNG", "a PNG picture"),
    (b"\xff\xd8\xff", "a JPEG picture"),
    (b"GIF8", "a GIF picture"),
    (b"II*\x00", "a TIFF picture"),
    (b"MM\x00*", "a TIFF picture"),
    (b"\x1f\x8b", "a gzip archive"),
    (b"7z\xbc\xaf", "a 7z archive"),
    (b"Rar!", "a RAR archive"),
    (b"\x7fELF", "a program"),
    (b"MZ\x90", "a program"),
)


def format_of(data: bytes, name: str) -> str:
    """'pdf', 'html', 'markdown' or 'text'.

    Raises ``EmptySheet``, ``UnknownFormat`` (names what it is, when known) or ``DamagedSheet``
    (a name that says PDF over bytes that are none).
    """
    if not data.strip(b"\x00 \t\r\n"):
        raise EmptySheet("The file is empty." if not data else "The file holds nothing.")
    if b"%PDF-" in data[:1024]:
        return "pdf"
    suffix = PurePath(name).suffix.lower()
    for signature, kind in _KNOWN_BINARY:
        if data.startswith(signature):
            raise UnknownFormat(f"The file is {kind}.")
    if suffix == ".pdf":
        raise DamagedSheet("The name says PDF, but the file does not begin like one.")
    if _HTML.search(data[:4096]):
        return "html"
    if suffix in (".md", ".markdown"):
        return "markdown"
    if suffix in (".htm", ".html", ".xhtml"):
        return "html"
    head = data[:4096]
    if b"\x00" in head and not data.startswith((b"\xff\xfe", b"\xfe\xff")):
        raise UnknownFormat("The file is binary and of no known kind.")
    if re.search(rb"^\s*\|?.*\|.*\n\s*\|?\s*:?-{3,}", data[:20000], re.MULTILINE):
        return "markdown"
    return "text"
