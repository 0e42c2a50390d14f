"""Amplifier gain: known by its label, by the heading above it, or by its company.

An amplifier's gain printed as 'Gain 28 dBi' is the commonest trap of active positioning antennas.
"""

from __future__ import annotations

import re

from specs.claims import Quantity
from specs.extraction.records import Record, Row
from specs.extraction.tables import Box

COMPANY_DB = 18.0
"""From this gain on, amplifier company (noise figure, supply) makes a gain an amplifier's."""

_AMPLIFIER = re.compile(
    r"\blna\b|\bamplifier\b|low[- ]noise|\bverstärker|amplificad|amplificat|усилител|мшу|"
    r"放大器|低噪|増幅|증폭", re.IGNORECASE,
)  # fmt: skip
_ANTENNA_HEADING = re.compile(
    r"^(?:\d+[.)]?\s*)?(?:passive |the )?(?:antenna|element|radiat|patch|mechanic|environment|"
    r"general|cable|physical|strahler|antenne|antena|天线|机械|環境|环境|アンテナ)", re.IGNORECASE,
)  # fmt: skip
_COMPANY = re.compile(
    r"noise figure|rauschzahl|rauschmaß|噪声|雑音|잡음|noise factor|figura de ruido|"
    r"facteur de bruit|voltage|spannung|电压|電圧|전압|\bvdc\b|"
    r"current|stromaufnahme|电流|電流|\bma\b", re.IGNORECASE,
)  # fmt: skip


def under_amplifier(record: Record, boxes: list[Box], labels: set[int]) -> set[int]:
    """Identities of the rows of a record whose figures stand under an amplifier heading.

    ``labels`` are the identities of labels that have a value: those are no headings.
    """
    free = [b for b in boxes if id(b) not in labels]
    headings = sorted((b for b in free if _is_heading(b)), key=lambda b: (round(b.x0 / 40), b.top))
    found: set[int] = set()
    for row in record.rows:
        above = [h for h in headings if _heads(h, row.pair.box)]
        if not above:
            column = [h for h in headings if h.x1 < row.pair.box.text_box[0]]
            above = column[-1:] if not _anything_above(row, headings) else []
        if above and _AMPLIFIER.search(max(above, key=lambda h: h.top).text):
            found.add(id(row))
    return found


def _is_heading(box: Box) -> bool:
    text = box.text.strip()
    if len(text) > 48 or re.search(r"\d\s*(?:d[bB]|MHz|GHz|%|°)", text):
        return False
    if box.label is not None and box.label.rest:
        return False
    return bool(_AMPLIFIER.search(text) or _ANTENNA_HEADING.search(text)) and (
        box.label is None or box.label.amplifier or box.label.quantity is None
    )


def _heads(heading: Box, box: Box) -> bool:
    """Whether a heading stands above a label, in its column of the page."""
    x0, top, x1, _ = box.text_box
    h0, h_top, h1, _ = heading.text_box
    return h_top < top - 1 and h0 < x1 + 60 and h1 > x0 - 60


def _anything_above(row: Row, headings: list[Box]) -> bool:
    return any(h.top < row.pair.box.top and h.x0 >= row.pair.box.x0 - 60 for h in headings)


def amplifier_row(row: Row) -> bool:
    """Whether the label or the value itself says that an amplifier is meant."""
    if row.pair.label.amplifier:
        return True
    return any(_AMPLIFIER.search(v.text) for v in row.values)


def in_amplifier_company(record: Record, positioning: bool) -> bool:
    """Whether a gain in this record has a noise figure, a supply or a current beside it."""
    company = 0
    for row in record.rows:
        if row.pair.label.quantity is None and _COMPANY.search(row.pair.label.text):
            company += 1
    return company >= 1 or positioning


def suspicious(record: Record, quantity: Quantity, gain: float, positioning: bool) -> bool:
    """Whether a gain figure is the amplifier's by its size and its company."""
    if quantity is not Quantity.GAIN or gain < COMPANY_DB:
        return False
    return in_amplifier_company(record, positioning)
