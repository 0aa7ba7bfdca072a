"""Symbols of the drawing as plain arrays: arrows, bent arrows, the clock. Frame and units as in shapes.py."""

from __future__ import annotations

from math import cos, pi, sin

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.views.shapes import Floats, Shape, across, bare, circle, merge, on_circle, polyline

ARROW_HEAD = 0.32  # of an arrow's length, at most
TURN_OF_BENT_ARROW = 1.5 * pi
HEAD_OF_BENT_ARROW = pi / 3  # from the direction towards the eye


def arrow(tail: ArrayLike, tip: ArrayLike, towards_eye: ArrayLike, width: float, *, filled: bool) -> Shape:
    """Flat arrow that turns its face to the eye: seven corners, filled, or hollow as a line around it.

    Parameters
    ----------
    tail, tip : (3,) float [m]
        Where it begins and ends.
    towards_eye : (3,) float
        Direction from the drawing to the eye.
    width : float [m]
        Of the shaft of the arrow; the head is three times as wide.
    filled : bool
        Filled, or its outline alone.
    """
    a, b, eye = (np.asarray(each, dtype=float) for each in (tail, tip, towards_eye))
    length = float(np.linalg.norm(b - a))
    along = (b - a) / length
    side = np.cross(eye, along)
    if np.linalg.norm(side) < 1e-6 * np.linalg.norm(eye):
        side = across(along)[0]  # seen end on: any side will do
    side = side / np.linalg.norm(side) * width / 2
    neck = b - along * min(ARROW_HEAD * length, 4 * width)
    corners = np.array([a - side, neck - side, neck - 3 * side, b, neck + 3 * side, neck + side, a + side])
    if not filled:
        return polyline(corners, closed=True)
    faces = np.array([[0, 1, 5], [0, 5, 6], [2, 3, 4]])
    return bare(corners, triangles=faces)


def bent_arrow(
    centre: ArrayLike, axis: ArrayLike, radius: float, width: float, towards_eye: ArrayLike, *, ribbon: bool
) -> Shape:
    """Arrow bent three quarters around an axis, turning as the right hand does about it (a torque).

    Parameters
    ----------
    centre : (3,) [m]
        Middle of the arc.
    axis : (3,)
        Of any length.
    radius : float [m]
        Of the arc.
    width : float [m]
        Of the band; the head is three times as wide.
    towards_eye : (3,)
        The head is on this side.
    ribbon : bool
        Whether the band lies on a cylinder about the axis, to be seen from the side; else in a plane across it, to be
        seen along the axis.
    """
    middle, along = np.asarray(centre, dtype=float), np.asarray(axis, dtype=float)
    along = along / np.linalg.norm(along)
    one, two = across(along, np.asarray(towards_eye, dtype=float))
    head, last = min(0.6, 4 * width / radius), HEAD_OF_BENT_ARROW
    angle = np.linspace(last - TURN_OF_BENT_ARROW, last - head, 40)
    out = np.cos(angle)[:, None] * one + np.sin(angle)[:, None] * two
    aside = width / 2 * (np.broadcast_to(along, out.shape) if ribbon else out)
    rim, tip = middle + radius * out, cos(last) * one + sin(last) * two
    barbs = np.array([rim[-1] - 3 * aside[-1], middle + radius * tip, rim[-1] + 3 * aside[-1]])
    points = np.concatenate([np.stack([rim - aside, rim + aside], axis=1).reshape(-1, 3), barbs])
    k = 2 * np.arange(len(angle) - 1)
    band = np.concatenate([np.stack([k, k + 1, k + 3], axis=1), np.stack([k, k + 3, k + 2], axis=1)])
    end = 2 * len(angle)
    return bare(points, triangles=np.concatenate([band, [[end, end + 1, end + 2]]]))


def clock(x: float, radius: float) -> tuple[Shape, Floats]:
    """Clock ring about the axis at x: circle with twelve ticks; and where 12, 3, 6 and 9 are written, (4, 3)."""
    hours = 2 * pi * np.arange(12) / 12
    inner = np.where(np.arange(12) % 3 == 0, 0.84, 0.92) * radius
    a, b = on_circle(x, inner, hours), on_circle(x, np.full(12, radius), hours)
    ticks = [polyline(np.stack([start, end])) for start, end in zip(a, b, strict=True)]
    return merge([circle(x, radius), *ticks]), on_circle(x, np.full(4, 1.22 * radius), hours[::3])


def turning_arrow(x: float, radius: float, sense: float) -> Shape:
    """Arrow on the clock ring from half past ten to half past one, or back when the shaft turns the other way."""
    angle = sense * np.linspace(-pi / 4, pi / 4, 24)
    width = 0.07 * radius
    rim = np.full(len(angle), radius)
    band = np.stack([on_circle(x, rim - width / 2, angle), on_circle(x, rim + width / 2, angle)], axis=1)
    over = angle[-1] + sense * 0.45
    head = np.concatenate([on_circle(x, np.array([radius - 2.4 * width, radius + 2.4 * width]), np.full(2, angle[-1])),
                           on_circle(x, np.array([radius]), np.array([over]))])  # fmt: skip
    points = np.concatenate([band.reshape(-1, 3), head])
    k = 2 * np.arange(len(angle) - 1)
    faces = np.concatenate([np.stack([k, k + 1, k + 3], axis=1), np.stack([k, k + 3, k + 2], axis=1)])
    end = 2 * len(angle)
    return bare(points, triangles=np.concatenate([faces, [[end, end + 1, end + 2]]]))
