"""What fits and warmth take from the clearance, against thick rings solved as equations."""

from __future__ import annotations

import numpy as np
import pytest

from fe_shaft.errors import ModelError
from fe_shaft.rolling.fits import (
    GROUND,
    TURNED,
    Elastic,
    effective_interference,
    loosening,
    press_inner,
    press_outer,
    thermal_loss,
    usual_raceways,
    warmed,
)
from fe_shaft.rolling.running import Rings, Seats, Warmth, running_clearance

#: Invented: rings of a bearing of 40 x 80 mm.
BORE, INNER, OUTER, OUTSIDE = 40e-3, 48e-3, 72e-3, 80e-3
ALUMINIUM = Elastic(70e9, 0.33, 23e-6)
STEEL = Elastic()


def two_tubes(
    hole: float, seat: float, rim: float, inner: Elastic, outer: Elastic, interference: float
) -> tuple[float, float, float]:
    """Pressure and radial movement of hole and rim of two thick tubes pressed together, as four linear equations.

    In each u = a r + b / r and, in plane stress, s_r = E / (1 - nu^2) ((1 + nu) a - (1 - nu) b / r^2). Unknown are a, b
    of both; the edges are free, the stress on the seat is the same and the movements differ by half the interference.
    """

    def stress(part: Elastic, r: float) -> list[float]:
        factor = part.youngs / (1 - part.poisson**2)
        return [factor * (1 + part.poisson), -factor * (1 - part.poisson) / r**2]

    r = [hole / 2, seat / 2, rim / 2]
    system = np.array(
        [
            [*stress(inner, r[0]), 0, 0],
            [0, 0, *stress(outer, r[2])],
            [*stress(inner, r[1]), *(-s for s in stress(outer, r[1]))],
            [-r[1], -1 / r[1], r[1], 1 / r[1]],
        ]
    )
    scale = np.abs(system).max(axis=1)
    a1, b1, a2, b2 = np.linalg.solve(system / scale[:, None], np.array([0, 0, 0, interference / 2]) / scale)
    s = stress(inner, r[1])
    return -(s[0] * a1 + s[1] * b1), a1 * r[0] + b1 / r[0], a2 * r[2] + b2 / r[2]


@pytest.mark.parametrize("hole", [1e-3, 20e-3, 30e-3])
@pytest.mark.parametrize("shaft", [STEEL, ALUMINIUM])
def test_inner_ring_as_two_thick_tubes(hole: float, shaft: Elastic) -> None:
    pressure, _, rim = two_tubes(hole, BORE, INNER, shaft, STEEL, 10e-6)
    got = press_inner(10e-6, BORE, INNER, hole, shaft)
    assert float(got.pressure) == pytest.approx(pressure, rel=1e-9)
    assert float(got.loss) == pytest.approx(2 * rim, rel=1e-9)


@pytest.mark.parametrize("housing", [STEEL, ALUMINIUM])
def test_outer_ring_as_two_thick_tubes(housing: Elastic) -> None:
    pressure, hole, _ = two_tubes(OUTER, OUTSIDE, 110e-3, STEEL, housing, 10e-6)
    got = press_outer(10e-6, OUTSIDE, OUTER, 110e-3, housing)
    assert float(got.pressure) == pytest.approx(pressure, rel=1e-9)
    assert float(got.loss) == pytest.approx(-2 * hole, rel=1e-9)


def test_steel_on_steel_is_a_ratio_of_diameters() -> None:
    """Solid shaft: the raceway grows by w d / raceway; very thick housing: it shrinks by w raceway / outside."""
    assert float(press_inner(10e-6, BORE, INNER).loss) == pytest.approx(10e-6 * BORE / INNER, rel=1e-12)
    assert float(press_outer(10e-6, OUTSIDE, OUTER).loss) == pytest.approx(10e-6 * OUTER / OUTSIDE, rel=1e-12)


def test_loose_fits_take_nothing() -> None:
    assert press_inner([-5e-6, 0.0], BORE, INNER).loss.tolist() == [0.0, 0.0]
    assert press_outer(-5e-6, OUTSIDE, OUTER).pressure == 0.0


def test_finish_takes_a_share_of_the_interference() -> None:
    assert float(effective_interference(16e-6, BORE)) == pytest.approx(16e-6 * 40 / 42)
    assert float(effective_interference(16e-6, BORE, TURNED)) == pytest.approx(16e-6 * 40 / 43)
    assert GROUND < TURNED
    # 0.08 sqrt(40 / 18 * 3000) um
    assert float(loosening(40e-3, 18e-3, -3000.0)) == pytest.approx(6.532e-6, rel=1e-3)


def test_an_aluminium_housing_comes_loose_when_it_warms() -> None:
    """80 mm times 40 K times the difference of expansions, 10.5e-6, is 33.6 um."""
    assert float(warmed(20e-6, OUTSIDE, 40.0, 40.0, STEEL, ALUMINIUM)) == pytest.approx(20e-6 - 33.6e-6)


