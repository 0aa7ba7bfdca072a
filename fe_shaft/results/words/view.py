"""A comparison in one case: which rows say something, and how far they wander over the estimates."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import TYPE_CHECKING

import numpy as np

from fe_shaft.results.movement import SupportMovement
from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.results.words.page import WORTH, Page, featured
from fe_shaft.results.words.wording import NOTHING, plain
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Comparison, Row

#: Order of the table, and what each quantity is called in it.
WORDS = {
    "deflection": "radial",
    "axial": "axial",
    "slope": "slope",
    "tilt": "tilt",
    "twist": "twist",
    "radial_force": "radial force",
    "axial_force": "axial force",
    "tilt_moment": "moment",
}
REACTIONS = ("radial_force", "axial_force", "tilt_moment")
SAME = 5e-4  # relative: no difference in three digits
MOST_TOLD = 4  # parts in one sentence


@dataclass(frozen=True)
class View:
    """A comparison in one case."""

    comparison: Comparison
    page: Page
    k: int

    @cached_property
    def rows(self) -> list[Row]:
        """Rows that say something, by quantity and from left to right."""
        places = {name: n for n, name in enumerate(name for names in self.page.on.values() for name in names)}
        rank = {quantity: n for n, quantity in enumerate(WORDS)}
        found = [row for row in self.comparison.rows if self._tells(row)]
        return sorted(found, key=lambda row: (rank[row.quantity], places[row.part]))

    def _tells(self, row: Row) -> bool:
        left, right = abs(row.left[self.k]), abs(row.right[self.k])
        if max(left, right) <= NOTHING * self.largest[QUANTITIES[row.quantity].dimension]:
            return False
        if row.part not in self._featured and (row.quantity == "axial" or self._stands_beside(row.part)):
            return False
        return abs(row.difference[self.k]) > SAME * max(left, right) or self.spread(row) > SAME

    @cached_property
    def _featured(self) -> dict[str, tuple[str, float]]:
        """Shaft and place of what the shaft is there for."""
        places = self.comparison.right.model.places
        return {name: (places[name].shaft, places[name].x) for name in featured(self.page)}

    def _stands_beside(self, name: str) -> bool:
        """Whether a part moves as another one that says more: a load or a mass at the place of a carrier of power."""
        place = self.comparison.right.model.places[name]
        is_support = isinstance(self.comparison.right.parts[name], SupportMovement)
        return not is_support and (place.shaft, place.x) in self._featured.values()

    @cached_property
    def largest(self) -> dict[str, float]:
        """The largest value of each dimension in this case."""
        out: dict[str, float] = {}
        for row in self.comparison.rows:
            dimension = QUANTITIES[row.quantity].dimension
            out[dimension] = max(out.get(dimension, 0.0), abs(float(row.left[self.k])), abs(float(row.right[self.k])))
        return out

    def band(self, row: Row) -> tuple[float, float]:
        """Smallest and largest value as given and over all mixes that were solved."""
        corners = self.comparison.mixes.corners if self.comparison.mixes is not None else ()
        values = [float(mix.results.parts[row.part].value(row.quantity)[self.k]) for mix in corners]
        values.append(float(row.right[self.k]))
        return min(values), max(values)

    def spread(self, row: Row) -> float:
        """How far a value wanders over the mixes, relative to its size."""
        right = float(row.right[self.k])
        return max(abs(end - right) for end in self.band(row)) / max(abs(right), np.finfo(float).tiny)

    def value(self, row: Row, si: float) -> str:
        """A value with its unit."""
        return show(si, self.page.shown.unit(row.quantity))

    def title(self, side: int) -> str:
        """Heading of one of the two columns."""
        return plain(self.comparison.titles[side])[:12]

    def main_rows(self) -> list[Row]:
        """Radial movement of what the shaft is there for, the largest ones."""
        rows = [row for row in self.comparison.rows if row.quantity == "deflection" and row.part in self._featured]
        sizes = sorted((abs(float(row.right[self.k])) for row in rows), reverse=True)
        least = max(sizes[min(MOST_TOLD, len(sizes)) - 1], WORTH * sizes[0]) if sizes else 0.0
        return [row for row in rows if row.right[self.k] and abs(row.right[self.k]) >= least][:MOST_TOLD]


def percent(share: float) -> str:
    """A share as "87 %"."""
    return f"{show(100 * share, '', 2)} %"


def change(row: Row, k: int) -> float:
    """Relative change from left to right; 0 where the left one is nothing."""
    return float(row.difference[k] / row.left[k]) if row.left[k] else 0.0
