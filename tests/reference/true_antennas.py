"""Several hundred antennas whose patterns are known in closed form, integrated here.

Each gain is the directivity without losses, found by integrating the pattern over the sphere, and
each beamwidth is found on the same pattern: an honest sheet of that antenna can state no more. The
patterns are textbook forms (Silver 1949; Kraus; Balanis, *Antenna Theory*, ch. 4, 6, 11 to 14;
Harrington 1958; Uzkov 1946), written down from memory; the integration is ours.

The beam axis is z for directional antennas, and the antenna axis is z for omnidirectional ones.
"""

from __future__ import annotations

import math
import warnings
from collections.abc import Callable, Iterator
from dataclasses import dataclass, field
from functools import cache
from itertools import pairwise, product
from typing import Any

import numpy as np
from numpy.typing import NDArray
from scipy import special
from scipy.signal.windows import chebwin, taylor

Floats = NDArray[np.float64]
Power = Callable[[Floats, Floats, Floats], Floats]
"""Power pattern as a function of a direction's x, y, z; only ratios of its values matter."""

TAU = 2 * np.pi


@dataclass(frozen=True)
class TrueAntenna:
    """One true antenna: gain is directivity in dBi, widths in degrees.

    ``kind`` is ``dir`` (two widths), ``bidirectional`` (two equal lobes), ``omni`` (vertical width
    and 360) or ``omni-ground`` (elevation of the −3 dB point over an infinite ground, and 360).
    ``size`` holds what is known of its size in wavelengths: ``diameter``, ``length``, ``area``,
    ``perimeter``, ``height``, ``elements``, ``boom``, ``radius`` (of the enclosing sphere).
    """

    name: str
    kind: str
    gain_dbi: float
    hpbw1: float
    hpbw2: float
    family: str = ""
    size: dict[str, float] = field(default_factory=dict)


# --- integration and beamwidths ---------------------------------------------------------------


@cache
def _nodes(count: int) -> tuple[Floats, Floats]:
    return np.polynomial.legendre.leggauss(count)


def radiated(
    power: Power, reach: float, *, round_z: bool = False, ends: tuple[float, ...]
) -> float:
    """∮U dΩ by Gauss–Legendre in cos θ (between the given ends) and equal steps in azimuth.

    ``reach`` is the largest extent in wavelengths: a field of that extent holds spherical modes
    up to about π·reach, so the step counts below oversample its power pattern.
    """
    count = int(60 + 4 * reach)
    azimuths = 1 if round_z else int(64 + 8 * reach)
    phi = TAU * (np.arange(azimuths) + 0.5) / azimuths
    total = 0.0
    for low, high in pairwise(ends):
        nodes, weights = _nodes(count)
        z = (low + high) / 2 + (high - low) / 2 * nodes
        rho = np.sqrt(1 - z * z)
        values = power(rho[:, None] * np.cos(phi), rho[:, None] * np.sin(phi), z[:, None] + 0 * phi)
        total += float((weights * (high - low) / 2) @ values.mean(axis=1)) * TAU
    return total


def half_power_angle(cut: Callable[[Floats], Floats], start: float, step: float) -> float:
    """Angle in radians from ``start`` to the first half-power point, walking by ``step``."""
    half = float(cut(np.array([start]))[0]) / 2
    inside, outside = start, start + step
    while True:
        # Walked in short stretches: most beams end long before the sphere does.
        angles = inside + step * np.arange(1, 49)
        below = np.flatnonzero(cut(angles) < half)
        if below.size:
            inside, outside = float(angles[below[0]] - step), float(angles[below[0]])
            break
        inside = float(angles[-1])
        if abs(inside - start) > math.pi:
            return math.nan
    for _ in range(40):
        middle = (inside + outside) / 2
        if float(cut(np.array([middle]))[0]) < half:
            outside = middle
        else:
            inside = middle
    return abs((inside + outside) / 2 - start)


