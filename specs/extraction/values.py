"""Value text to readings: the figures of a label's value with what stands beside each.

``Hor:48 Ver:31``, ``1.6:1 / 1.4:1 avg``, ``>=2.5@410~468MHz; >=6@1720-2180MHz``,
``KM-23: 5 dBi`` and ``65° H / 9° V`` all come apart here, in any language of the vocabulary.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, replace

from specs.claims import Band, Plane, Quantity, Relation, Statistic
from specs.extraction.labels import Label
from specs.extraction.vocabulary import phrase_at
from specs.units.figures import Figure, find_figures
from specs.units.linear import factor
from specs.units.spellings import measures, unit_pattern


@dataclass(frozen=True, slots=True)
class Reading:
    """One figure of a value with its conditions, before band, antenna and confidence are settled.

    ``place`` and ``places`` tell its position in a list; ``band`` is a band printed with the value;
    ``name`` a variant or port named with it ("KM-23").
    """

    figure: Figure
    quantity: Quantity
    unit: str
    plane: Plane | None
    statistic: Statistic | None
    relation: Relation
    place: int
    places: int
    band: Band | None = None
    name: str | None = None
    named_band: str | None = None
    condition: str | None = None
    unit_from: str = "value"
    level_db: float | None = None


UNITS: dict[Quantity, frozenset[str]] = {
    Quantity.GAIN: frozenset({"level", "ratio", "power level", "voltage level"}),
    Quantity.DIRECTIVITY: frozenset({"level", "ratio"}),
    Quantity.EFFICIENCY: frozenset({"percentage", "ratio"}),
    Quantity.BEAMWIDTH: frozenset({"angle"}),
    Quantity.ELECTRICAL_TILT: frozenset({"angle"}),
    Quantity.FREQUENCY: frozenset({"frequency"}),
    Quantity.BANDWIDTH: frozenset({"frequency"}),
    Quantity.VSWR: frozenset({"voltage"}),
    Quantity.RETURN_LOSS: frozenset({"ratio"}),
    Quantity.FRONT_TO_BACK: frozenset({"ratio"}),
    Quantity.SIDELOBE_LEVEL: frozenset({"ratio", "carrier level"}),
    Quantity.CROSS_POLAR_DISCRIMINATION: frozenset({"ratio"}),
    Quantity.AXIAL_RATIO: frozenset({"ratio"}),
    Quantity.ISOLATION: frozenset({"ratio"}),
    Quantity.IMPEDANCE: frozenset({"impedance"}),
    Quantity.POWER: frozenset({"power"}),
    Quantity.ELEMENTS: frozenset(),
    Quantity.ANTENNA_FACTOR: frozenset({"antenna factor", "ratio"}),
    Quantity.EFFECTIVE_AREA: frozenset({"area"}),
    Quantity.SIZE: frozenset({"length"}),
}
"""What a unit must measure to state a quantity; no unit at all is judged apart."""

_NEEDS_UNIT = frozenset(
    {Quantity.FREQUENCY, Quantity.BANDWIDTH, Quantity.SIZE, Quantity.EFFECTIVE_AREA}
)
_LIST_JOINT = re.compile(
    r"\s*(?:/|,|;|&|\*|\||x|\+|\b(?:or|and|und|oder|y|e|et|i|и|o)\b|或|和|及)\s*", re.IGNORECASE
)
_NAME = re.compile(r"([A-Za-z][\w .+-]{0,24}?)\s*[:=]\s*$")
_NAMED_BAND = re.compile(r"\b(low|mid|high|lower|upper)\b(?:\s*band)?", re.IGNORECASE)
_ANGLE_CONDITION = re.compile(r"(?:elevation|el\.?|at|@)\s*$", re.IGNORECASE)
_LETTER = re.compile(r"^\s*\(?([HVEhv])\b(?!\s*-?\s*plane)|\b([HV])\s*[:=]?\s*$")
_PLANE_OF_LETTER = {"H": Plane.AZIMUTH, "V": Plane.ELEVATION, "E": Plane.E}
_STATISTICS = {name: Statistic(name) for name in
               ("maximum", "minimum", "typical", "average", "nominal", "peak")}  # fmt: skip


def read_values(label: Label, folded: str, unit: str | None = None) -> list[Reading]:
    """All readings of a value text under its label; ``unit`` is what cell or header offer.

    Figures with a foreign unit, or none where one is needed, give no reading.
    """
    quantity = label.quantity
    if quantity is None:
        return []
    text = re.sub(r"(?<=\d)\. (?=\d\b)", ".", folded)  # '2. 5' is a broken '2.5'
    figures = find_figures(text)
    if quantity in (Quantity.FREQUENCY, Quantity.BANDWIDTH):
        return _frequencies(label, text, figures, unit)
    values, bands = _conditions(text, figures, quantity)
    outer = label.unit or unit
    kept = _with_units(text, values, quantity, outer)
    readings = []
    for index, (figure, source) in enumerate(kept):
        before, behind = _surroundings(text, kept, index)
        band = next((b for f, b in bands.items() if f.start == figure.start), None)
        readings.append(_reading(label, figure, source, before, behind, index, len(kept), band))
    return _planes_in_order(label, readings)


def mhz(figure: Figure, unit: str | None = None) -> Band | None:
    """The band that a frequency figure prints, in MHz; a tolerance widens a centre to a band."""
    name = figure.unit or unit or ""
    if measures(name) != "frequency":
        return None
    scale = factor(name, "MHz")
    tolerance = figure.tolerance or 0.0
    return (
        float(f"{(figure.low - tolerance) * scale:.12g}"),
        float(f"{(figure.high + tolerance) * scale:.12g}"),
    )


def _conditions(
    text: str, figures: list[Figure], quantity: Quantity
) -> tuple[list[Figure], dict[Figure, Band]]:
    """Take the frequencies out of a value and tie each to the figure it conditions.

    '@' or an opening parenthesis ties to the figure in front; a colon, or standing first, to the
    figure behind.
    """
    frequencies = [f for f in figures if _is_frequency(text, f)]
    values = [f for f in figures if f not in frequencies and not _is_angle(f, quantity)]
    bands: dict[Figure, Band] = {}
    leading = bool(frequencies and values and frequencies[0].start < values[0].start)
    for frequency in frequencies:
        band = mhz(frequency, "MHz")
        before = [v for v in values if v.end <= frequency.start]
        behind = [v for v in values if v.start >= frequency.end]
        tied = text[: frequency.start].rstrip()[-1:] in ("@", "(") or re.search(
            r"\b(?:at|in|for|bei)$", text[: frequency.start].rstrip(), re.IGNORECASE
        )
        target = None
        if behind and (not before or (leading and not tied)):
            target = behind[0]
        elif before:
            target = before[-1]
        if target is not None and band is not None:
            known = bands.get(target)
            bands[target] = band if known is None else _union(known, band)
    if tied_all := _shared(text, frequencies, values, bands):
        bands = tied_all
    return values, bands


def _shared(
    text: str, frequencies: list[Figure], values: list[Figure], bands: dict[Figure, Band]
) -> dict[Figure, Band] | None:
    """'65° H, 9° V @ 2400-2500 MHz': one frequency behind several figures holds for all."""
    if len(frequencies) == 1 and len(values) > 1 and frequencies[0].start > values[-1].start:
        between = text[values[-1].end : frequencies[0].start]
        if "(" not in between:
            band = next(iter(bands.values()), None)
            return None if band is None else dict.fromkeys(values, band)
    return None


def _is_frequency(text: str, figure: Figure) -> bool:
    if measures(figure.unit) == "frequency":
        return True
    return figure.unit == "" and text[: figure.start].rstrip()[-1:] == "@" and figure.low >= 30


def _is_angle(figure: Figure, quantity: Quantity) -> bool:
    """An elevation angle beside a gain is a condition."""
    return measures(figure.unit) == "angle" and quantity not in (
        Quantity.BEAMWIDTH, Quantity.ELECTRICAL_TILT,
    )  # fmt: skip


def _union(a: Band, b: Band) -> Band:
    return (min(a[0], b[0]), max(a[1], b[1]))


def _with_units(
    text: str, figures: list[Figure], quantity: Quantity, outer: str | None
) -> list[tuple[Figure, str]]:
    """Figures that can state the quantity, each with its unit and where the unit was found.

    A unit at the end of a list serves the whole list; then come label, cell and header.
    """
    allowed = UNITS.get(quantity, frozenset())
    outer = outer if outer and measures(outer) in allowed else None
    kept: list[tuple[Figure, str]] = []
    for index, figure in enumerate(figures):
        if figure.times and quantity is not Quantity.BEAMWIDTH:  # 65° x 9° are two beamwidths
            continue
        unit, source = figure.unit, "value"
        if not unit and _stray_word_before(text, figures, index):
            continue
        if not unit:
            unit, source = _unit_behind(text, figures, index), "list"
        if not unit:
            unit, source = outer or "", "label"
        if quantity is Quantity.VSWR and unit == "V":
            unit = ""  # a ratio of voltages has no unit, whatever is printed
        if quantity is Quantity.IMPEDANCE and unit == "W":
            unit = "ohm"  # the symbol font's letter W prints an omega
        if unit and measures(unit) not in allowed:
            continue
        if not unit and quantity is not Quantity.VSWR:
            if quantity in _NEEDS_UNIT or _stray_word_behind(text, figure):
                continue
            source = "none"
        if quantity is Quantity.VSWR and not (_vswr_like(figure) and not _counted(text, figure)):
            continue
        kept.append((replace(figure, unit=unit), source))
    return kept


def _counted(text: str, figure: Figure) -> bool:
    """'2 ports' under VSWR counts something else; '1.5:1' never does."""
    return not figure.ratio and _stray_word_behind(text, figure)


def _vswr_like(figure: Figure) -> bool:
    return 0.0 < figure.low < 50.0 and figure.unit in ("", "V")


def _unit_behind(text: str, figures: list[Figure], index: int) -> str:
    """The unit of the next figure of the same list that prints one."""
    at = index
    while at + 1 < len(figures):
        between = text[figures[at].end : figures[at + 1].start]
        if not _LIST_JOINT.fullmatch(between):
            return ""
        at += 1
        if figures[at].unit:
            return figures[at].unit
    return ""


def _stray_word_behind(text: str, figure: Figure) -> bool:
    """A bare number followed by an unknown word counts something else ('2 ports')."""
    behind = text[figure.end :].lstrip()
    if not behind or not behind[0].isalpha():
        return False
    found = phrase_at(behind.lower(), 0)
    if _NAMED_BAND.match(behind):
        return False
    return found is None and len(re.split(r"[^\w]", behind)[0]) > 1


def _stray_word_before(text: str, figures: list[Figure], index: int) -> bool:
    """'see chart 7': a bare number behind unknown words is no figure of the label's."""
    start = figures[index - 1].end if index else 0
    before = text[start : figures[index].start]
    if re.search(r"[:=]\s*(?:[<>]=?\s*)?$", before):
        return False
    words = re.findall(r"[^\W\d_]{3,}", before)
    return bool(words) and all(
        phrase_at(word.lower(), 0) is None and not _NAMED_BAND.match(word) for word in words
    )


