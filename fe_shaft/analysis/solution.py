"""Grid to results: one linear solution of a model in all its load cases, with its proof."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING, Any, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.discretise import Grid, discretise
from fe_shaft.analysis.loads import Balance, Loads, apply_loads, balance_torque, twist_reference
from fe_shaft.analysis.motions import require_held
from fe_shaft.analysis.supports import SupportPlan, plan_supports
from fe_shaft.errors import SolutionError
from fe_shaft.fem.assembly import Constraint, reduce
from fe_shaft.fem.dofs import NDOF, RX
from fe_shaft.fem.linear import Solution, solve, weighed_correction
from fe_shaft.fem.newton import SETTLED, Settled, settle
from fe_shaft.fem.span import Flexibility, Spans, condense, flexibility
from fe_shaft.fem.system import Network
from fe_shaft.model.actions import Action, case_names
from fe_shaft.model.support import Bearing

if TYPE_CHECKING:
    from fe_shaft.analysis.computed import Computed
    from fe_shaft.laws.response import Response
    from fe_shaft.model.support_table import SupportTable
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]

#: Axial loads below this share of the loads do not decide which one-way stop acts: rounding of thrusts that cancel.
NO_PUSH = 1e-9


_SPIN = np.arange(NDOF) == RX
_NO_MOTION = np.zeros(NDOF)


class Rolled(NamedTuple):
    """What the computed bearings came to.

    Attributes
    ----------
    bearings : they themselves, b
    deformation : (n_cases, b, 6) [m, rad]
    response : energies, forces and tangents there
    steps, left : (n_cases,), steps of Newton and what is left over of the forces
    floating : (n_cases, b) [N], force of the springs that hold rings which nothing touches
    """

    bearings: Computed
    deformation: Array
    response: Response
    steps: NDArray[np.intp]
    left: Array
    floating: Array


class Solved(NamedTuple):
    """Everything between a model and its results.

    Attributes
    ----------
    plans : springs and constraints of the supports in each group of cases, with the numbers of these; springs and
        nodes are the same in all
    solution : of all cases, in the model's order
    offset : (n_nodes, 6, 1)
        Prescribed displacements.
    balances : torques that the tool takes out
    spinning : shafts whose spin nothing holds
    rolled : what the computed bearings came to; None without any
    """

    model: Model
    actions: tuple[Action, ...]
    grid: Grid
    give: Flexibility
    spans: Spans
    loads: Loads
    table: SupportTable
    plans: list[tuple[SupportPlan, NDArray[np.intp]]]
    solution: Solution
    offset: Array
    balances: list[Balance]
    spinning: set[str]
    rolled: Rolled | None = None

    @property
    def plan(self) -> SupportPlan:
        """Of the first group: for what is the same in all."""
        return self.plans[0][0]


def solve_model(model: Model) -> Solved:
    """Solve a model once.

    Raises
    ------
    FreeMotionError, LoadError
        In words, before anything is solved.
    SolutionError
        Where the matrix cannot be factored.
    """
    acts, table = model.actions, model.support_table
    grid = discretise(model, acts)
    give = flexibility(grid.pieces)
    spans = condense(grid.pieces, give, grid.length)
    loads = apply_loads(model, grid, spans, acts)
    groups = _groups(model)
    spinning: set[str] = set()
    for push, cases in groups:
        spinning |= require_held(model, push, cases)
    balances = balance_torque(model, spinning)
    for balance in balances:
        loads.nodal[grid.node_of[balance.part], RX] += balance.torque
    plans = [(plan_supports(table, grid, push), cases) for push, cases in groups]
    rolling = _computed(model)
    solved = [_solve_group(model, grid, spans, loads, plan, cases, spinning, rolling) for plan, cases in plans]
    several = [cases for _, cases in plans]
    solution = solved[0].solution if len(solved) == 1 else _merge([each.solution for each in solved], several)
    rolled = (
        None if rolling is None else _rolled(rolling, [each.settled for each in solved], several, case_names(model))
    )
    return Solved(
        model, acts, grid, give, spans, loads, table, plans, solution, solved[0].offset, balances, spinning, rolled
    )


def _computed(model: Model) -> Computed | None:
    """The computed bearings of a model; force laws are loaded only where there are any."""
    if not any(isinstance(part, Bearing) and part.computed for part in model.supports):
        return None
    from fe_shaft.analysis.computed import computed_bearings

    return computed_bearings(model)


class _Group(NamedTuple):
    """One group of cases, solved."""

    solution: Solution
    offset: Array
    settled: Settled | None


def _rolled(
    bearings: Computed, several: Sequence[Settled | None], cases: Sequence[NDArray[np.intp]], names: Sequence[str]
) -> Rolled:
    """What the computed bearings came to, in the model's order of cases; an error where a case did not settle."""
    order = np.argsort(np.concatenate(cases))
    found = [each for each in several if each is not None]

    def join(arrays: list[NDArray[Any]]) -> NDArray[Any]:
        return np.concatenate(arrays)[order]

    left = join([each.left for each in found])
    if lost := [names[int(k)] for k in np.flatnonzero(~(left <= SETTLED))]:
        raise SolutionError(
            f"no trustworthy solution: the computed bearings do not come to rest in case {', '.join(lost[:3])}; "
            f"{left.max():.1g} of the forces is left over. Look for a bearing that cannot carry its load, or write "
            "stiffness = { ... } for it."
        )
    deformation = join([each.deformation for each in found])
    steps, floating = join([each.steps for each in found]), join([each.floating for each in found])
    return Rolled(bearings, deformation, bearings.respond(deformation), steps, left, floating)


