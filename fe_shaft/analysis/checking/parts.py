"""Shafts and parts in words: what each is, where it is, what it holds and how it gives."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import TYPE_CHECKING, Any

import numpy as np

from fe_shaft.analysis.check import PartCheck, ShaftCheck
from fe_shaft.analysis.checking.words import plural, side
from fe_shaft.model.actions import shaft_mass
from fe_shaft.model.gear import Gear
from fe_shaft.model.groups import noun
from fe_shaft.model.helix import Helix
from fe_shaft.model.hub import NONE
from fe_shaft.model.inside import KINDS
from fe_shaft.model.loads import Force, Pulley, Sprocket
from fe_shaft.model.part import Heavy, Part
from fe_shaft.model.support import Bearing, Support
from fe_shaft.results.shown import Shown
from fe_shaft.results.words.wording import is_level, listed
from fe_shaft.units import Value, show

if TYPE_CHECKING:
    from fe_shaft.model.stiffness import Springs
    from fe_shaft.model.system import Model

_WAYS = (("radial", ("radial", "up", "front")), ("axial", ("axial",)), ("tilt", ("tilt", "tilt_up", "tilt_front")))
_STOPS = {"stops_left": "axial (left only)", "stops_right": "axial (right only)"}


def counts(model: Model) -> tuple[str, ...]:
    """How many of each kind there are: ("1 shaft", "2 bearings", ...)."""
    numbers: dict[str, int] = {"shaft": len(model.shafts)}
    for part in model.parts_on_shafts:
        numbers[noun(part)] = numbers.get(noun(part), 0) + 1
    numbers["case"], numbers["limit"] = len(model.written_cases), len(model.limits)
    return tuple(plural(number, word) for word, number in numbers.items() if number)


def check_shafts(model: Model) -> tuple[ShaftCheck, ...]:
    """Every shaft with its parts from left to right."""
    return tuple(_shaft(model, shaft.name) for shaft in model.shafts)


def _shaft(model: Model, name: str) -> ShaftCheck:
    arrays = model.segment_arrays[name]
    outer = np.concatenate([arrays.diameter_left, arrays.diameter_right])
    bore = np.concatenate([arrays.bore_left, arrays.bore_right])
    shaft = model[name]
    materials = dict.fromkeys(segment.material or shaft.material for segment in shaft.segments)
    parts = sorted(
        (part for part in model.parts_on_shafts if model.places[part.name].shaft == name),
        key=lambda part: model.places[part.name].x,
    )
    return ShaftCheck(
        name=name,
        length=float(arrays.length.sum()),
        thinnest=float(outer.min()),
        thickest=float(outer.max()),
        widest_bore=float(bore.max()),
        segments=len(arrays.length),
        materials=tuple(str(material) for material in materials),
        mass=shaft_mass(model, name)[0] if arrays.density.all() else 0.0,
        parts=tuple(_part(model, part) for part in parts),
    )


def _part(model: Model, part: Part) -> PartCheck:
    place = model.places[part.name]
    phrases = next((say for kind, say in _SAYS.items() if isinstance(part, kind)), _nothing)
    words = [*phrases(part, is_level(model, place.shaft))]
    if isinstance(part, Heavy) and part.hub is not None:
        words.append(_hub(part))
    if isinstance(part, Heavy) and part.mass is not None:
        words += _mass(model, part)
    return PartCheck(part.name, noun(part), place.x, tuple(words))


# ---- supports


def _support(part: Any, level: bool) -> Iterator[str]:
    springs = part.stiffness if isinstance(part, Bearing) else None
    yield from _held(part, springs)
    if isinstance(part, Bearing) and part.seat is not None:
        yield "seat " + (", ".join(_seat(part.seat)) if part.seat.matrix is None else "by its 6 x 6 matrix")
    if part.load_centre is not None:
        where = "right" if part.load_centre.si >= 0 else "left"
        yield f"load centre {show(abs(part.load_centre.si), 'mm')} to the {where} of its middle"
    if part.offset is not None:
        yield f"bore {part.offset.text} out of line towards {side(part.offset_angle, level=level)}"
    if part.bore_tilt is not None:
        yield f"bore leans {part.bore_tilt.text}, its right end towards {side(part.bore_tilt_angle, level=level)}"


def _held(part: Support, springs: Springs | None) -> Iterator[str]:
    """What a support holds and how stiffly, what else it resists, what it leaves free."""
    rigid = not isinstance(part, Bearing)
    computed = isinstance(part, Bearing) and part.computed
    by_matrix = isinstance(part, Bearing) and springs is None and not computed
    holds = []
    for word in part.holds:
        way = "axial" if word in _STOPS else word
        figures = "" if springs is None else _figures(springs, dict(_WAYS).get(way, ()))
        holds.append(f"{_STOPS.get(word, word)} {figures}".rstrip())
    yield f"holds {', '.join(holds)}{', rigid' if rigid else ', by its 6 x 6 matrix' if by_matrix else ''}"
    if isinstance(part, Bearing) and part.computed:
        yield from _inside(part)
        return
    if springs is not None and "tilt" not in part.holds and (tilt := _figures(springs, dict(_WAYS)["tilt"])):
        yield f"resists tilt {tilt}"
    free = [way for way, keys in _WAYS if not by_matrix and _is_free(part, springs, way, keys)]
    if free:
        yield f"free: {', '.join(free)}"


def _inside(part: Bearing) -> Iterator[str]:
    """What is inside a computed bearing."""
    geometry, kind = part.geometry, KINDS[part.kind or ""]
    assert geometry is not None
    word = "rollers" if kind.rollers else "balls"
    size = f"{geometry.elements} {word} of {geometry.element_diameter.text} on {geometry.pitch_diameter.text}"
    yield f"computed: {part.kind}, {size}"
    angle = [] if part.contact_angle is None else [f"contact angle {part.contact_angle.text}"]
    play = "0" if part.radial_clearance is None else part.radial_clearance.text
    yield ", ".join([*angle, f"radial clearance {play}"])
    if part.slides:
        yield "its outer ring slides"


def _is_free(part: Support, springs: Springs | None, way: str, keys: tuple[str, ...]) -> bool:
    if way == "axial":
        return not part.holds_axially
    return way not in part.holds and not (way == "tilt" and springs is not None and _figures(springs, keys))


def _figures(springs: Springs, keys: tuple[str, ...]) -> str:
    """The stiffness of one direction as written; of two planes, both."""
    found = {key: getattr(springs, key) for key in keys if getattr(springs, key) is not None}
    if len(found) == 1:
        return str(next(iter(found.values())))
    return " and ".join(f"{value} {key.removeprefix('tilt_')}" for key, value in found.items())


def _seat(seat: Springs) -> Iterator[str]:
    for way, keys in _WAYS:
        yield f"{way} {_figures(seat, keys) or 'rigid'}"


# ---- gears and what else is on a shaft


def _gear(gear: Any, level: bool) -> Iterator[str]:
    size = [] if gear.teeth is None else [f"z {gear.teeth}"]
    for key, sign in (("normal_module", "m"), ("pitch_diameter", "d"), ("mean_diameter", "mean d")):
        if getattr(gear, key) is not None:
            size.append(f"{sign} {getattr(gear, key).text}")
    if isinstance(gear.helix, Helix):
        size.append(f"{gear.helix.angle.text} {gear.helix.hand}-hand")
    if gear.facewidth is not None:
        size.append(f"b {gear.facewidth.text}")
    yield ", ".join(size)
    if gear.form == "bevel":
        yield f"bevel, cone {gear.pitch_cone_angle.text}, apex {gear.apex}"
    if gear.body is not None:
        figures = {key: getattr(gear.body, key) for key in ("radial", "tilt")}
        yield "body " + ", ".join(f"{key} {value or 'rigid'}" for key, value in figures.items())
    yield "no mate" if gear.mate is None else f"mate {side(gear.mate, level=level)}"
    if isinstance(gear.spread, Value):
        yield f"tooth force over {gear.spread.text}"
    elif gear.spread == "point":
        yield "tooth force at a point"


def _pulley(pulley: Any, level: bool) -> Iterator[str]:
    yield f"d {pulley.diameter.text}"
    if pulley.belt_pull is not None:
        yield f"belt {pulley.belt_pull.tight.text} and {pulley.belt_pull.slack.text} over {pulley.wrap.text}"
    yield f"pulls towards {side(pulley.pulls_towards, level=level)}"


def _sprocket(sprocket: Any, level: bool) -> Iterator[str]:
    if sprocket.diameter is None:
        yield f"z {sprocket.teeth}, pitch {sprocket.chain_pitch.text}"
    else:
        yield f"d {sprocket.diameter.text}"
    yield f"pulls towards {side(sprocket.pulls_towards, level=level)}"


def _force(force: Any, level: bool) -> Iterator[str]:
    if force.radius is not None:
        yield f"attacks {force.radius.text} off the axis at {side(force.angle, level=level)}"
    if isinstance(force.spread, Value):
        yield f"spread over {force.spread.text}"


def _nothing(part: Any, level: bool) -> Iterator[str]:
    return iter(())


_SAYS: dict[type[Part], Callable[[Any, bool], Iterator[str]]] = {
    Support: _support, Gear: _gear, Pulley: _pulley, Sprocket: _sprocket, Force: _force,
}  # fmt: skip


def _hub(part: Heavy) -> str:
    """How a hub stiffens, and how large it is."""
    how = f"hub {part.hub}" if isinstance(part.hub, str) else f"hub {part.hub:g} of one piece, assumed"
    if part.hub == NONE or part.hub_outside is None or part.hub_width is None:
        return how
    return f"{how}: {show(part.hub_outside, 'mm')} thick, {show(part.hub_width, 'mm')} long"


def _mass(model: Model, part: Heavy) -> Iterator[str]:
    """Mass, and where its centre of gravity is if that is not the part's place."""
    assert part.mass is not None
    x, y, z = model.cg(part.name)
    where = []
    if abs(x - model.places[part.name].x) > 1e-9:
        where.append(f"at {show(x, Shown.of(model).along, 4)}")
    if y or z:
        assert part.cg_radius is not None
        assert part.cg_angle is not None
        where.append(f"{part.cg_radius.text} off the axis towards {part.cg_angle.text}")
    centre = f", its centre of gravity {listed(where)}" if where else ""
    yield f"{part.mass.text}{centre}"
