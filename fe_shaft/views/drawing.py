"""What is drawn of a result: the shafts and everything on them, each as a shape at rest and a movement per case.

Every shape lies in the model's coordinates. What is drawn is ``rest + exaggeration * movement(case)``, one linear map
for the whole picture.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.results.body import Body
from fe_shaft.views.shapes import Shape

if TYPE_CHECKING:
    from fe_shaft.results.line import Line

Floats = NDArray[np.float64]
Movement = Callable[[int], Floats]


@dataclass(frozen=True)
class Piece:
    """One thing drawn.

    Parameters
    ----------
    style : "steel", "ring", "glass", "ink", "pin" or "clock"
    shape : at rest
    movement : of a case, (n_points, 3) [m], or None for what stands still
    """

    style: str
    shape: Shape
    movement: Movement | None = None

    def moved(self, case: int) -> Floats:
        """Movement of its points in a case, (n_points, 3) [m]."""
        return np.zeros_like(self.shape.points) if self.movement is None else self.movement(case)


@dataclass(frozen=True)
class Stance:
    """How a shaft stands in the model: from its own frame to the model's."""

    origin: Floats
    rotation: Floats

    def point(self, points: Floats) -> Floats:
        """Points (..., 3) of the shaft's frame in the model."""
        return np.asarray(self.origin + points @ self.rotation.T)

    def vector(self, vectors: Floats) -> Floats:
        """Vectors (..., 3) of the shaft's frame in the model."""
        return np.asarray(vectors @ self.rotation.T)

    def shape(self, shape: Shape) -> Shape:
        """A shape of the shaft's frame in the model."""
        return Shape(self.point(shape.points), self.vector(shape.normals), shape.triangles, shape.lines)


@dataclass(frozen=True)
class ShaftSkin:
    """The surface of one shaft, to be coloured.

    Parameters
    ----------
    name : of the shaft
    frame : how it stands in the model
    line, body : of the results, and turned about the axis
    u, force : (n_cases, n_rings, 6), movements and section forces of the rings
    """

    name: str
    frame: Stance
    line: Line
    body: Body
    u: Floats
    force: Floats

    def case(self, case: int) -> tuple[Floats, Floats]:
        """Movement [m] and turn of the normals [rad] of every point in a case, (n_points, 3) each."""
        u = self.u[case]
        return self.frame.vector(self.body.movement(u)), self.frame.vector(self.body.turn(u))


@dataclass(frozen=True)
class Arrow:
    """A force, or a torque, at a place that moves with its shaft.

    Parameters
    ----------
    name : of the part
    support : whether a support puts it on the shaft (else a load does)
    point : (3,) [m], where it attacks, in the model
    movement : of that point in a case, (3,) [m]
    force : (n_cases, 3) [N], in the model, on the shaft
    couple : (n_cases, 3) [N m]
    clear : [m], distance that the tip keeps from the point, so that it stands on the surface
    around : [m], radius of what a bent arrow goes around
    axis : (3,), of the shaft, of length 1
    """

    name: str
    support: bool
    point: Floats
    movement: Movement
    force: Floats
    couple: Floats
    clear: float
    around: float
    axis: Floats


@dataclass(frozen=True)
class Mark:
    """A part that can have a label: its name, what pictures call it, and a point of its outline at 12 o'clock."""

    name: str
    called: str
    point: Floats
    movement: Movement


@dataclass(frozen=True)
class Clock:
    """The clock at a shaft's left end.

    Parameters
    ----------
    x, radius : [m], in the shaft's frame
    hours : (4, 3) [m], where 12, 3, 6 and 9 are written, in the model
    senses : of every case: +1 clockwise from left, -1 the other way, 0 where nothing turns it
    """

    frame: Stance
    x: float
    radius: float
    hours: Floats
    senses: tuple[int, ...]

    def sense(self, case: int) -> int:
        """How the shaft turns in a case."""
        return self.senses[case]


@dataclass(frozen=True)
class Drawing:
    """Everything that is drawn of one result."""

    skins: tuple[ShaftSkin, ...]
    pieces: tuple[Piece, ...]
    arrows: tuple[Arrow, ...]
    marks: tuple[Mark, ...]
    clocks: tuple[Clock, ...]
    length: float
