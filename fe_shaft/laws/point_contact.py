"""Hertz point contact of a ball and a raceway, exact, for any number of contacts at once.

H. Hertz, Ueber die Beruehrung fester elastischer Koerper, J. reine angew. Math. 92 (1881) 156; in the form used for
bearings by T. A. Harris, Rolling Bearing Analysis, and ISO/TS 16281 (formulas from memory, held against mpmath and
published tables by the tests). With the complete elliptic integrals K, E of the parameter m = 1 - 1 / k^2, the
semi-axes a (across the rolling direction) and b = a / k, the curvature sum S and E' = E / (1 - nu^2):

    curvatures   rolling / across = B / (m1 D),   m1 = 1 / k^2,   B = (E - m1 K) / m,   D = (K - E) / m
    load         Q = c d^1.5,   c = pi E' k / sqrt(4.5) sqrt(E / (S K^3))
    ellipse      a = (2 k^2 E / pi)^(1/3) (3 Q / (E' S))^(1/3)
    pressure     p = 1.5 Q / (pi a b)

B and D come from Carlson's integrals, which lose no digits where the ellipse is a circle; they are as good for k < 1,
so rounding cannot push a circle out of reach.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike, NDArray
from scipy.special import ellipe, ellipk, ellipkm1, elliprd

from fe_shaft.errors import SolutionError

Array = NDArray[np.float64]

#: The root's slope lies between 3/4 (a circle) and 1 (a needle), so a Newton step leaves a third of the error or less.
SLOPES = (0.75, 1.0)
STEPS, SETTLED = 30, 4e-16


def effective_modulus(
    youngs: ArrayLike, poisson: ArrayLike, other_youngs: ArrayLike, other_poisson: ArrayLike
) -> Array:
    """E' [Pa] of two bodies in contact: 2 / E' = sum (1 - nu^2) / E; of the same steel E / (1 - nu^2)."""
    one, two = (1 - np.square(poisson)) / np.asarray(youngs), (1 - np.square(other_poisson)) / np.asarray(other_youngs)
    return np.asarray(2 / (one + two))


def axis_ratio(curvature_ratio: ArrayLike) -> Array:
    """Ratio k = a / b of the contact ellipse's axes.

    Parameters
    ----------
    curvature_ratio : any shape
        Relative curvature along the rolling direction over that across it, positive. With the curvature difference F
        of the tables it is (1 + F) / (1 - F).

    Raises
    ------
    SolutionError
        Where a ratio is not positive and finite: such surfaces touch in no ellipse.
    """
    ratio = np.asarray(curvature_ratio, dtype=float)
    if not np.all((ratio > 0) & np.isfinite(ratio)):
        raise SolutionError(
            "no contact ellipse: the raceway is as curved as the ball or more. Choose a conformity above 0.5."
        )
    return np.asarray(np.exp(_log_axis_ratio(np.log(ratio) / 2)))


def _log_axis_ratio(wanted: Array) -> Array:
    """Root t = ln k of 1/2 ln(B / (m1 D)) = wanted, by Newton's method from a guess that is right at both ends."""
    t = wanted / SLOPES[0] * (1 + np.abs(wanted)) / (1 + np.abs(wanted) / SLOPES[0])
    for _ in range(STEPS):
        m1 = np.exp(-2 * t)
        b, d = m1 * elliprd(0.0, 1.0, m1) / 3, elliprd(0.0, m1, 1.0) / 3
        step = (np.log(b / (m1 * d)) / 2 - wanted) / _slope(m1, b, d)
        t = t - step
        if np.all(np.abs(step) <= SETTLED * (1 + np.abs(t))):
            break
    return np.asarray(t)


def _slope(m1: Array, b: Array, d: Array) -> Array:
    """Derivative of 1/2 ln(B / (m1 D)) by ln k: 3/2 - m1 D' (1/B + 1/D), with m1 D' = (B - m1 D) / 2m."""
    m = 1 - m1
    near = np.abs(m) < 1e-6
    rise = np.where(near, 3 * np.pi / 32, (b - m1 * d) / (2 * np.where(near, 1.0, m)))
    return np.asarray(np.clip(1.5 - rise * (1 / b + 1 / d), *SLOPES))


