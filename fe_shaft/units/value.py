"""A number the user gave, certain or an estimate with its band."""

from dataclasses import dataclass
from typing import Literal

from fe_shaft.units.showing import exact
from fe_shaft.units.spelling import split
from fe_shaft.units.table import FACTORS

ESTIMATED_BY_TILDE = {"stiffness", "tilt_stiffness"}


@dataclass(frozen=True, slots=True)
class Value:
    """A number the user gave: SI inside, the user's own text outside, a band if it is an estimate.

    Parameters
    ----------
    si : float
        The value [SI unit of its dimension].
    text : str
        As the user wrote it.
    low, high : float or None
        Ends of the band of an estimate [SI]; both None if the value is certain.
    source : str
        Where the value comes from, in the user's words.
    """

    si: float
    text: str
    low: float | None = None
    high: float | None = None
    source: str = ""

    @property
    def estimated(self) -> bool:
        """Whether the value is an estimate, with a band from ``low`` to ``high``."""
        return self.low is not None

    def end(self, which: Literal["low", "high"]) -> "Value":
        """A certain value at one end of the band; the value itself if it is certain already."""
        si = self.low if which == "low" else self.high
        return self if si is None else Value(si, self._in_own_unit(si), source=self.source)

    def written(self) -> str | dict[str, str]:
        """The value as a model file states it: text, or a table with low, high and source where text is too little."""
        table = {"value": self.text}
        if self.low is not None and self.high is not None and not self._has_usual_band():
            table |= {"low": self._in_own_unit(self.low), "high": self._in_own_unit(self.high)}
        if self.source:
            table["source"] = self.source
        return table if len(table) > 1 else self.text

    def __str__(self) -> str:
        return f"~{self.text}" if self.estimated and not self.text.lstrip().startswith("~") else self.text

    def _has_usual_band(self) -> bool:
        """Whether "~" in the text says the band already."""
        parts = split(self.text) if self.text.lstrip().startswith("~") else None
        usual = parts is not None and any(parts[1].text in FACTORS[name] for name in ESTIMATED_BY_TILDE)
        return usual and (self.low, self.high) == tilde_band(self.si)

    def _in_own_unit(self, si: float) -> str:
        """Another value of the same dimension, in the unit this one was written in."""
        parts = split(self.text)
        return exact(si, parts[1]) if parts else repr(si)


def tilde_band(si: float) -> tuple[float, float]:
    """The band of an estimate by "~": half to twice the value."""
    return si / 2.0, si * 2.0
