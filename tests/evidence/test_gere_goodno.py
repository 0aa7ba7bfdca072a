"""J. M. Gere & B. J. Goodno, Mechanics of Materials, Cengage: axial bars, torsion, tapered and stepped beams, tables.

Examples on tapered bars in tension (ch. 2) and torsion (ch. 3), on clamped bars in tension and torsion, on beams with
two moments of inertia (ch. 9), and the tables of deflections and slopes of beams (appendix). All from memory; numbers
are our own. Slender theory, shear = "none". Tolerance 1e-9 throughout: all of them are closed forms.
"""

from __future__ import annotations

import math

import fe_shaft as fs
from tests.evidence.plane import (
    SHEAR_MODULUS,
    Bent,
    E,
    Plane,
    area,
    both_planes,
    clamp,
    cone,
    pin,
    rod,
    roller,
    second_moment,
)
from tests.evidence.published import agree, text

L, P, W, C, T = 1.2, 1000.0, 800.0, 90.0, 250.0
D = 0.04
EI = E * second_moment(D)
G = SHEAR_MODULUS


def polar(d: float, bore: float = 0.0) -> float:
    return 2 * second_moment(d, bore)


def twisted(segments: list[fs.Segment], *supports: fs.Pin, at: float, torque: float = T) -> Bent:
    load = fs.Force("torque", at=text(at, "m"), couple={"axial": text(torque, "N m")})
    return Plane(0).solve(segments, *supports, load)


def pulled(segments: list[fs.Segment], *supports: fs.Pin, at: float, pull: float = 50e3) -> Bent:
    return Plane(0).solve(segments, *supports, fs.Force("pull", at=text(at, "m"), axial=text(pull, "N")))


# ---- bars in tension


def test_stepped_bar_in_tension() -> None:
    """delta = sum of P L_i / (E A_i)."""
    bent = pulled([rod(0.4, 0.05), rod(0.3, 0.04, 0.02), rod(0.5, 0.03)], clamp("wall", 0), at=1.2)
    give = 0.4 / area(0.05) + 0.3 / area(0.04, 0.02) + 0.5 / area(0.03)
    agree(bent.station(1.2).u[0], 50e3 / E * give)
    agree(bent.station(0.9).axial_force, 50e3)


def test_tapered_bar_in_tension() -> None:
    """delta = 4 P L / (pi E d_A d_B)."""
    bent = pulled([cone(L, 0.06, 0.025)], clamp("wall", 0), at=L)
    agree(bent.station(L).u[0], 4 * 50e3 * L / (math.pi * E * 0.06 * 0.025))


def test_bar_between_walls() -> None:
    """Held at both ends, pulled between: R_A = P (b / A_2) / (a / A_1 + b / A_2)."""
    a, b = 0.5, 0.7
    stiff = clamp("wall_a", 0), clamp("wall_b", L)
    bent = pulled([rod(a, 0.05), rod(b, 0.035)], *stiff, at=a)
    s1, s2 = a / area(0.05), b / area(0.035)
    agree(bent.results.case()["wall_a"].axial_force, -50e3 * s2 / (s1 + s2))
    agree(bent.results.case()["wall_b"].axial_force, -50e3 * s1 / (s1 + s2))
    agree(bent.station(a).u[0], 50e3 / E * s1 * s2 / (s1 + s2))


# ---- torsion


def test_hollow_and_stepped_shaft_in_torsion() -> None:
    """phi = sum of T L_i / (G I_p,i)."""
    bent = twisted([rod(0.4, 0.05), rod(0.3, 0.045, 0.03), rod(0.5, 0.03)], clamp("wall", 0), at=1.2)
    agree(bent.station(1.2).twist, T / G * (0.4 / polar(0.05) + 0.3 / polar(0.045, 0.03) + 0.5 / polar(0.03)))
    agree(bent.station(0.55).torque, T)


def test_tapered_shaft_in_torsion() -> None:
    """phi = 32 T L (d_B^2 + d_A d_B + d_A^2) / (3 pi G d_A^3 d_B^3)."""
    a, b = 0.06, 0.025
    bent = twisted([cone(L, a, b)], clamp("wall", 0), at=L)
    agree(bent.station(L).twist, 32 * T * L * (a**2 + a * b + b**2) / (3 * math.pi * G * a**3 * b**3))


