"""The shaft as a body of revolution that follows its bent line; the files and the views both draw it.

A meridian (the outline of one half of the lengthwise cut, walked once around) is revolved about the shaft's axis. Every
point of the surface belongs to one ring, every ring to one place on the line, and every section moves as a rigid disc,
so the movement of the surface is one linear map of the line's results: ``u(x) + theta(x) x r``. Between two stations
the line is asked for its exact field, never interpolated.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from fe_shaft.results.line import Line

Floats = NDArray[np.float64]
Ints = NDArray[np.int64]


@dataclass(frozen=True)
class Places:
    """Places on a line, each on one of its spans.

    Parameters
    ----------
    span : (n,) int
        Number of the span, which reaches from station ``span`` to station ``span + 1``.
    share : (n,) float
        Where on the span: 0 at its left station, 1 at its right one.
    """

    span: Ints
    share: Floats

    def __getitem__(self, chosen: NDArray[np.int64] | NDArray[np.bool_] | slice) -> Places:
        return Places(self.span[chosen], self.share[chosen])


@dataclass(frozen=True)
class Body:
    """Surface of a shaft: rings of points around the axis, and the faces between them.

    Parameters
    ----------
    places : Places of the rings, (n_rings,)
    x, radius : (n_rings,) float [m]
        A ring of radius 0 is a single point on the axis.
    ring : (n_points,) int
        Ring of each point.
    points : (n_points, 3) float [m]
        At rest, in the shaft's frame; around the ring from 12 o'clock (+y) by 3 o'clock (+z).
    normals : (n_points, 3) float
        Unit normals out of the material, the mean of the neighbouring faces.
    quads : (n_quads, 4) int
    triangles : (n_triangles, 3) int
        Corners of the faces, anticlockwise as seen from outside the material.
    """

    places: Places
    x: Floats
    radius: Floats
    ring: Ints
    points: Floats
    normals: Floats
    quads: Ints
    triangles: Ints

    def movement(self, u: Floats) -> Floats:
        """Movement of every point when each section moves as a rigid disc.

        Parameters
        ----------
        u : (..., n_rings, 6) float [m, rad]
            Movements and rotations of the rings, as ``line_fields`` gives them.

        Returns
        -------
        (..., n_points, 3) float [m]
        """
        arm = self.points.copy()
        arm[:, 0] = 0.0
        return section_movement(u[..., self.ring, :], arm)

    def turn(self, u: Floats) -> Floats:
        """Change of the normals for small rotations, ``theta x n``, (..., n_points, 3) [rad]."""
        return np.cross(u[..., self.ring, 3:], self.normals)


def section_movement(u: Floats, arm: Floats) -> Floats:
    """Movement of points carried rigidly: ``u + theta x arm`` (small rotations).

    Parameters
    ----------
    u : (..., 6) float [m, rad]
        Movement and rotation of one place.
    arm : (..., 3) float [m]
        From that place to the point.

    Returns
    -------
    (..., 3) float [m]
    """
    return u[..., :3] + np.cross(u[..., 3:], arm)


def revolve(line: Line, *, around: int = 48, rings: int = 4000, smooth: int = 60, sharp: bool = False) -> Body:
    """Body of revolution of a shaft's line, with steps, cones, bores and end faces.

    Parameters
    ----------
    line : Line
        With two stations or more.
    around : int
        Points on each ring, at least 3.
    rings : int
        Largest number of contour points kept on the outside, and again in the bore. Of a longer contour, narrow slices
        keep their largest and smallest radius, so nothing that can be seen is lost.
    smooth : int
        A span longer than this part of the shaft is divided, so that a bent line looks bent.
    sharp : bool
        False: faces share their rings and the surface is closed. True: each face has rings of its own, so that edges
        stay sharp when the normals are drawn.
    """
    if around < 3 or rings < 8 or smooth < 1:
        raise ValueError(f"around {around}, rings {rings}, smooth {smooth}: at least 3, 8 and 1 are needed.")
    places, radius = _meridian(line, rings, smooth)
    x = place_x(line, places)
    start, stop = _strips(x, radius)
    if sharp:
        order = np.stack([start, stop], axis=1).ravel()
        places, x, radius = places[order], x[order], radius[order]
        start = np.arange(0, len(order), 2)
        stop = start + 1
    return _spin(places, x, radius, start, stop, around)


def place_x(line: Line, places: Places) -> Floats:
    """Position of places on a line, (n,) [m]."""
    left, right = line.x[places.span], line.x[places.span + 1]
    return np.asarray(np.where(places.share < 1.0, left + places.share * (right - left), right))


def line_fields(line: Line, places: Places) -> tuple[Floats, Floats]:
    """Movements and section forces at places on a line: the stations' own values, the exact field between them.

    Returns
    -------
    u : (n_cases, n, 6) float [m, rad]
    force : (n_cases, n, 6) float [N, N m]
        N Vy Vz Mx My Mz; at a station those on the side of the place's own span.
    """
    u, force = np.empty((2, len(line.u), len(places.span), 6))
    left, right = places.share == 0.0, places.share == 1.0
    u[:, left], force[:, left] = line.u[:, places.span[left]], line.force_right[:, places.span[left]]
    u[:, right], force[:, right] = line.u[:, places.span[right] + 1], line.force_left[:, places.span[right] + 1]
    between = ~(left | right)
    if between.any():
        u[:, between], force[:, between] = line.at(place_x(line, places[between]))
    return u, force


def _meridian(line: Line, rings: int, smooth: int) -> tuple[Places, Floats]:
    """Corners of the closed outline: outside from left to right, then the bore from right to left."""
    outside, outer = _contour(line, line.diameter_right, line.diameter_left, rings, smooth)
    inside, inner = _contour(line, line.bore_right, line.bore_left, rings, smooth)
    back = slice(None, None, -1)
    span = np.concatenate([outside.span, inside.span[back]])
    share = np.concatenate([outside.share, inside.share[back]])
    return Places(span, share), np.concatenate([outer, inner[back]])


def _contour(line: Line, right: Floats, left: Floats, rings: int, smooth: int) -> tuple[Places, Floats]:
    """One contour, left to right: ends of every span and divisions of the long ones, each place once unless it steps.

    ``right`` and ``left`` are the diameters just right and just left of each station.
    """
    length = np.diff(line.x)
    reach = (line.x[-1] - line.x[0]) / smooth
    parts = np.maximum(1, np.ceil(length / reach - 1e-9)).astype(np.int64)
    number = parts + 1
    span = np.repeat(np.arange(len(length)), number)
    step = np.arange(len(span)) - np.repeat(np.cumsum(number) - number, number)
    share = step / parts[span]
    radius = (right[span] + share * (left[span + 1] - right[span])) / 2
    keep = np.ones(len(span), dtype=bool)
    keep[1:] = (step[1:] > 0) | (np.abs(np.diff(radius)) > 1e-9 * np.max(line.diameter_left))
    places, radius = Places(span[keep], share[keep]), radius[keep]
    if len(radius) > rings:
        few = _extremes(place_x(line, places), radius, rings)
        places, radius = places[few], radius[few]
    return places, radius


def _extremes(x: Floats, radius: Floats, rings: int) -> Ints:
    """Numbers of the points that keep a long contour's look: ends, and largest and smallest radius of each slice."""
    slices = (rings - 2) // 2
    where = np.minimum((slices * (x - x[0]) / (x[-1] - x[0])).astype(np.int64), slices - 1)
    order = np.lexsort((radius, where))
    last = np.flatnonzero(np.append(np.diff(where[order]) > 0, True))
    first = np.append(0, last[:-1] + 1)
    return np.unique(np.concatenate([[0, len(x) - 1], order[first], order[last]]))


