"""Arrows: as long as their force is large, filled for loads and hollow for supports, with the true number."""

from __future__ import annotations

import numpy as np
import pytest

from fe_shaft.views.arrows import LONGEST, SHORTEST, draw_arrows, force_text, reach
from fe_shaft.views.camera import fit
from fe_shaft.views.drawing import Arrow, Drawing

X = np.array([1.0, 0.0, 0.0])
EYE = fit(np.array([[0.0, 0, 0], [1.0, 0.3, 0]]), np.eye(3), (800, 900), (0, 0, 0, 0))


def drawn(*arrows: Arrow, factor=1.0, largest=1000.0):
    return draw_arrows(Drawing((), (), arrows, (), (), 1.0), 0, factor, EYE, largest, 0.01)


def arrow(force=(0, 0, 0), couple=(0, 0, 0), *, support=False, moved=(0, 0, 0), clear=0.0):
    def movement(case):
        return np.array(moved, dtype=float)

    point = np.array([0.5, 0.0, 0.0])
    return Arrow("it", support, point, movement, np.array([force], float), np.array([couple], float), clear, 0.05, X)


def test_length_is_in_proportion_but_small_forces_stay_visible():
    assert reach(np.array([0, 1000.0, 0]), 2.0, 1000.0) == pytest.approx(LONGEST * 2.0)
    assert reach(np.array([0, 500.0, 0]), 2.0, 1000.0) == pytest.approx(LONGEST)
    assert reach(np.array([0, 1.0, 0]), 2.0, 1000.0) == pytest.approx(SHORTEST * 2.0)
    assert reach(np.zeros(3), 2.0, 1000.0) == 0.0
    assert reach(np.zeros(3), 2.0, 0.0) == 0.0


def test_tip_stands_on_the_moved_point_clear_of_the_surface():
    result = drawn(arrow((0, -1000.0, 0), moved=(0, 1e-3, 0), clear=0.02), factor=100.0)
    path = result.paths[0]
    np.testing.assert_allclose(path[-1], [0.5, 0.1 + 0.02, 0.0])
    np.testing.assert_allclose(path[0], [0.5, 0.12 + LONGEST, 0.0])
    assert result.tails[0].text == "1 kN"


def test_loads_are_filled_and_supports_hollow_on_white():
    result = drawn(arrow((0, 800.0, 0)), arrow((0, -800.0, 0), support=True))
    assert {style: len(shapes) for style, shapes in result.shapes.items()} == {
        "filled": 1, "hollow": 1, "paper": 1, "bent": 0,
    }  # fmt: skip
    assert len(result.shapes["filled"][0].triangles) > 0
    assert len(result.shapes["hollow"][0].triangles) == 0
    assert len(result.tails) == 2


def test_torques_are_bent_and_nothing_is_drawn_of_nothing():
    result = drawn(arrow(couple=(133.0, 0, 0)), arrow())
    assert len(result.shapes["bent"]) == 1
    assert [tail.text for tail in result.tails] == ["133 N m"]
    across = drawn(arrow(couple=(0, 133.0, 0)))
    assert len(across.shapes["filled"]) == 1
    along_the_eye = drawn(arrow(couple=tuple(EYE.towards)))
    assert len(along_the_eye.shapes["filled"]) == 1


@pytest.mark.parametrize(("size", "text"), [(40.2, "40.2 N"), (999.4, "999 N"), (4980.0, "4.98 kN"), (0.5, "0.5 N")])
def test_force_is_written_in_its_unit(size, text):
    assert force_text(size) == text
