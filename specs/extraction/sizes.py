"""Sizes: products of two or three lengths, or one length that the label names."""

from __future__ import annotations

import re
from dataclasses import dataclass

from specs.extraction.labels import Label
from specs.units.figures import Figure, find_figures
from specs.units.spellings import measures

_INITIAL = r"([lwhdtbø])(?:ength|idth|eight|epth|ia\.?|iameter)?"
_ORDER = re.compile(
    rf"\(?\s*{_INITIAL}\s*[x*/]\s*{_INITIAL}(?:\s*[x*/]\s*{_INITIAL})?", re.IGNORECASE
)
_NAMES = {"l": "length", "w": "width", "b": "width", "h": "height", "d": "depth", "t": "depth",
          "ø": "diameter"}  # fmt: skip
_DIAMETER = re.compile(r"ø|\bdia\b|\bdiam|\bd\b", re.IGNORECASE)


@dataclass(frozen=True, slots=True)
class Extent:
    """One length of an antenna: the figure, its unit, and which dimension it is."""

    figure: Figure
    unit: str
    dimension: str | None


def extents(label: Label, text: str, outer: str | None) -> list[Extent]:
    """The lengths that a size value prints; a second unit system in parentheses is left out."""
    figures = find_figures(text)
    first = [f for f in figures if not _in_parentheses(text, f)] or figures
    unit = next((f.unit for f in first if f.unit), "") or label.unit or outer or ""
    if measures(unit) != "length":
        return []
    product: list[Figure] = []
    for figure in first:
        if figure.unit and measures(figure.unit) != "length":
            break
        if product and not figure.times:
            break
        product.append(figure)
        if not figure.times:
            break
    if not product or len(product) > 3:
        return []
    names = _dimensions(label, text, len(product))
    return [Extent(f, f.unit or unit, n) for f, n in zip(product, names, strict=True)]


def _in_parentheses(text: str, figure: Figure) -> bool:
    return text[: figure.start].count("(") > text[: figure.start].count(")")


def _dimensions(label: Label, text: str, count: int) -> list[str | None]:
    if count == 1:
        if label.kind in ("length", "height", "width", "diameter", "depth"):
            return [label.kind]
        if label.kind == "boom":
            return ["length"]
        return ["diameter" if _DIAMETER.search(text) else None]
    order = _ORDER.search(label.text) or _ORDER.search(text)
    if order:
        named = [_NAMES[g.lower()] for g in order.groups() if g]
        if len(named) == count:
            return list(named)
    if _DIAMETER.search(text) and count == 2:
        return (
            ["length", "diameter"] if not text.strip().startswith("ø") else ["diameter", "length"]
        )
    default = ["height", "width", "depth"] if count == 3 else ["height", "width"]
    return list(default)
