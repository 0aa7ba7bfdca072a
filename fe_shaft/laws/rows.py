"""Bearings of several rows: any law's rows at places along the shaft, added up at the bearing's centre.

Paired bearings, by where the lines of contact meet the axis (common practice, no source):

    back-to-back   left row closed by pushing the inner ring to the right, right row to the left: wide apart, stiff
    face-to-face   the other way round: close together, gives to tilting
    tandem         all rows the same way: they share an axial load

A row at the offset s from the bearing's centre moves with its ring, uy + s rz and uz - s ry; its load comes back with
the moments that this makes. Preload is a movement along the shaft with which a row is mounted (`preset`).
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any, Generic, Protocol, Self, TypeVar

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.laws.response import Response

Array = NDArray[np.float64]

#: Sides of the rows from left to right, for a bearing whose own side is +1.
BACK_TO_BACK, FACE_TO_FACE, TANDEM = (1.0, -1.0), (-1.0, 1.0), (1.0, 1.0)


class Law(Protocol):
    """What rows may be made of."""

    def respond(self, u: ArrayLike) -> Response:
        """Energy, force and tangent of (..., r, 6)."""
        ...

    def elements(self, u: ArrayLike) -> Any:
        """What each ball or roller bears."""
        ...


LawT = TypeVar("LawT", bound=Law)


@dataclass(frozen=True)
class Rows(Generic[LawT]):
    """Bearings made of rows of one law; itself a law. Make it with `Rows.of`.

    Attributes
    ----------
    law : r rows, those of one bearing next to each other
    bearing : (r,) index of the bearing each row belongs to, rising from 0 without gaps
    offset : (r,) place of the row's centre, from the bearing's centre to the right [m]
    preset : (r,) movement of the row's inner ring to the right with which it is mounted [m]; closing is preload
    """

    law: LawT
    bearing: NDArray[np.intp]
    offset: Array
    preset: Array

    @classmethod
    def of(cls, law: LawT, bearing: ArrayLike, offset: ArrayLike, preset: ArrayLike = 0.0) -> Self:
        """Rows out of numbers or arrays (r,)."""
        index, where, moved = np.broadcast_arrays(np.asarray(bearing, dtype=np.intp), offset, preset)
        return cls(law, index, where.astype(float), moved.astype(float))

    @property
    def first_rows(self) -> NDArray[np.intp]:
        """Index of each bearing's first row, (b,)."""
        return np.flatnonzero(np.diff(self.bearing, prepend=-1))

    def respond(self, u: ArrayLike) -> Response:
        """Energy, force and tangent of the bearings at their centres; u (..., b, 6) [m, rad]."""
        told, first = self.law.respond(self.row_movement(u)), self.first_rows
        return Response(
            np.add.reduceat(told.energy, first, axis=-1),
            np.add.reduceat(_at_centre(told.force, self.offset), first, axis=-2),
            np.add.reduceat(_tangent_at_centre(told.tangent, self.offset), first, axis=-3),
        )

    def elements(self, u: ArrayLike) -> Any:
        """What the law tells of its rows, (..., r, z); row i belongs to bearing[i]."""
        return self.law.elements(self.row_movement(u))

    def row_movement(self, u: ArrayLike) -> Array:
        """Movement of each row's inner ring at the row's centre, (..., r, 6), from the bearings' (..., b, 6)."""
        row = np.asarray(u, dtype=float)[..., self.bearing, :]  # indexing copies
        row[..., 0] += self.preset
        row[..., 1] += self.offset * row[..., 5]
        row[..., 2] -= self.offset * row[..., 4]
        return row


def _at_centre(force: Array, offset: Array) -> Array:
    """Loads (..., r, 6) of rows at the offsets (r,), as loads at the bearing's centre."""
    out = force.copy()
    out[..., 4] -= offset * force[..., 2]
    out[..., 5] += offset * force[..., 1]
    return out


def _tangent_at_centre(tangent: Array, offset: Array) -> Array:
    """The same for both sides of tangents (..., r, 6, 6)."""
    half, s = tangent.copy(), offset[:, None]
    half[..., 4, :] -= s * tangent[..., 2, :]
    half[..., 5, :] += s * tangent[..., 1, :]
    out = half.copy()
    out[..., 4] -= s * half[..., 2]
    out[..., 5] += s * half[..., 1]
    return out
