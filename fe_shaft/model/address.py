"""Addresses: how the path of a value in the tables reads in a sentence, a limit, a variant."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from typing import Any

from fe_shaft.model.groups import GROUPS
from fe_shaft.model.plain import joined
from fe_shaft.model.shaft import inside_shaft
from fe_shaft.model.words import Named


def address(path: tuple[str | int, ...], source: Iterable[Named] | Mapping[str, Any] = ()) -> str:
    """The address of a value.

    Parameters
    ----------
    path : tuple
        Its path in the tables of the model file, e.g. ``("shafts", "layshaft", "segments", 1, "length")``.
    source : nouns or tables
        Where the names of segments can be looked up.

    Returns
    -------
    str
        E.g. ``layshaft.wheel_seat.length``; a segment without a name by its number from 1.
    """
    if not path or path[0] not in GROUPS or len(path) < 2:
        return joined(path)
    group, name, *rest = path
    inside = tuple(rest)
    if group == "shafts":
        return joined([name, *inside_shaft(_segments(str(name), source), inside)])
    return joined([name, *inside])


def _segments(name: str, source: Iterable[Named] | Mapping[str, Any]) -> Any:
    if isinstance(source, Mapping):
        shafts = source.get("shafts")
        shaft = shafts.get(name) if isinstance(shafts, Mapping) else None
        return shaft.get("segments") if isinstance(shaft, Mapping) else getattr(shaft, "segments", None)
    return next((getattr(one, "segments", None) for one in source if one.name == name), None)
