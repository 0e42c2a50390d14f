"""dbi-dbd-pair-disagrees: one gain on two references must differ by 2.15 dB."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Claim, Quantity
from specs.rules.facts import Facts, pairs
from specs.rules.finding import Bound
from specs.rules.rule import Conflict, Need, rule
from specs.rules.tiers import difference_tiers, standing
from specs.rules.words import figure, stated
from specs.units.levels import DIPOLE_OFFSET_DB

TIERS = difference_tiers(0.06, 0.2, 1.0)


def _on(facts: Facts, unit: str) -> tuple[Claim, ...]:
    return tuple(g for g in facts.of(Quantity.GAIN) if g.stated.unit == unit)


BOTH = Need(
    "the gain both in dBi and in dBd",
    lambda facts: bool(_on(facts, "dBi")) and bool(_on(facts, "dBd")),
)


@rule(
    id="dbi-dbd-pair-disagrees",
    topic="reference and unit",
    needs=(BOTH,),
    formula="G(dBi) − G(dBd) = 2.15 dB",
    source="half-wave dipole 4/Cin(2π) = 1.6409, 2.151 dBi (Balanis, ch. 4); 2.15 by convention",
    tiers=(("≤ 0.06 dB off", "ordinary"), ("≤ 0.2", "note"), ("≤ 1", "doubtful"),
           ("more", "implausible")),
)  # fmt: skip
def dbi_dbd_pair_disagrees(facts: Facts) -> Iterator[Conflict]:
    """Gain in dBi and dBd of one antenna off 2.15 dB.

    What it checks
    --------------
    Where a sheet states one gain in dBi and in dBd, the two differ by 2.15 dB.

    Why it must hold
    ----------------
    Both describe the same field; only the reference antenna differs, by the gain of a half-wave
    dipole.

    Flagged
    -------
    Frequency: 440-470 MHz
    Gain: 7.5 dBi
    Gain: 7.5 dBd

    Accepted
    --------
    Frequency: 440-470 MHz
    Gain: 9.65 dBi
    Gain: 7.5 dBd
    """
    for dbi, dbd in pairs(_on(facts, "dBi"), _on(facts, "dBd")):
        if dbi.statistic != dbd.statistic and dbi.statistic and dbd.statistic:
            continue
        offset = dbi.stated.low - dbd.stated.low
        rounding = dbi.stated.half_step + dbd.stated.half_step
        off = abs(offset - DIPOLE_OFFSET_DB)
        severity = standing(max(off - rounding, 0.0) if off <= rounding else off, TIERS)
        if severity is None:
            continue
        yield Conflict(
            severity=severity,
            claims=(dbi.id, dbd.id),
            message=(
                f"The sheet states the gain as {stated(dbi)} and as {stated(dbd)}. The two differ "
                f"by {figure(offset, 'dB', 2)}, where one antenna on both references differs by "
                f"2.15 dB."
            ),
            question=f"Which holds: {stated(dbi)} or {stated(dbd)}?",
            working=f"{dbi.stated.low:g} dBi − {dbd.stated.low:g} dBd = {offset:.2f} dB",
            margin_db=off,
            bound=Bound(DIPOLE_OFFSET_DB, "dB", "dBi less dBd"),
        )
