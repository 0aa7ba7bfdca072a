"""W. C. Young & R. G. Budynas, Roark's Formulas for Stress and Strain, 7th ed., McGraw-Hill 2002.

Table 8.1, "Shear, moment, slope, and deflection formulas for elastic straight beams". All formulas are from memory
unless a check says otherwise. Cases CF.. are those of beams.toml, the others our own choice. Slender theory, so
shear = "none".

Tolerances: closed forms 1e-9 (the answers agree to some 1e-14); figures of beams.toml half a unit of their ninth
digit; where a table prints fewer digits, half a unit of its last one.
"""

from __future__ import annotations

import math

import numpy as np

import fe_shaft as fs
from tests.evidence.plane import E, Plane, both_planes, clamp, guide, pin, rod, roller, second_moment
from tests.evidence.published import CASES, NINE_DIGITS, agree, text

D, L, P, W, C, A = 0.04, 1.0, 1000.0, 1000.0, 100.0, 0.3
B = L - A
EI = E * second_moment(D)
BEAM = [rod(L, D)]


def given(name: str, **numbers: float) -> None:
    """The constants above are what the case states."""
    case = CASES[name]
    for key, number in {"E": E, "d": D, "L": L, **numbers}.items():
        agree(number, case.given(key), rel=0.0)


@both_planes
def test_cf03_couple_between_two_supports(plane: Plane) -> None:
    given("CF03_couple_interior", a=A, M0=C)
    case = CASES["CF03_couple_interior"]
    bent = plane.solve(BEAM, pin("end_a", 0), roller("end_b", L), plane.couple(A, C))
    # Size at the couple C a (L - a)(2 a - L) / (3 E I L): a web page. Sign: a couple that turns x towards y, a < L/2.
    agree(bent.y(A), C * A * (L - A) * (L - 2 * A) / (3 * EI * L))
    agree(bent.y(A), case.printed("y_at_couple_abs"), rel=NINE_DIGITS)
    # End slopes: Roark Table 8.1 case 3e, from memory.
    agree(bent.slope(0), C * (2 * L**2 - 6 * A * L + 3 * A**2) / (6 * EI * L))
    agree(bent.slope(L), -C * (L**2 - 3 * A**2) / (6 * EI * L))
    agree(bent.slope(0), case.printed("theta_A_abs"), rel=NINE_DIGITS)
    agree(-bent.slope(L), case.printed("theta_B_abs"), rel=NINE_DIGITS)
    # Statics of a couple between two supports.
    agree(bent.reaction("end_a"), case.printed("R_abs"))
    agree(bent.reaction("end_b"), -case.printed("R_abs"))


@both_planes
def test_cf04_propped_cantilever_load_at_the_middle(plane: Plane) -> None:
    """Roark Table 8.1 (supported at one end, fixed at the other) and AISC, from memory."""
    given("CF04_propped_centre", P=P)
    case = CASES["CF04_propped_centre"]
    bent = plane.solve(BEAM, roller("prop", 0), clamp("wall", L), plane.force(L / 2, P))
    agree(bent.reaction("prop"), -case.printed("R_pin"))  # 5 P / 16
    agree(bent.reaction("wall"), -case.printed("R_fix"))  # 11 P / 16
    agree(bent.moment(L), -case.printed("M_fix"))  # 3 P L / 16
    agree(abs(bent.couple("wall")), case.printed("M_fix"))
    agree(bent.y(L / 2), 7 * P * L**3 / (768 * EI))
    agree(bent.y(L / 2), case.printed("y_load"), rel=NINE_DIGITS)
    # Largest at L / sqrt(5) from the prop: P L^3 / (48 sqrt(5) E I), from memory; the section stands straight there.
    agree(bent.y(L / math.sqrt(5)), P * L**3 / (48 * math.sqrt(5) * EI))
    agree(bent.y(L / math.sqrt(5)), case.printed("y_max"), rel=NINE_DIGITS)
    agree(bent.slope(L / math.sqrt(5)), 0.0, within=1e-12)
    # Printed coefficient 0.009317 P L^3 / (E I), AISC, from memory: six decimals.
    agree(bent.y(L / math.sqrt(5)) * EI / (P * L**3), 0.009317, within=0.5e-6)


