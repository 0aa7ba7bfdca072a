"""Where a shaft stands in the model: its left end and its three axes."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from fe_shaft.model.shaft import Shaft
from fe_shaft.model.words import Fault
from fe_shaft.units import STANDARD_GRAVITY, Value

Array = NDArray[np.float64]
_AXIS = {"X": (1.0, 0.0, 0.0), "Y": (0.0, 1.0, 0.0), "Z": (0.0, 0.0, 1.0)}


@dataclass(frozen=True)
class Frame:
    """The frame of a shaft in model coordinates, right-handed.

    Parameters
    ----------
    origin : (3,) [m]
        Its left end.
    rotation : (3, 3)
        Columns: x along the shaft to the right, y towards 12 o'clock, z towards 3 o'clock.
    """

    origin: Array
    rotation: Array


def direction(text: str) -> Array:
    """Unit vector of ``+X`` ... ``-Z``: (3,)."""
    return np.array(_AXIS[text[1]]) * (-1.0 if text[0] == "-" else 1.0)


def frame_of(shaft: Shaft) -> Frame:
    """The frame of one shaft."""
    x, y = direction(shaft.axis), direction(shaft.twelve or "+Y")
    origin = np.array([each.si for each in shaft.left_end] if shaft.left_end else [0.0, 0.0, 0.0])
    return Frame(origin, np.column_stack([x, y, np.cross(x, y)]))


def frame_faults(shafts: Mapping[str, Shaft]) -> Iterator[Fault]:
    """Shafts of which nobody says where they stand."""
    for name, shaft in list(shafts.items())[1:]:
        if "left_end" not in shaft.given:
            first = next(iter(shafts))
            yield Fault(
                (shaft.group, name, "left_end"),
                f'left_end is not written; {first} alone stands at the origin. Write left_end = ["0 mm", "0 mm", "112 '
                'mm"].',
            )


def gravity_vector(gravity: str | tuple[Value, ...] | None) -> Array:
    """Acceleration of free fall in model coordinates: (3,) [m/s^2]; zeros without gravity."""
    if gravity is None:
        return np.zeros(3)
    if isinstance(gravity, str):
        return np.array([0.0, -STANDARD_GRAVITY, 0.0])
    return np.array([each.si for each in gravity])
