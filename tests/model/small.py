"""A small invented shaft for tests of the model layer: two bearings, two gears, a force and a disc."""

from collections.abc import Sequence
from typing import Any

import fe_shaft.model as fs


def segments() -> list[fs.Segment]:
    rows = [("left_journal", 20, 30), ("seat", 40, 38), ("collar", 10, 46), ("right_journal", 20, 30), ("stub", 30, 24)]
    return [fs.Segment(name, length=f"{length} mm", diameter=f"{diameter} mm") for name, length, diameter in rows]


def shaft(name: str = "layshaft", **words: Any) -> fs.Shaft:
    return fs.Shaft(name, segments(), **({"material": "42CrMo4"} | words))


def bearing(name: str, **words: Any) -> fs.Bearing:
    usual: dict[str, Any] = {"holds": ["radial"], "stiffness": {"radial": "~93 N/um", "tilt": "~5 N m/mrad"}}
    return fs.Bearing(name, **(usual | words))


def parts(mate: str | None = "9 o'clock") -> list[Any]:
    teeth: dict[str, Any] = {"normal_module": "2 mm", "facewidth": "20 mm"}
    return [
        shaft(),
        bearing("lay_left", at="left_journal"),
        bearing(
            "lay_right",
            at="right_journal",
            holds=["radial", "axial"],
            stiffness={"radial": "93 N/um", "axial": "60 N/um"},
        ),
        fs.Gear("wheel", at="seat", teeth=85, helix="15 deg left", **teeth, mate=mate),  # type: ignore[arg-type]
        fs.Gear("pinion", at="seat.right + 5 mm", teeth=19, **teeth, mate="3 o'clock"),
        fs.Force("pull", at="stub", up="-300 N"),
        fs.Mass("disc", at="stub", mass="4.1 kg", cg_at="stub.right + 10 mm", cg_radius="2 mm", cg_angle="3 o'clock"),
    ]


def model(
    extra: Sequence[Any] = (), cases: Sequence[Any] | None = None, mate: str | None = "9 o'clock", **words: Any
) -> fs.Model:
    running = fs.Case(
        "running", enters="wheel", leaves="pinion", power="5.5 kW", speed="393.7 rpm", turns="clockwise from left"
    )
    return fs.Model("A small shaft", [*parts(mate), *extra], [running] if cases is None else cases, **words)
