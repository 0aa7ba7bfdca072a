"""What a force law answers."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]


class Response(NamedTuple):
    """What a law answers.

    Stored energy (..., b) [J], load on the inner ring (..., b, 6) [N, N m], tangent (..., b, 6, 6).
    """

    energy: Array
    force: Array
    tangent: Array
