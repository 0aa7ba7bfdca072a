"""sympy.physics.continuum_mechanics.beam: Macaulay's singularity functions, solved in rational numbers.

SymPy (Meurer et al., SymPy: symbolic computing in Python, PeerJ Comput. Sci. 3 (2017) e103) integrates the load as
singularity functions four times and fits the constants and reactions to the boundary conditions; nothing of it is
numerical, so its answers are exact for slender beams (shear = "none"). It solves with E I = 1 here; deflections and
slopes scale with 1 / E I, and settling supports are given to it times E I, as a rational number.

Its signs: loads and y one way, a couple of order -2 turns y towards x, shear force and bending moment positive as in
the tables (see `plane`). SymPy 1.14 finds reactions with E I y'' = M but deflections with E I y'' = -M; only the latter
fits its loads. So it is given settlements with the sign that each of both steps needs, and joined beams, whose branch
has the first sign again, are read with it. Tolerance: 1e-9 of the largest value along the beam, as values pass through
zero.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from functools import cache
from typing import Any

import pytest
from sympy import Expr, Rational, Symbol, symbols
from sympy.physics.continuum_mechanics.beam import Beam

from tests.evidence.plane import Bent, E, Plane, both_planes, clamp, guide, pin, rod, roller, second_moment
from tests.evidence.published import agree, text

D = 0.04
EI = E * second_moment(D)
X = Symbol("x")


@dataclass(frozen=True)
class Case:
    """A beam of one section; places in hundredths of a metre, loads in N, N m and N/m, so that all is rational."""

    length: int
    supports: dict[int, str]
    forces: dict[int, int] = field(default_factory=dict)
    couples: dict[int, int] = field(default_factory=dict)
    even: dict[tuple[int, int], int] = field(default_factory=dict)
    settled: dict[int, int] = field(default_factory=dict)  # by place, in um


CASES = {
    "two_supports_many_loads": Case(
        120, {0: "pin", 120: "roller"}, {30: 1000, 70: -400, 95: 650}, {50: 80}, {(20, 60): 900, (60, 120): -350}
    ),
    "cantilever": Case(80, {0: "clamp"}, {35: 700, 80: -200}, {60: 45, 80: -30}, {(10, 50): 1200}),
    "propped_cantilever": Case(100, {0: "clamp", 100: "roller"}, {50: 300}, {75: -60}, {(25, 90): 1500}),
    "clamped_ends": Case(140, {0: "clamp", 140: "guide"}, {40: 2000}, {100: 150}, {(0, 70): 800, (100, 140): 500}),
    "overhangs": Case(150, {30: "pin", 110: "roller"}, {0: 500, 150: -350}, {150: 70}, {(30, 110): 600}),
    "three_supports": Case(180, {0: "pin", 70: "roller", 180: "roller"}, {40: 900, 120: 1100}, {}, {(70, 180): 400}),
    "four_supports_an_overhang": Case(
        260, {0: "pin", 60: "roller", 150: "roller", 220: "roller"}, {30: 800, 260: 450}, {100: -90}, {(60, 220): 300}
    ),
    "four_supports_two_settle": Case(
        210, {0: "pin", 70: "roller", 140: "roller", 210: "roller"}, {105: 500}, {}, {(0, 70): 700}, {70: 120, 210: -80}
    ),
    "clamp_and_two_rollers": Case(
        160, {0: "clamp", 90: "roller", 160: "roller"}, {120: -600}, {90: 100}, {(0, 90): 1000}
    ),
}


def metres(place: int) -> Any:
    return Rational(place, 100)


@dataclass(frozen=True)
class Exact:
    """SymPy's answer as expressions of x."""

    reactions: dict[Any, Any]
    y: Expr
    slope: Expr
    moment: Expr
    shear: Expr


