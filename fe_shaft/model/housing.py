"""What stands once for the whole model: the housing, estimates, units of the outputs."""

from typing import TYPE_CHECKING, Annotated, Unpack

from pydantic import Field

from fe_shaft.model.kinds import Choice, Flag
from fe_shaft.model.stiffness import Seat
from fe_shaft.model.words import Words
from fe_shaft.units import FACTORS

if TYPE_CHECKING:
    from fe_shaft.model.keywords import EstimatesWords, HousingWords, OutputUnitsWords


class Housing(Words):
    """The housing in which bearings without a seat of their own stand."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[HousingWords]) -> None: ...

    seat: Seat | None = Field(
        default=None,
        description="How the housing gives way at every bearing that has no seat of its own.",
        examples=[{"radial": "~400 N/um", "axial": "~150 N/um", "tilt": "~400 N m/mrad"}],
    )


class Estimates(Words):
    """How estimates are varied."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[EstimatesWords]) -> None: ...

    together: Annotated[bool, Flag()] = Field(
        default=False,
        description="Estimates move up and down together, not each for itself: no worst mix is sought.",
        examples=[True],
    )


class OutputUnits(Words):
    """Units of the outputs, where the trade units are not wanted."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[OutputUnitsWords]) -> None: ...

    force: Annotated[str, Choice(*FACTORS["force"])] | None = Field(
        default=None, description="Unit of forces.", examples=["lbf"]
    )
    length: Annotated[str, Choice(*FACTORS["length"])] | None = Field(
        default=None, description="Unit of lengths along the shaft.", examples=["in"]
    )
    angle: Annotated[str, Choice(*FACTORS["angle"])] | None = Field(
        default=None, description="Unit of slopes, tilts and twists.", examples=["deg"]
    )
    stress: Annotated[str, Choice(*FACTORS["pressure"])] | None = Field(
        default=None, description="Unit of stresses.", examples=["psi"]
    )
