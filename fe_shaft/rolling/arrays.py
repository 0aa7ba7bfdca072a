"""Numbers of any shape as arrays of floats."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]


def floats(values: ArrayLike) -> Array:
    """Values as an array of floats; a number becomes one without axes."""
    return np.asarray(values, dtype=float)
