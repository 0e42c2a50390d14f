"""The text of a request: a figure, perhaps with its quantity and conditions.

``7.5 dBd at 450 MHz``, ``VSWR 1.5:1``, ``60° at -10 dB``, ``36 ohm with 4 ohm loss``.
"""

from __future__ import annotations

import math
import re
from dataclasses import dataclass, replace

from specs.conversion.relations import CONDITIONS
from specs.conversion.scales import RATIO_SPELLINGS, Scale, of_unit, take_name
from specs.errors import IncompatibleUnits, UnknownUnit, UnreadableFigure
from specs.units.figures import Figure, Relation, read_figure
from specs.units.linear import factor
from specs.units.spellings import measures, unit_of

Interval = tuple[float, float, float]
"""(low, nominal, high)."""

_JOINTS = re.compile(r"\s+(?:at|bei|with|and)\s+|\s*@\s*|\s*[,;]\s+", re.IGNORECASE)
_LOSS_WORDS = re.compile(r"\b(radiation|resistance|loss)\b", re.IGNORECASE)
_NUMBER_AND_WORD = re.compile(r"\W*\d[\d.,]*\s*([^\d\s]\S*)")
_BEAM_LEVELS = (3.0, 6.0, 10.0)


@dataclass(frozen=True, slots=True)
class Request:
    """What a text states: the figure, the scales it may be on, and its conditions."""

    text: str
    figure: Figure
    scales: tuple[Scale, ...]
    conditions: dict[str, Interval]


def read_request(text: str) -> Request:
    """Read the text of a conversion.

    Raises ``UnreadableFigure`` or ``UnknownUnit`` with advice.

    >>> request = read_request("7.5 dBd at 450 MHz")
    >>> str(request.scales[0]), request.conditions["frequency"][1]
    ('gain in dBd', 450.0)
    """
    main, *others = _JOINTS.split(text.strip())
    quantity, rest = take_name(main)
    words = _LOSS_WORDS.sub(" ", rest).split()
    plain_ratio = bool(words) and words[-1].lower() in RATIO_SPELLINGS
    figure = _figure(" ".join(words[:-1] if plain_ratio else words))
    unit = "x" if plain_ratio else figure.unit
    conditions: dict[str, Interval] = {}
    for other in others:
        level = _beam_level(other) if measures(figure.unit) == "angle" else None
        if level is not None:
            quantity = f"beamwidth at −{level:g} dB"
        else:
            conditions.update([read_condition(None, other)])
    if figure.ratio and quantity is None:
        quantity = "VSWR"
    scales = of_unit(unit, quantity)
    if not scales:
        what = f"A {quantity} is not" if quantity else "Nothing that can be converted is"
        stated = f"stated in '{unit}'" if unit else "stated without a unit"
        raise IncompatibleUnits(
            f"{what} {stated}.", "Write a unit that belongs to it, such as dBi, dB/m, m2, % or MHz."
        )
    return Request(text, figure, _valid(scales, figure), conditions)


def read_condition(name: str | None, text: str) -> tuple[str, Interval]:
    """A condition such as '450 MHz', as (its name, interval in the unit of ``CONDITIONS``).

    Without a name its unit tells it. Raises ``UnreadableFigure`` or ``IncompatibleUnits``.
    """
    figure = _figure(_LOSS_WORDS.sub(" ", text).strip())
    for condition, (words, unit, _) in CONDITIONS.items():
        if name in (None, condition) and measures(figure.unit) == measures(unit):
            ratio = factor(figure.unit, unit)
            # A condition is chosen, not measured: its last digit hides nothing.
            low, nominal, high = interval_of(replace(figure, half_step=0.0), (0.0, math.inf))
            if nominal <= 0:
                raise UnreadableFigure(
                    f"'{text}': {words} must be above zero.", "Check the figure."
                )
            return condition, (low * ratio, nominal * ratio, high * ratio)
    wanted = CONDITIONS[name] if name else CONDITIONS["frequency"]
    raise IncompatibleUnits(
        f"'{text}' does not state {wanted[0]}.", f"Write it with its unit, as in {wanted[2]}."
    )


def interval_of(figure: Figure, valid: tuple[float, float]) -> Interval:
    """(low, nominal, high) of a figure: printed digits or tolerance, and relation.

    'At least' and 'at most' open the interval to the end of what is valid.
    """
    margin = figure.half_step if figure.tolerance is None else figure.tolerance
    low, high = figure.low - margin, figure.high + margin
    if figure.relation is Relation.AT_LEAST:
        high = valid[1]
    elif figure.relation is Relation.AT_MOST:
        low = valid[0]
    return max(low, valid[0]), (figure.low + figure.high) / 2, min(high, valid[1])


def _figure(text: str) -> Figure:
    """``read_figure`` with advice; a word where the unit should be is an unknown unit."""
    try:
        return read_figure(text)
    except UnreadableFigure as error:
        beside = _NUMBER_AND_WORD.fullmatch(text)
        if beside:
            unit_of(beside[1])
        raise UnreadableFigure(
            error.message, "Write one figure with its unit, as in '7.5 dBd at 450 MHz'."
        ) from error


def _beam_level(text: str) -> float | None:
    """3, 6 or 10 of '-10 dB'; None when the text is no beam level."""
    try:
        figure = read_figure(text)
    except (UnreadableFigure, UnknownUnit):
        return None
    level = abs(figure.low)
    return level if figure.unit == "dB" and level in _BEAM_LEVELS else None


def _valid(scales: tuple[Scale, ...], figure: Figure) -> tuple[Scale, ...]:
    """The scales on which the figure makes sense."""
    middle = (figure.low + figure.high) / 2
    fit = tuple(
        scale
        for scale in scales
        if scale.valid[0] <= (abs(middle) if scale.either_sign else middle) <= scale.valid[1]
    )
    if fit:
        return fit
    low, high = scales[0].valid
    unit = f" {scales[0].unit}" if scales[0].unit not in ("", "x") else ""
    span = f"from {low:g} to {high:g}" if math.isfinite(high) else f"at least {low:g}"
    if math.isinf(low):
        span = f"at most {high:g}"
    raise UnreadableFigure(
        f"There is no {scales[0].quantity} of {middle:g}{unit}: it is {span}{unit}.",
        "Check the figure and its sign.",
    )
