"""Numbers with units: what the user writes, and what the program shows.

Inside fe_shaft everything is SI floats. Here alone text such as ``"38 mm"`` or ``"~93 N/um"`` becomes one, and back.
The number follows a strict pattern and the unit a fixed list per dimension, so that nothing is guessed: a general
parser of units reads ``12 Nm`` as a textile unit, ``1,5 mm`` as 15 mm and accepts ``nan mm``. Quantities of pint are
accepted from the registry of the caller; only they make this module touch pint.

Factors are exact by definition: inch and pound (international yard and pound agreement, 1959: 0.0254 m,
0.45359237 kg), standard gravity 9.80665 m/s^2 (3rd CGPM, 1901); the others follow from these. Hz, 1/s, 1/min and rpm
are turns, not radians (rotational frequency, ISO 80000-3).
"""

import difflib
import math
import re
import unicodedata
from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache
from numbers import Number
from typing import Any, Literal, NamedTuple

from fe_shaft.errors import nearest, quote

STANDARD_GRAVITY = 9.80665  # m/s^2
LONGEST_TEXT = 100  # characters; a number with unit and tolerance needs a fraction of this
SLIP_MARGIN = 10.0  # how many times outside the usual range a value must lie to be called a slip of units
SLIP_FACTORS = (1e3, 1e6, 60.0, 180.0 / math.pi, 25.4)  # prefixes, minutes, degrees, inches


class UnitError(ValueError):
    """A value cannot be read; the text is the sentence that follows the place."""


@dataclass(frozen=True, slots=True)
class Value:
    """A number the user gave: SI inside, the user's own text outside, a band if it is an estimate.

    Parameters
    ----------
    si : float
        The value [SI unit of its dimension].
    text : str
        As the user wrote it.
    low, high : float or None
        Ends of the band of an estimate [SI]; both None if the value is certain.
    source : str
        Where the value comes from, in the user's words.
    """

    si: float
    text: str
    low: float | None = None
    high: float | None = None
    source: str = ""

    @property
    def estimated(self) -> bool:
        """Whether the value is an estimate, with a band from ``low`` to ``high``."""
        return self.low is not None

    def end(self, which: Literal["low", "high"]) -> "Value":
        """A certain value at one end of the band; the value itself if it is certain already."""
        si = self.low if which == "low" else self.high
        return self if si is None else Value(si, self._in_own_unit(si), source=self.source)

    def written(self) -> str | dict[str, str]:
        """The value as a model file states it: text, or a table with low, high and source where text is too little."""
        table = {"value": self.text}
        if self.low is not None and self.high is not None and not self._has_usual_band():
            table |= {"low": self._in_own_unit(self.low), "high": self._in_own_unit(self.high)}
        if self.source:
            table["source"] = self.source
        return table if len(table) > 1 else self.text

    def __str__(self) -> str:
        return f"~{self.text}" if self.estimated and not self.text.lstrip().startswith("~") else self.text

    def _has_usual_band(self) -> bool:
        """Whether "~" in the text says the band already."""
        parts = _split(self.text) if self.text.lstrip().startswith("~") else None
        usual = parts is not None and any(parts[1].text in FACTORS[name] for name in _ESTIMATED_BY_TILDE)
        return usual and (self.low, self.high) == _tilde_band(self.si)

    def _in_own_unit(self, si: float) -> str:
        """Another value of the same dimension, in the unit this one was written in."""
        parts = _split(self.text)
        return _exact(si, parts[1]) if parts else repr(si)


class _Unit(NamedTuple):
    """One unit: SI value = (number + offset) * times / over. Two numbers: x / 1000 rounds better than x * 0.001."""

    text: str
    times: float
    over: float = 1.0
    offset: float = 0.0

    @property
    def factor(self) -> float:
        return self.times / self.over

    def to_si(self, number: float) -> float:
        return (number + self.offset) * self.times / self.over

    def from_si(self, si: float) -> float:
        return si * self.over / self.times - self.offset


