"""Hertz contact of a ball and its two grooves, and of a roller and its raceway, exact and for arrays.

H. Hertz, Ueber die Beruehrung fester elastischer Koerper, J. reine angew. Math. 92 (1881) 156. With the semi-axes a
(across the rolling direction) and b = a / k, the parameter m = 1 - 1 / k^2 of the complete elliptic integrals K and E,
m1 = 1 - m, B = (E - m1 K) / m, D = (K - E) / m, the curvature sum S and E' = E / (1 - nu^2) of two bodies alike:

    curvature along over across the rolling direction = B / (m1 D)
    a = (2 k^2 E / pi)^(1/3) (3 Q / (E' S))^(1/3),   p = 1.5 Q / (pi a b)

B and D come from Carlson's integrals, which lose no digits where the ellipse is a circle. A line contact of length L:
p^2 = Q E' S / (2 pi L).
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import ArrayLike
from scipy.special import ellipe, elliprd

from fe_shaft.rolling.arrays import Array, floats
from fe_shaft.rolling.refusal import within

#: Bearing steel as ISO 76 and ISO/TS 16281 take it (from memory).
YOUNGS_MODULUS, POISSONS_RATIO = 207e9, 0.3
_STEPS = 60


class Curvature(NamedTuple):
    """Principal curvatures of a contact, bodies added: along and across the rolling direction [1/m]."""

    along: Array
    across: Array


def inner_curvature(diameter: ArrayLike, gamma: ArrayLike, conformity: ArrayLike) -> Curvature:
    """Of a ball on the inner raceway; gamma is ball diameter * cos(contact angle) / pitch diameter."""
    ball, g = floats(diameter), floats(gamma)
    return Curvature((2 + 2 * g / (1 - g)) / ball, (2 - 1 / conforming(conformity)) / ball)


def outer_curvature(diameter: ArrayLike, gamma: ArrayLike, conformity: ArrayLike) -> Curvature:
    """Of a ball in the outer raceway."""
    ball, g = floats(diameter), floats(gamma)
    return Curvature((2 - 2 * g / (1 + g)) / ball, (2 - 1 / conforming(conformity)) / ball)


def conforming(conformity: ArrayLike) -> Array:
    """Groove radius over ball diameter as an array.

    Raises
    ------
    ModelError
        Where it is 0.5 or less: the ball would not go into its groove.
    """
    return within(
        "conformity", conformity, np.nextafter(0.5, 1), np.inf, "Give groove radius over ball diameter, 0.52."
    )


def axis_ratio(curvature: Curvature) -> Array:
    """Ratio k = a / b of the contact ellipse; any shape, both curvatures positive.

    The root of ln(B / (m1 D)) = ln(along / across) in ln k by secants: the function is nearly straight, its slope lies
    between 1.5 and 2.
    """
    wanted = np.log(curvature.along / curvature.across)
    t, slope = wanted / 1.75, np.full(np.shape(wanted), 1.75)
    error = _log_ratio(t) - wanted
    for _ in range(_STEPS):
        if np.all(np.abs(error) <= 4e-15 * (1 + np.abs(wanted))):
            break
        step = -error / slope
        new = _log_ratio(t + step) - wanted
        rise = np.divide(new - error, step, out=np.full(np.shape(step), 1.75), where=np.abs(step) > 1e-9)
        t, error, slope = t + step, new, np.clip(rise, 1.4, 2.1)
    return np.asarray(np.exp(t))


def _log_ratio(t: Array) -> Array:
    m1 = np.exp(-2 * t)  # B = m1 RD(0, 1, m1) / 3, D = RD(0, m1, 1) / 3
    return np.asarray(np.log(elliprd(0.0, 1.0, m1) / elliprd(0.0, m1, 1.0)))


def load_at_pressure(
    curvature: Curvature, pressure: ArrayLike, youngs: float = YOUNGS_MODULUS, poisson: float = POISSONS_RATIO
) -> Array:
    """Load Q [N] under which a point contact of steel on steel reaches a largest pressure [Pa]."""
    k = axis_ratio(curvature)
    e = ellipe(1 - 1 / k**2)  # also for k < 1: the parameter is negative then
    modulus, total = youngs / (1 - poisson**2), curvature.along + curvature.across
    area = (2 * k**2 * e / np.pi) ** (2 / 3) / k * (3 / (modulus * total)) ** (2 / 3)  # a b / Q^(2/3)
    return np.asarray((np.pi * area * floats(pressure) / 1.5) ** 3)


def line_load_at_pressure(
    curvature: ArrayLike, pressure: ArrayLike, youngs: float = YOUNGS_MODULUS, poisson: float = POISSONS_RATIO
) -> Array:
    """Load per length [N/m] under which a line contact reaches a largest pressure [Pa]; curvature sum [1/m]."""
    modulus = youngs / (1 - poisson**2)
    return np.asarray(2 * np.pi * floats(pressure) ** 2 / (modulus * floats(curvature)))
