"""Basic dynamic radial rating C of ISO 281, from what is inside.

    balls     C = bm fc (i cos a)^0.7 Z^(2/3) D^1.8      (D above 25.4 mm: 3.647 D^1.4),  N and mm
    rollers   C = bm fc (i L cos a)^(7/9) Z^(3/4) D^(29/27)

fc is the formula behind the printed table (ISO/TR 1281-1, G. Lundberg and A. Palmgren, Dynamic Capacity of Rolling
Bearings, 1947; from memory, held against the table's figures by the tests). gamma = D cos a / pitch diameter.
Arguments are in SI and of any shapes that broadcast.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.rolling.arrays import Array, floats
from fe_shaft.rolling.hertz import conforming
from fe_shaft.rolling.kinds import Kind
from fe_shaft.rolling.refusal import positive, within

#: Groove radius over ball diameter that ISO 281 takes for both grooves (from memory).
GROOVE = 0.52
#: The same of self-aligning ball bearings, inner ring; their outer raceway is a sphere.
SELF_ALIGNING_GROOVE = 0.53
#: Factor bm of ISO 281 for today's steel and making, by type (from memory).
MATERIAL = {
    Kind.DEEP_GROOVE_BALL: 1.3,
    Kind.ANGULAR_CONTACT_BALL: 1.3,
    Kind.SELF_ALIGNING_BALL: 1.3,
    Kind.CYLINDRICAL_ROLLER: 1.1,
    Kind.NEEDLE_ROLLER: 1.1,
    Kind.TAPERED_ROLLER: 1.1,
    Kind.SPHERICAL_ROLLER: 1.15,
}
#: Reduction lambda for what edges and uneven loading take: one row, two rows in a rigid ring, a spherical raceway.
ONE_ROW, TWO_ROWS, SPHERICAL = 0.95, 0.90, 1.0
#: The roller's reduction lambda nu (from memory).
ROLLER = 0.83
_LARGE_BALL = 25.4e-3


def gamma(diameter: ArrayLike, pitch_diameter: ArrayLike, contact_angle: ArrayLike = 0.0) -> Array:
    """Ball or roller diameter * cos(contact angle) / pitch diameter.

    Raises
    ------
    ModelError
        Where it is not between 0 and 1.
    """
    small = floats(diameter) * np.cos(floats(contact_angle)) / floats(pitch_diameter)
    return within("diameter", small, 0.0, 1.0, "An element must be smaller.", " pitch diameters")


def sphere(g: ArrayLike) -> Array:
    """Radius over ball diameter of an outer raceway that is a sphere about the bearing's centre."""
    return np.asarray((1 + floats(g)) / (2 * floats(g)))


def ball_factor(
    g: ArrayLike, inner: ArrayLike = GROOVE, outer: ArrayLike = GROOVE, reduction: ArrayLike = ONE_ROW
) -> Array:
    """Factor fc of a ball bearing, for N and mm.

    Parameters
    ----------
    g : gamma
    inner, outer : groove radius over ball diameter, above 0.5
    reduction : lambda, ONE_ROW, TWO_ROWS or SPHERICAL
    """
    g, fi, fo = floats(g), conforming(inner), conforming(outer)
    fits = fi / fo * (2 * fo - 1) / (2 * fi - 1)
    both = (1 + (1.04 * ((1 - g) / (1 + g)) ** 1.72 * fits**0.41) ** (10 / 3)) ** -0.3
    inner_only = g**0.3 * (1 - g) ** 1.39 / (1 + g) ** (1 / 3) * (2 * fi / (2 * fi - 1)) ** 0.41
    return np.asarray(0.41 * 98.0665 * floats(reduction) * both * inner_only)


def roller_factor(g: ArrayLike, reduction: ArrayLike = ROLLER) -> Array:
    """Factor fc of a radial roller bearing, for N and mm."""
    g = floats(g)
    both = (1 + (1.04 * ((1 - g) / (1 + g)) ** (143 / 108)) ** 4.5) ** (-2 / 9)
    return np.asarray(207.9 * floats(reduction) * both * g ** (2 / 9) * (1 - g) ** (29 / 27) / (1 + g) ** 0.25)


def ball_rating(
    number: ArrayLike,
    diameter: ArrayLike,
    pitch_diameter: ArrayLike,
    contact_angle: ArrayLike = 0.0,
    rows: ArrayLike = 1,
    factor: ArrayLike | None = None,
    material: ArrayLike = 1.3,
) -> Array:
    """C [N] of radial ball bearings.

    Parameters
    ----------
    number : balls of one row
    diameter, pitch_diameter : [m]
    contact_angle : [rad]
    rows : i
    factor : fc; without it that of one row with grooves of 0.52
    material : bm

    Raises
    ------
    ModelError
        Where a number or diameter is not positive, or a ball as large as the pitch circle.
    """
    count = positive("number", number, "Give the number of balls of one row.")
    ball = positive("diameter", diameter, "Give the ball's diameter in m.")
    fc = ball_factor(gamma(ball, pitch_diameter, contact_angle)) if factor is None else floats(factor)
    size = np.where(ball <= _LARGE_BALL, (1e3 * ball) ** 1.8, 3.647 * (1e3 * ball) ** 1.4)
    parts = (floats(rows) * np.cos(floats(contact_angle))) ** 0.7 * count ** (2 / 3)
    return np.asarray(floats(material) * fc * parts * size)


def roller_rating(
    number: ArrayLike,
    diameter: ArrayLike,
    length: ArrayLike,
    pitch_diameter: ArrayLike,
    contact_angle: ArrayLike = 0.0,
    rows: ArrayLike = 1,
    material: ArrayLike = 1.1,
) -> Array:
    """C [N] of radial roller bearings; `length` is what touches of a roller [m], the rest as for balls."""
    count = positive("number", number, "Give the number of rollers of one row.")
    roller = positive("diameter", diameter, "Give the roller's diameter in m.")
    touching = positive("length", length, "Give the length of a roller that touches in m.")
    fc = roller_factor(gamma(roller, pitch_diameter, contact_angle))
    line = (floats(rows) * 1e3 * touching * np.cos(floats(contact_angle))) ** (7 / 9)
    return np.asarray(floats(material) * fc * line * count**0.75 * (1e3 * roller) ** (29 / 27))


def self_aligning_factor(g: ArrayLike) -> Array:
    """Factor fc of self-aligning ball bearings: inner groove 0.53, outer raceway a sphere."""
    return ball_factor(g, SELF_ALIGNING_GROOVE, sphere(g), SPHERICAL)
