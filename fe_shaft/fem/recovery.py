"""From the stored forces of the spans to every station: running sums along the pieces."""

from __future__ import annotations

from collections.abc import Sequence
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.pieces import Pieces, stretch, sums_before
from fe_shaft.fem.span import Flexibility
from fe_shaft.fem.spread import TURN_SIGNS, Gathered, by_component, load_forces, load_steps, own_forces

Array = NDArray[np.float64]


class Recovery:
    """Displacements and section forces at both ends of every piece, worked out when asked for.

    Parameters
    ----------
    u_node, s : (n_spans, 6, n_cases)
        Displacements of the spans' left nodes, stored forces of the spans.
    loads : pairs of a unit load and its wrench density (n_spans, 6, n_cases or 1)
    """

    def __init__(
        self,
        pieces: Pieces,
        give: Flexibility,
        centre: Array,
        u_node: Array,
        s: Array,
        loads: Sequence[tuple[Gathered, Array]] = (),
    ) -> None:
        self.pieces, self._give, self._loads = pieces, give, loads
        self._u_node = u_node.transpose(1, 2, 0)
        self._s = by_component(s, pieces)
        self._offset = stretch(centre, pieces) - pieces.left

    @cached_property
    def _densities(self) -> list[tuple[Gathered, Array]]:
        return [(load, by_component(density, self.pieces)) for load, density in self._loads]

    @cached_property
    def force_left(self) -> Array:
        """Section forces just right of each piece's left end, (6, n_cases, m)."""
        force = own_forces(self._s, self._offset)
        for load, density in self._densities:
            force = force + load_forces(load.mu_left, load.nu_left, density)
        return force

    @cached_property
    def force_right(self) -> Array:
        """Section forces just left of each piece's right end, (6, n_cases, m)."""
        force = own_forces(self._s, self._offset - self.pieces.length)
        for load, density in self._densities:
            force = force + load_forces(load.mu_right, load.nu_right, density)
        return force

    @cached_property
    def u_left(self) -> Array:
        """Displacements at each piece's left end, (6, n_cases, m)."""
        steps, length = self._steps, self.pieces.length
        left = np.empty_like(steps)
        self._sum(slice(3, 6), left)
        steps[1] += left[5] * length
        steps[2] -= left[4] * length
        self._sum(slice(3), left)
        return left

    @cached_property
    def u_right(self) -> Array:
        """Displacements at each piece's right end, (6, n_cases, m)."""
        return self.u_left + self._steps

    def _sum(self, own: slice, left: Array) -> None:
        """Put the running sums of some displacements from the spans' left nodes into `left`."""
        sums = sums_before(self._steps[own], self.pieces, left[own])
        sums += stretch(self._u_node[own] - sums.take(self.pieces.starts, axis=-1), self.pieces)

    @cached_property
    def _steps(self) -> Array:
        """What each piece adds to the displacements; `u_left` adds what comes from the slope at its left end.

        Both planes go together: shear (V_y, V_z) with moment (M_z, -M_y), so that M' = -V in each; the moment is that
        at the piece's own elastic centre, where it only turns the right end and shear only shifts it.
        """
        give, s = self._give, self._s
        shear = s[1:3]
        moment = s[:3:-1] * TURN_SIGNS + shear * (self._offset - give.centre)
        steps = np.empty_like(s)
        across, turn = steps[1:3], steps[:3:-1]
        np.multiply(give.axial, s[0], out=steps[0])
        np.multiply(give.torsion, s[3], out=steps[3])
        np.multiply(give.bending, moment, out=turn)
        np.multiply(self.pieces.length - give.centre, turn, out=across)
        across += (give.own + give.shear) * shear
        for load, density in self._densities:
            more = load_steps(self.pieces.points, self.pieces.length, load, density)
            for own, each in zip((steps[0], across, steps[3], turn), more, strict=True):
                own += each
        np.negative(steps[4], out=steps[4])
        return steps
