"""Claims, their evidence, and the antennas and sheet they belong to.

Frozen dataclasses: a claim is what the sheet says, and nothing downstream may change it.
Levels are floats in dB with the reference in the unit (``dBi``); lengths mm; frequencies MHz;
angles degrees.
"""

from __future__ import annotations

from dataclasses import dataclass

from specs.claims.quantity import Plane, Quantity, Statistic
from specs.units.figures import Relation

BBox = tuple[float, float, float, float]
"""(x0, top, x1, bottom) in points from the top left corner of the page as shown."""

Band = tuple[float, float]
"""(low, high) in MHz; a spot frequency has both ends equal."""


@dataclass(frozen=True, slots=True)
class Evidence:
    """One place where a claim was read: page from 1, box, and the text exactly as it stands."""

    page: int
    bbox: BBox
    text: str


@dataclass(frozen=True, slots=True)
class Stated:
    """A figure as printed.

    ``low`` and ``high`` are the printed ends (equal for a single number), in ``unit`` as printed
    but in its one spelling; ``tolerance`` is what stands after ±, in the same unit. ``half_step``
    is half of the last printed digit's step (0.05 for 17.5): what rounding may hide.
    For ``polarization`` the words are in ``text`` and both ends are 0.
    """

    text: str
    low: float
    high: float
    relation: Relation
    tolerance: float | None
    unit: str
    half_step: float = 0.0


@dataclass(frozen=True, slots=True)
class Normalized:
    """A figure on the one reference of its quantity, as an interval.

    The interval spans printed digits, tolerance, relation and open meanings (a bare dB).
    One-sided claims are open: ``low`` may be -inf and ``high`` +inf. ``nominal`` is the figure
    itself, for the eye and for estimates; never None for a number.
    """

    low: float
    high: float
    nominal: float
    unit: str
    assumptions: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class Claim:
    """One stated figure.

    ``kind`` refines the quantity: efficiency ``radiation|total|aperture``; size
    ``length|width|height|diameter|depth``; gain ``realized``; frequency ``centre``;
    polarization ``linear|vertical|horizontal|dual|circular`` (one of them).
    ``level_db`` is the level at which a beamwidth is taken when the sheet says so (-3.0, -10.0).
    ``condition`` keeps any other condition in words ("elevation 15°", "1 m ground plane").
    """

    id: str
    quantity: Quantity
    stated: Stated
    normalized: Normalized
    statistic: Statistic | None = None
    plane: Plane | None = None
    port: str | None = None
    polarization: str | None = None
    kind: str | None = None
    band_mhz: Band | None = None
    level_db: float | None = None
    condition: str | None = None
    evidence: tuple[Evidence, ...] = ()
    confidence: float = 1.0


@dataclass(frozen=True, slots=True)
class Unread:
    """Text that looked like a claim and is not used as one.

    ``reason`` is one of ``not-a-figure``, ``no-value``, ``low-confidence``, ``amplifier``,
    ``unknown-glyph``, ``hidden``, ``unplaced``.
    """

    text: str
    reason: str
    page: int
    bbox: BBox
    quantity: Quantity | None = None
    antenna: str | None = None


@dataclass(frozen=True, slots=True)
class Antenna:
    """One model or variant described by a sheet.

    ``type`` is one of the words of ``specs.claims.types`` or None; ``traits`` are the plain facts
    that rules ask for (``specs.claims.types.Trait``). ``headline`` holds figures from the title or
    product name, kept apart so that a contradiction with the table shows.
    """

    label: str
    claims: tuple[Claim, ...]
    type: str | None = None
    type_inferred: bool = False
    traits: frozenset[str] = frozenset()
    headline: tuple[Claim, ...] = ()


@dataclass(frozen=True, slots=True)
class Sheet:
    """Everything read from one document (or given as claims)."""

    name: str
    sha256: str
    media_type: str
    pages: int
    antennas: tuple[Antenna, ...]
    language: str | None = None
    read_by: str = "text"
    unread: tuple[Unread, ...] = ()
    notes: tuple[str, ...] = ()