def _list(*units: tuple[str, float] | tuple[str, float, float]) -> list[_Unit]:
    return [_Unit(*unit) for unit in units]


def _combine(left: list[_Unit], sign: str, right: list[_Unit]) -> list[_Unit]:
    """Every product (sign " ") or quotient (sign "/") of two lists."""
    if sign == "/":
        return [_Unit(f"{a.text}/{b.text}", a.times * b.over, a.over * b.times) for a in left for b in right]
    return [_Unit(f"{a.text} {b.text}", a.times * b.times, a.over * b.over) for a in left for b in right]


_POUND = 0.45359237
_LBF = 4.4482216152605  # _POUND * STANDARD_GRAVITY, all digits
_INCH2 = 0.00064516  # 0.0254^2, all digits
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
_UNITS: dict[str, list[_Unit]] = {
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
    "density": _list(("kg/m^3", 1), ("g/cm^3", 1e3)),
    "expansion": _list(("1/K", 1)),
    "acceleration": _list(("m/s^2", 1)),
    "temperature": [_Unit("K", 1), _Unit("degC", 1, 1, 273.15), _Unit("degF", 5, 9, 459.67)],
    "temperature_difference": _list(("K", 1)),
    "ratio": _list(("", 1), ("%", 1, 100)),
}
FACTORS: dict[str, dict[str, float]] = {
    dimension: {unit.text: unit.factor for unit in units} for dimension, units in _UNITS.items()
}
TRADE_UNITS = {
    "length": "mm", "angle": "deg", "force": "N", "moment": "N m", "mass": "kg", "time": "h", "speed": "rpm",
    "power": "kW", "stiffness": "N/um", "tilt_stiffness": "N m/mrad", "pressure": "MPa", "density": "kg/m^3",
    "expansion": "1/K", "acceleration": "m/s^2", "temperature": "degC", "temperature_difference": "K", "ratio": "",
}  # fmt: skip
_SI_OF_PINT = {
    "length": "meter", "angle": "radian", "force": "newton", "moment": "newton * meter", "mass": "kilogram",
    "time": "second", "speed": "radian / second", "power": "watt", "stiffness": "newton / meter",
    "tilt_stiffness": "newton * meter / radian", "pressure": "pascal", "density": "kilogram / meter ** 3",
    "expansion": "1 / kelvin", "acceleration": "meter / second ** 2", "temperature": "kelvin",
    "temperature_difference": "kelvin", "ratio": "dimensionless",
}  # fmt: skip
_ANGULAR = {"angle", "speed", "tilt_stiffness"}
_ESTIMATED_BY_TILDE = {"stiffness", "tilt_stiffness"}

# What people write for a unit of the list; offered in the refusal, never taken silently.
_MEANT = {
    "N/mm^2": "MPa", "N/mm2": "MPa", "kN/mm^2": "GPa", "\N{DEGREE SIGN}": "deg", "degree": "deg", "degrees": "deg",
    "grad": "deg", "'": "arcmin", "inch": "in", "inches": "in", '"': "in", "micron": "um", "thou": "mil",
    "U/min": "rpm", "r/min": "rpm", "rev/min": "rpm", "min^-1": "1/min", "s^-1": "1/s", "r/s": "1/s",
    "PS": "hp(metric)",
    "kp": "kgf", "tonne": "t", "lbs": "lb", "sec": "s", "hour": "h", "hours": "h", "hr": "h", "mins": "min",
    "\N{DEGREE SIGN}C": "degC", "C": "degC", "\N{DEGREE SIGN}F": "degF", "F": "degF", "K^-1": "1/K", "/K": "1/K",
    "m/s2": "m/s^2", "kg/m3": "kg/m^3", "g/cm3": "g/cm^3", "ft lbf": "lbf ft", "in lbf": "lbf in", "lb ft": "lbf ft",
    "lb in": "lbf in", "percent": "%",
}  # fmt: skip

