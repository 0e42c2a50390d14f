"""gain-looks-like-amplifier: the figure is an amplifier's."""

from __future__ import annotations

from collections.abc import Iterator

from specs.claims import Quantity
from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.rule import Conflict, Need, rule
from specs.rules.words import stated


def _set_aside(facts: Facts) -> list[str]:
    """Gains of an amplifier that reading put aside for this antenna."""
    return [
        u.text for u in facts.sheet.unread
        if u.reason == "amplifier" and u.quantity is Quantity.GAIN
        and u.antenna in (None, facts.antenna.label)
    ]  # fmt: skip


SOME = Need("a gain", lambda f: bool(f.of(Quantity.GAIN)) or bool(_set_aside(f)))


@rule(
    id="gain-looks-like-amplifier",
    topic="reference and unit",
    needs=(SOME,),
    formula="gain above 15 dB beside a noise figure, a supply or an LNA",
    source="common practice, no source",
    tiers=(("no separate gain of the element", "unclear"), ("element gain stated too", "note")),
)
def gain_looks_like_amplifier(facts: Facts) -> Iterator[Conflict]:
    """Amplifier gain printed as antenna gain.

    What it checks
    --------------
    An active or positioning antenna states the gain of its element apart from that of its
    amplifier.

    Why it must hold
    ----------------
    A positioning element has a few dBi. 28 dB beside a noise figure and a supply voltage is the
    low noise amplifier's, and says nothing about the antenna.

    Flagged
    -------
    Active GNSS antenna
    Frequency: 1575.42 MHz
    Gain: 28 dBi
    Noise figure: 1.5 dB
    Supply voltage: 3-5 VDC

    Accepted
    --------
    Active GNSS antenna
    Frequency: 1575.42 MHz
    Gain: 4 dBic
    Polarization: RHCP
    Noise figure: 1.5 dB
    """
    elements = facts.gains
    amplified = [g for g in facts.of(Quantity.GAIN) if facts.amplified(g)]
    severity = Severity.NOTE if elements else Severity.UNCLEAR
    texts = [stated(g) for g in amplified] or _set_aside(facts)[:1]
    if not texts:
        return
    yield Conflict(
        severity=severity,
        claims=tuple(g.id for g in amplified),
        message=(
            f"The sheet prints '{texts[0]}' beside an amplifier's figures. That is the gain of the "
            "amplifier; it is not used as the gain of the antenna."
            + ("" if elements else " No gain of the antenna itself is stated.")
        ),
        question=(
            "What is the gain of the antenna element alone, in dBic or dBi, without the amplifier?"
        ),
    )
