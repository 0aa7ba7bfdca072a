"""Values changed at addresses, parts added and removed: tables in, tables out."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping, Sequence
from typing import Any

from fe_shaft.errors import ModelError, nearest, quote
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.heading import Heading
from fe_shaft.model.kinds import thing
from fe_shaft.model.refusal import problem
from fe_shaft.model.shaft import SHAPES
from fe_shaft.model.words import Fault, Words, example_of, inner_noun, tables_of

Path = tuple[str | int, ...]

# Keys that say the same thing in different ways: writing one takes the others away.
DISPLACE: tuple[tuple[frozenset[str], frozenset[str]], ...] = (
    (frozenset({"at"}), frozenset({"left_at", "right_at"})),
    (frozenset({"left_at"}), frozenset({"at", "right_at"})),
    (frozenset({"right_at"}), frozenset({"at", "left_at"})),
    (frozenset({"power"}), frozenset({"torque"})),
    (frozenset({"torque"}), frozenset({"power"})),
    *((frozenset({key}), SHAPES - {key}) for key in SHAPES),
)


class Changing:
    """Tables on their way from one model to another.

    Parameters
    ----------
    tables : mapping
        The model as tables; left untouched.
    """

    def __init__(self, tables: Mapping[str, Any]) -> None:
        self.tables: dict[str, Any] = {
            key: dict(value) if key in GROUPS and isinstance(value, Mapping) else value for key, value in tables.items()
        }
        self.faults: list[Fault] = []
        self.removed: list[str] = []

    def change(self, place: str, value: Any, where: Path) -> Path | None:
        """Write a value at an address.

        Parameters
        ----------
        place : str
            E.g. ``layshaft.wheel_seat.diameter``.
        value : object
            As the model file would state it.
        where : tuple
            Path of the change itself, for faults.

        Returns
        -------
        tuple or None
            Path of the value in the tables; None if the address leads nowhere.
        """
        found = self._owner(place, where)
        if found is None:
            return None
        path, steps = found
        if not steps:
            self.faults.append(Fault(where, f"{place} is a whole table. Name a key in it, or remove and add it."))
            return None
        table: Any = self.tables
        for step in path[:-1]:
            table = table[step]
        return self._set(table, path, steps, value, where)

    def _owner(self, place: str, where: Path) -> tuple[tuple[str, ...], list[str]] | None:
        """Path of the noun at the head of an address, and the steps inside it."""
        head, *rest = place.split(".")
        homes = [group for group in GROUPS if group != "materials" and head in self._group(group)]
        if len(homes) > 1:
            told = " and ".join(f"one of {group}" for group in homes)
            self.faults.append(Fault(where, f"{quote(head)} is {told}. Rename one of them."))
            return None
        if homes:
            return (homes[0], head), rest
        for name in self._group("materials"):
            if place == name or place.startswith(f"{name}."):
                return ("materials", name), place[len(name) + 1 :].split(".") if place != name else []
        if head in Heading.model_fields:
            if not rest:
                return (head,), [head]
            return (head,), [head, *rest]
        known = [*(name for group in GROUPS for name in self._group(group)), *Heading.model_fields]
        gone = (
            f"{quote(head)} was removed."
            if head in self.removed
            else f"nothing is called {quote(head)}. {nearest(head, known)}"
        )
        self.faults.append(Fault(where, gone.rstrip()))
        return None

    def _group(self, group: str) -> Mapping[str, Any]:
        content = self.tables.get(group)
        return content if isinstance(content, Mapping) else {}

    def _set(self, table: Any, path: tuple[str, ...], steps: list[str], value: Any, where: Path) -> Path | None:
        """Open the noun, and every table on the way, and write the value."""
        if path[-1] in Heading.model_fields and len(path) == 1:
            return self._write(self.tables, Heading, (), steps, value, where)
        group, name = path
        table[name] = tables_of(table[name])
        if group == "shafts" and steps[0] not in GROUPS["shafts"].model_fields:
            rows = table[name].get("segments")
            rows = list(rows) if isinstance(rows, Sequence) and not isinstance(rows, str) else []
            if len(steps) > 1 and "contour" in table[name]:
                self.faults.append(Fault(where, _of_contour(name)))
                return None
            if len(steps) > 1 or steps[0] in map(_name_of, rows):
                table[name]["segments"] = rows
                return self._set_segment(rows, path, steps, value, where)
        return self._write(table[name], GROUPS[group], path, steps, value, where)

    def _set_segment(
        self, rows: list[Any], path: tuple[str, ...], steps: list[str], value: Any, where: Path
    ) -> Path | None:
        names = [_name_of(row) for row in rows]
        if steps[0] not in names:
            self.faults.append(Fault(where, _no_segment(path[1], steps[0], [name for name in names if name])))
            return None
        if len(steps) == 1:
            self.faults.append(Fault(where, f"{'.'.join((path[1], *steps))} is a whole segment. Name a key in it."))
            return None
        index = names.index(steps[0])
        rows[index] = tables_of(rows[index])
        segment = inner_noun(GROUPS["shafts"], "segments")
        assert segment is not None
        return self._write(rows[index], segment, (*path, "segments", index), steps[1:], value, where)

    def _write(
        self,
        table: dict[str, Any],
        noun: type[Words],
        path: Path,
        steps: list[str],
        value: Any,
        where: Path,
    ) -> Path | None:
        key, *rest = steps
        inner = inner_noun(noun, key) if key in noun.model_fields else None
        if rest and (inner is None or key == "segments"):
            known = f"{key} has no keys of its own" if key in noun.model_fields else f"{key} is not a key here"
            hint = nearest(key, [name for name in noun.model_fields if name not in Words.model_fields])
            self.faults.append(
                Fault(
                    where,
                    f"{known}. {hint if key not in noun.model_fields else f'Write {example_of(noun, key)}.'}".rstrip(),
                )
            )
            return None
        _displace(table, key)
        if not rest:
            table[key] = value
            return (*path, key)
        assert inner is not None
        table[key] = tables_of(table[key]) if key in table else {}
        return self._write(table[key], inner, (*path, key), rest, value, where)

    def remove(self, name: object, where: Path) -> Path | None:
        """Take a part, case, limit, material or segment away.

        Returns
        -------
        tuple or None
            Path of what was removed; None if there is nothing of that name.
        """
        if not isinstance(name, str):
            self.faults.append(Fault(where, f'this is {thing(name)}, not a name. Write remove = ["barring_wheel"].'))
            return None
        for group in GROUPS:
            content = self.tables.get(group)
            if isinstance(content, dict) and name in content:
                del content[name]
                self.removed.append(name)
                return group, name
        shaft, _, segment = name.partition(".")
        if segment and shaft in self._group("shafts"):
            return self._remove_segment(shaft, segment, where)
        known = [each for group in GROUPS for each in self._group(group)]
        self.faults.append(Fault(where, f"nothing is called {quote(name)}. {nearest(name, known)}".rstrip()))
        return None

    def _remove_segment(self, shaft: str, segment: str, where: Path) -> Path | None:
        table = tables_of(self.tables["shafts"][shaft])
        if "contour" in table:
            self.faults.append(Fault(where, _of_contour(shaft)))
            return None
        rows = list(table.get("segments", ()))
        names = [_name_of(row) for row in rows]
        if segment not in names:
            self.faults.append(Fault(where, _no_segment(shaft, segment, [name for name in names if name])))
            return None
        index = names.index(segment)
        del rows[index]
        self.tables["shafts"][shaft] = {**table, "segments": rows}
        self.removed.append(segment)
        return "shafts", shaft, "segments", index

    def add(self, group: str, name: str, table: object, where: Path) -> None:
        """Add a whole table to a group."""
        if group not in GROUPS:
            self.faults.append(
                Fault(where[:-1], f"{group} is not a group of tables. {nearest(group, GROUPS)}".rstrip())
            )
            return
        content = self.tables.setdefault(group, {})
        if isinstance(content, dict) and name in content:
            self.faults.append(Fault(where, f"{quote(name)} is there already. Write its keys under [change]."))
        elif isinstance(content, dict):
            content[name] = table


def _name_of(row: object) -> str | None:
    """The name of a segment, as a noun or as a table."""
    name = row.get("name") if isinstance(row, Mapping) else getattr(row, "name", None)
    return name if isinstance(name, str) else None


def _no_segment(shaft: str, name: str, known: list[str]) -> str:
    if name.startswith("segment_") and name[8:].isdigit():
        return f'{shaft}.{name} has no name, so no address. Name it first: name = "..." in that segment.'
    return f"no segment or key of {shaft} is called {quote(name)}. {nearest(name, known)}".rstrip()


def _of_contour(shaft: str) -> str:
    return f"the segments of {shaft} come from its contour and have no names. Change {shaft}.contour as a whole."


def _displace(table: dict[str, Any], key: str) -> None:
    for keys, others in DISPLACE:
        if key in keys:
            for other in others & table.keys():
                del table[other]


def changed(tables: Mapping[str, Any], changes: Mapping[str, Any]) -> dict[str, Any]:
    """Tables with other values at some addresses; ModelError if an address leads nowhere."""
    work = Changing(tables)
    for place, value in changes.items():
        work.change(str(place), value, (str(place),))
    if work.faults:
        raise ModelError([problem(str(fault.path[0]), fault.sentence) for fault in work.faults])
    return work.tables


def leaves(table: Mapping[str, Any], whole: Iterable[tuple[str, ...]]) -> Iterator[tuple[tuple[str, ...], Any]]:
    """The values under [change], by their steps; a path in `whole` is one value even if it is a table."""
    ends = set(whole)
    waiting: list[tuple[tuple[str, ...], Any]] = [((key,), value) for key, value in table.items()]
    while waiting:
        steps, value = waiting.pop(0)
        if isinstance(value, Mapping) and steps not in ends:
            waiting[:0] = [((*steps, key), each) for key, each in value.items()]
        else:
            yield steps, value
