"""Cross-sections: solid and hollow rounds, their stiffness and their shear coefficient."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]


def area(diameter: Array, bore: Array) -> Array:
    """Area of a round [m^2]; written as a product so that thin walls lose no digits."""
    return np.pi / 4 * (diameter - bore) * (diameter + bore)


def second_moment(diameter: Array, bore: Array) -> Array:
    """Second moment of area about a diameter [m^4]; the polar one is twice it."""
    return np.pi / 64 * (diameter - bore) * (diameter + bore) * (diameter**2 + bore**2)


def cowper(diameter: Array, bore: Array, poisson: Array) -> Array:
    """Shear coefficient of a round, solid or hollow.

    Cowper (1966), The shear coefficient in Timoshenko's beam theory, J. Appl. Mech. 33, Table 1:
    kappa = 6 (1 + nu) (1 + m^2)^2 / ((7 + 6 nu) (1 + m^2)^2 + (20 + 12 nu) m^2) with m = bore / diameter;
    for m = 0 it is 6 (1 + nu) / (7 + 6 nu).
    """
    m2 = (bore / diameter) ** 2
    p2 = (1 + m2) ** 2
    return 6 * (1 + poisson) * p2 / ((7 + 6 * poisson) * p2 + (20 + 12 * poisson) * m2)
