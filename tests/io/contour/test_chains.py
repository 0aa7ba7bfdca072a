"""Lines to outer line and bore: what belongs together, where it may end, and what is refused."""

import math
import re
from pathlib import Path

import pytest

import fe_shaft as fs
from tests.io.contour.drawings import arc, document, line, numbers, polyline, saved


@pytest.fixture(autouse=True)
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    monkeypatch.chdir(tmp_path)
    return tmp_path


def read(*lines: object) -> list[tuple[float, ...]]:
    return numbers(fs.read_contour(saved(document(*lines))))


def refused(*lines: object) -> str:
    with pytest.raises(fs.ModelError) as caught:
        fs.read_contour(saved(document(*lines)))
    return re.sub(r"handle \w+", "handle H", str(caught.value))


POLYLINE = "LWPOLYLINE (handle H, layer contour)"


def test_a_contour_begins_anywhere() -> None:
    assert read([(-20.5, 15), (39.5, 15)]) == [(0, 30), (60, 30)]


def test_a_closed_profile_on_the_axis() -> None:
    assert read([(10, 0), (10, 15), (40, 15), (40, 20), (70, 20), (70, 0), (10, 0)]) == [
        (0, 30), (30, 30), (30, 40), (60, 40),
    ]  # fmt: skip


def test_a_closed_profile_of_a_hollow_shaft() -> None:
    hollow = [(0, 6), (0, 14), (1, 15), (40, 15), (40, 20), (60, 20), (60, 5), (30, 5), (30, 6), (0, 6)]
    wanted = [(0, 28, 12), (1, 30, 12), (30, 30, 12), (30, 30, 10), (40, 30, 10), (40, 40, 10), (60, 40, 10)]
    assert read(hollow) == wanted
    assert read(hollow[::-1]) == wanted


def test_outer_line_and_bore_line() -> None:
    outer, bore = [(0, 15), (40, 15), (40, 20), (60, 20)], [(60, 5), (30, 5), (30, 6), (0, 6)]
    wanted = [(0, 30, 12), (30, 30, 12), (30, 30, 10), (40, 30, 10), (40, 40, 10), (60, 40, 10)]
    assert read(outer, bore) == wanted
    assert read(bore, outer) == wanted


def test_bores_from_both_ends_with_the_cone_of_their_drill() -> None:
    outer = [(0, 0), (0, 15), (60, 15), (60, 0)]
    assert read(outer, [(0, 5), (20, 5), (23, 0)], [(60, 4), (45, 4), (45, 0)]) == [
        (0, 30, 10), (20, 30, 10), (23, 30, 0), (45, 30, 0), (45, 30, 8), (60, 30, 8),
    ]  # fmt: skip


def test_an_outline_whose_bore_ends_inside() -> None:
    one = [(60, 0), (60, 15), (0, 15), (0, 5), (20, 5), (20, 0)]
    assert read(one) == [(0, 30, 10), (20, 30, 10), (20, 30, 0), (60, 30, 0)]


def test_places_a_hair_apart_are_one() -> None:
    assert read([(0, 15), (19 + 3e-7, 15)], [(19, 15 + 2e-7), (19 - 2e-7, 19), (60, 19)]) == [
        (0, 30), (19, 30), (19, 38), (60, 38),
    ]  # fmt: skip


def test_a_piece_of_a_line_on_the_axis_is_left_out() -> None:
    assert read([(0, 0), (0, 15), (60, 15), (60, 0), (0, 0)]) == [(0, 30), (60, 30)]


def test_gaps_say_where_and_how_wide() -> None:
    assert refused([(0, 15), (19, 15)], [(19.3, 15), (60, 15)]) == (
        f"shaft.dxf: the contour has a gap of 0.3 mm between x = 19, y = 15 mm ({POLYLINE}) and x = 19.3, y = 15 mm. "
        "Close it."
    )


