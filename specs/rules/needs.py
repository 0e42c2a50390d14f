"""The figures that rules ask for, each with the words that name it to a buyer."""

from __future__ import annotations

from specs.claims import Plane, Quantity
from specs.rules.rule import Need


def _has(quantity: Quantity, words: str) -> Need:
    return Need(words, lambda facts: bool(facts.of(quantity)))


GAIN = Need("a gain", lambda facts: bool(facts.gains))
ANY_GAIN = _has(Quantity.GAIN, "a gain")
DIRECTIVITY = _has(Quantity.DIRECTIVITY, "a directivity")
EFFICIENCY = _has(Quantity.EFFICIENCY, "a radiation efficiency")
FREQUENCY = Need(
    "a frequency",
    lambda facts: bool(facts.bands) or any(g.band_mhz for g in facts.of(Quantity.GAIN)),
)
BANDWIDTH = _has(Quantity.BANDWIDTH, "a bandwidth")
VSWR = _has(Quantity.VSWR, "a VSWR")
RETURN_LOSS = _has(Quantity.RETURN_LOSS, "a return loss")
FRONT_TO_BACK = _has(Quantity.FRONT_TO_BACK, "a front-to-back ratio")
BEAMWIDTH = _has(Quantity.BEAMWIDTH, "a half-power beamwidth")
BEAM = Need("half-power beamwidths in both planes", lambda facts: bool(facts.beams))
VERTICAL_WIDTH = Need("a vertical half-power beamwidth", lambda facts: bool(facts.vertical_widths))
ANTENNA_FACTOR = _has(Quantity.ANTENNA_FACTOR, "an antenna factor")
EFFECTIVE_AREA = _has(Quantity.EFFECTIVE_AREA, "an effective area")
DIAMETER = Need(
    "the diameter of the reflector",
    lambda facts: facts.size("diameter", "height", "length", "width") is not None,
)
HEIGHT_AND_WIDTH = Need(
    "the height and width of the panel",
    lambda facts: (
        facts.size("height", "length") is not None and facts.size("width", "diameter") is not None
    ),
)
LENGTH = Need(
    "the length of the radiating part",
    lambda facts: facts.size("length", "height") is not None,
)
SIZE = _has(Quantity.SIZE, "the size of the radiating part")
ELEMENTS = _has(Quantity.ELEMENTS, "the number of elements")
AXIAL = Need("a polarization, linear or circular,", lambda facts: facts.circular or facts.linear)
AZIMUTH_WIDTH = Need("an azimuth beamwidth", lambda facts: bool(facts.beamwidths(Plane.AZIMUTH)))
