"""Movements under given loads, for single bearings in tests: Newton's method on the potential V(u) - f . u."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]

DOFS = np.array([0, 1, 2, 4, 5])


def settle(law: Any, load: ArrayLike, start: ArrayLike, held: tuple[int, ...] = ()) -> Array:
    """The movement (1, 6) under which one bearing carries the load (6,) [N, N m]; `held` movements stay as started.

    The energy is convex, so halving the step until the potential has fallen always arrives.
    """
    free = np.array([dof for dof in DOFS if dof not in held])
    f, u = np.asarray(load, dtype=float), np.array(start, dtype=float).reshape(1, 6)
    for _ in range(60):
        told = law.respond(u)
        left = (f - told.force[0])[free]
        if np.abs(left).max() < 1e-10 * np.abs(f).max():
            return u
        step = np.zeros((1, 6))
        step[0, free] = np.linalg.lstsq(told.tangent[0][np.ix_(free, free)], left, rcond=1e-14)[0]
        slope, share = left @ step[0, free], 1.0
        while share > 1e-9 and _potential(law, u + share * step, f) > _potential(law, u, f) - 1e-4 * share * slope:
            share /= 2
        u = u + share * step
    raise AssertionError(f"no equilibrium: {left} left over")


def _potential(law: Any, u: Array, f: Array) -> float:
    return float(law.respond(u).energy[0] - u[0] @ f)
