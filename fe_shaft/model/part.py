"""What everything on a shaft has in common: a name, its shaft, its place; for heavy things, a centre of gravity."""

from collections.abc import Iterator
from typing import Annotated, Any, ClassVar, Literal, Self

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.clock import Direction
from fe_shaft.model.hub import NONE, Hub, hub_end
from fe_shaft.model.kinds import Kind, Name, Reference, Text, shown
from fe_shaft.model.position import At
from fe_shaft.model.quantity import Diameter, Quantity, Radius, Weight, Width
from fe_shaft.model.refusal import refuse
from fe_shaft.model.words import Fault, Named, example_of
from fe_shaft.units import Value

PLACING = ("at", "left_at", "right_at")


class Part(Named):
    """A thing on a shaft."""

    group: ClassVar[str]

    name: Annotated[str, Name()] = Field(
        description="Name, unique among all parts; it is the address.", examples=["wheel"]
    )
    on: Annotated[str, Reference()] | None = Field(
        default=None, description="Shaft it is on; may be left out when there is only one.", examples=["layshaft"]
    )
    at: At | None = Field(
        default=None,
        description="Where its middle is: from the shaft's left end, on a segment or part, or beside one.",
        examples=["62 mm", "wheel_seat", "wheel + 12 mm", "collar.right - 2 mm"],
    )
    left_at: At | None = Field(default=None, description="Where its left face is.", examples=["right_journal.left"])
    right_at: At | None = Field(default=None, description="Where its right face is.", examples=["left_journal.right"])
    label: Annotated[str, Text()] | None = Field(
        default=None, description="What pictures call it, in any alphabet.", examples=["big wheel"]
    )
    width_key: ClassVar[str | None] = None  # key that says how wide it is

    @override
    def faults_together(self) -> Iterator[Fault]:
        placed = [key for key in PLACING if key in self.given]
        if not placed:
            yield Fault(
                ("at",),
                f"at is not written. Write {example_of(type(self), 'at')} (middle), or left_at or right_at (a face).",
            )
        elif len(placed) > 1:
            yield Fault((placed[1],), f"{' and '.join(placed)} place it more than once. Keep one.")
        elif placed[0] != "at" and not self.given & {self.width_key, "catalogue"}:
            key = self.width_key
            remedy = f"Write {example_of(type(self), key)} as well, or at." if key else "Write at."
            yield Fault((placed[0],), f"{placed[0]} places a face, but nothing says how wide it is. {remedy}")

    @property
    def spread_si(self) -> float:
        """Width over which its load is spread [m]; 0 at a point."""
        return 0.0

    def at_end(self, which: Literal["low", "high"]) -> Self:
        """The same with every estimate at one end of its band."""
        return self

    @property
    def placed_by(self) -> str | None:
        """Which key places it."""
        return next((key for key in PLACING if key in self.given), None)

    @property
    def width_si(self) -> float | None:
        """How wide it is along the shaft [m], None if that is not written."""
        value = getattr(self, self.width_key) if self.width_key else None
        return value.si if isinstance(value, Value) else None


class SpreadKind(Kind):
    """Over which width a load is spread: a length, ``point`` or another word."""

    def __init__(self, *words: str) -> None:
        self.words = words
        self.length = Quantity("length", ("0.1 mm", "20 m"))
        self.caption = " | ".join([*words, "length"])

    @override
    def check(self, raw: Any) -> str | Value:
        if isinstance(raw, str) and raw in self.words:
            return raw
        if isinstance(raw, str) and raw.isalpha():
            words = " or ".join(f'"{word}"' for word in self.words)
            raise refuse(f'{shown(raw)} is not possible here. Write {words} or a length, as in "20 mm".')
        return self.length.read(raw)

    @override
    def json(self) -> dict[str, Any]:
        return {"anyOf": [{"enum": list(self.words)}, self.length.json()]}


class Spread(Part):
    """A thing whose load acts at a point, or is spread over a width."""

    spread: Annotated[str | Value, SpreadKind("point")] = Field(
        default="point", description="Width over which its load is spread evenly.", examples=["20 mm"]
    )
    width_key: ClassVar[str | None] = "spread"

    @property
    def spread_si(self) -> float:
        """Width over which the load is spread [m]; 0 at a point."""
        return self.spread.si if isinstance(self.spread, Value) else 0.0


class Heavy(Part):
    """A thing with mass; its centre of gravity may lie beside its place and off the axis."""

    mass: Weight | None = Field(default=None, description="Mass; it weighs where gravity acts.", examples=["4.1 kg"])
    cg_at: At | None = Field(
        default=None,
        description="Position of its centre of gravity, where it is not at its middle.",
        examples=["stub.right"],
    )
    cg_radius: Radius | None = Field(
        default=None, description="Distance of its centre of gravity from the axis.", examples=["2 mm"]
    )
    cg_angle: Direction | None = Field(
        default=None, description="Direction of its centre of gravity from the axis.", examples=["12 o'clock"]
    )
    hub: Hub | None = Field(
        default=None,
        description="How it stiffens the shaft under it: `none`, in `one piece`, or an assumed share of that.",
        examples=["one piece", 0.5],
    )
    hub_diameter: Diameter | None = Field(
        default=None,
        description="Outer diameter of what may work with the shaft; of a cylindrical gear, the root diameter if left "
        "out.",
        examples=["60 mm"],
    )
    hub_length: Width | None = Field(
        default=None,
        description="Length of the hub along the shaft; of a gear, its width if left out.",
        examples=["40 mm"],
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        where = [key for key in ("cg_at", "cg_radius", "cg_angle") if key in self.given]
        if where and "mass" not in self.given and not type(self).model_fields["mass"].is_required():
            yield Fault(("mass",), f"mass is not written, but {where[0]} is. Write {example_of(type(self), 'mass')}.")
        if ("cg_radius" in self.given) != ("cg_angle" in self.given):
            there, missing = ("cg_radius", "cg_angle") if "cg_radius" in self.given else ("cg_angle", "cg_radius")
            yield Fault((missing,), f"{missing} is not written, only {there}. Write both, or neither.")
        yield from self._hub_faults()

    def _hub_faults(self) -> Iterator[Fault]:
        if self.hub in (None, NONE):
            return
        for key, known in (("hub_diameter", self.hub_outside), ("hub_length", self.hub_width)):
            if known is None and key not in self.given:
                yield Fault((key,), f"{key} is not written, but hub is. Write {example_of(type(self), key)}.")

    @property
    def hub_outside(self) -> float | None:
        """Outer diameter of its hub [m], None if that is not known."""
        return None if self.hub_diameter is None else self.hub_diameter.si

    @property
    def hub_width(self) -> float | None:
        """Length of its hub along the shaft [m], None if that is not known."""
        return self.width_si if self.hub_length is None else self.hub_length.si

    @property
    def hub_assumed(self) -> bool:
        """Whether a share of its hub is assumed to work with the shaft."""
        return isinstance(self.hub, float)

    def with_hub(self, hub: str) -> Self:
        """The same with another word for its hub."""
        return type(self).model_construct(self.given | {"hub"}, **{**self.__dict__, "hub": hub})

    @override
    def at_end(self, which: Literal["low", "high"]) -> Self:
        return self.with_hub(hub_end(which)) if self.hub_assumed else self
