"""How long the force laws take: `python benchmarks/bearing_laws.py`.

The measure is one stacked solution of as many 5 x 5 systems with numpy, timed in turn with the law in the same run.
"""

from __future__ import annotations

import sys
import time
from collections.abc import Callable
from pathlib import Path
from typing import Any

import numpy as np

sys.path.insert(0, str(Path(__file__).resolve().parent.parent))

from fe_shaft.laws.ball import BallLaw
from fe_shaft.rolling.ball_geometry import BallGeometry

BEARINGS = 1000


def ball_law(rng: np.random.Generator) -> tuple[BallLaw, np.ndarray]:
    """Invented ball bearings with 7 to 16 balls, a third each of deep groove, 15 and 40 degrees, and movements."""
    geometry = BallGeometry.of(
        rng.integers(7, 17, BEARINGS), rng.uniform(0.007, 0.02, BEARINGS), rng.uniform(0.08, 0.12, BEARINGS),
        contact_angle=np.deg2rad(rng.choice([0.0, 15.0, 40.0], BEARINGS)), clearance=rng.uniform(-5e-6, 2e-5, BEARINGS),
    )  # fmt: skip
    return BallLaw.of(geometry), rng.normal(size=(BEARINGS, 6)) * [2e-5, 2e-5, 2e-5, 0, 3e-4, 3e-4]


def in_turn(*runs: Callable[[], Any], repeat: int) -> list[float]:
    """Least processor time [ms] of each, run in turn: what other programs take of the machine is not in it."""
    times: list[list[float]] = [[] for _ in runs]
    for _ in range(repeat):
        for kept, run in zip(times, runs, strict=True):
            start = time.process_time()
            run()
            kept.append(time.process_time() - start)
    return [min(each) * 1e3 for each in times]


def ball_ratio(repeat: int = 30) -> tuple[float, float, float]:
    """Milliseconds for energy, force and tangent of 1,000 bearings and for 1,000 5 x 5 solutions, and their ratio."""
    rng = np.random.default_rng(7)
    law, u = ball_law(rng)
    law.respond(u)  # what is made once
    root = rng.normal(size=(BEARINGS, 5, 5))
    matrix, load = root @ root.swapaxes(1, 2) + np.eye(5), rng.normal(size=(BEARINGS, 5, 1))
    ours, theirs = in_turn(lambda: law.respond(u), lambda: np.linalg.solve(matrix, load), repeat=repeat)
    return ours, theirs, ours / theirs


def setting_up(repeat: int = 10) -> float:
    """Milliseconds to make the law of 1,000 bearings, Hertz's contacts and the lines included."""
    law, u = ball_law(np.random.default_rng(7))
    return in_turn(lambda: BallLaw.of(law.geometry).respond(u), repeat=repeat)[0]


if __name__ == "__main__":
    print("1,000 ball bearings: {:.2f} ms; 1,000 solutions 5 x 5: {:.2f} ms; ratio {:.2f}".format(*ball_ratio(100)))
    print(f"making the law, first answer included: {setting_up():.2f} ms")
