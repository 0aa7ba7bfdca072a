"""The proof of a solution: checked against statics and energy, refused when it fails.

Equilibrium is checked on the loads as the model states them (forces at their own points, weights by the formula of a
truncated cone), not on the condensed system; energy on the stored forces of every part.
"""

from __future__ import annotations

from functools import partial
from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.reactions import Reactions
from fe_shaft.analysis.solution import Solved
from fe_shaft.errors import SolutionError
from fe_shaft.fem.spread import loaded_energy
from fe_shaft.results.proof import REFUSED_ABOVE, Proof

Array = NDArray[np.float64]
TINY = np.finfo(float).tiny
#: Of the force with which the shafts would resist their offsets: far below any force that an offset makes, far above
#: the rounding of that resistance (1e-16).
ROUNDING_FLOOR = 1e-4


def prove(solved: Solved, carried: Reactions) -> Proof:
    """Check a solution.

    Raises
    ------
    SolutionError
        When equilibrium or energy miss by more than `REFUSED_ABOVE`.
    """
    balance = [_equilibrium(solved, carried, shaft) for shaft in solved.grid.shafts]
    forces, moments = balance[0] if len(balance) == 1 else np.max(balance, axis=0)
    energies = _energies(solved)
    find = partial(_details, solved, energies.of_spans)
    proof = Proof(forces, moments, solved.solution.residual, energies.imbalance(solved.solution.resistance[1]), find)
    if not proof.worst <= REFUSED_ABOVE:
        raise SolutionError(
            f"no trustworthy solution: {proof.sentence()}. Look for stiffnesses or diameters that differ by many "
            "powers of ten; the numbers are withheld."
        )
    return proof


def _equilibrium(solved: Solved, carried: Reactions, shaft: str) -> Array:
    """Relative imbalance of forces and of moments about the left end of a shaft, (2, n_cases)."""
    statics, table = solved.model.statics[shaft], solved.table
    wrench, place = carried.wrench, table.load_place
    if len(solved.grid.shafts) > 1:
        on = table.on_shaft.get(shaft, np.empty(0, dtype=np.intp))
        wrench, place = wrench[on], place[on]
    total = statics.resultant + wrench.sum(axis=0)
    total[4] -= place @ wrench[:, 2]
    total[5] += place @ wrench[:, 1]
    for balance in solved.balances:
        if balance.shaft == shaft:
            total[3] += balance.torque
    size = statics.size + np.abs(wrench[:, :3]).sum(axis=(0, 1)) + TINY
    if solved.table.gaps:  # an offset that meets no resistance leaves nothing but rounding to compare with
        size = np.maximum(size, ROUNDING_FLOOR * solved.solution.resistance[0])
    imbalance: Array = np.abs(total).reshape(2, 3, -1).max(axis=1) / size
    imbalance[1] /= statics.arm
    return imbalance


class _Energies(NamedTuple):
    """Twice the energies and twice the work of all loads and offsets, (n_cases,) each.

    Twice the work of the loads is F u + R g, plus what the section forces do on the deformations that spread loads
    would make by themselves; `of_spans` is the energy of each span where there are such loads.
    """

    spans: Array
    springs: Array
    work: Array
    of_spans: Array | None

    def imbalance(self, least: float) -> Array:
        """Energy against work, relative to them; both below `least` are measured by it."""
        stored = self.spans + self.springs
        return np.asarray(np.abs(stored - self.work) / np.maximum(stored + np.abs(self.work), least + TINY))


def _energies(solved: Solved) -> _Energies:
    solution, loads, springs = solved.solution, solved.loads, solved.plan.springs
    s = solution.span_force
    spans = _products(s, s * solved.spans.flexibility[:, :, None])
    in_springs = _products(solution.spring_deformation, solution.spring_force)
    work = _products(loads.nodal, solution.u[: len(loads.nodal)])
    of_spans = None
    if loads.deformation is not None:
        of_spans, mixed = loaded_energy(solved.grid.pieces, solved.spans.centre, s, loads.spread)
        spans, work = of_spans.sum(axis=0), work + mixed.sum(axis=0)
    if solved.table.gaps:
        work = work + (solution.unbalanced * solved.offset).sum(axis=(0, 1))
        work = work - (solution.spring_force * springs.gap[:, :, None]).sum(axis=(0, 1))
    return _Energies(spans, in_springs, work, of_spans)


def _products(force: Array, movement: Array) -> Array:
    """Sum of force times movement, (n_cases,)."""
    return np.asarray((force * movement).reshape(-1, force.shape[-1]).sum(axis=0))


def _details(solved: Solved, of_spans: Array | None) -> tuple[Array, dict[str, Array]]:
    """Digits lost, and the energy stored by part [J]."""
    solution = solved.solution
    s = solution.span_force
    per_span = (s * s * solved.spans.flexibility[:, :, None]).sum(axis=1) if of_spans is None else of_spans
    per_spring = (solution.spring_deformation * solution.spring_force).sum(axis=1)
    stored = {name: per_span[own.spans].sum(axis=0) / 2 for name, own in solved.grid.shafts.items()}
    names = solved.table.names
    for k, number in enumerate(solved.plan.bearing):
        stored[names[number]] = per_spring[k] / 2
    if solved.rolled is not None:
        energies = solved.rolled.response.energy.T
        stored |= {names[n]: energy for n, energy in zip(solved.rolled.bearings.numbers, energies, strict=True)}
    for k, number in enumerate(solved.table.seats, start=len(solved.plan.bearing)):
        stored[f"{names[number]}.seat"] = per_spring[k] / 2
    return solution.digits_lost, stored
