"""Shapes: where their points lie and which way their faces and arrows look."""

from __future__ import annotations

import numpy as np
import pytest

from fe_shaft.views import shapes, symbols


def solid_volume(shape):
    """Volume by the divergence theorem; right only when every face looks outward."""
    a, b, c = (shape.points[shape.triangles[:, k]] for k in range(3))
    return float(np.einsum("ij,ij->", a, np.cross(b, c)) / 6)


def faces_agree_with_normals(shape) -> bool:
    a, b, c = (shape.points[shape.triangles[:, k]] for k in range(3))
    face = np.cross(b - a, c - a)
    area = np.linalg.norm(face, axis=1)
    real = area > 1e-12 * area.max()
    mean = shape.normals[shape.triangles].mean(axis=1)
    return bool(np.all(np.einsum("ij,ij->i", face[real], mean[real]) > 0))


@pytest.mark.parametrize(
    ("shape", "volume"),
    [
        (shapes.turned([(0, 2), (3, 2), (3, 1), (0, 1)]), np.pi * 3 * 3),
        (shapes.cut_ring(-1, 1, 1, 2, start=0.3, sweep=1.5 * np.pi), 0.75 * np.pi * 3 * 2),
        (shapes.ball((1, 2, 3), 2, around=96), 4 / 3 * np.pi * 8),
        (shapes.cone((0, 0, 1), (1, 0, 1), 0.5, around=96), np.pi * 0.25 / 3),
        (shapes.cone((0, 3, 1), (0, 1, 1), 0.5, around=96), np.pi * 0.25 * 2 / 3),
    ],
    ids=["ring", "cut ring", "ball", "cone along", "cone from above"],
)
def test_solids_are_closed_and_look_outward(shape, volume):
    """Volumes in closed form (elementary geometry); a round of 72 or 96 sides lacks less than 1 %."""
    assert solid_volume(shape) == pytest.approx(volume, rel=0.01)
    assert faces_agree_with_normals(shape)


def test_wall_and_rod_look_outward():
    assert faces_agree_with_normals(shapes.wall(0, 1, 2, 3))
    assert faces_agree_with_normals(shapes.rod((0, 0, 0), (1, 2, 3), 0.1))


def test_right_hand_tooth_runs_away_clockwise():
    """ISO 1122-1: seen along the axis, a right-hand tooth runs away clockwise; from the left end that is 12 to 3."""
    right = shapes.tooth_lines(0, 1, 1, 1, 0.2, middle=0.0, lines=1).points
    assert right[-1, 2] > right[0, 2]
    left = shapes.tooth_lines(0, 1, 1, 1, -0.2, middle=0.0, lines=1).points
    assert left[-1, 2] < left[0, 2]


def test_tooth_line_makes_the_helix_angle_with_the_axis():
    beta = np.deg2rad(15)
    line = shapes.tooth_lines(0.01, 0.042, 0.088, 0.088, beta, middle=1.0, lines=1).points
    angle = np.arctan2(line[:, 2], line[:, 1])
    run = 0.088 * (angle[-1] - angle[0])
    assert np.arctan2(run, line[-1, 0] - line[0, 0]) == pytest.approx(beta, rel=1e-9)
    np.testing.assert_allclose(np.hypot(line[:, 1], line[:, 2]), 0.088)
    assert angle.mean() == pytest.approx(1.0)


def test_three_tooth_lines():
    three = shapes.tooth_lines(0, 1, 1, 1, 0.2, middle=0.0)
    assert len(three.lines) == 3 * 12


@pytest.mark.parametrize("eye", [(0, 0, 1), (1, 2, 3), (1, 0, 0)])
@pytest.mark.parametrize("filled", [True, False])
def test_arrow_reaches_from_tail_to_tip_and_turns_its_face_to_the_eye(eye, filled):
    shape = symbols.arrow((1, 1, 1), (4, 1, 1), eye, 0.1, filled=filled)
    along = shape.points[:, 0]
    assert along.min() == 1
    assert along.max() == 4
    if eye != (1, 0, 0):
        assert np.ptp((shape.points - 1) @ np.asarray(eye) - (shape.points[:, 0] - 1) * eye[0]) == pytest.approx(0)
    assert len(shape.triangles) == (3 if filled else 0)
    assert len(shape.lines) == (0 if filled else 7)


