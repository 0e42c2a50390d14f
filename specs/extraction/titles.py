"""Titles and model names: what a page says it is about."""

from __future__ import annotations

import re
from statistics import median

from specs.extraction.tables import Box
from specs.units.figures import find_figures

TITLE_EM = 1.25
"""Print this much larger than the ordinary is a title."""

_MODEL = re.compile(r"\b(?=[\w/-]*\d)(?=[\w/-]*[A-Z])[A-Z][\w]*(?:[-/ ]?\w*\d\w*)(?:-\w+)*\b")
_SERVICE = re.compile(
    r"^(?:[2-6]G|\d+G|IP\s?\d\dK?|LTE\w*|RG-?\d+\w*|LMR-?\d+|802\.\w+|WIFI\s?\d?|N\s?\w+|L[125]|E[15]|B[1-3]|"
    r"GPS\w*|USB\d?|ISO\s?\d+|EN\s?\d+|PIM\d?|MIMO|H\d|V\d|UV\d+|M\d+|AISI\s?\d+|EP\d+|US\d+)$",
    re.IGNORECASE,
)  # fmt: skip


def title_size(boxes: list[Box]) -> float:
    """The type size from which print is a title on this page."""
    sizes = [b.size for b in boxes]
    return TITLE_EM * median(sizes) if sizes else 0.0


def title_boxes(boxes: list[Box], page_height: float) -> list[Box]:
    """The large print of the upper half of a page, largest first, then from the top."""
    limit = title_size(boxes)
    large = [b for b in boxes if b.size >= limit and b.top < page_height / 2]
    return sorted(large, key=lambda b: (-round(b.size), b.top))


def subject(boxes: list[Box], page_height: float) -> tuple[str, str]:
    """(name, description) of what a page is about.

    The name is a model number if the title holds one, else the largest line. The description is
    the line that holds it and the title lines below it, which say what kind of antenna it is.
    """
    titles = title_boxes(boxes, page_height) or boxes[:3]
    for box in titles:
        model = model_in(box.printed)
        if model is not None:
            below = [b for b in titles if b.top > box.top][:2]
            return model, " ".join(b.printed for b in [box, *below])
    if not titles:
        return "", ""
    return " ".join(titles[0].printed.split())[:80], " ".join(b.printed for b in titles[:4])


def model_in(text: str) -> str | None:
    """The first model number in a text: letters with digits that are no figure and no service.

    >>> model_in("OF-5800-17 sector panel, 5 GHz")
    'OF-5800-17'
    """
    for match in _MODEL.finditer(text):
        name = match[0].strip(" -/")
        if _SERVICE.match(name) or find_figures(name) or len(name) < 3:
            continue
        return name
    return None
