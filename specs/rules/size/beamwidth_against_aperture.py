"""beamwidth-against-aperture: a beam narrower or wider than its aperture makes."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import AntennaType, Claim, Plane
from specs.physics.aperture import beamwidth_aperture_factor
from specs.rules.facts import SPEED_OF_LIGHT_MM_MHZ, Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import BEAMWIDTH, FREQUENCY, SIZE
from specs.rules.rule import Conflict, rule
from specs.rules.words import figure, stated

APERTURES = frozenset({AntennaType.DISH, AntennaType.PANEL, AntennaType.SECTOR})
SMALLEST_WL = 1.0


@rule(
    id="beamwidth-against-aperture",
    topic="gain against size",
    needs=(BEAMWIDTH, FREQUENCY, SIZE),
    applies=lambda facts: facts.antenna.type in APERTURES,
    formula="θ·L/λ = 55° to 90°",
    source="Silver, 1949; Balanis, ch. 12 (51 to 84° by taper; derived in the tests)",
    tiers=(("55 to 90", "ordinary"), ("50 to 55, 90 to 110", "note"),
           ("40 to 50, above 110", "doubtful"), ("below 40", "implausible")),
)  # fmt: skip
def beamwidth_against_aperture(facts: Facts) -> Iterator[Conflict]:
    """Beamwidth against aperture.

    What it checks
    --------------
    The half-power width times the length of the aperture in wavelengths lies where tapers put it.

    Why it must hold
    ----------------
    An evenly lit aperture has the narrowest beam without superdirectivity, 51° λ/L; a taper
    widens it.

    Flagged
    -------
    Parabolic dish antenna
    Frequency: 5725-5875 MHz
    Gain: 30 dBi
    Horizontal beamwidth: 2.0°
    Vertical beamwidth: 2.0°
    Diameter: 0.6 m

    Accepted
    --------
    Parabolic dish antenna
    Frequency: 5725-5875 MHz
    Gain: 28.7 dBi
    Horizontal beamwidth: 6.0°
    Vertical beamwidth: 6.0°
    Diameter: 0.6 m
    """
    for width, size in _paired(facts):
        band = width.band_mhz or (
            (min(b[0] for b in facts.bands), max(b[1] for b in facts.bands))
            if facts.bands
            else None
        )
        if band is None or width.normalized.high > 60:
            continue
        short = size.normalized.low * band[0] / SPEED_OF_LIGHT_MM_MHZ
        long = size.normalized.high * band[1] / SPEED_OF_LIGHT_MM_MHZ
        if short < SMALLEST_WL:
            continue
        most = float(beamwidth_aperture_factor(width.normalized.high, long))
        least = float(beamwidth_aperture_factor(width.normalized.low, short))
        severity, value, bound = _judged(least, most)
        if severity is None:
            continue
        kind = "narrower" if value < 60 else "wider"
        yield Conflict(
            severity=severity,
            claims=(width.id, size.id),
            message=(
                f"The sheet states a beamwidth of {stated(width)} from an aperture of "
                f"{stated(size)}. Width times length in wavelengths is {figure(value, 'deg', 0)}, "
                f"where apertures ordinarily have 55° to 90°: {kind} than the aperture makes."
            ),
            question=(
                f"Is the beamwidth of {stated(width)} the full half-power angle in the plane of the "
                f"{stated(size)} side?"
            ),
            working=f"θ·L/λ = {value:.0f}°",
            bound=Bound(bound, "deg", "θ·L/λ of ordinary apertures"),
        )


def _judged(least: float, most: float) -> tuple[Severity | None, float, float]:
    if most < 55:
        if most < 40:
            return Severity.IMPLAUSIBLE, most, 40.0
        return (Severity.DOUBTFUL if most < 50 else Severity.NOTE), most, 55.0
    if least > 90:
        return (Severity.DOUBTFUL if least > 110 else Severity.NOTE), least, 90.0
    return None, most, 0.0


def _paired(facts: Facts) -> Iterator[tuple[Claim, Claim]]:
    """Each beamwidth with the side of the aperture that makes it."""
    if facts.antenna.type == AntennaType.DISH:
        size = facts.size("diameter")
        if size is not None:
            for width in facts.beamwidths(*Plane, None):
                yield width, size
        return
    height = facts.size("height", "length")
    if height is not None:
        for width in facts.beamwidths(Plane.ELEVATION):
            yield width, height
