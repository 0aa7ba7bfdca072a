"""Radial internal clearance of unmounted bearings by group and bore, as ISO 5753-1 has it (cylindrical bores)."""

from __future__ import annotations

import tomllib
from dataclasses import dataclass
from functools import cache
from importlib.resources import files
from typing import Any

from fe_shaft.rolling.kinds import Kind
from fe_shaft.rolling.refusal import impossible, mm

GROUPS = ("C2", "CN", "C3", "C4", "C5")
#: Types whose play is set when they are mounted.
SET_AT_MOUNTING = frozenset({Kind.ANGULAR_CONTACT_BALL, Kind.TAPERED_ROLLER})


@dataclass(frozen=True)
class ClearanceGroup:
    """Least and largest radial internal clearance [m], and whether the figures were "read" or are "from memory"."""

    least: float
    largest: float
    source: str

    @property
    def mean(self) -> float:
        """Middle of the group [m]."""
        return (self.least + self.largest) / 2


@dataclass(frozen=True)
class _Table:
    read: tuple[str, ...]
    lines: tuple[tuple[Any, ...], ...]


@cache
def _tables() -> dict[str, _Table]:
    text = (files("fe_shaft.rolling") / "clearance.toml").read_text(encoding="utf-8")
    return {
        kind: _Table(tuple(table["read"]), tuple(tuple(line) for line in table["lines"]))
        for table in tomllib.loads(text)["table"]
        for kind in table["kinds"]
    }


def clearance_group(kind: Kind, bore: float, group: str = "CN") -> ClearanceGroup:
    """Clearance of a group before mounting.

    Parameters
    ----------
    kind : type
    bore : d [m]; needle bearings without an inner ring: the shaft
    group : C2, CN, C3, C4 or, for deep-groove bearings, C5

    Raises
    ------
    ModelError
        For a type whose clearance is set at mounting, an unknown group, or a bore beyond the table.
    """
    if kind in SET_AT_MOUNTING:
        raise impossible("clearance", f"{kind} bearings get theirs when they are mounted. Write the value.")
    if group not in GROUPS:
        raise impossible("clearance", f'"{group}" is no group. Write one of {", ".join(GROUPS)}.')
    table = _tables()[kind]
    column = GROUPS.index(group)
    # A bore of 50 mm given in metres may differ from 50 mm in its last digit.
    line = next((line for line in table.lines if line[0] < round(1e3 * bore, 9) <= line[1]), None)
    if line is None:
        low, high = table.lines[0][0], table.lines[-1][1]
        raise impossible(
            "bore",
            f"{mm(bore)} is outside of the clearance table of {kind} bearings, over {low:g} to {high:g} mm. "
            "Write the clearance.",
        )
    if column + 2 >= len(line):
        raise impossible("clearance", f"{group} of {kind} bearings is not in the table. Write the clearance.")
    least, largest = line[column + 2]
    return ClearanceGroup(1e-6 * least, 1e-6 * largest, "read" if group in table.read else "from memory")