def _surroundings(text: str, values: list[tuple[Figure, str]], index: int) -> tuple[str, str]:
    """What stands before and behind a figure within its own piece of the list."""
    figure = values[index][0]
    start = values[index - 1][0].end if index else 0
    end = values[index + 1][0].start if index + 1 < len(values) else len(text)
    before, behind = text[start : figure.start], text[figure.end : end]
    if index:
        before = re.split(r"[,;/|]|\s{2,}", before)[-1]
        if not re.search(r"[,;/|]", text[start : figure.start]):
            # no separator: words with a colon belong to the figure behind them
            before = before if ":" in before or "=" in before else ""
    if index + 1 < len(values):
        pieces = re.split(r"[,;/|]", behind, maxsplit=1)
        behind = pieces[0]
        if len(pieces) == 1 and re.search(r"[:=]\s*(?:[<>]=?\s*)?$", behind):
            behind = ""
    return before, behind


def _reading(
    label: Label,
    figure: Figure,
    unit_from: str,
    before: str,
    behind: str,
    place: int,
    places: int,
    band: Band | None,
) -> Reading:
    quantity = label.quantity
    assert quantity is not None
    words = _tags(before) + _tags(behind)
    planes = [Plane(name) for group, name in words if group == "plane"]
    plane = planes[0] if planes and quantity in _PLANAR else None
    if plane is None and quantity is Quantity.BEAMWIDTH:
        plane = _letter_plane(before, behind)
    if plane is None and len(label.planes) == 1 and quantity in _PLANAR:
        plane = label.planes[0]
    qualifier = figure.qualifier or next((n for g, n in words if g == "statistic"), None)
    statistic = _statistic(quantity, qualifier) or label.statistic
    relation = figure.relation
    if relation is Relation.EQUAL:
        relation = _relation(quantity, qualifier, label)
    name = _NAME.search(before.strip(" ,;/|"))
    named = _NAMED_BAND.search(before) or _NAMED_BAND.search(behind)
    known = name is not None and _known(name[1])
    return Reading(
        figure=figure,
        quantity=quantity,
        unit=figure.unit,
        plane=plane,
        statistic=statistic,
        relation=relation,
        place=place,
        places=places,
        band=band,
        name=name[1].strip() if name and not known else None,
        named_band=named[1].lower() if named else None,
        unit_from=unit_from,
        level_db=label.level_db if quantity is Quantity.BEAMWIDTH else None,
    )


