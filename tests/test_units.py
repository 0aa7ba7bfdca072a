"""Numbers with units: what is read, what is refused with which sentence, and every factor against pint."""

import decimal
import fractions
import math
import subprocess
import sys
import time
from collections.abc import Callable
from typing import Any

import numpy as np
import pint
import pytest
from hypothesis import example, given
from hypothesis import strategies as st

from fe_shaft.units import (
    FACTORS,
    TRADE_UNITS,
    UnitError,
    Value,
    convert,
    parse,
    show,
    slip,
    unit_factor,
)

REGISTRY: Any = pint.UnitRegistry()
LISTED = [(dimension, unit) for dimension, units in FACTORS.items() for unit in units]

# ---- factors, against pint (an independent table of units)

# Our text -> pint's, where they differ. In pint a hertz is 1 rad/s; as a speed of turning it is a turn per second
# (rotational frequency, ISO 80000-3), and 1/min likewise.
PINT_TEXT = {
    "hp(metric)": "metric_horsepower",
    "hp(imperial)": "550 * foot * force_pound / second",
    "rpm": "turn / minute",
    "1/min": "turn / minute",
    "1/s": "turn / second",
    "Hz": "turn / second",
    "%": "percent",
    "": "dimensionless",
    "t": "metric_ton",
}
SI_OF_PINT = {
    "length": "m",
    "angle": "rad",
    "force": "N",
    "moment": "N*m",
    "mass": "kg",
    "time": "s",
    "speed": "rad/s",
    "power": "W",
    "stiffness": "N/m",
    "tilt_stiffness": "N*m/rad",
    "pressure": "Pa",
    "density": "kg/m^3",
    "expansion": "1/K",
    "acceleration": "m/s^2",
    "ratio": "",
}


def in_pint(number: float, unit: str) -> Any:
    text = PINT_TEXT.get(unit)
    if text is None:  # in pint "in" is an operator, and "mil" an angle of gunners
        words = {"in": "inch", "mil": "thou"}
        parts = [" * ".join(words.get(word, word) for word in part.split()) for part in unit.split("/")]
        text = "/".join(f"({part})" for part in parts)
    return number * REGISTRY.parse_expression(text)


@pytest.mark.parametrize(("dimension", "unit"), [each for each in LISTED if "temperature" not in each[0]])
def test_every_factor_is_that_of_pint(dimension: str, unit: str) -> None:
    expected = in_pint(1.0, unit).to(SI_OF_PINT[dimension]).magnitude
    # pint multiplies factors one after the other: a few roundings of 1.1e-16
    assert FACTORS[dimension][unit] == pytest.approx(expected, rel=2e-15)
    assert parse(f"1 {unit}", dimension).si == pytest.approx(expected, rel=2e-15)
    assert unit_factor(dimension, unit) == FACTORS[dimension][unit]


@pytest.mark.parametrize("number", [0.0, 20.0, 451.0])
@pytest.mark.parametrize(("unit", "of_pint"), [("K", "kelvin"), ("degC", "degC"), ("degF", "degF")])
def test_temperatures_have_the_zero_point_of_pint(number: float, unit: str, of_pint: str) -> None:
    expected = REGISTRY.Quantity(number, of_pint).to("kelvin").magnitude
    assert parse(f"{number} {unit}", "temperature").si == pytest.approx(expected, rel=1e-14)
    assert convert(expected, unit) == pytest.approx(number, abs=1e-10)


def test_exact_by_definition() -> None:
    # International yard and pound agreement (1959): 1 in = 25.4 mm, 1 lb = 0.45359237 kg.
    # 3rd CGPM (1901): standard gravity 9.80665 m/s^2.
    assert parse("1 in", "length").si == 0.0254
    assert parse("1 lb", "mass").si == 0.45359237
    assert parse("1 kgf", "force").si == 9.80665
    pound_force = decimal.Decimal("0.45359237") * decimal.Decimal("9.80665")
    assert parse("1 lbf", "force").si == float(pound_force) == 4.4482216152605
    assert parse("360 deg", "angle").si == 2 * math.pi
    assert parse("1 Hz", "speed").si == 2 * math.pi
    assert parse("60 rpm", "speed").si == pytest.approx(2 * math.pi, rel=1e-15)


@pytest.mark.parametrize("number", [25.4, 62.0, 38.5, 0.1, 191.0, 1234.567])
def test_millimetres_round_as_metres_do(number: float) -> None:
    assert parse(f"{number} mm", "length").si == number / 1000


