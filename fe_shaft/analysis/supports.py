"""Supports to springs and constraints: what pins, bearings and seats are between nodes.

A bearing is a 6 x 6 spring at its load centre, between the shaft's node and its outer ring. The outer ring is the
ground, or a node of its own where the seat gives. A pin is a constraint at its load centre. Bores out of line move the
ground side.
"""

from __future__ import annotations

from collections.abc import Mapping
from typing import TYPE_CHECKING, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.assembly import Constraint, Springs
from fe_shaft.fem.dofs import NDOF

if TYPE_CHECKING:
    from fe_shaft.analysis.discretise import Grid
    from fe_shaft.model.support_table import SupportTable

Array = NDArray[np.float64]
Bools = NDArray[np.bool_]


#: A scaled eigenvalue below this is none: rounding is 1e-16, the softest real seat is 1e-10 of the stiffest bearing.
IDLE = 1e-12


class SupportPlan(NamedTuple):
    """Supports as springs and constraints between nodes.

    Attributes
    ----------
    n_nodes : nodes of the grid and one for each outer ring that a seat lets move; also the number of the ground
    springs : of the bearings, then of the seats
    bearing : (n_bearings,), number of the support of each bearing spring
    outer : node of the outer ring, by number of the support
    constraints : pins, and the rigid directions of seats
    holding : (n, 6), what each support holds in this plan
    """

    n_nodes: int
    springs: Springs
    bearing: NDArray[np.intp]
    outer: Mapping[int, int]
    constraints: tuple[Constraint, ...]
    holding: Bools


def plan_supports(table: SupportTable, grid: Grid, sense: Mapping[str, int]) -> SupportPlan:
    """Turn the supports into springs and constraints.

    Parameters
    ----------
    sense : of the axial load on each shaft (-1 to the left, +1 to the right, 0 none); it decides which one-way stops
        act
    """
    holding = table.holding(sense)
    bearing = table.bearings
    node = np.array([grid.node_of[name] for name in table.names], dtype=np.intp)
    outer = {k: len(grid.x) + i for i, k in enumerate(table.seats)}
    ground = len(grid.x) + len(outer)
    constraints = [
        Constraint(int(node[k]), float(table.centre[k]), holding[k], table.gap[k])
        for k in (np.flatnonzero(table.pin) if table.pins else ())
    ]
    constraints += [Constraint(outer[k], 0.0, rigid, table.gap[k]) for k, (_, rigid) in table.seats.items()]
    springs = _springs(table, bearing, node, outer, ground, holding)
    return SupportPlan(ground, springs, bearing, outer, tuple(constraints), holding)


def _springs(
    table: SupportTable,
    bearing: NDArray[np.intp],
    node: NDArray[np.intp],
    outer: Mapping[int, int],
    ground: int,
    holding: Bools,
) -> Springs:
    laws, far = table.laws(holding), np.full(len(table.names), ground)
    if not outer and not table.pins:
        return Springs(node, far, table.links, table.everywhere, laws, table.gap)
    on_seat = list(outer)
    far[on_seat] = list(outer.values())
    gap = table.gap.copy()
    gap[on_seat] = 0.0
    n = len(bearing) + len(on_seat)
    unit = np.tile(np.eye(NDOF), (n, 1, 1))
    return Springs(
        node_a=np.concatenate([node[bearing], far[on_seat]]),
        node_b=np.concatenate([far[bearing], np.full(len(on_seat), ground)]),
        b_a=np.concatenate([table.links[bearing], unit[: len(on_seat)]]),
        b_b=unit,
        stiffness=np.concatenate([laws[bearing], *(_seat_law(laws[k], *table.seats[k])[None] for k in on_seat)]),
        gap=np.concatenate([gap[bearing], table.gap[on_seat]]),
    )


def _seat_law(bearing: Array, seat: Array, rigid: Bools) -> Array:
    """Stiffness of a seat, made definite where neither seat nor bearing resists the outer ring.

    Nothing pulls at the ring there, so what is added carries no force; it only keeps the ring in its place.
    """
    if seat.diagonal()[~rigid].all() and np.count_nonzero(seat) == np.count_nonzero(seat.diagonal()):
        return seat
    both = (bearing + seat)[np.ix_(~rigid, ~rigid)]
    size = np.sqrt(np.where(both.diagonal() > 0, both.diagonal(), 1.0))
    values, vectors = np.linalg.eigh(both / np.outer(size, size))
    loose = vectors[:, values < IDLE] * size[:, None]
    out = seat.copy()
    out[np.ix_(~rigid, ~rigid)] += loose @ loose.T
    return out
