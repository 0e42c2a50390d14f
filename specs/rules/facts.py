"""What a rule may ask of one antenna: its claims by quantity, under the same conditions."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from functools import cached_property
from itertools import product

from specs.claims import Antenna, AntennaType, Band, Claim, Plane, Quantity, Sheet, Statistic, Trait

SPEED_OF_LIGHT_MM_MHZ = 299_792.458
"""Speed of light in mm·MHz: wavelength in mm of a frequency in MHz."""

OMNI_TYPES = frozenset(
    {AntennaType.OMNI, AntennaType.COLLINEAR, AntennaType.DIPOLE, AntennaType.WHIP,
     AntennaType.MONOPOLE}
)  # fmt: skip


@dataclass(frozen=True)
class Facts:
    """One antenna and the sheet it stands on."""

    antenna: Antenna
    sheet: Sheet

    def of(self, quantity: Quantity) -> tuple[Claim, ...]:
        """All claims of a quantity."""
        return self._by_quantity.get(quantity, ())

    @cached_property
    def _by_quantity(self) -> dict[Quantity, tuple[Claim, ...]]:
        found: dict[Quantity, list[Claim]] = {}
        for claim in self.antenna.claims:
            found.setdefault(claim.quantity, []).append(claim)
        return {quantity: tuple(claims) for quantity, claims in found.items()}

    @cached_property
    def gains(self) -> tuple[Claim, ...]:
        """Gain claims that speak of the antenna's best direction (no average over the sphere)."""
        return tuple(
            g for g in self.of(Quantity.GAIN)
            if g.statistic is not Statistic.AVERAGE and not self.amplified(g)
        )  # fmt: skip

    def amplified(self, gain: Claim) -> bool:
        """Whether a gain is more likely an amplifier's: above 15 dB in amplifier company."""
        active = {Trait.NOISE_FIGURE, Trait.SUPPLY_VOLTAGE, Trait.ACTIVE}
        positioning = self.antenna.type == AntennaType.POSITIONING
        company = bool(self.antenna.traits & active)
        return gain.normalized.low > 15.0 and company and (
            positioning or Trait.ACTIVE in self.antenna.traits
            or {Trait.NOISE_FIGURE, Trait.SUPPLY_VOLTAGE} <= self.antenna.traits
        )  # fmt: skip

    @cached_property
    def omnidirectional(self) -> bool:
        """Whether the antenna is said, or by its type known, to radiate all round."""
        if Trait.OMNIDIRECTIONAL in self.antenna.traits:
            return True
        return self.antenna.type in OMNI_TYPES

    @cached_property
    def circular(self) -> bool:
        """Whether the antenna is said to be circularly polarized."""
        return Trait.CIRCULAR in self.antenna.traits

    @cached_property
    def linear(self) -> bool:
        """Whether the antenna is said to be linearly polarized, and not circularly."""
        kinds = {c.kind for c in self.of(Quantity.POLARIZATION)}
        return not self.circular and bool(kinds & {"linear", "vertical", "horizontal"})

    @cached_property
    def bands(self) -> tuple[Band, ...]:
        """The bands that the sheet prints for the antenna."""
        return tuple(
            (c.normalized.low, c.normalized.high)
            for c in self.of(Quantity.FREQUENCY)
            if c.normalized.high < float("inf")
        )

    def beamwidths(self, *planes: Plane | None) -> tuple[Claim, ...]:
        """Beamwidths at the half-power level in any of these planes."""
        return tuple(
            b for b in self.of(Quantity.BEAMWIDTH)
            if b.plane in planes and b.level_db in (None, -3.0) and b.statistic in _WIDTHS
        )  # fmt: skip

    @cached_property
    def beams(self) -> tuple[tuple[Claim, Claim], ...]:
        """Pairs of half-power beamwidths in two crossed planes, under the same conditions."""
        first = self.beamwidths(Plane.AZIMUTH)
        second = self.beamwidths(Plane.ELEVATION)
        crossed = [*product(first, second), *product(self.beamwidths(Plane.E),
                                                     self.beamwidths(Plane.H))]  # fmt: skip
        return tuple((a, b) for a, b in crossed if same_conditions(a, b))

    @cached_property
    def vertical_widths(self) -> tuple[Claim, ...]:
        """Half-power widths in the plane that holds the axis of an omnidirectional antenna."""
        named = self.beamwidths(Plane.ELEVATION, Plane.E)
        if named:
            return named
        unnamed = self.beamwidths(None)
        return tuple(b for b in unnamed if b.normalized.nominal < 180)

    def size(self, *dimensions: str) -> Claim | None:
        """The first stated dimension of these, in order of preference."""
        sizes = {c.kind: c for c in reversed(self.of(Quantity.SIZE))}
        return next((sizes[d] for d in dimensions if d in sizes), None)

    @cached_property
    def longest_mm(self) -> float | None:
        """The longest stated dimension at its most favourable, in mm."""
        highs = [c.normalized.high for c in self.of(Quantity.SIZE)]
        finite = [h for h in highs if h < float("inf")]
        return max(finite) if finite else None

    def wavelength_mm(self, claim: Claim) -> float | None:
        """The wavelength at which a gain claim is judged in favour of the vendor, in mm.

        A peak or unqualified gain may occur at the top of its band; a minimum must hold at the
        bottom too.
        """
        band = self.band_of(claim)
        if band is None:
            return None
        guaranteed = claim.statistic is Statistic.MINIMUM or claim.stated.relation == "at_least"
        edge = band[0] if guaranteed else band[1]
        return SPEED_OF_LIGHT_MM_MHZ / edge if edge > 0 else None

    def band_of(self, claim: Claim) -> Band | None:
        """The band a claim holds in: its own, else all that the antenna covers."""
        if claim.band_mhz is not None:
            return claim.band_mhz
        if not self.bands:
            return None
        return min(b[0] for b in self.bands), max(b[1] for b in self.bands)

    @cached_property
    def on_structure(self) -> bool:
        """Whether a board, case, vehicle or ground plane radiates with the antenna."""
        traits = self.antenna.traits
        types = {AntennaType.CHIP, AntennaType.WHIP, AntennaType.MONOPOLE}
        return Trait.ON_STRUCTURE in traits or self.antenna.type in types or (
            Trait.GROUND_PLANE in traits
        )  # fmt: skip


