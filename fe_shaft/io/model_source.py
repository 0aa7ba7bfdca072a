"""Files as the reader of models meets them: only regular ones, of bounded size, inside the model's folder."""

from __future__ import annotations

import os
import re
import stat
import tomllib
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path
from typing import Any

from fe_shaft.errors import FileError, ModelError, quote
from fe_shaft.io.toml_lines import TomlLines, scan
from fe_shaft.io.toml_syntax import syntax_fault
from fe_shaft.model.refusal import problem

MOST_BYTES = 8_000_000
_MANY_DIGITS = re.compile(r"[\d_]{640,}")  # the least number of digits that Python may be told to refuse
# Keys of so many steps cost the parser time that grows with their square.
_DEEP_KEY = re.compile(r"""(?<![\w.'"-])(?:(?:[\w-]++|"[^"\n]*+"|'[^'\n]*+')[ \t]*+\.[ \t]*+){40}""")
MOST_DEPTH = 40  # tables and lists in each other; a model needs 6


@dataclass(frozen=True)
class Source:
    """One file of a model.

    Parameters
    ----------
    path : Path
        Where it is.
    shown : str
        How messages call it.
    folder : Path
        The folder that nothing of the model may leave.
    """

    path: Path
    shown: str
    folder: Path

    @classmethod
    def named(cls, path: str | os.PathLike[str]) -> Source:
        """The file that the user names; its folder becomes the model's."""
        shown = os.fspath(path)
        if not isinstance(shown, str) or not shown or "\0" in shown:
            raise FileError(f"{quote(str(shown))} is not the name of a file. Name a model file, such as layshaft.toml.")
        return cls(Path(shown), shown, Path(shown).absolute().parent.resolve())

    def beside(self, name: object) -> Source | str:
        """A file named in this one, or the sentence why it cannot be taken."""
        if not isinstance(name, str) or not name.strip():
            return 'this is not the name of a file. Write it in quotes, such as "layshaft.toml".'
        if "\\" in name or "\0" in name or ":" in name or name.startswith(("/", "~")):
            return (
                f"{quote(name)} is not a path inside the model's folder. Write it relative to this file, with / "
                "between folders."
            )
        try:
            path = self.path.absolute().parent / name
            real = path.resolve()
            inside = real.is_relative_to(self.folder)
        except (OSError, RuntimeError, ValueError):
            return f"{quote(name)} cannot be followed. Check the name."
        if not inside:
            return f"{quote(name)} leads out of the model's folder. Put the file beside the model."
        if not real.exists():
            return f"{quote(name)} does not exist. Check its name and folder."
        return Source(real, str(Path(self.shown).parent / name), self.folder)

    @cached_property
    def data(self) -> bytes:
        """All bytes of the file."""
        try:
            with open(self.path, "rb", opener=_regular) as file:
                data = file.read(MOST_BYTES + 1)
        except _NotRegularError:
            raise FileError(f"{self.shown} is not a regular file. Name a model file, such as layshaft.toml.") from None
        except FileNotFoundError:
            raise FileError(f"{self.shown} does not exist. Check its name and folder.") from None
        except (IsADirectoryError, PermissionError) as error:
            what = (
                "is a folder. Name a file in it"
                if isinstance(error, IsADirectoryError)
                else "may not be read. Check its permissions"
            )
            raise FileError(f"{self.shown} {what}.") from None
        except (OSError, ValueError) as error:
            reason = getattr(error, "strerror", None) or "its name is not possible"
            raise FileError(f"{self.shown} cannot be read: {reason.lower()}.") from None
        if len(data) > MOST_BYTES:
            raise FileError(
                f"{self.shown} has more than {MOST_BYTES // 1_000_000} MB; no more is read. Put long shafts into "
                "segments_file."
            )
        return data

    @cached_property
    def text(self) -> str:
        """The file as text."""
        data = self.data
        if data.startswith((b"\xff\xfe", b"\xfe\xff")):
            raise self.error(1, "the file is UTF-16. Save it as UTF-8.")
        try:
            text = data.decode("utf-8-sig")
        except UnicodeDecodeError as error:
            line = data.count(b"\n", 0, error.start) + 1
            raise self.error(
                line, f"byte {data[error.start]:#04x} is not UTF-8. Save the file as UTF-8 text."
            ) from None
        if "\0" in text:
            raise self.error(
                text.count("\n", 0, text.index("\0")) + 1,
                "the file is not text: it holds zero bytes. Name a model file.",
            )
        if not text.strip():
            raise self.error(None, "the file is empty. `fe-shaft new` writes a starter.")
        return text

    @cached_property
    def tables(self) -> dict[str, Any]:
        """The file as nested tables."""
        if deep := _DEEP_KEY.search(self.text):
            line = self.text.count("\n", 0, deep.start()) + 1
            raise self.error(line, "a key has too many dots. A model needs three steps.")
        try:
            tables = tomllib.loads(self.text)
        except tomllib.TOMLDecodeError as error:
            raise self.error(*syntax_fault(str(error), self.text)) from None
        except RecursionError:
            raise self.error(None, "brackets stand too deep in each other. A model needs six levels.") from None
        except ValueError:  # a whole number of thousands of digits
            long = _MANY_DIGITS.search(self.text)
            where = self.text.count("\n", 0, long.start()) + 1 if long else None
            raise self.error(where, "a number has too many digits. Shorten it.") from None
        if _depth(tables) > MOST_DEPTH:
            raise self.error(None, "tables stand too deep in each other. A model needs six levels.")
        return tables

    @cached_property
    def toml(self) -> TomlLines:
        """Lines of its keys."""
        try:
            return scan(self.text.replace("\r\n", "\n"))
        except (ValueError, IndexError, RecursionError):  # no line is better than no message
            return TomlLines({}, set())

    def error(self, line: int | None, sentence: str) -> ModelError:
        """A mistake of the file as a whole."""
        return ModelError(problem("", sentence, self.shown, line))


class _NotRegularError(Exception):
    """A device, pipe or socket."""


def _regular(path: str, flags: int) -> int:
    """Open without waiting for a pipe, and only what is a file."""
    handle = os.open(path, flags | getattr(os, "O_NONBLOCK", 0))
    mode = os.fstat(handle).st_mode
    if stat.S_ISREG(mode):
        return handle
    os.close(handle)
    if stat.S_ISDIR(mode):
        raise IsADirectoryError
    raise _NotRegularError


def _depth(tables: Mapping[str, Any]) -> int:
    """How deep tables and lists stand in each other."""
    level: list[Any] = [tables]
    depth = 0
    while level and depth <= MOST_DEPTH:
        depth += 1
        level = [
            each
            for one in level
            for each in (one.values() if isinstance(one, dict) else one)
            if isinstance(each, dict | list)
        ]
    return depth
