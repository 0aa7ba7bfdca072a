"""Random ball bearings, invented, and the states in which their laws are judged."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from fe_shaft.rolling.ball_geometry import BallGeometry

Array = NDArray[np.float64]

ARM = 0.03  # m, a radius of the order of these bearings


def random_balls(rng: np.random.Generator, count: int, **fixed: Any) -> BallGeometry:
    """Deep-groove, angular-contact, four-point, thrust and self-aligning in turn, from 5 to 25 mm ball diameter."""
    kind = np.arange(count) % 5
    number = rng.integers(6, 21, count)
    ball = rng.uniform(5e-3, 25e-3, count)
    pitch = ball * number / np.pi * rng.uniform(1.15, 1.6, count)
    angle = np.choose(kind, [0.0, rng.uniform(0.2, 0.8, count), 0.6, np.pi / 2, 0.2])
    outer = np.where(kind == 4, pitch / ball / 2 / np.cos(0.2) + 0.5, rng.uniform(0.51, 0.54, count))
    told: dict[str, Any] = {
        "inner_conformity": rng.uniform(0.51, 0.54, count),
        "outer_conformity": outer,
        "contact_angle": angle,
        "clearance": np.where(kind == 3, 0.0, rng.uniform(-10e-6, 30e-6, count)),
        "side": rng.choice([-1.0, 1.0], count),
        "both_sides": (kind == 2) | (kind == 4),
        "free_tilt": kind == 4,
        "shoulder_angle": 0.9,
    }
    return BallGeometry.of(number, ball, pitch, **(told | fixed))


def random_states(rng: np.random.Generator, geometry: BallGeometry) -> Array:
    """Movements (b, 6) of some 10 um and 0.3 mrad, pushed the way that closes the bearing."""
    u = rng.normal(size=(geometry.count, 6)) * [10e-6, 15e-6, 15e-6, 1.0, 3e-4, 3e-4]
    reach = geometry.centre_distance * (np.sin(geometry.free_angle) - np.sin(geometry.contact_angle))
    u[:, 0] += geometry.side * (rng.uniform(0, 25e-6, geometry.count) + np.maximum(reach, 0.0))
    return u
