"""The force law of ball bearings: deep-groove, angular-contact, four-point contact, thrust and self-aligning.

Frame of the shaft: x along it to the right, y to 12 o'clock, z to 3 o'clock; u = (ux, uy, uz, rx, ry, rz) is the inner
ring less the outer one at the centre of the pitch circle, force the load that must act on the inner ring to hold u.
A ball at the angle phi (from y towards z) sees the centre of the inner groove move

    outwards          v_r = c uy + s uz + h t     c = cos phi, s = sin phi, t = c rz - s ry
    along the shaft   v_x = ux - R t              R, h: radius and axial place of the inner groove's centre

so the vector from the outer groove's centre to the inner one's is a = a0 + v. Both contacts carry the same load on that
one line:  d = |a| - A,  Q = c d^1.5 where d > 0,  energy = sum 2/5 c d^2.5. The tangent is exact: with n = a / |a| the
ball adds kn n n^T + Q / |a| (1 - n n^T), kn = 1.5 c d^0.5; the second term is the change of the contact angle. That is
the model of A. B. Jones, A General Theory for Elastically Constrained Ball and Radial Roller Bearings, J. Basic Eng. 82
(1960) 309, for rings at rest (from memory). ISO/TS 16281 writes the same in one load plane, with moments that take the
pitch radius where R belongs; deflections differ by about 1 %.

What degenerates: a thrust bearing (90 degrees) without axial load has no radial stiffness, with it only the term
Q / |a|. An axial load on a deep-groove bearing under radial load alone meets that term only. A four-point bearing is
taken as two contact pairs that do not know of each other, although they share a ball: exact while one pair of a ball
bears, 0.1 to 0.2 % soft in energy where both do (tests). A self-aligning bearing has no tilt stiffness; that its rows
turn with the inner ring is left out. Centrifugal and gyroscopic loads, ovalisation of rings and the film are not in
the law.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import NamedTuple, Self

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.laws.point_contact import (
    PointContact,
    effective_modulus,
    in_series,
    inner_contact,
    outer_contact,
)
from fe_shaft.laws.response import Response
from fe_shaft.rolling.ball_geometry import BallGeometry

Array = NDArray[np.float64]

#: Weights of the sums over balls, and what is summed: energy; loads outwards, along, about; second derivatives by the
#: movements outwards, along (numbered 1, 2) and the tilt t (3).
_ONE, _C, _S, _CC, _CS, _SS = range(6)
_ENERGY, _FR, _FX, _FT, _H11, _H12, _H13, _H22, _H23, _H33 = range(10)
#: Where each component of the force and each entry of the tangent (upper triangle) comes from: sum, weight, sign.
_FORCE = {0: (_FX, _ONE, 1), 1: (_FR, _C, 1), 2: (_FR, _S, 1), 4: (_FT, _S, -1), 5: (_FT, _C, 1)}
_TANGENT = {
    (0, 0): (_H22, _ONE, 1), (0, 1): (_H12, _C, 1), (0, 2): (_H12, _S, 1),
    (0, 4): (_H23, _S, -1), (0, 5): (_H23, _C, 1),
    (1, 1): (_H11, _CC, 1), (1, 2): (_H11, _CS, 1), (1, 4): (_H13, _CS, -1), (1, 5): (_H13, _CC, 1),
    (2, 2): (_H11, _SS, 1), (2, 4): (_H13, _SS, -1), (2, 5): (_H13, _CS, 1),
    (4, 4): (_H33, _SS, 1), (4, 5): (_H33, _CS, -1), (5, 5): (_H33, _CC, 1),
}  # fmt: skip


def _gather() -> tuple[NDArray[np.intp], Array]:
    """Index into the sums (10 x 6, flat) and sign of the 6 components of the force and the 36 of the tangent."""
    index, sign = np.zeros(42, dtype=np.intp), np.zeros(42)
    entries = {(row,): told for row, told in _FORCE.items()} | _TANGENT
    for place, (quantity, weight, factor) in entries.items():
        for flat in {place[0]} if len(place) == 1 else {6 + 6 * place[0] + place[1], 6 + 6 * place[1] + place[0]}:
            index[flat], sign[flat] = 6 * quantity + weight, factor
    return index, sign


_INDEX, _SIGN = _gather()


class BallElements(NamedTuple):
    """What each contact pair of each ball bears, all (..., b, z).

    Columns are the balls from `first` on, clockwise seen from the left; where there are second contact pairs, z is
    twice the largest number of balls and the second half holds them. Columns a bearing has no ball for are zero.

    Attributes
    ----------
    load : Q [N]
    angle : loaded contact angle from the radial plane, positive where the inner ring is pressed to the right [rad]
    pressure_inner, pressure_outer : largest pressures [Pa]
    over_shoulder : the contact ellipse reaches beyond the groove's shoulder
    wrong_side : loaded on the side of the groove that is not made for it
    """

    load: Array
    angle: Array
    pressure_inner: Array
    pressure_outer: Array
    over_shoulder: NDArray[np.bool_]
    wrong_side: NDArray[np.bool_]


class _Lines(NamedTuple):
    """Contact lines, one for each contact pair: (b, z), or (b, 1) where all of a bearing are alike."""

    c: Array
    s: Array
    stiffness: Array
    outwards: Array
    along: Array
    excess: Array
    distance: Array
    radius: Array
    lever: Array
    weights: Array


class _Stretch(NamedTuple):
    """Vectors between the groove centres: overlap |a| - A, length |a|, direction outwards and along; (..., b, z)."""

    overlap: Array
    length: Array
    outwards: Array
    along: Array


@dataclass(frozen=True)
class BallLaw:
    """Ball bearings as one batch; make it with `BallLaw.of`.

    Attributes
    ----------
    geometry : b bearings
    stiffness : (b,) [N / m^1.5]
        c of Q = c d^1.5 of both contacts in series, at the nominal contact angle.
    inner, outer : contacts (b,)
    """

    geometry: BallGeometry
    stiffness: Array
    inner: PointContact
    outer: PointContact

    @classmethod
    def of(cls, geometry: BallGeometry) -> Self:
        """The law of the given bearings, with Hertz's contacts.

        Raises
        ------
        SolutionError
            Where a conformity is not above 0.5.
        """
        g = geometry
        modulus = effective_modulus(g.youngs, g.poisson, g.ball_youngs, g.ball_poisson)
        inner = inner_contact(modulus, g.ball_diameter, g.inner_conformity, g.gamma)
        outer = outer_contact(modulus, g.ball_diameter, g.outer_conformity, g.gamma)
        return cls(g, in_series(inner.stiffness, outer.stiffness), inner, outer)

    def respond(self, u: ArrayLike) -> Response:
        """Energy, force and tangent.

        Parameters
        ----------
        u : (..., b, 6) [m, rad]
            Inner ring less outer ring, at the centre of the pitch circle; rx has no effect.
        """
        on, way = self._lines, self._stretch(np.asarray(u, dtype=float))
        d = np.maximum(way.overlap, 0.0)
        stiff = on.stiffness * np.sqrt(d)
        load = stiff * d
        turning = load / way.length
        bend = 1.5 * stiff - turning
        r, x = way.outwards, way.along
        # Twice the room: glibc hands back to the system what exceeds twice the largest block ever freed, and fetching
        # those pages again at every call would take three times as long as all the arithmetic.
        parts = np.empty((2, *d.shape[:-1], 10, d.shape[-1]))[0]
        energy, fr, fx, ft, k11, k12, k13, k22, k23, k33 = (parts[..., i, :] for i in range(10))
        np.multiply(0.4 * load, d, out=energy)
        np.multiply(load, r, out=fr)
        np.multiply(load, x, out=fx)
        np.subtract(on.lever * fr, on.radius * fx, out=ft)
        np.multiply(bend * r, x, out=k12)
        np.add(bend * r * r, turning, out=k11)
        np.add(bend * x * x, turning, out=k22)
        np.subtract(on.lever * k11, on.radius * k12, out=k13)
        np.subtract(on.lever * k12, on.radius * k22, out=k23)
        np.subtract(on.lever * k13, on.radius * k23, out=k33)
        summed = parts @ on.weights
        flat = summed.reshape(*summed.shape[:-2], 60)
        answer = flat[..., _INDEX] * _SIGN
        return Response(flat[..., 0], answer[..., :6], answer[..., 6:].reshape(*answer.shape[:-1], 6, 6))

    def overlap(self, u: ArrayLike) -> Array:
        """How far each contact pair is pressed together, negative where it is open [m], (..., b, z)."""
        return self._stretch(np.asarray(u, dtype=float)).overlap

    def elements(self, u: ArrayLike) -> BallElements:
        """What each ball bears; see `BallElements`. For output, after convergence."""
        way, g = self._stretch(np.asarray(u, dtype=float)), self.geometry
        load = self._lines.stiffness * np.maximum(way.overlap, 0.0) ** 1.5
        angle, loaded = np.arctan2(way.along, way.outwards), load > 0
        cube = np.cbrt(load)
        widest = np.maximum(self.inner.unit_axes[0], self.outer.unit_axes[0])[:, None] * cube
        reach = np.arcsin(np.minimum(2 * widest / g.ball_diameter[:, None], 1.0))
        off_bottom = np.abs(np.abs(angle) - g.groove_bottom[:, None])
        return BallElements(
            load,
            np.where(loaded, angle, 0.0),
            self.inner.unit_pressure[:, None] * cube,
            self.outer.unit_pressure[:, None] * cube,
            loaded & (off_bottom + reach > g.shoulder_angle[:, None]),
            loaded & self._strays(way),
        )

    @cached_property
    def balls(self) -> tuple[Array, NDArray[np.bool_]]:
        """Angle of each contact pair's ball from 12 o'clock [rad], and whether there is one, both (b, z)."""
        g = self.geometry
        column = np.arange(int(g.number.max(initial=1)))
        phi = g.first[:, None] + 2 * np.pi * column / np.maximum(g.number, 1)[:, None]
        there = column < g.number[:, None]
        if g.both_sides.any():
            phi, there = np.hstack([phi, phi]), np.hstack([there, there & g.both_sides[:, None]])
        return np.where(there, phi, 0.0), there

    @cached_property
    def _sides(self) -> Array:
        """Side of each contact pair, (b, z) or (b, 1)."""
        side = self.geometry.side[:, None]
        if not self.geometry.both_sides.any():
            return side
        half = self.balls[0].shape[1] // 2
        return np.repeat(np.hstack([side, -side]), half, axis=1)

    @cached_property
    def _lines(self) -> _Lines:
        g, (phi, there) = self.geometry, self.balls
        c, s = np.where(there, np.cos(phi), 0.0), np.where(there, np.sin(phi), 0.0)
        cosine, sine = np.cos(g.contact_angle)[:, None], np.sin(g.contact_angle)[:, None]
        distance, gap = g.centre_distance[:, None], g.clearance[:, None] / 2
        hold = np.where(g.free_tilt, 0.0, 1.0)[:, None]
        behind = ((g.inner_conformity - 0.5) * g.ball_diameter)[:, None]
        return _Lines(
            c=c,
            s=s,
            stiffness=np.where(there, self.stiffness[:, None], 0.0),
            outwards=distance * cosine - gap,
            along=distance * sine * self._sides,
            excess=gap * (gap - 2 * distance * cosine),
            distance=distance,
            radius=hold * (g.pitch_diameter[:, None] / 2 + behind * cosine),
            lever=hold * behind * sine * self._sides,
            weights=np.stack([there.astype(float), c, s, c * c, c * s, s * s], axis=-1),
        )

    def _stretch(self, u: Array) -> _Stretch:
        """The overlap is (|a|^2 - A^2) / (|a| + A) written out, so that small ones keep their digits."""
        on = self._lines
        ux, uy, uz, ry, rz = (u[..., i, None] for i in (0, 1, 2, 4, 5))
        tilt = on.c * rz - on.s * ry
        vr, vx = on.c * uy + on.s * uz + on.lever * tilt, ux - on.radius * tilt
        r, x = on.outwards + vr, on.along + vx
        length = np.sqrt(r * r + x * x)
        grown = on.excess + vr * (on.outwards + r) + vx * (on.along + x)
        overlap = grown / (length + on.distance)
        length = np.maximum(length, on.distance / 2)  # shorter, nothing is pressed: do not divide by 0
        return _Stretch(overlap, length, r / length, x / length)

    def _strays(self, way: _Stretch) -> NDArray[np.bool_]:
        """The line of contact has left the half of the groove made for it, or crosses the ball the wrong way."""
        on, angled = self._lines, self.geometry.contact_angle[:, None] > 0
        against = way.outwards * on.outwards + way.along * on.along < 0
        return np.asarray(against | (angled & (way.along * self._sides < 0)))
