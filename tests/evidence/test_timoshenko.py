"""S. P. Timoshenko, Strength of Materials, parts I and II, Van Nostrand; with J. M. Gere, Mechanics of Materials.

Deflections of beams with shear (the beam that carries his name), stepped beams, bars under their own weight,
eccentric pull. The formulas are from memory; cases CF.. are those of beams.toml. With shear the coefficient is
Cowper's (1966) for a solid round, 6 (1 + nu) / (7 + 6 nu), which is fe_shaft's default.

Tolerances: closed forms 1e-9; figures of beams.toml half a unit of their ninth digit.
"""

from __future__ import annotations

import math

import pytest

import fe_shaft as fs
from tests.evidence.plane import (
    NU,
    SHEAR_MODULUS,
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
)
from tests.evidence.published import CASES, NINE_DIGITS, agree, text

L, P, W = 1.0, 100e3, 50e3
THICK = 0.2
EI = E * second_moment(THICK)
KAPPA = 6 * (1 + NU) / (7 + 6 * NU)
KGA = KAPPA * SHEAR_MODULUS * area(THICK)
BEAM = [rod(L, THICK)]
DENSITY, GRAVITY = 7850.0, 9.80665


def test_the_thick_beam_is_the_one_of_the_cases() -> None:
    for name in ("CF12_shear_ss_centre", "CF13_shear_cantilever", "CF14_shear_fixed_fixed", "CF15_shear_propped"):
        for key, number in {"E": E, "nu": NU, "d": THICK, "L": L, "P": P}.items():
            agree(number, CASES[name].given(key), rel=0.0)
        agree(KAPPA, CASES[name].given("kappa"), rel=NINE_DIGITS)


@both_planes
def test_cf12_two_supports_load_at_the_middle(plane: Plane) -> None:
    """P L^3 / 48 E I + P L / (4 kappa G A), from memory."""
    case = CASES["CF12_shear_ss_centre"]
    supports = pin("a", 0), roller("b", L)
    bent = plane.solve(BEAM, *supports, plane.force(L / 2, P), shear="cowper")
    agree(bent.y(L / 2), P * L**3 / (48 * EI) + P * L / (4 * KGA))
    agree(bent.y(L / 2), case.printed("y_mid"), rel=NINE_DIGITS)
    slender = plane.solve(BEAM, *supports, plane.force(L / 2, P))
    agree(bent.y(L / 2) - slender.y(L / 2), case.printed("shear_part"), rel=NINE_DIGITS)
    agree(bent.slope(0), slender.slope(0))  # sections turn by bending alone


@both_planes
def test_cf13_cantilever(plane: Plane) -> None:
    """P L^3 / 3 E I + P L / (kappa G A); the section's rotation has no part from shear. From memory."""
    case = CASES["CF13_shear_cantilever"]
    bent = plane.solve(BEAM, clamp("wall", 0), plane.force(L, P), shear="cowper")
    agree(bent.y(L), P * L**3 / (3 * EI) + P * L / KGA)
    agree(bent.y(L), case.printed("y_tip"), rel=NINE_DIGITS)
    agree(bent.slope(L), P * L**2 / (2 * EI))
    agree(bent.slope(L), case.printed("rotation_tip"), rel=NINE_DIGITS)


@both_planes
def test_cf14_clamped_ends(plane: Plane) -> None:
    """P L^3 / 192 E I + P L / (4 kappa G A), from memory."""
    case = CASES["CF14_shear_fixed_fixed"]
    bent = plane.solve(BEAM, clamp("a", 0), guide("b", L), plane.force(L / 2, P), shear="cowper")
    agree(bent.y(L / 2), P * L**3 / (192 * EI) + P * L / (4 * KGA))
    agree(bent.y(L / 2), case.printed("y_mid"), rel=NINE_DIGITS)
    agree(-bent.moment(0), case.printed("M_end"))


