"""Straight lines and arcs of a drawing, cut so that each has one radius for each x."""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import NamedTuple

Place = tuple[float, float]


class Edge(NamedTuple):
    """A piece of a drawn line, in units of the drawing; x along the axis, y the radius.

    Attributes
    ----------
    start, end : (x, y)
    name : how messages call the entity it comes from
    centre : (x, y) of an arc, None for a straight line
    radius : of an arc
    side : of an arc
        1: the upper half of its circle (convex where material lies below), -1: the lower half (concave).
    fillet : whether the arc is told as the fillet of a shoulder
    """

    start: Place
    end: Place
    name: str
    centre: Place | None = None
    radius: float = 0.0
    side: int = 0
    fillet: bool = False

    @property
    def reversed(self) -> Edge:
        """The same line, drawn the other way."""
        return self._replace(start=self.end, end=self.start)

    @property
    def lowest(self) -> Place:
        """Its point nearest to the axis, or farthest below."""
        if self.centre is not None and self.side < 0:
            low, high = sorted((self.start[0], self.end[0]))
            if low < self.centre[0] < high:
                return self.centre[0], self.centre[1] - self.radius
        return min(self.start, self.end, key=lambda place: place[1])

    def angles(self) -> tuple[float, float]:
        """Direction of start and end from the centre of an arc [rad]; never more than half a turn apart."""
        assert self.centre is not None
        first, last = (math.atan2(y - self.centre[1], x - self.centre[0]) for x, y in (self.start, self.end))
        if self.side > 0:  # 0 to pi; what lies a hair below the centre is on the near side
            return _turned(first, -math.pi / 2), _turned(last, -math.pi / 2)
        return _turned(first, math.pi / 2), _turned(last, math.pi / 2)


def _turned(angle: float, least: float) -> float:
    """The same direction from `least` on."""
    return least + (angle - least) % (2 * math.pi)


def distance(one: Place, other: Place) -> float:
    """Between two places."""
    return math.hypot(one[0] - other[0], one[1] - other[1])


def arc_edges(centre: Place, radius: float, first: float, last: float, name: str, same: float) -> Iterator[Edge]:
    """An arc, counterclockwise from `first` to `last` [rad], cut where it is farthest left and right.

    Parameters
    ----------
    same : float
        Pieces shorter than this are none.
    """
    sweep = (last - first) % (2 * math.pi) or 2 * math.pi
    begin = first
    while begin < first + sweep - same / radius:
        half = math.floor(begin / math.pi + same / (math.pi * radius))  # which half turn the piece lies in
        end = min((half + 1) * math.pi, first + sweep)
        if first + sweep - end < same / radius:
            end = first + sweep
        side = 1 if half % 2 == 0 else -1
        start, stop = (_on_circle(centre, radius, angle) for angle in (begin, end))
        yield Edge(start, stop, name, centre, radius, side)
        begin = end


def _on_circle(centre: Place, radius: float, angle: float) -> Place:
    return centre[0] + radius * math.cos(angle), centre[1] + radius * math.sin(angle)
