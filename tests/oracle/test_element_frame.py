"""The independent solution against closed forms, to 35 digits.

Sources, all from memory unless said otherwise:
Gere      Gere, Timoshenko: Mechanics of Materials, tables of beam deflections and chapters 2, 3, 9, 10.
Roark     Young, Budynas: Roark's Formulas for Stress and Strain, table 8.1.
Prz       Przemieniecki 1968: Theory of Matrix Structural Analysis, beam element with shear, Phi = 12 EI/(kGA L^2).
Cowper    Cowper 1966: The shear coefficient in Timoshenko's beam theory, J. Appl. Mech. 33.
unit load "unit load": the formula is worked out beside the test by the unit-load theorem (Gere, chapter 9).
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import replace
from decimal import Decimal

import pytest

from tests.oracle.digits import ZERO, Number, arctan, cos_sin, gauss_points, pi, working
from tests.oracle.element import integrals
from tests.oracle.element_frame import Case, Chain, Element, LooseChainError, Solution, Support, diagonal, solve_chain

D = Decimal
DIGITS = 35
INTEGRAL_DIGITS = 88
"""Integrals are exact to nearly the whole working precision, 60 + 36."""
CLAMP = (0, 1, 2, 3, 4, 5)
E, G, NU, RHO = D("2.06e11"), D("0.8e11"), D("0.3"), D("7850")
KAPPA = D("0.9")
L, DIA = D("0.37"), D("0.043")
P = D("1234.5")
SHEARS = [None, KAPPA]


@pytest.fixture(autouse=True)
def many_digits() -> Iterator[None]:
    with working(60):
        yield


def close(found: D, expected: Number, of: Number | None = None, digits: int = DIGITS) -> None:
    """Demand agreement to so many digits of the expected value, or of a given size."""
    expected = D(expected)
    size = abs(expected) if of is None else abs(D(of))
    assert abs(found - expected) <= size * D(10) ** -digits, (found, expected)


def alike(found: Sequence[D], expected: Sequence[Number], of: Number) -> None:
    """Demand the same of each component, against one size."""
    for value, wanted in zip(found, expected, strict=True):
        close(value, wanted, of)


def rod(length: D = L, diameter: D = DIA, shear: D | None = KAPPA, end_diameter: D | None = None) -> Element:
    return Element(length, diameter, E, G, end_diameter, shear=shear, poisson_ratio=NU, density=RHO)


def area(diameter: D = DIA, bore: D = ZERO) -> D:
    return pi() / 4 * (diameter**2 - bore**2)


def inertia(diameter: D = DIA, bore: D = ZERO) -> D:
    return pi() / 64 * (diameter**4 - bore**4)


def flex(shear: D | None, diameter: D = DIA) -> tuple[D, D]:
    """Give EI and the shear compliance 1/(kGA)."""
    return E * inertia(diameter), D(0) if shear is None else 1 / (shear * G * area(diameter))


def run(elements: Sequence[Element], supports: Sequence[Support], *cases: Case) -> Solution:
    return solve_chain(Chain(elements, supports, cases), 40)


def six(component: int, value: Number) -> list[Number]:
    load: list[Number] = [0] * 6
    load[component] = value
    return load


def pinned(node: int, *more: int) -> Support:
    return Support(node, rigid=(1, 2, *more))


# ---------------------------------------------------------------- the arithmetic itself


def test_pi_sines_arctangent() -> None:
    """Source: 50 digits of pi (OEIS A000796, from memory); cos 60 = 1/2; sin 45 = sqrt(1/2); tan 15 = 2 - sqrt 3."""
    close(pi(), "3.14159265358979323846264338327950288419716939937510")
    close(cos_sin(60)[0], "0.5")
    close(cos_sin(-315)[1], D("0.5").sqrt())
    close(cos_sin(90)[1], 1)
    close(arctan(2 - D(3).sqrt()), pi() / 12)


@pytest.mark.parametrize("count", [5, 48])
def test_gauss_rule_is_exact_to_its_degree_and_no_further(count: int) -> None:
    """Source: definition of Gauss-Legendre, degree 2n - 1; error of degree 2n: (n!)^4 / ((2n+1) ((2n)!)^2)."""
    points = gauss_points(count, 96)
    for degree in range(2 * count):
        close(sum((w * x**degree for x, w in points), D(0)), 1 / D(degree + 1))
    error = 1 / D(2 * count + 1)
    for k in range(1, count + 1):
        error *= (D(k) / (count + k)) ** 2
    beyond = 1 / D(2 * count + 1) - sum((w * x ** (2 * count) for x, w in points), D(0))
    assert abs(beyond / error - 1) < D("1e-20")


# ---------------------------------------------------------------- one cylinder, clamped at its left end


@pytest.mark.parametrize("shear", SHEARS)
def test_cantilever_end_loads(shear: D | None) -> None:
    """Source: Gere tables (P L^3/3EI, P L^2/2EI, M L^2/2EI, M L/EI, N L/EA, T L/GJ); P L/kGA: unit load.

    Also fixes each sign: dv/dx = +theta_z, dw/dx = -theta_y.
    """
    ei, s = flex(shear)
    ea, gj = E * area(), 2 * G * inertia()
    solution = run([rod(shear=shear)], [Support(0, rigid=CLAMP)], *[Case({1: six(i, P)}) for i in range(6)])
    bent, turned, ended = P * L**3 / (3 * ei) + P * L * s, P * L**2 / (2 * ei), P * L / ei
    expected: list[list[Number]] = [
        six(0, P * L / ea),
        [0, bent, 0, 0, 0, turned],
        [0, 0, bent, 0, -turned, 0],
        six(3, P * L / gj),
        [0, 0, -turned, 0, ended, 0],
        [0, turned, 0, 0, 0, ended],
    ]
    for i in range(6):
        alike(solution.u[i][1], expected[i], ended)
    # Reactions on the shaft, section forces on the +x face (statics).
    alike(solution.reactions[1][0], [0, -P, 0, 0, 0, -P * L], P)
    alike(solution.reactions[2][0], [0, 0, -P, 0, P * L, 0], P)
    alike(solution.start[1][0], [0, P, 0, 0, 0, P * L], P)
    alike(solution.end[2][0], [0, 0, P, 0, 0, 0], P)


@pytest.mark.parametrize("shear", SHEARS)
def test_cantilever_uniform_loads(shear: D | None) -> None:
    """Source: Gere tables, q L^4/8EI, q L^3/6EI, n L^2/2EA, t L^2/2GJ; q L^2/2kGA and couples m: unit load."""
    ei, s = flex(shear)
    q = P
    solution = run([rod(shear=shear)], [Support(0, rigid=CLAMP)], *[Case(spread={0: six(i, q)}) for i in range(6)])
    u = [case[1] for case in solution.u]
    close(u[0][0], q * L**2 / (2 * E * area()))
    close(u[1][1], q * L**4 / (8 * ei) + q * L**2 * s / 2)
    close(u[1][5], q * L**3 / (6 * ei))
    close(u[2][2], q * L**4 / (8 * ei) + q * L**2 * s / 2)
    close(u[2][4], -q * L**3 / (6 * ei))
    close(u[3][3], q * L**2 / (4 * G * inertia()))
    # M(x) = m (L - x): theta = m L^2/2EI, v = int M (L - x)/EI = m L^3/3EI
    close(u[4][4], q * L**2 / (2 * ei))
    close(u[4][2], -q * L**3 / (3 * ei))
    close(u[5][5], q * L**2 / (2 * ei))
    close(u[5][1], q * L**3 / (3 * ei))
    close(solution.reactions[1][0][5], -q * L**2 / 2)
    close(solution.reactions[2][0][4], q * L**2 / 2)
    close(solution.reactions[5][0][5], -q * L)


def test_own_weight_of_a_cylinder() -> None:
    """Source: Gere: hanging bar rho g L^2/2E; cantilever under q = rho g A as above."""
    g = D("9.81")
    solution = run([rod()], [Support(0, rigid=CLAMP)], Case(gravity=(g, 0, 0)), Case(gravity=(0, -g, g)))
    ei, s = flex(KAPPA)
    q = RHO * g * area()
    close(solution.u[0][1][0], RHO * g * L**2 / (2 * E))
    close(solution.u[1][1][1], -q * L**4 / (8 * ei) - q * L**2 * s / 2)
    close(solution.u[1][1][2], q * L**4 / (8 * ei) + q * L**2 * s / 2)
    close(solution.u[1][1][5], -q * L**3 / (6 * ei))


@pytest.mark.parametrize("bore", ["0", "0.01", "0.0425"])
def test_shear_coefficient_of_a_round_tube(bore: str) -> None:
    """Source: Cowper 1966, table 1, m = bore/diameter."""
    m2 = (D(bore) / DIA) ** 2
    kappa = 6 * (1 + NU) * (1 + m2) ** 2 / ((7 + 6 * NU) * (1 + m2) ** 2 + (20 + 12 * NU) * m2)
    element = Element(L, DIA, E, G, bore=D(bore), poisson_ratio=NU)
    close(integrals(element).shear[0], L / (kappa * G * area(DIA, D(bore))))


def test_shear_coefficient_of_solid_and_thin_round() -> None:
    """Source: Cowper 1966: solid 6(1+nu)/(7+6nu), thin tube 2(1+nu)/(4+3nu)."""
    solid = integrals(Element(1, 1, E, G, poisson_ratio=NU)).shear[0] * G * area(D(1))
    close(1 / solid, 6 * (1 + NU) / (7 + 6 * NU))
    bore = 1 - D("1e-20")
    thin = integrals(Element(1, 1, E, G, bore=bore, poisson_ratio=NU)).shear[0] * G * area(D(1), bore)
    assert abs(1 / thin - 2 * (1 + NU) / (4 + 3 * NU)) < D("1e-19")


# ---------------------------------------------------------------- beams on two and three supports


@pytest.mark.parametrize("shear", SHEARS)
@pytest.mark.parametrize("plane", [1, 2])
def test_simply_supported_load_anywhere(shear: D | None, plane: int) -> None:
    """Source: Gere tables: v = P a^2 b^2/3EIL, theta_A = P a b (L + b)/6EIL; shear P a b/(kGA L): unit load."""
    a, b = L * D("0.3"), L * D("0.7")
    ei, s = flex(shear)
    supports = [pinned(0, 0, 3), pinned(2)]
    solution = run([rod(a, shear=shear), rod(b, shear=shear)], supports, Case({1: six(plane, P)}))
    turn, sign = (5, 1) if plane == 1 else (4, -1)
    u = solution.u[0]
    close(u[1][plane], P * a**2 * b**2 / (3 * ei * L) + P * a * b / L * s)
    close(u[0][turn], sign * (P * a * b * (L + b) / (6 * ei * L)))
    close(u[2][turn], -sign * (P * a * b * (L + a) / (6 * ei * L)))
    close(solution.reactions[0][0][plane], -P * b / L)
    close(solution.reactions[0][1][plane], -P * a / L)


def test_simply_supported_couple_anywhere() -> None:
    """Source: Gere/Roark table 8.1 (3e): v at the couple = M a b (b - a)/3EIL in size, R = M/L."""
    a, b = L * D("0.3"), L * D("0.7")
    supports = [pinned(0, 0, 3), pinned(2)]
    solution = run([rod(a, shear=None), rod(b, shear=None)], supports, Case({1: six(5, P)}))
    close(solution.u[0][1][1], P * a * b * (b - a) / (3 * E * inertia() * L))
    close(solution.reactions[0][0][1], P / L)
    close(solution.reactions[0][1][1], -P / L)


@pytest.mark.parametrize("shear", SHEARS)
def test_simply_supported_uniform_load(shear: D | None) -> None:
    """Source: Gere tables: 5 q L^4/384EI, q L^3/24EI; shear q L^2/8kGA: unit load."""
    ei, s = flex(shear)
    half = rod(L / 2, shear=shear)
    solution = run([half, half], [pinned(0, 0, 3), pinned(2)], Case(spread={0: six(1, P), 1: six(1, P)}))
    close(solution.u[0][1][1], 5 * P * L**4 / (384 * ei) + P * L**2 / 8 * s)
    close(solution.u[0][0][5], P * L**3 / (24 * ei))
    close(solution.end[0][0][5], -P * L**2 / 8)


@pytest.mark.parametrize("shear", SHEARS)
def test_clamped_at_both_ends_uniform_load(shear: D | None) -> None:
    """Source: Gere tables: q L^4/384EI, end moments q L^2/12; shear q L^2/8kGA by symmetry: unit load."""
    ei, s = flex(shear)
    half = rod(L / 2, shear=shear)
    supports = [Support(0, rigid=CLAMP), Support(2, rigid=CLAMP)]
    solution = run([half, half], supports, Case(spread={0: six(1, P), 1: six(1, P)}))
    close(solution.u[0][1][1], P * L**4 / (384 * ei) + P * L**2 / 8 * s)
    close(solution.reactions[0][0][5], -P * L**2 / 12)
    close(solution.reactions[0][1][5], P * L**2 / 12)
    close(solution.end[0][0][5], -P * L**2 / 24)


def test_clamped_at_both_ends_load_anywhere() -> None:
    """Source: Gere tables: M_A = P a b^2/L^2, R_A = P b^2 (3a + b)/L^3, v = P a^3 b^3/(3EI L^3)."""
    a, b = L * D("0.3"), L * D("0.7")
    supports = [Support(0, rigid=CLAMP), Support(2, rigid=CLAMP)]
    solution = run([rod(a, shear=None), rod(b, shear=None)], supports, Case({1: six(1, P)}))
    close(solution.u[0][1][1], P * a**3 * b**3 / (3 * E * inertia() * L**3))
    close(solution.reactions[0][0][1], -P * b**2 * (3 * a + b) / L**3)
    close(solution.reactions[0][0][5], -P * a * b**2 / L**2)
    close(solution.reactions[0][1][5], P * a**2 * b / L**2)


@pytest.mark.parametrize("shear", SHEARS)
def test_propped_uniform_load(shear: D | None) -> None:
    """Source: Gere tables: R = 3 q L/8 without shear; with shear R = (qL^4/8EI + qL^2 s/2)/(L^3/3EI + L s)."""
    ei, s = flex(shear)
    solution = run([rod(shear=shear)], [Support(0, rigid=CLAMP), pinned(1)], Case(spread={0: six(1, P)}))
    prop = P * (L**4 / (8 * ei) + L**2 * s / 2) / (L**3 / (3 * ei) + L * s)
    close(solution.reactions[0][1][1], -prop)
    close(solution.reactions[0][0][5], -(P * L**2 / 2 - prop * L))
    if shear is None:
        close(prop, 3 * P * L / 8)


def test_propped_load_in_the_middle() -> None:
    """Source: Gere tables: prop 5P/16, clamp 3PL/16, v = 7PL^3/768EI."""
    half = rod(L / 2, shear=None)
    solution = run([half, half], [Support(0, rigid=CLAMP), pinned(2)], Case({1: six(2, P)}))
    close(solution.reactions[0][1][2], -5 * P / 16)
    close(solution.reactions[0][0][4], 3 * P * L / 16)
    close(solution.u[0][1][2], 7 * P * L**3 / (768 * E * inertia()))


def test_three_supports_unequal_spans_and_settlement() -> None:
    """Source: Clapeyron's theorem of three moments (Gere, chapter 10 of older editions).

    2 M (L1 + L2) = -q1 L1^3/4 - q2 L2^3/4 + 6EI d (1/L1 + 1/L2), d the middle support's movement along v.
    """
    l1, l2, q1, q2, d = L, D("0.21"), P, D("777"), D("1e-4")
    supports = [pinned(0, 0, 3), Support(1, rigid=(1, 2), offset=(0, d, 0, 0, 0, 0)), pinned(2)]
    case = Case(spread={0: six(1, -q1), 1: six(1, -q2)})
    solution = run([rod(l1, shear=None), rod(l2, shear=None)], supports, case)
    settled = 6 * E * inertia() * d * (1 / l1 + 1 / l2)
    moment = (-q1 * l1**3 / 4 - q2 * l2**3 / 4 - settled) / (2 * (l1 + l2))
    close(solution.end[0][0][5], moment)
    close(solution.u[0][1][1], d)
    close(solution.reactions[0][0][1], q1 * l1 / 2 + moment / l1)


@pytest.mark.parametrize("shear", SHEARS)
def test_moved_and_turned_clamps(shear: D | None) -> None:
    """Source: Prz: 12EI/(L^3 (1+Phi)), 6EI/(L^2 (1+Phi)), (4+Phi)EI/(L (1+Phi)), (2-Phi)EI/(L (1+Phi))."""
    ei, s = flex(shear)
    phi = 12 * ei * s / L**2
    for component, value in ((1, D("1e-3")), (5, D("2e-3"))):
        moved = Support(1, rigid=CLAMP, offset=six(component, value))
        solution = run([rod(shear=shear)], [Support(0, rigid=CLAMP), moved], Case())
        left, right = solution.reactions[0]
        if component == 1:
            close(right[1], 12 * ei * value / (L**3 * (1 + phi)))
            close(right[5], -6 * ei * value / (L**2 * (1 + phi)))
            close(left[5], right[5])
        else:
            close(right[5], (4 + phi) * ei * value / (L * (1 + phi)))
            close(left[5], (2 - phi) * ei * value / (L * (1 + phi)))
            close(right[1], -6 * ei * value / (L**2 * (1 + phi)))


# ---------------------------------------------------------------- steps and cones


def test_stepped_cantilever() -> None:
    """Source: unit load: P (l1^3/3EI1 + ((l1+l2)^3 - l1^3)/3EI2) + shear, l1 the free part."""
    l1, l2, d1, d2 = D("0.21"), D("0.002"), D("0.005"), D("0.2")
    solution = run([rod(l2, d2), rod(l1, d1)], [Support(0, rigid=CLAMP)], Case({2: [P, P, 0, P, 0, 0]}))
    (ei1, s1), (ei2, s2) = flex(KAPPA, d1), flex(KAPPA, d2)
    bent = P * (l1**3 / (3 * ei1) + ((l1 + l2) ** 3 - l1**3) / (3 * ei2) + l1 * s1 + l2 * s2)
    close(solution.u[0][2][1], bent)
    close(solution.u[0][2][0], P / E * (l1 / area(d1) + l2 / area(d2)))
    close(solution.u[0][2][3], P / (2 * G) * (l1 / inertia(d1) + l2 / inertia(d2)))


@pytest.mark.parametrize(("tip", "root"), [("0.043", "0.086"), ("0.04", "0.041"), ("0.2", "0.006")])
def test_solid_cone_cantilever(tip: str, root: str) -> None:
    """Source: N: 4PL/(pi E d1 d2), T: 32TL(d1^2+d1d2+d2^2)/(3 pi G d1^3 d2^3) (Gere, chapters 2 and 3).

    Tip force: P L^3/(3 E I_root) d_root/d_tip (direct integration; for d_root = 2 d_tip it is P L^3/(24 E I_tip),
    Gere, chapter 9), slope 32 P L^2 (2 d_tip + d_root)/(3 pi E d_tip^2 d_root^3) likewise, shear 4PL/(pi k G d1 d2).
    """
    d1, d2 = D(tip), D(root)
    element = rod(diameter=d2, end_diameter=d1)
    solution = run([element], [Support(0, rigid=CLAMP)], Case({1: [P, P, 0, P, 0, 0]}), Case({1: six(5, P)}))
    u, turned = solution.u[0][1], solution.u[1][1]
    q = d1**2 + d1 * d2 + d2**2
    close(u[0], 4 * P * L / (pi() * E * d1 * d2))
    close(u[3], 32 * P * L * q / (3 * pi() * G * d1**3 * d2**3))
    close(u[1], P * L**3 / (3 * E * inertia(d2)) * d2 / d1 + 4 * P * L / (pi() * KAPPA * G * d1 * d2))
    close(u[5], 32 * P * L**2 * (2 * d1 + d2) / (3 * pi() * E * d1**2 * d2**3))
    close(turned[1], u[5])
    close(turned[5], 64 * P * L * q / (3 * pi() * E * d1**3 * d2**3))


def test_cone_under_its_own_weight() -> None:
    """Source: direct integration with s the distance to the cone's apex, A = A2 s^2/s2^2, I = I2 s^4/s2^4.

    Weight beyond s: (s^3 - s1^3)/3; moment: s^4/12 - s s1^3/3 + s1^4/4 (times rho g A2/s2^2).
    """
    d1, d2, g = D("0.03"), D("0.08"), D("9.81")
    s1, s2 = L * d1 / (d2 - d1), L * d2 / (d2 - d1)
    element = rod(diameter=d2, end_diameter=d1, shear=None)
    solution = run([element], [Support(0, rigid=CLAMP)], Case(gravity=(g, 0, 0)), Case(gravity=(0, 0, -g)))
    close(solution.u[0][1][0], RHO * g / (3 * E) * ((s2**2 - s1**2) / 2 + s1**3 / s2 - s1**2))
    factor = RHO * g * area(d2) * s2**2 / (E * inertia(d2))

    def power(n: int) -> D:
        return (s2 ** (n + 1) - s1 ** (n + 1)) / (n + 1)

    theta = factor * (power(0) / 12 - s1**3 * power(-3) / 3 + s1**4 * power(-4) / 4)
    moved = factor * (power(1) / 12 - s1**3 * power(-2) / 3 + s1**4 * power(-3) / 4) - s1 * theta
    close(solution.u[1][1][4], theta)
    close(solution.u[1][1][2], -moved)
    volume = pi() * L / 12 * (d1**2 + d1 * d2 + d2**2)
    close(solution.reactions[1][0][2], RHO * g * volume)


@pytest.mark.parametrize("ratio", ["0.3", "0.85", "0.999"])
def test_cone_with_a_bore_in_proportion(ratio: str) -> None:
    """Source: A and I are those of the solid cone times 1 - m^2 and 1 - m^4; Cowper's kappa is constant."""
    m, d1, d2 = D(ratio), D("0.05"), D("0.11")
    bored = integrals(Element(L, d1, E, G, d2, bore=m * d1, end_bore=m * d2, poisson_ratio=NU, density=RHO))
    solid = integrals(Element(L, d1, E, G, d2, shear=1, density=RHO))
    kappa = 6 * (1 + NU) * (1 + m**2) ** 2 / ((7 + 6 * NU) * (1 + m**2) ** 2 + (20 + 12 * NU) * m**2)
    for k in range(4):
        close(bored.bend[k], solid.bend[k] / (1 - m**4), digits=INTEGRAL_DIGITS)
    for k in range(2):
        close(bored.stretch[k], solid.stretch[k] / (1 - m**2), digits=INTEGRAL_DIGITS)
        close(bored.twist[k], solid.twist[k] / (1 - m**4), digits=INTEGRAL_DIGITS)
        close(bored.shear[k], solid.shear[k] / (1 - m**2) / kappa, digits=INTEGRAL_DIGITS)
    close(bored.mass, solid.mass * (1 - m**2), digits=INTEGRAL_DIGITS)
    close(bored.own_rotation, solid.own_rotation * (1 - m**2) / (1 - m**4), digits=INTEGRAL_DIGITS)
    close(bored.own_stretch, solid.own_stretch, digits=INTEGRAL_DIGITS)


