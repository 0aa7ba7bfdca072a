"""Ratings, factors and lives as functions: how they scale, where they meet, what they refuse."""

from __future__ import annotations

import math

import numpy as np
import pytest

from fe_shaft.errors import ModelError
from fe_shaft.rolling import dynamic_rating, life, load_factors, static_rating
from fe_shaft.rolling.kinds import Kind
from fe_shaft.rolling.load_factors import equivalent_load

DEG = math.pi / 180


def test_large_balls_join_small_ones() -> None:
    """The two branches of the ball's size meet at 25.4 mm within the rounding of 3.647."""
    just = [float(dynamic_rating.ball_rating(9, 25.4e-3 * (1 + side), 130e-3)) for side in (-1e-9, 1e-9)]
    assert just[1] == pytest.approx(just[0], rel=3e-4)


@pytest.mark.parametrize("rows", [1, 2])
def test_arrays_are_each_alone(rows: int) -> None:
    number, ball = np.array([8, 9]), np.array([[7e-3], [12e-3], [26e-3]])
    together = dynamic_rating.ball_rating(number, ball, 90e-3, 0.3, rows)
    assert together.shape == (3, 2)
    assert together[2, 1] == pytest.approx(float(dynamic_rating.ball_rating(9, 26e-3, 90e-3, 0.3, rows)), rel=1e-14)
    together = static_rating.ball_rating(number, ball, 90e-3, 0.3, rows)
    assert together[0, 1] == pytest.approx(float(static_rating.ball_rating(9, 7e-3, 90e-3, 0.3, rows)), rel=1e-12)


def test_two_rows_of_rollers() -> None:
    """C of two rows is 2^(7/9) times that of one, C0 twice."""
    shape = (14, 10e-3, 9.6e-3, 65e-3, 0.1)
    one, two = (float(dynamic_rating.roller_rating(*shape, rows)) for rows in (1, 2))
    assert two == pytest.approx(2 ** (7 / 9) * one, rel=1e-12)
    one, two = (float(static_rating.roller_rating(*shape, rows)) for rows in (1, 2))
    assert two == pytest.approx(2 * one, rel=1e-12)


@pytest.mark.parametrize(
    ("kind", "angle", "rows"),
    [
        (Kind.DEEP_GROOVE_BALL, 0.0, 1),
        (Kind.ANGULAR_CONTACT_BALL, 12 * DEG, 1),
        (Kind.ANGULAR_CONTACT_BALL, 40 * DEG, 1),
        (Kind.ANGULAR_CONTACT_BALL, 30 * DEG, 2),
        (Kind.SELF_ALIGNING_BALL, 10 * DEG, 2),
        (Kind.TAPERED_ROLLER, 14 * DEG, 1),
        (Kind.SPHERICAL_ROLLER, 10 * DEG, 2),
    ],
)
def test_the_equivalent_load_has_no_jump(kind: Kind, angle: float, rows: int) -> None:
    factors = load_factors.load_factors(kind, angle, 0.5, rows)
    low, high = (equivalent_load(factors, 1000.0, 1000 * factors.e * (1 + side)) for side in (-1e-9, 1e-9))
    assert float(high) == pytest.approx(float(low), rel=1e-8)
    assert float(equivalent_load(factors, 1000.0, 0.0)) == 1000.0
    assert float(equivalent_load(factors, 0.0, -1000.0)) == pytest.approx(1000 * float(factors.y))


def test_factors_between_the_angles_of_the_table_lie_between() -> None:
    y = [float(load_factors.load_factors(Kind.ANGULAR_CONTACT_BALL, a * DEG, 0.7).y) for a in (15, 17, 20, 37, 40)]
    assert y == sorted(y, reverse=True)
    assert y[1] == pytest.approx(y[0] + 2 / 5 * (y[2] - y[0]), rel=1e-12)


def test_two_rows_bear_twice_the_static_axial_factor() -> None:
    one, two = (load_factors.static_factors(Kind.ANGULAR_CONTACT_BALL, 40 * DEG, rows) for rows in (1, 2))
    assert two == pytest.approx((2 * one[0], 2 * one[1]))
    assert load_factors.static_factors(Kind.CYLINDRICAL_ROLLER) == (1.0, 0.0)
    assert float(load_factors.static_equivalent_load((0.6, 0.5), 1000.0, 100.0)) == 1000.0


