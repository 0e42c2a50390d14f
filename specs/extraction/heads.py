"""What stands over a value: band, statistic, unit, model name.

The heads of a column are found by looking up from the value, through the cells of its own column,
until free text crosses the table.
"""

from __future__ import annotations

import re
from dataclasses import dataclass

from specs.claims import Band, Quantity, Statistic
from specs.extraction.pairing import Pair, Value, only_band, only_unit, same_column
from specs.extraction.tables import Box
from specs.extraction.values import UNITS, mhz
from specs.extraction.vocabulary import phrase_at
from specs.units.figures import find_figures
from specs.units.spellings import measures

_MOST_ROWS = 60


@dataclass(slots=True)
class Head:
    """The heads over one value, nearest first; each None when there is none."""

    band: Band | None = None
    statistic: Statistic | None = None
    unit: str | None = None
    name: str | None = None


def head_of(
    pair: Pair, value: Value, above: list[Box], names: dict[int, str], used: set[int]
) -> Head:
    """The heads over a value.

    ``above`` are all boxes of the page from the top, ``names`` the model names and ``used`` the
    values of labels, both by the identity of their box. A value of another label is no head.
    """
    head = Head()
    box = value.boxes[0]
    left = pair.box.text_box[0]
    column = [b for b in above if b.bottom <= box.top + 2 and same_column(b, box)]
    candidate: str | None = None
    for other in reversed(column[-_MOST_ROWS:]):
        if id(other) in names:
            head.name = head.name or names[id(other)]
            continue
        if id(other) in used:
            continue
        if not other.ruled and other.x0 <= left + 1 and other.x1 >= box.x0:
            break
        if other.label is not None and not other.label.rest and not other.ruled:
            if value.columns == 1:
                break
            continue
        text = other.text.strip()
        statistic = only_statistic(text)
        if statistic is not None:
            head.statistic = head.statistic or statistic
        elif (unit := only_unit(text)) is not None:
            if measures(unit) in UNITS.get(pair.label.quantity or Quantity.POLARIZATION, ()):
                head.unit = head.unit or unit
        elif only_band(text):
            head.band = head.band or union_of(text)
        elif value.columns > 1 and _name_like(text):
            candidate = other.printed.strip()
    if head.name is None and value.columns > 1 and head.band is None:
        head.name = candidate
    return head


def only_statistic(text: str) -> Statistic | None:
    """MIN, TYP., MAX and their like, when a cell holds nothing else."""
    lowered = text.lower().strip(" ().:")
    if not lowered or len(lowered) > 14:
        return None
    found = phrase_at(lowered, 0)
    if found is None or found.end < len(lowered):
        return None
    return next((Statistic(t.name) for t in found.tags if t.group == "statistic"), None)


def union_of(text: str) -> Band | None:
    """The band that a cell of frequencies spans, from its lowest to its highest."""
    figures = find_figures(text)
    unit = next((f.unit for f in reversed(figures) if f.unit), "")
    bands = [b for f in figures if (b := mhz(f, unit)) is not None]
    return (min(b[0] for b in bands), max(b[1] for b in bands)) if bands else None


def _name_like(text: str) -> bool:
    """A model name: letters, short, no figure with a unit."""
    if len(text) > 40 or not re.search(r"[^\W\d_]", text):
        return False
    return not any(f.unit for f in find_figures(text))
