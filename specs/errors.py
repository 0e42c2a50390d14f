"""Every error that Beamproof raises on purpose.

::

    BeamproofError
    ├── SheetError                  a sheet could not be read
    │   ├── UnknownFormat           neither PDF, text, Markdown nor HTML
    │   ├── EmptySheet              no bytes, or nothing printed
    │   ├── EncryptedSheet          needs a password
    │   ├── DamagedSheet            says it is a PDF and cannot be opened
    │   ├── NoTextLayer             a scan, or outlines only
    │   ├── SheetTooLarge           more bytes, objects or text than allowed
    │   ├── TooManyPages            more pages than allowed
    │   ├── ReadingTimedOut         overran its time
    │   └── ReaderFailed            the reading process died or ran out of memory
    ├── ClaimsError                 claims given as JSON are malformed
    └── UnitsError
        ├── UnreadableFigure        no number, or not one number
        ├── UnknownUnit             a unit we do not know (names the nearest we do)
        ├── IncompatibleUnits       from dBi to degrees
        └── MissingCondition        a conversion needs a figure that was not given

Each carries ``code`` (stable, kebab-case), ``message`` (what happened) and ``advice`` (what to
do). They survive pickling, for they cross the border of the reading process.
"""

from __future__ import annotations


class BeamproofError(Exception):
    """Base of all errors raised on purpose.

    ``message`` says what happened, ``advice`` what the reader can do about it.
    """

    code = "error"
    advice = ""

    def __init__(self, message: str, advice: str | None = None) -> None:
        super().__init__(message)
        self.message = message
        if advice is not None:
            self.advice = advice

    def __reduce__(self) -> tuple[type[BeamproofError], tuple[str, str]]:
        return type(self), (self.message, self.advice)

    def __str__(self) -> str:
        return f"{self.message} {self.advice}".strip()


class SheetError(BeamproofError):
    """A sheet could not be read."""

    code = "sheet-unreadable"


class UnknownFormat(SheetError):
    """The bytes are of no kind that can be read."""

    code = "unknown-format"
    advice = "Send a PDF, a text file, Markdown or HTML."


class EmptySheet(SheetError):
    """There is nothing in the file."""

    code = "empty-sheet"
    advice = "Check that the file was saved or sent whole."


class EncryptedSheet(SheetError):
    """The PDF needs a password."""

    code = "encrypted-sheet"
    advice = "Ask the vendor for a copy without a password, or save one."


class DamagedSheet(SheetError):
    """The file says it is a PDF and cannot be opened as one."""

    code = "damaged-sheet"
    advice = "Fetch the file again; if it still fails, print it to a new PDF."


class NoTextLayer(SheetError):
    """The pages hold pictures or outlines, and no text."""

    code = "no-text-layer"
    advice = "Ask for the original, or make a searchable copy by text recognition."


class SheetTooLarge(SheetError):
    """The file is larger than allowed, in bytes, objects or characters."""

    code = "sheet-too-large"
    advice = "Send only the pages that describe the antenna."


class TooManyPages(SheetError):
    """The file has more pages than allowed."""

    code = "too-many-pages"
    advice = "Send only the pages that describe the antenna."


class ReadingTimedOut(SheetError):
    """Reading took longer than allowed and was stopped."""

    code = "reading-timed-out"
    advice = "Print the pages to a new PDF, or send fewer pages."


class ReaderFailed(SheetError):
    """The reading process died or ran out of memory on this sheet."""

    code = "reader-failed"
    advice = "Print the pages to a new PDF; the file may be hostile."


class ClaimsError(BeamproofError):
    """Claims given as JSON do not have the form of ``beamproof.claims/1``."""

    code = "claims-malformed"
    advice = "Compare with the claims schema."


class UnitsError(BeamproofError):
    """A figure or unit could not be understood or converted."""

    code = "units"


class UnreadableFigure(UnitsError):
    """The text holds no figure, or something beside it that is none."""

    code = "unreadable-figure"


class UnknownUnit(UnitsError):
    """The unit is not in the table of spellings."""

    code = "unknown-unit"


class IncompatibleUnits(UnitsError):
    """The two units do not measure the same thing."""

    code = "incompatible-units"


class MissingCondition(UnitsError):
    """The conversion needs a figure that was not given, such as a frequency."""

    code = "missing-condition"
