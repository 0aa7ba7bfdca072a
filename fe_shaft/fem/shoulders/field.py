"""Pieces as sources and receivers of decaying flexibility, and the pairs of them that can matter.

Of a field, the m-th power is V = f^m / (1 + c s^p) with c = l^-p, so 1/V is a constant plus a power of the distance.
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np

from fe_shaft.fem.shoulders.contour import Array, Ints
from fe_shaft.fem.shoulders.pieces import Pieces
from fe_shaft.fem.shoulders.rule import (
    BETA,
    GAMMA,
    A,
    M,
    P,
    Y,
    flexibility,
    flexibility_slopes,
    modes_first,
    per_mode,
    thickness,
)

#: Fields that miss the level by less than this are looked at in full precision.
SCREEN = 1e-4
#: Kept between a place and the plane of a source, where powers of the distance have no slope.
TINY = 1e-300


class Fields:
    """Pieces as sources and receivers; rows are modes x shafts, arrays (r, p) where nothing else is said.

    Attributes
    ----------
    m, p, y : (r,)
    left, right : planes
    rate_left, rate_right : section flexibility there
    strong_left, strong_right : f^m of a source that acts to the left, to the right
    near_left, near_right : its l^-p over receivers without a bore
    hollow_left, hollow_right : times exp(-hollow b_k) over receivers with a bore
    bore : of the receivers, in their middle
    """

    def __init__(self, pieces: Pieces) -> None:
        self.pieces = pieces
        self.tapered = pieces.tapered
        shape = pieces.left.shape
        self.rows, self.size = shape[0] * shape[1], shape[2]
        self.m, self.p, self.y = (np.repeat(constant, shape[1]) for constant in (M, P, Y))
        self.left, self.right = self._flat(pieces.left), self._flat(pieces.right)
        self.rate_left = self.rate_right = self._flat(pieces.rate_left)
        self.strong_left = self.strong_right = self._strong(self.rate_left)
        self.bore = self._flat((pieces.bore_left + pieces.bore_right) / 2)
        self.hollow = bool(self.bore.any())
        self.near_left, self.hollow_left = self._reach(pieces.diameter_left, pieces.bore_left)
        self.near_right, self.hollow_right = self.near_left, self.hollow_left
        if self.tapered:
            self.rate_right = self._flat(pieces.rate_right)
            self.strong_right = self._strong(self.rate_right)
            self.near_right, self.hollow_right = self._reach(pieces.diameter_right, pieces.bore_right)
            self.sections = tuple(
                self._flat(of)
                for of in (pieces.diameter_left, pieces.diameter_right, pieces.bore_left, pieces.bore_right)
            )
            self.poisson = self._flat(pieces.poisson[None])

    def _flat(self, values: Array) -> Array:
        return modes_first(values).reshape(self.rows, self.size)

    def _strong(self, rate: Array) -> Array:
        """f^m, 0 for pieces that do not act."""
        return np.asarray(rate ** self.m[:, None] * self.pieces.acts.reshape(rate.shape))

    def _reach(self, diameter: Array, bore: Array) -> tuple[Array, Array]:
        diameter = modes_first(diameter)
        a, p, gamma = (per_mode(constant, diameter) for constant in (A / Y, P, GAMMA))
        if not self.hollow:
            near = self._flat((a * diameter) ** -p)
            return near, np.zeros_like(near)
        mu = modes_first(bore) / diameter
        near = (a * diameter * thickness(mu)) ** -p * np.exp(p * gamma * mu**2)
        return self._flat(near), self._flat(p * (per_mode(BETA, mu) + gamma) * mu / diameter)

    def share(self, row: Ints, receiver: Ints, x: Array) -> Array:
        """How far along their pieces the x are, 0 to 1."""
        left, right = self.left[row, receiver], self.right[row, receiver]
        return (x - left) / (right - left)

    def level(self, row: Ints, receiver: Ints, x: Array) -> tuple[Array, Array, Array]:
        """Flexibility of slices of cones at x, and its derivatives by diameter and bore; x (..., q)."""
        d_left, d_right, b_left, b_right = (values[row, receiver] for values in self.sections)
        share = self.share(row, receiver, x)
        d, b = (d_left + share * (d_right - d_left))[None], (b_left + share * (b_right - b_left))[None]
        nu = self.poisson[row, receiver]
        mode = np.broadcast_to(row // (self.rows // 4), x.shape)[None]
        of_modes = (flexibility(d, b, nu), *flexibility_slopes(d, b, nu))
        f, by_d, by_b = (np.take_along_axis(values, mode, axis=0)[0] for values in of_modes)
        return f, by_d, by_b

    def level_along(self, row: Ints, receiver: Ints, x: Array) -> tuple[Array, Array]:
        """Flexibility of slices of cones at x, and its slope along x."""
        at = (row, receiver)
        d_left, d_right, b_left, b_right = (values[at] for values in self.sections)
        f, by_d, by_b = self.level(row, receiver, x)
        return f, (by_d * (d_right - d_left) + by_b * (b_right - b_left)) / (self.right[at] - self.left[at])


class Pairs(NamedTuple):
    """Fields that may exceed the level of a receiver, (q,); then the levels of crowded receivers; then nothing.

    Attributes
    ----------
    row, receiver, source : pieces
    strong, near, plane, sign :
        V = strong / (1 + near s^p), s = sign (x - plane); sign is +1 where s grows to the right, 0 for a level.
    p : exponent
    crowd : (c, k)
        Pairs of each receiver that has several fields, its level first, filled up with the last pair, which is nothing.
    lonely : pairs of the other receivers
    """

    row: Ints
    receiver: Ints
    source: Ints
    strong: Array
    near: Array
    plane: Array
    sign: Array
    p: Array
    crowd: Ints
    lonely: Ints


def pairs(fields: Fields) -> Pairs:
    """Receivers and fields that may exceed their level, which they can only where they enter."""
    row, receiver, source = _screened(fields)
    begins = np.flatnonzero(np.diff(row * fields.size + receiver, prepend=-1))
    number = np.diff(begins, append=len(row))
    several = number > (0 if fields.tapered else 1)
    lonely = begins[~several]
    begins, number = begins[several], number[several]
    crowd = np.full((len(begins), 1 + int(number.max(initial=0))), len(row) + len(begins))
    crowd[:, 0] = len(row) + np.arange(len(begins))
    column = np.arange(int(number.sum())) - (np.cumsum(number) - number).repeat(number)
    crowd[np.arange(len(begins)).repeat(number), 1 + column] = begins.repeat(number) + column
    row, receiver = (np.concatenate((of, of[begins], [0])) for of in (row, receiver))
    source = np.concatenate((source, receiver[len(source) :]))
    return _pairs(fields, row, receiver, source, crowd, lonely)


def _screened(fields: Fields) -> tuple[Ints, Ints, Ints]:
    """Rows, receivers and sources worth a look: none farther apart than the source reaches over the lowest level."""
    row, source, receiver = _in_reach(fields)
    at, to = row * fields.size + source, row * fields.size + receiver
    rightwards = source < receiver

    def acting(to_left: Array, to_right: Array) -> Array:
        if to_right is to_left:
            return np.asarray(to_left.take(at))
        return np.asarray(np.where(rightwards, to_right.take(at), to_left.take(at)))

    s = np.where(rightwards, fields.left.take(to) - fields.right.take(at), fields.left.take(at) - fields.right.take(to))
    np.maximum(s, 0, out=s)
    np.power(s, fields.p.take(row), out=s)
    s *= acting(fields.near_left, fields.near_right)
    if fields.hollow:
        s *= np.exp(-acting(fields.hollow_left, fields.hollow_right) * fields.bore.take(to))
    s += 1
    s *= np.minimum(fields.strong_left.take(to), fields.strong_right.take(to))
    there = s * (1 - SCREEN) < acting(fields.strong_left, fields.strong_right)
    there &= fields.right.take(to) > fields.left.take(to)
    to, source = to[there], source[there]
    order = np.argsort(to, kind="stable")
    row, receiver = np.divmod(to[order], fields.size)
    return row, receiver, source[order]


def _in_reach(fields: Fields) -> tuple[Ints, Ints, Ints]:
    """Rows, sources and receivers such that the source may exceed the lowest level of its row that far away.

    Pieces of a row lie from left to right, so that those in reach are neighbours of each other.
    """
    strong = np.maximum(fields.strong_left, fields.strong_right)
    levels = np.minimum(fields.strong_left, fields.strong_right)
    lowest = np.where(levels > 0, levels, np.inf).min(axis=1, keepdims=True)
    near = np.minimum(fields.near_left, fields.near_right)
    if fields.hollow:
        hollow = np.maximum(fields.hollow_left, fields.hollow_right)
        near = near * np.exp(-hollow * fields.bore.max(axis=1, keepdims=True))
    above = np.maximum(strong / (lowest * (1 - SCREEN)) - 1, 0)
    reach = (above / near) ** (1 / fields.p[:, None])
    far = 2 * float(fields.right.max(initial=0.0))  # rows one after the other on one line
    start = far * np.arange(fields.rows)[:, None]
    pad = SCREEN * reach
    first = (start + fields.right).ravel().searchsorted((start + np.maximum(fields.left - reach - pad, 0)).ravel())
    last = (
        (start + fields.left)
        .ravel()
        .searchsorted((start + np.minimum(fields.right + reach + pad, far / 2)).ravel(), side="right")
    )
    own = np.arange(fields.rows * fields.size)
    number = np.where((above > 0).ravel(), np.maximum(last - first, 0), 0)
    source = own.repeat(number)
    receiver = np.arange(len(source)) - (np.cumsum(number) - number - first).repeat(number)
    apart = receiver != source
    source, receiver = source[apart], receiver[apart]
    row, source = np.divmod(source, fields.size)
    return row, source, receiver - row * fields.size


def _pairs(fields: Fields, row: Ints, receiver: Ints, source: Ints, crowd: Ints, lonely: Ints) -> Pairs:
    at = (row, source)
    rightwards = source < receiver

    def acting(to_left: Array, to_right: Array) -> Array:
        return to_left[at] if to_right is to_left else np.where(rightwards, to_right[at], to_left[at])

    near = acting(fields.near_left, fields.near_right)
    if fields.hollow:
        near *= np.exp(-acting(fields.hollow_left, fields.hollow_right) * fields.bore[row, receiver])
    strong = acting(fields.strong_left, fields.strong_right)
    strong[-1] = 0
    plane = acting(fields.left, fields.right)
    sign = np.where(rightwards, 1.0, -1.0)
    sign[source == receiver] = 0
    return Pairs(row, receiver, source, strong, near, plane, sign, fields.p[row], crowd, lonely)


def values(fields: Fields, of: Pairs, each: Ints, x: Array) -> Array:
    """V of all pairs of crowded receivers `each` at one place in each, (n, k)."""
    pair = of.crowd.take(each, axis=0)
    s = x[:, None] - of.plane.take(pair)
    s *= of.sign.take(pair)
    np.maximum(s, 0, out=s)
    np.power(s, of.p.take(pair[:, 0])[:, None], out=s)
    s *= of.near.take(pair)
    s += 1
    out = np.divide(of.strong.take(pair), s, out=s)
    if fields.tapered:
        row, receiver = of.row[pair[:, 0]], of.receiver[pair[:, 0]]
        out[:, 0] = fields.level(row, receiver, x)[0] ** fields.m[row]
    return out


class Inverse:
    """1/V of some pairs, and its slope along x."""

    def __init__(self, fields: Fields, of: Pairs, pair: Ints) -> None:
        self.plane, self.sign, self.near = of.plane[pair], of.sign[pair], of.near[pair]
        self.strong, self.p = of.strong[pair], of.p[pair]
        self.fields, self.of = fields, (of.row[pair], of.receiver[pair])
        self.level = self.sign == 0 if fields.tapered else None

    def at(self, x: Array) -> tuple[Array, Array]:
        """Both at x."""
        s = np.maximum((x - self.plane) * self.sign, TINY)
        power = self.near * s**self.p
        value, slope = (1 + power) / self.strong, self.p * power / s * self.sign / self.strong
        if self.level is None or not self.level.any():
            return value, slope
        own, own_slope = self._of_level(x)
        return np.where(self.level, own, value), np.where(self.level, own_slope, slope)

    def _of_level(self, x: Array) -> tuple[Array, Array]:
        m = self.fields.m[self.of[0]]
        f, along = self.fields.level_along(*self.of, x)
        return f**-m, -m * f ** (-m - 1) * along