_NUMBER = r"[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?"
_QUANTITY = re.compile(rf"\s*(~?)\s*({_NUMBER})(.*?)\s*", re.ASCII)
_PLUS_MINUS = re.compile(rf"(.+?)\s*(?:\+-|\+/-|\N{{PLUS-MINUS SIGN}})\s*(?:{_NUMBER})(.+)", re.ASCII)
# Letters of ISO 286-1 (holes in capitals), grades IT01 to IT18.
_ISO_LETTERS = "a|b|c|cd|d|e|ef|f|fg|g|h|j|js|k|m|n|p|r|s|t|u|v|x|y|z|za|zb|zc"
_LIKE_TOLERANCE = re.compile(r"(\S+?|)\s*([A-Za-z]{1,2}\d+|[+\N{PLUS-MINUS SIGN}].*)", re.ASCII)
_ISO_CLASS = re.compile(rf"(\S+)\s+(?:{_ISO_LETTERS}|{_ISO_LETTERS.upper()})(?:01|0|[1-9]|1[0-8])", re.ASCII)


def parse(
    raw: object, dimension: str, *, usual: tuple[float, float] | None = None, example: str | None = None
) -> Value:
    """Read a number with its unit.

    Parameters
    ----------
    raw : str, mapping, Value or pint quantity
        ``"25 mm"``; ``"~93 N/um"``, an estimate between half and twice (stiffnesses only);
        ``{"value": ..., "low": ..., "high": ..., "source": ...}``; for a length also ``"30 mm k6"`` (ISO 286) and
        ``"12 um +-5 um"``, of which the nominal value is taken. A bare number is a ratio and nothing else.
    dimension : str
        A key of `TRADE_UNITS`.
    usual : (low, high), optional
        Usual range of the magnitude [SI]; a value that looks like a slip of units is refused (see `slip`).
    example : str, optional
        Unit to suggest in refusals; default: the trade unit of the dimension.

    Returns
    -------
    Value

    Raises
    ------
    UnitError
        Its text is the sentence that follows the place.
    """
    unit = TRADE_UNITS[dimension] if example is None else example
    if isinstance(raw, str):
        value = _from_text(raw, dimension, unit)
    elif isinstance(raw, Value):
        _from_text(raw.text, dimension, unit) if not raw.estimated else _from_table(_table(raw), dimension, unit)
        value = raw
    elif isinstance(raw, Mapping):
        value = _from_table(raw, dimension, unit)
    elif all(hasattr(raw, name) for name in ("to", "magnitude", "units")):
        value = _from_quantity(raw, dimension, unit)
    else:
        value = _from_bare(raw, dimension, unit)
    if usual is not None and (sentence := slip(value, usual, unit)):
        raise UnitError(sentence)
    return value


def slip(value: Value, usual: tuple[float, float], unit: str) -> str | None:
    """The sentence about a value that looks like a slip of units, else None.

    A slip lies outside the usual range by more than a factor of `SLIP_MARGIN`, and inside it once read in another
    unit that differs by one of `SLIP_FACTORS`. Anything else outside the range is merely unusual.

    Parameters
    ----------
    value : Value
        As `parse` returned it.
    usual : (low, high)
        Usual range of the magnitude [SI], ends included; the sign of the value does not matter.
    unit : str
        Unit in which the range is told.
    """
    low, high = usual
    size = abs(value.si)
    if size == 0.0 or low / SLIP_MARGIN <= size <= high * SLIP_MARGIN:
        return None
    meant = _meant(value, usual, unit)
    if meant is None:
        return None
    ends = f"{_plain(convert(low, unit))} to {_plain(convert(high, unit))}"
    now = f"{quote(value.text)} is {_plain(convert(value.si, unit))} {unit}".rstrip()
    return f'{now}; usual: {ends}. Meant: {meant}? (to keep it: range_check = "off" in this table)'


