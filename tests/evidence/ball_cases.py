"""Cases of balls.toml, and the bearings they are about."""

from __future__ import annotations

import tomllib
from pathlib import Path
from typing import Any

import numpy as np

from fe_shaft.rolling.ball_geometry import BallGeometry

MM, MPA = 1e-3, 1e6
#: N/mm^1.5 in N/m^1.5.
PER_MM15 = MM**-1.5

with (Path(__file__).parent / "balls.toml").open("rb") as _file:
    CASES: dict[str, dict[str, Any]] = {case["id"]: case for case in tomllib.load(_file)["case"]}


def bearing(given: dict[str, Any], balls: int = 1) -> BallGeometry:
    """The bearing of a case; `balls` times as many of them where an integral over the circle is meant."""
    return BallGeometry.of(
        given["Z"] * balls, given["D_mm"] * MM, given["dm_mm"] * MM,
        inner_conformity=given.get("fi", given.get("f")), outer_conformity=given.get("fo", given.get("f")),
        contact_angle=np.deg2rad(given.get("alpha0_deg", given.get("alpha_deg", 0.0))),
        clearance=given.get("Pd_mm", 0.0) * MM, youngs=given.get("E_MPa", 206843.0) * MPA, poisson=given.get("nu", 0.3),
    )  # fmt: skip
