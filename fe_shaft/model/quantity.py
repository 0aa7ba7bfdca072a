"""Kinds of numbers with a unit: their dimension, sign and usual range."""

from __future__ import annotations

from typing import Annotated, Any, Literal

from pydantic import ValidationInfo
from typing_extensions import override

from fe_shaft.errors import quote
from fe_shaft.model.kinds import Kind
from fe_shaft.model.refusal import refuse
from fe_shaft.units import FACTORS, TRADE_UNITS, UnitError, Value, parse, show

Sign = Literal["positive", "not negative", "any"]
ABSURD = 1e6  # times beyond the usual range: refused
MOST_REMEMBERED = 20_000  # texts whose value a kind keeps; long shafts repeat few texts


class Quantity(Kind):
    """A number with a unit of one dimension.

    Parameters
    ----------
    dimension : str
        A key of `fe_shaft.units.TRADE_UNITS`.
    usual : (str, str), optional
        Ends of the usual range. A value far outside that reads like a slip of units is refused.
    sign : str
        Which signs are possible.
    unit : str, optional
        Unit to suggest; default: the trade unit.
    """

    def __init__(
        self, dimension: str, usual: tuple[str, str] | None = None, *, sign: Sign = "positive", unit: str | None = None
    ) -> None:
        self.dimension, self.sign = dimension, sign
        self.unit = TRADE_UNITS[dimension] if unit is None else unit
        self.usual_texts = usual
        self.usual = None if usual is None else (parse(usual[0], dimension).si, parse(usual[1], dimension).si)
        self.caption = dimension.replace("_", " ")
        self._known: dict[tuple[str, bool], Value] = {}

    @override
    def check_in(self, raw: Any, info: ValidationInfo) -> Value:
        return self.read(raw, loose=info.context is not None and info.context["loose"])

    @override
    def check(self, raw: Any) -> Value:
        return self.read(raw)

    def read(self, raw: Any, *, loose: bool = False) -> Value:
        """The value, checked for sign and, unless `loose`, for slips of units."""
        text = type(raw) is str
        if text and (known := self._known.get((raw, loose))):
            return known
        try:
            value = parse(raw, self.dimension, usual=None if loose else self.usual, example=self.unit)
        except UnitError as error:
            raise refuse(str(error)) from None
        self._check_sign(value)
        if not loose:
            self._check_size(value)
        if text:
            if len(self._known) >= MOST_REMEMBERED:
                self._known.clear()
            self._known[raw, loose] = value
        return value

    def _check_sign(self, value: Value) -> None:
        lowest = value.si if value.low is None else value.low
        if self.sign == "positive" and lowest <= 0.0:
            raise refuse(f"{quote(value.text)} is not greater than 0. Write a positive value.")
        if self.sign == "not negative" and lowest < 0.0:
            raise refuse(f"{quote(value.text)} is negative. Write 0 or a positive value.")

    def _check_size(self, value: Value) -> None:
        """Sizes that no machine has are refused even where no slip of units explains them."""
        if self.usual is None or value.si == 0.0:
            return
        least = self.usual[0] / ABSURD if self.sign == "positive" else 0.0  # what may be 0 may be its rounding
        if not least <= abs(value.si) <= self.usual[1] * ABSURD:
            raise refuse(
                f"{quote(value.text)} is no size of this world; usual: {self._range}. Check it "
                '(to keep it: range_check = "off" in this table).'
            )

    @property
    def _range(self) -> str:
        low, high = (show(end, self.unit) for end in self.usual or (0.0, 0.0))
        return f"{low} to {high}"

    def unusual(self, value: Value) -> str | None:
        """The doubt about a value outside the usual range, or None."""
        if self.usual is None or value.si == 0.0 or self.usual[0] <= abs(value.si) <= self.usual[1]:
            return None
        return f"{quote(value.text)} is unusual; usual: {self._range}"

    @override
    def json(self) -> dict[str, Any]:
        units = ", ".join(unit or "bare number" for unit in FACTORS[self.dimension])
        text: dict[str, Any] = {"type": "string", "description": f"a number and a unit of: {units}"}
        ends = {key: {"type": "string"} for key in ("value", "low", "high", "source")}
        table = {"type": "object", "properties": ends, "required": ["value"], "additionalProperties": False}
        bare = [{"type": "number"}] if self.dimension == "ratio" else []
        return {"anyOf": [text, *bare, table]}


# ---- the numbers of the model. Usual ranges are wide on purpose: they catch slips of units, not bold designs.

Length = Annotated[Value, Quantity("length", ("0.1 mm", "20 m"))]
Diameter = Annotated[Value, Quantity("length", ("1 mm", "3 m"))]
Bore = Annotated[Value, Quantity("length", ("0.5 mm", "3 m"), sign="not negative")]
Width = Annotated[Value, Quantity("length", ("0.5 mm", "1.5 m"))]
Fillet = Annotated[Value, Quantity("length", ("0.05 mm", "100 mm"), sign="not negative")]
Radius = Annotated[Value, Quantity("length", ("0.1 mm", "20 m"), sign="not negative")]
Shift = Annotated[Value, Quantity("length", ("0.001 mm", "20 m"), sign="any")]
Offset = Annotated[Value, Quantity("length", ("0.1 um", "1 mm"), sign="not negative", unit="um")]
BoreTilt = Annotated[Value, Quantity("angle", ("0.001 mrad", "20 mrad"), sign="not negative", unit="mrad")]
Clearance = Annotated[Value, Quantity("length", ("0.1 um", "1 mm"), sign="any", unit="um")]
ContactAngle = Annotated[Value, Quantity("angle", ("1 deg", "85 deg"))]
Coordinate = Quantity("length", ("0.01 mm", "100 m"), sign="any")
Module = Annotated[Value, Quantity("length", ("0.1 mm", "60 mm"))]
RadialStiffness = Annotated[Value, Quantity("stiffness", ("0.5 N/um", "20000 N/um"))]
TiltStiffness = Annotated[Value, Quantity("tilt_stiffness", ("0.001 N m/mrad", "20000 N m/mrad"))]
PressureAngle = Annotated[Value, Quantity("angle", ("10 deg", "35 deg"))]
ConeAngle = Annotated[Value, Quantity("angle", ("1 deg", "90 deg"))]
Wrap = Annotated[Value, Quantity("angle", ("30 deg", "360 deg"))]
Load = Annotated[Value, Quantity("force", ("0.01 N", "20 MN"), sign="any")]
Pull = Annotated[Value, Quantity("force", ("0.01 N", "20 MN"), sign="not negative")]
Moment = Annotated[Value, Quantity("moment", ("0.0001 N m", "20000 kN m"), sign="any")]
Torque = Annotated[Value, Quantity("moment", ("0.0001 N m", "20000 kN m"), sign="not negative")]
Power = Annotated[Value, Quantity("power", ("0.01 W", "500000 kW"), sign="not negative")]
Speed = Annotated[Value, Quantity("speed", ("0.001 rpm", "500000 rpm"), sign="not negative")]
Weight = Annotated[Value, Quantity("mass", ("0.1 g", "50 t"), sign="not negative")]
Modulus = Annotated[Value, Quantity("pressure", ("3 GPa", "1200 GPa"), unit="GPa")]
Density = Annotated[Value, Quantity("density", ("100 kg/m^3", "25000 kg/m^3"))]
Expansion = Annotated[Value, Quantity("expansion", ("1e-8 1/K", "5e-4 1/K"), sign="any")]
Acceleration = Quantity("acceleration", ("0.01 m/s^2", "10000 m/s^2"), sign="any")
