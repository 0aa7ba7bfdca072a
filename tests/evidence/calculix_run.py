"""Decks for CalculiX CrunchiX, its runs, and what it writes: measures of a whole shaft, per unit load.

`ccx` is a program of its own (G. Dhondt, K. Wittig, www.calculix.de; Debian package calculix-ccx); linear statics of
elastic solids is all that is asked of it. Units mm, N, MPa.

Mirror planes of the quarter: in z = 0 bending is even and torsion odd, in y = 0 both are odd, and axial load is even in
both. Even: nothing moves across the plane. Odd: nothing moves within it. The nodes that stop the rigid motions left
carry nothing, which is checked.
"""

from __future__ import annotations

import os
import re
import shutil
import subprocess
from collections.abc import Iterator
from dataclasses import dataclass
from itertools import groupby
from pathlib import Path

import numpy as np
from numpy.typing import NDArray

from tests.evidence.calculix_loads import along, bending
from tests.evidence.calculix_solid import Mesh, Shaft, Solid, solid

Array = NDArray[np.float64]
E, NU = 210e3, 0.3  # MPa
#: Of the sizes of all forces on a quarter: what a node that only stops rigid motion may carry.
NOTHING = 1e-4
SECONDS = 1800


class CcxError(RuntimeError):
    """ccx did not do what was asked."""


@dataclass(frozen=True)
class Problem:
    """One way of holding a quarter, and its loads."""

    name: str
    odd: tuple[bool, bool]  # in z = 0, in y = 0
    stops: tuple[tuple[str, int], ...]  # end and direction of single nodes
    loads: tuple[Array, ...]  # (n, 3) each, of the whole shaft


def problems(shaft: Shaft, of: Solid) -> tuple[Problem, ...]:
    bent = bending(shaft, of)
    loads = tuple(bent[name] for name in ("defl_load", "defl_tip", "slope_tip"))
    return (
        Problem("bending", (False, True), (("left", 1), ("right", 1)), loads),
        Problem("torsion", (True, True), (("left", 2),), (along(of, "twist"),)),
        Problem("axial", (False, False), (("left", 0),), (along(of, "extension"),)),
    )


def table(rows: Array, ids: NDArray[np.intp], form: str) -> str:
    return "\n".join(f"{i}," + ",".join(form % value for value in row) for i, row in zip(ids + 1, rows, strict=True))


def elements(of: Solid) -> Iterator[str]:
    """All elements; no line has more than 16 entries."""
    number = 0
    for kind, cells in (("C3D20", of.hexes), ("C3D15", of.wedges)):
        if len(cells):
            yield f"*ELEMENT,TYPE={kind},ELSET=ALL"
        for nodes in cells + 1:
            number += 1
            words = [str(number), *map(str, nodes)]
            yield ",\n".join(",".join(part) for part in (words[:10], words[10:]))


def fixed(of: Solid, problem: Problem) -> Iterator[str]:
    """Mirror planes: nothing across an even one, nothing within an odd one."""
    for plane, across, odd in zip((of.nodes[:, 2], of.nodes[:, 1]), (2, 1), problem.odd, strict=True):
        held = [axis for axis in range(3) if (axis != across) == odd]
        for node in np.flatnonzero(np.abs(plane) < 1e-9):
            yield from (f"{node + 1},{axis + 1},{axis + 1}" for axis in held)


def stops(of: Solid, problem: Problem) -> list[tuple[int, int]]:
    """Nodes and directions: on the rim of an end, where the mirror planes leave that direction free."""
    found = []
    for end, direction in problem.stops:
        at_end = np.isclose(of.nodes[:, 0], 0.0 if end == "left" else of.length)
        plane = of.nodes[:, 2] if direction == 2 else of.nodes[:, 1]
        rim = np.where(at_end & (np.abs(plane) < 1e-9), np.hypot(of.nodes[:, 1], of.nodes[:, 2]), -1.0)
        found.append((int(np.argmax(rim)), direction))
    return found


def deck(of: Solid, problem: Problem) -> str:
    read = np.flatnonzero(np.any(problem.loads, axis=(0, 2)))
    held = stops(of, problem)
    lines = ["*NODE,NSET=EVERY", table(of.nodes, np.arange(len(of.nodes)), "%.12e"), *elements(of)]
    lines += ["*NSET,NSET=READ", *(f"{node + 1}," for node in read)]
    lines += ["*NSET,NSET=HELD", *(f"{node + 1}," for node, _ in held)]
    lines += ["*MATERIAL,NAME=STEEL", "*ELASTIC", f"{E},{NU}", "*SOLID SECTION,ELSET=ALL,MATERIAL=STEEL"]
    lines += ["*BOUNDARY", *fixed(of, problem), *(f"{node + 1},{axis + 1},{axis + 1}" for node, axis in held)]
    for load in problem.loads:
        lines += ["*STEP", "*STATIC", "*CLOAD,OP=NEW"]
        lines += [f"{node + 1},{axis + 1},{load[node, axis] / 4:.12e}" for node, axis in np.argwhere(load)]
        lines += ["*NODE PRINT,NSET=READ", "U", "*NODE PRINT,NSET=HELD", "RF", "*END STEP"]
    return "\n".join(lines) + "\n"