def _directional(
    name: str,
    power: Power,
    reach: float,
    *,
    round_z: bool = False,
    front_only: bool = False,
    kind: str = "dir",
    tilt: float = 0.0,
    **size: float,
) -> TrueAntenna:
    """Directivity along z (or tilted by ``tilt`` in the yz plane) and both principal widths."""
    step = min(0.01, 0.05 / max(reach, 1.0))

    def in_xz(a: Floats) -> Floats:
        along = np.cos(a)
        return power(np.sin(a), along * math.sin(tilt), along * math.cos(tilt))

    def in_yz(a: Floats) -> Floats:
        return power(0 * a, np.sin(a), np.cos(a))

    ends = (0.0, 1.0) if front_only else (-1.0, 0.0, 1.0)
    total = radiated(power, reach, round_z=round_z, ends=ends)
    peak = float(in_yz(np.array([tilt]))[0])
    width1 = width2 = 2 * half_power_angle(in_xz, 0.0, step)
    if not round_z:
        width2 = half_power_angle(in_yz, tilt, step) + half_power_angle(in_yz, tilt, -step)
    gain = 10 * math.log10(4 * math.pi * peak / total)
    family = name.split(",")[0]
    return TrueAntenna(name, kind, gain, math.degrees(width1), math.degrees(width2), family, size)


def _omni(
    name: str,
    power: Callable[[Floats], Floats],
    reach: float,
    *,
    ground: bool = False,
    **size: float,
) -> TrueAntenna:
    """Directivity and vertical width about the horizon; ``power`` takes z = sin(elevation)."""
    ends = (0.0, 1.0) if ground else (-1.0, 0.0, 1.0)
    total = radiated(lambda x, y, z: power(z), reach, round_z=True, ends=ends)
    peak = float(power(np.array([0.0]))[0])
    step = min(0.005, 0.03 / max(reach, 1.0))
    above = math.degrees(half_power_angle(lambda a: power(np.sin(a)), 0.0, step))
    gain = 10 * math.log10(4 * math.pi * peak / total)
    kind, width = ("omni-ground", above) if ground else ("omni", 2 * above)
    return TrueAntenna(name, kind, gain, width, 360.0, name.split(",")[0], size)


# --- building blocks --------------------------------------------------------------------------


def huygens(z: Floats) -> Floats:
    """Obliquity of an aperture's element of area: ((1 + cos θ)/2)²."""
    return np.square((1 + z) / 2)


def line(length: float, taper: str, s: Floats) -> Floats:
    """Amplitude pattern of a line source of this length; ``s`` the direction cosine along it."""
    t = length * s
    closed: dict[str, Callable[[], Floats]] = {
        "uniform": lambda: np.sinc(t),
        "cosine": lambda: (np.sinc(t - 0.5) + np.sinc(t + 0.5)) / 2,
        "triangle": lambda: np.square(np.sinc(t / 2)),
        "cosine squared": lambda: np.sinc(t) / 2 + (np.sinc(t - 1) + np.sinc(t + 1)) / 4,
        "cosine on pedestal": lambda: (
            0.3 * np.sinc(t) + 0.7 * (np.sinc(t - 0.5) + np.sinc(t + 0.5)) / 2
        ),
    }
    return closed[taper]()


def array(weights: Floats, spacing: float, s: Floats, phase: float = 0.0) -> Floats:
    """Power of an equally spaced array along a direction with cosine ``s``; phase in radians."""
    n = np.arange(len(weights)) - (len(weights) - 1) / 2
    field_ = np.tensordot(
        weights, np.exp(1j * n.reshape(-1, *[1] * s.ndim) * (TAU * spacing * s + phase)), axes=1
    )
    return np.abs(field_) ** 2


def half_wave(s: Floats) -> Floats:
    """Power of a half-wave dipole; ``s`` the direction cosine along it."""
    return np.square(np.cos(np.pi / 2 * s)) / np.maximum(1 - s * s, 1e-15)


def dipole(length: float, s: Floats) -> Floats:
    """Power of a thin centre-fed dipole with sinusoidal current (Balanis ch. 4)."""
    kl = np.pi * length
    return np.square(np.cos(kl * s) - math.cos(kl)) / np.maximum(1 - s * s, 1e-15)


def _weights(count: int, kind: str) -> Floats:
    made: dict[str, Callable[[], Any]] = {
        "uniform": lambda: np.ones(count),
        "Chebyshev 20 dB": lambda: chebwin(count, 20),
        "Chebyshev 30 dB": lambda: chebwin(count, 30),
        "Taylor 25 dB": lambda: taylor(count, nbar=4, sll=25),
    }
    with warnings.catch_warnings():
        # scipy warns that these are poor windows for spectra; here they are arrays.
        warnings.simplefilter("ignore", UserWarning)
        return np.asarray(made[kind](), dtype=float)


# --- directional families ---------------------------------------------------------------------


