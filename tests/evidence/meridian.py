"""Meridians of stepped round bars, meshed with quadrilaterals of 9 nodes in the plane (z, r).

The mesh is a grid that is graded geometrically towards the re-entrant corners, cut to the contour. A fillet is made by
moving the nodes of the sharp step: its corner goes to the middle of the arc, so that no cell gets a sharp angle.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from itertools import pairwise
from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray
from skfem import MeshQuad1, MeshQuad2

Array = NDArray[np.float64]


class Segment(NamedTuple):
    """A cylinder, possibly bored."""

    length: float
    diameter: float
    bore: float = 0.0


@dataclass(frozen=True)
class Fineness:
    """Sizes of the elements [length], for bars whose thinnest diameter is about 1.

    They grow by `growth` per length away from a sharp corner or a fillet.
    """

    corner: float = 1e-3
    growth: float = 0.6
    largest: float = 0.3
    per_fillet: int = 8  # elements along the arc

    def line(self, knots: list[float], corners: dict[float, float]) -> Array:
        """A grid through all knots, with the size of the elements given at some places (corners)."""
        knots = sorted(knots)
        near = [False, *np.isclose(np.diff(knots), 0, atol=1e-9 * knots[-1])]  # the same place but for rounding
        knots = [x for x, again in zip(knots, near, strict=True) if not again]
        places, smallest = np.array(list(corners)), np.array(list(corners.values()))
        pieces = [np.array(knots[:1])]
        for left, right in pairwise(knots):
            beside = np.geomspace(1e-5, 0.5, 200) * (right - left)
            x = np.concatenate([[left], left + beside, right - beside[-2::-1], [right]])
            sizes = smallest + self.growth * np.abs(x[:, None] - places)
            density = 1 / np.min(sizes, axis=1, initial=self.largest)
            count = np.concatenate([[0.0], np.cumsum(np.diff(x) * (density[1:] + density[:-1]) / 2)])
            pieces.append(np.interp(np.linspace(0, count[-1], int(np.ceil(count[-1])) + 1), count, x)[1:])
        return np.concatenate(pieces)


class Fillet(NamedTuple):
    """An arc of a circle at the foot of a step: it leaves the thin side tangentially and ends at the step's plane.

    Where the radius is larger than the step is high, the arc ends at the rim, before it has turned by 90 degrees.
    """

    radius: float
    plane: float
    foot: float  # radius of the thin side
    height: float
    towards_thick: int  # +1: the thick side is on the right
    room_along: float  # half the length of the thick side
    room_inwards: float  # half the wall of the thin side

    @property
    def turn(self) -> float:
        return float(np.arccos(max(0.0, 1 - self.height / self.radius)))

    @property
    def length(self) -> float:
        return float(self.radius * np.sin(self.turn))

    @property
    def rise(self) -> float:
        return float(self.radius * (1 - np.cos(self.turn)))

    def shift(self, z: Array, r: Array) -> Array:
        """How nodes of the sharp step move: its corner to the middle of the arc, the faces beside it to its halves."""
        along, up = self.towards_thick * (z - self.plane), r - self.foot
        face, wall = np.clip(along, -self.length, 0), np.clip(up, 0, self.rise)
        angle = self.turn / 2 * (1 + face / self.length + wall / self.rise)
        dz = self.radius * np.sin(angle) - self.length - face
        dr = self.radius * (1 - np.cos(angle)) - wall
        fade = 1.0 * ~((along < 0) & (up > 0))  # nothing of this step is there
        for inside, room in ((along, self.room_along), (-up, self.room_inwards)):
            fade *= (1 - np.clip(inside / min(2 * self.radius, room), 0, 1)) ** 2
        return fade * np.array([self.towards_thick * dz, dr])


@dataclass(frozen=True)
class Bar:
    """A stepped bar: segments left to right, and the radius of the fillet at the foot of each step (0: sharp)."""

    segments: tuple[Segment, ...]
    fillets: tuple[float, ...]
    fineness: Fineness = Fineness()
    knots: tuple[float, ...] = ()  # further planes that no element shall reach over

    @cached_property
    def planes(self) -> Array:
        return np.concatenate([[0.0], np.cumsum([s.length for s in self.segments])])

    @property
    def steps(self) -> list[tuple[float, Segment, Segment]]:
        return [(z, *pair) for z, pair in zip(self.planes[1:-1], pairwise(self.segments), strict=True)]

    @cached_property
    def arcs(self) -> list[Fillet]:
        """The fillets that are not sharp."""
        arcs = []
        for radius, (plane, left, right) in zip(self.fillets, self.steps, strict=True):
            thin, thick = sorted((left, right), key=lambda s: s.diameter)
            if radius > 0 and thick.diameter > thin.diameter:
                foot, rim = thin.diameter / 2, thick.diameter / 2
                side = 1 if thick is right else -1
                wall = foot - max(thin.bore, thick.bore) / 2
                arcs.append(Fillet(radius, plane, foot, rim - foot, side, thick.length / 2, wall / 2))
        return arcs

    @cached_property
    def grid(self) -> MeshQuad1:
        """Lines through all planes and radii, close together at the inner corners of sharp steps and along fillets."""
        fine = self.fineness
        knots_z, knots_r = [*self.planes, *self.knots], [x / 2 for s in self.segments for x in (s.diameter, s.bore)]
        corners_z, corners_r = dict.fromkeys(self.planes[1:-1], fine.corner), {}
        for _, left, right in self.steps:
            if left.diameter != right.diameter:
                corners_r[min(left.diameter, right.diameter) / 2] = fine.corner
            if left.bore != right.bore:
                corners_r[max(left.bore, right.bore) / 2] = fine.corner
        for arc in self.arcs:
            knots_z.append(arc.plane - arc.towards_thick * arc.length)
            knots_r.append(arc.foot + arc.rise)
            corners_z[arc.plane] = corners_z[knots_z[-1]] = 2 * arc.length / fine.per_fillet
            corners_r[arc.foot] = corners_r[knots_r[-1]] = 2 * arc.rise / fine.per_fillet
        return MeshQuad1.init_tensor(fine.line(knots_z, corners_z), fine.line(knots_r, corners_r))

    @cached_property
    def mesh(self) -> MeshQuad2:
        """The cells of the grid which lie in the solid, moved to the fillets."""
        z, r = self.grid.p[:, self.grid.t].mean(axis=1)
        _, outer, bore = np.array(self.segments)[np.searchsorted(self.planes, z) - 1].T / 2
        sharp = MeshQuad2.from_mesh(self.grid.restrict(np.flatnonzero((bore < r) & (r < outer))))
        nodes = sharp.doflocs
        return MeshQuad2(nodes + sum((arc.shift(*nodes) for arc in self.arcs), np.zeros_like(nodes)), sharp.t)
