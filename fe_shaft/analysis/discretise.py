"""Model to grid: where the connection nodes stand, which pieces lie between them, what is spread over them.

A connection node stands at both ends of a shaft, at every part's place, and at both ends of every width over which a
load is spread, so that inside a span a spread load is constant.
"""

from __future__ import annotations

from bisect import bisect_left
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import replace
from itertools import accumulate
from typing import TYPE_CHECKING, Any, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.shouldering import lumps_in_pieces, no_lumps
from fe_shaft.fem.pieces import CONE_RATIO, Outline, Pieces, Points, Sections

if TYPE_CHECKING:
    from fe_shaft.model.actions import Action
    from fe_shaft.model.segment_arrays import SegmentArrays
    from fe_shaft.model.shaft import Shaft
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

#: Places closer than this share of the shaft's length are one place: it is above the rounding of added lengths
#: (1e-16 times the number of segments) and far below what a drawing can say.
SAME_PLACE = 1e-12


class ShaftGrid(NamedTuple):
    """The part of the grid that one shaft owns: slices into the grid's arrays."""

    nodes: slice
    spans: slice
    pieces: slice


class Grid(NamedTuple):
    """Nodes, spans and pieces of all shafts, one after the other.

    Attributes
    ----------
    x : (n_nodes,) [m]
        Places of the connection nodes on their shafts.
    left, right : (n_spans,)
        Nodes of each span.
    length : (n_spans,) [m]
    pieces : of all spans
    shafts : by name, in the model's order
    node_of : node at a part's place, by part
    """

    x: Array
    left: Ints
    right: Ints
    length: Array
    pieces: Pieces
    shafts: Mapping[str, ShaftGrid]
    node_of: Mapping[str, int]


def discretise(model: Model, actions: Sequence[Action]) -> Grid:
    """Lay the grid of a model under its actions."""
    return _join(model, [_lay(model, shaft, _stations(model, shaft, actions)) for shaft in model.shafts])


def _stations(model: Model, shaft: Shaft, actions: Sequence[Action]) -> list[float]:
    end = float(shaft.ends[-1])
    stations = [0.0, end]
    stations += [place.x for place in model.places.values() if place.shaft == shaft.name]
    for action in actions:
        if action.shaft == shaft.name and action.spread > 0:
            stations += load_edges(action, end)
    return stations


def load_edges(action: Action, shaft_length: float) -> tuple[float, float]:
    """Both ends of a spread load, cut off where the shaft ends."""
    return max(action.x - action.spread / 2, 0.0), min(action.x + action.spread / 2, shaft_length)


class _Laid(NamedTuple):
    """One shaft, cut: its stations, where they fall among the piece ends, and the segment of each piece."""

    ends: Array
    station: Ints
    segment: Ints
    shares: tuple[Array, Array] | None


def _lay(model: Model, shaft: Shaft, stations: list[float]) -> _Laid:
    """Cut one shaft at its stations, and its cones into short ones."""
    arrays = model.working_arrays[shaft.name]
    bounds = arrays.ends
    same = SAME_PLACE * float(bounds[-1])
    wanted = _distinct(stations, same)
    cuts = _distinct([*wanted, *_cone_cuts(arrays, bounds)], same) if arrays.tapered else wanted
    new = _off_bounds(bounds, np.array(cuts), same)
    ends, segment = bounds, np.arange(len(bounds) - 1)
    if len(new):
        ends = np.sort(np.concatenate([bounds, new]))
        segment = segment.repeat(np.bincount(bounds.searchsorted(new) - 1, minlength=len(segment)) + 1)
    station = ends.searchsorted(np.array(wanted) - 2 * same)
    if not arrays.tapered:
        return _Laid(ends, station, segment, None)
    begin, length = bounds[segment], arrays.length[segment]
    first, last = (((edge - begin) / length).clip(0.0, 1.0) for edge in (ends[:-1], ends[1:]))
    return _Laid(ends, station, segment, (first, last))


def _distinct(values: Iterable[float], same: float) -> list[float]:
    out: list[float] = []
    for value in sorted(values):
        if not out or value - out[-1] > same:
            out.append(value)
    return out


def _off_bounds(bounds: Array, cuts: Array, same: float) -> Array:
    """Those cuts that do not fall on a segment's end."""
    return cuts[bounds[bounds.searchsorted(cuts - same)] - cuts > same]


def _cone_cuts(arrays: SegmentArrays, bounds: Array) -> Array:
    """Cut cones so that in each piece neither diameter nor wall grows by more than `CONE_RATIO`.

    Both are cut in geometric steps of their own: a bore may open the other way than the outside.
    """
    outer = np.array([arrays.diameter_left, arrays.diameter_right])
    wall = outer - np.array([arrays.bore_left, arrays.bore_right])
    cuts = [np.empty(0)]
    for left, right in (outer, wall):
        growth = right / left
        steps = np.ceil(np.abs(np.log(growth)) / np.log(CONE_RATIO))
        for k in np.flatnonzero(steps > 1):
            share = (growth[k] ** (np.arange(1, steps[k]) / steps[k]) - 1) / (growth[k] - 1)
            cuts.append(bounds[k] + arrays.length[k] * share)
    return np.concatenate(cuts)


