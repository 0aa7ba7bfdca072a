"""Keyways and splines: what weakens a segment from end to end, counted by an effective diameter."""

import math
from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, ClassVar, Literal, NamedTuple, Self, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.kinds import Count
from fe_shaft.model.quantity import Diameter, Width
from fe_shaft.model.words import Fault, Words
from fe_shaft.units import Value, show

if TYPE_CHECKING:
    from fe_shaft.model.keywords import KeywayWords, SplineWords

#: Twist of a shaft with one keyway of width w and depth t over that without: 1 + 0.4 w/d + 0.7 t/d
#: (H. F. Moore, The Effect of Keyways on the Strength of Shafts, University of Illinois, 1909; from memory).
BY_WIDTH, BY_DEPTH = 0.4, 0.7
#: Share of the height of a spline's teeth that carries (common practice, no source; sections solved as plane problems
#: give a quarter in torsion and half in bending, `tests/evidence/test_keyways.py`).
TEETH = 0.25


class Counted(NamedTuple):
    """Diameters that a weakened segment may count as [m].

    Attributes
    ----------
    full : all of the groove's depth taken away
    effective : as it is taken
    ignored : the groove ignored
    """

    full: float
    effective: float
    ignored: float


class Weakening(Words):
    """What weakens a segment."""

    effective_diameter: Diameter | None = Field(
        default=None,
        description="Diameter that the segment counts as; left out, by common practice.",
        examples=["36.5 mm"],
    )

    practice: ClassVar[str] = ""  # where the effective diameter comes from that is taken

    def counted(self, diameter: float) -> Counted:
        """What a segment of a diameter [m] counts as."""
        full = self.remaining(diameter)
        taken = self.usual(diameter) if self.effective_diameter is None else self.effective_diameter.si
        return Counted(full, min(max(taken, full), diameter), diameter)

    def remaining(self, diameter: float) -> float:
        """Diameter [m] with all of the groove's depth taken away."""
        raise NotImplementedError

    def usual(self, diameter: float) -> float:
        """Effective diameter [m] by common practice."""
        raise NotImplementedError

    @property
    def readable(self) -> bool:
        """Whether all of it could be read."""
        return True

    def figure(self, diameter: float) -> tuple[Value, str, str]:
        """The effective diameter as an estimate, its unit, and its band in words.

        The band reaches from full to ignored, unless one is written with the effective diameter.
        """
        full, effective, ignored = self.counted(diameter)
        own, text = self.effective_diameter, show(effective, "mm")
        if own is not None and own.estimated:
            return Value(effective, text, own.low, own.high, own.source or self.source or ""), "mm", ""
        ends = f"full {show(full, 'mm')}, ignored {show(ignored, 'mm')}"
        return Value(effective, text, full, ignored, self.source or ""), "mm", ends

    def at_end(self, which: Literal["low", "high"], diameter: float) -> Self:
        """The same at one end of its band: all of its depth taken away, or ignored, unless another one is written."""
        end = self.figure(diameter)[0].end(which).si
        told = {**self.__dict__, "effective_diameter": Value(end, show(end, "mm", 6))}
        return type(self).model_construct(self.given | {"effective_diameter"}, **told)

    def faults_in(self, key: str, diameter: Value, bore: Value | None) -> Iterator[Fault]:
        """Mistakes that show only in the segment: nothing left, or a diameter out of its band."""
        if not self.readable:
            return
        full, inner = self.remaining(diameter.si), 0.0 if bore is None else bore.si
        if full <= inner:
            yield Fault(
                (key,),
                f"it leaves {show(max(full, 0.0), 'mm')} of {diameter.text}, no wall. Make it less deep.",
            )
        elif full > diameter.si:
            yield Fault((key,), f"it is thicker than the segment ({diameter.text}). Make it smaller.")
        if full > inner:
            yield from self._taken_faults(key, full, diameter)

    def _taken_faults(self, key: str, full: float, diameter: Value) -> Iterator[Fault]:
        """An effective diameter, or an end of its band, that no depth of the groove can give."""
        taken = self.effective_diameter
        ends = [] if taken is None else [taken.si, *((taken.low, taken.high) if taken.estimated else ())]
        if taken is not None and not all(full <= end <= diameter.si for end in ends if end is not None):
            yield Fault(
                (key, "effective_diameter"),
                f"{taken.text} is not between {show(full, 'mm', 6)} (all of it taken away) and {diameter.text} "
                "(ignored). Write a diameter in between.",
            )


class Keyway(Weakening):
    """Keyways along a whole segment."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[KeywayWords]) -> None: ...

    practice: ClassVar[str] = "by its twist (Moore 1909, from memory)"

    width: Width = Field(description="Width of the keyway.", examples=["10 mm"])
    depth: Width = Field(description="Depth in the shaft, from the full diameter.", examples=["5 mm"])
    count: Annotated[int, Count(1, 4)] = Field(
        default=1, description="Number of keyways around the shaft.", examples=[2]
    )

    @property
    @override
    def readable(self) -> bool:
        return self.width is not None and self.depth is not None

    @override
    def faults_in(self, key: str, diameter: Value, bore: Value | None) -> Iterator[Fault]:
        yield from super().faults_in(key, diameter, bore)
        count = self.count or 1
        if self.readable and self.width.si >= diameter.si * math.sin(math.pi / max(count, 2)):  # flank meets flank
            many = "one keyway" if count == 1 else f"{count} keyways"
            left = f"{'leaves' if count == 1 else 'leave'} nothing of {diameter.text}"
            yield Fault((key, "width"), f"{many} of {self.width.text} {left}. Make it narrower.")

    @override
    def remaining(self, diameter: float) -> float:
        """The largest circle that the keyways leave: d - t of one, d - 2 t of several."""
        return diameter - min(self.count or 1, 2) * self.depth.si

    @override
    def usual(self, diameter: float) -> float:
        """By Moore's ratio k of twists, one keyway as good as the next: d k^(-1/4)."""
        each = BY_WIDTH * self.width.si / diameter + BY_DEPTH * self.depth.si / diameter
        return float(diameter * (1 + (self.count or 1) * each) ** -0.25)


class Spline(Weakening):
    """Splines along a whole segment, whose diameter is that of their tips."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[SplineWords]) -> None: ...

    practice: ClassVar[str] = "the core and a quarter of the teeth (common practice, no source)"

    root_diameter: Diameter = Field(description="Diameter at the root of the splines.", examples=["36 mm"])

    @property
    @override
    def readable(self) -> bool:
        return self.root_diameter is not None

    @override
    def remaining(self, diameter: float) -> float:
        """The core."""
        return self.root_diameter.si

    @override
    def usual(self, diameter: float) -> float:
        """The core and a quarter of the height of the teeth on either side."""
        return self.root_diameter.si + TEETH * (diameter - self.root_diameter.si)
