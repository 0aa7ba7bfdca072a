"""Where a contour leaves what the shoulder rule was made for."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np

from fe_shaft.fem.shoulders.contour import Array, Bools, Contour, joined
from fe_shaft.fem.shoulders.lumps import spread
from fe_shaft.fem.shoulders.pieces import Neighbours, neighbours

#: D/d from which on the rule was not fitted with collars, grooves and fillets.
LARGEST_STEP = 3.0
#: Discs and flanges thinner than this share of the shaft beside them, and larger than it by this ratio, bend as plates.
THIN, PLATE = 0.5, 1.5
#: Hollow grooves narrower than this share of their diameter are 5 to 9 % stiffer by the rule than the solid.
NARROW = 0.3


class OutOfRange(NamedTuple):
    """The shoulders that leave the range, at the ends of their thinner segments, (..., n, 2) each.

    Attributes
    ----------
    end_disc : a thin disc ends the shaft here: stiffer in the rule, by a third where it is loaded or held
    flange : a thin flange begins here: the same, but only where it is loaded or held
    hollow_groove : a narrow groove of a hollow shaft
    large_step : D/d over 3
    """

    end_disc: Bools
    flange: Bools
    hollow_groove: Bools
    large_step: Bools


def out_of_range(contour: Contour) -> OutOfRange:
    """Which shoulders of a contour (..., n) leave the range of the rule."""
    whole = contour.flat
    joint = joined(whole)
    found = _of_joined(whole if joint is None else joint.contour)
    if joint is not None:
        found = OutOfRange(*(spread(of, joint, whole.shape) for of in found))
    return OutOfRange(*(of.reshape(*contour.shape, 2) for of in found))


def hollow_shoulders(contour: Contour) -> tuple[Array, Array]:
    """Where one contour (n,) steps and is bored on either side, and the smaller diameters there, (k,) each."""
    joint = joined(contour.flat)
    length, d1, d2, b1, b2, *_ = (of[0] for of in (contour.flat if joint is None else joint.contour).arrays)
    step = (d2[:-1] != d1[1:]) | (b2[:-1] != b1[1:])
    step &= ((b2[:-1] > 0) | (b1[1:] > 0)) & (length[1:] > 0)
    return np.cumsum(length)[:-1][step], np.minimum(d2[:-1], d1[1:])[step]


def _of_joined(contour: Contour) -> OutOfRange:
    at = neighbours(contour)
    step = at.next_diameter / at.diameter
    thin = (step > PLATE) & (_next(at, at.length) < THIN * at.diameter)
    last = _next(at, _at_ends(contour)) > 0
    groove = (step > 1).all(axis=-1) & (at.bore > 0).any(axis=-1) & (contour.length < NARROW * at.diameter.min(axis=-1))
    both = np.broadcast_to(groove[..., None], step.shape)
    return OutOfRange(thin & last, thin & ~last, both, step > LARGEST_STEP)


def _at_ends(contour: Contour) -> Array:
    """1 for the segments at a shaft's ends, (v, n, 2)."""
    ends = np.cumsum(contour.length, axis=1)
    outer = (ends == contour.length) | (ends == ends[:, -1:])
    return np.repeat(outer[..., None].astype(np.float64), 2, axis=-1)


def _next(at: Neighbours, of_segments: Array) -> Array:
    """What the neighbours have, (v, n, 2), 0 where there is none."""
    out = np.zeros_like(at.length)
    out[:, 1:, 0], out[:, :-1, 1] = of_segments[:, :-1, 1], of_segments[:, 1:, 0]
    return out