def _groups(model: Model) -> list[tuple[dict[str, int], NDArray[np.intp]]]:
    """Cases that share their supports: one-way stops act against the axial load of their shaft."""
    table, statics = model.support_table, model.statics
    every = np.arange(len(case_names(model)))
    if not table.stops:
        return [(dict.fromkeys(statics, 0), every)]
    one_way = {shaft for shaft, way in zip(table.shafts, table.one_way, strict=True) if way}
    signs = {
        name: np.where(np.abs(of.resultant[0]) > NO_PUSH * of.size, np.sign(of.resultant[0]), 0.0) * (name in one_way)
        for name, of in statics.items()
    }
    keys = [tuple(int(signs[name][k]) for name in statics) for k in every]
    return [
        (dict(zip(statics, key, strict=True)), np.array([k for k in every if keys[k] == key]))
        for key in dict.fromkeys(keys)
    ]


def _solve_group(
    model: Model,
    grid: Grid,
    spans: Spans,
    loads: Loads,
    plan: SupportPlan,
    cases: NDArray[np.intp],
    spinning: set[str],
    rolling: Computed | None,
) -> _Group:
    held = list(plan.constraints)
    for shaft in spinning:
        node, _ = twist_reference(model, grid, shaft)
        held.append(Constraint(node, 0.0, _SPIN, _NO_MOTION))
    reduction = reduce(plan.n_nodes, held)
    offset = reduction.offset.reshape(-1, NDOF, 1)
    nodal, deformation = loads.nodal, loads.deformation
    if len(cases) < nodal.shape[2]:
        nodal, deformation = nodal[..., cases], None if deformation is None else deformation[..., cases]
    if plan.n_nodes > len(nodal):
        nodal = np.concatenate([nodal, np.zeros((plan.n_nodes - len(nodal), *nodal.shape[1:]))])
    if rolling is None:
        network = Network(plan.n_nodes, spans, grid.left, grid.right, plan.springs, reduction)
        return _Group(solve(network, nodal, deformation), offset, None)
    rows = plan.bearing.searchsorted(rolling.numbers)
    stiffness = plan.springs.stiffness.copy()
    stiffness[rows] = rolling.reference
    springs = plan.springs._replace(stiffness=stiffness)
    network = Network(plan.n_nodes, spans, grid.left, grid.right, springs, reduction)
    settled = settle(network, rows, lambda e, _: rolling.respond(e), nodal, deformation)
    return _Group(settled.solution, offset, settled)


def _merge(solutions: list[Solution], cases: list[NDArray[np.intp]]) -> Solution:
    """Put the cases of all groups back into the model's order."""
    order = np.argsort(np.concatenate(cases))

    def join(arrays: list[Array]) -> Array:
        return np.concatenate(arrays, axis=-1)[..., order]

    arrays = {name: join([getattr(s, name) for s in solutions]) for name in Solution._fields[:-2]}
    weighed = [weighed_correction(solution) for solution in solutions]
    longest = max(len(step) for step, _ in weighed)
    padded = [[np.pad(each, ((0, longest - len(each)), (0, 0))) for each in pair] for pair in weighed]
    steps, totals = (join([pair[k] for pair in padded]) for k in (0, 1))
    return Solution(**arrays, correction=(steps, totals, np.ones(longest)), resistance=solutions[0].resistance)


def counted_twist(solved: Solved) -> Array:
    """Displacements (n_nodes, 6, n_cases) with twist counted from where torque leaves."""
    grid, u = solved.grid, solved.solution.u
    for shaft in solved.spinning:
        _, names = twist_reference(solved.model, grid, shaft)
        shift = np.array([0.0 if name is None else u[grid.node_of[name], RX, k] for k, name in enumerate(names)])
        if shift.any():
            u = u.copy() if u is solved.solution.u else u
            u[grid.shafts[shaft].nodes, RX] -= shift
    return u
