"""Slopes of the surplus with respect to what the pieces are made of: their planes, diameters and bores.

An interval of the maximum holds the integral of f g(s/l) less the level. Its slope is taken between fixed ends, plus
what the ends carry along: a plane of the contour moves by itself; where a field has sunk to the level nothing is
carried; where two fields cross, what one lump gains the other loses, so that in their sum it drops out.
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np

from fe_shaft.fem.shoulders.contour import Array, Ints
from fe_shaft.fem.shoulders.field import Fields, Pairs
from fe_shaft.fem.shoulders.maxima import PLANE, Intervals, gathered, gauss
from fe_shaft.fem.shoulders.pieces import Pieces
from fe_shaft.fem.shoulders.rule import BETA, GAMMA, flexibility_slopes, modes_first, per_mode, thickness_slope

#: What a piece is made of, left and right each, and how many that are.
PLANES, DIAMETERS, BORES, PARTS = 0, 2, 4, 6


class PieceSlopes(NamedTuple):
    """How f and ln l of a source depend on its diameter D and bore b, and on the bore b_k of a receiver, (r, p, 2).

    df = rate_d dD + rate_b db,  d ln l = (d - 2 w b b_k / D) dD + (b + w b_k) db + w b db_k. Left and right last.
    """

    rate_d: Array
    rate_b: Array
    d: Array
    b: Array
    w: Array
    diameter: Array
    bore: Array


def piece_slopes(of: Pieces) -> PieceSlopes:
    """For all pieces, rows as in `Fields`."""
    d = modes_first(np.stack((of.diameter_left, of.diameter_right), axis=-1))
    b = modes_first(np.stack((of.bore_left, of.bore_right), axis=-1))
    rate_d, rate_b = flexibility_slopes(d, b, of.poisson[..., None])
    mu, gamma = b / d, per_mode(GAMMA, d)
    thinner = thickness_slope(mu) / d
    w = (per_mode(BETA, d) + gamma) / d**2
    by_d, by_b = 1 / d - thinner * mu + 2 * gamma * mu**2 / d, thinner - 2 * gamma * mu / d
    shape = (-1, len(of.cuts.segment), 2)
    every = (4, *of.left.shape[1:], 2)
    return PieceSlopes(*(np.broadcast_to(a, every).reshape(shape) for a in (rate_d, rate_b, by_d, by_b, w, d, b)))


class Fall(NamedTuple):
    """Fields at places, (q,): s / l, the integral of g up to there, g, the value f g, its slope by ln s and by x."""

    u: Array
    gathered: Array
    g: Array
    value: Array
    by_log: Array
    by_x: Array


class FieldSlopes:
    """Slopes of lumps with respect to the parts of pieces, gathered entry by entry."""

    def __init__(self, fields: Fields, of: Pairs, found: Intervals, lump: Ints, lumps: int) -> None:
        """Prepare for intervals whose surplus goes to `lump`, one of so many in each row."""
        self.fields, self.of, self.found, self.lumps = fields, of, found, lumps
        self.y = fields.y[of.row[found.first]]
        self.lump = of.row[found.first] * lumps + lump
        self.slopes = piece_slopes(fields.pieces)
        self.index: list[Ints] = []
        self.amount: list[Array] = []

    def by_pieces(self) -> Array:
        """Slopes with respect to the planes, diameters and bores of the pieces, (r, lumps, p, 6)."""
        found = self.found
        begin, end = (self._fall(found.first, x) for x in (found.begin, found.end))
        self._between(begin, end)
        self._levels()
        self._carried(-self.y, begin, found.begin, found.before, PLANES)
        self._carried(self.y, end, found.end, found.after, PLANES + 1)
        shape = (self.fields.rows, self.lumps, self.fields.size, PARTS)
        index, amount = np.concatenate(self.index), np.concatenate(self.amount)
        return np.bincount(index, amount, int(np.prod(shape))).reshape(shape).astype(np.float64)

    def _add(self, lump: Ints, piece: Ints, part: int | Ints, amount: Array) -> None:
        self.index.append((lump * self.fields.size + piece) * PARTS + part)
        self.amount.append(amount)

    def _fall(self, pair: Ints, x: Array) -> Fall:
        of = self.of
        p, m, away = of.p[pair], self.fields.m[of.row[pair]], x - of.plane[pair]
        u = np.maximum(away * of.sign[pair], 0) * of.near[pair] ** (1 / p)
        power = u**p
        g = (1 + power) ** (-1 / m)
        value = self._rate(pair) * g
        by_log = -p / m * power / (1 + power) * value
        return Fall(u, gathered(u, p), g, value, by_log, safe_ratio(by_log, away))

    def _rate(self, pair: Ints) -> Array:
        at = (self.of.row[pair], self.of.source[pair])
        return np.where(self.of.sign[pair] > 0, self.fields.rate_right[at], self.fields.rate_left[at])

    def _between(self, begin: Fall, end: Fall) -> None:
        """Of the integrals of f g between fixed ends."""
        pair = self.found.first
        along = self.y * self.of.near[pair] ** (-1 / self.of.p[pair]) * self.of.sign[pair]
        by_rate = along * (end.gathered - begin.gathered)
        by_reach = by_rate - along * (end.u * end.g - begin.u * begin.g)
        self._use(pair, self.lump, by_rate, by_reach * self._rate(pair), self.y * (begin.value - end.value))

    def _levels(self) -> None:
        """Of the integrals of the receivers' own flexibility between fixed ends."""
        fields, pair = self.fields, self.found.first
        at = row, receiver = self.of.row[pair], self.of.receiver[pair]
        x, weights = gauss(self.found.begin, self.found.end)
        share = fields.share(row, receiver, x)
        if fields.tapered:
            _, by_d, by_b = fields.level(row, receiver, x)
        else:
            by_d, by_b = self.slopes.rate_d[at][:, 0], self.slopes.rate_b[at][:, 0]
        for part, slope in ((DIAMETERS, by_d), (BORES, by_b)):
            self._add(self.lump, receiver, part, -self.y * (weights * (1 - share) * slope).sum(axis=0))
            self._add(self.lump, receiver, part + 1, -self.y * (weights * share * slope).sum(axis=0))
        if fields.tapered:
            self._stretched(x, weights, share)

    def _stretched(self, x: Array, weights: Array, share: Array) -> None:
        """A slice of a cone that is moved or stretched carries its level along."""
        fields, pair = self.fields, self.found.first
        row, receiver = self.of.row[pair], self.of.receiver[pair]
        slope = fields.level_along(row, receiver, x)[1] * weights * self.y
        self._add(self.lump, receiver, PLANES, (slope * (1 - share)).sum(axis=0))
        self._add(self.lump, receiver, PLANES + 1, (slope * share).sum(axis=0))

    def _carried(self, y: Array, fall: Fall, x: Array, kind: Ints, plane: int) -> None:
        """What the ends of the intervals carry along; y is negative where they begin."""
        of, pair = self.of, self.found.first
        at = (of.row[pair], of.receiver[pair])
        level = self.fields.level(*at, x)[0] if self.fields.tapered else self.fields.rate_left[at]
        excess = y * (fall.value - level)
        fixed, crossing = (kind == PLANE).nonzero()[0], (kind >= 0).nonzero()[0]
        self._add(self.lump[fixed], of.receiver[pair[fixed]], plane, excess[fixed])
        winner, rival, x, lump = pair[crossing], kind[crossing], x[crossing], self.lump[crossing]
        one, other = self._fall(winner, x), self._fall(rival, x)
        weight = -safe_ratio(excess[crossing], one.by_x - other.by_x)
        self._use(winner, lump, weight * one.g, -weight * one.by_log, -weight * one.by_x)
        self._use(rival, lump, -weight * other.g, weight * other.by_log, weight * other.by_x)

    def _use(self, pair: Ints, lump: Ints, rate: Array, reach: Array, plane: Array) -> None:
        """Slopes with respect to f, ln l and plane of fields, handed on to their pieces and the receivers' bores."""
        of = self.of
        side = (of.sign[pair] > 0).astype(np.intp)
        source, receiver, row = of.source[pair], of.receiver[pair], of.row[pair]
        at = PieceSlopes(*(values[row, source, side] for values in self.slopes))
        hollow = at.w * self.fields.bore[row, receiver]
        by_d = at.d - 2 * hollow * at.bore / at.diameter
        self._add(lump, source, PLANES + side, plane)
        self._add(lump, source, DIAMETERS + side, rate * at.rate_d + reach * by_d)
        self._add(lump, source, BORES + side, rate * at.rate_b + reach * (at.b + hollow))
        for part in (BORES, BORES + 1):
            self._add(lump, receiver, part, reach * at.w * at.bore / 2)


def safe_ratio(top: Array, bottom: Array) -> Array:
    """Divide top by bottom, 0 where the bottom is 0."""
    nothing = bottom == 0
    return np.asarray(np.where(nothing, 0, top) / np.where(nothing, 1, bottom))
