"""What is not written is said aloud: every default and every doubt, with the key that changes it."""

from typing import Any

import pytest

import fe_shaft.model as fs
from tests.model.small import bearing, model, segments


def notes(made: fs.Model) -> dict[str, str]:
    return {note.key: note.sentence for note in made.notes}


def test_defaults_of_a_plain_model() -> None:
    assert notes(model(gravity="down")) == {
        "housing.seat": "seats rigid: lay_left, lay_right",
        "wheel.body": "gear bodies rigid: wheel, pinion",
        "wheel.hub": "hubs do not stiffen the shaft: wheel",
        "wheel.hub_diameter": "in one piece its hub is a step of D/d = 4.5, beyond the 3 of the shoulder rule: wheel",
        "mate": "mates stand still",
        "layshaft.shear": "shear: Cowper",
        "shoulders": "shoulders make the shafts softer, by a rule made for this project",
        "wheel.pressure_angle": "pressure_angle 20 deg (ISO 53): wheel, pinion",
        "pinion.helix": "spur gears: pinion",
        "efficiency": "efficiency 1",
        "wheel.mass": "no weight is written: wheel, pinion",
        "estimates": "estimated or assumed (~): lay_left",
        "pinion.at": "the facewidth of pinion reaches over a shoulder",
    }


def test_notes_read_as_one_line() -> None:
    assert str(model().notes[0]) == "seats rigid: lay_left, lay_right (housing.seat)"


@pytest.mark.parametrize(
    ("extra", "words", "key", "sentence"),
    [
        ([], {}, "gravity", "masses without gravity are not weighed: disc"),
        ([], {"cases": []}, "cases", "no case is written: one case as_loaded, all forces and weights, no power"),
        (
            [bearing("b", at="seat", stiffness={"radial": "9 N/um", "axial": "9 N/um"})],
            {},
            "b.holds",
            "axial stiffness of b is not used: it does not hold the shaft so",
        ),
        (
            [bearing("b", at="seat", holds=["axial"], stiffness={"radial": "9 N/um", "axial": "9 N/um"})],
            {},
            "b.holds",
            "radial stiffness of b is not used: it does not hold the shaft so",
        ),
        (
            [bearing("b", at="seat", offset="20 um", offset_angle="3 o'clock")],
            {},
            "b.offset",
            "offset 20 um = coaxiality zone of 40 um diameter: b",
        ),
        (
            [
                fs.Pulley(
                    "p",
                    at="stub",
                    diameter="160 mm",
                    belt_pull={"tight": "9 N", "slack": "3 N"},
                    pulls_towards="6 o'clock",
                )
            ],
            {},
            "p.wrap",
            "belt wraps 180 deg: p",
        ),
        (
            [fs.Sprocket("s", at="stub", diameter="160 mm", pulls_towards="6 o'clock")],
            {},
            "s.pull_factor",
            "pull_factor 1: s",
        ),
        (
            [bearing("b", at="collar.left", width="10 mm")],
            {},
            "b.at",
            "the ring of b reaches over a shoulder",
        ),
        ([bearing("b", at="0 mm", width="10 mm")], {}, "b.at", "b reaches 5 mm over the end of layshaft"),
        (
            [fs.Force("f", at="stub", up="30 MN")],
            {},
            "f.up",
            '"30 MN" is unusual; usual: 0.01 N to 2e7 N',
        ),
        (
            [bearing("b", at="seat", stiffness={"radial": "0.4 N/um"})],
            {},
            "b.stiffness.radial",
            '"0.4 N/um" is unusual; usual: 0.5 N/um to 20000 N/um',
        ),
    ],
)
def test_doubts(extra: list[Any], words: dict[str, Any], key: str, sentence: str) -> None:
    assert notes(model(extra, **words))[key] == sentence


@pytest.mark.parametrize(
    ("words", "key", "sentence"),
    [
        (
            {"torque_factor": 2.2},
            "running.torque_factor",
            "torque_factor 2.2 multiplies power and torque, as K_A of ISO 6336-1 may: running",
        ),
        ({"leaves": None}, "running.leaves", "power enters, but nothing says where it leaves: running"),
        ({"enters": None}, "running.enters", "power leaves, but nothing says where it enters: running"),
    ],
)
def test_doubts_about_cases(words: dict[str, Any], key: str, sentence: str) -> None:
    flow: dict[str, Any] = {"enters": "wheel", "leaves": "pinion", "torque": "3 N m", "turns": "clockwise from left"}
    assert notes(model(cases=[fs.Case("running", **(flow | words))]))[key] == sentence


def test_matrices_tell_what_is_not_used() -> None:
    rows = [[1e5 if i == j else 0.0 for j in range(6)] for i in range(6)]
    matrix = {"rows": rows, "units": {"force": "N", "length": "mm", "angle": "rad"}}
    made = model([fs.Bearing("b", at="seat", holds=["radial"], matrix=matrix)])
    told = [note.sentence for note in made.notes if note.key == "b.holds"]
    assert told == [f"{word} stiffness of b is not used: it does not hold the shaft so" for word in ("axial", "spin")]


def test_unusual_segments_are_counted() -> None:
    rows = [*segments(), *(fs.Segment(None, length="0.05 mm", diameter="20 mm") for _ in range(3))]
    made = fs.Model("x", [fs.Shaft("s", rows, material="steel")])
    assert notes(made)["s.segment_6.length"] == '"0.05 mm" is unusual; usual: 0.1 mm to 20000 mm, and 2 more'


def test_many_names_are_cut() -> None:
    made = model([bearing(f"b{index}", at="seat") for index in range(6)])
    assert notes(made)["estimates"] == "estimated or assumed (~): lay_left, b0, b1, b2 and 3 more"
