"""Numbers with units: what the user writes, and what the program shows.

Inside fe_shaft everything is SI floats. Here alone text such as ``"38 mm"`` or ``"~93 N/um"`` becomes one, and back.
Quantities of pint are accepted from the registry of the caller; only they make this package touch pint.

Each file imports only from those before it: table, spelling, showing, refusals, value, slips, pint_door, reading.
"""

from fe_shaft.units.reading import parse, unit_factor
from fe_shaft.units.refusals import LONGEST_TEXT
from fe_shaft.units.showing import convert, show
from fe_shaft.units.slips import SLIP_FACTORS, SLIP_MARGIN, slip
from fe_shaft.units.spelling import UnitError
from fe_shaft.units.table import FACTORS, STANDARD_GRAVITY, TRADE_UNITS
from fe_shaft.units.value import Value

__all__ = [
    "FACTORS", "LONGEST_TEXT", "SLIP_FACTORS", "SLIP_MARGIN", "STANDARD_GRAVITY", "TRADE_UNITS", "UnitError", "Value",
    "convert", "parse", "show", "slip", "unit_factor",
]  # fmt: skip
