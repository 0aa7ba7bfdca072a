"""Belt and chain pulls as vectors: statics of the strands, as in machine-design books (common practice, no source).

A belt's two strands leave the pulley along its tangents; their vector sum has the size sqrt(F1^2 + F2^2 - 2 F1 F2
cos(wrap)) and their moment about the shaft is (F1 - F2) r. Here each strand is also put on the shaft as a plain force
at its own tangent point, and both shafts must move alike. ISO 606: pitch diameter of a sprocket p / sin(pi / z); the
printed unit diameters are from memory. Tolerance 1e-9 (both sides are exact), four decimals for the printed ones.
"""

from __future__ import annotations

import math
from typing import Any

import numpy as np
import pytest

import fe_shaft as fs
from tests.evidence.plane import rod
from tests.evidence.published import agree, text

RADIUS, TIGHT, SLACK = 0.08, 900.0, 300.0
TORQUE = (TIGHT - SLACK) * RADIUS


def clock(degrees: float) -> np.ndarray:
    return np.array([math.cos(math.radians(degrees)), math.sin(math.radians(degrees))])


def run(*parts: Any, cases: list[fs.Case]) -> Any:
    """An overhung shaft in two springs, so that up, front, tilt and twist all move; a coupling takes the torque."""
    give = {"up": "30 N/um", "front": "70 N/um", "tilt": "2 N m/mrad"}
    common = [
        fs.Shaft("shaft", [rod(0.15, 0.03), rod(0.2, 0.04, 0.015), rod(0.1, 0.025)], material="42CrMo4"),
        fs.Bearing("near", at="0.05 m", holds=["radial"], stiffness=give),
        fs.Bearing("far", at="0.3 m", holds=["radial", "axial"], stiffness=give | {"axial": "50 N/um"}),
        fs.Coupling("taker", at="shaft.left"),
    ]
    return fs.solve(fs.Model("belt on an overhang", [*common, *parts], cases, shoulders="off")).case()


def same(one: Any, two: Any, place: str) -> None:
    for name in ("near", "far"):
        assert np.allclose(one[name].wrench, two[name].wrench, rtol=1e-9, atol=1e-9 * one[name].force)
    u, w = one["shaft"].at(place).u, two["shaft"].at(place).u
    assert np.allclose(u[:3], w[:3], rtol=1e-9, atol=1e-9 * np.abs(u[:3]).max())
    assert np.allclose(u[3:], w[3:], rtol=1e-9, atol=1e-9 * np.abs(u[3:]).max())


@pytest.mark.parametrize("wrap", [180.0, 165.0, 120.0, 240.0])
@pytest.mark.parametrize("middle", [0.0, 100.0, 225.0])
def test_two_strands(wrap: float, middle: float) -> None:
    """Strands at both ends of the arc of contact, whose middle lies opposite to `middle`."""
    strands, pull = [], np.zeros(2)
    for name, size, way in (("tight", TIGHT, 1.0), ("slack", SLACK, -1.0)):
        point = middle + 180 + way * wrap / 2
        along = size * clock(point + 90 * way)
        pull += along
        strands.append(
            fs.Force(
                name,
                at="0.42 m",
                radius=text(RADIUS, "m"),
                angle=text(point % 360, "deg"),
                up=text(along[0], "N"),
                front=text(along[1], "N"),
            )
        )
    agree(float(np.hypot(*pull)), math.sqrt(TIGHT**2 + SLACK**2 - 2 * TIGHT * SLACK * math.cos(math.radians(wrap))))
    against = fs.Force("against", at="shaft.left", couple={"axial": text(-TORQUE, "N m")})
    by_strands = run(*strands, against, cases=[])
    pulley = fs.Pulley(
        "pulley", at="0.42 m", diameter=text(2 * RADIUS, "m"), wrap=text(wrap, "deg"),
        belt_pull={"tight": text(TIGHT, "N"), "slack": text(SLACK, "N")},
        pulls_towards=text(middle, "deg"),
    )  # fmt: skip
    case = fs.Case("running", enters="pulley", leaves="taker", torque=text(TORQUE, "N m"), turns="clockwise from left")
    by_belt = run(pulley, cases=[case])
    same(by_strands, by_belt, "0.45 m")
    # Twist between the pulley and the end where the torque leaves: sum of T l / G J (from memory).
    stiff = [math.pi / 32 * d for d in (0.03**4, 0.04**4 - 0.015**4, 0.025**4)]
    twist = TORQUE / 81e9 * sum(length / j for length, j in zip((0.15, 0.2, 0.07), stiff, strict=True))
    agree(by_belt["pulley"].twist - by_belt["taker"].twist, twist)
    agree(by_strands["tight"].twist - by_strands["against"].twist, twist)


