"""What of a model is only estimated or assumed: every figure with its band, and the thing that it belongs to."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING, NamedTuple

from fe_shaft.model.gear import Gear
from fe_shaft.model.hub import NONE, ONE_PIECE, hub_figure
from fe_shaft.model.part import Heavy
from fe_shaft.model.support import Bearing
from fe_shaft.model.words import Words
from fe_shaft.units import Value

if TYPE_CHECKING:
    from fe_shaft.model.lookup import Lookup

HOUSING = "housing"  # name of the housing's seat among the estimated things


class Estimate(NamedTuple):
    """One figure with its band.

    Attributes
    ----------
    thing : the part, or the address of the segment, whose estimates move together
    key : what it is: "radial", "seat tilt", "hub", "keyway"
    value : with its band
    unit : to show it in; empty for a share
    ends : the band in words, where numbers alone do not say it
    """

    thing: str
    key: str
    value: Value
    unit: str
    ends: str = ""

    @property
    def usual(self) -> bool:
        """Whether the band reaches from half to twice, to rounding."""
        low, high = self.value.low or 0.0, self.value.high or 0.0
        return abs(2 * low - self.value.si) < 1e-9 * self.value.si > abs(high - 2 * self.value.si)


def estimates_of(model: Lookup) -> Iterator[Estimate]:
    """Every estimate of a model, bearings and their seats first."""
    bearings = [part for part in model.parts if isinstance(part, Bearing)]
    for bearing in bearings:
        yield from _springs(bearing.name, "", bearing.stiffness)
        yield from _springs(bearing.name, "seat ", bearing.seat)
    if model.housing is not None and any(part.seat is None for part in bearings):
        yield from _springs(HOUSING, "seat ", model.housing.seat)
    for part in model.parts_on_shafts:
        if isinstance(part, Gear):
            yield from _springs(part.name, "body ", part.body)
        if isinstance(part, Heavy) and isinstance(part.hub, float):
            yield Estimate(part.name, "hub", hub_figure(part.hub), "", f"{NONE} to {ONE_PIECE}")
    for shaft in model.shafts:
        for address, k in shaft.weakened.items():
            segment = shaft.segments[k]
            weak = segment.weakening
            if weak is not None:
                key = "keyway" if segment.keyway is not None else "spline"
                yield Estimate(address, key, *weak.figure(segment.diameter.si))


def _springs(thing: str, front: str, springs: Words | None) -> Iterator[Estimate]:
    for key, value in vars(springs).items() if springs is not None else ():
        if isinstance(value, Value) and value.estimated:
            yield Estimate(thing, f"{front}{key}", value, "N m/mrad" if "tilt" in key else "N/um")
