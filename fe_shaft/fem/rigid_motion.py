"""Which rigid motions the supports leave free: decided before any matrix is solved."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

#: Held directions leave singular values above 3e-4 (two supports 2 mm apart on a 10 m shaft), free ones below 1e-15;
#: the bar stands between the two on a logarithmic scale.
FREE_BELOW = 1e-9


def free_motions(held: Array, length: float) -> Array:
    """Basis of the rigid motions that cost no force.

    Parameters
    ----------
    held : (k, 6)
        One row for each direction held: row @ motion = movement of the support in that direction, the motion being
        the six displacements at the shaft's left end. Rotational rows in rad.
    length : float [m]
        Of the shaft; it makes translations and rotations comparable.

    Returns
    -------
    (n_free, 6)
        In units of m and rad at the left end; orthonormal when rotations are multiplied by the length.
    """
    weigh = np.array([1.0, 1.0, 1.0, 1 / length, 1 / length, 1 / length])
    rows = held.reshape(-1, 6) * weigh
    size = np.sqrt((rows**2).sum(axis=1, keepdims=True))
    rows = rows[size[:, 0] > 0] / size[size[:, 0] > 0]
    _, values, v = np.linalg.svd(np.concatenate([rows, np.zeros((6, 6))]))
    free: Array = v[values < FREE_BELOW] * weigh
    return free
