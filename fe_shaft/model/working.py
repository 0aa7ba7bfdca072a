"""A shaft as it works: keyways and splines by their effective diameters, hubs that carry as collars.

A hub that takes away the share s of what it could take from the flexibility of the shaft under it counts as a collar
whose bending flexibility is 1 - s times that of the shaft plus s times that of shaft and hub in one piece. Weights stay
those of the drawing.
"""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.model.hub import share_of
from fe_shaft.model.part import Heavy
from fe_shaft.model.segment_arrays import Outline, SegmentArrays
from fe_shaft.model.shaft import Shaft
from fe_shaft.units import show

if TYPE_CHECKING:
    from collections.abc import Iterable, Mapping

    from fe_shaft.model.part import Part
    from fe_shaft.model.position import Place
    from fe_shaft.model.weakening import Weakening

Array = NDArray[np.float64]

#: Planes closer than this share of the shaft's length are one.
SAME_PLANE = 1e-12


class Collar(NamedTuple):
    """A hub on its shaft: from where to where [m], how thick [m], and the share of it that works."""

    left: float
    right: float
    diameter: float
    share: float


def collar_of(part: Part, place: Place, length: float) -> Collar | None:
    """The hub of a part on a shaft of a length [m]; None if it has none, or nothing says how large it is."""
    if not isinstance(part, Heavy) or part.hub_outside is None or not part.hub_width:
        return None
    half = part.hub_width / 2
    left, right = max(place.x - half, 0.0), min(place.x + half, length)
    return Collar(left, right, part.hub_outside, share_of(part.hub)) if right > left else None


def thickest(arrays: SegmentArrays, left: float, right: float) -> float:
    """Largest diameter [m] of a shaft between two places, of cones what lies between them."""
    inside = (arrays.ends[1:] > left + SAME_PLANE) & (arrays.ends[:-1] < right - SAME_PLANE)
    first, last, at_left, at_right = (
        of[inside] for of in (arrays.ends[:-1], arrays.ends[1:], arrays.diameter_left, arrays.diameter_right)
    )
    slope = (at_right - at_left) / (last - first)
    ends = at_left + slope * (np.maximum(left, first) - first), at_right - slope * (last - np.minimum(right, last))
    return float(np.maximum(*ends).max())


def idle_hub(part: Part, place: Place, arrays: SegmentArrays) -> str | None:
    """The sentence about a hub that is to carry, but does not reach out of its shaft."""
    collar = collar_of(part, place, float(arrays.ends[-1]))
    if collar is None or not collar.share:
        return None
    shaft = thickest(arrays, collar.left, collar.right)
    if collar.diameter > shaft:
        return None
    return (
        f"the hub is {show(collar.diameter, 'mm', 4)} thick and the shaft in it {show(shaft, 'mm', 4)}, so nothing of "
        'it can carry. Write hub = "none", or the right hub_diameter.'
    )


def working_arrays(
    shaft: Shaft, drawn: SegmentArrays, parts: Iterable[Part], places: Mapping[str, Place]
) -> SegmentArrays:
    """The shaft in numbers as it works; the drawn one itself where nothing changes it.

    It is kept with the drawn one, so that models of the same working shape share what follows from it.
    """
    end = float(drawn.ends[-1])
    on = (collar_of(part, places[part.name], end) for part in parts if places[part.name].shaft == shaft.name)
    collars = tuple(collar for collar in on if collar is not None and collar.share)
    counted = {k: weak.counted(shaft.segments[k].diameter.si).effective for k, weak in _weakened(shaft)}
    if not (collars or counted):
        return drawn
    key = f"working {collars} {counted}"
    if key not in drawn.memo:
        drawn.memo[key] = _with_collars(_with_grooves(drawn, counted), collars)
    made: SegmentArrays = drawn.memo[key]
    return made


def _weakened(shaft: Shaft) -> list[tuple[int, Weakening]]:
    return [(k, weak) for k in shaft.weakened.values() if (weak := shaft.segments[k].weakening) is not None]


def _with_grooves(drawn: SegmentArrays, counted: Mapping[int, float]) -> SegmentArrays:
    """Segments with keyways and splines as cylinders of their effective diameters."""
    left, right = drawn.diameter_left.copy(), drawn.diameter_right.copy()
    numbers = list(counted)
    left[numbers] = right[numbers] = list(counted.values())
    return replace(drawn, diameter_left=left, diameter_right=right, drawn=drawn.outline, memo={})


def _with_collars(arrays: SegmentArrays, collars: Iterable[Collar]) -> SegmentArrays:
    """Cut at the ends of hubs, and thicker in them."""
    for collar in collars:
        arrays = _with_collar(arrays, collar)
    return arrays


def _with_collar(arrays: SegmentArrays, collar: Collar) -> SegmentArrays:
    cut = _cut(arrays, (collar.left, collar.right))
    middle = (cut.ends[:-1] + cut.ends[1:]) / 2
    inside = (middle > collar.left) & (middle < collar.right)

    def thicker(diameter: Array, bore: Array) -> Array:
        alone, joined = diameter**4 - bore**4, np.maximum(collar.diameter, diameter) ** 4 - bore**4
        grown = (1 / ((1 - collar.share) / alone + collar.share / joined) + bore**4) ** 0.25
        return np.where(inside, grown, diameter)

    return replace(
        cut,
        diameter_left=thicker(cut.diameter_left, cut.bore_left),
        diameter_right=thicker(cut.diameter_right, cut.bore_right),
    )


def _cut(arrays: SegmentArrays, places: tuple[float, float]) -> SegmentArrays:
    """Cut segments at places [m] that are no ends of segments."""
    ends, same = arrays.ends, SAME_PLANE * float(arrays.ends[-1])
    new = np.array([place for place in places if np.abs(ends - place).min() > same])
    all_ends = np.sort(np.concatenate([ends, new]))
    k = ends.searchsorted((all_ends[:-1] + all_ends[1:]) / 2) - 1
    shares = [((edge - ends[k]) / arrays.length[k]).clip(0, 1) for edge in (all_ends[:-1], all_ends[1:])]
    first, last = shares[0] == 0, shares[1] == 1

    def outline(of: Outline) -> Outline:
        sides = [
            before[k] + (after[k] - before[k]) * share
            for before, after in ((of[0], of[1]), (of[2], of[3]))
            for share in shares
        ]
        return Outline(*sides)

    own = outline(Outline(arrays.diameter_left, arrays.diameter_right, arrays.bore_left, arrays.bore_right))
    material = {key: getattr(arrays, key)[k] for key in _MATERIAL}
    return SegmentArrays(
        length=np.where(first & last, arrays.length[k], np.diff(all_ends)),
        **own._asdict(),
        **material,
        fillet_left=np.where(first, arrays.fillet_left[k], 0.0),
        fillet_right=np.where(last, arrays.fillet_right[k], 0.0),
        ends=all_ends,
        drawn=outline(arrays.outline),
        number=k if arrays.number is None else arrays.number[k],
    )


_MATERIAL = ("youngs_modulus", "shear_modulus", "poisson_ratio", "density", "shear_coefficient")
