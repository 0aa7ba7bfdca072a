"""Bearings whose stiffness is computed: from what is inside them to force laws that the solution asks."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import NDOF, RY, UX
from fe_shaft.laws.ball import BallLaw
from fe_shaft.laws.response import Response
from fe_shaft.laws.roller import RollerLaw
from fe_shaft.model.inside import CONFORMITY, KINDS, BearingKind
from fe_shaft.model.support import Bearing
from fe_shaft.rolling.ball_geometry import BallGeometry, spherical_conformity
from fe_shaft.rolling.roller_geometry import RollerGeometry
from fe_shaft.rolling.roller_profile import cylindrical, logarithmic

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

#: Radial movement beyond the clearance at which the reference stiffness is taken [m].
WORKING = 10e-6
#: Least axial and tilt stiffness of the reference, as shares of the radial one (tilt: at the pitch radius).
LEAST = 0.05


class Elements(NamedTuple):
    """Loads [N], contact angles [rad] and pressures [Pa] of the elements of one bearing, (n_cases, z) each."""

    load: Array
    angle: Array
    pressure: Array

    def kept(self, number: int, kind: BearingKind) -> Elements:
        """Without the columns that only fuller bearings have; both contact pairs of one ball as one."""
        half = self.load.shape[1] // 2 if kind.both_sides or (kind.rollers and kind.aligning) else 0
        first = Elements(*(each[:, :number] for each in self))
        if not half:
            return first
        second = Elements(*(each[:, half : half + number] for each in self))
        if kind.aligning:
            return Elements(*(np.concatenate(pair, axis=1) for pair in zip(first, second, strict=True)))
        larger = first.load >= second.load
        angle = np.where(larger, first.angle, second.angle)
        return Elements(first.load + second.load, angle, np.maximum(first.pressure, second.pressure))


class Computed(NamedTuple):
    """Computed bearings, balls first; b of them.

    Attributes
    ----------
    numbers : (b,), their numbers among the supports
    balls, rollers : laws of the ball bearings and of the roller bearings, None where there are none
    kinds : (b,)
    pitch_radius, clearance : (b,) [m]
    """

    numbers: Ints
    balls: BallLaw | None
    rollers: RollerLaw | None
    kinds: tuple[BearingKind, ...]
    pitch_radius: Array
    clearance: Array

    @property
    def n_balls(self) -> int:
        """How many are ball bearings."""
        return 0 if self.balls is None else self.balls.geometry.count

    def respond(self, e: Array) -> Response:
        """Energies, forces and tangents of all bearings; e (..., b, 6), inner less outer ring."""
        cut = self.n_balls
        told = []
        if self.balls is not None:
            told.append(self.balls.respond(e[..., :cut, :]))
        if self.rollers is not None:
            told.append(self.rollers.respond(e[..., cut:, :]))
        if len(told) == 1:
            return told[0]
        one, other = told
        return Response(
            np.concatenate([one.energy, other.energy], axis=-1),
            np.concatenate([one.force, other.force], axis=-2),
            np.concatenate([one.tangent, other.tangent], axis=-3),
        )

    def elements(self, e: Array) -> dict[int, Elements]:
        """What each ball or roller bears, by the number of the support; e (n_cases, b, 6)."""
        out, cut = {}, self.n_balls
        for law, first in ((self.balls, 0), (self.rollers, cut)):
            if law is None:
                continue
            count = law.geometry.count
            told = law.elements(e[:, first : first + count])
            pressure = np.maximum(told.pressure_inner, told.pressure_outer)
            for k in range(count):
                found = Elements(told.load[:, k], told.angle[:, k], pressure[:, k])
                out[int(self.numbers[first + k])] = found.kept(int(law.geometry.number[k]), self.kinds[first + k])
        return out

    @property
    def reference(self) -> Array:
        """Stiffness (b, 6, 6) under some microns of radial movement, the same in all directions across the shaft."""
        moved = np.zeros((2, len(self.numbers), NDOF))
        reach = np.maximum(self.clearance / 2, 0) + WORKING
        moved[0, :, 1] = moved[1, :, 2] = reach
        tangent = self.respond(moved).tangent
        radial = (tangent[0, :, 1, 1] + tangent[1, :, 2, 2]) / 2
        axial = np.maximum(tangent[..., UX, UX].mean(axis=0), LEAST * radial)
        tilt = np.maximum(tangent[..., RY, RY].mean(axis=0), LEAST * radial * self.pitch_radius**2)
        able = np.array([[kind.holds_axially, not kind.aligning] for kind in self.kinds], dtype=float)
        out = np.zeros((len(self.numbers), NDOF, NDOF))
        diagonal = np.stack([axial * able[:, 0], radial, radial, 0 * radial, *[tilt * able[:, 1]] * 2], axis=-1)
        out[:, np.arange(NDOF), np.arange(NDOF)] = diagonal
        return out


def computed_bearings(model: Model) -> Computed:
    """The computed bearings of a model that has any."""
    found = [(k, part) for k, part in enumerate(model.supports) if isinstance(part, Bearing) and part.computed]
    found.sort(key=lambda pair: KINDS[pair[1].kind or ""].rollers)
    bearings = [bearing for _, bearing in found]
    kinds = tuple(KINDS[bearing.kind or ""] for bearing in bearings)
    cut = sum(not kind.rollers for kind in kinds)
    return Computed(
        numbers=np.array([k for k, _ in found], dtype=np.intp),
        balls=_balls(bearings[:cut], kinds[:cut]) if cut else None,
        rollers=_rollers(bearings[cut:], kinds[cut:]) if cut < len(bearings) else None,
        kinds=kinds,
        pitch_radius=np.array([bearing.geometry.pitch_diameter.si / 2 for bearing in bearings if bearing.geometry]),
        clearance=np.array([_clearance(bearing) for bearing in bearings]),
    )


def _clearance(bearing: Bearing) -> float:
    return 0.0 if bearing.radial_clearance is None else bearing.radial_clearance.si


def _angle(bearing: Bearing) -> float:
    return 0.0 if bearing.contact_angle is None else bearing.contact_angle.si


def _balls(bearings: Sequence[Bearing], kinds: Sequence[BearingKind]) -> BallLaw:
    inside = [bearing.geometry for bearing in bearings if bearing.geometry is not None]
    ball = np.array([g.element_diameter.si for g in inside])
    pitch = np.array([g.pitch_diameter.si for g in inside])
    angle = np.array([_angle(bearing) for bearing in bearings])
    aligning = np.array([kind.aligning for kind in kinds])
    inner, outer = (
        np.array([CONFORMITY if g.groove is None else getattr(g.groove, ring) for g in inside])
        for ring in ("inner", "outer")
    )
    geometry = BallGeometry.of(
        [g.elements for g in inside],
        ball,
        pitch,
        inner_conformity=inner,
        outer_conformity=np.where(aligning, spherical_conformity(ball, pitch, angle), outer),
        contact_angle=angle,
        clearance=[_clearance(bearing) for bearing in bearings],
        both_sides=[kind.both_sides for kind in kinds],
        free_tilt=aligning,
    )
    return BallLaw.of(geometry)


def _rollers(bearings: Sequence[Bearing], kinds: Sequence[BearingKind]) -> RollerLaw:
    each = [
        RollerGeometry.of(
            g.elements,
            g.element_diameter.si,
            0.0 if g.roller_length is None else g.roller_length.si,
            g.pitch_diameter.si,
            contact_angle=_angle(bearing),
            clearance=_clearance(bearing),
            both_sides=kind.aligning,
            free_tilt=kind.aligning,
            profile=logarithmic if g.profile == "logarithmic" else cylindrical,
        )
        for bearing, kind in zip(bearings, kinds, strict=True)
        if (g := bearing.geometry) is not None
    ]
    return RollerLaw.of(RollerGeometry.stacked(each))
