"""Force law of roller bearings: cylindrical, needle, tapered, thrust and spherical ones.

Laminae of a roller touch both rings along one normal, at the contact angle; the roller shares a tilt of the rings
equally. Its own equilibrium, its skew and the load of its rib stand outside (as in ISO/TS 16281). With one angle for
both races a tapered roller's rib load is left out too.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import NamedTuple, Self

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.laws.line_contact import (
    ENERGY,
    LOAD,
    STIFFNESS,
    Sums,
    curvature_sums,
    lamina_constant,
    lamina_load,
    lamina_sums,
    pressure,
)
from fe_shaft.laws.response import Response
from fe_shaft.rolling.roller_geometry import RollerGeometry

Array = NDArray[np.float64]
Ints = NDArray[np.int64]

#: Laminae worked on at once: so many numbers, six times, stay in the processor's cache.
CHUNK = 1 << 13
#: The displacements that carry: all but rx.
CARRY = np.array([0, 1, 2, 4, 5])
#: Pairs of them, and where those stand among the 36 of a tangent; the place behind the last pair holds a 0.
FIRST, SECOND = (CARRY[of] for of in np.triu_indices(5))
SPREAD = np.full((6, 6), len(FIRST))
SPREAD[FIRST, SECOND] = SPREAD[SECOND, FIRST] = np.arange(len(FIRST))


class RollerElements(NamedTuple):
    """What each roller bears.

    Columns are the rollers from `first` on, clockwise seen from the left; a second row follows behind the first.
    Columns and laminae a bearing has not are zero.

    Attributes
    ----------
    load : (..., b, z) [N]
    laminae : (..., b, z, n) [N]
    angle : (..., b, z) contact angle where loaded, positive where the inner ring is pressed to the right [rad]
    pressure_inner, pressure_outer : (..., b, z) largest of all laminae [Pa]
    """

    load: Array
    laminae: Array
    angle: Array
    pressure_inner: Array
    pressure_outer: Array


class _Rows(NamedTuple):
    """How displacements close the rollers; z counts the rollers of all rows, filled up to the largest number.

    Attributes
    ----------
    closing : (b, 6, 2 z) approach of each roller's middle by each displacement; then its growth along x
    gap : (b, 1, z) what must be closed first [m], infinite where there is no roller
    energy : (b, 1) factor of the sums of energies
    force, tangent : (b, 2 z, 6), (b, 3 z, 16) what sums over laminae contribute to load and pairs of the tangent
    drop, x : (n, b) both drops of a lamina [m], its place [m]
    reach, least : (b, 1, 1) farthest lamina, smallest of both drops [m]
    """

    closing: Array
    gap: Array
    energy: Array
    force: Array
    tangent: Array
    drop: Array
    x: Array
    reach: Array
    least: Array


@dataclass(frozen=True, eq=False)
class RollerLaw:
    """Roller bearings of any kinds as one law of b bearings, about the centres of their pitch circles.

    For roller j at phi and lamina at x, with contact angle a (signed by the side) and lever l = x - sin(a) dm/2:
    d = sin(a) ux + cos(a) (cos(phi) uy + sin(phi) uz - s/2) + l (cos(phi) rz - sin(phi) ry) - 2 P(x).
    With `free_tilt` l = 0, because every normal meets the centre of the spherical raceway: that is where u counts.

    Attributes
    ----------
    geometry : b bearings
    """

    geometry: RollerGeometry

    @classmethod
    def of(cls, geometry: RollerGeometry) -> Self:
        """The law of the given bearings."""
        return cls(geometry)

    def respond(self, u: ArrayLike) -> Response:
        """Energy, load and tangent.

        Parameters
        ----------
        u : (..., b, 6) [m, rad]
            Inner ring less outer ring, at the centre of the pitch circle; rx has no effect.
        """
        rows, given = self._rows, np.asarray(u, dtype=float)
        shape = given.shape[:-1]
        sums = self._sums(*self._approach(_listed(given)))
        energy = sums[0].sum(axis=-1) * rows.energy
        force = _side_by_side(sums[1:3]) @ rows.force
        pairs = _side_by_side(sums[3:]) @ rows.tangent
        return Response(
            energy.T.reshape(shape),
            force.swapaxes(0, 1).reshape(*shape, 6),
            pairs.swapaxes(0, 1)[..., SPREAD].reshape(*shape, 6, 6),
        )

    def overlap(self, u: ArrayLike) -> Array:
        """Approach d of each lamina (..., b, z, n) [m], negative where it is open, -infinite where there is none."""
        rows, given = self._rows, np.asarray(u, dtype=float)
        middle, along = (of.swapaxes(0, 1)[..., None] for of in self._approach(_listed(given)))
        d = middle + along * rows.x.T[:, None] - rows.drop.T[:, None]
        return d.reshape(*given.shape[:-1], *d.shape[2:])

    def elements(self, u: ArrayLike) -> RollerElements:
        """What each roller and each lamina bears; see `RollerElements`. For output, after convergence."""
        g = self.geometry
        laminae = lamina_constant(g.length, g.laminae)[:, None, None] * lamina_load(self.overlap(u))
        load = laminae.sum(axis=-1)
        per_length = laminae.max(axis=-1) * (g.laminae / g.length)[:, None]
        curvatures = curvature_sums(g.roller_diameter, g.pitch_diameter, g.cosine)
        inner, outer = (pressure(per_length, of[:, None], g.youngs[:, None], g.poisson[:, None]) for of in curvatures)
        angle = np.where(load > 0, self._signed_angle, 0.0)
        return RollerElements(load, laminae, angle, inner, outer)

    def _approach(self, u: Array) -> tuple[Array, Array]:
        """Approach of the rollers' middles and its growth along them, both (b, m, z); u (m, b, 6)."""
        rows = self._rows
        both = u.swapaxes(0, 1) @ rows.closing
        z = rows.gap.shape[2]
        return both[..., :z] - rows.gap, both[..., z:]

    def _sums(self, middle: Array, along: Array) -> Array:
        """Sums over the laminae of each roller (6, b, m, z), as in `Sums`; only rollers that may touch cost."""
        rows = self._rows
        touching = np.flatnonzero(middle + np.abs(along) * rows.reach > rows.least)
        bearing = touching // (middle.shape[1] * middle.shape[2])
        middles, alongs = middle.ravel()[touching], along.ravel()[touching]
        sums = np.zeros((len(Sums._fields), middle.size))
        size = max(1, CHUNK // max(1, len(rows.x)))
        for start in range(0, len(touching), size):
            part = slice(start, start + size)
            x = rows.x.take(bearing[part], axis=1)
            depth = alongs[part] * x
            depth += middles[part]
            depth -= rows.drop.take(bearing[part], axis=1)
            sums[:, touching[part]] = lamina_sums(depth, x)
        return sums.reshape(-1, *middle.shape)

    @property
    def _signed_angle(self) -> Array:
        """Contact angles of all rollers (b, z), second rows with the other sign."""
        g = self.geometry
        second = g.both_sides[:, None] & (np.arange(self._columns) >= g.number[:, None])
        return np.asarray(np.where(second, -1.0, 1.0) * (g.side * g.contact_angle)[:, None])

    @property
    def _rollers(self) -> Ints:
        """Rollers of all rows (b,)."""
        return np.asarray(self.geometry.number * np.where(self.geometry.both_sides, 2, 1))

    @property
    def _columns(self) -> int:
        """Most rollers of any bearing, z."""
        return int(self._rollers.max(initial=0))

    @cached_property
    def _rows(self) -> _Rows:
        geometry = self.geometry
        j = np.arange(self._columns)
        phi = geometry.first[:, None] + 2 * np.pi * j / geometry.number[:, None]
        cos, sin, nil = np.cos(phi), np.sin(phi), np.zeros_like(phi)
        axial, radial = np.sin(self._signed_angle), geometry.cosine[:, None]
        tilts = np.where(geometry.free_tilt, 0.0, 1.0)[:, None]
        lever = -tilts * axial * geometry.pitch_diameter[:, None] / 2
        middle = np.stack((axial, radial * cos, radial * sin, nil, -lever * sin, lever * cos), axis=-1)
        along = np.stack((nil, nil, nil, nil, -tilts * sin, tilts * cos), axis=-1)
        closing = np.concatenate((middle, along), axis=1)
        gap = np.where(j < self._rollers[:, None], radial * geometry.clearance[:, None] / 2, np.inf)
        drop, x = 2 * geometry.profile, geometry.places
        constant = lamina_constant(geometry.length, geometry.laminae)[:, None, None]
        return _Rows(
            closing.swapaxes(1, 2), gap[:, None], ENERGY * constant[..., 0],
            LOAD * constant * closing, STIFFNESS * constant * _pairs(middle, along),
            np.ascontiguousarray(drop.T), np.ascontiguousarray(x.T),
            np.abs(x).max(axis=1)[:, None, None], drop.min(axis=1)[:, None, None],
        )  # fmt: skip


def _pairs(middle: Array, along: Array) -> Array:
    """What sums times 1, x, x^2 over a roller's laminae contribute to the pairs; a column of 0: (b, 3 z, 16)."""
    mixed = middle[..., FIRST] * along[..., SECOND] + along[..., FIRST] * middle[..., SECOND]
    squares = (middle[..., FIRST] * middle[..., SECOND], mixed, along[..., FIRST] * along[..., SECOND])
    return np.pad(np.concatenate(squares, axis=1), ((0, 0), (0, 0), (0, 1)))


def _listed(u: Array) -> Array:
    """(..., b, 6) as (m, b, 6)."""
    return u.reshape(math.prod(u.shape[:-2]), *u.shape[-2:])


def _side_by_side(sums: Array) -> Array:
    """(k, b, m, z) as (b, m, k z)."""
    k, b, m, z = sums.shape
    return sums.transpose(1, 2, 0, 3).reshape(b, m, k * z)