def test_fixed_list_of_units() -> None:
    assert set(TRADE_UNITS) == set(FACTORS)
    for dimension, unit in TRADE_UNITS.items():
        assert unit in FACTORS[dimension]
    assert len(FACTORS["stiffness"]) == len(FACTORS["force"]) * len(FACTORS["length"])
    assert len(FACTORS["tilt_stiffness"]) == len(FACTORS["moment"]) * len(FACTORS["angle"])


# ---- reading


@pytest.mark.parametrize(
    ("text", "dimension", "si"),
    [
        ("38 mm", "length", 0.038),
        ("38mm", "length", 0.038),
        ("  38   mm ", "length", 0.038),
        ("+38 mm", "length", 0.038),
        ("-.5 mm", "length", -0.0005),
        ("5. mm", "length", 0.005),
        ("3.8e1 mm", "length", 0.038),
        ("3.8E+1mm", "length", 0.038),
        ("38\N{NO-BREAK SPACE}mm", "length", 0.038),
        ("12 \N{MICRO SIGN}m", "length", 12e-6),
        ("12 \N{GREEK SMALL LETTER MU}m", "length", 12e-6),
        ("30 mm k6", "length", 0.030),
        ("30 mm H7", "length", 0.030),
        ("30 mm js6", "length", 0.030),
        ("12 um +-5 um", "length", 12e-6),
        ("12 um +- 0.005 mm", "length", 12e-6),
        ("12 um +/-5 um", "length", 12e-6),
        ("12 \N{MICRO SIGN}m \N{PLUS-MINUS SIGN}5 \N{MICRO SIGN}m", "length", 12e-6),
        ("133.4 N m", "moment", 133.4),
        ("133.4 N*m", "moment", 133.4),
        ("133.4 N * m", "moment", 133.4),
        ("133.4 Nm", "moment", 133.4),
        ("133.4 N\N{MIDDLE DOT}m", "moment", 133.4),
        ("133.4 N\N{DOT OPERATOR}m", "moment", 133.4),
        ("2 kNm", "moment", 2000.0),
        ("300 Nm/mrad", "tilt_stiffness", 3e5),
        ("300 N m / mrad", "tilt_stiffness", 3e5),
        ("93 N / um", "stiffness", 93e6),
        ("93 kN/mm", "stiffness", 93e6),
        ("393.7 rpm", "speed", 393.7 * math.pi / 30),
        ("393.7 1/min", "speed", 393.7 * math.pi / 30),
        ("7850 kg/m^3", "density", 7850.0),
        ("7850 kg/m**3", "density", 7850.0),
        ("7850 kg/m\N{SUPERSCRIPT THREE}", "density", 7850.0),
        ("9.81 m/s\N{SUPERSCRIPT TWO}", "acceleration", 9.81),
        ("98.5 %", "ratio", 0.985),
        ("98.5%", "ratio", 0.985),
        ("0.985", "ratio", 0.985),
        ("12000 h", "time", 43.2e6),
        ("-459.67 degF", "temperature", 0.0),
    ],
)
def test_read(text: str, dimension: str, si: float) -> None:
    value = parse(text, dimension)
    assert value.si == pytest.approx(si, rel=1e-15)
    assert value.text == text
    assert not value.estimated


@pytest.mark.parametrize("text", ["0 mm", "-0 mm", "-0.0e-5 mm", "0e400 mm"])
def test_zero_has_no_sign(text: str) -> None:
    assert math.copysign(1.0, parse(text, "length").si) == 1.0
    assert parse(text, "length").si == 0.0


@pytest.mark.parametrize(
    "raw", [0.98, 1, np.float64(0.98), np.int64(1), decimal.Decimal("0.98"), fractions.Fraction(1, 2)]
)
def test_bare_number_is_a_ratio(raw: Any) -> None:
    assert parse(raw, "ratio").si == float(raw)


def test_numpy_numbers_in_texts() -> None:
    for x in (np.float64(38.5), np.float32(38.5), np.int64(38)):
        assert parse(f"{x} mm", "length").si == float(x) / 1000


def test_value_passes_again_if_its_dimension_fits() -> None:
    value = parse("~93 N/um", "stiffness")
    assert parse(value, "stiffness") is value
    certain = parse("38 mm", "length")
    assert parse(certain, "length") is certain
    with pytest.raises(UnitError, match='"38 mm" is a length, not a mass'):
        parse(certain, "mass")
    with pytest.raises(UnitError, match="is a stiffness, not a length"):
        parse(Value(1.0, "1 N/m", 0.9, 1.1), "length")


# ---- estimates


