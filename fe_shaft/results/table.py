"""Tables of results with their units in the headings, for spreadsheets and data frames."""

from __future__ import annotations

import csv
import io
import math
from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import UsageError, nearest
from fe_shaft.model.groups import noun
from fe_shaft.results.movement import SupportMovement
from fe_shaft.results.of_shoulders import along_of_shoulders, of_shoulders
from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.results.shown import Shown
from fe_shaft.units import unit_factor

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Comparison
    from fe_shaft.results.results import Results

Array = NDArray[np.float64]
Cell = str | float | None
_FORMULA = ("=", "+", "-", "@", "\t", "\n")  # what spreadsheets take for the start of a formula
_FORCES = ("up_force", "front_force", "axial_force", "radial_force", "force", "tilt_moment")


@dataclass(frozen=True)
class Table:
    """Rows of words and numbers.

    Attributes
    ----------
    columns : headings; a number's unit stands behind its name: "deflection_um"
    rows : one cell a column; None where a quantity does not apply
    """

    columns: tuple[str, ...]
    rows: tuple[tuple[Cell, ...], ...]

    def __len__(self) -> int:
        return len(self.rows)

    def __iter__(self) -> Iterator[tuple[Cell, ...]]:
        return iter(self.rows)

    def column(self, name: str) -> tuple[Cell, ...]:
        """All cells of a column, by its heading."""
        if name not in self.columns:
            raise UsageError(f'the table has no column "{name}". {nearest(name, self.columns)}'.rstrip())
        k = self.columns.index(name)
        return tuple(row[k] for row in self.rows)

    def to_csv(self) -> str:
        """The table as CSV text (RFC 4180 with plain line feeds, decimal points); numbers with all their digits.

        Words that a spreadsheet would take for a formula get an apostrophe in front.
        """
        text = io.StringIO()
        writer = csv.writer(text, lineterminator="\n")
        writer.writerow([_harmless(name) for name in self.columns])
        writer.writerows([_cell(cell) for cell in row] for row in self.rows)
        return text.getvalue()

    def to_dataframe(self) -> Any:
        """The table as a pandas DataFrame.

        Raises
        ------
        UsageError
            pandas is not installed.
        """
        try:
            import pandas as pd
        except ImportError:
            raise UsageError(
                'a DataFrame needs pandas, which is not installed. Run   pip install "fe_shaft[table]"'
            ) from None
        return pd.DataFrame(list(self.rows), columns=list(self.columns))


def _cell(cell: Cell) -> str:
    if cell is None:
        return ""
    if isinstance(cell, str):
        return _harmless(cell)
    return repr(cell + 0.0) if math.isfinite(cell) else ""  # + 0.0: no minus zero


def _harmless(text: str) -> str:
    """Words as words; line ends are line feeds, and zero characters, which no spreadsheet reads, are left out."""
    text = text.replace("\0", "").replace("\r\n", "\n").replace("\r", "\n")
    return f"'{text}" if text.startswith(_FORMULA) else text


def movement_table(results: Results) -> Table:
    """All quantities of all parts: one row a part and case, in the units the model asks for.

    The last columns tell what of deflection, slope and twist the shoulders make; `shoulder_table` tells it of all.
    """
    shown = Shown.of(results.model)
    wanted = _wanted(results)
    made = {name: of_shoulders(results, name) for name in results.parts}
    columns = ("case", "part", "kind", "shaft", f"x_{shown.suffix('along')}", *map(shown.heading, wanted))
    told = [f"{key}_by_shoulders_{shown.heading(key).removeprefix(f'{key}_')}" for key in _MADE]
    rows = _rows_of_parts(results, shown, _all_quantities(results, results.parts), wanted)
    more = _rows_of_parts(results, shown, made, _MADE)
    return Table((*columns, *told), tuple((*row, *own[5:]) for row, own in zip(rows, more, strict=True)))


def shoulder_table(results: Results) -> Table:
    """How much of every quantity of every part is the shoulders' doing: rows and columns as in `movement_table`."""
    shown = Shown.of(results.model)
    wanted = _wanted(results)
    columns = ("case", "part", "kind", "shaft", f"x_{shown.suffix('along')}", *map(shown.heading, wanted))
    made = {name: of_shoulders(results, name) for name in results.parts}
    return Table(columns, tuple(_rows_of_parts(results, shown, made, wanted)))


def note_table(results: Results) -> Table:
    """What was taken and what is doubtful, among it shoulders beyond their rule: the key that changes it, and words."""
    return Table(("key", "note"), tuple((note.key, note.sentence) for note in results.notes))


def _wanted(results: Results) -> list[str]:
    """Every quantity that any part has."""
    kinds = [part.quantities() for part in results.parts.values()]
    return [name for name in QUANTITIES if any(name in quantities for quantities in kinds)]


def _all_quantities(results: Results, names: Iterable[str]) -> dict[str, dict[str, Array]]:
    parts = {name: results.parts[name] for name in names}
    return {name: {key: np.asarray(part.value(key)) for key in part.quantities()} for name, part in parts.items()}


