"""Whole stiffness matrices of two bearings under given loads.

Derived figures, no evidence: computed once by another program with the same model, whose tangent had been checked
against a solution with the ball as a body of its own between two contacts (1e-10). They guard signs, levers and the
convergence of a loaded bearing. Figures in N, mm and rad; load and movement in the order (y, z, x; about y, about z).
"""

from __future__ import annotations

import numpy as np
import pytest

from fe_shaft.laws.ball import BallLaw
from fe_shaft.rolling.ball_geometry import BallGeometry
from tests.laws.loaded import settle

ORDER = np.array([1, 2, 0, 4, 5])
MM = np.array([1e-3, 1e-3, 1e-3, 1.0, 1.0])
STEEL = {"youngs": 206.843e9, "poisson": 0.3}
B218 = BallGeometry.of(
    16, 0.022225, 0.12526, inner_conformity=0.5232, outer_conformity=0.5232, contact_angle=np.deg2rad(40.0), **STEEL
)
B209 = BallGeometry.of(9, 0.0127, 0.065, clearance=15e-6, **STEEL)

CASES = {
    "218 axial": (
        B218, [0, 0, 17800], [0, 0, 0.03600451, 0, 0], [1678.9931] * 16, [41.498428] * 16,
        [
            [486455.91, 0, 0, 0, -26251906.0], [0, 486455.91, 0, 26251906.0, 0], [0, 0, 766987.4, 0, 0],
            [0, 26251906.0, 0, 1.5058392e9, 0], [-26251906.0, 0, 0, 0, 1.5058392e9],
        ],
    ),
    "209 axial": (
        B209, [0, 0, 2000], [0, 0, 0.15521927, 0, 0], [750.21682] * 9, [17.230148] * 9,
        [
            [288996.15, 0, 0, 0, -2870164.7], [0, 288996.15, 0, 2870164.7, 0], [0, 0, 67236.81, 0, 0],
            [0, 2870164.7, 0, 36066649.0, 0], [-2870164.7, 0, 0, 0, 36066649.0],
        ],
    ),
    "209 combined": (
        B209, [3000, 0, 2000], [0.033927727, 0, 0.14990694, 0, 0.0025750115],
        [1965.1085, 1494.274, 759.25997, 504.23746, 590.24065, 590.24065, 504.23746, 759.25997, 1494.274],
        [6.9942483, 9.2025962, 14.955012, 21.664752, 26.059427, 26.059427, 21.664752, 14.955012, 9.2025962],
        [
            [320102.96, 0, -30100.434, 0, -2717696.9], [0, 291376.73, 0, 2674029.7, 0],
            [-30100.434, 0, 72424.83, 0, 644833.33], [0, 2674029.7, 0, 35230389.0, 0],
            [-2717696.9, 0, 644833.33, 0, 42468745.0],
        ],
    ),
}  # fmt: skip


@pytest.mark.parametrize("name", CASES)
def test_stiffness_matrix(name: str) -> None:
    geometry, (fy, fz, fx), moved, loads, angles, matrix = CASES[name]
    law = BallLaw.of(geometry)
    start = [float(geometry.centre_distance[0] * np.sin(geometry.free_angle[0])) + 1e-5, 0, 0, 0, 0, 0]
    start[0] -= float(geometry.centre_distance[0] * np.sin(geometry.contact_angle[0]))
    u = settle(law, [fx, fy, fz, 0, 0, 0], start)
    told = law.elements(u)
    np.testing.assert_allclose(u[0, ORDER] / MM, moved, rtol=1e-6, atol=1e-12)
    np.testing.assert_allclose(told.load[0], loads, rtol=1e-6)
    np.testing.assert_allclose(np.rad2deg(told.angle[0]), angles, rtol=1e-6)
    got = law.respond(u).tangent[0][np.ix_(ORDER, ORDER)]
    scale = 1e3 * np.outer(1 / MM, 1 / MM) / 1e6  # N/mm, N, N mm in SI
    np.testing.assert_allclose(got / scale, matrix, rtol=1e-6, atol=1.0)
