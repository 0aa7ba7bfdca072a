"""Model files: read with file and line in every sentence, all mistakes at once; written back as text."""

from __future__ import annotations

import os
import tomllib
from collections.abc import Mapping
from typing import Any

from fe_shaft.errors import UsageError, quote
from fe_shaft.files import write_whole
from fe_shaft.io.model_loader import Loader
from fe_shaft.io.model_source import Source
from fe_shaft.io.toml_text import to_toml
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.heading import FORMAT
from fe_shaft.model.system import Model


def read(path: str | os.PathLike[str], changes: Mapping[str, Any] | None = None) -> Model:
    """Read a model file.

    Parameters
    ----------
    path : path-like
        A TOML file; a variant (``extends``) is followed to its end.
    changes : mapping, optional
        Values by address that take the place of the file's, as `Model.change` takes them.

    Returns
    -------
    Model

    Raises
    ------
    ModelError
        With every mistake found, each with file and line.
    FileError
        If a file cannot be read.
    """
    loader = Loader(Source.named(path))
    loader.load()
    if changes:
        loader.set(changes)
    return loader.model()


def write_text(model: Model) -> str:
    """The whole model as the text of a model file; values as the user wrote them.

    Parameters
    ----------
    model : Model
        Any model, also a variant or one made by a script.
    """
    return to_toml({"format": FORMAT, **model.to_table()}, GROUPS)


def write(model: Model, path: str | os.PathLike[str]) -> None:
    """Write a model file: the whole model, values as the user wrote them.

    Parameters
    ----------
    model : Model
        Any model, also a variant or one made by a script.
    path : path-like
        The file; it is replaced as a whole or not at all.

    Raises
    ------
    FileError
        If it cannot be written.
    """
    write_whole(path, write_text(model))


def parse_setting(text: str) -> tuple[str, Any]:
    """Address and value of ``ADDRESS=VALUE``, as the command line has it.

    Parameters
    ----------
    text : str
        E.g. ``layshaft.wheel_seat.diameter=44 mm`` or ``wheel.teeth=86``; lists and tables as TOML writes them.
    """
    place, equals, value = text.partition("=")
    place, value = place.strip(), value.strip()
    if not equals or not place or not value:
        example = '--set "layshaft.wheel_seat.diameter=44 mm"'
        raise UsageError(f"--set {quote(text)}: no address and value. Write {example}.")
    try:
        return place, tomllib.loads(f"value = {value}")["value"] if "\n" not in value else value
    except (ValueError, RecursionError):
        return place, value
