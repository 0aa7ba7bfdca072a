"""Beams on springs: S. P. Timoshenko, Strength of Materials I and II; J. M. Gere & B. J. Goodno, Mechanics of Materials
(statically indeterminate beams). Superposition of the beam on rigid supports and its rigid motion on the springs, or
the force method with the spring as the redundant. From memory; case CF18 is that of beams.toml.

Tolerance 1e-9: closed forms; figures of beams.toml half a unit of their ninth digit. Slender theory, shear = "none".
"""

from __future__ import annotations

import math

import numpy as np
import pytest

import fe_shaft as fs
from tests.evidence.plane import (
    STEEL,
    E,
    Plane,
    area,
    both_planes,
    clamp,
    guide,
    pin,
    rod,
    roller,
    second_moment,
    spring,
)
from tests.evidence.published import CASES, NINE_DIGITS, agree, text

D, L, P, W = 0.04, 1.0, 1000.0, 1000.0
EI = E * second_moment(D)
BEAM = [rod(L, D)]


def axial_stop() -> fs.Pin:
    return fs.Pin("stop", at="0 m", holds=["axial"])


@both_planes
def test_cf18_springs_at_both_ends(plane: Plane) -> None:
    case = CASES["CF18_elastic_end_springs"]
    a, k_a, k_b = case.given("a"), case.given("k_A"), case.given("k_B")
    for key, number in {"E": E, "d": D, "L": L, "P": P}.items():
        agree(number, case.given(key), rel=0.0)
    springs = spring("end_a", 0, k_a), spring("end_b", L, k_b)
    bent = plane.solve(BEAM, axial_stop(), *springs, plane.force(a, P))
    b = L - a
    y_a, y_b = P * b / L / k_a, P * a / L / k_b
    agree(bent.y(a), P * a**2 * b**2 / (3 * EI * L) + y_a + (y_b - y_a) * a / L)
    for got, key in {bent.y(a): "y_load", bent.slope(0): "theta_A"}.items():
        agree(got, case.printed(key), rel=NINE_DIGITS)
    agree(bent.y(0), case.printed("y_A"))
    agree(bent.y(L), case.printed("y_B"))
    # Rigid pins beside flexible bearings: the difference is the rigid motion on the springs, nothing else.
    pinned = fs.compare(bent.results.model).left.case()["load"].deflection
    agree(bent.y(a) - pinned, y_a + (y_b - y_a) * a / L)


@both_planes
@pytest.mark.parametrize("k", [2e4, 2e6, 2e9])
def test_elastic_prop_at_the_middle(plane: Plane, k: float) -> None:
    """Even load, spring under the middle: R = (5 w L^4 / 384 E I) / (L^3 / 48 E I + 1 / k)."""
    bent = plane.solve(BEAM, pin("a", 0), spring("prop", L / 2, k), roller("b", L), plane.even(0, L, W))
    reaction = 5 * W * L**4 / (384 * EI) / (L**3 / (48 * EI) + 1 / k)
    agree(-bent.reaction("prop"), reaction)
    agree(bent.y(L / 2), reaction / k)
    agree(-bent.reaction("a"), (W * L - reaction) / 2)


@both_planes
@pytest.mark.parametrize("k", [2e4, 2e6, 2e9])
def test_cantilever_on_an_elastic_prop(plane: Plane, k: float) -> None:
    """Load at the middle, spring under the tip: R = (5 P / 16) / (1 + 3 E I / k L^3)."""
    bent = plane.solve(BEAM, clamp("wall", 0), spring("prop", L, k), plane.force(L / 2, P))
    agree(-bent.reaction("prop"), 5 * P / 16 / (1 + 3 * EI / (k * L**3)))


@both_planes
def test_three_springs_under_two_spans(plane: Plane) -> None:
    """Load over the middle of three equal springs, by the force method.

    The beam with its outer springs carries P - X, the middle spring X: (P - X)(L^3 / 48 E I + 1 / 2k) = X / k.
    """
    k = 3e6
    springs = spring("a", 0, k), spring("b", L / 2, k), spring("c", L, k)
    bent = plane.solve(BEAM, axial_stop(), *springs, plane.force(L / 2, P))
    soft = L**3 / (48 * EI) + 1 / (2 * k)
    middle = P * soft / (soft + 1 / k)
    agree(-bent.reaction("b"), middle)
    agree(-bent.reaction("c"), (P - middle) / 2)


@both_planes
def test_ends_that_resist_tilting(plane: Plane) -> None:
    """Even load, ends held by tilt springs c: end moments (w L^2 / 12) / (1 + 2 E I / c L)."""
    c = 3e4
    stiffness = {"radial": "1e15 N/m", "tilt": text(c, "N m/rad"), "range_check": "off"}
    ends = [
        fs.Bearing(f"end_{k}", at=text(x, "m"), holds=["radial"], stiffness=stiffness) for k, x in enumerate((0, L))
    ]
    bent = plane.solve(BEAM, axial_stop(), *ends, plane.even(0, L, W))
    end_moment = W * L**2 / 12 / (1 + 2 * EI / (c * L))
    # The radial springs of 1e15 N/m stand for rigid ones; two equal ones share the load and do not tilt the beam.
    agree(-bent.moment(0), end_moment)
    agree(bent.slope(0), end_moment / c)


