"""What is said aloud of hubs, keyways, splines and gear bodies, and of bands that nothing reads."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

from fe_shaft.model.estimates import estimates_of
from fe_shaft.model.hub import NONE
from fe_shaft.model.notes import Note, some_names
from fe_shaft.model.part import Heavy
from fe_shaft.model.working import collar_of, thickest
from fe_shaft.units import Value, show

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

LARGEST_STEP = 3.0  # D/d that the shoulder rule was fitted to
MOST_LOOKED_AT = 2000  # segments whose every figure is looked at for a band


def shape_notes(model: Model) -> tuple[Note, ...]:
    """All of them."""
    return (*_bodies(model), *_weakenings(model), *_unread_bands(model))


def _bodies(model: Model) -> Iterator[Note]:
    """Gears and what else sits on the shafts: rigid or not, carrying with them or not."""
    rigid = [gear.name for gear in model.gears if gear.body is None]
    if rigid:
        yield Note(f"{rigid[0]}.body", f"gear bodies rigid: {some_names(rigid)}")
    yield from _wide_hubs(model)
    silent = [name for name in model.hubs if model[name].hub is None]
    if silent:
        yield Note(f"{silent[0]}.hub", f"hubs do not stiffen the shaft: {some_names(silent)}")
    yield from _carrying(model)
    if model.gears:
        yield Note("mate", "mates stand still")


def _wide_hubs(model: Model) -> Iterator[Note]:
    """Hubs that in one piece would be beyond what the shoulder rule was made for."""
    for name in model.hubs:
        place = model.places[name]
        collar = collar_of(model[name], place, float(model[place.shaft].ends[-1]))
        ratio = 0.0 if collar is None else collar.diameter / thickest(model.segment_arrays[place.shaft], *collar[:2])
        if ratio > LARGEST_STEP and model.shoulders == "on":
            beyond = f"in one piece its hub is a step of D/d = {ratio:.2g}, beyond the 3 of the shoulder rule: {name}"
            yield Note(f"{name}.hub_diameter", beyond)


def _unread_bands(model: Model) -> Iterator[Note]:
    """Bands where none is read: the figure counts as if it were certain."""
    read = {(each.thing, each.key.rpartition(" ")[2]) for each in estimates_of(model)}
    for part in model.parts_on_shafts:
        for key in sorted(part.given):
            value = getattr(part, key, None)
            if isinstance(value, Value) and value.estimated and (part.name, key) not in read:
                yield Note(f"{part.name}.{key}", f"its band is not used, the value counts: {part.name}.{key}")
    for shaft in model.shafts:
        if len(shaft.segments) > MOST_LOOKED_AT:
            continue
        for k, segment in enumerate(shaft.segments, 1):
            for key in sorted(segment.given):
                value = getattr(segment, key, None)
                if isinstance(value, Value) and value.estimated:
                    address = f"{shaft.name}.{segment.name or f'segment_{k}'}.{key}"
                    yield Note(address, f"its band is not used, the value counts: {address}")


def _carrying(model: Model) -> Iterator[Note]:
    """Of hubs that carry: sizes taken from the gear, ends beyond the shaft, and two of them on one place."""
    for shaft in model.shafts:
        end, before = float(shaft.ends[-1]), ("", 0.0)
        on = [part for part in model.parts_on_shafts if isinstance(part, Heavy) and part.hub not in (None, NONE)]
        found = [(model.places[part.name].x, part) for part in on if model.places[part.name].shaft == shaft.name]
        for _, part in sorted(found, key=lambda each: each[0]):
            collar = collar_of(part, model.places[part.name], end)
            if collar is None:
                continue
            if "hub_diameter" not in part.given:
                taken = f"hub as thick as the root of its teeth, {show(collar.diameter, 'mm')}: {part.name}"
                yield Note(f"{part.name}.hub_diameter", taken)
            over = (part.hub_width or 0.0) - (collar.right - collar.left)
            if over > 1e-9 * end:
                yield Note(f"{part.name}.hub_length", f"the hub of {part.name} reaches {show(over, 'mm')} over an end")
            if before[1] - collar.left > 1e-9 * end:
                both = f"the hubs of {before[0]} and {part.name} overlap: both stiffen the shaft there"
                yield Note(f"{part.name}.hub_length", both)
            before = max(before, (part.name, collar.right), key=lambda each: each[1])


def _weakenings(model: Model) -> Iterator[Note]:
    """Keyways and splines that count by common practice."""
    for shaft in model.shafts:
        for address, k in shaft.weakened.items():
            segment = shaft.segments[k]
            key, weak = ("keyway", segment.keyway) if segment.keyway is not None else ("spline", segment.spline)
            if weak is not None and weak.effective_diameter is None:
                taken = show(weak.counted(segment.diameter.si).effective, "mm")
                how = f"{key} counts as a diameter of {taken}, {weak.practice}"
                yield Note(f"{address}.{key}.effective_diameter", f"{how}: {address}")
