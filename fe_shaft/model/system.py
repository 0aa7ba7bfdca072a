"""The whole model: shafts, what holds and loads them, cases and limits; validated, frozen, everything in place."""

from __future__ import annotations

import hashlib
import json
from collections.abc import Iterable, Mapping, Sequence
from functools import cached_property
from types import MappingProxyType
from typing import TYPE_CHECKING, Any, Self, Unpack

from fe_shaft.errors import ModelError, nearest, quote
from fe_shaft.model.actions import Action
from fe_shaft.model.actions import actions as actions_of
from fe_shaft.model.address import address
from fe_shaft.model.assembly import Assembly
from fe_shaft.model.case import Case
from fe_shaft.model.changing import changed
from fe_shaft.model.draft import MOST_FAULTS, MOST_NOUNS, Draft, read_tables
from fe_shaft.model.estimates import HOUSING, estimates_of
from fe_shaft.model.groups import GROUPS, PARTS, group_of
from fe_shaft.model.heading import Heading
from fe_shaft.model.housing import Housing
from fe_shaft.model.kinds import shown, thing
from fe_shaft.model.limit import Limit
from fe_shaft.model.lookup import Lookup
from fe_shaft.model.material import Material
from fe_shaft.model.notes import Note, notes_of
from fe_shaft.model.part import Heavy
from fe_shaft.model.refusal import problem
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.shape_notes import shape_notes
from fe_shaft.model.statics import Statics
from fe_shaft.model.statics import statics as statics_of
from fe_shaft.model.summary import summary, summary_html
from fe_shaft.model.support import Support
from fe_shaft.model.support_table import SupportTable, tabulate
from fe_shaft.model.variants import End, at_end, housing_at_end, pin_of, seated
from fe_shaft.model.words import Fault, Named

if TYPE_CHECKING:
    from fe_shaft.model.keywords import HeadingWords


