"""A segment: one cylinder or cone of a shaft, solid or bored."""

from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.kinds import Kind, Name, Reference, shown, thing
from fe_shaft.model.quantity import Bore, Diameter, Fillet, Length
from fe_shaft.model.refusal import refuse
from fe_shaft.model.words import Fault, Named

if TYPE_CHECKING:
    from fe_shaft.model.keywords import SegmentWords


class ShearKind(Kind):
    """How a section gives way in shear: ``cowper``, ``none`` or a shear coefficient."""

    caption = "cowper | none | number"

    @override
    def check(self, raw: Any) -> str | float:
        if isinstance(raw, str) and raw in ("cowper", "none"):
            return str(raw)
        if isinstance(raw, bool) or not isinstance(raw, int | float):
            raise refuse(
                f'{shown(raw)} is {thing(raw)} that says nothing about shear. Write "cowper", "none" or a shear '
                "coefficient such as 0.9."
            )
        if not 0.0 < raw <= 1.0:
            raise refuse(f'{shown(raw)} is no shear coefficient: above 0, up to 1. Write "cowper" (by section) or 0.9.')
        return float(raw)

    @override
    def json(self) -> dict[str, Any]:
        return {"anyOf": [{"enum": ["cowper", "none"]}, {"type": "number", "exclusiveMinimum": 0, "maximum": 1}]}


Shear = Annotated[str | float, ShearKind()]


class Segment(Named):
    """One cylinder or cone of a shaft, from left to right as drawn."""

    group: ClassVar[str] = "segments"
    named_inside: ClassVar[bool] = True

    if TYPE_CHECKING:

        def __init__(self, name: str | None = None, **words: Unpack[SegmentWords]) -> None: ...

    name: Annotated[str, Name()] | None = Field(
        default=None,
        description="Name, unique on its shaft; a segment without one is shown by its number and cannot be addressed.",
        examples=["wheel_seat"],
    )
    length: Length = Field(description="Length along the shaft.", examples=["38 mm"])
    diameter: Diameter = Field(
        description="Outer diameter; of a cone, at its left end. A tolerance class may follow.",
        examples=["38 mm", "30 mm k6"],
    )
    bore: Bore | None = Field(
        default=None, description="Diameter of the bore; of a conical bore, at its left end.", examples=["12 mm"]
    )
    end_diameter: Diameter | None = Field(
        default=None, description="Outer diameter at the right end of a cone.", examples=["30 mm"]
    )
    end_bore: Bore | None = Field(
        default=None, description="Diameter of a conical bore at its right end.", examples=["8 mm"]
    )
    fillet: Fillet | None = Field(
        default=None,
        description="Fillet radius at each end where this segment is the thinner one.",
        examples=["1.5 mm"],
    )
    fillet_left: Fillet | None = Field(
        default=None, description="Fillet radius at the left end, instead of `fillet`.", examples=["1 mm"]
    )
    fillet_right: Fillet | None = Field(
        default=None, description="Fillet radius at the right end, instead of `fillet`.", examples=["0.5 mm"]
    )
    material: Annotated[str, Reference()] | None = Field(
        default=None, description="Material of this segment, where it is not the shaft's.", examples=["EN-GJS-400"]
    )
    shear: Shear | None = Field(
        default=None, description="Shear of this segment, where it is not the shaft's.", examples=[0.9]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        if self.bore is None and self.end_bore is None:
            return
        left, right = self.diameter, self.end_diameter or self.diameter
        ends = [("bore", self.bore, left)]
        if self.given & {"end_bore", "end_diameter"}:
            key = "end_bore" if "end_bore" in self.given else "end_diameter"
            ends.append((key, self.end_bore or self.bore, right))
        for key, bore, diameter in ends:
            if bore and diameter and bore.si >= diameter.si:
                smaller = "the diameter larger" if key == "end_diameter" else "it smaller"
                end = " at the right end" if key != "bore" else ""
                yield Fault(
                    (key,), f"{bore.text} leaves no wall in a diameter of {diameter.text}{end}. Make {smaller}."
                )