@pytest.mark.parametrize("text", ["~93 N/um", " ~ 93 N/um"])
def test_tilde_means_half_to_twice(text: str) -> None:
    value = parse(text, "stiffness")
    assert (value.si, value.low, value.high) == (93e6, 46.5e6, 186e6)
    assert value.estimated
    assert value.written() == text
    assert value.end("low") == Value(46.5e6, "46.5 N/um")
    assert value.end("high") == Value(186e6, "186 N/um")
    assert not value.end("low").estimated
    assert value.end("low").end("high") == value.end("low")


def test_band_is_given_in_a_table() -> None:
    table = {"value": "0.3 mm", "low": "200 um", "high": "0.5 mm", "source": "measured by feeler gauge"}
    value = parse(table, "length")
    assert value == Value(0.3 / 1000, "0.3 mm", 200 / 1e6, 0.5 / 1000, "measured by feeler gauge")
    assert str(value) == "~0.3 mm"
    assert value.written() == table | {"low": "0.2 mm"}
    assert parse(value.written(), "length") == value


def test_table_without_a_band() -> None:
    assert parse({"value": "3 kg"}, "mass") == Value(3.0, "3 kg")
    assert parse({"value": "3 kg", "source": "scales"}, "mass").written() == {"value": "3 kg", "source": "scales"}
    tilde = parse({"value": "~93 N/um", "source": "catalogue"}, "stiffness")
    assert (tilde.low, tilde.source) == (46.5e6, "catalogue")
    assert tilde.written() == {"value": "~93 N/um", "source": "catalogue"}
    assert parse({"value": 0.9, "low": 0.8, "high": 1}, "ratio").low == 0.8


def test_given_band_wins_over_the_tilde() -> None:
    value = parse({"value": "~93 N/um", "low": "80 N/um", "high": "100 N/um"}, "stiffness")
    assert (value.low, value.high) == (80e6, 100e6)
    assert str(value) == "~93 N/um"
    tilde_on_length = parse({"value": "~3 mm", "low": "1.5 mm", "high": "6 mm"}, "length")
    assert parse(tilde_on_length.written(), "length") == tilde_on_length


@pytest.mark.parametrize(
    ("table", "sentence"),
    [
        ({}, 'value is missing. Write { value = "12 N/um", low = "...", high = "..." }.'),
        ({"value": "93"}, 'value: "93" has no unit. Write "93 N/um".'),
        ({"value": "93 N/um", "low": "5 N/um"}, "low is given without high. Write both, or neither."),
        ({"value": "93 N/um", "high": "5 N/um"}, "high is given without low. Write both, or neither."),
        (
            {"value": "3 N/um", "low": "5 N/um", "high": "9 N/um"},
            'low = "5 N/um" is above value = "3 N/um". Write low <= value <= high.',
        ),
        (
            {"value": "10 N/um", "low": "5 N/um", "high": "9 N/um"},
            'high = "9 N/um" is below value = "10 N/um". Write low <= value <= high.',
        ),
        (
            {"value": "7 N/um", "low": "~5 N/um", "high": "9 N/um"},
            '"~5 N/um" is the end of a band and an estimate itself. Leave out the ~.',
        ),
        ({"value": "7 N/um", "low": "5 mm", "high": "9 N/um"}, "low: "),
        ({"value": "7 N/um", "lo": "5 N/um"}, '"lo" is not a key of an estimate. Nearest: low.'),
        ({"value": "7 N/um", "source": 3}, 'source is not text. Write source = "where the value comes from".'),
        ({"value": {"value": "7 N/um"}}, 'value is a table. Write value = "12 N/um".'),
    ],
)
def test_bad_table(table: dict[str, Any], sentence: str) -> None:
    with pytest.raises(UnitError) as caught:
        parse(table, "stiffness")
    assert str(caught.value).startswith(sentence)


# ---- refusals, each with its own sentence