@pytest.mark.parametrize("bore", ["0.01", "0.0425", "0.0499"])
def test_cone_with_a_straight_bore(bore: str) -> None:
    """Source: direct integration: int dd/(d^2-b^2) = ln((d-b)/(d+b))/2b, int dd/(d^4-b^4) = that/2b^2 - atan(d/b)/2b^3.

    Integrals of d dd/(d^4-b^4) = ln((d^2-b^2)/(d^2+b^2))/4b^2 give the bending's first moment.
    """
    b, d1, d2 = D(bore), D("0.05"), D("0.11")
    found = integrals(Element(L, d1, E, G, d2, bore=b, shear=KAPPA))
    slope = (d2 - d1) / L
    logs = (((d2 - b) / (d2 + b)).ln() - ((d1 - b) / (d1 + b)).ln()) / (2 * b)
    angle = 2 * arctan_any((d2 - d1) * b / (b**2 + d1 * d2))
    stretch = 4 / (pi() * E * slope) * logs
    bend0 = 64 / (pi() * E * slope) * (logs / (2 * b**2) - angle / 2 / (2 * b**3))
    rise = (((d2**2 - b**2) / (d2**2 + b**2)).ln() - ((d1**2 - b**2) / (d1**2 + b**2)).ln()) / (4 * b**2)
    close(found.stretch[0], stretch, digits=INTEGRAL_DIGITS)
    close(found.shear[0], stretch * E / (G * KAPPA), digits=INTEGRAL_DIGITS)
    close(found.bend[0], bend0, digits=INTEGRAL_DIGITS)
    close(found.twist[0], bend0 * E / (2 * G), digits=INTEGRAL_DIGITS)
    # y = (d2 - d)/slope
    close(found.bend[1], (d2 * bend0 - 64 / (pi() * E * slope) * rise) / slope, digits=INTEGRAL_DIGITS)


