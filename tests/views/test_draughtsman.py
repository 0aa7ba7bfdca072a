"""Everything is in its place and moves as the results say."""

from __future__ import annotations

from functools import cache

import numpy as np
import pytest

from fe_shaft.analysis.solve import solve
from fe_shaft.views.draughtsman import Draughtsman
from tests.views.demo import layshaft, many, pinned, solved


@cache
def drawing():
    return Draughtsman(solved()).draw()


@cache
def drawing_of_many():
    results = solve(many())
    return results, Draughtsman(results).draw()


def pieces(drawn, style):
    return [piece for piece in drawn.pieces if piece.style == style]


def test_pitch_cylinders_have_the_gears_true_size_and_place():
    """z m_n / cos(beta) over the facewidth, middle on the seat (ISO 21771)."""
    for piece, gear, middle in zip(pieces(drawing(), "glass"), solved().model.gears, (0.038, 0.093), strict=True):
        points = piece.shape.points
        assert points[:, 0].min() == pytest.approx(middle - 0.016)
        assert points[:, 0].max() == pytest.approx(middle + 0.016)
        radius = np.hypot(points[:, 1], points[:, 2])
        np.testing.assert_allclose(radius, gear.reference_diameter / 2, rtol=1e-12)


def test_pieces_move_rigidly_with_their_part():
    results = solved()
    for piece, gear in zip(pieces(drawing(), "glass"), results.model.gears, strict=True):
        for case in range(3):
            u = results[gear.name].u[case]
            arm = piece.shape.points - [results.model.places[gear.name].x, 0, 0]
            np.testing.assert_allclose(piece.moved(case), u[:3] + np.cross(u[3:], arm), atol=1e-18)


def test_inner_ring_follows_the_shaft_and_outer_ring_stays():
    results = solved()
    inner, outer = pieces(drawing(), "ring")[:2]
    assert np.linalg.norm(inner.moved(0), axis=1).mean() == pytest.approx(
        np.linalg.norm(results["lay_left"].u[0, :3]), rel=0.1
    )
    assert not outer.moved(0).any()
    radii = [np.hypot(piece.shape.points[:, 1], piece.shape.points[:, 2]) for piece in (inner, outer)]
    assert radii[0].min() == pytest.approx(0.015)
    assert radii[0].max() < radii[1].min()


def test_rings_are_cut_open_towards_the_eye():
    for piece in pieces(drawing(), "ring"):
        angle = np.rad2deg(np.arctan2(piece.shape.points[:, 2], piece.shape.points[:, 1])) % 360
        assert not np.any((angle > 40) & (angle < 140))


def test_outer_ring_moves_with_a_seat_that_gives():
    results, drawn = drawing_of_many()
    outer = pieces(drawn, "ring")[1]
    u = results["fan_right"].seat[0]
    assert np.linalg.norm(u[:3]) > 0
    arm = outer.shape.points - [0.225, 0, 0]
    np.testing.assert_allclose(outer.moved(0), u[:3] + np.cross(u[3:], arm), atol=1e-18)


def test_pins_are_drawn_in_place_of_bearings():
    drawn = Draughtsman(pinned()).draw()
    assert not pieces(drawn, "ring")
    cones = pieces(drawn, "pin")
    assert len(cones) == 4
    tips = sorted(tuple(np.round(cone.shape.points[0], 9)) for cone in cones)
    assert tips == [(0.0095, -0.015, 0.0), (0.0095, 0.015, 0.0), (0.1365, -0.015, 0.0), (0.1365, 0.015, 0.0)]


def test_skin_moves_by_the_results():
    skin = drawing().skins[0]
    movement, turned = skin.case(1)
    line = solved().lines["layshaft"]
    at_start = np.flatnonzero(skin.body.points[:, 0] == 0.0)
    u = line.u[1, 0]
    expected = u[:3] + np.cross(u[3:], skin.body.points[at_start])
    np.testing.assert_allclose(movement[at_start], expected, atol=1e-18)
    np.testing.assert_allclose(turned[at_start], np.cross(u[3:], skin.body.normals[at_start]), atol=1e-18)


def test_arrows_are_the_loads_and_the_reactions_and_balance():
    results = solved()
    weight = layshaft().gravity_vector
    for case in range(3):
        total = sum(arrow.force[case] for arrow in drawing().arrows)
        density = 7850.0
        volume = sum(np.pi / 4 * d**2 * h for h, d in zip(*_cylinders(), strict=True))
        shaft = weight * density * volume
        assert np.linalg.norm(total + shaft) < 0.02 * np.linalg.norm(shaft) + 1e-9 * 1e4
        supports = [arrow for arrow in drawing().arrows if arrow.support]
        for arrow in supports:
            assert np.linalg.norm(arrow.force[case]) == pytest.approx(results[arrow.name].force[case], rel=1e-12)


def _cylinders():
    segments = layshaft().segment_arrays["layshaft"]
    return segments.length, segments.diameter_left


def test_tooth_force_attacks_at_the_pitch_point_towards_the_mate():
    arrow = next(arrow for arrow in drawing().arrows if arrow.name == "wheel")
    radius = solved().model["wheel"].reference_diameter / 2
    np.testing.assert_allclose(arrow.point, [0.038, 0.0, -radius], atol=1e-15)  # mate at 9 o'clock
    u = solved()["wheel"].u[0]
    np.testing.assert_allclose(arrow.movement(0), u[:3] + np.cross(u[3:], [0, 0, -radius]), atol=1e-18)


def test_ball_of_a_mass_is_at_its_centre_of_gravity():
    steel = pieces(drawing(), "steel")
    middle = (steel[0].shape.points.min(axis=0) + steel[0].shape.points.max(axis=0)) / 2
    np.testing.assert_allclose(middle, [0.191, 0, 0], atol=1e-12)


def test_clock_turns_as_the_case_says():
    (clock,) = drawing().clocks
    assert clock.senses == (1, 1, -1)
    assert clock.x < 0
    assert clock.hours[0, 1] > 0.0
    assert clock.hours[1, 2] > 0.0


def test_every_kind_of_part_is_drawn_and_can_be_named():
    results, drawn = drawing_of_many()
    placed = {part.name for part in results.model.parts_on_shafts}
    assert {mark.name for mark in drawn.marks} == placed
    assert len(drawn.skins) == len(drawn.clocks) == 2
    senses = {name: clock.senses for name, clock in zip(results.lines, drawn.clocks, strict=True)}
    assert senses == {"fan": (-1,), "tube": (0,)}


def test_bevel_gear_is_a_cone_with_its_tip_on_the_apex_side():
    results, drawn = drawing_of_many()
    cone = pieces(drawn, "glass")[0].shape.points
    radius = np.hypot(cone[:, 1], cone[:, 2])
    left, right = cone[:, 0] < 0.14, cone[:, 0] > 0.14
    assert radius[left].max() < radius[right].min()
    lean = (radius[right].mean() - radius[left].mean()) / (cone[right, 0].mean() - cone[left, 0].mean())
    assert np.rad2deg(np.arctan(lean)) == pytest.approx(63.4)
    assert (radius[right].mean() + radius[left].mean()) == pytest.approx(results.model["crown"].reference_diameter)


def test_upright_shaft_stands_in_the_model():
    results, drawn = drawing_of_many()
    skin = drawn.skins[list(results.lines).index("tube")]
    points = skin.frame.point(skin.body.points)
    np.testing.assert_allclose(points.min(axis=0), [-0.24, 0, -0.04], atol=1e-12)
    np.testing.assert_allclose(points.max(axis=0), [-0.16, 0.46, 0.04], atol=1e-12)
