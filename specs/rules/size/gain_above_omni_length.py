"""gain-above-omni-length: more gain than an omni of that length can have."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.physics.omni import omni_length_ceiling_dbi, omni_over_ground_ceiling_dbi
from specs.rules.beamwidth.omni_gain_above_beamwidth_limit import over_ground
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import FREQUENCY, GAIN, LENGTH
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, above, ruler, softened, standing
from specs.rules.words import band_words, figure, gain_words, stated

TIERS: Tiers = ((0.0, None), (0.5, Severity.NOTE), (1.0, Severity.DOUBTFUL),
                (3.0, Severity.IMPLAUSIBLE), (math.inf, Severity.IMPOSSIBLE))  # fmt: skip


@rule(
    id="gain-above-omni-length",
    topic="gain against size",
    needs=(GAIN, FREQUENCY, LENGTH),
    applies=lambda facts: facts.omnidirectional,
    formula="D ≤ max(1.641, 2L/λ + 0.92)",
    source="derived: sum over the rotationally symmetric spherical modes n ≤ kL/2",
    tiers=(("≤ 0.5 dB above", "note"), ("≤ 1", "doubtful"), ("≤ 3", "implausible"),
           ("beyond", "impossible"), ("on a board, case or vehicle", "two tiers lower")),
)  # fmt: skip
def gain_above_omni_length(facts: Facts) -> Iterator[Conflict]:
    """Omnidirectional gain against length.

    What it checks
    --------------
    The gain of an omnidirectional antenna is not more than its length allows at the top of its
    band.

    Why it must hold
    ----------------
    To press the pattern flat a radiator must be long: about 2L/λ for long ones. A short whip with
    the gain of a long collinear is the commonest overclaim of all.

    Flagged
    -------
    Omnidirectional base antenna
    Frequency: 440-470 MHz
    Gain: 9 dBi
    Length: 600 mm

    Accepted
    --------
    Omnidirectional base antenna
    Frequency: 440-470 MHz
    Gain: 7 dBi
    Length: 2100 mm
    """
    length = facts.size("length", "height")
    if length is None or math.isinf(length.normalized.high):
        return
    ground = over_ground(facts)
    for gain in facts.gains:
        wavelength = facts.wavelength_mm(gain)
        if wavelength is None:
            continue
        size = length.normalized.high / wavelength
        if ground:
            ceiling = float(omni_over_ground_ceiling_dbi(size))
        else:
            ceiling = float(omni_length_ceiling_dbi(size))
        excess = gain.normalized.low - ceiling
        steps = 2 if facts.on_structure else 0
        severity = softened(standing(excess, TIERS), steps)
        if severity is None:
            continue
        bound = Bound(ceiling, "dBi", "ceiling for this length")
        yield Conflict(
            severity=severity,
            claims=(gain.id, length.id),
            message=(
                f"The sheet claims {gain_words(gain)}{band_words(gain)} all round from a length of "
                f"{stated(length)}. At {299792.458 / wavelength:.0f} MHz that is {size:.2f} "
                f"wavelengths, which allow {figure(ceiling, 'dBi')}"
                f"{' over a ground plane' if ground else ''}; the claim is {figure(excess, 'dB')} "
                "above."
                + (" A board, case or vehicle that radiates with it may explain the rest."
                   if steps else "")
            ),
            question=(
                f"How is {stated(gain)} reached with a length of {stated(length)}, and on which "
                "ground plane or structure was it measured?"
            ),
            working=f"10·log10(2·{size:.2f} + 0.92) = {ceiling:.2f} dBi",
            assumption="Would hold if the antenna were longer, not round, or on a large structure.",
            margin_db=excess,
            bound=bound,
            ruler=ruler(gain, TIERS, above(ceiling), bound),
        )  # fmt: skip
