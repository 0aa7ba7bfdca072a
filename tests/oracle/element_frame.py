"""The truth for tests: a chain shaft as a three-dimensional frame, one element per piece, 40 digits.

Direct stiffness with 12 x 12 elements (inverse of the end's flexibility), eliminated node by node in
Decimal arithmetic; nothing is condensed and no bending plane is treated apart. Supports add springs,
seats and Lagrange multipliers to the block of their node.

Shaft frame: x along the shaft, right-handed; order ux uy uz rx ry rz; dv/dx = +theta_z, dw/dx = -theta_y
for a slender beam; section forces act on the face whose outward normal is +x; reactions act ON the shaft.
SI units. A float means its exact binary value.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field, replace
from decimal import Decimal, getcontext

import numpy as np
from numpy.typing import NDArray

from tests.oracle.digits import (
    ZERO,
    LooseChainError,
    Matrix,
    Number,
    Vector,
    numbers,
    product,
    solve,
    times,
    transposed,
    working,
    zeros,
)
from tests.oracle.element import Beam, Element
from tests.oracle.supports import NOTHING, Hold, Support, diagonal

__all__ = [
    "Case",
    "Chain",
    "DoubtfulError",
    "Element",
    "LooseChainError",
    "Solution",
    "Support",
    "diagonal",
    "solve_chain",
]


class DoubtfulError(ArithmeticError):
    """The solution does not balance at its nodes to the wanted digits."""


@dataclass(frozen=True)
class Case:
    """One set of loads.

    Parameters
    ----------
    nodal
        Node -> force and moment (6).
    spread
        Element -> uniform force and moment per length (6).
    gravity
        Acceleration that acts on every element with a density [m/s^2].
    """

    nodal: Mapping[int, Sequence[Number]] = field(default_factory=dict)
    spread: Mapping[int, Sequence[Number]] = field(default_factory=dict)
    gravity: Sequence[Number] = (0, 0, 0)


@dataclass(frozen=True)
class Chain:
    """A shaft: elements from left to right, supports, load cases."""

    elements: Sequence[Element]
    supports: Sequence[Support]
    cases: Sequence[Case]


@dataclass(frozen=True)
class Solution:
    """What came out, as Decimals; counted things first, the six components last.

    Parameters
    ----------
    u
        [case][node][6] movements.
    start, end
        [case][element][6] section forces at the left and the right end of each element.
    reactions
        [case][support][6] on the shaft, at the support's point.
    seats
        [case][support][6] movement of the seat (of the ground where there is none).
    imbalance
        Largest force or moment left over at a node, of the largest in the shaft (a moment is a force at its length).
    """

    u: list[Matrix]
    start: list[Matrix]
    end: list[Matrix]
    reactions: list[Matrix]
    seats: list[Matrix]
    imbalance: Decimal

    def floats(self) -> dict[str, NDArray[np.float64]]:
        """Give everything as float arrays.

        u, force_left, force_right (n_cases, n_nodes, 6); reactions, seats (n_cases, n_supports, 6).
        force_left / force_right: section forces just left / right of a node, zero beyond the ends.
        """
        left = [[[ZERO] * 6, *case] for case in self.end]
        right = [[*case, [ZERO] * 6] for case in self.start]
        named = {"u": self.u, "force_left": left, "force_right": right}
        named |= {"reactions": self.reactions, "seats": self.seats}
        return {name: np.array(values, dtype=np.float64) for name, values in named.items()}


def solve_chain(chain: Chain, digits: int = 40) -> Solution:
    """Solve a chain for all its cases to about `digits` decimal digits.

    Raises
    ------
    LooseChainError
        If the supports leave a motion free.
    DoubtfulError
        If forces at a node fail to balance to five digits fewer than wanted.
    """
    with working(digits):
        beams = [Beam(element) for element in chain.elements]
        holds: list[list[Hold]] = [[] for _ in range(len(beams) + 1)]
        supports = [Hold(support) for support in chain.supports]
        for support in supports:
            holds[support.node].append(support)
        loads = [_CaseLoads(beams, case) for case in chain.cases]
        unknowns = _eliminate(beams, holds, [case.nodes for case in loads])
        solution = _recover(beams, supports, holds, loads, unknowns)
    if solution.imbalance > Decimal(10) ** (5 - digits):
        raise DoubtfulError(f"forces at the nodes balance only to {solution.imbalance:.1e}: ask for more digits")
    return solution


class _CaseLoads:
    """The loads of one case on nodes, direct (`applied`) and from the elements."""

    def __init__(self, beams: Sequence[Beam], case: Case) -> None:
        self.applied = zeros(len(beams) + 1, 6)
        for node, wrench in case.nodal.items():
            self.applied[node] = numbers(wrench)
        gravity = numbers(case.gravity)
        self.on_beams = [beam.loaded(numbers(case.spread.get(k, NOTHING)), gravity) for k, beam in enumerate(beams)]
        self.nodes = [list(row) for row in self.applied]
        for k, (beam, (free, resultant)) in enumerate(zip(beams, self.on_beams, strict=True)):
            for node, part in zip((k, k + 1), beam.equivalent(free, resultant), strict=True):
                self.nodes[node] = [a + b for a, b in zip(self.nodes[node], part, strict=True)]


def _eliminate(beams: Sequence[Beam], holds: Sequence[Sequence[Hold]], loads: Sequence[Matrix]) -> list[list[Vector]]:
    """Solve the chain; returns [node][case] of movements followed by the supports' own unknowns."""
    stored: list[tuple[Matrix, Matrix]] = []
    carried, carried_size, carried_loads = zeros(6, 6), zeros(6, 6), zeros(6, len(loads))
    for node, held in enumerate(holds):
        beam = beams[node] if node < len(beams) else None
        parts = [carried] if beam is None else [carried, beam.k11]
        size = [carried_size] if beam is None else [carried_size, beam.k11]
        right = [[carried_loads[i][c] + case[node][i] for c, case in enumerate(loads)] for i in range(6)]
        matrix, right, scale = _bordered(_total(parts), size, right, held)
        coupling = [*(zeros(6, 6) if beam is None else beam.k12), *zeros(len(matrix) - 6, 6)]
        joint = [[*a, *b] for a, b in zip(coupling, right, strict=True)]
        answer = solve(matrix, joint, scale)
        gain, fixed = [row[:6] for row in answer], [row[6:] for row in answer]
        stored.append((gain, fixed))
        if beam is not None:
            carried = [[a - b for a, b in zip(*rows, strict=True)]
                       for rows in zip(beam.k22, product(beam.k21, gain[:6]), strict=True)]  # fmt: skip
            carried_loads = [[-value for value in row] for row in product(beam.k21, fixed[:6])]
            carried_size = beam.k22
    unknowns: list[list[Vector]] = []
    for gain, fixed in reversed(stored):
        here = transposed(fixed)
        if unknowns:
            pulls = [times(gain, after[:6]) for after in unknowns[-1]]
            here = [[a - b for a, b in zip(*pair, strict=True)] for pair in zip(here, pulls, strict=True)]
        unknowns.append(here)
    return unknowns[::-1]


