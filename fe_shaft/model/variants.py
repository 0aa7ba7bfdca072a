"""Part to part: every bearing a rigid pin, every estimate at one end of its band."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Literal

from fe_shaft.model.housing import Housing
from fe_shaft.model.part import Part
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.support import Bearing, Pin, Support
from fe_shaft.model.words import Named

End = Literal["low", "high"]
_PIN_KEYS = tuple(Pin.model_fields)


def seated(support: Support, housing: Housing | None) -> Support:
    """A bearing with the housing's seat, if it has none of its own."""
    if not isinstance(support, Bearing) or support.seat is not None or housing is None or housing.seat is None:
        return support
    return Bearing.model_construct(set(support.given), **{**support.__dict__, "seat": housing.seat})


def pin_of(support: Support) -> Pin:
    """The rigid pin that holds what a support holds, in the same place."""
    if isinstance(support, Pin):
        return support
    return Pin.model_construct(support.given & set(_PIN_KEYS), **{key: getattr(support, key) for key in _PIN_KEYS})


def at_end(part: Named, ends: Mapping[str, End]) -> Named:
    """A part or shaft as written, with its own estimates at ends of their bands, by name or address."""
    if isinstance(part, Shaft):
        return part.at_ends(ends)
    return part.at_end(ends[part.name]) if isinstance(part, Part) and part.name in ends else part


def housing_at_end(housing: Housing, which: End) -> Housing:
    """The housing with its seat's estimates at one end."""
    assert housing.seat is not None
    return Housing.model_construct(set(housing.given), **{**housing.__dict__, "seat": housing.seat.at_end(which)})
