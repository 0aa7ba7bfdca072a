"""The span: flexibilities, signs, loads and recovery against closed forms."""

import numpy as np
import pytest

from fe_shaft.fem.frames import move_wrench, rigid_link
from fe_shaft.fem.recovery import Recovery
from fe_shaft.fem.span import condense, deformation_matrices, flexibility
from fe_shaft.fem.spread import end_loads, gather_mass, gather_uniform, load_deformation
from tests.fem.chains import NU, RHO, E, G, chain, condensed

CYLINDER_I = np.pi / 64 * 0.04**4
CYLINDER_A = np.pi / 4 * 0.04**2
KAPPA = 6 * (1 + NU) / (7 + 6 * NU)  # Cowper 1966, solid round


def test_cylinder_has_the_textbook_flexibilities():
    spans = condensed(chain([0.2, 0.3], [0.04, 0.04]))
    length = 0.5
    # Timoshenko beam: L/EA, L^3/12EI + L/(kappa G A), L/GJ, L/EI (any text on structural analysis)
    bending = length / (E * CYLINDER_I)
    across = length**3 / (12 * E * CYLINDER_I) + length / (KAPPA * G * CYLINDER_A)
    expected = [length / (E * CYLINDER_A), across, across, length / (G * 2 * CYLINDER_I), bending, bending]
    np.testing.assert_allclose(spans.flexibility[0], expected, rtol=1e-14)
    assert spans.centre[0] == pytest.approx(length / 2, rel=1e-14)


@pytest.mark.parametrize("d2", [0.02, 0.024, 0.03, 0.05, 0.13, 0.9])
def test_solid_cone_agrees_with_its_closed_form(d2):
    """Integrals of 1/EI, x/EI, x^2/EI and 1/A of a cone, integrated by hand with D(x) linear."""
    d1, length, n = 0.03, 0.25, 1 + int(np.ceil(abs(np.log(d2 / 0.03)) / np.log(1.2)))
    edges = np.linspace(0, 1, n + 1)
    diameter = d1 + (d2 - d1) * ((d2 / d1) ** edges - 1) / ((d2 / d1) - 1) if d2 != d1 else d1 + 0 * edges
    lengths = np.diff((diameter - d1) / (d2 - d1) * length) if d2 != d1 else np.diff(edges) * length
    spans = condensed(chain(lengths, diameter[:-1], diameter[1:]))
    q = d1**2 + d1 * d2 + d2**2
    bending = 64 * length / (np.pi * E) * q / (3 * d1**3 * d2**3)
    centre = d1 * (2 * d1 + d2) / (2 * q) * length
    own = 64 * length**3 / (np.pi * E) / (4 * d1 * d2 * q)
    shear = 4 * length / (np.pi * KAPPA * G * d1 * d2)
    expected = [4 * length / (np.pi * E * d1 * d2), own + shear, own + shear, bending * E / (2 * G), bending, bending]
    np.testing.assert_allclose(spans.flexibility[0], expected, rtol=1e-13)
    assert spans.centre[0] == pytest.approx(centre, rel=1e-13)


def test_rigid_motions_deform_nothing():
    spans = condensed(chain([0.2, 0.05, 0.3], [0.04, 0.1, 0.02], spans=[0, 0, 1]))
    x = np.array([0.0, 0.25, 0.55])
    modes = np.stack([rigid_link((xk, 0.0, 0.0)) for xk in x])
    b_left, b_right = deformation_matrices(spans)
    e = b_left @ modes[:-1] + b_right @ modes[1:]
    assert np.abs(e).max() < 1e-16


def cantilever(pieces, load=None, density=None, tip=None):
    """Clamped at the left: recovery and tip displacement of the chain's one span."""
    length = np.array([pieces.length.sum()])
    give = flexibility(pieces)
    spans = condense(pieces, give, length)
    b = length[0] - spans.centre[0]
    total = np.zeros(6) if tip is None else np.asarray(tip, float)
    loads, e_load = (), 0.0
    if load is not None:
        gathered, density = load(pieces), np.asarray(density, float)
        total = total + (end_loads(gathered, pieces)[1] @ density)[0]
        e_load = load_deformation(pieces, spans, gathered)[0] @ density
        loads = ((gathered, density[None, :, None]),)
    s = total.copy()
    s[5] += total[1] * b
    s[4] -= total[2] * b
    found = Recovery(pieces, give, spans.centre, np.zeros((1, 6, 1)), s[None, :, None], loads)
    e = spans.flexibility[0] * s + e_load
    e[1] += b * e[5]
    e[2] -= b * e[4]
    return found, e


