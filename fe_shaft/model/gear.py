"""Gears whose mates stand outside the model: spur, helical and straight bevel."""

import math
from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, ClassVar, Literal, Self, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.body import Body
from fe_shaft.model.clock import Direction
from fe_shaft.model.helix import Helix, HelixWords
from fe_shaft.model.kinds import Choice, Count
from fe_shaft.model.part import Heavy, SpreadKind
from fe_shaft.model.quantity import ConeAngle, Diameter, Module, PressureAngle, Width
from fe_shaft.model.words import Fault, example_of
from fe_shaft.units import Value

if TYPE_CHECKING:
    from fe_shaft.model.keywords import GearWords

PRESSURE_ANGLE = "20 deg"  # ISO 53, standard basic rack
DEDENDUM = 1.25  # ISO 53, profile A, in modules; from memory
_BEVEL = ("pitch_cone_angle", "apex", "mean_diameter")


class Gear(Heavy):
    """A gear; its tooth force follows from the torque of the case."""

    group: ClassVar[str] = "gears"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[GearWords]) -> None: ...

    teeth: Annotated[int, Count(4, 10_000)] | None = Field(default=None, description="Number of teeth.", examples=[85])
    normal_module: Module | None = Field(
        default=None, description="Normal module; of a bevel gear, at the large end.", examples=["2 mm"]
    )
    pitch_diameter: Diameter | None = Field(
        default=None,
        description="Reference diameter, instead of teeth and module; of a bevel gear, at the large end.",
        examples=["176 mm"],
    )
    pressure_angle: PressureAngle = Field(
        default=Value(math.radians(20.0), PRESSURE_ANGLE),
        description="Normal pressure angle; 20 deg is the basic rack of ISO 53.",
        examples=["20 deg"],
    )
    helix: HelixWords | None = Field(
        default=None,
        description="Helix angle at the reference cylinder with the gear's own hand; a spur gear has none.",
        examples=["15 deg left"],
    )
    facewidth: Width | None = Field(default=None, description="Face width.", examples=["32 mm"])
    mate: Direction | None = Field(
        default=None,
        description="Direction of the mate's axis; needed where power passes through this gear.",
        examples=["9 o'clock"],
    )
    spread: Annotated[str | Value, SpreadKind("facewidth", "point")] = Field(
        default="facewidth", description="Width over which the tooth force is spread evenly.", examples=["point"]
    )
    form: Annotated[
        str, Choice("cylindrical", "bevel", later={"worm": "Only cylindrical and bevel gears are known."})
    ] = Field(default="cylindrical", description="Form of the gear.", examples=["bevel"])
    pitch_cone_angle: ConeAngle | None = Field(
        default=None, description="Bevel gears: half angle of the pitch cone.", examples=["63.4 deg"]
    )
    apex: Annotated[str, Choice("left", "right")] | None = Field(
        default=None, description="Bevel gears: side on which the cone's tip lies.", examples=["left"]
    )
    mean_diameter: Diameter | None = Field(
        default=None,
        description="Bevel gears: pitch diameter at the middle of the face, instead of teeth and module.",
        examples=["90 mm"],
    )
    body: Body | None = Field(
        default=None,
        description="How the gear's rim gives way against its shaft through web and hub; left out, it is rigid.",
        examples=[{"radial": "~900 N/um", "tilt": "~150 N m/mrad"}],
    )
    width_key: ClassVar[str | None] = "facewidth"

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        yield from self._diameter_faults()
        if "facewidth" not in self.given and (self.spread == "facewidth" or self._mean_by_facewidth):
            yield Fault(
                ("facewidth",), f'facewidth is not written. Write {example_of(Gear, "facewidth")}, or spread = "point".'
            )
        if self.form == "bevel":
            yield from self._bevel_faults()
        elif self.form == "cylindrical":
            for key in _BEVEL:
                if key in self.given:
                    yield Fault((key,), f'{key} belongs to bevel gears. Write form = "bevel", or leave it out.')

    @property
    def _mean_by_facewidth(self) -> bool:
        return self.form == "bevel" and "mean_diameter" not in self.given

    def _diameter_faults(self) -> Iterator[Fault]:
        ways = [key for key in ("normal_module", "pitch_diameter", "mean_diameter") if key in self.given]
        if self.form == "cylindrical":
            ways = [key for key in ways if key != "mean_diameter"]
        if not ways:
            yield Fault(
                ("normal_module",),
                'normal_module is not written. Write normal_module = "2 mm" with teeth = 85, or pitch_diameter = "176 '
                'mm".',
            )
        elif len(ways) > 1:
            yield Fault((ways[1],), f"{' and '.join(ways)} state the diameter {len(ways)} times. Keep one.")
        elif ways == ["normal_module"] and "teeth" not in self.given:
            yield Fault(
                ("teeth",),
                f"teeth is not written. Write {example_of(Gear, 'teeth')}, or pitch_diameter instead of normal_module.",
            )

    def _bevel_faults(self) -> Iterator[Fault]:
        for key in ("pitch_cone_angle", "apex"):
            if key not in self.given:
                yield Fault((key,), f"{key} is not written. Write {example_of(Gear, key)}.")
        if "helix" in self.given:
            yield Fault(
                ("helix",), "a bevel gear has no helix, and spiral is not known yet in this version. Leave it out."
            )
        cone = self.pitch_cone_angle
        if cone and cone.si > math.radians(90.0):
            yield Fault(
                ("pitch_cone_angle",), f"{cone.text} is more than 90 deg. Write the half angle of the pitch cone."
            )
        outer = self._outer_diameter
        if cone and outer and self.facewidth and 2.0 * self.facewidth.si * math.sin(cone.si) >= outer:
            yield Fault(("facewidth",), f"{self.facewidth.text} reaches to the tip of the pitch cone. Make it smaller.")

    @property
    def _outer_diameter(self) -> float | None:
        if self.pitch_diameter is not None:
            return self.pitch_diameter.si
        return None if self.teeth is None or self.normal_module is None else self.teeth * self.normal_module.si

    def _mean(self, outer: float) -> float | None:
        if self.facewidth is None or self.pitch_cone_angle is None:
            return None
        return outer - self.facewidth.si * math.sin(self.pitch_cone_angle.si)

    @property
    def helix_angle(self) -> float:
        """Helix angle at the reference cylinder [rad], 0 for a spur gear; positive whatever the hand."""
        return self.helix.angle.si if isinstance(self.helix, Helix) else 0.0

    @property
    def reference_diameter(self) -> float:
        """Diameter [m] at which the tooth force acts: z m_n / cos(beta) (ISO 21771); bevel: d - b sin(delta)."""
        if self.form == "bevel":
            if self.mean_diameter is not None:
                return self.mean_diameter.si
            mean = self._mean(self._outer_diameter or 0.0)
            assert mean is not None
            return mean
        if self.pitch_diameter is not None:
            return self.pitch_diameter.si
        assert self.teeth is not None
        assert self.normal_module is not None
        return self.teeth * self.normal_module.si / math.cos(self.helix_angle)

    @property
    def root_diameter(self) -> float | None:
        """Root diameter [m] of a cylindrical gear by the basic rack of ISO 53, m_n z / cos(beta) - 2.5 m_n."""
        if self.form != "cylindrical" or self.teeth is None or self.normal_module is None:
            return None
        return self.reference_diameter - 2 * DEDENDUM * self.normal_module.si

    @property
    @override
    def hub_outside(self) -> float | None:
        return self.root_diameter if self.hub_diameter is None else self.hub_diameter.si

    @override
    def at_end(self, which: Literal["low", "high"]) -> Self:
        moved = super().at_end(which)
        if moved.body is None:
            return moved
        return type(self).model_construct(set(moved.given), **{**moved.__dict__, "body": moved.body.at_end(which)})

    @property
    def width_si(self) -> float | None:
        """How wide it is along the shaft [m]: the face width; of a bevel gear b cos(delta)."""
        width = super().width_si
        if width is not None and self.form == "bevel" and self.pitch_cone_angle is not None:
            return width * math.cos(self.pitch_cone_angle.si)
        return width

    @property
    def spread_si(self) -> float:
        """Width over which the tooth force is spread [m]; 0 at a point."""
        if self.spread == "facewidth":
            return self.width_si or 0.0
        return self.spread.si if isinstance(self.spread, Value) else 0.0
