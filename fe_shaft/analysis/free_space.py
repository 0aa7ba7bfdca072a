"""The rigid motions of a shaft that cost no force, taken apart: along it, about it, in each of its two planes."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import RX, RY, RZ, UX, UY, UZ

Array = NDArray[np.float64]

#: A component below this share of a motion (angles times shaft length) is rounding, far above 1e-15, far below any
#: motion that a support's place or a stiffness matrix really mixes in.
NOISE = 1e-7

SLIDE, SPIN, UP, FRONT = [UX], [RX], [UY, RZ], [UZ, RY]


@dataclass(frozen=True)
class FreeSpace:
    """The rigid motions that cost no force.

    Attributes
    ----------
    basis : (n, 6) [m], orthonormal; rotations times the shaft's length
    length : of the shaft [m]
    """

    basis: Array
    length: float

    def within(self, dofs: list[int]) -> Array:
        """Basis of those motions that use only the given displacements, (n, 6)."""
        others = [k for k in range(6) if k not in dofs]
        u, values, _ = np.linalg.svd(self.basis[:, others])
        inside = u[:, int((values > NOISE).sum()) :].T @ self.basis
        inside[:, others] = 0.0
        return np.asarray(inside)

    def beyond(self, known: Array) -> Array:
        """Basis of the motions that are perpendicular to the known ones, (n, 6)."""
        rest = self.basis - (self.basis @ known.T) @ known
        _, values, v = np.linalg.svd(rest, full_matrices=False)
        return np.asarray(v[values > 0.5])

    def pivot(self, motion: Array) -> float | None:
        """Place on the axis that stands still in a motion within one plane [m]; None where all of it shifts alike."""
        shift, turn = motion[[UY, UZ]], np.array([motion[RZ], -motion[RY]])
        if turn @ turn < NOISE**2:
            return None
        return float(-(shift @ turn) / (turn @ turn)) * self.length
