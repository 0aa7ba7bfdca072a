"""File and line of every value of a model that may come from several files."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from typing import Any

from fe_shaft.io.model_source import Source
from fe_shaft.model.address import address

Path = tuple[str | int, ...]
Where = tuple[str, int | None]  # file as shown, line


class Origins:
    """Where the values in the tables of a model were written.

    Parameters
    ----------
    base : Source
        The file that the others change; its lines are scanned when they are asked for.
    """

    def __init__(self, base: Source) -> None:
        self.base = base
        self.where: dict[Path, Where] = {}  # of what other files brought
        self.rows: dict[Path, tuple[str, list[int]]] = {}  # of segments out of spreadsheets
        self.removed: list[tuple[Path, int]] = []  # segments that variants took away: list and index, one by one

    def remember(self, source: Source, there: Path, here: Path) -> None:
        """The lines of what a file brought, under the path where it now stands."""
        for old in [path for path in self.where if path[: len(here)] == here]:
            del self.where[old]
        for path, line in source.toml.lines.items():
            if path[: len(there)] == there:
                self.where[here + path[len(there) :]] = (source.shown, line)

    def remember_rows(self, path: Path, file: str, lines: list[int]) -> None:
        """The lines of segments out of a spreadsheet."""
        self.where[path] = (file, 1)
        self.rows[path] = (file, lines)

    def find(self, path: Path) -> Where:
        """File and line of a path in the tables, or of the nearest table around it."""
        for length in range(len(path), 0, -1):
            part = path[:length]
            before = self._before_removals(part)
            where = self.where.get(part) or self._row(before)
            if where is not None:
                return where
            line = self.base.toml.lines.get(before)
            if line is not None:
                return self.base.shown, line
        return self.base.shown, None

    def paths(self) -> Iterator[Path]:
        """Every path of the tables that was written somewhere."""
        yield from self.where
        written = [*self.base.toml.lines]
        written += [(*prefix, index) for prefix, (_, lines) in self.rows.items() for index in range(len(lines))]
        yield from (path for each in written if (path := self._after_removals(each)) is not None)

    def _row(self, path: Path) -> Where | None:
        """File and line of a segment out of a spreadsheet."""
        if path[:-1] not in self.rows:
            return None
        file, lines = self.rows[path[:-1]]
        index = int(path[-1])
        return (file, lines[index]) if index < len(lines) else None

    def _before_removals(self, path: Path) -> Path:
        """The path that a segment had before others were removed."""
        for prefix, removed in reversed(self.removed):
            depth = len(prefix)
            if path[:depth] == prefix and len(path) > depth and int(path[depth]) >= removed:
                path = (*prefix, int(path[depth]) + 1, *path[depth + 1 :])
        return path

    def _after_removals(self, path: Path) -> Path | None:
        """The path that a segment has after others were removed; None if it is gone itself."""
        for prefix, removed in self.removed:
            depth = len(prefix)
            if path[:depth] == prefix and len(path) > depth:
                index = int(path[depth])
                if index == removed:
                    return None
                path = (*prefix, index - (index > removed), *path[depth + 1 :])
        return path


class SourceLines(Mapping[str, tuple[str, int]]):
    """File and line of every address of a model, found when first asked for.

    Parameters
    ----------
    origins : Origins
    tables : mapping
        The model's tables, for the names of segments.
    """

    def __init__(self, origins: Origins, tables: Mapping[str, Any]) -> None:
        self._origins, self._tables = origins, tables
        self._found: dict[str, tuple[str, int]] | None = None

    @property
    def _all(self) -> dict[str, tuple[str, int]]:
        if self._found is None:
            found = {address(path, self._tables): self._origins.find(path) for path in self._origins.paths()}
            self._found = {place: (file, line) for place, (file, line) in found.items() if line is not None}
        return self._found

    def __getitem__(self, place: str) -> tuple[str, int]:
        return self._all[place]

    def __iter__(self) -> Iterator[str]:
        return iter(self._all)

    def __len__(self) -> int:
        return len(self._all)
