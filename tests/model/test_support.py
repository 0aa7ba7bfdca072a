"""Supports: what they hold, how they give way, what fits together."""

import numpy as np
import pytest

import fe_shaft.model as fs
from tests.model.told import only

AT = {"at": "10 mm"}
UNITS = {"force": "N", "length": "mm", "angle": "rad"}
DIAGONAL = np.diag([1e4, 2e4, 2e4, 0.0, 3e6, 3e6])


def bearing(**words: object) -> fs.Bearing:
    return fs.Bearing("b", **(AT | {"holds": ["radial"], "stiffness": {"radial": "93 N/um"}} | words))  # type: ignore[arg-type]


def matrix(rows: object, **units: str) -> fs.Matrix:
    return fs.Matrix(rows=rows, units=UNITS | units)


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        ({"holds": []}, "b.holds", 'the list is empty. Write ["radial"].'),
        ({"holds": "radial"}, "b.holds", '"radial" is text, not a list. Write ["radial"].'),
        ({"holds": ["radial", "radial"]}, "b.holds", '"radial" stands twice. Leave one out.'),
        (
            {"holds": ["axial", "stops_left"], "stiffness": {"axial": "60 N/um"}},
            "b.holds",
            "axial holds both ways already. Leave stops_left out, or axial.",
        ),
        (
            {"holds": ["stops_left", "stops_right"], "stiffness": {"axial": "60 N/um"}},
            "b.holds",
            'stops_left and stops_right together are "axial". Write "axial" instead.',
        ),
        (
            {"stiffness": None},
            "b.stiffness",
            'stiffness is not written. Write stiffness = { radial = "93 N/um" }, or [pins.X] if it gives nothing way.',
        ),
        (
            {"matrix": {"rows": DIAGONAL.tolist(), "units": UNITS}},
            "b.matrix",
            "matrix stands beside stiffness. Write one of them.",
        ),
        (
            {"holds": ["radial", "axial"]},
            "b.stiffness.axial",
            'axial is not written, but holds says axial. Write axial = "60 N/um", or hold less.',
        ),
        (
            {"holds": ["radial", "stops_left"]},
            "b.stiffness.axial",
            'axial is not written, but holds says stops_left. Write axial = "60 N/um", or hold less.',
        ),
        (
            {"holds": ["radial", "tilt"]},
            "b.stiffness.tilt",
            'tilt is not written, but holds says tilt. Write tilt = "50 N m/mrad", or hold less.',
        ),
        (
            {"holds": ["radial", "spin"]},
            "b.holds",
            "spin has no stiffness in a bearing. Leave spin out, or hold it by a pin or a matrix.",
        ),
        ({"stiffness": {}}, "b.stiffness", 'the table is empty. Write { radial = "93 N/um" }.'),
        (
            {"stiffness": "93 N/um"},
            "b.stiffness",
            '"93 N/um" is text, not a table. Write { radial = "~93 N/um", up = "120 N/um" }.',
        ),
        (
            {"stiffness": {"radial": "93 N/um", "up": "93 N/um"}},
            "b.stiffness.radial",
            "radial stands beside up. Write radial, or up and front.",
        ),
        (
            {"stiffness": {"up": "93 N/um"}},
            "b.stiffness.front",
            "front is not written, only up. Write both, or radial for all directions.",
        ),
        (
            {"stiffness": {"radial": "93 N/um", "tilt_front": "5 N m/mrad"}},
            "b.stiffness.tilt_up",
            "tilt_up is not written, only tilt_front. Write both, or tilt for all directions.",
        ),
        ({"seat": {}}, "b.seat", 'the table is empty. Write { radial = "400 N/um" }.'),
        (
            {"seat": {"radial": "93 N/um", "matrix": {"rows": DIAGONAL.tolist(), "units": UNITS}}},
            "b.seat.matrix",
            "matrix stands beside radial. Write one of them.",
        ),
        ({"offset": "20 um"}, "b.offset_angle", "offset_angle is not written, only offset. Write both, or neither."),
        (
            {"bore_tilt_angle": "3 o'clock"},
            "b.bore_tilt",
            "bore_tilt is not written, only bore_tilt_angle. Write both, or neither.",
        ),
        ({"at": None}, "b.at", 'at is not written. Write at = "62 mm" (middle), or left_at or right_at (a face).'),
        ({"left_at": "3 mm"}, "b.left_at", "at and left_at place it more than once. Keep one."),
        (
            {"at": None, "left_at": "3 mm"},
            "b.left_at",
            'left_at places a face, but nothing says how wide it is. Write width = "19 mm" as well, or at.',
        ),
        (
            {"preload": {"force": "200 N"}},
            "b.preload",
            "preload is not known yet in this version. "
            "Leave it out: radial_clearance is that of the bearing as mounted and warm.",
        ),
    ],
)
def test_bearings_that_cannot_be(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(bearing, **words) == (place, sentence)


def test_a_bearing_of_a_catalogue_is_told_once() -> None:
    place, sentence = only(fs.Bearing, "b", left_at="3 mm", holds=["radial"], catalogue="6306")
    assert (place, sentence) == (
        "b.catalogue",
        "catalogue is not known yet in this version. "
        'Write the figures of the bearing as stiffness = { radial = "...", axial = "..." }.',
    )


def test_a_pin_gives_nothing_way() -> None:
    assert only(fs.Pin, "p", **AT, holds=["radial"], stiffness={"radial": "3 N/um"})[1].startswith(
        "stiffness is not a key here."
    )
    assert only(fs.Pin, "p", **AT, holds=["radial"], preload="3 N") == (
        "p.preload",
        "preload is not known yet in this version. A pin gives nothing way; leave it out.",
    )


def test_stiffness_in_the_order_of_displacements() -> None:
    stiffness = {
        "up": "3 N/um",
        "front": "2 N/um",
        "axial": "1 N/um",
        "tilt_up": "5 N m/mrad",
        "tilt_front": "4 N m/mrad",
    }
    made = bearing(holds=["radial", "axial"], stiffness=stiffness)
    assert made.diagonal is not None
    assert made.diagonal.tolist() == [1e6, 3e6, 2e6, 0.0, 5e3, 4e3]
    assert made.matrix_si is None


@pytest.mark.parametrize(
    ("holds", "used"),
    [
        (["radial"], [0, 1, 1, 0, 1, 1]),
        (["axial"], [1, 0, 0, 0, 1, 1]),
        (["radial", "stops_left"], [1, 1, 1, 0, 1, 1]),
        (["radial", "stops_right"], [1, 1, 1, 0, 1, 1]),
        (["tilt"], [0, 0, 0, 0, 1, 1]),
    ],
)
def test_what_is_not_held_is_not_used_but_tilt_counts(holds: list[str], used: list[int]) -> None:
    stiffness = {"radial": "1 N/um", "axial": "1 N/um", "tilt": "1000 N m/rad"}
    everything = np.array([1e6, 1e6, 1e6, 0.0, 1e3, 1e3])
    assert bearing(holds=holds, stiffness=stiffness).diagonal == pytest.approx(np.array(used) * everything)


def test_a_seat_is_rigid_where_nothing_is_written() -> None:
    seat = fs.Seat(radial="400 N/um", axial="150 N/um")
    assert seat.diagonal(np.inf).tolist() == [1.5e8, 4e8, 4e8, np.inf, np.inf, np.inf]
    assert seat.matrix_si is None


@pytest.mark.parametrize(
    ("units", "factors"),
    [
        ({}, (1e3, 1.0, 1e-3)),
        ({"length": "m"}, (1.0, 1.0, 1.0)),
        ({"force": "kN"}, (1e6, 1e3, 1.0)),
        ({"angle": "mrad"}, (1e3, 1e3, 1.0)),
    ],
)
def test_units_of_a_matrix(units: dict[str, str], factors: tuple[float, float, float]) -> None:
    """Force per length, force (per radian, or moment per length), moment per radian."""
    rows = DIAGONAL.copy()
    per_angle = 1e3 if units.get("angle") == "mrad" else 1.0
    rows[1, 5], rows[5, 1] = 7.0 / per_angle, 7.0  # both are a force in SI
    rows[4, 4] = rows[5, 5] = 3e6 / per_angle
    si = matrix(rows.tolist(), **units).si
    force_per_length, force, moment = factors
    assert si[0, 0] == pytest.approx(1e4 * force_per_length)
    assert si[1, 5] == pytest.approx(7.0 * force / per_angle)
    assert si[4, 4] == pytest.approx(3e6 * moment / per_angle)
    assert (si == si.T).all()


def test_a_matrix_loses_the_rows_of_what_is_not_held() -> None:
    rows = DIAGONAL.copy()
    rows[0, 1] = rows[1, 0] = 10.0
    made = bearing(stiffness=None, matrix={"rows": rows.tolist(), "units": UNITS})
    assert made.matrix_si is not None
    assert not made.matrix_si[0].any()
    assert not made.matrix_si[:, 0].any()
    assert made.matrix_si[1, 1] == pytest.approx(2e7)
    assert made.diagonal is None


@pytest.mark.parametrize(
    ("rows", "sentence"),
    [
        ("m.mtx", '"m.mtx" is text, not six rows of six numbers. Write rows = [[...], ...].'),
        ([[1.0] * 6] * 5, "there are 5 rows, not six (ux uy uz rx ry rz)."),
        ([[1.0] * 6] * 5 + [[1.0] * 5], "row 6 has 5 numbers, not six (ux uy uz rx ry rz)."),
        ([[1.0] * 6] * 5 + [3], "row 6 is a number, not a list of six numbers."),
        (
            [["1 N"] * 6] * 6,
            'row 1: "1 N" is text, not a number. Write a bare number without quotes, as in 1.15.',
        ),
        (np.zeros((6, 6)), "all numbers are 0. Write the stiffness, or leave the bearing out."),
        (
            np.diag([1.0, 1, 1, 1, 1, -1]),
            "the matrix pushes along in some direction (scaled eigenvalue -1). Check signs and units.",
        ),
        (
            np.eye(6) + np.eye(6, k=1),
            "row 1 column 2 is 1, row 2 column 1 is 0: not symmetric. Make them equal.",
        ),
        (None, 'rows is not written. Write six rows of six numbers, or file = "bearing.mtx".'),
    ],
)
def test_matrices_that_cannot_be(rows: object, sentence: str) -> None:
    assert only(matrix, rows) == ("matrix.rows", sentence)


def test_a_script_reads_no_matrix_file() -> None:
    assert only(fs.Matrix, file="m.mtx", units=UNITS) == (
        "matrix.file",
        "only a model file reads files. In a script write rows = numpy.loadtxt(...).",
    )


def test_estimates_have_a_band_and_its_ends() -> None:
    made = bearing(
        stiffness={"radial": "~93 N/um", "tilt": {"value": "5 N m/mrad", "low": "4 N m/mrad", "high": "9 N m/mrad"}}
    )
    assert made.at_end("low").stiffness == made.stiffness.at_end("low")
    assert made.stiffness is not None
    low, high = made.stiffness.at_end("low"), made.stiffness.at_end("high")
    assert low.diagonal(0.0).tolist() == pytest.approx([0, 46.5e6, 46.5e6, 0, 4e3, 4e3])
    assert high.diagonal(0.0).tolist() == pytest.approx([0, 186e6, 186e6, 0, 9e3, 9e3])
    assert not low.estimated
