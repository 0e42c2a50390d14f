"""The shortest way through the relations, walked with intervals."""

from __future__ import annotations

import math
from collections import deque
from collections.abc import Iterable, Iterator
from contextlib import suppress
from dataclasses import dataclass, replace
from decimal import Decimal
from functools import cache

from specs.conversion.relations import CONDITIONS, RELATIONS, Key, Relation
from specs.conversion.request import Interval, Request, interval_of, read_condition, read_request
from specs.conversion.scales import SCALES, Scale, of_request
from specs.errors import IncompatibleUnits, MissingCondition, UnreadableFigure


@dataclass(frozen=True, slots=True)
class Conversion:
    """One figure on another scale.

    ``low`` to ``high`` spans the printed digits or the stated tolerance, the conditions, and every
    meaning that the text leaves open; ``nominal`` is the figure itself. Ends may be infinite.
    ``formula`` has the numbers put in, one line a step; ``read_as`` says what the text was taken
    to state; ``unit`` is '' for a VSWR or a reflection coefficient and 'x' for a plain ratio.
    """

    text: str
    read_as: str
    quantity: str
    unit: str
    low: float
    nominal: float
    high: float
    formula: str
    source: str
    assumptions: tuple[str, ...] = ()

    def __str__(self) -> str:
        unit = f" {self.unit}" if self.unit not in ("", "x") else ""
        low, high = _figure(self.low), _figure(self.high)
        if math.isinf(self.high):
            return f"at least {low}{unit}"
        if math.isinf(self.low):
            return f"at most {high}{unit}"
        span = f" ({low} to {high}{unit})" if self.low < self.high else ""
        return f"{_figure(self.nominal)}{unit}{span}"


def convert(
    text: str,
    to: str,
    *,
    frequency: str | None = None,
    loss_resistance: str | None = None,
) -> Conversion:
    """A figure in another unit, or as another quantity.

    ``text`` may name its quantity and carry its conditions ('return loss 14 dB', '7.5 dBd at
    450 MHz'); ``to`` is a unit ('dBi'), a quantity ('VSWR') or both ('ERP in dBW'). ``frequency``
    and ``loss_resistance`` are texts with units and outrank what ``text`` carries.
    Raises ``UnreadableFigure``, ``UnknownUnit``, ``IncompatibleUnits`` or ``MissingCondition``.

    >>> answer = convert("7.5 dBd", to="dBi")
    >>> answer.nominal, str(answer)
    (9.65, '9.65 dBi (9.6 to 9.7 dBi)')
    """
    request = read_request(text)
    conditions = _conditions(request, frequency, loss_resistance)
    goals = of_request(to)
    ways = [
        (len(way), order, start, way)
        for order, start in enumerate(request.scales)
        for goal in goals
        if (way := _way(_key(start), _key(goal))) is not None
    ]
    if not ways:
        raise IncompatibleUnits(
            f"{request.scales[0]} cannot be converted to {to}.",
            f"It can be converted to: {_reachable(request.scales)}.",
        )
    _, _, start, way = min(ways, key=lambda found: found[:2])
    return _walk(request, start, way, conditions)


def equivalents(
    text: str, *, frequency: str | None = None, loss_resistance: str | None = None
) -> tuple[Conversion, ...]:
    """Every other way to state a figure, for each quantity that the text may mean.

    Those that need a condition which is not given are left out. Raises as ``convert`` does.

    >>> [str(found) for found in equivalents("VSWR 1.50")][:2]
    ['13.979 dB (13.91 to 14.049 dB)', '0.17729 dB (0.1744 to 0.18019 dB)']
    """
    request = read_request(text)
    conditions = _conditions(request, frequency, loss_resistance)
    found = []
    for start in request.scales:
        for goal in SCALES:
            way = _way(_key(start), _key(goal))
            if way and all(row.needs is None or row.needs in conditions for row in way):
                # A figure may have no equivalent: a −6 dB width beyond the full circle.
                with suppress(UnreadableFigure):
                    found.append(_walk(request, start, way, conditions))
    return tuple(found)


def _conditions(
    request: Request, frequency: str | None, loss_resistance: str | None
) -> dict[str, Interval]:
    given = {"frequency": frequency, "loss_resistance": loss_resistance}
    named = (read_condition(name, text) for name, text in given.items() if text is not None)
    return request.conditions | dict(named)