def show(si: float, unit: str, digits: int = 3) -> str:
    """A value as the terminal shows it: ``36.5 um``, plain ASCII.

    Parameters
    ----------
    si : float
        The value [SI].
    unit : str
        Any unit of the fixed list, any spelling of it; output is always ``N m``.
    digits : int
        Significant digits; whole numbers keep all of theirs up to a million, trailing zeros are dropped.
    """
    known = _known(unit)
    return f"{_digits(known.from_si(float(si)), digits)} {known.text}".rstrip()


def convert(si: float, unit: str) -> float:
    """An SI value in another unit; temperatures with their zero point."""
    return _known(unit).from_si(si)


def unit_factor(dimension: str, unit: str) -> float:
    """SI units in one of `unit` (without the zero point of temperatures); UnitError if it is not of that dimension."""
    known = _lookup(dimension, unit)
    if known is None:
        raise UnitError(_unknown_unit(unit, "", dimension, unit, unit))
    return known.factor


# ---- the list of units, by spelling


def _spellings(unit: _Unit) -> list[str]:
    """Ways to write a unit that count as one: N m and Nm (N*m and others are brought to N m by `_normal`)."""
    return [unit.text, unit.text.replace(" ", "")] if " " in unit.text else [unit.text]


_BY_SPELLING = {
    dimension: {spelling: unit for unit in units for spelling in _spellings(unit)}
    for dimension, units in _UNITS.items()
}
# No spelling has two meanings but K, which is the same in both.
_ANY_SPELLING = {spelling: unit for units in _BY_SPELLING.values() for spelling, unit in units.items()}
_SIGNS = str.maketrans({
    "\N{MICRO SIGN}": "u", "\N{GREEK SMALL LETTER MU}": "u", "\N{MIDDLE DOT}": "*", "\N{DOT OPERATOR}": "*",
    "\N{SUPERSCRIPT TWO}": "^2", "\N{SUPERSCRIPT THREE}": "^3",
})  # fmt: skip


def _normal(text: str) -> str:
    """A unit's text with one spelling per sign: N*m, N·m and N  m are N m."""
    text = text.translate(_SIGNS).replace("**", "^").replace("*", " ")
    return re.sub(r" ?([/^]) ?", r"\1", " ".join(text.split()))


@lru_cache(maxsize=4096)
def _lookup(dimension: str, text: str) -> _Unit | None:
    """The unit that a text names; for a length also with a tolerance behind it."""
    units = _BY_SPELLING[dimension]
    unit = units.get(_normal(text))
    if unit is None and dimension == "length":
        match = _ISO_CLASS.fullmatch(text.strip()) or _PLUS_MINUS.fullmatch(text.strip())
        if match and all(_normal(each) in units for each in match.groups()):
            unit = units[_normal(match[1])]
    return unit


@lru_cache(maxsize=4096)
def _known(text: str) -> _Unit:
    """The unit of any dimension that a text of the program names."""
    unit = _ANY_SPELLING.get(_normal(text))
    if unit is None:
        raise UnitError(f"{quote(text)} is not a unit of the list. {nearest(text, _ANY_SPELLING)}".rstrip())
    return unit


def _split(text: str) -> tuple[float, _Unit] | None:
    """Number and unit of a text that was accepted before."""
    match = _QUANTITY.fullmatch(text)
    if match is None:
        return None
    found = (_lookup(dimension, match[3]) for dimension in _UNITS)
    unit = next((unit for unit in found if unit is not None), None)
    return None if unit is None else (float(match[2]), unit)


# ---- reading


def _from_text(text: str, dimension: str, example: str) -> Value:
    match = _QUANTITY.fullmatch(text) if len(text) <= LONGEST_TEXT else None
    unit = _lookup(dimension, match[3]) if match else None
    if match is None or unit is None:
        raise UnitError(_refusal(text, dimension, example))
    si = _finite(float(match[2]), unit, match[2], text)
    _above_absolute_zero(si, text, dimension)
    if not match[1]:
        return Value(si, text)
    return _by_tilde(si, text, dimension)


