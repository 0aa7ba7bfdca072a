"""What must not depend on how a shaft is described: viewpoint, units, company, order of loads; and what stiffness does.

On random shafts of the hard range. Reciprocity and superposition hold even in wrong runs, so they are the weak ones
here; the strong ones are in test_hard_range.py. Rounding in this range makes 1e-12 at most (measured there), so 1e-11
is held unless a line says otherwise.

Sources: reciprocity: Maxwell (1864), Betti (1872). The rest is common mechanics, no source.
"""

from __future__ import annotations

import os
from dataclasses import replace

import numpy as np
import pytest

import fe_shaft as fs
from tests.analysis.moves import MIRROR, SWAP, Move, roll, round_springs
from tests.analysis.statics import common_stations, scales, station, wrench_of
from tests.models import IN_LBF, M_KN, MM_N, layshaft, to_cases, to_material, to_model, to_parts
from tests.oracle.shaft_spec import CaseSpec, ForceSpec, ShaftSpec
from tests.random_shafts import HARD, random_shaft

SHAFTS = 2_000 if os.environ.get("FE_SHAFT_LONG") == "1" else 240
SEEDS = range(50_000, 50_000 + SHAFTS)
HELD = 1e-11


def solved(spec: ShaftSpec, **how):
    return fs.solve(to_model(spec, **how)).lines["shaft"]


def plain(spec: ShaftSpec) -> ShaftSpec:
    """The shaft with its own loads only: no weight, bores in line, loads at points, and its spin held."""
    supports = [replace(support, offset=0.0, bore_tilt=0.0) for support in spec.supports]
    if not spec.spin_is_held:
        supports[0] = replace(supports[0], holds=(*supports[0].holds, "spin"))
    forces = tuple(replace(force, spread=0.0) for force in spec.forces if not force.name.startswith("balance"))
    cases = tuple(CaseSpec(case.name, {f.name: case.factors.get(f.name, 0.0) for f in forces}) for case in spec.cases)
    return replace(spec, supports=tuple(supports), forces=forces, cases=cases, gravity=(0.0, 0.0, 0.0))


def assert_same(spec: ShaftSpec, one, other, move: Move | None = None, held: float = HELD) -> None:
    """Hold one line against another, which may see it from another side."""
    u, left, right = one.u, one.force_left, one.force_right
    x = one.x
    if move is not None:
        u = move.vectors(u)
        left, right = move.vectors(left), move.vectors(right)
        if move.swapped:  # what was the face to the left is the face to the right, and pulls the other way
            x, left, right = x[-1] - x[::-1], -right, -left
    u_size, f_size = scales(spec, u, left, right)
    k, there = common_stations(x, other.x)
    # twist is counted from the left end where the spin is free: from another end it is shifted as a whole
    turned = other.u[:, there, 3] - u[:, k, 3]
    shift = turned[:, :1] if move is not None and move.swapped and not spec.spin_is_held else 0.0
    found = other.u[:, there] - u[:, k]
    found[..., 3] = turned - shift
    assert np.abs(found / u_size).max() < held, f"seed {spec.seed}: movements"
    assert np.abs((other.force_left[:, there] - left[:, k]) / f_size).max() < held, f"seed {spec.seed}: force_left"
    assert np.abs((other.force_right[:, there] - right[:, k]) / f_size).max() < held, f"seed {spec.seed}: force_right"


# ---- viewpoint


@pytest.mark.parametrize(
    "move", [roll(90), roll(180), MIRROR, SWAP], ids=["roll_90", "roll_180", "mirror", "swap_ends"]
)
def test_another_viewpoint_sees_the_same(move):
    for seed in SEEDS:
        spec = random_shaft(seed, HARD)
        assert_same(spec, solved(spec), solved(move.spec(spec)), move)


def test_any_roll_about_the_axis():
    for seed in SEEDS:
        spec, move = round_springs(random_shaft(seed, HARD)), roll(360.0 * ((seed * 0.6180339887) % 1))
        assert_same(spec, solved(spec), solved(move.spec(spec)), move)


AXES = {"X": 0, "Y": 1, "Z": 2}
PLACINGS = [
    (f"{s}{a}", f"{t}{b}") for s in "+-" for a in AXES for t in "+-" for b in AXES if a != b
]  # all 24 right-handed frames along the axes


@pytest.mark.parametrize(("axis", "twelve"), PLACINGS)
def test_the_shaft_may_stand_any_way_in_the_model(axis, twelve):
    """Gravity is given in the model and turned along with the shaft: nothing changes."""
    frame = np.zeros((3, 3))
    for column, word in enumerate((axis, twelve)):
        frame[AXES[word[1]], column] = -1.0 if word[0] == "-" else 1.0
    frame[:, 2] = np.cross(frame[:, 0], frame[:, 1])
    for seed in list(SEEDS)[::10]:
        spec = replace(random_shaft(seed, HARD), gravity=(1.2345, -9.7, 0.5))
        gravity = tuple(float(v) for v in frame @ np.array(spec.gravity))
        place = {"axis": axis, "twelve": twelve, "left_end": ["1 m", "-20 mm", "3 mm"], "gravity": gravity}
        assert_same(spec, solved(spec), solved(spec, **place), held=1e-15)


