"""Cross-sections: solid and hollow rounds, their stiffness and their shear coefficient."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]


def area(diameter: Array, bore: Array) -> Array:
    """Area of a round [m^2]; written as a product so that thin walls lose no digits."""
    return np.pi / 4 * (diameter - bore) * (diameter + bore)


def cowper(diameter: Array, bore: Array, poisson: Array) -> Array:
    """Shear coefficient of a round, solid or hollow.

    Cowper (1966), The shear coefficient in Timoshenko's beam theory, J. Appl. Mech. 33, Table 1:
    kappa = 6 (1 + nu) (1 + m^2)^2 / ((7 + 6 nu) (1 + m^2)^2 + (20 + 12 nu) m^2) with m = bore / diameter;
    for m = 0 it is 6 (1 + nu) / (7 + 6 nu).
    """
    m2 = (bore / diameter) ** 2
    p2 = (1 + m2) ** 2
    return 6 * (1 + poisson) * p2 / ((7 + 6 * poisson) * p2 + (20 + 12 * poisson) * m2)


def cowper_solid(poisson: Array) -> Array:
    """The same for a solid round."""
    return 6 * (1 + poisson) / (7 + 6 * poisson)