@cache
def by_sympy(name: str) -> Exact:
    case = CASES[name]
    beam = Beam(metres(case.length), 1, 1)
    unknown = []
    beam.bc_deflection, beam.bc_slope = [], []
    settled = {place: Rational(um) / 10**6 * Rational(str(EI)) for place, um in case.settled.items()}
    for place, kind in case.supports.items():
        force, couple = symbols(f"R{place} M{place}")
        unknown.append(force)
        beam.apply_load(force, metres(place), -1)
        beam.bc_deflection.append((metres(place), -settled.get(place, 0)))
        if kind in ("clamp", "guide"):
            unknown.append(couple)
            beam.apply_load(couple, metres(place), -2)
            beam.bc_slope.append((metres(place), 0))
    for place, size in case.forces.items():
        beam.apply_load(size, metres(place), -1)
    for place, size in case.couples.items():
        beam.apply_load(-size, metres(place), -2)
    for (first, last), size in case.even.items():
        beam.apply_load(size, metres(first), 0, end=metres(last))
    beam.solve_for_reaction_loads(*unknown)
    beam.bc_deflection = [(metres(place), settled.get(place, 0)) for place in case.supports]
    return Exact(beam.reaction_loads, beam.deflection(), beam.slope(), beam.bending_moment(), beam.shear_force())


MAKERS = {"pin": pin, "roller": roller, "clamp": clamp, "guide": guide}


def by_fe_shaft(name: str, plane: Plane) -> Bent:
    case = CASES[name]
    parts: list[Any] = []
    for place, kind in case.supports.items():
        move = case.settled.get(place, 0)
        angle = plane.degrees if move > 0 else plane.degrees + 180
        moved = {"offset": f"{abs(move)} um", "offset_angle": text(angle, "deg")} if move else {}
        parts.append(MAKERS[kind](f"s{place}", place / 100, **moved))
    parts += [plane.force(place / 100, size, f"force_{place}") for place, size in case.forces.items()]
    parts += [plane.couple(place / 100, size, f"couple_{place}") for place, size in case.couples.items()]
    parts += [plane.even(a / 100, b / 100, size, f"even_{a}") for (a, b), size in case.even.items()]
    return plane.solve([rod(case.length / 100, D)], *parts)


def stations(case: Case) -> list[int]:
    """Places off every load, so that nothing jumps there."""
    taken = {*case.supports, *case.forces, *case.couples, *(end for ends in case.even for end in ends)}
    return [place for place in range(3, case.length, 7) if place not in taken]


@both_planes
@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("what", ["y", "slope", "moment", "shear"])
def test_along_the_beam(name: str, what: str, plane: Plane) -> None:
    exact, bent = getattr(by_sympy(name), what), by_fe_shaft(name, plane)
    scale = EI if what in ("y", "slope") else 1.0
    places = stations(CASES[name])
    wanted = [float(exact.subs(X, metres(place))) / scale for place in places]
    size = max(abs(value) for value in wanted)
    assert len(places) > 8
    assert size > 0
    for place, value in zip(places, wanted, strict=True):
        agree(getattr(bent, what)(place / 100), value, within=1e-9 * size)


@both_planes
@pytest.mark.parametrize("name", CASES)
def test_reactions(name: str, plane: Plane) -> None:
    case, exact, bent = CASES[name], by_sympy(name).reactions, by_fe_shaft(name, plane)
    size = max(abs(float(value)) for value in exact.values())
    for place, kind in case.supports.items():
        agree(bent.reaction(f"s{place}"), float(exact[Symbol(f"R{place}")]), within=1e-9 * size)
        if kind in ("clamp", "guide"):
            agree(bent.couple(f"s{place}"), -float(exact[Symbol(f"M{place}")]), within=1e-9 * size)


@both_planes
def test_two_sections(plane: Plane) -> None:
    """SymPy joins two beams of different second moments: 2 I at the wall, then I; a force, a couple, an even load."""
    first, second = Beam(Rational(3, 5), 1, 2), Beam(Rational(2, 5), 1, 1)
    beam = first.join(second, via="fixed")
    force, couple = symbols("R0 M0")
    beam.apply_load(force, 0, -1)
    beam.apply_load(couple, 0, -2)
    beam.apply_load(800, 1, -1)
    beam.apply_load(-50, Rational(3, 10), -2)
    beam.apply_load(600, 0, 0, end=Rational(3, 5))
    beam.bc_slope, beam.bc_deflection = [(0, 0)], [(0, 0)]
    beam.solve_for_reaction_loads(force, couple)
    y = beam.deflection()
    loads = plane.force(1.0, 800, "tip"), plane.couple(0.3, 50), plane.even(0, 0.6, 600, "even")
    bent = plane.solve([rod(0.6, D * 2**0.25), rod(0.4, D)], clamp("wall", 0), *loads)
    for place in (20, 45, 70, 95):
        agree(bent.y(place / 100), -float(y.subs(X, metres(place))) / EI)  # sign of joined beams: see above
