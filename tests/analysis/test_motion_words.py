"""What the engineer reads when something can move or a load cannot be carried: shaft, motion, reason, remedy."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
import pytest

import fe_shaft as fs
from tests.models import matrix

SPRING = {"radial": "100 N/um"}
BOTH = {"radial": "100 N/um", "axial": "60 N/um"}
TORQUE = {"torque": "100 N m", "turns": "clockwise from left"}


def shaft(name: str = "layshaft", **words: Any) -> fs.Shaft:
    return fs.Shaft(name, [fs.Segment(length="200 mm", diameter="30 mm")], material="42CrMo4", **words)


def pin(name: str, at: str, *holds: str, **words: Any) -> fs.Pin:
    return fs.Pin(name, at=at, holds=list(holds), **words)


def bearing(name: str, at: str, *holds: str, **words: Any) -> fs.Bearing:
    give = {} if "matrix" in words or "stiffness" in words else {"stiffness": BOTH if "axial" in holds else SPRING}
    return fs.Bearing(name, at=at, holds=list(holds), **give, **words)


def stiff(**diagonal: float) -> dict[str, Any]:
    """A matrix with these entries on its diagonal, in N, m, rad."""
    keys = ("ux", "uy", "uz", "rx", "ry", "rz")
    return matrix(np.diag([diagonal.get(key, 0.0) for key in keys]).tolist())


def skew(*direction: float) -> dict[str, Any]:
    """A spring along one direction of all six."""
    return matrix((1e8 * np.outer(direction, direction)).tolist())


def thrust(name: str = "thrust", at: str = "100 mm", **words: str) -> fs.Force:
    return fs.Force(name, at=at, **words)


def case(name: str, **words: Any) -> fs.Case:
    return fs.Case(name, **words)


LEFT, RIGHT = ("lay_left", "20 mm"), ("lay_right", "180 mm")
GEARS = [
    fs.Gear("wheel", at="60 mm", pitch_diameter="100 mm", spread="point", mate="9 o'clock"),
    fs.Gear("pinion", at="120 mm", pitch_diameter="50 mm", spread="point", mate="3 o'clock"),
]
HELICAL = fs.Gear("wheel", at="60 mm", pitch_diameter="100 mm", helix="15 deg left", spread="point", mate="9 o'clock")
OUT = fs.Coupling("output", at="200 mm")
FLOW = {"enters": "wheel", "leaves": "output", **TORQUE}


@dataclass(frozen=True)
class Scenario:
    parts: list[Any]
    cases: list[fs.Case]
    heading: dict[str, Any]
    read: list[str]  # every line that the engineer reads


SCENARIOS = {
    "no support at all": Scenario(
        [shaft()],
        [],
        {},
        [
            "layshaft can move every way: it stands on no support.",
            "  Put it on two pins or bearings that hold radial; let one of them hold axial as well.",
        ],
    ),
    "slides, nothing pushes": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial")],
        [],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially.",
            '  Write in lay_right   holds = ["radial", "axial"] and its stiffness.axial, such as "60 N/um"',
        ],
    ),
    "slides, pushed left": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial"), thrust(axial="-567 N")],
        [],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially; 567 N push it left.",
            '  Write in lay_right   holds = ["radial", "axial"] and its stiffness.axial, such as "60 N/um"',
            "  (stops_left instead of axial is enough: nothing pushes it right.)",
        ],
    ),
    "slides on pins, pushed right": Scenario(
        [shaft(), pin(*LEFT, "radial"), pin(*RIGHT, "radial"), thrust(axial="567 N")],
        [],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially; 567 N push it right.",
            '  Write in lay_right   holds = ["radial", "axial"]',
            "  (stops_right instead of axial is enough: nothing pushes it left.)",
        ],
    ),
    "slides, helical gear drives it right": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial"), HELICAL, OUT],
        [case("running", **FLOW)],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially; 536 N push it right.",
            '  Write in lay_right   holds = ["radial", "axial"] and its stiffness.axial, such as "60 N/um"',
            "  (stops_right instead of axial is enough: nothing pushes it left.)",
        ],
    ),
    "slides, most cases push right": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial"), HELICAL, OUT],
        [
            case("running", **FLOW),
            case("starting", like="running", torque_factor=2.2),
            case("reversed", like="running", turns="counterclockwise from left"),
        ],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially; 1179 N push it right in case",
            "    starting.",
            '  Write in lay_right   holds = ["radial", "axial"] and its stiffness.axial, such as "60 N/um"',
            "  (stops_right instead of axial is enough except in reversed, which pushes it left.)",
        ],
    ),
    "slides, weight pulls a vertical shaft": Scenario(
        [shaft(axis="+Y", twelve="+Z"), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial")],
        [],
        {"gravity": "down"},
        [
            "layshaft can slide along its axis: no support holds it axially; 10.9 N push it left.",
            '  Write in lay_right   holds = ["radial", "axial"] and its stiffness.axial, such as "60 N/um"',
            "  (stops_left instead of axial is enough: nothing pushes it right.)",
        ],
    ),
    "slides, tilt of a bearing is kept": Scenario(
        [shaft(), pin(*LEFT, "radial", "tilt")],
        [],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially.",
            '  Write in lay_left   holds = ["radial", "axial", "tilt"]',
        ],
    ),
    "slides, stiffness is written but not held": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial", stiffness=BOTH)],
        [],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially.",
            '  Write in lay_right   holds = ["radial", "axial"]',
        ],
    ),
    "slides, the matrix has no axial entry": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial", "axial", matrix=stiff(uy=1e8, uz=1e8))],
        [],
        {},
        [
            'layshaft can slide along its axis: lay_right holds "axial" without a stiffness there.',
            "  Give the matrix of lay_right (or of its seat) an axial stiffness, at ux.",
        ],
    ),
    "slides with its seat": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "radial", "axial", seat={"matrix": stiff(uy=1e9, uz=1e9)})],
        [],
        {},
        [
            'layshaft can slide along its axis: lay_right holds "axial" without a stiffness there.',
            "  Give the matrix of lay_right (or of its seat) an axial stiffness, at ux.",
        ],
    ),
    "stop on the wrong side": Scenario(
        [
            shaft(),
            bearing(*LEFT, "radial", "stops_left", stiffness=BOTH),
            bearing(*RIGHT, "radial"),
            thrust(axial="1.41 kN"),
        ],
        [],
        {},
        [
            "layshaft can slide to the right: lay_left keeps it only from moving left; 1410 N push it right.",
            '  Write in lay_left   holds = ["radial", "axial"]',
        ],
    ),
    "stop on the wrong side in one case": Scenario(
        [shaft(), pin(*LEFT, "radial", "stops_left"), pin(*RIGHT, "radial"), HELICAL, OUT],
        [case("running", **FLOW), case("reversed_jam", like="running", turns="counterclockwise from left")],
        {},
        [
            "layshaft can slide to the right: lay_left keeps it only from moving left; 536 N push it right in",
            "    case running.",
            '  Write in lay_left   holds = ["radial", "axial"]',
        ],
    ),
    "two stops, both the same way": Scenario(
        [shaft(), pin(*LEFT, "radial", "stops_right"), pin(*RIGHT, "radial", "stops_right"), thrust(axial="-300 N")],
        [],
        {},
        [
            "layshaft can slide to the left: lay_left and lay_right keep it only from moving right; 300 N push it",
            "    left.",
            '  Write in lay_right   holds = ["radial", "axial"]',
        ],
    ),
    "swings on one pin": Scenario(
        [shaft(), pin(*LEFT, "radial", "axial")],
        [],
        {},
        [
            "layshaft can swing across its axis about lay_left: no other support holds it radially.",
            '  Add a second support that holds radial, or let lay_left hold "tilt".',
        ],
    ),
    "swings on one bearing": Scenario(
        [shaft(), bearing(*RIGHT, "radial", "axial")],
        [],
        {},
        [
            "layshaft can swing across its axis about lay_right: no other support holds it radially.",
            "  Add a second support that holds radial, or give lay_right a tilt stiffness.",
        ],
    ),
    "second support holds only axially": Scenario(
        [shaft(), pin(*LEFT, "radial"), pin(*RIGHT, "axial")],
        [],
        {},
        [
            "layshaft can swing across its axis about lay_left: no other support holds it radially.",
            '  Write in lay_right   holds = ["radial", "axial"], or let lay_left hold "tilt".',
        ],
    ),
    "second bearing holds only axially": Scenario(
        [shaft(), bearing(*LEFT, "radial"), bearing(*RIGHT, "axial")],
        [],
        {},
        [
            "layshaft can swing across its axis about lay_left: no other support holds it radially.",
            '  Write in lay_right   holds = ["radial", "axial"], or give lay_left a tilt stiffness.',
        ],
    ),
    "two pins in one place": Scenario(
        [shaft(), pin(*LEFT, "radial", "axial"), pin("twin", "20 mm", "radial")],
        [],
        {},
        [
            "layshaft can swing across its axis about lay_left and twin: they hold it radially in one place,",
            "    20 mm from the shaft's left end.",
            '  Add a second support that holds radial, or let twin hold "tilt".',
        ],
    ),
    "load centres meet": Scenario(
        [
            shaft(),
            bearing(*LEFT, "radial", "axial", load_centre="40 mm"),
            bearing("other", "100 mm", "radial", load_centre="-40 mm"),
        ],
        [],
        {},
        [
            "layshaft can swing across its axis about lay_left and other: they hold it radially in one place,",
            "    where their load centres meet, 60 mm from the shaft's left end.",
            "  Add a second support that holds radial, or give other a tilt stiffness.",
        ],
    ),
    "a point beside the ring": Scenario(
        [shaft(), bearing(*LEFT, "radial", "axial", load_centre="-15 mm")],
        [],
        {},
        [
            "layshaft can swing across its axis about lay_left (its load centre, 5 mm from the shaft's left end):",
            "    no other support holds it radially.",
            "  Add a second support that holds radial, or give lay_left a tilt stiffness.",
        ],
    ),
    "no radial support, one axial pin": Scenario(
        [shaft(), pin(*LEFT, "axial")],
        [],
        {},
        [
            "layshaft can move and tilt across its axis: no support holds it radially.",
            '  Write in lay_left   holds = ["radial", "axial"], and add a second support that does.',
        ],
    ),
    "no radial support, two axial pins": Scenario(
        [shaft(), pin(*LEFT, "axial"), pin(*RIGHT, "spin")],
        [],
        {},
        [
            "layshaft can move and tilt across its axis: no support holds it radially.",
            '  Write in lay_left   holds = ["radial", "axial"]',
            '  Write in lay_right   holds = ["radial", "spin"]',
        ],
    ),
    "only tilt is held": Scenario(
        [shaft(), pin(*LEFT, "tilt", "axial")],
        [],
        {},
        [
            "layshaft can shift across its axis: lay_left holds it only against tilting.",
            '  Write in lay_left   holds = ["radial", "axial", "tilt"]',
        ],
    ),
    "tilt stiffness, but not radial": Scenario(
        [shaft(), bearing(*LEFT, "axial", stiffness=BOTH | {"tilt": "5 N m/mrad"})],
        [],
        {},
        [
            "layshaft can shift across its axis: lay_left holds it only against tilting.",
            '  Write in lay_left   holds = ["radial", "axial"]',
        ],
    ),
    "slides and swings": Scenario(
        [shaft(), pin(*LEFT, "radial")],
        [],
        {},
        [
            "layshaft can slide along its axis: no support holds it axially.",
            '  Write in lay_left   holds = ["radial", "axial"]',
            "layshaft can swing across its axis about lay_left: no other support holds it radially.",
            '  Add a second support that holds radial, or let lay_left hold "tilt".',
        ],
    ),
    "slides, swings and is level": Scenario(
        [shaft(), pin(*LEFT, "radial")],
        [],
        {"gravity": "down"},
        [
            "layshaft can slide along its axis: no support holds it axially.",
            '  Write in lay_left   holds = ["radial", "axial"]',
            "layshaft can swing across its axis about lay_left: no other support holds it radially.",
            '  Add a second support that holds radial, or let lay_left hold "tilt".',
        ],
    ),
    "one plane is missing in both matrices": Scenario(
        [
            shaft(),
            bearing(*LEFT, "radial", "axial", matrix=stiff(ux=1e8, uy=1e8)),
            bearing(*RIGHT, "radial", matrix=stiff(uy=1e8)),
        ],
        [],
        {},
        [
            "layshaft can move and tilt towards 3 and 9 o'clock: no support holds it radially in that direction.",
            "  Give lay_left and lay_right a stiffness in that direction too, or add a support that holds it",
            "    there.",
        ],
    ),
    "one plane is missing in one matrix": Scenario(
        [
            shaft(),
            bearing(*LEFT, "radial", "axial", matrix=stiff(ux=1e8, uy=1e8, uz=1e8)),
            bearing(*RIGHT, "radial", matrix=stiff(uy=1e8)),
        ],
        [],
        {},
        [
            "layshaft can swing towards 3 and 9 o'clock about lay_left: no other support holds it radially in",
            "    that direction.",
            "  Give lay_right a stiffness in that direction too, or give lay_left a tilt stiffness.",
        ],
    ),
    "one plane is missing, level": Scenario(
        [
            shaft(),
            bearing(*LEFT, "radial", "axial", matrix=stiff(ux=1e8, uy=1e8, uz=1e8)),
            bearing(*RIGHT, "radial", matrix=stiff(uz=1e8)),
        ],
        [],
        {"gravity": "down"},
        [
            "layshaft can swing up and down about lay_left: no other support holds it radially in that direction.",
            "  Give lay_right a stiffness in that direction too, or give lay_left a tilt stiffness.",
        ],
    ),
    "each plane about another support": Scenario(
        [
            shaft(),
            bearing(*LEFT, "radial", "axial", matrix=stiff(ux=1e8, uy=1e8)),
            bearing(*RIGHT, "radial", matrix=stiff(uz=1e8)),
        ],
        [],
        {},
        [
            "layshaft can swing towards 12 and 6 o'clock about lay_left: no other support holds it radially in",
            "    that direction.",
            "  Give lay_right a stiffness in that direction too, or give lay_left a tilt stiffness.",
            "layshaft can swing towards 3 and 9 o'clock about lay_right: no other support holds it radially in",
            "    that direction.",
            "  Give lay_left a stiffness in that direction too, or give lay_right a tilt stiffness.",
        ],
    ),
    "a skew direction is missing": Scenario(
        [shaft(), pin(*LEFT, "tilt", "axial"), bearing(*RIGHT, "radial", matrix=skew(0, 1, 1, 0, 0, 0))],
        [],
        {},
        [
            "layshaft can move across its axis towards 10:30 o'clock and back: the stiffness of lay_right does",
            "    not resist that.",
            "  Give lay_right a stiffness in that direction too, or add a support that holds it there.",
        ],
    ),
    "held along a screw": Scenario(
        [
            shaft(),
            pin(*LEFT, "radial", "tilt"),
            bearing(*RIGHT, "radial", "axial", "spin", matrix=skew(1, 0, 0, 0.02, 0, 0)),
        ],
        [],
        {},
        [
            "layshaft can spin while it slides along its axis: the stiffness of lay_right does not resist that.",
            "  Give lay_right a stiffness in that direction too, or add a support that holds it there.",
        ],
    ),
    "seat gives in one plane": Scenario(
        [shaft(), pin(*LEFT, "radial", "axial"), bearing(*RIGHT, "radial", seat={"matrix": stiff(ux=1e9, uy=1e9)})],
        [],
        {},
        [
            "layshaft can swing towards 3 and 9 o'clock about lay_left: no other support holds it radially in",
            "    that direction.",
            '  Give lay_right a stiffness in that direction too, or let lay_left hold "tilt".',
        ],
    ),
    "one of two shafts slides": Scenario(
        [
            shaft("first"),
            shaft("second", left_end=["0 mm", "0 mm", "90 mm"]),
            pin("a", "20 mm", "radial", "axial", on="first"),
            pin("b", "180 mm", "radial", on="first"),
            pin("c", "20 mm", "radial", on="second"),
            pin("d", "180 mm", "radial", on="second"),
        ],
        [],
        {},
        [
            "second can slide along its axis: no support holds it axially.",
            '  Write in d   holds = ["radial", "axial"]',
        ],
    ),
    "both shafts are loose": Scenario(
        [
            shaft("first"),
            shaft("second", left_end=["0 mm", "0 mm", "90 mm"]),
            pin("a", "20 mm", "radial", "axial", on="first"),
            pin("c", "20 mm", "radial", on="second"),
            pin("d", "180 mm", "radial", on="second"),
        ],
        [],
        {},
        [
            "first can swing across its axis about a: no other support holds it radially.",
            '  Add a second support that holds radial, or let a hold "tilt".',
            "second can slide along its axis: no support holds it axially.",
            '  Write in d   holds = ["radial", "axial"]',
        ],
    ),
    "spins under a couple": Scenario(
        [shaft(), pin(*LEFT, "radial", "axial"), pin(*RIGHT, "radial"), thrust("motor", couple={"axial": "25 N m"})],
        [],
        {},
        [
            "layshaft can spin: 25 N m turn it clockwise, seen from its left end, and nothing takes them out.",
            '  Balance it by a couple.axial, or let a pin hold "spin".',
        ],
    ),
    "spins under a force at a radius": Scenario(
        [
            shaft(),
            pin(*LEFT, "radial", "axial"),
            pin(*RIGHT, "radial"),
            thrust("crank", up="200 N", radius="150 mm", angle="3 o'clock"),
        ],
        [case("pedalling")],
        {},
        [
            "layshaft can spin: 30 N m turn it counterclockwise, seen from its left end, and nothing takes them",
            "    out.",
            '  Balance it by a couple.axial, or let a pin hold "spin".',
        ],
    ),
    "torque enters and never leaves": Scenario(
        [shaft(), pin(*LEFT, "radial", "axial"), pin(*RIGHT, "radial"), *GEARS],
        [case("running", enters="wheel", **TORQUE)],
        {},
        [
            "layshaft can spin: 100 N m turn it clockwise, seen from its left end, and nothing takes them out.",
            '  Write in case running   leaves = "pinion"   or let a pin hold "spin".',
        ],
    ),
    "torque enters and never leaves, two cases": Scenario(
        [shaft(), pin(*LEFT, "radial", "axial"), pin(*RIGHT, "radial"), *GEARS],
        [
            case("running", enters="wheel", leaves="pinion", **TORQUE),
            case("idling", enters="wheel", torque="2 N m", turns="clockwise from right"),
        ],
        {},
        [
            "layshaft can spin: 2 N m turn it counterclockwise, seen from its left end, in case idling, and",
            "    nothing takes them out.",
            '  Write in case idling   leaves = "pinion"   or let a pin hold "spin".',
        ],
    ),
    "weight off the axis turns it": Scenario(
        [
            shaft(),
            pin(*LEFT, "radial", "axial"),
            pin(*RIGHT, "radial"),
            fs.Mass("crank", at="100 mm", mass="3 kg", cg_radius="40 mm", cg_angle="9 o'clock"),
        ],
        [],
        {"gravity": "down"},
        [
            "layshaft can spin: 1.18 N m turn it counterclockwise, seen from its left end, and nothing takes them",
            "    out.",
            '  Balance it by a couple.axial, or let a pin hold "spin".',
        ],
    ),
    "a stop is pulled": Scenario(
        [
            shaft(),
            pin(*LEFT, "radial", "stops_left"),
            pin(*RIGHT, "radial", "axial"),
            thrust("near", at="60 mm", axial="100 N"),
            thrust("far", at="200 mm", axial="-500 N"),
        ],
        [],
        {},
        [
            "layshaft pulls away from lay_left with 75 N, but lay_left only keeps it from moving left.",
            '  Write in lay_left   holds = ["radial", "axial"], or take its stop out.',
        ],
    ),
    "pins cannot hold": Scenario(
        [shaft(), bearing(*LEFT, "radial", "axial", stiffness=BOTH | {"tilt": "5 N m/mrad"})],
        [],
        {},
        [
            "on rigid pins, layshaft can swing across its axis about lay_left: no other support holds it radially.",
            '  Add a second support that holds radial, or let lay_left hold "tilt".',
            '  (A pin holds what "holds" says; a stiffness that is not held is none there.)',
        ],
    ),
}


@pytest.mark.parametrize("scenario", SCENARIOS.values(), ids=SCENARIOS)
def test_the_sentence_names_shaft_motion_and_remedy(scenario):
    model = fs.Model("", scenario.parts, scenario.cases, **scenario.heading)
    with pytest.raises((fs.FreeMotionError, fs.LoadError)) as refused:
        fs.compare(model)
    assert str(refused.value).split("\n") == scenario.read
    assert refused.value.exit_code == 4


def test_the_sentence_names_the_line_of_the_file(tmp_path, monkeypatch):
    monkeypatch.chdir(tmp_path)
    (tmp_path / "loose.toml").write_text(
        """[shafts.layshaft]
