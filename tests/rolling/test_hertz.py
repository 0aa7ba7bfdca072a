"""Hertz's contact: shapes, limits, and the same integrals in 30 digits by mpmath."""

from __future__ import annotations

import math

import mpmath
import numpy as np
import pytest

from fe_shaft.rolling.hertz import (
    Curvature,
    axis_ratio,
    inner_curvature,
    line_load_at_pressure,
    load_at_pressure,
    outer_curvature,
)


@pytest.mark.parametrize("k", [1.0, 1.001, 1.5, 3.0, 9.3, 40.0, 300.0])
def test_axis_ratio_undoes_the_ratio_of_curvatures(k: float) -> None:
    """along / across = ((E - m1 K) / m) / (m1 (K - E) / m), written out with mpmath's integrals."""
    with mpmath.workdps(30):
        m1 = mpmath.mpf(1) / mpmath.mpf(k) ** 2
        big, small = mpmath.ellipk(1 - m1), mpmath.ellipe(1 - m1)
        ratio = 1.0 if k == 1 else float((small - m1 * big) / (m1 * (big - small)))
    assert float(axis_ratio(Curvature(np.asarray(ratio), np.asarray(1.0)))) == pytest.approx(k, rel=1e-12)


def test_a_ball_on_a_plane_is_the_closed_form() -> None:
    """p^3 = 6 Q E*^2 / (pi^3 R^2), 1 / E* = 2 (1 - nu^2) / E (Johnson, Contact Mechanics, 1985; from memory)."""
    radius, pressure = 5e-3, 3e9
    modulus = 207e9 / 0.91 / 2
    want = pressure**3 * math.pi**3 * radius**2 / (6 * modulus**2)
    plane = Curvature(np.asarray(1 / radius), np.asarray(1 / radius))
    assert float(load_at_pressure(plane, pressure)) == pytest.approx(want, rel=1e-12)


def test_a_cylinder_on_a_plane_is_the_closed_form() -> None:
    """p^2 = q E* / (pi R) (Johnson, Contact Mechanics, 1985; from memory)."""
    radius, pressure = 5e-3, 3e9
    want = pressure**2 * math.pi * radius / (207e9 / 0.91 / 2)
    assert float(line_load_at_pressure(1 / radius, pressure)) == pytest.approx(want, rel=1e-12)


def test_many_at_once_are_each_alone() -> None:
    g, f = np.linspace(0, 0.4, 9)[:, None], np.array([0.505, 0.52, 0.53])
    together = load_at_pressure(inner_curvature(10e-3, g, f), 4.2e9)
    assert together.shape == (9, 3)
    alone = [[float(load_at_pressure(inner_curvature(10e-3, a, b), 4.2e9)) for b in f] for a in g[:, 0]]
    assert together == pytest.approx(np.array(alone), rel=1e-12)


def test_the_outer_contact_is_the_roomier_one() -> None:
    """Its groove bends the other way round the axis, so it bears more at the same pressure."""
    inner = load_at_pressure(inner_curvature(10e-3, 0.2, 0.52), 4.2e9)
    assert load_at_pressure(outer_curvature(10e-3, 0.2, 0.52), 4.2e9) > inner


def test_load_grows_with_the_cube_of_pressure_and_the_square_of_size() -> None:
    one = load_at_pressure(inner_curvature(10e-3, 0.2, 0.52), 2e9)
    assert load_at_pressure(inner_curvature(10e-3, 0.2, 0.52), 4e9) == pytest.approx(8 * one, rel=1e-12)
    assert load_at_pressure(inner_curvature(30e-3, 0.2, 0.52), 2e9) == pytest.approx(9 * one, rel=1e-12)
