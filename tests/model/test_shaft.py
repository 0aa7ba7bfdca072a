"""Segments and shafts: sizes that can be, names, axes, and the arrays that come of them."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

import fe_shaft.model as fs
from fe_shaft.model.material import built_in
from fe_shaft.model.shaft import running_sums
from tests.model.told import only, told

STEEL = {"material": "steel"}


def segment(name: str | None = None, **words: object) -> fs.Segment:
    return fs.Segment(name, **({"length": "10 mm", "diameter": "20 mm"} | words))  # type: ignore[arg-type]


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        ({"bore": "20 mm"}, "s.bore", "20 mm leaves no wall in a diameter of 20 mm. Make it smaller."),
        (
            {"bore": "12 mm", "end_diameter": "10 mm"},
            "s.end_diameter",
            "12 mm leaves no wall in a diameter of 10 mm at the right end. Make the diameter larger.",
        ),
        (
            {"end_bore": "20 mm"},
            "s.end_bore",
            "20 mm leaves no wall in a diameter of 20 mm at the right end. Make it smaller.",
        ),
        ({"length": "0 mm"}, "s.length", '"0 mm" is not greater than 0. Write a positive value.'),
        ({"length": "-3 mm"}, "s.length", '"-3 mm" is not greater than 0. Write a positive value.'),
        (
            {"length": "nan mm"},
            "s.length",
            '"nan mm" is not a finite number. Write a number and a unit, as in "12 mm".',
        ),
        ({"length": float("inf")}, "s.length", 'inf is not a finite number. Write a number and a unit, as in "12 mm".'),
        ({"length": "1e400 mm"}, "s.length", '"1e400 mm" is too large for a number. Check its exponent.'),
        ({"diameter": "20,5 mm"}, "s.diameter", '"20,5 mm" has a decimal comma. Write "20.5 mm".'),
        ({"diameter": 20}, "s.diameter", '20 has no unit. Write "20 mm".'),
        (
            {"diameter": "38 m"},
            "s.diameter",
            '"38 m" is 38000 mm; usual: 1 to 3000. Meant: mm? (to keep it: range_check = "off" in this table)',
        ),
        (
            {"diameter": "~20 mm"},
            "s.diameter",
            '"~20 mm": only a stiffness has a usual band (half to twice). '
            'Write { value = "20 mm", low = "...", high = "...", source = "..." }.',
        ),
    ],
)
def test_segments_that_cannot_be(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(segment, "s", **words) == (place, sentence)


def test_a_band_whose_low_end_is_not_positive() -> None:
    band = {"value": "20 mm", "low": "0 mm", "high": "30 mm"}
    assert only(segment, "s", diameter=band) == ("s.diameter", '"20 mm" is not greater than 0. Write a positive value.')


def test_the_diameter_of_a_cone_and_its_bore_at_both_ends() -> None:
    shaft = fs.Shaft("s", [segment(bore="4 mm", end_diameter="30 mm", end_bore="6 mm"), segment(bore="2 mm")], **STEEL)
    numbers = shaft.numbers
    assert numbers["diameter_left"].tolist() == [0.02, 0.02]
    assert numbers["diameter_right"].tolist() == [0.03, 0.02]
    assert numbers["bore_left"].tolist() == [0.004, 0.002]
    assert numbers["bore_right"].tolist() == [0.006, 0.002]


def test_tolerance_classes_keep_the_nominal_value_and_the_text() -> None:
    value = segment(diameter="30 mm k6").diameter
    assert (value.si, value.text) == (0.03, "30 mm k6")


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        (
            {"segments": []},
            "s.segments",
            'the shaft has no segment. Write segments = [{ length = "38 mm", diameter = "38 mm" }].',
        ),
        (
            {"segments": "a.csv"},
            "s.segments",
            '"a.csv" is text, not a list. '
            'Write segments = [{ name = "wheel_seat", length = "38 mm", diameter = "38 mm" }].',
        ),
        (
            {"segments": [3]},
            "s.segment_1",
            '3 is a number, not a table. Write { length = "38 mm", diameter = "38 mm" }.',
        ),
        ({"material": None}, "s.material", 'material is not written. Write material = "42CrMo4".'),
        (
            {"segments": [segment("a"), segment("a")]},
            "s.a.name",
            '"a" is segment 1 already. Choose another name.',
        ),
        (
            {"segments": [segment("material")]},
            "s.material.name",
            '"material" is a key of the shaft. Choose another name.',
        ),
        ({"axis": "+Y"}, "s.twelve", 'a shaft along +Y has no upper side. Write twelve = "+Z".'),
        (
            {"axis": "-Z", "twelve": "+Z"},
            "s.twelve",
            '12 o\'clock cannot point along the axis (-Z). Write twelve = "+Y".',
        ),
        (
            {"left_end": "0 mm"},
            "s.left_end",
            '"0 mm" is text, not a list of three. Write ["0 mm", "0 mm", "12 mm"].',
        ),
        (
            {"left_end": ["0 mm", "0 mm"]},
            "s.left_end",
            'the list has 2 entries, not three (X, Y, Z). Write ["0 mm", "0 mm", "12 mm"].',
        ),
        ({"left_end": ["0 mm", "0 mm", 12]}, "s.left_end", '12 has no unit. Write "12 mm".'),
        (
            {"segments_file": "a.csv"},
            "s.segments_file",
            "only a model file reads files. In a script write segments = [...].",
        ),
        (
            {"shoulders": "off"},
            "s.shoulders",
            "shoulders is not a key here. "
            "Keys: segments, contour, material, shear, left_end, axis, twelve, segments_file, contour_file, "
            "contour_layer, contour_unit, label.",
        ),
        (
            {"beside": "layshaft"},
            "s.beside",
            'beside is not known yet in this version. Write left_end = ["0 mm", "0 mm", "112 mm"].',
        ),
    ],
)
def test_shafts_that_cannot_be(words: dict[str, object], place: str, sentence: str) -> None:
    given_words: dict[str, object] = {"segments": [segment()], "material": "steel"} | words
    assert only(fs.Shaft, "s", **given_words) == (place, sentence)


def test_a_material_is_needed_only_where_a_segment_has_none() -> None:
    assert fs.Shaft("s", [segment(material="steel")]).material is None
    assert told(fs.Shaft, "s", [segment(material="steel"), segment()]) == {
        "s.material": 'material is not written. Write material = "42CrMo4".'
    }


def test_arrays_in_si_with_materials_and_shear_by_segment() -> None:
    rows = [segment(), segment(material="aluminium", shear=0.9), segment(shear="none")]
    shaft = fs.Shaft("s", rows, material="steel")
    materials = {name: material for name in ("steel", "aluminium") if (material := built_in(name))}
    arrays = shaft.arrays(materials)
    assert arrays.length.tolist() == [0.01] * 3
    assert arrays.youngs_modulus.tolist() == [207e9, 71e9, 207e9]
    assert arrays.shear_modulus.tolist() == [79.3e9, 26.2e9, 79.3e9]
    assert arrays.poisson_ratio.tolist() == [0.292, 0.334, 0.292]
    assert arrays.density.tolist() == [7801.0, 2712.0, 7801.0]
    assert np.isnan(arrays.shear_coefficient[0])
    assert arrays.shear_coefficient[1:].tolist() == [0.9, np.inf]
    for column in (value for name, value in vars(arrays).items() if name not in ("memo", "drawn", "number")):
        assert column.dtype == np.float64
        assert not column.flags.writeable


def test_shear_of_the_shaft_holds_for_segments_without_their_own() -> None:
    shaft = fs.Shaft("s", [segment(), segment(shear="cowper")], material="steel", shear="none")
    material = built_in("steel")
    assert material is not None
    coefficient = shaft.arrays({"steel": material}).shear_coefficient
    assert coefficient[0] == np.inf
    assert np.isnan(coefficient[1])


@given(st.lists(st.floats(1e-4, 1.0), min_size=1, max_size=300))
def test_ends_of_segments_are_sums_of_lengths(lengths: list[float]) -> None:
    """Against sums in exact rational arithmetic (math.fsum, correctly rounded)."""
    import math

    ends = running_sums(np.array(lengths))
    exact = [math.fsum(lengths[:count]) for count in range(len(lengths) + 1)]
    assert ends == pytest.approx(exact, rel=4e-16, abs=0.0)


def test_a_shaft_of_many_segments_is_made_in_a_moment() -> None:
    rows = [segment(f"s{index}", length="1 mm") for index in range(20_000)]
    shaft = fs.Shaft("s", rows, material="steel")
    assert shaft.ends[-1] == pytest.approx(20.0)
    assert shaft.segment_index["s19999"] == 19_999