def _total(parts: Sequence[Matrix]) -> Matrix:
    """Add matrices."""
    return [[sum(values, ZERO) for values in zip(*rows, strict=True)] for rows in zip(*parts, strict=True)]


def _bordered(matrix: Matrix, size: list[Matrix], right: Matrix, held: Sequence[Hold]) -> tuple[Matrix, Matrix, Vector]:
    """Add a node's supports to its block; returns matrix, right side and the size of each row's terms."""
    cases = len(right[0])
    for hold in held:
        corner, columns, own, node_right, own_right = hold.block()
        before = len(matrix)
        matrix = [[*row, *([ZERO] * hold.size)] for row in matrix] + zeros(hold.size, before + hold.size)
        size.append(corner)
        for i in range(6):
            for j in range(6):
                matrix[i][j] += corner[i][j]
            for j in range(hold.size):
                matrix[i][before + j] = matrix[before + j][i] = columns[i][j]
            right[i] = [value + node_right[i] for value in right[i]]
        for i in range(hold.size):
            matrix[before + i][before:] = own[i]
            right.append([own_right[i]] * cases)
    terms = [[row, *(part[i] for part in size)] if i < 6 else [row] for i, row in enumerate(matrix)]
    return matrix, right, [max(max(map(abs, term)) for term in row) for row in terms]


