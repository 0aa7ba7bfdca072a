"""Two results side by side: rigid pins against the bearings as given, or one model against another."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING, Any

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import UsageError, nearest
from fe_shaft.results.quantity import QUANTITIES

if TYPE_CHECKING:
    from fe_shaft.results.results import Results

Array = NDArray[np.float64]


END_WORDS = {"low": "soft", "high": "stiff"}
#: Values below this share of the largest of their kind are rounding; results hold at least 1e-11.
ROUNDING = 1e-11


@dataclass(frozen=True)
class Mix:
    """The model with each estimated part at one end of its band."""

    ends: tuple[tuple[str, str], ...]
    results: Results

    @property
    def words(self) -> str:
        """Such as "lay_left stiff, lay_right soft"."""
        return ", ".join(f"{name} {END_WORDS[end]}" for name, end in self.ends)


@dataclass(frozen=True)
class Mixes:
    """All mixes of low and high that were solved.

    Attributes
    ----------
    low, high : every estimate at the same end
    corners : every mix solved, those two among them
    complete : whether that is every corner of the band
    """

    low: Mix
    high: Mix
    corners: tuple[Mix, ...]
    complete: bool


@dataclass(frozen=True)
class Row:
    """One quantity of one part in both results, (n_cases,) each, SI.

    Attributes
    ----------
    left, right : the two results (pins, bearings as given)
    low, high, worst : the right one over its estimates; None where nothing is estimated
    worst_mix : words, one a case
    rounding : size below which a value of this kind is nothing but rounding
    """

    part: str
    quantity: str
    left: Array
    right: Array
    low: Array | None = None
    high: Array | None = None
    worst: Array | None = None
    worst_mix: tuple[str, ...] = ()
    rounding: Array | float = 0.0

    @property
    def difference(self) -> Array:
        """Right minus left."""
        return self.right - self.left

    @property
    def ratio(self) -> Array:
        """Right over left; NaN where the left one is nothing, by itself or against the right one."""
        nothing = np.abs(self.left) <= np.maximum(self.rounding, 1e-9 * np.abs(self.right))
        return np.asarray(np.where(nothing, np.nan, self.right / np.where(nothing, 1.0, self.left)))

    @property
    def share(self) -> Array:
        """Share of the right value that is not in the left one: what bearings and seats make."""
        nothing = np.abs(self.right) <= self.rounding
        return np.asarray(np.where(nothing, 0.0, 1 - self.left / np.where(nothing, 1.0, self.right)))


@dataclass(frozen=True)
class Comparison:
    """Two results of the same parts and cases, side by side.

    Attributes
    ----------
    left, right : results; for one model the left one stands on rigid pins
    titles : of the two columns
    rows : every quantity of every common part
    mixes : the right model over the band of its estimates, None where nothing is estimated
    changes : what differs between two models, in words
    """

    left: Results
    right: Results
    titles: tuple[str, str]
    rows: tuple[Row, ...]
    mixes: Mixes | None = None
    changes: tuple[str, ...] = ()

    @property
    def cases(self) -> tuple[str, ...]:
        """Names of the cases."""
        return self.right.cases

    @property
    def is_pins(self) -> bool:
        """Whether the left one stands on rigid pins."""
        return self.titles[0] == "pins"

    def row(self, address: str) -> Row:
        """A row by its address, such as "wheel.deflection"."""
        part, _, quantity = address.rpartition(".")
        for row in self.rows:
            if (row.part, row.quantity) == (part, quantity):
                return row
        known = (f"{row.part}.{row.quantity}" for row in self.rows)
        raise UsageError(f'the comparison has no row "{address}". {nearest(address, known)}'.rstrip())

    def __iter__(self) -> Iterator[Row]:
        return iter(self.rows)

    def __str__(self) -> str:
        from fe_shaft.results.text import comparison_text

        return comparison_text(self)

    def _repr_html_(self) -> str:
        from fe_shaft.results.html import preformatted

        return preformatted(str(self))

    def to_dataframe(self) -> Any:
        """One row a part, quantity and case (needs pandas)."""
        from fe_shaft.results.table import comparison_table

        return comparison_table(self).to_dataframe()

    def to_csv(self) -> str:
        """The same table as CSV text."""
        from fe_shaft.results.table import comparison_table

        return comparison_table(self).to_csv()

    def to_json(self) -> str:
        """Both results and the rows as JSON text."""
        from fe_shaft.results.record import comparison_record, to_json

        return to_json(comparison_record(self))


def compared_quantities(kind: str) -> tuple[str, ...]:
    """What is compared of a part of a kind."""
    if kind == "support":
        return ("deflection", "axial", "tilt", "radial_force", "axial_force", "tilt_moment")
    return ("deflection", "axial", "slope", "twist")


def common_rows(left: Results, right: Results, mixes: Mixes | None) -> tuple[Row, ...]:
    """Rows of all parts and quantities that both results have."""
    rows = []
    for name, part in right.parts.items():
        if name not in left.parts:
            continue
        known = left.parts[name].quantities()
        rows += [_row(left, right, mixes, name, key) for key in compared_quantities(part.kind) if key in known]
    largest: dict[str, Array] = {}
    for row in rows:
        kind = QUANTITIES[row.quantity].dimension
        size = np.maximum(np.abs(row.left), np.abs(row.right))
        largest[kind] = np.maximum(largest[kind], size) if kind in largest else size
    return tuple(replace(row, rounding=ROUNDING * largest[QUANTITIES[row.quantity].dimension]) for row in rows)


def _row(left: Results, right: Results, mixes: Mixes | None, name: str, quantity: str) -> Row:
    def of(results: Results) -> Array:
        return np.asarray(results.parts[name].value(quantity))

    if mixes is None:
        return Row(name, quantity, of(left), of(right))
    corners = np.array([of(mix.results) for mix in mixes.corners])
    worst = np.abs(corners).argmax(axis=0)
    return Row(
        name,
        quantity,
        of(left),
        of(right),
        of(mixes.low.results),
        of(mixes.high.results),
        np.take_along_axis(corners, worst[None], axis=0)[0],
        tuple(mixes.corners[k].words for k in worst),
    )
