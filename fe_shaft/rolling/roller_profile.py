"""Profiles of rollers: by how much a roller is thinner, on each side, than a cylinder at a distance from its middle.

A profile is a callable ``profile(x, length, diameter) -> drop``: x (b, n) along the roller, counted from its middle to
the right; length, diameter (b,); drop (b, n); all in m. Places beyond the ends of a roller are not asked for.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]
Profile = Callable[[Array, Array, Array], Array]

#: ISO/TS 16281, from memory: drop of the reference profile over diameter and logarithm, for rollers up to
#: LONG diameters and for longer ones, which keep a straight part in their middle.
SHORT_DROP, LONG_DROP, LONG = 0.00035, 0.0005, 2.5


def logarithmic(x: Array, length: Array, diameter: Array) -> Array:
    """Reference profile of ISO/TS 16281 (from memory).

    Up to a length of 2.5 diameters: 0.00035 D ln(1 / (1 - (2 x / L)^2)).
    Beyond: 0.0005 D ln(1 / (1 - ((2 |x| - (L - 2.5 D)) / (2.5 D))^2)), nothing within |x| <= (L - 2.5 D) / 2.
    It is infinite at the very ends, where no lamina has its middle.
    """
    curved = np.minimum(length, LONG * diameter)[:, None]
    share = np.maximum(2 * np.abs(x) - (length[:, None] - curved), 0) / curved
    height = np.where(length > LONG * diameter, LONG_DROP, SHORT_DROP) * diameter
    return np.asarray(-height[:, None] * np.log1p(-(share**2)))


def cylindrical(x: Array, length: Array, diameter: Array) -> Array:
    """No drop at all: a cylinder, or a barrel that fits its raceway."""
    return np.zeros_like(x)


@dataclass(frozen=True, eq=False)
class Tabulated:
    """A measured or drawn profile: drop [m] at rising distances from the middle [m], straight in between."""

    at: Array
    drop: Array

    def __post_init__(self) -> None:
        if self.at.ndim != 1 or self.at.shape != self.drop.shape or not (np.diff(self.at) > 0).all():
            raise ValueError(f"profile table: places {self.at.shape} and drops {self.drop.shape}: write rising pairs.")

    def __call__(self, x: Array, length: Array, diameter: Array) -> Array:
        """Drops of the table, which must span every roller."""
        reach = float(np.abs(x).max(initial=0))
        if self.at[0] > -reach or self.at[-1] < reach:
            raise ValueError(
                f"profile table: from {self.at[0]:g} m to {self.at[-1]:g} m, but laminae lie up to {reach:g} m from "
                "the middle. Continue the table to both ends of the roller."
            )
        return np.interp(x, self.at, self.drop)
