"""gain-above-small-antenna-limit: more gain than the enclosing sphere allows."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import AntennaType, Claim
from specs.physics.small import enclosing_radius, ka_of_radius, normal_gain_dbi
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import FREQUENCY, GAIN, SIZE
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, above, ruler, softened, standing
from specs.rules.words import band_words, figure, gain_words

TIERS: Tiers = ((0.0, None), (0.5, Severity.NOTE), (1.5, Severity.DOUBTFUL),
                (3.0, Severity.IMPLAUSIBLE), (math.inf, Severity.IMPOSSIBLE))  # fmt: skip
_OWN_RULE = frozenset({AntennaType.DISH, AntennaType.PANEL, AntennaType.SECTOR, AntennaType.YAGI})


def steps_lower(facts: Facts) -> int:
    """Two tiers lower where a board, case or vehicle radiates with the antenna."""
    return 2 if facts.on_structure else 0


def enclosing_ceiling_dbi(facts: Facts, gain: Claim) -> float | None:
    """max(3, (ka)² + 2ka) in dBi for the sphere around the stated size; None if it is not known."""
    wavelength, longest = facts.wavelength_mm(gain), facts.longest_mm
    if wavelength is None or longest is None:
        return None
    height, width = facts.size("height", "length"), facts.size("width", "diameter")
    depth = facts.size("depth", "diameter")
    if height and width and depth and height is not width:
        radius = float(
            enclosing_radius(height.normalized.high, width.normalized.high, depth.normalized.high)
        )
    else:
        # One length alone: the widest body it may have favours the vendor by half again.
        radius = longest / 2 * 1.12
    return float(normal_gain_dbi(ka_of_radius(radius / wavelength)))


@rule(
    id="gain-above-small-antenna-limit",
    topic="gain against size",
    needs=(GAIN, FREQUENCY, SIZE),
    applies=lambda facts: facts.antenna.type not in _OWN_RULE,
    formula="G ≤ max(3, (ka)² + 2ka), a: radius of the enclosing sphere",
    source="Harrington, IRE Trans. AP-6, 219–225, 1958 (from memory; integrated in the tests)",
    tiers=(("≤ 0.5 dB above", "note"), ("≤ 1.5", "doubtful"), ("≤ 3", "implausible"),
           ("beyond", "impossible"), ("on a board, case or vehicle", "two tiers lower")),
)  # fmt: skip
def gain_above_small_antenna_limit(facts: Facts) -> Iterator[Conflict]:
    """Gain against the enclosing sphere.

    What it checks
    --------------
    The stated gain is not more than an antenna inside its enclosing sphere has without
    superdirectivity.

    Why it must hold
    ----------------
    Only spherical modes up to about ka carry power with a usable bandwidth. A body much smaller
    than a wavelength has at most a few dBi by itself; mounted on a board, case or vehicle, the
    whole structure radiates.

    Flagged
    -------
    Helical antenna
    Frequency: 430-440 MHz
    Gain: 9 dBi
    Dimensions: 30 x 20 x 20 mm

    Accepted
    --------
    Helical antenna
    Frequency: 430-440 MHz
    Gain: 1 dBi
    Dimensions: 30 x 20 x 20 mm
    """
    for gain in facts.gains:
        ceiling = enclosing_ceiling_dbi(facts, gain)
        if ceiling is None:
            continue
        excess = gain.normalized.low - ceiling
        steps = steps_lower(facts)
        severity = softened(standing(excess, TIERS), steps)
        if severity is None:
            continue
        sizes = [c for c in facts.antenna.claims if c.quantity.value == "size"]
        bound = Bound(ceiling, "dBi", "ceiling for this size")
        yield Conflict(
            severity=severity,
            claims=(gain.id, *(c.id for c in sizes)),
            message=(
                f"The sheet claims {gain_words(gain)}{band_words(gain)} from a body of at most "
                f"{figure(facts.longest_mm or 0.0, 'mm', 0)}. A body of that size reaches "
                f"{figure(ceiling, 'dBi')} by itself; the claim is {figure(excess, 'dB')} above."
                + (" A board, case or vehicle that radiates with it may explain the rest."
                   if steps else "")
            ),
            question="On which board, case or ground plane, and of what size, was the gain measured?",
            working=f"max(3, (ka)² + 2ka) = {ceiling:.2f} dBi",
            assumption="Would hold if a larger structure radiates with the antenna.",
            margin_db=excess,
            bound=bound,
            ruler=ruler(gain, TIERS, above(ceiling), bound),
        )  # fmt: skip
