"""Basic and reliability-adjusted rating life of ISO 281, and static safety of ISO 76.

L10 = (C / P)^p million revolutions,   p = 3 balls, 10/3 rollers
Ln  = a1 L10,   a1 = 0.95 (ln(1/S) / ln(1/0.9))^(2/3) + 0.05     (ISO 281:2007, formula from memory)
"""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.rolling.arrays import Array, floats
from fe_shaft.rolling.kinds import BALLS, Kind
from fe_shaft.rolling.refusal import positive, within


def exponent(kind: Kind) -> float:
    """Life exponent p."""
    return 3.0 if kind in BALLS else 10 / 3


def reliability_factor(reliability: ArrayLike) -> Array:
    """a1 for the share of bearings that reach the life, 0.9 to 0.9995.

    Raises
    ------
    ModelError
        Outside of what ISO 281 covers.
    """
    remedy = "ISO 281 covers 0.9 to 0.9995; write 0.95 for 95 %."
    share = within("reliability", reliability, 0.9, np.nextafter(0.9995, 1), remedy)
    return np.asarray(0.95 * (np.log(1 / share) / np.log(1 / 0.9)) ** (2 / 3) + 0.05)


def rating_life(kind: Kind, rating: ArrayLike, load: ArrayLike, reliability: ArrayLike = 0.9) -> Array:
    """Life in revolutions; infinite where there is no load.

    Parameters
    ----------
    kind : type
    rating, load : C and P [N]
    reliability : share that reaches it
    """
    c = positive("dynamic", rating, "Give the rating C in N.")
    p = within("load", load, 0.0, np.inf, "Give the equivalent load P in N, 0 or more.")
    ratio = np.divide(c, p, out=np.full(np.broadcast_shapes(c.shape, p.shape), np.inf), where=p > 0)
    return np.asarray(1e6 * reliability_factor(reliability) * ratio ** exponent(kind))


def hours(revolutions: ArrayLike, speed: ArrayLike) -> Array:
    """Life in hours of revolutions turned at a speed [rad/s]."""
    turning = positive(
        "speed", np.abs(floats(speed)), "A bearing at rest has no life to count; look at its static safety."
    )
    return np.asarray(floats(revolutions) * 2 * np.pi / turning / 3600)


def static_safety(rating: ArrayLike, load: ArrayLike) -> Array:
    """s0 = C0 / P0; infinite where there is no load."""
    c0 = positive("static", rating, "Give the rating C0 in N.")
    p0 = within("load", load, 0.0, np.inf, "Give the equivalent load P0 in N, 0 or more.")
    return np.asarray(np.divide(c0, p0, out=np.full(np.broadcast_shapes(c0.shape, p0.shape), np.inf), where=p0 > 0))
