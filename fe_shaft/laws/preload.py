"""From the preload of a row to the movement with which it is mounted."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.errors import SolutionError
from fe_shaft.laws.rows import Law

Array = NDArray[np.float64]

#: First guess of the movement [m], how often it may be doubled (to some metres), and steps of the safeguarded Newton
#: method, which at least halves the bracket in each.
GUESS, DOUBLINGS, STEPS, SETTLED = 1e-6, 24, 100, 1e-14


def preset_for(law: Law, side: ArrayLike, preload: ArrayLike) -> Array:
    """Axial movements of inner rings that press each row with its preload.

    Parameters
    ----------
    law : b rows, each alone; an increasing axial force from some movement on
    side : (b,) the way that closes the row, +1 inner ring to the right
    preload : (b,) axial force [N], 0 or more; 0 gives 0, clearance is not taken up

    Returns
    -------
    (b,) [m] with the sign of `side`

    Raises
    ------
    SolutionError
        Where a row cannot bear the preload along the shaft.
    """
    way, wanted = np.broadcast_arrays(np.asarray(side, dtype=float), np.asarray(preload, dtype=float))
    low, high = np.zeros(wanted.shape), _far_enough(law, way, wanted)
    x = high.copy()
    for _ in range(STEPS):
        force, slope = _axial(law, way, x)
        low, high = np.where(force < wanted, x, low), np.where(force < wanted, high, x)
        newton = x - (force - wanted) / np.where(slope > 0, slope, 1.0)
        inside = (slope > 0) & (newton >= low) & (newton <= high)
        new = np.where(inside, newton, (low + high) / 2)
        done = np.abs(new - x) <= SETTLED * high
        x = new
        if done.all():
            break
    return np.where(wanted > 0, way * x, 0.0)


def _far_enough(law: Law, side: Array, wanted: Array) -> Array:
    """Movements under which every row bears its preload or more."""
    x = np.full(wanted.shape, GUESS)
    for _ in range(DOUBLINGS):
        short = _axial(law, side, x)[0] < wanted
        if not short.any():
            return x
        x = np.where(short, 2 * x, x)
    worst = float(wanted[_axial(law, side, x)[0] < wanted].max(initial=0.0))
    raise SolutionError(f"a preload of {worst:g} N is more than a row can bear along the shaft. Lower it.")


def _axial(law: Law, side: Array, x: Array) -> tuple[Array, Array]:
    """Closing force [N] and its slope [N/m] at the closing movements x [m]."""
    u = np.zeros((*x.shape, 6))
    u[..., 0] = side * x
    told = law.respond(u)
    return side * told.force[..., 0], told.tangent[..., 0, 0]
