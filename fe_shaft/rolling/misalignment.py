"""How far inner and outer ring may be tilted against each other, with the spread of what makers say.

A maker's figure presumes a moderate load and normal clearance; the pressure at the rollers' ends, where it is computed,
says more.
"""

from __future__ import annotations

import tomllib
from dataclasses import dataclass
from functools import cache
from importlib.resources import files

from fe_shaft.rolling.kinds import Kind


@dataclass(frozen=True)
class Said:
    """What one source says: low and high end [rad]."""

    source: str
    low: float
    high: float


@dataclass(frozen=True)
class TiltLimit:
    """Tilt from which to warn and beyond which to fail [rad]; what was found, and a remark or nothing."""

    warn: float
    fail: float
    found: tuple[Said, ...]
    note: str


@cache
def _limits() -> dict[str, TiltLimit]:
    text = (files("fe_shaft.rolling") / "misalignment.toml").read_text(encoding="utf-8")
    return {
        row["kind"]: TiltLimit(
            1e-3 * row["warn"],
            1e-3 * row["fail"],
            tuple(Said(source, 1e-3 * low, 1e-3 * high) for source, low, high in row["found"]),
            row.get("note", ""),
        )
        for row in tomllib.loads(text)["limit"]
    }


def tilt_limit(kind: Kind) -> TiltLimit:
    """Limits of a type."""
    return _limits()[kind]
