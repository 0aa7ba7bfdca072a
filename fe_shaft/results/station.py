"""Any place along a bent shaft, and the shaft as a whole."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, field

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import UsageError
from fe_shaft.results.extremes import largest_along
from fe_shaft.results.line import Line
from fe_shaft.results.movement import Movement, Number
from fe_shaft.units import show

Array = NDArray[np.float64]

ROUNDING = 1e-9  # of the shaft's length: what sums of lengths may miss an end by


@dataclass(frozen=True, repr=False)
class Station(Movement[Number]):
    """Movement and section forces at a place.

    Attributes
    ----------
    x : [m] from the shaft's left end
    section_force : (n_cases, 6) or (6,) [N, N m]
        N, V_y, V_z, M_x, M_y, M_z on the face that looks to the right, just right of the place.
    """

    x: float
    section_force: Array

    kind = "station"

    @property
    def axial_force(self) -> Number:
        """Axial force, + tension [N]."""
        return self._give(self.section_force[..., 0])

    @property
    def shear_force(self) -> Number:
        """Resultant shear force [N]."""
        return self._give(np.hypot(self.section_force[..., 1], self.section_force[..., 2]))

    @property
    def torque(self) -> Number:
        """Torque on the face that looks to the right, clockwise from left [N m]."""
        return self._give(self.section_force[..., 3])

    @property
    def bending_moment(self) -> Number:
        """Resultant bending moment [N m]."""
        return self._give(np.hypot(self.section_force[..., 4], self.section_force[..., 5]))


@dataclass(frozen=True)
class ShaftResults:
    """A shaft in all cases: its line, its largest values, and any station.

    Attributes
    ----------
    find : place in words ("wheel + 12 mm") to metres from the left end
    """

    name: str
    line: Line = field(repr=False)
    find: Callable[[str], float] = field(repr=False)

    def at(self, place: str) -> Station[Array]:
        """Movement and section forces at a place, such as "62 mm" or "wheel + 12 mm"."""
        x, length = self.find(place), self.line.length
        if not -ROUNDING * length <= x <= (1 + ROUNDING) * length:
            end = show(length, "mm", 6)
            raise UsageError(
                f'"{place}" is {show(x, "mm", 6)}, off the shaft: {self.name} is {end} long. Write 0 mm to {end}.'
            )
        u, force = self.line.at(x)
        return Station(place, u[:, 0], np.zeros_like(u[:, 0]), x, force[:, 0])

    def largest(self, quantity: str) -> tuple[Array, Array]:
        """Largest value along the shaft and its place, (n_cases,) each; deflection, slope, bending_moment or torque."""
        return largest_along(self.line, quantity)


@dataclass(frozen=True)
class ShaftCase:
    """A shaft in one case."""

    shaft: ShaftResults
    k: int

    def at(self, place: str) -> Station[float]:
        """Movement and section forces at a place, as floats."""
        station: Station[float] = self.shaft.at(place).in_case(self.k)
        return station

    def largest(self, quantity: str) -> tuple[float, float]:
        """Largest value along the shaft and its place [m]; see `ShaftResults.largest`."""
        value, x = self.shaft.largest(quantity)
        return float(value[self.k]), float(x[self.k])