def _recover(
    beams: Sequence[Beam],
    supports: Sequence[Hold],
    holds: Sequence[Sequence[Hold]],
    loads: Sequence[_CaseLoads],
    unknowns: Sequence[Sequence[Vector]],
) -> Solution:
    """Turn the unknowns into section forces and reactions, and weigh what is left over at the nodes."""
    solution = Solution([], [], [], [], [], ZERO)
    worst, length = ZERO, sum((beam.length for beam in beams), ZERO)
    # Where nothing pulls, forces are the rounding of stiffness times movement: never a size to compare with.
    rounding = Decimal(10) ** -(getcontext().prec // 4)
    rounding *= max(abs(value) for beam in beams for row in beam.k22 for value in row)
    for c, case in enumerate(loads):
        u = [unknowns[node][c][:6] for node in range(len(holds))]
        pairs = [beam.sections(u[k], u[k + 1], *case.on_beams[k]) for k, beam in enumerate(beams)]
        outcomes = _outcomes(holds, [unknowns[node][c] for node in range(len(holds))])
        solution.u.append(u)
        solution.start.append([first for first, _ in pairs])
        solution.end.append([last for _, last in pairs])
        solution.reactions.append([outcomes[id(support)][0] for support in supports])
        solution.seats.append([outcomes[id(support)][1] for support in supports])
        noise = rounding * max(abs(value) for row in u for value in row)
        worst = max(worst, _left_over(solution, supports, case.applied, length, noise))
    return replace(solution, imbalance=worst)


def _outcomes(holds: Sequence[Sequence[Hold]], unknowns: Sequence[Vector]) -> dict[int, tuple[Vector, Vector]]:
    """Give each support's force and seat movement in one case, by the identity of the support."""
    outcomes = {}
    for held, here in zip(holds, unknowns, strict=True):
        place = 6
        for hold in held:
            outcomes[id(hold)] = hold.outcome(here[:6], here[place : place + hold.size])
            place += hold.size
    return outcomes


def _left_over(
    solution: Solution, supports: Sequence[Hold], applied: Matrix, length: Decimal, noise: Decimal
) -> Decimal:
    """Give the largest unbalanced part at a node in the last case, of the largest force or moment.

    A moment counts as a force at the shaft's length.
    """
    sums = [list(row) for row in applied]
    terms = [*applied]
    for k, (first, last) in enumerate(zip(solution.start[-1], solution.end[-1], strict=True)):
        sums[k] = [a + b for a, b in zip(sums[k], first, strict=True)]
        sums[k + 1] = [a - b for a, b in zip(sums[k + 1], last, strict=True)]
        terms += [first, last]
    for support, force in zip(supports, solution.reactions[-1], strict=True):
        at_node = times(transposed(support.shift), force)
        sums[support.node] = [a + b for a, b in zip(sums[support.node], at_node, strict=True)]
        terms.append(at_node)
    forces = max(noise, *(abs(value) for row in terms for value in row[:3]))
    moments = max(abs(value) for row in terms for value in row[3:])
    if not forces:
        return ZERO
    left = max(abs(value) for row in sums for value in row[:3])
    turned = max(abs(value) for row in sums for value in row[3:])
    return max(left / (forces + moments / length), turned / (moments + forces * length))