def test_tapered_tube_in_torsion() -> None:
    """Bore and outside in one proportion m: the solid cone's twist over 1 - m^4 (own integration, same integral)."""
    a, b, m = 0.06, 0.025, 0.6
    ends = {"diameter": a, "end_diameter": b, "bore": m * a, "end_bore": m * b}
    tube = fs.Segment(length=text(L, "m"), **{key: text(value, "m") for key, value in ends.items()})
    solid = 32 * T * L * (a**2 + a * b + b**2) / (3 * math.pi * G * a**3 * b**3)
    agree(twisted([tube], clamp("wall", 0), at=L).station(L).twist, solid / (1 - m**4))


def test_shaft_in_torsion_between_walls() -> None:
    """Held at both ends, twisted between: T_A = T (L_B / I_pB) / (L_A / I_pA + L_B / I_pB)."""
    a, b = 0.45, 0.75
    bent = twisted([rod(a, 0.03), rod(b, 0.05, 0.02)], clamp("wall_a", 0), clamp("wall_b", L), at=a)
    s1, s2 = a / polar(0.03), b / polar(0.05, 0.02)
    agree(bent.results.case()["wall_a"].wrench[3], -T * s2 / (s1 + s2))
    agree(bent.results.case()["wall_b"].wrench[3], -T * s1 / (s1 + s2))
    agree(bent.station(a).twist, T / G * s1 * s2 / (s1 + s2))


def test_torque_spread_along_the_shaft() -> None:
    """Torque t per length on a cantilever: phi = t L^2 / (2 G I_p)."""
    load = fs.Force("torque", at=text(L / 2, "m"), couple={"axial": text(T, "N m")}, spread=text(L, "m"))
    bent = Plane(0).solve([rod(L, D)], clamp("wall", 0), load)
    agree(bent.station(L).twist, T * L / (2 * G * polar(D)))
    agree(bent.station(L / 4).torque, 0.75 * T)


# ---- beams with two moments of inertia, tapered beams

DOUBLE = D * 2**0.25  # twice the second moment


@both_planes
def test_cantilever_with_two_moments_of_inertia(plane: Plane) -> None:
    """2 I in the half at the wall, I in the free half: delta = 3 P L^3 / 16 E I, theta = 5 P L^2 / 16 E I."""
    bent = plane.solve([rod(L / 2, DOUBLE), rod(L / 2, D)], clamp("wall", 0), plane.force(L, P))
    agree(bent.y(L), 3 * P * L**3 / (16 * EI))
    agree(bent.slope(L), 5 * P * L**2 / (16 * EI))


@both_planes
def test_beam_with_a_thicker_middle_half(plane: Plane) -> None:
    """I, 2 I, I over L/4, L/2, L/4, load at the middle: delta = 3 P L^3 / 256 E I, theta = 5 P L^2 / 128 E I."""
    segments = [rod(L / 4, D), rod(L / 2, DOUBLE), rod(L / 4, D)]
    bent = plane.solve(segments, pin("a", 0), roller("b", L), plane.force(L / 2, P))
    agree(bent.y(L / 2), 3 * P * L**3 / (256 * EI))
    agree(bent.slope(0), 5 * P * L**2 / (128 * EI))


@both_planes
def test_conical_cantilever(plane: Plane) -> None:
    """Solid cone, d_A at the free end, d_B = r d_A at the wall, load P at the tip:

    delta = P L^3 / (3 E I_A r^3), theta = P L^2 (r + 2) / (6 E I_A r^3), from the integral of
    P x^2 / E I_A (1 + (r - 1) x/L)^4; with shear delta grows by 4 P L / (pi kappa G d_A d_B) at constant kappa
    (own integration, as in the problems on tapered cantilevers).
    """
    a, b, kappa = 0.03, 0.075, 0.9
    i_a, r = second_moment(a), b / a
    bending = P * L**3 / (3 * E * i_a * r**3)
    parts = clamp("wall", 0), plane.force(L, P)
    bent = plane.solve([cone(L, b, a)], *parts)
    agree(bent.y(L), bending)
    agree(bent.slope(L), P * L**2 * (r + 2) / (6 * E * i_a * r**3))
    sheared = plane.solve([cone(L, b, a)], *parts, shear=kappa)
    agree(sheared.y(L), bending + 4 * P * L / (math.pi * kappa * G * a * b))


@both_planes
def test_conical_cantilever_with_a_couple(plane: Plane) -> None:
    """The same cone under a couple: theta = C L (r^2 + r + 1) / 3 E I_A r^3, delta = C L^2 (r + 2) / 6 E I_A r^3."""
    a, b = 0.03, 0.075
    i_a, r = second_moment(a), b / a
    bent = plane.solve([cone(L, b, a)], clamp("wall", 0), plane.couple(L, C))
    agree(bent.slope(L), C * L * (r**2 + r + 1) / (3 * E * i_a * r**3))
    agree(bent.y(L), C * L**2 * (r + 2) / (6 * E * i_a * r**3))


