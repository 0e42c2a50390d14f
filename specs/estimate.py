"""Planning gain: the interval that all the independent evidence on a sheet supports.

For a link budget a claim counts for no more than its evidence. Each piece of evidence is an
interval in dBi; where they meet, the claim holds; where one lies below the claim, it wins, and the
basis says so.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass

from specs.claims import Antenna, AntennaType, Claim, Plane, Quantity, Statistic, Trait
from specs.physics.aperture import dish_gain_dbi, panel_ceiling_dbi
from specs.physics.beamwidth import beam_metric, omni_metric
from specs.physics.decibels import to_db
from specs.physics.omni import omni_length_ceiling_dbi

BEAM_RANGE = (0.35, 0.75)
"""r = G·sin(θ1/4)·sin(θ2/4) of real data sheets (derived from integrated patterns and losses)."""

OMNI_RANGE = (0.70, 1.06)
"""ro = G·sin(θv/2) of dipoles and collinear stacks (derived from integrated patterns)."""

DISH_EFFICIENCY = (0.40, 0.80)
_SPEED_OF_LIGHT_MM_MHZ = 299_792.458
_SLACK_DB = 0.5


@dataclass(frozen=True, slots=True)
class Support:
    """One piece of evidence on the gain: an interval in dBi and where it comes from, in words."""

    low: float
    high: float
    basis: str


@dataclass(frozen=True, slots=True)
class PlanningGain:
    """A defensible gain interval in dBi.

    ``shortfall_db`` is claimed nominal less planning nominal (0 where the claim holds);
    ``range_factor`` the free-space range left, 10^(-shortfall/20).
    """

    low: float
    high: float
    nominal: float
    basis: tuple[str, ...]
    shortfall_db: float
    range_factor: float


def planning_gain(antenna: Antenna) -> PlanningGain | None:
    """The gain to plan with; None when the antenna states no gain of its own.

    Never above the claim. A claim whose interval meets all the evidence keeps its own value.
    """
    claim = _claimed(antenna)
    if claim is None:
        return None
    low, high = claim.normalized.low, claim.normalized.high
    nominal = claim.normalized.nominal
    low = low if math.isfinite(low) else nominal
    high = high if math.isfinite(high) else nominal
    supports = list(_supports(antenna, claim))
    against = [s for s in supports if s.high + _SLACK_DB < low]
    if not against:
        agreeing = tuple(f"agrees with {s.basis}" for s in supports)
        basis = (f"the claim itself, {nominal:.1f} dBi", *agreeing)
        return PlanningGain(low, high, nominal, basis, 0.0, 1.0)
    ceiling = min(s.high for s in against)
    floor = min((s.low for s in against), default=ceiling)
    middle = min((floor + ceiling) / 2, nominal)
    basis = tuple(f"{s.basis}: {s.low:.1f} to {s.high:.1f} dBi, below the claim" for s in against)
    shortfall = nominal - middle
    return PlanningGain(floor, ceiling, middle, basis, shortfall, 10 ** (-shortfall / 20))


def _claimed(antenna: Antenna) -> Claim | None:
    """The gain a buyer would plan with: the highest stated one that is the antenna's own."""
    active = {Trait.NOISE_FIGURE, Trait.SUPPLY_VOLTAGE, Trait.ACTIVE} & antenna.traits
    gains = [
        c for c in antenna.claims
        if c.quantity is Quantity.GAIN
        and c.statistic is not Statistic.AVERAGE
        and not (active and c.normalized.low > 15.0)
    ]  # fmt: skip
    return max(gains, key=lambda c: c.normalized.nominal, default=None)


def _meets(a: Claim, b: Claim) -> bool:
    if a.band_mhz is None or b.band_mhz is None:
        return True
    return a.band_mhz[0] <= b.band_mhz[1] and b.band_mhz[0] <= a.band_mhz[1]


def _supports(antenna: Antenna, gain: Claim) -> Iterator[Support]:
    yield from _from_beam(antenna, gain)
    yield from _from_size(antenna, gain)
    yield from _from_directivity(antenna, gain)


