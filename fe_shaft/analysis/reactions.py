"""What the supports carry, all at once, and who moved against whom."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.solution import Solved
from fe_shaft.fem.dofs import NDOF, RX, RY, RZ, UY, UZ

Array = NDArray[np.float64]


class Reactions(NamedTuple):
    """Of all supports in the model's order, (n, 6, n_cases) each.

    Attributes
    ----------
    wrench : ON the shaft, at the load centre [N, N m]
    """

    solved: Solved
    wrench: Array

    def seat(self, k: int) -> Array:
        """Outer ring of support k at its load centre (a pin: its bore), (6, n_cases) [m, rad]."""
        if k in self.solved.plan.outer:
            return np.asarray(self.solved.solution.u[self.solved.plan.outer[k]])
        return np.broadcast_to(self.solved.table.gap[k][:, None], self.wrench[k].shape)

    def relative(self, k: int) -> Array:
        """Inner ring of support k against its outer ring, at the load centre, (6, n_cases) [m, rad]."""
        table = self.solved.table
        own = self.solved.solution.u[self.solved.grid.node_of[table.names[k]]]
        return np.asarray(table.links[k] @ own - self.seat(k))


def reactions(solved: Solved) -> Reactions:
    """Read the forces of all supports from the solution."""
    table, plan, solution = solved.table, solved.plan, solved.solution
    wrench = np.zeros((len(table.names), NDOF, solution.u.shape[2]))
    wrench[plan.bearing] = -solution.spring_force[: len(plan.bearing)]
    if table.pins:
        _pin_wrenches(solved, [solved.grid.node_of[name] for name in table.names], wrench)
    return Reactions(solved, wrench)


def _pin_wrenches(solved: Solved, nodes: list[int], wrench: Array) -> None:
    """Reactions of pins: what is unbalanced at their nodes, in the directions they hold."""
    table, holding = solved.table, solved.plan.holding.copy()
    spinning = np.array([shaft in solved.spinning for shaft in table.shafts], dtype=bool)
    holding[spinning, RX] = False
    together: dict[int, list[int]] = {}
    for k in np.flatnonzero(table.pin):
        together.setdefault(nodes[k], []).append(int(k))
    for node, pins in together.items():
        at_node = solved.solution.unbalanced[node]
        if len(pins) == 1:
            wrench[pins[0]] = _at_centre(at_node, table.centre[pins[0]]) * holding[pins[0]][:, None]
            continue
        rows = np.concatenate([table.links[k][holding[k]] for k in pins])
        share = np.linalg.lstsq(rows.T, at_node, rcond=None)[0]
        for pin in pins:
            count = int(holding[pin].sum())
            wrench[pin][holding[pin]], share = share[:count], share[count:]


def _at_centre(wrench: Array, centre: float) -> Array:
    """The wrench at a node, seen from a load centre to its right."""
    moved = wrench.copy()
    moved[RY] += centre * wrench[UZ]
    moved[RZ] -= centre * wrench[UY]
    return moved
