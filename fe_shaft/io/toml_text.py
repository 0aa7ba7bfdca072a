"""Writing a model as TOML text."""

from __future__ import annotations

import re
from collections.abc import Mapping
from typing import Any

_BARE = re.compile(r"[A-Za-z0-9_-]+")
_ESCAPES = {'"': '\\"', "\\": "\\\\", "\n": "\\n", "\t": "\\t", "\r": "\\r", "\b": "\\b", "\f": "\\f"}


def to_toml(tables: Mapping[str, Any], groups: Mapping[str, Any]) -> str:
    """The text of a model file.

    Parameters
    ----------
    tables : mapping
        The model as `Model.to_table` gives it.
    groups : mapping
        Names of the groups: each of their tables gets a heading of its own.

    Returns
    -------
    str
        Valid TOML that reads as the same tables.
    """
    top = [f"{_key(key)} = {value(each)}" for key, each in tables.items() if key not in groups and not _is_table(each)]
    blocks = ["\n".join(top)] if top else []
    blocks += [_block([key], each) for key, each in tables.items() if key not in groups and _is_table(each)]
    for group in groups:
        blocks += [_block([group, name], table) for name, table in tables.get(group, {}).items()]
    return "\n\n".join(blocks) + "\n"


def _is_table(each: object) -> bool:
    return isinstance(each, Mapping)


def _block(heading: list[str], table: Mapping[str, Any]) -> str:
    lines = [f"[{'.'.join(map(_key, heading))}]"]
    for key, each in table.items():
        if key in ("segments", "contour"):
            lines.append(f"{key} = [")
            lines += [f"  {value(row)}," for row in each]
            lines.append("]")
        else:
            lines.append(f"{_key(key)} = {value(each)}")
    return "\n".join(lines)


def _key(key: str) -> str:
    return key if _BARE.fullmatch(key) else _text(key)


def _text(text: str) -> str:
    signs = (_ESCAPES.get(sign) or (sign if sign.isprintable() else _code(sign)) for sign in text)
    return f'"{"".join(signs)}"'


def _code(sign: str) -> str:
    return f"\\u{ord(sign):04X}" if ord(sign) < 0x10000 else f"\\U{ord(sign):08X}"


def value(each: object) -> str:
    """One value in TOML; tables in braces."""
    if isinstance(each, bool):
        return str(each).lower()
    if isinstance(each, str):
        return _text(each)
    if isinstance(each, int):
        return str(each)
    if isinstance(each, float):
        return repr(each)
    if isinstance(each, Mapping):
        return f"{{ {', '.join(f'{_key(key)} = {value(one)}' for key, one in each.items())} }}" if each else "{}"
    if isinstance(each, list | tuple):
        return f"[{', '.join(value(one) for one in each)}]"
    raise TypeError(f"{type(each).__name__} has no TOML form")
