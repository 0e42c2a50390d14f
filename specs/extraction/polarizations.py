"""Polarization values in words, and sizes of the radiating part."""

from __future__ import annotations

import re

_KINDS: tuple[tuple[str, re.Pattern[str]], ...] = (
    ("circular", re.compile(r"circ|rhc|lhc|r\.h\.c|zirkular|圆|右旋|左旋|円偏|круг|\bcp\b",
                            re.I)),
    ("dual", re.compile(
        r"dual|±\s?45|\+/-\s?45|slant|cross|h\s?(?:&|/|and|\+)\s?v|v\s?(?:&|/|and|\+)\s?h|"
        r"vertical (?:and|&|/) horizontal|horizontal (?:and|&|/) vertical|双", re.I)),
    ("vertical", re.compile(r"vert|\bv\b|垂直|верт|수직|pionow", re.I)),
    ("horizontal", re.compile(r"horiz|\bh\b|水平|гориз|수평|poziom", re.I)),
    ("linear", re.compile(r"lin|线|直線|линейн|선형", re.I)),
)  # fmt: skip


def polarization_kind(text: str) -> str | None:
    """circular, dual, vertical, horizontal or linear, as the words say; None if they do not.

    >>> polarization_kind("RHCP"), polarization_kind("±45°"), polarization_kind("V")
    ('circular', 'dual', 'vertical')
    """
    return next((kind for kind, pattern in _KINDS if pattern.search(text)), None)