def test_hollow_and_filled_arrow_have_one_contour():
    filled = symbols.arrow((0, 0, 0), (0, 1, 0), (0, 0, 1), 0.1, filled=True)
    hollow = symbols.arrow((0, 0, 0), (0, 1, 0), (0, 0, 1), 0.1, filled=False)
    np.testing.assert_array_equal(filled.points, hollow.points)


@pytest.mark.parametrize("axis", [(1, 0, 0), (-1, 0, 0), (0, 2, 0), (1, 1, 1)])
@pytest.mark.parametrize("ribbon", [True, False])
def test_bent_arrow_turns_by_the_right_hand(axis, ribbon):
    """Its head is ahead of its tail in the right-hand sense about the axis."""
    shape = symbols.bent_arrow((0, 0, 0), axis, 1.0, 0.05, (0.1, 0.2, 1), ribbon=ribbon)
    unit = np.asarray(axis) / np.linalg.norm(axis)
    last, tip = shape.points[-4], shape.points[-2]
    assert np.cross(last, tip) @ unit > 0
    assert tip @ (0.1, 0.2, 1) > 0 or abs(unit[2]) > 0.9
    start = shape.points[0]
    assert np.cross(start, shape.points[2]) @ unit > 0
    aside = shape.points @ unit
    assert np.ptp(aside) == pytest.approx(0.15 if ribbon else 0.0, abs=1e-12)


def test_turning_arrow_follows_the_clock():
    clockwise = symbols.turning_arrow(0.0, 1.0, +1.0).points[-1]
    back = symbols.turning_arrow(0.0, 1.0, -1.0).points[-1]
    assert clockwise[2] > 0.5
    assert back[2] < -0.5
    assert clockwise[1] > 0
    assert back[1] > 0


def test_clock_has_twelve_up_and_three_in_front():
    ring, marks = symbols.clock(-0.1, 1.0)
    np.testing.assert_allclose(marks[:, 0], -0.1)
    np.testing.assert_allclose(marks[:, 1:] / 1.22, [[1, 0], [0, 1], [-1, 0], [0, -1]], atol=1e-12)
    np.testing.assert_allclose(ring.points[:, 0], -0.1)


def test_outline_has_both_circles_at_a_step_and_its_contour_from_end_to_end():
    x = np.array([0.0, 1.0, 2.0])
    left, right = np.array([2.0, 2.0, 4.0]), np.array([2.0, 4.0, 4.0])
    shape = shapes.outline(x, left, right, [0.0])
    radii = np.hypot(shape.points[:, 1], shape.points[:, 2])
    at_step = np.unique(np.round(radii[shape.points[:, 0] == 1.0], 12))
    np.testing.assert_allclose(at_step, [1.0, 2.0])
    contour = shape.points[-6:]
    np.testing.assert_allclose(contour[:, 0], [0, 0, 1, 1, 2, 2])
    np.testing.assert_allclose(contour[:, 1], [0, 1, 1, 2, 2, 0])


def test_outline_of_a_long_shaft_keeps_the_widest_steps():
    n = 3000
    random = np.random.default_rng(3)
    d = random.uniform(1, 2, n)
    d[1234] = 9.0
    x = np.arange(n + 1.0)
    left, right = np.r_[d[0], d], np.r_[d, d[-1]]
    shape = shapes.outline(x, left, right, [])
    assert len(shape.points) <= 2 * 60 * 72
    assert np.max(np.hypot(shape.points[:, 1], shape.points[:, 2])) == pytest.approx(4.5)


def test_merge_keeps_every_face_and_line_on_its_own_points():
    one, two = shapes.circle(0, 1, around=8), shapes.wall(0, 1, 1, 1, around=8)
    both = one + two
    np.testing.assert_array_equal(both.points[both.triangles], two.points[two.triangles])
    np.testing.assert_array_equal(both.points[both.lines], one.points[one.lines])
    assert len(shapes.merge([]).points) == 0
