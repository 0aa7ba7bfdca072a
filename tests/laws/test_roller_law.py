"""The law of roller bearings keeps the contract of all laws, and is what contacts in three dimensions add up to."""

from __future__ import annotations

from typing import Any

import numpy as np
import pytest

from fe_shaft.laws.roller import RollerLaw
from fe_shaft.rolling.roller_geometry import RollerGeometry
from tests.laws import roller_contract as contract
from tests.laws.roller_states import batch, states
from tests.laws.slow_rollers import Slow, slow

Array = np.ndarray[Any, Any]
LENGTH = 0.03
GEOMETRY = batch()
B = len(GEOMETRY.number)
LAW = RollerLaw.of(GEOMETRY)


@pytest.fixture(scope="module")
def u() -> Array:
    return states(1, 1250, B)


@pytest.fixture(scope="module")
def solid(u: Array) -> list[Slow]:
    """The same states, contact by contact in three dimensions."""
    return [slow(GEOMETRY, i, u[:, i]) for i in range(B)]


@pytest.fixture(scope="module")
def clear(solid: list[Slow]) -> Array:
    """At least 5,000 of the states, over all bearings, have no lamina within reach of touching."""
    found = np.stack([np.abs(of.depth).min(axis=(1, 2)) > contract.REACH for of in solid], axis=1)
    assert found.sum() >= 5000
    assert found.any(axis=0).all()
    return found


def test_force_is_gradient(u: Array, clear: Array) -> None:
    contract.force_is_gradient(LAW, u, clear, LENGTH)


def test_tangent_is_hessian(u: Array, clear: Array) -> None:
    contract.tangent_is_hessian(LAW, u, clear, LENGTH)


def test_turning_by_a_pitch(u: Array) -> None:
    contract.turned(LAW, u, 2 * np.pi / GEOMETRY.number, LENGTH)
    contract.turned(LAW, u, -6 * np.pi / GEOMETRY.number, LENGTH)


def test_mirror(u: Array) -> None:
    contract.mirrored(LAW, RollerLaw.of(batch(side=-1)), u, LENGTH)


def test_work_is_energy(u: Array) -> None:
    contract.work_is_energy(LAW, u[:10])


def test_finite(u: Array) -> None:
    """Bearings that close to one side come apart to the other; those with clearance move a little; one just rests."""
    apart = np.zeros((1, B, 6))
    apart[:, [2, 3, 5], 0] = [-1e-3, 1e-3, 1e-3]
    apart[:, [0, 1, 4]] = u[:1, [0, 1, 4]] * 1e-3
    contract.finite_everywhere(LAW, u, apart)


def test_one_by_one(u: Array) -> None:
    def single(i: int) -> RollerLaw:
        return RollerLaw.of(GEOMETRY.pick([i]))

    contract.one_by_one(LAW, single, u[:40])


def test_contacts_in_three_dimensions(u: Array, solid: list[Slow]) -> None:
    """Energy, load and each lamina's load, near touching too."""
    whole, inside = LAW.respond(u), LAW.elements(u)
    for i, want in enumerate(solid):
        z, n = want.load.shape[1:]
        np.testing.assert_allclose(whole.energy[:, i], want.energy, rtol=1e-9, atol=1e-12)
        np.testing.assert_allclose(whole.force[:, i], want.force, rtol=1e-9, atol=1e-9 * np.abs(want.force).max())
        np.testing.assert_allclose(inside.laminae[:, i, :z, :n], want.load, rtol=1e-6, atol=1e-7)
        np.testing.assert_allclose(inside.load[:, i, :z], want.load.sum(axis=-1), rtol=1e-9, atol=1e-6)
        assert not inside.load[:, i, z:].any()
        assert not inside.laminae[:, i, :, n:].any()


def test_rollers_balance_the_load(u: Array) -> None:
    """Roller loads along their normals are the load, at signed contact angles."""
    force, inside = LAW.respond(u).force, LAW.elements(u)
    phi = GEOMETRY.first[:, None] + 2 * np.pi * np.arange(inside.load.shape[-1]) / GEOMETRY.number[:, None]
    axial = (inside.load * np.sin(inside.angle)).sum(axis=-1)
    upwards = (inside.load * np.cos(inside.angle) * np.cos(phi)).sum(axis=-1)
    size = np.abs(force).max()
    np.testing.assert_allclose(axial, force[..., 0], rtol=1e-9, atol=1e-12 * size)
    np.testing.assert_allclose(upwards, force[..., 1], rtol=1e-9, atol=1e-12 * size)


def test_touching_costs_nothing() -> None:
    """Just when laminae begin to touch, every number is finite and small; the stiffness starts from nothing."""
    law = RollerLaw.of(RollerGeometry.of(12, 0.01, 0.01, 0.06))
    u = np.zeros((60, 1, 6))
    u[:, 0, 1] = law.geometry.profile[0].min() * 2 + 10.0 ** -np.arange(60)
    answer = law.respond(u)
    assert all(np.isfinite(part).all() for part in answer)
    stiffness = answer.tangent[:, 0, 1, 1]
    assert (np.diff(stiffness) <= 0).all()


def test_tilt_is_free_for_spherical_rollers(u: Array) -> None:
    tilted = u[:, 4:5] * [0, 0, 0, 1, 1, 1]
    spherical = RollerLaw.of(GEOMETRY.pick([4]))
    assert not spherical.respond(100 * tilted).force.any()
    assert not spherical.respond(u[:, 4:5]).tangent[..., 3:, :].any()


def test_tapered_moment_vanishes_at_the_effective_centre() -> None:
    """A turn about the effective centre hardly loads a tapered bearing: only through its rollers' length."""
    geometry = RollerGeometry.of(200, 0.0009, 0.0001, 0.062, contact_angle=0.24, side=[1, -1])
    law = RollerLaw.of(geometry)
    tilt = 1e-4
    turned = np.zeros((2, 6))
    turned[:, 5], turned[:, 1] = tilt, -tilt * geometry.effective_centre
    offset = np.zeros((2, 6))
    offset[:, 5] = tilt
    turned[:, 0] = offset[:, 0] = geometry.side * 1e-5
    moment = law.respond(turned).force
    about_centre = moment[:, 5] - geometry.effective_centre * moment[:, 1]
    assert np.abs(about_centre).max() < 1e-4 * np.abs(law.respond(offset).force[:, 5]).min()


def test_thrust_rollers_feel_no_radial_motion(u: Array) -> None:
    answer = LAW.respond(u)
    assert not answer.force[:, 5:, 1:3].any()
    assert not answer.tangent[:, 5:, 1:3].any()


def test_convex(u: Array) -> None:
    """The tangent has no negative stiffness: the energy is convex, which Newton's method relies on."""
    of = contract.scales(LENGTH)
    tangent = LAW.respond(u).tangent / of[:, None] / of
    assert (np.linalg.eigvalsh(tangent) > -1e-12 * np.abs(tangent).max()).all()
