"""A shaft: its segments from left to right, its material, and where it stands in the model."""

import re
from collections.abc import Iterator, Mapping, Sequence
from functools import cached_property
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Literal, Self, Unpack

import numpy as np
from pydantic import Field
from typing_extensions import override

from fe_shaft.errors import quote
from fe_shaft.model.contour import ContourKind, Written, segments_of
from fe_shaft.model.kinds import Choice, Kind, Name, Reference, Text, shown, thing
from fe_shaft.model.material import Material
from fe_shaft.model.plain import joined
from fe_shaft.model.quantity import Coordinate, Quantity
from fe_shaft.model.refusal import refuse
from fe_shaft.model.segment import Segment, Shear
from fe_shaft.model.segment_arrays import Array, SegmentArrays, running_sums
from fe_shaft.model.words import Fault, Named, example_of
from fe_shaft.units import FACTORS, Value

if TYPE_CHECKING:
    from fe_shaft.model.keywords import ShaftWords

MOST_SEGMENTS = 1_000_000
SHAPES = frozenset(("segments", "segments_file", "contour", "contour_file"))  # one of them says what a shaft is
AXES = ("+X", "-X", "+Y", "-Y", "+Z", "-Z")


class Vector(Kind):
    """Three numbers with a unit, along X, Y and Z of the model."""

    def __init__(self, number: Quantity, word: str = "") -> None:
        self.number, self.word = number, word
        self.caption = f"{quote(word) + ' | ' if word else ''}three of: {number.caption}"

    @override
    def check(self, raw: Any) -> Any:
        if self.word and isinstance(raw, str) and raw == self.word:
            return raw
        example = f'["0 {self.number.unit}", "0 {self.number.unit}", "12 {self.number.unit}"]'
        remedy = f"Write {quote(self.word) + ' or ' if self.word else ''}{example}."
        if not isinstance(raw, list | tuple):
            raise refuse(f"{shown(raw)} is {thing(raw)}, not a list of three. {remedy}")
        if len(raw) != 3:
            raise refuse(f"the list has {len(raw)} entries, not three (X, Y, Z). {remedy}")
        return tuple(self.number.read(each) for each in raw)

    @override
    def json(self) -> dict[str, Any]:
        vector = {"type": "array", "items": self.number.json(), "minItems": 3, "maxItems": 3}
        return {"anyOf": [{"enum": [self.word]}, vector]} if self.word else vector


