"""The same drawn shaft described from another side, and what that makes of its vectors.

Forces and shifts are polar vectors, couples and turns axial ones: they differ in a mirror.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass, replace
from decimal import Decimal

import numpy as np
from numpy.typing import NDArray

from tests.oracle.shaft_spec import ForceSpec, SegmentSpec, ShaftSpec, SupportSpec

Array = NDArray[np.float64]
CROSSED = {"up": "front", "front": "up", "tilt_up": "tilt_front", "tilt_front": "tilt_up"}


@dataclass(frozen=True)
class Move:
    """A way to look at a shaft: a turn or a mirror (3, 3), and whether its ends change places."""

    matrix: Array
    swapped: bool = False

    @property
    def six(self) -> Array:
        """What it makes of shifts and turns, or of forces and couples, (6, 6)."""
        out = np.zeros((6, 6))
        out[:3, :3], out[3:, 3:] = self.matrix, np.linalg.det(self.matrix) * self.matrix
        return out

    def vectors(self, values: Array) -> Array:
        """Displacements or wrenches (n_cases, n, 6) along a line, as the other side sees them."""
        seen = values @ self.six.T
        return seen[:, ::-1] if self.swapped else seen

    def spec(self, spec: ShaftSpec) -> ShaftSpec:
        """The shaft as the other side describes it."""
        length = sum((Decimal(repr(segment.length)) for segment in spec.segments), Decimal(0))
        place: Callable[[float], float] = (
            (lambda x: float(length - Decimal(repr(x)))) if self.swapped else (lambda x: x)
        )
        segments = tuple(_turned(s) for s in reversed(spec.segments)) if self.swapped else spec.segments
        x, y, z = (float(v) for v in self.matrix @ np.array(spec.gravity))
        return replace(
            spec,
            segments=segments,
            supports=tuple(self._support(support, place) for support in spec.supports),
            forces=tuple(self._force(force, place) for force in spec.forces),
            gravity=(x, y, z),
        )

    def _angle(self, degrees: float) -> float:
        direction = self.matrix[1:, 1:] @ np.array([math.cos(math.radians(degrees)), math.sin(math.radians(degrees))])
        return math.degrees(math.atan2(direction[1], direction[0]))

    def _force(self, force: ForceSpec, place: Callable[[float], float]) -> ForceSpec:
        wrench = [force.axial, force.up, force.front, force.couple_axial, force.couple_up, force.couple_front]
        seen = (float(value) for value in self.six @ np.array(wrench))
        names = ("axial", "up", "front", "couple_axial", "couple_up", "couple_front")
        angle = self._angle(force.angle) if force.radius else 0.0
        return replace(force, x=place(force.x), angle=angle, **dict(zip(names, seen, strict=True)))

    def _support(self, support: SupportSpec, place: Callable[[float], float]) -> SupportSpec:
        tilt_angle = support.bore_tilt_angle + (180.0 if self.swapped else 0.0)  # the other end leans the other way
        return replace(
            support,
            x=place(support.x),
            load_centre=-support.load_centre if self.swapped else support.load_centre,
            offset_angle=self._angle(support.offset_angle),
            bore_tilt_angle=self._angle(tilt_angle),
            stiffness=self._springs(support.stiffness),
            seat=self._springs(support.seat),
            matrix=self._matrix(support.matrix),
        )

    def _springs(self, named: dict[str, float] | None) -> dict[str, float] | None:
        across = abs(self.matrix[1, 2]) > 0.5
        if named is None or not across:
            return named
        assert abs(self.matrix[1, 1]) < 1e-9 or not set(named) & set(CROSSED), (
            "springs along the clock only turn by 90 deg"
        )
        return {CROSSED.get(name, name): value for name, value in named.items()}

    def _matrix(self, rows):
        if rows is None:
            return None
        seen = self.six @ np.array(rows) @ self.six.T
        return tuple(tuple(float(value) for value in row) for row in (seen + seen.T) / 2)


def _turned(segment: SegmentSpec) -> SegmentSpec:
    if segment.end_diameter is None and segment.end_bore is None:
        return segment
    outer = segment.diameter if segment.end_diameter is None else segment.end_diameter
    bore = segment.bore if segment.end_bore is None else segment.end_bore
    return SegmentSpec(segment.length, outer, segment.diameter, bore, segment.bore)


def roll(degrees: float) -> Move:
    """The shaft turned about its axis, clockwise from the left."""
    c, s = math.cos(math.radians(degrees)), math.sin(math.radians(degrees))
    if degrees % 90 == 0:
        c, s = round(c), round(s)
    return Move(np.array([[1.0, 0.0, 0.0], [0.0, c, -s], [0.0, s, c]]))


MIRROR = Move(np.diag([1.0, 1.0, -1.0]))  # front and back change places
SWAP = Move(np.diag([-1.0, 1.0, -1.0]), swapped=True)  # turned about 12 o'clock: left and right change places


def round_springs(spec: ShaftSpec) -> ShaftSpec:
    """The shaft with springs that are the same in all directions across the axis, so that it may be rolled anyhow."""

    def even(named):
        if named is None:
            return None
        pairs = {"up": "radial", "tilt_up": "tilt"}
        return {pairs.get(name, name): value for name, value in named.items() if name not in ("front", "tilt_front")}

    supports = tuple(replace(s, stiffness=even(s.stiffness), seat=even(s.seat)) for s in spec.supports)
    return replace(spec, supports=supports)
