"""Run all benchmarks: `python benchmarks/run.py --json FILE` (needs the extra `[bench]`).

Times are only worth comparing within one run, so every row carries a ratio: the other library's time over ours, or a
cold start over that of a bare `python -c pass`.
"""

from __future__ import annotations

import argparse
import json
import statistics
import subprocess
import sys
import time
from collections.abc import Callable
from functools import partial
from pathlib import Path
from typing import Any

import numpy as np

ROOT = Path(__file__).resolve().parent.parent
sys.path.insert(0, str(ROOT))

import fe_shaft as fs  # noqa: E402
from benchmarks.others import run_opensees, run_pynite  # noqa: E402
from benchmarks.shafts import our_model, their_problem  # noqa: E402

Row = dict[str, Any]
DEMO = ROOT / "examples" / "layshaft.toml"


def clock(run: Callable[[], Any], repeat: int) -> float:
    """Median time of one run [ms]."""
    times = []
    for _ in range(repeat):
        start = time.perf_counter()
        run()
        times.append(time.perf_counter() - start)
    return statistics.median(times) * 1e3


def first_solutions(n: int, shear: str | float, count: int) -> float:
    """Median time [ms] from a validated model, never solved before, to all its nodal displacements."""
    models = [our_model(n, shear=shear) for _ in range(count)]
    return statistics.median(clock(partial(ours, model), 1) for model in models)


def ours(model: fs.Model) -> np.ndarray:
    """From a validated model to the displacements of all nodes, free-motion check and proof included."""
    return fs.solve(model).lines["shaft"].u[0]


def side_by_side(name: str, n: int, other: Callable[[Any], np.ndarray], *, shear: bool, repeat: int) -> Row:
    """One row: same model, same answers, both clocks."""
    problem, word = their_problem(n, shear=shear), "cowper" if shear else "none"
    theirs_u, ours_u = other(problem), ours(our_model(n, shear=word))
    ours_u = ours_u - np.outer(np.ones(n + 1), [0, 0, 0, ours_u[0, 3], 0, 0])
    size = np.array([np.abs(theirs_u[:, :3]).max()] * 3 + [np.abs(theirs_u[:, 3:]).max()] * 3)
    theirs_ms = clock(partial(other, problem), repeat)
    ours_ms = first_solutions(n, word, 100 if n <= 1000 else 20)
    return {
        "name": name,
        "n": n,
        "ours_ms": ours_ms,
        "theirs_ms": theirs_ms,
        "ratio": theirs_ms / ours_ms,
        "max_difference": float((np.abs(theirs_u - ours_u) / size).max()),
    }


def growth(n: int, base_n: int) -> Row:
    """Time a segment at n segments over that at base_n: 1 is linear growth."""
    models = {k: our_model(k) for k in (base_n, n)}
    per_segment = [clock(partial(ours, model), 5) / k for k, model in models.items()]
    return {
        "name": f"time a segment, over that at n = {base_n}",
        "n": n,
        "ours_ms": per_segment[1] * n,
        "theirs_ms": per_segment[0] * n,
        "ratio": per_segment[1] / per_segment[0],
        "max_difference": 0.0,
    }


def cold_starts(folder: Path) -> list[Row]:
    """Cold starts, as multiples of a bare `python -c pass` in the same run."""
    commands = {
        "python -c 'import fe_shaft'": ["-c", "import fe_shaft"],
        "fe-shaft --help": ["-m", "fe_shaft", "--help"],
        "fe-shaft solve, demo": ["-m", "fe_shaft", "solve", str(DEMO), "--ignore-limits"],
        "first picture, demo": ["-m", "fe_shaft", "view", str(DEMO), "--picture", str(folder / "cold.png")],
    }

    def start(arguments: list[str]) -> None:
        subprocess.run([sys.executable, *arguments], check=True, capture_output=True, cwd=ROOT)

    rows = []
    for name, arguments in commands.items():
        start(arguments)
        bare, own = [], []
        for _ in range(7):
            bare.append(clock(lambda: start(["-c", "pass"]), 1))
            own.append(clock(partial(start, arguments), 1))
        bare_ms, own_ms = statistics.median(bare), statistics.median(own)
        ratio = own_ms / bare_ms
        rows.append(
            {"name": name, "n": 1, "ours_ms": own_ms, "theirs_ms": bare_ms, "ratio": ratio, "max_difference": 0.0}
        )
    return rows


def all_rows(*, quick: bool, folder: Path) -> list[Row]:
    """Every row; `quick` leaves out what takes longer than some seconds."""
    rows = [side_by_side("OpenSeesPy", n, run_opensees, shear=True, repeat=7) for n in (50, 500, 5000)]
    for n, repeat in ((50, 5), (500, 3)) if quick else ((50, 5), (500, 3), (5000, 1)):
        rows.append(side_by_side("PyNiteFEA", n, run_pynite, shear=False, repeat=repeat))
    rows += [growth(n, 5000) for n in ((50_000,) if quick else (50_000, 166_660))]
    return rows + cold_starts(folder)


def main() -> None:
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--json", type=Path, help="write the rows to this file")
    parser.add_argument("--quick", action="store_true", help="leave out the long ones")
    arguments = parser.parse_args()
    folder = arguments.json.parent if arguments.json else Path.cwd()
    rows = all_rows(quick=arguments.quick, folder=folder)
    print(f"{'':34}{'n':>8}{'ours ms':>12}{'theirs ms':>12}{'ratio':>9}  difference")
    for row in rows:
        print("{name:34}{n:8}{ours_ms:12.3f}{theirs_ms:12.3f}{ratio:9.1f}  {max_difference:.1e}".format(**row))
    if arguments.json:
        arguments.json.write_text(json.dumps(rows, indent=2) + "\n", encoding="utf-8")


if __name__ == "__main__":
    main()
