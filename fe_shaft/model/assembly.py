"""From words to a model: names resolved, cases completed, everything in its place, all mistakes at once."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass, field

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import nearest, quote
from fe_shaft.model.case import ONLY_CASE, Case
from fe_shaft.model.draft import Draft
from fe_shaft.model.frame import Frame, frame_faults, frame_of
from fe_shaft.model.gear import Gear
from fe_shaft.model.groups import CARRIERS, GROUPS, group_of, noun
from fe_shaft.model.heading import Heading
from fe_shaft.model.kinds import unknown_name
from fe_shaft.model.limit import GEARS_ONLY, SUPPORTS_ONLY, Limit
from fe_shaft.model.loads import Force
from fe_shaft.model.material import BUILT_IN_NAMES, Material, built_in
from fe_shaft.model.part import Heavy, Part
from fe_shaft.model.placing import Placing, gone
from fe_shaft.model.position import Place
from fe_shaft.model.segment_arrays import SegmentArrays
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.support import Support
from fe_shaft.model.words import Fault, Named
from fe_shaft.model.working import idle_hub

Array = NDArray[np.float64]
_MODEL_KEYS = frozenset((*Heading.model_fields, *GROUPS))  # no names for parts


@dataclass
class Assembly:
    """A model being put together; complete when nothing is in `faults` or in the draft's.

    Parameters
    ----------
    draft : Draft
        What the model is made of; parts in it may be broken, as its faults tell.
    removed : frozenset of str
        Names that a variant took away.

    Attributes
    ----------
    faults : list of Fault
        Mistakes in how the parts fit together.
    """

    draft: Draft
    removed: frozenset[str] = frozenset()
    faults: list[Fault] = field(default_factory=list)
    shafts: dict[str, Shaft] = field(default_factory=dict)
    parts: dict[str, Part] = field(default_factory=dict)
    places: dict[str, Place] = field(default_factory=dict)
    frames: dict[str, Frame] = field(default_factory=dict)
    materials: dict[str, Material] = field(default_factory=dict)
    segment_arrays: dict[str, SegmentArrays] = field(default_factory=dict)
    cases: dict[str, Case] = field(default_factory=dict)
    limits: dict[str, Limit] = field(default_factory=dict)
    targets: dict[str, tuple[str, ...]] = field(default_factory=dict)
    centres: dict[str, float] = field(default_factory=dict)  # x of centres of gravity

    def __post_init__(self) -> None:
        self._names()
        self._materials()
        self.faults += frame_faults(self.shafts)
        self._place()
        self._cases()
        self._limits()
        if not self.faults and not self.draft.faults:
            self.frames = {name: frame_of(shaft) for name, shaft in self.shafts.items()}
            self.segment_arrays = {name: shaft.arrays(self.materials) for name, shaft in self.shafts.items()}
            self._hubs()

    def tell(self, noun_: Named, key: str | None, sentence: str) -> None:
        """Note a mistake at a key of a noun, or in the whole of it."""
        inside = () if key is None else (key,)
        self.faults.append(Fault((group_of(noun_), noun_.name, *inside), sentence))

    # ---- names

    def _names(self) -> None:
        taken: dict[str, str] = {}
        for part in self.draft.parts:
            if part.name in taken:
                self.tell(
                    part, None, f"{quote(part.name)} is the name of a {taken[part.name]} already. Choose another name."
                )
            elif part.name in _MODEL_KEYS:
                self.tell(part, None, f"{quote(part.name)} is a key of the model itself. Choose another name.")
            taken.setdefault(part.name, noun(part))
            if isinstance(part, Shaft):
                self.shafts.setdefault(part.name, part)
            elif isinstance(part, Part):
                self.parts.setdefault(part.name, part)
        if not self.shafts and not any(fault.path[:1] == ("shafts",) for fault in self.draft.faults):
            self.faults.append(Fault(("shafts",), "the model has no shaft. Write [shafts.layshaft] with its segments."))
        for shaft in self.shafts.values():
            for name, index in shaft.segment_index.items():
                if name in taken:
                    path = (shaft.group, shaft.name, "segments", index, "name")
                    self.faults.append(
                        Fault(path, f"{quote(name)} is the name of a {taken[name]} already. Choose another name.")
                    )
        self._twice(self.draft.cases)
        self._twice(self.draft.limits)
        self._twice(self.draft.materials)

    def _twice(self, nouns: Sequence[Named]) -> None:
        seen: set[str] = set()
        for each in nouns:
            if each.name in seen:
                self.tell(
                    each, None, f"{quote(each.name)} is the name of another {noun(each)} already. Choose another name."
                )
            seen.add(each.name)

    def missing(self, what: str, name: str, known: Iterable[str]) -> str:
        """The sentence about a name that is not there."""
        return gone(name) if name in self.removed else unknown_name(what, name, known)

    # ---- materials

    def _materials(self) -> None:
        own = {material.name: material for material in self.draft.materials}
        for name in own:
            if name in BUILT_IN_NAMES:
                self.tell(
                    own[name], None, f"{quote(name)} is a built-in material. Choose another name, such as own_{name}."
                )
        for shaft in self.shafts.values():
            places: dict[str, tuple[str | int, ...]] = {}
            if shaft.material is not None:
                places[shaft.material] = ("material",)
            for index, segment in enumerate(shaft.segments or ()):
                if segment.material is not None:
                    places.setdefault(segment.material, ("segments", index, "material"))
            for name, path in places.items():
                self._material(name, own, Fault((shaft.group, shaft.name, *path), ""))

    def _material(self, name: str, own: Mapping[str, Material], fault: Fault) -> None:
        material = own.get(name) or built_in(name)
        if material is None:
            hint = nearest(name, [*own, *BUILT_IN_NAMES]) or "`fe-shaft explain material` lists the built-in ones."
            sentence = gone(name) if name in self.removed else f"no material is called {quote(name)}. {hint}"
            self.faults.append(Fault(fault.path, sentence))
            return
        self.materials[name] = material
        if self.draft.heading.gravity is not None and "density" not in material.given:
            self.faults.append(
                Fault(
                    ("materials", name, "density"),
                    'gravity acts, but density is not written. Write density = "7850 kg/m^3".',
                )
            )

    # ---- places

    def _place(self) -> None:
        placing = Placing(self.shafts, self.parts, self.removed)
        for part in self.parts.values():
            if part.on is not None and part.on not in self.shafts:
                self.tell(part, "on", self.missing("shaft", part.on, self.shafts))
            elif "on" not in part.given and len(self.shafts) > 1:
                names = " or ".join(f'on = "{name}"' for name in list(self.shafts)[:3])
                self.tell(part, "on", f"on is not written, and there are {len(self.shafts)} shafts. Write {names}.")
        self.places = placing.all()
        for part in self.parts.values():
            if isinstance(part, Heavy) and "mass" in part.given:
                x = placing.centre_of_gravity(part)
                if x is not None:
                    self.centres[part.name] = x
        self.faults += placing.faults
        self.placing = placing

    def _hubs(self) -> None:
        """A hub that is to carry must reach out of its shaft."""
        for part in self.parts.values():
            place = self.places[part.name]
            if sentence := idle_hub(part, place, self.segment_arrays[place.shaft]):
                self.tell(part, "hub", sentence)

    # ---- cases

    def _cases(self) -> None:
        written = {case.name: case for case in self.draft.cases}
        for case in self.draft.cases:
            done = self._resolved(case, written, ())
            self.cases[case.name] = done
            for fault in done.resolved_faults():
                self.faults.append(Fault(("cases", case.name, *fault.path), fault.sentence))
            self._case_names(case, done)
        if not written:
            self.cases = {ONLY_CASE: Case(ONLY_CASE)}

    def _resolved(self, case: Case, written: Mapping[str, Case], seen: tuple[str, ...]) -> Case:
        if case.like is None:
            return case
        if case.name in seen:
            circle = " -> ".join([*seen[seen.index(case.name) :], case.name])
            if seen[0] == case.name:
                self.tell(case, "like", f"cases go round in a circle: {circle}. Leave like out in one of them.")
            return case
        if case.like not in written:
            if not seen:
                self.tell(case, "like", self.missing("case", case.like, written))
            return case
        return case.over(self._resolved(written[case.like], written, (*seen, case.name)))

    def _case_names(self, case: Case, done: Case) -> None:
        """Names in a case, told where they are written."""
        for key, shares in (("enters", case.enters_shares), ("leaves", case.leaves_shares)):
            for name in shares:
                self._carrier(case, key, name)
        if case.of_shaft is not None and case.of_shaft not in self.shafts:
            self.tell(case, "of_shaft", self.missing("shaft", case.of_shaft, self.shafts))
        forces = {name for name, part in self.parts.items() if isinstance(part, Force)}
        for name in case.forces or ():
            if name in self.parts and name not in forces:
                self.tell(
                    case,
                    "forces",
                    f"{quote(name)} is a {noun(self.parts[name])}, not a force. Leave it out: only forces are "
                    "switched.",
                )
            elif name not in forces:
                self.tell(case, "forces", self.missing("force", name, sorted(forces)))
        self._one_shaft(case, done)

    def _carrier(self, case: Case, key: str, name: str) -> None:
        part = self.parts.get(name)
        carriers = [other for other, one in self.parts.items() if isinstance(one, CARRIERS)]
        if part is None and name in self.shafts:
            self.tell(case, key, f"{quote(name)} is a shaft. Write the gear, coupling, pulley or sprocket on it.")
        elif part is None:
            self.tell(case, key, self.missing("part", name, carriers))
        elif not isinstance(part, CARRIERS):
            passes = "power passes through gears, couplings, pulleys and sprockets"
            self.tell(case, key, f"{quote(name)} is a {noun(part)}; {passes}. {nearest(name, carriers)}".rstrip())
        elif isinstance(part, Gear) and "mate" not in part.given:
            fault = Fault(
                (part.group, name, "mate"),
                f'mate is not written, but power passes here in case {case.name}. Write mate = "9 o\'clock".',
            )
            if not any(one.path == fault.path for one in self.faults):
                self.faults.append(fault)

    def _one_shaft(self, case: Case, done: Case) -> None:
        both = set(done.enters_shares) & set(done.leaves_shares)
        if both and {"enters", "leaves"} & case.given:
            name = min(both)
            self.tell(case, "leaves", f"power enters and leaves at {name}. Write two parts.")
        names = [*done.enters_shares, *done.leaves_shares]
        shafts = {name: self.placing.shaft_of(self.parts[name]) for name in names if name in self.parts}
        on = {shaft: name for name, shaft in shafts.items() if shaft is not None}
        if len(on) > 1 and {"enters", "leaves"} & case.given:
            told = " and ".join(f"{name} on {shaft}" for shaft, name in on.items())
            self.tell(
                case,
                "leaves",
                f"power passes {told}, but nothing joins these shafts: gear pairs are not known yet in this version. "
                "Write one case for each shaft.",
            )
        elif len(on) == 1 and case.of_shaft in self.shafts and case.of_shaft not in on:
            self.tell(
                case, "of_shaft", f"the power passes on {next(iter(on))}, not on {case.of_shaft}. Leave of_shaft out."
            )

    # ---- limits

    def _limits(self) -> None:
        for limit in self.draft.limits:
            self.limits[limit.name] = limit
            for name in limit.cases or ():
                if name not in self.cases:
                    self.tell(limit, "cases", self.missing("case", name, self.cases))
            self.targets[limit.name] = tuple(self._targets(limit)) if limit.of is not None else ()

    def _targets(self, limit: Limit) -> Iterator[str]:
        if isinstance(limit.of, str) and limit.of.startswith("every "):
            kind = limit.of.removeprefix("every ").strip()
            found = [name for name, part in self.parts.items() if noun(part) == kind]
            if not found:
                self.tell(limit, "of", f"there is no {kind} in the model. Leave the limit out.")
        else:
            found = [limit.of] if isinstance(limit.of, str) else list(limit.of)
        for name in found:
            if name not in self.parts:
                what = f"{quote(name)} is a shaft; a limit holds for a part on it" if name in self.shafts else ""
                self.tell(
                    limit, "of", f"{what}. Write the part's name." if what else self.missing("part", name, self.parts)
                )
            else:
                self._applies(limit, self.parts[name])
                yield name

    def _applies(self, limit: Limit, part: Part) -> None:
        quantity = limit.quantity
        if quantity in SUPPORTS_ONLY and not isinstance(part, Support):
            other = ' Write quantity = "slope".' if quantity == "tilt" else ""
            self.tell(
                limit, "quantity", f"{quantity} belongs to bearings and pins; {part.name} is a {noun(part)}.{other}"
            )
        elif quantity in GEARS_ONLY and not (isinstance(part, Gear) and "mate" in part.given):
            self.tell(
                limit,
                "quantity",
                f"{quantity} belongs to gears with a mate; {part.name} is none. Write deflection, up or front.",
            )