def _finite(number: float, unit: _Unit, digits: str, text: str) -> float:
    """The SI value, refused if a float cannot hold it; minus zero becomes zero."""
    si = unit.to_si(number)
    if not math.isfinite(si):
        raise UnitError(f"{quote(text)} is too large for a number. Check its exponent.")
    if number == 0.0 or (si == 0.0 and unit.offset == 0.0):
        if re.search("[1-9]", re.split("[eE]", digits)[0]):
            raise UnitError(f"{quote(text)} is too small for a number. Check its exponent, or write 0.")
        return abs(si)
    return si


def _above_absolute_zero(si: float, text: str, dimension: str) -> None:
    if dimension == "temperature" and si < 0.0:
        raise UnitError(f"{quote(text)} is below absolute zero (0 K). Check its sign.")


def _tilde_band(si: float) -> tuple[float, float]:
    return si / 2.0, si * 2.0


def _by_tilde(si: float, text: str, dimension: str) -> Value:
    """An estimate by "~": half to twice for stiffnesses, refused elsewhere."""
    bare = text.replace("~", "").strip()
    if dimension not in _ESTIMATED_BY_TILDE:
        table = f'{{ value = "{bare}", low = "...", high = "...", source = "..." }}'
        raise UnitError(f"{quote(text)}: only a stiffness has a usual band (half to twice). Write {table}.")
    if not (si > 0.0 and math.isfinite(2.0 * si)):
        raise UnitError(f"{quote(text)} has no band from half to twice. Write a number greater than 0.")
    return Value(si, text, *_tilde_band(si))


def _from_table(table: Mapping[Any, Any], dimension: str, example: str) -> Value:
    """``{ value, low, high, source }``: a band when low and high are there, else a value with its source."""
    for key in table:
        if key not in ("value", "low", "high", "source"):
            hint = nearest(str(key), ("value", "low", "high", "source"))
            raise UnitError(f"{quote(str(key))} is not a key of an estimate. {hint}")
    if "value" not in table:
        raise UnitError(f'value is missing. Write {{ value = "12 {example}", low = "...", high = "..." }}.')
    if ("low" in table) != ("high" in table):
        there, missing = ("low", "high") if "low" in table else ("high", "low")
        raise UnitError(f"{there} is given without {missing}. Write both, or neither.")
    source = table.get("source", "")
    if not isinstance(source, str):
        raise UnitError('source is not text. Write source = "where the value comes from".')
    if "low" not in table:
        value = _entry(table, "value", dimension, example)
        return Value(value.si, value.text, value.low, value.high, source or value.source)
    return _band(table, source, dimension, example)


def _band(table: Mapping[Any, Any], source: str, dimension: str, example: str) -> Value:
    written = table["value"]
    plain = (
        written.lstrip().removeprefix("~") if isinstance(written, str) else written
    )  # the band is given: "~" adds none
    value = _entry({"value": plain}, "value", dimension, example)
    low, high = (_entry(table, key, dimension, example) for key in ("low", "high"))
    for end in (low, high):
        if end.estimated:
            raise UnitError(f"{quote(end.text)} is the end of a band and an estimate itself. Leave out the ~.")
    if not low.si <= value.si:
        raise UnitError(f"low = {quote(low.text)} is above value = {quote(value.text)}. Write low <= value <= high.")
    if not value.si <= high.si:
        raise UnitError(f"high = {quote(high.text)} is below value = {quote(value.text)}. Write low <= value <= high.")
    return Value(value.si, written if isinstance(written, str) else value.text, low.si, high.si, source)


def _entry(table: Mapping[Any, Any], key: str, dimension: str, example: str) -> Value:
    """One number of a table; its errors name the key."""
    if isinstance(table[key], Mapping):
        raise UnitError(f'{key} is a table. Write {key} = "12 {example}".')
    try:
        return parse(table[key], dimension, example=example)
    except UnitError as error:
        raise UnitError(f"{key}: {error}") from None