# ---- tables of deflections and slopes


@both_planes
def test_two_supports_even_load(plane: Plane) -> None:
    """5 w L^4 / 384 E I; w L^3 / 24 E I."""
    bent = plane.solve([rod(L, D)], pin("a", 0), roller("b", L), plane.even(0, L, W))
    agree(bent.y(L / 2), 5 * W * L**4 / (384 * EI))
    agree(bent.slope(0), W * L**3 / (24 * EI))
    agree(bent.slope(L), -W * L**3 / (24 * EI))
    agree(bent.moment(L / 2), W * L**2 / 8)


@both_planes
def test_two_supports_load_on_a_part(plane: Plane) -> None:
    """w over the first a: theta_A = w a^2 (2L - a)^2 / 24 L E I, theta_B = w a^2 (2L^2 - a^2) / 24 L E I, y at a."""
    a = 0.45
    bent = plane.solve([rod(L, D)], pin("a", 0), roller("b", L), plane.even(0, a, W))
    agree(bent.slope(0), W * a**2 * (2 * L - a) ** 2 / (24 * L * EI))
    agree(bent.slope(L), -W * a**2 * (2 * L**2 - a**2) / (24 * L * EI))
    agree(bent.y(a), W * a**3 * (4 * L**2 - 7 * a * L + 3 * a**2) / (24 * L * EI))
    agree(-bent.reaction("b"), W * a**2 / (2 * L))


@both_planes
def test_two_supports_couple_at_one_end(plane: Plane) -> None:
    """theta = C L / 3 E I here, C L / 6 E I there; C L^2 / 16 E I at the middle."""
    bent = plane.solve([rod(L, D)], pin("a", 0), roller("b", L), plane.couple(0, C))
    agree(bent.slope(0), C * L / (3 * EI))
    agree(bent.slope(L), -C * L / (6 * EI))
    agree(bent.y(L / 2), C * L**2 / (16 * EI))


@both_planes
def test_overhang(plane: Plane) -> None:
    """Load at the tip of an overhang a: y = P a^2 (L + a) / 3 E I; the span rises P a L^2 / (9 sqrt(3) E I)."""
    a = 0.35
    bent = plane.solve([rod(L + a, D)], pin("a", 0), roller("b", L), plane.force(L + a, P))
    agree(bent.y(L + a), P * a**2 * (L + a) / (3 * EI))
    agree(bent.slope(L + a), P * a * (2 * L + 3 * a) / (6 * EI))
    agree(bent.slope(L), P * a * L / (3 * EI))
    agree(bent.y(L / math.sqrt(3)), -P * a * L**2 / (9 * math.sqrt(3) * EI))
    agree(bent.reaction("b"), -P * (L + a) / L)
    agree(bent.moment(L), -P * a)


@both_planes
def test_overhangs_at_both_ends_even_load(plane: Plane) -> None:
    """Even load over everything: middle w L^2 (5 L^2 - 24 a^2) / 384 E I, tips w a (3a^3 + 6a^2 L - L^3) / 24 E I."""
    a = 0.25
    whole = L + 2 * a
    bent = plane.solve([rod(whole, D)], pin("a", a), roller("b", a + L), plane.even(0, whole, W))
    agree(bent.y(whole / 2), W * L**2 * (5 * L**2 - 24 * a**2) / (384 * EI))
    agree(bent.y(0), W * a * (3 * a**3 + 6 * a**2 * L - L**3) / (24 * EI))
    agree(bent.y(whole), bent.y(0))
    agree(bent.moment(whole / 2), W * (L**2 / 8 - a**2 / 2))


@both_planes
def test_two_equal_loads(plane: Plane) -> None:
    """Loads P at a from each end: y = P a (3 L^2 - 4 a^2) / 24 E I at the middle, theta = P a (L - a) / 2 E I."""
    a = 0.4
    loads = plane.force(a, P, "one"), plane.force(L - a, P, "two")
    bent = plane.solve([rod(L, D)], pin("a", 0), roller("b", L), *loads)
    agree(bent.y(L / 2), P * a * (3 * L**2 - 4 * a**2) / (24 * EI))
    agree(bent.slope(0), P * a * (L - a) / (2 * EI))
    agree(bent.moment(L / 2), P * a)
    agree(bent.shear(L / 2), 0.0, within=1e-9)
