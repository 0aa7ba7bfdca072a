"""Where the decayed flexibility of one piece is the largest: exact intervals of the maximum, and their integrals.

Within a piece the fields of all pieces to its left fall and those of all pieces to its right rise. As the powers V of
`field` have it, two fields from opposite sides, or a field and the level of a cylinder, cross once at most;
two from the same side cross twice at most, and then it is the nearer one that is larger in between. So the maximum is
found from the winners at both ends of each piece: where they differ, at their crossing, where a third winner splits the
interval; and where one wins at both ends, at the bulges of nearer ones. (Within one slice of a cone, whose level falls,
no bulges over the level are looked for.)
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import NamedTuple

import numpy as np

from fe_shaft.fem.shoulders.contour import Array, Bools, Ints
from fe_shaft.fem.shoulders.field import TINY, Fields, Inverse, Pairs, values

#: What bounds an interval, if not the rival pair: the plane of its piece, or a place free to move.
PLANE, FREE = -1, -2
#: A third field must win by this share to split an interval.
CLEARLY = 1e-13
#: Newton's step, as a share of the interval, after which it is as close as the numbers allow.
CLOSE = 1e-9
GAUSS_NODES, GAUSS_WEIGHTS = np.polynomial.legendre.leggauss(8)


class Intervals(NamedTuple):
    """Stretches of receivers, with the winners at their ends, (n,) each.

    Attributes
    ----------
    each : which crowded receiver
    begin, end : places
    first, last : winners there, pairs; the same once settled
    before, after : PLANE, FREE, or the rival that ends it, a pair
    """

    each: Ints
    begin: Array
    end: Array
    first: Ints
    last: Ints
    before: Ints
    after: Ints

    def where(self, these: Bools | Ints) -> Intervals:
        """Those chosen."""
        each, begin, end, first, last, before, after = self
        ends = first[these], last[these], before[these], after[these]
        return Intervals(each[these], begin[these], end[these], *ends)


def together(parts: Sequence[Intervals]) -> Intervals:
    """All intervals of some parts."""
    return Intervals(*(np.concatenate(of) for of in zip(*parts, strict=True)))


def maxima(fields: Fields, of: Pairs) -> Intervals:
    """The intervals in which a field exceeds the level of its receiver and all other fields."""
    done = [_alone(fields, of)]
    todo = _start(fields, of)
    while len(todo.each):
        settled = todo.first == todo.last
        crossed = _crossed(fields, of, todo.where(~settled))
        finished, split = _bulges(fields, of, todo.where(settled))
        done.append(finished)
        todo = together((crossed, split))
    return together(done)


def _alone(fields: Fields, of: Pairs) -> Intervals:
    """Fields that have only the level of a cylinder to exceed: up to where they have sunk to it."""
    pair = of.lonely
    at = (of.row[pair], of.receiver[pair])
    begin, end = fields.left[at], fields.right[at]
    sunk = _sunk(of, pair, fields.strong_left[at])
    rightwards = of.sign[pair] > 0
    plane = np.full(len(pair), PLANE)
    before = np.where(rightwards | (sunk <= begin), PLANE, FREE)
    after = np.where(rightwards & (sunk < end), FREE, PLANE)
    begin, end = np.where(rightwards, begin, np.maximum(sunk, begin)), np.where(rightwards, np.minimum(sunk, end), end)
    return Intervals(plane, begin, end, pair, pair, before, after).where(end > begin)


def _sunk(of: Pairs, pair: Ints, level: Array) -> Array:
    """Where a field sinks to the level of a cylinder: 1 + near s^p = strong / level."""
    above = np.maximum(of.strong[pair] / level - 1, 0)
    return np.asarray(of.plane[pair] + of.sign[pair] * (above / of.near[pair]) ** (1 / of.p[pair]))


def _start(fields: Fields, of: Pairs) -> Intervals:
    """Winners at both planes of the crowded receivers, those left out where the level wins at both."""
    own = of.crowd[:, 0]
    each, at = np.arange(len(own)), (of.row[own], of.receiver[own])
    begin, end = fields.left[at], fields.right[at]
    entering, leaving = (values(fields, of, each, x) for x in (begin, end))
    first, last = entering.argmax(axis=1), leaving.argmax(axis=1)
    if fields.tapered:
        first, last = _past_equals(entering, leaving, first), _past_equals(leaving, entering, last)
    first, last, plane = of.crowd[each, first], of.crowd[each, last], np.full(len(each), PLANE)
    return Intervals(each, begin, end, first, last, plane, plane).where((first != own) | (last != own))


def _past_equals(here: Array, there: Array, winner: Ints) -> Ints:
    """Where a slice of a cone begins, the one before is its equal, and soon the stronger."""
    if here.shape[1] == 1:
        return winner
    other = here[:, 1:].argmax(axis=1) + 1
    equal = here[np.arange(len(here)), other] >= here[:, 0] * (1 - CLEARLY)
    return np.where((winner == 0) & equal & (there[:, 0] < here[:, 0]), other, winner)


def _crossed(fields: Fields, of: Pairs, these: Intervals) -> Intervals:
    """Cut at the crossings of the two winners, or where a third wins there, between each and the third."""
    if not len(these.each):
        return these
    first, last = these.first, these.last
    x = _crossing(fields, of, these)
    third, most = _largest(fields, of, these.each, x)
    known = 1 / np.minimum(*(Inverse(fields, of, pair).at(x)[0] for pair in (first, last)))
    split = (most > known * (1 + CLEARLY)) & (x > these.begin) & (x < these.end)
    # a field that has sunk to the level leaves nothing at its end, which is then free to move
    after = np.where(split | (of.sign[last] == 0), FREE, last)
    before = np.where(split | (of.sign[first] == 0), FREE, first)
    left = these._replace(end=x, last=np.where(split, third, first), after=after)
    right = these._replace(begin=x, first=np.where(split, third, last), before=before)
    both = together((left, right))
    return both.where((both.end > both.begin) & ((of.sign[both.first] != 0) | (of.sign[both.last] != 0)))


def _largest(fields: Fields, of: Pairs, each: Ints, x: Array) -> tuple[Ints, Array]:
    """The largest pair at x, and its V."""
    found = values(fields, of, each, x)
    column = found.argmax(axis=1)
    return of.crowd[each, column], found[np.arange(len(each)), column]


def _crossing(fields: Fields, of: Pairs, these: Intervals) -> Array:
    """Where the winners of both ends are equal."""
    level = (of.sign[these.first] == 0) | (of.sign[these.last] == 0)
    if fields.tapered:
        return _root(fields, of, these, level)
    x = np.empty(len(level))
    sunk, crossed = level.nonzero()[0], (~level).nonzero()[0]
    x[sunk] = _sunk_within(of, these.where(sunk))
    if len(crossed):
        x[crossed] = _root(fields, of, these.where(crossed), level[crossed])
    return x


def _sunk_within(of: Pairs, these: Intervals) -> Array:
    field = np.where(of.sign[these.first] == 0, these.last, these.first)
    sunk = _sunk(of, field, of.strong[of.crowd[these.each, 0]])
    return np.clip(sunk, these.begin, these.end)


def _root(fields: Fields, of: Pairs, these: Intervals, level: Bools) -> Array:
    """Crossings by Newton's method between bounds; `level`: one of the two is the receiver's own level."""
    winning, coming = Inverse(fields, of, these.first), Inverse(fields, of, these.last)
    low, high = these.begin, these.end
    width = high - low

    def excess(x: Array) -> tuple[Array, Array]:
        """Positive left of the crossing."""
        one, other = winning.at(x), coming.at(x)
        return other[0] - one[0], other[1] - one[1]

    at_low, at_high = excess(low)[0], excess(high)[0]
    x = low + width * np.clip(at_low / np.maximum(at_low - at_high, TINY), 0, 1)
    x = np.where(level, np.where(of.sign[these.first] == 0, low, high), x)  # at the other end they may be equal, too
    for _ in range(100):
        value, slope = excess(x)
        low, high = np.where(value > 0, x, low), np.where(value > 0, high, x)
        with np.errstate(divide="ignore", invalid="ignore"):
            new = x - value / slope
        new = np.where((new >= low) & (new <= high), new, (low + high) / 2)
        moved, x = np.abs(new - x), new
        if not (moved > CLOSE * width).any():
            break
    return x


def _bulges(fields: Fields, of: Pairs, these: Intervals) -> tuple[Intervals, Intervals]:
    """Settled intervals, and those in which a piece between winner and receiver is the larger somewhere.

    Of two from one side, far and near by, the near one is the largest against the far one where their slopes agree.
    """
    n, near_by = _between(of, these)
    far = these.first[n]
    p = of.p[far]
    steeper = (of.near[near_by] * of.strong[far] / (of.near[far] * of.strong[near_by])) ** (1 / (p - 1)) - 1
    apart = (of.plane[near_by] - of.plane[far]) / np.where(steeper > 0, steeper, TINY)
    x = of.plane[near_by] + apart
    inside = ((x > these.begin[n]) & (x < these.end[n])).nonzero()[0]
    if not len(inside):
        return these, these.where(inside)
    return _split_at_bulges(fields, of, these, n[inside], x[inside], near_by[inside])


def _between(of: Pairs, these: Intervals) -> tuple[Ints, Ints]:
    """Intervals, and all weaker pairs nearer by than their winner on its side."""
    crowd, winner = of.crowd[these.each], these.first[:, None]
    sign = of.sign[winner]
    weaker = (of.strong[crowd] < of.strong[winner]) & (of.sign[crowd] == sign) & (of.strong[crowd] > 0)
    n, column = (weaker & ((of.plane[crowd] - of.plane[winner]) * sign > 0)).nonzero()
    return n, crowd[n, column]


def _split_at_bulges(
    fields: Fields, of: Pairs, these: Intervals, n: Ints, x: Array, near_by: Ints
) -> tuple[Intervals, Intervals]:
    """Split interval n at x where the near field is larger there than the winner; the largest of each interval."""
    over, under = (Inverse(fields, of, pair).at(x)[0] for pair in (these.first[n], near_by))
    lead = over / under
    order = np.argsort(-lead, kind="stable")
    order = order[lead[order] > 1 + CLEARLY]
    split, where = np.unique(n[order], return_index=True)
    x = x[order][where]
    kept = np.ones(len(these.each), dtype=bool)
    kept[split] = False
    cut = these.where(split)
    third, _ = _largest(fields, of, cut.each, x)
    free = np.full(len(split), FREE)
    halves = cut._replace(end=x, last=third, after=free), cut._replace(begin=x, first=third, before=free)
    return these.where(kept), together(halves)


def integral(fields: Fields, of: Pairs, these: Intervals) -> Array:
    """Integrate y times winner less level over each interval, (n,)."""
    pair = these.first
    p, row, source, sign, plane = of.p[pair], of.row[pair], of.source[pair], of.sign[pair], of.plane[pair]
    reach = of.near[pair] ** (-1 / p)
    begin, end = (np.maximum((x - plane) * sign, 0) / reach for x in (these.begin, these.end))
    rate = fields.rate_left[row, source]
    if fields.tapered:
        rate = np.where(sign > 0, fields.rate_right[row, source], rate)
    decayed = rate * reach * sign * (gathered(end, p) - gathered(begin, p))
    return np.asarray(fields.y[row] * (decayed - level_integral(fields, of, these)))


def gathered(u: Array, p: Array) -> Array:
    """Integral of g from 0 to u."""
    return np.asarray(u * (1 + u**p) ** (-1 / p))


def level_integral(fields: Fields, of: Pairs, these: Intervals) -> Array:
    """Integral of the receiver's own flexibility over each interval."""
    row, receiver = of.row[these.first], of.receiver[these.first]
    if not fields.tapered:
        return np.asarray(fields.rate_left[row, receiver] * (these.end - these.begin))
    x, weights = gauss(these.begin, these.end)
    return np.asarray((fields.level(row, receiver, x)[0] * weights).sum(axis=0))


def gauss(begin: Array, end: Array) -> tuple[Array, Array]:
    """Places and weights to integrate from begin to end, (8, ...)."""
    shape = (-1, *(1,) * begin.ndim)
    half = (end - begin) / 2
    return begin + half * (1 + GAUSS_NODES.reshape(shape)), half * GAUSS_WEIGHTS.reshape(shape)
