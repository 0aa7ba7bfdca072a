"""What differs between two models, address by address."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from typing import TYPE_CHECKING, Any

from fe_shaft.model.plain import as_toml

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

#: Words that say what a model is for, not what it computes.
_TALK = frozenset(("title", "question", "source", "label"))


def differences(first: Model, second: Model) -> tuple[str, ...]:
    """Lines such as "layshaft.wheel_seat.diameter: 38 mm -> 44 mm", in the order of the first model."""
    one, two = dict(_flat(first.to_table())), dict(_flat(second.to_table()))
    out = [f"{key}: {value} -> {two[key]}" for key, value in one.items() if key in two and two[key] != value]
    out += [f"{key}: {value} -> not written" for key, value in one.items() if key not in two]
    return (*out, *(f"{key}: not written -> {value}" for key, value in two.items() if key not in one))


def _flat(table: Mapping[str, Any], path: tuple[str, ...] = ()) -> Iterator[tuple[str, str]]:
    """Addresses and texts; the group of a part is no part of its address."""
    for key, value in table.items():
        here = (*path, key)
        if key in _TALK:
            continue
        if key == "segments":
            yield from _segments(value, path)
        elif key == "contour":
            for number, point in enumerate(value, start=1):
                yield ".".join((*here[1:], f"point_{number}")), as_toml(point)
        elif isinstance(value, Mapping):
            yield from _flat(value, here)
        else:
            yield ".".join(here[1:] if len(here) > 2 else here), str(value)


def _segments(segments: Any, path: tuple[str, ...]) -> Iterator[tuple[str, str]]:
    for number, segment in enumerate(segments, start=1):
        name = segment.get("name", f"segment_{number}")
        for key, value in segment.items():
            here = (*path[1:], name, key)
            if isinstance(value, Mapping):  # a keyway, a diameter with its band
                yield from ((".".join((*here, inner)), str(each)) for inner, each in value.items())
            elif key != "name":
                yield ".".join(here), str(value)
