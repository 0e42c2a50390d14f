"""A document in, a judged report out: the one place that shows the whole way.

::

    bytes --reading--> Document --extraction--> Sheet
          --rules, estimate--> judgements --report--> Report

Untrusted bytes are taken this way in a child process with limits (``Checker``). Text that the
caller already holds, and claims given as JSON, are judged in this process.
"""

from __future__ import annotations

import hashlib
import json
from collections.abc import Callable, Iterable, Iterator
from pathlib import Path
from types import TracebackType
from typing import Any

from specs.claims import Sheet
from specs.claims.given import sheet_from_claims
from specs.errors import BeamproofError, ClaimsError, SheetError
from specs.estimate import planning_gain
from specs.extraction import read_sheet
from specs.reading import Limits, Sandbox
from specs.report.assemble import build_report
from specs.report.model import Report
from specs.rules.engine import judge


def judge_sheet(sheet: Sheet) -> Report:
    """The report on a sheet whose claims are read."""
    judgements = [judge(antenna, sheet) for antenna in sheet.antennas]
    planning = [planning_gain(antenna) for antenna in sheet.antennas]
    return build_report(sheet, judgements, planning)


def check_text(text: str, name: str = "sheet.txt") -> Report:
    """The report on a sheet given as plain text or Markdown.

    >>> check_text("Gain: 3.1 dBi\\nDirectivity: 2.0 dBi").verdict.value
    'hold'
    """
    return judge_sheet(read_sheet(text.encode(), name))


def check_claims(given: str | bytes | dict[str, Any], name: str = "claims.json") -> Report:
    """The report on claims given as ``beamproof.claims/1`` (JSON text or a dictionary).

    Raises ``ClaimsError`` with every fault and its place.
    """
    if isinstance(given, dict):
        try:
            body = json.dumps(given, sort_keys=True, allow_nan=False).encode()
        except (TypeError, ValueError) as error:
            raise ClaimsError(f"The claims are no JSON: {error}.") from error
    else:
        body = given.encode() if isinstance(given, str) else given
    return judge_sheet(sheet_from_claims(given, name, hashlib.sha256(body).hexdigest()))


def check_file(path: str | Path) -> Report:
    """The report on one file, read in a child process with limits.

    A name that ends in ``.json`` is read as claims. Raises ``SheetError``, ``ClaimsError`` or
    ``OSError``. For many files, hold one ``Checker``.
    """
    path = Path(path)
    with Checker() as checker:
        return checker.check(path.read_bytes(), path.name)


class Checker:
    """Checks sheets in warm child processes with limits on time, memory and size.

    Thread-safe. Use as a context manager, or call ``close``.
    """

    def __init__(self, workers: int = 1, limits: Limits | None = None) -> None:
        self._limits = limits or Limits()
        self._sandbox = Sandbox(_work, workers=workers, limits=self._limits)

    def check(self, data: bytes, name: str) -> Report:
        """The report on one document. Raises ``SheetError`` or ``ClaimsError``."""
        return Report.model_validate_json(self.check_json(data, name))

    def check_json(self, data: bytes, name: str) -> bytes:
        """The report on one document as JSON, as the child process wrote it."""
        return self._sandbox.run("check", data, name, self._limits)

    def check_many(
        self,
        items: Iterable[tuple[bytes | Path, str]],
        progress: Callable[[int], None] | None = None,
    ) -> Iterator[tuple[str, Report | BeamproofError]]:
        """Reports on many documents, in order; an error stands in the place of its report.

        ``items`` are (bytes or path, name); ``progress`` is told how many are done.
        """
        listed = list(items)
        jobs = (("check", data, name, self._limits) for data, name in listed)
        results = zip(listed, self._sandbox.map(jobs), strict=True)
        for done, ((_, name), result) in enumerate(results, start=1):
            if progress is not None:
                progress(done)
            if isinstance(result, BeamproofError):
                yield name, result
            else:
                yield name, Report.model_validate_json(result)

    def page_image(self, data: bytes, number: int, dpi: float = 110) -> bytes:
        """One page of a PDF as PNG. ``number`` counts from 1. Raises ``SheetError``."""
        return self._sandbox.run("image", data, number, dpi)

    def page_images(
        self, data: bytes, report: Report, most: int = 8
    ) -> tuple[dict[int, bytes], dict[int, tuple[float, float]]]:
        """Pictures (PNG) and sizes in points of the pages of a PDF that hold claims.

        At most ``most`` pages, the first ones; nothing for a sheet that is no PDF.
        """
        if report.sheet.media_type != "application/pdf":
            return {}, {}
        numbers = sorted(
            {e.page for a in report.antennas for c in a.claims for e in c.evidence if e.page}
        )[:most]
        sizes = json.loads(self._sandbox.run("sizes", data))
        images = {n: self.page_image(data, n) for n in numbers}
        return images, {n: tuple(sizes[n - 1]) for n in numbers}

    def close(self) -> None:
        """End the child processes."""
        self._sandbox.close()

    def __enter__(self) -> Checker:
        return self

    def __exit__(
        self,
        kind: type[BaseException] | None,
        error: BaseException | None,
        trace: TracebackType | None,
    ) -> None:
        self.close()


def _work(task: str, data: bytes | Path, *rest: Any) -> bytes:
    """What a child process does: runs there, on untrusted bytes."""
    body = _read_bytes(data) if isinstance(data, Path) else data
    if task == "image":
        from specs.reading import render_page

        number, dpi = rest
        return render_page(body, number, dpi=dpi)
    if task == "sizes":
        from specs.reading import page_sizes

        return json.dumps(page_sizes(body)).encode()
    name, limits = rest
    if name.lower().endswith(".json"):
        report = check_claims(body, name)
    else:
        report = judge_sheet(read_sheet(body, name, limits))
    return report.model_dump_json(by_alias=True).encode()


def _read_bytes(path: Path) -> bytes:
    try:
        return path.read_bytes()
    except OSError as error:
        raise SheetError(f"The file cannot be opened: {error.strerror}.") from error
