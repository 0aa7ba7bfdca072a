"""What holds a shaft: pins, which give nothing way, and bearings, which do."""

from collections.abc import Iterator
from functools import cached_property
from typing import TYPE_CHECKING, Annotated, ClassVar, Literal, Self, Unpack

import numpy as np
from numpy.typing import NDArray
from pydantic import Field
from typing_extensions import override

from fe_shaft.model.clock import Direction
from fe_shaft.model.kinds import Choice
from fe_shaft.model.lists import Listed
from fe_shaft.model.part import Part
from fe_shaft.model.quantity import BoreTilt, Offset, Shift, Width
from fe_shaft.model.stiffness import Matrix, Seat, Stiffness
from fe_shaft.model.words import Fault

if TYPE_CHECKING:
    from fe_shaft.model.keywords import BearingWords, PinWords

HOLDS = ("radial", "axial", "stops_left", "stops_right", "tilt", "spin")
AXIAL = frozenset(("axial", "stops_left", "stops_right"))
OTHER_WAYS = frozenset(("catalogue", "geometry", "table"))  # of a later version, refused already
Holds = Annotated[tuple[str, ...], Listed(Choice(*HOLDS), '["radial"]', least=1)]


class Support(Part):
    """What pins and bearings have in common."""

    holds: Holds = Field(
        description="What it keeps the shaft from doing: `radial`; `axial` (both ways), `stops_left`, `stops_right` "
        "(one way); `tilt`; `spin`. This is what its rigid pin holds in the comparison.",
        examples=[["radial", "axial"]],
    )
    load_centre: Shift | None = Field(
        default=None,
        description="Where the forces act on the shaft's axis: distance to the right of the ring's middle.",
        examples=["12 mm"],
    )
    offset: Offset | None = Field(
        default=None, description="How far the bore lies out of line (half of a coaxiality zone).", examples=["20 um"]
    )
    offset_angle: Direction | None = Field(
        default=None, description="Direction in which the bore lies out of line.", examples=["4:30 o'clock"]
    )
    bore_tilt: BoreTilt | None = Field(
        default=None, description="How far the bore's axis leans.", examples=["0.5 mrad"]
    )
    bore_tilt_angle: Direction | None = Field(
        default=None, description="Direction in which the right end of the bore leans.", examples=["12 o'clock"]
    )
    width: Width | None = Field(
        default=None,
        description="Width of the ring; left out, it is the segment's length if `at` is the name of a segment.",
        examples=["19 mm"],
    )
    width_key: ClassVar[str] = "width"

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        holds = set(self.holds or ())
        if "axial" in holds and holds & {"stops_left", "stops_right"}:
            extra = " and ".join(sorted(holds & {"stops_left", "stops_right"}))
            yield Fault(("holds",), f"axial holds both ways already. Leave {extra} out, or axial.")
        elif {"stops_left", "stops_right"} <= holds:
            yield Fault(("holds",), 'stops_left and stops_right together are "axial". Write "axial" instead.')
        for amount, angle in (("offset", "offset_angle"), ("bore_tilt", "bore_tilt_angle")):
            if (amount in self.given) != (angle in self.given):
                there, missing = (amount, angle) if amount in self.given else (angle, amount)
                yield Fault((missing,), f"{missing} is not written, only {there}. Write both, or neither.")

    @property
    def holds_axially(self) -> bool:
        """Whether it holds along the shaft, at least one way."""
        return bool(AXIAL & set(self.holds))


class Pin(Support):
    """A support that gives nothing way in what it holds, and nothing else."""

    group: ClassVar[str] = "pins"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[PinWords]) -> None: ...


class Bearing(Support):
    """A support that gives way: a linear spring between shaft and seat."""

    group: ClassVar[str] = "bearings"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[BearingWords]) -> None: ...

    stiffness: Stiffness | None = Field(
        default=None,
        description="How it gives way, direction by direction.",
        examples=[{"radial": "~93 N/um", "tilt": "~5 N m/mrad"}],
    )
    matrix: Matrix | None = Field(
        default=None,
        description="The whole stiffness as a 6 x 6 matrix, instead of `stiffness`.",
        examples=[{"file": "bearing.mtx"}],
    )
    seat: Seat | None = Field(
        default=None,
        description="How the housing gives way at this bearing, if not as `housing.seat`; directions not written are "
        "rigid.",
        examples=[{"radial": "~400 N/um", "axial": "~150 N/um", "tilt": "~400 N m/mrad"}],
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        ways = self.given & {"stiffness", "matrix"}
        if not ways and not self.given & OTHER_WAYS:
            yield Fault(
                ("stiffness",),
                'stiffness is not written. Write stiffness = { radial = "93 N/um" }, or [pins.X] if it gives nothing '
                "way.",
            )
        elif len(ways) == 2:
            yield Fault(("matrix",), "matrix stands beside stiffness. Write one of them.")
        elif self.stiffness is not None and self.stiffness.written_figures:
            yield from self._unbacked(self.stiffness)

    def _unbacked(self, stiffness: Stiffness) -> Iterator[Fault]:
        """What is held must have a stiffness."""
        holds = set(self.holds or ())
        wanted = {
            "radial": (holds & {"radial"}, {"radial", "up", "front"}, "93 N/um"),
            "axial": (holds & AXIAL, {"axial"}, "60 N/um"),
            "tilt": (holds & {"tilt"}, {"tilt", "tilt_up", "tilt_front"}, "50 N m/mrad"),
        }
        for key, (held, keys, example) in wanted.items():
            if held and not stiffness.given & keys:
                what = " and ".join(sorted(held))
                yield Fault(
                    ("stiffness", key),
                    f'{key} is not written, but holds says {what}. Write {key} = "{example}", or hold less.',
                )
        if "spin" in holds:
            yield Fault(
                ("holds",), "spin has no stiffness in a bearing. Leave spin out, or hold it by a pin or a matrix."
            )

    @property
    def used(self) -> NDArray[np.bool_]:
        """Which of ux uy uz rx ry rz the bearing resists: (6,).

        Tilt always counts, held or not; what is not held along the shaft, across it or against spin is not used.
        """
        radial, spin = "radial" in self.holds, "spin" in self.holds
        return np.array([self.holds_axially, radial, radial, spin, True, True])

    @property
    def matrix_si(self) -> NDArray[np.float64] | None:
        """The 6 x 6 matrix in SI, rows and columns of unused directions 0; None if `stiffness` is written."""
        return None if self.matrix is None else self.matrix.si * np.outer(self.used, self.used)

    @property
    def diagonal(self) -> NDArray[np.float64] | None:
        """The six stiffnesses (6,) [N/m, N m/rad] that are used; None if a matrix is written."""
        return None if self.stiffness is None else self.stiffness.diagonal(0.0) * self.used

    @cached_property
    def law(self) -> NDArray[np.float64]:
        """The stiffness that is used as a 6 x 6 matrix in SI: (6, 6) [N/m, N, N m/rad]."""
        matrix, diagonal = self.matrix_si, self.diagonal
        if matrix is not None:
            return matrix
        assert diagonal is not None
        return np.diag(diagonal)

    @override
    def at_end(self, which: Literal["low", "high"]) -> Self:
        moved = {key: each.at_end(which) for key in ("stiffness", "seat") if (each := getattr(self, key)) is not None}
        return type(self).model_construct(set(self.given), **{**self.__dict__, **moved})