def arctan_any(x: D) -> D:
    """Give the arctangent of x in 0..1 by halving: atan x = 2 atan(x/(1 + sqrt(1 + x^2)))."""
    return 2 * arctan(x / (1 + (1 + x * x).sqrt()))


# ---------------------------------------------------------------- torsion, stretch, springs, load centres


def test_torque_and_thrust_between_two_clamps() -> None:
    """Source: Gere, chapters 2 and 3: shares go with the other part's compliance."""
    a, b, d1, d2 = D("0.1"), D("0.25"), D("0.03"), D("0.05")
    supports = [Support(0, rigid=CLAMP), Support(2, rigid=CLAMP)]
    solution = run([rod(a, d1), rod(b, d2)], supports, Case({1: [P, 0, 0, P, 0, 0]}))
    for component, ca, cb in ((3, a / inertia(d1), b / inertia(d2)), (0, a / area(d1), b / area(d2))):
        close(solution.reactions[0][0][component], -P * cb / (ca + cb))
        close(solution.reactions[0][1][component], -P * ca / (ca + cb))
    close(solution.u[0][1][0], P / E / (area(d1) / a + area(d2) / b))


def test_overhang_on_two_springs() -> None:
    """Source: Gere tables (overhang P c^2 (L+c)/3EI) plus the rigid movement on the springs (statics)."""
    c, k1, k2 = D("0.12"), D("3e7"), D("4e6")
    ei, s = flex(KAPPA)
    supports = [
        Support(0, rigid=(0, 3), spring=diagonal(0, k1, k1, 0, 0, 0)),
        Support(1, spring=diagonal(0, k2, k2, 0, 0, 0)),
    ]
    solution = run([rod(), rod(c)], supports, Case({2: six(1, P)}))
    r1, r2 = P * c / L, -P * (L + c) / L
    v1, v2 = -r1 / k1, -r2 / k2
    # unit load for shear: V = -r1 in the span, V = P beyond
    bent = P * c**2 * (L + c) / (3 * ei) + P * c**2 / L * s + P * c * s
    close(solution.reactions[0][0][1], r1)
    close(solution.reactions[0][1][1], r2)
    close(solution.u[0][0][1], v1)
    close(solution.u[0][2][1], bent + v1 + (v2 - v1) * (L + c) / L)


