"""The grammar of printed figures: relation, number, range, tolerance, unit, qualifier.

::

    figure := {relation | qualifier} number [unit] [range number [unit]]
              [± number [unit]] {qualifier}

One reader serves sheets, claims given as JSON and the converter.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from enum import StrEnum

from specs.errors import UnreadableFigure
from specs.units.glyphs import fold
from specs.units.numerals import Numeral
from specs.units.spellings import measures
from specs.units.tokens import Kind, Token, scan


class Relation(StrEnum):
    """How a printed figure stands to the truth it claims."""

    EQUAL = "equal"
    AT_LEAST = "at_least"
    AT_MOST = "at_most"
    RANGE = "range"


@dataclass(frozen=True, slots=True)
class Figure:
    """One printed figure: ends as printed, relation, tolerance, unit in its one spelling.

    ``unit`` is '' when none is printed. ``half_step`` is half a step of the last digit (of the
    coarser end). ``qualifier`` is 'maximum', 'minimum', 'typical', 'average', 'nominal' or 'peak'
    when such a word stands beside the number. ``ratio`` marks a ratio to one (1.5:1), ``times`` a
    number that is one factor of a product (300 x 150). ``start`` and ``end`` are its place in the
    folded text. ``bare_unit``: the unit is a letter without Hz (617M).
    """

    text: str
    low: float
    high: float
    relation: Relation
    tolerance: float | None
    unit: str
    half_step: float
    qualifier: str | None = None
    ratio: bool = False
    times: bool = False
    start: int = 0
    end: int = 0
    bare_unit: bool = False


def read_figure(text: str) -> Figure:
    """The one figure that a text prints.

    Raises ``UnreadableFigure`` when there is none, more than one, or stray words beside it.

    >>> f = read_figure("16.0 dBd ±0.5"); f.low, f.unit, f.tolerance
    (16.0, 'dBd', 0.5)
    """
    folded = fold(text).strip()
    found = find_figures(folded)
    if not found:
        raise UnreadableFigure(f"'{text}' holds no figure.", "Write a number and its unit.")
    if len(found) > 1:
        raise UnreadableFigure(
            f"'{text}' holds {len(found)} figures.", "State one figure at a time."
        )
    figure = found[0]
    rest = (folded[: figure.start] + " " + folded[figure.end :]).strip(" .;,()")
    if rest:
        raise UnreadableFigure(f"'{rest}' beside the figure in '{text}' is not understood.")
    return replace(figure, text=text)


def find_figures(folded: str) -> list[Figure]:
    """All figures of a folded text, in order of print.

    >>> [(f.low, f.high, f.unit) for f in find_figures("690-960 / 1710-2170 MHz")]
    [(690.0, 960.0, ''), (1710.0, 2170.0, 'MHz')]
    """
    tokens = scan(folded)
    figures: list[Figure] = []
    at = floor = 0
    while at < len(tokens):
        if tokens[at].kind is not Kind.NUMBER:
            at += 1
        elif at > floor and tokens[at - 1].kind is Kind.PLUS_MINUS:
            at += 1  # ±45° alone names two directions; it is no figure
        else:
            figure, at = _Reader(folded, tokens, at, floor).read()
            floor = at
            figures.append(figure)
    return figures


class _Reader:
    """Reads one figure around a number token, from ``floor`` (the end of the last one) on."""

    def __init__(self, text: str, tokens: list[Token], at: int, floor: int) -> None:
        self.text, self.tokens, self.at, self.floor = text, tokens, at, floor
        self.first = at
        self.unit: Token | None = None
        self.inner_unit: Token | None = None
        self.relation = Relation.EQUAL
        self.qualifier: str | None = None
        self.tolerance: Numeral | None = None
        self.tolerance_unit: Token | None = None

    def read(self) -> tuple[Figure, int]:
        number = self.tokens[self.at]
        times = self._peek(-1) is Kind.TIMES
        self._look_back()
        self.at += 1
        self.inner_unit = self._take(Kind.UNIT)
        second = self._range(number)
        self.unit = (self._take(Kind.UNIT) if second else None) or self.inner_unit
        self._tolerance()
        self._qualifiers_behind()
        times = times or self._peek(0) is Kind.TIMES
        return self._figure(number, second, times), self.at

    def _peek(self, offset: int) -> Kind | None:
        index = self.at + offset
        return self.tokens[index].kind if 0 <= index < len(self.tokens) else None

    def _take(self, kind: Kind) -> Token | None:
        if self._peek(0) is kind:
            self.at += 1
            return self.tokens[self.at - 1]
        return None

    def _look_back(self) -> None:
        """Relations and qualifiers in front: '<=1.5', 'max. 1.5', 'up to 9'."""
        while self.first > self.floor:
            before = self.tokens[self.first - 1]
            if before.kind is Kind.RELATION:
                if before.value != "approximately":
                    self.relation = Relation(before.value)
            elif before.kind is Kind.QUALIFIER:
                self.qualifier = self.qualifier or before.value
            elif not (before.kind is Kind.TO and self.text[before.start] == "~"):
                return
            self.first -= 1

    def _range(self, first: Token) -> Token | None:
        assert first.number is not None
        joint = self._peek(0)
        if joint not in (Kind.DASH, Kind.TO) or (first.ratio and joint is Kind.DASH):
            return None
        if self._peek(1) is not Kind.NUMBER:
            return None
        second = self.tokens[self.at + 1]
        assert second.number is not None
        if joint is Kind.DASH and self._dash_list(self.at + 2):
            return None
        if not self._ascending(first, second):
            return None
        self.at += 2
        return second

    def _dash_list(self, index: int) -> bool:
        """1-2-3: more than two numbers joined by dashes are a list, not a range."""
        rest = self.tokens[index : index + 2]
        return len(rest) == 2 and rest[0].kind is Kind.DASH and rest[1].kind is Kind.NUMBER

    def _ascending(self, first: Token, second: Token) -> bool:
        assert first.number is not None
        assert second.number is not None
        low, high = first.number.value, second.number.value
        following = self.at + 2
        outer = self.tokens[following] if following < len(self.tokens) else None
        if self.inner_unit and outer and outer.kind is Kind.UNIT:
            if measures(self.inner_unit.value) != measures(outer.value):
                return False
            if self.inner_unit.value != outer.value:
                return True
        return high >= low

    def _tolerance(self) -> None:
        at = self.at
        opened = self._take(Kind.OPEN)
        if self._take(Kind.PLUS_MINUS) is None or self._peek(0) is not Kind.NUMBER:
            self.at = at
            return
        self.tolerance = self.tokens[self.at].number
        self.at += 1
        unit = self._take(Kind.UNIT)
        self.tolerance_unit = unit
        self.unit = self.unit or unit
        if opened:
            self._take(Kind.CLOSE)
        self.unit = self.unit or self._take(Kind.UNIT)

    def _tolerance_in_other_unit(self, unit: str) -> bool:
        """Whether the tolerance must be rescaled: '2.4 GHz ±50 MHz', but not '12 dBi ±0.5 dB'."""
        other = self.tolerance_unit
        return other is not None and other.value != unit and measures(other.value) == measures(unit)

    def _qualifiers_behind(self) -> None:
        """'1.5 max', '1.5 (typ.)', '10 dB or better'."""
        at = self.at
        while True:
            opened = self._take(Kind.OPEN)
            word = self._take(Kind.QUALIFIER)
            sign = self._take(Kind.RELATION) if word is None else None
            closed = self._take(Kind.CLOSE) if opened else None
            if word is not None and bool(opened) == bool(closed):
                following = self.tokens[self.at] if self.at < len(self.tokens) else None
                if not opened and following and following.kind is Kind.NUMBER:
                    # 'typ. 1.4 max. 1.8': the word in front of a number belongs to it
                    self.at = at
                    return
                self.qualifier = self.qualifier or word.value
                at = self.at
                continue
            if sign is not None and opened and closed and sign.value != "approximately":
                self.relation = Relation(sign.value)  # 1.5 (<=)
                at = self.at
                continue
            self.at = at
            return

    def _figure(self, first: Token, second: Token | None, times: bool) -> Figure:
        assert first.number is not None
        unit = self.unit.value if self.unit else ""
        low = _reading(first.number, unit)
        if second is None:
            high, relation = low, self.relation
        else:
            assert second.number is not None
            high, relation = _reading(second.number, unit), Relation.RANGE
            if self.inner_unit and self.unit and self.inner_unit.value != self.unit.value:
                low = _rescaled(low, self.inner_unit.value, unit)
        tolerance = self.tolerance
        spread = None if tolerance is None else _reading(tolerance, unit).value
        if spread is not None and self._tolerance_in_other_unit(unit):
            assert self.tolerance_unit is not None
            spread = _rescaled(Numeral(spread, 0), self.tolerance_unit.value, unit).value
        start = self.tokens[self.first].start
        end = self.tokens[self.at - 1].end
        return Figure(
            text=self.text[start:end],
            low=min(low.value, high.value),
            high=max(low.value, high.value),
            relation=relation,
            tolerance=spread,
            unit=unit,
            half_step=max(low.half_step, high.half_step) if second else low.half_step,
            qualifier=self.qualifier,
            ratio=first.ratio,
            times=times,
            start=start,
            end=end,
            bare_unit=bool(self.unit and self.unit.bare),
        )


_GROUPED_UNITS = frozenset({"MHz", "kHz", "Hz", "mm", "W", "mW", "ft", "g", "N", "m", "V"})


def _reading(number: Numeral, unit: str) -> Numeral:
    """Settle '1,575': thousands where the unit runs to thousands, else a decimal comma."""
    if number.decimal is None:
        return number
    return number if unit in _GROUPED_UNITS else number.decimal


def _rescaled(number: Numeral, unit: str, to: str) -> Numeral:
    from specs.units.linear import factor

    ratio = factor(unit, to)
    # A dozen digits are more than any sheet prints; this removes 0.6900000000000001.
    return Numeral(float(f"{number.value * ratio:.12g}"), number.half_step * ratio)
