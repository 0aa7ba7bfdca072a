"""The built-in materials against printed figures: cases MA.. of beams.toml.

Sources, named beside the figures: J. E. Shigley, Mechanical Engineering Design, Table A-5 (as printed on a web page;
densities from kN/m^3); a table in the manner of R. C. Hibbeler, Mechanics of Materials (web page); usual figures of EN
and VDI practice (from memory); printed PLA and ABS (web pages; what MA04 and MA05 call recalled is from memory).

Equal to the printed figure, so 1e-12. E, G and nu of the tables do not fit E = 2 G (1 + nu) exactly (up to 3 %): each
is held as printed. Where a table states no G it follows from that equation.
"""

from __future__ import annotations

import pytest

import fe_shaft as fs
from tests.evidence.plane import area, rod
from tests.evidence.published import CASES, agree

NAMES = {
    "MA01_carbon_steel": ("steel",),
    "MA01_nickel_steel": ("nickel steel",),
    "MA01_stainless": ("stainless steel",),
    "MA01_grey_cast_iron": ("grey cast iron",),
    "MA01_aluminium": ("aluminium",),
    "MA01_brass": ("brass",),
    "MA01_phosphor_bronze": ("bronze",),
    "MA02_ti_alloy": ("titanium",),
    "MA02_al_6061_t6": ("aluminium 6061-T6",),
    "MA02_al_2014_t6": ("aluminium 2014-T6",),
    "MA02_malleable_ci": ("malleable cast iron",),
    "MA02_grey_ci_astm20": ("grey cast iron class 20",),
    "MA02_steel_a36": ("structural steel",),
    "MA02_stainless_304": ("X5CrNi18-10",),
    "MA03_shaft_steel_EN": ("16MnCr5", "18CrNiMo7-6", "42CrMo4", "C45", "34CrNiMo6"),
    "MA03_ductile_iron_GJS": ("ductile cast iron", "EN-GJS-400"),
    "MA03_bearing_steel_100Cr6": ("100Cr6",),
    "MA03_ti6al4v": ("Ti-6Al-4V",),
    "MA04_PLA_print": ("PLA",),
    "MA05_ABS_print": ("ABS",),
}
PAIRS = [(case, name) for case, names in NAMES.items() for name in names]


def hung(name: str) -> fs.Results:
    """A bar of the material that hangs from its left end, twisted and pulled at its right."""
    shaft = fs.Shaft("shaft", [rod(1.0, 0.05)], material=name, axis="-Y", twelve="+Z")
    held = fs.Pin("held", at="0 m", holds=["radial", "axial", "tilt", "spin"])
    torque = fs.Force("torque", at="shaft.right", couple={"axial": "100 N m"})
    pull = fs.Force("pull", at="shaft.right", axial="1 kN")
    cases = [fs.Case(each.name, forces=[each.name]) for each in (torque, pull)]
    return fs.solve(fs.Model("hung bar", [shaft, held, torque, pull], cases, gravity="down"))


def test_every_printed_material_is_in_the_list() -> None:
    assert set(NAMES) == {name for name in CASES if name.startswith("MA")}


@pytest.mark.parametrize(("case", "name"), PAIRS)
def test_figures(case: str, name: str) -> None:
    printed = CASES[case]
    model = hung(name).model
    arrays = model.segment_arrays["shaft"]
    got = {
        "E": arrays.youngs_modulus[0],
        "G": arrays.shear_modulus[0],
        "nu": arrays.poisson_ratio[0],
        "rho": arrays.density[0],
    }
    for key in got.keys() & printed.expected.keys():
        agree(float(got[key]), printed.printed(key), rel=1e-12)
    if "G" not in printed.expected:
        agree(float(got["G"]), printed.printed("E") / (2 * (1 + printed.printed("nu"))), rel=1e-12)
    expansion = model.materials[name].thermal_expansion
    if "alpha" in printed.expected:
        assert expansion is not None
        agree(expansion.si, printed.printed("alpha"), rel=1e-12)
    else:
        assert expansion is None


@pytest.mark.parametrize(("case", "name"), PAIRS)
def test_figures_are_used(case: str, name: str) -> None:
    """Twist by the printed G, stretch by the printed E, weight by the printed density (bar: closed forms, 1e-9)."""
    printed, results = CASES[case], hung(name)
    d = 0.05
    by_ratio = printed.printed("E") / (2 + 2 * printed.printed("nu"))
    shear_modulus = printed.printed("G") if "G" in printed.expected else by_ratio
    agree(results.case("torque")["torque"].twist, 100.0 / (shear_modulus * area(d) * d**2 / 8))
    stretch = results.case("pull")["pull"].axial - results.case("torque")["pull"].axial
    agree(stretch, 1000.0 / (printed.printed("E") * area(d)))
    agree(-results.case("torque")["held"].axial_force, printed.printed("rho") * area(d) * 9.80665)


@pytest.mark.parametrize(("case", "name"), PAIRS)
def test_each_names_its_source(case: str, name: str) -> None:
    source = hung(name).model.materials[name].source
    wanted = {"MA01": "Table A-5", "MA02": "Hibbeler"}
    assert source is not None
    assert wanted.get(case[:4], "from memory") in source