def disks() -> Iterator[TrueAntenna]:
    """Round apertures: tapers (1 − ρ²)ⁿ on a pedestal, with and without central blockage."""
    tapers = [(0, 0.0), (1, 0.0), (2, 0.0), (1, 0.316), (1, 0.1), (2, 0.316), (2, 0.1), (1, 0.5)]
    free = product((1.0, 1.5, 2.0, 3.0, 5.0, 8.0, 12.0, 20.0, 35.0, 50.0), tapers, (0.0,))
    blocked = product((3.0, 5.0, 10.0, 20.0, 50.0), tapers[:4], (0.1, 0.2, 0.3))
    for diameter, (n, pedestal), block in [*free, *blocked]:
        nodes, w = _nodes(int(24 + 1.2 * diameter))
        rho = (block + 1) / 2 + (1 - block) / 2 * nodes
        feed = (pedestal + (1 - pedestal) * (1 - rho**2) ** n) * rho * w

        def power(
            x: Floats, y: Floats, z: Floats, rho: Floats = rho, feed: Floats = feed,
            d: float = diameter,
        ) -> Floats:  # fmt: skip
            u = np.pi * d * np.hypot(x, y)
            return np.square(special.j0(u[..., None] * rho) @ feed) * huygens(z)

        yield _directional(
            f"disk, {diameter:g} λ, taper {n} on {pedestal:g}, blockage {block:g}",
            power, diameter, round_z=True,
            diameter=diameter, area=math.pi * diameter**2 / 4, perimeter=math.pi * diameter,
        )  # fmt: skip


def rectangles() -> Iterator[TrueAntenna]:
    """Rectangular apertures with separable tapers."""
    sizes = [(1, 1), (1, 2), (2, 2), (1, 4), (3, 3), (2, 8), (5, 5), (1, 10), (10, 10), (4, 16),
             (2, 20), (20, 20)]  # fmt: skip
    tapers = [
        ("uniform", "uniform"), ("cosine", "uniform"), ("cosine", "cosine"),
        ("triangle", "triangle"), ("cosine squared", "cosine"),
        ("cosine squared", "cosine squared"), ("cosine on pedestal", "cosine on pedestal"),
    ]  # fmt: skip
    for (a, b), (tx, ty) in product(sizes, tapers):

        def power(
            x: Floats, y: Floats, z: Floats, a: float = a, b: float = b, tx: str = tx, ty: str = ty
        ) -> Floats:
            return np.square(line(a, tx, x) * line(b, ty, y)) * huygens(z)

        yield _directional(
            f"rectangle, {a} by {b} λ, {tx} by {ty}", power, math.hypot(a, b),
            area=a * b, perimeter=2.0 * (a + b),
        )  # fmt: skip


def horns() -> Iterator[TrueAntenna]:
    """Pyramidal horns with the quadratic phase of the optimum horn (Balanis ch. 13)."""
    nodes, w = _nodes(32)
    for a, b, (s, t) in product((2.0, 3.0, 5.0, 8.0), (1.5, 4.0, 6.0), ((0.0, 0.0), (0.25, 0.375))):

        def power(
            x: Floats, y: Floats, z: Floats, a: float = a, b: float = b, s: float = s, t: float = t
        ) -> Floats:
            feed_h = w * np.cos(np.pi / 2 * nodes) * np.exp(-1j * TAU * t * nodes**2)
            feed_e = w * np.exp(-1j * TAU * s * nodes**2)
            h = np.exp(1j * np.pi * a * x[..., None] * nodes) @ feed_h
            e = np.exp(1j * np.pi * b * y[..., None] * nodes) @ feed_e
            return np.abs(h * e) ** 2 * huygens(z)

        yield _directional(
            f"horn, {a:g} by {b:g} λ, phase {s:g} and {t:g}", power, math.hypot(a, b),
            area=a * b, perimeter=2.0 * (a + b),
        )  # fmt: skip