class Shaft(Named):
    """One shaft."""

    group: ClassVar[str] = "shafts"
    positional: ClassVar[tuple[str, ...]] = ("name", "segments")

    if TYPE_CHECKING:

        def __init__(
            self, name: str, segments: Sequence[Segment | Mapping[str, Any]] = (), **words: Unpack[ShaftWords]
        ) -> None: ...

    name: Annotated[str, Name()] = Field(description="Name of the shaft.", examples=["layshaft"])
    segments: tuple[Segment, ...] = Field(
        default=(),
        description="Its segments from left to right; a `contour` or a file may stand instead.",
        examples=[[{"name": "wheel_seat", "length": "38 mm", "diameter": "38 mm"}]],
    )
    contour: Annotated[tuple[Written, ...], ContourKind()] | None = Field(
        default=None,
        description="Its points from left to right, instead of `segments`: x from the left end, outer diameter, bore "
        "if it is hollow; two points at one x are a step, between points the lines run straight. A point with a fillet "
        "is a table.",
        examples=[[["0 mm", "30 mm"], {"x": "19 mm", "diameter": "30 mm", "fillet": "1 mm"}, ["19 mm", "38 mm"]]],
    )
    material: Annotated[str, Reference()] | None = Field(
        default=None, description="Name of a built-in material or one of `materials`.", examples=["42CrMo4"]
    )
    shear: Shear = Field(
        default="cowper",
        description="Shear deformation: by Cowper (1966) from each section, none, or a shear coefficient.",
        examples=["none", 0.9],
    )
    left_end: Annotated[tuple[Value, Value, Value], Vector(Coordinate)] | None = Field(
        default=None,
        description="Where the left end stands in the model (X, Y, Z); the first shaft may leave it out: the origin.",
        examples=[["0 mm", "0 mm", "112 mm"]],
    )
    axis: Annotated[str, Choice(*AXES)] = Field(
        default="+X", description="Direction from the left end to the right, in the model.", examples=["+Y"]
    )
    twelve: Annotated[str, Choice(*AXES)] | None = Field(
        default=None,
        description="Direction of 12 o'clock in the model; +Y, unless the shaft itself stands along Y.",
        examples=["+Z"],
    )
    segments_file: Annotated[str, Text()] | None = Field(
        default=None,
        description="Model files only: a table (CSV) with the segments, beside the model, instead of `segments`.",
        examples=["layshaft.csv"],
    )
    contour_file: Annotated[str, Text()] | None = Field(
        default=None,
        description="Model files only: a table (CSV) or drawing (DXF) with the contour, beside the model, instead of "
        "`contour`.",
        examples=["layshaft.dxf"],
    )
    contour_layer: Annotated[str, Text()] | None = Field(
        default=None,
        description="Layer of the drawing with the contour; may be left out if one layer alone has lines.",
        examples=["contour"],
    )
    contour_unit: Annotated[str, Choice(*FACTORS["length"])] | None = Field(
        default=None, description="Unit of a drawing that states none.", examples=["mm"]
    )
    label: Annotated[str, Text()] | None = Field(
        default=None, description="What pictures call it, in any alphabet.", examples=["intermediate shaft"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from self._source_faults()
        yield from self._list_faults()
        yield from self._name_faults()
        if not self.axis:
            return
        if self.axis[1] == "Y" and "twelve" not in self.given:
            yield Fault(("twelve",), f'a shaft along {self.axis} has no upper side. Write twelve = "+Z".')
        elif self.twelve and self.twelve[1] == self.axis[1]:
            other = "+Y" if self.axis[1] == "Z" else "+Z"
            yield Fault(
                ("twelve",), f'12 o\'clock cannot point along the axis ({self.axis}). Write twelve = "{other}".'
            )

    def model_post_init(self, context: Any) -> None:
        """Put the segments of a contour in their place; what was written stays the contour."""
        if self.contour and "segments" not in self.given:
            self.__dict__["segments"] = segments_of(self.contour)

    def _source_faults(self) -> Iterator[Fault]:
        """Where the segments come from: exactly one place."""
        if "segments_file" in self.given:
            yield Fault(("segments_file",), "only a model file reads files. In a script write segments = [...].")
        if "contour_file" in self.given:
            remedy = 'In a script write contour = fs.read_contour("shaft.dxf").'
            yield Fault(("contour_file",), f"only a model file reads files. {remedy}")
        for key in ("contour_layer", "contour_unit"):
            if key in self.given and "contour_file" not in self.given:
                yield Fault((key,), f"{key} belongs to a contour_file, and none is read here. Write both, or neither.")
        if "contour" in self.given and "segments" in self.given:
            yield Fault(("contour",), "contour stands beside segments. Write one of them.")
        if not self.given & SHAPES:
            remedy = f"Write {example_of(type(self), 'segments')}, or contour = [...]."
            yield Fault(("segments",), f"segments is not written. {remedy}")

    def _list_faults(self) -> Iterator[Fault]:
        if self.segments is None:
            return
        if not self.segments and "segments" in self.given:
            yield Fault(
                ("segments",), 'the shaft has no segment. Write segments = [{ length = "38 mm", diameter = "38 mm" }].'
            )
        elif len(self.segments) > MOST_SEGMENTS:
            yield Fault(("segments",), f"{len(self.segments)} segments; {MOST_SEGMENTS} at most are computed.")
        if "material" not in self.given and any("material" not in segment.given for segment in self.segments):
            yield Fault(("material",), 'material is not written. Write material = "42CrMo4".')

    def _name_faults(self) -> Iterator[Fault]:
        seen: dict[str, int] = {}
        for index, segment in enumerate(self.segments or ()):
            name = segment.name
            if name is None:
                continue
            if name in seen:
                yield Fault(
                    ("segments", index, "name"),
                    f"{quote(name)} is segment {seen[name] + 1} already. Choose another name.",
                )
            elif name in _SHAFT_KEYS:
                yield Fault(("segments", index, "name"), f"{quote(name)} is a key of the shaft. Choose another name.")
            elif (number := _NUMBERED.fullmatch(name)) and int(number[1]) != index + 1:
                words = f"{quote(name)} is segment {index + 1}, and what segment {number[1]} is called without a name."
                yield Fault(("segments", index, "name"), f"{words} Choose another name.")
            else:
                seen[name] = index

    @classmethod
    @override
    def place_of(cls, words: Mapping[str, Any], path: tuple[str | int, ...]) -> str:
        name = words.get("name")
        head = name if isinstance(name, str) and name else "shaft"
        return joined([head, *inside_shaft(words.get("segments"), path)])

    @cached_property
    def lengths(self) -> Array:
        """Length of each segment: (n_segments,) [m]."""
        return np.array([segment.length.si for segment in self.segments])

    @cached_property
    def numbers(self) -> dict[str, Array]:
        """Lengths and diameters as arrays (n_segments,) [m], by the names of `SegmentArrays`."""
        rows = self.segments
        diameter = np.array([row.diameter.si for row in rows])
        bore = np.array([0.0 if row.bore is None else row.bore.si for row in rows])
        right = [d if row.end_diameter is None else row.end_diameter.si for row, d in zip(rows, diameter, strict=True)]
        end_bore = [b if row.end_bore is None else row.end_bore.si for row, b in zip(rows, bore, strict=True)]
        named = {"length": self.lengths, "diameter_left": diameter, "diameter_right": np.array(right)}
        return named | {"bore_left": bore, "bore_right": np.array(end_bore)}

    @cached_property
    def ends(self) -> Array:
        """Where segments end, from the left end on: (n_segments + 1,) [m], the first 0."""
        ends = running_sums(self.lengths)
        ends.setflags(write=False)
        return ends

    @cached_property
    def segment_index(self) -> dict[str, int]:
        """Number of each named segment, counted from 0."""
        return {segment.name: index for index, segment in enumerate(self.segments or ()) if segment.name}

    @cached_property
    def weakened(self) -> dict[str, int]:
        """Number of every segment with a keyway or a spline, counted from 0, by its address."""
        found = ((k, segment) for k, segment in enumerate(self.segments or ()) if segment.weakening is not None)
        return {f"{self.name}.{segment.name or f'segment_{k + 1}'}": k for k, segment in found}

    def at_ends(self, ends: Mapping[str, Literal["low", "high"]]) -> Self:
        """The same with keyways and splines at ends of their bands, by the addresses of their segments."""
        moved = {k: ends[address] for address, k in self.weakened.items() if address in ends}
        if not moved:
            return self
        rows = [row.at_end(moved[k]) if k in moved else row for k, row in enumerate(self.segments)]
        return type(self).model_construct(set(self.given), **{**self.__dict__, "segments": tuple(rows)})

    @property
    def _fillets(self) -> dict[str, Array]:
        """Fillets at both ends of the segments (n_segments,) [m]."""
        return {
            "fillet_left": np.array([_size(row.fillet_left, row.fillet) for row in self.segments]),
            "fillet_right": np.array([_size(row.fillet_right, row.fillet) for row in self.segments]),
        }

    def arrays(self, materials: Mapping[str, Material]) -> SegmentArrays:
        """The shaft in numbers.

        Parameters
        ----------
        materials : mapping
            Every material that shaft and segments name.
        """
        names = [segment.material or self.material or "" for segment in self.segments]
        unique = list(dict.fromkeys(names))
        figures = np.array([[*materials[name].elastic, _density(materials[name])] for name in unique])
        number = {name: index for index, name in enumerate(unique)}
        rows = figures[[number[name] for name in names]] if len(unique) > 1 else np.repeat(figures, len(names), axis=0)
        shear = [_SHEAR.get(each, each) for each in (segment.shear or self.shear for segment in self.segments)]
        young, stiff, ratio, density = np.ascontiguousarray(rows.T)
        columns = {"youngs_modulus": young, "shear_modulus": stiff, "poisson_ratio": ratio, "density": density}
        made = {**self.numbers, **columns, "shear_coefficient": np.array(shear, dtype=float), **self._fillets}
        for column in made.values():
            column.setflags(write=False)
        return SegmentArrays(**made, ends=self.ends)


def _size(value: Value | None, default: Value | None) -> float:
    chosen = default if value is None else value
    return 0.0 if chosen is None else chosen.si


_SHAFT_KEYS = frozenset(Shaft.model_fields)
_NUMBERED = re.compile(r"segment_([1-9]\d*)")  # how a segment without a name is addressed
_SHEAR: dict[str | float, float] = {"cowper": np.nan, "none": np.inf}


def _density(material: Material) -> float:
    return 0.0 if material.density is None else material.density.si


def inside_shaft(segments: Any, path: tuple[str | int, ...]) -> list[str]:
    """The steps of an address inside a shaft: segments by name, or by their number from 1, as points of a contour."""
    if len(path) > 1 and path[0] == "contour" and isinstance(path[1], int):
        return ["contour", f"point_{path[1] + 1}", *(str(step) for step in path[2:])]
    if len(path) < 2 or path[0] != "segments" or not isinstance(path[1], int):
        return [str(step) for step in path]
    rows = segments if isinstance(segments, list | tuple) else ()
    row = rows[path[1]] if path[1] < len(rows) else None
    name = row.get("name") if isinstance(row, Mapping) else getattr(row, "name", None)
    return [name if isinstance(name, str) and name else f"segment_{path[1] + 1}", *(str(step) for step in path[2:])]
