"""Materials: the built-in list with the source of every figure, and the user's own.

Figures marked 'from memory' were not checked against the named publication. Densities, moduli and expansions of one
alloy scatter by a few per cent; the list states one usual value each.
"""

from collections.abc import Iterator
from functools import cache
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, Unpack

from pydantic import Field
from typing_extensions import override

from fe_shaft.model.kinds import Factor, FreeName
from fe_shaft.model.quantity import Density, Expansion, Modulus
from fe_shaft.model.words import Fault, Named
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.keywords import MaterialWords


class Material(Named):
    """An elastic, isotropic material; any two of the two moduli and Poisson's ratio, or all three apart."""

    group: ClassVar[str] = "materials"

    if TYPE_CHECKING:

        def __init__(self, name: str, **words: Unpack[MaterialWords]) -> None: ...

    name: Annotated[str, FreeName()] = Field(description="Name of the material.", examples=["own_steel"])
    youngs_modulus: Modulus | None = Field(default=None, description="Young's modulus E.", examples=["210 GPa"])
    shear_modulus: Modulus | None = Field(default=None, description="Shear modulus G.", examples=["81 GPa"])
    poisson_ratio: Annotated[float, Factor(-1.0, 0.5, open_at_least=True)] | None = Field(
        default=None, description="Poisson's ratio; bare number.", examples=[0.3]
    )
    density: Density | None = Field(
        default=None, description="Density; needed where gravity acts.", examples=["7850 kg/m^3"]
    )
    thermal_expansion: Expansion | None = Field(
        default=None, description="Coefficient of linear thermal expansion.", examples=["11.5e-6 1/K"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        elastic = ("youngs_modulus", "shear_modulus", "poisson_ratio")
        if len(self.given & set(elastic)) < 2:
            yield Fault(
                (),
                'two of youngs_modulus, shear_modulus and poisson_ratio are needed. Write youngs_modulus = "210 GPa" '
                "and poisson_ratio = 0.3.",
            )
            return
        young, shear = self.youngs_modulus, self.shear_modulus
        if young and shear and self.poisson_ratio is None and not -1.0 < young.si / (2.0 * shear.si) - 1.0 <= 0.5:
            ratio = young.si / (2.0 * shear.si) - 1.0
            yield Fault(
                ("shear_modulus",),
                f"{shear.text} beside {young.text} makes a Poisson's ratio of {ratio:.3g}; possible: -1 to 0.5. "
                f"Write about {show(young.si / 2.6, 'GPa')}, or poisson_ratio as well to hold all three apart.",
            )

    @property
    def elastic(self) -> tuple[float, float, float]:
        """Young's modulus [Pa], shear modulus [Pa], Poisson's ratio; the missing one by E = 2 G (1 + nu)."""
        young, shear = (None if each is None else each.si for each in (self.youngs_modulus, self.shear_modulus))
        ratio = self.poisson_ratio
        if young is None:
            assert shear is not None
            assert ratio is not None
            return 2.0 * shear * (1.0 + ratio), shear, ratio
        if shear is None:
            assert ratio is not None
            return young, young / (2.0 * (1.0 + ratio)), ratio
        return young, shear, young / (2.0 * shear) - 1.0 if ratio is None else ratio


_SHIGLEY = "Shigley, Mechanical Engineering Design, Table A-5, as printed on a web page"
_HIBBELER = "table of properties in the manner of Hibbeler, Mechanics of Materials, as printed on a web page"
_PRACTICE = "usual figures for this steel in EN and VDI practice, from memory"

# name: E [GPa], G [GPa], nu, density [kg/m^3], thermal expansion [1e-6/K], source
_BUILT_IN: dict[str, tuple[float, float | None, float, float, float | None, str]] = {
    **dict.fromkeys(
        ("42CrMo4", "16MnCr5", "18CrNiMo7-6", "C45", "34CrNiMo6"), (210, 81, 0.3, 7850, 11.5, _PRACTICE)
    ),
    **dict.fromkeys(
        ("S235", "S355"), (210, 81, 0.3, 7850, 12, "EN 1993-1-1, 3.2.6, density EN 1991-1-1; from memory")
    ),
    "100Cr6": (210, 81, 0.3, 7830, 11.9, _PRACTICE),
    "steel": (207, 79.3, 0.292, 7801, None, f"{_SHIGLEY}: carbon steel"),
    "nickel steel": (207, 79.3, 0.291, 7750, None, f"{_SHIGLEY}: nickel steel"),
    "structural steel": (200, 75, 0.32, 7850, 12, f"{_HIBBELER}: structural steel A-36"),
    "stainless steel": (190, 73.1, 0.305, 7750, None, f"{_SHIGLEY}: stainless steel"),
    "X5CrNi18-10": (193, 75, 0.27, 7860, 17, f"{_HIBBELER}: stainless steel 304"),
    "grey cast iron": (100, 41.4, 0.211, 7199, None, f"{_SHIGLEY}: grey cast iron"),
    "grey cast iron class 20": (67, 27, 0.28, 7190, 12, f"{_HIBBELER}: grey cast iron, ASTM 20"),
    "malleable cast iron": (165, 65, 0.28, 7300, 12, f"{_HIBBELER}: malleable cast iron"),
    **dict.fromkeys(
        ("ductile cast iron", "EN-GJS-400"),
        (169, 66, 0.275, 7100, 12.5, "usual figures for ductile cast iron in EN practice, from memory"),
    ),
    "aluminium": (71, 26.2, 0.334, 2712, None, f"{_SHIGLEY}: aluminium, all alloys"),
    "aluminium 6061-T6": (68.9, 26, 0.35, 2710, 24, f"{_HIBBELER}: aluminium 6061-T6"),
    "aluminium 2014-T6": (73.1, 27, 0.35, 2790, 23, f"{_HIBBELER}: aluminium 2014-T6"),
    "titanium": (120, 44, 0.36, 4430, 9.4, f"{_HIBBELER}: titanium alloy"),
    "Ti-6Al-4V": (114, 44, 0.33, 4430, 8.8, "usual figures for this alloy, from memory"),
    "bronze": (111, 41.4, 0.349, 8168, None, f"{_SHIGLEY}: phosphor bronze"),
    "brass": (106, 40.1, 0.324, 8545, None, f"{_SHIGLEY}: brass"),
    "PLA": (
        3.5, None, 0.35, 1240, 68,
        "printed PLA, middle of a range on a web page (E 3 to 4 GPa); Poisson's ratio and expansion from memory; "
        "lower with sparse infill and across layers",
    ),
    "ABS": (
        1.44, None, 0.35, 1040, 90,
        "printed ABS, a maker's value on a web page; Poisson's ratio, density and expansion from memory; "
        "moulded: 2.0 to 2.3 GPa, from memory",
    ),
}  # fmt: skip
BUILT_IN_NAMES = tuple(_BUILT_IN)


@cache
def built_in(name: str) -> Material | None:
    """A material of the built-in list, or None.

    Parameters
    ----------
    name : str
        One of `BUILT_IN_NAMES`.
    """
    if name not in _BUILT_IN:
        return None
    young, shear, ratio, density, expansion, source = _BUILT_IN[name]
    figures: dict[str, Any] = {"youngs_modulus": f"{young:g} GPa", "poisson_ratio": ratio}
    figures |= {"density": f"{density:g} kg/m^3", "source": source}
    if shear is not None:
        figures["shear_modulus"] = f"{shear:g} GPa"
    if expansion is not None:
        figures["thermal_expansion"] = f"{expansion:g}e-6 1/K"
    return Material(name, **figures)
