"""Limits: what a named quantity may reach, and who says so."""

from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Unpack

from pydantic import Field, ValidationInfo
from typing_extensions import override

from fe_shaft.errors import nearest, quote
from fe_shaft.model.kinds import Choice, Kind, Name, Reference, shown, thing
from fe_shaft.model.lists import Listed
from fe_shaft.model.quantity import Quantity
from fe_shaft.model.refusal import refuse
from fe_shaft.model.words import Fault, Named
from fe_shaft.units import Value

if TYPE_CHECKING:
    from fe_shaft.model.keywords import LimitWords

# Quantity -> how large it may be.
QUANTITIES: dict[str, Quantity] = {
    **dict.fromkeys(
        ("deflection", "up", "front", "axial", "separation", "tangential"),
        Quantity("length", ("0.01 um", "100 mm"), sign="any", unit="um"),
    ),
    **dict.fromkeys(("slope", "tilt", "twist"), Quantity("angle", ("0.0001 mrad", "1 rad"), sign="any", unit="mrad")),
    "force": Quantity("force", ("0.01 N", "100 MN"), sign="any"),
}
_LATER = {
    "misalignment": "It needs gear pairs.",
    "life_hours": "It needs a bearing catalogue.",
}
SUPPORTS_ONLY = ("tilt", "force")
GEARS_ONLY = ("separation", "tangential")
KINDS = ("bearing", "pin", "gear", "coupling", "pulley", "sprocket", "mass", "force")  # after "every"


class Of(Kind):
    """What a limit holds for: a name, a list of names, or ``every bearing``."""

    caption = "name | list of names | every bearing, every gear, ..."

    @override
    def check(self, raw: Any) -> str | tuple[str, ...]:
        if isinstance(raw, list | tuple):
            names: tuple[str, ...] = Listed(Reference(), '["wheel", "pinion"]', least=1).check(raw)
            return names
        if not isinstance(raw, str):
            raise refuse(f'{shown(raw)} is {thing(raw)}, not a name. Write of = "wheel" or of = "every bearing".')
        if raw.startswith("every") and raw.removeprefix("every").strip() not in KINDS:
            word = raw.removeprefix("every").strip()
            if word in ("gear pair", "pair"):
                raise refuse(f"{quote(raw)} is not known yet in this version. It needs gear pairs.")
            hint = nearest(raw, [f"every {kind}" for kind in KINDS])
            raise refuse(f"{quote(raw)} means nothing here. {hint or f'Write every {KINDS[0]}.'}")
        if " to " in raw:
            raise refuse(f"{quote(raw)}: one thing against another is not known yet in this version. Write one name.")
        return Reference().check(raw)

    @override
    def json(self) -> dict[str, Any]:
        return {"anyOf": [{"type": "string"}, {"type": "array", "items": {"type": "string"}}]}


class Bound(Kind):
    """The end of what is allowed; its dimension is that of the quantity."""

    caption = "number with the unit of the quantity"

    @override
    def check_in(self, raw: Any, info: ValidationInfo) -> Value | None:
        name = info.data.get("quantity") if info.data else None
        if name is None:  # the quantity itself is wrong, which is told at its own key
            return None
        return QUANTITIES[name].read(raw, loose=info.context is not None and info.context["loose"])

    @override
    def json(self) -> dict[str, Any]:
        return {"type": "string"}


class Limit(Named):
    """One limit; what the tool finds is held against it in every case, and at the ends of the band."""

    group: ClassVar[str] = "limits"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[LimitWords]) -> None: ...

    name: Annotated[str, Name()] = Field(description="Name of the limit.", examples=["wheel_deflection"])
    of: Annotated[str | tuple[str, ...], Of()] = Field(
        description="Part, list of parts, or `every bearing`, `every gear`, ...", examples=["wheel", "every bearing"]
    )
    quantity: Annotated[str, Choice(*QUANTITIES, later=_LATER)] = Field(
        description="What is limited.", examples=["deflection"]
    )
    max: Annotated[Value, Bound()] | None = Field(
        default=None, description="Largest value allowed; without `min`, of the size.", examples=["20 um"]
    )
    min: Annotated[Value, Bound()] | None = Field(
        default=None, description="Smallest value allowed; without `max`, of the size.", examples=["-5 um"]
    )
    counting: Annotated[
        str,
        Choice("everything", later=dict.fromkeys(("shaft", "shaft and bearings"), 'Write counting = "everything".')),
    ] = Field(default="everything", description="What is counted: all that gives way.", examples=["everything"])
    cases: Annotated[tuple[str, ...], Listed(Reference(), '["running"]', least=1)] | None = Field(
        default=None, description="Cases in which it holds; all if left out.", examples=[["running"]]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        if not self.given & {"max", "min", "bundled"}:
            yield Fault(("max",), 'max is not written. Write max = "20 um", or min.')
        if self.max and self.min and self.min.si >= self.max.si:
            yield Fault(("min",), f"{self.min.text} is not below max = {self.max.text}. Exchange them.")
        for key, bound, other in (("max", self.max, "min"), ("min", self.min, "max")):
            if bound and other not in self.given and bound.si <= 0:
                says = f"{bound.text}: without {other} it limits the size, which is never negative"
                yield Fault((key,), f"{says}. Write a value above 0, or {other} as well for a range.")