def panels() -> Iterator[TrueAntenna]:
    """Planar arrays of cos θ elements over a reflector."""
    grids = [(2, 2), (4, 4), (8, 8), (16, 16), (2, 8), (4, 12)]
    for (n, m), d, kind in product(
        grids, (0.5, 0.7, 0.85), ("uniform", "Chebyshev 20 dB", "Chebyshev 30 dB", "Taylor 25 dB")
    ):
        wx, wy = _weights(n, kind), _weights(m, kind)

        def power(
            x: Floats, y: Floats, z: Floats, wx: Floats = wx, wy: Floats = wy, d: float = d
        ) -> Floats:
            return array(wx, d, x) * array(wy, d, y) * np.maximum(z, 0)

        yield _directional(
            f"planar array, {n} by {m}, {d} λ, {kind}", power, math.hypot(n * d, m * d),
            front_only=True, area=n * m * d * d, perimeter=2.0 * (n + m) * d,
        )  # fmt: skip


def columns() -> Iterator[TrueAntenna]:
    """Sector columns along y with azimuth widths of 65, 90, 120 degrees, and electrical tilt."""
    for count, d, azimuth, kind, tilt in product(
        (4, 6, 8, 12), (0.7, 0.85), (65.0, 90.0, 120.0), ("uniform", "Chebyshev 20 dB"), (0.0, 6.0)
    ):
        n = math.log(0.5) / math.log((1 + math.cos(math.radians(azimuth / 2))) / 2)
        w = _weights(count, kind)
        lean = math.radians(tilt)

        def power(
            x: Floats, y: Floats, z: Floats, w: Floats = w, d: float = d, n: float = n,
            lean: float = lean,
        ) -> Floats:  # fmt: skip
            level = np.maximum(np.hypot(x, z), 1e-12)
            element = ((1 + z / level) / 2) ** n * level**2
            return array(w, d, y, -TAU * d * math.sin(lean)) * element

        yield _directional(
            f"sector column, {count} of {d} λ, {azimuth:g}°, {kind}, tilt {tilt:g}°", power,
            count * d, tilt=lean, length=count * d,
        )  # fmt: skip


def endfire_lines() -> Iterator[TrueAntenna]:
    """End-fire line sources along z: ordinary, and with the phase of Hansen and Woodyard."""
    elements: dict[str, Power] = {
        "isotropic": lambda x, y, z: 1 + 0 * z,
        "short dipole": lambda x, y, z: 1 - x * x,
        "half-wave dipole": lambda x, y, z: half_wave(x),
        "loop": lambda x, y, z: (1 + z) ** 2,
    }
    for length, (kind, extra), (name, element) in product(
        (1.0, 1.5, 2.0, 3.0, 4.0, 6.0, 10.0, 20.0), (("ordinary", 0.0), ("Hansen–Woodyard", 1.47)),
        elements.items(),
    ):  # fmt: skip

        def power(
            x: Floats, y: Floats, z: Floats, length: float = length, extra: float = extra,
            element: Power = element,
        ) -> Floats:  # fmt: skip
            return np.square(np.sinc(length * (z - 1) - extra / np.pi)) * element(x, y, z)

        yield _directional(
            f"end-fire line, {kind}, {length:g} λ, {name}", power, length,
            round_z=name in ("isotropic", "loop"), boom=length, length=length,
        )  # fmt: skip


def dipole_rows() -> Iterator[TrueAntenna]:
    """End-fire rows of half-wave dipoles with equal currents, as a Yagi is often drawn."""
    for count, d, extra in product((3, 4, 6, 9, 14), (0.15, 0.2, 0.3), (0.0, 2.94)):
        phase = -TAU * d - extra / count

        def power(
            x: Floats, y: Floats, z: Floats, count: int = count, d: float = d, phase: float = phase
        ) -> Floats:
            return array(np.ones(count), d, z, phase) * half_wave(x)

        made = _directional(
            f"dipole row, {count} of {d} λ, extra phase {extra:g}", power, count * d,
            elements=count, boom=(count - 1) * d,
        )  # fmt: skip
        if made.hpbw1 < 180 and made.hpbw2 < 180:
            yield made


