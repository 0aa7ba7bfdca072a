"""A mixed batch of roller bearings, all sizes invented, and random states of them."""

from __future__ import annotations

from typing import Any

import numpy as np

from fe_shaft.rolling.roller_geometry import RollerGeometry
from fe_shaft.rolling.roller_profile import Tabulated, cylindrical

Array = np.ndarray[Any, Any]
#: A crowned profile, thicker to the left.
CROWNED = Tabulated(np.array([-0.02, 0, 0.02]), np.array([60e-6, 0, 90e-6]))
CROWNED_MIRRORED = Tabulated(-CROWNED.at[::-1], CROWNED.drop[::-1])


def batch(side: float = 1.0) -> RollerGeometry:
    """Cylindrical, needle, two tapered, spherical bearings, thrust bearings of one and two directions.

    side = -1 is the batch in a mirror.
    """
    crowned = CROWNED if side > 0 else CROWNED_MIRRORED

    return RollerGeometry.stacked(
        [
            RollerGeometry.of(14, 0.010, 0.0096, 0.065, clearance=20e-6, first=0.2),
            RollerGeometry.of(38, 0.0025, 0.0158, 0.0325, clearance=8e-6, laminae=41),
            RollerGeometry.of(
                [17, 22], [0.011, 0.012], [0.014, 0.018], [0.062, 0.09], contact_angle=[0.24, 0.5],
                side=[side, -side], first=[0.1, 0.25], clearance=[0, -6e-6], profile=crowned,
            ),
            RollerGeometry.of(
                16, 0.012, 0.0105, 0.066, contact_angle=0.16, side=side, clearance=30e-6, profile=cylindrical,
                both_sides=True, free_tilt=True,
            ),
            RollerGeometry.of(
                13, 0.008, 0.0075, 0.05, contact_angle=np.pi / 2, side=-side, both_sides=[False, True]
            ),
        ]
    )  # fmt: skip


def states(seed: int, count: int, bearings: int) -> Array:
    """Random displacements (count, b, 6) of all sizes from clearances to heavy loads, tilts up to some mrad."""
    random = np.random.default_rng(seed)
    size = 10 ** random.uniform(-5.3, -3.9, (count, bearings, 1))
    spread = np.array([1, 1, 1, 30, 30, 30]) * 10 ** random.uniform(-0.7, 0, (count, bearings, 6))
    return size * spread * random.choice([-1, 1], (count, bearings, 6))