def _known(name: str) -> bool:
    """Whether a word in front of a colon is a word of the vocabulary or a unit, not a name."""
    return phrase_at(name.lower(), 0) is not None or unit_pattern().fullmatch(name) is not None


_LESS_IS_BETTER = frozenset({Quantity.VSWR, Quantity.AXIAL_RATIO, Quantity.SIDELOBE_LEVEL})
_PLANAR = frozenset({Quantity.BEAMWIDTH, Quantity.SIDELOBE_LEVEL})


def _tags(text: str) -> list[tuple[str, str]]:
    """The modifiers that stand in a text."""
    found: list[tuple[str, str]] = []
    lowered = text.lower()
    at = 0
    while at < len(lowered):
        boundary = at == 0 or not (lowered[at - 1].isalpha() and lowered[at].isascii())
        phrase = phrase_at(lowered, at) if boundary and not lowered[at].isspace() else None
        if phrase is None:
            at += 1
            continue
        found.extend((t.group, t.name) for t in phrase.tags if t.group in ("plane", "statistic"))
        at = phrase.end
    return found


def _letter_plane(before: str, behind: str) -> Plane | None:
    for text in (behind, before):
        match = _LETTER.search(text)
        if match:
            letter = (match[1] or match[2]).upper()
            return _PLANE_OF_LETTER.get(letter)
    return None