def _key(scale: Scale) -> Key:
    return scale.quantity, scale.unit


@cache
def _leaving() -> dict[Key, tuple[Relation, ...]]:
    leaving: dict[Key, list[Relation]] = {}
    for row in RELATIONS:
        leaving.setdefault(row.start, []).append(row)
    return {key: tuple(rows) for key, rows in leaving.items()}


@cache
def _scale(key: Key) -> Scale:
    return next(scale for scale in SCALES if _key(scale) == key)


@cache
def _way(start: Key, goal: Key) -> tuple[Relation, ...] | None:
    """The shortest chain of relations, () from a scale to itself, None where there is none."""
    seen = {start}
    waiting: deque[tuple[Key, tuple[Relation, ...]]] = deque([(start, ())])
    while waiting:
        here, way = waiting.popleft()
        if here == goal:
            return way
        for row in _leaving().get(here, ()):
            if row.end not in seen:
                seen.add(row.end)
                waiting.append((row.end, (*way, row)))
    return None


def _reachable(scales: Iterable[Scale]) -> str:
    names = dict.fromkeys(
        goal.unit or goal.quantity
        for start in scales
        for goal in SCALES
        if goal != start and _way(_key(start), _key(goal))
    )
    return ", ".join(names)


def _walk(
    request: Request, start: Scale, way: tuple[Relation, ...], conditions: dict[str, Interval]
) -> Conversion:
    figure = request.figure
    assumptions = []
    if len(request.scales) > 1 and figure.unit in ("", "dB"):
        assumptions.append(f"'{figure.text}' is read as {start}")
    if start.either_sign and figure.low + figure.high < 0:
        figure = replace(figure, low=-figure.high, high=-figure.low)
        assumptions.append(f"a {start.quantity} printed with a minus sign is taken by its size")
    low, nominal, high = interval_of(figure, start.valid)
    end = start
    formulas, sources = [], []
    for row in way:
        condition = _condition(row, conditions)
        end = _scale(row.end)
        before = nominal
        corners = list(_corners(row, low, high, condition, end))
        nominal = row.function(nominal, condition[1])
        low, high = min(corners), max(corners)
        if not end.valid[0] <= nominal <= end.valid[1] * (1 + 1e-9):
            raise UnreadableFigure(
                f"{request.text} would be a {end.quantity} of {_figure(nominal)} {end.unit}.",
                "There is none: check the figure.",
            )
        formulas.append(
            row.formula.format(x=_figure(before), y=_figure(nominal), f=_figure(condition[1]))
        )
        sources.append(row.source)
        assumptions += [row.assumption] if row.assumption else []
    return Conversion(
        text=request.text,
        read_as=str(start),
        quantity=end.quantity,
        unit=end.unit,
        low=low,
        nominal=nominal,
        high=high,
        formula="\n".join(formulas) or f"{_figure(nominal)} {end.unit}".strip(),
        source="; ".join(dict.fromkeys(sources)) or "as stated",
        assumptions=tuple(dict.fromkeys(assumptions)),
    )


def _corners(
    row: Relation, low: float, high: float, condition: Interval, end: Scale
) -> Iterator[float]:
    """The ends of the result: every relation is monotonic in the figure and in its condition."""
    for value in (low, high):
        for at in {condition[0], condition[2]} if row.needs else {math.nan}:
            result = row.function(value, at)
            for open_db in set(row.open_db):
                yield min(max(result + open_db, end.valid[0]), end.valid[1])


def _condition(row: Relation, conditions: dict[str, Interval]) -> Interval:
    if row.needs is None:
        return (math.nan, math.nan, math.nan)
    if row.needs not in conditions:
        words, _, example = CONDITIONS[row.needs]
        option = row.needs.replace("_", "-")
        raise MissingCondition(
            f"From {_scale(row.start)} to {_scale(row.end)} needs {words}.",
            f"Give it with the figure ('... at {example}') or as --{option} '{example}'.",
        )
    return conditions[row.needs]


def _figure(value: float) -> str:
    """Five significant digits, without a negative zero."""
    if not math.isfinite(value):
        return str(value)
    return format(Decimal(f"{value + 0.0:.5g}"), "f").replace("-", "−")
