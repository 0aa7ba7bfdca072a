"""Why a value is refused, and what to write instead: the sentences and the repairs they offer."""

import difflib
import re

from fe_shaft.errors import quote
from fe_shaft.units.spelling import BY_SPELLING, QUANTITY, UnitError, find_unit, normal
from fe_shaft.units.table import FACTORS, TRADE_UNITS, UNITS

LONGEST_TEXT = 100  # characters; a number with unit and tolerance needs a fraction of this

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

_LIKE_TOLERANCE = r"(\S+?|)\s*([A-Za-z]{1,2}\d+|[+\N{PLUS-MINUS SIGN}].*)"
NAMES = {
    "length": "a length", "angle": "an angle", "force": "a force", "moment": "a moment", "mass": "a mass",
    "time": "a time", "speed": "a speed of turning", "power": "a power", "stiffness": "a stiffness",
    "tilt_stiffness": "a tilt stiffness", "pressure": "a stress or pressure", "density": "a density",
    "expansion": "a thermal expansion", "acceleration": "an acceleration", "temperature": "a temperature",
    "temperature_difference": "a temperature difference", "ratio": "a ratio",
}  # fmt: skip


def _noun(dimension: str) -> str:
    return NAMES[dimension].split(" ", 1)[1]


def sample(example: str) -> str:
    """What to write where a value is expected; `example` is its unit, empty for a ratio."""
    return f'a number and a unit, as in "12 {example}"' if example else 'a number, as in 0.98 or "98 %"'


def choices(dimension: str) -> str:
    """The units of a dimension, at most eight of them, the trade unit first."""
    if dimension == "ratio":
        return "a bare number or %"
    trade = TRADE_UNITS[dimension]
    texts = [trade, *(unit.text for unit in UNITS[dimension] if unit.text != trade)][:8]
    return texts[0] if len(texts) == 1 else f"{', '.join(texts[:-1])} or {texts[-1]}"


def refusal(text: str, dimension: str, example: str) -> str:
    """Why a text was not accepted, and what to write."""
    if len(text) > LONGEST_TEXT:
        return f"{quote(text)} has {len(text)} characters, {LONGEST_TEXT} at most are read. Shorten it."
    if not text.strip():
        return f"the text is empty. Write {sample(example)}."
    if re.match(r"\s*~?\s*[+-]?(?:nan|inf|infinity)(?![a-z])", text, re.IGNORECASE):
        return f"{quote(text)} is not a finite number. Write {sample(example)}."
    for fact, cleaned in _repairs(text):
        if cleaned != text:
            readable = [each for each in cleaned.split("|") if _readable(each, dimension)]
            remedy = " or ".join(f'"{each}"' for each in readable) or sample(example)
            return f"{quote(text)} {fact}. Write {remedy}."
    match = QUANTITY.fullmatch(text)
    if match is None or re.match(r"\s*[-*^.(\d]|\s*\+\s*\d", match[3]):
        known = normal(text) in BY_SPELLING[dimension]
        return f"{quote(text)} {'has no number' if known else 'is not a number with a unit'}. Write {sample(example)}."
    return unknown_unit(match[3].strip(), f"{match[1]}{match[2]}", dimension, example, text.strip())


def _repairs(text: str) -> list[tuple[str, str]]:
    """Usual slips in a number: what is wrong with it, and the text without it (choices parted by |)."""
    import unicodedata  # for refusals alone

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
    match = QUANTITY.fullmatch(text)
    return match is not None and find_unit(dimension, match[3]) is not None


def unknown_unit(unit: str, number: str, dimension: str, example: str, written: str) -> str:
    """The sentence about a unit that does not fit in `written`; `number` is what stood before it (may be empty)."""
    if not unit:
        return f'{quote(written)} has no unit. Write "{number} {example}".'
    unfit = f"{quote(written)}: {quote(unit)} is not a unit of {_noun(dimension)}"
    if meant := _respelled(unit, dimension):
        return f'{unfit}. Write "{f"{number} {meant}".strip()}".'
    others = [other for other in UNITS if find_unit(other, unit) is not None]
    if others:
        return f"{quote(written)} is {NAMES[others[0]]}, not {NAMES[dimension]}. Write {choices(dimension)}."
    if dimension == "length" and (match := re.fullmatch(_LIKE_TOLERANCE, unit, re.ASCII)):
        own = match[1] if match[1] in FACTORS["length"] else example
        wanted = f'Write for example "{number} {own} k6" or "{number} {own} +-5 um"'
        return f"{quote(written)}: {quote(match[2])} is no ISO 286 tolerance class and no deviation. {wanted}."
    close = difflib.get_close_matches(normal(unit), BY_SPELLING[dimension], n=1, cutoff=0.75)
    remedy = f"Nearest: {BY_SPELLING[dimension][close[0]].text}." if close else f"Write {choices(dimension)}."
    return f"{unfit}. {remedy}"


def _respelled(unit: str, dimension: str) -> str | None:
    """The unit that was meant: right but for capitals, or a usual word for one of the list."""
    text = normal(unit)
    units = BY_SPELLING[dimension]
    same = list(dict.fromkeys(known.text for spelling, known in units.items() if spelling.lower() == text.lower()))
    if len(same) == 1:
        return same[0]
    meant = _MEANT.get(text)
    return meant if meant in units else None


def refuse_below_absolute_zero(si: float, text: str, dimension: str) -> None:
    """Raise UnitError for a temperature [K] below zero; `text` is what the user wrote."""
    if dimension == "temperature" and si < 0.0:
        raise UnitError(f"{quote(text)} is below absolute zero (0 K). Check its sign.")