def test_bearing_on_a_seat_is_two_springs_in_series() -> None:
    """Source: compliances in series add; where the seat is rigid or the tie is rigid, the other one is left."""
    k = [D("1e7"), D("2e8"), D("3e8"), D(0), D("1e4"), D("2e4")]
    seat = [D("5e6"), D("1e8"), D("1e7"), D(0), D("3e4"), D(0)]
    load = [P, 2 * P, 3 * P, D(0), D(7), D(11)]
    support = Support(0, rigid=(3,), spring=diagonal(*k), seat=diagonal(*seat), seat_rigid=(3, 5))
    solution = run([rod()], [support], Case({0: load}))
    for i, (part, give) in enumerate(zip(k, seat, strict=True)):
        if i == 3:
            continue
        compliance = 1 / part + (1 / give if give else 0)
        close(solution.u[0][0][i], load[i] * compliance)
        close(solution.seats[0][0][i], load[i] / give if give else 0, load[i] * compliance)
        close(solution.reactions[0][0][i], -load[i])
    tied = Support(0, rigid=CLAMP, seat=diagonal(*seat), seat_rigid=(3, 5))
    solution = run([rod()], [tied], Case({0: load}))
    moved = [load[i] / seat[i] if i not in (3, 5) else D(0) for i in range(6)]
    alike(solution.u[0][0], moved, moved[0])
    alike(solution.seats[0][0], moved, moved[0])