class Model(Lookup):
    """Everything that is computed together.

    Parameters
    ----------
    title : str
        What it is.
    parts : sequence
        Shafts and everything on them, in any order; the first shaft sets the origin.
    cases : sequence of Case
        Load cases; without any there is one case with all forces and weights.
    limits, materials : sequences of Limit, Material
    question, gravity, units, housing, estimates, source
        As in the model file (see `Heading`).

    Attributes
    ----------
    parts, written_cases, written_limits, own_materials : tuples
        As they were written; `cases`, `supports` etc. are what they come to.
    source_lines : mapping
        File and line by address; empty in a script.

    Raises
    ------
    ModelError
        With every mistake found.
    """

    written_cases: tuple[Case, ...]
    written_limits: tuple[Limit, ...]
    own_materials: tuple[Material, ...]
    source_lines: Mapping[str, tuple[str, int]]

    def __init__(
        self,
        title: str = "",
        parts: Sequence[Named] = (),
        cases: Sequence[Case] = (),
        *,
        limits: Sequence[Limit] = (),
        materials: Sequence[Material] = (),
        **heading: Unpack[HeadingWords],
    ) -> None:
        top, faults = Heading.attempt({"title": title, **heading})
        faults += _list_faults("parts", parts, (Shaft, *PARTS.values()))
        faults += _list_faults("cases", cases, (Case,))
        faults += _list_faults("limits", limits, (Limit,))
        faults += _list_faults("materials", materials, (Material,))
        if not faults:
            faults = self._assemble(Draft(top, list(parts), list(cases), list(limits), list(materials)))
        _raise(faults, parts)

    @classmethod
    def from_tables(cls, tables: Mapping[str, Any], removed: Iterable[str] = ()) -> tuple[Self, list[Fault]]:
        """The model that tables state, and every mistake in it; with mistakes it is good for nothing else.

        Parameters
        ----------
        tables : mapping
            As TOML reads a model file; a table may also be the noun itself.
        removed : iterable of str
            Names that a variant took away, for better sentences.
        """
        self = object.__new__(cls)
        draft = read_tables(tables)
        found = self._assemble(draft, removed)
        return self, [*draft.faults, *found][:MOST_FAULTS]

    def _assemble(self, draft: Draft, removed: Iterable[str] = ()) -> list[Fault]:
        made = Assembly(draft, frozenset(removed))
        housing = draft.heading.housing
        self._put(
            heading=draft.heading, parts=tuple(draft.parts), written_cases=tuple(draft.cases),
            written_limits=tuple(draft.limits), own_materials=tuple(draft.materials), _assembly=made,
            supports=tuple(seated(part, housing) for part in made.parts.values() if isinstance(part, Support)),
            source_lines=MappingProxyType({}),
        )  # fmt: skip
        if not made.faults and not draft.faults:
            _ = self.statics, self.support_table  # held from validation on, as the segments' arrays are
            _ = [(arrays.tapered, arrays.uniform) for arrays in self.segment_arrays.values()]
        return made.faults

    # ---- frozen

    def __setattr__(self, key: str, value: object) -> None:
        raise ModelError(problem(key, "a model does not change. Write model.change({...}), which returns a new one."))

    def __delattr__(self, key: str) -> None:
        self.__setattr__(key, None)

    def _put(self, **attributes: Any) -> None:
        self.__dict__.update(attributes)

    def told_by(self, lines: Mapping[str, tuple[str, int]]) -> Self:
        """The same model, which knows the file and line of every address."""
        new = object.__new__(type(self))
        new._put(**{**self.__dict__, "source_lines": lines})
        return new

    # ---- what is known roughly, what was taken

    @cached_property
    def notes(self) -> tuple[Note, ...]:
        """Defaults taken and doubts, each with the key that changes it."""
        return (*notes_of(self), *shape_notes(self))

    @cached_property
    def estimated(self) -> tuple[str, ...]:
        """Names of the things that are estimated: parts, segments with keyways or splines, ``housing``."""
        found = dict.fromkeys(each.thing for each in estimates_of(self) if each.thing != HOUSING)
        housing = any(each.thing == HOUSING for each in estimates_of(self))
        return (*found, *[HOUSING] * housing)

    # ---- in numbers

    @cached_property
    def actions(self) -> tuple[Action, ...]:
        """What the parts do to their shafts, in all cases."""
        return actions_of(self)

    @cached_property
    def statics(self) -> dict[str, Statics]:
        """The resultant of all that acts on each shaft, by its name."""
        return statics_of(self)

    @cached_property
    def support_table(self) -> SupportTable:
        """The supports as arrays."""
        return tabulate(self)

    # ---- variants

    def at_band(self, ends: Mapping[str, End]) -> Self:
        """The model with estimated things at one end of their bands; those not named stay as they are.

        Parameters
        ----------
        ends : mapping
            ``"low"`` or ``"high"`` by names out of `estimated`.
        """
        for name in ends:
            if name not in self.estimated:
                hint = nearest(name, self.estimated)
                raise ModelError(problem(name, f"nothing about {quote(name)} is estimated. {hint}".rstrip()))
        housing = self.housing
        if housing is not None and HOUSING in ends:
            housing = housing_at_end(housing, ends[HOUSING])
        return self._with_parts([at_end(part, ends) for part in self.parts], housing)

    def pinned(self) -> Self:
        """The model with every bearing a rigid pin that holds the same; seats are dropped."""
        return self._with_parts([pin_of(part) if isinstance(part, Support) else part for part in self.parts], None)

    def with_hubs(self, hub: str) -> Self:
        """The model with every hub whose size is known at ``none`` or in ``one piece`` with its shaft."""
        parts = [
            part.with_hub(hub) if isinstance(part, Heavy) and part.name in self.hubs else part for part in self.parts
        ]
        return self._altered(parts=tuple(parts))

    def plain(self) -> Self:
        """The model without its shoulders: every segment carries to its rim from end to end."""
        given = self.heading.given | {"shoulders"}
        return self._altered(heading=Heading.model_construct(given, **{**self.heading.__dict__, "shoulders": "off"}))

    def _with_parts(self, parts: Sequence[Named], housing: Housing | None) -> Self:
        """The same model with other parts in the same places."""
        given = self.heading.given if housing is not None else self.heading.given - {HOUSING}
        return self._altered(
            heading=Heading.model_construct(set(given), **{**self.heading.__dict__, "housing": housing}),
            parts=tuple(parts),
            supports=tuple(seated(part, housing) for part in parts if isinstance(part, Support)),
        )

    def _altered(self, **attributes: Any) -> Self:
        """The same model with other attributes; what was worked out from them is forgotten."""
        new = object.__new__(type(self))
        new._put(**{key: value for key, value in self.__dict__.items() if key not in _CACHED})
        new._put(**attributes)
        return new

    def change(self, changes: Mapping[str, Any]) -> Self:
        """A new model with other values at some addresses.

        Parameters
        ----------
        changes : mapping
            Values by address, e.g. ``{"layshaft.wheel_seat.diameter": "44 mm"}``.
        """
        tables = changed(self.tables(), changes)
        model, faults = self.from_tables(tables)
        _raise(faults, tables)
        return model

    # ---- back to words

    def tables(self) -> dict[str, Any]:
        """The model as tables by group and name, the nouns in them still whole."""
        groups: dict[str, dict[str, Any]] = {group: {} for group in GROUPS}
        for noun in (*self.parts, *self.written_cases, *self.written_limits, *self.own_materials):
            groups[group_of(noun)][noun.name] = noun
        top = {key: value for key, value in self.heading.to_table().items() if key != "format"}
        return top | {group: nouns for group, nouns in groups.items() if nouns}

    def to_table(self) -> dict[str, Any]:
        """The model as nested tables, as a model file states it; values as the user wrote them."""
        return {
            key: {name: noun.to_table() for name, noun in value.items()} if key in GROUPS else value
            for key, value in self.tables().items()
        }

    @cached_property
    def digest(self) -> str:
        """SHA-256 of the model's words, in hexadecimal; the order of keys does not matter, that of shafts does."""
        table = self.to_table()
        table["shafts"] = list(table["shafts"].items())
        text = json.dumps(table, sort_keys=True, ensure_ascii=True, separators=(",", ":"))
        return hashlib.sha256(text.encode()).hexdigest()

    def __str__(self) -> str:
        return summary(self)

    def _repr_html_(self) -> str:
        return summary_html(self)

    def __repr__(self) -> str:
        return f"Model({quote(self.title)}, {len(self.shafts)} shafts, {len(self.parts_on_shafts)} parts)"


