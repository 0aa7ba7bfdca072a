"""The linear solution: one factorisation, forces accumulated over residual steps.

Deformations taken from the total displacements lose digits on strongly stepped shafts; forces that are accumulated,
s += D B du, do not (method "f2": one solution and two residual steps). All reports read the stored deformations and
forces of the parts, never K u. Load cases are columns.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Any, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import SolutionError
from fe_shaft.fem.assembly import Reduction, Springs, scatter
from fe_shaft.fem.dofs import NDOF, UY
from fe_shaft.fem.span import Spans, deformation_matrices

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

RESIDUAL_STEPS = 2
BEYOND_PRECISION = (
    "no trustworthy solution: stiffnesses differ by more powers of ten than double precision can hold. "
    "Look for a diameter, a length or a stiffness far from the others; the numbers are withheld."
)


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


class Solution(NamedTuple):
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
    correction : (n_free, n_cases), (n_free, n_cases), (n_free,)
        What the residual steps added to the free displacements, these, and the diagonal of their stiffness.
    resistance : [N], [J]
        The force with which the softest span resists the prescribed displacements, and its energy: the measure of
        rounding where nothing but a bore out of line loads a shaft that gives way to it freely.
    """

    u: Array
    span_force: Array
    spring_deformation: Array
    spring_force: Array
    unbalanced: Array
    residual: Array
    correction: tuple[Array, Array, Array]
    resistance: tuple[float, float]

    @property
    def digits_lost(self) -> Array:
        """Decimal digits by which the first solution missed the final one, (n_cases,)."""
        step, total = weighed_correction(self)
        size = np.abs(total).max(axis=0, initial=np.finfo(float).tiny)
        missed = np.abs(step).max(axis=0, initial=0.0) / size
        return np.asarray(np.log10(np.maximum(missed / np.finfo(float).eps, 1.0)))


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
    red, law = network.reduction, _Law(network)
    system = _factor(law, red)
    f = load.reshape(n * NDOF, n_cases)
    gap = law.gap(span_load, n_cases)
    s = law.starting_forces(red.offset, gap, n_cases)
    wanted = red.contract(f)
    q = first = np.zeros_like(wanted)
    for step in range(1 + RESIDUAL_STEPS):
        dq = system.solve(wanted - system.b.T @ s)
        s += system.force @ dq
        q = q + dq
        if step == 0:
            first = q
    u = red.expand(q)
    unbalanced = law.matrix.T @ s - f
    cut = law.n_span_rows
    resistance = _resistance(network)
    e = law.matrix[cut:] @ u
    if gap is not None:
        e -= gap[cut:]
    return Solution(
        u=u.reshape(n, NDOF, n_cases),
        span_force=s[:cut].reshape(-1, NDOF, n_cases),
        spring_deformation=e.reshape(-1, NDOF, n_cases),
        spring_force=s[cut:].reshape(-1, NDOF, n_cases),
        unbalanced=unbalanced.reshape(n, NDOF, n_cases),
        residual=_residual(red.contract(unbalanced), red.turning, s, resistance[0], float(network.spans.length.max())),
        correction=(q - first, q, system.diagonal),
        resistance=resistance,
    )


def _resistance(network: Network) -> tuple[float, float]:
    """Force and energy with which the softest span resists the prescribed displacements; zeros without any."""
    offset, gap = network.reduction.offset, network.springs.gap
    if not (offset.any() or gap.any()):
        return 0.0, 0.0
    length = float(network.spans.length.sum())
    weigh = np.repeat([1.0, length], NDOF // 2)
    moved = float(max(np.abs(each.reshape(-1, NDOF) * weigh).max(initial=0.0) for each in (offset, gap)))
    force = moved / float(network.spans.flexibility[:, UY].max())
    return force, force * moved


class _Law:
    """B of all parts, and their laws: spans diagonal, springs 6 x 6."""

    def __init__(self, network: Network) -> None:
        spans, springs = network.spans, network.springs
        n = len(network.left)
        self.n_span_rows = n * NDOF
        block_a, block_b = deformation_matrices(spans, len(springs.node_a))
        block_a[n:] = springs.b_a
        np.negative(springs.b_b, out=block_b[n:])
        node_a = np.concatenate([network.left, springs.node_a])
        node_b = np.concatenate([network.right, springs.node_b])
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

    def forces(self, b: Any) -> Any:
        """D B: forces of all parts for unit values of the free displacements."""
        if isinstance(b, np.ndarray):
            return self.apply(b)
        from scipy import sparse

        blocks = [sparse.dia_array((self._diagonal.T, [0]), shape=(self.n_span_rows, self.n_span_rows))]
        if len(self._springs.stiffness):
            blocks.append(sparse.block_diag(list(self._springs.stiffness)))
        return sparse.block_diag(blocks, format="csr") @ b

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


class _System(NamedTuple):
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


def _factor(law: _Law, red: Reduction) -> _System:
    """Assemble and factor the stiffness, once."""
    b = red.columns(law.matrix)
    force = law.forces(b)
    k = b.T @ force
    if k.shape[0] == 0:
        return _System(b, force, np.empty(0), lambda r: r)
    return _System(b, force, k.diagonal(), _dense(k) if isinstance(k, np.ndarray) else _sparse(k.tocsc()))


def _dense(k: Array) -> Callable[[Array], Array]:
    from scipy.linalg import lapack

    factor, info = lapack.dpotrf(k.T, lower=1)
    if info:
        raise SolutionError(BEYOND_PRECISION)
    return lambda r: np.asarray(lapack.dpotrs(factor, r, lower=1)[0])


def _sparse(k: Any) -> Callable[[Array], Array]:
    from scipy.sparse.linalg import splu

    try:
        lu = splu(k, permc_spec="MMD_AT_PLUS_A", diag_pivot_thresh=0.0, options={"SymmetricMode": True})
    except RuntimeError:
        raise SolutionError(BEYOND_PRECISION) from None
    solve: Callable[[Array], Array] = lu.solve
    return solve


def _residual(free: Array, turning: NDArray[np.bool_], s: Array, least: float, length: float) -> Array:
    """Largest force or moment left over at the free displacements, relative to the forces in the parts.

    Moments are turned into forces by the length of the longest span; forces below `least` are measured by it.
    """
    least = max(least, np.finfo(float).tiny)
    largest = np.abs(s).reshape(-1, NDOF, s.shape[1]).max(axis=0, initial=least)
    largest[NDOF // 2 :] /= length
    left = np.abs(free)
    left[turning] /= length
    return np.asarray(left.max(axis=0, initial=0.0) / largest.max(axis=0))


def weighed_correction(solution: Solution) -> tuple[Array, Array]:
    """The last correction and the free displacements, weighed by the forces that they stand for."""
    step, total, diagonal = solution.correction
    weigh = np.sqrt(diagonal)[:, None]
    return weigh * step, weigh * total
