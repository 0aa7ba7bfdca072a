"""Which motions are free: 20,000 random support sets against exact ranks, none missed and none invented.

The decision under test is one of rounded numbers (singular values); the independent one counts in whole numbers.
The sentences are in test_motion_words.py.
"""

from __future__ import annotations

import random
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from fractions import Fraction
from typing import Any

import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.fem.rigid_motion import free_motions
from tests.models import LOOSE, matrix

SETS, CHUNKS, SOLVED = 20_000, 10, 30
GRID = 10_000  # places are whole numbers of 0.1 mm
HELD = {"radial": (1, 2), "axial": (0,), "tilt": (4, 5), "spin": (3,)}
SHAFT = {}


@dataclass(frozen=True)
class Drawn:
    """A support with its independent description: exact directions it holds (6 each)."""

    part: fs.Pin | fs.Bearing
    rows: tuple[tuple[Fraction, ...], ...]


def draw(rng: random.Random) -> tuple[int, list[Drawn]]:
    """A length and up to four supports, often too few, in one place or in the wrong directions."""
    length = rng.choice([500, 2_000, 10_000, 100_000])
    places: list[int] = []
    out = []
    for k in range(rng.choice([0, 1, 1, 2, 2, 2, 3, 4])):
        near = places and rng.random() < 0.25
        x = min(max(rng.choice(places) + rng.choice([-20, 0, 20]), 0), length) if near else rng.randint(0, length)
        places.append(x)
        centre = rng.choice([0, 0, 0, -x, 137, -20])
        out.append(rng.choice([pin, pin, bearing, full_matrix])(rng, f"support_{k}", x, centre))
    return length, out


def place(x: int, centre: int) -> dict[str, str]:
    words = {"at": f"{x / 10} mm", **LOOSE}
    return words | {"load_centre": f"{centre / 10} mm"} if centre else words


def at_left_end(rows: list[list[Fraction]], x: int) -> tuple[tuple[Fraction, ...], ...]:
    """Directions at a point, as directions of the left end's motion."""
    arm = Fraction(x, GRID)
    return tuple((v[0], v[1], v[2], v[3], v[4] - arm * v[2], v[5] + arm * v[1]) for v in rows)


def unit(dof: int) -> list[int]:
    return [int(dof == k) for k in range(6)]


def pin(rng: random.Random, name: str, x: int, centre: int) -> Drawn:
    holds = [word for word in HELD if rng.random() < {"radial": 0.6, "axial": 0.4, "tilt": 0.15, "spin": 0.2}[word]]
    holds = holds or [rng.choice(list(HELD))]
    rows = [unit(dof) for word in holds for dof in HELD[word]]
    return Drawn(fs.Pin(name, holds=holds, **place(x, centre)), at_left_end(rows, x + centre))


def bearing(rng: random.Random, name: str, x: int, centre: int) -> Drawn:
    """Springs direction by direction; tilt counts whether held or not, the rest only where it is held."""
    holds = [word for word in ("radial", "axial") if rng.random() < 0.6] or [rng.choice(["radial", "axial"])]
    given = {"axial": "1e8 N/m", "radial": "1e8 N/m"}
    springs = {word: given[word] for word in ("radial", "axial") if word in holds or rng.random() < 0.3}
    if rng.random() < 0.3:
        springs["tilt"] = "5 N m/mrad"
    rows = [unit(dof) for word in (*holds, *({"tilt"} & set(springs))) for dof in HELD[word]]
    rows, seat = on_seat(rng, rows)
    part = fs.Bearing(name, holds=holds, stiffness=springs, seat=seat, **place(x, centre))
    return Drawn(part, at_left_end(rows, x + centre))


def full_matrix(rng: random.Random, name: str, x: int, centre: int) -> Drawn:
    """A sum of springs along random directions, some of them across all six displacements."""
    holds = [word for word in ("radial", "axial", "spin") if rng.random() < 0.8] or ["radial"]
    used = [int("axial" in holds), *[int("radial" in holds)] * 2, int("spin" in holds), 1, 1]
    springs, seen = [], []
    while not any(any(row) for row in seen):
        springs = random_springs(rng)
        seen = [[value * use for value, use in zip(spring, used, strict=True)] for spring in springs]
    rows, seat = on_seat(rng, seen)
    part = fs.Bearing(name, holds=holds, matrix=summed(springs), seat=seat, **place(x, centre))
    return Drawn(part, at_left_end(rows, x + centre))


def random_springs(rng: random.Random) -> list[list[int]]:
    return [[rng.choice([0, 0, 1, -1, 2, 3]) for _ in range(6)] for _ in range(rng.randint(1, 4))]


def summed(springs: list[list[int]]) -> dict[str, Any]:
    rows = [[1e6 * sum(s[i] * s[j] for s in springs) for j in range(6)] for i in range(6)]
    return matrix(rows)


