"""What moved, by the engineer's names: parts, gears, supports, in all cases (arrays) or in one case (floats)."""

from __future__ import annotations

from dataclasses import dataclass, fields, replace
from typing import Any, Generic, TypeVar, cast

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import RX, RY, RZ, UX, UY, UZ
from fe_shaft.results.quantity import QUANTITIES, in_unit
from fe_shaft.units import show

Array = NDArray[np.float64]
MOST_TOLD = 6  # cases whose values a prompt shows
#: An array over the cases, or one float.
Number = TypeVar("Number", Array, float)


@dataclass(frozen=True)
class Movement(Generic[Number]):
    """Six displacements of a place on a shaft's axis.

    Attributes
    ----------
    name : of the part
    u : (n_cases, 6) or (6,) [m, rad]
        ux uy uz rx ry rz in the shaft's frame.
    load : (n_cases, 6) or (6,) [N, N m]
        Wrench that the part's own loads put on the shaft, at the axis.
    """

    name: str
    u: Array
    load: Array

    kind = "place"

    def __repr__(self) -> str:
        """Every quantity in its trade unit."""
        told = (f"{name} {_told(self.value(name), QUANTITIES[name].unit)}" for name in self.quantities())
        return f"<{self.name}: {', '.join(told)}>"

    def in_case(self, k: int) -> Any:
        """The same in one case: floats instead of arrays."""
        cut = {f.name: getattr(self, f.name)[k] for f in fields(self) if isinstance(getattr(self, f.name), np.ndarray)}
        return replace(self, **cut)

    def _give(self, value: Any) -> Number:
        return cast("Number", float(value) if np.ndim(value) == 0 else value)

    def value(self, name: str) -> Any:
        """Quantity by name, SI."""
        return getattr(self, name)

    @classmethod
    def quantities(cls) -> tuple[str, ...]:
        """Names of the quantities that this has."""
        return tuple(name for name in QUANTITIES if hasattr(cls, name))

    @property
    def deflection(self) -> Number:
        """Radial movement [m]."""
        return self._give(np.hypot(self.u[..., UY], self.u[..., UZ]))

    @property
    def up(self) -> Number:
        """Movement towards 12 o'clock [m]."""
        return self._give(self.u[..., UY])

    @property
    def front(self) -> Number:
        """Movement towards 3 o'clock [m]."""
        return self._give(self.u[..., UZ])

    @property
    def axial(self) -> Number:
        """Movement to the right [m]."""
        return self._give(self.u[..., UX])

    @property
    def slope(self) -> Number:
        """Rotation of the cross-section out of its plane [rad]."""
        return self._give(np.hypot(self.u[..., RY], self.u[..., RZ]))

    @property
    def twist(self) -> Number:
        """Rotation about the axis, clockwise seen from the left [rad]."""
        return self._give(self.u[..., RX])

    deflection_um, up_um, front_um, axial_um = map(in_unit, ("deflection", "up", "front", "axial"))
    slope_mrad, twist_mrad = map(in_unit, ("slope", "twist"))


