"""Ratings of rolling bearings against the tables of ISO 281 and ISO 76 (from memory, bearing_ratings.toml).

The factors are computed from the formulas and the contact pressures behind the tables, none is read from a table, so
the printed figures are a check. Makers' ratings: bearing_insides.toml, read in catalogue texts unless marked there.
"""

from __future__ import annotations

import math
import tomllib
from pathlib import Path
from typing import Any

import numpy as np
import pytest

from fe_shaft.rolling import dynamic_rating, life, load_factors, static_rating
from fe_shaft.rolling.hertz import line_load_at_pressure
from fe_shaft.rolling.kinds import Kind
from tests.evidence.published import agree

HERE = Path(__file__).parent
CASES: dict[str, Any] = {
    row["id"]: row for row in tomllib.loads((HERE / "bearing_ratings.toml").read_text(encoding="utf-8"))["case"]
}
BEARINGS = tomllib.loads((HERE / "bearing_insides.toml").read_text(encoding="utf-8"))["bearing"]
DEG = math.pi / 180


@pytest.mark.parametrize(
    ("name", "function"),
    [
        ("iso281_fc_ball", dynamic_rating.ball_factor),
        ("iso281_fc_self_aligning", dynamic_rating.self_aligning_factor),
        ("iso281_fc_roller", dynamic_rating.roller_factor),
        ("iso76_f0_ball", static_rating.factor),
        ("iso76_f0_self_aligning", static_rating.self_aligning_factor),
    ],
)
def test_factors_are_the_printed_ones(name: str, function: Any) -> None:
    case = CASES[name]
    assert np.abs(function(case["gamma"]) - case["expected"]).max() <= 0.06


def test_the_table_of_f0_in_use_is_the_computed_one() -> None:
    """Half a printed digit, and twice that where f0 turns between two lines, from the outer contact to the inner."""
    g = np.linspace(0.001, 0.4, 200)
    gap = np.abs(static_rating.printed_factor(g) - static_rating.factor(g))
    assert gap[(g < 0.09) | (g > 0.10)].max() <= 0.06
    assert gap.max() <= 0.10
    g = np.linspace(0.01, 0.4, 100)
    gap = static_rating.printed_self_aligning_factor(g) - static_rating.self_aligning_factor(g)
    assert np.abs(gap).max() <= 0.08


def test_44_of_rollers_is_4000_mpa() -> None:
    """ISO 76 (from memory): 44 N/mm^2 stands for a line contact on the inner ring at 4000 MPa; 44.19 by Hertz."""
    ratio = 0.2
    per_length = float(line_load_at_pressure(2 / (10e-3 * (1 - ratio)), static_rating.ROLLER_PRESSURE))
    agree(per_length / static_rating.STRIBECK / (10e-3 * (1 - ratio)) / 1e6, 44.0, within=0.5)


def test_reliability() -> None:
    case = CASES["iso281_a1"]
    assert np.abs(life.reliability_factor(case["reliability"]) - case["expected"]).max() <= 0.006


def test_x_y_e_of_deep_groove_bearings() -> None:
    case = CASES["iso281_xy_deep_groove"]
    got = load_factors.load_factors(Kind.DEEP_GROOVE_BALL, 0.0, case["relative_load"])
    assert got.x.tolist() == [0.56] * 9
    assert got.y == pytest.approx(np.array(case["Y"]), abs=1e-12)
    assert np.abs(got.e - case["e"]).max() <= 0.005


def test_e_of_angular_contact_bearings() -> None:
    steep, flat = CASES["iso281_e_angular"], CASES["iso281_e_angular_15"]
    got = load_factors.load_factors(Kind.ANGULAR_CONTACT_BALL, np.array(steep["angle"]) * DEG)
    assert np.abs(got.e - steep["e"]).max() <= 0.005
    got = load_factors.load_factors(Kind.ANGULAR_CONTACT_BALL, 15 * DEG, flat["relative_load"])
    assert np.abs(got.e - flat["e"]).max() <= 0.006


def test_e_of_two_rows() -> None:
    """Balls by their table; other rows e = 1.5 tan(angle), X and Y printed to two digits (ISO 281, from memory)."""
    case = CASES["iso281_e_two_rows"]
    got = load_factors.load_factors(Kind.ANGULAR_CONTACT_BALL, np.array(case["angle"]) * DEG, 0.0, 2)
    assert np.abs(got.e - case["e"]).max() <= 0.03
    for kind in (Kind.SELF_ALIGNING_BALL, Kind.SPHERICAL_ROLLER):
        agree(float(load_factors.load_factors(kind, 10 * DEG, 0.0, 2).e), 1.5 * math.tan(10 * DEG), rel=0.02)
    agree(float(load_factors.load_factors(Kind.TAPERED_ROLLER, 14 * DEG).e), 1.5 * math.tan(14 * DEG), rel=1e-12)


def test_a_worked_equivalent_load() -> None:
    """Older tables go by Fa / C0, today's by f0 Fa / C0; with f0 = 12.27 their lines at 0.084 and 1.03 are one."""
    case = CASES["shigley_equivalent_load"]
    got = load_factors.load_factors(Kind.DEEP_GROOVE_BALL, 0.0, 1.03 / 0.084 * case["axial"] / case["static"])
    agree(float(got.y), case["Y"], rel=0.005)
    used = got._replace(y=np.asarray(case["Y_used"]))
    agree(float(load_factors.equivalent_load(used, case["radial"], case["axial"])), case["equivalent"], rel=1e-9)


def conforming() -> list[dict[str, Any]]:
    """Deep-groove bearings of the maker whose ratings follow the standards, less three of another inner design."""
    return [b for b in BEARINGS if "C_B" in b and b["type"].startswith("deep") and "another internal" not in str(b)]


@pytest.mark.parametrize("bearing", conforming(), ids=lambda b: b["id"])
def test_ratings_of_known_insides(bearing: dict[str, Any]) -> None:
    """C and C0 of a maker against those of the published inside: 1 %, C0 2 % (printed to 50 or 100 N)."""
    inside = bearing["Z"], bearing["Dw"] * 1e-3, bearing["dpw"] * 1e-3
    agree(float(dynamic_rating.ball_rating(*inside)), bearing["C_B"], rel=0.01)
    agree(float(static_rating.ball_rating(*inside)), bearing["C0_B"], rel=0.02)
    agree(float(dynamic_rating.ball_rating(*inside)), bearing["regression_C_iso"], rel=1e-5)


def test_every_figure_has_its_source() -> None:
    text = Path(__file__).read_text(encoding="utf-8")
    assert all(row["source"] and f'"{name}"' in text for name, row in CASES.items())
    assert all(row["geometry_source"] for row in BEARINGS)