def on_seat(rng: random.Random, rows: list[list[int]]) -> tuple[list[list[Fraction]], dict[str, Any] | None]:
    """What is held through a seat that itself holds in some directions only; the usual seat holds in all."""
    if rng.random() < 0.75:
        return rows, None
    if rng.random() < 0.5:
        return rows, {"radial": "1e9 N/m"}  # rigid in what is not written
    springs = [*random_springs(rng), *random_springs(rng)]
    if not any(any(spring) for spring in springs):
        return rows, None
    return exact_null([*exact_null(rows), *exact_null(springs)]), {"matrix": summed(springs)}


def reduced(rows: Iterable[Sequence[int | Fraction]]) -> dict[int, list[Fraction]]:
    """Reduced rows by the column of their leading 1, by elimination in fractions."""
    done: dict[int, list[Fraction]] = {}
    for given in rows:
        row = [Fraction(v) for v in given]
        for column, other in done.items():
            row = [a - row[column] * b for a, b in zip(row, other, strict=True)] if row[column] else row
        lead = next((k for k in range(6) if row[k]), None)
        if lead is None:
            continue
        row = [v / row[lead] for v in row]
        for column, other in done.items():
            done[column] = [a - other[lead] * b for a, b in zip(other, row, strict=True)] if other[lead] else other
        done[lead] = row
    return done


def exact_null(rows: Iterable[Sequence[int | Fraction]]) -> list[list[Fraction]]:
    """Basis of what is perpendicular to all rows."""
    done = reduced(rows)
    basis = []
    for free in (k for k in range(6) if k not in done):
        vector = [Fraction(int(k == free)) for k in range(6)]
        for column, row in done.items():
            vector[column] = -row[free]
        basis.append(vector)
    return basis


def exact_rank(rows: Iterable[Sequence[int | Fraction]]) -> int:
    return len(reduced(rows))


def model_of(length: int, drawn: list[Drawn]) -> fs.Model:
    if length not in SHAFT:
        SHAFT[length] = fs.Shaft("shaft", [fs.Segment(length=f"{length / 10} mm", diameter="20 mm")], material="steel")
    return fs.Model("", [SHAFT[length], *(support.part for support in drawn)])


@pytest.mark.parametrize("chunk", range(CHUNKS))
def test_every_free_motion_is_found_and_none_invented(chunk):
    rng = random.Random(chunk)
    for number in range(SETS // CHUNKS):
        length, drawn = draw(rng)
        rows = [row for support in drawn for row in support.rows]
        model = model_of(length, drawn)
        free = free_motions(model.support_table.held_directions("shaft", {"shaft": 0}), length / GRID)
        what = f"chunk {chunk}, set {number}: {[support.part for support in drawn]}"
        assert len(free) == 6 - exact_rank(rows), what
        if len(free) and rows:
            assert np.abs(movements(rows, free, length / GRID)).max() < 1e-9, what
        if number < SOLVED:
            solve_or_refuse(model, rows, what)


def movements(rows: list[tuple[Fraction, ...]], free: np.ndarray, length: float) -> np.ndarray:
    """What free motions do in the held directions, relative to the largest that such a motion could do there."""
    weigh = np.array([1.0, 1.0, 1.0, length, length, length])
    held = np.array(rows, dtype=float) / weigh
    motions = free * weigh
    sizes = np.linalg.norm(held, axis=1)[:, None] * np.linalg.norm(motions, axis=1)
    return (held @ motions.T) / np.where(sizes > 0, sizes, 1.0)


def solve_or_refuse(model: fs.Model, rows: list[tuple[Fraction, ...]], what: str) -> None:
    """The public verb agrees: it refuses when anything but pure spin is free, and names the shaft."""
    if exact_rank(rows) + (not any(row[3] for row in rows)) == 6:
        assert np.isfinite(fs.solve(model).lines["shaft"].u).all(), what
        return
    with pytest.raises(fs.FreeMotionError, match=r"^shaft can ") as refused:
        fs.solve(model)
    assert "\n  " in str(refused.value), f"no remedy: {what}"


def test_exact_rank_counts():
    """The judge itself, on sets that can be counted by hand."""
    one = [(0, 1, 0, 0, 0, 5), (0, 0, 1, 0, -5, 0)]
    assert exact_rank([]) == 0
    assert exact_null([]) == [unit(dof) for dof in range(6)]
    assert exact_null(one) == [unit(0), unit(3), [0, 0, 5, 0, 1, 0], [0, -5, 0, 0, 0, 1]]
    assert exact_rank(one) == 2
    assert exact_rank([*one, *one]) == 2
    assert exact_rank([*one, (0, 1, 0, 0, 0, 6), (0, 0, 1, 0, -6, 0)]) == 4
    assert exact_rank([*one, (0, 0, 0, 0, 1, 0), (0, 0, 0, 0, 0, 1), (1, 0, 0, 0, 0, 0), (0, 0, 0, 1, 0, 0)]) == 6
