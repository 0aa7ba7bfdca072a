"""Beams bent in one plane, built and read back through the public model.

Published beam tables know one plane; a shaft knows all directions of the clock. A `Plane` turns the table's loads
into the shaft's directions and the shaft's answers back, so that each case can be run towards 12 o'clock and towards
an hour between both axes, where a wrong sign between the planes would show.

Signs here: y, loads and reactions towards the plane's hour; slopes dy/dx; a bending moment is positive where it
stretches the side to which y points (positive between supports under a load along +y, as tables print it under a load
downwards); a shear force is positive where the part to the left is held back (+ at the left end of such a beam);
applied couples and couples of clamps are positive in the sense that turns x towards y.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np
import pytest
from numpy.typing import NDArray

import fe_shaft as fs
from tests.evidence.published import text

E, NU = 200e9, 0.3
STEEL = fs.Material("test_steel", youngs_modulus=text(E, "Pa"), poisson_ratio=NU, density="7850 kg/m^3")
SHEAR_MODULUS = E / (2 * (1 + NU))
CLAMP = ("radial", "axial", "tilt", "spin")


def second_moment(d: float, bore: float = 0.0) -> float:
    """Second moment of area of a round [m^4]."""
    return math.pi / 64 * (d**4 - bore**4)


def area(d: float, bore: float = 0.0) -> float:
    """Area of a round [m^2]."""
    return math.pi / 4 * (d**2 - bore**2)


def rod(length: float, d: float, bore: float = 0.0, **more: Any) -> fs.Segment:
    """A cylinder, all in metres."""
    hollow = {"bore": text(bore, "m")} if bore else {}
    return fs.Segment(length=text(length, "m"), diameter=text(d, "m"), **hollow, **more)


def cone(length: float, left: float, right: float) -> fs.Segment:
    """A solid cone, all in metres."""
    return fs.Segment(length=text(length, "m"), diameter=text(left, "m"), end_diameter=text(right, "m"))


def pin(name: str, x: float, **more: Any) -> fs.Pin:
    """A fixed hinge: holds across and along, lets tilt and spin."""
    return fs.Pin(name, at=text(x, "m"), holds=["radial", "axial"], **more)


def roller(name: str, x: float, **more: Any) -> fs.Pin:
    """A movable hinge: holds across only."""
    return fs.Pin(name, at=text(x, "m"), holds=["radial"], **more)


def clamp(name: str, x: float, **more: Any) -> fs.Pin:
    """A built-in end."""
    return fs.Pin(name, at=text(x, "m"), holds=list(CLAMP), **more)


def guide(name: str, x: float, **more: Any) -> fs.Pin:
    """A built-in end that slides along the beam, so that no axial force can arise."""
    return fs.Pin(name, at=text(x, "m"), holds=["radial", "tilt"], **more)


def spring(name: str, x: float, k: float, **more: Any) -> fs.Bearing:
    """A radial spring [N/m]; odd stiffnesses of textbooks are meant as they stand."""
    stiffness = {"radial": text(k, "N/m"), "range_check": "off"}
    return fs.Bearing(name, at=text(x, "m"), holds=["radial"], stiffness=stiffness, **more)


@dataclass(frozen=True)
class Plane:
    """The plane through the shaft's axis and one hour of the clock."""

    degrees: float

    @property
    def toward(self) -> NDArray[np.float64]:
        """Components up and front of the plane's hour."""
        a = math.radians(self.degrees)
        return np.array([math.cos(a), math.sin(a)])

    @property
    def clock(self) -> str:
        """As the model writes it."""
        return text(self.degrees, "deg")

    def force(self, x: float, size: float, name: str = "load", **more: Any) -> fs.Force:
        """A point force [N]."""
        up, front = size * self.toward
        return fs.Force(name, at=text(x, "m"), up=text(up, "N"), front=text(front, "N"), **more)

    def even(self, x1: float, x2: float, w: float, name: str = "load") -> fs.Force:
        """An evenly distributed load [N/m] from x1 to x2."""
        return self.force((x1 + x2) / 2, w * (x2 - x1), name, spread=text(x2 - x1, "m"))

    def couple(self, x: float, size: float, name: str = "couple") -> fs.Force:
        """A couple [N m] that turns x towards the plane's hour."""
        up, front = size * self.toward
        return fs.Force(name, at=text(x, "m"), couple={"up": text(-front, "N m"), "front": text(up, "N m")})

    def solve(self, segments: Sequence[fs.Segment], *parts: Any, shear: float | str = "none", **heading: Any) -> Bent:
        """Solve a shaft of the test's steel as the plain beam of the formulas, which know no shoulders."""
        shaft = fs.Shaft("shaft", list(segments), material=STEEL.name, shear=shear)
        model = fs.Model("beam", [shaft, *parts], materials=[STEEL], shoulders="off", **heading)
        return Bent(self, fs.solve(model))


@dataclass(frozen=True)
class Bent:
    """The results of one load case, read in the plane."""

    plane: Plane
    results: fs.Results

    def station(self, x: float) -> Any:
        """Movement and section forces at a place [m]."""
        return self.results.case()["shaft"].at(text(x, "m"))

    def y(self, x: float) -> float:
        """Deflection [m]; nothing may move across the plane."""
        across = self.plane.toward[::-1] * [-1, 1] @ self.station(x).u[1:3]
        along = float(self.plane.toward @ self.station(x).u[1:3])
        assert abs(across) <= 1e-9 * abs(along) + 1e-15
        return along

    def slope(self, x: float) -> float:
        """Rotation of the section [rad], dy/dx without shear."""
        _, _, _, _, ry, rz = self.station(x).u
        return float(self.plane.toward @ [rz, -ry])

    def moment(self, x: float) -> float:
        """Bending moment just right of a place [N m]."""
        _, _, _, _, my, mz = self.station(x).section_force
        return -float(self.plane.toward @ [mz, -my])

    def shear(self, x: float) -> float:
        """Shear force just right of a place [N]."""
        return float(self.plane.toward @ self.station(x).section_force[1:3])

    def reaction(self, support: str) -> float:
        """Force of a support on the shaft [N]."""
        return float(self.plane.toward @ self.results.case()[support].wrench[1:3])

    def couple(self, support: str) -> float:
        """Couple of a support on the shaft [N m]."""
        _, _, _, _, my, mz = self.results.case()[support].wrench
        return float(self.plane.toward @ [mz, -my])

    def line(self, x: NDArray[np.float64]) -> tuple[NDArray[np.float64], NDArray[np.float64]]:
        """Deflections and bending moments at many places."""
        u, force = self.results.lines["shaft"].at(x)
        up, front = self.plane.toward
        return u[0] @ [0, up, front, 0, 0, 0], -(force[0] @ [0, 0, 0, 0, -front, up])


#: Every case of a beam table is run in both of these.
PLANES = (Plane(0.0), Plane(140.0))
both_planes = pytest.mark.parametrize("plane", PLANES, ids=["12_o_clock", "4_40"])
