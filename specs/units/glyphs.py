"""Many glyphs, one meaning: printed text folded to the few characters the grammar knows.

Folding never changes which number is meant: every minus and dash becomes '-', a raised digit
behind a digit (a footnote mark) is dropped, full-width forms become narrow, the signs ≤ ≥ become
'<=' '>='. Verbatim text is kept by the caller; folded text is for reading only.
"""

from __future__ import annotations

import re
import unicodedata

_SUPERSCRIPTS = "⁰¹²³⁴⁵⁶⁷⁸⁹"
_FOOTNOTE_MARK = re.compile(rf"(?<=[\d)°%])[{_SUPERSCRIPTS}]+(?![\d.,])")
_RING_AFTER_SPACE = re.compile(r" ?[\u030a\u02da\u00ba\u2070](?![\w])")

_GLYPHS = str.maketrans(
    {
        # dashes and minus signs
        **dict.fromkeys("\u2212\u2010\u2011\u2012\u2013\u2014\u2015\ufe63\uff0d\u00ad\u0002", "-"),
        # tildes
        **dict.fromkeys("\u223c\u301c\uff5e\u2053\u223d", "~"),
        # degrees (the combining ring is handled apart)
        **dict.fromkeys("\u00ba\u02da\u2218", "°"),
        # spaces
        **dict.fromkeys("\u00a0\u2000\u2001\u2002\u2003\u2004\u2005\u2006\u2007\u2008\u2009"
                        "\u200a\u202f\u205f\u3000\t\r\n", " "),
        # nothing at all
        **dict.fromkeys("\u200b\u200c\u200d\u2060\ufeff\u200e\u200f"),
        # inequalities
        **dict.fromkeys("≤≦⩽⪯", "<="),
        **dict.fromkeys("≥≧⩾⪰", ">="),
        # multiplication, division (a range sign in some countries), ohm, micro, quotes
        **dict.fromkeys("×✕✖⨯∗", "x"),
        "÷": "~",
        "\u2126": "Ω",
        "\u00b5": "μ",
        **dict.fromkeys("“”″〃", '"'),
        **dict.fromkeys("‘’′", "'"),
        "﹤": "<",
        "﹥": ">",
        "∶": ":",
        "⁄": "/",
        "∕": "/",
        "、": ",",
        "Ø": "ø",
        "⌀": "ø",
        "∅": "ø",
        "Φ": "ø",
        "φ": "ø",
        "ϕ": "ø",
    }
)  # fmt: skip

_ASCII = re.compile(r"[\x20-\x7e]*\Z")
_REPAIRS = (
    (re.compile(r"= ?<|< ?="), "<="),
    (re.compile(r"= ?>|> ?="), ">="),
    (re.compile(r"\+ ?/ ?-|\(\+-\)|\+-"), "±"),
)


def fold(text: str) -> str:
    """Text with every glyph variant folded to the one the grammar knows.

    >>> fold("\u22123\u202fdBi"), fold("\u2264\uff11\uff0e\uff15"), fold("1.5²")
    ('-3 dBi', '<=1.5', '1.5')
    """
    if not _ASCII.match(text):
        text = _FOOTNOTE_MARK.sub("", text)
        text = _RING_AFTER_SPACE.sub("°", text)
        text = unicodedata.normalize("NFKC", text.translate(_GLYPHS)).translate(_GLYPHS)
    if "=" in text or "+" in text:
        for pattern, replacement in _REPAIRS:
            text = pattern.sub(replacement, text)
    return text
