"""American Institute of Steel Construction, beam diagrams and formulas: continuous beam of three equal spans.

The coefficients of cases CF08 to CF10 are printed numbers as shown on a web page; the moment over the second support
in CF09 is from memory. Tolerance: half a unit of the last printed digit of a reaction, moment or deflection, as
beams.toml says (0.0005 on reactions and moments in units of wL and wL^2, 0.00005 on deflections, 0.0005 on places).
"""

from __future__ import annotations

from itertools import pairwise

import numpy as np
import pytest

from tests.evidence.plane import Bent, E, Plane, both_planes, pin, rod, roller, second_moment
from tests.evidence.published import CASES, Case, agree

D, W = 0.04, 1000.0
EI = E * second_moment(D)
LOADED = {
    "CF08_3span_udl_all": (1, 2, 3),
    "CF09_3span_udl_two_adjacent": (1, 2),
    "CF10_3span_udl_end_spans": (1, 3),
}


def bend(plane: Plane, spans: tuple[int, ...]) -> Bent:
    supports = [pin("R1", 0), *(roller(f"R{k + 1}", k) for k in (1, 2, 3))]
    loads = [plane.even(k - 1, k, W, f"load_{k}") for k in spans]
    return plane.solve([rod(3.0, D)], *supports, *loads)


def largest(bent: Bent, span: int) -> float:
    """Largest moment of a span, from stations a thousandth of it apart."""
    return float(bent.line(np.linspace(span - 1, span, 1001))[1].max())


@both_planes
@pytest.mark.parametrize("name", LOADED)
def test_reactions(name: str, plane: Plane) -> None:
    case, bent = CASES[name], bend(plane, LOADED[name])
    for key in case.expected:
        if key.startswith("R"):  # "R1_coef_wL"
            agree(-bent.reaction(key[:2]) / W, case.printed(key), within=0.0005)


@both_planes
@pytest.mark.parametrize("name", LOADED)
def test_largest_deflection_in_the_first_span(name: str, plane: Plane) -> None:
    case, bent = CASES[name], bend(plane, LOADED[name])
    y, _ = bent.line(np.linspace(0, 1, 100_001))
    agree(float(y.max()) * EI / W, case.printed("ymax_coef_wL4_EI"), within=0.00005)
    agree(float(y.argmax()) / 100_000, case.printed("x_ymax"), within=0.0005)


def test_moments_cf08() -> None:
    case, bent = CASES["CF08_3span_udl_all"], bend(Plane(0), (1, 2, 3))
    agree(-bent.moment(1.0) / W, case.printed("M_support_coef_wL2"), within=0.0005)
    agree(largest(bent, 1) / W, case.printed("M_endspan_coef_wL2"), within=0.0005)
    agree(bent.moment(1.5) / W, case.printed("M_midspan_coef_wL2"), within=0.0005)


def test_moments_cf09() -> None:
    case, bent = CASES["CF09_3span_udl_two_adjacent"], bend(Plane(0), (1, 2))
    agree(largest(bent, 1) / W, case.printed("M_span1_coef_wL2"), within=0.0005)
    agree(largest(bent, 2) / W, case.printed("M_span2_coef_wL2"), within=0.0005)
    agree(bent.moment(2.0) / W, case.printed("M_R3_coef_wL2"), within=0.0005)
    agree(bent.moment(1.0) / W, -0.1167, within=0.00005)  # from memory


def test_moments_cf10() -> None:
    case, bent = CASES["CF10_3span_udl_end_spans"], bend(Plane(0), (1, 3))
    agree(largest(bent, 1) / W, case.printed("M_endspan_coef_wL2"), within=0.0005)
    agree(bent.moment(1.5) / W, case.printed("M_mid_coef_wL2"), within=0.0005)


@both_planes
def test_reactions_exactly(plane: Plane) -> None:
    """The fractions behind the printed coefficients (three-moment equation): 1e-9."""
    exact = {(1, 2, 3): (0.4, 1.1, 1.1, 0.4), (1, 2): (23 / 60, 1.2, 0.45, -1 / 30), (1, 3): (0.45, 0.55, 0.55, 0.45)}
    for spans, shares in exact.items():
        bent = bend(plane, spans)
        for k, share in enumerate(shares, 1):
            agree(-bent.reaction(f"R{k}"), share * W)
        agree(sum(shares), len(spans))


def test_the_printed_cases_are_those_solved() -> None:
    """Every case states the beam that `bend` builds."""

    def states(case: Case) -> tuple[float, ...]:
        return tuple(case.given(key) for key in ("E", "d", "L_each", "w"))

    assert all(states(CASES[a]) == states(CASES[b]) == (E, D, 1.0, W) for a, b in pairwise(LOADED))
