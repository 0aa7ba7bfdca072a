"""A thousand roller bearings at once, against a stacked solve of as many 5 x 5 systems in the same process.

Only the ratio means something; `pytest -s` prints it. The bound is generous: it is there to find a loop.
"""

from __future__ import annotations

import time
from collections.abc import Callable
from typing import Any

import numpy as np

from fe_shaft.laws.roller import RollerLaw
from fe_shaft.rolling.roller_geometry import RollerGeometry

MOST = 80.0


def fastest(run: Callable[[], Any], repeat: int = 9) -> float:
    """Least processor time of one run [s], which other work on the machine disturbs least."""
    run()
    times = []
    for _ in range(repeat):
        start = time.process_time()
        run()
        times.append(time.process_time() - start)
    return min(times)


def test_against_stacked_solve() -> None:
    b, random = 1000, np.random.default_rng(0)
    sizes = 10 ** random.uniform(-0.3, 0.3, b)
    geometry = RollerGeometry.of(
        random.integers(12, 18, b), 0.010 * sizes, 0.0096 * sizes, 0.065 * sizes,
        contact_angle=0.2, clearance=random.uniform(0, 3e-5, b),
    )  # fmt: skip
    law = RollerLaw.of(geometry)
    u = random.normal(size=(b, 6)) * [1e-5, 3e-5, 3e-5, 1e-4, 1e-4, 1e-4]
    systems, right = random.normal(size=(b, 5, 5)) + 5 * np.eye(5), random.normal(size=(b, 5, 1))
    ours, solve = fastest(lambda: law.respond(u)), fastest(lambda: np.linalg.solve(systems, right))
    loaded = (law.elements(u).load > 0).sum() / geometry.number.sum()
    print(
        f"\n{b} roller bearings, {geometry.number.sum()} rollers ({loaded:.0%} loaded) of 31 laminae: "
        f"{1e6 * ours / b:.1f} us each, {ours / solve:.1f} times a stacked 5 x 5 solve"
    )
    assert ours / solve < MOST
