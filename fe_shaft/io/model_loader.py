"""From the files of a model to its tables: what it extends, includes and names, each value with its file and line."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from typing import Any

from fe_shaft.errors import ModelError, Problem, nearest, quote
from fe_shaft.io.contour.reading import contour_points
from fe_shaft.io.model_lines import Origins, Path, SourceLines
from fe_shaft.io.model_source import Source
from fe_shaft.io.model_tables import matrix_rows, segments
from fe_shaft.model.address import address
from fe_shaft.model.changing import Changing, leaves
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.kinds import thing
from fe_shaft.model.refusal import problem
from fe_shaft.model.shaft import SHAPES
from fe_shaft.model.system import Model
from fe_shaft.model.words import Fault

VARIANT_KEYS = ("format", "title", "question", "source", "extends", "include", "remove", "change", "add")
INCLUDED = ("materials", "limits")
LATER_INCLUDED = ("catalogue",)
MOST_FILES = 20  # of one model
SET = "--set"


class Loader:
    """One model on its way from files to tables.

    Parameters
    ----------
    source : Source
        The file that the user named.
    """

    def __init__(self, source: Source) -> None:
        self.source = source
        self.origins = Origins(source)
        self.tables: dict[str, Any] = {}
        self.faults: list[Fault] = []  # in the tables
        self.problems: list[Problem] = []  # in what brings them together
        self.removed: list[str] = []

    def load(self) -> None:
        """Read the file and everything it stands on."""
        chain = self._chain()
        base = chain[-1]
        self.origins = Origins(base)
        self.tables = dict(base.tables)
        self._take_files(base)
        if self.problems:  # without its segments nothing on a shaft has a place
            raise ModelError([*self.problems, *map(self._problem, self.faults)])
        self._include(base, self.tables.pop("include", None))
        for key in ("change", "add", "remove"):
            if key in self.tables:
                del self.tables[key]
                remedy = 'Write extends = "..." at the top, or change the file itself.'
                self.faults.append(Fault((key,), f"{key} belongs into a variant. {remedy}"))
        for variant in reversed(chain[:-1]):
            self._vary(variant)

    def model(self) -> Model:
        """The model, or every mistake."""
        model, faults = Model.from_tables(self.tables, self.removed)
        problems = [*self.problems, *map(self._problem, [*self.faults, *faults])]
        if problems:
            raise ModelError(dict.fromkeys(problems))
        return model.told_by(SourceLines(self.origins, self.tables))

    # ---- other files

    def _chain(self) -> list[Source]:
        """The file, the one it extends, and so on to the last."""
        chain = [self.source]
        while "extends" in chain[-1].tables:
            found = self._beside(chain[-1], chain[-1].tables["extends"], ("extends",))
            circle = found is not None and found.path in [each.path.resolve() for each in chain]
            if found is not None and (circle or len(chain) >= MOST_FILES):
                names = " -> ".join([*(each.shown for each in chain), found.shown])
                what = f"go round in a circle: {names}" if circle else f"are more than {MOST_FILES} files"
                self._tell(chain[-1], ("extends",), f"variants {what}. Let one of them stand alone.")
            if self.problems or found is None:
                raise ModelError(self.problems)
            chain.append(found)
        return chain

    def _beside(self, source: Source, name: object, path: Path) -> Source | None:
        """A file that one file names at some path, or None with the reason told."""
        found = source.beside(name)
        if isinstance(found, Source):
            return found
        self._tell(source, path, found)
        return None

    def _take_files(self, source: Source) -> None:
        """Put the tables that stand beside the model in the place of their names."""
        shafts = self.tables.get("shafts")
        for name, shaft in (shafts if isinstance(shafts, dict) else {}).items():
            if isinstance(shaft, dict) and {"segments_file", "contour_file"} & shaft.keys():
                self._take_shape(source, ("shafts", name), shaft)
        for path, table in list(_matrices(self.tables)):
            if "file" not in table:
                continue
            if "rows" in table:
                self.faults.append(Fault((*path, "file"), "file stands beside rows. Write one of them."))
            file = table.pop("file")
            found = self._beside(source, file, (*path, "file")) if "rows" not in table else None
            table.setdefault("rows", matrix_rows(found) if found is not None else None)

    def _take_shape(self, source: Source, path: Path, shaft: dict[str, Any]) -> None:
        """Put the segments or the contour out of a file in the place of its name."""
        key = "segments_file" if "segments_file" in shaft else "contour_file"
        file, others = shaft.pop(key), [other for other in SHAPES if other in shaft]
        words = (
            {word: shaft.pop(f"contour_{word}", None) for word in ("layer", "unit")} if key == "contour_file" else {}
        )
        if others:
            sentence = f"{key} stands beside {min(others)}. Write one of them."
            if "contour_file" in others:  # nothing is left to be read
                self._tell(source, (*path, key), sentence)
            else:
                self.faults.append(Fault((*path, key), sentence))
            return
        found = self._beside(source, file, (*path, key))
        if found is None:
            return
        to = key.removesuffix("_file")
        rows = segments(found) if key == "segments_file" else contour_points(found, **words)
        shaft[to], lines = rows
        if lines is None:  # a drawing has none
            self.origins.where[*path, to] = (found.shown, None)
        else:
            self.origins.remember_rows((*path, to), found.shown, lines)

    def _include(self, source: Source, names: object) -> None:
        """Take materials and limits out of other files."""
        if names is None:
            return
        if not isinstance(names, list) or len(names) > MOST_FILES:
            what = (
                f"this is {thing(names)}, not a list"
                if not isinstance(names, list)
                else f"more than {MOST_FILES} files"
            )
            self._tell(source, ("include",), f'{what}. Write include = ["our_materials.toml"].')
            return
        for index, name in enumerate(names):
            found = self._beside(source, name, ("include", index))
            if found is not None:
                for key, content in found.tables.items():
                    self._take_included(found, key, content)

    def _take_included(self, source: Source, key: str, content: object) -> None:
        if key in LATER_INCLUDED:
            self._tell(source, (key,), f"{key} is not known yet in this version. Leave it out.")
        elif key not in INCLUDED and key not in ("format", "title", "source"):
            brings = " and ".join(INCLUDED)
            self._tell(
                source, (key,), f"{key} cannot be included; an included file brings {brings}. Move it into the model."
            )
        elif key in INCLUDED and not isinstance(content, dict):
            self._tell(source, (key,), f"{key} is {thing(content)}, not a group of tables. Write [{key}.NAME].")
        elif key in INCLUDED and isinstance(content, dict):
            own = self.tables.setdefault(key, {})
            for name, table in content.items():
                if not isinstance(own, dict) or name in own:
                    already = "stands in the model or another included file already. Leave one out."
                    self._tell(source, (key, name), f"{quote(name)} {already}")
                else:
                    own[name] = table
                    self.origins.remember(source, (key, name), (key, name))

    # ---- variants

    def _vary(self, source: Source) -> None:
        """Apply one variant to the tables."""
        tables = source.tables
        for key in tables:
            if key not in VARIANT_KEYS:
                self._tell(source, (key,), f"{key} cannot stand in a variant. {_variant_remedy(key)}")
        work = Changing(self.tables)
        self._remove(source, work, tables.get("remove", []))
        self._change(source, work, tables.get("change", {}))
        self._add(source, work, tables.get("add", {}))
        for fault in work.faults:
            self._tell(source, fault.path, fault.sentence)
        self.tables = work.tables
        self.removed += work.removed
        self._take_files(source)
        self._include(source, tables.get("include"))
        for key in ("title", "question", "source", "format"):
            if key in tables:
                self.tables[key] = tables[key]
                self.origins.remember(source, (key,), (key,))

    def _remove(self, source: Source, work: Changing, names: object) -> None:
        if not isinstance(names, list):
            self._tell(source, ("remove",), f'this is {thing(names)}, not a list. Write remove = ["barring_wheel"].')
            return
        for index, name in enumerate(names):
            gone = work.remove(name, ("remove", index))
            if gone is not None and isinstance(gone[-1], int):
                self.origins.removed.append((gone[:-1], gone[-1]))

    def _change(self, source: Source, work: Changing, changes: object) -> None:
        if not isinstance(changes, Mapping):
            self._tell(source, ("change",), f"this is {thing(changes)}, not a table. Write [change], addresses below.")
            return
        whole = {tuple(map(str, path[1:])) for path in source.toml.assigned if path[:1] == ("change",)}
        for steps, value in leaves(changes, whole):
            path = work.change(".".join(steps), value, ("change", *steps))
            if path is not None:
                self.origins.remember(source, ("change", *steps), path)

    def _add(self, source: Source, work: Changing, groups: object) -> None:
        if not isinstance(groups, Mapping) or not all(isinstance(each, Mapping) for each in groups.values()):
            self._tell(source, ("add",), "add holds groups of tables. Write [add.masses.disc].")
            return
        for group, tables in groups.items():
            for name, table in tables.items():
                work.add(group, name, table, ("add", group, name))
                self.origins.remember(source, ("add", group, name), (group, name))

    def set(self, changes: Mapping[str, Any]) -> None:
        """Apply changes from outside the files."""
        work = Changing(self.tables)
        for place, value in changes.items():
            path = work.change(place, value, (SET, place))
            if path is not None:
                self.origins.where[path] = (SET, None)
        self.problems += [problem(str(fault.path[1]), fault.sentence, SET) for fault in work.faults]
        self.tables = work.tables

    # ---- telling

    def _tell(self, source: Source, path: Path, sentence: str) -> None:
        """A mistake in how a file is brought in, with its line there."""
        lines = source.toml.lines
        line = next((lines[path[:n]] for n in range(len(path), 0, -1) if path[:n] in lines), None)
        place = path[1:] if path[0] in ("change", "add") and len(path) > 1 else path
        self.problems.append(problem(address(_without_index(place)), sentence, source.shown, line))

    def _problem(self, fault: Fault) -> Problem:
        """A mistake in the tables, with file and line."""
        return problem(address(fault.path, self.tables), fault.sentence, *self.origins.find(fault.path))


def _variant_remedy(key: str) -> str:
    if key in GROUPS:
        return f"Write [add.{key}.NAME], or its keys under [change]."
    return nearest(key, VARIANT_KEYS) or "Write it under [change]."


def _without_index(path: Path) -> Path:
    """A path without the number of an entry at its end."""
    return path[:-1] if path and isinstance(path[-1], int) else path


def _matrices(tables: Mapping[str, Any]) -> Iterator[tuple[Path, dict[str, Any]]]:
    """The tables called matrix, each with its path."""
    waiting: list[tuple[Path, Any]] = [((group,), tables.get(group)) for group in ("bearings", "housing")]
    while waiting:
        path, table = waiting.pop()
        for key, each in table.items() if isinstance(table, dict) else ():
            if key == "matrix" and isinstance(each, dict):
                yield (*path, key), each
            else:
                waiting.append(((*path, key), each))
