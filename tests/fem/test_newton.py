"""Newton with springs whose force is not proportional, against the same balance in all displacements (scipy)."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
import pytest
from numpy.typing import NDArray
from scipy.optimize import root

from fe_shaft.fem.newton import SETTLED, settle
from fe_shaft.fem.system import Law
from tests.fem.test_linear import UX, UY, UZ, held, loads, network

Array = NDArray[np.float64]


class Answered(NamedTuple):
    force: Array
    tangent: Array


def ring(stiffness, clearance):
    """A ring that touches after a radial clearance: F = c (|r| - g)^1.5 along r, and a weak spring along the shaft."""

    def respond(e, cases):
        y, z = e[..., 1], e[..., 2]
        r = np.maximum(np.hypot(y, z), 1e-30)
        deep = np.maximum(r - clearance, 0)
        pull, slope = stiffness * deep**1.5, 1.5 * stiffness * np.sqrt(deep)
        n = np.stack([y / r, z / r], axis=-1)
        force, tangent = np.zeros(e.shape), np.zeros((*e.shape, 6))
        force[..., 1:3] = pull[..., None] * n
        along = n[..., :, None] * n[..., None, :]
        across = np.eye(2) - along
        tangent[..., 1:3, 1:3] = slope[..., None, None] * along + (pull / r)[..., None, None] * across
        force[..., 0], tangent[..., 0, 0] = 1e6 * e[..., 0], 1e6
        return Answered(force, tangent)

    return respond


K0 = np.diag([1e6, 2e8, 2e8, 0, 0, 0])


def shaft(gap=0.0):
    """Eight spans on two rings, its spin held."""
    out = [0, gap, 0, 0, 0, 0]
    return network(8, [held(0, 3)], (1, 9, K0, 0, [0] * 6), (7, 9, K0, 0, out))[0]


def settled(force, respond, net=None):
    return settle(shaft() if net is None else net, np.array([0, 1]), respond, force)


def left_over(net, found, force, respond):
    """Internal less applied forces in all displacements, by K u of the spans and the law at B u."""
    law = Law(net)
    cut = law.n_span_rows
    b = np.asarray(law.matrix if isinstance(law.matrix, np.ndarray) else law.matrix.toarray())

    def of(u, case):
        e = b @ u
        s = np.concatenate([e[:cut] / net.spans.flexibility.ravel(), np.zeros(len(e) - cut)])
        gaps = net.springs.gap.ravel()
        s[cut:] = respond((e[cut:] - gaps).reshape(1, -1, 6), np.array([case])).force.ravel()
        return b.T @ s - force[..., case].ravel()

    return of


@pytest.mark.parametrize("clearance", [0.0, 20e-6])
@pytest.mark.parametrize("gap", [0.0, 30e-6])
def test_the_balance_of_all_displacements(clearance, gap):
    net, respond = shaft(gap), ring(6e12, clearance)
    force = np.concatenate(
        [loads(9, (4, UY, 3000.0), (6, UZ, -900.0)), loads(9, (2, UZ, 50.0), (4, UX, 10.0)), loads(9, (8, UY, 2e5))],
        axis=2,
    )
    found = settled(force, respond, net)
    assert found.converged.all()
    assert found.steps.max() < 25
    of = left_over(net, found, force, respond)
    free = net.reduction.free
    for case in range(force.shape[2]):
        u = found.solution.u[..., case].ravel().copy()
        size = np.abs(force[..., case]).max()
        floating = found.floating[case].max()  # a millionth of the stiffness holds a ring that nothing touches
        assert np.abs(of(u, case)[free]).max() < 1e-9 * size + 1.01 * floating

        def balance(q, u=u, case=case, size=size):
            tried = u.copy()
            tried[free] = q
            return of(tried, case)[free] / size

        other = root(balance, u[free] * (1 + 1e-3), tol=1e-14)
        np.testing.assert_allclose(other.x, u[free], rtol=2e-4, atol=1e-9)


def test_forces_balance_to_the_last_digit():
    net, force = shaft(), loads(9, (4, UY, 3000.0), (6, UZ, -900.0))
    found = settled(force, ring(6e12, 20e-6), net)
    carried = found.solution.spring_force.sum(axis=0)
    np.testing.assert_allclose(carried[1:3, 0], [3000, -900], rtol=1e-13)
    assert found.solution.residual.max() < 1e-14
    np.testing.assert_allclose(
        found.solution.spring_deformation.transpose(2, 0, 1), found.deformation, rtol=1e-6, atol=1e-12
    )


def test_any_start_ends_at_the_same_place():
    net, respond, force = shaft(), ring(6e12, 20e-6), loads(9, (4, UY, 300.0), (6, UZ, -90.0))
    one = settled(force, respond, net)
    rng = np.random.default_rng(2)
    for _ in range(5):
        start = rng.normal(size=(1, 2, 6)) * np.array([1e-5, 5e-5, 5e-5, 0, 1e-4, 1e-4])
        other = settle(net, np.array([0, 1]), respond, force, start=start)
        np.testing.assert_allclose(other.deformation, one.deformation, rtol=1e-8, atol=1e-14)


def test_tiny_loads_and_none():
    net, respond = shaft(), ring(6e12, 20e-6)
    force = np.concatenate([loads(9, (4, UY, size), (6, UZ, -size / 3)) for size in (1e-3, 1e-2, 1.0, 0.0)], axis=2)
    found = settled(force, respond, net)
    assert found.converged.all()
    assert (found.left <= SETTLED).all()
    assert (found.floating.max(axis=1)[:3] < 1e-2 * np.abs(force).max(axis=(0, 1))[:3] + 0.01).all()
    assert np.abs(found.deformation[3]).max() < 20e-6


def test_cases_do_not_see_each_other():
    respond = ring(6e12, 20e-6)
    each = [loads(9, (4, UY, size), (6, UZ, -size / 3)) for size in (5.0, 3e3, 8e4)]
    together = settled(np.concatenate(each, axis=2), respond)
    for case, alone in enumerate(each):
        np.testing.assert_allclose(settled(alone, respond).deformation[0], together.deformation[case], rtol=1e-9)
