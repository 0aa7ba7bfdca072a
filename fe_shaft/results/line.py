"""One bent shaft: displacements and section forces at all its stations, and at any place between them.

Signs are the shaft's own: x to the right from its left end, y towards 12 o'clock, z towards 3 o'clock; rotations by
the right hand; section forces act on the face whose outward normal is +x.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.pieces import Pieces
from fe_shaft.fem.recovery import Recovery
from fe_shaft.fem.span import flexibility
from fe_shaft.fem.spread import Gathered, gather_mass, gather_uniform

Array = NDArray[np.float64]


@dataclass(frozen=True)
class Line:
    """A shaft's own line after the solution; its arrays are worked out when asked for.

    Attributes
    ----------
    found : recovery of all pieces of the model
    own : the pieces of this shaft
    span_left : (n_spans,) [m], left ends of the model's spans on their shafts
    end : place [m] and displacements (6, n_cases) of the right end
    density : (n_spans, 6, n_cases) [N/m, N m/m] of loads spread over the model's spans, or None
    gravity : (3,) [m/s^2] in the shaft's frame
    """

    found: Recovery
    own: slice
    span_left: Array
    end: tuple[float, Array]
    density: Array | None
    gravity: Array

    @cached_property
    def x(self) -> Array:
        """Stations (n,) [m]: segment ends, parts, ends of spread loads; strictly increasing."""
        pieces = self.found.pieces
        left = self.span_left.repeat(pieces.counts)[self.own] + pieces.left[self.own]
        return np.append(left, self.end[0])

    @cached_property
    def u(self) -> Array:
        """Displacements, (n_cases, n, 6) [m, rad]."""
        left = self.found.u_left[..., self.own]
        return np.concatenate([left, self.end[1][..., None]], axis=-1).transpose(1, 2, 0)

    @cached_property
    def force_left(self) -> Array:
        """Section forces N V_y V_z M_x M_y M_z just left of each station, (n_cases, n, 6); at the left end, right."""
        first, last = self.found.force_left[..., self.own], self.found.force_right[..., self.own]
        return np.concatenate([first[..., :1], last], axis=-1).transpose(1, 2, 0)

    @cached_property
    def force_right(self) -> Array:
        """The same just right of each station; at the right end, left of it."""
        first, last = self.found.force_left[..., self.own], self.found.force_right[..., self.own]
        return np.concatenate([first, last[..., -1:]], axis=-1).transpose(1, 2, 0)

    @property
    def length(self) -> float:
        """Of the shaft [m]."""
        return self.end[0]

    @property
    def segment(self) -> NDArray[np.intp]:
        """Number of the segment each piece belongs to, counted from 0 on this shaft, (n - 1,)."""
        segment: NDArray[np.intp] = self.found.pieces.segment[self.own]
        return np.asarray(segment - segment[0])

    @property
    def diameter_left(self) -> Array:
        """Outer diameter just left of each station, (n,) [m]; at the left end the one to its right."""
        return self._before("diameter")

    @property
    def diameter_right(self) -> Array:
        """Outer diameter just right of each station, (n,) [m]; at the right end the one to its left."""
        return self._after("diameter")

    @property
    def bore_left(self) -> Array:
        """Bore just left of each station, (n,) [m]."""
        return self._before("bore")

    @property
    def bore_right(self) -> Array:
        """Bore just right of each station, (n,) [m]."""
        return self._after("bore")

    def _sides(self, what: str) -> tuple[Array, Array]:
        pieces = self.found.pieces
        left, right = (getattr(pieces.drawn, f"{what}_{side}")[self.own] for side in ("left", "right"))
        return left, right

    def _before(self, what: str) -> Array:
        left, right = self._sides(what)
        return np.concatenate([left[:1], right])

    def _after(self, what: str) -> Array:
        left, right = self._sides(what)
        return np.concatenate([left, right[-1:]])

    @cached_property
    def deflection(self) -> Array:
        """Radial movement, (n_cases, n) [m]."""
        return np.hypot(self.u[..., 1], self.u[..., 2])

    @cached_property
    def slope(self) -> Array:
        """Rotation of the cross-section out of its plane, (n_cases, n) [rad]."""
        return np.hypot(self.u[..., 4], self.u[..., 5])

    @cached_property
    def bending_moment(self) -> Array:
        """Resultant bending moment, the larger of both sides of a station, (n_cases, n) [N m]."""
        sides = [np.hypot(f[..., 4], f[..., 5]) for f in (self.force_left, self.force_right)]
        return np.maximum(*sides)

    def at(self, places: ArrayLike) -> tuple[Array, Array]:
        """Displacements and section forces at any places, exact between the stations.

        Parameters
        ----------
        places : (k,) [m]
            From the shaft's left end.

        Returns
        -------
        u : (n_cases, k, 6) [m, rad]
        force : (n_cases, k, 6) [N, N m]
            Just right of the place (just left of it at the right end).
        """
        x = np.atleast_1d(np.asarray(places, dtype=float))
        k = (np.searchsorted(self.x, x, side="right") - 1).clip(0, len(self.x) - 2)
        cut = self._cut(k, x - self.x[k])
        start, force = self.u[:, k].transpose(1, 2, 0), self.force_right[:, k].transpose(1, 2, 0)
        loads: list[tuple[Gathered, Array]] = []
        if self.density is not None:
            loads.append((gather_uniform(cut), self.density[self.found.pieces.span[self.own][k]]))
        if self.gravity.any():
            density = np.zeros((len(x), NDOF, 1))
            density[:, :3, 0] = self.gravity
            loads.append((gather_mass(cut), density))
        # each cut piece is a span of its own whose forces are known at its left end: "centre" 0
        found = Recovery(cut, flexibility(cut), np.zeros(len(x)), start, force, loads)
        return found.u_right.transpose(1, 2, 0), found.force_right.transpose(1, 2, 0)

    def _cut(self, k: NDArray[np.intp], length: Array) -> Pieces:
        """The pieces k, each cut at a distance from its left end and made a span of its own."""
        whole, piece = self.found.pieces, k + self.own.start
        own = np.arange(len(k))
        length = np.maximum(length, np.finfo(float).tiny)
        shares: tuple[Array | None, Array | None] = (None, None)
        if whole.share_left is not None and whole.share_right is not None:
            begin, finish = whole.share_left[piece], whole.share_right[piece]
            shares = (begin, begin + (finish - begin) * (length / whole.length[piece]))
        lumps = None if whole.lumps is None else whole.lumps.cut(piece, length)
        segment, zero, one = whole.segment[piece], 0.0 * length, np.ones_like(own)
        return Pieces(own, one, zero, length, segment, whole.sections, shares[0], shares[1], lumps=lumps)
