"""Segments cut into pieces: fillets, ends of bores, slices of cones. To the rule each is a segment of its own."""

from __future__ import annotations

from dataclasses import dataclass
from typing import NamedTuple

import numpy as np

from fe_shaft.fem.shoulders.contour import Array, Bools, Contour, Ints
from fe_shaft.fem.shoulders.rule import (
    BORE_LIMIT,
    FILLET_LIMIT,
    K_BORE,
    LAMBDA,
    NU,
    POWER_BORE,
    WIDEST_BORE,
    flexibility,
    modes_first,
    per_mode,
)

#: Slices of a cone, and of all cones of a shaft together: of very many, each is but a chord of a curve.
SLICES, ALL_SLICES = 16, 512
#: The part of a segment between what its two ends need.
MIDDLE = 3


class Neighbours(NamedTuple):
    """Both ends of each segment and what they face, (v, n, 2) each, left and right last; shaft ends face themselves.

    Attributes
    ----------
    length, diameter, bore, fillet : of the segment, at that end
    next_diameter, next_bore : of the neighbour, at the plane between them
    """

    length: Array
    diameter: Array
    bore: Array
    fillet: Array
    next_diameter: Array
    next_bore: Array


def neighbours(contour: Contour) -> Neighbours:
    """Ends of the segments of a contour (v, n)."""
    diameter = np.stack((contour.diameter_left, contour.diameter_right), axis=-1)
    bore = np.stack((contour.bore_left, contour.bore_right), axis=-1)
    fillet = np.stack((contour.fillet_left, contour.fillet_right), axis=-1)
    length = np.broadcast_to(contour.length[..., None], diameter.shape)
    return Neighbours(length, diameter, bore, fillet, _facing(diameter), _facing(bore))


def _facing(ends: Array) -> Array:
    out = ends.copy()
    out[:, 1:, 0] = ends[:, :-1, 1]
    out[:, :-1, 1] = ends[:, 1:, 0]
    return out


class EndPieces(NamedTuple):
    """What a shoulder makes of the end of a segment, (4, v, n, 2) each.

    Attributes
    ----------
    fillet, bore : lengths over which the diameter is larger, and the bore wider
    more_diameter, more_bore : by how much
    """

    fillet: Array
    bore: Array
    more_diameter: Array
    more_bore: Array


def limited(length: Array, limit: Array) -> Array:
    """Return length (1 + (length / limit)^4)^(-1/4), 0 where both are 0."""
    return ratio(length * limit, fourth_root(length, limit))


def fourth_root(one: Array, other: Array) -> Array:
    """(one^4 + other^4)^(1/4)."""
    return np.sqrt(np.sqrt((one * one) ** 2 + (other * other) ** 2))


def ratio(top: Array, bottom: Array) -> Array:
    """Divide top by bottom, 0 where both are 0."""
    return np.asarray(top / (bottom + (bottom == 0)))


def end_pieces(at: Neighbours) -> EndPieces | None:
    """Lengths and sections of the end pieces, None where all shoulders are sharp and all bores go on."""
    step = np.maximum(at.next_diameter - at.diameter, 0) / 2
    round_ones, wider = (step * at.fillet > 0).any(), (at.next_bore > at.bore).any()
    if not (round_ones or wider):
        return None
    none = np.zeros((4, *step.shape))
    fillet, more_diameter = _fillet(step, at.fillet, at.length) if round_ones else (none, none)
    bore, more_bore = _bore_end(at) if wider else (none, none)
    return EndPieces(fillet, bore, more_diameter, more_bore)


def _fillet(step: Array, radius: Array, length: Array) -> tuple[Array, Array]:
    """Length lambda r sqrt(h / (h + r/10)), limited, and 2 nu r h / (nu r + h) more of the diameter."""
    step, radius = step[None], radius[None]
    carried = per_mode(NU, step) * radius
    along = per_mode(LAMBDA, step) * radius * np.sqrt(ratio(step, step + radius / 10))
    return limited(along, FILLET_LIMIT * length), 2 * ratio(carried * step, carried + step)


