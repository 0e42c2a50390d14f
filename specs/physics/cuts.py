"""Pattern cuts: beamwidth, sidelobe level, front-to-back ratio from levels along one circle."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike

from specs.physics.elementwise import Floats
from specs.physics.pattern import PatternError, SpherePattern

HALF_POWER_DB = 3.010_3


@dataclass(frozen=True, eq=False)
class Cut:
    """Levels in dB along one circle, at ascending angles in degrees. Build it with ``cut``."""

    angle_deg: Floats
    level_db: Floats

    @property
    def peak_deg(self) -> float:
        """Angle of the highest level."""
        return float(self.angle_deg[int(np.argmax(self.level_db))])

    @property
    def closed(self) -> bool:
        """Whether the cut goes all the way around."""
        step = float(np.diff(self.angle_deg).max())
        return bool(self.angle_deg[-1] - self.angle_deg[0] >= 360 - 1.01 * step)

    def at(self, angle_deg: ArrayLike) -> Floats:
        """Levels at any angles, linear in dB between points, around the circle if closed."""
        period = 360.0 if self.closed else None
        floor = np.maximum(self.level_db, -200.0)  # a null at -inf has no straight line to it
        level: Floats = np.interp(
            np.asarray(angle_deg, dtype=np.float64), self.angle_deg, floor, period=period
        )
        return level


def cut(angle_deg: ArrayLike, level_db: ArrayLike) -> Cut:
    """A checked cut, sorted by angle; -inf is a null.

    Raises ``PatternError``.

    >>> cut([0, 90, 180, 270], [0, -10, -20, -10]).peak_deg
    0.0
    """
    angle, level = (np.asarray(a, dtype=np.float64) for a in (angle_deg, level_db))
    if angle.ndim != 1 or angle.shape != level.shape or angle.size < 3:
        raise PatternError(f"{level.size} levels do not fit {angle.size} angles of a cut.")
    if np.isnan(angle).any() or np.isnan(level).any() or np.isposinf(level).any():
        raise PatternError("Some angles or levels of the cut are not numbers.")
    order = np.argsort(angle, kind="stable")
    angle, level = angle[order], level[order]
    keep = np.append(True, np.diff(angle) > 0)
    if angle[-1] - angle[0] > 360.0:
        raise PatternError(f"The cut runs from {angle[0]:g} to {angle[-1]:g}°, more than a circle.")
    return Cut(angle[keep], level[keep])


def beamwidth_deg(pattern: Cut, drop_db: float = HALF_POWER_DB) -> float:
    """Full width at ``drop_db`` below the peak, degrees: the points nearest to the peak.

    Straight lines in dB between points. 360 when a closed cut never falls so far, nan when an open
    one does not.

    >>> lobe = cut([-90, -30, 0, 30, 90], [-20, -6, 0, -6, -20])
    >>> round(beamwidth_deg(lobe), 2)
    30.1
    """
    sides = [_fall(pattern, drop_db, direction) for direction in (1, -1)]
    if None in sides:
        return 360.0 if pattern.closed else float("nan")
    return float(sum(side for side in sides if side is not None))


def sidelobe_level_db(pattern: Cut) -> float:
    """Highest level outside of the main lobe against the peak, dB (negative); -inf for none.

    The main lobe ends at the first minimum beyond the half-power point on either side.

    >>> sidelobe_level_db(cut([-60, -40, -20, 0, 20, 40, 60], [-13, -30, -4, 0, -4, -30, -14]))
    -13.0
    """
    levels, top = pattern.level_db, int(np.argmax(pattern.level_db))
    count = levels.size
    inside = {top}
    for direction in (1, -1):
        index = top
        for _ in range(count - 1):
            following = index + direction
            if not pattern.closed and not 0 <= following < count:
                break
            following %= count
            fallen = levels[index] <= levels[top] - HALF_POWER_DB
            if fallen and levels[following] > levels[index]:
                break
            inside.add(following)
            index = following
    outside = [index for index in range(count) if index not in inside]
    return float(levels[outside].max() - levels[top]) if outside else float("-inf")


def front_to_back_db(pattern: Cut, sector_deg: float = 0.0) -> float:
    """Peak against the level opposite, dB; the worst within ± ``sector_deg`` around opposite.

    nan when the cut does not reach there.

    >>> front_to_back_db(cut([0, 90, 180, 270], [0, -10, -25, -10]))
    25.0
    """
    if not pattern.closed:
        return float("nan")
    behind = pattern.peak_deg + 180 + np.linspace(-sector_deg, sector_deg, 121)
    return float(pattern.level_db.max() - pattern.at(behind).max())


def principal_cuts(pattern: SpherePattern) -> tuple[Cut, Cut]:
    """Two cuts through the peak of a sphere: (around the horizon or across, along the meridian).

    With the peak away from the poles: the cone θ = θ of the peak, as an azimuth cut, and the great
    circle of the peak's meridian, as an elevation cut (angle = 90 − θ in front, on over the top).
    With the peak at a pole: the meridians φ and φ + 90° of the peak.

    >>> import numpy as np
    >>> from specs.physics.pattern import sphere_pattern
    >>> theta, phi = np.arange(0, 181, 5.0), np.arange(0, 360, 5.0)
    >>> dipole = 20 * np.log10(np.maximum(np.sin(np.radians(theta)), 1e-6))
    >>> around, along = principal_cuts(sphere_pattern(theta, phi, dipole[:, None] + 0 * phi))
    >>> beamwidth_deg(around), round(beamwidth_deg(along))
    (360.0, 90)
    """
    theta, phi = pattern.peak
    if min(theta, 180 - theta) < 2.0 * float(np.diff(pattern.theta_deg).max()):
        return _meridian(pattern, phi + 90.0), _meridian(pattern, phi)
    row = int(np.argmin(np.abs(pattern.theta_deg - theta)))
    around = pattern.phi_deg
    once = around < around[0] + 360.0 - 1e-9
    return cut(around[once], pattern.level_db[row][once]), _meridian(pattern, phi)


def _meridian(pattern: SpherePattern, phi_deg: float) -> Cut:
    """The great circle through the z axis: angle 90 − θ on the side of φ, 90 + θ on the other."""
    near, far = (_nearest(pattern, phi) for phi in (phi_deg, phi_deg + 180.0))
    theta = pattern.theta_deg
    angle = np.concatenate([90.0 - theta, 90.0 + theta])
    level = np.concatenate([pattern.level_db[:, near], pattern.level_db[:, far]])
    # The poles occur on both sides; the last point closes the circle on the first.
    inside = angle < 270.0 - 1e-9
    return cut(angle[inside], level[inside])


def _nearest(pattern: SpherePattern, phi_deg: float) -> int:
    away = np.abs((pattern.phi_deg - phi_deg + 180.0) % 360.0 - 180.0)
    return int(np.argmin(away))


def _fall(pattern: Cut, drop_db: float, direction: int) -> float | None:
    """Angle from the peak to the first crossing of peak less ``drop_db``, going one way."""
    levels, angles = np.maximum(pattern.level_db, -200.0), pattern.angle_deg
    top, count = int(np.argmax(levels)), levels.size
    target = levels[top] - drop_db
    walked = 0.0
    index = top
    for _ in range(count):
        following = index + direction
        if not 0 <= following < count:
            if not pattern.closed:
                return None
            following %= count
        step = abs((angles[following] - angles[index] + 180.0) % 360.0 - 180.0)
        if levels[following] < target:
            share = (levels[index] - target) / (levels[index] - levels[following])
            return float(walked + share * step)
        walked += step
        index = following
    return None
