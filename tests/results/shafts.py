"""Small invented models whose printed results are read in the tests of this folder."""

from __future__ import annotations

from typing import Any

import fe_shaft as fs

GIVE = {"radial": "~93 N/um", "tilt": "~5 N m/mrad"}
LIMITS = (
    fs.Limit("wheel_deflection", of="wheel", quantity="deflection", max="20 um", cases=["running"], source="own rule"),
    fs.Limit("gear_slope", of="every gear", quantity="slope", max="0.5 mrad", cases=["running", "starting"]),
    fs.Limit("bearing_tilt", of="every bearing", quantity="tilt", max="1 mrad"),
)


def layshaft(limits: Any = LIMITS, **words: Any) -> fs.Model:
    """A stepped shaft with two gears and a mass on an overhang, on two estimated bearings; three cases."""
    sizes = {"left_journal": (19, 30), "wheel_seat": (38, 38), "collar": (10, 46), "pinion_body": (52, 51)}
    sizes |= {"right_collar": (8, 40), "right_journal": (19, 30), "stub": (45, 24)}
    segments = [fs.Segment(name, length=f"{x} mm", diameter=f"{d} mm") for name, (x, d) in sizes.items()]
    right = {"holds": ["radial", "axial"], "stiffness": GIVE | {"axial": "~60 N/um"}}
    wheel = {"teeth": 85, "normal_module": "2 mm", "helix": "15 deg left", "facewidth": "32 mm", "mate": "9 o'clock"}
    pinion = {"teeth": 19, "normal_module": "3 mm", "helix": "12 deg left", "facewidth": "50 mm", "mate": "3 o'clock"}
    parts = [
        fs.Shaft("layshaft", segments, material="42CrMo4"),
        fs.Bearing("lay_left", at="left_journal", holds=["radial"], stiffness=GIVE),
        fs.Bearing("lay_right", at="right_journal", **right),
        fs.Gear("wheel", at="wheel_seat", **wheel),
        fs.Gear("pinion", at="pinion_body", **pinion),
        fs.Mass("barring_wheel", at="stub", mass="4.1 kg", cg_at="stub.right"),
    ]
    flow = {"enters": "wheel", "leaves": "pinion"}
    cases = [
        fs.Case("running", **flow, power="5.5 kW", speed="393.7 rpm", turns="clockwise from left"),
        fs.Case("starting", like="running", torque_factor=2.2),
        fs.Case("reversed_jam", **flow, torque="332.6 N m", speed="0 rpm", turns="counterclockwise from left"),
    ]
    return fs.Model("Layshaft", parts, cases, limits=limits, gravity="down", **words)


def plain_shaft(length: str = "400 mm", diameter: str = "30 mm", **words: Any) -> fs.Shaft:
    """One cylinder of steel (E 210 GPa, 7850 kg/m^3) without shear deformation: an Euler beam."""
    return fs.Shaft(
        "axle", [fs.Segment("rod", length=length, diameter=diameter)], material="own_steel", shear="none", **words
    )


STEEL = fs.Material("own_steel", youngs_modulus="210 GPa", poisson_ratio=0.3, density="7850 kg/m^3")


def beam(*loads: Any, gravity: str | None = None, length: str = "400 mm", **words: Any) -> fs.Model:
    """An Euler beam on two pins at its ends."""
    pins = [
        fs.Pin("left_pin", at="0 mm", holds=["radial", "axial", "spin"]),
        fs.Pin("right_pin", at="axle.right", holds=["radial"]),
    ]
    heading = {} if gravity is None else {"gravity": gravity}
    return fs.Model("Beam", [plain_shaft(length), *pins, *loads], materials=[STEEL], **heading, **words)


def three_bearings() -> fs.Model:
    """A shaft on three bearings, the right one with a band of its own; no case is written."""
    right = {"radial": {"value": "80 N/um", "low": "60 N/um", "high": "90 N/um", "source": "an invented table"}}
    parts = [
        plain_shaft("600 mm", "40 mm"),
        fs.Bearing(
            "near", at="20 mm", holds=["radial", "axial"], stiffness={"radial": "~80 N/um", "axial": "~50 N/um"}
        ),
        fs.Bearing("mid", at="300 mm", holds=["radial"], stiffness={"radial": "~80 N/um"}),
        fs.Bearing("far", at="580 mm", holds=["radial"], stiffness=right),
        fs.Force("press", at="160 mm", up="-4 kN", front="1 kN"),
    ]
    return fs.Model("Three bearings", parts, materials=[STEEL])


