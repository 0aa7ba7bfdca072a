"""Verdicts: a limit held against a result, as given and over the band of what is estimated."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.results.quantity import FACTOR, QUANTITIES

Word = Literal["FAIL", "pass", "unsure"]


def use(values: ArrayLike, least: float | None, most: float | None) -> NDArray[np.float64]:
    """How much of what is allowed is used, (...); above 1 a limit is exceeded.

    Parameters
    ----------
    values : (...) SI
    least, most : bounds, SI; with one of them the values' sizes count, with both the sign counts too

    Returns
    -------
    size over `most`; `least` over size, infinite where nothing is there; with both bounds, distance from their middle
    over half their distance
    """
    values = np.asarray(values, dtype=float)
    if least is None and most is not None:
        return np.asarray(np.abs(values) / most)
    if most is None or least is None:
        with np.errstate(divide="ignore"):
            return np.asarray((least or 0.0) / np.abs(values))
    return np.asarray(np.abs(values - (most + least) / 2) / ((most - least) / 2))


@dataclass(frozen=True)
class Band:
    """The governing value where everything estimated is at an end of its band, SI.

    Attributes
    ----------
    all_low, all_high : value with every estimate at its low, its high end
    worst : the worst of all mixes that were solved
    worst_use : use there
    mix : that mix in words, such as "lay_left stiff, lay_right soft"
    """

    all_low: float
    all_high: float
    worst: float
    worst_use: float
    mix: str

    @property
    def fails(self) -> bool:
        """Whether the limit is exceeded anywhere in the band."""
        return self.worst_use > 1


@dataclass(frozen=True)
class Verdict:
    """One limit against one result.

    Attributes
    ----------
    limit : its name
    part, quantity, case : where it governs
    value : SI; its size where only one bound is given
    least, most : bounds, SI, None where not given
    use : see `use`; above 1 it fails
    per_case : use in each case the limit speaks of
    band : over the estimates, None where nothing is estimated
    shaft_alone : the value on rigid pins, None where pins cannot hold the shaft
    by_shoulders : how much of the value is the shoulders' doing, None where no shoulder counts
    hubs : the value with no hub carrying, and with all hubs in one piece with their shafts; None without hubs
    """

    limit: str
    part: str
    quantity: str
    case: str
    value: float
    least: float | None
    most: float | None
    use: float
    per_case: dict[str, float]
    source: str
    counting: str
    band: Band | None = None
    shaft_alone: float | None = None
    by_shoulders: float | None = None
    hubs: tuple[float, float] | None = None

    @property
    def word(self) -> Word:
        """FAIL as given; unsure: passes as given, fails somewhere in the band; else pass."""
        if self.use > 1:
            return "FAIL"
        return "unsure" if self.band is not None and self.band.fails else "pass"

    def use_of(self, value: float) -> float:
        """Use of another value of the same quantity [SI]."""
        return float(use(value, self.least, self.most))

    @property
    def unit(self) -> str:
        """Trade unit of the quantity."""
        return QUANTITIES[self.quantity].unit

    def shown(self, si: float) -> float:
        """A value of this quantity in its trade unit."""
        return si * FACTOR[self.unit]