@both_planes
def test_cf05_propped_cantilever_even_load(plane: Plane) -> None:
    """Roark Table 8.1 and AISC, from memory."""
    given("CF05_propped_udl", w=W)
    case = CASES["CF05_propped_udl"]
    bent = plane.solve(BEAM, roller("prop", 0), clamp("wall", L), plane.even(0, L, W))
    agree(bent.reaction("prop"), -case.printed("R_pin"))  # 3 w L / 8
    agree(bent.moment(L), -case.printed("M_fix"))  # w L^2 / 8
    # The printed divisor 185 stands for 184.6 (y_max at 0.4215 L): 0.2 %, as beams.toml says.
    y, _ = bent.line(np.linspace(0, L, 2001))
    agree(float(y.max()), case.printed("y_max"), rel=0.002)
    agree(L * float(y.argmax()) / 2000, 0.4215 * L, within=0.0005)
    # y(x) = w x (L^3 - 3 L x^2 + 2 x^3) / (48 E I), from memory.
    agree(bent.y(0.37), W * 0.37 * (L**3 - 3 * L * 0.37**2 + 2 * 0.37**3) / (48 * EI))
    agree(bent.slope(0), W * L**3 / (48 * EI))


@both_planes
def test_cf06_clamped_ends_load_anywhere(plane: Plane) -> None:
    """Roark Table 8.1 case 1d and AISC, from memory."""
    given("CF06_fixed_fixed_offcentre", P=P, a=A)
    case = CASES["CF06_fixed_fixed_offcentre"]
    bent = plane.solve(BEAM, clamp("end_a", 0), guide("end_b", L), plane.force(A, P))
    agree(bent.moment(0), -case.printed("M_A"))  # P a b^2 / L^2
    agree(bent.moment(L), -case.printed("M_B"))  # P a^2 b / L^2
    agree(bent.reaction("end_a"), -case.printed("R_A"))  # P b^2 (3 a + b) / L^3
    agree(bent.reaction("end_b"), -P * A**2 * (A + 3 * B) / L**3)
    agree(bent.y(A), P * A**3 * B**3 / (3 * EI * L**3))
    agree(bent.y(A), case.printed("y_load"), rel=NINE_DIGITS)


@both_planes
def test_cf07_clamped_ends_even_load(plane: Plane) -> None:
    """Roark Table 8.1 case 2d and AISC, from memory."""
    given("CF07_fixed_fixed_udl", w=W)
    case = CASES["CF07_fixed_fixed_udl"]
    bent = plane.solve(BEAM, clamp("end_a", 0), guide("end_b", L), plane.even(0, L, W))
    agree(bent.moment(0), -W * L**2 / 12)
    agree(bent.moment(L), -case.printed("M_end"), rel=NINE_DIGITS)
    agree(bent.moment(L / 2), W * L**2 / 24)
    agree(bent.moment(L / 2), case.printed("M_mid"), rel=NINE_DIGITS)
    agree(bent.y(L / 2), W * L**4 / (384 * EI))
    agree(bent.y(L / 2), case.printed("y_mid"), rel=NINE_DIGITS)


@both_planes
def test_cantilever_load_anywhere(plane: Plane) -> None:
    """Roark Table 8.1 case 1a, from memory."""
    bent = plane.solve(BEAM, clamp("wall", 0), plane.force(A, P))
    agree(bent.y(L), P * A**2 * (3 * L - A) / (6 * EI))
    agree(bent.slope(L), P * A**2 / (2 * EI))
    agree(bent.moment(0), -P * A)