def _statistic(quantity: Quantity, qualifier: str | None) -> Statistic | None:
    if qualifier is None or qualifier == "better":
        return None
    found = _STATISTICS[qualifier]
    levels = (Quantity.GAIN, Quantity.DIRECTIVITY, Quantity.EFFICIENCY)
    if quantity in levels and found is Statistic.MAXIMUM:
        return Statistic.PEAK
    return found


def _relation(quantity: Quantity, qualifier: str | None, label: Label) -> Relation:
    if qualifier == "better":
        return Relation.AT_MOST if quantity in _LESS_IS_BETTER else Relation.AT_LEAST
    if qualifier == "minimum":
        return Relation.AT_LEAST
    if qualifier == "maximum" and quantity not in (Quantity.GAIN, Quantity.DIRECTIVITY):
        return Relation.AT_MOST
    if qualifier in ("typical", "average", "nominal"):
        return Relation.EQUAL
    return label.relation or Relation.EQUAL


def _planes_in_order(label: Label, readings: list[Reading]) -> list[Reading]:
    """A label that names two planes gives them to the figures in turn ('H/V': '65/9')."""
    planes = label.planes
    if len(planes) < 2 or not readings or any(r.plane for r in readings):
        return readings
    if len(readings) % len(planes):
        return readings
    places = len(readings) // len(planes)
    return [
        replace(r, plane=planes[i % len(planes)], place=i // len(planes), places=places)
        for i, r in enumerate(readings)
    ]


def _mixed_units(figure: Figure) -> Figure:
    """'1.575±40MHz' is a centre in GHz with its tolerance in MHz."""
    tolerance = figure.tolerance
    if figure.unit == "MHz" and tolerance is not None and tolerance >= 10 > figure.low:
        return replace(figure, unit="GHz", tolerance=tolerance / 1000)
    return figure


def _frequencies(label: Label, text: str, figures: list[Figure], unit: str | None) -> list[Reading]:
    """The bands of a frequency value; a return loss or VSWR beside them is no frequency."""
    outer = label.unit or unit
    outer = outer if outer and measures(outer) == "frequency" else None
    kept: list[tuple[Figure, str, str]] = []
    for index, figure in enumerate(figures):
        name, source = figure.unit, "value"
        if not name:
            name, source = _unit_behind(text, figures, index), "list"
        if not name:
            name, source = outer or "", "label"
        if not name and kept and kept[-1][1] != "none":
            between = text[figures[index - 1].end : figure.start]
            if _LIST_JOINT.fullmatch(between):
                name, source = kept[-1][0].unit, "list"
        if measures(name) != "frequency" or figure.times:
            continue
        mended = _mixed_units(replace(figure, unit=name))
        kept.append((mended, mended.unit, source))
    readings = []
    for place, (figure, name, source) in enumerate(kept):
        before = text[(kept[place - 1][0].end if place else 0) : figure.start]
        variant = _NAME.search(before.strip(" ,;/|"))
        known = variant is not None and _known(variant[1])
        readings.append(
            Reading(
                figure=figure,
                quantity=label.quantity or Quantity.FREQUENCY,
                unit=name,
                plane=None,
                statistic=None,
                relation=figure.relation,
                place=place,
                places=len(kept),
                band=mhz(figure, name),
                name=variant[1].strip() if variant and not known else None,
                unit_from=source,
            )
        )
    return readings