def _table(value: Value) -> Mapping[str, str]:
    written = value.written()
    return {"value": written} if isinstance(written, str) else written


def _from_bare(raw: object, dimension: str, example: str) -> Value:
    """A bare number is a ratio; anything else is told what to write."""
    if isinstance(raw, bool) or type(raw).__name__ in ("bool", "bool_"):
        raise UnitError(f"{str(raw).lower()} is not {_NAMES[dimension]}. Write {_sample(example)}.")
    if not isinstance(raw, Number) or isinstance(raw, complex):
        kind = "None" if raw is None else f"a value of type {type(raw).__name__}"
        raise UnitError(f"{kind} is not {_NAMES[dimension]}. Write {_sample(example)}.")
    try:
        number = float(raw)  # type: ignore[arg-type]
    except OverflowError:
        number = math.inf
    if not math.isfinite(number):
        raise UnitError(f"{number} is not a finite number. Write {_sample(example)}.")
    if dimension == "ratio":
        return Value(number + 0.0, str(raw))
    raise UnitError(f'{str(raw)[:40]} has no unit. Write "{str(raw)[:40]} {example}".')


def _from_quantity(raw: Any, dimension: str, example: str) -> Value:
    """A pint quantity, converted by its own registry."""
    import pint

    shown = f"{' '.join(str(raw).split())[:60]} (a pint quantity)"
    try:
        units = str(raw.units)
        number = float(raw.magnitude)
        si = float(raw.to(_SI_OF_PINT[dimension]).magnitude)
        rooted = str(raw.units) if dimension not in _ANGULAR else str(raw.to_root_units().units)
    except (pint.errors.PintError, TypeError, ValueError) as error:
        reason = "is not one number" if not isinstance(error, pint.errors.PintError) else f"is not {_NAMES[dimension]}"
        raise UnitError(f"{shown} {reason}. Give {_choices(dimension)}.") from None
    if not (math.isfinite(si) and math.isfinite(number)):
        raise UnitError(f"{shown} is not a finite number. Write {_sample(example)}.")
    if dimension in _ANGULAR and "radian" not in rooted:
        raise UnitError(f"{shown} does not name its angle. Put radian, degree or turn into its unit.")
    difference = dimension == "temperature_difference"
    if (difference and units.startswith("degree_")) or (dimension == "temperature" and "delta_" in units):
        other = "temperature" if difference else "temperature_difference"
        raise UnitError(f"{shown} is {_NAMES[other]}, not {_NAMES[dimension]}. Give {_choices(dimension)}.")
    _above_absolute_zero(si, f"{number:g} {units}", dimension)
    return _in_listed_unit(number, si, dimension, example)


def _in_listed_unit(number: float, si: float, dimension: str, example: str) -> Value:
    """A quantity in the caller's own unit if the list has it, else in the field's; the text is read as this value."""
    for unit in (_known(example), *_UNITS[dimension]):
        if math.isclose(unit.to_si(number), si, rel_tol=1e-12):
            return Value(unit.to_si(number) + 0.0, f"{_shortest(number)} {unit.text}".rstrip())
    return Value(si + 0.0, _exact(si, _known(example)))


def _shortest(number: float) -> str:
    """A number with the fewest digits that name it: 5, not 5.0."""
    return f"{number:.12g}" if float(f"{number:.12g}") == number else repr(number)


def _exact(si: float, unit: _Unit) -> str:
    """The shortest text that is read as this very value, or as near as floats allow."""
    number = unit.from_si(si)
    texts = [f"{number:.{digits}g}" for digits in (12, 15, 16, 17)]
    text = next((text for text in texts if unit.to_si(float(text)) == si), texts[-1])
    return f"{text} {unit.text}".rstrip()


# ---- refusing

