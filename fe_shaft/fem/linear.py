"""The linear solution: one factorisation, forces accumulated over residual steps.

Deformations taken from the total displacements lose digits on strongly stepped shafts; forces that are accumulated,
s += D B du, do not (method "f2": one solution and two residual steps). All reports read the stored deformations and
forces of the parts, never K u. Load cases are columns.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import SolutionError
from fe_shaft.fem.assembly import Reduction, Springs, scatter
from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.span import Spans

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

RESIDUAL_STEPS = 2


@dataclass(frozen=True)
class Network:
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


@dataclass(frozen=True)
class Solution:
    """What every later step reads: displacements, stored deformations and stored forces.

    Attributes
    ----------
    u : (n_nodes, 6, n_cases) [m, rad]
    span_force : (n_spans, 6, n_cases)
        Stored forces of the spans at their elastic centres; their deformations are f s + e_load.
    spring_deformation, spring_force : (n_springs, 6, n_cases)
        Force of the spring on node b, seen at the spring's point.
    unbalanced : (n_nodes, 6, n_cases)
        Internal minus applied forces at the nodes: the reaction where something is held, the residual elsewhere.
    residual : (n_cases,)
        Largest residual of the free displacements, relative to the forces that meet there.
    correction : (n_nodes, 6, n_cases)
        What the residual steps added to the displacements.
    """

    u: Array
    span_force: Array
    spring_deformation: Array
    spring_force: Array
    unbalanced: Array
    residual: Array
    correction: Array

    @property
    def digits_lost(self) -> Array:
        """Decimal digits by which the first solution missed the final one, (n_cases,)."""
        lost = [_lost(self.correction[:, kind], self.u[:, kind]) for kind in (slice(0, 3), slice(3, 6))]
        return np.maximum(*lost)


def solve(network: Network, load: Array, span_load: Array | None = None) -> Solution:
    """Solve for all load cases at once.

    Parameters
    ----------
    load : (n_nodes, 6, n_cases) [N, N m]
        Wrenches on the nodes, the spans' end loads included.
    span_load : (n_spans, 6, n_cases), optional
        Deformations of the spans under their own distributed loads.

    Raises
    ------
    SolutionError
        Where the stiffness matrix is not positive definite in spite of a model without free motions.
    """
    n, n_cases = network.n_nodes, load.shape[2]
    law, red = _Law(network), network.reduction
    b = red.columns(law.matrix)
    back = _factor(law.stiffness(b))
    f = load.reshape(n * NDOF, n_cases)
    gap = law.gap(span_load, n_cases)
    u = np.empty_like(f)
    u[:] = red.offset[:, None]
    s = law.apply(law.matrix @ u - gap)
    first = u
    for step in range(1 + RESIDUAL_STEPS):
        dq = back(red.contract(f - law.matrix.T @ s))
        s += law.apply(b @ dq)
        u = u + red.expand(dq)
        if step == 0:
            first = u
    unbalanced = law.matrix.T @ s - f
    e = law.matrix @ u - gap
    cut = law.n_span_rows
    return Solution(
        u=u.reshape(n, NDOF, n_cases),
        span_force=s[:cut].reshape(-1, NDOF, n_cases),
        spring_deformation=e[cut:].reshape(-1, NDOF, n_cases),
        spring_force=s[cut:].reshape(-1, NDOF, n_cases),
        unbalanced=unbalanced.reshape(n, NDOF, n_cases),
        residual=_residual(red.contract(unbalanced), red.turning, s, f, float(network.spans.length.max())),
        correction=(u - first).reshape(n, NDOF, n_cases),
    )


class _Law:
    """B of all parts, and their laws: spans diagonal, springs 6 x 6."""

    def __init__(self, network: Network) -> None:
        spans, springs = network.spans, network.springs
        self.n_span_rows = len(network.left) * NDOF
        node_a = np.concatenate([network.left, springs.node_a])
        node_b = np.concatenate([network.right, springs.node_b])
        block_a = np.concatenate([spans.b_left, springs.b_a])
        block_b = np.concatenate([spans.b_right, -springs.b_b])
        self.matrix: Any = scatter(network.n_nodes, node_a, block_a, node_b, block_b)
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

    def stiffness(self, b: Any) -> Any:
        """B^T D B over the free displacements."""
        if isinstance(b, np.ndarray):
            return b.T @ self.apply(b)
        from scipy import sparse

        blocks = [sparse.dia_array((self._diagonal.T, [0]), shape=(self.n_span_rows, self.n_span_rows))]
        if len(self._springs.stiffness):
            blocks.append(sparse.block_diag(list(self._springs.stiffness)))
        return (b.T @ sparse.block_diag(blocks, format="csr") @ b).tocsc()

    def gap(self, span_load: Array | None, n_cases: int) -> Array:
        """Deformations that no force goes with: loads on the spans, offsets of the supports."""
        gap = np.zeros((self.matrix.shape[0], n_cases))
        if span_load is not None:
            gap[: self.n_span_rows] = span_load.reshape(self.n_span_rows, n_cases)
        gap[self.n_span_rows :] = self._springs.gap.reshape(-1, 1)
        return gap


def _factor(k: Any) -> Callable[[Array], Array]:
    """Factor the stiffness, scaled by its diagonal, once."""
    size = k.shape[0]
    if size == 0:
        return lambda r: r
    diagonal = k.diagonal()
    if not (np.isfinite(diagonal).all() and (diagonal > 0).all()):
        raise SolutionError("the stiffness matrix has a displacement that nothing holds or that overflows")
    scale = (1 / np.sqrt(diagonal))[:, None]
    if isinstance(k, np.ndarray):
        try:
            inverse = np.linalg.inv(k * scale * scale.T)
        except np.linalg.LinAlgError:
            raise SolutionError("the stiffness matrix is singular in working precision") from None
        return lambda r: scale * (inverse @ (scale * r))
    from scipy import sparse
    from scipy.sparse.linalg import splu

    by = sparse.dia_array((scale.T, [0]), shape=(size, size))
    try:
        lu = splu(
            (by @ k @ by).tocsc(), permc_spec="MMD_AT_PLUS_A", diag_pivot_thresh=0.0, options={"SymmetricMode": True}
        )
    except RuntimeError:
        raise SolutionError("the stiffness matrix is singular in working precision") from None
    return lambda r: scale * lu.solve(scale * r)


def _residual(free: Array, turning: NDArray[np.bool_], s: Array, f: Array, length: float) -> Array:
    """Largest force or moment left over at the free displacements, relative to the forces of loads and parts.

    Moments are turned into forces by the length of the longest span.
    """
    size = np.full(f.shape[1], np.finfo(float).tiny)
    weigh = np.array([1.0, 1.0, 1.0, 1 / length, 1 / length, 1 / length])[:, None]
    for force in (s, f):
        by_kind = np.abs(force.reshape(-1, NDOF, f.shape[1])).max(axis=0, initial=0.0)
        size = np.maximum(size, (weigh * by_kind).max(axis=0))
    left = np.abs(free) / np.where(turning, length, 1.0)[:, None]
    return np.asarray(left.max(axis=0, initial=0.0) / size)


def _lost(correction: Array, u: Array) -> Array:
    size = np.maximum(np.abs(u).max(axis=(0, 1)), np.finfo(float).tiny)
    missed = np.abs(correction).max(axis=(0, 1)) / size
    return np.log10(np.maximum(missed / np.finfo(float).eps, 1.0))
