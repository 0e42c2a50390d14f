"""Printed spellings of units, and the one spelling used inside.

The table is data (``spellings.toml``) and closed: a unit that is not in it is unknown, never
guessed. Printed units never reach pint, which would read dBi as deci-biot.
"""

from __future__ import annotations

import difflib
import re
import tomllib
from functools import cache
from importlib.resources import files

from specs.errors import UnknownUnit
from specs.units.glyphs import fold


@cache
def _table() -> dict[str, tuple[str, str]]:
    """Folded lower-case spelling -> (unit, what it measures)."""
    data = tomllib.loads(files("specs.units").joinpath("spellings.toml").read_text("utf-8"))
    return {
        fold(spelling).lower(): (unit, entry["measures"])
        for unit, entry in data.items()
        for spelling in entry["spellings"]
    }


@cache
def _measures() -> dict[str, str]:
    """Unit -> what it measures."""
    return dict(_table().values())


@cache
def unit_pattern() -> re.Pattern[str]:
    """Pattern that matches any known spelling at a position, longest first.

    A spelling that ends in a letter must not run on into another letter ("m" in "max").
    """
    spellings = sorted(_table(), key=len, reverse=True)
    parts = [re.escape(s) + (r"(?![^\W\d_])" if s[-1].isalpha() else "") for s in spellings]
    return re.compile("|".join(parts), re.IGNORECASE)


def unit_of(spelling: str) -> str:
    """The one spelling of a printed unit.

    Raises ``UnknownUnit``, naming the nearest known spelling.

    >>> unit_of("DBI"), unit_of("Mhz"), unit_of("º")
    ('dBi', 'MHz', 'deg')
    """
    folded = fold(spelling).strip().lower()
    if folded == "":
        return ""
    found = _table().get(folded)
    if found is None:
        near = difflib.get_close_matches(folded, _table(), n=1, cutoff=0.5)
        hint = f"Did you mean {_table()[near[0]][0]}?" if near else "See the table of units."
        raise UnknownUnit(f"The unit '{spelling}' is not known.", hint)
    return found[0]


def measures(unit: str) -> str:
    """What a unit measures ("level", "frequency", "angle" ...); '' for no unit."""
    if unit == "":
        return ""
    return _measures()[unit]
