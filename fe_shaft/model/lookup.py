"""Looking things up in a model: parts by name, cases, places, frames, numbers."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping
from functools import cached_property
from types import MappingProxyType
from typing import Any, TypeVar

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import ModelError, nearest, quote
from fe_shaft.model.assembly import Assembly
from fe_shaft.model.case import Case
from fe_shaft.model.frame import Frame, gravity_vector
from fe_shaft.model.gear import Gear
from fe_shaft.model.heading import Heading
from fe_shaft.model.housing import Estimates, Housing, OutputUnits
from fe_shaft.model.limit import Limit
from fe_shaft.model.loads import Coupling, Force, Mass, Pulley, Sprocket
from fe_shaft.model.material import Material
from fe_shaft.model.part import Heavy, Part
from fe_shaft.model.position import Place, PositionKind
from fe_shaft.model.refusal import problem
from fe_shaft.model.segment_arrays import SegmentArrays
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.support import Support
from fe_shaft.model.words import Named
from fe_shaft.model.working import collar_of, thickest, working_arrays
from fe_shaft.units import Value

P = TypeVar("P", bound=Part)
Array = NDArray[np.float64]


class Lookup:
    """What can be asked of a model; `Model` makes it."""

    heading: Heading
    parts: tuple[Named, ...]
    supports: tuple[Support, ...]
    _assembly: Assembly

    # ---- the parts

    @property
    def title(self) -> str:
        """What the model is."""
        return self.heading.title

    @property
    def question(self) -> str:
        """What it shall answer."""
        return self.heading.question

    @property
    def gravity(self) -> str | tuple[Value, Value, Value] | None:
        """As written; see `gravity_vector`."""
        return self.heading.gravity

    @property
    def units(self) -> OutputUnits | None:
        """Units of the outputs, None for the trade units."""
        return self.heading.units

    @property
    def housing(self) -> Housing | None:
        """The housing; supports carry its seat already."""
        return self.heading.housing

    @property
    def shoulders(self) -> str:
        """Whether shoulders make the shafts softer: "on" or "off"."""
        return self.heading.shoulders

    @property
    def estimates(self) -> Estimates:
        """How estimates are varied."""
        return self.heading.estimates

    @property
    def shafts(self) -> tuple[Shaft, ...]:
        """The shafts, the first of which sets the origin."""
        return tuple(part for part in self.parts if isinstance(part, Shaft))

    @property
    def gears(self) -> tuple[Gear, ...]:
        """The gears."""
        return self._of(Gear)

    @property
    def forces(self) -> tuple[Force, ...]:
        """The forces."""
        return self._of(Force)

    @property
    def couplings(self) -> tuple[Coupling, ...]:
        """The couplings."""
        return self._of(Coupling)

    @property
    def pulleys(self) -> tuple[Pulley, ...]:
        """The pulleys."""
        return self._of(Pulley)

    @property
    def sprockets(self) -> tuple[Sprocket, ...]:
        """The sprockets."""
        return self._of(Sprocket)

    @property
    def masses(self) -> tuple[Mass, ...]:
        """The masses; other heavy parts are among `parts_on_shafts`."""
        return self._of(Mass)

    def _of(self, cls: type[P]) -> tuple[P, ...]:
        return tuple(part for part in self.parts_on_shafts if isinstance(part, cls))

    @cached_property
    def parts_on_shafts(self) -> tuple[Part, ...]:
        """Everything but the shafts; supports with their seats."""
        supports: dict[str, Part] = {support.name: support for support in self.supports}
        return tuple(supports.get(part.name, part) for part in self.parts if isinstance(part, Part))

    @property
    def cases(self) -> tuple[Case, ...]:
        """The cases, `like` followed to the end."""
        return tuple(self._assembly.cases.values())

    @property
    def limits(self) -> tuple[Limit, ...]:
        """The limits; `targets` says for which parts they hold."""
        return tuple(self._assembly.limits.values())

    @property
    def materials(self) -> Mapping[str, Material]:
        """Every material that a shaft or segment uses, by name."""
        return MappingProxyType(self._assembly.materials)

    def targets(self, limit: str) -> tuple[str, ...]:
        """Names of the parts for which a limit holds."""
        return self._assembly.targets[limit]

    def limit_cases(self, limit: str) -> tuple[str, ...]:
        """Names of the cases in which a limit holds."""
        return self._assembly.limits[limit].cases or tuple(self._assembly.cases)

    @cached_property
    def _by_name(self) -> dict[str, Any]:
        return {part.name: part for part in (*self.shafts, *self.parts_on_shafts)}

    def __getitem__(self, name: str) -> Any:
        """The shaft or part of that name; ModelError with the nearest name if there is none."""
        found = self._by_name.get(name)
        if found is None:
            raise ModelError(
                problem("", f"no part is called {quote(str(name))}. {nearest(str(name), self._by_name)}".rstrip())
            )
        return found

    def __contains__(self, name: object) -> bool:
        return name in self._by_name

    def __iter__(self) -> Iterator[str]:
        return iter(self._by_name)

    def __len__(self) -> int:
        return len(self._by_name)

    def case(self, name: str) -> Case:
        """The case of that name, `like` followed; ModelError with the nearest name if there is none."""
        cases = self._assembly.cases
        if name not in cases:
            raise ModelError(problem("", f"no case is called {quote(str(name))}. {nearest(str(name), cases)}".rstrip()))
        return cases[name]

    # ---- where everything is

    @property
    def places(self) -> Mapping[str, Place]:
        """Shaft, x and faces [m] of every part."""
        return MappingProxyType(self._assembly.places)

    @property
    def frames(self) -> Mapping[str, Frame]:
        """Frame of every shaft in model coordinates."""
        return MappingProxyType(self._assembly.frames)

    @property
    def segment_arrays(self) -> Mapping[str, SegmentArrays]:
        """Every shaft in numbers, as drawn."""
        return MappingProxyType(self._assembly.segment_arrays)

    @cached_property
    def working_arrays(self) -> Mapping[str, SegmentArrays]:
        """Every shaft in numbers as it works: with its hubs, keyways and splines."""
        drawn, parts = self._assembly.segment_arrays, self.parts_on_shafts
        of = {shaft.name: working_arrays(shaft, drawn[shaft.name], parts, self.places) for shaft in self.shafts}
        return MappingProxyType(of)

    @cached_property
    def hubs(self) -> tuple[str, ...]:
        """Names of the parts whose hubs could carry with their shafts: their size is known, and larger."""
        return tuple(part.name for part in self.parts_on_shafts if self._could_carry(part))

    def _could_carry(self, part: Part) -> bool:
        place = self.places[part.name]
        arrays = self._assembly.segment_arrays[place.shaft]
        collar = collar_of(part, place, float(arrays.ends[-1]))
        return collar is not None and collar.diameter > thickest(arrays, collar.left, collar.right)

    @cached_property
    def gravity_vector(self) -> Array:
        """Acceleration of free fall in model coordinates: (3,) [m/s^2]; zeros without gravity."""
        return gravity_vector(self.heading.gravity)

    def position(self, text: str, shaft: str | None = None) -> float:
        """Place x of a position such as ``wheel + 12 mm`` [m] from the left end of a shaft.

        Parameters
        ----------
        text : str
            As in `at`.
        shaft : str, optional
            Name of the shaft; may be left out if there is only one.
        """
        shafts = self._assembly.shafts
        name = next(iter(shafts)) if shaft is None and len(shafts) == 1 else shaft
        if name not in shafts:
            what = "which shaft? " if name is None else f"no shaft is called {quote(str(name))}. "
            raise ModelError(problem("position", f"{what}{nearest(str(name), shafts) or 'Give its name.'}"))
        try:
            position = PositionKind().check(text)
        except ValueError as error:
            raise ModelError(problem("position", str(error))) from None
        placing = self._assembly.placing
        count = len(placing.faults)
        x = placing.follow(position, name, None, "position")
        if x is None:
            fault = placing.faults[count]
            del placing.faults[count:]
            raise ModelError(problem("position", fault.sentence))
        return x

    def cg(self, name: str) -> tuple[float, float, float]:
        """Centre of gravity of a part with mass, in its shaft's frame.

        Parameters
        ----------
        name : str
            A part with a mass.

        Returns
        -------
        x, y, z : float
            From the shaft's left end, towards 12 o'clock, towards 3 o'clock [m]; x may lie beyond the shaft's end.
        """
        part = self[name]
        if not isinstance(part, Heavy) or part.mass is None:
            raise ModelError(problem(name, "it has no mass, so no centre of gravity. Write mass in it."))
        radius = 0.0 if part.cg_radius is None else part.cg_radius.si
        angle = 0.0 if part.cg_angle is None else part.cg_angle.si
        return self._assembly.centres[name], radius * math.cos(angle), radius * math.sin(angle)