def _strips(x: Floats, radius: Floats) -> tuple[Ints, Ints]:
    """First and second ring of every face of the closed outline; none along the axis, none without width."""
    start = np.arange(len(x))
    stop = np.roll(start, -1)
    wide = (np.maximum(radius[start], radius[stop]) > 0.0) & ((x[start] != x[stop]) | (radius[start] != radius[stop]))
    return start[wide], stop[wide]


def _spin(places: Places, x: Floats, radius: Floats, start: Ints, stop: Ints, around: int) -> Body:
    """Points, normals and faces of an outline's strips turned about the axis."""
    used = np.unique(np.concatenate([start, stop]))
    renumber = np.zeros(len(x), dtype=np.int64)
    renumber[used] = np.arange(len(used))
    places, x, radius = places[used], x[used], radius[used]
    start, stop = renumber[start], renumber[stop]
    on_axis = radius == 0.0
    number = np.where(on_axis, 1, around)
    first = np.cumsum(number) - number
    ring = np.repeat(np.arange(len(x)), number)
    angle = 2 * np.pi / around * (np.arange(len(ring)) - first[ring])
    outward = np.stack([np.cos(angle), np.sin(angle)], axis=1)
    points = np.column_stack([x[ring], radius[ring, None] * outward])
    normals = _ring_normals(x, radius, start, stop)[ring]
    normals = np.column_stack([normals[:, 0], normals[:, 1, None] * np.where(on_axis[ring, None], 0.0, outward)])
    normals /= np.maximum(np.linalg.norm(normals, axis=1, keepdims=True), 1e-300)
    here = np.arange(around)
    there = np.roll(here, -1)
    a, b = first[start, None], first[stop, None]
    both = ~on_axis[start] & ~on_axis[stop]
    quads = np.stack([a + here, a + there, b + there, b + here], axis=-1)[both]
    from_axis = np.stack([a + 0 * here, b + there, b + here], axis=-1)[on_axis[start]]
    to_axis = np.stack([a + here, a + there, b + 0 * here], axis=-1)[on_axis[stop]]
    triangles = np.concatenate([from_axis.reshape(-1, 3), to_axis.reshape(-1, 3)])
    return Body(places, x, radius, ring, points, normals, quads.reshape(-1, 4), triangles)


def _ring_normals(x: Floats, radius: Floats, start: Ints, stop: Ints) -> Floats:
    """Axial and radial part of each ring's normal: the sum of its strips' unit normals, (n_rings, 2)."""
    along = np.stack([x[stop] - x[start], radius[stop] - radius[start]], axis=1)
    along /= np.linalg.norm(along, axis=1, keepdims=True)
    normal = np.stack([-along[:, 1], along[:, 0]], axis=1)
    total = np.zeros((len(x), 2))
    np.add.at(total, start, normal)
    np.add.at(total, stop, normal)
    return total
