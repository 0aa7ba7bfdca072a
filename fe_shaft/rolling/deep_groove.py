"""Inside of single-row deep-groove ball bearings: balls of a standard size first, then weighed, then common practice.

Rings that are put together off centre (Conrad) let in balls over about half the circle, so the assembly angle is the
relation that C and C0 lack.
"""

from __future__ import annotations

import math
from dataclasses import replace

import numpy as np

from fe_shaft.rolling.arrays import Array
from fe_shaft.rolling.inside import Band, Catalogue, Estimate, Inside, Neighbour
from fe_shaft.rolling.refusal import impossible
from fe_shaft.rolling.weighing import (
    F0_SPREAD,
    FEWEST,
    MOST,
    BallType,
    Priors,
    Weighed,
    assembly_angle,
    ratios,
    weigh,
)

#: Common practice, no source: assembly angle of known bearings 180 to 195 deg, balls 0.29 to 0.32 of D - d.
PRIORS = Priors(0.30, 0.05, assembly_angle, 189.0, 6.0, 0.06, 0.025, 0.03)
TYPE = BallType()

SIZED = Band(1, 0.04, 0.12, 0.03, 0.0, 0.07, 0.05, 0.08, 0.12)
WEIGHED = Band(1, 0.04, 0.12, 0.03, 0.0, 0.07, 0.06, 0.08, 0.12)
PRACTICE = Band(1, 0.06, 0.12, 0.03, 0.0, 0.12, 0.07, 0.10, 0.13)

#: Where ratings count as those of the standards; beyond, geometry alone decides.
DYNAMIC_LIKE, STATIC_LIKE = (0.95, 1.20), (0.95, 1.05)
#: A bearing of a standard ball counts as found if C0 and C agree this well; C as the standard has it or 5 % above.
STATIC_HIT, DYNAMIC_HIT, CLASSES = 0.01, 0.012, (1.00, 1.05)
F0_HIT = 0.20
#: Balls sought, as shares of D - d; sizes: 1/32 in preferred, 1/64 in and 0.5 mm at the price of a square of this.
SOUGHT, ODD_SIZE = (0.24, 0.34), 2.0
#: An assembly angle [deg] beyond which rings hardly go together without a slot, and below which balls are few.
MOST_ANGLE, LEAST_ANGLE = 203.0, 175.0
UNSURE = 0.7
_INCH = 25.4e-3


def estimate(catalogue: Catalogue) -> Estimate:
    """Inside of a deep-groove bearing from d, D and whatever of C, C0 and f0 is given."""
    if catalogue.rows != 1:
        raise impossible("rows", "there is no rule for two rows of deep-groove balls. Write what is inside.")
    if catalogue.static is None:
        return _by_practice(catalogue, ())
    weighed = weigh(catalogue, PRIORS, TYPE)
    if found := _sized(catalogue):
        return _answer(catalogue, found, "balls of a standard size", SIZED, weighed)
    best = Inside(int(weighed.number[weighed.best]), float(weighed.diameter[weighed.best]), catalogue.mean)
    dynamic, static = ratios(catalogue, TYPE, best)
    if not (like(dynamic, DYNAMIC_LIKE) and like(static, STATIC_LIKE)):
        return _by_practice(catalogue, (unlike(dynamic, static),))
    return _answer(catalogue, best, "ratings and assembly weighed together", WEIGHED, weighed)


def like(ratio: float, limits: tuple[float, float]) -> bool:
    """Whether a rating may count as that of the standard; one not given does."""
    return math.isnan(ratio) or limits[0] <= ratio <= limits[1]


def unlike(dynamic: float, static: float) -> str:
    """Note where ratings do not fit any geometry of the type."""
    told = " and ".join(
        f"{name} is {ratio:.2f} times that of the standard"
        for name, ratio in (("C", dynamic), ("C0", static))
        if not math.isnan(ratio)
    )
    return f"The ratings are not those of ISO 281 and ISO 76 for this type ({told}): common proportions were used."


