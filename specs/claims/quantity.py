"""The closed lists of words with which a claim is described."""

from __future__ import annotations

from enum import StrEnum


class Quantity(StrEnum):
    """What a claim states. Terms of IEEE Std 145 where it has one."""

    GAIN = "gain"
    DIRECTIVITY = "directivity"
    EFFICIENCY = "efficiency"
    BEAMWIDTH = "beamwidth"
    FREQUENCY = "frequency"
    BANDWIDTH = "bandwidth"
    VSWR = "vswr"
    RETURN_LOSS = "return_loss"
    FRONT_TO_BACK = "front_to_back"
    SIDELOBE_LEVEL = "sidelobe_level"
    CROSS_POLAR_DISCRIMINATION = "cross_polar_discrimination"
    AXIAL_RATIO = "axial_ratio"
    ISOLATION = "isolation"
    POLARIZATION = "polarization"
    IMPEDANCE = "impedance"
    POWER = "power"
    ELECTRICAL_TILT = "electrical_tilt"
    SIZE = "size"
    ELEMENTS = "elements"
    ANTENNA_FACTOR = "antenna_factor"
    EFFECTIVE_AREA = "effective_area"


class Statistic(StrEnum):
    """Which figure of a spread the sheet says it states."""

    PEAK = "peak"
    TYPICAL = "typical"
    MINIMUM = "minimum"
    MAXIMUM = "maximum"
    AVERAGE = "average"
    NOMINAL = "nominal"


class Plane(StrEnum):
    """The cut in which a beamwidth is taken, as the sheet names it."""

    AZIMUTH = "azimuth"
    ELEVATION = "elevation"
    E = "E"
    H = "H"


UNIT_OF: dict[Quantity, str] = {
    Quantity.GAIN: "dBi",
    Quantity.DIRECTIVITY: "dBi",
    Quantity.EFFICIENCY: "%",
    Quantity.BEAMWIDTH: "deg",
    Quantity.FREQUENCY: "MHz",
    Quantity.BANDWIDTH: "MHz",
    Quantity.VSWR: "",
    Quantity.RETURN_LOSS: "dB",
    Quantity.FRONT_TO_BACK: "dB",
    Quantity.SIDELOBE_LEVEL: "dB",
    Quantity.CROSS_POLAR_DISCRIMINATION: "dB",
    Quantity.AXIAL_RATIO: "dB",
    Quantity.ISOLATION: "dB",
    Quantity.POLARIZATION: "",
    Quantity.IMPEDANCE: "ohm",
    Quantity.POWER: "W",
    Quantity.ELECTRICAL_TILT: "deg",
    Quantity.SIZE: "mm",
    Quantity.ELEMENTS: "",
    Quantity.ANTENNA_FACTOR: "dB/m",
    Quantity.EFFECTIVE_AREA: "m2",
}
"""The one unit in which each quantity is normalised."""
