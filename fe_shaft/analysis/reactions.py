"""What the supports carry, all at once, and who moved against whom."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.solution import Solved
from fe_shaft.fem.dofs import NDOF, RX
from fe_shaft.fem.frames import move_wrench

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
        for group, cases in solved.plans:
            wrench[..., cases] += _pin_wrenches(solved, group.holding, solution.unbalanced[..., cases])
    return Reactions(solved, wrench)


def _pin_wrenches(solved: Solved, holding: NDArray[np.bool_], unbalanced: Array) -> Array:
    """Reactions of pins, (n, 6, k): what is unbalanced at their nodes, in the directions they hold; 0 for bearings."""
    table = solved.table
    held = holding.copy()
    held[[shaft in solved.spinning for shaft in table.shafts], RX] = False
    wrench = np.zeros((len(table.names), NDOF, unbalanced.shape[2]))
    together: dict[int, list[int]] = {}
    for k in np.flatnonzero(table.pin).tolist():
        together.setdefault(solved.grid.node_of[table.names[k]], []).append(k)
    for node, pins in together.items():
        if len(pins) == 1:
            at_centre = move_wrench(unbalanced[node].T, (-table.centre[pins[0]], 0.0, 0.0)).T
            wrench[pins[0]] = at_centre * held[pins[0]][:, None]
            continue
        rows = np.concatenate([table.links[k][held[k]] for k in pins])
        share = np.linalg.lstsq(rows.T, unbalanced[node], rcond=None)[0]
        for pin in pins:
            count = int(held[pin].sum())
            wrench[pin][held[pin]], share = share[:count], share[count:]
    return wrench