@both_planes
def test_cantilever_even_load_on_the_outer_part(plane: Plane) -> None:
    """Roark Table 8.1 case 2a (load over part of the span), from memory."""
    bent = plane.solve(BEAM, clamp("wall", 0), plane.even(A, L, W))
    agree(bent.y(L), W * (3 * L**4 - 4 * A**3 * L + A**4) / (24 * EI))
    agree(bent.slope(L), W * (L**3 - A**3) / (6 * EI))
    agree(bent.moment(0), -W * (L**2 - A**2) / 2)
    agree(bent.shear(A / 2), W * (L - A))


@both_planes
def test_propped_cantilever_load_anywhere(plane: Plane) -> None:
    """Roark Table 8.1 case 1c, from memory; a is counted from the wall."""
    bent = plane.solve(BEAM, clamp("wall", 0), roller("prop", L), plane.force(A, P))
    agree(bent.reaction("prop"), -P * A**2 * (3 * L - A) / (2 * L**3))
    agree(bent.couple("wall"), -P * A * B * (2 * L - A) / (2 * L**2))
    agree(bent.slope(L), -P * A**2 * B / (4 * EI * L))


@both_planes
def test_propped_cantilever_couple_at_the_prop(plane: Plane) -> None:
    """Roark Table 8.1 case 3c, from memory: half of the couple arrives at the wall."""
    bent = plane.solve(BEAM, clamp("wall", 0), roller("prop", L), plane.couple(L, C))
    agree(bent.slope(L), C * L / (4 * EI))
    agree(bent.couple("wall"), C / 2)
    agree(bent.reaction("prop"), -3 * C / (2 * L))


@both_planes
def test_clamped_ends_couple_anywhere(plane: Plane) -> None:
    """Roark Table 8.1 case 3d, from memory."""
    bent = plane.solve(BEAM, clamp("end_a", 0), guide("end_b", L), plane.couple(A, C))
    agree(bent.reaction("end_a"), 6 * C * A * B / L**3)
    agree(bent.couple("end_a"), C * B * (2 * A - B) / L**2)
    agree(bent.couple("end_b"), C * A * (2 * B - A) / L**2)


@both_planes
def test_guided_end(plane: Plane) -> None:
    """Roark Table 8.1 case 1b (one end guided, the other fixed), load at the guided end, from memory."""
    sleeve = fs.Pin("sleeve", at=text(L, "m"), holds=["tilt"])
    bent = plane.solve(BEAM, clamp("wall", 0), sleeve, plane.force(L, P))
    agree(bent.y(L), P * L**3 / (12 * EI))
    agree(bent.slope(L), 0.0, within=1e-15)
    agree(bent.couple("sleeve"), -P * L / 2)
    agree(bent.couple("wall"), -P * L / 2)


@both_planes
def test_settling_of_a_clamped_end(plane: Plane) -> None:
    """Roark Table 8.1 case 5d (an end moves sideways by h), from memory: M = 6 E I h / L^2, R = 12 E I h / L^3."""
    h = 0.5e-3
    moved = guide("end_b", L, offset=text(h, "m"), offset_angle=plane.clock)
    bent = plane.solve(BEAM, clamp("end_a", 0), moved)
    agree(bent.reaction("end_b"), 12 * EI * h / L**3)
    agree(bent.couple("end_b"), -6 * EI * h / L**2)
    agree(bent.couple("end_a"), -6 * EI * h / L**2)
    agree(bent.y(L / 2), h / 2)


@both_planes
def test_turning_of_a_clamped_end(plane: Plane) -> None:
    """Roark Table 8.1 case 4d (an end turns by theta), from memory: M = 4 E I theta / L here, 2 E I theta / L there."""
    theta = 2e-3
    leaning = guide("end_b", L, bore_tilt=text(theta, "rad"), bore_tilt_angle=plane.clock)
    bent = plane.solve(BEAM, clamp("end_a", 0), leaning)
    agree(bent.slope(L), theta)
    agree(bent.couple("end_b"), 4 * EI * theta / L)
    agree(bent.couple("end_a"), 2 * EI * theta / L)
    agree(bent.reaction("end_a"), 6 * EI * theta / L**2)
