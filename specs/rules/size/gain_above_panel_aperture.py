"""gain-above-panel-aperture: more gain than the area of the panel can gather."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import AntennaType
from specs.physics.aperture import panel_ceiling_dbi, uniform_aperture_dbi
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import FREQUENCY, GAIN, HEIGHT_AND_WIDTH
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, above, ruler, standing
from specs.rules.words import band_words, figure, gain_words, stated

PANELS = frozenset({AntennaType.PANEL, AntennaType.SECTOR, AntennaType.HORN, AntennaType.PATCH})
TIERS: Tiers = ((0.0, Severity.NOTE), (1.0, Severity.DOUBTFUL), (3.0, Severity.IMPLAUSIBLE),
                (math.inf, Severity.IMPOSSIBLE))  # fmt: skip


@rule(
    id="gain-above-panel-aperture",
    topic="gain against size",
    needs=(GAIN, FREQUENCY, HEIGHT_AND_WIDTH),
    applies=lambda facts: facts.antenna.type in PANELS,
    formula="G ≤ 4πA/λ² + 2P/λ (P: perimeter)",
    source=(
        "Silver, MIT Rad. Lab. vol. 12, 1949 (4πA/λ²); edge term derived, equal to Harrington's "
        "(ka)² + 2ka for a disk; 70 integrated apertures lie below it"
    ),
    tiers=(("≤ 4πA/λ²", "ordinary"), ("≤ bound", "note"), ("≤ bound + 1 dB", "doubtful"),
           ("≤ bound + 3 dB", "implausible"), ("beyond", "impossible")),
)  # fmt: skip
def gain_above_panel_aperture(facts: Facts) -> Iterator[Conflict]:
    """Panel gain against its area.

    What it checks
    --------------
    The stated gain is not more than the panel's face can gather at the top of the band.

    Why it must hold
    ----------------
    A plane aperture has 4πA/λ², and a small one a little more at its edges. Beyond that an
    antenna must be superdirective, which no sold panel is.

    Flagged
    -------
    Panel antenna
    Frequency: 2400-2500 MHz
    Gain: 18 dBi
    Dimensions (H x W): 200 x 200 mm

    Accepted
    --------
    Panel antenna
    Frequency: 2400-2500 MHz
    Gain: 13 dBi
    Dimensions (H x W): 220 x 220 mm
    """
    height, width = facts.size("height", "length"), facts.size("width", "diameter")
    if height is None or width is None:
        return
    for gain in facts.gains:
        wavelength = facts.wavelength_mm(gain)
        if wavelength is None:
            continue
        h, w = height.normalized.high / wavelength, width.normalized.high / wavelength
        if not (math.isfinite(h) and math.isfinite(w)):
            continue
        plain = float(uniform_aperture_dbi(h * w))
        ceiling = float(panel_ceiling_dbi(h * w, 2 * (h + w)))
        least = gain.normalized.low
        if least <= plain:
            continue
        excess = least - ceiling
        severity = standing(excess, TIERS)
        if severity is None:
            continue
        bound = Bound(ceiling, "dBi", "ceiling for this face")
        yield Conflict(
            severity=severity,
            claims=(gain.id, height.id, width.id),
            message=(
                f"The sheet claims {gain_words(gain)}{band_words(gain)} from a face of "
                f"{stated(height)} by {stated(width)}. At {299792.458 / wavelength:.0f} MHz that "
                f"face, lit evenly, gives {figure(plain, 'dBi')}, and at the very most "
                f"{figure(ceiling, 'dBi')}. "
                + (f"The claim is {figure(excess, 'dB')} above that." if excess > 0 else
                   "The claim lies between the two.")
                + (" It needs more than 3 dB of superdirectivity."
                   if severity is Severity.IMPOSSIBLE else "")
            ),
            question=(
                f"A face of {stated(height)} by {stated(width)} gives about {figure(plain, 'dBi')} "
                f"at {299792.458 / wavelength:.0f} MHz. Are the dimensions and the gain of "
                f"{stated(gain)} those of one antenna?"
            ),
            working=(
                f"4π·{h:.2f}·{w:.2f} = {plain:.1f} dBi; with 2·{2 * (h + w):.2f}: {ceiling:.1f} dBi"
            ),
            assumption="Would hold if the radiating face were larger than stated.",
            margin_db=excess,
            bound=bound,
            ruler=ruler(gain, ((plain - ceiling, None), *TIERS), above(ceiling), bound),
        )  # fmt: skip
