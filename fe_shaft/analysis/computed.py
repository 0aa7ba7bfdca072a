"""Bearings whose stiffness is computed: from what is inside them to force laws that the solution asks."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import NDOF, RX, RY, UX
from fe_shaft.laws.ball import BallElements, BallLaw
from fe_shaft.laws.response import Response
from fe_shaft.laws.roller import RollerElements, RollerLaw
from fe_shaft.model.inside import KINDS, BearingKind
from fe_shaft.model.support import Bearing
from fe_shaft.rolling.ball_geometry import BallGeometry
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


class Computed(NamedTuple):
    """Computed bearings, balls first; b of them.

    Attributes
    ----------
    numbers : (b,), their numbers among the supports
    laws : of the ball bearings and of the roller bearings, None where there are none
    kinds : (b,)
    pitch_radius : (b,) [m]
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

    def elements(self, e: Array) -> list[BallElements | RollerElements]:
        """What each ball or roller bears, a bearing at a time with one bearing each; e (n_cases, b, 6)."""
        cut, out = self.n_balls, []
        for k in range(len(self.numbers)):
            law, own = (self.balls, slice(0, cut)) if k < cut else (self.rollers, slice(cut, None))
            assert law is not None
            told = law.elements(e[:, own])
            out.append(type(told)(*(each[:, k - (own.start or 0)] for each in told)))
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
        out[:, RX, RX] = 0.0
        return out


def computed_bearings(model: Model) -> Computed | None:
    """The computed bearings of a model; None without any."""
    found = [(k, part) for k, part in enumerate(model.supports) if isinstance(part, Bearing) and part.computed]
    if not found:
        return None
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
    given = {
        "number": [g.elements for g in inside],
        "ball_diameter": [g.element_diameter.si for g in inside],
        "pitch_diameter": [g.pitch_diameter.si for g in inside],
        "contact_angle": [_angle(bearing) for bearing in bearings],
        "clearance": [_clearance(bearing) for bearing in bearings],
        "both_sides": [kind.both_sides for kind in kinds],
        "free_tilt": [kind.aligning for kind in kinds],
    }
    grooves = {
        f"{ring}_conformity": [0.52 if g.groove is None else getattr(g.groove, ring) for g in inside]
        for ring in ("inner", "outer")
    }
    sphere = [  # the outer raceway of a self-aligning bearing is a sphere about its centre
        (g.pitch_diameter.si / (2 * np.cos(_angle(b))) + g.element_diameter.si / 2) / g.element_diameter.si
        for g, b in zip(inside, bearings, strict=True)
    ]
    aligning = [kind.aligning for kind in kinds]
    grooves["outer_conformity"] = np.where(aligning, sphere, grooves["outer_conformity"]).tolist()
    return BallLaw.of(BallGeometry.of(**given, **grooves))


def _rollers(bearings: Sequence[Bearing], kinds: Sequence[BearingKind]) -> RollerLaw:
    each = [
        RollerGeometry.of(
            number=g.elements,
            diameter=g.element_diameter.si,
            length=0.0 if g.roller_length is None else g.roller_length.si,
            pitch_diameter=g.pitch_diameter.si,
            E=207e9,
            nu=0.3,
            contact_angle=_angle(bearing),
            clearance=_clearance(bearing),
            profile=logarithmic if g.profile == "logarithmic" else cylindrical,
            aligning=kind.aligning,
        )
        for bearing, kind in zip(bearings, kinds, strict=True)
        if (g := bearing.geometry) is not None
    ]
    return RollerLaw.of(RollerGeometry.stacked(each))
