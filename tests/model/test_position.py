"""Positions: lengths, anchors, faces, and circles."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

import fe_shaft.model as fs
from fe_shaft.model.position import PositionKind
from tests.model.small import bearing, model, parts, shaft
from tests.model.told import only, told

# The small shaft: left_journal 0-20, seat 20-60, collar 60-70, right_journal 70-90, stub 90-120 mm.


@pytest.mark.parametrize(
    ("text", "x"),
    [
        ("62 mm", 62.0),
        ("0 mm", 0.0),
        ("1 in", 25.4),
        ("seat", 40.0),
        ("seat.left", 20.0),
        ("seat.right", 60.0),
        ("seat + 12 mm", 52.0),
        ("seat+12 mm", 52.0),
        ("collar.right - 2 mm", 68.0),
        ("layshaft.left", 0.0),
        ("layshaft.right", 120.0),
        ("layshaft", 60.0),
        ("layshaft.seat.right", 60.0),
        ("layshaft.right - 1 in", 94.6),
        ("wheel", 40.0),
        ("wheel.left", 30.0),
        ("wheel.right + 1 mm", 51.0),
        ("pinion", 65.0),
        ("lay_left.right", 20.0),
        ("lay_right.left", 70.0),
        ("disc.right", 105.0),
    ],
)
def test_where_a_position_is(text: str, x: float) -> None:
    assert model().position(text) == pytest.approx(x * 1e-3, abs=1e-12)
    assert model([fs.Pin("p", at=text, holds=["tilt"])]).places["p"].x == pytest.approx(x * 1e-3, abs=1e-12)


@pytest.mark.parametrize(
    ("words", "left", "right"),
    [
        ({"at": "seat", "width": "10 mm"}, 35.0, 45.0),
        ({"left_at": "seat.left", "width": "10 mm"}, 20.0, 30.0),
        ({"right_at": "seat.right", "width": "10 mm"}, 50.0, 60.0),
        ({"at": "seat"}, 20.0, 60.0),
        ({"at": "seat + 0 mm"}, 40.0, 40.0),
        ({"at": "40 mm"}, 40.0, 40.0),
    ],
)
def test_faces_of_a_ring(words: dict[str, str], left: float, right: float) -> None:
    place = model([fs.Pin("p", holds=["tilt"], **words)]).places["p"]  # type: ignore[arg-type]
    assert (place.left, place.right) == pytest.approx((left * 1e-3, right * 1e-3), abs=1e-12)
    assert place.shaft == "layshaft"


def test_a_part_follows_when_a_shoulder_moves() -> None:
    moved = model().change({"layshaft.left_journal.length": "30 mm"})
    assert moved.places["pinion"].x == pytest.approx(0.075, abs=1e-12)
    assert moved.places["disc"].x == pytest.approx(0.115, abs=1e-12)


@pytest.mark.parametrize(
    ("raw", "sentence"),
    [
        (62, '62 has no unit. Write "62 mm".'),
        ("62", '"62" has no unit. Write "62 mm".'),
        ("62,5 mm", '"62,5 mm" has a decimal comma. Write "62.5 mm".'),
        ("", 'the text is empty. Write a length or a name, as in "62 mm" or "wheel_seat".'),
        ([1], 'this is a list, not a position. Write "62 mm", "wheel_seat" or "wheel + 12 mm".'),
        (True, 'true is yes or no, not a position. Write "62 mm", "wheel_seat" or "wheel + 12 mm".'),
        ("wheel.middle", '"wheel.middle": a name alone is its middle. Write "wheel".'),
        ("a.b.c", '"a.b.c" has too many dots. Write "collar.right" or "layshaft.collar.right".'),
        ("wheel seat", '"wheel seat" is not a position. Write "62 mm", "wheel_seat" or "wheel + 12 mm".'),
        ("wheel -12 mm", '"wheel -12 mm" is not a position. Write "62 mm", "wheel_seat" or "wheel + 12 mm".'),
        ("+ 12 mm", '"+ 12 mm" is not a number with a unit. Write a number and a unit, as in "12 mm".'),
        ("wheel + 12", '"12" has no unit. Write "12 mm".'),
        ("wheel + + 12 mm", '"wheel + + 12 mm" has two signs. Write "wheel + 12 mm".'),
        ("wheel + 1 mm + 2 mm", '"wheel + 1 mm + 2 mm" has more than one offset. Add them up: "wheel + 12 mm".'),
        ("wheel + seat", '"seat" is not a number with a unit. Write a number and a unit, as in "12 mm".'),
        (
            "~62 mm",
            '"~62 mm": only a stiffness has a usual band (half to twice). '
            'Write { value = "62 mm", low = "...", high = "...", source = "..." }.',
        ),
        ("left", '"left" is not a position. Write "62 mm", "wheel_seat" or "wheel + 12 mm".'),
    ],
)
def test_positions_that_cannot_be_read(raw: object, sentence: str) -> None:
    with pytest.raises(ValueError) as caught:
        PositionKind().check(raw)
    assert str(caught.value) == sentence


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        (
            {"at": "121 mm"},
            "p.at",
            '"121 mm" is off the shaft: layshaft is 120 mm long. Write 0 mm to 120 mm.',
        ),
        ({"at": "-1 mm"}, "p.at", '"-1 mm" is off the shaft: layshaft is 120 mm long. Write 0 mm to 120 mm.'),
        (
            {"at": "stub.right + 3 mm"},
            "p.at",
            '"stub.right + 3 mm" puts its middle at 123 mm, off the shaft: layshaft is 120 mm long. '
            "Write 0 mm to 120 mm.",
        ),
        (
            {"left_at": "stub.right", "width": "10 mm"},
            "p.left_at",
            '"stub.right" puts its middle at 125 mm, off the shaft: layshaft is 120 mm long. Write 0 mm to 120 mm.',
        ),
        ({"at": "sead"}, "p.at", 'no segment or part on layshaft is called "sead". Nearest: seat.'),
        (
            {"at": "output.seat"},
            "p.at",
            '"output.seat": no shaft is called "output". Known: layshaft. '
            "Anchors are segments and parts of layshaft itself.",
        ),
        ({"at": "p + 1 mm"}, "p.at", "positions go round in a circle: p -> p. Give one of them a length."),
        ({"at": "1 mm", "on": "layshat"}, "p.on", 'no shaft is called "layshat". Nearest: layshaft.'),
    ],
)
def test_positions_that_are_nowhere(words: dict[str, str], place: str, sentence: str) -> None:
    assert only(lambda: model([fs.Pin("p", holds=["tilt"], **words)])) == (place, sentence)  # type: ignore[arg-type]


def test_a_circle_of_positions_is_printed() -> None:
    ring = [fs.Pin(name, at=f"{other} + 1 mm", holds=["tilt"]) for name, other in (("a", "b"), ("b", "c"), ("c", "a"))]
    assert told(lambda: model(ring)) == {
        "a.at": "positions go round in a circle: a -> b -> c -> a. Give one of them a length."
    }


def test_two_shafts_need_on_and_left_end() -> None:
    second = fs.Shaft("output", [fs.Segment("hub", length="50 mm", diameter="20 mm")], material="steel")
    sentences = told(lambda: model([second]))
    assert sentences["output.left_end"] == (
        'left_end is not written; layshaft alone stands at the origin. Write left_end = ["0 mm", "0 mm", "112 mm"].'
    )
    assert sentences["wheel.on"] == (
        'on is not written, and there are 2 shafts. Write on = "layshaft" or on = "output".'
    )


def test_anchors_are_on_the_same_shaft() -> None:
    second = fs.Shaft(
        "output", [fs.Segment("hub", length="50 mm", diameter="20 mm")], material="steel", left_end=["0 mm"] * 3
    )
    pins = [
        fs.Pin("p", on="output", at="q", holds=["radial"]),
        fs.Pin("q", on="layshaft", at="hub", holds=["radial"]),
        fs.Pin("r", on="output", at="layshaft.seat", holds=["radial"]),
        fs.Pin("s", on="output", at="t", holds=["radial"]),
        fs.Pin("t", on="layshaft", at="seat", holds=["radial"]),
    ]
    assert told(lambda: fs.Model("x", [shaft(), second, *pins])) == {
        "q.at": '"hub" is a segment of output, not of layshaft. Anchors are segments and parts of layshaft itself.',
        "r.at": '"layshaft.seat": layshaft is another shaft. Anchors are segments and parts of output itself.',
        "s.at": '"t": t is on layshaft, not on output. Choose an anchor on output.',
    }


def test_a_centre_of_gravity_may_lie_beyond_the_end() -> None:
    assert model().cg("disc") == pytest.approx((0.130, 0.0, 0.002), abs=1e-12)
    plain = model([fs.Coupling("c", at="stub", mass="1 kg")])
    assert plain.cg("c") == pytest.approx((0.105, 0.0, 0.0), abs=1e-12)
    assert only(lambda: plain.cg("wheel")) == ("wheel", "it has no mass, so no centre of gravity. Write mass in it.")


def test_positions_asked_of_a_model() -> None:
    made = model()
    assert made.position("seat", "layshaft") == made.position("seat")
    assert only(lambda: made.position("sead"))[1] == 'no segment or part on layshaft is called "sead". Nearest: seat.'
    assert only(lambda: made.position("62"))[1] == '"62" has no unit. Write "62 mm".'
    assert only(lambda: made.position("62 mm", "layshat"))[1] == 'no shaft is called "layshat". Nearest: layshaft.'
    assert told(lambda: made.position("sead"))  # asked twice, told twice


@given(st.floats(0.0, 0.12))
def test_any_length_on_the_shaft_is_found_again(x: float) -> None:
    assert model().position(f"{x!r} m") == pytest.approx(x, abs=1e-15)


def test_the_very_end_of_a_shaft_belongs_to_it() -> None:
    rows = [fs.Segment(None, length="0.1 mm", diameter="10 mm") for _ in range(3)]
    made = fs.Model("x", [fs.Shaft("s", rows, material="steel"), fs.Pin("p", at="0.3 mm", holds=["radial"])])
    assert made.places["p"].x <= made["s"].ends[-1]


def test_a_supports_width_does_not_come_from_a_part() -> None:
    made = fs.Model("x", [*parts(), bearing("b", at="wheel")])
    assert (made.places["b"].left, made.places["b"].right) == (0.04, 0.04)
