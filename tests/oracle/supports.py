"""What holds the chain at a node: rigid ties, springs, and springs on an elastic seat."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from tests.oracle.digits import ONE, ZERO, Matrix, Number, Vector, number, numbers, product, times, transposed, zeros
from tests.oracle.element import transfer

NOTHING: tuple[Number, ...] = (0,) * 6


@dataclass(frozen=True)
class Support:
    """What holds the shaft at one node; several may share a node.

    Parameters
    ----------
    node
        Its node; node k lies left of element k.
    dx
        The point where it acts, along the axis from the node (load centre) [m].
    rigid
        Components 0..5 in which the point is tied to the seat (or to the ground without a seat).
    spring
        6 x 6 stiffness between the point and the seat (or the ground) [N/m, N, N m/rad].
    seat
        6 x 6 stiffness between the seat and the ground; None: the seat is the ground.
    seat_rigid
        Components in which the seat cannot move.
    offset
        Movement of the ground, given at the point [m, rad].
    """

    node: int
    dx: Number = 0
    rigid: tuple[int, ...] = ()
    spring: Sequence[Sequence[Number]] | None = None
    seat: Sequence[Sequence[Number]] | None = None
    seat_rigid: tuple[int, ...] = ()
    offset: Sequence[Number] = NOTHING


def diagonal(*stiffness: Number) -> list[list[Number]]:
    """Give the 6 x 6 matrix of six uncoupled springs."""
    return [[stiffness[i] if i == j else 0 for j in range(6)] for i in range(6)]


class Hold:
    """A support as rows and columns beside its node's six movements.

    Own unknowns: movements of the seat against the ground, then forces of the rigid ties.
    From the stationary energy 1/2 e'Ke + 1/2 m'Sm + f'e_rigid with e = T u - offset - m.
    """

    def __init__(self, support: Support) -> None:
        """Read a support's numbers."""
        self.node = support.node
        self.shift = transfer(number(support.dx))
        self.offset = numbers(support.offset)
        self.spring = zeros(6, 6) if support.spring is None else [numbers(row) for row in support.spring]
        self.seat = zeros(6, 6) if support.seat is None else [numbers(row) for row in support.seat]
        self.rigid = support.rigid
        self.moving = []
        if support.seat is not None:
            stiff = [i for i in range(6) if i in support.rigid or any(self.spring[i]) or any(self.seat[i])]
            self.moving = [i for i in stiff if i not in support.seat_rigid]
        self.size = len(self.moving) + len(self.rigid)

    def block(self) -> tuple[Matrix, Matrix, Matrix, Vector, Vector]:
        """Give what is added: to the node's 6 x 6, own columns, own square, node's and own right side."""
        back = transposed(self.shift)
        pull = product(back, self.spring)
        corner = product(pull, self.shift)
        columns = [[-row[i] for i in self.moving] + [row[i] for i in self.rigid] for row in pull]
        for r in range(6):
            columns[r][len(self.moving) :] = [back[r][i] for i in self.rigid]
        own = zeros(self.size, self.size)
        for a, i in enumerate(self.moving):
            for b, j in enumerate(self.moving):
                own[a][b] = self.spring[i][j] + self.seat[i][j]
            for b, j in enumerate(self.rigid, len(self.moving)):
                own[a][b] = own[b][a] = -ONE if i == j else ZERO
        sprung = times(self.spring, self.offset)
        right = [-sprung[i] for i in self.moving] + [self.offset[i] for i in self.rigid]
        return corner, columns, own, times(pull, self.offset), right

    def outcome(self, u: Vector, own: Vector) -> tuple[Vector, Vector]:
        """Give the force on the shaft at the point, and the seat's movement."""
        seat = list(self.offset)
        for i, movement in zip(self.moving, own, strict=False):
            seat[i] += movement
        stretch = [a - b for a, b in zip(times(self.shift, u), seat, strict=True)]
        force = [-value for value in times(self.spring, stretch)]
        for i, tie in zip(self.rigid, own[len(self.moving) :], strict=True):
            force[i] -= tie
        return force, seat
