"""Positions along a shaft: lengths from its left end, and anchors on segments and parts, followed to the end."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Annotated, Any, Literal

from typing_extensions import override

from fe_shaft.errors import quote
from fe_shaft.model.kinds import NAME, Kind, name_fault, shown, thing
from fe_shaft.model.refusal import refuse
from fe_shaft.units import UnitError, Value, parse

Side = Literal["left", "middle", "right"]
_NUMBER = re.compile(r"\s*[~+-]?\s*[.,]?\d")
_SIGN = re.compile(r"\s[+-]\s|\+")


@dataclass(frozen=True, slots=True)
class Position:
    """A position as written: a length from the shaft's left end, or an anchor and an offset.

    Parameters
    ----------
    text : str
        As the user wrote it.
    anchor : tuple of str
        Names that lead to the anchor: a part or segment, or shaft and segment; empty for a plain length.
    side : "left", "middle" or "right"
        Face of the anchor.
    offset : Value
        From the anchor (or the shaft's left end) to the right [m].
    """

    text: str
    anchor: tuple[str, ...]
    side: Side
    offset: Value

    @property
    def bare_name(self) -> str | None:
        """The name if the position is a name alone."""
        return self.anchor[-1] if self.anchor and self.side == "middle" and not self.offset.text else None


@dataclass(frozen=True, slots=True)
class Place:
    """Where a part stands on its shaft.

    Parameters
    ----------
    shaft : str
        Name of the shaft.
    x, left, right : float
        Middle and faces [m] from that shaft's left end.
    """

    shaft: str
    x: float
    left: float
    right: float


_NOWHERE = Value(0.0, "")


class PositionKind(Kind):
    """``62 mm``, ``wheel_seat``, ``wheel + 12 mm``, ``collar.right - 2 mm``."""

    caption = "position"

    @override
    def check(self, raw: Any) -> Position:
        if isinstance(raw, Position):
            raw = raw.text
        if not isinstance(raw, str):
            value = self._length(raw)
            return Position(value.text, (), "left", value)
        if not raw.strip():
            raise refuse('the text is empty. Write a length or a name, as in "62 mm" or "wheel_seat".')
        if _NUMBER.match(raw) or len(raw) > 300:
            return Position(raw, (), "left", self._length(raw))
        sign = _SIGN.search(raw)
        if sign is None:
            return Position(raw, *self._anchor(raw, raw), _NOWHERE)
        anchor, rest = raw[: sign.start()].strip(), raw[sign.end() :].strip()
        return Position(raw, *self._anchor(raw, anchor), self._offset(raw, anchor, sign[0].strip(), rest))

    def _anchor(self, raw: str, text: str) -> tuple[tuple[str, ...], Side]:
        names = [step.strip() for step in text.split(".")]
        side: Side = "middle"
        if len(names) > 1 and names[-1] in ("left", "right"):
            side = "left" if names.pop() == "left" else "right"
        elif len(names) > 1 and names[-1] == "middle":
            raise refuse(f'{quote(raw)}: a name alone is its middle. Write "{".".join(names[:-1])}".')
        if len(names) > 2:
            raise refuse(f'{quote(raw)} has too many dots. Write "collar.right" or "layshaft.collar.right".')
        for name in names:
            if not NAME.fullmatch(name) or name_fault(name):
                raise refuse(f'{quote(raw)} is not a position. Write "62 mm", "wheel_seat" or "wheel + 12 mm".')
        return tuple(names), side

    def _offset(self, raw: str, anchor: str, sign: str, rest: str) -> Value:
        if re.search(r"\s[+-]\s", rest):
            raise refuse(f'{quote(raw)} has more than one offset. Add them up: "{anchor} + 12 mm".')
        if rest[:1] in "+-":
            raise refuse(f'{quote(raw)} has two signs. Write "{anchor} {sign} {rest.lstrip("+- ") or "12 mm"}".')
        value = self._length(rest)
        return value if sign == "+" else Value(-value.si, "-" + value.text, source=value.source)

    @staticmethod
    def _length(raw: Any) -> Value:
        if isinstance(raw, list | dict | bool) or raw is None:
            raise refuse(
                f'{shown(raw)} is {thing(raw)}, not a position. Write "62 mm", "wheel_seat" or "wheel + 12 mm".'
            )
        try:
            value = parse(raw, "length")
        except UnitError as error:
            raise refuse(str(error)) from None
        if value.estimated:
            raise refuse(f'{quote(value.text)} is an estimate; a position is one length. Write "62 mm".')
        return value

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string", "description": '"62 mm", "wheel_seat", "wheel + 12 mm" or "collar.right - 2 mm"'}


At = Annotated[Position, PositionKind()]
