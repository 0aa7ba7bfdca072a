"""Random shafts and the independent solution hold what they promise.

Source of every check: statics, linearity, the reciprocal theorem (Maxwell 1864, Betti 1872), and the exactness of
the element (cutting it changes nothing). Tolerances: 40 digits are asked for, 35 demanded.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import replace
from decimal import Decimal
from itertools import pairwise

import pytest

from tests.oracle.digits import pi, working
from tests.oracle.element import ends
from tests.oracle.element_frame import Solution, solve_chain
from tests.random_shafts import (
    EXTREME,
    HARD,
    ForceSpec,
    Reach,
    SegmentSpec,
    ShaftSpec,
    Truth,
    exact,
    random_shaft,
    to_oracle,
    truth,
    wrench,
)

D = Decimal
SMALL = D("1e-35")
SEEDS = range(40)


@pytest.fixture(autouse=True)
def many_digits() -> Iterator[None]:
    with working(60):
        yield


def worst(a: list[list[D]], b: list[list[D]]) -> D:
    """Give the largest difference of movements or forces, linear and angular each of its own largest."""
    share = D(0)
    for part in (slice(0, 3), slice(3, 6)):
        size = max(abs(value) for row in b for value in row[part])
        gap = max(abs(x - y) for p, q in zip(a, b, strict=True) for x, y in zip(p[part], q[part], strict=True))
        share = max(share, gap / size if size else D(0))
    return share


def overall(spec: ShaftSpec, made: Truth, solution: Solution, case: int) -> D:
    """Sum all forces and moments about the left end, from the shaft's description alone; of the sum of sizes."""
    total, size = [D(0)] * 6, [D(0), D(0)]

    def add(x: D, force: list[D]) -> None:
        fx, fy, fz, mx, my, mz = force
        for i, value in enumerate([fx, fy, fz, mx, my - x * fz, mz + x * fy]):
            total[i] += value
            size[i // 3] += abs(value)

    for force in spec.forces:
        factor = exact(spec.cases[case].factors.get(force.name, 0.0))
        add(exact(force.x), [factor * value for value in wrench(force)])
    for support, reaction in zip(made.chain.supports, solution.reactions[case], strict=True):
        add(made.x[support.node] + D(support.dx), reaction)
    for x, element in zip(made.x, made.chain.elements, strict=False):
        d1, d2, b1, b2 = ends(element)
        length = D(element.length)
        # Frustum: V = pi L/12 (d1^2 + d1 d2 + d2^2), moment about its left end pi L^2/48 (d1^2 + 2 d1 d2 + 3 d2^2).
        volume = pi() * length / 12 * (d1**2 + d1 * d2 + d2**2 - b1**2 - b1 * b2 - b2**2)
        first = pi() * length**2 / 48 * (d1**2 + 2 * d1 * d2 + 3 * d2**2 - b1**2 - 2 * b1 * b2 - 3 * b2**2)
        weight = [exact(spec.density) * volume * exact(g) for g in spec.gravity]
        add(x + first / volume, [*weight, D(0), D(0), D(0)])
    return max(abs(value) / size[i // 3] for i, value in enumerate(total) if size[i // 3])


@pytest.mark.parametrize("reach", [HARD, EXTREME], ids=["hard", "extreme"])
@pytest.mark.parametrize("seed", SEEDS)
def test_equilibrium(seed: int, reach: Reach) -> None:
    spec = random_shaft(seed, reach)
    made, solution = truth(spec)
    assert solution.imbalance < SMALL
    for case in range(len(spec.cases)):
        assert overall(spec, made, solution, case) < SMALL


@pytest.mark.parametrize("seed", SEEDS)
def test_forty_digits_agree_with_sixty_five(seed: int) -> None:
    spec = random_shaft(seed)
    _, short = truth(spec)
    _, long = truth(spec, 65)
    for case in range(len(spec.cases)):
        assert worst(short.u[case], long.u[case]) < D("1e-40")
        assert worst(short.start[case], long.start[case]) < D("1e-40")
        assert worst(short.reactions[case], long.reactions[case]) < D("1e-40")


@pytest.mark.parametrize("seed", SEEDS)
def test_cutting_changes_nothing(seed: int) -> None:
    spec = random_shaft(seed)
    made, solution = truth(spec)
    total = float(made.x[-1])
    finer, cut = truth(spec, more_stations=[round(total * k / 23, 6) for k in range(1, 23)])
    assert len(finer.x) > len(made.x)
    places = [finer.x.index(x) for x in made.x]
    for case in range(len(spec.cases)):
        assert worst([cut.u[case][place] for place in places], solution.u[case]) < SMALL
        assert worst([cut.start[case][place] for place in places[:-1]], solution.start[case]) < SMALL
        assert worst(cut.reactions[case], solution.reactions[case]) < SMALL


@pytest.mark.parametrize("seed", SEEDS)
def test_unit_loads_are_reciprocal(seed: int) -> None:
    spec = random_shaft(seed)
    spec = replace(
        spec,
        gravity=(0.0, 0.0, 0.0),
        supports=tuple(replace(s, offset=0.0, bore_tilt=0.0) for s in spec.supports),
    )
    chain = to_oracle(spec).chain
    last = len(chain.elements)
    one, other = (0, 1 + seed % 2), (last, (1, 2, 4, 5)[seed // 2 % 4])
    cases = [replace(chain.cases[0], spread={}, nodal={n: [int(i == c) for i in range(6)]}) for n, c in (one, other)]
    u = solve_chain(replace(chain, cases=cases)).u
    there, back = u[0][other[0]][other[1]], u[1][one[0]][one[1]]
    # |there| <= own (Cauchy-Schwarz); zero only where a pin holds the very movement.
    own = (abs(u[0][one[0]][one[1]]) * abs(u[1][other[0]][other[1]])).sqrt()
    assert abs(there) <= own
    assert abs(there - back) <= SMALL * own


@pytest.mark.parametrize("seed", SEEDS)
def test_turning_the_clock_turns_the_answer(seed: int) -> None:
    """A quarter turn clockwise: up becomes front, front becomes down."""
    spec = random_shaft(seed)
    chain = to_oracle(spec).chain

    def turned(six: list[D]) -> list[D]:
        return [six[0], -six[2], six[1], six[3], -six[5], six[4]]

    def turned_matrix(k: list[list[D]] | None) -> list[list[D]] | None:
        if k is None:
            return None
        rows = [turned(row) for row in k]
        return [rows[0], [-v for v in rows[2]], rows[1], rows[3], [-v for v in rows[5]], rows[4]]

    swap = (0, 2, 1, 3, 5, 4)
    supports = [
        replace(
            s,
            spring=turned_matrix(s.spring),  # type: ignore[arg-type]
            seat=turned_matrix(s.seat),  # type: ignore[arg-type]
            offset=turned(list(s.offset)),  # type: ignore[arg-type]
            rigid=tuple(swap[i] for i in s.rigid),
            seat_rigid=tuple(swap[i] for i in s.seat_rigid),
        )
        for s in chain.supports
    ]
    cases = [
        replace(
            case,
            nodal={k: turned(list(v)) for k, v in case.nodal.items()},  # type: ignore[arg-type]
            spread={k: turned(list(v)) for k, v in case.spread.items()},  # type: ignore[arg-type]
            gravity=turned([*case.gravity, D(0), D(0), D(0)])[:3],  # type: ignore[list-item]
        )
        for case in chain.cases
    ]
    straight = solve_chain(chain)
    rolled = solve_chain(replace(chain, supports=supports, cases=cases))
    for case in range(len(spec.cases)):
        assert worst(rolled.u[case], [turned(row) for row in straight.u[case]]) < SMALL
        assert worst(rolled.reactions[case], [turned(row) for row in straight.reactions[case]]) < SMALL


def test_a_spread_load_is_many_small_ones() -> None:
    """The midpoint rule with n loads errs by order n^-2: a third of the width, a ninth of the error."""
    spec = random_shaft(3)
    total = float(to_oracle(spec).x[-1])
    width, middle = round(total * 0.3, 4), round(total * 0.5, 4)
    spread = ForceSpec("spread", middle, up=1e3, couple_front=20.0, radius=0.05, angle=33.0, axial=500.0, spread=width)
    # A plain cylinder: at a step inside the width the error would depend on where the loads fall.
    first, *others = spec.supports
    supports = (replace(first, holds=(*first.holds, "spin")), *others)
    held = replace(spec, supports=supports, segments=(SegmentSpec(total, 0.04),))
    exact_answer = _alone(held, (spread,))
    errors = []
    for n in (9, 27):
        parts = tuple(
            replace(
                spread,
                name=f"part_{k}",
                x=round(middle + width * ((k + 0.5) / n - 0.5), 9),
                up=1e3 / n,
                axial=500.0 / n,
                couple_front=20.0 / n,
                spread=0.0,
            )
            for k in range(n)
        )
        errors.append(worst(_alone(held, parts), exact_answer))
    assert errors[0] < D("1e-2")
    assert 8 < errors[0] / errors[1] < 10


def _alone(spec: ShaftSpec, forces: tuple[ForceSpec, ...]) -> list[list[D]]:
    """Give the movements of both ends under these forces alone."""
    case = replace(spec.cases[0], factors={force.name: 1.0 for force in forces})
    _, solution = truth(replace(spec, forces=forces, cases=(case,), gravity=(0.0, 0.0, 0.0)))
    return [solution.u[0][0], solution.u[0][-1]]


# ---------------------------------------------------------------- what the drawing promises


def test_drawing_is_repeatable() -> None:
    assert random_shaft(11) == random_shaft(11)
    assert random_shaft(11) != random_shaft(12)
    assert random_shaft(11, EXTREME) != random_shaft(11)


def test_drawing_stays_in_its_range_and_reaches_all_of_it() -> None:
    specs = [random_shaft(seed) for seed in range(500)]
    lengths = [s.length for spec in specs for s in spec.segments]
    diameters = [d for spec in specs for s in spec.segments for d in (s.diameter, s.end_diameter) if d is not None]
    counts = [len(spec.segments) for spec in specs]
    assert 2e-3 <= min(lengths) < 2.1e-3 < 0.48 < max(lengths) <= 0.5
    assert 5e-3 <= min(diameters) < 5.1e-3 < 0.19 < max(diameters) <= 0.2
    assert (min(counts), max(counts)) == (2, 40)
    assert {len(spec.supports) for spec in specs} == {2, 3, 4}
    assert {len(spec.cases) for spec in specs} == {1, 2, 3}
    for spec in specs:
        for segment in spec.segments:
            d2 = segment.end_diameter or segment.diameter
            b2 = segment.bore if segment.end_bore is None else segment.end_bore
            assert 0 <= segment.bore <= 0.851 * segment.diameter
            assert 0 <= b2 <= 0.851 * d2
        total = sum(exact(s.length) for s in spec.segments)
        assert sum("axial" in s.holds for s in spec.supports if s.matrix is None) <= 1
        assert any("axial" in s.holds for s in spec.supports)
        assert all("radial" in s.holds and 0 <= exact(s.x) <= total for s in spec.supports)
        centres = sorted(exact(s.x) + exact(s.load_centre) for s in spec.supports)
        assert all(b - a >= D("0.002") for a, b in pairwise(centres))
        for force in spec.forces:
            assert exact(force.x) - exact(force.spread) / 2 >= 0
            assert exact(force.x) + exact(force.spread) / 2 <= total


def test_drawing_has_every_feature() -> None:
    specs = [random_shaft(seed) for seed in range(200)]
    features: dict[str, Callable[[ShaftSpec], object]] = {
        "hollow": lambda spec: any(s.bore for s in spec.segments),
        "cone": lambda spec: any(s.end_diameter for s in spec.segments),
        "bored cone": lambda spec: any(s.end_diameter and s.end_bore for s in spec.segments),
        "gravity": lambda spec: any(spec.gravity),
        "spin held": lambda spec: spec.spin_is_held,
        "spin free": lambda spec: not spec.spin_is_held,
        "pins": lambda spec: all(s.is_pin for s in spec.supports),
        "clamp": lambda spec: any("tilt" in s.holds for s in spec.supports),
        "tilt stiffness": lambda spec: any("tilt" in (s.stiffness or {}) for s in spec.supports),
        "two stiffnesses": lambda spec: any("up" in (s.stiffness or {}) for s in spec.supports),
        "matrix": lambda spec: any(s.matrix for s in spec.supports),
        "seat": lambda spec: any(s.seat for s in spec.supports),
        "load centre": lambda spec: any(s.load_centre for s in spec.supports),
        "offset": lambda spec: any(s.offset for s in spec.supports),
        "bore tilt": lambda spec: any(s.bore_tilt for s in spec.supports),
        "spread": lambda spec: any(f.spread for f in spec.forces),
        "radius": lambda spec: any(f.radius for f in spec.forces),
        "couple": lambda spec: any(f.couple_up for f in spec.forces),
        "no shear": lambda spec: spec.shear == "none",
        "shear number": lambda spec: isinstance(spec.shear, float),
    }
    for name, has in features.items():
        count = sum(bool(has(spec)) for spec in specs)
        assert count >= 5, f"{name}: {count} of 200"


def test_torque_is_balanced_where_nothing_holds_the_spin() -> None:
    for seed in range(300):
        spec = random_shaft(seed)
        if spec.spin_is_held:
            continue
        for case in spec.cases:
            torques = [exact(case.factors.get(f.name, 0.0)) * wrench(f)[3] for f in spec.forces]
            assert abs(sum(torques, D(0))) <= D("4e-16") * sum(map(abs, torques), D(0))