_NAMES = {
    "length": "a length", "angle": "an angle", "force": "a force", "moment": "a moment", "mass": "a mass",
    "time": "a time", "speed": "a speed of turning", "power": "a power", "stiffness": "a stiffness",
    "tilt_stiffness": "a tilt stiffness", "pressure": "a stress or pressure", "density": "a density",
    "expansion": "a thermal expansion", "acceleration": "an acceleration", "temperature": "a temperature",
    "temperature_difference": "a temperature difference", "ratio": "a ratio",
}  # fmt: skip


def _noun(dimension: str) -> str:
    return _NAMES[dimension].split(" ", 1)[1]


def _sample(example: str) -> str:
    return f'a number and a unit, as in "12 {example}"' if example else 'a number, as in 0.98 or "98 %"'


def _choices(dimension: str) -> str:
    """The units of a dimension, at most eight of them, the trade unit first."""
    if dimension == "ratio":
        return "a bare number or %"
    trade = TRADE_UNITS[dimension]
    texts = [trade, *(unit.text for unit in _UNITS[dimension] if unit.text != trade)][:8]
    return texts[0] if len(texts) == 1 else f"{', '.join(texts[:-1])} or {texts[-1]}"


def _refusal(text: str, dimension: str, example: str) -> str:
    """Why a text was not accepted, and what to write."""
    if len(text) > LONGEST_TEXT:
        return f"{quote(text)} has {len(text)} characters, {LONGEST_TEXT} at most are read. Shorten it."
    if not text.strip():
        return f"the text is empty. Write {_sample(example)}."
    if re.match(r"\s*~?\s*[+-]?(?:nan|inf|infinity)(?![a-z])", text, re.IGNORECASE):
        return f"{quote(text)} is not a finite number. Write {_sample(example)}."
    for fact, cleaned in _repairs(text):
        if cleaned != text:
            readable = [each for each in cleaned.split("|") if _readable(each, dimension)]
            remedy = " or ".join(f'"{each}"' for each in readable) or _sample(example)
            return f"{quote(text)} {fact}. Write {remedy}."
    match = _QUANTITY.fullmatch(text)
    if match is None or re.match(r"\s*[-*^.(\d]|\s*\+\s*\d", match[3]):
        known = _normal(text) in _BY_SPELLING[dimension]
        return f"{quote(text)} {'has no number' if known else 'is not a number with a unit'}. Write {_sample(example)}."
    return _unknown_unit(match[3].strip(), f"{match[1]}{match[2]}", dimension, example, text.strip())


def _repairs(text: str) -> list[tuple[str, str]]:
    """Usual slips in a number: what is wrong with it, and the text without it (choices parted by |)."""
    ascii_digits = "".join(str(unicodedata.decimal(sign, sign)) for sign in text)
    comma = text.replace(",", ".")
    if re.search(r"\d,\d{3},|,.*\.", text):
        comma = text.replace(",", "")
    elif re.search(r"\..*,", text):
        comma = comma.replace(".", "", comma.count(".") - 1)
    elif re.search(r"[1-9]\d{0,2},\d{3}(?!\d)", text):
        comma = f"{comma}|{text.replace(',', '')}"
    return [
        ("has digits other than 0 to 9", ascii_digits),
        ("has a minus sign other than -", re.sub("[\N{MINUS SIGN}\N{EN DASH}\N{EM DASH}]", "-", text)),
        ("has an underscore", re.sub(r"(?<=\d)_(?=\d)", "", text)),
        (
            "has a decimal comma" if comma.startswith(text.replace(",", ".")) else "has a comma in its number",
            comma if re.search(r"\d,\d", text) else text,
        ),
        ("has an apostrophe in its number", re.sub("(?<=\\d)['\N{RIGHT SINGLE QUOTATION MARK}](?=\\d)", "", text)),
        ("has a space in its number", re.sub(r"(?<=\d)\s+(?=\d)(?!1/\D)", "", text)),
        ("is a fraction", re.sub(r"^\s*(\d+)/(\d+)(?=\D|$)", _divided, text)),
    ]


def _divided(match: re.Match[str]) -> str:
    return f"{int(match[1]) / int(match[2]):.6g}" if int(match[2]) else match[0]


