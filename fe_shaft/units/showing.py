"""SI floats back to text: for the terminal, and exactly."""

import math

from fe_shaft.units.spelling import unit_named
from fe_shaft.units.table import Unit


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
    known = unit_named(unit)
    return f"{_digits(known.from_si(float(si)), digits)} {known.text}".rstrip()


def convert(si: float, unit: str) -> float:
    """An SI value in another unit; temperatures with their zero point."""
    return unit_named(unit).from_si(si)


def shortest(number: float) -> str:
    """A number with the fewest digits that name it: 5, not 5.0."""
    return f"{number:.12g}" if float(f"{number:.12g}") == number else repr(number)


def exact(si: float, unit: Unit) -> str:
    """The shortest text that is read as this very value, or as near as floats allow."""
    number = unit.from_si(si)
    texts = [f"{number:.{digits}g}" for digits in (12, 15, 16, 17)]
    texts += [
        f"{near:.17g}" for near in _neighbours(number)
    ]  # division may land a step beside the number that was read
    text = min(texts, key=lambda text: abs(unit.to_si(float(text)) - si))
    return f"{text} {unit.text}".rstrip()


def _neighbours(number: float) -> list[float]:
    """The two floats next to a number on either side."""
    above, below = math.nextafter(number, math.inf), math.nextafter(number, -math.inf)
    return [below, above, math.nextafter(below, -math.inf), math.nextafter(above, math.inf)]


def plain(number: float) -> str:
    """Three significant digits, with small numbers written out: 0.000093."""
    if 1e-9 <= abs(number) < 1e-3:
        return f"{number:.{2 - math.floor(math.log10(abs(number)))}f}".rstrip("0")
    return _digits(number, 3)


def _digits(number: float, digits: int) -> str:
    """Significant digits, without exponent from 0.001 to a million."""
    if number == 0.0 or not math.isfinite(number):
        return "0" if number == 0.0 else str(number)
    mantissa, power = f"{number:.{digits - 1}e}".split("e")
    if int(power) >= -3 and abs(number) < 999_999.5:
        text = f"{number:.{max(0, digits - 1 - int(power))}f}"
        return text.rstrip("0").rstrip(".") if "." in text else text
    return f"{mantissa.rstrip('0').rstrip('.') if '.' in mantissa else mantissa}e{int(power)}"
