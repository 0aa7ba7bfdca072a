"""Slopes of the pieces at the ends of segments, and of the place of bending lumps."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np

from fe_shaft.fem.shoulders.contour import Array
from fe_shaft.fem.shoulders.pieces import Neighbours, ratio, wider_bore
from fe_shaft.fem.shoulders.rule import (
    BORE_LIMIT,
    FILLET_LIMIT,
    K_BORE,
    LAMBDA,
    NU,
    OFFSET,
    POWER_BORE,
    WIDEST_BORE,
    A,
    M,
    per_mode,
)


class EndSlopes(NamedTuple):
    """Slopes of `EndPieces` with respect to what `Neighbours` holds, (4, v, n, 2, 6) each: in its order."""

    fillet: Array
    bore: Array
    more_diameter: Array
    more_bore: Array


LENGTH, DIAMETER, BORE, FILLET, NEXT_DIAMETER, NEXT_BORE = range(6)


def limited_slopes(length: Array, limit: Array) -> tuple[Array, Array]:
    """Slopes of `limited` by length and limit."""
    fourth, other = length**4, limit**4
    share = ratio(other, fourth + other)
    return share**1.25, (1 - share) ** 1.25


def end_slopes(at: Neighbours) -> EndSlopes:
    """Slopes of the lengths and sections of the end pieces."""
    fillet, more_diameter = _fillet(at)
    bore, more_bore = _bore_end(at)
    return EndSlopes(fillet, bore, more_diameter, more_bore)


def _fillet(at: Neighbours) -> tuple[Array, Array]:
    """Of l = lambda r sqrt(h / (h + r/10)), limited, and 2 nu r h / (nu r + h); none where there is no step."""
    h, r = np.maximum(at.next_diameter - at.diameter, 0)[None] / 2, at.fillet[None]
    there = h > 0
    h = np.where(there, h, 1)
    root = np.sqrt(h / (h + r / 10))
    raw = per_mode(LAMBDA, h) * r * root
    raw_h = raw * (r / 10) / (2 * h * (h + r / 10))
    raw_r = per_mode(LAMBDA, h) * root * (1 - r / 10 / (2 * (h + r / 10)))
    by_raw, by_limit = limited_slopes(raw, FILLET_LIMIT * at.length)
    nu = per_mode(NU, h)
    more_h, more_r = 2 * (nu * r / (nu * r + h)) ** 2, 2 * nu * (h / (nu * r + h)) ** 2
    length, more = np.zeros((2, 4, *at.length.shape, 6))
    length[..., LENGTH] = FILLET_LIMIT * by_limit * there
    for out, slope_h, slope_r in ((length, by_raw * raw_h, by_raw * raw_r), (more, more_h, more_r)):
        out[..., NEXT_DIAMETER] = slope_h / 2 * there
        out[..., DIAMETER] = -out[..., NEXT_DIAMETER]
        out[..., FILLET] = slope_r * there
    return length, more


def _bore_end(at: Neighbours) -> tuple[Array, Array]:
    """Of k_b b_w (1 - t), limited, and b_w q^(1/P) - b with q = 1 - t^6 + t^7, t = (b / b_w)^P."""
    wide, b = wider_bore(at)[None], at.bore[None]
    there = wide > b
    wide = np.where(there, wide, 1)
    power, k = per_mode(POWER_BORE, wide), per_mode(K_BORE, wide)
    t = np.where(there, (b / wide) ** power, 0)
    t_b, t_wide = power * np.where(there, b, 0) ** (power - 1) / wide**power, -power * t / wide
    raw = k * wide * (1 - t)
    by_raw, by_limit = limited_slopes(raw, BORE_LIMIT * at.length)
    q, q_t = 1 - t**6 + t**7, 7 * t**6 - 6 * t**5
    end_t = wide / power * q ** (1 / power - 1) * q_t
    length, more = np.zeros((2, 4, *at.length.shape, 6))
    length[..., LENGTH] = BORE_LIMIT * by_limit * there
    length[..., BORE] = -by_raw * k * wide * t_b * there
    more[..., BORE] = (end_t * t_b - 1) * there
    length_wide = by_raw * k * (1 - t - wide * t_wide) * there
    more_wide = (q ** (1 / power) + end_t * t_wide) * there
    capped = at.next_bore > WIDEST_BORE * at.diameter
    for out, slope in ((length, length_wide), (more, more_wide)):
        out[..., NEXT_BORE] = np.where(capped, 0, slope)
        out[..., DIAMETER] = np.where(capped, WIDEST_BORE * slope, 0)
    return length, more


def inwards_slopes(at: Neighbours, seen: Array) -> tuple[Array, Array, Array, Array]:
    """Slopes of `bending_inwards` by the segment's length, diameter and bore, and by the seen diameter, (v, n, 2)."""
    d, b, length = at.diameter, at.bore, at.length
    there = seen > d
    seen = np.where(there, seen, 2 * d)
    a, m = A[0], M[0]
    whole = seen**4 - b**4
    s = (d**4 - b**4) / whole
    s_d, s_b, s_seen = 4 * d**3 / whole, -4 * b**3 * (1 - s) / whole, -4 * seen**3 * s / whole
    front = d * OFFSET * (1 + b / d) ** 3
    rise = (seen / d) ** 2 - 1
    below = a * (1 - s**m) ** (1 / m) + OFFSET
    z = front * s * rise / below
    by_s = z / s + z / below * a * s ** (m - 1) * (1 - s**m) ** (1 / m - 1)
    z_d = z * (1 / d - 3 * b / (d * (d + b))) + by_s * s_d - front * s / below * 2 * seen**2 / d**3
    z_b = z * 3 / (d + b) + by_s * s_b
    z_seen = by_s * s_seen + front * s / below * 2 * seen / d**2
    kept = there * (length / (length + 2 * z)) ** 2
    return there * 2 * (z / (length + 2 * z)) ** 2, kept * z_d, kept * z_b, kept * z_seen
