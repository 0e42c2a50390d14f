"""The language of a sheet, from its script and a few words that only one language uses."""

from __future__ import annotations

import re

_SCRIPTS: tuple[tuple[str, str], ...] = (
    ("ja", "[\u3040-\u30ff]"),
    ("ko", "[\uac00-\ud7af]"),
    ("zh", "[\u4e00-\u9fff]"),
    ("ru", "[\u0400-\u04ff]"),
)
_WORDS: tuple[tuple[str, str], ...] = (
    ("de", r"\b(?:gewinn|frequenz\w*|gewicht|und|mit|öffnungswinkel|abmessungen)\b"),
    ("fr", r"\b(?:fréquence\w*|poids|et|avec|ouverture|puissance|des)\b"),
    ("es", r"\b(?:ganancia|frecuencia\w*|peso|con|haz|potencia|impedancia|de la)\b"),
    ("it", r"\b(?:guadagno|frequenza|peso|potenza|impedenza|con|della)\b"),
    ("pt", r"\b(?:ganho|frequência|peso|potência|impedância|com|da)\b"),
    ("pl", r"\b(?:zysk|częstotliwość|waga|moc|szerokość|impedancja)\b"),
    ("en", r"\b(?:gain|frequency|weight|and|with|power|impedance|the)\b"),
)


def language_of(text: str) -> str | None:
    """ISO 639-1 code of the main language; None when too little text tells.

    >>> language_of("Frequenzbereich 2400 MHz Gewinn 5 dBi Gewicht 2 kg")
    'de'
    """
    letters = sum(c.isalpha() for c in text)
    if letters < 20:
        return None
    for code, pattern in _SCRIPTS:
        if len(re.findall(pattern, text)) > 0.08 * letters:
            return code
    lowered = text.lower()
    counts = [(len(re.findall(pattern, lowered)), code) for code, pattern in _WORDS]
    best, code = max(counts, key=lambda c: c[0])
    return code if best else None
