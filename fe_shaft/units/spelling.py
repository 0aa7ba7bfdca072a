"""How numbers and units are spelled: the pattern of a quantity, and the unit of the list that a text names."""

import re
from functools import lru_cache

from fe_shaft.errors import nearest, quote
from fe_shaft.units.table import UNITS, Unit


class UnitError(ValueError):
    """A value cannot be read; the text is the sentence that follows the place."""


_NUMBER = r"[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?"
QUANTITY = re.compile(rf"\s*(~?)\s*({_NUMBER})(.*?)\s*", re.ASCII)
# Tolerances behind a length are rare: their patterns are compiled when they are first needed.
_PLUS_MINUS = rf"(.+?)\s*(?:\+-|\+/-|\N{{PLUS-MINUS SIGN}})\s*(?:{_NUMBER})(.+)"
# Letters of ISO 286-1 (holes in capitals), grades IT01 to IT18.
_ISO_LETTERS = "a|b|c|cd|d|e|ef|f|fg|g|h|j|js|k|m|n|p|r|s|t|u|v|x|y|z|za|zb|zc"
_ISO_CLASS = rf"(\S+)\s+(?:{_ISO_LETTERS}|{_ISO_LETTERS.upper()})(?:01|0|[1-9]|1[0-8])"


def _spellings(unit: Unit) -> list[str]:
    """Ways to write a unit that count as one: N m and Nm (N*m and others are brought to N m by `normal`)."""
    return [unit.text, unit.text.replace(" ", "")] if " " in unit.text else [unit.text]


BY_SPELLING = {
    dimension: {spelling: unit for unit in units for spelling in _spellings(unit)} for dimension, units in UNITS.items()
}
# No spelling has two meanings but K, which is the same in both.
_ANY_SPELLING = {spelling: unit for units in BY_SPELLING.values() for spelling, unit in units.items()}
_SIGNS = str.maketrans({
    "\N{MICRO SIGN}": "u", "\N{GREEK SMALL LETTER MU}": "u", "\N{MIDDLE DOT}": "*", "\N{DOT OPERATOR}": "*",
    "\N{SUPERSCRIPT TWO}": "^2", "\N{SUPERSCRIPT THREE}": "^3",
})  # fmt: skip


def normal(text: str) -> str:
    """A unit's text with one spelling per sign: N*m, N·m and N  m are N m."""
    text = text.translate(_SIGNS).replace("**", "^").replace("*", " ")
    return re.sub(r" ?([/^]) ?", r"\1", " ".join(text.split()))


@lru_cache(maxsize=4096)
def find_unit(dimension: str, text: str) -> Unit | None:
    """The unit that a text names; for a length also with a tolerance behind it."""
    units = BY_SPELLING[dimension]
    unit = units.get(normal(text))
    if unit is None and dimension == "length":
        bare = text.strip()
        match = re.fullmatch(_ISO_CLASS, bare, re.ASCII) or re.fullmatch(_PLUS_MINUS, bare, re.ASCII)
        if match and all(normal(each) in units for each in match.groups()):
            unit = units[normal(match[1])]
    return unit


@lru_cache(maxsize=4096)
def unit_named(text: str) -> Unit:
    """The unit of any dimension that a text of the program names."""
    unit = _ANY_SPELLING.get(normal(text))
    if unit is None:
        raise UnitError(f"{quote(text)} is not a unit of the list. {nearest(text, _ANY_SPELLING)}".rstrip())
    return unit


def split(text: str) -> tuple[float, Unit] | None:
    """Number and unit of a text that was accepted before."""
    match = QUANTITY.fullmatch(text)
    if match is None:
        return None
    found = (find_unit(dimension, match[3]) for dimension in UNITS)
    unit = next((unit for unit in found if unit is not None), None)
    return None if unit is None else (float(match[2]), unit)
