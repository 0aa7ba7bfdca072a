"""Every key of the model file, from the metadata of the nouns themselves: for the README and for `explain`."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cache

from fe_shaft.model.draft import FILE_KEYS
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.heading import Heading
from fe_shaft.model.kinds import Kind
from fe_shaft.model.lists import Listed
from fe_shaft.model.notes import kind_of
from fe_shaft.model.plain import as_toml
from fe_shaft.model.quantity import Quantity
from fe_shaft.model.shaft import Vector
from fe_shaft.model.words import Words, holds_list, inner_noun, written
from fe_shaft.units import FACTORS

_FILE_KINDS = {
    "include": ("list of files", "Files whose `materials` and `limits` are taken over."),
    "extends": ("file", "Makes the file a variant of another one; beside it stand only change, add and remove."),
    "change": ("table", "In a variant: new values by address."),
    "add": ("table", "In a variant: new tables."),
    "remove": ("list of names", "In a variant: parts, cases, limits, materials or segments that go."),
}


@dataclass(frozen=True)
class Entry:
    """One key of the model file.

    Parameters
    ----------
    group : str
        Table it stands in, e.g. ``gears``, ``bearings.stiffness``; empty for the top of the file.
    key : str
        The key.
    kind : str
        What it holds, e.g. ``length``, ``name``, ``cylindrical | bevel``.
    unit : str
        Unit to suggest; empty if it has none.
    usual : str
        Usual range, outside of which a slip of units is suspected; empty if there is none.
    default : str
        What is taken if it is left out, as TOML writes it; empty if nothing is.
    required : bool
        Whether it must be written.
    description : str
        What it means.
    example : str
        ``key = value``.
    """

    group: str
    key: str
    kind: str
    unit: str
    usual: str
    default: str
    required: bool
    description: str
    example: str


@cache
def entries() -> tuple[Entry, ...]:
    """Every key of the model file, top first, then group by group.

    `source` and `range_check` stand with the top; they may be written in any table.
    """
    told: dict[type[Words], str] = {}
    top = list(_of("", Heading, told))
    files = [Entry("", key, *_file_key(key), f"{example}") for key, example in FILE_KEYS.items()]
    return (*top, *files, *(entry for group, noun in GROUPS.items() for entry in _of(group, noun, told)))


def explain(word: str) -> tuple[Entry, ...]:
    """The entries of one key (``facewidth``) or of one group (``gears``).

    Parameters
    ----------
    word : str
        A key, a group, or both with a dot (``gears.helix``).
    """
    group, _, key = word.rpartition(".")
    found = [entry for entry in entries() if entry.key == word or entry.group == word or _is(entry, group, key)]
    return tuple(found)


def units_of(dimension: str) -> tuple[str, ...]:
    """Every unit of a dimension, as a file writes it."""
    return tuple(FACTORS[dimension])


def words() -> tuple[str, ...]:
    """Everything that `explain` knows, for the nearest right word."""
    return tuple(dict.fromkeys(word for entry in entries() for word in (entry.key, entry.group) if word))


def _is(entry: Entry, group: str, key: str) -> bool:
    return bool(group) and entry.group == group and entry.key == key


def _file_key(key: str) -> tuple[str, str, str, str, bool, str]:
    kind, description = _FILE_KINDS[key]
    return kind, "", "", "", False, description


def _of(group: str, noun: type[Words], told: dict[type[Words], str]) -> Iterator[Entry]:
    """The keys of one noun, those of the nouns inside it behind them, each noun once."""
    inside: list[tuple[str, type[Words]]] = []
    for key, field in noun.model_fields.items():
        if (key == "name" and not noun.named_inside) or (group and key in Words.model_fields):
            continue
        place = f"{group}.{key}" if group else key
        inner = inner_noun(noun, key)
        if inner is not None and inner not in told:
            told[inner] = place
            inside.append((place, inner))
        kind = kind_of(noun, key)
        quantity = _quantity(kind)
        example = (field.examples or [...])[0]
        yield Entry(
            group, key, _caption(noun, key, kind, told), quantity.unit if quantity else "", _usual(quantity),
            _default(noun, key), field.is_required(), field.description or "", f"{key} = {as_toml(example)}",
        )  # fmt: skip
    for place, inner in inside:
        yield from _of(place, inner, told)


def _caption(noun: type[Words], key: str, kind: object, told: Mapping[type[Words], str]) -> str:
    if isinstance(kind, Kind):
        return kind.caption
    inner = inner_noun(noun, key)
    return f"{'list of tables' if holds_list(noun, key) else 'table'}: {told[inner] if inner else ''}"


def _quantity(kind: object) -> Quantity | None:
    if isinstance(kind, Vector):
        return kind.number
    if isinstance(kind, Listed):
        return _quantity(kind.kind)
    return kind if isinstance(kind, Quantity) else None


def _usual(quantity: Quantity | None) -> str:
    return "" if quantity is None or quantity.usual_texts is None else " to ".join(quantity.usual_texts)


def _default(noun: type[Words], key: str) -> str:
    field = noun.model_fields[key]
    if field.is_required():
        return ""
    value = written(field.get_default(call_default_factory=True))
    return "" if value in (None, "", {}, []) else as_toml(value)
