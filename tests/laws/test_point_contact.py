"""Hertz's point contact: the axis ratio against mpmath in 40 digits, limits, scaling, and contacts in series."""

from __future__ import annotations

import mpmath as mp
import numpy as np
import pytest

from fe_shaft.errors import SolutionError
from fe_shaft.laws.point_contact import (
    axis_ratio,
    contact,
    effective_modulus,
    in_series,
    inner_contact,
    outer_contact,
)


def curvature_ratio(k: float) -> float:
    """(1 + F) / (1 - F) of F = ((k^2 + 1) E - 2 K) / ((k^2 - 1) E), as tables write it."""
    with mp.workdps(40):
        m = 1 - 1 / mp.mpf(k) ** 2
        first, second = mp.ellipk(m), mp.ellipe(m)
        f = ((k**2 + 1) * second - 2 * first) / ((k**2 - 1) * second)
        return float((1 + f) / (1 - f))


@pytest.mark.parametrize("k", [1.0001, 1.1, 2.0, 7.3, 30.0, 1e3, 1e6])
def test_axis_ratio_is_the_root(k: float) -> None:
    ratio = curvature_ratio(k)
    assert axis_ratio(ratio) == pytest.approx(k, rel=2e-14)
    assert axis_ratio(1 / ratio) == pytest.approx(1 / k, rel=2e-14)


def test_a_sphere_on_a_plane_or_in_a_sphere() -> None:
    """K = E = pi / 2: d = (9 Q^2 / (16 E*^2 R))^(1/3), E* = E' / 2 (K. L. Johnson, Contact Mechanics, from memory)."""
    modulus, radius = 2e11, 0.01
    ball = contact(modulus, 2 / radius / 2, 2 / radius / 2)  # curvatures of the ball 1 / R in each direction
    assert ball.ratio == pytest.approx(1.0, rel=1e-15)
    assert ball.stiffness == pytest.approx(4 / 3 * (modulus / 2) * np.sqrt(radius), rel=1e-14)
    a, b = ball.axes(1000.0)
    assert a == pytest.approx(np.cbrt(3 * 1000 * radius / (4 * modulus / 2)), rel=1e-14)
    assert b == pytest.approx(a, rel=1e-14)


def test_rounding_cannot_lose_a_circle() -> None:
    assert axis_ratio([1.0, 1 + 2e-16, 1 - 2e-16]) == pytest.approx(np.ones(3), abs=1e-15)


def test_any_shape_at_once() -> None:
    ratio = np.exp(np.random.default_rng(1).uniform(-9, 9, (7, 11)))
    single = [[float(axis_ratio(x)) for x in row] for row in ratio]
    np.testing.assert_allclose(axis_ratio(ratio), single, rtol=1e-14)


@pytest.mark.parametrize("conformity", [0.5, 0.49])
def test_a_groove_as_narrow_as_the_ball_is_refused(conformity: float) -> None:
    with np.errstate(divide="ignore"), pytest.raises(SolutionError, match=r"conformity above 0\.5"):
        inner_contact(2e11, 0.0127, conformity, 0.2)


def test_pressure_and_load_undo_each_other() -> None:
    ball = inner_contact(2.27e11, 0.0127, 0.52, 0.195)
    a, b = ball.axes(500.0)
    assert ball.pressure(500.0) == pytest.approx(1.5 * 500 / (np.pi * a * b), rel=1e-14)
    assert ball.load(ball.pressure(500.0)) == pytest.approx(500.0, rel=1e-13)


def test_similar_bearings() -> None:
    """Twice the size under four times the load: the same pressure and angles, twice the movement."""
    small, large = (outer_contact(2.27e11, d, 0.53, 0.2) for d in (0.01, 0.02))
    assert large.pressure(400.0) == pytest.approx(small.pressure(100.0), rel=1e-13)
    assert large.stiffness == pytest.approx(small.stiffness * np.sqrt(2), rel=1e-13)


def test_series_and_moduli() -> None:
    both = in_series(8.0, 27.0)
    assert pytest.approx((10 / both) ** (2 / 3), rel=1e-14) == (10 / 8.0) ** (2 / 3) + (10 / 27.0) ** (2 / 3)
    assert effective_modulus(2e11, 0.3, 2e11, 0.3) == pytest.approx(2e11 / 0.91, rel=1e-15)
    hybrid = effective_modulus(2e11, 0.3, 3e11, 0.26)
    assert 2 / hybrid == pytest.approx(0.91 / 2e11 + (1 - 0.26**2) / 3e11, rel=1e-14)
