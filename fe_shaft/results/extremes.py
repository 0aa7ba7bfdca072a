"""The largest values along a bent shaft, also between its stations.

The exact field is asked at the stations, at places between them, and again more closely around the largest of these.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import UsageError, nearest
from fe_shaft.results.line import Line

Array = NDArray[np.float64]

MOST_VALUES = 200_000  # places times cases asked at once along one shaft; beyond, stations alone
CLOSER = 33  # places around the largest value, asked twice
KINDS = ("deflection", "slope", "bending_moment", "torque")


def largest_along(line: Line, quantity: str) -> tuple[Array, Array]:
    """Largest value along a shaft in each case, and where.

    Parameters
    ----------
    line : of the shaft
    quantity : "deflection", "slope", "bending_moment" or "torque" (its size)

    Returns
    -------
    value, x : (n_cases,) [m, rad or N m], [m]
        Exact at x. A larger value can hide only between two places that are asked, 9 to a span of the grid.

    Raises
    ------
    UsageError
        No such quantity.
    """
    if quantity not in KINDS:
        raise UsageError(f'a shaft has no largest "{quantity}". {nearest(quantity, KINDS)}')
    value, x = _at_stations(line, quantity)
    places = _places(line, len(value))
    between = _values(line, places, quantity)
    best = between.argmax(axis=1)
    left, right = places[np.maximum(best - 1, 0)], places[np.minimum(best + 1, len(places) - 1)]
    value, x = _better(value, x, between.max(axis=1), places[best])
    for _ in range(2):
        value, x = _closer(line, quantity, value, x, left, right)
        step = (right - left) / (CLOSER - 1)
        left, right = np.maximum(x - step, 0.0), np.minimum(x + step, line.length)
    return value, x


def _closer(line: Line, quantity: str, value: Array, x: Array, left: Array, right: Array) -> tuple[Array, Array]:
    """Ask again between left and right, (n_cases,) each; cases that share their places are asked together."""
    ends, which = np.unique(np.stack([left, right], axis=1), axis=0, return_inverse=True)
    found, at = value.copy(), x.copy()
    for k, (start, stop) in enumerate(ends):
        cases = np.flatnonzero(which.ravel() == k)
        places = np.linspace(start, stop, CLOSER)
        near = _values(line, places, quantity)[cases]
        found[cases], at[cases] = near.max(axis=1), places[near.argmax(axis=1)]
    return _better(value, x, found, at)


def _better(value: Array, x: Array, other: Array, at: Array) -> tuple[Array, Array]:
    """The larger of two values with its place; the first where they are the same to rounding."""
    take = other > value * (1 + 1e-12)
    return np.where(take, other, value), np.where(take, at, x)


def _places(line: Line, n_cases: int) -> Array:
    inside = max(0, min(8, MOST_VALUES // (len(line.x) * n_cases) - 1))
    share = np.arange(inside + 1) / (inside + 1)
    steps = np.diff(line.x)
    return np.append((line.x[:-1, None] + steps[:, None] * share).ravel(), line.x[-1])


def _values(line: Line, places: Array, quantity: str) -> Array:
    """Sizes at places, (n_cases, n)."""
    u, force = line.at(places)
    if quantity == "torque":
        return np.abs(force[..., 3])
    pair = {"deflection": u[..., 1:3], "slope": u[..., 4:6], "bending_moment": force[..., 4:6]}[quantity]
    return np.hypot(pair[..., 0], pair[..., 1])


def _at_stations(line: Line, quantity: str) -> tuple[Array, Array]:
    """The same at the stations, both sides of a jump."""
    if quantity == "torque":
        values = np.maximum(np.abs(line.force_left[..., 3]), np.abs(line.force_right[..., 3]))
    else:
        values = getattr(line, quantity)
    return values.max(axis=1), line.x[values.argmax(axis=1)]
