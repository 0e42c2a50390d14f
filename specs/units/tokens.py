"""Folded text cut into the tokens of the figure grammar.

A number glued to a letter in front (RG58, KM-23) or to unknown letters behind (2T2R, 5G) is part
of a name and becomes a word, so that no name is ever read as a figure.
"""

from __future__ import annotations

import re
import tomllib
from dataclasses import dataclass
from enum import Enum, auto
from functools import cache
from importlib.resources import files

from specs.units.numerals import NUMERAL, Numeral, numeral
from specs.units.spellings import unit_of, unit_pattern


class Kind(Enum):
    """Kinds of token."""

    NUMBER = auto()
    UNIT = auto()
    RELATION = auto()
    PLUS_MINUS = auto()
    DASH = auto()
    TO = auto()
    TIMES = auto()
    QUALIFIER = auto()
    SEPARATOR = auto()
    OPEN = auto()
    CLOSE = auto()
    WORD = auto()


@dataclass(frozen=True, slots=True)
class Token:
    """A token and where it stands in the folded text.

    ``value`` is the unit, relation, qualifier or separator in its one form; ``number`` is set for
    numbers, signed; ``ratio`` marks a ratio to one (1.5:1); ``bare`` a unit letter without Hz.
    """

    kind: Kind
    start: int
    end: int
    value: str = ""
    number: Numeral | None = None
    ratio: bool = False
    bare: bool = False


@cache
def _phrases() -> dict[str, tuple[Kind, str]]:
    data = tomllib.loads(files("specs.units").joinpath("words.toml").read_text("utf-8"))
    kinds = {"relation": Kind.RELATION, "range": Kind.TO, "qualifier": Kind.QUALIFIER}
    return {
        phrase: (kinds[group], meaning)
        for group, meanings in data.items()
        for meaning, phrases in meanings.items()
        for phrase in phrases
    }


@cache
def _phrase_pattern() -> re.Pattern[str]:
    phrases = sorted(_phrases(), key=len, reverse=True)
    parts = [re.escape(p) + (r"(?![^\W\d_])" if p[-1].isascii() else "") for p in phrases]
    return re.compile("|".join(parts), re.IGNORECASE)


_RATIO = re.compile(r"(\d+(?:[.,]\d+)?) ?: ?(\d+(?:[.,]\d+)?)(?![\d.,:]*\d)")
_BARE_HERTZ = re.compile(r"(M|G)(?![A-Za-z])")
_WORD = re.compile(r"[^\W\d_](?:[^\W_]|[-_](?=\w)|['’.](?=[^\W\d_]))*")
_GLUED_TAIL = re.compile(r"[A-Za-zА-я][\w]*")
_SIGNS = {
    "<=": (Kind.RELATION, "at_most"),
    ">=": (Kind.RELATION, "at_least"),
    "<": (Kind.RELATION, "at_most"),
    ">": (Kind.RELATION, "at_least"),
    "±": (Kind.PLUS_MINUS, ""),
    "~": (Kind.TO, "to"),
    "≈": (Kind.RELATION, "approximately"),
    "…": (Kind.TO, "to"),
    "(": (Kind.OPEN, "("),
    ")": (Kind.CLOSE, ")"),
    "[": (Kind.OPEN, "("),
    "]": (Kind.CLOSE, ")"),
}
_DOTS = re.compile(r"\.{2,3}")
_SPACE = re.compile(r"\s+")


def scan(text: str) -> list[Token]:
    """All tokens of a folded text, in order, white space left out."""
    tokens: list[Token] = []
    at, end = 0, len(text)
    while at < end:
        space = _SPACE.match(text, at)
        if space:
            at = space.end()
            continue
        token = _token(text, at, tokens[-1] if tokens else None)
        tokens.append(token)
        at = token.end
    return tokens


def _token(text: str, at: int, before: Token | None) -> Token:
    char = text[at]
    if char.isdigit() or (char in ".," and text[at + 1 : at + 2].isdigit()):
        return _number(text, at, at)
    if char in "-+" and _is_sign(text, at, before):
        return _number(text, at, at + 1)
    for sign in (text[at : at + 2], char):
        if sign in _SIGNS:
            return Token(_SIGNS[sign][0], at, at + len(sign), _SIGNS[sign][1])
    if _DOTS.match(text, at) and before and before.kind in (Kind.NUMBER, Kind.UNIT):
        return Token(Kind.TO, at, _DOTS.match(text, at).end(), "to")  # type: ignore[union-attr]
    if before and before.kind is Kind.NUMBER:
        unit = _unit(text, at, before)
        if unit:
            return unit
        if char in "xX*" and re.match(r"[xX*] ?[\d.ø]", text[at:]):
            return Token(Kind.TIMES, at, at + 1)
    if before and before.kind is Kind.UNIT and re.match(r"[xX*] ?[\d.ø]", text[at:]):
        return Token(Kind.TIMES, at, at + 1)
    if char == "-":
        return Token(Kind.DASH, at, at + 1)
    phrase = _phrase_pattern().match(text, at)
    if phrase and (at == 0 or not (text[at - 1].isalpha() and text[at - 1].isascii())):
        kind, value = _phrases()[phrase[0].lower()]
        return Token(kind, at, phrase.end(), value)
    unit = _unit(text, at, None)
    if unit and not (before and before.kind is Kind.WORD and before.end == at):
        return unit
    word = _WORD.match(text, at)
    if word:
        return Token(Kind.WORD, at, word.end(), word[0])
    return Token(Kind.SEPARATOR, at, at + 1, char)