@both_planes
def test_cf15_propped_cantilever(plane: Plane) -> None:
    """Shear moves load to the prop: R = P (5/48 + phi/6) / (1/3 + phi/3), phi = 3 E I / kappa G A L^2. From memory."""
    case = CASES["CF15_shear_propped"]
    parts = roller("prop", 0), clamp("wall", L), plane.force(L / 2, P)
    phi = 3 * EI / (KGA * L**2)
    thick, slender = plane.solve(BEAM, *parts, shear="cowper"), plane.solve(BEAM, *parts)
    agree(-thick.reaction("prop"), P * (5 / 48 + phi / 6) / (1 / 3 + phi / 3))
    agree(-thick.reaction("prop"), case.printed("R_pin"), rel=NINE_DIGITS)
    agree(-slender.reaction("prop"), case.printed("R_pin_no_shear"))


@both_planes
def test_cf23_stepped_cantilever(plane: Plane) -> None:
    """y = P [(L^3 - l2^3) / (3 E I1) + l2^3 / (3 E I2)]: integral of M x / E I, from memory. No shear."""
    case = CASES["CF23_stepped_cantilever"]
    l1, l2, load = case.given("l1"), case.given("l2"), case.given("P")
    i1, i2 = second_moment(case.given("d1")), second_moment(case.given("d2"))
    agree(E, case.given("E"), rel=0.0)
    stepped = [rod(l1, case.given("d1")), rod(l2, case.given("d2"))]
    bent = plane.solve(stepped, clamp("wall", 0), plane.force(l1 + l2, load))
    agree(bent.y(l1 + l2), load * (((l1 + l2) ** 3 - l2**3) / (3 * E * i1) + l2**3 / (3 * E * i2)))
    agree(bent.slope(l1 + l2), load * (((l1 + l2) ** 2 - l2**2) / (2 * E * i1) + l2**2 / (2 * E * i2)))
    agree(bent.y(l1 + l2), case.printed("y_tip"), rel=NINE_DIGITS)
    agree(bent.slope(l1 + l2), case.printed("th_tip"), rel=NINE_DIGITS)


@both_planes
@pytest.mark.parametrize("length", [0.3, 1.0], ids=["very_short", "short"])
def test_thick_short_beam_even_load(plane: Plane, length: float) -> None:
    """5 w L^4 / 384 E I + w L^2 / (8 kappa G A): Timoshenko, Strength of Materials I, shear deflection; from memory."""
    supports = pin("a", 0), roller("b", length)
    bent = plane.solve([rod(length, THICK)], *supports, plane.even(0, length, W), shear="cowper")
    agree(bent.y(length / 2), 5 * W * length**4 / (384 * EI) + W * length**2 / (8 * KGA))
    agree(bent.slope(0), W * length**3 / (24 * EI))


@both_planes
def test_thick_cantilever_even_load_and_couple(plane: Plane) -> None:
    """w L^4 / 8 E I + w L^2 / (2 kappa G A); a couple makes no shear, M L^2 / 2 E I. From memory."""
    bent = plane.solve(BEAM, clamp("wall", 0), plane.even(0, L, W), plane.couple(L, P), shear="cowper")
    agree(bent.y(L), W * L**4 / (8 * EI) + W * L**2 / (2 * KGA) + P * L**2 / (2 * EI))
    agree(bent.slope(L), W * L**3 / (6 * EI) + P * L / EI)


@both_planes
def test_thick_beam_on_three_supports(plane: Plane) -> None:
    """Middle reaction by the force method: deflection of the long beam over that per unit load, both with shear."""
    whole = 2 * L
    bent = plane.solve(
        [rod(whole, THICK)], pin("a", 0), roller("b", L), roller("c", whole), plane.even(0, whole, W), shear="cowper"
    )
    sag = 5 * W * whole**4 / (384 * EI) + W * whole**2 / (8 * KGA)
    agree(-bent.reaction("b"), sag / (whole**3 / (48 * EI) + whole / (4 * KGA)))
    # Without shear it would be 5/8 of the load (from memory); shear takes some away.
    assert -bent.reaction("b") < 0.624 * W * whole


