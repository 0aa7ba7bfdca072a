"""Exact slopes of the lumps with respect to every length, diameter, bore and fillet."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np

import fe_shaft.fem.shoulders.end_slopes as end
from fe_shaft.fem.shoulders.contour import Array, Contour, Ints, Joined, joined
from fe_shaft.fem.shoulders.field import Fields, pairs
from fe_shaft.fem.shoulders.field_slopes import BORES, DIAMETERS, PARTS, PLANES, FieldSlopes
from fe_shaft.fem.shoulders.lumps import lump_of, seen_diameter, seen_slopes
from fe_shaft.fem.shoulders.maxima import gauss, maxima
from fe_shaft.fem.shoulders.pieces import (
    MIDDLE,
    ROUNDED,
    WIDENED,
    EndPieces,
    Neighbours,
    Pieces,
    end_pieces,
    neighbours,
    pieces,
)
from fe_shaft.fem.shoulders.rule import SECTION_FACTORS, flexibility, flexibility_slopes

#: What the slopes are with respect to, in this order.
PARAMETERS = (
    "length",
    "diameter_left",
    "diameter_right",
    "bore_left",
    "bore_right",
    "fillet_left",
    "fillet_right",
)
LENGTH, DIAMETER, BORE, FILLET = 0, 1, 3, 5
#: Shafts worked on at once.
AT_ONCE = 16


class LumpSlopes(NamedTuple):
    """Slopes of `ShoulderLumps`, (..., n, 2, 7, n) each: [..., k, side, parameter, segment].

    The diameter of a cylinder is its left and its right one: add the two.
    """

    bending_place: Array
    bending: Array
    torsion: Array
    axial: Array
    shear: Array


def lump_slopes(contour: Contour) -> LumpSlopes:
    """Slopes of all lumps, and of the places of the bending lumps, of shafts of a contour (..., n).

    They are those of the contour as it is given: neighbours that are equal are two segments that can part, and each is
    then what limits the length of its own fillets. A sharp end has no slope by its fillet.
    """
    whole = contour.flat
    parts = [_slopes(whole.rows(first, first + AT_ONCE)) for first in range(0, max(len(whole.length), 1), AT_ONCE)]
    shape = (*contour.shape, 2, len(PARAMETERS), contour.shape[-1])
    place = np.concatenate([part[0] for part in parts]).reshape(shape)
    amounts = np.concatenate([part[1] for part in parts], axis=1)
    return LumpSlopes(place, *(mode.reshape(shape) for mode in amounts))


def _slopes(contour: Contour) -> tuple[Array, Array]:
    """Of a contour (v, n): bending places (v, n, 2, 7, n) and amounts (4, v, n, 2, 7, n)."""
    packed = joined(contour, equal=False)
    if packed is None:
        inwards, amounts = _of_packed(contour)
    else:
        inwards, amounts = (_unpacked(of, packed, contour.shape) for of in _of_packed(packed.contour))
    n = contour.shape[1]
    before = np.tri(n, n, -1)
    place = inwards * np.array((1.0, -1.0))[:, None, None]
    place[:, :, 0, LENGTH] += before
    place[:, :, 1, LENGTH] += before + np.eye(n)
    return place, amounts


def _unpacked(slopes: Array, packed: Joined, shape: tuple[int, ...]) -> Array:
    """From the segments that have a length, (..., v, m, 2, 7, m), to all, (..., v, n, 2, 7, n)."""
    back = np.zeros((*shape, slopes.shape[-1]))
    back[packed.row, packed.left, packed.run] = 1
    return np.asarray(np.einsum("...vmspq,vnm,vkq->...vnspk", slopes, back, back, optimize=True))


def _of_packed(contour: Contour) -> tuple[Array, Array]:
    v, n = contour.shape
    at = neighbours(contour)
    ends = end_pieces(at)
    parts = pieces(contour, ends)
    fields = Fields(parts)
    of = pairs(fields)
    found = maxima(fields, of)
    slopes = FieldSlopes(fields, of, found, lump_of(parts, of, found), 2 * n)
    by_pieces = slopes.by_pieces().reshape(4, v, 2 * n, -1, PARTS)
    amounts = _Chain(contour, parts).amounts(by_pieces, at, ends)
    amounts *= SECTION_FACTORS[:, None, None, None, None]
    return _inwards(contour, at), amounts.reshape(4, v, n, 2, len(PARAMETERS), n)


class _Chain:
    """From the parts of pieces to the segments that they were cut from; l lumps."""

    def __init__(self, contour: Contour, parts: Pieces) -> None:
        self.contour, self.parts = contour, parts
        self.cut, self.n = parts.cuts, contour.shape[1]
        k = self.segment = self.cut.segment
        self.parent = np.eye(self.n)[k]
        origin = (np.cumsum(contour.length, axis=1) - contour.length)[:, k]
        self.length = np.where(contour.length > 0, contour.length, 1)[:, k]
        self.share_left, self.share_right = (parts.left - origin) / self.length, (parts.right - origin) / self.length
        _, d_left, d_right, b_left, b_right = (values[:, k] for values in contour.arrays[:5])
        self.d_left, self.b_left, self.rise_d, self.rise_b = d_left, b_left, d_right - d_left, b_right - b_left

    def amounts(self, g: Array, at: Neighbours, ends: EndPieces | None) -> Array:
        """Slopes by parameters, (4, v, l, 7, n), from those by the parts of pieces, (4, v, l, p, 6)."""
        out = np.zeros((*g.shape[:3], len(PARAMETERS), self.n))
        left, right = np.zeros((2, *g.shape[:-1]))
        if ends is not None:
            self._material(g, left, right, out)
        self._lines(g, left, right, out)
        planes = self._planes(left, right)
        out[..., LENGTH, :] += planes[..., 4:].sum(axis=-1)
        if ends is not None:
            by_end = self._ends(g, planes, ends)
            total = sum(of[..., None] * by[:, :, None] for of, by in zip(by_end, end.end_slopes(at), strict=True))
            _add_ends(out, np.asarray(total))
        return out

    def _sum(self, by_piece: Array) -> Array:
        """Sum over the pieces of each segment, (..., p) to (..., n)."""
        return by_piece @ self.parent

    def _lines(self, g: Array, left: Array, right: Array, out: Array) -> None:
        """Through the line of the segment that a piece lies on, and the place of the segment in the shaft.

        Adds to `left` and `right` what comes by the planes of the pieces in their segments, (4, v, l, p).
        """
        x_left, x_right = g[..., PLANES], g[..., PLANES + 1]
        moved = self._sum(x_left + x_right)
        out[..., LENGTH, :] += moved.sum(axis=-1, keepdims=True) - np.cumsum(moved, axis=-1)
        left += x_left
        right += x_right
        far_left, far_right = self.share_left[:, :, None], self.share_right[:, :, None]
        for part, first, rise in ((DIAMETERS, DIAMETER, self.rise_d), (BORES, BORE, self.rise_b)):
            at_left, at_right = g[..., part], g[..., part + 1]
            out[..., first, :] += self._sum(at_left * (1 - far_left) + at_right * (1 - far_right))
            out[..., first + 1, :] += self._sum(at_left * far_left + at_right * far_right)
            grow = (rise / self.length)[:, None]
            out[..., LENGTH, :] -= self._sum(grow * (at_left * far_left + at_right * far_right))
            left += grow * at_left
            right += grow * at_right

    def _planes(self, left: Array, right: Array) -> Array:
        """Slopes by the eight planes between the parts of each segment, (4, v, l, n, 8)."""
        cut = self.cut
        planes = np.zeros((*left.shape[:3], self.n, 8))
        begin, end_ = left * (1 - cut.first) + right * (1 - cut.last), left * cut.first + right * cut.last
        for slot in np.unique(cut.slot):
            of_slot = self.parent * (cut.slot == slot)[:, None]
            planes[..., slot] += begin @ of_slot
            planes[..., slot + 1] += end_ @ of_slot
        return planes

    def _ends(self, g: Array, planes: Array, ends: EndPieces) -> tuple[Array, Array, Array, Array]:
        """Slopes by the lengths and offsets of the pieces at the ends, as in `EndPieces`, (4, v, l, n, 2) each."""
        outer, middle, inner = (planes[..., which] * (1, -1) for which in ((1, 6), (2, 5), (3, 4)))
        shared, fillet, bore = outer - inner, middle + inner, inner
        by_fillet, by_bore = (of[:, :, None] for of in end.limited_slopes(ends.fillet, ends.bore))
        more = []
        for part, which in ((DIAMETERS, ROUNDED), (BORES, WIDENED)):
            of_piece = g[..., part] + g[..., part + 1]
            more.append(np.stack([self._sum(of_piece * which[side, self.cut.slot]) for side in (0, 1)], axis=-1))
        return fillet + by_fillet * shared, bore + by_bore * shared, more[0], more[1]

    def _material(self, g: Array, left: Array, right: Array, out: Array) -> None:
        """What end pieces have beyond the flexibility of their segments.

        Adds to g what comes by the parts of the pieces, to `left` and `right` what by the ends of the replaced
        stretch, to `out` what by the line of the segment.
        """
        at = (self.cut.slot != MIDDLE).nonzero()[0]
        lump = 2 * self.segment[at] + (self.cut.slot[at] > MIDDLE)
        to = (slice(None), slice(None), lump, at)
        width, nu = (self.parts.right - self.parts.left)[..., at], self.parts.poisson[:, at]
        share, weights = (of[:, 0] for of in gauss(np.zeros(1), np.ones(1)))
        for t, weight in zip(share, weights, strict=True):
            self._piece(g, to, at, t, weight, width, nu)
            self._replaced(out, at, t, weight * width, nu)
        left[to] += flexibility(*self._line(at, 0.0), nu)
        right[to] -= flexibility(*self._line(at, 1.0), nu)

    def _piece(
        self, g: Array, to: tuple[slice | Ints, ...], at: Ints, t: float, weight: float, width: Array, nu: Array
    ) -> None:
        """One point of the integral of the pieces' own flexibility, at the share t."""
        of = self.parts
        d = (of.diameter_left + t * (of.diameter_right - of.diameter_left))[..., at]
        b = (of.bore_left + t * (of.bore_right - of.bore_left))[..., at]
        f, (by_d, by_b) = flexibility(d, b, nu), flexibility_slopes(d, b, nu)
        g[(*to, PLANES)] -= weight * f
        g[(*to, PLANES + 1)] += weight * f
        for part, slope in ((DIAMETERS, by_d), (BORES, by_b)):
            g[(*to, part)] += weight * (1 - t) * width * slope
            g[(*to, part + 1)] += weight * t * width * slope

    def _line(self, at: Ints, t: float) -> tuple[Array, Array]:
        """Diameter and bore of the segments themselves at the share t of pieces `at`."""
        far = self._far(at, t)
        return self.d_left[:, at] + far * self.rise_d[:, at], self.b_left[:, at] + far * self.rise_b[:, at]

    def _far(self, at: Ints, t: float) -> Array:
        return (self.share_left + t * (self.share_right - self.share_left))[..., at]

    def _replaced(self, out: Array, at: Ints, t: float, weight: Array, nu: Array) -> None:
        """One point of the integral of what the segments themselves would have there."""
        by_d, by_b = flexibility_slopes(*self._line(at, t), nu)
        far = self._far(at, t)
        by_length = far * (by_d * self.rise_d[:, at] + by_b * self.rise_b[:, at]) / self.length[:, at]
        lump, which = np.unique(2 * self.segment[at] + (self.cut.slot[at] > MIDDLE), return_inverse=True)
        to_lumps = np.eye(len(lump))[which]
        for parameter, slope in (
            (LENGTH, by_length),
            (DIAMETER, -by_d * (1 - far)),
            (DIAMETER + 1, -by_d * far),
            (BORE, -by_b * (1 - far)),
            (BORE + 1, -by_b * far),
        ):
            out[:, :, lump, parameter, lump // 2] += (weight * slope) @ to_lumps


def _add_ends(out: Array, total: Array) -> None:
    """From the ends of segments, (4, v, l, n, 2, 6), to the parameters of segments, (4, v, l, 7, n)."""
    out[..., LENGTH, :] += total[..., end.LENGTH].sum(axis=-1)
    for first, own, facing in (
        (DIAMETER, end.DIAMETER, end.NEXT_DIAMETER),
        (BORE, end.BORE, end.NEXT_BORE),
    ):
        for side in (0, 1):
            out[..., first + side, :] += total[..., side, own]
        out[..., first + 1, :-1] += total[..., 1:, 0, facing]
        out[..., first, 1:] += total[..., :-1, 1, facing]
    for side in (0, 1):
        out[..., FILLET + side, :] += total[..., side, end.FILLET]


def _inwards(contour: Contour, at: Neighbours) -> Array:
    """Slopes of how far inside the bending lumps lie, (v, n, 2, 7, n)."""
    v, n = contour.shape
    by_length, by_d, by_b, by_seen = end.inwards_slopes(at, seen_diameter(contour, at))
    by_next, by_beyond, by_across, by_own = (by_seen * of for of in seen_slopes(at))
    out = np.zeros((v, n, 2, len(PARAMETERS), n))
    k = np.arange(n)
    for side in (0, 1):
        out[:, k, side, LENGTH, k] += by_length[..., side]
        out[:, k, side, DIAMETER + side, k] += (by_d + by_own)[..., side]
        out[:, k, side, BORE + side, k] += by_b[..., side]
    for side, own, facing in ((0, k[1:], k[:-1]), (1, k[:-1], k[1:])):
        out[:, own, side, DIAMETER + 1 - side, facing] += by_next[:, own, side]
        out[:, own, side, DIAMETER + side, facing] += by_beyond[:, own, side]
        out[:, own, side, LENGTH, facing] += by_across[:, own, side]
    return out
