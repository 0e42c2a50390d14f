"""gain-above-helix: more gain than an axial-mode helix of that length has."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import AntennaType
from specs.physics.helix import king_wong_dbic
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import FREQUENCY, GAIN, LENGTH
from specs.rules.rule import Conflict, Need, rule
from specs.rules.tiers import Tiers, above, ruler, standing
from specs.rules.words import figure, gain_words, stated

TIERS: Tiers = ((1.0, None), (2.0, Severity.NOTE), (3.0, Severity.DOUBTFUL),
                (math.inf, Severity.IMPLAUSIBLE))  # fmt: skip
DIAMETER = Need("the diameter of the helix", lambda f: f.size("diameter", "width") is not None)
PITCH_DEG = 13.0
_LEAST_TURNS, _MOST_TURNS = 5.0, 35.0
_LEAST_CIRCUMFERENCE, _MOST_CIRCUMFERENCE = 0.75, 1.33


@rule(
    id="gain-above-helix",
    topic="gain against size",
    needs=(GAIN, FREQUENCY, LENGTH, DIAMETER),
    applies=lambda facts: facts.antenna.type == AntennaType.HELIX and facts.circular,
    formula="King and Wong: 8.3(πD/λ)^(√(N+2)−1)·(NS/λ)^0.8·[tan 12.5°/tan α]^(√N/2)",
    source="King & Wong, IEEE Trans. AP-28, 291–296, 1980 (from memory); C 0.75–1.33 λ, N 5–35",
    tiers=(("≤ 1 dB above", "ordinary"), ("≤ 2", "note"), ("≤ 3", "doubtful"),
           ("more", "implausible")),
)  # fmt: skip
def gain_above_helix(facts: Facts) -> Iterator[Conflict]:
    """Helix gain against its length.

    What it checks
    --------------
    The gain of an axial-mode helix is what measured helices of its length and diameter have.

    Why it must hold
    ----------------
    A helix in axial mode is an end-fire antenna; the classical textbook formula is 2 to 4 dB too
    hopeful for many turns.

    Flagged
    -------
    Helix antenna
    Frequency: 2400-2500 MHz
    Gain: 20 dBic
    Polarization: RHCP
    Length: 280 mm
    Diameter: 40 mm

    Accepted
    --------
    Helix antenna
    Frequency: 2400-2500 MHz
    Gain: 12 dBic
    Polarization: RHCP
    Length: 280 mm
    Diameter: 40 mm
    """
    length, diameter = facts.size("length", "height", "depth"), facts.size("diameter", "width")
    if length is None or diameter is None:
        return
    for gain in facts.gains:
        wavelength = facts.wavelength_mm(gain)
        if wavelength is None:
            continue
        circumference = math.pi * diameter.normalized.nominal / wavelength
        spacing = circumference * math.tan(math.radians(PITCH_DEG))
        turns = length.normalized.high / wavelength / spacing
        if not (_LEAST_CIRCUMFERENCE <= circumference <= _MOST_CIRCUMFERENCE):
            continue
        if not (_LEAST_TURNS <= turns <= _MOST_TURNS):
            continue
        usual = float(king_wong_dbic(circumference, spacing, turns))
        excess = gain.normalized.low - usual
        severity = standing(excess, TIERS)
        if severity is None:
            continue
        bound = Bound(usual, "dBi", "measured helices of this size")
        yield Conflict(
            severity=severity,
            claims=(gain.id, length.id, diameter.id),
            message=(
                f"The sheet claims {gain_words(gain)} from a helix {stated(length)} long and "
                f"{stated(diameter)} wide. Measured helices of that size have about "
                f"{figure(usual, 'dBic')}; the claim is {figure(excess, 'dB')} above."
            ),
            question=f"How many turns has the helix, and is {stated(gain)} measured or computed?",
            working=f"C = {circumference:.2f} λ, N ≈ {turns:.0f}, pitch {PITCH_DEG:g}°: "
            f"{usual:.1f} dBic",
            assumption="A pitch angle of 13° is assumed where the sheet names none.",
            margin_db=excess,
            bound=bound,
            ruler=ruler(gain, TIERS, above(usual), bound),
        )
