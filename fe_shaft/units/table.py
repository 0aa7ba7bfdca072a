"""The fixed list of units: which a dimension has, what each is in SI, and the one the trade writes.

Factors are exact by definition: inch and pound (international yard and pound agreement, 1959: 0.0254 m,
0.45359237 kg), standard gravity 9.80665 m/s^2 (3rd CGPM, 1901); the others follow from these. Hz, 1/s, 1/min and rpm
are turns, not radians (rotational frequency, ISO 80000-3).
"""

import math
from typing import NamedTuple

STANDARD_GRAVITY = 9.80665  # m/s^2


class Unit(NamedTuple):
    """One unit: SI value = (number + offset) * times / over. Two numbers: x / 1000 rounds better than x * 0.001."""

    text: str
    times: float
    over: float = 1.0
    offset: float = 0.0

    @property
    def factor(self) -> float:
        """SI units in one of this (without the zero point of temperatures)."""
        return self.times / self.over

    def to_si(self, number: float) -> float:
        """The SI value of a number in this unit."""
        return (number + self.offset) * self.times / self.over

    def from_si(self, si: float) -> float:
        """The number in this unit of an SI value."""
        return si * self.over / self.times - self.offset


def _list(*units: tuple[str, float] | tuple[str, float, float]) -> list[Unit]:
    return [Unit(*unit) for unit in units]


def _combine(left: list[Unit], sign: str, right: list[Unit]) -> list[Unit]:
    """Every product (sign " ") or quotient (sign "/") of two lists."""
    if sign == "/":
        return [Unit(f"{a.text}/{b.text}", a.times * b.over, a.over * b.times) for a in left for b in right]
    return [Unit(f"{a.text} {b.text}", a.times * b.times, a.over * b.over) for a in left for b in right]


_POUND = 0.45359237
_LBF = 4.4482216152605  # _POUND * STANDARD_GRAVITY, all digits
_INCH2 = 0.00064516  # 0.0254^2, all digits
_INCH3 = 0.000016387064  # 0.0254^3, all digits
_FOOT3 = 0.028316846592  # 0.3048^3, all digits
_METRIC_HORSEPOWER = 75 * STANDARD_GRAVITY  # 75 kgf m/s
_IMPERIAL_HORSEPOWER = (550 * _LBF * 3048, 1e4)  # 550 ft lbf/s
_LENGTH = _list(
    ("m", 1), ("mm", 1, 1e3), ("cm", 1, 100), ("um", 1, 1e6), ("nm", 1, 1e9),
    ("in", 254, 1e4), ("ft", 3048, 1e4), ("mil", 254, 1e7),
)  # fmt: skip
_FORCE = _list(("N", 1), ("kN", 1e3), ("MN", 1e6), ("lbf", _LBF), ("kgf", STANDARD_GRAVITY))
_MOMENTS = ("N m", "N mm", "kN m", "lbf in", "lbf ft")
_MOMENT = [unit for unit in _combine(_FORCE, " ", _LENGTH) if unit.text in _MOMENTS]
_ANGLE = _list(
    ("rad", 1), ("mrad", 1, 1e3), ("urad", 1, 1e6),
    ("deg", math.pi, 180), ("arcmin", math.pi, 10800), ("arcsec", math.pi, 648000),
)  # fmt: skip
UNITS: dict[str, list[Unit]] = {
    "length": _LENGTH,
    "angle": _ANGLE,
    "force": _FORCE,
    "moment": _MOMENT,
    "mass": _list(("kg", 1), ("g", 1, 1e3), ("t", 1e3), ("lb", _POUND)),
    "time": _list(("s", 1), ("min", 60), ("h", 3600)),
    "speed": _list(
        ("rpm", math.pi, 30), ("1/min", math.pi, 30), ("1/s", 2 * math.pi), ("rad/s", 1), ("Hz", 2 * math.pi)
    ),
    "power": _list(("W", 1), ("kW", 1e3), ("hp(metric)", _METRIC_HORSEPOWER), ("hp(imperial)", *_IMPERIAL_HORSEPOWER)),
    "stiffness": _combine(_FORCE, "/", _LENGTH),
    "tilt_stiffness": _combine(_MOMENT, "/", _ANGLE),
    "pressure": _list(
        ("Pa", 1), ("kPa", 1e3), ("MPa", 1e6), ("GPa", 1e9), ("psi", _LBF, _INCH2), ("ksi", 1e3 * _LBF, _INCH2)
    ),
    "density": _list(("kg/m^3", 1), ("g/cm^3", 1e3), ("lb/in^3", _POUND, _INCH3), ("lb/ft^3", _POUND, _FOOT3)),
    "expansion": _list(("1/K", 1)),
    "acceleration": _list(("m/s^2", 1)),
    "temperature": [Unit("K", 1), Unit("degC", 1, 1, 273.15), Unit("degF", 5, 9, 459.67)],
    "temperature_difference": _list(("K", 1)),
    "ratio": _list(("", 1), ("%", 1, 100)),
}
FACTORS: dict[str, dict[str, float]] = {
    dimension: {unit.text: unit.factor for unit in units} for dimension, units in UNITS.items()
}
TRADE_UNITS = {
    "length": "mm", "angle": "deg", "force": "N", "moment": "N m", "mass": "kg", "time": "h", "speed": "rpm",
    "power": "kW", "stiffness": "N/um", "tilt_stiffness": "N m/mrad", "pressure": "MPa", "density": "kg/m^3",
    "expansion": "1/K", "acceleration": "m/s^2", "temperature": "degC", "temperature_difference": "K", "ratio": "",
}  # fmt: skip
