"""The report as one self-contained HTML page."""

from __future__ import annotations

import base64
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from importlib.resources import files

from jinja2 import Environment, PackageLoader, StrictUndefined
from markupsafe import Markup

from specs.report.drawings import beam_svg, ruler_svg
from specs.report.model import AntennaEntry, ClaimEntry, FindingEntry, Report
from specs.report.phrases import (
    SHAPES,
    UNREAD_REASONS,
    VERDICTS,
    condition,
    interval,
    link_consequence,
    normalized,
    number,
    quantity,
    where,
)
from specs.report.questions import letter


@dataclass(frozen=True, slots=True)
class _Box:
    """A claim marked on a page, in per cent of the page."""

    id: str
    anchor: str
    label: str
    title: str
    left: float
    top: float
    width: float
    height: float


@dataclass(frozen=True, slots=True)
class _Picture:
    number: int
    data: str
    boxes: list[_Box]


@dataclass(frozen=True, slots=True)
class _Claim:
    entry: ClaimEntry
    quantity: str
    normalized: str
    interval: str
    condition: str
    where: str
    box: str | None


@dataclass(frozen=True, slots=True)
class _Finding:
    entry: FindingEntry
    ruler: Markup


@dataclass(frozen=True, slots=True)
class _Antenna:
    entry: AntennaEntry
    anchor: str
    claims: list[_Claim]
    findings: list[_Finding]
    consequence: str
    picture: Markup | None


def render_html(
    report: Report,
    pages: Mapping[int, bytes] | None = None,
    page_sizes: Mapping[int, tuple[float, float]] | None = None,
) -> str:
    """The report as an HTML page that needs no other file.

    ``pages`` are pictures (PNG) by page number, ``page_sizes`` width and height of these pages in
    points, by which the boxes of the claims are placed. Both may be left out.
    """
    pages, sizes = pages or {}, page_sizes or {}
    shown = {n for n in pages if n in sizes}
    antennas = [_antenna(a, i, shown) for i, a in enumerate(report.antennas, start=1)]
    return _environment().get_template("report.html").render(
        report=report,
        antennas=antennas,
        pictures=[_picture(n, pages[n], sizes[n], antennas) for n in sorted(shown)],
        css=Markup(stylesheet()),
        letter=letter(report),
        shapes=SHAPES,
        verdicts=VERDICTS,
        reasons=UNREAD_REASONS,
        number=number,
    )  # fmt: skip


@cache
def stylesheet() -> str:
    """Tokens and rules of the report's look."""
    folder = files("specs.report").joinpath("templates")
    return "\n".join(
        folder.joinpath(name).read_text("utf-8") for name in ("tokens.css", "report.css")
    )


@cache
def _environment() -> Environment:
    return Environment(
        loader=PackageLoader("specs.report", "templates"),
        autoescape=True,
        undefined=StrictUndefined,
        trim_blocks=True,
        lstrip_blocks=True,
    )


def _antenna(entry: AntennaEntry, index: int, shown: set[int]) -> _Antenna:
    gain = entry.planning_gain
    anchor = f"a{index}"
    return _Antenna(
        entry=entry,
        anchor=anchor,
        claims=[_claim(c, anchor, shown) for c in entry.claims],
        findings=[
            _Finding(f, Markup("") if f.ruler is None else ruler_svg(f.ruler))
            for f in entry.findings
        ],
        consequence="" if gain is None else link_consequence(gain.shortfall_db, gain.range_factor),
        picture=beam_svg(entry),
    )


def _claim(entry: ClaimEntry, anchor: str, shown: set[int]) -> _Claim:
    boxed = next((i for i, e in enumerate(entry.evidence) if e.page in shown), None)
    return _Claim(
        entry=entry,
        quantity=quantity(entry),
        normalized=normalized(entry),
        interval=interval(entry),
        condition=condition(entry),
        where=where(entry),
        box=None if boxed is None else f"{anchor}-{entry.id}-box{boxed}",
    )


def _picture(
    number: int, data: bytes, size: tuple[float, float], antennas: list[_Antenna]
) -> _Picture:
    width, height = size
    boxes = [
        _Box(
            id=f"{antenna.anchor}-{claim.entry.id}-box{index}",
            anchor=f"{antenna.anchor}-{claim.entry.id}",
            label=claim.entry.id,
            title=f"{claim.entry.id}: {claim.quantity}, {claim.normalized}",
            left=round(100 * place.bbox[0] / width, 3),
            top=round(100 * place.bbox[1] / height, 3),
            width=round(100 * (place.bbox[2] - place.bbox[0]) / width, 3),
            height=round(100 * (place.bbox[3] - place.bbox[1]) / height, 3),
        )
        for antenna in antennas
        for claim in antenna.claims
        for index, place in enumerate(claim.entry.evidence)
        if place.page == number
    ]
    return _Picture(number, base64.b64encode(data).decode(), boxes)
