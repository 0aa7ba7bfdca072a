"""Text, table, bare number or quantity to a `Value`, or a refusal that says what to write.

The number follows a strict pattern and the unit a fixed list per dimension, so that nothing is guessed: a general
parser of units reads ``12 Nm`` as a textile unit, ``1,5 mm`` as 15 mm and accepts ``nan mm``.
"""

import math
import re
from collections.abc import Mapping
from typing import Any

from fe_shaft.errors import nearest, quote
from fe_shaft.units.pint_door import from_quantity
from fe_shaft.units.refusals import (
    LONGEST_TEXT,
    NAMES,
    refusal,
    refuse_below_absolute_zero,
    sample,
    unknown_unit,
)
from fe_shaft.units.slips import slip
from fe_shaft.units.spelling import QUANTITY, UnitError, find_unit
from fe_shaft.units.table import TRADE_UNITS, Unit
from fe_shaft.units.value import ESTIMATED_BY_TILDE, Value, tilde_band


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
        value = from_quantity(raw, dimension, unit)
    else:
        value = _from_bare(raw, dimension, unit)
    if usual is not None and (sentence := slip(value, usual, unit)):
        raise UnitError(sentence)
    return value


def unit_factor(dimension: str, unit: str) -> float:
    """SI units in one of `unit` (without the zero point of temperatures); UnitError if it is not of that dimension."""
    known = find_unit(dimension, unit)
    if known is None:
        raise UnitError(unknown_unit(unit, "", dimension, unit, unit))
    return known.factor


def _from_text(text: str, dimension: str, example: str) -> Value:
    match = QUANTITY.fullmatch(text) if len(text) <= LONGEST_TEXT else None
    unit = find_unit(dimension, match[3]) if match else None
    if match is None or unit is None:
        raise UnitError(refusal(text, dimension, example))
    si = _finite(float(match[2]), unit, match[2], text)
    refuse_below_absolute_zero(si, text, dimension)
    if not match[1]:
        return Value(si, text)
    return _by_tilde(si, text, dimension)


def _finite(number: float, unit: Unit, digits: str, text: str) -> float:
    """The SI value, refused if a float cannot hold it; minus zero becomes zero."""
    si = unit.to_si(number)
    if not math.isfinite(si):
        raise UnitError(f"{quote(text)} is too large for a number. Check its exponent.")
    if number == 0.0 or (si == 0.0 and unit.offset == 0.0):
        if re.search("[1-9]", re.split("[eE]", digits)[0]):
            raise UnitError(f"{quote(text)} is too small for a number. Check its exponent, or write 0.")
        return abs(si)
    return si


def _by_tilde(si: float, text: str, dimension: str) -> Value:
    """An estimate by "~": half to twice for stiffnesses, refused elsewhere."""
    bare = text.replace("~", "").strip()
    if dimension not in ESTIMATED_BY_TILDE:
        table = f'{{ value = "{bare}", low = "...", high = "...", source = "..." }}'
        raise UnitError(f"{quote(text)}: only a stiffness has a usual band (half to twice). Write {table}.")
    if not (si > 0.0 and math.isfinite(2.0 * si)):
        raise UnitError(f"{quote(text)} has no band from half to twice. Write a number greater than 0.")
    return Value(si, text, *tilde_band(si))


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
    from numbers import Number  # rarely needed, and slow to load

    if isinstance(raw, bool) or type(raw).__name__ in ("bool", "bool_"):
        raise UnitError(f"{str(raw).lower()} is not {NAMES[dimension]}. Write {sample(example)}.")
    if not isinstance(raw, Number) or isinstance(raw, complex):
        kind = "None" if raw is None else f"a value of type {type(raw).__name__}"
        raise UnitError(f"{kind} is not {NAMES[dimension]}. Write {sample(example)}.")
    try:
        number = float(raw)  # type: ignore[arg-type]
    except OverflowError:
        number = math.inf
    if not math.isfinite(number):
        raise UnitError(f"{number} is not a finite number. Write {sample(example)}.")
    if dimension == "ratio":
        return Value(number + 0.0, str(raw))
    raise UnitError(f'{str(raw)[:40]} has no unit. Write "{str(raw)[:40]} {example}".')
