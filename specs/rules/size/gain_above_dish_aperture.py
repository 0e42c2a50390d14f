"""gain-above-dish-aperture: more gain than the reflector can gather."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator

from specs.claims import AntennaType
from specs.physics.aperture import dish_ceiling_dbi, dish_efficiency, dish_gain_dbi
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import DIAMETER, FREQUENCY, GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, ruler, standing
from specs.rules.words import figure, gain_words, stated

ORDINARY_LOW = 0.40
TIERS: Tiers = ((0.80, None), (0.85, Severity.NOTE), (1.0, Severity.DOUBTFUL),
                (math.inf, Severity.IMPLAUSIBLE))  # fmt: skip
LOW_NOTE = 0.30


@rule(
    id="gain-above-dish-aperture",
    topic="gain against size",
    needs=(GAIN, FREQUENCY, DIAMETER),
    applies=lambda facts: facts.antenna.type == AntennaType.DISH,
    formula="η = G / (πd/λ)²",
    source=(
        "Silver, MIT Rad. Lab. vol. 12, 1949; IEEE Std 145-2013, aperture efficiency; ordinary "
        "range confirmed on 3070 open records of licensed dishes (0.36 to 0.76)"
    ),
    tiers=(
        ("η 0.40 to 0.80", "ordinary"), ("0.30 to 0.40 or 0.80 to 0.85", "note"),
        ("0.85 to 1.0 or below 0.30", "doubtful"), ("above 1", "implausible"),
        ("above (ka)² + 2ka and 4πA/λ² + 0.5 dB", "impossible"),
    ),
)  # fmt: skip
def gain_above_dish_aperture(facts: Facts) -> Iterator[Conflict]:
    """Dish gain against its diameter.

    What it checks
    --------------
    The stated gain needs no more of the reflector's area than a feed can light.

    Why it must hold
    ----------------
    A dish gathers what falls on its area. At 100 % aperture efficiency its gain is (πd/λ)²;
    real feeds, spill-over and blockage leave 50 to 75 %.

    Flagged
    -------
    Parabolic dish antenna
    Frequency: 5725-5875 MHz
    Gain: 36 dBi
    Diameter: 0.9 m

    Accepted
    --------
    Parabolic dish antenna
    Frequency: 5725-5875 MHz
    Gain: 32.5 dBi
    Diameter: 0.9 m
    """
    diameter = facts.size("diameter", "height", "length", "width")
    if diameter is None or math.isinf(diameter.normalized.high):
        return
    for gain in facts.gains:
        wavelength = facts.wavelength_mm(gain)
        if wavelength is None:
            continue
        size = diameter.normalized.high / wavelength
        least, most = gain.normalized.low, gain.normalized.high
        efficiency = float(dish_efficiency(least, size))
        severity = standing(efficiency, TIERS)
        if least > max(float(dish_ceiling_dbi(size)), float(dish_gain_dbi(size)) + 0.5):
            severity = Severity.IMPOSSIBLE
        full = float(dish_gain_dbi(size))
        if severity is None:
            yield from _low(facts, gain.id, most, diameter.normalized.low, wavelength)
            continue
        top = float(dish_gain_dbi(size, 0.80))
        bound = (
            Bound(full, "dBi", "100 % aperture efficiency")
            if severity.rank >= Severity.IMPLAUSIBLE.rank
            else Bound(top, "dBi", "80 % aperture efficiency")
        )
        yield Conflict(
            severity=severity,
            claims=(gain.id, diameter.id),
            message=(
                f"The sheet claims {gain_words(gain)} from a reflector of {stated(diameter)}. At "
                f"{299792.458 / wavelength:.0f} MHz that needs {100 * efficiency:.0f} % of its "
                f"area; the whole area would give {figure(full, 'dBi')} and well-built dishes "
                f"reach {figure(top, 'dBi')}. The claim is {figure(least - bound.value, 'dB')} above "
                f"the {bound.name.replace('100 %', 'full').replace('80 %', '80 %')} mark."
            ),
            question=(
                f"A {stated(diameter)} reflector gives at most {figure(full, 'dBi')} at "
                f"{299792.458 / wavelength:.0f} MHz. At which frequency, and against which "
                f"reference, is {stated(gain)} measured?"
            ),
            working=f"η = 10^({least:.2f}/10)/(π·{size:.2f})² = {efficiency:.2f}",
            assumption="Would hold if the reflector were larger than stated, or the gain in dB "
            "over something other than an isotropic source.",
            margin_db=least - bound.value,
            bound=bound,
            ruler=ruler(gain, TIERS, _gain_at(size), bound),
        )


def _gain_at(size: float) -> Callable[[float], float]:
    """Gain in dBi of a dish of this diameter in wavelengths at an aperture efficiency."""
    return lambda efficiency: float(dish_gain_dbi(size, efficiency))


def _low(
    facts: Facts, gain_id: str, most: float, diameter_mm: float, wavelength: float
) -> Iterator[Conflict]:
    """A gain so low for its diameter that a figure may be misprinted."""
    if math.isinf(most) or diameter_mm <= 0:
        return
    size = diameter_mm / wavelength
    efficiency = float(dish_efficiency(most, size))
    if efficiency >= ORDINARY_LOW:
        return
    severity = Severity.NOTE if efficiency >= LOW_NOTE else Severity.DOUBTFUL
    ordinary = float(dish_gain_dbi(size, ORDINARY_LOW))
    diameter = facts.size("diameter", "height", "length", "width")
    yield Conflict(
        severity=severity,
        claims=(gain_id,) if diameter is None else (gain_id, diameter.id),
        message=(
            f"The stated gain uses only {100 * efficiency:.0f} % of the reflector's area; dishes "
            f"ordinarily use more than {100 * ORDINARY_LOW:.0f} %, which would be "
            f"{figure(ordinary, 'dBi')}. The claim is {figure(ordinary - most, 'dB')} below that."
        ),
        question="Is the diameter that of the reflector, and the gain that of this band?",
        working=f"η = 10^({most:.2f}/10)/(π·{size:.2f})² = {efficiency:.2f}",
        margin_db=ordinary - most,
        bound=Bound(ordinary, "dBi", "40 % aperture efficiency"),
    )
