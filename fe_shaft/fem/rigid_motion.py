"""Which rigid motions the supports leave free: decided before any matrix is solved."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import NDOF, RX, RY, RZ, UX, UY, UZ

Array = NDArray[np.float64]

#: Held directions leave singular values above 3e-4 (two supports 2 mm apart on a 10 m shaft), free ones below 1e-15;
#: the bar stands between the two on a logarithmic scale.
FREE_BELOW = 1e-9
#: Above this square of a singular value nothing is free, whatever the rounding of the squares (1e-16): a quick answer
#: for the usual drive, which is held in everything but spin.
SURELY_HELD = 1e-10

_WITHOUT_SPIN = [UX, UY, UZ, RY, RZ]
_SPIN = np.eye(NDOF)[[RX]]
_UNIT = np.eye(len(_WITHOUT_SPIN))


def _above(matrix: Array, least: float) -> bool:
    """Whether all eigenvalues of a symmetric 5 x 5 matrix are above a value: the rest has a Cholesky factor."""
    from scipy.linalg import lapack

    return bool(lapack.dpotrf(matrix - least * _UNIT)[1] == 0)


def free_motions(held: Array, length: float) -> Array:
    """Basis of the rigid motions that cost no force.

    Parameters
    ----------
    held : (k, 6)
        One row for each direction held: row @ motion = movement of the support in that direction, the motion being
        the six displacements at the shaft's left end. Rows of a size of about 1 (m, rad).
    length : float [m]
        Of the shaft; it makes translations and rotations comparable.

    Returns
    -------
    (n_free, 6)
        In units of m and rad at the left end; orthonormal when rotations are multiplied by the length.
    """
    if len(held) >= 5 and not held[:, RX].any():
        rows = held[:, _WITHOUT_SPIN] * np.array([1.0, 1.0, 1.0, 1 / length, 1 / length])
        if _above(rows.T @ rows, SURELY_HELD):
            return _SPIN / length
    weigh = np.array([1.0, 1.0, 1.0, 1 / length, 1 / length, 1 / length])
    rows = held * weigh
    if len(rows) < NDOF:
        rows = np.concatenate([rows.reshape(-1, NDOF), np.zeros((NDOF - len(rows), NDOF))])
    _, values, v = np.linalg.svd(rows, full_matrices=False)
    free: Array = v[values < FREE_BELOW] * weigh
    return free
