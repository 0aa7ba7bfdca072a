"""M. Hetenyi, Beams on Elastic Foundation, University of Michigan Press, 1946: beams on Winkler's foundation (k per
length), with lambda = (k / 4 E I)^(1/4). Formulas from memory; cases CF21 and CF22 are those of beams.toml.

fe_shaft knows no foundation, so many bearings stand close together, spring k h at a spacing h (half of it at the ends).
What that costs is derived here, not guessed. On an endless beam the springs act on the samples y(n h), and the sum over
the aliases of the beam's response 1 / E I w^4 in place of the response itself gives, to the leading order,

    y0  =  (P lambda / 2k) (1 - (lambda h)^4 / 144)          M0  =  (P / 4 lambda) (1 - (lambda h)^2 / 6)

(the first alias sum is h^4 / 720, the second h^2 / 12). The tests demand these orders and factors at lambda h = 0.2
and 0.1. By Euler and Maclaurin's formula only even powers of h appear, at an end too, so the answers at h, h/2, h/4
are extrapolated (Romberg) to h -> 0 with an error of order (lambda h)^6; from lambda h = 0.1 that is of
order 1e-9 (the last two columns of the scheme differ by less than the tolerance, which is demanded as well). The beam
is 20 / lambda long: what an end at 10 / lambda sends back is exp(-10) there and again on the way back, 2e-9 in all.
Tolerance 2e-8; beams.toml's own recomputation differs from its figures by up to 8e-9 for the same reason.
"""

from __future__ import annotations

from functools import cache
from typing import Literal

import pytest

import fe_shaft as fs
from tests.evidence.plane import Bent, E, Plane, rod, second_moment, spring
from tests.evidence.published import CASES, agree

CLOSE = 2e-8
ENDLESS, ENDED = CASES["CF21_winkler_infinite"], CASES["CF22_winkler_semi_infinite"]
D, K, P, C = ENDLESS.given("d"), ENDLESS.given("k"), ENDLESS.given("P"), ENDED.given("M0")
EI = E * second_moment(D)
LAMBDA = (K / (4 * EI)) ** 0.25
LENGTH = 20 / LAMBDA
PLANE = Plane(140.0)


@cache
def bend(spans: int, load: Literal["force at the middle", "force at the end", "couple at the end"]) -> Bent:
    """The beam on spans + 1 springs."""
    h = LENGTH / spans
    springs = [spring(f"s{k}", k * h, K * h * (0.5 if k in (0, spans) else 1.0)) for k in range(spans + 1)]
    stop = fs.Pin("stop", at="0 m", holds=["axial"])
    if load == "couple at the end":
        return PLANE.solve([rod(LENGTH, D)], *springs, stop, PLANE.couple(0, C))
    x = LENGTH / 2 if load == "force at the middle" else 0.0
    return PLANE.solve([rod(LENGTH, D)], *springs, stop, PLANE.force(x, P))


def romberg(coarse: float, fine: float, finest: float) -> float:
    """The limit of a quantity with even powers of the spacing h, from h, h/2 and h/4."""
    one, two = (4 * fine - coarse) / 3, (4 * finest - fine) / 3
    limit = (16 * two - one) / 15
    agree(two, limit, rel=1e-6)
    return limit


SPACINGS = (200, 400, 800)  # lambda h = 0.1, 0.05, 0.025


def test_the_beam_is_the_one_of_the_cases() -> None:
    for case in (ENDLESS, ENDED):
        for key, number in {"E": E, "d": D, "k": K, "P": P}.items():
            agree(number, case.given(key), rel=0.0)
    agree(LAMBDA, ENDLESS.printed("lambda"), rel=5e-9)
    agree(LENGTH, ENDLESS.given("length_used"), rel=5e-8)


def test_cf21_endless_beam() -> None:
    """y0 = P lambda / 2k, M0 = P / 4 lambda: Hetenyi 1946, from memory."""
    bents = [bend(spans, "force at the middle") for spans in SPACINGS]
    y0 = romberg(*(bent.y(LENGTH / 2) for bent in bents))
    m0 = romberg(*(bent.moment(LENGTH / 2) for bent in bents))
    agree(y0, P * LAMBDA / (2 * K), rel=CLOSE)
    agree(m0, P / (4 * LAMBDA), rel=CLOSE)
    agree(y0, ENDLESS.printed("y0"), rel=CLOSE)
    agree(m0, ENDLESS.printed("M0"), rel=CLOSE)


@pytest.mark.parametrize("spans", [100, 200])
def test_cost_of_separate_springs(spans: int) -> None:
    """The two leading terms of the header, within their own next order (lambda h)^2."""
    bent, step = bend(spans, "force at the middle"), LAMBDA * LENGTH / spans
    lost_y = 1 - bent.y(LENGTH / 2) / (P * LAMBDA / (2 * K))
    lost_m = 1 - bent.moment(LENGTH / 2) / (P / (4 * LAMBDA))
    agree(lost_y, step**4 / 144, rel=step**2)
    agree(lost_m, step**2 / 6, rel=step**2)


def test_cf22_force_at_the_end() -> None:
    """y = 2 P lambda / k, theta = 2 P lambda^2 / k: Hetenyi 1946, from memory."""
    bents = [bend(spans, "force at the end") for spans in SPACINGS]
    y = romberg(*(bent.y(0) for bent in bents))
    theta = romberg(*(-bent.slope(0) for bent in bents))
    agree(y, 2 * P * LAMBDA / K, rel=CLOSE)
    agree(theta, 2 * P * LAMBDA**2 / K, rel=CLOSE)
    agree(y, ENDED.printed("y_end_P"), rel=CLOSE)
    agree(theta, ENDED.printed("th_end_P"), rel=CLOSE)


def test_cf22_couple_at_the_end() -> None:
    """y = 2 M lambda^2 / k, theta = 4 M lambda^3 / k: Hetenyi 1946, from memory."""
    bents = [bend(spans, "couple at the end") for spans in SPACINGS]
    y = romberg(*(-bent.y(0) for bent in bents))
    theta = romberg(*(bent.slope(0) for bent in bents))
    agree(y, 2 * C * LAMBDA**2 / K, rel=CLOSE)
    agree(theta, 4 * C * LAMBDA**3 / K, rel=CLOSE)
    agree(y, ENDED.printed("y_end_M"), rel=CLOSE)
    agree(theta, ENDED.printed("th_end_M"), rel=CLOSE)
