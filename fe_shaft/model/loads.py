"""What loads a shaft besides gears: forces, couplings, pulleys, sprockets and masses."""

import math
from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, ClassVar, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.clock import Direction
from fe_shaft.model.kinds import Count, Factor
from fe_shaft.model.part import Heavy, Spread
from fe_shaft.model.quantity import Diameter, Load, Moment, Pull, Radius, Weight, Wrap
from fe_shaft.model.words import Fault, Words, example_of
from fe_shaft.units import Value

if TYPE_CHECKING:
    from fe_shaft.model.keywords import (
        BeltPullWords,
        CoupleWords,
        CouplingWords,
        ForceWords,
        MassWords,
        PulleyWords,
        SprocketWords,
    )

_PLAIN = {"source", "range_check"}


class Couple(Words):
    """A couple (moment) on the shaft; each component clockwise about its axis is positive."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[CoupleWords]) -> None: ...

    up: Moment | None = Field(default=None, description="About the 12 o'clock axis.", examples=["40 N m"])
    front: Moment | None = Field(default=None, description="About the 3 o'clock axis.", examples=["40 N m"])
    axial: Moment | None = Field(
        default=None, description="About the shaft: a torque, clockwise from left positive.", examples=["12 N m"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        if not self.given - _PLAIN:
            yield Fault((), 'the table is empty. Write { up = "40 N m" }.')

    @property
    def si(self) -> tuple[float, float, float]:
        """Components about x, y, z [N m]."""
        return _three(self.axial, self.up, self.front)


class Force(Spread):
    """A force or couple of fixed direction on the shaft, switched by the cases."""

    group: ClassVar[str] = "forces"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[ForceWords]) -> None: ...

    up: Load | None = Field(default=None, description="Component towards 12 o'clock.", examples=["1.2 kN"])
    front: Load | None = Field(default=None, description="Component towards 3 o'clock.", examples=["-300 N"])
    axial: Load | None = Field(default=None, description="Component to the right.", examples=["500 N"])
    couple: Couple | None = Field(default=None, description="A couple as well, or alone.", examples=[{"up": "40 N m"}])
    radius: Radius | None = Field(
        default=None, description="Distance of the point of attack from the axis.", examples=["60 mm"]
    )
    angle: Direction | None = Field(
        default=None, description="Direction of the point of attack from the axis.", examples=["3 o'clock"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        if not self.given & {"up", "front", "axial", "couple"}:
            yield Fault(("up",), 'nothing acts here. Write up = "1.2 kN", front, axial or couple.')
        if ("radius" in self.given) != ("angle" in self.given):
            there, missing = ("radius", "angle") if "radius" in self.given else ("angle", "radius")
            yield Fault((missing,), f"{missing} is not written, only {there}. Write both, or neither.")

    @property
    def force_si(self) -> tuple[float, float, float]:
        """Components along x, y, z [N]."""
        return _three(self.axial, self.up, self.front)


class Coupling(Spread, Heavy):
    """A coupling: brings torque in or takes it out, and nothing else."""

    group: ClassVar[str] = "couplings"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[CouplingWords]) -> None: ...


class BeltPull(Words):
    """Forces in the two runs of a belt."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[BeltPullWords]) -> None: ...

    tight: Pull = Field(description="Force in the tight run.", examples=["900 N"])
    slack: Pull = Field(description="Force in the slack run.", examples=["300 N"])

    @override
    def faults_together(self) -> Iterator[Fault]:
        if self.tight and self.slack and self.slack.si > self.tight.si:
            yield Fault(("slack",), f"{self.slack.text} is more than tight = {self.tight.text}. Exchange them.")


class Pulley(Spread, Heavy):
    """A belt pulley."""

    group: ClassVar[str] = "pulleys"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[PulleyWords]) -> None: ...

    diameter: Diameter = Field(description="Diameter at which the belt runs.", examples=["160 mm"])
    belt_pull: BeltPull | None = Field(
        default=None,
        description="Forces in both runs; they act in every case.",
        examples=[{"tight": "900 N", "slack": "300 N"}],
    )
    pull_factor: Annotated[float, Factor(0.5, 10.0)] | None = Field(
        default=None,
        description="Pull on the shaft over the belt's circumferential force, instead of `belt_pull`.",
        examples=[1.8],
    )
    wrap: Wrap = Field(
        default=Value(math.pi, "180 deg"), description="Angle over which the belt wraps.", examples=["170 deg"]
    )
    pulls_towards: Direction = Field(
        description="Direction in which the other pulley stands; the belt pulls that way.", examples=["7:30 o'clock"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        ways = self.given & {"belt_pull", "pull_factor"}
        if not ways:
            yield Fault(
                ("belt_pull",), f"belt_pull is not written. Write {example_of(Pulley, 'belt_pull')}, or pull_factor."
            )
        elif len(ways) == 2:
            yield Fault(("pull_factor",), "pull_factor stands beside belt_pull. Write one of them.")
        elif "pull_factor" in ways and "wrap" in self.given:
            yield Fault(("wrap",), "wrap has no effect beside pull_factor. Leave it out, or write belt_pull.")

    @property
    def reference_diameter(self) -> float:
        """Diameter [m] at which the belt pulls."""
        return self.diameter.si


class Sprocket(Spread, Heavy):
    """A chain sprocket."""

    group: ClassVar[str] = "sprockets"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[SprocketWords]) -> None: ...

    teeth: Annotated[int, Count(4, 10_000)] | None = Field(default=None, description="Number of teeth.", examples=[17])
    chain_pitch: Diameter | None = Field(
        default=None, description="Pitch of the chain (ISO 606).", examples=["25.4 mm"]
    )
    diameter: Diameter | None = Field(
        default=None, description="Pitch diameter, instead of teeth and chain pitch.", examples=["138 mm"]
    )
    pull_factor: Annotated[float, Factor(0.5, 10.0)] = Field(
        default=1.0, description="Pull on the shaft over the chain's circumferential force.", examples=[1.15]
    )
    pulls_towards: Direction = Field(
        description="Direction in which the other wheel stands; the chain pulls that way.", examples=["1 o'clock"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        by_teeth = [key for key in ("teeth", "chain_pitch") if key in self.given]
        if "diameter" in self.given and by_teeth:
            yield Fault(
                ("diameter",),
                f"diameter stands beside {' and '.join(by_teeth)}. Write diameter, or teeth and chain_pitch.",
            )
        elif "diameter" not in self.given and len(by_teeth) < 2:
            missing = "chain_pitch" if by_teeth == ["teeth"] else "teeth"
            yield Fault(
                (missing,), f"{missing} is not written. Write {example_of(Sprocket, missing)}, or diameter alone."
            )

    @property
    def reference_diameter(self) -> float:
        """Pitch diameter [m]: p / sin(pi / z) (chain geometry, ISO 606)."""
        if self.diameter is not None:
            return self.diameter.si
        assert self.teeth is not None
        assert self.chain_pitch is not None
        return self.chain_pitch.si / math.sin(math.pi / self.teeth)


class Mass(Spread, Heavy):
    """A mass on the shaft, such as a disc or an overhung web."""

    group: ClassVar[str] = "masses"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[MassWords]) -> None: ...

    mass: Weight = Field(description="Mass; it weighs where gravity acts.", examples=["4.1 kg"])


def _three(axial: Value | None, up: Value | None, front: Value | None) -> tuple[float, float, float]:
    x, y, z = (0.0 if each is None else each.si for each in (axial, up, front))
    return x, y, z
