"""Shoulders to lumps of the grid's pieces: once for each geometry, from the contour and never from the grid."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.pieces import Points
from fe_shaft.fem.section import cowper
from fe_shaft.fem.shoulders import Contour, ShoulderLumps, out_of_range, shoulder_lumps

if TYPE_CHECKING:
    from fe_shaft.model.shaft import SegmentArrays

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


#: What is said of shoulders beyond the rule's range, by the fields of `OutOfRange`.
BEYOND = {
    "end_disc": "a thin disc ends the shaft: up to a third too stiff where it is loaded or held",
    "flange": "a thin flange: up to a third too stiff where it is loaded or held",
    "hollow_groove": "a narrow groove of a hollow shaft: 5 to 9 % too stiff",
    "large_step": "a step beyond D/d = 3: outside what the rule was fitted to",
}


def range_remarks(arrays: SegmentArrays) -> Iterator[tuple[int, str]]:
    """Segments whose shoulders leave the range of the rule, and what that means."""
    found = out_of_range(contour_of(arrays))
    for field, words in BEYOND.items():
        for segment in np.flatnonzero(getattr(found, field).any(axis=-1)).tolist():
            yield segment, words


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
    if len(arrays.length) == 1:
        return None
    found = shoulders_of(arrays)
    if not found.bending.any():
        return None
    n = len(arrays.length)
    first, last = np.searchsorted(segment, np.arange(n)), np.searchsorted(segment, np.arange(n), side="right") - 1
    e, g, shear = arrays.youngs_modulus, arrays.shear_modulus, _shear_share(arrays)
    lumps = no_lumps(len(segment))
    for side, plane, row, piece in ((0, LEFT_PLANE, LEFT_BENDING, first), (1, RIGHT_PLANE, RIGHT_BENDING, last)):
        lumps.axial[plane, piece] = found.axial[:, side] / e
        lumps.torsion[plane, piece] = found.torsion[:, side] / g
        lumps.shear[plane, piece] = found.shear[:, side] / g * shear
        lumps.eta[plane, piece] = (ends[piece + side] - ends[piece]) * side
        place = found.bending_place[:, side]
        inside = np.clip(np.searchsorted(ends, place, side="right") - 1, first, last)
        lumps.bending[row, inside] = found.bending[:, side] / e
        lumps.eta[row, inside] = place - ends[inside]
    return lumps


def _shear_share(arrays: SegmentArrays) -> Array:
    """Shear lumps against those of Cowper's coefficient, which the rule was made with: none where shear is left out."""
    given = arrays.shear_coefficient
    own = cowper(arrays.diameter_left, arrays.bore_left, arrays.poisson_ratio)
    return np.where(np.isnan(given), 1.0, own / np.where(np.isnan(given), 1.0, given))
