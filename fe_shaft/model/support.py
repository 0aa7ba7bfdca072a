"""What holds a shaft: pins, which give nothing way, and bearings, which do."""

from collections.abc import Iterator
from functools import cached_property
from typing import TYPE_CHECKING, Annotated, ClassVar, Literal, Self, Unpack

import numpy as np
from numpy.typing import NDArray
from pydantic import Field
from typing_extensions import override

from fe_shaft.model.clock import Direction
from fe_shaft.model.inside import KINDS, BearingKind, Geometry, Kind
from fe_shaft.model.kinds import Choice
from fe_shaft.model.lists import Listed
from fe_shaft.model.part import Part
from fe_shaft.model.quantity import BoreTilt, Clearance, ContactAngle, Offset, Shift, Width
from fe_shaft.model.stiffness import Matrix, Seat, Stiffness
from fe_shaft.model.words import Fault

if TYPE_CHECKING:
    from fe_shaft.model.keywords import BearingWords, PinWords

HOLDS = ("radial", "axial", "stops_left", "stops_right", "tilt", "spin")
AXIAL = frozenset(("axial", "stops_left", "stops_right"))
OTHER_WAYS = frozenset(("catalogue", "table"))  # of a later version, refused already
COMPUTED_ONLY = ("kind", "contact_angle", "radial_clearance")
#: Directions of a computed bearing before its own stiffness is known: ux uy uz rx ry rz [N/m, N m/rad].
UNKNOWN = (1e8, 1e8, 1e8, 0.0, 1e4, 1e4)
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
    kind: Kind | None = Field(
        default=None,
        description="Kind of a bearing whose stiffness is computed.",
        examples=["deep groove ball bearing"],
    )
    geometry: Geometry | None = Field(
        default=None,
        description="What is inside a bearing whose stiffness is computed, instead of `stiffness`.",
        examples=[{"elements": 8, "element_diameter": "12.3 mm", "pitch_diameter": "51 mm"}],
    )
    contact_angle: ContactAngle | None = Field(
        default=None,
        description="Nominal contact angle, from the radial plane, of kinds that have one.",
        examples=["12 deg"],
    )
    radial_clearance: Clearance | None = Field(
        default=None,
        description="Radial internal clearance of a computed bearing as mounted and warm; negative: rings press.",
        examples=["8 um"],
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
        ways = self.given & {"stiffness", "matrix", "geometry"}
        for key in COMPUTED_ONLY:
            if key in self.given and "geometry" not in ways:
                yield Fault((key,), f"{key} belongs to a bearing that is computed. Write geometry = {{ ... }} as well.")
        if not ways and not self.given & OTHER_WAYS:
            yield Fault(
                ("stiffness",),
                'stiffness is not written. Write stiffness = { radial = "93 N/um" }, or [pins.X] if it gives nothing '
                "way.",
            )
        elif len(ways) > 1:
            key = "matrix" if "matrix" in ways else "geometry"
            other = next(way for way in ("stiffness", "matrix") if way in ways and way != key)
            yield Fault((key,), f"{key} stands beside {other}. Write one of them.")
        elif "geometry" in ways:
            yield from self._computed_faults()
        elif self.stiffness is not None and self.stiffness.written_figures:
            yield from self._unbacked(self.stiffness)

    def _computed_faults(self) -> Iterator[Fault]:
        """What a computed bearing needs, and what its kind cannot do."""
        if "kind" not in self.given:
            yield Fault(("kind",), 'kind is not written. Write kind = "deep groove ball bearing".')
        kind = KINDS.get(self.kind or "")
        if kind is None:
            return
        if self.geometry is not None:
            yield from self.geometry.faults_of(kind)
        if kind.angled and "contact_angle" not in self.given:
            yield Fault(("contact_angle",), 'contact_angle is not written. Write contact_angle = "12 deg".')
        elif not kind.angled and "contact_angle" in self.given:
            yield Fault(("contact_angle",), f"a {self.kind} has no contact angle of its own. Leave it out.")
        yield from self._unable(kind)

    def _unable(self, kind: BearingKind) -> Iterator[Fault]:
        holds = set(self.holds or ("radial",))
        wrong = {"spin", "stops_left", "stops_right"} & holds
        wrong |= set() if kind.holds_axially else {"axial"} & holds
        wrong |= {"tilt"} & holds if kind.aligning else set()
        if wrong:
            yield Fault(("holds",), f"a {self.kind} does not hold {' and '.join(sorted(wrong))}. Leave it out.")
        elif "radial" not in holds:
            yield Fault(("holds",), f'a {self.kind} holds the shaft radially. Write holds = ["radial"].')

    @property
    def slides(self) -> bool:
        """Whether its outer ring slides in its seat, because it could hold the shaft axially and shall not."""
        return self.computed and KINDS[self.kind or ""].holds_axially and not self.holds_axially

    @property
    def computed(self) -> bool:
        """Whether its stiffness is computed from what is inside it."""
        return self.geometry is not None

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
        """The stiffness that is used as a 6 x 6 matrix in SI: (6, 6) [N/m, N, N m/rad].

        Of a computed bearing only which directions it resists; how stiffly is not known before it is loaded.
        """
        if self.computed:
            kind = KINDS[self.kind or ""]
            able = [kind.holds_axially, True, True, False, not kind.aligning, not kind.aligning]
            return np.diag(np.array(UNKNOWN) * able)
        matrix, diagonal = self.matrix_si, self.diagonal
        if matrix is not None:
            return matrix
        assert diagonal is not None
        return np.diag(diagonal)

    @override
    def at_end(self, which: Literal["low", "high"]) -> Self:
        moved = {key: each.at_end(which) for key in ("stiffness", "seat") if (each := getattr(self, key)) is not None}
        return type(self).model_construct(set(self.given), **{**self.__dict__, **moved})