def test_lives() -> None:
    """ISO 281: twice the load is an eighth of the life of balls, 2^(-10/3) of that of rollers."""
    ball, half = life.rating_life(Kind.DEEP_GROOVE_BALL, 20e3, [1e3, 2e3])
    assert ball == pytest.approx(8 * half, rel=1e-12)
    assert ball == pytest.approx(8000e6, rel=1e-12)
    roller, half = life.rating_life(Kind.TAPERED_ROLLER, 20e3, [1e3, 2e3])
    assert roller == pytest.approx(2 ** (10 / 3) * half, rel=1e-12)
    assert float(life.rating_life(Kind.TAPERED_ROLLER, 20e3, 0.0)) == math.inf
    assert float(life.hours(60e6, 2 * math.pi)) == pytest.approx(60e6 / 3600, rel=1e-12)
    assert life.static_safety(10e3, [5e3, 0.0]).tolist() == [2.0, math.inf]


@pytest.mark.parametrize(
    ("call", "place", "sentence"),
    [
        (
            lambda: load_factors.load_factors(Kind.ANGULAR_CONTACT_BALL, 60 * DEG),
            "contact_angle",
            "60 deg is not in the table of ISO 281, 5 to 45 deg. Take the maker's X and Y.",
        ),
        (
            lambda: load_factors.load_factors(Kind.ANGULAR_CONTACT_BALL, 15 * DEG, 0.5, 2),
            "contact_angle",
            "15 deg is not in the table of ISO 281, 20 to 45 deg. Take the maker's X and Y.",
        ),
        (
            lambda: load_factors.load_factors(Kind.CYLINDRICAL_ROLLER),
            "kind",
            "a cylindrical roller bearing has no axial load to be made equivalent. Take P = Fr.",
        ),
        (
            lambda: load_factors.load_factors(Kind.TAPERED_ROLLER, 0.0),
            "contact_angle",
            "a tapered roller bearing needs one between 0 and 90 deg. Take atan(e / 1.5).",
        ),
        (
            lambda: life.reliability_factor([0.95, 0.5]),
            "reliability",
            "0.5 cannot be. ISO 281 covers 0.9 to 0.9995; write 0.95 for 95 %.",
        ),
        (
            lambda: life.hours(1e6, 0.0),
            "speed",
            "0 cannot be. A bearing at rest has no life to count; look at its static safety.",
        ),
        (lambda: life.rating_life(Kind.TAPERED_ROLLER, -1.0, 1.0), "dynamic", "-1 cannot be. Give the rating C in N."),
        (
            lambda: life.static_safety(1.0, math.nan),
            "load",
            "nan cannot be. Give the equivalent load P0 in N, 0 or more.",
        ),
        (
            lambda: dynamic_rating.ball_rating(9, 70e-3, 60e-3),
            "diameter",
            "1.16667 pitch diameters cannot be. An element must be smaller.",
        ),
        (
            lambda: static_rating.factor(0.2, 0.5),
            "conformity",
            "0.5 cannot be. Give groove radius over ball diameter, 0.52.",
        ),
        (
            lambda: dynamic_rating.ball_factor(0.2, 0.52, 0.49),
            "conformity",
            "0.49 cannot be. Give groove radius over ball diameter, 0.52.",
        ),
        (
            lambda: static_rating.ball_rating(0, 7e-3, 60e-3),
            "number",
            "0 cannot be. Give the number of balls of one row.",
        ),
        (
            lambda: dynamic_rating.roller_rating(14, 7e-3, 0.0, 60e-3),
            "length",
            "0 cannot be. Give the length of a roller that touches in m.",
        ),
    ],
)
def test_what_cannot_be_is_said_in_a_sentence(call, place: str, sentence: str) -> None:  # type: ignore[no-untyped-def]
    with pytest.raises(ModelError) as caught:
        call()
    (problem,) = caught.value.problems
    assert (problem.place, problem.sentence) == (place, sentence)