@pytest.mark.parametrize(
    ("raw", "dimension", "sentence"),
    [
        (38, "length", '38 has no unit. Write "38 mm".'),
        (np.float64(0.5), "power", '0.5 has no unit. Write "0.5 kW".'),
        ("38", "length", '"38" has no unit. Write "38 mm".'),
        ("~93", "stiffness", '"~93" has no unit. Write "~93 N/um".'),
        (True, "length", 'true is not a length. Write a number and a unit, as in "12 mm".'),
        (np.True_, "ratio", 'true is not a ratio. Write a number, as in 0.98 or "98 %".'),
        (None, "length", 'None is not a length. Write a number and a unit, as in "12 mm".'),
        ([1], "mass", 'a value of type list is not a mass. Write a number and a unit, as in "12 kg".'),
        (1j, "ratio", 'a value of type complex is not a ratio. Write a number, as in 0.98 or "98 %".'),
        (math.nan, "ratio", 'nan is not a finite number. Write a number, as in 0.98 or "98 %".'),
        ("46,5 mm", "length", '"46,5 mm" has a decimal comma. Write "46.5 mm".'),
        ("0,985", "ratio", '"0,985" has a decimal comma. Write "0.985".'),
        ("1,000 mm", "length", '"1,000 mm" has a decimal comma. Write "1.000 mm" or "1000 mm".'),
        ("1,234.5 mm", "length", '"1,234.5 mm" has a comma in its number. Write "1234.5 mm".'),
        ("1.234,5 mm", "length", '"1.234,5 mm" has a comma in its number. Write "1234.5 mm".'),
        ("1,234,567 mm", "length", '"1,234,567 mm" has a comma in its number. Write "1234567 mm".'),
        ("1_000 mm", "length", '"1_000 mm" has an underscore. Write "1000 mm".'),
        ("1 000 mm", "length", '"1 000 mm" has a space in its number. Write "1000 mm".'),
        ("1'000 mm", "length", '"1\'000 mm" has an apostrophe in its number. Write "1000 mm".'),
        ("1/2 in", "length", '"1/2 in" is a fraction. Write "0.5 in".'),
        ("\u0661\u0665 mm", "length", '"\u0661\u0665 mm" has digits other than 0 to 9. Write "15 mm".'),
        ("\uff13 mm", "length", '"\uff13 mm" has digits other than 0 to 9. Write "3 mm".'),
        ("\N{MINUS SIGN}5 mm", "length", '"\N{MINUS SIGN}5 mm" has a minus sign other than -. Write "-5 mm".'),
        ("nan mm", "length", '"nan mm" is not a finite number. Write a number and a unit, as in "12 mm".'),
        ("1e400 mm", "length", '"1e400 mm" is too large for a number. Check its exponent.'),
        ("1e308 MN", "force", '"1e308 MN" is too large for a number. Check its exponent.'),
        ("1e-400 mm", "length", '"1e-400 mm" is too small for a number. Check its exponent, or write 0.'),
        ("1e-320 nm", "length", '"1e-320 nm" is too small for a number. Check its exponent, or write 0.'),
        ("", "length", 'the text is empty. Write a number and a unit, as in "12 mm".'),
        ("mm", "length", '"mm" has no number. Write a number and a unit, as in "12 mm".'),
        ("wheel", "length", '"wheel" is not a number with a unit. Write a number and a unit, as in "12 mm".'),
        ("9**9**7 mm", "length", '"9**9**7 mm" is not a number with a unit. Write a number'),
        ("20 mm + 5 mm", "length", '"20 mm + 5 mm": "+ 5 mm" is no ISO 286 tolerance class and no deviation. '),
        ("20 kg", "length", '"20 kg" is a mass, not a length. Write mm, m, cm, um, nm, in, ft or mil.'),
        ("20 %", "length", '"20 %" is a ratio, not a length. '),
        ("20 kg", "ratio", '"20 kg" is a mass, not a ratio. Write a bare number or %.'),
        ("5 K", "length", '"5 K" is a temperature, not a length. '),
        ("20 degC", "temperature_difference", '"20 degC" is a temperature, not a temperature difference. Write K.'),
        ("20 MM", "length", '"20 MM": "MM" is not a unit of length. Write "20 mm".'),
        ("12 nm", "moment", '"12 nm": "nm" is not a unit of moment. Write "12 N m".'),
        ("5 KW", "power", '"5 KW": "KW" is not a unit of power. Write "5 kW".'),
        ("5 hp", "power", '"5 hp": "hp" is not a unit of power. Write kW, W, hp(metric) or hp(imperial).'),
        ("210 N/mm^2", "pressure", '"210 N/mm^2": "N/mm^2" is not a unit of stress or pressure. Write "210 MPa".'),
        (
            "15\N{DEGREE SIGN}",
            "angle",
            '"15\N{DEGREE SIGN}": "\N{DEGREE SIGN}" is not a unit of angle. Write "15 deg".',
        ),
        ("7 arcmins", "angle", '"7 arcmins": "arcmins" is not a unit of angle. Nearest: arcmin.'),
        ("5 m m", "length", '"5 m m": "m m" is not a unit of length. Nearest: mm.'),
        (
            "5 furlong",
            "length",
            '"5 furlong": "furlong" is not a unit of length. Write mm, m, cm, um, nm, in, ft or mil.',
        ),
        ("30 mm q6", "length", '"30 mm q6": "q6" is no ISO 286 tolerance class and no deviation. Write for example '),
        ("30 mm k19", "length", '"30 mm k19": "k19" is no ISO 286 tolerance class and no deviation. '),
        ("12 +-5 um", "length", '"12 +-5 um": "+-5 um" is no ISO 286 tolerance class and no deviation. '),
        ("12 um +-5 kg", "length", '"12 um +-5 kg": "+-5 kg" is no ISO 286 tolerance class and no deviation. '),
        ("30 kg k6", "mass", '"30 kg k6": "kg k6" is not a unit of mass. '),
        ("-3 K", "temperature", '"-3 K" is below absolute zero (0 K). Check its sign.'),
        ("-300 degC", "temperature", '"-300 degC" is below absolute zero (0 K). Check its sign.'),
        (
            "~3 kg",
            "mass",
            '"~3 kg": only a stiffness has a usual band (half to twice). Write { value = "3 kg", low = "...", high =',
        ),
        ("~-3 N/um", "stiffness", '"~-3 N/um" has no band from half to twice. Write a number greater than 0.'),
        ("~0 N/um", "stiffness", '"~0 N/um" has no band from half to twice. Write a number greater than 0.'),
        ("1" * 10**5 + " mm", "length", f'"{"1" * 37}..." has 100003 characters, 100 at most are read. Shorten it.'),
        ("20\x1b[31m mm", "length", r'"20\x1b[31m mm": "\x1b[31m mm" is not a unit of length. '),
    ],
    ids=lambda each: ascii(each)[:25] if isinstance(each, str) else type(each).__name__,
)
def test_refusal(raw: object, dimension: str, sentence: str) -> None:
    with pytest.raises(UnitError) as caught:
        parse(raw, dimension)
    assert str(caught.value).startswith(sentence)
    assert str(caught.value).endswith((".", ". "))


