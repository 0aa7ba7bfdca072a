"""Public models for tests: from plain data, with every number written so that its text reads back exactly.

`to_model(spec)` builds what `tests.random_shafts` draws, in any system of units; `layshaft` and its parts are a small
shaft for tests that write their models by hand.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import replace
from decimal import Decimal
from typing import Any

import fe_shaft as fs
from tests.oracle.shaft_spec import ForceSpec, SegmentSpec, ShaftSpec, SupportSpec

LOOSE = {"range_check": "off"}
TILTS = ("tilt", "tilt_up", "tilt_front")

#: What a text is written in instead of the SI unit, and how many SI units that is. The inch is 25.4 mm by definition
#: (1959), the pound-force 0.45359237 kg x 9.80665 m/s^2 by definition.
Units = Mapping[str, tuple[str, float]]
SI: Units = {}
LBF = 0.45359237 * 9.80665
MM_N: Units = {
    "m": ("mm", 1e-3), "N/m": ("N/mm", 1e3), "N m": ("N mm", 1e-3), "Pa": ("MPa", 1e6), "N m/rad": ("N m/mrad", 1e3),
    "rad": ("mrad", 1e-3), "kg/m^3": ("g/cm^3", 1e3),
}  # fmt: skip
M_KN: Units = {"N": ("kN", 1e3), "N m": ("kN m", 1e3), "N/m": ("kN/mm", 1e6), "Pa": ("GPa", 1e9), "m": ("cm", 1e-2)}
IN_LBF: Units = {
    "m": ("in", 0.0254), "N": ("lbf", LBF), "N/m": ("lbf/in", LBF / 0.0254), "N m": ("lbf in", LBF * 0.0254),
    "Pa": ("psi", LBF / 0.0254**2), "N m/rad": ("lbf in/rad", LBF * 0.0254),
}  # fmt: skip


def text(value: float, unit: str, units: Units = SI) -> str:
    """A number and its unit; in SI it reads back to the very same float."""
    name, size = units.get(unit, (unit, 1.0))
    return f"{float(value) / size!r} {name}"


def to_model(spec: ShaftSpec, splits: int = 1, units: Units = SI, **placing: Any) -> fs.Model:
    """Build the public model of a shaft; every segment is cut into `splits` equal ones.

    `placing` turns the shaft in the model (axis, twelve, left_end; gravity then in model coordinates).
    """
    gravity = placing.pop("gravity", spec.gravity)
    if gravity is not None:
        gravity = [text(part, "m/s^2") for part in gravity] if any(gravity) else None
    parts = to_parts(spec, splits, units, **placing)
    materials = [to_material(spec, units)]
    return fs.Model("random shaft", parts, to_cases(spec), materials=materials, gravity=gravity, shoulders="off")


def to_parts(spec: ShaftSpec, splits: int = 1, units: Units = SI, name: str = "shaft", **placing: Any) -> list[Any]:
    """The shaft and everything on it; with another name for the shaft, all parts carry it in front of theirs."""
    segments = [piece for segment in spec.segments for piece in split(segment, splits, units)]
    material = "drawn" if name == "shaft" else f"drawn_{name}"
    parts: list[Any] = [fs.Shaft(name, segments, material=material, shear=spec.shear, **placing, **LOOSE)]
    front = "" if name == "shaft" else f"{name}_"
    for support in spec.supports:
        parts += to_supports(replace(support, name=front + support.name), units, on=name)
    parts += [to_force(replace(force, name=front + force.name), units, on=name) for force in spec.forces]
    return parts


def to_cases(spec: ShaftSpec, front: str = "") -> list[fs.Case]:
    return [fs.Case(c.name, forces={front + name: factor for name, factor in c.factors.items()}) for c in spec.cases]


def to_material(spec: ShaftSpec, units: Units = SI, name: str = "drawn") -> fs.Material:
    return fs.Material(
        name,
        youngs_modulus=text(spec.youngs_modulus, "Pa", units),
        poisson_ratio=spec.poisson_ratio,
        density=text(spec.density, "kg/m^3", units),
    )


def split(segment: SegmentSpec, count: int, units: Units = SI) -> list[fs.Segment]:
    """A segment as `count` equal ones; the pieces of a cylinder are one and the same object."""
    length = float(Decimal(repr(segment.length)) / count)
    if segment.end_diameter is None and segment.end_bore is None:
        return [to_segment(SegmentSpec(length, segment.diameter, None, segment.bore), units)] * count
    ends = (segment.diameter, segment.end_diameter), (segment.bore, segment.end_bore)
    outer, bore = ([float(_between(first, last, Decimal(k) / count)) for k in range(count + 1)] for first, last in ends)
    cones = [SegmentSpec(length, outer[k], outer[k + 1], bore[k], bore[k + 1]) for k in range(count)]
    return [to_segment(cone, units) for cone in cones]


def _between(first: float, last: float | None, share: Decimal) -> Decimal:
    begin = Decimal(repr(first))
    return begin if last is None else begin + (Decimal(repr(last)) - begin) * share


def to_segment(spec: SegmentSpec, units: Units = SI) -> fs.Segment:
    keys = ("length", "diameter", "end_diameter", "bore", "end_bore")
    words = {key: text(value, "m", units) for key in keys if (value := getattr(spec, key))}
    return fs.Segment(**words, **LOOSE)


def to_supports(spec: SupportSpec, units: Units = SI, on: str = "shaft") -> Iterable[fs.Pin | fs.Bearing]:
    """A pin or a bearing; a bearing that holds spin stands beside a pin that holds nothing else."""
    place: dict[str, Any] = {"at": text(spec.x, "m", units), "on": on, **LOOSE}
    words = dict(place)
    if spec.load_centre:
        words["load_centre"] = text(spec.load_centre, "m", units)
    if spec.offset:
        words |= {"offset": text(spec.offset, "m", units), "offset_angle": text(spec.offset_angle, "deg")}
    if spec.bore_tilt:
        words |= {"bore_tilt": text(spec.bore_tilt, "rad", units), "bore_tilt_angle": text(spec.bore_tilt_angle, "deg")}
    if spec.is_pin:
        yield fs.Pin(spec.name, holds=list(spec.holds), **words)
        return
    if spec.seat is not None:
        words["seat"] = stiffness(spec.seat, units)
    words |= (
        {"matrix": matrix(spec.matrix)} if spec.matrix is not None else {"stiffness": stiffness(spec.stiffness, units)}
    )
    yield fs.Bearing(spec.name, holds=[word for word in spec.holds if word != "spin"], **words)
    if "spin" in spec.holds:
        yield fs.Pin(f"{spec.name}_spin", holds=["spin"], **place)


def stiffness(named: Mapping[str, float], units: Units = SI) -> dict[str, str]:
    return {name: text(k, "N m/rad" if name in TILTS else "N/m", units) for name, k in named.items()} | LOOSE


def matrix(rows: Sequence[Sequence[float]]) -> dict[str, Any]:
    return {"rows": [list(row) for row in rows], "units": {"force": "N", "length": "m", "angle": "rad"}}


def to_force(spec: ForceSpec, units: Units = SI, on: str = "shaft") -> fs.Force:
    words: dict[str, Any] = {key: text(getattr(spec, key), "N", units) for key in ("up", "front", "axial")}
    couple = {key: getattr(spec, f"couple_{key}") for key in ("up", "front", "axial")}
    if any(couple.values()):
        words["couple"] = {key: text(value, "N m", units) for key, value in couple.items()} | LOOSE
    if spec.radius:
        words |= {"radius": text(spec.radius, "m", units), "angle": text(spec.angle, "deg")}
    if spec.spread:
        words["spread"] = text(spec.spread, "m", units)
    return fs.Force(spec.name, at=text(spec.x, "m", units), on=on, **words, **LOOSE)


# ---- small models written by hand; all data invented


def bar(name: str = "shaft", length: str = "200 mm", diameter: str = "30 mm", **words: Any) -> fs.Shaft:
    """A plain shaft of one segment."""
    return fs.Shaft(name, [fs.Segment(length=length, diameter=diameter)], material="42CrMo4", **words)


def layshaft(limits: Sequence[fs.Limit] = (), *more: Any, **heading: Any) -> fs.Model:
    """The layshaft of an invented compost drum drive: two estimated bearings, two helical gears, three cases."""
    segments = [
        fs.Segment("left_journal", length="19 mm", diameter="30 mm", fillet="1 mm"),
        fs.Segment("wheel_seat", length="38 mm", diameter="38 mm", fillet="1.5 mm"),
        fs.Segment("collar", length="10 mm", diameter="46 mm"),
        fs.Segment("pinion_body", length="52 mm", diameter="51 mm"),
        fs.Segment("right_collar", length="8 mm", diameter="40 mm", fillet="1.5 mm"),
        fs.Segment("right_journal", length="19 mm", diameter="30 mm", fillet="1 mm"),
        fs.Segment("stub", length="45 mm", diameter="24 mm", fillet="1 mm"),
    ]
    give = {"radial": "~93 N/um", "tilt": "~5 N m/mrad"}
    wheel = {"teeth": 85, "normal_module": "2 mm", "helix": "15 deg left", "facewidth": "32 mm", "mate": "9 o'clock"}
    pinion = {"teeth": 19, "normal_module": "3 mm", "helix": "12 deg left", "facewidth": "50 mm", "mate": "3 o'clock"}
    parts = [
        fs.Shaft("layshaft", segments, material="42CrMo4"),
        fs.Bearing("lay_left", at="left_journal", holds=["radial"], stiffness=give),
        fs.Bearing("lay_right", at="right_journal", holds=["radial", "axial"], stiffness=give | {"axial": "~60 N/um"}),
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
    heading = {"gravity": "down"} | heading
    return fs.Model("Layshaft of the compost drum drive", [*parts, *more], cases, limits=list(limits), **heading)
