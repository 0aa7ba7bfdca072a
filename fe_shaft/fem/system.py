"""All parts as one system: deformations from displacements, forces from deformations, and the stiffness factored.

Two factorisations: a quick one of the stiffness K, and a thorough one of its root for where stiff and soft parts stand
so close that K keeps no digits of the soft ones.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Any, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.assembly import Reduction, Springs, scatter
from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.span import Spans, deformation_matrices

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

#: The thorough factorisation is dense: so many displacements take about a second.
ORTHOGONAL_LIMIT = 1500


class Network(NamedTuple):
    """Everything that gives, between nodes: spans and springs, and what is held.

    Attributes
    ----------
    n_nodes : number of nodes
    spans, left, right : the spans and their nodes (n_spans,)
    springs : the springs
    reduction : constraints as u = T q + g
    """

    n_nodes: int
    spans: Spans
    left: Ints
    right: Ints
    springs: Springs
    reduction: Reduction


class Law:
    """B of all parts, and their laws: spans diagonal, springs 6 x 6."""

    def __init__(self, network: Network, n_cases: int = 1) -> None:
        spans, springs = network.spans, network.springs
        n = len(network.left)
        self.n_span_rows = n * NDOF
        block_a, block_b = deformation_matrices(spans, len(springs.node_a))
        block_a[n:] = springs.b_a
        np.negative(springs.b_b, out=block_b[n:])
        node_a = np.concatenate([network.left, springs.node_a])
        node_b = np.concatenate([network.right, springs.node_b])
        self.matrix: Any = scatter(network.n_nodes, node_a, block_a, node_b, block_b, n_cases)
        self._diagonal = 1.0 / spans.flexibility.reshape(-1, 1)
        self._springs = springs

    def apply(self, e: Array) -> Array:
        """Forces of all parts from their deformations, (6 n_parts, k)."""
        s = np.empty_like(e)
        np.multiply(self._diagonal, e[: self.n_span_rows], out=s[: self.n_span_rows])
        if len(e) > self.n_span_rows:
            k = self._springs.stiffness
            s[self.n_span_rows :] = (k @ e[self.n_span_rows :].reshape(len(k), NDOF, -1)).reshape(-1, e.shape[1])
        return s

    def forces(self, b: Any) -> Any:
        """D B: forces of all parts for unit values of the free displacements."""
        if isinstance(b, np.ndarray):
            return self.apply(b)
        from scipy import sparse

        blocks = [sparse.dia_array((self._diagonal.T, [0]), shape=(self.n_span_rows, self.n_span_rows))]
        if len(self._springs.stiffness):
            blocks.append(sparse.block_diag(list(self._springs.stiffness)))
        return sparse.block_diag(blocks, format="csr") @ b

    def roots(self, b: Array) -> Array:
        """D^(1/2) B, so that its square is the stiffness."""
        out = np.sqrt(self._diagonal) * b[: self.n_span_rows]
        if len(b) == self.n_span_rows:
            return out
        values, vectors = np.linalg.eigh(self._springs.stiffness)
        root = np.sqrt(values.clip(min=0.0))[:, :, None] * vectors.transpose(0, 2, 1)
        of_springs = root @ b[self.n_span_rows :].reshape(len(root), NDOF, -1)
        return np.concatenate([out, of_springs.reshape(-1, b.shape[1])])

    def gap(self, span_load: Array | None, n_cases: int) -> Array | None:
        """Deformations that no force goes with: loads on the spans, offsets of the supports; None without any."""
        offsets = self._springs.gap
        if span_load is None and not offsets.any():
            return None
        gap = np.zeros((self.matrix.shape[0], n_cases))
        if span_load is not None:
            gap[: self.n_span_rows] = span_load.reshape(self.n_span_rows, n_cases)
        gap[self.n_span_rows :] = offsets.reshape(-1, 1)
        return gap

    def starting_forces(self, offset: Array, gap: Array | None, n_cases: int) -> Array:
        """Forces of all parts while the free displacements are still zero."""
        e = np.zeros((self.matrix.shape[0], n_cases))
        if offset.any():
            e += self.matrix @ offset[:, None]
        elif gap is None:
            return e
        return self.apply(e if gap is None else e - gap)


class System(NamedTuple):
    """The factored system; neither factorisation needs its rows scaled, because no pivots are chosen.

    Attributes
    ----------
    b, force : B T and D B T
    diagonal : (n_free,) of the stiffness
    solve : of a right-hand side
    """

    b: Any
    force: Any
    diagonal: Array
    solve: Callable[[Array], Array]


def factor_quickly(law: Law, red: Reduction) -> System | None:
    """Assemble and factor the stiffness, once; None where it is not positive definite in working precision."""
    b = red.columns(law.matrix)
    force = law.forces(b)
    k = b.T @ force
    if k.shape[0] == 0:
        return System(b, force, np.empty(0), lambda r: r)
    solve = _dense(k) if isinstance(k, np.ndarray) else _sparse(k.tocsc())
    return None if solve is None else System(b, force, k.diagonal(), solve)


def _dense(k: Array) -> Callable[[Array], Array] | None:
    from scipy.linalg import lapack

    factor, info = lapack.dpotrf(k.T, lower=1)
    return None if info else lambda r: np.asarray(lapack.dpotrs(factor, r, lower=1)[0])


def _sparse(k: Any) -> Callable[[Array], Array] | None:
    from scipy.sparse.linalg import splu

    try:
        lu = splu(k, permc_spec="MMD_AT_PLUS_A", diag_pivot_thresh=0.0, options={"SymmetricMode": True})
    except RuntimeError:
        return None
    solve: Callable[[Array], Array] = lu.solve
    return solve


def factor_thoroughly(law: Law, red: Reduction) -> System | None:
    """Factor the root of the stiffness instead of the stiffness: half as many digits are at stake.

    K = A^T A with A = D^(1/2) B T; Householder reflections with rows sorted by size and columns pivoted stand stiff and
    soft parts side by side (Cox and Higham, 1998, Stability of Householder QR factorization for weighted least
    squares problems). Parts a hundredth of a millimetre apart on a thick shaft need it.
    """
    from scipy.linalg import qr, solve_triangular

    b = red.columns(law.matrix)
    if not 0 < b.shape[1] <= ORTHOGONAL_LIMIT:
        return None
    b = b if isinstance(b, np.ndarray) else b.toarray()
    a = law.roots(b)
    scale = np.sqrt((a * a).sum(axis=0))
    if not (np.isfinite(scale).all() and (scale > 0).all()):
        return None
    a = a / scale
    r, order = qr(a[np.argsort(-np.abs(a).max(axis=1))], mode="r", pivoting=True, check_finite=False)
    r = r[: len(order)]
    if len(r) < len(order) or abs(r[-1, -1]) <= np.finfo(float).eps * len(r) * abs(r[0, 0]):
        return None

    def solve(right: Array) -> Array:
        y = solve_triangular(r, (right / scale[:, None])[order], trans="T", check_finite=False)
        x = np.empty_like(y)
        x[order] = solve_triangular(r, y, check_finite=False)
        return np.asarray(x / scale[:, None])

    return System(b, law.forces(b), scale * scale, solve)
