"""Types of antenna and the traits that rules ask for."""

from __future__ import annotations

from enum import StrEnum


class AntennaType(StrEnum):
    """Types told apart by their physics, in the words of the trade."""

    DIPOLE = "dipole"
    MONOPOLE = "monopole"
    WHIP = "whip"
    COLLINEAR = "collinear omni"
    OMNI = "omni"
    PATCH = "patch"
    CHIP = "chip"
    PANEL = "panel"
    SECTOR = "sector panel"
    YAGI = "yagi"
    LOG_PERIODIC = "log-periodic"
    CORNER_REFLECTOR = "corner reflector"
    HORN = "horn"
    DISH = "dish"
    HELIX = "helix"
    LOOP = "loop"
    POSITIONING = "positioning"


class Trait(StrEnum):
    """Plain facts about an antenna, from the words of the sheet."""

    OMNIDIRECTIONAL = "omnidirectional"
    BIDIRECTIONAL = "bidirectional"
    ACTIVE = "active"
    NOISE_FIGURE = "noise figure"
    SUPPLY_VOLTAGE = "supply voltage"
    POSITIONING = "satellite positioning"
    GROUND_PLANE = "over a ground plane"
    ON_STRUCTURE = "mounted on a board, case or vehicle"
    CIRCULAR = "circular polarization"
    LINEAR = "linear polarization"
    STACKED = "stacked or several antennas"
    OPEN_WAVEGUIDE = "open circular waveguide"
