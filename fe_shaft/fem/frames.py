"""Rigid links: how a displacement and a wrench travel along a rigid arm."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.fem.dofs import NDOF

Array = NDArray[np.float64]


def rigid_link(arm: ArrayLike) -> Array:
    """Matrix of a rigid link: the displacement of a point from that of its node.

    u_point = R u_node with u + theta x arm for the translations; the wrench goes the other way,
    F_node = R^T F_point, because a rigid link stores no energy.

    Parameters
    ----------
    arm : (..., 3) [m]
        From the node to the point.

    Returns
    -------
    (..., 6, 6)
    """
    r = np.asarray(arm, dtype=float)
    link = np.zeros((*r.shape[:-1], NDOF, NDOF))
    link[..., range(NDOF), range(NDOF)] = 1.0
    x, y, z = r[..., 0], r[..., 1], r[..., 2]
    link[..., 0, 4], link[..., 0, 5] = z, -y
    link[..., 1, 3], link[..., 1, 5] = -z, x
    link[..., 2, 3], link[..., 2, 4] = y, -x
    return link


def move_wrench(wrench: ArrayLike, arm: ArrayLike) -> Array:
    """Wrench at a node that is statically equal to one at a point.

    Parameters
    ----------
    wrench : (..., 6) [N, N m]
        Force and couple at the point.
    arm : (..., 3) [m]
        From the node to the point.
    """
    w, r = np.asarray(wrench, dtype=float), np.asarray(arm, dtype=float)
    force, couple = w[..., :3], w[..., 3:]
    moment = np.stack(
        [
            r[..., 1] * force[..., 2] - r[..., 2] * force[..., 1],
            r[..., 2] * force[..., 0] - r[..., 0] * force[..., 2],
            r[..., 0] * force[..., 1] - r[..., 1] * force[..., 0],
        ],
        axis=-1,
    )
    return np.concatenate([force + np.zeros_like(moment), couple + moment], axis=-1)
