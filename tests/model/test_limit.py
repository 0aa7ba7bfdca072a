"""Limits: what they hold for, and in which unit."""

import pytest

import fe_shaft.model as fs
from tests.model.small import model
from tests.model.told import only

WHEEL = {"of": "wheel", "quantity": "deflection", "max": "20 um"}


def limit(**words: object) -> fs.Limit:
    return fs.Limit("x", **(WHEEL | words))  # type: ignore[arg-type]


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        ({"max": None}, "x.max", 'max is not written. Write max = "20 um", or min.'),
        ({"max": 20}, "x.max", '20 has no unit. Write "20 um".'),
        ({"max": "20 mrad"}, "x.max", '"20 mrad" is an angle, not a length. Write mm, m, cm, um, nm, in, ft or mil.'),
        (
            {"quantity": "slope"},
            "x.max",
            '"20 um" is a length, not an angle. Write deg, rad, mrad, urad, arcmin or arcsec.',
        ),
        ({"min": "30 um"}, "x.min", "30 um is not below max = 20 um. Exchange them."),
        ({"quantity": "deflexion"}, "x.quantity", '"deflexion" is not possible here. Nearest: deflection.'),
        (
            {"quantity": "misalignment"},
            "x.quantity",
            '"misalignment" is not known yet in this version. It needs gear pairs.',
        ),
        (
            {"quantity": "life_hours"},
            "x.quantity",
            '"life_hours" is not known yet in this version. It needs a bearing catalogue.',
        ),
        (
            {"counting": "shaft"},
            "x.counting",
            '"shaft" is not known yet in this version. Write counting = "everything".',
        ),
        (
            {"bundled": "strict", "max": None},
            "x.bundled",
            'bundled is not known yet in this version. Write max = "..." and its source.',
        ),
        ({"of": 3}, "x.of", '3 is a number, not a name. Write of = "wheel" or of = "every bearing".'),
        ({"of": []}, "x.of", 'the list is empty. Write ["wheel", "pinion"].'),
        ({"of": "every bering"}, "x.of", '"every bering" means nothing here. Nearest: every bearing.'),
        ({"of": "every gear pair"}, "x.of", '"every gear pair" is not known yet in this version. It needs gear pairs.'),
        (
            {"of": "wheel to pinion"},
            "x.of",
            '"wheel to pinion": one thing against another is not known yet in this version. Write one name.',
        ),
        ({"cases": []}, "x.cases", 'the list is empty. Write ["running"].'),
    ],
)
def test_limits_that_cannot_be(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(limit, **words) == (place, sentence)


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        ({"of": "weel"}, "x.of", 'no part is called "weel". Nearest: wheel.'),
        ({"of": "layshaft"}, "x.of", '"layshaft" is a shaft; a limit holds for a part on it. Write the part\'s name.'),
        ({"of": "every sprocket"}, "x.of", "there is no sprocket in the model. Leave the limit out."),
        ({"cases": ["runing"]}, "x.cases", 'no case is called "runing". Nearest: running.'),
        (
            {"quantity": "tilt", "max": "1 mrad"},
            "x.quantity",
            'tilt belongs to bearings and pins; wheel is a gear. Write quantity = "slope".',
        ),
        ({"quantity": "force", "max": "1 kN"}, "x.quantity", "force belongs to bearings and pins; wheel is a gear."),
        (
            {"quantity": "separation", "of": "disc"},
            "x.quantity",
            "separation belongs to gears with a mate; disc is none. Write deflection, up or front.",
        ),
    ],
)
def test_limits_that_do_not_fit_the_model(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(lambda: model(limits=[limit(**words)])) == (place, sentence)


def test_what_a_limit_holds_for() -> None:
    limits = [
        fs.Limit("a", of="every bearing", quantity="tilt", max="1 mrad"),
        fs.Limit("b", of=["wheel", "disc"], quantity="slope", max="1 mrad", cases=["running"]),
        fs.Limit("c", of="every gear", quantity="separation", min="-5 um", max="20 um"),
    ]
    made = model(limits=limits)
    assert made.targets("a") == ("lay_left", "lay_right")
    assert made.targets("b") == ("wheel", "disc")
    assert made.targets("c") == ("wheel", "pinion")
    assert made.limit_cases("a") == ("running",)
    assert made.pinned().targets("a") == ("lay_left", "lay_right")
    assert [each.name for each in made.limits] == ["a", "b", "c"]


def test_two_limits_of_one_name() -> None:
    assert only(lambda: model(limits=[limit(), limit()])) == (
        "x",
        '"x" is the name of another limit already. Choose another name.',
    )
