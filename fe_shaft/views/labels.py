"""Where labels go on the screen: near what they name, in the picture, none on another. Pixels in, pixels out."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]

MOST = 8  # labels of parts shown at a time
FARTHER = (0.0, 8.0, 16.0, 28.0, 44.0, 64.0, 90.0, 120.0, 160.0, 210.0)  # pixels beyond the distance wished for
GAP = 4.0  # pixels kept free around a label


@dataclass(frozen=True)
class Wish:
    """A label that wants a place.

    Parameters
    ----------
    anchor : (x, y) [px]
        What it names, from the lower left corner of the picture.
    size : (width, height) [px]
    away : (x, y)
        Direction in which the label would best go from its anchor; any length.
    reach : float [px]
        Distance from the anchor to the label's nearest edge that it would best keep.
    """

    anchor: tuple[float, float]
    size: tuple[float, float]
    away: tuple[float, float] = (0.0, 1.0)
    reach: float = 24.0


def place(
    wishes: Sequence[Wish], area: tuple[float, float, float, float], taken: Sequence[tuple[float, ...]] = ()
) -> list[tuple[float, float] | None]:
    """Lower left corners of the labels, in the order of the wishes; None where no free place is left.

    Parameters
    ----------
    wishes : sequence of Wish
        The first ones choose first.
    area : (left, bottom, right, top) [px]
        Labels stay inside.
    taken : sequence of (left, bottom, right, top) [px]
        Rectangles that labels keep clear of.
    """
    boxes = [np.asarray(box, dtype=float) for box in taken]
    placed: list[tuple[float, float] | None] = []
    for wish in wishes:
        corners, cost = _candidates(wish)
        size = np.asarray(wish.size)
        free = np.all(corners >= area[:2], axis=1) & np.all(corners + size <= area[2:], axis=1)
        for box in boxes:
            apart = (corners + size + GAP <= box[:2]) | (corners - GAP >= box[2:])
            free &= np.any(apart, axis=1)
        if not free.any():
            placed.append(None)
            continue
        best = corners[np.argmin(np.where(free, cost, np.inf))]
        boxes.append(np.concatenate([best, best + size]))
        placed.append((float(best[0]), float(best[1])))
    return placed


def leader_end(corner: tuple[float, float], size: tuple[float, float], anchor: tuple[float, float]) -> Floats:
    """Point of a label's edge from which its leader line goes to the anchor, (2,) [px]."""
    low = np.asarray(corner, dtype=float)
    high = low + np.asarray(size)
    return np.asarray(np.clip(np.asarray(anchor, dtype=float), low, high))


def shorten(text: str, longest: int) -> str:
    """Text cut in its middle, so that two names with the same beginning stay apart."""
    if len(text) <= longest:
        return text
    tail = (longest - 2) // 2
    return text[: longest - 2 - tail] + ".." + text[len(text) - tail :]


def _candidates(wish: Wish) -> tuple[Floats, Floats]:
    """Corners tried, (n, 2), and what each costs: far from the anchor, or off the direction wished for."""
    away = np.asarray(wish.away, dtype=float)
    norm = np.linalg.norm(away)
    best = np.arctan2(away[1], away[0]) if norm > 0 else np.pi / 2
    grid = np.meshgrid(np.linspace(-np.pi, np.pi, 37), wish.reach + np.array(FARTHER))
    turn, reach = (each.ravel() for each in grid)
    direction = np.stack([np.cos(best + turn), np.sin(best + turn)], axis=1)
    size = np.asarray(wish.size, dtype=float)
    # The label's middle lies so far out that its nearest edge keeps the reach.
    middle = np.asarray(wish.anchor) + direction * reach[:, None] + direction * size / 2
    return middle - size / 2, (reach - wish.reach) / 20.0 + 1.3 * np.abs(turn)
