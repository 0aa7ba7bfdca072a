"""What the kinds of ball bearings do: four contacts, free tilting, both directions, shoulders, the wrong side."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from fe_shaft.laws.ball import BallLaw
from fe_shaft.rolling.ball_geometry import BallGeometry, self_aligning

SIZE = (10, 0.012, 0.060)


def push(**movement: float) -> np.ndarray:
    u = np.zeros((1, 6))
    for name, value in movement.items():
        u[0, ("ux", "uy", "uz", "rx", "ry", "rz").index(name)] = value
    return u


def angular(side: float = 1.0, **told: float) -> BallGeometry:
    return BallGeometry.of(*SIZE, contact_angle=np.deg2rad(35), side=side, **told)


def test_four_contacts_are_two_opposed_pairs() -> None:
    rng = np.random.default_rng(3)
    four = BallLaw.of(replace(angular(), both_sides=np.array([True])))
    for _ in range(20):
        u = rng.normal(size=(1, 6)) * [2e-5, 2e-5, 2e-5, 1, 4e-4, 4e-4]
        whole, parts = four.respond(u), [BallLaw.of(angular(side)).respond(u) for side in (1, -1)]
        for got, one, two in zip(whole, *parts, strict=True):
            np.testing.assert_allclose(got, one + two, rtol=1e-12, atol=1e-12 * np.abs(got).max())
        loads = four.elements(u).load
        assert loads.shape == (1, 20)
        np.testing.assert_allclose(loads[:, :10], BallLaw.of(angular()).elements(u).load, rtol=1e-12)


def test_a_four_point_bearing_without_angle_is_twice_a_deep_groove_one() -> None:
    deep = BallGeometry.of(*SIZE, clearance=1e-5)
    u = push(ux=5e-5, uy=2e-5, rz=3e-4)
    twice, once = BallLaw.of(replace(deep, both_sides=np.array([True]))).respond(u), BallLaw.of(deep).respond(u)
    np.testing.assert_allclose(twice.tangent, 2 * once.tangent, rtol=1e-12, atol=1e-3)


def test_a_self_aligning_bearing_tilts_freely() -> None:
    law = BallLaw.of(self_aligning(*SIZE, np.deg2rad(10)))
    assert law.outer.ratio == pytest.approx(1.0, abs=1e-12)  # a ball in a sphere touches in a circle
    level, tilted = law.respond(push(ux=5e-6, uy=2e-5)), law.respond(push(ux=5e-6, uy=2e-5, ry=0.03, rz=-0.02))
    for got, want in zip(tilted, level, strict=True):
        np.testing.assert_allclose(got, want, rtol=1e-13)
    assert level.force[0, 1] > 0
    assert not level.force[0, 3:].any()
    assert not level.tangent[0, 3:].any()


def test_self_aligning_rows_as_the_general_law_has_them() -> None:
    """Without the freedom said, two rows at dm/2 tan(angle) about a sphere give no moment to first order either."""
    angle, pitch = np.deg2rad(10), SIZE[2]
    sphere = (pitch / (2 * np.cos(angle)) + SIZE[1] / 2) / SIZE[1]
    row = BallGeometry.of(*SIZE, contact_angle=angle, outer_conformity=sphere)
    told = BallLaw.of(row).respond(push(ux=1e-6, uy=2e-6))
    at_centre = told.force[0, 5] + pitch / 2 * np.tan(angle) * told.force[0, 1]
    assert abs(at_centre) < 1e-3 * abs(told.force[0, 5])


def test_a_deep_groove_bearing_takes_both_directions_alike() -> None:
    law = BallLaw.of(BallGeometry.of(*SIZE, clearance=1e-5))
    right, left = (law.respond(push(ux=ux, uy=2e-5)) for ux in (9e-5, -9e-5))
    assert right.force[0, 0] == pytest.approx(-left.force[0, 0], rel=1e-12)
    assert right.force[0, 1] == pytest.approx(left.force[0, 1], rel=1e-12)


def test_the_side_that_closes() -> None:
    for side in (1.0, -1.0):
        law = BallLaw.of(angular(side))
        assert law.respond(push(ux=side * 1e-5)).force[0, 0] * side > 0
        assert not law.respond(push(ux=-side * 1e-5)).force.any()


def test_pulled_over_to_the_wrong_side() -> None:
    geometry = angular()
    across = 2 * float((geometry.centre_distance * np.sin(geometry.contact_angle))[0])
    told = BallLaw.of(geometry).elements(push(ux=-across - 1e-5))
    assert told.load.all()
    assert told.wrong_side.all()
    assert (told.angle < 0).all()
    assert not BallLaw.of(geometry).elements(push(ux=1e-5)).wrong_side.any()


def test_over_the_shoulder() -> None:
    low, high = angular(shoulder_angle=np.deg2rad(37)), angular(shoulder_angle=np.deg2rad(60))
    u = push(ux=3e-5)
    assert BallLaw.of(low).elements(u).over_shoulder.all()  # the ellipse is a few degrees wide
    assert not BallLaw.of(high).elements(u).over_shoulder.any()
    assert not BallLaw.of(low).elements(push()).over_shoulder.any()
    thrust = BallGeometry.of(*SIZE, contact_angle=np.pi / 2, shoulder_angle=np.deg2rad(20))
    assert not BallLaw.of(thrust).elements(u).over_shoulder.any()


def test_pressures_are_those_of_the_contacts() -> None:
    law = BallLaw.of(angular())
    told = law.elements(push(ux=1e-5))
    np.testing.assert_allclose(told.pressure_inner, law.inner.pressure(told.load), rtol=1e-13)
    np.testing.assert_allclose(told.pressure_outer, law.outer.pressure(told.load), rtol=1e-13)
    assert (told.pressure_inner > told.pressure_outer).all()


def test_ceramic_balls_are_stiffer() -> None:
    """Silicon nitride 310 GPa, 0.27 (common practice, no source): the modulus E' rises, and c with it, alike."""
    steel, ceramic = BallLaw.of(angular()), BallLaw.of(angular(ball_youngs=310e9, ball_poisson=0.27))
    grown = ceramic.inner.modulus / steel.inner.modulus
    assert 1.15 < float(grown[0]) < 1.25
    np.testing.assert_allclose(ceramic.stiffness / steel.stiffness, grown, rtol=1e-13)


def test_balls_stand_where_they_are_said_to() -> None:
    """The first at 12 o'clock and clockwise seen from the left: with 4 balls a push to 3 o'clock loads the second."""
    law = BallLaw.of(BallGeometry.of(4, *SIZE[1:]))
    np.testing.assert_array_equal(law.elements(push(uz=1e-5)).load[0] > 1.0, [False, True, False, False])
    np.testing.assert_allclose(law.balls[0][0], np.arange(4) * np.pi / 2)
