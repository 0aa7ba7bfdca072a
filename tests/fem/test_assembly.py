"""Parts to a system: B of all parts dense and sparse, and constraints as u = T q + g."""

import numpy as np
import pytest

from fe_shaft.fem import assembly
from fe_shaft.fem.assembly import Constraint, is_dense, reduce, scatter
from fe_shaft.fem.frames import rigid_link

UX, UY, UZ, RX, RY, RZ = range(6)


@pytest.fixture(params=["dense", "sparse"])
def way(request, monkeypatch):
    """Both ways for small systems."""
    monkeypatch.setattr(assembly, "DENSE_LIMIT", 10**9 if request.param == "dense" else 0)
    return request.param


def full(matrix):
    return matrix if isinstance(matrix, np.ndarray) else matrix.toarray()


def mask(*dofs):
    return np.isin(np.arange(6), dofs)


def test_dense_while_blas_stays_on_one_thread():
    assert is_dense(16)
    assert not is_dense(17)
    assert is_dense(7, 95)
    assert not is_dense(7, 96)


def test_scatter_puts_each_block_at_its_nodes_and_drops_the_ground(way):
    rng = np.random.default_rng(0)
    a, b = rng.normal(size=(3, 6, 6)), rng.normal(size=(3, 6, 6))
    matrix = full(scatter(4, np.array([0, 2, 3]), a, np.array([1, 3, 4]), b))
    expected = np.zeros((18, 24))
    for part, (i, j) in enumerate([(0, 1), (2, 3), (3, 4)]):
        expected[6 * part : 6 * part + 6, 6 * i : 6 * i + 6] = a[part]
        if j < 4:
            expected[6 * part : 6 * part + 6, 6 * j : 6 * j + 6] = b[part]
    np.testing.assert_array_equal(matrix, expected)


def test_nothing_held_keeps_every_displacement(way):
    reduction = reduce(2, [])
    q = np.arange(12.0)[:, None]
    np.testing.assert_array_equal(reduction.expand(q), q)
    np.testing.assert_array_equal(reduction.contract(q), q)
    np.testing.assert_array_equal(reduction.turning, np.tile([False] * 3 + [True] * 3, 2))


def test_held_on_the_node_is_a_selection(way):
    value = np.array([1e-3, 2e-3, 0, 0, 0, 5.0])
    reduction = reduce(2, [Constraint(1, 0.0, mask(UX, UY), value)])
    q = np.arange(10.0)[:, None]
    u = reduction.expand(q).reshape(2, 6)
    np.testing.assert_array_equal(u[1, :2], [1e-3, 2e-3])  # the 5 rad are not held and so not read
    np.testing.assert_array_equal(np.concatenate([u[0], u[1, 2:]]), q[:, 0])


@pytest.mark.parametrize("arm", [0.0, 0.04, -0.04])
@pytest.mark.parametrize("dofs", [(UY, UZ), (UX, UY, UZ), (UY, UZ, RY, RZ), range(6), (RX,), (RY, RZ)])
def test_the_point_beside_the_node_moves_as_prescribed(way, arm, dofs):
    rng = np.random.default_rng(1)
    value = rng.normal(size=6)
    reduction = reduce(3, [Constraint(1, arm, mask(*dofs), value)])
    n_free = 18 - len(dofs)
    assert reduction.turning.shape == (n_free,)
    q = rng.normal(size=(n_free, 2))
    u = reduction.expand(q).reshape(3, 6, 2)
    point = rigid_link((arm, 0, 0)) @ u[1]
    for dof in dofs:
        np.testing.assert_allclose(point[dof], value[dof], atol=1e-14)
    # q is free: whatever is not held follows it
    others = [dof for dof in range(6) if dof not in dofs]
    assert np.linalg.matrix_rank(np.delete(u, 1, axis=0).reshape(12, 2)) == 2
    assert not others or np.abs(np.diff(u[1, others], axis=1)).min() > 1e-3


def test_contract_is_the_transpose_of_expand(way):
    """Forces do the work of the movements that are left: (T q) f = q (T^T f)."""
    rng = np.random.default_rng(2)
    held = [Constraint(0, 0.03, mask(UY, UZ), np.zeros(6)), Constraint(2, 0.0, mask(UX, RX), np.zeros(6))]
    reduction = reduce(3, held)
    q, f = rng.normal(size=(14, 3)), rng.normal(size=(18, 3))
    np.testing.assert_allclose(reduction.expand(q).T @ f, q.T @ reduction.contract(f), rtol=1e-12)


def test_columns_are_b_times_t(way):
    rng = np.random.default_rng(3)
    b = scatter(3, np.array([0, 1]), rng.normal(size=(2, 6, 6)), np.array([1, 2]), rng.normal(size=(2, 6, 6)))
    for arm in (0.0, 0.05):
        reduction = reduce(3, [Constraint(1, arm, mask(UY, UZ), np.zeros(6))])
        q = rng.normal(size=(16, 1))
        np.testing.assert_allclose(full(reduction.columns(b)) @ q, b @ reduction.expand(q), rtol=1e-12)


def test_two_points_beside_one_node(way):
    """Two radial holds at different arms clamp the node: only sliding and spinning are left."""
    lift = np.array([0, 1e-5, 0, 0, 0, 0])
    held = [Constraint(0, -0.01, mask(UY, UZ), 0 * lift), Constraint(0, 0.03, mask(UY, UZ), lift)]
    reduction = reduce(1, held)
    assert reduction.turning.shape == (2,)
    u = reduction.expand(np.zeros((2, 1)))[:, 0]
    assert u[RZ] == pytest.approx(1e-5 / 0.04, rel=1e-12)
    np.testing.assert_allclose((rigid_link((-0.01, 0, 0)) @ u)[[UY, UZ]], 0, atol=1e-18)
    np.testing.assert_allclose((rigid_link((0.03, 0, 0)) @ u)[[UY, UZ]], [1e-5, 0], atol=1e-18)


def test_the_same_hold_twice_is_one(way):
    once = [Constraint(0, 0.02, mask(UY, UZ), np.zeros(6))]
    assert reduce(1, once * 2).turning.shape == reduce(1, once).turning.shape


def test_a_point_with_an_arm_beside_one_without(way):
    """An axial hold on the node and a radial one beside it take three displacements."""
    held = [Constraint(0, 0.0, mask(UX), np.full(6, 1e-4)), Constraint(0, 0.02, mask(UY, UZ), np.full(6, 2e-4))]
    reduction = reduce(1, held)
    u = reduction.expand(np.full((3, 1), 0.5))[:, 0]
    assert u[UX] == pytest.approx(1e-4)
    np.testing.assert_allclose((rigid_link((0.02, 0, 0)) @ u)[[UY, UZ]], 2e-4, rtol=1e-12)
