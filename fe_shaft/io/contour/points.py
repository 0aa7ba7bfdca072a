"""Outlines to the points of a contour: outside and bore at each x, a step where they jump."""

from __future__ import annotations

import math
from bisect import bisect_left, bisect_right
from collections.abc import Sequence
from typing import Any, NamedTuple

from fe_shaft.io.contour.outline import Corner
from fe_shaft.units import FACTORS

GRID = 1e-9  # m: places are rounded to it, so that 19 mm is no 18.9999999999 mm


class _Line(NamedTuple):
    """An outline in whole grid steps."""

    x: list[int]
    y: list[int]
    fillet: list[float]

    def beside(self, x: int, side: int) -> tuple[float, float] | None:
        """Radius and fillet just left (side -1) or right (1) of x; None where the line is not."""
        k = bisect_left(self.x, x) if side < 0 else bisect_right(self.x, x) - 1
        there = self.x[0] < x <= self.x[-1] if side < 0 else self.x[0] <= x < self.x[-1]
        if not there:
            return None
        if self.x[k] == x:
            return self.y[k], self.fillet[k]
        first = k - 1 if side < 0 else k
        share = (x - self.x[first]) / (self.x[first + 1] - self.x[first])
        return self.y[first] + (self.y[first + 1] - self.y[first]) * share, 0.0


def points(outer: Sequence[Corner], bores: Sequence[Sequence[Corner]], unit: str) -> list[Any]:
    """The points of a contour as a model file states them; x counts from the left end.

    Parameters
    ----------
    outer, bores : corners from left to right, in units of the drawing
    unit : of the drawing
    """
    grid = GRID / FACTORS["length"][unit]
    left = outer[0].x
    outside, inside = _line(outer, left, grid), [_line(bore, left, grid) for bore in bores]
    out: list[Any] = []
    for x in sorted({*outside.x, *(x for line in inside for x in line.x)}):
        both = []
        for side in (-1, 1):
            found = outside.beside(x, side)
            if found is not None:
                bore = next((there[0] for line in inside if (there := line.beside(x, side))), 0.0)
                both.append((found[0], bore, found[1]))
        out += [_point(x, *one, grid, unit, bool(bores)) for one in dict.fromkeys(both)]
    return out


def _line(corners: Sequence[Corner], left: float, grid: float) -> _Line:
    x = [round((corner.x - left) / grid) for corner in corners]
    for k in range(1, len(x)):  # a face that leans by less than can be drawn
        x[k] = max(x[k], x[k - 1])
    return _Line(x, [round(corner.y / grid) for corner in corners], [corner.fillet for corner in corners])


def _point(x: int, radius: float, bore: float, fillet: float, grid: float, unit: str, hollow: bool) -> Any:
    """A point as a list, or as a table where it has a fillet."""
    named = {"x": _text(x * grid, unit), "diameter": _text(2 * radius * grid, unit)}
    if hollow:
        named["bore"] = _text(2 * bore * grid, unit)
    if fillet:
        return named | {"fillet": _text(fillet, unit)}
    return list(named.values())


def _text(number: float, unit: str) -> str:
    digits = max(0, math.ceil(-math.log10(GRID / FACTORS["length"][unit])))
    text = f"{number:.{digits}f}"
    return f"{text.rstrip('0').rstrip('.') if '.' in text else text} {unit}"