def test_full_spring_matrix() -> None:
    """Source: u = K^-1 F for a free shaft on one spring; K = A'DA with A unit triangular, so u is back-substitution."""
    lower = [[D((3 * i + 5 * j) % 7 - 3) / 4 if j > i else D(i == j) for j in range(6)] for i in range(6)]
    d = [D("1e7"), D("2e8"), D("3e8"), D("5e5"), D("1e5"), D("2e5")]
    k = [[sum((lower[m][i] * d[m] * lower[m][j] for m in range(6)), D(0)) for j in range(6)] for i in range(6)]
    u = [D(i + 1) / 1000 for i in range(6)]
    force = [sum((k[i][j] * u[j] for j in range(6)), D(0)) for i in range(6)]
    solution = run([rod()], [Support(1, spring=k)], Case({1: force}))
    alike(solution.u[0][1], u, u[0])
    alike(solution.u[0][0], [u[0], u[1] - L * u[5], u[2] + L * u[4], *u[3:]], u[0])


def test_load_centres_shift_the_reactions() -> None:
    """Source: statics of a beam on two points at dx1 and L + dx2, load in the middle of the shaft."""
    dx1, dx2 = D("-0.011"), D("0.023")
    half = rod(L / 2)
    supports = [Support(0, dx=dx1, rigid=(0, 1, 2, 3)), Support(2, dx=dx2, rigid=(1, 2))]
    solution = run([half, half], supports, Case({1: [0, P, 2 * P, 0, 0, 0]}))
    base = L + dx2 - dx1
    for component, load in ((1, P), (2, 2 * P)):
        close(solution.reactions[0][0][component], -load * (L / 2 + dx2) / base)
        close(solution.reactions[0][1][component], -load * (L / 2 - dx1) / base)
    first, last = solution.u[0][0], solution.u[0][2]
    size = max(map(abs, first))
    close(first[1] + dx1 * first[5], 0, size)
    close(first[2] - dx1 * first[4], 0, size)
    close(last[1] + dx2 * last[5], 0, size)
    close(last[2] - dx2 * last[4], 0, size)
    # the shaft's end takes the reaction as a force and a couple
    close(solution.start[0][0][5], -dx1 * solution.reactions[0][0][1])
    close(solution.start[0][0][4], dx1 * solution.reactions[0][0][2])


