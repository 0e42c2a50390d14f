"""The one place where the service has sheets checked: shared reading processes, a short queue."""

from __future__ import annotations

import hashlib
import threading
import unicodedata
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import PurePosixPath

from flask import Flask, current_app

from service.settings import Settings
from service.shelf import Kept, Shelf
from specs.errors import BeamproofError, EmptySheet, SheetTooLarge
from specs.pipeline import Checker
from specs.reading import Limits
from specs.report.html import render_html
from specs.report.model import Report

_EXTENSION = "beamproof-desk"
_LONGEST_NAME = 120
_PATIENCE_SECONDS = 1.0


class ServiceBusy(BeamproofError):
    """As many sheets are being read as the service takes at once."""

    code = "service-busy"
    advice = "Send the sheet again in a few seconds."


class Desk:
    """Checks sheets for many threads at once, and keeps the newest reports."""

    def __init__(self, settings: Settings) -> None:
        limits = Limits(bytes=settings.sheet_bytes, seconds=settings.reading_seconds)
        self._checker = Checker(workers=settings.readers, limits=limits)
        self._shelf = Shelf(settings.kept_reports, settings.kept_bytes)
        self._sheet_bytes = settings.sheet_bytes
        # Two threads are never held by sheets for longer than the patience, so that pages and
        # health get their turn while long sheets are read.
        self._places = threading.BoundedSemaphore(settings.threads - 2)

    def check(self, data: bytes, name: str) -> Kept:
        """Check a sheet and keep its report. Raises ``SheetError`` or ``ClaimsError``.

        ``name`` is what the sender calls the file; it is shown, tells the format where the bytes do
        not, and is never a path.
        """
        if not data:
            raise EmptySheet("The file is empty.")
        if len(data) > self._sheet_bytes:
            raise SheetTooLarge(
                f"The file has {len(data):,} bytes; at most {self._sheet_bytes:,} are read."
            )
        name = plain_name(name)
        with self._place():
            report = self._checker.check_json(data, name)
        kept = Kept(hashlib.sha256(data).hexdigest(), name, data, report)
        self._shelf.put(kept)
        return kept

    def find(self, sheet_id: str) -> Kept | None:
        """A sheet that was checked before and is still kept."""
        return self._shelf.get(sheet_id)

    def page(self, kept: Kept) -> str:
        """The report of a kept sheet as one HTML page, with the pages that hold claims."""
        report = Report.model_validate_json(kept.report)
        with self._place():
            images, sizes = self._checker.page_images(kept.data, report)
        return render_html(report, images, sizes)

    def ready(self) -> bool:
        """Whether a sheet can be read now: a small one is."""
        try:
            with self._place():
                self._checker.check_json(b"Gain: 3 dBi", "ready.txt")
        except BeamproofError:
            return False
        return True

    def close(self) -> None:
        """End the reading processes."""
        self._checker.close()

    @contextmanager
    def _place(self) -> Iterator[None]:
        if not self._places.acquire(timeout=_PATIENCE_SECONDS):
            raise ServiceBusy("As many sheets are being read as the service takes at once.")
        try:
            yield
        finally:
            self._places.release()


def open_desk(app: Flask, settings: Settings) -> None:
    """Give an application its desk."""
    app.extensions[_EXTENSION] = Desk(settings)


def desk(app: Flask | None = None) -> Desk:
    """The desk of an application, without one that of the request at hand."""
    found = (app or current_app).extensions[_EXTENSION]
    assert isinstance(found, Desk)
    return found


def plain_name(name: str) -> str:
    """A file name fit to be shown: its last part, without control and direction characters.

    >>> plain_name("../../etc/pass\\x00wd.pdf")
    'passwd.pdf'
    """
    last = PurePosixPath(name.replace("\\", "/")).name
    shown = "".join(c for c in last if unicodedata.category(c) not in ("Cc", "Cf", "Cs", "Co"))
    shown = " ".join(shown.split())
    if len(shown) > _LONGEST_NAME:
        stem, dot, suffix = shown.rpartition(".")
        tail = dot + suffix if stem and len(suffix) <= 8 else ""
        shown = shown[: _LONGEST_NAME - len(tail) - 1] + "…" + tail
    return shown if shown.strip(".") else "sheet"
