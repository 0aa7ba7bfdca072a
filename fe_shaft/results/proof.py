"""The proof that every result carries: equilibrium, energy, residual, digits."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

#: A result is refused when it misses equilibrium or energy balance by more than this share.
REFUSED_ABOVE = 1e-8


@dataclass(frozen=True)
class Proof:
    """What was checked after the solution, all relative, worst over the shafts, one number a case.

    Attributes
    ----------
    forces, moments : (n_cases,)
        Sum of loads, weights and reactions over the sum of their sizes; moments over forces times shaft length.
    nodes : (n_cases,)
        Largest force left over at a node.
    energy : (n_cases,)
        Work of the loads against the energy stored, over the energy.
    find : works out `digits_lost` and `stored` when they are asked for
    """

    forces: Array
    moments: Array
    nodes: Array
    energy: Array
    find: Callable[[], tuple[Array, Mapping[str, Array]]] = field(repr=False)

    @cached_property
    def _found(self) -> tuple[Array, Mapping[str, Array]]:
        return self.find()

    @property
    def digits_lost(self) -> Array:
        """Decimal digits that the residual steps had to win back, (n_cases,)."""
        return self._found[0]

    @property
    def stored(self) -> Mapping[str, Array]:
        """Energy stored by part, (n_cases,) each [J]."""
        return self._found[1]

    @property
    def worst(self) -> float:
        """The largest of all relative errors."""
        return float(np.concatenate([self.forces, self.moments, self.nodes, self.energy]).max(initial=0.0))

    def sentence(self) -> str:
        """One line for the terminal."""
        forces, moments, energy = (float(np.max(a, initial=0.0)) for a in (self.forces, self.moments, self.energy))
        lost = float(np.max(self.digits_lost, initial=0.0))
        digits = "no digits lost to speak of" if lost < 3.5 else f"{lost:.0f} digits lost and won back"
        told = ", ".join(
            f"{name} {error:.0e}" if error else f"{name} 0"
            for name, error in (("forces", forces), ("moments", moments), ("energy", energy))
        )
        return f"{told} | {digits}" if np.isfinite(lost) else told