def test_integer_beyond_every_float() -> None:
    with pytest.raises(UnitError, match="inf is not a finite number"):
        parse(10**5000, "length")


def test_field_suggests_its_own_unit() -> None:
    with pytest.raises(UnitError, match='Write "6 um"'):
        parse(6, "length", example="um")


NO_NUMBERS = [
    "nan", "NaN", "-nan", "+nan", "inf", "-inf", "+Inf", "Infinity", "-infinity", "~nan", "1e400", "-1e400",
    "1e999999", "1e-400", "-1e-9999", "1,5", "1.000,5", "1,000.5", "1 000", "1_000", "1'000", "\u0661",
    "\u0967\u0968", "\uff11", "\N{SUPERSCRIPT TWO}", "\N{VULGAR FRACTION ONE HALF}", "\N{MINUS SIGN}1", "1/2",
    "1/0", "2*3", "9**9**7", "(1)", "1.2.3", "..5", ".", "-", "+", "--1", "+-1", "1e", "1e+", "0x10", "0b1", "1j",
    "one", "", " ", "\t", "\0", "1\0", "1\n2", "9" * 10**5, "1e" + "9" * 200, "True", "None", "$1", "=1+1",
    "<b>1</b>", "1;2", "{1}", "\ud800",
]  # fmt: skip
FIELDS = [
    ("length", "mm"),
    ("stiffness", "N/um"),
    ("speed", "rpm"),
    ("temperature", "degC"),
    ("moment", "N m"),
    ("ratio", "%"),
]


@pytest.mark.parametrize(("dimension", "unit"), FIELDS)
@pytest.mark.parametrize("number", NO_NUMBERS, ids=lambda number: ascii(number)[:20])
def test_what_is_no_number_is_refused_in_one_sentence(number: str, dimension: str, unit: str) -> None:
    with pytest.raises(UnitError) as caught:
        parse(f"{number} {unit}", dimension)
    sentence = str(caught.value)
    assert 20 < len(sentence) < 300
    assert sentence.isprintable() or "\n" not in sentence
    assert any(word in sentence for word in ("Write", "Check", "Shorten", "Nearest"))


UNKNOWN_UNITS = ("", "parsec", "mm mm", "N/", "/um", "?", "k6", "1")
WRONG_UNITS = [(dimension, unit) for dimension in FACTORS for unit in UNKNOWN_UNITS]


@pytest.mark.parametrize(("dimension", "unit"), WRONG_UNITS)
def test_missing_and_unknown_units_are_refused(dimension: str, unit: str) -> None:
    if (dimension, unit) == ("ratio", ""):
        assert parse("5", "ratio").si == 5.0
        return
    with pytest.raises(UnitError, match=r"Write|Nearest"):
        parse(f"5 {unit}", dimension)


@pytest.mark.parametrize("dimension", FACTORS)
def test_units_of_every_other_dimension_are_refused(dimension: str) -> None:
    for other, unit in LISTED:
        if unit not in FACTORS[dimension]:
            with pytest.raises(UnitError, match="not a"):
                parse(f"5 {unit}" if unit else "5 kg", dimension if other != "ratio" or unit else "length")


