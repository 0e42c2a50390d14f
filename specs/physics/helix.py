"""Axial-mode helices: gain and beamwidth from circumference, spacing and turns."""

# mypy: no-warn-return-any
from __future__ import annotations

import numpy as np

from specs.physics.decibels import to_db
from specs.physics.elementwise import Real, elementwise


@elementwise
def king_wong_dbic(circumference_wl: Real, spacing_wl: Real, turns: Real) -> Real:
    """Gain of an axial-mode helix, dBic, fitted to measurements.

    8.3·(C/λ)^(√(N+2)−1)·(NS/λ)^0.8·(tan 12.5°/tan α)^(√N/2) with tan α = S/C; C from 0.75 to
    1.33 λ, N from 5 to 35 turns. The measured peak frequency is meant: C/λ about 1.05 to 1.15.
    Source: King & Wong, IEEE Trans. AP-28, 291–296, 1980 (from memory).

    >>> round(king_wong_dbic(1.05, 1.05 * 0.2217, 10.0), 2)
    12.65
    """
    pitch = spacing_wl / circumference_wl
    return to_db(
        8.3
        * np.power(circumference_wl, np.sqrt(turns + 2.0) - 1.0)
        * np.power(turns * spacing_wl, 0.8)
        * np.power(np.tan(np.radians(12.5)) / pitch, np.sqrt(turns) / 2.0)
    )


@elementwise
def kraus_helix_dbi(circumference_wl: Real, spacing_wl: Real, turns: Real) -> Real:
    """Directivity 12·C²·N·S, dBi: 2 to 4 dB above measurements for more than 10 turns.

    Source: Kraus & Marhefka, *Antennas*, 3rd ed., Example 8-5.2.

    >>> round(kraus_helix_dbi(1.0, 0.25, 16.0), 1)
    16.8
    """
    return to_db(12 * np.square(circumference_wl) * turns * spacing_wl)


@elementwise
def helix_beamwidth_deg(circumference_wl: Real, spacing_wl: Real, turns: Real) -> Real:
    """Half-power beamwidth 52/(C·√(NS)), degrees.

    Source: Kraus & Marhefka, *Antennas*, 3rd ed., ch. 8.

    >>> helix_beamwidth_deg(1.0, 0.25, 16.0)
    26.0
    """
    return 52.0 / (circumference_wl * np.sqrt(turns * spacing_wl))
