"""Units of the outputs: those of the trade, or those that the model asks for."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.units import FACTORS

if TYPE_CHECKING:
    from fe_shaft.model.system import Model


@dataclass(frozen=True)
class Shown:
    """Units of the outputs, by dimension; `along` is for places along the shaft.

    The trade units (um, mrad, N, N m, mm), unless the model states others. A movement is far smaller than a shaft:
    where lengths are asked for in inches or feet, it is shown in mil (0.001 in), else in um.
    """

    length: str = "um"
    angle: str = "mrad"
    force: str = "N"
    moment: str = "N m"
    along: str = "mm"

    @classmethod
    def of(cls, model: Model) -> Shown:
        """Units that a model asks for."""
        asked = model.units
        if asked is None:
            return cls()
        force, along = asked.force or cls.force, asked.length or cls.along
        small = {"in": "mil", "ft": "mil", "mil": "mil", "nm": "nm"}.get(along, cls.length)
        arm = {"in": "in", "mil": "in", "ft": "ft"}.get(along, "in")
        moment = {"lbf": f"lbf {arm}", "kN": "kN m", "MN": "kN m"}.get(force, cls.moment)
        return cls(small, asked.angle or cls.angle, force, moment, along)

    def unit(self, quantity: str) -> str:
        """Unit of a quantity, by its name."""
        unit: str = getattr(self, QUANTITIES[quantity].dimension)
        return unit

    def heading(self, quantity: str) -> str:
        """Name of a column: "deflection_um"."""
        return f"{quantity}_{self.suffix(QUANTITIES[quantity].dimension)}"

    def suffix(self, dimension: str) -> str:
        """Unit of a dimension without its space: "Nm"."""
        unit: str = getattr(self, dimension)
        return unit.replace(" ", "")

    def factor(self, dimension: str) -> float:
        """SI units in one of the shown units."""
        return FACTORS["length" if dimension == "along" else dimension][getattr(self, dimension)]