@pytest.mark.parametrize("kind", ["pin", "bearing", "bearing on a seat", "pin on a seat"])
def test_bores_out_of_line_move_a_determinate_shaft_rigidly(kind: str) -> None:
    """Source: a statically determinate beam takes moved supports without force."""
    a, b = D("1e-4"), D("-3e-4")
    hold = Support(
        0,
        rigid=(1, 2) if "pin" in kind else (),
        spring=diagonal(0, D("1e8"), D("1e7"), 0, 0, 0) if "bearing" in kind else None,
        seat=diagonal(0, D("1e6"), D("1e9"), 0, 0, 0) if "seat" in kind else None,
        seat_rigid=(0, 3, 4, 5),
    )
    supports = [
        replace(hold, offset=(0, a, b, 0, 0, 0)),
        replace(hold, node=1, offset=(0, b, a, 0, 0, 0)),
        Support(0, rigid=(0, 3)),
    ]
    solution = run([rod(), rod()], supports, Case())
    close(solution.u[0][2][1], b + (b - a))
    close(solution.u[0][2][2], a + (a - b))
    close(solution.u[0][0][5], (b - a) / L)
    close(solution.u[0][0][4], -(a - b) / L)
    alike(solution.seats[0][1], [0, b, a, 0, 0, 0], a)
    for reaction in solution.reactions[0]:
        alike(reaction, [0] * 6, 1)


