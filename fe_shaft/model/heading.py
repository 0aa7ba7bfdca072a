"""What stands at the top of a model: title, question, gravity, units of the outputs, housing, estimates."""

from typing import Annotated

from pydantic import Field

from fe_shaft.model.housing import Estimates, Housing, OutputUnits
from fe_shaft.model.kinds import Choice, Count, Text
from fe_shaft.model.quantity import Acceleration
from fe_shaft.model.shaft import Vector
from fe_shaft.model.words import Words
from fe_shaft.units import Value

FORMAT = 1  # version of the model file


class Heading(Words):
    """The keys of a model that belong to no part."""

    format: Annotated[int, Count(1, FORMAT)] = Field(
        default=FORMAT, description="Version of the model file.", examples=[FORMAT]
    )
    title: Annotated[str, Text()] = Field(
        default="", description="What the model is.", examples=["Layshaft of a drive"]
    )
    question: Annotated[str, Text()] = Field(
        default="", description="What it shall answer.", examples=["Does the shaft stand straight enough at its gears?"]
    )
    gravity: Annotated[str | tuple[Value, Value, Value], Vector(Acceleration, "down")] | None = Field(
        default=None,
        description="Direction of weights: `down` is -Y of the model, 9.80665 m/s^2; left out, nothing weighs.",
        examples=["down", ["0 m/s^2", "-9.81 m/s^2", "0 m/s^2"]],
    )
    units: OutputUnits | None = Field(
        default=None, description="Units of the outputs.", examples=[{"force": "lbf", "length": "in"}]
    )
    housing: Housing | None = Field(
        default=None, description="The housing.", examples=[{"seat": {"radial": "~400 N/um"}}]
    )
    shoulders: Annotated[str, Choice("on", "off")] = Field(
        default="on",
        description="`on`: shoulders make the shafts softer, by a rule made for this project; `off`: the plain beam.",
        examples=["off"],
    )
    estimates: Estimates = Field(
        default_factory=Estimates, description="How estimates are varied.", examples=[{"together": True}]
    )
