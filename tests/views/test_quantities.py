"""Colours show true values in their unit, and the exaggeration starts where the movement is plain to see."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from fe_shaft.views.quantities import (
    COLOURINGS,
    FACTORS,
    common_range,
    factor_text,
    first_factor,
    longest_125,
    nearest_125,
    round_values,
)
from tests.views.demo import solved


def test_values_at_parts_are_those_of_the_results():
    line = solved().lines["layshaft"]
    place = int(np.argmin(np.abs(line.x - 0.038)))
    wheel = solved()["wheel"]
    u, force = line.u[:, place], line.force_left[:, place]
    np.testing.assert_allclose(COLOURINGS["deflection"].values(u, force), wheel.deflection_um, rtol=1e-12)
    np.testing.assert_allclose(COLOURINGS["slope"].values(u, force), wheel.slope_mrad, rtol=1e-12)
    np.testing.assert_allclose(COLOURINGS["axial movement"].values(u, force), wheel.axial_um, rtol=1e-12)
    np.testing.assert_allclose(COLOURINGS["twist"].values(u, force), wheel.twist_mrad, rtol=1e-12)


def test_section_forces_by_name():
    force = np.array([1.0, 3.0, 4.0, -7.0, 6.0, 8.0])
    still = np.zeros(6)
    found = {name: float(each.values(still, force)) for name, each in COLOURINGS.items() if not each.of_movement}
    assert found == {"axial force": 1.0, "shear force": 5.0, "torque": -7.0, "bending moment": 10.0}


def test_one_range_for_both_halves():
    assert common_range([np.array([1.0, 4.0]), np.array([2.0, 40.0])]) == (0.0, 40.0)
    assert common_range([np.array([-3.0, 4.0])]) == (-3.0, 4.0)
    assert common_range([np.array([-3.0, -1.0])]) == (-3.0, 0.0)
    low, high = common_range([np.zeros(3)])
    assert low == 0.0
    assert high > low


def test_first_exaggeration_draws_a_fifteenth_of_the_length():
    """0.0397 mm on 191 mm: a fifteenth is 320 times; of 200 and 500 the nearer by ratio is 500."""
    assert first_factor(39.7e-6, 0.191) == 500.0
    assert first_factor(50e-6, 0.191) == 200.0
    assert first_factor(0.0, 0.2) == 1.0
    assert first_factor(1e-12, 0.2) == FACTORS[1]
    assert first_factor(1.0, 0.2) == FACTORS[0]


@given(st.floats(1e-9, 1e9))
def test_rounding_to_one_two_five(value):
    near, below = nearest_125(value), longest_125(value)
    for step in (near, below):
        assert float(f"{step:.6e}"[0]) in (1, 2, 5)
        assert f"{step:.3e}"[1:5] == ".000"
    assert 0.6 < near / value < 1.6
    assert below <= value * (1 + 1e-9)
    assert below > 0.39 * value


@pytest.mark.parametrize(
    ("factor", "text"),
    [(1, "1"), (12.5, "12.5"), (200, "200"), (281.8383, "282"), (1234.5, "1230"), (5000, "5000"), (99.97, "100")],
)
def test_factor_is_written_with_three_digits(factor, text):
    assert factor_text(factor) == text


@given(st.floats(-1e6, 1e6), st.floats(1e-6, 1e6))
def test_round_values_lie_in_the_range_and_are_few(low, width):
    if width < 1e-9 * abs(low):
        return
    high = low + width
    values = round_values(low, high)
    assert 1 <= len(values) <= 6
    slack = 1e-6 * width + 1e-11 * abs(low)
    assert all(low - slack <= value <= high + slack for value in values)
    assert values == sorted(set(values))
