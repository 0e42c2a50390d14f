"""The bands of a record, and which of them a figure holds for.

In this order: printed with the value; in a cell between label and value; in the label; in the head
of the column; the column of the frequency row; the place in a list as long as the list of bands;
the single band of the record; else none.
"""

from __future__ import annotations

from dataclasses import dataclass, field

from specs.claims import Band
from specs.extraction.heads import Head, union_of
from specs.extraction.pairing import Value
from specs.extraction.records import Row
from specs.extraction.tables import Box
from specs.extraction.values import Reading


@dataclass(slots=True)
class Bands:
    """The bands that a record prints.

    ``all`` in order of print; ``columns`` the boxes of a frequency row of several columns, each
    with its bands; ``samples`` are spot frequencies of a measured table, which are no claims.
    """

    all: list[Band] = field(default_factory=list)
    columns: list[tuple[Box, Band]] = field(default_factory=list)
    rows: list[tuple[Box, Band]] = field(default_factory=list)
    listed: list[list[Band]] = field(default_factory=list)


_NAMED = {"low": 0, "lower": 0, "mid": 1, "high": -1, "upper": -1}


def add_frequency(bands: Bands, value: Value, readings: list[Reading]) -> None:
    """Take in the bands of one value of a frequency row."""
    found = [r.band for r in readings if r.band is not None]
    if not found:
        return
    bands.all.extend(b for b in found if b not in bands.all)
    union = (min(b[0] for b in found), max(b[1] for b in found))
    if value.below:
        bands.rows.append((value.boxes[0], union))
    elif value.columns > 1:
        bands.columns.append((value.boxes[0], union))
    else:
        bands.listed.append(found)


def band_of(reading: Reading, row: Row, value: Value, head: Head, bands: Bands) -> Band | None:
    """The band a reading holds for; None when the sheet does not say."""
    if reading.band is not None:
        return reading.band
    for text in (value.band_text, row.pair.label.band_text):
        if text and (band := union_of(text)) is not None:
            return band
    if head.band is not None:
        return head.band
    if value.columns > 1 or bands.columns:
        over = _over_box(value.boxes[0], bands)
        if over:
            # a value over all columns holds for all of them: no band of its own
            whole = len(over) == len(bands.columns) > 1
            return None if whole else (min(b[0] for b in over), max(b[1] for b in over))
    if row.sampled:
        return next((b for box, b in bands.rows if _same_row(box, value.boxes[0])), None)
    if reading.named_band and len(bands.all) in (2, 3):
        index = _NAMED[reading.named_band]
        if not (len(bands.all) == 2 and index == 1):
            return bands.all[index]
    for listed in bands.listed:
        if reading.places == len(listed) > 1:
            return listed[reading.place]
    if len(bands.all) == 1:
        return bands.all[0]
    return None


def _over_box(box: Box, bands: Bands) -> list[Band]:
    """The bands of the frequency columns over (or under) a box."""
    return [band for head, band in bands.columns if _over(head, box)]


def _over(head: Box, box: Box) -> bool:
    left, right = max(head.x0, box.x0), min(head.x1, box.x1)
    return right - left > 0.5 * min(head.x1 - head.x0, box.x1 - box.x0)


def _same_row(a: Box, b: Box) -> bool:
    top, bottom = max(a.top, b.top), min(a.bottom, b.bottom)
    return bottom - top >= 0.5 * min(a.bottom - a.top, b.bottom - b.top)


def is_sample_list(readings: list[Reading]) -> bool:
    """Four or more spot frequencies in a row are points of a measurement, not claims."""
    spots = [r for r in readings if r.band is not None and r.band[0] == r.band[1]]
    return len(spots) >= 4 and len(spots) == len(readings)