def test_a_line_that_ends_in_the_open() -> None:
    assert refused([(0, 5), (0, 15), (60, 15), (60, 5), (30, 5)]) == (
        f"shaft.dxf: the contour has a gap of 30 mm between x = 30, y = 5 mm ({POLYLINE}) and x = 0, y = 5 mm. "
        "Close it."
    )
    assert refused([(0, 0), (0, 15), (60, 15), (60, 5), (30, 5)], [(0, 0), (1, 0)]) == (
        f"shaft.dxf: the contour has a gap of 30.41 mm between x = 30, y = 5 mm ({POLYLINE}) and x = 0, y = 0 mm. "
        "Close it."
    )


def test_overhangs() -> None:
    """An undercut into a face, and a bulge beyond a half turn."""
    two = "two radii at one x. Draw undercuts and overhangs so that each x has one radius, or leave them out."
    assert refused([(0, 15), (20, 15), (21, 14.5), (20, 19), (60, 19)]) == (
        f"shaft.dxf: the contour turns back at x = 21, y = 14.5 mm ({POLYLINE}): {two}"
    )
    made = document([(0, 15), (20, 15)], [(26, 15), (60, 15)])
    half = math.degrees(math.atan2(1, 3))
    arc(made, (23, 14), math.sqrt(10), 180 - half, 360 + half)
    with pytest.raises(fs.ModelError, match=r"turns back at x = 20, y = 15 mm \(ARC "):
        fs.read_contour(saved(made))


def test_below_the_axis() -> None:
    assert refused([(0, 15), (20, 15), (25, -2), (60, 15)]) == (
        f"shaft.dxf: {POLYLINE} goes below the axis, at x = 25, y = -2 mm. Draw the half above y = 0 alone."
    )
    made = document([(0, 3), (20, 3)], [(28, 3), (60, 3)])
    arc(made, (24, 3), 4, 180, 360)
    with pytest.raises(fs.ModelError, match=r"ARC .* goes below the axis, at x = 24, y = -1 mm"):
        fs.read_contour(saved(made))


def test_a_shaft_that_comes_to_a_point() -> None:
    assert refused([(0, 15), (40, 15), (60, 0)]) == (
        f"shaft.dxf: {POLYLINE} comes down to the axis at x = 60, y = 0 mm, where the shaft has no section. "
        "End it before."
    )


def test_lines_that_branch_or_are_drawn_twice() -> None:
    twice = [(0, 15), (20, 15), (20, 19), (60, 19)]
    told = refused(twice, [(20, 15), (60, 15)])
    assert told == (
        f"shaft.dxf: more than two lines meet at x = 20, y = 15 mm: {POLYLINE} and {POLYLINE}. Leave one out, or the "
        "copy of one that is drawn twice."
    )
    assert "more than two lines meet" in refused(twice, twice[1:])


def test_lines_inside_each_other() -> None:
    made = document([(0, 15), (60, 15)])
    for y in (10, 5):
        line(made, (0, y), (60, y))
    with pytest.raises(fs.ModelError, match="two lines stand inside the outer one at x = 0, y = "):
        fs.read_contour(saved(made))


def test_no_line_from_end_to_end() -> None:
    made = document([(0, 0), (0, 15), (20, 15), (20, 0)])
    polyline(made, [(30, 0), (30, 15), (60, 15), (60, 0)])
    with pytest.raises(fs.ModelError) as caught:
        fs.read_contour(saved(made))
    assert str(caught.value) == (
        "shaft.dxf: no line runs from end to end of the shaft, from x = 0 to 60 mm. Draw the outer line without "
        "a break."
    )


def test_nothing_but_the_axis() -> None:
    made = document()
    line(made, (0, 0), (60, 0))
    with pytest.raises(fs.ModelError, match=r"nothing is drawn beside the axis\. Draw the half contour above y = 0\."):
        fs.read_contour(saved(made), layer="contour")
