"""Shoulders: the flexibility that the steps of a shaft add to its beam, as one lump per end of a segment.

A beam lets the whole of a larger section carry from the very plane of the step; the solid does not. `rule` has
the rule that says by how much, and its range. Cones are many small steps to it: the decaying field of every place of a
cone is compared with the cone's own flexibility, from plane to plane of its slices, so that a cone, the same cone in
several parts, and ever finer stairs give the same; a steep one grows into a shoulder, and a slender one has next to no
lump. How far a field of the lump's kind reaches, and so the place of a bending lump, is told in `bending_inwards`.
"""

from __future__ import annotations

from typing import NamedTuple, TypeVar

import numpy as np

from fe_shaft.fem.shoulders.contour import Array, Bools, Contour, Ints, Joined, joined
from fe_shaft.fem.shoulders.field import Fields, Pairs, pairs
from fe_shaft.fem.shoulders.maxima import Intervals, gauss, integral, maxima
from fe_shaft.fem.shoulders.pieces import (
    MIDDLE,
    EndPieces,
    Neighbours,
    Pieces,
    along,
    end_offsets,
    end_pieces,
    fourth_root,
    neighbours,
    pieces,
    ratio,
    slices_of,
)
from fe_shaft.fem.shoulders.rule import OFFSET, SECTION_FACTORS, A, M, flexibility

Values = TypeVar("Values", Array, Bools)

#: Segments and slices worked on at once: enough to fill the arrays, few enough to stay in the cache.
AT_ONCE = 6_000


class ShoulderLumps(NamedTuple):
    """What the shoulders add to the beams, (..., n, 2) each: at the left and the right end of every segment.

    Single lumps may be slightly negative, where a fillet gives more than the shoulder takes; so may, by 0.3 % of the
    beam's flexibility, be their sum. Beam and lumps together are always positive.

    Attributes
    ----------
    place : [length]
        Planes of the ends, from the shaft's left end: where torsion, axial and shear lumps act.
    bending_place : [length]
        Where the bending lumps act: inside the thinner segment.
    bending : [1/length^3]
        Over E: slope per moment.
    torsion : [1/length^3]
        Over G: twist per torque.
    axial : [1/length]
        Over E: extension per force.
    shear : [1/length]
        Over G: offset per shear force.
    """

    place: Array
    bending_place: Array
    bending: Array
    torsion: Array
    axial: Array
    shear: Array


