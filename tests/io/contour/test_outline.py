"""Arcs: which are fillets, and that the chords of the others lie on them."""

import math
from pathlib import Path

import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.io.contour.edges import Edge, arc_edges
from fe_shaft.io.contour.outline import CHORD, LEAST_TURN, corners, with_fillets
from tests.io.contour.drawings import QUARTER, arc, document, numbers, saved


@pytest.fixture(autouse=True)
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    monkeypatch.chdir(tmp_path)
    return tmp_path


def read(*lines: object) -> list[object]:
    return fs.read_contour(saved(document(*lines)))


def fillets(points: list[object]) -> list[object]:
    return [point for point in points if isinstance(point, dict)]


# ---- fillets


def test_fillets_on_both_sides_of_a_collar() -> None:
    points = read([(0, 15), (18, 15, QUARTER), (19, 16), (19, 20), (30, 20), (30, 17, QUARTER), (32, 15), (60, 15)])
    assert fillets(points) == [
        {"x": "19 mm", "diameter": "30 mm", "fillet": "1 mm"},
        {"x": "30 mm", "diameter": "30 mm", "fillet": "2 mm"},
    ]
    assert numbers(points) == [(0, 30), (19, 30, 1), (19, 40), (30, 40), (30, 30, 2), (60, 30)]
    shaft = fs.Shaft("s", contour=points, material="steel")  # type: ignore[arg-type]
    assert [row.fillet_left and row.fillet_left.si for row in shaft.segments] == [None, None, 0.002]
    assert [row.fillet_right and row.fillet_right.si for row in shaft.segments] == [0.001, None, None]


def test_a_fillet_as_high_as_its_shoulder() -> None:
    assert numbers(read([(0, 15), (17, 15, QUARTER), (19, 17), (60, 17)])) == [(0, 30), (19, 30, 2), (19, 34), (60, 34)]


def test_a_fillet_and_a_rounded_rim() -> None:
    points = read([(0, 15), (18, 15, QUARTER), (19, 16), (19, 18, -QUARTER), (20, 19), (60, 19)])
    assert fillets(points) == [{"x": "19 mm", "diameter": "30 mm", "fillet": "1 mm"}]
    assert numbers(points)[2] == (19, 36)
    assert len(points) > 6


def cut_off(turn: float, radius: float = 4.0) -> list[tuple[float, ...]]:
    """A shoulder whose fillet is cut off by the face after a turn [rad]."""
    x, y = radius * math.sin(turn), radius * (1 - math.cos(turn))
    return [(0, 15), (20, 15, math.tan(turn / 4)), (20 + x, 15 + y), (20 + x, 25), (60, 25)]


@pytest.mark.parametrize(("turn", "fillet"), [(89, True), (75, True), (61, True), (58, False), (30, False)])
def test_an_arc_that_the_face_cuts_off(turn: float, fillet: bool) -> None:
    found = fillets(read(cut_off(math.radians(turn))))
    assert bool(found) == fillet
    if found:
        x = 20 + 4 * math.sin(math.radians(turn))
        assert numbers(found)[0] == pytest.approx((x, 30, 4), abs=1e-6)


def test_an_arc_that_the_rim_cuts_off() -> None:
    turn = math.radians(70)
    x, y = 4 * math.sin(turn), 4 * (1 - math.cos(turn))
    points = read([(0, 15), (20, 15, math.tan(turn / 4)), (20 + x, 15 + y), (60, 15 + y)])
    assert numbers(points)[1] == pytest.approx((20 + x, 30, 4), abs=1e-6)


@pytest.mark.parametrize(
    "line",
    [
        [(0, 15), (18, 15, -QUARTER), (20, 13), (60, 13)],  # a rounded edge
        [(0, 15), (18, 16, QUARTER), (20, 18), (20, 25), (60, 25)],  # beside a cone
        [(0, 15), (20, 15), (20, 17, 0.4), (25, 17), (25, 25), (60, 25)],  # a groove, tangent to nothing
        [(0, 15), (20, 15, QUARTER), (24, 19)],  # a flare at the end of the shaft
    ],
)
def test_arcs_that_are_no_fillets(line: list[tuple[float, ...]]) -> None:
    assert not fillets(read(line))