def test_recovery_closes_at_the_far_end():
    """Running sums along the pieces arrive at the displacement that the condensed span gives."""
    right = [0.03, 0.055, 0.024, 0.08]
    pieces = chain([0.1, 0.02, 0.2, 0.05], [0.03, 0.06, 0.02, 0.08], right, bores=[0, 0.01, 0.01, 0.02])
    for load, density in ((gather_uniform, [3e3, -2e3, 5e3, 40, 25, -30]), (gather_mass, [9.81, -5.0, 2.0, 0, 0, 0])):
        found, tip = cantilever(pieces, load, density, tip=[1e3, -200, 300, 20, 10, -5])
        np.testing.assert_allclose(found.u_right[:, 0, -1], tip, rtol=1e-12)


def test_cantilever_under_uniform_load_and_couple():
    """w L^4 / 8EI + w L^2 / (2 kappa G A), w L^3 / 6EI; m L^3 / 3EI ... (integration of the Timoshenko equations)."""
    pieces = chain([0.25] * 2, [0.04] * 2)
    length, w, m = 0.5, 800.0, 30.0
    found, tip = cantilever(pieces, gather_uniform, [0, w, 0, 0, 0, 0])
    assert tip[1] == pytest.approx(
        w * length**4 / (8 * E * CYLINDER_I) + w * length**2 / (2 * KAPPA * G * CYLINDER_A), rel=1e-13
    )
    assert tip[5] == pytest.approx(w * length**3 / (6 * E * CYLINDER_I), rel=1e-13)
    assert found.force_left[:, 0, 0] == pytest.approx([0, w * length, 0, 0, 0, w * length**2 / 2], abs=1e-9)
    assert np.abs(found.force_right[:, 0, -1]).max() < 1e-10
    found, tip = cantilever(pieces, gather_uniform, [0, 0, 0, 0, 0, m])
    assert tip[5] == pytest.approx(m * length**2 / (2 * E * CYLINDER_I), rel=1e-13)
    assert tip[1] == pytest.approx(m * length**3 / (3 * E * CYLINDER_I), rel=1e-13)


def test_own_weight_of_a_bored_cone_is_its_mass():
    pieces = chain([0.3], [0.06], [0.03], bores=[0.02], end_bores=[0.01])
    gathered = gather_mass(pieces)
    volume = np.pi / 12 * 0.3 * ((0.06**2 + 0.06 * 0.03 + 0.03**2) - (0.02**2 + 0.02 * 0.01 + 0.01**2))
    assert gathered.mu_right[-1] == pytest.approx(RHO * volume, rel=1e-14)


@pytest.mark.parametrize(
    ("load", "moved"),
    [
        ([0, 1, 0, 0, 0, 0], {1: 1, 5: 1}),  # a force up lifts the tip and turns it about +z
        ([0, 0, 1, 0, 0, 0], {2: 1, 4: -1}),  # a force to the front turns it about -y
        ([0, 0, 0, 0, 1, 0], {4: 1, 2: -1}),
        ([0, 0, 0, 0, 0, 1], {5: 1, 1: 1}),
        ([1, 0, 0, 0, 0, 0], {0: 1}),
        ([0, 0, 0, 1, 0, 0], {3: 1}),
    ],
)
def test_signs_of_a_cantilever(load, moved):
    _, tip = cantilever(chain([0.5], [0.04]), tip=load)
    assert {int(k): int(np.sign(tip[k])) for k in np.flatnonzero(tip)} == moved


def test_section_forces_act_on_the_face_that_looks_right():
    found, _ = cantilever(chain([0.5], [0.04]), tip=[0, 100, 0, 0, 0, 0])
    n, vy, _, _, _, mz = found.force_left[:, 0, 0]
    assert (n, vy, mz) == pytest.approx((0, 100, 50))


def test_wrench_travels_against_the_displacement():
    rng = np.random.default_rng(1)
    arm, wrench, u = rng.normal(size=3), rng.normal(size=6), rng.normal(size=6)
    assert move_wrench(wrench, arm) == pytest.approx(rigid_link(arm).T @ wrench)
    assert (rigid_link(arm) @ u)[:3] == pytest.approx(u[:3] + np.cross(u[3:], arm))
