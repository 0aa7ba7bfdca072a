"""Kinds of values: what each accepts, and its sentence about anything else."""

import datetime
from typing import Any

import pytest

from fe_shaft.model.clock import ClockAngle, Turning
from fe_shaft.model.helix import HelixKind
from fe_shaft.model.kinds import (
    Choice,
    Count,
    Factor,
    Flag,
    FreeName,
    Kind,
    Name,
    Reference,
    Text,
    name_fault,
    shown,
    thing,
)
from fe_shaft.model.lists import Listed, Shares
from fe_shaft.model.part import SpreadKind
from fe_shaft.model.position import PositionKind
from fe_shaft.model.quantity import Quantity
from fe_shaft.model.segment import ShearKind

SHARES = Shares(Factor(0.0, 1.0, open_at_least=True), total=1.0, word=True)
SWITCHED = Shares(Factor(-10.0, 10.0), lists=True)


@pytest.mark.parametrize(
    ("kind", "raw", "value"),
    [
        (Text(), "two\nlines", "two\nlines"),
        (Name(), "wheel_2-b", "wheel_2-b"),
        (Name(), "R\N{LATIN SMALL LETTER A WITH DIAERESIS}der", "R\N{LATIN SMALL LETTER A WITH DIAERESIS}der"),
        (FreeName(), "1.4301", "1.4301"),
        (Count(4), 4, 4),
        (Factor(0.0, 2.0), 2, 2.0),
        (Flag(), True, True),
        (Choice("a", "b"), "b", "b"),
        (Listed(Reference(), '["a"]'), ["a", "b"], ("a", "b")),
        (SHARES, "wheel", "wheel"),
        (SHARES, {"a": 0.25, "b": 0.75}, {"a": 0.25, "b": 0.75}),
        (SWITCHED, ["a"], ("a",)),
        (SWITCHED, {"a": -1}, {"a": -1.0}),
        (ShearKind(), 0.9, 0.9),
        (ShearKind(), "none", "none"),
        (SpreadKind("point"), "point", "point"),
    ],
)
def test_accepted(kind: Kind, raw: Any, value: Any) -> None:
    assert kind.check(raw) == value


@pytest.mark.parametrize(
    ("kind", "raw", "sentence"),
    [
        (Text(), 3, '3 is a number, not text. Write it in quotes: "...".'),
        (Text(), "x" * 4001, "the text has 4001 characters; 4000 at most are kept. Shorten it."),
        (Text(), "a\x1b[2J", r'"a\x1b[2J" holds control characters. Leave them out.'),
        (Name(), 3, '3 is a number, not a name. Write it in quotes: "wheel".'),
        (Name(), "left", '"left" has a meaning of its own in positions and limits. Choose another name.'),
        (
            Name(),
            "big wheel",
            '"big wheel" is not a name: a letter first, then letters, digits, _ and -. Write big_wheel.',
        ),
        (Name(), "3", '"3" is not a name: a letter first, then letters, digits, _ and -.'),
        (
            Name(),
            "x" * 61,
            f'"{"x" * 37}..." has 61 characters; a name has 60 at most. Shorten it; label = ... may be long.',
        ),
        (FreeName(), 3, '3 is a number, not a name. Write it in quotes: "42CrMo4".'),
        (
            FreeName(),
            "a;b",
            '"a;b" is not a name of a material: letters, digits, space and .,+/()-_ , 60 at most.',
        ),
        (Reference(), ["a"], 'this is a list, not a name. Write it in quotes: "wheel".'),
        (Reference(), "x" * 181, f'"{"x" * 37}..." is too long for a name. Shorten it.'),
        (Count(4), "85", '"85" is not a whole number. Write it without quotes and unit, as in 19.'),
        (Count(4), 85.0, "85.0 is not a whole number. Write 85."),
        (Count(4), True, "true is not a whole number. Write it without quotes and unit, as in 19."),
        (Count(4, 100), 3, "3 is not possible here. Write 4 to 100."),
        (Factor(0, 2), "1.5", '"1.5" is text, not a number. Write a bare number without quotes, as in 1.15.'),
        (Factor(0, 2), float("nan"), "nan is not a finite number. Write a number from 0 to 2."),
        (Factor(0, 2), 10**400, "inf is not a finite number. Write a number from 0 to 2."),
        (Factor(0, 2, open_at_least=True), 0, "0 is not possible here. Write a number above 0 up to 2."),
        (Flag(), 1, "1 is a number, not yes or no. Write true or false, without quotes."),
        (Choice("a", "b"), "zz", '"zz" is not possible here. Write "a" or "b".'),
        (Choice("radial", "axial"), "axail", '"axail" is not possible here. Nearest: axial.'),
        (Choice("a", later={"b": "Write a."}), "b", '"b" is not known yet in this version. Write a.'),
        (Listed(Reference(), '["a"]'), "a", '"a" is text, not a list. Write ["a"].'),
        (Listed(Reference(), '["a"]'), 3, '3 is a number, not a list. Write ["a"].'),
        (Listed(Reference(), '["a"]', least=1), [], 'the list is empty. Write ["a"].'),
        (Listed(Reference(), '["a"]'), ["a", "a"], '"a" stands twice. Leave one out.'),
        (Listed(Reference(), '["a"]'), ["a"] * 10001, "the list has 10001 entries; 10000 at most are read."),
        (
            SHARES,
            3,
            "3 is a number; here stands name | names with numbers. Write { name = 1 }.",
        ),
        (SHARES, {"a": 0.5, "b": 0.6}, "the shares add up to 1.1, not 1. Change one of them."),
        (
            SHARES,
            {"a": "1"},
            'a: "1" is text, not a number. Write a bare number without quotes, as in 1.15.',
        ),
        (
            ShearKind(),
            "euler",
            '"euler" is text that says nothing about shear. Write "cowper", "none" or a shear coefficient such as 0.9.',
        ),
        (
            ShearKind(),
            1.2,
            '1.2 is no shear coefficient: above 0, up to 1. Write "cowper" (by section) or 0.9.',
        ),
        (
            SpreadKind("facewidth", "point"),
            "width",
            '"width" is not possible here. Write "facewidth" or "point" or a length, as in "20 mm".',
        ),
        (
            ClockAngle(),
            "13 o'clock",
            '"13 o\'clock" is not on the clock. Write 1 to 12 o\'clock, such as "4:30 o\'clock".',
        ),
        (ClockAngle(), "up", '"up" is not a direction on the clock. Write "12 o\'clock".'),
        (ClockAngle(), "9", '"9": hours or degrees? Write "9 o\'clock" or "9 deg".'),
        (ClockAngle(), 9, '9 has no unit. Write "9 deg". Or write "9 o\'clock".'),
        (ClockAngle(), "721 deg", '"721 deg" is more than two turns. Write 0 to 360 deg.'),
        (
            ClockAngle(),
            ["3 o'clock", "9 o'clock"],
            'a list of directions is not known yet in this version. Write one, such as "9 o\'clock".',
        ),
        (
            Turning(),
            "clockwise",
            '"clockwise": from which end? Write "clockwise from left" or "clockwise from right".',
        ),
        (
            Turning(),
            "ccw",
            '"ccw": from which end? Write "counterclockwise from left" or "counterclockwise from right".',
        ),
        (
            Turning(),
            "clockwise from lefft",
            '"clockwise from lefft" is not a sense of turning. Nearest: clockwise from left.',
        ),
        (Turning(), 1, '1 is a number, not a sense of turning. Write "clockwise from left".'),
        (HelixKind(), "15 deg", '"15 deg": left-hand or right-hand? Write "15 deg left" or "15 deg right".'),
        (HelixKind(), "0 deg", '"0 deg" is a spur gear. Leave helix out.'),
        (
            HelixKind(),
            "0 deg left",
            '"0 deg left": a helix angle lies above 0 and up to 60 deg; its hand says the side. Spur: leave helix out.',
        ),
        (HelixKind(), "15 left", '"15" has no unit. Write "15 deg". With the hand: "15 deg left".'),
        (HelixKind(), 15, '15 has no unit. Write "15 deg". With the hand: "15 deg left".'),
    ],
)
def test_refused(kind: Kind, raw: Any, sentence: str) -> None:
    with pytest.raises(ValueError) as caught:
        kind.check(raw)
    assert str(caught.value) == sentence


