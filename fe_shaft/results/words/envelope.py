"""The envelope: the largest values over all cases, each with the case that governs."""

from __future__ import annotations

from functools import cache, partial
from typing import TYPE_CHECKING

import numpy as np

from fe_shaft.results.movement import SupportMovement
from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.results.words.layout import Column, fitting, shortened, table
from fe_shaft.results.words.tables import noise
from fe_shaft.results.words.wording import number

if TYPE_CHECKING:
    from fe_shaft.results.words.page import Page


def envelope(page: Page) -> list[str]:
    """The largest values over all cases, each with its case."""
    results = page.results
    names = [name for on in page.on.values() for name in on]
    supports = [name for name in names if isinstance(results.parts[name], SupportMovement)]
    others = [name for name in names if name not in supports]
    wanted = {"deflection": names, "slope": others, "tilt": supports, "force": supports}
    shaft = {name: on for on, parts in page.on.items() for name in parts}
    quiet = cache(partial(noise, page))

    def largest(name: str, quantity: str) -> tuple[float, str]:
        """Largest size over the cases, and its case; 0 where it is rounding."""
        sizes = np.abs(np.asarray(results.parts[name].value(quantity)))
        k = int(sizes.argmax())
        loud = sizes[k] > quiet(shaft[name], k)[QUANTITIES[quantity].dimension]
        return float(sizes[k]) if loud else 0.0, results.cases[k]

    found = {quantity: {name: largest(name, quantity) for name in of} for quantity, of in wanted.items()}
    governing = {case for values in found.values() for value, case in values.values() if value}
    one = next(iter(governing)) if len(governing) == 1 else None

    def make(width: int, gap: int) -> list[str]:
        shown = page.names(width)
        sub = "" if one is None else f"all in {shown[one]}"
        columns = [Column(f"Largest of {len(results.cases)} cases", sub, tuple(shown[name] for name in names), "left")]
        for quantity, values in found.items():
            unit = page.shown.unit(quantity)
            cells = [values.get(name, (0.0, "")) for name in names]
            column = Column(
                "radial" if quantity == "deflection" else quantity,
                unit,
                tuple(number(value, unit) if value else "" for value, _ in cells),
            )
            if column.says_something:
                columns.append(column)
                if one is None:
                    columns.append(Column("in case", "", tuple(shown[case] if v else "" for v, case in cells), "left"))
        return table(columns, gap=gap) if len(columns) > 1 else []

    return shortened(fitting(make), len(names), 2)
