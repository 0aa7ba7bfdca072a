"""Mild random shafts as plain numbers, for a comparison with a library that loses digits on hard ones.

Places count the segments' quarters, so that no member is shorter than a quarter of a segment. Units: m, N, N m.
"""

from __future__ import annotations

import math
import random
from dataclasses import dataclass
from functools import cache

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]
E, G = 206e9, 79.4e9


@dataclass(frozen=True)
class Support:
    """`k`: stiffness along or about each axis; inf is rigid, 0 is free. `moved`: prescribed, of rigid ones."""

    name: str
    x: float
    k: tuple[float, ...]
    moved: float = 0.0
    angle: float = 0.0


@dataclass(frozen=True)
class Load:
    """Force and couple at a radius and an angle [deg]; `width` > 0: spread evenly, then on the axis."""

    name: str
    x: float
    force: tuple[float, ...]
    couple: tuple[float, ...] = (0.0, 0.0, 0.0)
    radius: float = 0.0
    angle: float = 0.0
    width: float = 0.0

    @property
    def wrench(self) -> Array:
        """At the axis: the couple and (0, r cos a, r sin a) x force."""
        a = math.radians(self.angle)
        arm = [0.0, self.radius * math.cos(a), self.radius * math.sin(a)]
        return np.concatenate([self.force, np.add(self.couple, np.cross(arm, self.force))])


@dataclass(frozen=True)
class Drawn:
    """A shaft: its segments from left to right, what holds it and what loads it."""

    length: tuple[float, ...]
    d: tuple[float, ...]
    bore: tuple[float, ...]
    supports: tuple[Support, ...]
    loads: tuple[Load, ...]

    @property
    def ends(self) -> Array:
        return np.concatenate([[0.0], np.cumsum(self.length)])


@cache
def draw(seed: int) -> Drawn:
    """Draw a shaft; the same seed always gives the same one."""
    rng = random.Random(seed)
    n = rng.randint(3, 6)
    d = [rng.uniform(0.02, 0.08)]
    while len(d) < n:
        d.append(min(max(d[-1] * rng.uniform(1 / 1.6, 1.6), 0.015), 0.12))
    length = [each * rng.uniform(0.5, 3.0) for each in d]
    bore = [each * rng.uniform(0.2, 0.7) if rng.random() < 0.4 else 0.0 for each in d]
    quarters = [float(sum(length[:k]) + length[k] * q / 4) for k in range(n) for q in range(4)] + [float(sum(length))]
    places = sorted(rng.sample(quarters, rng.randint(2, 4)))
    while places[-1] - places[0] < 0.4 * quarters[-1]:
        places = sorted(rng.sample(quarters, len(places)))
    own = 3 * E * math.pi / 64 * min(d) ** 4 / quarters[-1] ** 3  # a cantilever as long as the whole shaft
    located, spun = rng.randrange(len(places)), rng.choice(quarters)
    supports = [_support(rng, f"support_{k}", x, own, k == located, quarters[-1]) for k, x in enumerate(places)]
    supports.append(Support("driver", spun, (0, 0, 0, math.inf, 0, 0)))
    loads = [_load(rng, f"load_{k}", quarters, length) for k in range(rng.randint(2, 4))]
    return Drawn(tuple(length), tuple(d), tuple(bore), tuple(supports), tuple(loads))


def _support(rng: random.Random, name: str, x: float, own: float, axial: bool, span: float) -> Support:
    if rng.random() < 0.4:
        tilt = math.inf if rng.random() < 0.2 else 0.0
        moved = rng.uniform(1e-6, 1e-5) if rng.random() < 0.4 else 0.0
        k = (math.inf if axial else 0.0, math.inf, math.inf, 0.0, tilt, tilt)
        return Support(name, x, k, moved, rng.uniform(0, 359))
    stiff = [own * 10 ** rng.uniform(0.5, 2.5) for _ in range(3)]
    tilt = [own * span**2 * 10 ** rng.uniform(-2, 0) if rng.random() < 0.5 else 0.0] * 2
    return Support(name, x, (stiff[0] if axial else 0.0, stiff[1], stiff[2], 0.0, *tilt))


def _load(rng: random.Random, name: str, quarters: list[float], length: list[float]) -> Load:
    force = tuple(rng.choice([-1, 1]) * 10 ** rng.uniform(1.5, 3.5) for _ in range(3))
    if rng.random() < 0.3:
        k = rng.randrange(len(length))
        return Load(name, sum(length[:k]) + length[k] / 2, force, width=length[k])
    couple = tuple(rng.uniform(-50, 50) if rng.random() < 0.5 else 0.0 for _ in range(3))
    return Load(name, rng.choice(quarters), force, couple, rng.uniform(0.01, 0.1), rng.uniform(0, 359))
