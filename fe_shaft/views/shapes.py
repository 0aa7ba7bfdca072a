"""Shapes of the drawing as plain arrays: rings, pitch cylinders, tooth lines, outlines. Nothing is drawn here.

Everything is in one right-handed frame whose x is the shaft's axis; an angle counts from 12 o'clock (+y) clockwise as
seen from the left end, so 3 o'clock is +z. All lengths in m, all angles in rad.
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from math import cos, pi, sin, tan

import numpy as np
from numpy.typing import ArrayLike, NDArray

Floats = NDArray[np.float64]
Ints = NDArray[np.int64]


@dataclass(frozen=True)
class Shape:
    """Points with triangles between them, lines between them, or both.

    Parameters
    ----------
    points : (n, 3) float [m]
    normals : (n, 3) float
        For shading; zero where a shape has lines only.
    triangles : (n_triangles, 3) int
    lines : (n_lines, 2) int
    """

    points: Floats
    normals: Floats
    triangles: Ints
    lines: Ints

    def __add__(self, other: Shape) -> Shape:
        return merge([self, other])


def merge(shapes: Iterable[Shape]) -> Shape:
    """Several shapes as one."""
    parts = list(shapes)
    if not parts:
        return bare(np.zeros((0, 3)))
    starts = np.cumsum([0] + [len(part.points) for part in parts[:-1]])
    return Shape(
        np.concatenate([part.points for part in parts]),
        np.concatenate([part.normals for part in parts]),
        np.concatenate([part.triangles + k for part, k in zip(parts, starts, strict=True)]),
        np.concatenate([part.lines + k for part, k in zip(parts, starts, strict=True)]),
    )


def polyline(points: ArrayLike, *, closed: bool = False) -> Shape:
    """Line through (n, 3) points, back to the first one if closed."""
    corners = np.asarray(points, dtype=float)
    n = len(corners)
    start = np.arange(n if closed else n - 1)
    return bare(corners, lines=np.stack([start, (start + 1) % n], axis=1))


def circle(x: float, radius: float, *, around: int = 72) -> Shape:
    """Circle about the axis at x."""
    return polyline(on_circle(x, radius, 2 * pi * np.arange(around) / around), closed=True)


def turned(profile: ArrayLike, *, start: float = 0.0, sweep: float = 2 * pi, around: int = 72) -> Shape:
    """Solid whose section is a convex polygon, turned about the axis; an incomplete turn gets its two cut faces.

    Parameters
    ----------
    profile : (n, 2) float [m]
        Corners (x, radius), walked so that the material lies on the right hand: outside from left to right.
    start, sweep : float [rad]
        First angle, and how far the solid goes on from there.
    around : int
        Faces of a whole turn.
    """
    corner = np.asarray(profile, dtype=float)
    count = max(2, round(around * sweep / (2 * pi)) + 1)
    angle = start + sweep * np.arange(count) / (count - 1)
    sides = [_side(a, b, angle) for a, b in zip(corner, np.roll(corner, -1, axis=0), strict=True) if (a != b).any()]
    if sweep < 2 * pi - 1e-9:
        sides += [_cut(corner, angle[0], -1.0), _cut(corner, angle[-1], 1.0)]
    return merge(sides)


def cut_ring(left: float, right: float, inner: float, outer: float, *, start: float, sweep: float) -> Shape:
    """Ring of rectangular section, cut open: it goes from ``start`` over ``sweep``; radii ``inner`` to ``outer``."""
    return turned([(left, outer), (right, outer), (right, inner), (left, inner)], start=start, sweep=sweep)


def ring_edges(left: float, right: float, inner: float, outer: float, *, start: float, sweep: float) -> Shape:
    """Edges of a cut ring: four arcs, and the outlines of both cut faces."""
    angle = start + sweep * np.arange(49) / 48
    corners = np.array([(left, outer), (right, outer), (right, inner), (left, inner)])
    arcs = [polyline(on_circle(x, radius, angle)) for x, radius in corners]
    cuts = [polyline(on_circle(corners[:, 0], corners[:, 1], np.float64(at)), closed=True) for at in angle[[0, -1]]]
    return merge([*arcs, *cuts])


def wall(left: float, right: float, radius_left: float, radius_right: float, *, around: int = 72) -> Shape:
    """Cylinder or cone without thickness and without ends, as a pitch surface is drawn."""
    angle = 2 * pi * np.arange(around + 1) / around
    return _side(np.array([left, radius_left]), np.array([right, radius_right]), angle)


def tooth_lines(
    left: float, right: float, radius_left: float, radius_right: float, helix: float, *, middle: float, lines: int = 3
) -> Shape:
    """Lines along the flank on a pitch cylinder or cone.

    Parameters
    ----------
    left, right : float [m]
        Ends of the teeth.
    radius_left, radius_right : float [m]
        Of the pitch surface there.
    helix : float [rad]
        Helix angle, positive for a right-hand tooth, which seen along the axis runs away clockwise (ISO 1122-1).
    middle : float [rad]
        Angle about which the lines are spread, 25 degrees apart.
    lines : int
        How many.
    """
    share = np.linspace(0.0, 1.0, 13)
    x = left + share * (right - left)
    radius = radius_left + share * (radius_right - radius_left)
    centre = (radius_left + radius_right) / 2
    run = (x - (left + right) / 2) * tan(helix) / centre
    spread = np.deg2rad(25.0) * (np.arange(lines) - (lines - 1) / 2)
    return merge(polyline(on_circle(x, radius, middle + at + run)) for at in spread)


def ball(centre: ArrayLike, radius: float, *, around: int = 24) -> Shape:
    """Sphere."""
    polar = pi * np.arange(around // 2 + 1) / (around // 2)
    angle = 2 * pi * np.arange(around + 1) / around
    p, a = np.meshgrid(polar, angle, indexing="ij")
    normals = np.stack([-np.cos(p), np.sin(p) * np.cos(a), np.sin(p) * np.sin(a)], axis=-1).reshape(-1, 3)
    return Shape(np.asarray(centre) + radius * normals, normals, _grid(len(polar), len(angle)), _none(2))


def cone(tip: ArrayLike, foot: ArrayLike, radius: float, *, around: int = 24) -> Shape:
    """Cone from its tip to the middle of its base, closed by the base."""
    top, base = np.asarray(tip, dtype=float), np.asarray(foot, dtype=float)
    axis = (base - top) / np.linalg.norm(base - top)
    one, two = across(axis)
    angle = 2 * pi * np.arange(around) / around
    out = np.cos(angle)[:, None] * one + np.sin(angle)[:, None] * two
    rim = base + radius * out
    here, there = np.arange(around), (np.arange(around) + 1) % around
    side = np.stack([0 * here, 1 + there, 1 + here], axis=1)
    floor = np.stack([0 * here + 1 + around, 2 + around + here, 2 + around + there], axis=1)
    points = np.concatenate([[top], rim, [base], rim])
    normals = np.concatenate([[-axis], out, np.tile(axis, (around + 1, 1))])
    return Shape(points, normals, np.concatenate([side, floor]), _none(2))


def rod(start: ArrayLike, end: ArrayLike, radius: float, *, around: int = 12) -> Shape:
    """Round bar without ends."""
    a, b = np.asarray(start, dtype=float), np.asarray(end, dtype=float)
    one, two = across((b - a) / np.linalg.norm(b - a))
    angle = 2 * pi * np.arange(around + 1) / around
    out = np.cos(angle)[:, None] * one + np.sin(angle)[:, None] * two
    points = np.concatenate([a + radius * out, b + radius * out])
    return Shape(points, np.concatenate([out, out]), _grid(2, around + 1), _none(2))


def outline(x: Floats, left: Floats, right: Floats, sides: ArrayLike, *, most: int = 60) -> Shape:
    """Thin outline of a straight shaft: circles at its ends and steps, and the contour seen from the side.

    Parameters
    ----------
    x : (n,) float [m]
        Stations.
    left, right : (n,) float [m]
        Diameters just left and just right of each station.
    sides : (k,) float [rad]
        Angles at which the contour is drawn.
    most : int
        Circles drawn at most; of more, the widest steps are kept.
    """
    step = np.abs(right - left)
    step[[0, -1]] = np.inf
    chosen = np.sort(np.argsort(-step, kind="stable")[:most])
    chosen = chosen[step[chosen] > 1e-9]
    circles = [circle(x[k], d / 2) for k in chosen for d in {left[k], right[k]}]
    where = np.repeat(x, 2)[1:-1]
    radius = np.stack([left, right], axis=1).ravel()[1:-1] / 2
    where, radius = np.r_[x[0], where, x[-1]], np.r_[0.0, radius, 0.0]
    return merge([*circles, *(polyline(on_circle(where, radius, np.float64(at))) for at in np.atleast_1d(sides))])


def bare(points: Floats, *, triangles: ArrayLike | None = None, lines: ArrayLike | None = None) -> Shape:
    """Shape without normals."""
    return Shape(
        points,
        np.zeros_like(points),
        _none(3) if triangles is None else np.asarray(triangles, dtype=np.int64),
        _none(2) if lines is None else np.asarray(lines, dtype=np.int64),
    )


def _none(corners: int) -> Ints:
    return np.zeros((0, corners), dtype=np.int64)


def on_circle(x: ArrayLike, radius: ArrayLike, angle: ArrayLike) -> Floats:
    """Points at the clock's angles, (n, 3)."""
    along, r, a = np.broadcast_arrays(np.asarray(x, dtype=float), np.asarray(radius, dtype=float), np.asarray(angle))
    return np.stack([along, r * np.cos(a), r * np.sin(a)], axis=-1)


