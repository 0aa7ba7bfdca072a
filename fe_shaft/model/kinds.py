"""Kinds of values: text, names, counts, choices, lists. Each checks one raw value and says one sentence about it."""

from __future__ import annotations

import math
import re
from collections.abc import Mapping
from datetime import date, time
from numbers import Integral, Real
from typing import Any

from pydantic import GetCoreSchemaHandler, ValidationInfo
from pydantic_core import CoreSchema, core_schema
from typing_extensions import override

from fe_shaft.errors import nearest, quote
from fe_shaft.model.refusal import refuse

LONGEST_TEXT = 4000  # characters of a source, a question, a title
LONGEST_NAME = 60
LONGEST_LIST = 10_000
RESERVED = ("left", "right", "middle", "every", "to")
NAME = re.compile(r"[^\W\d_][\w-]*")


def shown(raw: object) -> str:
    """A raw value in a sentence: short, one line, as TOML writes it."""
    if isinstance(raw, str):
        return quote(raw)
    if isinstance(raw, bool):
        return str(raw).lower()
    if isinstance(raw, Integral | Real):
        return str(raw)[:40]
    if isinstance(raw, date | time):
        return str(raw)
    return "this" if isinstance(raw, Mapping | list | tuple | set) else quote(type(raw).__name__)


def thing(raw: object) -> str:
    """What sort of thing a raw value is."""
    if isinstance(raw, bool):
        return "yes or no"
    if isinstance(raw, Integral | Real):
        return "a number"
    if isinstance(raw, str):
        return "text"
    if isinstance(raw, Mapping):
        return "a table"
    if isinstance(raw, list | tuple | set):
        return "a list"
    if isinstance(raw, date | time):
        return "a date or time"
    return "something else"


class Kind:
    """Base of the kinds: one check, one caption, one JSON schema."""

    caption: str = ""

    def check(self, raw: Any) -> Any:
        """The value inside, or a refusal."""
        raise NotImplementedError

    def check_in(self, raw: Any, info: ValidationInfo) -> Any:
        """The same, for kinds that must know the table around."""
        return self.check(raw)

    def json(self) -> dict[str, Any]:
        """What a JSON Schema says of it."""
        return {}

    def __get_pydantic_core_schema__(self, source: Any, handler: GetCoreSchemaHandler) -> CoreSchema:
        return core_schema.with_info_plain_validator_function(self.check_in)

    def __get_pydantic_json_schema__(self, schema: CoreSchema, handler: Any) -> dict[str, Any]:
        return self.json()


class Text(Kind):
    """Free text."""

    caption = "text"

    @override
    def check(self, raw: Any) -> str:
        if not isinstance(raw, str):
            raise refuse(f'{shown(raw)} is {thing(raw)}, not text. Write it in quotes: "...".')
        if len(raw) > LONGEST_TEXT:
            raise refuse(f"the text has {len(raw)} characters; {LONGEST_TEXT} at most are kept. Shorten it.")
        if not all(sign.isprintable() or sign in "\n\t" for sign in raw):
            raise refuse(f"{shown(raw)} holds control characters. Leave them out.")
        return raw

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string", "maxLength": LONGEST_TEXT}


def name_fault(name: str) -> str | None:
    """Why a text cannot be a name, or None."""
    if len(name) > LONGEST_NAME:
        return (
            f"{quote(name)} has {len(name)} characters; a name has {LONGEST_NAME} at most. Shorten it; label = ... may "
            "be long."
        )
    if name in RESERVED:
        return f"{quote(name)} has a meaning of its own in positions and limits. Choose another name."
    if not NAME.fullmatch(name):
        better = re.sub(r"[^\w-]+", "_", name).strip("_-0123456789")
        hint = f" Write {better}." if NAME.fullmatch(better) else ""
        return f"{quote(name)} is not a name: a letter first, then letters, digits, _ and -.{hint}"
    return None


class Name(Kind):
    """The name of a part, which is its address."""

    caption = "name"

    @override
    def check(self, raw: Any) -> str:
        if not isinstance(raw, str):
            raise refuse(f'{shown(raw)} is {thing(raw)}, not a name. Write it in quotes: "wheel".')
        if fault := name_fault(raw):
            raise refuse(fault)
        return raw

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string", "pattern": r"^[^\W\d_][\w-]*$", "maxLength": LONGEST_NAME}


