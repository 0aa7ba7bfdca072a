"""A shaft in numbers: its segments as arrays, as drawn and as they work."""

from dataclasses import dataclass, field
from functools import cached_property
from typing import Any, NamedTuple

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]
Ints = NDArray[np.intp]


class Outline(NamedTuple):
    """Diameters and bores at both ends of every segment, (n_segments,) each [m]."""

    diameter_left: Array
    diameter_right: Array
    bore_left: Array
    bore_right: Array

    @property
    def tapered(self) -> bool:
        """Whether any segment is a cone."""
        return not (
            np.array_equal(self.diameter_left, self.diameter_right) and np.array_equal(self.bore_left, self.bore_right)
        )


@dataclass(frozen=True)
class SegmentArrays:
    """A shaft in numbers, one row for each segment from left to right; SI.

    Parameters
    ----------
    length, diameter_left, diameter_right, bore_left, bore_right : (n_segments,) [m]
    youngs_modulus, shear_modulus : (n_segments,) [Pa]
    poisson_ratio : (n_segments,)
    density : (n_segments,) [kg/m^3]
        0 where the material states none (allowed without gravity only).
    shear_coefficient : (n_segments,)
        NaN: by Cowper from section and Poisson's ratio; inf: no shear deformation.
    fillet_left, fillet_right : (n_segments,) [m]
        Fillets at the segments' ends; one counts where its segment is the thinner one.
    ends : (n_segments + 1,) [m]
        Where segments end, from the left end on: the first 0.
    drawn : Outline, optional
        The outline as drawn, where hubs, keyways or splines make the shaft work by another one.
    number : (n_segments,), optional
        Number of each on the drawing, counted from 0, where hubs cut segments.
    memo : what follows from the geometry alone and is kept for all models that share it
    """

    length: Array
    diameter_left: Array
    diameter_right: Array
    bore_left: Array
    bore_right: Array
    youngs_modulus: Array
    shear_modulus: Array
    poisson_ratio: Array
    density: Array
    shear_coefficient: Array
    fillet_left: Array
    fillet_right: Array
    ends: Array
    drawn: Outline | None = None
    number: Ints | None = None
    memo: dict[str, Any] = field(default_factory=dict, compare=False, repr=False)

    @cached_property
    def uniform(self) -> bool:
        """Whether all segments are of one material and one way of shear."""
        columns = (self.youngs_modulus, self.shear_modulus, self.poisson_ratio, self.density, self.shear_coefficient)
        return all(
            np.array_equal(column, np.broadcast_to(column[:1], column.shape), equal_nan=True) for column in columns
        )

    @cached_property
    def tapered(self) -> bool:
        """Whether any segment is a cone, outside or inside, as drawn or as it works."""
        own = Outline(self.diameter_left, self.diameter_right, self.bore_left, self.bore_right)
        return own.tapered or (self.drawn is not None and self.drawn.tapered)

    @property
    def outline(self) -> Outline:
        """As drawn."""
        return self.drawn or Outline(self.diameter_left, self.diameter_right, self.bore_left, self.bore_right)


def running_sums(values: Array) -> Array:
    """Sums of the first 0, 1, ... n values, (n + 1,), each with its rounding errors added back.

    Plain running sums of 4,000 lengths drift by 1e-13 of the whole and those of 1,000,000 by 2e-11, which moves
    supports against shoulders ("Sum2" of Ogita, Rump and Oishi, 2005, SIAM J. Sci. Comput. 26).
    """
    sums = np.concatenate([[0.0], np.cumsum(values)])
    before, after = sums[:-1], sums[1:]
    added = after - before
    missed = (before - (after - added)) + (values - added)
    sums[1:] += np.cumsum(missed)
    return sums
