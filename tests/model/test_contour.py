"""A contour of points: what it refuses, the segments it becomes, and that it is written back as it was."""

import pickle

import numpy as np
import pint
import pytest

import fe_shaft as fs
from tests.model.told import only, told

PLAIN = [["0 mm", "28 mm"], ["1 mm", "30 mm"], ["19 mm", "30 mm"], ["19 mm", "38 mm"], ["60 mm", "38 mm"]]


def shaft(contour: object, **words: object) -> fs.Shaft:
    return fs.Shaft("s", contour=contour, **({"material": "steel"} | words))  # type: ignore[arg-type]


def at(*x: str) -> list[list[str]]:
    """Points at some places, all of one diameter."""
    return [[f"{each} mm", "30 mm"] for each in x]


EXAMPLE = 'Write contour = [["0 mm", "30 mm"], ["19 mm", "30 mm"], ["19 mm", "38 mm"], ["57 mm", "38 mm"]].'
FILLET = {"x": "19 mm", "diameter": "30 mm", "fillet": "1 mm"}


@pytest.mark.parametrize(
    ("contour", "place", "sentence"),
    [
        ("a.csv", "", f'"a.csv" is text, not a list of points. {EXAMPLE}'),
        ([], "", f"the contour has no point; two at least make a shaft. {EXAMPLE}"),
        (at("0"), "", f"the contour has one point; two at least make a shaft. {EXAMPLE}"),
        ([*at("0"), "9 mm"], ".point_2", '"9 mm" is text, not a point. Write ["19 mm", "38 mm"].'),
        (
            [*at("0"), ["9 mm"]],
            ".point_2",
            'two or three numbers make a point (x, diameter, bore), not 1. Write ["19 mm", "38 mm"].',
        ),
        ([*at("0"), ["9 mm", 30]], ".point_2.diameter", '30 has no unit. Write "30 mm".'),
        ([*at("0"), [9, "30 mm"]], ".point_2.x", '9 has no unit. Write "9 mm".'),
        ([*at("0"), ["9 mm", "0 mm"]], ".point_2.diameter", '"0 mm" is not greater than 0. Write a positive value.'),
        ([*at("0"), ["-9 mm", "3 mm"]], ".point_2.x", '"-9 mm" is negative. Write 0 or a positive value.'),
        (
            [*at("0"), ["9 mm", {"value": "30 mm", "low": "29 mm", "high": "31 mm"}]],
            ".point_2.diameter",
            '"30 mm" is an estimate; a contour has one length. Write "38 mm".',
        ),
        (
            [*at("0"), ["9 mm", "38 m"]],
            ".point_2.diameter",
            '"38 m" is 38000 mm; usual: 1 to 3000. Meant: mm? (to keep it: range_check = "off" in this table)',
        ),
        (
            [*at("0"), {"x": "9 mm", "diameter": "30 mm", "radius": "1 mm"}],
            ".point_2",
            '"radius" is not a key of a point. Known: x, diameter, bore, fillet.',
        ),
        (
            [*at("0"), {"x": "9 mm"}],
            ".point_2",
            'diameter is not written. Write ["19 mm", "38 mm"].',
        ),
        (
            at("0", "9", "8"),
            ".point_3",
            'x = "8 mm" is left of point 2 at x = "9 mm". Write the points from left to right.',
        ),
        (
            at("0", "9", "9", "9", "20"),
            ".point_4",
            'it is the third point at x = "9 mm"; a step has two. Leave one out.',
        ),
        (
            at("5", "9"),
            ".point_1",
            'the contour begins at x = "5 mm", not at 0. Count x from the left end of the shaft.',
        ),
        (at("0", "0"), "", f'the contour has no length: both points stand at x = "0 mm". {EXAMPLE}'),
        (
            at("0", "0", "9"),
            ".point_2",
            'it stands at x = "0 mm" like point 1: no step at an end. Leave one of them out.',
        ),
        (
            at("0", "9", "9"),
            ".point_3",
            'it stands at x = "9 mm" like point 2: no step at an end. Leave one out.',
        ),
        (
            [["0 mm", "30 mm", "10 mm"], ["9 mm", "20 mm", "20 mm"]],
            ".point_2",
            "a bore of 20 mm leaves no wall in a diameter of 20 mm at x = 9 mm. Make it smaller.",
        ),
        (
            [["0 mm", "30 mm", "10 mm"], ["9 mm", "30 mm"]],
            ".point_2",
            'bore is not written, but point 1 beside it has one. Write "10 mm", or two points at one x where the bore '
            "ends.",
        ),
        (
            [*at("0"), FILLET, *at("30")],
            ".point_2",
            'the fillet of "1 mm" stands at no shoulder: no larger diameter at x = 19 mm. Write it at the thinner '
            "point of a step.",
        ),
    ],
)
def test_contours_that_cannot_be(contour: object, place: str, sentence: str) -> None:
    assert only(shaft, contour) == (f"s.contour{place}", sentence)


def test_every_mistake_is_told_at_its_point() -> None:
    wrong = [["0 mm", 28], ["1 mm", "30,5 mm"], "x"]
    assert list(told(shaft, wrong)) == ["s.contour.point_1.diameter", "s.contour.point_2.diameter", "s.contour.point_3"]


