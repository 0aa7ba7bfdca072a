"""Hertz contacts of balls against published tables and constants; cases, sources and tolerances in balls.toml.

T. A. Harris, Rolling Bearing Analysis (table and constants from memory); ISO 76 table of f0 (from memory); ISO/TS 16281
(from memory); A. Palmgren's deflection formula (from memory); D. E. Brewe, B. J. Hamrock, Simplified Solution for
Elliptical-Contact Deformation Between Two Elastic Solids, J. Lubr. Technol. 99 (1977) 485 (formulas from memory), whose
accuracy is stated as about 3 %.
"""

from __future__ import annotations

import re
from pathlib import Path

import numpy as np
import pytest

from fe_shaft.laws.point_contact import axis_ratio, contact, in_series, inner_contact, outer_contact
from tests.evidence.ball_cases import CASES, MM, MPA, PER_MM15, bearing

MODULUS = 206843e6 / (1 - 0.3**2)


def test_harris_table() -> None:  # from memory
    case = CASES["hertz_ab_delta_table"]
    f, printed = np.array(case["inputs"]["F_rho"]), case["expected"]
    got = contact(1.0, 1 + f, 1 - f)
    # a = a* (3 Q / E' S)^(1/3) and d = d* (3 Q / E' S)^(2/3) S / 2, here with E' = 1 and S = 2.
    a, b = (axis / np.cbrt(1.5) for axis in got.unit_axes)
    delta = got.stiffness ** (-2 / 3) / np.cbrt(1.5) ** 2
    for name, mine in (("a_star", a), ("b_star", b), ("delta_star", delta)):
        np.testing.assert_allclose(mine, printed[name], rtol=3.5e-4, err_msg=name)


def test_harris_constants_of_steel() -> None:  # from memory
    """In mm and N: a = 0.0236 a* (Q/S)^(1/3), d = 2.79e-4 d* Q^(2/3) S^(1/3), K = 2.15e5 S^-0.5 d*^-1.5."""
    printed = CASES["hertz_steel_constants"]["expected"]
    circle = contact(MODULUS, 500.0, 500.0)  # a* = d* = 1; S = 1 / mm
    assert circle.unit_axes[0] / MM == pytest.approx(printed["a_const"], abs=0.00005)
    assert circle.stiffness ** (-2 / 3) / MM == pytest.approx(printed["delta_const"], abs=0.5e-6)
    assert circle.stiffness / PER_MM15 == pytest.approx(printed["Kp_const"], rel=0.005)  # belongs to E 207.5 GPa


def test_harris_209_curvatures() -> None:  # from memory
    case = CASES["harris_209_curvature"]
    g, printed = bearing(case["inputs"] | {"Z": 9}), case["expected"]
    inner = inner_contact(MODULUS, g.ball_diameter, g.inner_conformity, g.gamma)
    outer = outer_contact(MODULUS, g.ball_diameter, g.outer_conformity, g.gamma)
    assert inner.curvature * 0.0254 == pytest.approx(printed["sum_rho_i_per_in"], abs=0.001)
    assert outer.curvature * 0.0254 == pytest.approx(printed["sum_rho_o_per_in"], abs=0.001)
    for mine, f in ((inner, printed["F_rho_i"]), (outer, printed["F_rho_o"])):
        assert mine.ratio[0] == pytest.approx(float(axis_ratio((1 + f) / (1 - f))), rel=2e-3)  # F to 0.0001
    assert np.rad2deg(g.free_angle) == pytest.approx(printed["free_contact_angle_deg"], abs=0.02)
    play = 2 * g.centre_distance * np.sin(g.free_angle)
    assert play / MM == pytest.approx(printed["free_endplay_mm"], abs=0.0005)


def test_iso76_f0() -> None:  # from memory
    """f0 = Q / (5 D^2) of the ball under 4200 MPa, by the weaker contact."""
    case = CASES["iso76_f0_table"]
    given, d = case["inputs"], 0.010
    modulus, gamma = given["E_MPa"] * MPA / (1 - given["nu"] ** 2), np.array(given["gamma"])
    loads = [
        inner_contact(modulus, d, given["ri_over_D"], gamma).load(given["p_max_MPa"] * MPA),
        outer_contact(modulus, d, given["re_over_D"], gamma).load(given["p_max_MPa"] * MPA),
    ]
    f0 = np.minimum(*loads) / (given["Stribeck"] * (d / MM) ** 2)
    np.testing.assert_allclose(f0, case["expected"]["f0"], atol=0.05)


def test_iso16281_point_constant() -> None:  # from memory
    """Both contacts in series have 1.48 E' [sum K (S / k^2 E)^(1/3)]^-1.5."""
    printed = CASES["iso16281_constants"]["expected"]["point_factor"]
    both = [make(MODULUS, 0.0127, 0.52, 12.7 / 65) for make in (inner_contact, outer_contact)]
    bracket = sum(each.first * np.cbrt(each.curvature / (each.ratio**2 * each.second)) for each in both)
    got = in_series(both[0].stiffness, both[1].stiffness) / (MODULUS * bracket**-1.5)
    assert got == pytest.approx(printed, abs=0.005)


def test_palmgren_deflection() -> None:  # from memory
    case = CASES["palmgren_vs_hertz_209"]
    both = [make(MODULUS, 0.0127, 0.52, 12.7 / 65) for make in (inner_contact, outer_contact)]
    got = (case["inputs"]["Q_N"] / in_series(both[0].stiffness, both[1].stiffness)) ** (2 / 3)
    assert got / MM == pytest.approx(case["expected"]["delta_mm"], rel=0.05)


def test_brewe_and_hamrock() -> None:  # from memory
    """k = 1.0339 r^0.636, E = 1.0003 + 0.5968 / r, K = 1.5277 + 0.6023 ln r, for r = Ry / Rx up to 50."""
    case = CASES["hamrock_brewe_error"]
    r = np.array([each for each in case["inputs"]["Ry_over_Rx"] if each <= 50])
    got = contact(1.0, r, 1.0)
    within = case["expected"]["max_error_percent_stated"] / 100 + 0.005  # "about"
    np.testing.assert_allclose(1.0339 * r**0.6360, got.ratio, rtol=within)
    np.testing.assert_allclose(1.0003 + 0.5968 / r, got.second, rtol=within)
    np.testing.assert_allclose(1.5277 + 0.6023 * np.log(r), got.first, rtol=within)


def test_every_case_is_used_and_marked() -> None:
    here = Path(__file__).parent
    tests = [(here / name).read_text(encoding="utf-8") for name in (Path(__file__).name, "test_ball_loads.py")]
    for name, case in CASES.items():
        users = [text for text in tests if re.search(rf'"{re.escape(name)}"', text)]
        assert users, f"no test uses {name}"
        assert case["source"]
        assert not case["from_memory"] or all("from memory" in text for text in users)
