"""The quantities of a result: one name, one unit of the trade, one sentence each.

A quantity has two attributes on every result: its SI value under its name, and the same in its trade unit under the
name with a suffix (`deflection`, `deflection_um`).
"""

from __future__ import annotations

from dataclasses import dataclass
from types import MappingProxyType
from typing import Any, Final


@dataclass(frozen=True)
class Quantity:
    """Name, trade unit, SI unit and meaning of a quantity."""

    name: str
    unit: str
    dimension: str
    meaning: str
    of: str

    @property
    def suffix(self) -> str:
        """Of the attribute that shows it in its trade unit."""
        return self.unit.replace(" ", "")


FACTOR: Final = MappingProxyType({"um": 1e6, "mrad": 1e3, "N": 1.0, "N m": 1.0})

_ALL = (
    Quantity("deflection", "um", "length", "radial movement, sqrt(up^2 + front^2)", "place"),
    Quantity("up", "um", "length", "movement towards 12 o'clock", "place"),
    Quantity("front", "um", "length", "movement towards 3 o'clock", "place"),
    Quantity("axial", "um", "length", "movement to the right along the shaft", "place"),
    Quantity("slope", "mrad", "angle", "rotation of the cross-section out of its plane", "place"),
    Quantity("twist", "mrad", "angle", "rotation about the axis, clockwise from left", "place"),
    Quantity("separation", "um", "length", "movement away from the mate", "gear"),
    Quantity("tangential", "um", "length", "movement along the pitch circle, with the turning", "gear"),
    Quantity("body_movement", "um", "length", "radial movement of the rim against the shaft", "gear"),
    Quantity("body_tilt", "mrad", "angle", "tilt of the rim against the shaft", "gear"),
    Quantity("tilt", "mrad", "angle", "inner ring against outer ring", "support"),
    Quantity("force", "N", "force", "resultant force on the shaft", "support"),
    Quantity("radial_force", "N", "force", "force on the shaft across its axis", "support"),
    Quantity("axial_force", "N", "force", "force on the shaft along its axis, + to the right", "support"),
    Quantity("up_force", "N", "force", "force on the shaft towards 12 o'clock", "support"),
    Quantity("front_force", "N", "force", "force on the shaft towards 3 o'clock", "support"),
    Quantity("tilt_moment", "N m", "moment", "moment on the shaft across its axis, at the load centre", "support"),
    Quantity("give", "um", "length", "radial movement of the inner ring against the outer ring", "support"),
    Quantity("seat_movement", "um", "length", "radial movement of the seat", "support"),
)

QUANTITIES: Final = MappingProxyType({quantity.name: quantity for quantity in _ALL})


def in_unit(name: str) -> Any:
    """A property that shows quantity `name` in its trade unit."""
    quantity = QUANTITIES[name]
    factor = FACTOR[quantity.unit]
    return property(lambda self: getattr(self, name) * factor, doc=f"{quantity.meaning} [{quantity.unit}]")