def shoulder_lumps(contour: Contour) -> ShoulderLumps:
    """Lumps of all shafts of a contour, by a rule made for this project from its own solid solutions.

    Divide them by the E or G of their segments. Neighbours that continue each other count as one segment, and nothing
    happens at the plane between them.

    Parameters
    ----------
    contour : (..., n)
        Contours, not elements of a grid: one call per geometry.
    """
    whole = contour.flat
    v, n = whole.shape
    cones = whole.tapered
    size = n + slices_of(cones) * int(cones.sum())
    step = max(1, AT_ONCE // size)
    parts = [_lumps(whole.rows(first, first + step)) for first in range(0, max(v, 1), step)]
    inwards = np.concatenate([part[0] for part in parts])
    amounts = np.concatenate([part[1] for part in parts], axis=1)
    ends = np.cumsum(whole.length, axis=1)
    place = np.stack((ends - whole.length, ends), axis=-1)
    shape = (*contour.shape, 2)
    bending_place = place + inwards * np.array((1.0, -1.0))
    return ShoulderLumps(place.reshape(shape), bending_place.reshape(shape), *(mode.reshape(shape) for mode in amounts))


def _lumps(contour: Contour) -> tuple[Array, Array]:
    """Distance of the bending lumps from their planes (v, n, 2) and amounts (4, v, n, 2) of a contour (v, n)."""
    joint = joined(contour)
    if joint is None:
        return _of_joined(contour)
    inwards, amounts = _of_joined(joint.contour)
    return spread(inwards, joint, contour.shape), spread(amounts, joint, contour.shape)


def spread(values: Values, joint: Joined, shape: tuple[int, ...]) -> Values:
    """From the ends of joined segments, (..., v, m, 2), to those of the given ones, (..., v, n, 2)."""
    out: Values = np.zeros((*values.shape[:-3], *shape, 2), dtype=values.dtype)
    for side, segment in enumerate((joint.left, joint.right)):
        out[..., joint.row, segment, side] = values[..., joint.row, joint.run, side]
    return out


def _of_joined(contour: Contour) -> tuple[Array, Array]:
    """The same as `_lumps` where nothing is left to join."""
    at = neighbours(contour)
    ends = end_pieces(at)
    parts = pieces(contour, ends)
    amounts = _surplus(parts, contour.shape)
    if ends is not None:
        amounts += _own_material(contour, ends, parts)
    amounts *= SECTION_FACTORS[:, None, None, None]
    return bending_inwards(contour, at), amounts


def _surplus(parts: Pieces, shape: tuple[int, ...]) -> Array:
    """Surplus that each end of each segment causes, (4, v, n, 2)."""
    fields = Fields(parts)
    of = pairs(fields)
    found = maxima(fields, of)
    v, n = shape
    at = of.row[found.first] * (2 * n) + lump_of(parts, of, found)
    return np.bincount(at, integral(fields, of, found), 8 * v * n).reshape(4, v, n, 2).astype(np.float64)


def lump_of(parts: Pieces, of: Pairs, found: Intervals) -> Ints:
    """The segment end, 2 k + side, that the surplus of each interval is put to.

    It is the side to which the field goes; in a cone the end that is nearer to the source.
    """
    cut, source = parts.cuts, of.source[found.first]
    twice_middle, rightwards = cut.first[source] + cut.last[source], of.sign[found.first] > 0
    return np.asarray(2 * cut.segment[source] + np.where(twice_middle == 1, rightwards, twice_middle > 1))


def _own_material(contour: Contour, ends: EndPieces, parts: Pieces) -> Array:
    """Flexibility of the pieces at the ends beyond that of their segments, (4, v, n, 2)."""
    at = (parts.cuts.slot != MIDDLE).nonzero()[0]
    k, side = parts.cuts.segment[at], (parts.cuts.slot[at] > MIDDLE).astype(np.intp)
    if parts.tapered:
        more = _tapered_material(contour, ends, parts, at)
    else:
        plain = flexibility(contour.diameter_left[None, :, k], contour.bore_left[None, :, k], contour.poisson[:, k])
        more = (parts.right - parts.left)[..., at] * (parts.rate_left[..., at] - plain)
    to_ends = np.eye(2 * contour.shape[1])[2 * k + side]
    return np.asarray(more @ to_ends).reshape(4, *contour.shape, 2)


def _tapered_material(contour: Contour, ends: EndPieces, parts: Pieces, at: Ints) -> Array:
    """The same of pieces `at` where segments are tapered, (4, v, q), by Gauss points."""
    k = parts.cuts.segment[at]
    length, d_left, d_right, b_left, b_right = (values[:, k] for values in contour.arrays[:5])
    origin = (np.cumsum(contour.length, axis=1) - contour.length)[:, k]
    x, weights = gauss(parts.left[..., at], parts.right[..., at])
    more_d, more_b = (of[..., at] for of in end_offsets(ends, parts.cuts))
    out, nu = np.zeros(x.shape[1:]), contour.poisson[:, k]
    for place, weight in zip(x - origin, weights, strict=True):
        d, b = along(length, d_left, d_right, place), along(length, b_left, b_right, place)
        out += weight * (flexibility(d + more_d, b + more_b, nu) - flexibility(d, b, nu))
    return out


class Beyond(NamedTuple):
    """The far end of each neighbour, (v, n, 2) each: its diameter there, and its length."""

    diameter: Array
    length: Array


def _beyond(at: Neighbours) -> Beyond:
    far, diameter, length = at.diameter[..., ::-1], at.next_diameter.copy(), np.ones_like(at.length)
    diameter[:, 1:, 0], length[:, 1:, 0] = far[:, :-1, 1], at.length[:, :-1, 1]
    diameter[:, :-1, 1], length[:, :-1, 1] = far[:, 1:, 0], at.length[:, 1:, 0]
    return Beyond(diameter, length)


def seen_diameter(contour: Contour, at: Neighbours) -> Array:
    """The neighbour's diameter that a bending lump sees, (v, n, 2): a cone's, as deep inside as the field reaches."""
    if not contour.tapered.any():
        return at.next_diameter
    beyond, depth = _beyond(at), A[0] * at.diameter
    share = depth / fourth_root(depth, beyond.length)
    return np.asarray(at.next_diameter + (beyond.diameter - at.next_diameter) * share)


def seen_slopes(at: Neighbours) -> tuple[Array, Array, Array, Array]:
    """Slopes of `seen_diameter` by the neighbour's near and far diameter, its length, and the segment's diameter."""
    beyond, depth = _beyond(at), A[0] * at.diameter
    whole = fourth_root(depth, beyond.length)
    share, rise = depth / whole, (beyond.diameter - at.next_diameter) / whole**5
    return 1 - share, share, -rise * depth * beyond.length**3, rise * A[0] * beyond.length**4


def bending_inwards(contour: Contour, at: Neighbours) -> Array:
    """How far inside the thinner segment its bending lumps lie, (v, n, 2); less than half of its length.

    The shear warping of the thick section does not fit the thin one:
    z' = .030 D (1 + b/D)^3 s (D_n^2/D^2 - 1) / (a (1 - s^m)^(1/m) + .030), s = (D^4 - b^4)/(D_n^4 - b^4), with D_n the
    neighbour's diameter, and z = z' / (1 + z' / (L/2)).
    """
    d, seen = at.diameter, np.maximum(seen_diameter(contour, at), at.diameter)
    s = (d**4 - at.bore**4) / (seen**4 - at.bore**4)
    a, m = A[0], M[0]
    z = d * OFFSET * (1 + at.bore / d) ** 3 * s * ((seen / d) ** 2 - 1) / (a * (1 - s**m) ** (1 / m) + OFFSET)
    return ratio(z * at.length, at.length + 2 * z)
