"""gain-outside-type-range: more gain than antennas of this type have."""

from __future__ import annotations

import math
from collections.abc import Iterator

from specs.claims import AntennaType
from specs.rules.facts import Facts
from specs.rules.finding import Bound, Severity
from specs.rules.needs import GAIN
from specs.rules.rule import Conflict, rule
from specs.rules.tiers import Tiers, above, ruler, softened, standing
from specs.rules.words import figure, gain_words, stated

ORDINARY_TOP_DBI: dict[str, float] = {
    AntennaType.DIPOLE: 2.5,
    AntennaType.MONOPOLE: 5.5,
    AntennaType.PATCH: 9.0,
    AntennaType.CHIP: 5.0,
    AntennaType.LOG_PERIODIC: 12.0,
    AntennaType.CORNER_REFLECTOR: 14.0,
    AntennaType.POSITIONING: 8.0,
}
"""The top of the ordinary range of a single antenna of each type (common practice, no source)."""

TIERS: Tiers = ((0.0, None), (1.0, Severity.NOTE), (3.0, Severity.DOUBTFUL),
                (math.inf, Severity.IMPLAUSIBLE))  # fmt: skip


@rule(
    id="gain-outside-type-range",
    topic="gain against size",
    needs=(GAIN,),
    applies=lambda facts: facts.antenna.type in ORDINARY_TOP_DBI,
    formula="ordinary range of the type",
    source="common practice, no source",
    tiers=(("within", "ordinary"), ("≤ 1 dB above", "note"), ("≤ 3", "doubtful"),
           ("more", "implausible"), ("type inferred from words", "one tier lower")),
)  # fmt: skip
def gain_outside_type_range(facts: Facts) -> Iterator[Conflict]:
    """Gain above the ordinary range of the type.

    What it checks
    --------------
    The gain is not above what single antennas of the type ordinarily have.

    Why it must hold
    ----------------
    Nothing forbids it, but a patch of 14 dBi or a log-periodic of 18 dBi is an array, or another
    antenna's figure.

    Flagged
    -------
    Log-periodic antenna
    Frequency: 698-2700 MHz
    Gain: 18 dBi

    Accepted
    --------
    Log-periodic antenna
    Frequency: 698-2700 MHz
    Gain: 9 dBi
    """
    top = ORDINARY_TOP_DBI[facts.antenna.type or ""]
    for gain in facts.gains:
        excess = gain.normalized.low - top
        severity = softened(standing(excess, TIERS), 1 if facts.antenna.type_inferred else 0)
        if severity is None:
            continue
        bound = Bound(top, "dBi", f"ordinary top for a {facts.antenna.type}")
        yield Conflict(
            severity=severity,
            claims=(gain.id,),
            message=(
                f"The sheet claims {gain_words(gain)} for a {facts.antenna.type}. Single antennas "
                f"of that type ordinarily reach {figure(top, 'dBi')}; the claim is "
                f"{figure(excess, 'dB')} above."
            ),
            question=f"Is the antenna an array, and is {stated(gain)} the gain of all of it?",
            working=f"{gain.normalized.low:.2f} − {top:g} = {excess:.2f} dB",
            margin_db=excess,
            bound=bound,
            ruler=ruler(gain, TIERS, above(top), bound),
        )
