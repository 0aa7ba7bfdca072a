"""Models drawn in these tests; all invented."""

from __future__ import annotations

from functools import cache

import fe_shaft.model as fs
from fe_shaft.analysis.solve import solve

SEGMENTS = (
    ("left_journal", "19 mm", "30 mm"),
    ("wheel_seat", "38 mm", "38 mm"),
    ("collar", "10 mm", "46 mm"),
    ("pinion_body", "52 mm", "51 mm"),
    ("right_collar", "8 mm", "40 mm"),
    ("right_journal", "19 mm", "30 mm"),
    ("stub", "45 mm", "24 mm"),
)


def layshaft(**parts) -> fs.Model:
    """A gear shaft on two bearings with three cases; keywords replace parts by name."""
    give = {"radial": "~93 N/um", "tilt": "~5 N m/mrad"}
    gear = {"normal_module": "2 mm", "helix": "15 deg left", "facewidth": "32 mm", "mate": "9 o'clock"}
    known = {
        "layshaft": fs.Shaft(
            "layshaft", [fs.Segment(n, length=h, diameter=d) for n, h, d in SEGMENTS], material="42CrMo4"
        ),
        "lay_left": fs.Bearing("lay_left", at="left_journal", holds=["radial"], stiffness=give),
        "lay_right": fs.Bearing(
            "lay_right", at="right_journal", holds=["radial", "axial"], stiffness=give | {"axial": "~60 N/um"}
        ),
        "wheel": fs.Gear("wheel", at="wheel_seat", teeth=85, **gear),
        "pinion": fs.Gear(
            "pinion", at="pinion_body", teeth=19, **gear | {"normal_module": "3 mm", "mate": "3 o'clock"}
        ),
        "barring_wheel": fs.Mass("barring_wheel", at="stub", mass="4.1 kg", cg_at="stub.right"),
    } | parts
    flow = {"enters": "wheel", "leaves": "pinion"}
    cases = [
        fs.Case("running", **flow, power="5.5 kW", speed="393.7 rpm", turns="clockwise from left"),
        fs.Case("starting", like="running", torque_factor=2.2),
        fs.Case("reversed_jam", **flow, torque="332.6 N m", speed="0 rpm", turns="counterclockwise from left"),
    ]
    return fs.Model("Layshaft of an invented drive", list(known.values()), cases, gravity="down")


@cache
def solved():
    """Results of the layshaft with its bearings."""
    return solve(layshaft())


@cache
def pinned():
    """Results of the layshaft on rigid pins."""
    return solve(layshaft().pinned())


def many() -> fs.Model:
    """Two shafts, one of them upright and hollow, with every kind of part that can be drawn."""
    tube = fs.Shaft(
        "tube",
        [
            fs.Segment("t1", length="60 mm", diameter="60 mm", bore="30 mm"),
            fs.Segment("t2", length="400 mm", diameter="80 mm", end_diameter="60 mm", bore="30 mm"),
        ],
        material="42CrMo4",
        axis="+Y",
        twelve="+Z",
        left_end=["-200 mm", "0 mm", "0 mm"],
    )
    fan = fs.Shaft("fan", [fs.Segment("f1", length="300 mm", diameter="40 mm")], material="42CrMo4")
    stiffness = {"radial": "100 N/um", "axial": "80 N/um"}
    bevel = {"form": "bevel", "pitch_cone_angle": "63.4 deg", "apex": "left", "facewidth": "25 mm"}
    parts = [
        fan,
        tube,
        fs.Pin("fan_left", on="fan", at="20 mm", holds=["radial", "axial"]),
        fs.Bearing("fan_right", on="fan", at="220 mm", holds=["radial"], stiffness={"radial": "90 N/um"},
                   seat={"radial": "60 N/um"}, load_centre="5 mm"),
        fs.Pulley("belt", on="fan", at="280 mm", diameter="160 mm", pulls_towards="7:30 o'clock",
                  belt_pull={"tight": "900 N", "slack": "300 N"}),
        fs.Sprocket("chain", on="fan", at="250 mm", teeth=17, chain_pitch="12.7 mm", pulls_towards="1 o'clock"),
        fs.Coupling("coupling", on="fan", at="60 mm"),
        fs.Gear("crown", on="fan", at="140 mm", teeth=40, normal_module="3 mm", mate="12 o'clock", **bevel),
        fs.Bearing("tube_low", on="tube", at="t1", holds=["radial", "axial"], stiffness=stiffness),
        fs.Pin("tube_key", on="tube", at="tube.left", holds=["spin"]),
        fs.Bearing("tube_high", on="tube", at="440 mm", holds=["radial"], stiffness={"radial": "90 N/um"}),
        fs.Force("push", on="tube", at="200 mm", up="300 N", front="150 N", radius="50 mm", angle="3 o'clock"),
        fs.Force("wrench", on="tube", at="300 mm", couple={"up": "40 N m"}),
        fs.Mass("bowl", on="tube", at="250 mm", mass="3 kg", cg_radius="60 mm", cg_angle="3 o'clock"),
    ]  # fmt: skip
    flow = {"enters": "coupling", "leaves": "belt", "torque": "48 N m", "speed": "900 rpm"}
    return fs.Model("Many parts", parts, [fs.Case("only", **flow, turns="clockwise from right")], gravity="down")