@dataclass(frozen=True, repr=False)
class GearMovement(Movement[Number]):
    """Of a gear's rim: also against its mate.

    Attributes
    ----------
    body : (n_cases, 6) or (6,) [m, rad]
        How far the rim moves against the shaft, by the gear's body; part of `u`.
    point : (3,) [m], from the axis to the pitch point
    towards_mate, along : (3,) unit vectors: to the mate's axis; along the pitch circle, clockwise from left
    sense : (n_cases,) or a number: +1 turns clockwise from left, or not at all; -1 the other way
    """

    body: Array
    point: tuple[float, float, float]
    towards_mate: tuple[float, float, float]
    along: tuple[float, float, float]
    sense: Array

    kind = "gear"

    @property
    def separation(self) -> Number:
        """Movement away from the mate [m]."""
        return self._give(-(self.u[..., :3] @ np.array(self.towards_mate)))

    @property
    def tangential(self) -> Number:
        """Movement of the axis along the pitch circle, with the turning [m]."""
        return self._give(self.sense * (self.u[..., :3] @ np.array(self.along)))

    @property
    def at_point(self) -> Array:
        """Movement of the pitch point itself, rigid with the axis, (..., 3) [m]."""
        return self.u[..., :3] + np.cross(self.u[..., 3:], np.array(self.point))

    @property
    def body_movement(self) -> Number:
        """Radial movement of the rim against the shaft [m]."""
        return self._give(np.hypot(self.body[..., UY], self.body[..., UZ]))

    @property
    def body_tilt(self) -> Number:
        """Tilt of the rim against the shaft [rad]."""
        return self._give(np.hypot(self.body[..., RY], self.body[..., RZ]))

    separation_um, tangential_um = map(in_unit, ("separation", "tangential"))
    body_movement_um, body_tilt_mrad = map(in_unit, ("body_movement", "body_tilt"))


@dataclass(frozen=True, repr=False)
class SupportMovement(Movement[Number]):
    """Of a support: also what it carries and how far it gives.

    Attributes
    ----------
    wrench : (n_cases, 6) or (6,) [N, N m]
        Force and couple ON the shaft, at the load centre.
    relative : same shape [m, rad]
        Inner ring against outer ring, at the load centre (a pin: against its bore).
    seat : same shape [m, rad]
        Outer ring, at the load centre; prescribed offsets included.
    """

    wrench: Array
    relative: Array
    seat: Array

    kind = "support"

    @property
    def tilt(self) -> Number:
        """Tilt of the inner ring against the outer ring [rad]."""
        return self._give(np.hypot(self.relative[..., RY], self.relative[..., RZ]))

    @property
    def give(self) -> Number:
        """Radial movement of the inner ring against the outer ring [m]."""
        return self._give(np.hypot(self.relative[..., UY], self.relative[..., UZ]))

    @property
    def seat_movement(self) -> Number:
        """Radial movement of the outer ring with its seat [m]."""
        return self._give(np.hypot(self.seat[..., UY], self.seat[..., UZ]))

    @property
    def force(self) -> Number:
        """Resultant force on the shaft [N]."""
        return self._give(np.sqrt((self.wrench[..., :3] ** 2).sum(axis=-1)))

    @property
    def radial_force(self) -> Number:
        """Force on the shaft across its axis [N]."""
        return self._give(np.hypot(self.wrench[..., UY], self.wrench[..., UZ]))

    @property
    def axial_force(self) -> Number:
        """Force on the shaft along its axis, + to the right [N]."""
        return self._give(self.wrench[..., UX])

    @property
    def up_force(self) -> Number:
        """Force on the shaft towards 12 o'clock [N]."""
        return self._give(self.wrench[..., UY])

    @property
    def front_force(self) -> Number:
        """Force on the shaft towards 3 o'clock [N]."""
        return self._give(self.wrench[..., UZ])

    @property
    def tilt_moment(self) -> Number:
        """Moment on the shaft across its axis, at the load centre [N m]."""
        return self._give(np.hypot(self.wrench[..., RY], self.wrench[..., RZ]))

    tilt_mrad, give_um, seat_movement_um = map(in_unit, ("tilt", "give", "seat_movement"))
    force_N, radial_force_N, axial_force_N = map(in_unit, ("force", "radial_force", "axial_force"))
    up_force_N, front_force_N, tilt_moment_Nm = map(in_unit, ("up_force", "front_force", "tilt_moment"))


def _told(values: Any, unit: str) -> str:
    """Such as "42.9 um"; of many cases the first ones: "[42.9, 43.4, ...] um"."""
    if np.ndim(values) == 0:
        return show(float(values), unit)
    first = [show(float(value), unit).removesuffix(f" {unit}") for value in values[:MOST_TOLD]]
    return f"[{', '.join(first + ['...'] * (len(values) > MOST_TOLD))}] {unit}"
