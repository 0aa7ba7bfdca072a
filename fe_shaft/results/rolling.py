"""What the balls or rollers of a computed bearing bear, and how stiff it is under its load."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

#: An element that bears less than this share of the most loaded one does not carry.
CARRIES = 1e-6


@dataclass(frozen=True)
class RollingElements:
    """The elements of one computed bearing, row after row, from 12 o'clock clockwise seen from the left.

    Attributes
    ----------
    name : of the bearing
    word : "balls" or "rollers"
    place : (z,) [rad], where they stand, clockwise from 12 o'clock
    load : (n_cases, z) [N]
    angle : (n_cases, z) [rad]
        Contact angle from the radial plane, + where the inner ring is pressed to the right; 0 where nothing is pressed.
    pressure : (n_cases, z) [Pa], the larger of both rings
    force : (n_cases, 6) [N, N m], load on the inner ring
    movement : (n_cases, 6) [m, rad], inner ring against outer ring
    tangent : (n_cases, 6, 6) [N/m, N, N m/rad]
        Slope of the force: how stiff the bearing is to a small change of its load.
    steps : (n_cases,), steps until the bearings came to rest
    held : (n_cases,) [N]
        Force of the spring, a millionth as stiff as the bearing, that keeps a ring in place which nothing touches.
    """

    name: str
    word: str
    place: Array
    load: Array
    angle: Array
    pressure: Array
    force: Array
    movement: Array
    tangent: Array
    steps: NDArray[np.intp]
    held: Array

    @property
    def number(self) -> int:
        """How many elements there are."""
        return len(self.place)

    @property
    def carrying(self) -> NDArray[np.intp]:
        """How many of them carry, (n_cases,)."""
        return np.asarray((self.load > CARRIES * self.load.max(axis=1, keepdims=True)).sum(axis=1))

    @property
    def most(self) -> Array:
        """Load of the most loaded element, (n_cases,) [N]."""
        return np.asarray(self.load.max(axis=1))

    @property
    def peak_pressure(self) -> Array:
        """Largest contact pressure, (n_cases,) [Pa]."""
        return np.asarray(self.pressure.max(axis=1))

    @property
    def steepest(self) -> Array:
        """Largest contact angle of what is pressed, (n_cases,) [rad]."""
        return np.asarray(np.abs(np.where(self.load > 0, self.angle, 0.0)).max(axis=1))

    @property
    def _radial(self) -> tuple[Array, Array]:
        """Radial force and its direction (n_cases,), (n_cases, 2)."""
        radial = self.force[:, 1:3]
        size = np.hypot(radial[:, 0], radial[:, 1])
        return size, radial / np.where(size > 0, size, 1.0)[:, None]

    @property
    def tangent_stiffness(self) -> Array:
        """Radial stiffness to a small change of the load, in its direction, (n_cases,) [N/m]; NaN without load."""
        size, along = self._radial
        stiffness = np.einsum("ki,kij,kj->k", along, self.tangent[:, 1:3, 1:3], along)
        return np.where(size > 0, stiffness, np.nan)

    @property
    def secant_stiffness(self) -> Array:
        """Radial force over radial movement in its direction, clearance included, (n_cases,) [N/m]; NaN without."""
        size, along = self._radial
        moved = (self.movement[:, 1:3] * along).sum(axis=1)
        return np.where((size > 0) & (moved > 0), size / np.where(moved > 0, moved, 1.0), np.nan)