def ideal_beams() -> Iterator[TrueAntenna]:
    """cosⁿθ, ((1 + cos θ)/2)ⁿ, Gaussian beams, and cosecant-squared fans."""
    for n in (0.5, 0.75, 1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 14, 20, 30, 50, 80, 130, 200, 400):
        yield _directional(
            f"cosine power, n = {n:g}", lambda x, y, z, n=n: np.maximum(z, 0) ** n, 2 + n / 20,
            round_z=True, front_only=True,
        )  # fmt: skip
    for n in (1, 2, 3, 4, 6, 10, 20, 50, 100, 300):
        yield _directional(
            f"cardioid power, n = {n}", lambda x, y, z, n=n: ((1 + z) / 2) ** n, 2 + n / 20,
            round_z=True,
        )  # fmt: skip
    for w1, w2 in [(2, 2), (5, 5), (10, 10), (20, 20), (40, 40), (60, 60), (90, 90), (65, 8),
                   (90, 15), (30, 5), (60, 30), (10, 3)]:  # fmt: skip

        def gaussian(x: Floats, y: Floats, z: Floats, w1: float = w1, w2: float = w2) -> Floats:
            theta = np.arccos(np.clip(z, -1, 1))
            scale = theta / np.maximum(np.hypot(x, y), 1e-12)
            q = np.square(x * scale / math.radians(w1)) + np.square(y * scale / math.radians(w2))
            return np.exp(-4 * math.log(2) * q)

        yield _directional(f"Gaussian, {w1} by {w2}°", gaussian, 80 / min(w1, w2) + 4)
    for w_azimuth, w_elevation in product((20.0, 65.0, 90.0), (5.0, 10.0, 15.0)):
        half = math.radians(w_elevation / 2)

        def fan(
            x: Floats, y: Floats, z: Floats, wa: float = math.radians(w_azimuth), half: float = half
        ) -> Floats:
            azimuth, elevation = np.arctan2(x, z), np.arcsin(np.clip(y, -1, 1))
            lobe = np.exp(-math.log(2) * np.square(elevation / half))
            skirt = np.square(math.sin(half) / np.sin(np.maximum(-elevation, half))) / 2
            low = np.where(elevation < -half, np.where(elevation > -0.7, skirt, 0.0), lobe)
            return low * np.exp(-4 * math.log(2) * np.square(azimuth / wa))

        yield _directional(f"cosecant fan, {w_azimuth:g} by {w_elevation:g}°", fan, 60.0)


def two_sided() -> Iterator[TrueAntenna]:
    """Antennas with two equal lobes: |cos|ⁿ, free-standing broadside rows without reflector."""
    for n in (1, 2, 3, 4, 6, 8, 12, 20, 40):
        yield _directional(
            f"two-sided cosine, n = {n}", lambda x, y, z, n=n: np.abs(z) ** n, 4 + n / 20,
            round_z=True, kind="bidirectional",
        )  # fmt: skip
    for count, rows in product((2, 4, 8), (2, 4)):
        yield _directional(
            f"two-sided curtain, {count} by {rows}",
            lambda x, y, z, n=count, m=rows: (
                array(np.ones(n), 0.5, x) * array(np.ones(m), 0.5, y) * half_wave(x)
            ),
            4.0 + count, kind="bidirectional",
        )  # fmt: skip


def dipoles_over_plane() -> Iterator[TrueAntenna]:
    """A half-wave dipole before a large plane, and in a 90° corner (image theory, Kraus)."""
    for h in (0.1, 0.15, 0.2, 0.25, 0.3):
        yield _directional(
            f"dipole over plane, {h} λ",
            lambda x, y, z, h=h: half_wave(x) * np.square(np.sin(TAU * h * z)) * (z > 0),
            3.0, front_only=True,
        )  # fmt: skip
    for s in (0.25, 0.3, 0.35, 0.4, 0.45, 0.5, 0.55, 0.6):

        def corner(x: Floats, y: Floats, z: Floats, s: float = s) -> Floats:
            inside = np.abs(np.arctan2(y, z)) < math.pi / 4
            images = np.cos(TAU * s * z) - np.cos(TAU * s * y)
            return half_wave(x) * np.square(images) * inside

        # The corner's edge is a kink in azimuth: more steps than the extent asks for.
        yield _directional(f"corner reflector, {s} λ", corner, 30.0, front_only=True)


def patches() -> Iterator[TrueAntenna]:
    """Rectangular patches over a large ground, two-slot model (Balanis ch. 14)."""
    for permittivity, wide in product((1.05, 1.5, 2.2, 3.5, 4.5, 10.0), (1.0, 1.5)):
        length = 0.49 / math.sqrt(permittivity)
        width = wide * length

        def power(
            x: Floats, y: Floats, z: Floats, length: float = length, width: float = width
        ) -> Floats:
            slots = np.square(np.cos(np.pi * length * x) * np.sinc(width * y))
            # A magnetic current along y radiates as sin² of the angle from y.
            return slots * (1 - y * y) * (z > 0)

        yield _directional(
            f"patch, permittivity {permittivity}, width {wide} of length", power, 4.0,
            front_only=True,
        )  # fmt: skip


