"""The body of a gear: how rim and web give way between the teeth and the shaft."""

from collections.abc import Iterator
from typing import TYPE_CHECKING, Literal, Self, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.quantity import RadialStiffness, TiltStiffness
from fe_shaft.model.words import Fault, Words
from fe_shaft.units import Value

if TYPE_CHECKING:
    from fe_shaft.model.keywords import BodyWords


class Body(Words):
    """Springs between the rim of a gear and its shaft; what is not written is rigid."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[BodyWords]) -> None: ...

    radial: RadialStiffness | None = Field(
        default=None, description="Stiffness across the shaft.", examples=["~900 N/um"]
    )
    tilt: TiltStiffness | None = Field(
        default=None, description="Stiffness against tilting of the rim.", examples=["~150 N m/mrad"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        if not self.given & {"radial", "tilt"}:
            yield Fault((), 'the table is empty. Write { tilt = "~150 N m/mrad" }.')

    @property
    def give(self) -> tuple[float, float]:
        """Movement per force [m/N] and tilt per moment [rad/(N m)] of the rim against the shaft."""
        radial, tilt = (0.0 if value is None else 1 / value.si for value in (self.radial, self.tilt))
        return radial, tilt

    def at_end(self, which: Literal["low", "high"]) -> Self:
        """The same with every estimate at one end of its band."""
        ends = {key: each.end(which) for key in ("radial", "tilt") if isinstance(each := getattr(self, key), Value)}
        return type(self).model_construct(set(self.given), **{**self.__dict__, **ends})
