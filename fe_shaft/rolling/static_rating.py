"""Basic static radial rating C0 of ISO 76: the load that dents the weakest contact by a ten-thousandth.

    balls     C0 = f0 i Z D^2 cos a,   largest pressure 4200 MPa (self-aligning 4600 MPa)
    rollers   C0 = 44 (1 - gamma) i Z L D cos a,   4000 MPa            N and mm

The heaviest element bears 5 Fr / (i Z cos a), so f0 = Q / (5 D^2) at that pressure. f0 comes from Hertz's contact
itself; `printed_factor` is the standard's table (from memory), which is the same rounded to 0.1 and what makers use.
Arguments are in SI and of any shapes that broadcast.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.rolling.arrays import Array, floats
from fe_shaft.rolling.dynamic_rating import SELF_ALIGNING_GROOVE, gamma, sphere
from fe_shaft.rolling.hertz import inner_curvature, load_at_pressure, outer_curvature
from fe_shaft.rolling.refusal import positive

#: Groove radii over ball diameter and largest pressures [Pa] of ISO 76 (from memory).
INNER_GROOVE, OUTER_GROOVE = 0.52, 0.53
BALL_PRESSURE, SELF_ALIGNING_PRESSURE, ROLLER_PRESSURE = 4200e6, 4600e6, 4000e6
#: Load of the heaviest element over the mean one under radial load with a little clearance.
STRIBECK = 5.0

_GAMMA = np.concatenate([np.arange(11) / 100, np.arange(12, 42, 2) / 100])
_PRINTED = np.array([
    14.7, 14.9, 15.1, 15.3, 15.5, 15.7, 15.9, 16.1, 16.3, 16.5, 16.4,
    15.9, 15.4, 14.9, 14.4, 14.0, 13.5, 13.0, 12.5, 12.1, 11.6, 11.2, 10.7, 10.3, 9.8, 9.4,
])  # fmt: skip
_SELF_ALIGNING = np.array([
    1.9, 2.0, 2.0, 2.1, 2.1, 2.1, 2.2, 2.2, 2.3, 2.3, 2.4,
    2.4, 2.5, 2.6, 2.7, 2.8, 2.9, 3.0, 3.1, 3.2, 3.3, 3.4, 3.5, 3.6, 3.7, 3.8,
])  # fmt: skip


def factor(
    g: ArrayLike, inner: ArrayLike = INNER_GROOVE, outer: ArrayLike = OUTER_GROOVE, pressure: ArrayLike = BALL_PRESSURE
) -> Array:
    """f0 [N/mm^2] out of Hertz's contact: gamma; groove radii over ball diameter; largest pressure [Pa]."""
    weakest = np.minimum(
        load_at_pressure(inner_curvature(1.0, g, inner), pressure),
        load_at_pressure(outer_curvature(1.0, g, outer), pressure),
    )
    return np.asarray(weakest / STRIBECK / 1e6)


def self_aligning_factor(g: ArrayLike) -> Array:
    """f0 [N/mm^2] of self-aligning ball bearings out of Hertz's contact; gamma above 0."""
    return factor(g, SELF_ALIGNING_GROOVE, sphere(g), SELF_ALIGNING_PRESSURE)


def printed_factor(g: ArrayLike) -> Array:
    """f0 of radial ball bearings as ISO 76 prints it, straight between its lines; gamma up to 0.4."""
    return np.asarray(np.interp(floats(g), _GAMMA, _PRINTED))


def printed_self_aligning_factor(g: ArrayLike) -> Array:
    """The same of self-aligning ball bearings."""
    return np.asarray(np.interp(floats(g), _GAMMA, _SELF_ALIGNING))


def ball_rating(
    number: ArrayLike,
    diameter: ArrayLike,
    pitch_diameter: ArrayLike,
    contact_angle: ArrayLike = 0.0,
    rows: ArrayLike = 1,
    f0: ArrayLike | None = None,
) -> Array:
    """C0 [N] of radial ball bearings: balls of one row; [m]; [m]; [rad]; rows i; f0, without it the exact one."""
    count = positive("number", number, "Give the number of balls of one row.")
    ball = positive("diameter", diameter, "Give the ball's diameter in m.")
    g = gamma(ball, pitch_diameter, contact_angle)
    chosen = factor(g) if f0 is None else floats(f0)
    return np.asarray(chosen * floats(rows) * count * (1e3 * ball) ** 2 * np.cos(floats(contact_angle)))


def roller_rating(
    number: ArrayLike,
    diameter: ArrayLike,
    length: ArrayLike,
    pitch_diameter: ArrayLike,
    contact_angle: ArrayLike = 0.0,
    rows: ArrayLike = 1,
) -> Array:
    """C0 [N] of radial roller bearings; `length` is what touches of a roller [m]."""
    return np.asarray(floats(length) * roller_rating_per_length(number, diameter, pitch_diameter, contact_angle, rows))


def roller_rating_per_length(
    number: ArrayLike,
    diameter: ArrayLike,
    pitch_diameter: ArrayLike,
    contact_angle: ArrayLike = 0.0,
    rows: ArrayLike = 1,
) -> Array:
    """C0 over the length of a roller that touches [N/m]."""
    count = positive("number", number, "Give the number of rollers of one row.")
    roller = positive("diameter", diameter, "Give the roller's diameter in m.")
    g = gamma(roller, pitch_diameter, contact_angle)
    return np.asarray(44e6 * (1 - g) * floats(rows) * count * roller * np.cos(floats(contact_angle)))