def limits() -> Iterator[TrueAntenna]:
    """Fields that reach a theoretical limit: Harrington's maximum-gain modes, Uzkov's N²."""
    for count in (1, 2, 3, 4, 5, 6, 8, 10, 15, 20, 30, 40):

        def modes(x: Floats, y: Floats, z: Floats, count: int = count) -> Floats:
            pi_before, pi_now = np.zeros_like(z), np.ones_like(z)
            total = np.zeros_like(z)
            for n in range(1, count + 1):
                tau = n * z * pi_now - (n + 1) * pi_before
                total += (2 * n + 1) / (n * (n + 1)) * (pi_now + tau)
                following = ((2 * n + 1) * z * pi_now - (n + 1) * pi_before) / n
                pi_before, pi_now = pi_now, following
            return np.square(total)

        yield _directional(
            f"Harrington, {count} modes", modes, count / math.pi + 2, round_z=True,
            radius=count / TAU,
        )  # fmt: skip
    for count in (2, 3, 4, 5):
        # As the spacing goes to zero the best pattern of N elements is the best polynomial.
        n = np.arange(count)

        def best(x: Floats, y: Floats, z: Floats, n: NDArray[np.int64] = n) -> Floats:
            total = np.zeros_like(z)
            for degree in n:
                total += (2 * degree + 1) * special.eval_legendre(int(degree), z)
            return np.square(total)

        yield _directional(f"Uzkov, {count} elements", best, 4.0, round_z=True, elements=count)


# --- omnidirectional families -----------------------------------------------------------------


def thin_dipoles() -> Iterator[TrueAntenna]:
    """Centre-fed dipoles, and monopoles as their upper halves over an infinite ground."""
    for length in [0.02, *np.arange(0.1, 1.2501, 0.05)]:
        yield _omni(
            f"dipole, {length:.2f} λ", lambda z, p=length: dipole(p, z), 3.0, length=float(length)
        )
    for height in (0.02, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3, 0.35, 0.4, 0.45, 0.5, 0.55, 0.6, 0.625):
        yield _omni(
            f"monopole, {height:g} λ", lambda z, p=height: dipole(2 * p, z), 3.0, ground=True,
            height=height,
        )  # fmt: skip


def stacks() -> Iterator[TrueAntenna]:
    """Collinear stacks of half-wave dipoles, line sources, sinⁿ patterns."""
    kinds = ("uniform", "Chebyshev 20 dB", "Chebyshev 30 dB")
    for count, d, kind in product((2, 3, 4, 6, 8, 12, 16, 32), (0.5, 0.7, 0.85, 0.95), kinds):
        if count < 4 and kind != "uniform":
            continue
        w = _weights(count, kind)
        yield _omni(
            f"collinear, {count} of {d} λ, {kind}",
            lambda z, w=w, d=d: array(w, d, z) * half_wave(z), count * d + 1,
            length=(count - 1) * d + 0.5,
        )  # fmt: skip
    for length, taper in product(
        (1.0, 2.0, 3.0, 5.0, 8.0, 12.0, 20.0), ("uniform", "cosine", "triangle", "cosine squared")
    ):
        yield _omni(
            f"vertical line, {length:g} λ, {taper}",
            lambda z, p=length, t=taper: np.square(line(p, t, z)) * (1 - z * z), length + 1,
            length=length,
        )  # fmt: skip
    for n in (1, 1.5, 2, 3, 4, 6, 10, 20, 50, 100, 200, 500):
        yield _omni(f"sine power, n = {n:g}", lambda z, n=n: (1 - z * z) ** n, 3 + n / 20)


FAMILIES: tuple[Callable[[], Iterator[TrueAntenna]], ...] = (
    disks, rectangles, horns, panels, columns, endfire_lines, dipole_rows, ideal_beams, two_sided,
    dipoles_over_plane, patches, limits, thin_dipoles, stacks,
)  # fmt: skip


@cache
def true_antennas() -> tuple[TrueAntenna, ...]:
    """Every antenna of the catalogue, in the order of the families; computed once."""
    return tuple(antenna for family in FAMILIES for antenna in family())


def of_family(*families: str) -> tuple[TrueAntenna, ...]:
    """The antennas of some families, by the first words of their names ("disk", "dipole row")."""
    return tuple(antenna for antenna in true_antennas() if antenna.family in families)
