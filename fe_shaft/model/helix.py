"""The helix of a gear: angle and hand, never apart."""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from typing import Annotated, Any, Literal

from typing_extensions import override

from fe_shaft.errors import quote
from fe_shaft.model.kinds import Kind
from fe_shaft.model.refusal import refuse
from fe_shaft.units import UnitError, Value, parse


@dataclass(frozen=True, slots=True)
class Helix:
    """Helix at the reference cylinder: right-hand teeth, seen along the axis, run away clockwise (ISO 1122-1).

    Parameters
    ----------
    angle : Value
        Helix angle [rad], greater than 0.
    hand : "left" or "right"
        The gear's own hand.
    text : str
        As the user wrote it.
    """

    angle: Value
    hand: Literal["left", "right"]
    text: str

    @property
    def sign(self) -> int:
        """+1 for right-hand, -1 for left-hand."""
        return 1 if self.hand == "right" else -1


class HelixKind(Kind):
    """``15 deg left``: the angle and the gear's own hand."""

    caption = "angle and hand"

    @override
    def check(self, raw: Any) -> Helix:
        if isinstance(raw, Helix):
            raw = raw.text
        if not isinstance(raw, str):
            angle = self._angle(raw)
            raise refuse(f'"{angle.text}": left-hand or right-hand? Write "{angle.text} left" or "{angle.text} right".')
        match = re.fullmatch(r"\s*(.*?)[\s,-]*\b(left|right)(?:[- ]?hand(?:ed)?)?\s*", raw, re.ASCII)
        if match is None:
            angle = self._angle(raw)
            if angle.si == 0.0:
                raise refuse(f"{quote(raw)} is a spur gear. Leave helix out.")
            raise refuse(f'{quote(raw)}: left-hand or right-hand? Write "{raw.strip()} left" or "{raw.strip()} right".')
        angle = self._angle(match[1])
        if not 0.0 < angle.si <= math.radians(60.0):
            raise refuse(
                f"{quote(raw)}: a helix angle lies above 0 and up to 60 deg; its hand says the side. Spur: leave helix "
                "out."
            )
        return Helix(angle, "left" if match[2] == "left" else "right", raw)

    @staticmethod
    def _angle(raw: Any) -> Value:
        try:
            return parse(raw, "angle", example="deg")
        except UnitError as error:
            raise refuse(f'{error} With the hand: "15 deg left".') from None

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string", "pattern": "(left|right)$", "description": "angle and hand, such as 15 deg left"}


HelixWords = Annotated[Helix, HelixKind()]