def read_or_refuse(text: str, dimension: str) -> None:
    """Nothing but a finite number or a UnitError with a sentence comes out."""
    sentence = ""
    try:
        assert math.isfinite(parse(text, dimension).si)
    except UnitError as error:
        sentence = str(error) or "no sentence"
    assert sentence != "no sentence"


@given(st.text(max_size=120), st.sampled_from(sorted(FACTORS)))
def test_any_text_is_read_or_refused(text: str, dimension: str) -> None:
    read_or_refuse(text, dimension)


@given(st.text("0123456789.,_eE+-~/*' kmNuradin%\N{PLUS-MINUS SIGN}", max_size=30), st.sampled_from(sorted(FACTORS)))
def test_texts_that_look_like_numbers_are_read_or_refused(text: str, dimension: str) -> None:
    read_or_refuse(text, dimension)


# ---- round trips

finite = st.floats(min_value=1e-150, max_value=1e150) | st.floats(min_value=-1e150, max_value=-1e-150)


@given(finite, st.sampled_from([each for each in LISTED if each[0] != "temperature"]))
def test_what_is_written_is_read_back(number: float, listed: tuple[str, str]) -> None:
    dimension, unit = listed
    value = parse(f"{number!r} {unit}", dimension)
    assert convert(value.si, unit) == pytest.approx(number, rel=1e-15)
    assert parse(value.written(), dimension) == value


@given(
    st.floats(min_value=1e-100, max_value=1e100),
    st.floats(min_value=0.0, max_value=1.0),
    st.floats(min_value=1.0, max_value=1e3),
    st.sampled_from([each for each in LISTED if "temperature" not in each[0]]),
)
@example(0.29364928835662335, 0.0, 1.0, ("tilt_stiffness", "N m/deg"))  # an end at the value itself, a float beside it
def test_bands_are_written_and_read_back(number: float, down: float, up: float, listed: tuple[str, str]) -> None:
    dimension, unit = listed
    si = parse(f"{number!r} {unit}", dimension).si
    value = Value(si, f"{number!r} {unit}", si * down, si * up, "invented")
    again = parse(value.written(), dimension)
    assert (again.si, again.text, again.source) == (value.si, value.text, value.source)
    assert (again.low, again.high) == pytest.approx((value.low, value.high), rel=1e-15)
    for end in (value.end("low"), value.end("high")):
        assert parse(end.text, dimension).si == pytest.approx(end.si, rel=1e-15)


# ---- slips of units

STIFFNESS = (5e6, 5e9)  # 5 to 5000 N/um


def slip_of(text: str, dimension: str, low: str, high: str) -> str | None:
    usual = (parse(low, dimension).si, parse(high, dimension).si)
    return slip(parse(text, dimension), usual, low.split(" ", 1)[1])


def test_slip_is_told_with_the_unit_meant() -> None:
    with pytest.raises(UnitError) as caught:
        parse("93 N/m", "stiffness", usual=STIFFNESS)
    assert str(caught.value) == (
        '"93 N/m" is 0.000093 N/um; usual: 5 to 5000. Meant: N/um? (to keep it: range_check = "off" in this table)'
    )