@both_planes
def test_eccentric_pull(plane: Plane) -> None:
    """A pull beside the axis bends like the couple F e (Strength of Materials I; first order; from memory)."""
    pull, e, d = 20e3, 0.03, 0.04
    off = fs.Force("pull", at=text(L, "m"), axial=text(pull, "N"), radius=text(e, "m"), angle=plane.clock)
    bent = plane.solve([rod(L, d)], clamp("wall", 0), off)
    # Pulled at a point on the side of +y, the bar bends away from it.
    agree(bent.y(L), -pull * e * L**2 / (2 * E * second_moment(d)))
    agree(bent.slope(L), -pull * e * L / (E * second_moment(d)))
    agree(bent.moment(L / 2), pull * e)
    agree(bent.station(L).u[0], pull * L / (E * area(d)))
    agree(bent.results.case()["wall"].axial_force, -pull)


def test_own_weight_across() -> None:
    """5 q L^4 / 384 E I with q = rho g A, downwards; from memory. Standard gravity 9.80665 m/s^2 (3rd CGPM, 1901)."""
    d, bore = 0.06, 0.03
    q = DENSITY * GRAVITY * area(d, bore)
    bent = Plane(0).solve([rod(L, d, bore)], pin("a", 0), roller("b", L), gravity="down")
    agree(bent.y(L / 2), -5 * q * L**4 / (384 * E * second_moment(d, bore)))
    agree(bent.moment(L / 2), -q * L**2 / 8)
    agree(bent.reaction("a"), q * L / 2)


def test_own_weight_along() -> None:
    """A bar that hangs by its upper end stretches by rho g L^2 / 2 E (Strength of Materials I; from memory)."""
    hung = fs.Shaft("shaft", [rod(L, 0.05)], material=STEEL.name, axis="-Y", twelve="+Z")
    results = fs.solve(fs.Model("hung bar", [hung, clamp("ceiling", 0)], materials=[STEEL], gravity="down"))
    end = results.case()["shaft"].at(text(L, "m"))
    agree(end.axial, DENSITY * GRAVITY * L**2 / (2 * E))
    agree(results.case()["ceiling"].axial_force, -DENSITY * GRAVITY * area(0.05) * L)


def test_own_weight_of_a_frustum() -> None:
    """A conical bar hung by its thick end: integral of (weight below) / (E area), in closed form.

    Strength of Materials I has the whole cone, rho g L^2 / 6 E (from memory); a frustum from r1 at the free end to r2:
    rho g L^2 (r2^2 / 2 - r1^2 / 2 - r1^3 (1/r1 - 1/r2)) / (3 E (r2 - r1)^2), which is that for r1 -> 0 and
    rho g L^2 / 2 E for r1 -> r2 (own integration).
    """
    r1, r2 = 0.01, 0.04
    segments = [fs.Segment(length=text(L, "m"), diameter=text(2 * r2, "m"), end_diameter=text(2 * r1, "m"))]
    hung = fs.Shaft("shaft", segments, material=STEEL.name, axis="-Y", twelve="+Z")
    results = fs.solve(fs.Model("hung cone", [hung, clamp("ceiling", 0)], materials=[STEEL], gravity="down"))
    shape = (r2**2 / 2 - r1**2 / 2 - r1**3 * (1 / r1 - 1 / r2)) / (3 * (r2 - r1) ** 2)
    agree(results.case()["shaft"].at(text(L, "m")).axial, DENSITY * GRAVITY * L**2 / E * shape)
    volume = math.pi / 3 * L * (r1**2 + r1 * r2 + r2**2)
    agree(results.case()["ceiling"].axial_force, -DENSITY * GRAVITY * volume)
