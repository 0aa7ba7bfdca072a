"""Lines and arcs to the outer line of a shaft and its bores: joined to chains, each from left to right."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from itertools import pairwise
from typing import NamedTuple

import numpy as np
from scipy.sparse import coo_array
from scipy.sparse.csgraph import connected_components
from scipy.spatial import cKDTree

from fe_shaft.errors import ModelError
from fe_shaft.io.contour.drawing import Drawing
from fe_shaft.io.contour.edges import Edge, Place, distance

Refuse = Callable[[str], ModelError]


class Half(NamedTuple):
    """A half contour: chains of edges that run from left to right.

    Attributes
    ----------
    outer : from one end of the shaft to the other
    bores : below it, none overlapping another
    """

    outer: list[Edge]
    bores: list[list[Edge]]


def half_contour(drawn: Drawing, refuse: Refuse) -> Half:
    """Find outer line and bores among the edges of a drawing.

    Parameters
    ----------
    drawn : Drawing
    refuse : makes the error of a sentence
    """
    if not drawn.edges:
        raise refuse("nothing is drawn beside the axis. Draw the half contour above y = 0.")
    for edge in drawn.edges:
        if edge.lowest[1] < -drawn.same:
            below = f"{edge.name} goes below the axis, at {_at(edge.lowest, drawn)}"
            raise refuse(f"{below}. Draw the half above y = 0 alone.")
    x = [place[0] for edge in drawn.edges for place in (edge.start, edge.end)]
    ends = min(x), max(x)
    runs = [run for chain in _chains(drawn, ends, refuse) for run in _runs(chain, drawn, ends, refuse)]
    return _outer_and_bores(runs, drawn, ends, refuse)


# ---- chains


def _chains(drawn: Drawing, ends: tuple[float, float], refuse: Refuse) -> list[list[Edge]]:
    """Edges in the order in which they follow each other, one list for each line that is drawn."""
    edges, corner, places = _cornered(drawn)
    at: list[list[int]] = [[] for _ in places]
    for number, pair in enumerate(corner):
        for one in pair:
            at[one].append(number)
    for one, place in enumerate(places):
        if len(at[one]) > 2:
            names = " and ".join(dict.fromkeys(edges[number].name for number in at[one][:3]))
            what = f"more than two lines meet at {_at(place, drawn)}: {names}"
            raise refuse(f"{what}. Leave one out, or the copy of one that is drawn twice.")
    free = [one for one in range(len(places)) if len(at[one]) == 1]
    _refuse_gaps(free, at, edges, places, drawn, ends, refuse)
    left = sorted(range(len(places)), key=lambda one: (places[one][0], -places[one][1]))
    begins = sorted(free, key=lambda one: places[one]) + left  # open chains first, then closed ones
    chains, used = [], [False] * len(edges)
    for begin in begins:
        chain = _walk(begin, at, edges, corner, used)
        if chain:
            chains.append(chain)
    return chains


def _cornered(drawn: Drawing) -> tuple[list[Edge], list[tuple[int, int]], list[Place]]:
    """Edges whose ends are moved into common corners, the two corners of each, and where these are."""
    points = np.array([place for edge in drawn.edges for place in (edge.start, edge.end)])
    pairs = cKDTree(points).query_pairs(drawn.same, output_type="ndarray")
    links = coo_array((np.ones(len(pairs)), (pairs[:, 0], pairs[:, 1])), shape=(len(points), len(points)))
    count, label = connected_components(links, directed=False)
    first = np.full(count, len(points))
    np.minimum.at(first, label, np.arange(len(points)))
    places = [(float(x), float(y)) for x, y in points[first]]
    edges, corner = [], []
    for edge, one, other in zip(drawn.edges, label[::2].tolist(), label[1::2].tolist(), strict=True):
        if one != other:
            edges.append(edge._replace(start=places[one], end=places[other]))
            corner.append((one, other))
    return edges, corner, places


def _refuse_gaps(
    free: list[int],
    at: Sequence[Sequence[int]],
    edges: Sequence[Edge],
    places: Sequence[Place],
    drawn: Drawing,
    ends: tuple[float, float],
    refuse: Refuse,
) -> None:
    """A line may end on the axis and at an end of the shaft; elsewhere the contour is open."""
    same = drawn.same
    for one in free:
        x, y = places[one]
        if y <= same or min(x - ends[0], ends[1] - x) <= same:
            continue
        name = edges[at[one][0]].name
        others = [other for other in free if other != one]
        near = min(others, key=lambda other: distance(places[one], places[other]), default=None)
        if near is None:
            raise refuse(f"{name} ends in the open, at {_at(places[one], drawn)}. Draw it on to an end of the shaft.")
        wide = f"{distance(places[one], places[near]):.4g} {drawn.unit}"
        between = f"between {_at(places[one], drawn)} ({name}) and {_at(places[near], drawn)}"
        raise refuse(f"the contour has a gap of {wide} {between}. Close it.")


def _walk(
    begin: int, at: Sequence[Sequence[int]], edges: Sequence[Edge], corner: Sequence[tuple[int, int]], used: list[bool]
) -> list[Edge]:
    """The chain that begins in a corner, as far as its edges are not used; they are from now on."""
    chain: list[Edge] = []
    here: int | None = begin
    while here is not None:
        number = next((each for each in at[here] if not used[each]), None)
        if number is None:
            return chain
        used[number] = True
        first, last = corner[number]
        chain.append(edges[number] if first == here else edges[number].reversed)
        here = last if first == here else first
    return chain


# ---- runs


def _runs(chain: list[Edge], drawn: Drawing, ends: tuple[float, float], refuse: Refuse) -> list[list[Edge]]:
    """A chain cut at the ends of the shaft into parts that run from left to right, or were turned to."""
    runs: list[list[Edge]] = []
    heading = 0
    for edge in chain:
        step = edge.end[0] - edge.start[0]
        way = 0 if abs(step) <= drawn.same else (1 if step > 0 else -1)
        if way and heading and way != heading:
            _refuse_overhang(edge, drawn, ends, refuse)
            runs.append([])
        heading = way or heading
        if not runs:
            runs.append([])
        runs[-1].append(edge)
    return [_rightwards(run) for run in runs if any(_wide(edge, drawn.same) for edge in run)]


def _refuse_overhang(edge: Edge, drawn: Drawing, ends: tuple[float, float], refuse: Refuse) -> None:
    """A line may turn back where the shaft ends, nowhere else."""
    x = edge.start[0]
    if min(x - ends[0], ends[1] - x) > drawn.same:
        what = f"the contour turns back at {_at(edge.start, drawn)} ({edge.name}): two radii at one x"
        raise refuse(f"{what}. Draw undercuts and overhangs so that each x has one radius, or leave them out.")


def _wide(edge: Edge, same: float) -> bool:
    return abs(edge.end[0] - edge.start[0]) > same


def _rightwards(run: list[Edge]) -> list[Edge]:
    if run[-1].end[0] >= run[0].start[0]:
        return run
    return [edge.reversed for edge in reversed(run)]


def _outer_and_bores(runs: list[list[Edge]], drawn: Drawing, ends: tuple[float, float], refuse: Refuse) -> Half:
    """The uppermost of the lines from end to end is the outside; all others are bores, side by side."""
    through = [
        run for run in runs if run[0].start[0] - ends[0] <= drawn.same and ends[1] - run[-1].end[0] <= drawn.same
    ]
    if not through:
        span = f"from x = {ends[0]:.6g} to {ends[1]:.6g} {drawn.unit}"
        raise refuse(f"no line runs from end to end of the shaft, {span}. Draw the outer line without a break.")
    outer = max(through, key=_height)
    bores = sorted((run for run in runs if run is not outer), key=lambda run: run[0].start[0])
    for one, other in pairwise(bores):
        if one[-1].end[0] - other[0].start[0] > drawn.same:
            names = f"{one[0].name} and {other[0].name}"
            where = f"{_at(other[0].start, drawn)}: {names}"
            raise refuse(f"two lines stand inside the outer one at {where}. Leave one out.")
    _refuse_points(outer, drawn, refuse)
    return Half(outer, bores)


def _refuse_points(outer: Sequence[Edge], drawn: Drawing, refuse: Refuse) -> None:
    """A shaft that comes to a point has no section there."""
    for edge in outer:
        if _wide(edge, drawn.same) and edge.lowest[1] <= drawn.same:
            what = f"{edge.name} comes down to the axis at {_at(edge.lowest, drawn)}"
            raise refuse(f"{what}, where the shaft has no section. End it before.")


def _height(run: Sequence[Edge]) -> float:
    """Area below a line."""
    return sum((edge.end[0] - edge.start[0]) * (edge.end[1] + edge.start[1]) for edge in run)


def _at(place: Place, drawn: Drawing) -> str:
    return f"x = {place[0]:.6g}, y = {place[1]:.6g} {drawn.unit}"