# ---- units, company


@pytest.mark.parametrize("units", [MM_N, M_KN, IN_LBF], ids=["mm-N", "m-kN", "in-lbf"])
def test_units_change_nothing(units):
    for seed in SEEDS:
        spec = random_shaft(seed, HARD)
        assert_same(spec, solved(spec), solved(spec, units=units))


def test_several_shafts_in_one_model_are_each_as_alone():
    names = ("first", "second", "third")
    for seed in SEEDS[::3]:
        specs = [replace(random_shaft(seed + k, HARD), gravity=(0.0, -9.80665, 0.0)) for k in range(3)]
        parts, materials, factors = [], [], {}
        for k, (name, spec) in enumerate(zip(names, specs, strict=True)):
            parts += to_parts(spec, name=name, left_end=["0 m", "0 m", f"{k} m"])
            materials.append(to_material(spec, name=f"drawn_{name}"))
            factors |= to_cases(spec, front=f"{name}_")[0].forces
        cases = [fs.Case("case_1", forces=factors)]
        model = fs.Model("three", parts, cases, materials=materials, gravity="down", shoulders="off")
        together = fs.solve(model)
        for name, spec in zip(names, specs, strict=True):
            alone = replace(spec, cases=spec.cases[:1])
            assert_same(alone, solved(alone), together.lines[name])


def test_idle_parts_change_nothing():
    """Eighty places more than the shaft needs: other spans, and the sparse way instead of the dense one."""
    marks = [fs.Force(f"mark_{k}", at=f"{1 + 2.36 * k!r} mm", up="0 N", range_check="off") for k in range(80)]
    one, other = fs.solve(layshaft()), fs.solve(layshaft((), *marks))
    for name in one.parts:
        for values, seen in ((one[name].u, other[name].u), (one[name].load, other[name].load)):
            assert np.abs(values - seen).max() <= 1e-12 * np.abs(values).max(initial=0.0), name
    for name in ("lay_left", "lay_right"):
        np.testing.assert_allclose(other[name].wrench, one[name].wrench, rtol=0, atol=1e-12 * 7e3)


# ---- loads


def test_reciprocity():
    """The first load's work on the second's movement is the second's on the first's (Maxwell, Betti)."""
    for seed in SEEDS:
        spec = plain(random_shaft(seed, HARD))
        rng = np.random.default_rng(seed)
        places = rng.choice([force.x for force in spec.forces] + [spec.supports[0].x, 0.0], 2, replace=False)
        forces = tuple(_any_load(f"load_{k}", float(x), rng) for k, x in enumerate(places))
        cases = tuple(CaseSpec(f"case_{k}", {force.name: 1.0}) for k, force in enumerate(forces))
        spec = replace(spec, forces=forces, cases=cases)
        line = solved(spec)
        at = [station(line.x, force.x) for force in forces]
        terms = [
            [wrench_of(forces[i]) * line.u[1 - i, at[i]], np.abs(line.u[i, at[i]] * wrench_of(forces[i]))]
            for i in (0, 1)
        ]
        # Cauchy: mutual work is at most the root of the product of the loads' own works
        size = np.sqrt(terms[0][1].sum() * terms[1][1].sum())
        assert abs(terms[0][0].sum() - terms[1][0].sum()) <= 1e-12 * size, f"seed {seed}"


def _any_load(name: str, x: float, rng: np.random.Generator) -> ForceSpec:
    up, front, axial = (float(v) for v in rng.uniform(-1e4, 1e4, 3))
    couples = [float(v) for v in rng.uniform(-1e3, 1e3, 3)]
    return ForceSpec(name, x, up, front, axial, *couples, radius=0.05, angle=float(rng.uniform(0, 360)))


def test_superposition():
    """With weight and bores out of line, what loads add to the unloaded shaft is the sum of what each adds."""
    for seed in SEEDS:
        spec = replace(random_shaft(seed, HARD), gravity=(0.1, -9.7, 1.0))
        if not spec.spin_is_held:
            spec = replace(plain(spec), gravity=spec.gravity)
        names = [force.name for force in spec.forces]
        factors = {name: 0.3 * (k + 1) * (-1) ** k for k, name in enumerate(names)}
        cases = [CaseSpec("nothing", {}), CaseSpec("sum", factors)] + [CaseSpec(name, {name: 1.0}) for name in names]
        spec = replace(spec, cases=tuple(cases))
        line = solved(spec)
        for values in (line.u, line.force_left):
            added = sum(factors[name] * (values[k + 2] - values[0]) for k, name in enumerate(names))
            size = np.abs(values).max(axis=(0, 1)) + np.finfo(float).tiny
            size = np.concatenate([np.maximum(part, 1e-4 * part.max()) for part in (size[:3], size[3:])])
            assert np.abs((values[1] - values[0] - added) / size).max() < HELD, f"seed {seed}"