material = "42CrMo4"
segments = [{ length = "200 mm", diameter = "30 mm" }]
[pins.lay_left]
at = "20 mm"
holds = ["radial"]
[pins.lay_right]
at = "180 mm"
holds = ["radial"]
"""
    )
    with pytest.raises(fs.FreeMotionError) as refused:
        fs.solve(fs.read("loose.toml"))
    first = str(refused.value).splitlines()[0]
    assert first == "loose.toml:1 layshaft can slide along its axis: no support holds it axially."


def test_long_lists_of_cases_are_counted():
    cases = [case(f"case_{k}", enters="wheel", **TORQUE | {"torque": f"{10 + k} N m"}) for k in range(9)]
    with pytest.raises(fs.LoadError) as refused:
        fs.solve(fs.Model("", [shaft(), pin(*LEFT, "radial", "axial"), pin(*RIGHT, "radial"), *GEARS], cases))
    words = " ".join(str(refused.value).split())
    assert words == (
        "layshaft can spin: 18 N m turn it clockwise, seen from its left end, in case case_8, and nothing takes them "
        "out (likewise in case_0, case_1, case_2 and 5 more). "
        'Write in case case_8 leaves = "pinion" or let a pin hold "spin".'
    )


def test_there_are_at_least_forty():
    assert len(SCENARIOS) >= 40


@pytest.mark.parametrize("scenario", SCENARIOS.values(), ids=SCENARIOS)
def test_every_sentence_is_whole(scenario):
    """The first line of each motion names its shaft and what it can do; below it stands what to write."""
    names = [part.name for part in scenario.parts if isinstance(part, fs.Shaft)]
    told = [line.removeprefix("on rigid pins, ") for line in scenario.read]
    assert max(map(len, told)) <= 100
    for line, below in zip(told, [*told[1:], ""], strict=True):
        if line.startswith("  "):
            continue
        assert line.split()[0] in names
        assert line.split()[1:2] == ["can"] or line.split()[1:3] == ["pulls", "away"]
        assert below.startswith("  ")
