"""A segment: one cylinder or cone of a shaft, solid or bored."""

from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Literal, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.kinds import Kind, Name, Reference, shown, thing
from fe_shaft.model.quantity import Bore, Diameter, Fillet, Length
from fe_shaft.model.refusal import refuse
from fe_shaft.model.weakening import Keyway, Spline, Weakening
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

    keyway: Keyway | None = Field(
        default=None,
        description="Keyway along the whole segment; cut the segment where it ends.",
        examples=[{"width": "10 mm", "depth": "5 mm"}],
    )
    spline: Spline | None = Field(
        default=None,
        description="Splines along the whole segment, whose diameter is that of their tips.",
        examples=[{"root_diameter": "36 mm"}],
    )

    @property
    def weakening(self) -> Weakening | None:
        """Its keyway or spline."""
        return self.keyway or self.spline

    def at_end(self, which: Literal["low", "high"]) -> "Segment":
        """The same with its keyway or spline at one end of its band."""
        key = "keyway" if self.keyway is not None else "spline"
        moved = getattr(self, key).at_end(which, self.diameter.si)
        return Segment.model_construct(set(self.given), **{**self.__dict__, key: moved})

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from self._wall_faults()
        yield from self._weakening_faults()

    def _weakening_faults(self) -> Iterator[Fault]:
        ways = [key for key in ("keyway", "spline") if key in self.given]
        if len(ways) == 2:
            yield Fault(("spline",), "spline stands beside keyway. Keep one, or cut the segment in two.")
        for key in ways:
            if self.given & {"end_diameter", "end_bore"}:
                yield Fault((key,), f"a cone carries no {key} here. Cut the segment, or leave the {key} out.")
            elif getattr(self, key) is not None and self.diameter is not None:
                yield from getattr(self, key).faults_in(key, self.diameter, self.bore)

    def _wall_faults(self) -> Iterator[Fault]:
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
