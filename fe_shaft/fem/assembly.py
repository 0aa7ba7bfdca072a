"""Parts to a system: every part has its deformations e = B u, its law and its stored force.

A span joins two connection nodes by six uncoupled flexibilities; a spring joins two nodes (or a node and the ground) by
a full 6 x 6 stiffness. B is scattered once for all parts together; small systems carry it as a dense array, large ones
as a sparse one, and the same lines of code serve both. Constraints are one mechanism, u = T q + g: no penalties, no
dropped rows.
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.frames import rigid_link

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

#: Up to this number of displacements, and of displacements times cases, a dense system is solved faster than a sparse
#: one is started. Beyond, BLAS takes several threads, which wait for each other where other programs run as well:
#: 0.6 ms become 8 to 100.
DENSE_LIMIT, DENSE_NUMBERS = 96, 4000


class Springs(NamedTuple):
    """Springs with a full 6 x 6 law.

    Attributes
    ----------
    node_a, node_b : (n,)
        e = B_a u_a - B_b u_b - gap; node_b = n_nodes is the ground.
    b_a, b_b : (n, 6, 6)
        Rigid links from the nodes to the point where the spring sits.
    stiffness : (n, 6, 6)
    gap : (n, 6)
        Prescribed offset of the b side.
    """

    node_a: Ints
    node_b: Ints
    b_a: Array
    b_b: Array
    stiffness: Array
    gap: Array


class Constraint(NamedTuple):
    """Displacements held rigidly at a point beside a node.

    Attributes
    ----------
    node : the node
    arm : [m], along x from the node to the point
    held : (6,) bool
    value : (6,) prescribed displacement of the point, read where held
    """

    node: int
    arm: float
    held: NDArray[np.bool_]
    value: Array


class Reduction(NamedTuple):
    """u = T q + g.

    Attributes
    ----------
    free : (n_free,)
        The displacements that are kept as they are, where T is nothing but a selection; else None.
    matrix : T, where it is more than a selection
    offset : (6 n_nodes,) g
    turning : (n_free,)
        Which entries of q are rotations.
    """

    free: Ints | None
    matrix: Any
    offset: Array
    turning: NDArray[np.bool_]

    def columns(self, b: Any) -> Any:
        """B T."""
        if self.free is None:
            return b @ self.matrix
        return b.take(self.free, axis=1) if isinstance(b, np.ndarray) else b[:, self.free]

    def expand(self, q: Array) -> Array:
        """T q + g."""
        if self.free is None:
            return np.asarray(self.matrix @ q) + self.offset[:, None]
        u = np.empty((len(self.offset), q.shape[1]))
        u[:] = self.offset[:, None]
        u[self.free] = q
        return u

    def contract(self, force: Array) -> Array:
        """T^T f."""
        return force[self.free] if self.free is not None else np.asarray(self.matrix.T @ force)


def is_dense(n_nodes: int, n_cases: int = 1) -> bool:
    """Whether a system is small enough to be carried densely."""
    return n_nodes * NDOF <= DENSE_LIMIT and n_nodes * NDOF * n_cases <= DENSE_NUMBERS


def scatter(n_nodes: int, node_a: Ints, block_a: Array, node_b: Ints, block_b: Array, n_cases: int = 1) -> Any:
    """Scatter two 6 x 6 blocks a part into one matrix of 6 n_parts rows and 6 n_nodes columns.

    Node number n_nodes is the ground; what falls there is dropped.
    """
    n = len(node_a)
    if is_dense(n_nodes, n_cases):
        full = np.zeros((n, NDOF, n_nodes + 1, NDOF))
        rows = np.arange(n)
        full[rows, :, node_a] = block_a
        full[rows, :, node_b] = block_b
        return full.reshape(n * NDOF, -1)[:, : n_nodes * NDOF]
    from scipy import sparse

    row = np.arange(n * NDOF).reshape(n, NDOF, 1) + np.zeros((1, 1, NDOF), dtype=np.intp)
    cols = [node[:, None, None] * NDOF + np.arange(NDOF)[None, None] + 0 * row for node in (node_a, node_b)]
    data = np.concatenate([block_a.ravel(), block_b.ravel()])
    where = (np.concatenate([row.ravel()] * 2), np.concatenate([c.ravel() for c in cols]))
    keep = (where[1] < n_nodes * NDOF) & (data != 0)
    return sparse.csr_array((data[keep], (where[0][keep], where[1][keep])), shape=(n * NDOF, n_nodes * NDOF))


def reduce(n_nodes: int, constraints: Sequence[Constraint]) -> Reduction:
    """Build u = T q + g from all constraints, node by node."""
    offset, free = np.zeros((n_nodes, NDOF)), np.ones((n_nodes, NDOF), dtype=bool)
    at_node: dict[int, list[Constraint]] = {}
    for constraint in constraints:
        at_node.setdefault(constraint.node, []).append(constraint)
    mixed: list[tuple[int, Array]] = []
    for node, here in at_node.items():
        if all(c.arm == 0.0 for c in here):
            for c in here:
                free[node, c.held] = False
                offset[node, c.held] = c.value[c.held]
            continue
        block, offset[node] = _node_block(here)
        kept = np.abs(block).sum(axis=0) > 0
        free[node] = kept
        mixed.append((node, block[:, kept]))
    kept = np.flatnonzero(free)
    turning = kept % NDOF >= NDOF // 2
    if not mixed:
        return Reduction(kept, None, offset.reshape(-1), turning)
    return Reduction(None, _with_blocks(free, mixed), offset.reshape(-1), turning)


def _with_blocks(free: NDArray[np.bool_], mixed: list[tuple[int, Array]]) -> Any:
    """T as a matrix: a selection everywhere but at some nodes."""
    from scipy import sparse

    column = np.cumsum(free).reshape(free.shape) - 1
    rows = np.flatnonzero(free)
    matrix = sparse.lil_array((free.size, len(rows)))
    matrix[rows, np.arange(len(rows))] = 1.0
    for node, block in mixed:
        dofs = np.arange(NDOF) + node * NDOF
        columns = column[node][free[node]]
        matrix[np.ix_(dofs, columns)] = block
    return sparse.csr_array(matrix)


def _node_block(here: list[Constraint]) -> tuple[Array, Array]:
    """Allowed motion (6, 6) of one node (zero columns where none is left) and its prescribed part (6,)."""
    arms = {c.arm for c in here if c.held[1:3].any()} or {0.0}
    if len(arms) == 1:
        (arm,) = arms
        back = rigid_link((-arm, 0.0, 0.0))
        held, value = np.zeros(NDOF, dtype=bool), np.zeros(NDOF)
        for c in here:
            held |= c.held
            value[c.held] = c.value[c.held]
        return back * ~held, back @ np.where(held, value, 0.0)
    rows = np.concatenate([rigid_link((c.arm, 0.0, 0.0))[c.held] for c in here])
    value = np.concatenate([c.value[c.held] for c in here])
    _, size, v = np.linalg.svd(rows)
    rank = int((size > 1e-9 * size[0]).sum())
    block = np.zeros((NDOF, NDOF))
    block[:, : NDOF - rank] = v[rank:].T
    return block, np.linalg.lstsq(rows, value, rcond=None)[0]
