"""Numbers and claims in words, alike in all messages."""

from __future__ import annotations

from specs.claims import Claim

_SYMBOL = {"deg": "°", "ohm": " Ω", "": "", "%": " %", "m2": " m²"}


def figure(value: float, unit: str, digits: int = 1) -> str:
    """A number with its unit: 17.2 dBi, 65°, 300 mm."""
    text = f"{value:.{digits}f}"
    if "." in text:
        text = text.rstrip("0").rstrip(".") if digits > 1 or unit in ("deg", "mm", "MHz") else text
    return text.replace("-", "−") + _SYMBOL.get(unit, f" {unit}")


def stated(claim: Claim) -> str:
    """A claim's figure as the sheet states it: '17.0 dBd', '65° to 70°', 'at least 16 dBi'."""
    figures = claim.stated
    unit = figures.unit or ""
    digits = _digits(figures.half_step)
    low = figure(figures.low, unit, digits)
    if figures.low != figures.high:
        return f"{low} to {figure(figures.high, unit, digits)}"
    words = {"at_least": "at least ", "at_most": "at most "}.get(figures.relation.value, "")
    tolerance = "" if figures.tolerance is None else f" ±{figures.tolerance:g}"
    return f"{words}{low}{tolerance}"


def gain_words(claim: Claim) -> str:
    """A gain as stated, and on dBi where that differs: '17.0 dBd (19.2 dBi)'."""
    if claim.stated.unit == claim.normalized.unit:
        return stated(claim)
    return f"{stated(claim)} ({figure(claim.normalized.nominal, 'dBi', 2)})"


def _digits(half_step: float) -> int:
    digits = 0
    while digits < 3 and half_step * 2 * 10**digits < 0.999:
        digits += 1
    return digits


def band_words(claim: Claim) -> str:
    """' at 5150 to 5850 MHz', or nothing when the claim names no band."""
    if claim.band_mhz is None:
        return ""
    low, high = claim.band_mhz
    return f" at {low:g} MHz" if low == high else f" at {low:g} to {high:g} MHz"
