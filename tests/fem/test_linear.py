"""The linear solution: closed forms, both factorisations, prescribed displacements, springs, and what it refuses."""

import numpy as np
import pytest

from fe_shaft.errors import SolutionError
from fe_shaft.fem import assembly, linear, system
from fe_shaft.fem.assembly import Constraint, Springs, reduce
from fe_shaft.fem.frames import rigid_link
from fe_shaft.fem.linear import solve
from fe_shaft.fem.spread import end_loads, gather_uniform, load_deformation
from fe_shaft.fem.system import Network
from tests.fem.chains import E, G, chain, condensed

UX, UY, UZ, RX, RY, RZ = range(6)
D = 0.04
AREA, INERTIA = np.pi / 4 * D**2, np.pi / 64 * D**4


@pytest.fixture(params=["dense", "sparse"])
def way(request, monkeypatch):
    """Both ways for small systems."""
    monkeypatch.setattr(assembly, "DENSE_LIMIT", 10**9 if request.param == "dense" else 0)
    return request.param


def held(node, *dofs, value=0.0, arm=0.0):
    return Constraint(node, arm, np.isin(np.arange(6), dofs), np.zeros(6) + value)


def springs(*each):
    """(node, ground or other node, stiffness, arm, gap) each."""
    n = len(each)
    b_a = np.array([rigid_link((arm, 0, 0)) for _, _, _, arm, _ in each]).reshape(n, 6, 6)
    return Springs(
        np.array([s[0] for s in each], dtype=np.intp),
        np.array([s[1] for s in each], dtype=np.intp),
        b_a,
        np.tile(np.eye(6), (n, 1, 1)),
        np.array([s[2] for s in each], dtype=float).reshape(n, 6, 6),
        np.array([s[4] for s in each], dtype=float).reshape(n, 6),
    )


def network(n, constraints, *each, length=0.5, kappa=np.inf, extra_nodes=0):
    """A shaft of n equal spans (slender: no shear unless kappa is given)."""
    pieces = chain(np.full(n, length / n), np.full(n, D), spans=np.arange(n), kappa=kappa)
    nodes = np.arange(n)
    total = n + 1 + extra_nodes
    return Network(total, condensed(pieces), nodes, nodes + 1, springs(*each), reduce(total, constraints)), pieces


def loads(n_nodes, *each):
    out = np.zeros((n_nodes, 6, 1))
    for node, dof, value in each:
        out[node, dof, 0] += value
    return out


CLAMP = range(6)


def test_a_cantilever_under_each_load(way):
    """PL/EA, PL^3/3EI, TL/GJ, ML/EI (any text on strength of materials)."""
    net, _ = network(4, [held(0, *CLAMP)])
    force = np.zeros((5, 6, 6))
    force[4] = np.eye(6)
    u = solve(net, force).u[4]
    length = 0.5
    assert u[UX, 0] == pytest.approx(length / (E * AREA), rel=1e-12)
    assert [u[UY, 1], u[UZ, 2]] == pytest.approx([length**3 / (3 * E * INERTIA)] * 2, rel=1e-12)
    assert u[RX, 3] == pytest.approx(length / (G * 2 * INERTIA), rel=1e-12)
    assert [u[RZ, 5], u[RY, 4]] == pytest.approx([length / (E * INERTIA)] * 2, rel=1e-12)
    assert [u[RZ, 1], -u[RY, 2]] == pytest.approx([length**2 / (2 * E * INERTIA)] * 2, rel=1e-12)


def test_reactions_are_what_is_unbalanced(way):
    net, _ = network(4, [held(0, UX, UY, UZ, RX), held(4, UY, UZ)])
    solution = solve(net, loads(5, (1, UY, 1000.0), (3, UX, -200.0)))
    # lever rule; the forces ON the shaft
    assert solution.unbalanced[0, UY, 0] == pytest.approx(-750, rel=1e-12)
    assert solution.unbalanced[4, UY, 0] == pytest.approx(-250, rel=1e-12)
    assert solution.unbalanced[0, UX, 0] == pytest.approx(200, rel=1e-12)
    free = np.delete(solution.unbalanced.reshape(-1), [0, 1, 2, 3, 25, 26])
    assert np.abs(free).max() < 1e-9
    assert solution.residual[0] < 1e-12