def _bore_end(at: Neighbours) -> tuple[Array, Array]:
    """Length k_b b_w (1 - t), limited, and a bore of b_w (t + (1 - t)(1 - t^6))^(1/P), t = (b / b_w)^P."""
    wide = wider_bore(at)[None]
    power = per_mode(POWER_BORE, wide)
    t = np.where(wide > 0, ratio(at.bore[None], wide), 1.0) ** power
    along = limited(per_mode(K_BORE, wide) * wide * (1 - t), BORE_LIMIT * at.length)
    return along, wide * (t + (1 - t) * (1 - t**6)) ** (1 / power) - at.bore


def wider_bore(at: Neighbours) -> Array:
    """The neighbour's bore where it is wider, up to a share of the diameter; else the segment's own."""
    return np.maximum(at.bore, np.minimum(at.next_bore, WIDEST_BORE * at.diameter))


class Cuts(NamedTuple):
    """Where the segments of a contour (v, n) are cut: which piece is which part of which segment, (p,) each.

    Attributes
    ----------
    segment, slot : parent, and which of its seven parts: 3 its middle, below at its left end, above at its right end
    first, last : share of the part at which the piece begins and ends
    """

    segment: Ints
    slot: Ints
    first: Array
    last: Array


def cut_planes(length: Array, ends: EndPieces) -> Array:
    """The eight planes of the seven parts of each segment, from its left end, (4, v, n, 8).

    Inwards from a shoulder: both pieces, fillet only, bore only.
    """
    both = limited(ends.fillet, ends.bore)
    inwards = np.stack((np.zeros_like(both), both, ends.fillet, ends.fillet + ends.bore - both), axis=-1)
    planes = np.empty((*both.shape[:-1], 8))
    planes[..., :4] = inwards[..., 0, :]
    planes[..., 4:] = length[..., None] - inwards[..., 1, ::-1]
    return planes


def acting(length: Array, ends: EndPieces | None) -> Bools:
    """Which of the seven parts each segment has, (4, v, n, 7), however short they are."""
    out = np.zeros((4, *length.shape, 7), dtype=bool)
    out[..., MIDDLE] = length > 0
    if ends is not None:
        fillet, bore = ends.fillet > 0, ends.bore > 0
        for side, slots in enumerate(((0, 1, 2), (6, 5, 4))):
            for slot, part in zip(slots, (fillet & bore, fillet, bore), strict=True):
                out[..., slot] = part[..., side]
    return out


def cuts(acts: Bools, tapered: Bools) -> Cuts:
    """All middles, and the parts that any row has; middles of cones sliced, with a plane at each end."""
    kept = np.asarray(acts.any(axis=(0, 1)))
    kept[:, MIDDLE] = True
    segment, slot = kept.nonzero()
    if not tapered.any():
        return Cuts(segment, slot, np.zeros(len(segment)), np.ones(len(segment)))
    slices = slices_of(tapered)
    number = np.where(tapered[segment] & (slot == MIDDLE), slices + 2, 1)
    part = np.arange(len(segment)).repeat(number)
    step = np.arange(len(part)) - (np.cumsum(number) - number).repeat(number)
    sliced = (number > 1)[part]
    first = np.where(sliced, np.clip((step - 1) / slices, 0, 1), 0.0)
    last = np.where(sliced, np.clip(step / slices, 0, 1), 1.0)
    return Cuts(segment[part], slot[part], first, last)


