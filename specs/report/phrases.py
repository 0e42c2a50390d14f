"""Claims and quantities in words, alike in every rendering."""

from __future__ import annotations

from specs.report.model import AntennaEntry, ClaimEntry, FindingEntry

SEVERITIES = ("impossible", "implausible", "doubtful", "unclear", "note")
SHAPES = {"impossible": "■", "implausible": "▲", "doubtful": "◆", "unclear": "○", "note": "·"}
VERDICTS = {
    "release": "Nothing above a note was found in what could be checked.",
    "query": "Ask the vendor before ordering.",
    "hold": "Do not order on these figures.",
}
UNREAD_REASONS = {
    "not-a-figure": "no figure could be read",
    "no-value": "a label without a value",
    "low-confidence": "read with too little confidence to use",
    "amplifier": "an amplifier's figure, not the antenna's",
    "unknown-glyph": "a character without a known meaning",
    "hidden": "text that the page does not show",
    "unplaced": "not tied to an antenna",
}
_UNIT = {"deg": "°", "%": " %", "": "", "ohm": " Ω", "m2": " m²"}


def printable(text: str) -> str:
    """Text without control characters: what a sheet says must not drive a terminal."""
    return "".join(c if c.isprintable() else " " for c in text)


def number(value: float) -> str:
    """A number without needless digits, with a true minus."""
    text = f"{value:.2f}".rstrip("0").rstrip(".") if abs(value) < 1000 else f"{value:.6g}"
    return text.replace("-", "−")


def with_unit(value: float, unit: str) -> str:
    """A number and its unit."""
    return number(value) + _UNIT.get(unit, f" {unit}")


def quantity(claim: ClaimEntry) -> str:
    """The quantity with statistic, kind and plane: 'peak gain', 'beamwidth, azimuth'."""
    words = claim.quantity.replace("_", " ")
    if claim.quantity == "size" and claim.kind:
        words = claim.kind
    elif claim.kind and claim.quantity in ("efficiency", "gain"):
        words = f"{claim.kind} {words}"
    if claim.statistic:
        words = f"{claim.statistic} {words}"
    if claim.plane:
        words += f", {claim.plane}" if len(claim.plane) > 1 else f", {claim.plane}-plane"
    if claim.level_db is not None:
        words += f" at {number(claim.level_db)} dB"
    return words


def condition(claim: ClaimEntry) -> str:
    """Band, port and other conditions of a claim."""
    parts = []
    if claim.band_mhz:
        low, high = claim.band_mhz
        parts.append(f"{low:g} MHz" if low == high else f"{low:g}–{high:g} MHz")
    parts += [p for p in (claim.port, claim.condition) if p]
    return "; ".join(parts)


def normalized(claim: ClaimEntry) -> str:
    """The normalised figure: nominal, and the interval where it says more."""
    if claim.quantity == "polarization":
        return claim.kind or claim.stated.text
    figure = claim.normalized
    if claim.stated.relation == "range":
        low = figure.nominal if figure.low is None else figure.low
        high = figure.nominal if figure.high is None else figure.high
        span = _printed_span(claim)
        low, high = span or (low, high)
        return f"{number(low)} to {with_unit(high, figure.unit)}"
    sign = {"at_least": "≥ ", "at_most": "≤ "}.get(claim.stated.relation, "")
    return sign + with_unit(figure.nominal, figure.unit)


def _printed_span(claim: ClaimEntry) -> tuple[float, float] | None:
    """The ends of a range on the normal unit, without the rounding of their digits."""
    stated, figure = claim.stated, claim.normalized
    middle = (stated.low + stated.high) / 2
    if figure.unit == "dBi":
        shift = figure.nominal - middle
        return stated.low + shift, stated.high + shift
    if middle == 0:
        return None
    scale = figure.nominal / middle
    return stated.low * scale, stated.high * scale


def interval(claim: ClaimEntry) -> str:
    """The interval that rules compare, open ends in words."""
    if claim.quantity == "polarization":
        return ""
    figure = claim.normalized
    low = "any" if figure.low is None else number(figure.low)
    high = "any" if figure.high is None else number(figure.high)
    return f"{low} … {high}"


def where(claim: ClaimEntry) -> str:
    """Where a claim was read."""
    pages = sorted({e.page for e in claim.evidence if e.page})
    return ", ".join(f"p. {p}" for p in pages) or "given"


def counts(antenna: AntennaEntry) -> list[tuple[str, int]]:
    """(severity, number of findings), worst first, without zeros."""
    found = [f.severity for f in antenna.findings]
    return [(s, found.count(s)) for s in SEVERITIES if s in found]


def margin(finding: FindingEntry) -> str:
    """The margin in words: '3.4 dB above', or nothing."""
    if finding.margin_db is None or finding.bound is None:
        return ""
    return f"{number(round(abs(finding.margin_db), 1))} dB"


def link_consequence(shortfall_db: float, range_factor: float) -> str:
    """What a shortfall of gain costs a link in free space."""
    if shortfall_db <= 0.05:
        return "the claim holds for planning"
    less = round(100 * (1 - range_factor))
    return f"−{shortfall_db:.1f} dB against the claim: {less} % less range in free space"