def test_a_settled_middle_support(way):
    """48 E I delta / L^3 at the middle of a beam on two supports, half of it back at each end."""
    net, _ = network(2, [held(0, UX, UY, UZ, RX), held(1, UY, value=1e-3), held(2, UY, UZ)])
    solution = solve(net, loads(3))
    middle = 48 * E * INERTIA * 1e-3 / 0.5**3
    np.testing.assert_allclose(solution.unbalanced[[0, 1, 2], UY, 0], [-middle / 2, middle, -middle / 2], rtol=1e-12)
    assert solution.u[1, UY, 0] == 1e-3


def test_a_prescribed_turn_beside_the_node(way):
    """A clamp whose point lies beside its node, leaning: the free shaft follows it straight and takes no force."""
    lean = np.array([0, 2e-4, 0, 0, 0, 1e-3])
    constraint = Constraint(0, 0.05, np.ones(6, dtype=bool), lean)
    net, _ = network(4, [constraint])
    solution = solve(net, loads(5))
    x = np.linspace(0, 0.5, 5)
    np.testing.assert_allclose(solution.u[:, UY, 0], 2e-4 + 1e-3 * (x - 0.05), rtol=1e-12)
    assert np.abs(solution.span_force).max() < 1e-9


def test_springs_in_series_and_their_gap(way):
    """Two springs in series between a stiff shaft and the ground, over a node of their own."""
    soft, firm = np.diag([0, 2e6, 2e6, 0, 0, 0.0]), np.diag([1e6, 3e6, 3e6, 1e3, 1e3, 1e3])
    gap = np.array([0, 1e-4, 0, 0, 0, 0])
    each = [(0, 3, soft, 0.0, np.zeros(6)), (3, 4, firm, 0.0, gap)]
    net, _ = network(2, [held(2, UX, UY, UZ, RX)], *each, length=0.5, extra_nodes=1)
    solution = solve(net, loads(4, (0, UY, 500.0)))
    # the end is pushed by 500 N: the shaft turns about node 2, no moment holds it
    assert solution.u[0, UY, 0] == pytest.approx(500 / 2e6 + 500 / 3e6 + 1e-4, rel=1e-9)
    np.testing.assert_allclose(solution.spring_force[:, UY, 0], 500, rtol=1e-12)
    np.testing.assert_allclose(solution.spring_deformation[:, UY, 0], [500 / 2e6, 500 / 3e6], rtol=1e-9)


def test_a_spring_beside_its_node(way):
    """Reactions of a beam on load centres: lever rule over the distance of the centres."""
    k = np.diag([1e8, 1e8, 1e8, 1e2, 0, 0])
    net, _ = network(2, [], (0, 3, k, 0.1, np.zeros(6)), (2, 3, k, -0.1, np.zeros(6)))
    solution = solve(net, loads(3, (1, UY, 1000.0), (1, UZ, 400.0)))
    np.testing.assert_allclose(solution.spring_force[:, UY, 0], [500, 500], rtol=1e-10)
    np.testing.assert_allclose(solution.spring_force[:, UZ, 0], [200, 200], rtol=1e-10)


def test_a_uniform_load_on_the_spans(way):
    """5 q L^4 / 384 E I in the middle of a beam on two supports."""
    net, pieces = network(2, [held(0, UX, UY, UZ, RX), held(2, UY, UZ)])
    load = gather_uniform(pieces)
    density = np.zeros((2, 6, 1))
    density[:, UY] = -700.0
    nodal = np.zeros((3, 6, 1))
    nodal[1:] += end_loads(load, pieces)[1] @ density
    solution = solve(net, nodal, load_deformation(pieces, net.spans, load) @ density)
    assert solution.u[1, UY, 0] == pytest.approx(-5 * 700 * 0.5**4 / (384 * E * INERTIA), rel=1e-12)
    np.testing.assert_allclose(solution.unbalanced[[0, 2], UY, 0], 175, rtol=1e-12)


def test_no_displacement_is_free(way):
    net, _ = network(1, [held(0, *CLAMP), held(1, *CLAMP, value=1e-5)])
    solution = solve(net, loads(2))
    assert solution.u[1, UX, 0] == 1e-5
    assert solution.unbalanced[1, UX, 0] == pytest.approx(E * AREA / 0.5 * 1e-5, rel=1e-12)
    assert solution.residual[0] == 0