def element_table(results: Results) -> Table:
    """Every ball and roller of the computed bearings: where it stands (clockwise from 12 o'clock), what it bears."""
    shown = Shown.of(results.model)
    force, pressure = shown.factor("force"), unit_factor("pressure", "MPa")
    degrees = unit_factor("angle", "deg")
    columns = ("case", "part", "element", "place_deg", f"load_{shown.suffix('force')}", "contact_deg", "pressure_MPa")
    rows: list[tuple[Cell, ...]] = []
    for k, case in enumerate(results.cases):
        for name, of in results.rolling.items():
            numbers = np.column_stack(
                [of.place / degrees, of.load[k] / force, of.angle[k] / degrees, of.pressure[k] / pressure]
            )
            rows += [(case, name, float(n), *row) for n, row in enumerate(numbers.tolist(), 1)]
    return Table(columns, tuple(rows))


def force_table(results: Results) -> Table:
    """What the supports carry, ON the shaft: one row a support and case."""
    shown = Shown.of(results.model)
    supports = [name for name, part in results.parts.items() if isinstance(part, SupportMovement)]
    columns = ("case", "part", "kind", "shaft", f"x_{shown.suffix('along')}", *map(shown.heading, _FORCES))
    return Table(columns, tuple(_rows_of_parts(results, shown, _all_quantities(results, supports), _FORCES)))


def _rows_of_parts(
    results: Results, shown: Shown, of: Mapping[str, Mapping[str, Array]], quantities: Sequence[str]
) -> Iterator[tuple[Cell, ...]]:
    """One row a part and case, case by case; `of` has the values [SI] by part and quantity."""
    model = results.model
    values = {name: _shown_values(shown, own, quantities) for name, own in of.items()}
    for k, case in enumerate(results.cases):
        for name in of:
            place = model.places[name]
            x = place.x / shown.factor("along")
            cells = (None if array is None else float(array[k]) for array in values[name])
            yield (case, name, noun(model[name]), place.shaft, x, *cells)


def _shown_values(shown: Shown, own: Mapping[str, Array], quantities: Sequence[str]) -> list[Array | None]:
    return [own[key] / shown.factor(QUANTITIES[key].dimension) if key in own else None for key in quantities]


def station_table(results: Results) -> Table:
    """Every station of every shaft: movements, and section forces just left and just right of it.

    The section forces N, V (towards 12 and 3 o'clock), T, M act on the face that looks to the right; M_up turns about
    the 12 o'clock axis, M_front about the 3 o'clock axis. The last columns: what of a movement the shoulders make.
    """
    shown = Shown.of(results.model)
    movement = ("axial", "up", "front", "twist", "deflection", "slope")
    force, moment = shown.suffix("force"), shown.suffix("moment")
    sections = [(f"{name}_{side}", dimension) for side in ("left", "right") for name, dimension in _SECTION]
    columns = (
        "case",
        "shaft",
        f"x_{shown.suffix('along')}",
        *map(shown.heading, movement),
        *(f"{name}_{force if dimension == 'force' else moment}" for name, dimension in sections),
        *(f"{name}_by_shoulders_{shown.suffix(dimension)}" for name, dimension in _BY_SHOULDERS),
    )
    length, angle = shown.factor("length"), shown.factor("angle")
    rows: list[tuple[Cell, ...]] = []
    for k, case in enumerate(results.cases):
        for shaft, line in results.lines.items():
            x = line.x / shown.factor("along")
            u = line.u[k] / np.repeat([length, angle], 3)
            radial, slope = line.deflection[k] / length, line.slope[k] / angle
            scale = np.repeat([shown.factor("force"), shown.factor("moment")], 3)
            left, right = line.force_left[k] / scale, line.force_right[k] / scale
            made = along_of_shoulders(results, shaft)[k, :, :4] / np.repeat([length, angle], (3, 1))
            numbers = np.column_stack([x, u[:, :4], radial, slope, left, right, made])
            rows += [(case, shaft, *row) for row in numbers.tolist()]
    return Table(columns, tuple(rows))


_MADE = ("deflection", "slope", "twist")
_BY_SHOULDERS = (("axial", "length"), ("up", "length"), ("front", "length"), ("twist", "angle"))
_SECTION = (
    ("axial_force", "force"),
    ("shear_up", "force"),
    ("shear_front", "force"),
    ("torque", "moment"),
    ("moment_up", "moment"),
    ("moment_front", "moment"),
)


def comparison_table(comparison: Comparison) -> Table:
    """Both results side by side: one row a part, quantity and case, each with its unit."""
    shown = Shown.of(comparison.right.model)
    left, right = (title.replace(" ", "_") for title in comparison.titles)
    with_band = comparison.mixes is not None
    band = ("all_low", "all_high", "worst", "worst_mix") if with_band else ()
    columns = ("case", "part", "quantity", "unit", left, right, "difference", "ratio", "share", *band)
    rows: list[tuple[Cell, ...]] = []
    for row in comparison.rows:
        unit = shown.unit(row.quantity)
        factor = shown.factor(QUANTITIES[row.quantity].dimension)
        arrays: list[Iterable[float] | None] = [row.left / factor, row.right / factor, row.difference / factor]
        arrays += [row.ratio, row.share]
        if with_band:
            arrays += [None if each is None else each / factor for each in (row.low, row.high, row.worst)]
        columns_of = [[None] * len(comparison.cases) if each is None else _finite(each) for each in arrays]
        for k, case in enumerate(comparison.cases):
            mix = (row.worst_mix[k] if row.worst_mix else None,) if with_band else ()
            rows.append((case, row.part, row.quantity, unit, *(cells[k] for cells in columns_of), *mix))
    return Table(columns, tuple(rows))


def _finite(values: Iterable[float]) -> list[float | None]:
    return [float(value) if math.isfinite(value) else None for value in values]