def _is_sign(text: str, at: int, before: Token | None) -> bool:
    """Whether '-' or '+' here is the sign of a number, not a dash between two."""
    if not re.match(r"[-+] ?[.,]?\d", text[at:]):
        return False
    if before is None:
        return text[at + 1] != " "
    if text[at + 1] == " ":
        return before.kind in (Kind.RELATION, Kind.TO)
    return before.kind in (
        Kind.RELATION, Kind.TO, Kind.DASH, Kind.SEPARATOR, Kind.OPEN, Kind.QUALIFIER,
    ) or (before.kind is Kind.WORD and before.end < at)  # fmt: skip


def _number(text: str, start: int, digits: int) -> Token:
    while text[digits] == " ":
        digits += 1
    ratio = _RATIO.match(text, digits)
    if ratio and digits == start:
        sides = numeral(ratio[1]), numeral(ratio[2])
        if 1.0 in (sides[0].value, sides[1].value):
            value = sides[0] if sides[1].value == 1.0 else sides[1]
            return Token(Kind.NUMBER, start, ratio.end(), number=value, ratio=True)
    match = NUMERAL.match(text, digits)
    assert match is not None
    if _glued_to_name(text, start):
        tail = re.compile(r"[\w.,-]*\w").match(text, start)
        return Token(Kind.WORD, start, tail.end() if tail else match.end(), match[0])
    tail = _GLUED_TAIL.match(text, match.end())
    if tail and not _known_tail(text, match):
        return Token(Kind.WORD, start, tail.end(), text[start : tail.end()])
    value = numeral(match[0])
    if text[start] == "-":
        decimal = value.decimal
        negative = None if decimal is None else Numeral(-decimal.value, decimal.half_step)
        value = Numeral(-value.value, value.half_step, negative)
    return Token(Kind.NUMBER, start, match.end(), number=value)


def _glued_to_name(text: str, start: int) -> bool:
    """RG58, KM-23: the number follows a letter, or a hyphen glued to a letter."""
    if start == 0:
        return False
    before = text[start - 1]
    if before == "-" or text[start] in "-+":
        stem = text[: start - 1] if before == "-" else text[:start]
        return bool(re.search(r"[A-Za-z]\w*$", stem)) and not unit_at_end(stem)
    return before.isalpha() and before.isascii() and before not in "xX" and not unit_at_end(
        text[:start]
    )  # fmt: skip


def unit_at_end(text: str) -> bool:
    """Whether the letters at the end of a text are a unit or a word between two numbers."""
    tail = re.search(r"[^\W\d_]+$", text)
    if tail is None:
        return False
    stem = tail[0].lower()
    if stem in _phrases() and _phrases()[stem][0] is not Kind.WORD:
        return True
    match = unit_pattern().match(tail[0])
    glued = bool(text[: tail.start()]) and text[tail.start() - 1].isdigit()
    return glued and (bool(match and match.end() == len(tail[0])) or stem in ("m", "g"))


def _known_tail(text: str, match: re.Match[str]) -> bool:
    at = match.end()
    unit = unit_pattern().match(text, at)
    if (unit and unit[0] not in ("M", "G")) or _phrase_pattern().match(text, at):
        return True
    if re.match(r"[xX] ?[\d.ø]", text[at:]):
        return True
    return _bare_hertz(text, at, match[0]) is not None


def _bare_hertz(text: str, at: int, digits: str) -> re.Match[str] | None:
    """617M or 1.7G glued to the number: hertz left out. 4G and 5G are generations, not hertz."""
    match = _BARE_HERTZ.match(text, at)
    if match and (len(digits) >= 3 or (match[1] == "G" and "." in digits)):
        return match
    return None


def _unit(text: str, at: int, before: Token | None) -> Token | None:
    match = unit_pattern().match(text, at)
    if match and match[0] not in ("M", "G"):
        if match[0].lower() == "in" and re.match(r" +[A-Za-z]", text[match.end() :]):
            return None
        if before is None and len(match[0]) == 1 and match[0] not in "°%Ω":
            return None  # a lone letter is a unit only beside a number
        return Token(Kind.UNIT, at, match.end(), unit_of(match[0]))
    if before is not None and before.end == at:
        bare = _bare_hertz(text, at, text[before.start : before.end])
        if bare:
            return Token(Kind.UNIT, at, bare.end(), bare[1] + "Hz", bare=True)
    return None