def test_strands_without_a_case() -> None:
    """Without power the belt still pulls, by its two strands: parallel ones add up; statics of the overhang."""
    belt = {"tight": "900 N", "slack": "900 N"}
    pulley = fs.Pulley("pulley", at="0.42 m", diameter="160 mm", belt_pull=belt, pulls_towards="6 o'clock")
    pins = [fs.Pin("near", at="0.05 m", holds=["radial"]), fs.Pin("far", at="0.3 m", holds=["radial", "axial"])]
    shaft = fs.Shaft("shaft", [rod(0.45, 0.03)], material="42CrMo4")
    case = fs.solve(fs.Model("standing still", [shaft, *pins, pulley])).case()
    agree(case["far"].up_force, 1800 * 0.37 / 0.25)
    agree(case["near"].up_force, -1800 * 0.12 / 0.25)


@pytest.mark.parametrize("factor", [1.0, 1.8, 2.5])
@pytest.mark.parametrize("enters", [True, False])
def test_pull_factor(factor: float, enters: bool) -> None:
    """Load on the shaft = factor times effective pull T / r, both ways of the power (common practice, no source)."""
    pulley = fs.Pulley("wheel", at="0.42 m", diameter="160 mm", pull_factor=factor, pulls_towards="4 o'clock")
    ends = ("wheel", "taker") if enters else ("taker", "wheel")
    case = fs.Case(
        "running", **dict(zip(("enters", "leaves"), ends, strict=True)), power="3 kW", speed="500 rpm",
        turns="clockwise from right",
    )  # fmt: skip
    solved = run(pulley, cases=[case])
    torque = 3000 / (500 * math.pi / 30)
    up, front = factor * torque / 0.08 * clock(120)
    agree(solved["near"].up_force + solved["far"].up_force, -up)
    agree(solved["near"].front_force + solved["far"].front_force, -front)
    agree(solved["wheel"].load[3], -torque if enters else torque)


#: ISO 606, pitch diameter at unit pitch by number of teeth, from memory.
UNIT_DIAMETERS = {11: 3.5495, 13: 4.1786, 17: 5.4422, 19: 6.0755, 21: 6.7095, 25: 7.9787, 38: 12.1096, 57: 18.1529}


@pytest.mark.parametrize("teeth", UNIT_DIAMETERS)
def test_sprocket(teeth: int) -> None:
    """Chain pull T / (d / 2) with d = p / sin(pi / z): read off the bearings, against the printed unit diameter."""
    pitch, torque = 0.01905, 60.0
    wheel = fs.Sprocket("wheel", at="0.42 m", teeth=teeth, chain_pitch=text(pitch, "m"), pulls_towards="1:30 o'clock")
    case = fs.Case("running", enters="taker", leaves="wheel", torque="60 N m", turns="clockwise from left")
    solved = run(wheel, cases=[case])
    pull = math.hypot(*(solved["near"].wrench[1:3] + solved["far"].wrench[1:3]))
    agree(2 * torque / pull, pitch / math.sin(math.pi / teeth))
    agree(2 * torque / pull / pitch, UNIT_DIAMETERS[teeth], rel=0.0, within=0.00005)
    # Pulled towards half past one: equally up and to the front.
    agree(-solved["near"].up_force - solved["far"].up_force, pull / math.sqrt(2))
    agree(-solved["near"].front_force - solved["far"].front_force, pull / math.sqrt(2))


def test_chain_by_diameter_and_factor() -> None:
    """A sprocket by its diameter, with a factor for the chain's own pull (common practice, no source)."""
    wheel = fs.Sprocket("wheel", at="0.42 m", diameter="138 mm", pull_factor=1.15, pulls_towards="9 o'clock")
    case = fs.Case("running", enters="taker", leaves="wheel", torque="60 N m", turns="clockwise from left")
    solved = run(wheel, cases=[case])
    agree(solved["near"].front_force + solved["far"].front_force, 1.15 * 60 / 0.069)
