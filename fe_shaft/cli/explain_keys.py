"""Pages of the keys and groups of the model file, from their own descriptions."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Sequence

from fe_shaft.model.groups import GROUPS
from fe_shaft.model.reference import Entry, entries, units_of
from fe_shaft.results.words.layout import paragraph
from fe_shaft.units import FACTORS

LABEL = 10  # columns of the labels on a page
MOST_UNITS = 8  # listed on the page of a key
_TIED = "\N{NO-BREAK SPACE}"  # no line is broken here
_SINGULAR = {cls.__name__.lower(): group for group, cls in GROUPS.items()}


def group_words() -> tuple[str, ...]:
    """Names of all groups and tables inside them."""
    return tuple(dict.fromkeys([*GROUPS, *(entry.group for entry in entries() if entry.group)]))


def key_words() -> tuple[str, ...]:
    """All keys."""
    return tuple(dict.fromkeys(entry.key for entry in entries()))


def group_page(word: str) -> Iterator[list[str]]:
    """The page of a group (`gears`, `gear`) or of a table in one (`bearings.stiffness`)."""
    group = _SINGULAR.get(word.lower(), word)
    keys = [entry for entry in entries() if entry.group == group]
    if not keys or not group:
        return
    about = (GROUPS[group].__doc__ or "").splitlines()[0] if group in GROUPS else ""
    table = f"[{group}.NAME]" if group in GROUPS else f"{group.rpartition('.')[2]} = {{ ... }}"
    what = "group of the model file" if group in GROUPS else "table in the model file"
    wide = max(len(entry.key) for entry in keys)
    lines = [f"{group}   {what}: {table}", *(paragraph(about, "  ") if about else [])]
    for entry in sorted(keys, key=lambda each: not each.required):
        must = "must be written. " if entry.required else ""
        lines += paragraph(f"{must}{_plain(entry.description)}", " " * (wide + 4), first=f"  {entry.key:<{wide}}  ")
    yield lines


def key_page(word: str) -> Iterator[list[str]]:
    """The pages of a key, one for each meaning; `gears.helix` takes the one of a group."""
    yield from _keys(entry for entry in entries() if word in (entry.key, f"{entry.group}.{entry.key}"))


def value_page(word: str) -> Iterator[list[str]]:
    """The pages of the keys that may hold a word, such as `bevel`."""
    yield from _keys(entry for entry in entries() if word in entry.kind.removeprefix("list of: ").split(" | "))


def _keys(wanted: Iterable[Entry]) -> Iterator[list[str]]:
    """One page for each meaning."""
    found: dict[tuple[str, ...], list[Entry]] = {}
    for entry in wanted:
        found.setdefault((entry.description, entry.kind, entry.default), []).append(entry)
    for same in found.values():
        yield _key(same)


def _key(same: list[Entry]) -> list[str]:
    """One meaning of a key, with all groups that have it."""
    entry = same[0]
    where = ", ".join(each.group or "the top of the file" for each in same)
    rows = {"write": entry.example, "value": entry.kind}
    dimension = entry.kind.replace(" ", "_")
    if dimension in FACTORS:
        rows["units"] = _units(dimension, entry.unit)
    if entry.usual:
        rows["usual"] = f"{entry.usual}; far outside, it is taken for a slip of units"
    if entry.required:
        rows["left out"] = "not possible"
    elif entry.default:
        rows["left out"] = entry.default
    lines = paragraph(where, "    ", first=f"{entry.key}   key of ")
    lines += paragraph(_plain(entry.description), "  ")
    for label, text in rows.items():
        lines += paragraph(text, " " * (LABEL + 2), first=f"  {label:<{LABEL}}")
    return lines


def _units(dimension: str, usual: str) -> str:
    """The units of a dimension, the usual one first; of a long list the first ones."""
    units = list(dict.fromkeys([usual, *units_of(dimension)]))
    listed = ", ".join(unit or "bare number" for unit in units[:MOST_UNITS])
    more = len(units) - MOST_UNITS
    return f"{listed} and {more} more: fe-shaft explain {dimension.replace('_', ' ')}" if more > 0 else listed


def joined(label: str, words: Sequence[str]) -> list[str]:
    """A label and words with commas, none of them torn."""
    whole = ", ".join(word.replace(" ", _TIED) for word in words)
    return [line.replace(_TIED, " ") for line in paragraph(whole, " " * len(label), first=label)]


def _plain(description: str) -> str:
    """A description without the marks of its README form."""
    return description.replace("`", "")