def many(n, constraints):
    rng = np.random.default_rng(7)
    pieces = chain(rng.uniform(0.002, 0.5, n), rng.uniform(0.005, 0.2, n), spans=np.arange(n))
    nodes = np.arange(n)
    k = np.diag([1e8, 3e7, 2e9, 0, 1e3, 1e3])
    each = springs((2, n + 1, k, 0.01, np.zeros(6)), (n // 2, n + 1, k, 0.0, np.array([0, 1e-5, 0, 0, 0, 1e-4])))
    force = rng.normal(size=(n + 1, 6, 3)) * 1e3
    return Network(n + 1, condensed(pieces), nodes, nodes + 1, each, reduce(n + 1, constraints)), force


@pytest.mark.parametrize("arm", [0.0, 0.015])
@pytest.mark.parametrize("n", [5, 49, 80, 300])
def test_the_sparse_way_is_the_dense_way(n, arm, monkeypatch):
    """Same system, both factorisations; 16 spans and more take the sparse one by themselves."""
    found = []
    for limit in (10**9, 0):
        monkeypatch.setattr(assembly, "DENSE_LIMIT", limit)
        net, force = many(n, [held(1, UX, UY, UZ, RX, arm=arm), held(n, UY, UZ, value=2e-5)])
        found.append(solve(net, force))
    one, other = found
    for name in ("u", "span_force", "spring_force", "unbalanced"):
        first, second = getattr(one, name), getattr(other, name)
        size = np.abs(first).max(axis=0)
        size = np.maximum(size, 1e-3 * size.max())
        # diameters of the hard range; a longer shaft loses more in either way
        np.testing.assert_allclose(second / size, first / size, rtol=0, atol=1e-9)
        assert np.isfinite(first).all()


@pytest.mark.parametrize(("n", "sparse"), [(15, False), (16, True)])
def test_more_than_sixteen_nodes_are_solved_the_sparse_way(n, sparse, monkeypatch):
    taken = []
    monkeypatch.setattr(system, "_sparse", lambda k, own=system._sparse: taken.append(k) or own(k))
    net, force = many(n, [held(1, UX, UY, UZ, RX), held(n, UY, UZ)])
    assert np.isfinite(solve(net, force).u).all()
    assert bool(taken) == sparse


def test_cases_do_not_mix(way):
    net, force = many(20, [held(0, UX, UY, UZ, RX), held(20, UY, UZ)])
    together = solve(net, force)
    for k in range(3):
        alone = solve(net, force[..., k : k + 1])
        size = np.abs(together.u[..., k]).max()
        np.testing.assert_allclose(alone.u[..., 0] / size, together.u[..., k] / size, atol=1e-13)


def refused_or_plainly_wrong(net, force):
    """A singular matrix is refused, or rounding hid it and the residual shows it."""
    try:
        solution = solve(net, force)
    except SolutionError:
        return True
    return bool((solution.residual > 1e-8).any())


@pytest.mark.parametrize("seed", range(40))
def test_a_floating_shaft_is_never_solved(way, seed):
    """Model checks come before; this is the net below them."""
    rng = np.random.default_rng(seed)
    n = int(rng.integers(1, 12))
    pieces = chain(rng.uniform(0.002, 0.5, n), rng.uniform(0.005, 0.2, n), spans=np.arange(n))
    nodes = np.arange(n)
    loose = [[], [held(0, UX, UY, UZ)], [held(0, UY, UZ), held(n, UY, UZ)]][seed % 3]
    net = Network(n + 1, condensed(pieces), nodes, nodes + 1, springs(), reduce(n + 1, loose))
    force = loads(n + 1, (n // 2, UY, 1000.0), (n // 2, UX, 300.0), (n, RX, 5.0), (n, RZ, 80.0))
    assert refused_or_plainly_wrong(net, force)


def test_an_exactly_singular_matrix_is_refused(way):
    """A node that nothing holds: an outer ring without bearing and seat."""
    net, _ = network(2, [held(0, *CLAMP)], extra_nodes=1)
    with pytest.raises(SolutionError, match="no trustworthy solution"):
        solve(net, loads(4, (2, UY, 1.0)))


def test_digits_that_were_won_back_are_counted():
    even, _ = network(4, [held(0, *CLAMP)])
    assert solve(even, loads(5, (4, UY, 1.0))).digits_lost[0] < 5
    pieces = chain([0.3, 0.002, 0.3], [0.005, 0.2, 0.005], spans=np.arange(3))
    nodes = np.arange(3)
    uneven = Network(4, condensed(pieces), nodes, nodes + 1, springs(), reduce(4, [held(0, *CLAMP)]))
    assert solve(uneven, loads(4, (3, UY, 1.0))).digits_lost[0] > 6


def thin_beside_thick(gap, extra):
    """A thin shaft with a thick disc in its middle, on which two nodes stand a gap apart; with or without them."""
    lengths, left, spans = [0.2, 0.01, gap, 0.01, 0.2], [0.006, 0.2, 0.2, 0.2, 0.006], np.arange(5)
    if not extra:
        spans = np.array([0, 1, 1, 1, 2])
    pieces = chain(lengths, left, spans=spans)
    n = int(spans[-1]) + 1
    nodes = np.arange(n)
    soft = np.diag([1e6, 1e7, 1e7, 0, 10.0, 10.0])
    each = springs((0, n + 1, soft, 0.0, np.zeros(6)), (n, n + 1, soft, 0.0, np.zeros(6)))
    net = Network(n + 1, condensed(pieces), nodes, nodes + 1, each, reduce(n + 1, [held(0, RX)]))
    return net, loads(n + 1, (1, UY, 100.0), (1, UZ, 20.0), (n, UX, 30.0), (n, RX, 1.0))


@pytest.mark.parametrize("gap", [1e-3, 1e-4, 1e-5, 1e-6, 1e-7])
def test_nodes_a_hair_apart_change_nothing(way, gap):
    net, force = thin_beside_thick(gap, extra=True)
    plain, plain_force = thin_beside_thick(gap, extra=False)
    one, other = solve(net, force), solve(plain, plain_force)
    for node in (0, 1, -1):
        np.testing.assert_allclose(one.u[node], other.u[node], rtol=1e-9, atol=1e-15)
    np.testing.assert_allclose(one.spring_force, other.spring_force, rtol=1e-9, atol=1e-9)
    assert one.residual[0] < 1e-11


@pytest.mark.parametrize("seed", [40, 58])
def test_the_thorough_factorisation_takes_over(way, seed, monkeypatch):
    """Where the quick one gives up (as it does for these two on some machines) the same answer comes from the other."""
    rng = np.random.default_rng(seed)
    lengths, diameters = [], []
    for _ in range(4):
        lengths += [float(rng.uniform(0.05, 0.2)), 2e-6]
        diameters += [float(rng.uniform(0.02, 0.1))] * 2
    pieces = chain([*lengths, 0.1], [*diameters, 0.05], spans=np.arange(9))
    nodes, k = np.arange(9), np.diag([1e8, 1e8, 1e8, 0, 0, 0.0])
    each = springs((5, 10, k, 0.05, np.zeros(6)), (6, 10, k, 0.0, np.zeros(6)))
    net = Network(10, condensed(pieces), nodes, nodes + 1, each, reduce(10, [held(0, RX)]))
    force = loads(10, (3, UY, 100.0), (8, UZ, -40.0), (9, UX, 20.0), (7, RX, 3.0))
    one = solve(net, force)
    monkeypatch.setattr(linear, "factor_quickly", lambda *_: None)
    other = solve(net, force)
    assert max(one.residual[0], other.residual[0]) < 1e-12
    # turns make the shifts of nodes far away: compare with the largest of all
    np.testing.assert_allclose(one.u, other.u, atol=1e-10 * np.abs(one.u).max())
    np.testing.assert_allclose(one.spring_force, other.spring_force, atol=1e-9 * np.abs(one.spring_force).max())


def test_both_factorisations_solve_the_same_system(way):
    net, force = many(20, [held(1, UX, UY, UZ, RX, arm=0.01), held(20, UY, UZ)])
    law = system.Law(net)
    quick, thorough = system.factor_quickly(law, net.reduction), system.factor_thoroughly(law, net.reduction)
    right = net.reduction.contract(force.reshape(-1, 3))
    np.testing.assert_allclose(quick.diagonal, thorough.diagonal, rtol=1e-12)
    # once each, without residual steps: the thorough one is the better one, and the steps bring both together
    assert np.linalg.norm(thorough.solve(right)) == pytest.approx(np.linalg.norm(quick.solve(right)), rel=1e-3)


def test_the_quick_factorisation_is_enough_for_the_usual_shaft(monkeypatch):
    def never(*_):
        raise AssertionError("not needed here")

    monkeypatch.setattr(linear, "factor_thoroughly", never)
    net, force = many(20, [held(1, UX, UY, UZ, RX), held(20, UY, UZ)])
    assert solve(net, force).residual.max() < 1e-13