def test_a_shaft_is_told_in_one_way() -> None:
    row = fs.Segment(length="9 mm", diameter="9 mm")
    assert only(fs.Shaft, "s", [row], contour=PLAIN, material="steel") == (
        "s.contour",
        "contour stands beside segments. Write one of them.",
    )
    assert only(fs.Shaft, "s", material="steel") == (
        "s.segments",
        'segments is not written. Write segments = [{ name = "wheel_seat", length = "38 mm", diameter = "38 mm" }], '
        "or contour = [...].",
    )
    assert only(shaft, PLAIN, material=None) == ("s.material", 'material is not written. Write material = "42CrMo4".')


@pytest.mark.parametrize(
    ("key", "sentence"),
    [
        ("contour_layer", "contour_layer belongs to a contour_file, and none is read here. Write both, or neither."),
        ("contour_unit", "contour_unit belongs to a contour_file, and none is read here. Write both, or neither."),
        (
            "contour_file",
            'only a model file reads files. In a script write contour = fs.read_contour("shaft.dxf").',
        ),
    ],
)
def test_a_script_reads_no_files(key: str, sentence: str) -> None:
    assert only(shaft, PLAIN, **{key: "mm"}) == (f"s.{key}", sentence)


def test_points_become_segments() -> None:
    points = [*PLAIN[:2], FILLET, *PLAIN[3:4], ["50 mm", "38 mm", "0 mm"], ["60 mm", "40 mm", "10 mm"]]
    made = shaft(points)
    numbers = made.numbers
    np.testing.assert_allclose(numbers["length"], [0.001, 0.018, 0.031, 0.010], rtol=1e-14)
    assert numbers["diameter_left"].tolist() == [0.028, 0.030, 0.038, 0.038]
    assert numbers["diameter_right"].tolist() == [0.030, 0.030, 0.038, 0.040]
    assert numbers["bore_left"].tolist() == [0.0] * 4
    assert numbers["bore_right"].tolist() == [0.0, 0.0, 0.0, 0.010]
    assert [row.fillet_right is not None for row in made.segments] == [False, True, False, False]
    assert made.segments[1].fillet_right.si == 0.001
    assert all(row.name is None for row in made.segments)


def test_a_fillet_right_of_its_shoulder_stands_at_the_left_end() -> None:
    made = shaft([["0 mm", "38 mm"], ["19 mm", "38 mm"], FILLET, ["40 mm", "30 mm"]])
    assert made.segments[1].fillet_left.si == 0.001
    assert made.segments[1].fillet_right is None


def test_quantities_of_pint_and_tolerances_are_read() -> None:
    unit = pint.UnitRegistry()
    made = shaft([[0 * unit.mm, "30 mm k6", None], [0.02 * unit.m, "30 mm k6"]])
    assert made.ends[-1] == 0.02
    assert made.contour[0][1].text == "30 mm k6"


def test_what_was_written_is_written_back() -> None:
    made = shaft([*PLAIN[:2], FILLET, *PLAIN[3:]])
    assert made.to_table() == {"contour": [*PLAIN[:2], FILLET, *PLAIN[3:]], "material": "steel"}
    assert fs.Shaft("s", **made.to_table()) == made
    assert pickle.loads(pickle.dumps(made)) == made


# ---- in a model


def model(contour: object = PLAIN) -> fs.Model:
    pins = [fs.Pin("a", at="10 mm", holds=["radial", "axial"]), fs.Pin("b", at="50 mm", holds=["radial"])]
    return fs.Model("m", [shaft(contour), *pins, fs.Force("f", at="30 mm", up="-1 kN")])


def test_a_contour_is_changed_as_a_whole() -> None:
    wider = [["0 mm", "30 mm"], ["60 mm", "40 mm"]]
    assert model().change({"s.contour": wider})["s"].to_table()["contour"] == wider
    by_segments = model().change({"s.segments": [{"length": "60 mm", "diameter": "30 mm"}]})
    assert "contour" not in by_segments["s"].to_table()
    assert by_segments.change({"s.contour": wider})["s"].to_table()["contour"] == wider


@pytest.mark.parametrize("place", ["s.segment_2.diameter", "s.wheel_seat.diameter"])
def test_segments_of_a_contour_have_no_address(place: str) -> None:
    assert only(model().change, {place: "44 mm"}) == (
        place,
        "the segments of s come from its contour and have no names. Change s.contour as a whole.",
    )


def test_points_have_no_keys_of_their_own_to_change() -> None:
    place, sentence = only(model().change, {"s.contour.point_1": "44 mm"})
    assert place == "s.contour.point_1"
    assert sentence.startswith("contour has no keys of its own. Write contour = [")


def test_results_and_notes_call_segments_by_number() -> None:
    text = str(fs.solve(model()))
    assert "segment_" not in text.split("Case")[0]  # short pieces of a contour are no slips
    short = [["0 mm", "28 mm"], ["0.02 mm", "30 mm"], ["60 mm", "30 mm"]]
    assert not [note for note in model(short).notes if "unusual" in note.sentence]
    big = [["0 mm", "2.9 m"], ["60 mm", "3.5 m"], ["70 mm", "3.5 m"]]
    assert [note.key for note in model(big).notes if "unusual" in note.sentence] == ["s.segment_2.diameter"]


def test_what_differs_is_told_point_by_point() -> None:
    other = [*PLAIN[:-1], ["61 mm", "38 mm"]]
    from fe_shaft.model.differences import differences

    assert differences(model(), model(other)) == ('s.contour.point_5: ["60 mm", "38 mm"] -> ["61 mm", "38 mm"]',)