@dataclass(frozen=True)
class PointContact:
    """Contacts of balls with raceways, all arrays of one shape.

    Attributes
    ----------
    modulus : E' [Pa]
    curvature : sum of the principal curvatures of both bodies [1/m]
    ratio : axis ratio k = a / b of the ellipse
    first, second : complete elliptic integrals K and E of the parameter 1 - 1 / k^2
    """

    modulus: Array
    curvature: Array
    ratio: Array
    first: Array
    second: Array

    @property
    def stiffness(self) -> Array:
        """The c of Q = c d^1.5 [N / m^1.5]."""
        return np.asarray(
            np.pi * self.modulus * self.ratio / np.sqrt(4.5) * np.sqrt(self.second / (self.curvature * self.first**3))
        )

    @property
    def unit_axes(self) -> tuple[Array, Array]:
        """Semi-axes a (across the rolling direction) and b under 1 N [m]; they grow as Q^(1/3)."""
        size = np.cbrt(6 * self.second / (np.pi * self.modulus * self.curvature))
        return np.asarray(size * np.cbrt(self.ratio) ** 2), np.asarray(size / np.cbrt(self.ratio))

    @property
    def unit_pressure(self) -> Array:
        """Largest pressure under 1 N [Pa]; it grows as Q^(1/3)."""
        a, b = self.unit_axes
        return np.asarray(1.5 / (np.pi * a * b))

    def axes(self, load: ArrayLike) -> tuple[Array, Array]:
        """Semi-axes a and b [m] under loads Q [N]."""
        a, b = self.unit_axes
        return a * np.cbrt(load), b * np.cbrt(load)

    def pressure(self, load: ArrayLike) -> Array:
        """Largest pressure [Pa] under loads Q [N]."""
        return np.asarray(self.unit_pressure * np.cbrt(load))

    def load(self, pressure: ArrayLike) -> Array:
        """Load Q [N] under which the largest pressure is the given one [Pa]."""
        return np.asarray((np.asarray(pressure) / self.unit_pressure) ** 3)


def contact(modulus: ArrayLike, rolling: ArrayLike, across: ArrayLike) -> PointContact:
    """The contact of two bodies.

    Parameters
    ----------
    modulus : E' [Pa]
    rolling, across : [1/m]
        Sums of both bodies' curvatures along the rolling direction and across it, hollow surfaces negative.

    Raises
    ------
    SolutionError
        See `axis_ratio`.
    """
    e, x, y = np.broadcast_arrays(*(np.asarray(each, dtype=float) for each in (modulus, rolling, across)))
    k = axis_ratio(x / y)
    m1 = 1 / k**2
    near = m1 > 0.5  # K by the complement keeps its digits for slender ellipses
    first = np.where(near, ellipk(1 - m1), ellipkm1(np.where(near, 0.5, m1)))
    return PointContact(e, x + y, k, first, np.asarray(ellipe(1 - m1)))


def inner_contact(modulus: ArrayLike, diameter: ArrayLike, conformity: ArrayLike, gamma: ArrayLike) -> PointContact:
    """Ball and inner raceway.

    Parameters
    ----------
    diameter : ball diameter D [m]
    conformity : groove radius over D
    gamma : D cos(contact angle) over pitch diameter
    """
    d, f, g = (np.asarray(each, dtype=float) for each in (diameter, conformity, gamma))
    return contact(modulus, (2 + 2 * g / (1 - g)) / d, (2 - 1 / f) / d)


def outer_contact(modulus: ArrayLike, diameter: ArrayLike, conformity: ArrayLike, gamma: ArrayLike) -> PointContact:
    """Ball and outer raceway, which is hollow in both directions."""
    d, f, g = (np.asarray(each, dtype=float) for each in (diameter, conformity, gamma))
    return contact(modulus, (2 - 2 * g / (1 + g)) / d, (2 - 1 / f) / d)


def in_series(inner: ArrayLike, outer: ArrayLike) -> Array:
    """Stiffness of two contacts that carry the same load on one line: c^(-2/3) = ci^(-2/3) + co^(-2/3)."""
    return np.asarray((np.asarray(inner) ** (-2 / 3) + np.asarray(outer) ** (-2 / 3)) ** -1.5)