# ---------------------------------------------------------------- free motions


@pytest.mark.parametrize(
    "supports",
    [
        [pinned(0, 3), pinned(1)],
        [pinned(0, 0), pinned(1)],
        [pinned(0, 0, 3)],
        [Support(0, rigid=(0, 3, 4, 5))],
        [Support(0, dx=L / 3, rigid=(0, 1, 2, 3)), Support(1, dx=-2 * L / 3, rigid=(1, 2))],
        [Support(0, rigid=(0, 3), spring=diagonal(0, 1, 1, 0, 0, 0)), Support(1, spring=diagonal(0, 1, 0, 0, 0, 0))],
    ],
    ids=["axial", "spin", "tilt", "across", "same load centre", "one plane"],
)
def test_free_motion_is_refused(supports: Sequence[Support]) -> None:
    """Source: rank of the supports on the six rigid motions."""
    with pytest.raises(LooseChainError):
        run([rod(), rod(D("0.011"), D("0.2"))], supports, Case({1: six(1, P)}))


def test_soft_supports_are_no_free_motion() -> None:
    """Source: statics; 1 N/m under a shaft of 1e13 N/m still leaves the digits asked for."""
    supports = [replace(s, spring=diagonal(*[1] * 6)) for s in (Support(0), Support(1))]
    solution = run([rod(D("0.002"), D("0.2"))], supports, Case({0: six(0, 1)}))
    total = solution.reactions[0][0][0] + solution.reactions[0][1][0]
    close(total, -1)