@both_planes
def test_spring_of_another_stiffness_in_each_plane(plane: Plane) -> None:
    """Each plane has its own spring: a rigid shaft's load splits into up and front, y = R / k in each."""
    k_up, k_front = 4e6, 9e6
    stiffness = {"up": text(k_up, "N/m"), "front": text(k_front, "N/m")}
    bearing = fs.Bearing("b", at=text(L, "m"), holds=["radial"], stiffness=stiffness)
    load = plane.force(L, P)
    shaft = fs.Shaft("shaft", BEAM, material=STEEL.name, shear="none")
    results = fs.solve(fs.Model("two planes", [shaft, pin("a", 0), bearing, load], materials=[STEEL]))
    up, front = P * plane.toward
    agree(results.case()["b"].up, up / k_up, within=1e-18)
    agree(results.case()["b"].front, front / k_front, within=1e-18)


@both_planes
@pytest.mark.parametrize("seat", [True, False], ids=["on_a_seat", "one_spring"])
def test_bearing_on_a_seat(plane: Plane, seat: bool) -> None:
    """Bearing and housing in series give way by F (1 / k + 1 / k_seat) (springs in series, from memory)."""
    k, k_seat = 4e6, 1.5e7
    series = 1 / (1 / k + 1 / k_seat)
    on_seat = {"seat": {"radial": text(k_seat, "N/m")}} if seat else {}
    bent = plane.solve(BEAM, pin("a", 0), spring("b", L, k if seat else series, **on_seat), plane.force(L, P))
    agree(bent.y(L), P / series)
    if seat:
        agree(bent.results.case()["b"].give, P / k)
        agree(bent.results.case()["b"].seat_movement, P / k_seat)


@both_planes
def test_load_centre_beside_the_ring(plane: Plane) -> None:
    """Forces act at the load centre: reactions are those of a beam held there (statics)."""
    shift = 0.07
    beside = spring("b", 0.8, 5e6, load_centre=text(shift, "m"))
    there = spring("b", 0.8 + shift, 5e6)
    ends = pin("a", 0), plane.force(L, P)
    one, two = (plane.solve(BEAM, *ends, support) for support in (beside, there))
    agree(one.reaction("b"), -P * L / (0.8 + shift))
    # A rigid arm carries the force from the ring to its load centre: the shaft between them is unbent by it, and a
    # moment R shift acts at the ring instead. Hence the same reaction, and the arm's own geometry.
    agree(one.reaction("b"), two.reaction("b"))
    agree(one.y(0.8) + shift * one.slope(0.8), one.reaction("b") / -5e6)


@both_planes
def test_full_matrix_as_the_only_support(plane: Plane) -> None:
    """A shaft in one bearing with a full 6 x 6: movement K^-1 F at the bearing, then a cantilever from there."""
    rng = np.random.default_rng(7)
    root = rng.normal(size=(6, 6))
    scale = np.array([1, 1, 1, 0.05, 0.05, 0.05])
    k = 2e7 * (root @ root.T + 6 * np.eye(6)) * np.outer(scale, scale)
    units = {"force": "N", "length": "m", "angle": "rad"}
    bearing = fs.Bearing(
        "only", at="0 m", holds=["radial", "axial", "tilt", "spin"], matrix={"rows": k.tolist(), "units": units}
    )
    up, front = P * plane.toward
    torque, axial = 40.0, 600.0
    load = fs.Force(
        "load", at=text(L, "m"), up=text(up, "N"), front=text(front, "N"), axial=text(axial, "N"),
        couple={"axial": text(torque, "N m")},
    )  # fmt: skip
    shaft = fs.Shaft("shaft", BEAM, material=STEEL.name, shear="none")
    case = fs.solve(fs.Model("one bearing", [shaft, bearing, load], materials=[STEEL])).case()
    u = np.linalg.solve(k, [axial, up, front, torque, -front * L, up * L])
    assert np.allclose(case["only"].u, u, rtol=1e-9, atol=1e-9 * np.abs(u).min())
    bend, polar = L**3 / (3 * EI), 2 * second_moment(D)
    tip = [
        u[0] + axial * L / (E * area(D)),
        u[1] + L * u[5] + up * bend,
        u[2] - L * u[4] + front * bend,
        u[3] + torque * L / (E / 2.6 * polar),
    ]
    assert np.allclose(case["load"].u[:4], tip, rtol=1e-9, atol=0)


def test_stiff_springs_become_pins() -> None:
    """The limit k -> infinity of CF18: P a^2 b^2 / 3 E I L; what is missing at k is P / k times shares (1e-9 here)."""
    a = 0.3
    plane = Plane(75.0)
    bent = plane.solve(BEAM, axial_stop(), spring("x", 0, 1e16), spring("y", L, 1e16), plane.force(a, P))
    agree(bent.y(a), P * a**2 * (L - a) ** 2 / (3 * EI * L))
    ends = [guide("c", 0), guide("d", L)]
    clamped = plane.solve(BEAM, axial_stop(), *ends, plane.force(a, P))
    agree(clamped.y(a), P * a**3 * (L - a) ** 3 / (3 * EI * L**3))
    assert math.isclose(bent.reaction("x"), -P * (L - a) / L, rel_tol=1e-9)
