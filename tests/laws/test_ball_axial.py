"""Ball bearings pushed along the shaft: closed forms of all stiffnesses, by the loaded contact angle.

With A_ = kn cos^2 + Q/L sin^2, B_ = kn sin^2 + Q/L cos^2, C_ = (kn - Q/L) sin cos, the radius R and the axial place h
of the inner groove's centre, Z balls (derived by summing over a full circle of balls):
Kyy = Z/2 A_, Kxx = Z B_, Ky,rz = Z/2 (h A_ - R C_), Krz,rz = Z/2 (h^2 A_ - 2 h R C_ + R^2 B_).
"""

from __future__ import annotations

import numpy as np
import pytest

from fe_shaft.laws.ball import BallLaw
from fe_shaft.rolling.ball_geometry import BallGeometry

GEOMETRY = BallGeometry.of(
    [9, 12, 16, 16, 14],
    [0.0127, 0.0095, 0.0222, 0.0222, 0.0111],
    [0.065, 0.060, 0.125, 0.125, 0.070],
    inner_conformity=[0.52, 0.515, 0.5232, 0.53, 0.53],
    outer_conformity=[0.52, 0.53, 0.5232, 0.52, 0.53],
    contact_angle=np.deg2rad([0, 15, 40, 40, 90]),
    clearance=[15e-6, 0.0, 0.0, -10e-6, 0.0],
    side=[1, 1, 1, -1, 1],
)
LAW = BallLaw.of(GEOMETRY)
#: Movements to the closing side [m].
PUSH = np.array([0.155e-3, 12e-6, 36e-6, 20e-6, 8e-6])


def test_closed_forms() -> None:
    g, u = GEOMETRY, np.zeros((5, 6))
    u[:, 0] = g.side * PUSH
    told, load, angle = LAW.respond(u), LAW.elements(u).load[:, 0], LAW.elements(u).angle[:, 0]
    length = g.centre_distance + (load / LAW.stiffness) ** (2 / 3)
    kn, turn = 1.5 * load ** (1 / 3) * LAW.stiffness ** (2 / 3), load / length
    c, s = np.cos(angle), np.sin(angle)
    a_, b_, c_ = kn * c**2 + turn * s**2, kn * s**2 + turn * c**2, (kn - turn) * s * c
    behind = (g.inner_conformity - 0.5) * g.ball_diameter
    r, h = g.pitch_diameter / 2 + behind * np.cos(g.contact_angle), behind * np.sin(g.contact_angle) * g.side
    z = g.number
    want = {
        (0, 0): z * b_, (1, 1): z / 2 * a_, (2, 2): z / 2 * a_,
        (1, 5): z / 2 * (h * a_ - r * c_), (2, 4): -z / 2 * (h * a_ - r * c_),
        (4, 4): z / 2 * (h**2 * a_ - 2 * h * r * c_ + r**2 * b_), (0, 1): 0 * z, (0, 4): 0 * z, (1, 2): 0 * z,
    }  # fmt: skip
    for (i, j), value in want.items():
        np.testing.assert_allclose(told.tangent[:, i, j], value, rtol=1e-11, atol=1e-3, err_msg=f"K[{i}, {j}]")
    np.testing.assert_allclose(told.force[:, 0], z * load * s, rtol=1e-12)
    np.testing.assert_allclose(told.force[:, 1:], 0, atol=1e-9 * np.abs(told.force[:, :1]).max())


def test_free_end_play() -> None:
    """The rings of a deep-groove bearing touch after A sin(free angle) either way, cos(free angle) = 1 - Pd / 2A."""
    one = GEOMETRY.pick([0])
    law, play = BallLaw.of(one), float((one.centre_distance * np.sin(one.free_angle))[0])
    for way in (-1, 1):
        for share, loaded in ((0.999999, False), (1.000001, True)):
            u = np.zeros((1, 6))
            u[0, 0] = way * share * play
            assert bool(law.respond(u).force[0, 0] * way > 0) is loaded


def test_a_thrust_bearing_holds_radially_only_while_it_is_pressed() -> None:
    law = BallLaw.of(GEOMETRY.pick([4]))
    u = np.zeros((1, 6))
    assert not law.respond(u).tangent.any()
    u[0, 0] = 8e-6
    k = law.respond(u).tangent[0]
    load = law.elements(u).load[0, 0]
    length = float(GEOMETRY.centre_distance[4]) + 8e-6
    assert k[1, 1] == pytest.approx(14 / 2 * load / length, rel=1e-12)
    assert k[1, 1] < 0.05 * k[0, 0]
