"""Number and diameter of balls by weighing ratings and assembly together.

Solving C and C0 for both is ill-conditioned: a C raised by 5 % costs 12 % in the number. So each number of balls is
taken in turn and its diameter chosen where the sum of squares

    ((ln C_iso / C + bC) / sC)^2 + (ln(C0_iso / C0) / s0)^2 + (ln(D / (r0 (outer - bore))) / sr)^2
        + ((filling - mean) / sf)^2 + ((f0 - printed f0) / 0.15)^2

is least; exp(-cost / 2) weighs the numbers against each other. The spreads were set on bearings whose inside is
published (common practice, no source).
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from fe_shaft.rolling import dynamic_rating, static_rating
from fe_shaft.rolling.arrays import Array
from fe_shaft.rolling.inside import Catalogue, Inside, Neighbour

FEWEST, MOST = 5, 45
#: Where the diameter is looked for, as shares of r0 (D - d), in how many first steps, and golden sections after them.
REACH, STEPS, SECTIONS = (0.67, 1.35), 48, 24
GOLDEN = (np.sqrt(5) - 1) / 2
F0_SPREAD = 0.15
LEAST_WEIGHT = 0.01


def touching(number: Array, diameter: Array, pitch_diameter: float) -> Array:
    """Share of the pitch circle that the balls fill."""
    return np.asarray(number * np.arcsin(np.minimum(diameter / pitch_diameter, 1.0)) / np.pi)


def assembly_angle(number: Array, diameter: Array, pitch_diameter: float) -> Array:
    """Angle that the balls fill when they all lie together, 2 (Z - 1) asin(D / pitch), in degrees."""
    return np.asarray(np.degrees(2 * (number - 1) * np.arcsin(np.minimum(diameter / pitch_diameter, 1.0))))


@dataclass(frozen=True)
class Priors:
    """What is known of a type before its ratings: names as in the sum above."""

    section: float
    section_spread: float
    filling: Callable[[Array, Array, float], Array]
    filling_mean: float
    filling_spread: float
    dynamic_spread: float
    dynamic_bias: float
    static_spread: float


@dataclass(frozen=True)
class BallType:
    """How a type is rated: fc and f0 as functions of gamma."""

    dynamic_factor: Callable[[Array], Array] = dynamic_rating.ball_factor
    static_factor: Callable[[Array], Array] = static_rating.printed_factor

    def ratings(self, catalogue: Catalogue, number: Array, diameter: Array) -> tuple[Array, Array, Array]:
        """C [N], C0 [N] and f0 for numbers and diameters of balls on the mean circle."""
        angle, rows = catalogue.contact_angle or 0.0, catalogue.rows
        g = dynamic_rating.gamma(diameter, catalogue.mean, angle)
        f0 = self.static_factor(g)
        c = dynamic_rating.ball_rating(number, diameter, catalogue.mean, angle, rows, self.dynamic_factor(g))
        return c, static_rating.ball_rating(number, diameter, catalogue.mean, angle, rows, f0), f0


@dataclass(frozen=True)
class Weighed:
    """Each number of balls with its best diameter [m] and cost, all (n,)."""

    number: Array
    diameter: Array
    cost: Array

    @property
    def best(self) -> int:
        """Index of the least cost."""
        return int(np.argmin(self.cost))

    def neighbours(self, diameter: float | None = None, number: int | None = None) -> tuple[Neighbour, ...]:
        """Numbers that weigh 1 % or more, ours first; radial stiffness goes as (Z^2 D)^(1/3) at a given load."""
        ours = self.best if number is None else int(np.argmin(np.abs(self.number - number)))
        diameters = self.diameter.copy()
        if diameter is not None:
            diameters[ours] = diameter
        weight = np.exp(-(self.cost - self.cost.min()) / 2)
        weight /= weight.sum()
        stiff = np.cbrt(self.number**2 * diameters)
        order = sorted(range(weight.size), key=lambda k: (k != ours, -weight[k]))
        return tuple(
            Neighbour(int(self.number[k]), float(diameters[k]), float(weight[k]), float(stiff[k] / stiff[ours]))
            for k in order
            if k == ours or weight[k] >= LEAST_WEIGHT
        )


def cost(catalogue: Catalogue, priors: Priors, ball_type: BallType, number: Array, diameter: Array) -> Array:
    """The sum of squares for numbers and diameters [m] that broadcast."""
    c, c0, f0 = ball_type.ratings(catalogue, number, diameter)
    filling = priors.filling(number, diameter, catalogue.mean)
    total = (np.log(diameter / (priors.section * catalogue.section)) / priors.section_spread) ** 2
    total = total + ((filling - priors.filling_mean) / priors.filling_spread) ** 2
    if catalogue.dynamic is not None:
        total = total + ((np.log(c / catalogue.dynamic) + priors.dynamic_bias) / priors.dynamic_spread) ** 2
    if catalogue.static is not None:
        total = total + (np.log(c0 / catalogue.static) / priors.static_spread) ** 2
    if catalogue.f0 is not None:
        total = total + ((f0 - catalogue.f0) / F0_SPREAD) ** 2
    return np.asarray(total)


def weigh(catalogue: Catalogue, priors: Priors, ball_type: BallType) -> Weighed:
    """Best diameter of every number of balls, all numbers at once."""
    number = np.arange(FEWEST, MOST + 1, dtype=float)
    middle = priors.section * catalogue.section
    grid = np.log(middle) + np.linspace(np.log(REACH[0]), np.log(REACH[1]), STEPS)
    first = cost(catalogue, priors, ball_type, number[:, None], np.exp(grid))
    place = np.clip(np.argmin(first, axis=1), 1, STEPS - 2)
    low, high = grid[place - 1], grid[place + 1]
    for _ in range(SECTIONS):
        left, right = high - GOLDEN * (high - low), low + GOLDEN * (high - low)
        lower = cost(catalogue, priors, ball_type, number, np.exp(left)) < cost(
            catalogue, priors, ball_type, number, np.exp(right)
        )
        low, high = np.where(lower, low, left), np.where(lower, right, high)
    diameter = np.exp((low + high) / 2)
    return Weighed(number, diameter, cost(catalogue, priors, ball_type, number, diameter))


def ratios(catalogue: Catalogue, ball_type: BallType, inside: Inside) -> tuple[float, float]:
    """Catalogue's C and C0 over those of the standards for a geometry; nan where not given."""
    c, c0, _ = ball_type.ratings(catalogue, np.asarray(float(inside.number)), np.asarray(inside.diameter))
    dynamic = float("nan") if catalogue.dynamic is None else catalogue.dynamic / float(c)
    return dynamic, float("nan") if catalogue.static is None else catalogue.static / float(c0)
