"""What every block of a printed result needs: the results, names that fit, units, and who stands where."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from fe_shaft.model.case import ONLY_CASE
from fe_shaft.model.groups import CARRIERS
from fe_shaft.model.loads import Force, Mass
from fe_shaft.results.shown import Shown
from fe_shaft.results.words.wording import Names

if TYPE_CHECKING:
    from fe_shaft.results.results import Results

WORTH = 0.01  # of the largest movement: a part that moves less has no sentence of its own


@dataclass(frozen=True)
class Page:
    """What every block of a printed result needs.

    Attributes
    ----------
    on : names of the parts on each shaft, from left to right
    """

    results: Results
    shown: Shown
    on: dict[str, tuple[str, ...]]
    _names: dict[int, Names] = field(default_factory=dict)

    @classmethod
    def of(cls, results: Results) -> Page:
        """A page for some results."""
        on: dict[str, list[str]] = {name: [] for name in results.lines}
        places = results.model.places
        for name in sorted(results.parts, key=lambda each: places[each].x):
            on[places[name].shaft].append(name)
        return cls(results, Shown.of(results.model), {shaft: tuple(names) for shaft, names in on.items()})

    def names(self, width: int) -> Names:
        """Names of everything, at most `width` wide."""
        if width not in self._names:
            verdicts = (verdict.limit for verdict in self.results.verdicts)
            every = dict.fromkeys([*self.results.parts, *self.results.lines, *self.results.cases, *verdicts])
            self._names[width] = Names(every, width)
        return self._names[width]

    @property
    def several(self) -> bool:
        """Whether there are several shafts."""
        return len(self.results.lines) > 1

    def title(self, what: str, shaft: str, width: int) -> str:
        """Heading of a table, with the shaft where there are several."""
        return f"{what}, {self.names(width)[shaft]}" if self.several else what

    def in_case(self, case: str) -> str:
        """Such as " in case running"; nothing where the model writes no case."""
        return "" if (case,) == (ONLY_CASE,) else f" in case {self.names(24)[case]}"

    def heading(self, case: str) -> str:
        """Such as "Case running"."""
        return "As loaded" if case == ONLY_CASE else f"Case {self.names(40)[case]}"


def featured(page: Page) -> list[str]:
    """What the shaft is there for: gears and other carriers of power, else masses, else forces."""
    model = page.results.model
    for kinds in (CARRIERS, (Mass,), (Force,)):
        found = [name for names in page.on.values() for name in names if isinstance(model[name], kinds)]
        if found:
            return found
    return []
