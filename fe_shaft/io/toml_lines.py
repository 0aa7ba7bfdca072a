"""Where in a TOML text each key stands, since the parser of the standard library forgets it.

The text is known to be valid TOML (the parser read it before), so that a scan of keys, strings and brackets suffices.
"""

from __future__ import annotations

import re
from bisect import bisect_right
from dataclasses import dataclass

Path = tuple[str | int, ...]

_BLANK = re.compile(r"(?:[ \t\r\n]|#[^\n]*)*")
_KEY = re.compile(r"""[ \t]*("(?:[^"\\]|\\.)*"|'[^']*'|[A-Za-z0-9_-]+)[ \t]*""")
_STRING = re.compile(
    r'"""(?:[^"\\]|\\.|"(?!""))*"""(?:"{1,2}(?!"))?'
    r"|'''(?:[^']|'(?!''))*'''(?:'{1,2}(?!'))?"
    r'|"(?:[^"\\]|\\.)*"'
    r"|'[^']*'",
    re.DOTALL,
)
_SCALAR = re.compile(r"[^,\]}#\n]+")
_ESCAPE = re.compile(r"\\(?:u([0-9A-Fa-f]{4})|U([0-9A-Fa-f]{8})|(.))")
_LETTERS = {"b": "\b", "t": "\t", "n": "\n", "f": "\f", "r": "\r"}


@dataclass(frozen=True)
class TomlLines:
    """Lines of a TOML text.

    Parameters
    ----------
    lines : dict
        Line, counted from 1, of each key, table and entry of an array, by its path in the nested tables.
    assigned : set
        Paths that stand before a ``=``; a table among them was written in braces.
    """

    lines: dict[Path, int]
    assigned: set[Path]


def scan(text: str) -> TomlLines:
    """The lines of every key of a valid TOML text."""
    return _Scanner(text).run()


class _Scanner:
    """One pass over the text; `at` is the next sign to be read."""

    def __init__(self, text: str) -> None:
        self.text = text
        self.at = 0
        self.lines: dict[Path, int] = {}
        self.assigned: set[Path] = set()
        self.counts: dict[Path, int] = {}  # entries of arrays of tables so far
        self.ends = [match.start() for match in re.finditer("\n", text)]

    def run(self) -> TomlLines:
        table: Path = ()
        while self._skip_blank():
            if self.text[self.at] == "[":
                table = self._header()
            else:
                self._assignment(table)
        return TomlLines(self.lines, self.assigned)

    def _skip_blank(self) -> bool:
        match = _BLANK.match(self.text, self.at)
        assert match is not None  # the pattern matches nothing as well
        self.at = match.end()
        return self.at < len(self.text)

    def _line(self, at: int) -> int:
        return bisect_right(self.ends, at - 1) + 1

    def _header(self) -> Path:
        start = self.at
        many = self.text.startswith("[[", self.at)
        self.at += 2 if many else 1
        keys = self._keys()
        self.at += 2 if many else 1
        path: Path = ()
        for key in keys[:-1]:
            path = self._last((*path, key))
            self.lines.setdefault(path, self._line(start))
        path = (*path, keys[-1])
        if many:
            self.lines.setdefault(path, self._line(start))
            self.counts[path] = self.counts.get(path, -1) + 1
        path = self._last(path)
        self.lines[path] = self._line(start)
        return path

    def _last(self, path: Path) -> Path:
        """The path itself, or that of the newest entry if it is an array of tables."""
        return (*path, self.counts[path]) if path in self.counts else path

    def _keys(self) -> list[str]:
        keys = []
        while True:
            match = _KEY.match(self.text, self.at)
            if match is None:
                raise ValueError(f"no key at {self.at}")
            self.at = match.end()
            keys.append(_plain(match[1]))
            if not self.text.startswith(".", self.at):
                return keys
            self.at += 1

    def _assignment(self, table: Path) -> None:
        start = self.at
        path = table
        for key in self._keys():
            path = (*path, key)
            self.lines.setdefault(path, self._line(start))
        self.assigned.add(path)
        self.at += 1  # the equals sign
        self._skip_blank()
        self._value(path)

    def _value(self, path: Path) -> None:
        sign = self.text[self.at]
        if sign == "[":
            self._array(path)
        elif sign == "{":
            self._braces(path)
        else:
            match = (_STRING if sign in "\"'" else _SCALAR).match(self.text, self.at)
            if match is None:
                raise ValueError(f"no value at {self.at}")
            self.at = match.end()

    def _array(self, path: Path) -> None:
        self.at += 1
        index = 0
        while self._skip_blank() and self.text[self.at] != "]":
            if self.text[self.at] == ",":
                self.at += 1
                continue
            self.lines[*path, index] = self._line(self.at)
            self._value((*path, index))
            index += 1
        self.at += 1

    def _braces(self, path: Path) -> None:
        self.at += 1
        while self._skip_blank() and self.text[self.at] != "}":
            if self.text[self.at] == ",":
                self.at += 1
                continue
            self._assignment(path)
        self.at += 1


def _plain(key: str) -> str:
    """A key without its quotes."""
    if key[0] == "'":
        return key[1:-1]
    return _ESCAPE.sub(_unescaped, key[1:-1]) if key[0] == '"' else key


def _unescaped(match: re.Match[str]) -> str:
    code = match[1] or match[2]
    return chr(int(code, 16)) if code else _LETTERS.get(match[3], match[3])