_WIDTHS = (None, Statistic.NOMINAL, Statistic.TYPICAL, Statistic.AVERAGE, Statistic.MAXIMUM,
           Statistic.MINIMUM, Statistic.PEAK)  # fmt: skip


def same_conditions(a: Claim, b: Claim) -> bool:
    """Whether two claims hold for the same port and in bands that meet."""
    if a.port is not None and b.port is not None and a.port != b.port:
        return False
    return bands_meet(a.band_mhz, b.band_mhz)


def bands_meet(a: Band | None, b: Band | None) -> bool:
    """Whether two bands overlap; an unstated band meets any."""
    if a is None or b is None:
        return True
    slack = 1e-6
    return a[0] <= b[1] * (1 + slack) and b[0] <= a[1] * (1 + slack)


def same_band(a: Claim, b: Claim) -> bool:
    """Whether two claims are printed for one and the same band (or both for none)."""
    if a.band_mhz is None or b.band_mhz is None:
        return a.band_mhz is b.band_mhz
    return all(abs(x - y) <= 1e-3 * abs(x) for x, y in zip(a.band_mhz, b.band_mhz, strict=True))


def pairs(first: tuple[Claim, ...], second: tuple[Claim, ...]) -> Iterator[tuple[Claim, Claim]]:
    """All pairs of claims under the same conditions; where some share a band, only those."""
    met = [(a, b) for a, b in product(first, second) if same_conditions(a, b)]
    shared = [(a, b) for a, b in met if same_band(a, b)]
    yield from shared or met
