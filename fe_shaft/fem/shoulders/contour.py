"""The contour of shafts as shoulders see it: segments between planes, with equal neighbours joined into one."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]
Ints = NDArray[np.intp]
Bools = NDArray[np.bool_]

#: Neighbours are one segment where the line of one goes on in the other to this share of the diameter.
SAME_LINE = 1e-13


@dataclass(frozen=True)
class Contour:
    """Contours with the same number of segments: leading axes for shafts or variants, segments last, left to right.

    A segment of length 0 is left out, so that shafts of fewer segments can be filled up with such.

    Attributes
    ----------
    length, diameter_left, diameter_right, bore_left, bore_right : (..., n) [length]
        Cylinders, and cones where left and right differ.
    fillet_left, fillet_right : (..., n) [length]
        Radius at each end; it counts where the segment is thinner than its neighbour. 0: sharp.
    poisson : (..., n) [-]
        For the shear coefficient.
    """

    length: Array
    diameter_left: Array
    diameter_right: Array
    bore_left: Array
    bore_right: Array
    fillet_left: Array
    fillet_right: Array
    poisson: Array

    @classmethod
    def of(
        cls,
        length: ArrayLike,
        diameter: ArrayLike,
        bore: ArrayLike = 0.0,
        fillet_left: ArrayLike = 0.0,
        fillet_right: ArrayLike = 0.0,
        *,
        end_diameter: ArrayLike | None = None,
        end_bore: ArrayLike | None = None,
        poisson: ArrayLike = 0.3,
    ) -> Contour:
        """Contour from whatever broadcasts to (..., n); without end values the segments are cylinders."""
        last_diameter = diameter if end_diameter is None else end_diameter
        last_bore = bore if end_bore is None else end_bore
        given = (length, diameter, last_diameter, bore, last_bore, fillet_left, fillet_right, poisson)
        return cls(*np.broadcast_arrays(*(np.asarray(values, dtype=np.float64) for values in given)))

    def map(self, change: Callable[[Array], Array]) -> Contour:
        """The contour with each of its arrays changed."""
        return Contour(*(change(values) for values in self.arrays))

    @property
    def arrays(self) -> tuple[Array, ...]:
        """All arrays, in the order of the attributes."""
        return (
            self.length,
            self.diameter_left,
            self.diameter_right,
            self.bore_left,
            self.bore_right,
            self.fillet_left,
            self.fillet_right,
            self.poisson,
        )

    @property
    def shape(self) -> tuple[int, ...]:
        """(..., n)."""
        return self.length.shape

    @property
    def flat(self) -> Contour:
        """With one leading axis, (v, n)."""
        n = self.shape[-1]
        return self.map(lambda values: values.reshape(-1, n))

    def rows(self, first: int, last: int) -> Contour:
        """Some of the shafts, by the first axis."""
        return self.map(lambda values: values[first:last])

    @property
    def mirrored(self) -> Contour:
        """The same shafts seen from behind."""
        order = (0, 2, 1, 4, 3, 6, 5, 7)
        return Contour(*(self.arrays[i][..., ::-1] for i in order))

    @property
    def tapered(self) -> Bools:
        """Whether a segment is a cone in any of the shafts, (n,); contour (v, n)."""
        cone = (self.diameter_left != self.diameter_right) | (self.bore_left != self.bore_right)
        return np.asarray(cone.any(axis=0))


class Joined(NamedTuple):
    """Contours with equal neighbours made one, and the way back.

    Attributes
    ----------
    contour : (v, m)
        Rows with fewer segments end in segments of length 0 that repeat the last section.
    row, left, right : (q,)
        For each joined segment, its row and the given segments that begin and end it ...
    run : (q,)
        ... and its place in the row of `contour`.
    """

    contour: Contour
    row: Ints
    left: Ints
    right: Ints
    run: Ints


def joined(contour: Contour, *, equal: bool = True) -> Joined | None:
    """Leave out segments of length 0 and join neighbours that continue each other; None if there are none of either.

    Parameters
    ----------
    contour : (v, n)
    equal : False: only leave out segments of length 0.
    """
    there = contour.length > 0
    if there.all() and not (equal and _continues(contour).any()):
        return None
    order = np.argsort(~there, axis=1, kind="stable")  # segments of length 0 last
    packed = contour.map(lambda values: np.take_along_axis(values, order, axis=1))
    there = np.take_along_axis(there, order, axis=1)
    first, last = there.copy(), there.copy()
    if equal:
        first[:, 1:] &= ~_continues(packed)
    last[:, :-1] &= first[:, 1:] | ~there[:, 1:]
    run = np.cumsum(first, axis=1) - 1
    row, left = first.nonzero()
    right = last.nonzero()[1]
    joint = _gather(packed, row, left, right, run)
    return Joined(joint, row, order[row, left], order[row, right], run[row, left])


def _continues(contour: Contour) -> Bools:
    """Whether the second of two neighbours goes on in the line of the first, (v, n - 1)."""
    same = _in_line(contour.length, contour.diameter_left, contour.diameter_right, contour.diameter_right)
    if not same.any():
        return same
    return same & _in_line(contour.length, contour.bore_left, contour.bore_right, contour.diameter_right)


def _in_line(length: Array, left: Array, right: Array, scale: Array) -> Bools:
    jump = np.abs(left[:, 1:] - right[:, :-1])
    bend = (right - left)[:, :-1] * length[:, 1:] - (right - left)[:, 1:] * length[:, :-1]
    close = SAME_LINE * scale[:, :-1]
    return (jump <= close) & (np.abs(bend) <= close * (length[:, 1:] + length[:, :-1]))


def _gather(packed: Contour, row: Ints, left: Ints, right: Ints, run: Ints) -> Contour:
    """Joined segments: sums of lengths, first and last of the rest; rows filled up with their last section."""
    v, m = packed.shape[0], int(run.max()) + 1
    place = (row, run[row, left])
    ends = np.cumsum(packed.length, axis=1)
    begin, end = ends[row, left] - packed.length[row, left], ends[row, right]
    length = np.zeros((v, m))
    length[place] = np.where(left == right, packed.length[row, left], end - begin)
    final = np.maximum.accumulate(np.where(length > 0, np.arange(m), 0), axis=1)[:, -1:]
    first, last = np.zeros((2, v, m), dtype=np.intp)
    first[place], last[place] = left, right
    empty = length == 0
    closing = np.take_along_axis(last, final, axis=1)
    first, last = np.where(empty, closing, first), np.where(empty, closing, last)

    def take(values: Array, index: Ints) -> Array:
        return np.take_along_axis(values, index, axis=1)

    _, d1, d2, b1, b2, r1, r2, poisson = packed.arrays
    d_left, b_left = np.where(empty, take(d2, last), take(d1, first)), np.where(empty, take(b2, last), take(b1, first))
    return Contour(
        length, d_left, take(d2, last), b_left, take(b2, last), take(r1, first), take(r2, last), take(poisson, first)
    )
