"""Rulings to cells: the smallest closed rectangles.

The rulings are snapped to a grid; squares of the grid with no ruling between them belong together,
and a group that fills a rectangle with rulings on all sides is a cell. Merged cells come out whole.
"""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

from specs.claims.claim import BBox

SNAP = 3.0
MOST_SQUARES = 12_000


def cells(
    horizontal: list[tuple[float, float, float]], vertical: list[tuple[float, float, float]]
) -> list[BBox]:
    """The cells that rulings enclose, as (x0, top, x1, bottom).

    ``horizontal`` holds (y, x0, x1), ``vertical`` (x, top, bottom). A grid finer than
    ``MOST_SQUARES`` is a drawing and gives no cells.
    """
    if len(horizontal) < 2 or len(vertical) < 2:
        return []
    ys = _snapped([h[0] for h in horizontal])
    xs = _snapped([v[0] for v in vertical])
    if len(xs) < 2 or len(ys) < 2 or len(xs) * len(ys) > MOST_SQUARES:
        return []
    over = _covered(ys, xs, horizontal)  # (len(ys), len(xs) - 1): ruling along the top of a square
    beside = _covered(xs, ys, vertical).T  # (len(ys) - 1, len(xs)): ruling along its left side
    groups = _groups(over, beside)
    return _rectangles(groups, over, beside, xs, ys)


def _snapped(values: list[float]) -> npt.NDArray[np.float64]:
    """Distinct positions: values closer than ``SNAP`` are one."""
    ordered = np.sort(np.asarray(values))
    starts = np.concatenate(([True], np.diff(ordered) > SNAP))
    group = np.cumsum(starts) - 1
    sums = np.bincount(group, weights=ordered)
    result: npt.NDArray[np.float64] = sums / np.bincount(group)
    return result


def _covered(
    across: npt.NDArray[np.float64],
    along: npt.NDArray[np.float64],
    lines: list[tuple[float, float, float]],
) -> npt.NDArray[np.bool_]:
    """Which stretches between neighbours of ``along`` a ruling covers, at each ``across``."""
    covered = np.zeros((len(across), len(along) - 1), dtype=bool)
    array = np.asarray(lines)
    at = np.abs(across[:, None] - array[None, :, 0]).argmin(axis=0)
    first = np.searchsorted(along, array[:, 1] - SNAP)
    last = np.searchsorted(along, array[:, 2] + SNAP) - 1
    for row, start, stop in zip(at.tolist(), first.tolist(), last.tolist(), strict=True):
        covered[row, start:stop] = True
    return covered


def _groups(over: npt.NDArray[np.bool_], beside: npt.NDArray[np.bool_]) -> npt.NDArray[np.int64]:
    """Number of the group of each square; squares with no ruling between share one."""
    rows, columns = beside.shape[0], over.shape[1]
    parent = list(range(rows * columns))

    def root(square: int) -> int:
        while parent[square] != square:
            parent[square] = parent[parent[square]]
            square = parent[square]
        return square

    for row, column in zip(*np.nonzero(~beside[:, 1:-1]), strict=True):
        square = int(row) * columns + int(column)
        parent[root(square)] = root(square + 1)
    for row, column in zip(*np.nonzero(~over[1:-1, :]), strict=True):
        square = int(row) * columns + int(column)
        parent[root(square)] = root(square + columns)
    return np.array([root(s) for s in range(rows * columns)]).reshape(rows, columns)


def _rectangles(
    groups: npt.NDArray[np.int64],
    over: npt.NDArray[np.bool_],
    beside: npt.NDArray[np.bool_],
    xs: npt.NDArray[np.float64],
    ys: npt.NDArray[np.float64],
) -> list[BBox]:
    found: list[BBox] = []
    columns = groups.shape[1]
    order = np.argsort(groups, axis=None, kind="stable")
    for squares in np.split(order, np.flatnonzero(np.diff(groups.ravel()[order])) + 1):
        row, column = squares // columns, squares % columns
        r0, r1, c0, c1 = row.min(), row.max(), column.min(), column.max()
        if len(squares) != (r1 - r0 + 1) * (c1 - c0 + 1):
            continue
        closed = (
            over[r0, c0 : c1 + 1].all()
            and over[r1 + 1, c0 : c1 + 1].all()
            and beside[r0 : r1 + 1, c0].all()
            and beside[r0 : r1 + 1, c1 + 1].all()
        )
        if closed:
            found.append((float(xs[c0]), float(ys[r0]), float(xs[c1 + 1]), float(ys[r1 + 1])))
    return found
