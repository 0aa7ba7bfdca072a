"""Shoulders to lumps of the grid's pieces: once for each geometry, from the contour and never from the grid."""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.pieces import Points
from fe_shaft.fem.section import cowper
from fe_shaft.fem.shoulders import Contour, ShoulderLumps, shoulder_lumps

if TYPE_CHECKING:
    from fe_shaft.model.segment_arrays import SegmentArrays

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

#: Rows of the lumps of a piece: at its segment's left end the plane and the bending place, then at its right end.
LEFT_PLANE, LEFT_BENDING, RIGHT_PLANE, RIGHT_BENDING = range(4)


def contour_of(arrays: SegmentArrays) -> Contour:
    """The contour of a shaft as shoulders see it."""
    return Contour(
        length=arrays.length,
        diameter_left=arrays.diameter_left,
        diameter_right=arrays.diameter_right,
        bore_left=arrays.bore_left,
        bore_right=arrays.bore_right,
        fillet_left=arrays.fillet_left,
        fillet_right=arrays.fillet_right,
        poisson=arrays.poisson_ratio,
    )


def shoulders_of(arrays: SegmentArrays) -> ShoulderLumps:
    """Points of a shaft at both ends of every segment; kept with the arrays, which models of one geometry share."""
    if "shoulders" not in arrays.memo:
        arrays.memo["shoulders"] = shoulder_lumps(contour_of(arrays))
    lumps: ShoulderLumps = arrays.memo["shoulders"]
    return lumps


def no_lumps(n_pieces: int) -> Points:
    """Pieces without any."""
    return Points(*np.zeros((5, 4, n_pieces)))


def lumps_in_pieces(arrays: SegmentArrays, ends: Array, segment: Ints) -> Points | None:
    """Put the lumps of a shaft into its pieces.

    Parameters
    ----------
    ends : (m + 1,) [m], ends of the pieces
    segment : (m,), the segment of each piece

    Returns
    -------
    Points or None
        None where no shoulder gives anything.
    """
    lumps = flexible_lumps(arrays)
    if lumps is None:
        return None
    numbers = np.arange(len(arrays.length))
    first, last = segment.searchsorted(numbers), segment.searchsorted(numbers, side="right") - 1
    out = np.zeros((5, 4, len(segment)))
    out[1:4, LEFT_PLANE, first], out[1:4, RIGHT_PLANE, last] = lumps.plane[:, 0], lumps.plane[:, 1]
    out[0, RIGHT_PLANE, last] = ends[last + 1] - ends[last]
    inside = (ends.searchsorted(lumps.place, side="right") - 1).clip(first, last)
    out[0, _BENDING, inside], out[4, _BENDING, inside] = lumps.place - ends[inside], lumps.bending
    return Points(*out)


_BENDING = np.array([[LEFT_BENDING], [RIGHT_BENDING]])


class FlexibleLumps(NamedTuple):
    """The lumps of a shaft with its material.

    Attributes
    ----------
    plane : (3, 2, n) [m/N, rad/(N m), m/N]
        Axial, torsion and shear flexibility at both ends of each segment.
    place, bending : (2, n) [m, rad/(N m)]
    """

    plane: Array
    place: Array
    bending: Array


def flexible_lumps(arrays: SegmentArrays) -> FlexibleLumps | None:
    """What the shoulders of a shaft give, kept with its arrays; None where that is nothing."""
    if "flexible" not in arrays.memo:
        arrays.memo["flexible"] = _flexible(arrays)
    lumps: FlexibleLumps | None = arrays.memo["flexible"]
    return lumps


def _flexible(arrays: SegmentArrays) -> FlexibleLumps | None:
    if len(arrays.length) == 1:
        return None
    found = shoulders_of(arrays)
    if not found.bending.any():
        return None
    e, g = arrays.youngs_modulus, arrays.shear_modulus
    plane = np.stack([found.axial.T / e, found.torsion.T / g, found.shear.T / g * _shear_share(arrays)])
    return FlexibleLumps(plane, np.ascontiguousarray(found.bending_place.T), found.bending.T / e)


def _shear_share(arrays: SegmentArrays) -> Array:
    """Shear lumps against those of Cowper's coefficient, which the rule was made with: none where shear is left out."""
    given = arrays.shear_coefficient
    own = cowper(arrays.diameter_left, arrays.bore_left, arrays.poisson_ratio)
    return np.where(np.isnan(given), 1.0, own / np.where(np.isnan(given), 1.0, given))
