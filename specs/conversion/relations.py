"""The table of relations between scales.

A row leads from one scale to another: function, formula, source, the condition it needs and the
assumption it makes. Formulas are templates: {x} the figure, {y} the result, {f} the condition.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

from specs.conversion.scales import ANGLES, AREAS, FREQUENCIES, LENGTHS, POWERS
from specs.physics import antenna_factor, aperture, mismatch
from specs.physics.constants import CIRCULAR_OVER_LINEAR_DB, SPEED_OF_LIGHT
from specs.physics.decibels import from_db, to_db
from specs.physics.directivity import efficiency_from_resistances
from specs.units.levels import DIPOLE_OFFSET_DB, REFERENCES
from specs.units.linear import factor

Key = tuple[str, str]
"""(quantity, unit) of a scale."""

CONDITIONS: dict[str, tuple[str, str, str]] = {
    "frequency": ("the frequency", "MHz", "450 MHz"),
    "loss_resistance": ("the loss resistance", "ohm", "4 ohm"),
}
"""Condition -> (its name in words, the unit it is taken in, an example)."""


@dataclass(frozen=True, slots=True)
class Relation:
    """One row: how a figure on scale ``start`` reads on scale ``end``.

    ``function`` takes the figure and the condition (nan when none is needed). ``open_db`` is how
    far the result may lie from the formula where the scale leaves a meaning open (a bare dB).
    """

    start: Key
    end: Key
    function: Callable[[float, float], float]
    formula: str
    source: str
    needs: str | None = None
    assumption: str | None = None
    open_db: tuple[float, float] = (0.0, 0.0)


_DIPOLE = "convention: half-wave dipole 2.15 dBi (exact 2.1509; Balanis, Antenna Theory, ch. 4)"
_DECIBEL = "definition of the decibel"
_AREA = "A = Gλ²/4π (IEEE Std 145)"
_FACTOR = "AF = E/V into 50 Ω, from c and η0"
_REFLECTION = "Pozar, Microwave Engineering, ch. 2"
_GAUSS = "Gaussian lobe: level in dB grows with the square of the angle"
_METRE = "c = 299 792 458 m/s"
_MATCHED = "the antenna is matched to a 50 Ω load"
_WAVE_MM = SPEED_OF_LIGHT * 1e-3


def _shift(db: float) -> Callable[[float, float], float]:
    return lambda x, _: round(x + db, 9)


def _times(scale: float) -> Callable[[float, float], float]:
    return lambda x, _: x * scale


def _wave(x: float, _: float) -> float:
    return _WAVE_MM / x if x else math.inf


def _same(x: float, _: float) -> float:
    return x


_DBI, _DBD, _X = ("gain", "dBi"), ("gain", "dBd"), ("gain", "x")
_AF, _AE = ("antenna factor", "dB/m"), ("effective area", "m2")
_GAMMA, _VSWR = ("reflection coefficient", ""), ("VSWR", "")
_RL, _ML = ("return loss", "dB"), ("mismatch loss", "dB")
_PERCENT, _EFF_DB, _EFF_X = ("efficiency", "%"), ("efficiency", "dB"), ("efficiency", "x")
_CIRCULAR = REFERENCES["dBic"].assumption
_LINEAR = REFERENCES["dBil"].assumption

_GAIN = (
    Relation(_DBD, _DBI, _shift(DIPOLE_OFFSET_DB), "{x} dBd + 2.15 = {y} dBi", _DIPOLE),
    Relation(_DBI, _DBD, _shift(-DIPOLE_OFFSET_DB), "{x} dBi − 2.15 = {y} dBd", _DIPOLE),
    Relation(("gain", "dBic"), _DBI, _same, "{x} dBic = {y} dBi of total power",
             "IEEE Std 145", assumption=_CIRCULAR),
    Relation(_DBI, ("gain", "dBic"), _same, "{x} dBi of total power = {y} dBic", "IEEE Std 145",
             assumption=_CIRCULAR),
    Relation(("gain", "dBil"), _DBI, _same, "{x} dBil + 0 to 3.01 = {y} dBi or more",
             "power of two equal components: 10 log 2 = 3.01 dB", assumption=_LINEAR,
             open_db=(0.0, CIRCULAR_OVER_LINEAR_DB)),
    Relation(_DBI, ("gain", "dBil"), _same, "{x} dBi − 0 to 3.01 = {y} dBil or less",
             "power of two equal components: 10 log 2 = 3.01 dB", assumption=_LINEAR,
             open_db=(-CIRCULAR_OVER_LINEAR_DB, 0.0)),
    Relation(("gain", "dB"), _DBI, _same, "{x} dB = {y} dBi, or 2.15 more if dBd is meant",
             _DIPOLE, assumption=REFERENCES["dB"].assumption, open_db=(0.0, DIPOLE_OFFSET_DB)),
    Relation(_DBI, _X, lambda x, _: from_db(x), "10^({x}/10) = {y}", _DECIBEL),
    Relation(_X, _DBI, lambda x, _: to_db(x), "10·log10({x}) = {y} dBi", _DECIBEL,
             assumption="the plain ratio is against an isotropic radiator"),
    Relation(_DBI, _AF, antenna_factor.antenna_factor_db,
             "20·log10({f} MHz) − {x} dBi − 29.774 = {y} dB/m", _FACTOR, "frequency", _MATCHED),
    Relation(_AF, _DBI, antenna_factor.gain_from_antenna_factor_dbi,
             "20·log10({f} MHz) − {x} dB/m − 29.774 = {y} dBi", _FACTOR, "frequency", _MATCHED),
    Relation(_DBI, _AE, aperture.effective_area_m2,
             "10^({x}/10)·(299.792 m/{f})²/4π = {y} m²", _AREA, "frequency"),
    Relation(_AE, _DBI, aperture.gain_from_effective_area_dbi,
             "10·log10[4π·{x} m²/(299.792 m/{f})²] = {y} dBi", _AREA, "frequency"),
)  # fmt: skip

_PORT = (
    Relation(_VSWR, _GAMMA, lambda x, _: mismatch.reflection_from_vswr(x),
             "|Γ| = ({x} − 1)/({x} + 1) = {y}", _REFLECTION),
    Relation(_GAMMA, _VSWR, lambda x, _: mismatch.vswr_from_reflection(x),
             "(1 + {x})/(1 − {x}) = {y}", _REFLECTION),
    Relation(_GAMMA, _RL, lambda x, _: mismatch.return_loss_from_reflection(x),
             "−20·log10({x}) = {y} dB", _REFLECTION),
    Relation(_RL, _GAMMA, lambda x, _: mismatch.reflection_from_return_loss(x),
             "|Γ| = 10^(−{x}/20) = {y}", _REFLECTION),
    Relation(_GAMMA, _ML, lambda x, _: mismatch.mismatch_loss_from_reflection(x),
             "−10·log10(1 − {x}²) = {y} dB", _REFLECTION),
    Relation(_ML, _GAMMA, lambda x, _: mismatch.reflection_from_mismatch_loss(x),
             "|Γ| = √(1 − 10^(−{x}/10)) = {y}", _REFLECTION),
)  # fmt: skip

_EFFICIENCY = (
    Relation(_PERCENT, _EFF_X, _times(0.01), "{x} % = {y}", "definition of per cent"),
    Relation(_EFF_X, _PERCENT, _times(100.0), "{x} = {y} %", "definition of per cent"),
    Relation(_EFF_DB, _PERCENT, lambda x, _: 100 * from_db(x), "100·10^({x}/10) = {y} %", _DECIBEL),
    Relation(_PERCENT, _EFF_DB, lambda x, _: to_db(x / 100), "10·log10({x}/100) = {y} dB",
             _DECIBEL),
    Relation(("radiation resistance", "ohm"), _PERCENT,
             lambda x, loss: 100 * efficiency_from_resistances(x, loss),
             "100·{x}/({x} + {f}) = {y} %", "IEEE Std 145; Balanis, Antenna Theory, ch. 2",
             "loss_resistance", "both resistances are referred to the same terminals"),
)  # fmt: skip


def _power(quantity: str) -> tuple[Relation, ...]:
    """dBm, dBW and W of one power."""
    dbm, dbw, watt = (quantity, "dBm"), (quantity, "dBW"), (quantity, "W")
    return (
        Relation(dbm, dbw, _shift(-30.0), "{x} dBm − 30 = {y} dBW", _DECIBEL),
        Relation(dbw, dbm, _shift(30.0), "{x} dBW + 30 = {y} dBm", _DECIBEL),
        Relation(dbw, watt, lambda x, _: from_db(x), "10^({x}/10) = {y} W", _DECIBEL),
        Relation(watt, dbw, lambda x, _: to_db(x), "10·log10({x} W) = {y} dBW", _DECIBEL),
        Relation(dbm, watt, lambda x, _: from_db(x - 30), "10^(({x} − 30)/10) = {y} W", _DECIBEL),
        Relation(watt, dbm, lambda x, _: to_db(x) + 30, "10·log10({x} W) + 30 = {y} dBm", _DECIBEL),
    )


_RADIATED = (
    *(relation
    for unit in ("dBm", "dBW")
    for relation in (
        Relation(("EIRP", unit), ("ERP", unit), _shift(-DIPOLE_OFFSET_DB),
                 f"{{x}} {unit} − 2.15 = {{y}} {unit} ERP", _DIPOLE),
        Relation(("ERP", unit), ("EIRP", unit), _shift(DIPOLE_OFFSET_DB),
                 f"{{x}} {unit} + 2.15 = {{y}} {unit} EIRP", _DIPOLE),
    )),
    Relation(("EIRP", "W"), ("ERP", "W"), _times(10 ** (-DIPOLE_OFFSET_DB / 10)),
             "{x} W/1.641 = {y} W ERP", _DIPOLE),
    Relation(("ERP", "W"), ("EIRP", "W"), _times(10 ** (DIPOLE_OFFSET_DB / 10)),
             "{x} W·1.641 = {y} W EIRP", _DIPOLE),
)  # fmt: skip

_BEAMS = tuple(
    Relation(
        (f"beamwidth at −{start} dB", "deg"), (f"beamwidth at −{end} dB", "deg"),
        _times(math.sqrt(levels[0] / levels[1])),
        f"{{x}}°·√({levels[0]:g}/{levels[1]:g}) = {{y}}°", _GAUSS,
        assumption="the lobe is Gaussian down to the wider level",
    )
    for start, end, levels in (
        (10, 3, (3.01, 10.0)), (3, 10, (10.0, 3.01)), (6, 3, (3.01, 6.0)), (3, 6, (6.0, 3.01)),
    )
)  # fmt: skip

_WAVES = (
    Relation(("frequency", "MHz"), ("wavelength", "mm"), _wave,
             "299 792.458/{x} MHz = {y} mm", _METRE),
    Relation(("wavelength", "mm"), ("frequency", "MHz"), _wave,
             "299 792.458/{x} mm = {y} MHz", _METRE),
)  # fmt: skip


def _linear(quantity: str, units: tuple[str, ...]) -> tuple[Relation, ...]:
    """Every pair of linear units; the factor is asked of pint only when the row is used."""
    return tuple(
        Relation(
            (quantity, start), (quantity, end), _factor(start, end), f"{{x}} {start} = {{y}} {end}",
            "definition of the units (SI; international inch and foot)",
        )
        for start in units
        for end in units
        if start != end
    )  # fmt: skip


def _factor(start: str, end: str) -> Callable[[float, float], float]:
    return lambda x, _: x * factor(start, end)


RELATIONS: tuple[Relation, ...] = (
    *_GAIN, *_PORT, *_EFFICIENCY, *_RADIATED, *_BEAMS, *_WAVES,
    *(row for quantity in ("power", "EIRP", "ERP") for row in _power(quantity)),
    *(row for quantity in ("power", "EIRP", "ERP") for row in _linear(quantity, POWERS)),
    *_linear("effective area", AREAS), *_linear("frequency", FREQUENCIES),
    *_linear("length", LENGTHS), *_linear("wavelength", LENGTHS), *_linear("angle", ANGLES),
    *(row for level in (3, 6, 10) for row in _linear(f"beamwidth at −{level} dB", ANGLES)),
)  # fmt: skip
"""Every relation. A conversion is the shortest chain of them."""
