"""What the shaft can be coloured by, and how far its movement is exaggerated. True values, never exaggerated ones."""

from __future__ import annotations

from dataclasses import dataclass
from math import ceil, floor, log10

import numpy as np
from numpy.typing import NDArray

from fe_shaft.results.shown import Shown as Units
from fe_shaft.units import unit_factor

Floats = NDArray[np.float64]

LARGEST_MOVEMENT = 1 / 15  # of the shaft's length, as first drawn
FACTORS = (1.0, 5000.0)  # ends of the slider


@dataclass(frozen=True)
class Colouring:
    """One quantity along the line.

    Parameters
    ----------
    name, unit, dimension : str, the first two as shown beside the colours, unless the model asks for other units
    of_movement : bool
        Whether it is taken from ux uy uz rx ry rz; else from N Vy Vz Mx My Mz.
    components : component of those six, or the two whose resultant is meant
    part : quantity of a part that labels show with it; forces along the line have none, labels then show deflection
    """

    name: str
    unit: str
    dimension: str
    of_movement: bool
    components: tuple[int, ...]
    part: str = "deflection"

    def unit_in(self, units: Units) -> str:
        """Unit of the values in a model's units."""
        unit: str = getattr(units, self.dimension)
        return unit

    def values(self, u: Floats, force: Floats, units: Units | None = None) -> Floats:
        """Values in a model's units, (...), from (..., 6) movements [m, rad] and section forces [N, N m]."""
        six = u if self.of_movement else force
        taken = six[..., list(self.components)]
        si = np.hypot(taken[..., 0], taken[..., 1]) if len(self.components) == 2 else taken[..., 0]
        return np.asarray(si / unit_factor(self.dimension, self.unit if units is None else self.unit_in(units)))


COLOURINGS = {
    colouring.name: colouring
    for colouring in (
        Colouring("deflection", "um", "length", True, (1, 2)),
        Colouring("slope", "mrad", "angle", True, (4, 5), "slope"),
        Colouring("axial movement", "um", "length", True, (0,), "axial"),
        Colouring("twist", "mrad", "angle", True, (3,), "twist"),
        Colouring("bending moment", "N m", "moment", False, (4, 5)),
        Colouring("shear force", "N", "force", False, (1, 2)),
        Colouring("torque", "N m", "moment", False, (3,)),
        Colouring("axial force", "N", "force", False, (0,)),
    )
}


def common_range(values: list[Floats]) -> tuple[float, float]:
    """One range for the colours of every half; a single value gets a little room around it."""
    low = min(float(each.min()) for each in values)
    high = max(float(each.max()) for each in values)
    low = min(low, 0.0) if low > 0.0 or high <= 0.0 else low
    high = max(high, 0.0)
    if high - low <= 1e-12 * max(abs(high), abs(low)):
        return low, low + 1.0
    return low, high


def first_factor(movement: float, length: float) -> float:
    """Exaggeration that draws the largest movement about a fifteenth of the length long: 1, 2 or 5 times 1, 10, ...

    Parameters
    ----------
    movement : float [m]
        Largest movement of the axis.
    length : float [m]
        Of the longest shaft.
    """
    if movement <= 0.0:
        return FACTORS[0]
    return float(np.clip(nearest_125(LARGEST_MOVEMENT * length / movement), *FACTORS))


def nearest_125(value: float) -> float:
    """Nearest of 1, 2, 5, 10, 20, ... on a logarithmic scale."""
    power = floor(log10(value))
    steps = [m * 10.0**p for p in (power - 1, power, power + 1) for m in (1, 2, 5)]
    return min(steps, key=lambda step: abs(log10(step / value)))


def longest_125(value: float) -> float:
    """Largest of 1, 2, 5, 10, 20, ... that is not above a value."""
    power = ceil(log10(value)) - 1
    return max(m * 10.0**p for p in (power, power + 1) for m in (1, 2, 5) if m * 10.0**p <= value * (1 + 1e-12))


def factor_text(factor: float) -> str:
    """A factor with three digits, without exponent: ``800``, ``12.5``."""
    return f"{factor:.3g}" if factor < 100 else f"{round(factor, 2 - floor(log10(factor))):.0f}"


def round_values(low: float, high: float, most: int = 6) -> list[float]:
    """Round numbers inside a range, at most so many."""
    width = high - low
    power = 10.0 ** np.floor(np.log10(width / most))
    step = next(m * power for m in (1.0, 2.0, 2.5, 5.0, 10.0, 20.0) if width / (m * power) <= most - 1)
    first = int(np.ceil(low / step - 1e-9))
    last = int(np.floor(high / step + 1e-9))
    return [float(f"{k * step:.12g}") for k in range(first, last + 1)]