def _join(model: Model, laid: list[_Laid]) -> Grid:
    shafts: dict[str, ShaftGrid] = {}
    nodes = spans = pieces = 0
    for shaft, part in zip(model.shafts, laid, strict=True):
        n_nodes, n_pieces = len(part.station), len(part.segment)
        shafts[shaft.name] = ShaftGrid(
            slice(nodes, nodes + n_nodes), slice(spans, spans + n_nodes - 1), slice(pieces, pieces + n_pieces)
        )
        nodes, spans, pieces = nodes + n_nodes, spans + n_nodes - 1, pieces + n_pieces
    x = _cat([part.ends[part.station] for part in laid])
    left = _cat([np.arange(own.nodes.start, own.nodes.stop - 1) for own in shafts.values()])
    right = left + 1
    node_of = _nodes_of(model, shafts, x.tolist())
    return Grid(
        x=x,
        left=left,
        right=right,
        length=x[right] - x[left],
        pieces=_pieces(model, laid, x[left], pieces, _hanging(model, shafts, node_of)),
        shafts=shafts,
        node_of=node_of,
    )


def _hanging(model: Model, shafts: Mapping[str, ShaftGrid], node_of: Mapping[str, int]) -> tuple[int, ...]:
    """Spans to the right of the last support of their shaft."""
    last = {name: own.nodes.start for name, own in shafts.items()}
    for support in model.supports:
        shaft = model.places[support.name].shaft
        last[shaft] = max(last[shaft], node_of[support.name])
    return tuple(
        span
        for name, own in shafts.items()
        for span in range(own.spans.start + last[name] - own.nodes.start, own.spans.stop)
    )


def _nodes_of(model: Model, shafts: Mapping[str, ShaftGrid], x: list[float]) -> dict[str, int]:
    """The node at each part's place: the nearest one, which is there but for rounding."""
    node_of = {}
    for part, place in model.places.items():
        own = shafts[place.shaft].nodes
        k = bisect_left(x, place.x, own.start, own.stop - 1)
        node_of[part] = k - 1 if k > own.start and place.x - x[k - 1] < x[k] - place.x else k
    return node_of


def _cat(arrays: list[NDArray[Any]]) -> NDArray[Any]:
    return arrays[0] if len(arrays) == 1 else np.concatenate(arrays)


def _pieces(model: Model, laid: list[_Laid], span_left: Array, n_pieces: int, hanging: tuple[int, ...]) -> Pieces:
    arrays = [model.working_arrays[shaft.name] for shaft in model.shafts]
    shifts = accumulate((len(part.segment) for part in laid), initial=0)
    starts = _cat([_shifted(part.station[:-1], shift) for part, shift in zip(laid, shifts, strict=False)])
    counts = np.concatenate([starts[1:], [n_pieces]]) - starts
    segments = accumulate((len(a.length) for a in arrays), initial=0)
    shares: list[Array | None] = [None, None]
    if any(part.shares for part in laid):
        shares = [
            _cat([part.shares[k] if part.shares else k + np.zeros(len(part.segment)) for part in laid]) for k in (0, 1)
        ]
    return Pieces(
        starts=starts,
        counts=counts,
        left=_cat([part.ends[:-1] for part in laid]) - span_left.repeat(counts),
        length=_cat([part.ends[1:] - part.ends[:-1] for part in laid]),
        segment=_cat([_shifted(part.segment, shift) for part, shift in zip(laid, segments, strict=False)]),
        sections=_sections(arrays),
        share_left=shares[0],
        share_right=shares[1],
        chains=tuple(accumulate(len(part.segment) for part in laid[:-1])),
        hanging=hanging,
        lumps=_shoulders(arrays, laid) if model.shoulders == "on" else None,
    )


def _shoulders(arrays: list[SegmentArrays], laid: list[_Laid]) -> Points | None:
    """The shoulders of all shafts, in the pieces where they act."""
    each = [lumps_in_pieces(a, part.ends, part.segment) for a, part in zip(arrays, laid, strict=True)]
    if all(lumps is None for lumps in each):
        return None
    filled = [no_lumps(len(part.segment)) if own is None else own for own, part in zip(each, laid, strict=True)]
    return filled[0] if len(filled) == 1 else Points(*(np.concatenate(of, axis=1) for of in zip(*filled, strict=True)))


def _shifted(numbers: Ints, shift: int) -> Ints:
    return numbers + shift if shift else numbers


def _sections(arrays: list[SegmentArrays]) -> Sections:
    worked = _worked_sections(arrays)
    if all(of.drawn is None for of in arrays):
        return worked
    outlines = [of.outline for of in arrays]
    return replace(worked, drawn=Outline(*(np.concatenate(side) for side in zip(*outlines, strict=True))))


def _worked_sections(arrays: list[SegmentArrays]) -> Sections:
    if len(arrays) == 1:
        (of,) = arrays
        material = [getattr(of, name)[: 1 if of.uniform else None] for name in _MATERIAL]
        return Sections(of.diameter_left, of.diameter_right, of.bore_left, of.bore_right, *material)
    outlines = (Outline(of.diameter_left, of.diameter_right, of.bore_left, of.bore_right) for of in arrays)
    d_left, d_right, b_left, b_right = (np.concatenate(side) for side in zip(*outlines, strict=True))
    material = [np.concatenate([getattr(of, name) for of in arrays]) for name in _MATERIAL]
    return Sections(d_left, d_right, b_left, b_right, *material)


_MATERIAL = ("youngs_modulus", "shear_modulus", "poisson_ratio", "density", "shear_coefficient")
