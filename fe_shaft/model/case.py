"""Load cases: where power enters and leaves, how much, how fast, which way; which forces act."""

from collections.abc import Iterator, Mapping
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.clock import TURNS, Turns
from fe_shaft.model.kinds import Factor, Flag, Name, Reference, Text
from fe_shaft.model.lists import Shares
from fe_shaft.model.quantity import Power, Speed, Torque
from fe_shaft.model.words import Fault, Named

if TYPE_CHECKING:
    from fe_shaft.model.keywords import CaseWords

_SHARE = Factor(0.0, 1.0, open_at_least=True)
_FORCES = Factor(-1e6, 1e6)
Through = Annotated[str | Mapping[str, float], Shares(_SHARE, total=1.0, word=True)]
Switched = Annotated[tuple[str, ...] | Mapping[str, float], Shares(_FORCES, lists=True)]

#: The one case of a model that writes none: forces and weights only.
ONLY_CASE = "as_loaded"


class Case(Named):
    """One load case."""

    group: ClassVar[str] = "cases"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[CaseWords]) -> None: ...

    name: Annotated[str, Name()] = Field(description="Name of the case.", examples=["running"])
    like: Annotated[str, Reference()] | None = Field(
        default=None,
        description="Case whose words this one takes over where it writes none; power and torque displace each other.",
        examples=["running"],
    )
    enters: Through | None = Field(
        default=None,
        description="Gear, coupling, pulley or sprocket where the power comes in; or several with their shares.",
        examples=["wheel"],
    )
    leaves: Through | None = Field(
        default=None,
        description="Where the power goes out; or several with their shares.",
        examples=["pinion", {"sprocket": 0.8, "pump": 0.2}],
    )
    power: Power | None = Field(default=None, description="Power; needs a speed.", examples=["5.5 kW"])
    torque: Torque | None = Field(default=None, description="Torque where the power enters.", examples=["133 N m"])
    speed: Speed | None = Field(
        default=None, description="Speed of turning; 0 rpm for a jam.", examples=["393.7 rpm", "0 rpm"]
    )
    turns: Turns | None = Field(
        default=None,
        description="Sense of turning (at 0 rpm: of pushing) and the end it is seen from.",
        examples=["clockwise from left"],
    )
    of_shaft: Annotated[str, Reference()] | None = Field(
        default=None,
        description="Shaft to which torque, speed and turns belong, if not the one where the power enters.",
        examples=["output"],
    )
    torque_factor: Annotated[float, Factor(0.0, 1000.0)] = Field(
        default=1.0,
        description="Factor on power and torque, not on weights and forces (such as K_A of ISO 6336-1).",
        examples=[2.2],
    )
    coasts: Annotated[bool, Flag()] = Field(
        default=False,
        description="The machine drives back: the torque acts against the turning, the flanks change.",
        examples=[True],
    )
    forces: Switched | None = Field(
        default=None,
        description="Forces that act in this case, all if left out; with a factor each if written as a table.",
        examples=[["belt_pull"], {"belt_pull": 1.5}],
    )
    label: Annotated[str, Text()] | None = Field(
        default=None, description="What pictures call it, in any alphabet.", examples=["running at full load"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        if {"power", "torque"} <= self.given:
            yield Fault(("torque",), "torque stands beside power. Write one of them, with speed.")

    def resolved_faults(self) -> Iterator[Fault]:
        """Mistakes in the case once `like` is followed."""
        given = self.given
        flows = given & {"power", "torque"}
        ends = [key for key in ("enters", "leaves") if key in given]
        if flows and not ends:
            yield Fault(
                (min(flows),),
                f'{min(flows)} is written, but not where it passes. Write enters = "wheel" and leaves = "pinion".',
            )
        if ends and not flows:
            yield Fault(
                (ends[0],),
                f'{ends[0]} is written, but no power or torque. Write torque = "133 N m", or power and speed.',
            )
        if flows and "turns" not in given:
            yield Fault(
                ("turns",), 'turns is not written. Write turns = "clockwise from left" or "clockwise from right".'
            )
        if "power" in given and "speed" not in given:
            yield Fault(("speed",), 'speed is not written, but power is. Write speed = "393.7 rpm".')
        if self.power and self.power.si > 0.0 and self.speed and self.speed.si == 0.0:
            yield Fault(
                ("speed",),
                f'{self.power.text} at {self.speed.text} has no finite torque. Write torque = "133 N m" instead of '
                "power.",
            )

    def over(self, other: "Case") -> "Case":
        """The case with the words of another one where it has none."""
        own = set(self.given)
        taken = (other.given & set(Case.model_fields)) - own - {"name", "label", "source"}
        if own & {"power", "torque"}:
            taken -= {"power", "torque"}
        values = dict(self.__dict__) | {key: getattr(other, key) for key in taken}
        return Case.model_construct(own | taken, **values)

    @property
    def sense(self) -> int:
        """+1 if it turns clockwise seen from the left end of the shaft concerned, -1 if not, 0 without power."""
        return TURNS.get(self.turns or "", 0)

    @property
    def enters_shares(self) -> dict[str, float]:
        """Share of the power by the part where it enters."""
        return _shares(self.enters)

    @property
    def leaves_shares(self) -> dict[str, float]:
        """Share of the power by the part where it leaves."""
        return _shares(self.leaves)

    @property
    def torque_si(self) -> float:
        """Torque where the power enters [N m], torque_factor included, never negative."""
        if self.torque is not None:
            return self.torque.si * self.torque_factor
        if self.power is None or self.speed is None or self.power.si == 0.0:
            return 0.0
        return self.power.si / self.speed.si * self.torque_factor

    def force_factor(self, name: str) -> float:
        """Factor of a force in this case; 0 if it is switched off."""
        if self.forces is None:
            return 1.0
        if isinstance(self.forces, Mapping):
            return self.forces.get(name, 0.0)
        return 1.0 if name in self.forces else 0.0


def _shares(through: Any) -> dict[str, float]:
    if through is None:
        return {}
    return {through: 1.0} if isinstance(through, str) else dict(through)
