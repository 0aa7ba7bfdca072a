"""The results of a model: look-up by the engineer's names, in all cases or in one."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass, field
from functools import cached_property
from typing import TYPE_CHECKING, Any

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import UsageError, nearest, quote
from fe_shaft.results.line import Line
from fe_shaft.results.parts import Parts
from fe_shaft.results.proof import Proof
from fe_shaft.results.quantity import QUANTITIES, Quantity
from fe_shaft.results.rolling import RollingElements
from fe_shaft.results.station import ShaftCase, ShaftResults
from fe_shaft.units import unit_factor

if TYPE_CHECKING:
    from fe_shaft.model.actions import Action
    from fe_shaft.model.notes import Note
    from fe_shaft.model.system import Model
    from fe_shaft.results.verdict import Verdict

Array = NDArray[np.float64]


@dataclass(frozen=True)
class Worst:
    """The governing value of a quantity over all cases."""

    value: float
    unit: str
    case: str
    of: str

    def __float__(self) -> float:
        return self.value


@dataclass(frozen=True)
class Results:
    """What came out of a model, in all its load cases.

    `results["wheel"]` gives arrays over the cases, `results.case("running")["wheel"]` floats.

    Attributes
    ----------
    model : as solved
    cases : names of the load cases, in the model's order
    lines : the bent shafts, by name
    parts : every part on a shaft, by name
    actions : what the parts do to their shafts
    proof : equilibrium, energy, residual, digits
    balances : what the solution adds to the model's notes: torques taken out, shoulders beyond their rule
    verdicts : of the model's limits
    rolling : what the balls or rollers of the computed bearings bear, by bearing
    solve_plain : solves the same model without its shoulders; None where none counts
    """

    model: Model
    cases: tuple[str, ...]
    lines: Mapping[str, Line]
    parts: Parts
    actions: tuple[Action, ...]
    proof: Proof
    balances: tuple[Note, ...] = ()
    verdicts: tuple[Verdict, ...] = ()
    rolling: Mapping[str, RollingElements] = field(default_factory=dict)
    solve_plain: Callable[[], Results] | None = field(default=None, repr=False, compare=False)

    @cached_property
    def plain(self) -> Results | None:
        """The same model as a plain beam, which lets every shoulder carry to its rim; None where no shoulder counts.

        It is solved when it is first asked for.
        """
        return None if self.solve_plain is None else self.solve_plain()

    @property
    def notes(self) -> tuple[Note, ...]:
        """What was not written and so taken, doubts, and torques that were balanced."""
        return (*self.model.notes, *self.balances)

    @property
    def beyond_range(self) -> tuple[Note, ...]:
        """Where the shoulders leave what their rule was made for."""
        return tuple(note for note in self.balances if note.key == "shoulders")

    def __getitem__(self, name: str) -> Any:
        if name in self.parts:
            return self.parts[name]
        if name in self.lines:
            return ShaftResults(name, self.lines[name], lambda place: self.model.position(place, name))
        raise UsageError(f'no part or shaft is called "{name}". {nearest(name, [*self.parts, *self.lines])}')

    def __iter__(self) -> Iterator[str]:
        return iter((*self.parts, *self.lines))

    def __contains__(self, name: object) -> bool:
        return name in self.parts or name in self.lines

    def __len__(self) -> int:
        return len(self.parts) + len(self.lines)

    def case(self, name: str | None = None) -> CaseResults:
        """One load case; the name may be left out where there is only one."""
        return CaseResults(self, self.case_number(name))

    def case_number(self, name: str | None = None) -> int:
        """Place of a case in `cases`."""
        if name is None:
            if len(self.cases) == 1:
                return 0
            raise UsageError(f"which case? One of {', '.join(self.cases)}.")
        if name not in self.cases:
            raise UsageError(f'no case is called "{name}". {nearest(name, self.cases)}')
        return self.cases.index(name)

    def value(self, address: str, case: str | None = None, unit: str | None = None) -> Any:
        """A quantity by its address ("wheel.deflection") in a unit of choice.

        Parameters
        ----------
        case : name; None gives an array over all cases
        unit : None gives the quantity's trade unit
        """
        quantity, values = self._look_up(address)
        shown = values / unit_factor(quantity.dimension, unit or quantity.unit)
        return shown if case is None else float(shown[self.case_number(case)])

    def by_shoulders(self, address: str, case: str | None = None, unit: str | None = None) -> Any:
        """How much of a quantity is the shoulders' doing: its value less that of the plain beam.

        Parameters
        ----------
        address : such as "wheel.deflection"
        case, unit : as in `value`
        """
        whole = self.value(address, case, unit)
        return whole - (whole if self.plain is None else self.plain.value(address, case, unit))

    def worst(self, address: str, unit: str | None = None) -> Worst:
        """The value that is largest in size over all cases, with its case."""
        quantity, values = self._look_up(address)
        k = int(np.abs(values).argmax())
        unit = unit or quantity.unit
        return Worst(float(values[k] / unit_factor(quantity.dimension, unit)), unit, self.cases[k], address)

    def _look_up(self, address: str) -> tuple[Quantity, Array]:
        name, _, key = address.rpartition(".")
        if not name:
            raise UsageError(f'{quote(address)} is not a part and its quantity. Write such as "wheel.deflection".')
        part = self[name]
        if isinstance(part, ShaftResults):
            known = [q for q in ("deflection", "slope") if q in QUANTITIES]
            if key in known:
                return QUANTITIES[key], part.largest(key)[0]
        else:
            known = list(part.quantities())
            if key in known:
                return QUANTITIES[key], np.asarray(part.value(key))
        raise UsageError(f'{name} has no quantity "{key}". {nearest(key, known)}')

    def __repr__(self) -> str:
        named = ", ".join([*self.cases[:4], *["..."] * (len(self.cases) > 4)])
        return f"Results({quote(self.model.title)}, cases: {named})"

    def __str__(self) -> str:
        from fe_shaft.results.text import results_text

        return results_text(self)

    def _repr_html_(self) -> str:
        from fe_shaft.results.html import preformatted

        return preformatted(str(self))

    def to_dataframe(self) -> Any:
        """All quantities of all parts: one row a part and case, columns with their units (needs pandas)."""
        from fe_shaft.results.table import movement_table

        return movement_table(self).to_dataframe()

    def to_csv(self) -> str:
        """The same table as CSV text."""
        from fe_shaft.results.table import movement_table

        return movement_table(self).to_csv()

    def to_json(self) -> str:
        """Everything as JSON text: movements, forces, stations, verdicts, notes, proof."""
        from fe_shaft.results.record import results_record, to_json

        return to_json(results_record(self))


@dataclass(frozen=True)
class CaseResults:
    """The results of one load case: floats by the engineer's names."""

    results: Results
    k: int

    @property
    def name(self) -> str:
        """Of the case."""
        return self.results.cases[self.k]

    def __str__(self) -> str:
        from fe_shaft.results.text import results_text

        return results_text(self.results, [self.name])

    def _repr_html_(self) -> str:
        from fe_shaft.results.html import preformatted

        return preformatted(str(self))

    def __getitem__(self, name: str) -> Any:
        part = self.results[name]
        return ShaftCase(part, self.k) if isinstance(part, ShaftResults) else part.in_case(self.k)

    def __iter__(self) -> Iterator[str]:
        return iter(self.results)

    def __contains__(self, name: object) -> bool:
        return name in self.results

    def __len__(self) -> int:
        return len(self.results)