def _from_beam(antenna: Antenna, gain: Claim) -> Iterator[Support]:
    widths = {
        c.plane: c for c in antenna.claims
        if c.quantity is Quantity.BEAMWIDTH and c.level_db in (None, -3.0) and _meets(c, gain)
    }  # fmt: skip
    omni = Trait.OMNIDIRECTIONAL in antenna.traits
    vertical = widths.get(Plane.ELEVATION) or widths.get(Plane.E)
    if omni and vertical is not None and vertical.normalized.low > 0:
        unit = omni_metric(0.0, min(vertical.normalized.low, 180.0))
        yield _scaled(OMNI_RANGE, float(unit), "the vertical beamwidth")
        return
    for first, second in ((Plane.AZIMUTH, Plane.ELEVATION), (Plane.E, Plane.H)):
        a, b = widths.get(first), widths.get(second)
        if a is not None and b is not None and not omni:
            narrow = max(a.normalized.low, 0.01), max(b.normalized.low, 0.01)
            yield _scaled(BEAM_RANGE, float(beam_metric(0.0, *narrow)), "the beamwidths")
            return


def _scaled(metric: tuple[float, float], unit: float, basis: str) -> Support:
    return Support(float(to_db(metric[0] / unit)), float(to_db(metric[1] / unit)), basis)


def _from_size(antenna: Antenna, gain: Claim) -> Iterator[Support]:
    top = _top_of_band(antenna, gain)
    sizes = {c.kind: c.normalized.high for c in antenna.claims if c.quantity is Quantity.SIZE}
    if top is None or not sizes:
        return
    wavelength = _SPEED_OF_LIGHT_MM_MHZ / top
    height = sizes.get("height") or sizes.get("length")
    width = sizes.get("width") or sizes.get("diameter")
    if antenna.type == AntennaType.DISH and sizes.get("diameter"):
        size = sizes["diameter"] / wavelength
        low, high = (float(dish_gain_dbi(size, e)) for e in DISH_EFFICIENCY)
        yield Support(low, high, "the reflector's diameter")
    elif antenna.type in (AntennaType.PANEL, AntennaType.SECTOR) and height and width:
        h, w = height / wavelength, width / wavelength
        ceiling = float(panel_ceiling_dbi(h * w, 2 * (h + w)))
        yield Support(ceiling - 4.0, ceiling, "the panel's face")
    elif Trait.OMNIDIRECTIONAL in antenna.traits and height and not _on_structure(antenna):
        ceiling = float(omni_length_ceiling_dbi(height / wavelength))
        yield Support(ceiling - 3.0, ceiling, "the antenna's length")


def _on_structure(antenna: Antenna) -> bool:
    return bool({Trait.ON_STRUCTURE, Trait.GROUND_PLANE} & antenna.traits)


def _top_of_band(antenna: Antenna, gain: Claim) -> float | None:
    if gain.band_mhz is not None:
        return gain.band_mhz[1]
    tops = [c.normalized.high for c in antenna.claims if c.quantity is Quantity.FREQUENCY]
    finite = [t for t in tops if math.isfinite(t) and t > 0]
    return max(finite) if finite else None


def _from_directivity(antenna: Antenna, gain: Claim) -> Iterator[Support]:
    for directivity in antenna.claims:
        if directivity.quantity is not Quantity.DIRECTIVITY or not _meets(directivity, gain):
            continue
        top = directivity.normalized.high
        losses = [
            float(to_db(c.normalized.high / 100))
            for c in antenna.claims
            if c.quantity is Quantity.EFFICIENCY and c.kind != "aperture"
            and 0 < c.normalized.high <= 100 and _meets(c, gain)
        ]  # fmt: skip
        if math.isfinite(top):
            loss = max(losses, default=0.0)
            words = "directivity and efficiency" if losses else "directivity"
            yield Support(top + loss - 1.0, top + loss, f"the stated {words}")
