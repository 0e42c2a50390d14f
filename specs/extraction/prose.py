"""Figures in running text and titles.

Accepted only in forms that cannot mean much else: a number with dBi, dBd or dBic; a number in dB
beside the word gain; 'VSWR of n'; degrees beside beamwidth. Rejected near loss, noise, amplifiers,
comparisons and other products.
"""

from __future__ import annotations

import re
from dataclasses import dataclass

from specs.claims import Plane, Quantity
from specs.extraction.labels import Label
from specs.extraction.tables import Box
from specs.extraction.values import Reading, read_values

_REJECT = re.compile(
    r"\bloss|noise|amplif|\blna\b|lower|higher|more than|less than|\berp\b|eirp|=\s*\d|improve|"
    r"increase|reduc|compar|versus|\bvs\b|exceed|degrad|other|optional|accessor|related|instead|"
    r"relative to|limit|example|table|figure|below|theor|formula|difference|would|ideal|"
    r"isotropic",
    re.IGNORECASE,
)
_GAIN = re.compile(
    r"(?P<figure>(?<![\w.,-])[-+]?\d+(?:[.,]\d+)?\s?(?:(?:-|~|to|/)\s?\d+(?:[.,]\d+)?\s?)?dB(?:i|d|ic)\b)",
    re.IGNORECASE,
)
_GAIN_DB = re.compile(
    r"(?:gain|gewinn|ganancia|guadagno|ganho)\s+(?:\w+\s+){0,2}?(?P<figure>\d+(?:[.,]\d+)?\s?dB)\b",
    re.IGNORECASE,
)
_VSWR = re.compile(
    r"vswr\s+(?:of\s+|is\s+|under\s+|below\s+)?(?P<figure>(?:<=?\s?)?\d(?:\.\d+)?(?:\s?:\s?1)?)",
    re.IGNORECASE,
)
_BEAM = re.compile(
    r"(?P<figure>\d+(?:[.,]\d+)?\s?(?:°|deg(?:ree)?s?)\s*)(?:(?P<plane>horizontal|azimuth|vertical|elevation|"
    r"(?:e|h)-plane)\s+)?(?:half[- ]power\s+|3\s?db\s+)?beam\s?-?width", re.IGNORECASE,
)  # fmt: skip

_FORMS: tuple[tuple[re.Pattern[str], Quantity], ...] = (
    (_GAIN, Quantity.GAIN),
    (_GAIN_DB, Quantity.GAIN),
    (_VSWR, Quantity.VSWR),
    (_BEAM, Quantity.BEAMWIDTH),
)
_PLANES = {"horizontal": Plane.AZIMUTH, "azimuth": Plane.AZIMUTH, "vertical": Plane.ELEVATION,
           "elevation": Plane.ELEVATION, "e-plane": Plane.E, "h-plane": Plane.H}  # fmt: skip


@dataclass(frozen=True, slots=True)
class Mention:
    """A figure mentioned in running text, and the box of its line."""

    reading: Reading
    box: Box
    title: bool


def mentions(boxes: list[Box], used: set[int], title_size: float) -> list[Mention]:
    """All acceptable figures in boxes that no label has used."""
    found: list[Mention] = []
    for box in boxes:
        if id(box) in used or not re.search(r"\d", box.text):
            continue
        title = box.size >= title_size
        for reading in _in_text(box.text):
            found.append(Mention(reading, box, title))
    return found


def _in_text(text: str) -> list[Reading]:
    found: list[Reading] = []
    for pattern, quantity in _FORMS:
        for match in pattern.finditer(text):
            window = text[max(0, match.start() - 50) : match.end() + 40]
            if _REJECT.search(window):
                continue
            plane = _PLANES.get((match.groupdict().get("plane") or "").lower())
            label = Label(text="", quantity=quantity, rest="", planes=(plane,) if plane else ())
            found.extend(read_values(label, match["figure"])[:1])
    return found