@pytest.mark.parametrize(
    ("text", "dimension", "low", "high", "meant"),
    [
        ("38 m", "length", "1 mm", "2000 mm", "mm"),
        ("38 um", "length", "1 mm", "2000 mm", "mm"),
        ("38000 mm", "length", "1 mm", "2000 mm", "um"),
        ("0.038 mm", "length", "1 mm", "2000 mm", "m"),
        ("2000 in", "length", "10 mm", "2000 mm", "mm"),
        ("3.5 m", "length", "1 um", "60 um", "um"),
        ("12 mm", "length", "0.1 um", "60 um", "um"),
        ("210 MPa", "pressure", "10 GPa", "1000 GPa", "GPa"),
        ("210000 GPa", "pressure", "10 GPa", "1000 GPa", "MPa"),
        ("210 Pa", "pressure", "1 MPa", "1000 MPa", "MPa"),
        ("93 N/mm", "stiffness", "5 N/um", "5000 N/um", "N/um"),
        ("93 N/m", "stiffness", "5 N/um", "5000 N/um", "N/um"),
        ("93000 N/um", "stiffness", "5 N/um", "5000 N/um", "N/mm"),
        ("20 rad", "angle", "0 deg", "45 deg", "deg"),
        ("0.5 rad", "angle", "0.001 mrad", "2 mrad", "mrad"),
        ("5.5 W", "power", "0.1 kW", "1000 kW", "kW"),
        ("50000 kW", "power", "0.1 kW", "1000 kW", "W"),
        ("300 N m/rad", "tilt_stiffness", "10 N m/mrad", "10000 N m/mrad", "N m/mrad"),
        ("300 N mm/mrad", "tilt_stiffness", "10 N m/mrad", "10000 N m/mrad", "N m/mrad"),
        ("7850 g/cm^3", "density", "1000 kg/m^3", "20000 kg/m^3", "kg/m^3"),
        ("7.85 kg/m^3", "density", "1000 kg/m^3", "20000 kg/m^3", "g/cm^3"),
        ("50000 1/s", "speed", "1 rpm", "60000 rpm", "rpm"),
        ("11.5 1/K", "expansion", "5e-6 1/K", "3e-5 1/K", "0.0000115 1/K"),
        ("332600 N m", "moment", "1 N m", "10000 N m", "N mm"),
        ("4.1 t", "mass", "0.01 kg", "100 kg", "kg"),
        ("4100 kg", "mass", "0.01 kg", "100 kg", "g"),
        ("985", "ratio", "0.5 ", "1 ", "0.985"),
        ("36 rpm", "speed", "1 Hz", "20 Hz", None),
        ("50 h", "time", "1 min", "100 min", "min"),
    ],
)
def test_slips(text: str, dimension: str, low: str, high: str, meant: str | None) -> None:
    sentence = slip_of(text, dimension, low, high)
    if meant is None:
        assert sentence is None
    else:
        assert sentence is not None
        assert f"Meant: {meant}? (to keep it:" in sentence


@pytest.mark.parametrize(
    "text",
    ["5 N/um", "5000 N/um", "93 N/um", "0.6 N/um", "40000 N/um", "0 N/um", "-93 N/um", "1e-9 N/um", "1e20 N/um"],
)
def test_usual_and_merely_unusual_values_pass(text: str) -> None:
    assert slip(parse(text, "stiffness"), STIFFNESS, "N/um") is None
    assert parse(text, "stiffness", usual=STIFFNESS).text == text


def test_slip_of_a_value_whose_text_says_nothing() -> None:
    sentence = slip(Value(93.0, "by hand"), STIFFNESS, "N/um")
    assert sentence is not None
    assert "Meant: 93 N/um?" in sentence


def test_no_slip_where_the_range_begins_at_zero() -> None:
    assert slip(parse("0.000001 um", "length"), (0.0, 1e-3), "um") is None


# ---- showing


@pytest.mark.parametrize(
    ("si", "unit", "text"),
    [
        (36.5e-6, "um", "36.5 um"),
        (4.9e-6, "um", "4.9 um"),
        (20e-6, "um", "20 um"),
        (0.000309, "mrad", "0.309 mrad"),
        (133.44, "Nm", "133 N m"),
        (133.44, "N*m", "133 N m"),
        (1516.2, "N", "1516 N"),
        (999999.0, "N", "999999 N"),
        (999999.7, "N", "1e6 N"),
        (-1234567.0, "N", "-1.23e6 N"),
        (0.00123, "m", "0.00123 m"),
        (0.00099999, "m", "0.001 m"),
        (0.0005, "m", "5e-4 m"),
        (9.999, "N", "10 N"),
        (0.0, "um", "0 um"),
        (-0.0, "um", "0 um"),
        (293.15, "degC", "20 degC"),
        (273.15, "degC", "0 degC"),
        (0.985, "%", "98.5 %"),
        (0.985, "", "0.985"),
        (math.nan, "um", "nan um"),
        (-math.inf, "um", "-inf um"),
    ],
)
def test_show(si: float, unit: str, text: str) -> None:
    assert show(si, unit) == text


def test_show_with_more_digits_and_numpy() -> None:
    assert show(np.float64(133.44), "N m", digits=4) == "133.4 N m"
    assert show(133.44, "N m", digits=1) == "133 N m"


@given(st.floats(allow_nan=False, allow_infinity=False, min_value=-1e300, max_value=1e300))
def test_shown_numbers_are_near_and_plain(number: float) -> None:
    text = show(number, "N")
    assert text.isascii()
    assert not text.startswith("-0 ")
    assert float(text.removesuffix(" N")) == pytest.approx(number, rel=0.0051)
    if 1e-3 <= abs(number) < 999999:
        assert "e" not in text


def test_unknown_unit_of_the_program_is_told() -> None:
    with pytest.raises(UnitError, match=r"not a unit of the list\. Nearest: um"):
        convert(1.0, "umm")
    with pytest.raises(UnitError, match='"kg" is a mass, not a length'):
        unit_factor("length", "kg")


