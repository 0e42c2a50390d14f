"""Cautions that go with every report: exposure, limits of power, masts, lightning.

They name the rules that commonly apply and judge nothing: local codes and licensed practice decide.
"""

from __future__ import annotations

from specs.claims import Quantity, Sheet

EIRP = (
    "Radiated power follows the true gain: an understated gain breaks limits on EIRP, an "
    "overstated one breaks the link. Rules that commonly apply: 47 CFR 15.247 and 15.407, "
    "EN 300 328, EN 301 893. Compliance is not judged here."
)
EXPOSURE = (
    "Keep people at the distance that the exposure rules demand (ICNIRP 2020, 47 CFR 1.1310). "
    "The far-field estimate S = P·G/(4πR²) does not hold close to the antenna."
)
MAST = (
    "Masts, wind and lightning: ANSI/TIA-222, EN 1991-1-4 and IEC 62305 are named only as "
    "pointers. Local codes and licensed practice decide."
)


def cautions(sheet: Sheet) -> tuple[str, ...]:
    """The cautions for a sheet: all of them as soon as it states a gain."""
    has_gain = any(c.quantity is Quantity.GAIN for a in sheet.antennas for c in a.claims)
    return (EIRP, EXPOSURE, MAST) if has_gain else (MAST,)