def upright() -> fs.Model:
    """A hollow shaft along gravity, one seat that gives, one bore out of line."""
    column = fs.Shaft(
        "column",
        [fs.Segment("tube", length="500 mm", diameter="60 mm", bore="30 mm")],
        material="own_steel",
        axis="-Y",
        twelve="+Z",
    )
    give = {"radial": "150 N/um", "axial": "100 N/um"}
    parts = [
        column,
        fs.Bearing("upper", at="20 mm", holds=["radial", "axial"], stiffness=give, seat={"radial": "400 N/um"}),
        fs.Bearing(
            "lower",
            at="400 mm",
            holds=["radial"],
            stiffness={"radial": "120 N/um"},
            offset="20 um",
            offset_angle="4:30 o'clock",
        ),
        fs.Mass("rotor", at="470 mm", mass="30 kg", cg_radius="2 mm", cg_angle="3 o'clock"),
    ]
    return fs.Model("Upright", parts, materials=[STEEL], gravity="down")


def two_shafts() -> fs.Model:
    """Two shafts side by side, with a gear each; one case for each of them."""
    parts: list[Any] = []
    for name, mate, z in (("input", "3 o'clock", "0 mm"), ("output", "9 o'clock", "60 mm")):
        rod = fs.Segment("rod", length="200 mm", diameter="30 mm")
        parts += [
            fs.Shaft(name, [rod], material="own_steel", left_end=["0 mm", "0 mm", z]),
            fs.Bearing(
                f"{name}_l", on=name, at="10 mm", holds=["radial", "axial"], stiffness=GIVE | {"axial": "60 N/um"}
            ),
            fs.Bearing(f"{name}_r", on=name, at="190 mm", holds=["radial"], stiffness={"radial": "90 N/um"}),
            fs.Gear(f"{name}_gear", on=name, at="80 mm", teeth=30, normal_module="2 mm", facewidth="20 mm", mate=mate),
            fs.Coupling(f"{name}_end", on=name, at="200 mm"),
        ]
    flow = {"torque": "40 N m", "turns": "clockwise from left"}
    cases = [
        fs.Case("first", enters="input_end", leaves="input_gear", **flow),
        fs.Case("second", enters="output_gear", leaves="output_end", **flow),
    ]
    return fs.Model("Two shafts", parts, cases, materials=[STEEL], gravity="down")


def twenty_cases() -> fs.Model:
    """The beam under a force that grows from case to case."""
    cases = [fs.Case(f"step_{n:02d}", forces={"load": n / 10}) for n in range(1, 21)]
    return beam(fs.Force("load", at="100 mm", up="-1 kN"), gravity="down", cases=cases)


def hostile() -> fs.Model:
    """Names as long as they may be, alike but for one letter, outside ASCII; texts with all sorts of signs."""
    names = [
        "a" * 55 + "_left",
        "a" * 55 + "_righ",
        "Welle_a",
        "W\u00e4lle_a",
        "\u30dc\u30fc\u30eb\u8ef8\u53d7",
        "Walle_a",
    ]
    parts = [
        fs.Shaft("Welle_\u00e4", [fs.Segment("rod", length="200 mm", diameter="30 mm")], material="own_steel"),
        fs.Pin(names[0], at="0 mm", holds=["radial", "axial", "spin"], source="=cmd()|' /C calc'!A0"),
        fs.Pin(names[1], at="200 mm", holds=["radial"]),
        *(fs.Force(name, at=f"{40 + 30 * n} mm", up="-1 kN") for n, name in enumerate(names[2:])),
    ]
    cases = [fs.Case("c" * 60), fs.Case("c" * 59 + "d")]
    limit = fs.Limit("L" * 60, of="Welle_a", quantity="deflection", max="10 um", source="=1+1\n\ttwo lines <b>&")
    return fs.Model("=HYPERLINK(1)", parts, cases, materials=[STEEL], limits=[limit])


EVERY = {
    "layshaft": layshaft,
    "three": three_bearings,
    "upright": upright,
    "two": two_shafts,
    "twenty": twenty_cases,
    "hostile": hostile,
    "pins": lambda: beam(fs.Force("load", at="100 mm", up="-1 kN")),
    "weight": lambda: beam(gravity="down"),
    "idle": lambda: beam(fs.Force("load", at="100 mm", up="0 N")),
    "inches": lambda: layshaft(units={"force": "lbf", "length": "in", "angle": "deg"}),
}
