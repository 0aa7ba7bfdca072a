"""A model before its parts are put together: read from tables, as a model file states them, every mistake kept."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field
from typing import Any

from fe_shaft.errors import quote
from fe_shaft.model.case import Case
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.heading import Heading
from fe_shaft.model.kinds import thing
from fe_shaft.model.limit import Limit
from fe_shaft.model.material import Material
from fe_shaft.model.symbols import unknown_key
from fe_shaft.model.words import Fault, Named, example_of

MOST_NOUNS = 10_000  # in one group
MOST_FAULTS = 500  # told; a model with more is not one with slips
# Keys that only the reader of files knows, with an example each.
FILE_KEYS = {
    "include": 'include = ["our_materials.toml"]',
    "extends": 'extends = "layshaft.toml"',
    "change": '[change] with layshaft.wheel_seat.diameter = "44 mm"',
    "add": "[add.masses.disc]",
    "remove": 'remove = ["barring_wheel"]',
}


@dataclass(frozen=True)
class Draft:
    """Everything a model is made of, readable or not.

    Parameters
    ----------
    heading : Heading
    parts : list of Named
        Shafts and what is on them.
    cases, limits, materials : lists
    faults : list of Fault
        Mistakes in the parts themselves; what could not be read is None in them.
    """

    heading: Heading
    parts: list[Named] = field(default_factory=list)
    cases: list[Case] = field(default_factory=list)
    limits: list[Limit] = field(default_factory=list)
    materials: list[Material] = field(default_factory=list)
    faults: list[Fault] = field(default_factory=list)

    def take(self, noun: Named) -> None:
        """Put a noun where it belongs."""
        homes: list[tuple[type[Named], list[Any]]] = [
            (Case, self.cases), (Limit, self.limits), (Material, self.materials), (Named, self.parts)
        ]  # fmt: skip
        next(home for cls, home in homes if isinstance(noun, cls)).append(noun)


def read_tables(tables: Mapping[str, Any]) -> Draft:
    """The nouns that tables state.

    Parameters
    ----------
    tables : mapping
        As TOML reads a model file; a table may also be the noun itself.
    """
    heading, faults = Heading.attempt({key: value for key, value in tables.items() if key in Heading.model_fields})
    draft = Draft(heading, faults=faults)
    for key, content in tables.items():
        if key in GROUPS:
            _read_group(draft, key, content)
        elif key not in Heading.model_fields and len(faults) < MOST_FAULTS:
            faults.append(Fault((key,), _unknown(key)))
    return draft


def _read_group(draft: Draft, group: str, content: object) -> None:
    """Read the tables of one group into the draft."""
    cls = GROUPS[group]
    if not isinstance(content, Mapping):
        remedy = f"Write [{group}.{_sample(cls)}], one table for each."
        draft.faults.append(Fault((group,), f"{group} is {thing(content)}, not a group of tables. {remedy}"))
        return
    if len(content) > MOST_NOUNS:
        draft.faults.append(Fault((group,), f"there are {len(content)} {group}; {MOST_NOUNS} at most are computed."))
        return
    for name, table in content.items():
        if isinstance(table, cls):
            draft.take(table)
        elif isinstance(table, Mapping):
            noun, found = cls.attempt({**table, "name": name})
            draft.take(noun)
            draft.faults.extend(_inside(group, str(name), found, "name" in table))
        else:
            what = f"{quote(str(name))} is {thing(table)}, not a table of {group}"
            draft.faults.append(Fault((group, name), f"{what}. {_heading_remedy(group, cls, str(name))}"))


def _inside(group: str, name: str, found: list[Fault], named_twice: bool) -> Iterator[Fault]:
    """Faults of one table, from the top of the model; a fault of the name is one of the whole table."""
    if named_twice:
        yield Fault((group, name, "name"), f"name stands in the heading [{group}.{name}] already. Leave it out.")
    for fault in found:
        yield Fault((group, name, *(() if fault.path == ("name",) else fault.path)), fault.sentence)


def _sample(cls: type[Named]) -> str:
    return str((cls.model_fields["name"].examples or ["name"])[0])


def _heading_remedy(group: str, cls: type[Named], name: str) -> str:
    if name in cls.model_fields:
        return f"Write the key under a heading with a name: [{group}.{_sample(cls)}]."
    return f"Write [{group}.{name}] and its keys below."


def _unknown(key: str) -> str:
    examples = {name: example_of(Heading, name) for name in Heading.model_fields}
    examples |= {group: f"[{group}.{_sample(cls)}]" for group, cls in GROUPS.items()} | FILE_KEYS
    return unknown_key(key, "Model", examples)
