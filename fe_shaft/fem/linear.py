"""The linear solution: one factorisation, forces accumulated over residual steps.

Deformations taken from the total displacements lose digits on strongly stepped shafts; forces that are accumulated,
s += D B du, do not (method "f2": one solution and two residual steps, more while they have not settled). All reports
read the stored deformations and forces of the parts, never K u. Load cases are columns.
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import SolutionError
from fe_shaft.fem.assembly import Reduction
from fe_shaft.fem.dofs import NDOF, UY
from fe_shaft.fem.system import Law, Network, System, factor_quickly, factor_thoroughly

Array = NDArray[np.float64]

RESIDUAL_STEPS = 2
#: More steps are taken, up to so many, while a node is out of balance by more than SETTLED of the forces and each step
#: still halves that. Of 10,000 shafts of 5 to 200 mm with supports 2 mm apart at least, one in a hundred takes more
#: than two. Where the quick factorisation leaves more than ENOUGH, the thorough one is tried.
SETTLED, ENOUGH = 1e-15, 1e-12
QUICK_STEPS, THOROUGH_STEPS = 6, 12
BEYOND_PRECISION = (
    "no trustworthy solution: stiffnesses differ by more powers of ten than double precision can hold. "
    "Look for a diameter, a length or a stiffness far from the others; the numbers are withheld."
)


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


def solve(network: Network, load: Array, span_load: Array | None = None, spring_load: Array | None = None) -> Solution:
    """Solve for all load cases at once.

    Parameters
    ----------
    load : (n_nodes, 6, n_cases) [N, N m]
        Wrenches on the nodes, the spans' end loads included.
    span_load : (n_spans, 6, n_cases), optional
        Deformations of the spans under their own distributed loads.
    spring_load : (n_springs, 6, n_cases), optional
        Forces of the springs beyond their stiffness times their deformation.

    Raises
    ------
    SolutionError
        Where the stiffness matrix is not positive definite in spite of a model without free motions.
    """
    n, n_cases = network.n_nodes, load.shape[2]
    red, law = network.reduction, Law(network, n_cases)
    f = load.reshape(n * NDOF, n_cases)
    gap = law.gap(span_load, n_cases)
    start = law.starting_forces(red.offset, gap, n_cases)
    if spring_load is not None:
        start[law.n_span_rows :] += spring_load.reshape(-1, n_cases)
    resistance = _resistance(network)
    reached = _settle(law, red, start, f, resistance[0], float(network.spans.length.max()))
    u, s = red.expand(reached.q), reached.s
    cut = law.n_span_rows
    e = law.matrix[cut:] @ u
    if gap is not None:
        e -= gap[cut:]
    return Solution(
        u=u.reshape(n, NDOF, n_cases),
        span_force=s[:cut].reshape(-1, NDOF, n_cases),
        spring_deformation=e.reshape(-1, NDOF, n_cases),
        spring_force=s[cut:].reshape(-1, NDOF, n_cases),
        unbalanced=reached.unbalanced.reshape(n, NDOF, n_cases),
        residual=reached.residual,
        correction=(reached.q - reached.first, reached.q, reached.diagonal),
        resistance=resistance,
    )


class _Reached(NamedTuple):
    """Where the residual steps have come to: forces, displacements, those of the first step, and what is left over."""

    s: Array
    q: Array
    first: Array
    unbalanced: Array
    residual: Array
    diagonal: Array

    @property
    def worst(self) -> float:
        worst = float(self.residual.max(initial=0.0))
        return worst if np.isfinite(worst) else np.inf


def _settle(law: Law, red: Reduction, start: Array, f: Array, resistance: float, longest: float) -> _Reached:
    """Solve with the quick factorisation; where it fails or does not settle, with the thorough one."""
    least = np.abs(f).reshape(-1, NDOF, f.shape[1])[:, : NDOF // 2].max(axis=(0, 1))
    least = np.maximum(least, max(resistance, np.finfo(float).tiny))
    best: _Reached | None = None
    for factor, most in ((factor_quickly, QUICK_STEPS), (factor_thoroughly, THOROUGH_STEPS)):
        system = factor(law, red)
        if system is None:
            continue
        reached = _step(system, law, red, start.copy(), f, least, longest, most)
        if best is None or reached.worst < best.worst:
            best = reached
        if best.worst <= ENOUGH:
            break
    if best is None:
        raise SolutionError(BEYOND_PRECISION)
    return best


def _step(
    system: System, law: Law, red: Reduction, s: Array, f: Array, least: Array, longest: float, most: int
) -> _Reached:
    """One solution and its residual steps; forces are accumulated."""
    wanted = red.contract(f)
    q = first = np.zeros_like(wanted)
    before = np.inf
    for step in range(1 + most):
        dq = system.solve(wanted - system.b.T @ s)
        s += system.force @ dq
        q = q + dq
        if step == 0:
            first = q
        if step < RESIDUAL_STEPS:
            continue
        unbalanced = law.matrix.T @ s - f
        residual = _residual(red.contract(unbalanced), red.turning, s, least, longest)
        worst = residual.max(initial=0.0)
        if worst <= SETTLED or worst > before / 2:
            break
        before = worst
    return _Reached(s, q, first, unbalanced, residual, system.diagonal)


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


def _residual(free: Array, turning: NDArray[np.bool_], s: Array, least: Array, length: float) -> Array:
    """Largest force or moment left over at the free displacements, relative to the forces in the parts.

    Moments are turned into forces by the length of the longest span; forces below `least` (n_cases,) are measured by
    it.
    """
    largest = np.abs(s).reshape(-1, NDOF, s.shape[1]).max(axis=0, initial=0.0)
    largest[NDOF // 2 :] /= length
    left = np.abs(free)
    left[turning] /= length
    return np.asarray(left.max(axis=0, initial=0.0) / np.maximum(largest.max(axis=0), least))


def weighed_correction(solution: Solution) -> tuple[Array, Array]:
    """The last correction and the free displacements, weighed by the forces that they stand for."""
    step, total, diagonal = solution.correction
    weigh = np.sqrt(diagonal)[:, None]
    return weigh * step, weigh * total
