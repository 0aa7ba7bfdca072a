"""The nonlinear solution: Newton in the deformations of those springs whose force is no constant times them.

Everything else is linear and is condensed onto these deformations once. With the reference stiffness k0 in place of the
nonlinear springs the loads alone make the deformations e0, and unit forces C = B K0^-1 B^T; with the true forces s(e)

    R(e) = e - e0 + C (s(e) - k0 e) = 0,     dR/de = I + C (k(e) - k0).

Each step is a full one; a Levenberg term, proportional to what is left over, is added to the tangent k alone and
vanishes with it. A case that does not settle is loaded more, solved, and brought down again, because few contacts carry
at tiny loads. At last the springs' forces less k0 e are put on the linear network, whose solution then holds its own
digits: forces are accumulated there, and statics and energy are those of all parts.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import NamedTuple, Protocol

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import SolutionError
from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.linear import BEYOND_PRECISION, Solution, solve
from fe_shaft.fem.system import Law, Network, factor_quickly, factor_thoroughly

Array = NDArray[np.float64]
Bools = NDArray[np.bool_]

MOST_STEPS = 60
#: Left over, relative to the forces; one full step more is taken then, which squares it.
SETTLED = 1e-8
#: The Levenberg term is what is left over per so much movement [m]; a turn counts at so much of a lever [m].
REACH, LEVER = 1e-3, 0.03
#: A ring that nothing touches is held by this share of the reference stiffness.
FLOATING = 1e-6
#: How far a step may let what is left over grow before it is halved, and how often.
GROWTH, HALVINGS = 50.0, 8
#: Loads of a case that does not settle at once, in multiples of its own.
DESCENT = (1e3, 1e2, 1e1, 1.0)


class Answer(Protocol):
    """Forces on the inner side (..., b, 6) and their tangents (..., b, 6, 6)."""

    @property
    def force(self) -> Array:
        """(..., b, 6)."""

    @property
    def tangent(self) -> Array:
        """(..., b, 6, 6)."""


Respond = Callable[[Array, NDArray[np.intp]], Answer]


class Settled(NamedTuple):
    """The nonlinear solution.

    Attributes
    ----------
    solution : as the linear one, with the springs' true forces
    deformation : (n_cases, b, 6) [m, rad], of the nonlinear springs
    steps : (n_cases,)
    left : (n_cases,), what is left over relative to the forces
    floating : (n_cases, b) [N], largest force of the springs that hold what nothing touches
    """

    solution: Solution
    deformation: Array
    steps: NDArray[np.intp]
    left: Array
    floating: Array

    @property
    def converged(self) -> Bools:
        """(n_cases,)."""
        return np.asarray(self.left <= SETTLED)


def settle(
    network: Network,
    numbers: NDArray[np.intp],
    respond: Respond,
    load: Array,
    span_load: Array | None = None,
    start: Array | None = None,
) -> Settled:
    """Solve for all load cases at once.

    Parameters
    ----------
    network : its springs `numbers` carry their reference stiffness
    numbers : (b,), the springs whose forces `respond` gives
    respond : their deformations (k, b, 6) in k of the cases, whose numbers follow, to forces and tangents
    load, span_load : as in `linear.solve`
    start : (n_cases, b, 6), optional
        Deformations to start from; else those with the reference stiffness.

    Raises
    ------
    SolutionError
        Where the stiffness is not positive definite in spite of a model without free motions.
    """
    condensed = _condense(network, numbers, respond, load, span_load)
    e, steps, left = _iterate(
        condensed, condensed.e0, condensed.e0 if start is None else start.reshape(load.shape[2], -1)
    )
    lost = np.flatnonzero(~(left <= SETTLED))
    if len(lost):
        e[lost], more, left[lost] = _descend(condensed.cases(lost))
        steps[lost] += more
    force, _ = condensed.answer(e)
    beyond = np.zeros((len(network.springs.stiffness), NDOF, load.shape[2]))
    beyond[numbers] = (force - e @ condensed.k0).reshape(len(e), -1, NDOF).transpose(1, 2, 0)
    solution = solve(network, load, span_load, beyond)
    kept = np.abs(FLOATING * (e @ condensed.k0)).reshape(len(e), -1, NDOF)[..., : NDOF // 2].max(axis=-1)
    return Settled(solution, e.reshape(len(e), -1, NDOF), steps, left, kept)


class _Condensed(NamedTuple):
    """The network as the nonlinear springs see it; m = 6 b deformations.

    Attributes
    ----------
    c, k0 : (m, m)
    e0, gap : (n_cases, m), of the loads with all that is out of line, and of the latter alone
    scale : (n_cases,) [N], the measure of forces
    which : (n_cases,), their numbers
    """

    c: Array
    k0: Array
    e0: Array
    gap: Array
    scale: Array
    which: NDArray[np.intp]
    respond: Respond

    def cases(self, these: NDArray[np.intp]) -> _Condensed:
        """Some of the cases."""
        return self._replace(e0=self.e0[these], gap=self.gap[these], scale=self.scale[these], which=self.which[these])

    def answer(self, e: Array) -> tuple[Array, Array]:
        """Forces (n_cases, m) and tangents (n_cases, m, m), with the springs that hold what floats."""
        n_cases, m = e.shape
        told = self.respond(e.reshape(n_cases, -1, NDOF), self.which)
        tangent = np.zeros((n_cases, m // NDOF, NDOF, m // NDOF, NDOF))
        each = np.arange(m // NDOF)
        tangent[:, each, :, each, :] = np.moveaxis(told.tangent, 1, 0)
        floating = FLOATING * self.k0
        return told.force.reshape(n_cases, m) + e @ floating, tangent.reshape(n_cases, m, m) + floating

    def residual(self, e: Array, force: Array, e0: Array) -> Array:
        """R, (n_cases, m)."""
        return np.asarray(e - e0 + (force - e @ self.k0) @ self.c)

    def left(self, r: Array) -> Array:
        """What R stands for as forces [N], the largest of each case, (n_cases,)."""
        diagonal = self.c.diagonal()
        there = diagonal > 0
        force = np.abs(r) * np.where(there, 1 / np.where(there, diagonal, 1.0), 0.0)
        return np.asarray((force / _levers(force.shape[1])).max(axis=1, initial=0.0))


def _levers(m: int) -> Array:
    """1 for movements, a lever for turns, (m,)."""
    return np.tile(np.repeat([1.0, LEVER], NDOF // 2), m // NDOF)


def _condense(
    network: Network, numbers: NDArray[np.intp], respond: Respond, load: Array, span_load: Array | None
) -> _Condensed:
    n_cases = load.shape[2]
    law, red = Law(network, n_cases), network.reduction
    system = factor_quickly(law, red) or factor_thoroughly(law, red)
    if system is None:
        raise SolutionError(BEYOND_PRECISION)
    rows = law.n_span_rows + (NDOF * numbers[:, None] + np.arange(NDOF)).ravel()
    b = red.columns(law.matrix)[rows]
    b = b if isinstance(b, np.ndarray) else b.toarray()
    c = b @ system.solve(np.ascontiguousarray(b.T)) if b.shape[1] else np.zeros((len(rows), len(rows)))
    k0 = np.zeros((len(numbers), NDOF, len(numbers), NDOF))
    each = np.arange(len(numbers))
    k0[each, :, each, :] = network.springs.stiffness[numbers]

    def deformed(solution: Solution) -> Array:
        return solution.spring_deformation[numbers].transpose(2, 0, 1).reshape(n_cases, -1)

    e0 = deformed(solve(network, load, span_load))
    gap = np.zeros_like(e0)
    if red.offset.any() or network.springs.gap.any():
        gap = deformed(solve(network, np.zeros_like(load)))
    scale = np.maximum(np.abs(load[:, : NDOF // 2]).sum(axis=(0, 1)), np.finfo(float).tiny)
    return _Condensed((c + c.T) / 2, k0.reshape(len(rows), -1), e0, gap, scale, np.arange(n_cases), respond)


def _iterate(of: _Condensed, e0: Array, e: Array) -> tuple[Array, NDArray[np.intp], Array]:
    """Newton from e: deformations, steps, and what is left over relative to the forces, of each case."""
    e = np.array(e, dtype=np.float64)
    steps, relative = np.zeros(len(e), dtype=np.intp), np.full(len(e), np.inf)
    last = np.zeros(len(e), dtype=bool)
    todo = np.arange(len(e))
    for _ in range(MOST_STEPS):
        part = of.cases(todo)
        force, tangent = part.answer(e[todo])
        r = part.residual(e[todo], force, e0[todo])
        left = part.left(r)
        relative[todo] = left / _size(part, force)
        done = last[todo] | ~np.isfinite(left)
        last[todo] = relative[todo] <= SETTLED
        go = ~done
        if not go.any():
            break
        todo, part = todo[go], part.cases(np.flatnonzero(go))
        step = _direction(part, tangent[go], r[go], left[go])
        e[todo] += step * _shortened(part, e[todo], step, e0[todo], left[go])[:, None]
        steps[todo] += 1
    return e, steps, np.where(np.isfinite(relative), relative, np.inf)


def _size(of: _Condensed, force: Array) -> Array:
    """The forces that what is left over is held against, (n_cases,) [N]."""
    return np.asarray(np.maximum((np.abs(force) / _levers(force.shape[1])).max(axis=1, initial=0.0), of.scale))


def _direction(of: _Condensed, tangent: Array, r: Array, left: Array) -> Array:
    """The full step, with the Levenberg term in the tangent."""
    m = r.shape[1]
    more = (left / REACH)[:, None] * _levers(m) ** 2
    k = tangent - of.k0
    k[:, np.arange(m), np.arange(m)] += more
    return np.asarray(-np.linalg.solve(np.eye(m) + of.c @ k, r[..., None])[..., 0])


def _shortened(of: _Condensed, e: Array, step: Array, e0: Array, left: Array) -> Array:
    """Share of each step that is taken: all of it, unless what is left over would grow out of bounds."""
    share = np.ones(len(e))
    for _ in range(HALVINGS):
        tried = e + share[:, None] * step
        grown = ~(of.left(of.residual(tried, of.answer(tried)[0], e0)) <= GROWTH * left)
        if not grown.any():
            break
        share = np.where(grown, share / 2, share)
    return share


def _descend(of: _Condensed) -> tuple[Array, NDArray[np.intp], Array]:
    """From larger loads down to the given ones, each from the solution before."""
    e = of.gap + DESCENT[0] * (of.e0 - of.gap)
    steps = np.zeros(len(e), dtype=np.intp)
    left = np.full(len(e), np.inf)
    for times in DESCENT:
        e, more, left = _iterate(of._replace(scale=of.scale * times), of.gap + times * (of.e0 - of.gap), e)
        steps += more
    return e, steps, left