def test_arcs_of_a_bore_are_no_fillets() -> None:
    outer = [(0, 30), (60, 30)]
    points = read(outer, [(0, 15), (18, 15, QUARTER), (19, 16), (19, 20), (60, 20)])
    assert not fillets(points)
    assert len(points) > 5


def test_the_least_turn_is_what_the_words_say() -> None:
    assert math.degrees(LEAST_TURN) == pytest.approx(60)


# ---- chords


@pytest.mark.parametrize("side", [1, -1])
@pytest.mark.parametrize("chord", [CHORD, CHORD / 8, 0.05])
def test_chords_lie_on_their_arc_and_enclose_its_area(side: int, chord: float) -> None:
    """The area below an arc of 100 degrees in closed form: rectangle below its chord, plus or less the segment.

    Chords between points of the arc itself would miss about 1 / n^2 of the segment.
    """
    turn, r = math.radians(100), 30.0
    half = r * math.sin(turn / 2)
    edge = Edge((0.0, 20.0), (2 * half, 20.0), "arc", (half, 20.0 - side * r * math.cos(turn / 2)), r, side)
    points = np.array([corner[:2] for corner in corners([edge], chord)])
    x, y = points.T
    assert (np.diff(x) > 0).all()
    assert (tuple(points[0]), tuple(points[-1])) == (edge.start, edge.end)
    middles = (points[1:] + points[:-1]) / 2
    off = np.hypot(*(np.concatenate([points, middles]) - edge.centre).T) - r
    assert np.abs(off).max() <= chord * 20.0 * 1.001
    area = 2 * half * 20.0 + side * r**2 * (turn - math.sin(turn)) / 2
    bulge = r**2 * (turn - math.sin(turn)) / 2
    assert abs(np.trapezoid(y, x) - area) < 0.04 / (len(x) - 1) ** 2 * bulge


def test_chords_are_finer_on_thin_shafts() -> None:
    def count(y: float) -> int:
        return len(corners([Edge((0.0, y + 5), (10.0, y + 5), "arc", (5.0, y + 5), 5.0, -1)]))

    assert count(1.0) > count(30.0) > 6


def test_arcs_are_cut_where_they_turn_back() -> None:
    full = list(arc_edges((0.0, 50.0), 10.0, math.radians(170), math.radians(370), "arc", 1e-6))
    assert [edge.side for edge in full] == [1, -1, 1]
    assert full[1].start == pytest.approx((-10, 50))
    assert full[1].end == pytest.approx((10, 50))
    hair = list(arc_edges((0.0, 50.0), 10.0, math.radians(180) - 1e-9, math.radians(360) + 1e-9, "arc", 1e-6))
    assert [edge.side for edge in hair] == [-1]


def test_a_fillet_keeps_its_neighbours() -> None:
    run = [
        Edge((0.0, 15.0), (18.0, 15.0), "a"),
        Edge((18.0, 15.0), (19.0, 16.0), "b", (18.0, 16.0), 1.0, -1),
        Edge((19.0, 16.0), (19.0, 20.0), "c"),
        Edge((19.0, 20.0), (30.0, 20.0), "d"),
    ]
    marked = with_fillets(run, 1e-6)
    assert [edge.fillet for edge in marked] == [False, True, False, False]
    assert [corner.fillet for corner in corners(marked)] == [0, 1, 0, 0, 0]


def test_a_drawn_groove_is_as_wide_and_deep_as_drawn() -> None:
    made = document([(0, 20), (20, 20)], [(30, 20), (60, 20)])
    arc(made, (25, 20), 5, 180, 360)
    points = np.array(numbers(fs.read_contour(saved(made))))
    assert points[:, 1].min() == pytest.approx(30, rel=2 * CHORD)
    volume = np.trapezoid(points[:, 1], points[:, 0])
    assert volume == pytest.approx(60 * 40 - math.pi * 25, rel=1e-5)