def _sizes(catalogue: Catalogue) -> tuple[Array, Array]:
    """Standard balls [m] within the range sought, and what each costs."""
    low, high = (share * catalogue.section for share in SOUGHT)
    steps = np.arange(1, 400)
    inches, metric = steps * _INCH / 64, steps * 0.5e-3
    diameter = np.concatenate([inches, metric])
    price = np.concatenate([np.where(steps % 2 == 0, 0.0, ODD_SIZE), np.full(steps.size, ODD_SIZE)])
    inside = (diameter > low) & (diameter < high)
    return diameter[inside], price[inside]


def _sized(catalogue: Catalogue) -> Inside | None:
    """The best bearing of standard balls if it meets the ratings, else None."""
    (diameter, price), number = _sizes(catalogue), np.arange(float(FEWEST), MOST + 1)[:, None]
    if catalogue.dynamic is None or catalogue.static is None or diameter.size == 0:
        return None
    c, c0, f0 = TYPE.ratings(catalogue, number, diameter)
    above, static = np.log(catalogue.dynamic / c), np.log(c0 / catalogue.static)
    off = np.minimum.reduce([np.abs(above - math.log(share)) for share in CLASSES])
    f0_off = np.zeros_like(f0) if catalogue.f0 is None else f0 - catalogue.f0
    total = np.minimum((off / DYNAMIC_HIT) ** 2, 2 + ((above - 0.03) / 0.05) ** 2) + (static / STATIC_HIT) ** 2 + price
    total = total + (f0_off / F0_SPREAD) ** 2 + _assembly_cost(catalogue, number, diameter)
    z, size = np.unravel_index(np.argmin(total), total.shape)
    hit = abs(static[z, size]) <= STATIC_HIT and off[z, size] <= DYNAMIC_HIT and abs(f0_off[size]) <= F0_HIT
    return Inside(int(number[z, 0]), float(diameter[size]), catalogue.mean) if hit else None


def _assembly_cost(catalogue: Catalogue, number: Array, diameter: Array) -> Array:
    """How unusual an assembly angle and a share of the section are."""
    angle = assembly_angle(number, diameter, catalogue.mean)
    unusual = ((angle - PRIORS.filling_mean) / PRIORS.filling_spread) ** 2
    return np.asarray(unusual + (np.log(diameter / (PRIORS.section * catalogue.section)) / PRIORS.section_spread) ** 2)


def _by_practice(catalogue: Catalogue, notes: tuple[str, ...]) -> Estimate:
    """Balls of 0.30 (D - d), as many as an assembly angle of 189 deg lets in, rounded to the nearest."""
    diameter = PRIORS.section * catalogue.section
    number = 1 + PRIORS.filling_mean / math.degrees(2 * math.asin(diameter / catalogue.mean))
    inside = Inside(max(round(number), 3), diameter, catalogue.mean)
    return _answer(catalogue, inside, "common proportions of d and D", PRACTICE, None, notes)


def _answer(
    catalogue: Catalogue,
    inside: Inside,
    method: str,
    band: Band,
    weighed: Weighed | None,
    notes: tuple[str, ...] = (),
) -> Estimate:
    neighbours = weighed.neighbours(inside.diameter, inside.number) if weighed else ()
    doubts = list(notes)
    if neighbours and neighbours[0].weight < UNSURE:
        other = neighbours[1]
        band = _wider(band, inside, other)
        doubts.append(f"{other.number} balls of {1e3 * other.diameter:.4g} mm would meet the catalogue as well.")
    angle = float(assembly_angle(np.asarray(inside.number), np.asarray(inside.diameter), catalogue.mean))
    if not LEAST_ANGLE <= angle <= MOST_ANGLE:
        doubts.append(f"The balls would fill {angle:.0f} deg at assembly; 180 to 195 deg are usual.")
    dynamic, static = ratios(catalogue, TYPE, inside)
    return Estimate(inside, method, band, dynamic, static, inside.spread, neighbours, tuple(doubts))


def _wider(band: Band, inside: Inside, other: Neighbour) -> Band:
    """The band where another number of balls is nearly as likely: its distance and the band's own as squares."""
    capacity = (other.number / inside.number) ** (2 / 3) * (other.diameter / inside.diameter) ** 1.8 - 1
    stiffness = other.stiffness - 1
    return replace(
        band,
        capacity=math.hypot(band.capacity, capacity),
        radial=math.hypot(band.radial, stiffness),
        axial=math.hypot(band.axial, stiffness),
        total=math.hypot(band.total, stiffness),
    )
