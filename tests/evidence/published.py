"""Figures out of beams.toml in SI, and the comparison that all tests of this folder use."""

from __future__ import annotations

import math
import tomllib
from dataclasses import dataclass
from pathlib import Path
from typing import Any

#: Figures of beams.toml that were computed from a published formula are written with nine significant digits:
#: half a unit of the last one is at most 5e-9 of the figure.
NINE_DIGITS = 5e-9

_INCH, _LBF = 0.0254, 4.4482216152605
#: Exact by definition: inch 0.0254 m, pound 0.45359237 kg, standard gravity 9.80665 m/s^2.
SI = {
    "-": 1.0, "m": 1.0, "m4": 1.0, "1/m": 1.0, "rad": 1.0, "N": 1.0, "N.m": 1.0, "N/m": 1.0, "N/m2": 1.0, "Pa": 1.0,
    "GPa": 1e9, "kg/m3": 1.0, "1e-6/K": 1e-6, "L": 1.0, "wL": 1.0, "deg": math.pi / 180,
    "in": _INCH, "in4": _INCH**4, "1/in": 1 / _INCH, "lbf": _LBF, "lbf.in": _LBF * _INCH, "psi": _LBF / _INCH**2,
    "hp": 550 * 12 * _LBF * _INCH, "rpm": math.pi / 30,
}  # fmt: skip


@dataclass(frozen=True)
class Case:
    """One case of beams.toml."""

    inputs: dict[str, Any]
    expected: dict[str, Any]
    source: str

    def given(self, key: str) -> float:
        """An input in SI."""
        return _si(self.inputs[key])

    def printed(self, key: str) -> float:
        """An expected figure in SI."""
        return _si(self.expected[key])


def _si(entry: list[Any]) -> float:
    number, unit = entry
    return float(number) * SI[unit.split(" ")[0]]


def _read() -> dict[str, Case]:
    with (Path(__file__).parent / "beams.toml").open("rb") as file:
        rows = tomllib.load(file)["case"]
    return {row["id"]: Case(row["inputs"], row["expected"], row["source"]) for row in rows}


CASES = _read()


def agree(got: float, want: float, *, rel: float = 1e-9, within: float = 0.0) -> None:
    """Demand two numbers to be equal within a share of the wanted one, or within an absolute difference."""
    gap = abs(got - want)
    assert gap <= max(rel * abs(want), within), f"{got!r} is not {want!r}: off by {gap:.3g}, {_share(gap, want)}"


def _share(gap: float, want: float) -> str:
    return f"{gap / abs(want):.3g} of it" if want else "and it should vanish"


def text(value: float, unit: str) -> str:
    """A number with its unit, so that it reads back to the very same float."""
    return f"{float(value)!r} {unit}"
