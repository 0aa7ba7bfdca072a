"""What of the results is the shoulders' doing: the results less those of the same model as a plain beam."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

if TYPE_CHECKING:
    from fe_shaft.results.results import Results

Array = NDArray[np.float64]


def of_shoulders(results: Results, name: str) -> dict[str, Array]:
    """Of every quantity of a part what the shoulders make, (n_cases,) each, SI; 0 where no shoulder counts."""
    part = results.parts[name]
    own = {key: np.asarray(part.value(key)) for key in part.quantities()}
    if results.plain is None:
        return {key: np.zeros_like(value) for key, value in own.items()}
    plain = results.plain.parts[name]
    return {key: value - np.asarray(plain.value(key)) for key, value in own.items()}


def along_of_shoulders(results: Results, shaft: str) -> Array:
    """The same of the displacements at the stations of a shaft, (n_cases, n, 6) [m, rad]."""
    line = results.lines[shaft]
    return np.zeros_like(line.u) if results.plain is None else line.u - results.plain.lines[shaft].u