@pytest.mark.parametrize("name", ["left", "right", "middle", "every", "to"])
def test_reserved_names(name: str) -> None:
    assert name_fault(name) is not None


def test_clock_angles_run_clockwise_from_twelve() -> None:
    angles = [
        ClockAngle().check(text).si for text in ("12 o'clock", "3 o'clock", "4:30 o'clock", "135 deg", "9 o'clock")
    ]
    assert angles == pytest.approx([0.0, 1.5707963267948966, 2.356194490192345, 2.356194490192345, 4.71238898038469])


@pytest.mark.parametrize("text", ["15 deg left", "15 deg left-hand", "15 deg, left", " 15 deg  left "])
def test_helix_angle_and_hand(text: str) -> None:
    helix = HelixKind().check(text)
    assert (helix.hand, helix.sign, helix.text) == ("left", -1, text)
    assert helix.angle.si == pytest.approx(0.2617993877991494)
    assert HelixKind().check(helix) == helix


def test_raw_values_in_sentences() -> None:
    assert shown(datetime.date(2020, 3, 1)) == "2020-03-01"
    assert thing(datetime.time(3)) == "a date or time"
    assert shown(object()) == '"object"'
    assert thing(object()) == "something else"
    assert shown({"a": 1}) == "this"
    assert thing({"a": 1}) == "a table"


def test_values_that_were_read_before_are_read_again() -> None:
    stiffness = Quantity("stiffness", ("0.5 N/um", "20000 N/um"))
    value = stiffness.check("~93 N/um")
    assert stiffness.check(value) == value
    with pytest.raises(ValueError, match="is a stiffness, not a length"):
        Quantity("length").check(value)


def test_few_texts_are_remembered(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr("fe_shaft.model.quantity.MOST_REMEMBERED", 2)
    length = Quantity("length")
    assert [length.check(f"{index} m").si for index in (1, 2, 3, 2, 1)] == [1.0, 2.0, 3.0, 2.0, 1.0]
    assert len(length._known) <= 2


def test_an_estimate_is_no_position() -> None:
    rough = Quantity("length").check({"value": "3 mm", "low": "2 mm", "high": "4 mm"})
    with pytest.raises(ValueError, match="is an estimate; a position is one length"):
        PositionKind().check(rough)


def test_a_helix_that_is_a_quantity_lacks_its_hand() -> None:
    import pint

    with pytest.raises(
        ValueError, match=r'^"15 deg": left-hand or right-hand\? Write "15 deg left" or "15 deg right"\.$'
    ):
        HelixKind().check(pint.UnitRegistry().Quantity(15, "degree"))