def run(folder: Path, name: str, text: str, threads: int) -> str:
    """Let ccx solve a deck; what it printed on nodes."""
    program = shutil.which("ccx")
    if program is None:
        raise CcxError("there is no ccx on the path")
    (folder / f"{name}.inp").write_text(text, encoding="ascii")
    surroundings = {**os.environ, "OMP_NUM_THREADS": str(threads), "CCX_NPROC_RESULTS": str(threads)}
    words = [program, "-i", name]
    done = subprocess.run(
        words, cwd=folder, env=surroundings, capture_output=True, text=True, timeout=SECONDS, check=False
    )
    printed = folder / f"{name}.dat"
    if done.returncode or "*ERROR" in done.stdout or not printed.exists():
        raise CcxError(f"ccx failed on {name} with {done.returncode}:\n{done.stdout[-1500:]}{done.stderr[-500:]}")
    return printed.read_text(encoding="ascii")


def tables(printed: str) -> list[tuple[str, Array]]:
    """Quantity, and rows of (node number, three values), for each table of a .dat file."""
    found: list[tuple[str, Array]] = []
    lines = (line for line in printed.splitlines() if line.strip())
    title = ""
    for is_title, part in groupby(lines, lambda line: re.match(r"\s*\d", line) is None):
        rows = list(part)
        if is_title:
            title = rows[-1].split()[0]
        else:
            found.append((title, np.array([[float(word) for word in row.split()] for row in rows])))
    return found


def solve(folder: Path, of: Solid, problem: Problem, threads: int = 1) -> list[Array]:
    """Movements under each load, (n, 3) [mm]; NaN where none was asked for."""
    found = tables(run(folder, problem.name, deck(of, problem), threads))
    moved = []
    for quantity, rows in found:
        if quantity == "displacements":
            u = np.full_like(of.nodes, np.nan)
            u[rows[:, 0].astype(int) - 1] = rows[:, 1:]
            moved.append(u)
    carried = np.array([rows for quantity, rows in found if quantity == "forces"])
    if len(moved) != len(problem.loads) or len(carried) != len(problem.loads):
        raise CcxError(f"ccx wrote {len(moved)} of {len(problem.loads)} tables of movements for {problem.name}")
    for load, rows in zip(problem.loads, carried, strict=True):
        forces = {int(row[0]) - 1: row[1:] for row in rows}
        for node, axis in stops(of, problem):
            own = forces[node][axis] - load[node, axis] / 4
            if abs(own) > NOTHING * np.abs(load / 4).sum():
                raise CcxError(f"node {node + 1} carries {own:.3g} N in {problem.name}: the loads are not balanced")
    return moved


def work(weights: Array, moved: Array) -> float:
    """Of weights on movements; only nodes that have weights count."""
    used = weights != 0
    return float(weights[used] @ moved[used])


def measure(folder: Path, shaft: Shaft, mesh: Mesh, threads: int = 1) -> dict[str, float]:
    """All measures of a shaft, per 1 N or 1 N mm; lengths in mm."""
    of = solid(shaft, mesh)
    bent, twisted, pulled = problems(shaft, of)
    weights = bending(shaft, of)
    by_load, by_tip_force, by_tip_moment = solve(folder, of, bent, threads)
    (twist,), (pull,) = solve(folder, of, twisted, threads), solve(folder, of, pulled, threads)
    return {
        "defl_load_per_F_load": work(weights["defl_load"], by_load),
        "slope_load_per_F_load": work(weights["slope_load"], by_load),
        "slope_tip_per_F_load": work(weights["slope_tip"], by_load),
        "defl_load_per_M_tip": work(weights["defl_load"], by_tip_moment),
        "slope_tip_per_M_tip": work(weights["slope_tip"], by_tip_moment),
        "defl_tip_per_M_tip": work(weights["defl_tip"], by_tip_moment),
        "defl_tip_per_F_tip": work(weights["defl_tip"], by_tip_force),
        "twist_per_T": work(twisted.loads[0], twist),
        "extension_per_N": work(pulled.loads[0], pull),
    }