class FreeName(Name):
    """A name that may hold dots, spaces and digits first, as materials do (42CrMo4, 1.4301)."""

    @override
    def check(self, raw: Any) -> str:
        if not isinstance(raw, str):
            raise refuse(f'{shown(raw)} is {thing(raw)}, not a name. Write it in quotes: "42CrMo4".')
        if not re.fullmatch(r"\w[\w .,+/()-]*", raw) or len(raw) > LONGEST_NAME or raw != raw.strip():
            raise refuse(
                f"{quote(raw)} is not a name of a material: letters, digits, space and .,+/()-_ , {LONGEST_NAME} at "
                "most."
            )
        return raw

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string", "maxLength": LONGEST_NAME}


class Reference(Kind):
    """The name of something in the model; whether it is there is checked when all names are known."""

    caption = "name"

    @override
    def check(self, raw: Any) -> str:
        if not isinstance(raw, str) or not raw:
            raise refuse(f'{shown(raw)} is {thing(raw)}, not a name. Write it in quotes: "wheel".')
        if len(raw) > 3 * LONGEST_NAME:
            raise refuse(f"{quote(raw)} is too long for a name. Shorten it.")
        return raw

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string"}


class Count(Kind):
    """A whole number; no unit."""

    caption = "whole number"

    def __init__(self, least: int, most: int = 100_000) -> None:
        self.least, self.most = least, most

    @override
    def check(self, raw: Any) -> int:
        if isinstance(raw, bool) or not isinstance(raw, Integral):
            whole = isinstance(raw, float) and raw.is_integer() and abs(raw) < 1e9
            remedy = f"Write {raw:.0f}." if whole else "Write it without quotes and unit, as in 19."
            raise refuse(f"{shown(raw)} is not a whole number. {remedy}")
        if not self.least <= int(raw) <= self.most:
            span = f"{self.least} to {self.most}" if self.least < self.most else f"{self.least}"
            raise refuse(f"{shown(raw)} is not possible here. Write {span}.")
        return int(raw)

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "integer", "minimum": self.least, "maximum": self.most}


class Factor(Kind):
    """A bare number, such as a factor or a share."""

    caption = "number"

    def __init__(self, least: float, most: float, *, open_at_least: bool = False) -> None:
        self.least, self.most, self.open = least, most, open_at_least

    @override
    def check(self, raw: Any) -> float:
        if isinstance(raw, bool) or not isinstance(raw, Real):
            raise refuse(f"{shown(raw)} is {thing(raw)}, not a number. Write a bare number without quotes, as in 1.15.")
        try:
            number = float(raw)
        except OverflowError:
            number = math.inf
        if not math.isfinite(number):
            raise refuse(f"{number} is not a finite number. Write {self._range()}.")
        if not self.least <= number <= self.most or (self.open and number == self.least):
            raise refuse(f"{shown(raw)} is not possible here. Write {self._range()}.")
        return number + 0.0

    def _range(self) -> str:
        return (
            f"a number {'above' if self.open else 'from'} {self.least:g} {'up ' if self.open else ''}to {self.most:g}"
        )

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "number", "exclusiveMinimum" if self.open else "minimum": self.least, "maximum": self.most}


class Flag(Kind):
    """Yes or no."""

    caption = "true or false"

    @override
    def check(self, raw: Any) -> bool:
        if not isinstance(raw, bool):
            raise refuse(f"{shown(raw)} is {thing(raw)}, not yes or no. Write true or false, without quotes.")
        return raw

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "boolean"}


class Choice(Kind):
    """One word of a fixed list."""

    def __init__(self, *words: str, later: Mapping[str, str] | None = None) -> None:
        self.words, self.later = words, later or {}
        self.caption = " | ".join(words)

    @override
    def check(self, raw: Any) -> str:
        if isinstance(raw, str) and raw in self.words:
            return raw
        if isinstance(raw, str) and raw in self.later:
            raise refuse(f"{quote(raw)} is not known yet in this version. {self.later[raw]}")
        near = nearest(raw, self.words) if isinstance(raw, str) else ""
        words = " or ".join(f'"{word}"' for word in self.words)
        raise refuse(f"{shown(raw)} is not possible here. {near if near.startswith('Nearest') else f'Write {words}.'}")

    @override
    def json(self) -> dict[str, Any]:
        return {"enum": list(self.words)}


def unknown_name(what: str, name: str, known: Any) -> str:
    """The sentence about a name that is not there."""
    return f"no {what} is called {quote(name)}. {nearest(name, known)}".rstrip()
