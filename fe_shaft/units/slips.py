"""Slips of units: a value far outside its usual range that fits once read in another unit."""

import math

from fe_shaft.errors import quote
from fe_shaft.units.showing import convert, plain
from fe_shaft.units.spelling import BY_SPELLING, normal, split
from fe_shaft.units.table import UNITS
from fe_shaft.units.value import Value

SLIP_MARGIN = 10.0  # how many times outside the usual range a value must lie to be called a slip of units
SLIP_FACTORS = (1e3, 1e6, 60.0, 180.0 / math.pi, 25.4)  # prefixes, minutes, degrees, inches


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
    ends = f"{plain(convert(low, unit))} to {plain(convert(high, unit))}"
    now = f"{quote(value.text)} is {plain(convert(value.si, unit))} {unit}".rstrip()
    return f'{now}; usual: {ends}. Meant: {meant}? (to keep it: range_check = "off" in this table)'


def _meant(value: Value, usual: tuple[float, float], unit: str) -> str | None:
    """The unit (or the value) that a slip stands for, None if nothing fits."""
    low, high = usual
    parts = split(value.text)
    if parts is not None:
        number, own = parts
        dimension = next(name for name, units in BY_SPELLING.items() if normal(unit) in units)
        for other in sorted(UNITS[dimension], key=lambda each: each.text != normal(unit)):
            if _slipped(own.factor / other.factor) and low <= abs(other.to_si(number)) <= high:
                return other.text
    for factor in SLIP_FACTORS[:2]:
        for si in (value.si * factor, value.si / factor):
            if low <= abs(si) <= high:
                return f"{plain(convert(si, unit))} {unit}".rstrip()
    return None


def _slipped(ratio: float) -> bool:
    """Whether two units differ by a factor that slips are made of."""
    return any(math.isclose(max(ratio, 1.0 / ratio), factor, rel_tol=1e-3) for factor in SLIP_FACTORS)
