"""Scales: a quantity stated in a unit.

A unit alone does not say what is stated (14 dB may be a gain, a return loss or a loss), so a text
names a set of scales, in order of preference, and the request decides between them.
"""

from __future__ import annotations

import difflib
import math
import re
from dataclasses import dataclass

from specs.errors import UnknownUnit
from specs.units.spellings import unit_of

_ANY = (-math.inf, math.inf)
_POSITIVE = (0.0, math.inf)


@dataclass(frozen=True, slots=True)
class Scale:
    """A quantity in a unit, and the range in which its figures make sense.

    ``either_sign``: sheets print it with and without a minus, and mean its size.
    """

    quantity: str
    unit: str
    valid: tuple[float, float] = _ANY
    either_sign: bool = False

    def __str__(self) -> str:
        return f"{self.quantity} in {self.unit}" if self.unit else self.quantity


LENGTHS = ("mm", "cm", "m", "in", "ft")
AREAS = ("m2", "cm2", "ft2")
FREQUENCIES = ("MHz", "GHz", "kHz", "Hz")
POWERS = ("W", "mW", "kW")
ANGLES = ("deg", "rad")

SCALES: tuple[Scale, ...] = (
    *(Scale("gain", unit) for unit in ("dBi", "dBd", "dBic", "dBil", "dB")),
    Scale("VSWR", "", (1.0, math.inf)),
    Scale("gain", "x", _POSITIVE),
    Scale("return loss", "dB", _POSITIVE, either_sign=True),
    Scale("mismatch loss", "dB", _POSITIVE, either_sign=True),
    Scale("reflection coefficient", "", (0.0, 1.0)),
    Scale("antenna factor", "dB/m"),
    *(Scale("effective area", unit, _POSITIVE) for unit in AREAS),
    Scale("efficiency", "%", (0.0, 100.0)),
    Scale("efficiency", "dB", (-math.inf, 0.0)),
    Scale("efficiency", "x", (0.0, 1.0)),
    Scale("radiation resistance", "ohm", _POSITIVE),
    *(
        Scale(quantity, unit, _ANY if unit.startswith("dB") else _POSITIVE)
        for quantity in ("power", "EIRP", "ERP")
        for unit in ("dBm", "dBW", *POWERS)
    ),
    *(Scale("angle", unit) for unit in ANGLES),
    *(
        Scale(f"beamwidth at −{level} dB", unit, (0.0, 360.0 if unit == "deg" else 2 * math.pi))
        for level in (3, 6, 10)
        for unit in ANGLES
    ),
    *(Scale("frequency", unit, _POSITIVE) for unit in FREQUENCIES),
    *(Scale("length", unit, _POSITIVE) for unit in LENGTHS),
    *(Scale("wavelength", unit, _POSITIVE) for unit in LENGTHS),
)
"""All scales. Where a unit stands for several, the earlier is the likelier."""

NAMES: dict[str, str] = {
    "gain": "gain", "directivity": "gain", "numeric gain": "gain", "linear gain": "gain",
    "vswr": "VSWR", "swr": "VSWR", "standing wave ratio": "VSWR",
    "return loss": "return loss", "rl": "return loss",
    "mismatch loss": "mismatch loss", "reflection loss": "mismatch loss",
    "reflection coefficient": "reflection coefficient", "reflection": "reflection coefficient",
    "gamma": "reflection coefficient", "|γ|": "reflection coefficient",
    "antenna factor": "antenna factor", "af": "antenna factor",
    "effective area": "effective area", "effective aperture": "effective area",
    "aperture": "effective area",
    "efficiency": "efficiency", "radiation resistance": "radiation resistance",
    "power": "power", "eirp": "EIRP", "erp": "ERP",
    "angle": "angle", "beamwidth": "beamwidth at −3 dB", "hpbw": "beamwidth at −3 dB",
    "frequency": "frequency", "wavelength": "wavelength", "length": "length",
}  # fmt: skip
"""Words by which a quantity may be named, in lower case."""

RATIO_SPELLINGS = frozenset({"x", "times", "linear", "numeric", "ratio"})
"""Words that ask for a plain power ratio."""

_NAME = re.compile(
    r"(?<![\w])("
    + "|".join(re.escape(n) for n in sorted(NAMES, key=len, reverse=True))
    + r")(?!\w)",
    re.IGNORECASE,
)
_BEAM_LEVEL = re.compile(r"(?:at\s+)?[-−–]?\s*(3|6|10)\s*dB\b", re.IGNORECASE)


def take_name(text: str) -> tuple[str | None, str]:
    """The quantity a text names, and the text without the name.

    >>> take_name("return loss 14 dB")
    ('return loss', '14 dB')
    """
    found = _NAME.search(text)
    if found is None:
        return None, text
    rest = (text[: found.start()] + " " + text[found.end() :]).strip(" :=")
    return NAMES[found[1].lower()], rest


def of_unit(unit: str, quantity: str | None = None) -> tuple[Scale, ...]:
    """The scales of a unit ('' for a bare number), of one quantity if it is named.

    >>> [str(scale) for scale in of_unit("dB/m")]
    ['antenna factor in dB/m']
    """
    plain = ("", "x") if unit in ("", "x") else (unit,)
    return tuple(
        scale
        for scale in SCALES
        if scale.unit in plain and (quantity is None or scale.quantity == quantity)
    )


def of_request(to: str) -> tuple[Scale, ...]:
    """The scales that a request such as 'dBi', 'VSWR', 'ERP in dBW' or '-3 dB' asks for.

    Raises ``UnknownUnit``, naming the nearest known word or unit.
    """
    quantity, rest = take_name(to)
    level = _BEAM_LEVEL.search(to)
    if level and (quantity is None or quantity.startswith("beamwidth")):
        quantity, rest = f"beamwidth at −{level[1]} dB", _BEAM_LEVEL.sub("", rest)
    rest = re.sub(r"^\s*in\s+(?=\S)", "", rest).strip(" .()")
    if rest.lower() in RATIO_SPELLINGS:
        return of_unit("x", quantity)
    if quantity is not None and rest in ("", "in"):
        return tuple(scale for scale in SCALES if scale.quantity == quantity)
    if not rest:
        raise UnknownUnit("No unit is asked for.", "Name one, such as dBi.")
    try:
        found = of_unit(unit_of(rest), quantity)
    except UnknownUnit as error:
        near = difflib.get_close_matches(rest.lower(), NAMES, n=1, cutoff=0.6)
        raise (
            UnknownUnit(error.message, f"Did you mean '{near[0]}'?") if near else error
        ) from None
    if not found:
        raise UnknownUnit(
            f"Nothing is converted to '{to}'.",
            "Ask for a unit such as dBi, dB/m, m2, %, mm, or a quantity such as VSWR.",
        )
    return found