_CACHED = frozenset(
    name for cls in (Model, Lookup) for name, value in vars(cls).items() if isinstance(value, cached_property)
)


def _raise(faults: Sequence[Fault], source: Any) -> None:
    """ModelError with every fault, if there is one."""
    if faults:
        raise ModelError([problem(address(fault.path, source), fault.sentence) for fault in faults])


def _list_faults(key: str, given: object, classes: tuple[type[Named], ...]) -> list[Fault]:
    """Mistakes in a list of nouns."""
    wanted = ", ".join(cls.__name__ for cls in classes)
    if not isinstance(given, list | tuple):
        return [Fault((key,), f"{shown(given)} is {thing(given)}, not a list. Write {key} = [...] of: {wanted}.")]
    if len(given) > MOST_NOUNS:
        return [Fault((key,), f"there are {len(given)} {key}; {MOST_NOUNS} at most are computed.")]
    strange = [(index, one) for index, one in enumerate(given, 1) if not isinstance(one, classes)]
    return [Fault((key,), f"number {index} does not belong here: {_strange(one, wanted)}") for index, one in strange]


def _strange(one: object, wanted: str) -> str:
    if isinstance(one, Named):
        home = {Case: "cases", Limit: "limits", Material: "materials"}.get(type(one), "parts")
        return f"{quote(str(one.name))} is a {type(one).__name__}. Give it in {home}."
    return f"it is {thing(one)} ({type(one).__name__}). Give {wanted}."