def test_warmth() -> None:
    """Alike in all parts it takes nothing; a warmer inner ring takes expansion * rise * outer raceway."""
    assert float(thermal_loss(INNER, OUTER, 30.0, 30.0)) == pytest.approx(0.0, abs=1e-18)
    assert float(thermal_loss(INNER, OUTER, 5.0, 0.0)) == pytest.approx(12.5e-6 * 5 * OUTER)
    assert float(thermal_loss(INNER, OUTER, 5.0, 0.0, 0.0)) == pytest.approx(12.5e-6 * 5 * INNER)
    assert float(thermal_loss(INNER, OUTER, 0.0, 5.0)) < 0


def test_from_the_shelf_to_the_running_machine() -> None:
    seats, warm = Seats(shaft_interference=15e-6), Warmth(inner=10.0, outer=5.0)
    got = running_clearance(13e-6, Rings(BORE, INNER, OUTER, OUTSIDE), seats, warm)
    assert float(got.mounted) == pytest.approx(13e-6 - 15e-6 * BORE / INNER)
    assert float(got.by_warmth) == pytest.approx(12.5e-6 * (10 - 5) * OUTER)
    assert float(got.running) == pytest.approx(float(got.mounted - got.by_warmth))
    assert got.by_housing == 0.0


def test_a_shaft_colder_than_its_ring_holds_it_less() -> None:
    rings, seats = Rings(BORE, INNER, OUTER, OUTSIDE), Seats(shaft_interference=15e-6)
    even, cold = (
        running_clearance(13e-6, rings, seats, Warmth(inner=20.0, outer=20.0, shaft=rise)) for rise in (20.0, 0.0)
    )
    assert float(cold.by_shaft) == pytest.approx((15e-6 - 12.5e-6 * 20 * BORE) * BORE / INNER)
    assert cold.running > even.running
    assert cold.mounted == even.mounted


def test_a_warm_housing_of_aluminium_lets_its_ring_go() -> None:
    """Cold 20 um of interference; 30 K warmer both the fit is looser by 80 mm * 30 K * 10.5e-6."""
    rings = Rings(BORE, INNER, OUTER, OUTSIDE)
    seats = Seats(housing_interference=20e-6, housing_outer=110e-3, housing=ALUMINIUM)
    warm = running_clearance(40e-6, rings, seats, Warmth(inner=30.0, outer=30.0))
    left = 20e-6 - 80e-3 * 30 * 10.5e-6
    assert left < 0
    assert warm.by_housing == 0.0
    assert float(warm.running) == pytest.approx(40e-6)
    half = running_clearance(40e-6, rings, seats, Warmth(inner=30.0, outer=30.0, housing=10.0))
    tight = 20e-6 + 80e-3 * (30 * 12.5e-6 - 10 * 23e-6)
    assert float(half.by_housing) == pytest.approx(float(press_outer(tight, OUTSIDE, OUTER, 110e-3, ALUMINIUM).loss))


def test_many_at_once() -> None:
    rings = Rings(BORE, INNER, OUTER, OUTSIDE)
    got = running_clearance(np.array([6e-6, 13e-6, 24e-6]), rings, Seats(np.array([[2e-6], [30e-6]])))
    assert got.running.shape == (2, 3)
    assert got.running[1, 0] < 0 < got.running[0, 2]


@pytest.mark.parametrize("rollers", [False, True])
def test_usual_raceways_lie_about_the_mean_circle(rollers: bool) -> None:
    inside, outside = usual_raceways(BORE, OUTSIDE, rollers)
    assert float(inside + outside) == pytest.approx(BORE + OUTSIDE)
    assert BORE < inside < outside < OUTSIDE


@pytest.mark.parametrize(
    ("call", "place", "sentence"),
    [
        (
            lambda: press_inner(1e-6, BORE, INNER, 50e-3), "shaft_bore",
            "1.25 bores cannot be. Give a hole smaller than the bearing's bore.",
        ),
        (
            lambda: press_inner(1e-6, 50e-3, 48e-3), "bore",
            "1.04167 raceways cannot be. Give a raceway larger than the bore.",
        ),
        (
            lambda: press_outer(1e-6, OUTSIDE, OUTER, 80e-3), "housing_outer",
            "1 housing diameters cannot be. Give a housing larger than the ring.",
        ),
        (
            lambda: press_outer(1e-6, 70e-3, OUTER), "raceway",
            "1.02857 outside diameters cannot be. Give a raceway smaller than the outside.",
        ),
        (
            lambda: thermal_loss(OUTER, INNER, 1.0, 0.0), "outer_raceway",
            "the outer raceway is not larger than the inner one. Give it in m.",
        ),
    ],
)  # fmt: skip
def test_what_cannot_be_is_said_in_a_sentence(call, place: str, sentence: str) -> None:  # type: ignore[no-untyped-def]
    with pytest.raises(ModelError) as caught:
        call()
    (problem,) = caught.value.problems
    assert (problem.place, problem.sentence) == (place, sentence)
