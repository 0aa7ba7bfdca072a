"""What a rolling bearing is and what is inside it, in the words of the trade (ISO 5593)."""

from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, NamedTuple, Unpack

import numpy as np
from pydantic import Field
from typing_extensions import override

from fe_shaft.model.kinds import Choice, Count, Factor
from fe_shaft.model.quantity import Diameter, Width
from fe_shaft.model.words import Fault, Words

if TYPE_CHECKING:
    from fe_shaft.model.keywords import GeometryWords, GrooveWords


class BearingKind(NamedTuple):
    """What follows from the kind of a bearing.

    Attributes
    ----------
    rollers : rollers, not balls
    angled : it has a contact angle of its own
    holds_axially : it can hold the shaft axially, both ways
    aligning : it does not resist tilting
    both_sides : each ball has contact pairs on both sides of its groove
    """

    rollers: bool
    angled: bool
    holds_axially: bool
    aligning: bool
    both_sides: bool


#: Bearings whose two sides are alike; those that close to one side need a preload as well.
KINDS = {
    "deep groove ball bearing": BearingKind(False, False, True, False, False),
    "four-point-contact ball bearing": BearingKind(False, True, True, False, True),
    "self-aligning ball bearing": BearingKind(False, True, True, True, True),
    "cylindrical roller bearing": BearingKind(True, False, False, False, False),
    "needle roller bearing": BearingKind(True, False, False, False, False),
    "spherical roller bearing": BearingKind(True, True, True, True, False),
}
LATER_KINDS = dict.fromkeys(
    (
        "angular contact ball bearing",
        "tapered roller bearing",
        "thrust ball bearing",
        "cylindrical roller thrust bearing",
    ),
    "Bearings that close to one side only are not computed yet: write stiffness = { ... } for it.",
)
Kind = Annotated[str, Choice(*KINDS, later=LATER_KINDS)]
CONFORMITY = 0.52  # groove radius over ball diameter, what ISO 76 and ISO 281 rate with; from memory


class Groove(Words):
    """Radii of the grooves of a ball bearing."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[GrooveWords]) -> None: ...

    inner: Annotated[float, Factor(0.5, 0.7, open_at_least=True)] = Field(
        default=CONFORMITY, description="Groove radius of the inner ring over the ball's diameter.", examples=[0.515]
    )
    outer: Annotated[float, Factor(0.5, 0.7, open_at_least=True)] = Field(
        default=CONFORMITY, description="Groove radius of the outer ring over the ball's diameter.", examples=[0.53]
    )


class Geometry(Words):
    """What is inside a rolling bearing."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[GeometryWords]) -> None: ...

    elements: Annotated[int, Count(3, 400)] = Field(description="Number of balls or rollers, of one row.", examples=[8])
    element_diameter: Diameter = Field(
        description="Diameter of a ball, or of a roller in its middle.", examples=["12.3 mm"]
    )
    pitch_diameter: Diameter = Field(description="Diameter of the circle of their centres.", examples=["51 mm"])
    groove: Groove | None = Field(
        default=None,
        description="Balls: radii of the grooves; left out, 0.52 each.",
        examples=[{"inner": 0.515, "outer": 0.53}],
    )
    roller_length: Width | None = Field(default=None, description="Rollers: length that touches.", examples=["14 mm"])
    profile: Annotated[str, Choice("logarithmic", "cylindrical")] = Field(
        default="logarithmic", description="Rollers: how their ends fall off.", examples=["cylindrical"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        if self.elements is None or self.element_diameter is None or self.pitch_diameter is None:
            return
        element, pitch = self.element_diameter.si, self.pitch_diameter.si
        if element >= pitch:
            yield Fault(
                ("element_diameter",),
                f"{self.element_diameter.text} is not smaller than the pitch diameter ({self.pitch_diameter.text}). "
                "Make it smaller.",
            )
        elif self.elements * np.arcsin(element / pitch) > np.pi:
            most = int(np.pi / np.arcsin(element / pitch))
            yield Fault(
                ("elements",),
                f"{self.elements} of {self.element_diameter.text} overlap on a circle of {self.pitch_diameter.text}; "
                f"{most} at most fit. Write fewer.",
            )

    def faults_of(self, kind: BearingKind) -> Iterator[Fault]:
        """What does not fit a kind of bearing."""
        if kind.rollers and "roller_length" not in self.given:
            yield Fault(("geometry", "roller_length"), 'roller_length is not written. Write roller_length = "14 mm".')
        strange = {"groove"} if kind.rollers else {"roller_length", "profile"}
        for key in sorted(strange & self.given):
            what = "balls" if kind.rollers else "rollers"
            yield Fault(("geometry", key), f"{key} belongs to bearings with {what}. Leave it out.")
