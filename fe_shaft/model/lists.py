"""Kinds of several values: lists, and names with a number each."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Any

from typing_extensions import override

from fe_shaft.model.kinds import LONGEST_LIST, Factor, Kind, Reference, shown, thing
from fe_shaft.model.refusal import refuse


class Listed(Kind):
    """A list, every entry of one kind, none twice."""

    def __init__(self, kind: Kind, example: str, *, least: int = 0) -> None:
        self.kind, self.example, self.least = kind, example, least
        self.caption = f"list of: {kind.caption}"

    @override
    def check(self, raw: Any) -> tuple[Any, ...]:
        if not isinstance(raw, list | tuple):
            simple = isinstance(raw, str) and raw.isprintable() and '"' not in raw and len(raw) < 40
            remedy = f'["{raw}"]' if simple else self.example
            raise refuse(f"{shown(raw)} is {thing(raw)}, not a list. Write {remedy}.")
        if len(raw) > LONGEST_LIST:
            raise refuse(f"the list has {len(raw)} entries; {LONGEST_LIST} at most are read.")
        if len(raw) < self.least:
            raise refuse(f"the list is empty. Write {self.example}.")
        values = tuple(self.kind.check(each) for each in raw)
        for index, value in enumerate(values):
            if value in values[:index]:
                raise refuse(f"{shown(raw[index])} stands twice. Leave one out.")
        return values

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "array", "items": self.kind.json(), "minItems": self.least, "uniqueItems": True}


class Shares(Kind):
    """Names with a number each, such as ``{ sprocket = 0.8, pump = 0.2 }``."""

    def __init__(self, number: Factor, *, total: float | None = None, lists: bool = False, word: bool = False) -> None:
        self.number, self.total, self.lists, self.word = number, total, lists, word
        forms = ["name"] * word + ["list of names"] * lists + ["names with numbers"]
        self.caption = " | ".join(forms)

    @override
    def check(self, raw: Any) -> Any:
        if self.word and isinstance(raw, str):
            return Reference().check(raw)
        if self.lists and isinstance(raw, list | tuple):
            return Listed(Reference(), '["belt_pull"]').check(raw)
        if not isinstance(raw, Mapping):
            raise refuse(f"{shown(raw)} is {thing(raw)}; here stands {self.caption}. Write {{ name = 1 }}.")
        shares = {}
        for name, share in raw.items():
            Reference().check(name)
            try:
                shares[name] = self.number.check(share)
            except Exception as error:
                raise refuse(f"{name}: {error}") from None
        if self.total is not None and not math.isclose(sum(shares.values()), self.total, rel_tol=1e-6):
            raise refuse(f"the shares add up to {sum(shares.values()):.6g}, not {self.total:g}. Change one of them.")
        return shares

    @override
    def json(self) -> dict[str, Any]:
        forms: list[dict[str, Any]] = [{"type": "string"}] * self.word
        forms += [{"type": "array", "items": {"type": "string"}}] * self.lists
        return {"anyOf": [*forms, {"type": "object", "additionalProperties": self.number.json()}]}
