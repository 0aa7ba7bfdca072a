"""The first view: from the front, slightly from above and from the left; everything inside its margins."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from fe_shaft.views.camera import fit, looking_at

SIZE = (800.0, 900.0)
MARGINS = (20.0, 70.0, 110.0, 120.0)


def test_level_shaft_is_seen_from_front_left_above():
    right, up, towards = looking_at(np.eye(3))
    assert towards[2] > 0.8
    assert -0.5 < towards[0] < -0.2
    assert 0.1 < towards[1] < 0.5
    assert right[0] > 0.85
    assert up[1] > 0.9
    np.testing.assert_allclose(np.cross(right, up), towards, atol=1e-15)


def test_upright_shaft_stands_upright():
    upright = np.array([[0, 0, 1], [1, 0, 0], [0, 1, 0]], dtype=float)  # x = +Y, y = +Z, z = +X
    right, up, _ = looking_at(upright)
    assert abs(up @ upright[:, 0]) > 0.9
    assert abs(right @ upright[:, 0]) < 0.2


def test_no_direction_of_the_shaft_leaves_the_eye_without_an_up():
    for axis in np.vstack([np.eye(3), -np.eye(3)]):
        for twelve in np.vstack([np.eye(3), -np.eye(3)]):
            if axis @ twelve == 0:
                frame = np.column_stack([axis, twelve, np.cross(axis, twelve)])
                axes = np.stack(looking_at(frame))
                np.testing.assert_allclose(axes @ axes.T, np.eye(3), atol=1e-12)


@settings(max_examples=50, deadline=None)
@given(st.lists(st.tuples(*[st.floats(-2, 2)] * 3), min_size=2, max_size=20))
def test_everything_is_inside_the_margins(points):
    cloud = np.array(points)
    if np.ptp(cloud, axis=0).max() < 1e-3:
        return
    at = fit(cloud, np.eye(3), SIZE, MARGINS).pixels(cloud, SIZE)
    slack = 1e-6
    assert at[:, 0].min() >= MARGINS[0] - slack
    assert at[:, 1].min() >= MARGINS[1] - slack
    assert at[:, 0].max() <= SIZE[0] - MARGINS[2] + slack
    assert at[:, 1].max() <= SIZE[1] - MARGINS[3] + slack


def test_the_drawing_fills_the_room_one_way():
    cloud = np.array([[0.0, 0, 0], [1.0, 0, 0]])
    at = fit(cloud, np.eye(3), SIZE, MARGINS).pixels(cloud, SIZE)
    assert np.ptp(at[:, 0]) == pytest.approx(SIZE[0] - MARGINS[0] - MARGINS[2])


def test_scale_is_true_across_the_line_of_sight():
    cloud = np.random.default_rng(0).uniform(-1, 1, (30, 3))
    eye = fit(cloud, np.eye(3), SIZE, MARGINS)
    step = 0.01 * eye.up + 0.02 * eye.right
    moved = eye.pixels(eye.focus + step, SIZE) - eye.pixels(eye.focus, SIZE)
    np.testing.assert_allclose(moved, eye.pixels_per_metre(SIZE) * np.array([0.02, 0.01]))
    np.testing.assert_allclose(eye.pixels(eye.focus, SIZE), (400, 450))
    np.testing.assert_allclose(eye.pixels(eye.focus + eye.towards, SIZE), (400, 450), atol=1e-9)