# ---- quantities of pint


@pytest.mark.parametrize(("dimension", "unit"), [each for each in LISTED if "temperature" not in each[0]])
def test_quantities_keep_their_unit_and_can_be_written(dimension: str, unit: str) -> None:
    value = parse(in_pint(7.3, unit), dimension)
    expected = in_pint(7.3, unit).to(SI_OF_PINT[dimension]).magnitude
    assert value.si == pytest.approx(expected, rel=2e-15)
    assert parse(value.text, dimension).si == value.si


def test_quantities_of_any_registry() -> None:
    others: list[Any] = [pint.UnitRegistry(), pint.UnitRegistry(autoconvert_offset_to_baseunit=True)]
    others.append(pint.application_registry)
    for registry in others:
        assert parse(registry.Quantity(1.5, "inch"), "length") == Value(1.5 * 254 / 1e4, "1.5 in")
        assert parse(registry.Quantity(200, "degC"), "temperature").si == pytest.approx(473.15)
    assert parse(REGISTRY.Quantity(3, "mile"), "length").text == "4828032 mm"
    assert parse(REGISTRY.Quantity(0, "mile"), "length", example="um") == Value(0.0, "0 um")
    assert parse(REGISTRY.Quantity(np.float64(5), "delta_degC"), "temperature_difference") == Value(5.0, "5 K")
    torque = REGISTRY.Quantity(5.5, "kW") / REGISTRY.Quantity(393.7, "rpm")
    assert parse(torque, "moment").si == pytest.approx(5500 / (393.7 * math.pi / 30))


@pytest.mark.parametrize(
    ("quantity", "dimension", "fact"),
    [
        (REGISTRY.Quantity(3, "kg"), "length", "is not a length. Give mm, m,"),
        (REGISTRY.Quantity([1, 2], "mm"), "length", "is not one number"),
        (REGISTRY.Quantity(math.nan, "mm"), "length", "is not a finite number"),
        (REGISTRY.Quantity(math.inf, "mm"), "length", "is not a finite number"),
        # pint converts 1 Hz to 1 rad/s; a speed in Hz is nearly always meant as turns, so neither is guessed
        (REGISTRY.Quantity(10, "Hz"), "speed", "does not name its angle"),
        (REGISTRY.Quantity(10, "1/min"), "speed", "does not name its angle"),
        (REGISTRY.Quantity(3, "N*m"), "tilt_stiffness", "does not name its angle"),
        (REGISTRY.Quantity(3, ""), "angle", "does not name its angle"),
        (REGISTRY.Quantity(20, "degC"), "temperature_difference", "is a temperature, not a temperature difference"),
        (REGISTRY.Quantity(20, "delta_degC"), "temperature", "is a temperature difference, not a temperature"),
        (REGISTRY.Quantity(-3, "kelvin"), "temperature", "is below absolute zero"),
    ],
)
def test_quantities_that_are_refused(quantity: Any, dimension: str, fact: str) -> None:
    with pytest.raises(UnitError, match=fact):
        parse(quantity, dimension)


def test_quantity_is_checked_for_slips() -> None:
    with pytest.raises(UnitError, match="Meant: N/um"):
        parse(REGISTRY.Quantity(93, "N/m"), "stiffness", usual=STIFFNESS)


# ---- cost


def test_reading_text_does_not_load_pint() -> None:
    code = "import sys; from fe_shaft.units import parse; parse('38 mm', 'length'); sys.exit('pint' in sys.modules)"
    assert subprocess.run([sys.executable, "-c", code], check=False).returncode == 0


def test_ten_thousand_numbers_are_read_at_once() -> None:
    """About as long as two regular expressions a text: 10 to 15 times what `float` takes of the bare numbers."""
    numbers = [f"{number}.25" for number in range(10_000)]

    def fastest(run: Callable[[str], object], texts: list[str]) -> float:
        best = math.inf
        for _ in range(7):
            start = time.process_time()
            for text in texts:
                run(text)
            best = min(best, time.process_time() - start)
        return best

    reading = fastest(lambda text: parse(text, "length", usual=(1e-6, 1e3)), [f"{number} mm" for number in numbers])
    assert reading < 60 * fastest(float, numbers)


@pytest.mark.parametrize("text", ["1" * 99 + "x", "1." * 50, "1e" * 50, " " * 99, "5 " + "+-" * 49, "5 mm" + " k" * 48])
def test_no_text_takes_long_to_refuse(text: str) -> None:
    start = time.perf_counter()
    with pytest.raises(UnitError):
        parse(text, "length")
    assert time.perf_counter() - start < 0.5
