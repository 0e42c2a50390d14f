"""What a sheet states: quantities, claims, evidence, antennas."""

from specs.claims.claim import (
    Antenna,
    Band,
    BBox,
    Claim,
    Evidence,
    Normalized,
    Sheet,
    Stated,
    Unread,
)
from specs.claims.quantity import UNIT_OF, Plane, Quantity, Statistic
from specs.claims.types import AntennaType, Trait
from specs.units.figures import Relation

__all__ = [
    "UNIT_OF",
    "Antenna",
    "AntennaType",
    "BBox",
    "Band",
    "Claim",
    "Evidence",
    "Normalized",
    "Plane",
    "Quantity",
    "Relation",
    "Sheet",
    "Stated",
    "Statistic",
    "Trait",
    "Unread",
]