def _readable(text: str, dimension: str) -> bool:
    match = _QUANTITY.fullmatch(text)
    return match is not None and _lookup(dimension, match[3]) is not None


def _unknown_unit(unit: str, number: str, dimension: str, example: str, written: str) -> str:
    """The sentence about a unit that does not fit in `written`; `number` is what stood before it (may be empty)."""
    if not unit:
        return f'{quote(written)} has no unit. Write "{number} {example}".'
    unfit = f"{quote(written)}: {quote(unit)} is not a unit of {_noun(dimension)}"
    if meant := _respelled(unit, dimension):
        return f'{unfit}. Write "{f"{number} {meant}".strip()}".'
    others = [other for other in _UNITS if _lookup(other, unit) is not None]
    if others:
        return f"{quote(written)} is {_NAMES[others[0]]}, not {_NAMES[dimension]}. Write {_choices(dimension)}."
    if dimension == "length" and (match := _LIKE_TOLERANCE.fullmatch(unit)):
        own = match[1] if match[1] in FACTORS["length"] else example
        wanted = f'Write for example "{number} {own} k6" or "{number} {own} +-5 um"'
        return f"{quote(written)}: {quote(match[2])} is no ISO 286 tolerance class and no deviation. {wanted}."
    close = difflib.get_close_matches(_normal(unit), _BY_SPELLING[dimension], n=1, cutoff=0.75)
    remedy = f"Nearest: {_BY_SPELLING[dimension][close[0]].text}." if close else f"Write {_choices(dimension)}."
    return f"{unfit}. {remedy}"


def _respelled(unit: str, dimension: str) -> str | None:
    """The unit that was meant: right but for capitals, or a usual word for one of the list."""
    text = _normal(unit)
    units = _BY_SPELLING[dimension]
    same = list(dict.fromkeys(known.text for spelling, known in units.items() if spelling.lower() == text.lower()))
    if len(same) == 1:
        return same[0]
    meant = _MEANT.get(text)
    return meant if meant in units else None


# ---- slips of units and figures


def _meant(value: Value, usual: tuple[float, float], unit: str) -> str | None:
    """The unit (or the value) that a slip stands for, None if nothing fits."""
    low, high = usual
    parts = _split(value.text)
    if parts is not None:
        number, own = parts
        dimension = next(name for name, units in _BY_SPELLING.items() if _normal(unit) in units)
        for other in sorted(_UNITS[dimension], key=lambda each: each.text != _normal(unit)):
            if _slipped(own.factor / other.factor) and low <= abs(other.to_si(number)) <= high:
                return other.text
    for factor in SLIP_FACTORS[:2]:
        for si in (value.si * factor, value.si / factor):
            if low <= abs(si) <= high:
                return f"{_plain(convert(si, unit))} {unit}".rstrip()
    return None


def _slipped(ratio: float) -> bool:
    """Whether two units differ by a factor that slips are made of."""
    return any(math.isclose(max(ratio, 1.0 / ratio), factor, rel_tol=1e-3) for factor in SLIP_FACTORS)


def _digits(number: float, digits: int) -> str:
    """Significant digits, without exponent from 0.001 to a million."""
    if number == 0.0 or not math.isfinite(number):
        return "0" if number == 0.0 else str(number)
    mantissa, power = f"{number:.{digits - 1}e}".split("e")
    if int(power) >= -3 and abs(number) < 999_999.5:
        text = f"{number:.{max(0, digits - 1 - int(power))}f}"
        return text.rstrip("0").rstrip(".") if "." in text else text
    return f"{mantissa.rstrip('0').rstrip('.') if '.' in mantissa else mantissa}e{int(power)}"


def _plain(number: float) -> str:
    """Three significant digits, with small numbers written out: 0.000093."""
    if 1e-9 <= abs(number) < 1e-3:
        return f"{number:.{2 - math.floor(math.log10(abs(number)))}f}".rstrip("0")
    return _digits(number, 3)