@pytest.mark.parametrize("factor", [1e6, 1e-6])
def test_loads_scale_results(factor):
    for seed in SEEDS:
        spec = plain(random_shaft(seed, HARD))
        keys = ("up", "front", "axial", "couple_up", "couple_front", "couple_axial")
        grown = tuple(replace(f, **{key: factor * getattr(f, key) for key in keys}) for f in spec.forces)
        one, other = solved(spec), solved(replace(spec, forces=grown))
        u_size, f_size = scales(spec, one.u, one.force_left, one.force_right)
        assert np.abs((other.u / factor - one.u) / u_size).max() < 1e-12, f"seed {seed}"
        assert np.abs((other.force_left / factor - one.force_left) / f_size).max() < 1e-12, f"seed {seed}"


# ---- stiffness


def own_give(spec: ShaftSpec) -> np.ndarray:
    """Movement of each load's point under that load alone, in its direction, times the load [J]."""
    cases = tuple(CaseSpec(force.name, {force.name: 1.0}) for force in spec.forces)
    line = solved(replace(spec, cases=cases))
    return np.array([wrench_of(f) @ line.u[k, station(line.x, f.x)] for k, f in enumerate(spec.forces)])


def stiffer(spec: ShaftSpec, rng: np.random.Generator) -> list[ShaftSpec]:
    """The shaft with one thing stiffer: a spring, a seat, a segment, all of the material."""
    out = [replace(spec, youngs_modulus=spec.youngs_modulus * 1.3)]
    number = int(rng.integers(len(spec.segments)))
    thick = spec.segments[number]
    thick = replace(thick, diameter=thick.diameter * 1.1, end_diameter=thick.end_diameter and thick.end_diameter * 1.1)
    out.append(replace(spec, segments=(*spec.segments[:number], thick, *spec.segments[number + 1 :])))
    for k, support in enumerate(spec.supports):
        for key in ("stiffness", "seat"):
            named = getattr(support, key)
            if named:
                name = str(rng.choice(list(named)))
                firm = replace(support, **{key: {**named, name: 3.0 * named[name]}})
                out.append(replace(spec, supports=(*spec.supports[:k], firm, *spec.supports[k + 1 :])))
    return out


def test_stiffer_parts_never_give_more():
    for seed in SEEDS[::3]:
        spec = plain(random_shaft(seed, HARD))
        before = own_give(spec)
        assert (before >= 0).all()
        assert before[0] > 0
        for firm in stiffer(spec, np.random.default_rng(seed)):
            assert (own_give(firm) <= before * (1 + HELD)).all(), f"seed {seed}"


def test_all_twice_as_stiff_gives_half():
    for seed in SEEDS[::3]:
        spec = plain(random_shaft(seed, HARD))
        supports = tuple(
            replace(
                s,
                stiffness=s.stiffness and {name: 2 * k for name, k in s.stiffness.items()},
                seat=s.seat and {name: 2 * k for name, k in s.seat.items()},
                matrix=s.matrix and tuple(tuple(2 * k for k in row) for row in s.matrix),
            )
            for s in spec.supports
        )
        firm = replace(spec, supports=supports, youngs_modulus=2 * spec.youngs_modulus)
        np.testing.assert_allclose(2 * own_give(firm), own_give(spec), rtol=HELD)


def test_a_stiffer_and_stiffer_bearing_becomes_a_pin():
    """The way to the pin is proportional to 1 / k, down to rounding."""
    for seed in SEEDS[::3]:
        drawn = plain(random_shaft(seed, HARD))
        pins = replace(
            drawn, supports=tuple(replace(s, stiffness=None, seat=None, matrix=None) for s in drawn.supports)
        )
        pinned = solved(pins)
        # where a spring as soft as the shaft itself would stand
        soft = float(np.abs(pinned.force_left[..., :3]).max() / np.abs(pinned.u[..., :3]).max())
        away = []
        for k in (1e5 * soft, 1e6 * soft, 1e7 * soft):
            springs = {"radial": k, "axial": k, "tilt": k * 1e-2}
            keep = [{name: v for name, v in springs.items() if name in s.holds} for s in pins.supports]
            supports = tuple(replace(s, stiffness=own) for s, own in zip(pins.supports, keep, strict=True))
            line = solved(replace(pins, supports=supports))
            away.append(np.abs(line.u[..., 1:3] - pinned.u[..., 1:3]).max())
        assert away[0] > away[1] > away[2] > 0
        np.testing.assert_allclose(away[1] / away[2], 10.0, rtol=0.05)
