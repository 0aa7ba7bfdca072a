"""What is not written is said aloud: defaults taken and doubts, each with the key that changes it."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from fe_shaft.model.case import Case
from fe_shaft.model.gear import PRESSURE_ANGLE, Gear
from fe_shaft.model.inside import KINDS
from fe_shaft.model.loads import Pulley, Sprocket
from fe_shaft.model.part import Heavy
from fe_shaft.model.quantity import Quantity
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.support import Bearing, Support
from fe_shaft.model.words import Words
from fe_shaft.units import Value, show

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

MOST_NAMED = 4  # names listed in one note
BELT_MISMATCH = 0.05  # of the torque: what is not worth a note


@dataclass(frozen=True)
class Note:
    """One thing the reader should know.

    Parameters
    ----------
    key : str
        Address of the key that changes it.
    sentence : str
        What was taken, or what is doubtful.
    """

    key: str
    sentence: str

    def __str__(self) -> str:
        return f"{self.sentence} ({self.key})"


def notes_of(model: Model) -> tuple[Note, ...]:
    """All notes of a model."""
    return (*_defaults(model), *_weights(model), *_supports(model), *_cases(model), *_faces(model), *_unusual(model))


def some_names(names: list[str]) -> str:
    """The first names, and how many more there are."""
    return ", ".join(names[:MOST_NAMED]) + (f" and {len(names) - MOST_NAMED} more" if len(names) > MOST_NAMED else "")


def _defaults(model: Model) -> Iterator[Note]:
    rigid = [part.name for part in model.supports if isinstance(part, Bearing) and part.seat is None]
    if rigid:
        yield Note("housing.seat", f"seats rigid: {some_names(rigid)}")
    default = [shaft.name for shaft in model.shafts if "shear" not in shaft.given]
    if default:
        yield Note(f"{default[0]}.shear", "shear: Cowper")
    if any(_is_stepped(shaft) for shaft in model.shafts):
        softer = "shoulders make the shafts softer, by a rule made for this project"
        yield Note(
            "shoulders", softer if model.shoulders == "on" else "shoulders carry to their rims, as in a plain beam"
        )
    plain = [gear.name for gear in model.gears if "pressure_angle" not in gear.given]
    if plain:
        yield Note(f"{plain[0]}.pressure_angle", f"pressure_angle {PRESSURE_ANGLE} (ISO 53): {some_names(plain)}")
    spur = [gear.name for gear in model.gears if "helix" not in gear.given and gear.form == "cylindrical"]
    if spur:
        yield Note(f"{spur[0]}.helix", f"spur gears: {some_names(spur)}")
    for part in model.pulleys:
        if part.belt_pull is not None and "wrap" not in part.given:
            yield Note(f"{part.name}.wrap", f"belt wraps {part.wrap.text}: {part.name}")
    for wheel in model.sprockets:
        if "pull_factor" not in wheel.given:
            yield Note(f"{wheel.name}.pull_factor", f"pull_factor 1: {wheel.name}")
    if any(case.enters_shares and case.leaves_shares for case in model.cases):
        yield Note("efficiency", "efficiency 1")


def _is_stepped(shaft: Shaft) -> bool:
    numbers = shaft.numbers
    return any(np.any(numbers[f"{what}_right"][:-1] != numbers[f"{what}_left"][1:]) for what in ("diameter", "bore"))


def _weights(model: Model) -> Iterator[Note]:
    heavy = [part.name for part in model.parts_on_shafts if isinstance(part, Heavy) and part.mass is not None]
    if model.gravity is None:
        what = f"masses without gravity are not weighed: {some_names(heavy)}" if heavy else "weights left out"
        yield Note("gravity", what)
        return
    light = [
        part.name for part in model.parts_on_shafts if isinstance(part, Gear | Pulley | Sprocket) and part.mass is None
    ]
    if light:
        yield Note(f"{light[0]}.mass", f"no weight is written: {some_names(light)}")


def _supports(model: Model) -> Iterator[Note]:
    for part in model.supports:
        if isinstance(part, Bearing):
            yield from _unused(part)
        if part.offset is not None:
            zone = show(2.0 * part.offset.si, "um")
            yield Note(
                f"{part.name}.offset", f"offset {part.offset.text} = coaxiality zone of {zone} diameter: {part.name}"
            )
    computed = [part.name for part in model.supports if isinstance(part, Bearing) and part.computed]
    loose = [name for name in computed if model[name].radial_clearance is None]
    if loose:
        yield Note(f"{loose[0]}.radial_clearance", f"radial clearance 0: {some_names(loose)}")
    plain = [name for name in computed if not KINDS[model[name].kind].rollers and model[name].geometry.groove is None]
    if plain:
        yield Note(
            f"{plain[0]}.geometry.groove", f"groove radii 0.52 of the ball, 0.515 is 7 % stiffer: {some_names(plain)}"
        )
    lines = [name for name in computed if KINDS[model[name].kind].rollers]
    if lines:
        yield Note(f"{lines[0]}.geometry", f"stiffness of line contacts is known to 10 %: {some_names(lines)}")
    if model.estimated:
        yield Note("estimates", f"estimated or assumed (~): {some_names(list(model.estimated))}")


def _unused(part: Bearing) -> Iterator[Note]:
    if part.computed:
        return
    words = ("axial", "up", "front", "spin", "tilt_up", "tilt_front")
    if part.stiffness is not None:
        values = part.stiffness.values
        unused = {("axial" if i == 0 else "radial") for i in range(3) if values[i] is not None and not part.used[i]}
    else:
        assert part.matrix is not None
        lost = part.matrix.si.any(axis=0) & ~part.used
        unused = {words[i] for i in range(6) if lost[i]}
    for word in sorted(unused):
        yield Note(f"{part.name}.holds", f"{word} stiffness of {part.name} is not used: it does not hold the shaft so")


def _cases(model: Model) -> Iterator[Note]:
    if not model.written_cases:
        yield Note("cases", f"no case is written: one case {model.cases[0].name}, all forces and weights, no power")
    for case in model.cases:
        yield from _case(model, case)


def _case(model: Model, case: Case) -> Iterator[Note]:
    if "torque_factor" in case.given and case.torque_factor != 1.0:
        yield Note(
            f"{case.name}.torque_factor",
            f"torque_factor {case.torque_factor:g} multiplies power and torque, as K_A of ISO 6336-1 may: {case.name}",
        )
    yield from _belts(model, case)
    one_way = [key for key in ("enters", "leaves") if key in case.given]
    if len(one_way) == 1:
        other = "leaves" if one_way[0] == "enters" else "enters"
        yield Note(f"{case.name}.{other}", f"power {one_way[0]}, but nothing says where it {other}: {case.name}")


def _belts(model: Model, case: Case) -> Iterator[Note]:
    """Strands whose difference does not go with the torque that passes."""
    passing = case.enters_shares | case.leaves_shares
    for pulley in model.pulleys:
        if pulley.belt_pull is None or pulley.name not in passing:
            continue
        own = (pulley.belt_pull.tight.si - pulley.belt_pull.slack.si) * pulley.reference_diameter / 2
        torque = passing[pulley.name] * case.torque_si
        if abs(own - torque) > BELT_MISMATCH * max(own, torque):
            both = f"goes with {show(own, 'N m')}, but {show(torque, 'N m')} pass it"
            yield Note(f"{pulley.name}.belt_pull", f"belt_pull of {pulley.name} {both}: {case.name}")


def _faces(model: Model) -> Iterator[Note]:
    """Rings that reach over a shoulder, and parts that reach over the end of the shaft."""
    for part in model.parts_on_shafts:
        place = model.places[part.name]
        shaft = model[place.shaft]
        ends = shaft.ends
        over = max(0.0 - place.left, place.right - float(ends[-1]))
        key = f"{part.name}.{part.placed_by}"
        if over > 1e-9 * ends[-1]:
            yield Note(key, f"{part.name} reaches {show(over, 'mm')} over the end of {place.shaft}")
            continue
        if isinstance(part, Support | Gear) and place.right > place.left:
            slack = 1e-9 * ends[-1]
            first = int(np.searchsorted(ends, place.left + slack, side="right")) - 1
            last = int(np.searchsorted(ends, place.right - slack, side="left")) - 1
            numbers = shaft.numbers
            inside = numbers["diameter_left"][first : last + 1]
            if inside.size and np.ptp(inside) > 0.0:
                what = "ring" if isinstance(part, Support) else "facewidth"
                yield Note(key, f"the {what} of {part.name} reaches over a shoulder")


def _unusual(model: Model) -> Iterator[Note]:
    nouns: list[Words] = [*model.parts_on_shafts, *model.written_cases, *model.written_limits, *model.own_materials]
    for noun in nouns:
        yield from _unusual_in(noun, str(getattr(noun, "name", "")))
    for shaft in model.shafts:
        yield from _unusual_segments(model, shaft.name)


def _unusual_in(noun: Words, place: str) -> Iterator[Note]:
    for key in type(noun).model_fields:
        value = getattr(noun, key)
        if isinstance(value, Words):
            yield from _unusual_in(value, f"{place}.{key}")
        elif isinstance(value, Value) and key in noun.given:
            kind = kind_of(type(noun), key)
            if isinstance(kind, Quantity) and (doubt := kind.unusual(value)):
                yield Note(f"{place}.{key}", doubt)


def _unusual_segments(model: Model, name: str) -> Iterator[Note]:
    """The same for the sizes of segments, all at once."""
    shaft = model[name]
    for key, numbers in (("length", shaft.numbers["length"]), ("diameter", shaft.numbers["diameter_left"])):
        kind = kind_of(type(shaft.segments[0]), key)
        assert isinstance(kind, Quantity)
        assert kind.usual is not None
        if key == "length" and shaft.contour is not None:  # arcs come as cones as short as they need be
            continue
        odd = np.flatnonzero((numbers < kind.usual[0]) | (numbers > kind.usual[1]))
        if odd.size:
            segment = shaft.segments[odd[0]]
            more = f", and {odd.size - 1} more" if odd.size > 1 else ""
            place = f"{name}.{segment.name or f'segment_{odd[0] + 1}'}.{key}"
            yield Note(place, f"{kind.unusual(getattr(segment, key))}{more}")


def kind_of(noun: type[Words], key: str) -> object:
    """The kind of a key, or None where a noun stands in it."""
    field = noun.model_fields[key]
    waiting = [*field.metadata, field.annotation]
    while waiting:
        one = waiting.pop(0)
        if hasattr(one, "check_in"):
            return one
        waiting += [*getattr(one, "__metadata__", ()), *getattr(one, "__args__", ())]
    return None
