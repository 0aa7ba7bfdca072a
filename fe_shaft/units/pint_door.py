"""Quantities of pint, from the registry of the caller: the only door to pint."""

import math
from typing import Any

from fe_shaft.units.refusals import NAMES, choices, refuse_below_absolute_zero, sample
from fe_shaft.units.showing import exact, shortest
from fe_shaft.units.spelling import UnitError, unit_named
from fe_shaft.units.table import UNITS
from fe_shaft.units.value import Value

_SI_OF_PINT = {
    "length": "meter", "angle": "radian", "force": "newton", "moment": "newton * meter", "mass": "kilogram",
    "time": "second", "speed": "radian / second", "power": "watt", "stiffness": "newton / meter",
    "tilt_stiffness": "newton * meter / radian", "pressure": "pascal", "density": "kilogram / meter ** 3",
    "expansion": "1 / kelvin", "acceleration": "meter / second ** 2", "temperature": "kelvin",
    "temperature_difference": "kelvin", "ratio": "dimensionless",
}  # fmt: skip
_ANGULAR = {"angle", "speed", "tilt_stiffness"}


def from_quantity(raw: Any, dimension: str, example: str) -> Value:
    """A pint quantity, converted by its own registry."""
    import pint

    shown = f"{' '.join(str(raw).split())[:60]} (a pint quantity)"
    try:
        units = str(raw.units)
        number = float(raw.magnitude)
        si = float(raw.to(_SI_OF_PINT[dimension]).magnitude)
        rooted = str(raw.units) if dimension not in _ANGULAR else str(raw.to_root_units().units)
    except (pint.errors.PintError, TypeError, ValueError) as error:
        reason = "is not one number" if not isinstance(error, pint.errors.PintError) else f"is not {NAMES[dimension]}"
        raise UnitError(f"{shown} {reason}. Give {choices(dimension)}.") from None
    if not (math.isfinite(si) and math.isfinite(number)):
        raise UnitError(f"{shown} is not a finite number. Write {sample(example)}.")
    if dimension in _ANGULAR and "radian" not in rooted:
        raise UnitError(f"{shown} does not name its angle. Put radian, degree or turn into its unit.")
    difference = dimension == "temperature_difference"
    if (difference and units.startswith("degree_")) or (dimension == "temperature" and "delta_" in units):
        other = "temperature" if difference else "temperature_difference"
        raise UnitError(f"{shown} is {NAMES[other]}, not {NAMES[dimension]}. Give {choices(dimension)}.")
    refuse_below_absolute_zero(si, f"{number:g} {units}", dimension)
    return _in_listed_unit(number, si, dimension, example)


def _in_listed_unit(number: float, si: float, dimension: str, example: str) -> Value:
    """A quantity in the caller's own unit if the list has it, else in the field's; the text is read as this value."""
    for unit in (unit_named(example), *UNITS[dimension]):
        if math.isclose(unit.to_si(number), si, rel_tol=1e-12):
            return Value(unit.to_si(number) + 0.0, f"{shortest(number)} {unit.text}".rstrip())
    return Value(si + 0.0, exact(si, unit_named(example)))