def slices_of(tapered: Bools) -> int:
    """Slices of each cone. They hang on the number of cones only, so that nothing jumps where a size changes."""
    return int(min(SLICES, max(1, ALL_SLICES // max(1, int(tapered.sum())))))


@dataclass(frozen=True)
class Pieces:
    """Pieces of all shafts in all modes, left to right, (4, v, p) each where nothing else is said.

    Attributes
    ----------
    cuts : where they come from
    left, right : planes of each piece, from the shaft's left end
    diameter_left, diameter_right, bore_left, bore_right : (4 or 1, v, p)
        Left and right are the same array where nothing is tapered.
    poisson : (v, p)
    rate_left, rate_right : section flexibility at both planes
    acts : (4, v, p)
        False for pieces that only other rows have.
    tapered : whether any piece is a cone
    """

    cuts: Cuts
    left: Array
    right: Array
    diameter_left: Array
    diameter_right: Array
    bore_left: Array
    bore_right: Array
    poisson: Array
    rate_left: Array
    rate_right: Array
    acts: Bools
    tapered: bool


def pieces(contour: Contour, ends: EndPieces | None) -> Pieces:
    """Cut the segments of a contour (v, n)."""
    planes = None if ends is None else cut_planes(contour.length, ends)
    tapered, acts = contour.tapered, acting(contour.length, ends)
    cut = cuts(acts, tapered)
    k = cut.segment
    acts = acts[..., k, cut.slot]
    left, right = _planes(contour, planes, cut)
    more = (None, None) if ends is None else end_offsets(ends, cut)
    origin = np.cumsum(contour.length, axis=1) - contour.length
    poisson = contour.poisson[:, k]
    if not tapered.any():
        diameter = _section(contour.diameter_left[None, :, k], more[0])
        bore = _section(contour.bore_left[None, :, k], more[1])
        rate = flexibility(diameter, bore, poisson)
        left, right = (modes_first(plane + origin[:, k]) for plane in (left, right))
        return Pieces(cut, left, right, diameter, diameter, bore, bore, poisson, rate, rate, acts, False)
    d_left, d_right, b_left, b_right = (
        _section(along(contour.length[:, k], begin[:, k], end[:, k], at), extra)
        for begin, end, extra in (
            (contour.diameter_left, contour.diameter_right, more[0]),
            (contour.bore_left, contour.bore_right, more[1]),
        )
        for at in (left, right)
    )
    rates = flexibility(d_left, b_left, poisson), flexibility(d_right, b_right, poisson)
    left, right = (modes_first(plane + origin[:, k]) for plane in (left, right))
    return Pieces(cut, left, right, d_left, d_right, b_left, b_right, poisson, *rates, acts, True)


def _section(plain: Array, more: Array | None) -> Array:
    return plain if more is None else plain + more


def along(length: Array, begin: Array, end: Array, at: Array) -> Array:
    """Value at a distance from the left end of a line from begin to end."""
    return begin + (end - begin) * ratio(at, np.broadcast_to(length, at.shape))


def _planes(contour: Contour, planes: Array | None, cut: Cuts) -> tuple[Array, Array]:
    """Both planes of each piece from its segment's left end, (4 or 1, v, p)."""
    if planes is None:
        begin, end = np.zeros((1, contour.shape[0], len(cut.segment))), contour.length[None, :, cut.segment]
    else:
        begin, end = planes[..., cut.segment, cut.slot], planes[..., cut.segment, cut.slot + 1]
    width = end - begin
    left = np.where(cut.first == 1, end, begin + cut.first * width)
    return left, np.where(cut.last == 1, end, begin + cut.last * width)


#: Which of a segment's parts have the larger diameter of the left end, of the right end; and so the wider bore.
ROUNDED = np.array([[1, 1, 0, 0, 0, 0, 0], [0, 0, 0, 0, 0, 1, 1]])
WIDENED = np.array([[1, 0, 1, 0, 0, 0, 0], [0, 0, 0, 0, 1, 0, 1]])


def end_offsets(ends: EndPieces, cut: Cuts) -> tuple[Array, Array]:
    """Diameter and bore of each piece beyond those of its segment, (4, v, p) each."""
    side = (cut.slot > MIDDLE).astype(np.intp)
    rounded, widened = ROUNDED[side, cut.slot], WIDENED[side, cut.slot]
    return ends.more_diameter[..., cut.segment, side] * rounded, ends.more_bore[..., cut.segment, side] * widened
