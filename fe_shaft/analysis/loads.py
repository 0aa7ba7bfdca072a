"""Actions to nodal wrenches and distributed loads, and the statics that are known before any solution."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.discretise import load_edges
from fe_shaft.analysis.load_words import spin_sentence
from fe_shaft.errors import LoadError
from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.frames import move_wrench
from fe_shaft.fem.span import Spans
from fe_shaft.fem.spread import Gathered, end_loads, gather_mass, gather_uniform, load_deformation
from fe_shaft.model.actions import case_names, gravity_in_shaft

if TYPE_CHECKING:
    from fe_shaft.analysis.discretise import Grid
    from fe_shaft.model.actions import Action
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]

#: Torques that cancel to this share of what turns the shaft are balanced: rounding of a handful of products.
BALANCED = 1e-9


class Loads(NamedTuple):
    """What acts on the grid.

    Attributes
    ----------
    nodal : (n_nodes, 6, n_cases) [N, N m]
        Point loads, and what spread loads and weights hand to the nodes of their spans.
    spread : pairs of a unit load and its density (n_spans, 6, n_cases or 1)
        Spread loads [N/m, N m/m]; the shafts' own mass, with gravity for its density [m/s^2].
    density : (n_spans, 6, n_cases) or None
        Of the spread loads alone.
    deformation : (n_spans, 6, n_cases) or None
        Of the spans under all of these.
    """

    nodal: Array
    spread: tuple[tuple[Gathered, Array], ...]
    density: Array | None
    deformation: Array | None


def apply_loads(model: Model, grid: Grid, spans: Spans, actions: Sequence[Action]) -> Loads:
    """Put all actions and the shafts' own weight on the grid."""
    n_cases = len(case_names(model))
    nodal = np.zeros((len(grid.x), NDOF, n_cases))
    families: list[tuple[Gathered, Array]] = []
    density = _spread(grid, actions, nodal)
    if density is not None:
        families.append((gather_uniform(grid.pieces), density))
    if model.gravity_vector.any():
        families.append((gather_mass(grid.pieces), _gravity(model, grid)))
    if not families:
        return Loads(nodal, (), density, None)
    deformation = np.zeros((len(grid.left), NDOF, n_cases))
    for load, of_spans in families:
        at_left, at_right = end_loads(load, grid.pieces)
        nodal[grid.left] += at_left @ of_spans
        nodal[grid.right] += at_right @ of_spans
        deformation += load_deformation(grid.pieces, spans, load) @ of_spans
    return Loads(nodal, tuple(families), density, deformation)


def _spread(grid: Grid, actions: Sequence[Action], nodal: Array) -> Array | None:
    """Point loads go to their nodes; spread ones become densities of the spans under them."""
    density = None
    for action in actions:
        if action.spread <= 0:
            nodal[grid.node_of[action.part]] += action.wrench.T
            continue
        if density is None:
            density = np.zeros((len(grid.left), NDOF, nodal.shape[2]))
        own = grid.shafts[action.shaft]
        first, last = load_edges(action, float(grid.x[own.nodes][-1]))
        middle = (grid.x[grid.left[own.spans]] + grid.x[grid.right[own.spans]]) / 2
        under = own.spans.start + np.flatnonzero((middle > first) & (middle < last))
        about_middle = move_wrench(action.wrench, (action.x - (first + last) / 2, 0.0, 0.0))
        density[under] += about_middle.T / (last - first)
    return density


def _gravity(model: Model, grid: Grid) -> Array:
    density = np.zeros((len(grid.left), NDOF, 1))
    for name, own in grid.shafts.items():
        density[own.spans, :3, 0] = gravity_in_shaft(model, name)
    return density


class Balance(NamedTuple):
    """Torques (n_cases,) [N m] that the tool takes out at a part so that a shaft that can spin stays where it is."""

    shaft: str
    part: str
    torque: Array


def balance_torque(model: Model, spinning: set[str]) -> list[Balance]:
    """Find the torque that is left over on each shaft that can spin, and the part that takes it out.

    Raises
    ------
    LoadError
        Where nothing takes it out.
    """
    out: list[Balance] = []
    sentences = []
    for shaft in (each.name for each in model.shafts if each.name in spinning):
        statics = model.statics[shaft]
        left_over, takers = statics.resultant[3], _takers(model, shaft)
        stuck: dict[int, float] = {}
        taken: dict[str, Array] = {}
        for k in np.flatnonzero(np.abs(left_over) > BALANCED * statics.turning).tolist():
            part = takers[k]
            if part is None:
                stuck[k] = float(left_over[k])
            else:
                taken.setdefault(part, np.zeros(len(left_over)))[k] = -left_over[k]
        out += [Balance(shaft, part, torque) for part, torque in taken.items()]
        if stuck:
            sentences.append(spin_sentence(model, shaft, stuck))
    if sentences:
        raise LoadError("\n".join(sentences))
    return out


def _takers(model: Model, shaft: str) -> list[str | None]:
    """The part of a shaft at which torque leaves, by case: the tool balances there and counts twist from there."""
    places = model.places
    return [next((name for name in case.leaves_shares if places[name].shaft == shaft), None) for case in model.cases]


def twist_reference(model: Model, grid: Grid, shaft: str) -> tuple[int, list[str | None]]:
    """Node at which the spin of a free shaft is held, and the part from which twist is counted in each case."""
    names = _takers(model, shaft)
    held = next((n for n in names if n is not None), None)
    return (grid.shafts[shaft].nodes.start if held is None else grid.node_of[held]), names
