"""Measured patterns over the whole sphere: directivity, average gain, beam efficiency, cuts.

A pattern is levels in dB on a grid of polar angle θ (0 to 180° from the z axis) and azimuth φ.
Levels may be relative (only differences count) or absolute in dBi (then the average over the
sphere is the efficiency). Integration treats the power as linear in θ between grid lines and
weights sin θ exactly, so that a uniform pattern gives exactly 0 dBi on any grid; φ is taken as
periodic. Terms of IEEE Std 145.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike

from specs.errors import BeamproofError
from specs.physics.elementwise import Floats


class PatternError(BeamproofError):
    """A pattern table does not cover what its figures are asked of."""

    code = "pattern-unusable"
    advice = "Export the pattern over the whole sphere, or as two principal cuts of 360°."


@dataclass(frozen=True, eq=False)
class SpherePattern:
    """Levels in dB, shape (θ, φ), on ascending ``theta_deg`` (0 to 180) and ``phi_deg``.

    Build it with ``sphere_pattern``, which checks the grid.
    """

    theta_deg: Floats
    phi_deg: Floats
    level_db: Floats

    @property
    def weights(self) -> Floats:
        """Solid angle of each grid point, sr, shape (θ, φ); they add up to 4π."""
        around = _azimuth_weights(self.phi_deg)
        return _polar_weights(self.theta_deg)[:, None] * around[None, :]

    @property
    def power(self) -> Floats:
        """Linear power."""
        power: Floats = np.power(10.0, self.level_db / 10)
        return power

    @property
    def peak(self) -> tuple[float, float]:
        """(θ, φ) of the highest level, degrees."""
        row, column = np.unravel_index(np.argmax(self.level_db), self.level_db.shape)
        return float(self.theta_deg[row]), float(self.phi_deg[column])


def sphere_pattern(theta_deg: ArrayLike, phi_deg: ArrayLike, level_db: ArrayLike) -> SpherePattern:
    """A checked pattern from grid lines and levels of shape (θ, φ).

    The grid must reach within one step of both poles and go all the way around; -inf is a null.
    Raises ``PatternError`` and says what is missing.

    >>> pattern = sphere_pattern(range(0, 181, 10), range(0, 360, 10), [[0.0] * 36] * 19)
    >>> round(float(pattern.weights.sum()), 4)
    12.5664
    """
    theta, phi, level = (np.asarray(a, dtype=np.float64) for a in (theta_deg, phi_deg, level_db))
    if theta.ndim != 1 or phi.ndim != 1 or level.shape != (theta.size, phi.size):
        raise PatternError(f"{level.shape} levels do not fit {theta.size} θ by {phi.size} φ.")
    if theta.size < 3 or phi.size < 3:
        raise PatternError(f"A grid of {theta.size} θ by {phi.size} φ is too coarse.")
    if not (np.all(np.diff(theta) > 0) and np.all(np.diff(phi) > 0)):
        raise PatternError("The grid lines are not in ascending order.")
    if np.isnan(level).any() or np.isposinf(level).any() or not np.isfinite(level).any():
        raise PatternError("Some levels are missing or not numbers.")
    step = float(np.diff(theta).max())
    if theta[0] < 0 or theta[-1] > 180 or theta[0] > step or theta[-1] < 180 - step:
        raise PatternError(f"θ runs from {theta[0]:g} to {theta[-1]:g}°, not from 0 to 180°.")
    if float(np.diff(phi).max()) > 45 or phi[-1] - phi[0] < 360 - 1.01 * float(np.diff(phi).max()):
        raise PatternError(f"φ runs from {phi[0]:g} to {phi[-1]:g}°, not all the way around.")
    if phi[-1] - phi[0] > 360:
        raise PatternError(f"φ runs from {phi[0]:g} to {phi[-1]:g}°, more than once around.")
    return SpherePattern(theta, phi, level)


def directivity_dbi(pattern: SpherePattern) -> float:
    """Peak directivity 4π·Umax/∮U dΩ, dBi, of relative or absolute levels.

    >>> pattern = sphere_pattern(range(0, 181, 10), range(0, 360, 10), [[-7.0] * 36] * 19)
    >>> abs(round(directivity_dbi(pattern), 9))
    0.0
    """
    return float(pattern.level_db.max()) - average_gain_db(pattern)


def average_gain_db(pattern: SpherePattern) -> float:
    """Power gain averaged over the sphere, dB: the radiation efficiency when levels are dBi.

    A result above 0 dB is impossible for gain.

    >>> pattern = sphere_pattern(range(0, 181, 10), range(0, 360, 10), [[-1.0] * 36] * 19)
    >>> round(average_gain_db(pattern), 9)
    -1.0
    """
    return float(10 * np.log10((pattern.power * pattern.weights).sum() / (4 * np.pi)))


def beam_efficiency(pattern: SpherePattern, half_angle_deg: float) -> float:
    """Share of the radiated power within a cone around the peak, 0 to 1 (IEEE Std 145).

    >>> pattern = sphere_pattern(range(0, 181, 2), range(0, 360, 5), [[0.0] * 72] * 91)
    >>> round(beam_efficiency(pattern, 90.0), 3)
    0.5
    """
    step = float(np.diff(pattern.theta_deg).max())
    # A grid point stands for a cell one step wide: the cone's edge takes part of it.
    inside = np.clip(0.5 + (half_angle_deg - off_peak_deg(pattern)) / step, 0.0, 1.0)
    power = pattern.power * pattern.weights
    return float((power * inside).sum() / power.sum())


def off_peak_deg(pattern: SpherePattern) -> Floats:
    """Angle of each grid point from the peak, degrees, shape (θ, φ).

    >>> pattern = sphere_pattern([0, 90, 180], [0, 45, 90, 135, 180, 225, 270, 315],
    ...                          [[0.0] * 8, [-9.0] * 8, [-20.0] * 8])
    >>> [round(float(angle)) for angle in off_peak_deg(pattern)[:, 0]]
    [0, 90, 180]
    """
    theta, phi = np.radians(pattern.theta_deg)[:, None], np.radians(pattern.phi_deg)[None, :]
    theta0, phi0 = np.radians(pattern.peak)
    cosine = np.cos(theta) * np.cos(theta0) + np.sin(theta) * np.sin(theta0) * np.cos(phi - phi0)
    angle: Floats = np.degrees(np.arccos(np.clip(cosine, -1.0, 1.0)))
    return angle


def half_power_solid_angle(pattern: SpherePattern) -> float:
    """Solid angle in which the level is within 3.0103 dB of the peak, sr: 8π over it bounds D.

    >>> pattern = sphere_pattern(range(0, 181, 10), range(0, 360, 10), [[0.0] * 36] * 19)
    >>> round(half_power_solid_angle(pattern), 4)
    12.5664
    """
    inside = pattern.power >= pattern.power.max() / 2
    return float(pattern.weights[inside].sum())


def _polar_weights(theta_deg: Floats) -> Floats:
    """∫hat(θ)·sin θ dθ of each grid line; the first and last reach to their pole."""
    theta = np.radians(theta_deg)
    low, high = theta[:-1], theta[1:]
    width = high - low
    rise = (np.sin(high) - np.sin(low)) / width
    weights = np.zeros_like(theta)
    weights[:-1] += np.cos(low) - rise
    weights[1:] += rise - np.cos(high)
    weights[0] += 1 - np.cos(theta[0])
    weights[-1] += 1 + np.cos(theta[-1])
    return weights


def _azimuth_weights(phi_deg: Floats) -> Floats:
    """Half of the gaps on both sides of each grid line, around the circle."""
    phi = np.radians(phi_deg)
    gaps = np.append(np.diff(phi), phi[0] + 2 * np.pi - phi[-1])
    weights: Floats = (gaps + np.roll(gaps, 1)) / 2
    return weights
