"""Plain tables of pattern levels: read text, give a sphere or a cut.

Columns are found by their names: θ (theta, polar), φ (phi, azimuth) and one level (dB, gain,
level ...); or one angle and one or two levels. Comma, semicolon, tab or space between columns;
decimal commas where the separator is not a comma. Lines that hold no numbers are comments.
"""

from __future__ import annotations

import re

import numpy as np

from specs.physics.cuts import Cut, cut
from specs.physics.elementwise import Floats
from specs.physics.pattern import PatternError, SpherePattern, sphere_pattern

MOST_POINTS = 2_000_000
"""Lines read before a table is refused: a sphere at a quarter of a degree has one million."""

_NAMES: dict[str, str] = {
    "theta": "theta", "θ": "theta", "polar": "theta",
    "phi": "phi", "φ": "phi", "ϕ": "phi",
    "elevation": "elevation", "el": "elevation", "vertical": "elevation", "v": "elevation",
    "azimuth": "azimuth", "az": "azimuth", "horizontal": "azimuth", "h": "azimuth",
    "angle": "angle", "degrees": "angle", "deg": "angle",
    "gain": "level", "level": "level", "db": "level", "dbi": "level", "directivity": "level",
    "magnitude": "level", "total": "level",
}  # fmt: skip
"""Words in a heading -> what the column holds."""


def read_sphere(text: str) -> SpherePattern:
    """A full-sphere pattern from a table of θ, φ, level rows in any order.

    Raises ``PatternError`` when columns, points or parts of the sphere are missing.

    >>> rows = [f"{t},{p},-3" for t in range(0, 181, 30) for p in range(0, 360, 30)]
    >>> read_sphere("theta,phi,dBi\\n" + "\\n".join(rows)).level_db.shape
    (7, 12)
    """
    columns, table = _table(text)
    theta, phi, level = (_column(columns, table, name) for name in ("theta", "phi", "level"))
    thetas, row = np.unique(theta, return_inverse=True)
    phis, column = np.unique(phi, return_inverse=True)
    grid = np.full((thetas.size, phis.size), np.nan)
    grid[row, column] = level
    for pole in (0.0, 180.0):
        # At a pole φ means nothing: many tables give it once.
        at = thetas == pole
        if at.any() and not np.isnan(grid[at]).all():
            grid[at] = np.where(np.isnan(grid[at]), np.nanmax(grid[at]), grid[at])
    if np.isnan(grid).any():
        raise PatternError(
            f"{int(np.isnan(grid).sum())} of {grid.size} points of the grid are missing."
        )
    return sphere_pattern(thetas, phis, grid)


def read_cuts(text: str) -> tuple[Cut, ...]:
    """One or more cuts from a table of one angle and a level for each cut.

    A table headed 'angle, azimuth, elevation' gives both principal cuts, in that order.
    Raises ``PatternError``.

    >>> around, along = read_cuts("angle;H;V\\n-90;-20,5;-9\\n0;0;-1\\n90;-20,5;0\\n180;-25;-9")
    >>> around.peak_deg, along.peak_deg
    (0.0, 90.0)
    """
    columns, table = _table(text)
    if table.shape[1] < 2:
        raise PatternError("A cut needs a column of angles and a column of levels.")
    angle = columns.index("angle") if "angle" in columns else 0
    levels = [index for index in range(table.shape[1]) if index != angle]
    order = [n for name in ("azimuth", "elevation") for n in levels if columns[n] == name]
    rest = [index for index in levels if index not in order]
    return tuple(cut(table[:, angle], table[:, index]) for index in [*order, *rest])


def _column(columns: list[str], table: Floats, name: str) -> Floats:
    if columns.count(name) != 1:
        found = ", ".join(word for word in columns if word) or "none"
        raise PatternError(
            f"The table has {columns.count(name) or 'no'} {name} columns (known columns: {found}).",
            "Head the columns theta, phi and dB.",
        )
    return table[:, columns.index(name)]


def _table(text: str) -> tuple[list[str], Floats]:
    """Column names (as far as a heading tells) and the numbers, one row for each line."""
    lines = [line.strip() for line in text.lstrip("\ufeff").splitlines()]
    separator = next(
        (mark for mark in (";", "\t", ",") if any(mark in line for line in lines)), None
    )
    heading: list[str] = []
    rows: list[list[float]] = []
    for at, line in enumerate(lines, start=1):
        cells = [cell.strip() for cell in line.split(separator)] if line else []
        numbers = [_number(cell, separator) for cell in cells if cell]
        if numbers and None not in numbers:
            rows.append([number for number in numbers if number is not None])
        elif not rows and len(cells) > 1:
            heading = cells
        elif rows and any(number is not None for number in numbers):
            raise PatternError(f"Line {at} holds something beside numbers: '{line[:60]}'.")
        if len(rows) > MOST_POINTS:
            raise PatternError(f"The table has more than {MOST_POINTS} points.", "Thin it out.")
    if not rows:
        raise PatternError("The table holds no rows of numbers.")
    width = max(set(map(len, rows)), key=lambda n: sum(len(row) == n for row in rows))
    if any(len(row) != width for row in rows):
        raise PatternError(f"Some rows do not have {width} numbers.")
    names = [_name(cell) for cell in heading] if len(heading) == width else [""] * width
    if not any(names) and width == 3:
        names = ["theta", "phi", "level"]
    return names, np.array(rows, dtype=np.float64)


def _name(heading: str) -> str:
    words = re.findall(r"[^\W\d_]+", heading.lower())
    return next((_NAMES[word] for word in words if word in _NAMES), "")


def _number(cell: str, separator: str | None) -> float | None:
    """A cell as a number, None if it is none. nan is not one; -inf is a null."""
    plain = cell.replace("−", "-")
    if separator != ",":
        plain = plain.replace(",", ".")
    try:
        number = float(plain)
    except ValueError:
        return None
    return None if np.isnan(number) else number
