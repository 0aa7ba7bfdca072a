"""Materials: elastic constants that belong together, the built-in list and its sources."""

import pytest

import fe_shaft.model as fs
from fe_shaft.model.material import BUILT_IN_NAMES, built_in
from tests.model.told import only


@pytest.mark.parametrize(
    "words",
    [
        {"youngs_modulus": "210 GPa", "poisson_ratio": 0.25},
        {"shear_modulus": "84 GPa", "poisson_ratio": 0.25},
        {"youngs_modulus": "210 GPa", "shear_modulus": "84 GPa"},
    ],
)
def test_any_two_constants_give_the_third(words: dict[str, object]) -> None:
    """E = 2 G (1 + nu), isotropic elasticity (Timoshenko and Goodier, Theory of Elasticity, 1951, art. 6)."""
    assert fs.Material("m", **words).elastic == pytest.approx((210e9, 84e9, 0.25), rel=1e-15)


def test_all_three_apart_are_kept() -> None:
    material = fs.Material("m", youngs_modulus="210 GPa", shear_modulus="81 GPa", poisson_ratio=0.3)
    assert material.elastic == (210e9, 81e9, 0.3)


def test_two_constants_are_needed() -> None:
    assert only(fs.Material, "m", youngs_modulus="210 GPa") == (
        "m",
        "two of youngs_modulus, shear_modulus and poisson_ratio are needed. "
        'Write youngs_modulus = "210 GPa" and poisson_ratio = 0.3.',
    )


def test_constants_that_cannot_be() -> None:
    place, sentence = only(fs.Material, "m", youngs_modulus="210 GPa", shear_modulus="8.1 GPa")
    assert place == "m.shear_modulus"
    assert sentence == (
        "8.1 GPa beside 210 GPa makes a Poisson's ratio of 12; possible: -1 to 0.5. "
        "Write about 80.8 GPa, or poisson_ratio as well to hold all three apart."
    )


@pytest.mark.parametrize("ratio", [-1.0, 0.51, "0.3"])
def test_poisson_ratio_is_bounded(ratio: object) -> None:
    assert only(fs.Material, "m", youngs_modulus="210 GPa", poisson_ratio=ratio)[0] == "m.poisson_ratio"


def test_a_modulus_in_the_wrong_unit_is_a_slip() -> None:
    assert only(fs.Material, "m", youngs_modulus="210 kPa", poisson_ratio=0.3) == (
        "m.youngs_modulus",
        '"210 kPa" is 0.00021 GPa; usual: 3 to 1200. Meant: GPa? (to keep it: range_check = "off" in this table)',
    )


@pytest.mark.parametrize("name", BUILT_IN_NAMES)
def test_built_in_materials_are_complete_and_sourced(name: str) -> None:
    material = built_in(name)
    assert material is not None
    assert material.source
    assert material.density is not None
    young, shear, ratio = material.elastic
    # Printed with two digits and as means of many alloys, the three constants fit each other within 4 %.
    assert shear == pytest.approx(young / (2 * (1 + ratio)), rel=0.04)


def test_shaft_steels_are_marked_from_memory() -> None:
    for name in ("42CrMo4", "16MnCr5", "18CrNiMo7-6", "C45"):
        material = built_in(name)
        assert material is not None
        assert "from memory" in material.source


def test_unknown_is_none() -> None:
    assert built_in("unobtainium") is None


def test_structural_steels_have_the_figures_of_the_eurocode() -> None:
    """EN 1993-1-1, 3.2.6: E 210 GPa, G about 81 GPa, nu 0.3, 12e-6/K; from memory."""
    for name in ("S235", "S355"):
        steel = built_in(name)
        assert steel is not None
        assert steel.elastic == (210e9, 81e9, 0.3)
        assert steel.thermal_expansion is not None
        assert steel.thermal_expansion.si == pytest.approx(12e-6)
