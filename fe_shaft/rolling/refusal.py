"""What is said where figures of a bearing cannot be: one sentence with the value and a remedy."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.errors import ModelError, Problem
from fe_shaft.rolling.arrays import Array, floats


def impossible(place: str, sentence: str) -> ModelError:
    """The error to raise; `place` is the argument's name, the caller may put an address before it."""
    return ModelError(Problem(place, sentence))


def mm(length: float) -> str:
    """A length in words."""
    return f"{1e3 * length:.6g} mm"


def within(place: str, values: ArrayLike, low: float, high: float, remedy: str, unit: str = "") -> Array:
    """Values as an array, all with low <= value < high; `unit` is written behind a wrong one.

    Raises
    ------
    ModelError
        With the first value that is outside or no number.
    """
    array = floats(values)
    wrong = ~((array >= low) & (array < high))
    if wrong.any():
        raise impossible(place, f"{array[wrong].flat[0]:g}{unit} cannot be. {remedy}")
    return array


def positive(place: str, values: ArrayLike, remedy: str) -> Array:
    """Values as an array, all above zero and finite."""
    return within(place, values, np.finfo(float).tiny, np.inf, remedy)
