"""The clock: directions across the shaft, and senses of turning, each with its viewpoint.

Looking from the shaft's left end along x, 12 o'clock is +y, 3 o'clock is +z, clockwise is positive. That is the
right-hand rule about +x: angle a from 12 points along (0, cos a, sin a).
"""

from __future__ import annotations

import math
import re
from typing import Annotated, Any

from typing_extensions import override

from fe_shaft.errors import nearest, quote
from fe_shaft.model.kinds import Kind, shown, thing
from fe_shaft.model.refusal import refuse
from fe_shaft.units import UnitError, Value, parse

_CLOCK = re.compile(r"\s*(\d{1,2})(?::(\d{2}))?\s*o['\N{RIGHT SINGLE QUOTATION MARK}]?\s*clock\s*", re.ASCII)
_WORDS = {
    "up": "12 o'clock", "top": "12 o'clock", "front": "3 o'clock", "down": "6 o'clock", "bottom": "6 o'clock",
    "back": "9 o'clock", "behind": "9 o'clock",
}  # fmt: skip

TURNS = {
    "clockwise from left": 1, "counterclockwise from left": -1,
    "clockwise from right": -1, "counterclockwise from right": 1,
}  # fmt: skip
_CLOCKWISE = {"clockwise": "clockwise", "cw": "clockwise", "right": "clockwise"}
_COUNTER = dict.fromkeys(("counterclockwise", "anticlockwise", "counter-clockwise", "anti-clockwise", "ccw", "left"))


class ClockAngle(Kind):
    """A direction across the shaft: ``9 o'clock``, ``4:30 o'clock`` or ``135 deg``, clockwise from 12."""

    caption = "direction on the clock"

    @override
    def check(self, raw: Any) -> Value:
        if isinstance(raw, Value):
            raw = raw.text
        if isinstance(raw, list | tuple):
            raise refuse('a list of directions is not known yet in this version. Write one, such as "9 o\'clock".')
        if isinstance(raw, str):
            if match := _CLOCK.fullmatch(raw):
                return self._by_hand(raw, int(match[1]), int(match[2] or 0))
            if word := _WORDS.get(raw.strip().lower()):
                raise refuse(f'{quote(raw)} is not a direction on the clock. Write "{word}".')
            if re.fullmatch(r"\s*\d{1,2}(:\d{2})?\s*", raw, re.ASCII):
                raise refuse(f'{quote(raw)}: hours or degrees? Write "{raw.strip()} o\'clock" or "{raw.strip()} deg".')
        try:
            value = parse(raw, "angle", example="deg")
        except UnitError as error:
            hint = "" if "o'clock" in str(error) else ' Or write "9 o\'clock".'
            raise refuse(f"{error}{hint}") from None
        if abs(value.si) > 4 * math.pi:
            raise refuse(f"{quote(value.text)} is more than two turns. Write 0 to 360 deg.")
        return value

    @staticmethod
    def _by_hand(text: str, hour: int, minute: int) -> Value:
        if not (1 <= hour <= 12 and minute < 60):
            raise refuse(f"{quote(text)} is not on the clock. Write 1 to 12 o'clock, such as \"4:30 o'clock\".")
        return Value(math.radians(30.0 * (hour % 12) + 0.5 * minute), text)

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string", "description": '"9 o\'clock", "4:30 o\'clock" or "135 deg", clockwise from 12'}


class Turning(Kind):
    """A sense of turning, with the end it is seen from."""

    caption = " | ".join(TURNS)

    @override
    def check(self, raw: Any) -> str:
        if isinstance(raw, str) and raw in TURNS:
            return raw
        if not isinstance(raw, str):
            raise refuse(f'{shown(raw)} is {thing(raw)}, not a sense of turning. Write "clockwise from left".')
        word = raw.strip().lower()
        sense = "clockwise" if word in _CLOCKWISE else "counterclockwise" if word in _COUNTER else None
        if sense:
            raise refuse(f'{quote(raw)}: from which end? Write "{sense} from left" or "{sense} from right".')
        hint = nearest(raw, TURNS)
        raise refuse(f"{quote(raw)} is not a sense of turning. {hint or 'Write one of: ' + ', '.join(TURNS) + '.'}")

    @override
    def json(self) -> dict[str, Any]:
        return {"enum": list(TURNS)}


Direction = Annotated[Value, ClockAngle()]
Turns = Annotated[str, Turning()]
