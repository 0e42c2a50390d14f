"""Text to label: which quantity, plane, statistic, unit a piece of text names.

A label is a head word with modifiers in front ("peak", "horizontal", "3 dB") and a tail (unit,
parenthesis, relation) behind; what follows is the value. Foreign labels (weight, cable, wind) are
labels too: they end the walk to a value. Labels are matched by phrase, and last by guarded
similarity, for print is often misspelt.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, field
from functools import lru_cache

from specs.claims import Plane, Quantity, Relation, Statistic
from specs.extraction.vocabulary import Tag, long_heads, phrase_at
from specs.units.figures import find_figures
from specs.units.spellings import measures, unit_of, unit_pattern


@dataclass(frozen=True, slots=True)
class Label:
    """What a label names, and the rest of its text (the value, when printed inline).

    ``quantity`` is None for foreign labels and for model rows. ``planes`` has two members when
    the label names both ("H/V"). ``names`` holds unknown words in parentheses: a variant, a port.
    ``separated`` says that a colon or dash stood between label and rest.
    """

    text: str
    quantity: Quantity | None
    rest: str
    foreign: bool = False
    amplifier: bool = False
    model: bool = False
    planes: tuple[Plane, ...] = ()
    statistic: Statistic | None = None
    relation: Relation | None = None
    unit: str | None = None
    kind: str | None = None
    level_db: float | None = None
    names: tuple[str, ...] = ()
    band_text: str | None = None
    separated: bool = False
    fuzzy: bool = False
    head_at: int = 0


_BULLET = re.compile(
    r"^(?:[\s•·●▪■□◦○‣⁃*►➢➤✓✔»◆★→>\uf000-\uf0ff]+|-\s*(?=[^\W\d_])|\(?\d{1,2}[.)、]\s*(?=[^\W\d_]))+"
)
_LEVEL = re.compile(r"[-–]?\s?(3|6|10|12|15)\s?-?db(?![a-z/])\.?(?:\s?point)?")
_SEPARATOR = re.compile(r"\s*(?::|=(?!<|>)|\|)\s*|\s+-\s+|\s*-\s*(?=[<>≈~A-Za-z])|\s*\.{3,}\s*")
_CONNECTOR = re.compile(r"\s*(?:-|/|,|&|\+|\band\b|\bor\b)\s*")
_SIGN = re.compile(r"\s*(<=|>=|<|>)\s*(?=$|\)|:)")
_LETTER_PLANE = re.compile(r"[\s(/,:-]*\b([hv])\b[.)]?", re.IGNORECASE)
_LEADING_PLANE = re.compile(r"([hv])(?:[-.]\s?|\s)(?=beam|3\s?db|half|hpbw|bw\b|-3)")
_LETTERS = {"h": Plane.AZIMUTH, "v": Plane.ELEVATION}
_LONGEST_LABEL = 90


@dataclass
class _Draft:
    """A label while its text is being walked."""

    tags: list[tuple[int, Tag]] = field(default_factory=list)
    planes: list[Plane] = field(default_factory=list)
    unit: str | None = None
    relation: Relation | None = None
    level_db: float | None = None
    names: list[str] = field(default_factory=list)
    band_text: str | None = None
    separated: bool = False

    def has_head(self) -> bool:
        return any(t.group in ("quantity", "foreign", "amplifier") for _, t in self.tags)

    def quantity_so_far(self) -> str | None:
        names = [t.name for _, t in self.tags if t.group == "quantity"]
        return names[-1] if names else None


@lru_cache(maxsize=8192)
def read_label(folded: str) -> Label | None:
    """The label that a folded text starts with, or None when it starts with none."""
    text = _BULLET.sub("", folded, count=1)
    if not text or len(text) > 400:
        return None
    draft = _Draft()
    at = _walk(text, text.lower(), draft)
    if not draft.has_head():
        return _misspelt(text)
    return _label(text, at, draft)


def _walk(text: str, lowered: str, draft: _Draft) -> int:
    """Consume label text; returns where the rest begins."""
    at, end = 0, len(text)
    letter = _LEADING_PLANE.match(lowered)
    if letter and not draft.tags:
        draft.planes.append(_LETTERS[letter[1]])
        at = letter.end(1)
    while at < end:
        if text[at].isspace():
            at += 1
            continue
        following = (
            _parenthesis(text, at, draft)
            or _level(lowered, at, draft)
            or _phrase(lowered, at, draft)
            or _unit_tail(text, at, draft)
            or _sign(text, at, draft)
        )
        if following:
            at = following
            continue
        separator = _SEPARATOR.match(text, at) or _spaced_dash(text, at)
        if separator and draft.has_head() and not _continues(lowered, at, draft):
            unit_end = _unit_tail(text, separator.end(), draft) if text[at] != ":" else None
            if unit_end is not None:
                at = unit_end
                continue
            draft.separated = True
            return separator.end()
        connector = _CONNECTOR.match(lowered, at)
        if connector and connector.end() < end and connector.end() > at:
            if _continues(lowered, at, draft):
                at = connector.end()
                continue
            unit_end = _unit_tail(text, connector.end(), draft)
            if unit_end is not None:
                at = unit_end
                continue
        letter = _LETTER_PLANE.match(text, at)
        if letter and draft.quantity_so_far() == "beamwidth" and letter.end() > at:
            draft.planes.append(_LETTERS[letter[1].lower()])
            at = letter.end()
            continue
        return at
    return at


def _spaced_dash(text: str, at: int) -> re.Match[str] | None:
    """A dash between spaces separates; glued to a number it is a sign."""
    return re.compile(r"-\s+").match(text, at) if at and text[at - 1].isspace() else None


def _continues(lowered: str, at: int, draft: _Draft) -> bool:
    """Whether a connector here joins two known words ('Front-to-back', 'Horizontal/Vertical')."""
    connector = _CONNECTOR.match(lowered, at)
    if connector is None or connector.end() >= len(lowered) or lowered[at] in ":=|":
        return False
    spaced_dash = lowered[at : connector.end()].strip() == "-" and " " in lowered[at : at + 3]
    found = phrase_at(lowered, connector.end())
    if found is None or all(t.group == "neutral" and len(found.text) == 1 for t in found.tags):
        return False
    return not (spaced_dash and draft.has_head() and found.tags[0].group != "plane")


def _phrase(lowered: str, at: int, draft: _Draft) -> int | None:
    if at and lowered[at - 1].isalpha() and lowered[at - 1].isascii() and lowered[at].isascii():
        return None
    found = phrase_at(lowered, at)
    if found is None or _is_name(lowered, at, found.end):
        return None
    if draft.quantity_so_far() == "polarization" and found.tags[0].group == "plane":
        return None  # 'Polarization Vertical': the word is the value
    draft.tags.extend((at, tag) for tag in found.tags)
    for tag in found.tags:
        if tag.group == "plane":
            draft.planes.append(Plane(tag.name))
    return found.end


def _is_name(lowered: str, at: int, end: int) -> bool:
    """BW-868-10, AR-5: a short head with a glued dash and a figure is a model name."""
    if end - at <= 3 and re.match(r"\s\d+-?[a-z]\b(?!/)", lowered[end:]):
        return True
    return (
        end - at <= 4
        and re.match(r"-?\w*\d", lowered[end:]) is not None
        and (lowered[end : end + 1] == "-" or lowered[end : end + 1].isdigit())
    )


def _level(lowered: str, at: int, draft: _Draft) -> int | None:
    match = _LEVEL.match(lowered, at)
    if match is None:
        return None
    if draft.has_head() and draft.quantity_so_far() != "beamwidth":
        return None
    draft.level_db = -float(match[1])
    return match.end()


def _parenthesis(text: str, at: int, draft: _Draft) -> int | None:
    if text[at] not in "([":
        return None
    close = text.find(")" if text[at] == "(" else "]", at)
    if close < 0:
        # a bracket that a line end cut off: a unit may still stand behind it
        return _unit_tail(text, at + 1, draft)
    inner = text[at + 1 : close].strip()
    if not inner:
        return close + 1
    if _inner(inner, draft):
        return close + 1
    return None


def _inner(inner: str, draft: _Draft) -> bool:
    """Take in what stands in parentheses; False when it holds a value and so ends the label."""
    lowered = inner.lower()
    if _as_unit(inner):
        draft.unit = _as_unit(inner)
        return True
    level = _LEVEL.fullmatch(lowered)
    if level:
        draft.level_db = -float(level[1])
        return True
    sign = {"<=": Relation.AT_MOST, "<": Relation.AT_MOST, ">=": Relation.AT_LEAST,
            ">": Relation.AT_LEAST}.get(inner)  # fmt: skip
    if sign:
        draft.relation = sign
        return True
    if draft.quantity_so_far() == "beamwidth" and re.fullmatch(r"[hv](\s?[/x&,]\s?[hv])?", lowered):
        draft.planes.extend(_LETTERS[c] for c in lowered if c in _LETTERS)
        return True
    sub = _Draft()
    if draft.has_head():
        sub.tags.extend(draft.tags)
    end = _walk(inner, lowered, sub)
    if end >= len(inner) and not sub.separated:
        draft.tags, draft.planes = (sub.tags, draft.planes + sub.planes)
        draft.unit = sub.unit or draft.unit
        draft.level_db = sub.level_db or draft.level_db
        draft.relation = sub.relation or draft.relation
        return True
    figures = find_figures(inner)
    if figures and all(measures(f.unit) == "frequency" for f in figures):
        draft.band_text = inner
        return True
    if any(measures(f.unit) in ("level", "angle", "ratio") for f in figures):
        level_inside = _LEVEL.search(lowered)
        if level_inside and draft.quantity_so_far() in ("beamwidth", "frequency", None):
            draft.level_db = -float(level_inside[1])
            return True
        return not draft.has_head()
    if len(inner) <= 30:
        draft.names.append(inner)
    return True


def _as_unit(text: str) -> str | None:
    match = unit_pattern().match(text)
    if match and match.end() == len(text):
        return unit_of(text)
    pair = re.fullmatch(r"(.+?)\s?[:/]\s?1", text)  # (:1)
    return _as_unit(pair[1]) if pair else None


def _unit_tail(text: str, at: int, draft: _Draft) -> int | None:
    """A unit printed behind the head without brackets: 'Gain dBi', 'Gain-dBi'."""
    if not draft.has_head():
        return None
    end = _after_unit(text, at)
    if end is None:
        return None
    unit = unit_of(text[at:end])
    if len(unit) == 1 and unit.isalpha() and text[at:end] == unit and text[end:].strip():
        return None  # a lone letter followed by more: 'W' in 'Gain W ...'
    draft.unit = unit
    return end


def _after_unit(text: str, at: int) -> int | None:
    match = unit_pattern().match(text, at)
    if match is None or match.end() == at:
        return None
    following = text[match.end() : match.end() + 1]
    if following.isalnum() and text[match.end() - 1].isalpha():
        return None
    return match.end()


def _sign(text: str, at: int, draft: _Draft) -> int | None:
    match = _SIGN.match(text, at)
    if match is None or not draft.has_head():
        return None
    draft.relation = Relation.AT_MOST if match[1][0] == "<" else Relation.AT_LEAST
    return match.end()


_STARTS_VALUE = re.compile(r"[\d<>=±≈~(+.,@'\"ø-]")


def _label(text: str, at: int, draft: _Draft, fuzzy: bool = False) -> Label | None:
    rest = text[at:].strip()
    head = _head(draft)
    if head is None:
        return None
    position, tag = head
    quantity = Quantity(tag.name) if tag.group == "quantity" and tag.name != "model" else None
    short = at - position <= 4
    if rest and not draft.separated and not _value_like(rest, quantity, short):
        return None
    if at > _LONGEST_LABEL:
        return None
    band_text = draft.band_text
    if quantity not in (None, Quantity.FREQUENCY, Quantity.BANDWIDTH) and _only_bands(rest):
        band_text, rest = rest, ""
    statistics = [t.name for _, t in draft.tags if t.group == "statistic"]
    kinds = [t.name for _, t in draft.tags if t.group == "kind"]
    statistic = _statistic(quantity, statistics)
    return Label(
        text=text[:at].strip(),
        quantity=quantity,
        rest=rest,
        foreign=tag.group == "foreign",
        amplifier=any(t.group == "amplifier" for _, t in draft.tags),
        model=tag.name == "model",
        planes=tuple(dict.fromkeys(draft.planes)),
        statistic=statistic,
        relation=draft.relation or _relation_of(quantity, statistic),
        unit=draft.unit,
        kind=kinds[-1] if kinds else None,
        level_db=draft.level_db,
        names=tuple(draft.names),
        band_text=band_text,
        separated=draft.separated,
        fuzzy=fuzzy,
        head_at=position,
    )


def _only_bands(text: str) -> bool:
    """'2.4 GHz', '@ 2400-2500 MHz': a condition of the value, not the value."""
    if not text:
        return False
    figures = find_figures(text)
    if not figures or any(measures(f.unit) != "frequency" for f in figures):
        return False
    left = text
    for figure in reversed(figures):
        left = left[: figure.start] + left[figure.end :]
    return not left.strip(" @/,;&()-:")


def _head(draft: _Draft) -> tuple[int, Tag] | None:
    """The head that decides: the last one, as English and most others put it.

    A foreign word that is also a plain word (range, band, port) never beats a quantity; for a
    size, any foreign word decides, for the size is then that of a box, a cable or a mast.
    """
    heads = [(p, t) for p, t in draft.tags if t.group in ("quantity", "foreign", "amplifier")]
    quantities = [(p, t) for p, t in heads if t.group == "quantity"]
    foreign = [(p, t) for p, t in heads if t.group == "foreign" and not _plain(p, draft)]
    amplifier = [(p, t) for p, t in heads if t.group == "amplifier"]
    if amplifier:
        return quantities[-1] if quantities else amplifier[-1]
    if not quantities:
        return heads[-1] if heads else None
    if foreign and (quantities[-1][1].name == "size" or foreign[-1][0] > quantities[-1][0]):
        return foreign[-1]
    # One phrase may be head of two quantities: the first listed decides.
    return next(h for h in quantities if h[0] == quantities[-1][0])


def _plain(position: int, draft: _Draft) -> bool:
    return any(p == position and t.group in ("neutral", "kind") for p, t in draft.tags)


def _value_like(rest: str, quantity: Quantity | None, short: bool) -> bool:
    """Whether text behind a label, with no separator between, can be its value."""
    if quantity is None:
        return True
    if _STARTS_VALUE.match(rest):
        return len(rest.split()) <= 16 and _unknown_words(rest) <= (0 if short else 2)
    if quantity is Quantity.POLARIZATION:
        return len(rest.split()) <= 5
    if re.match(r"[^\s:]{1,20}\s?:\s?[\d<>±-]", rest):
        return True
    first = rest.split()[0].lower()
    return first.startswith(("omni", "n/a", "rundstrahl"))


def _unknown_words(text: str) -> int:
    """Words of four letters or more that no vocabulary holds: running text, or a name."""
    words = [w.lower() for w in re.findall(r"[^\W\d_]{4,}", text)]
    return sum(phrase_at(w, 0) is None and unit_pattern().fullmatch(w) is None for w in words)


def _statistic(quantity: Quantity | None, names: list[str]) -> Statistic | None:
    if not names:
        return None
    found = Statistic(names[0])
    if quantity in (Quantity.GAIN, Quantity.DIRECTIVITY, Quantity.EFFICIENCY):
        if found is Statistic.MAXIMUM:
            return Statistic.PEAK
    elif found is Statistic.PEAK:
        return Statistic.MAXIMUM
    return found


def _relation_of(quantity: Quantity | None, statistic: Statistic | None) -> Relation | None:
    if quantity is Quantity.POWER:
        return Relation.AT_MOST  # a power rating is a limit, whatever the label says
    if statistic is Statistic.MINIMUM and quantity is not Quantity.FREQUENCY:
        return Relation.AT_LEAST
    if statistic is Statistic.MAXIMUM and quantity in (
        Quantity.VSWR, Quantity.AXIAL_RATIO,
    ):  # fmt: skip
        return Relation.AT_MOST
    return None


def _misspelt(text: str) -> Label | None:
    """A label one or two letters off a known head of six letters or more."""
    core = re.split(r"[:=(\[|]|\s-\s|\d", text, maxsplit=1)[0].strip().lower()
    if not 6 <= len(core) <= 40 or not any(c.isalpha() for c in core):
        return None
    from rapidfuzz import fuzz, process

    found = process.extractOne(core, long_heads().keys(), scorer=fuzz.ratio, score_cutoff=86)
    if found is None:
        return None
    draft = _Draft(tags=[(0, tag) for tag in long_heads()[found[0]]])
    at = _walk_tail(text, len(core), draft)
    return _label(text, at, draft, fuzzy=True)


def _walk_tail(text: str, at: int, draft: _Draft) -> int:
    tail = text[at:]
    return at + _walk(tail, tail.lower(), draft)