def _side(a: Floats, b: Floats, angle: Floats) -> Shape:
    """Surface swept by one edge of a section, from corner a to corner b; its normal is on the left of the walk."""
    along = (b - a) / np.linalg.norm(b - a)
    normal = on_circle(-along[1], along[0], angle)
    points = np.concatenate([on_circle(a[0], a[1], angle), on_circle(b[0], b[1], angle)])
    return Shape(points, np.concatenate([normal, normal]), _grid(2, len(angle)), _none(2))


def _cut(corner: Floats, angle: float, side: float) -> Shape:
    """Section's own face at an angle; ``side`` +1 looks clockwise, -1 anticlockwise."""
    points = on_circle(corner[:, 0], corner[:, 1], np.float64(angle))
    normal = side * np.array([0.0, -sin(angle), cos(angle)])
    k = np.arange(1, len(corner) - 1)
    faces = np.stack([0 * k, k, k + 1], axis=1)
    return Shape(points, np.tile(normal, (len(corner), 1)), faces if side < 0 else faces[:, ::-1], _none(2))


def _grid(rows: int, columns: int) -> Ints:
    """Triangles of a grid of points numbered row by row, anticlockwise for rows along +x and columns by the clock."""
    a = (np.arange(rows - 1)[:, None] * columns + np.arange(columns - 1)).ravel()
    return np.concatenate([np.stack([a, a + 1, a + columns + 1], axis=1),
                           np.stack([a, a + columns + 1, a + columns], axis=1)])  # fmt: skip


def across(axis: Floats, first: Floats | None = None) -> tuple[Floats, Floats]:
    """Two unit vectors that make a right-handed frame with a unit axis; the first as near as can be to a direction."""
    wish = np.zeros(3) if first is None else first - (first @ axis) * axis
    if np.linalg.norm(wish) < 1e-6:
        wish = np.cross(axis, [0.0, 1.0, 0.0] if abs(axis[1]) < 0.9 else [0.0, 0.0, 1.0])
    one = wish / np.linalg.norm(wish)
    return one, np.cross(axis, one)
