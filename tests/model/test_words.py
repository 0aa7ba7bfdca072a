"""What all nouns have in common: frozen, closed, every mistake in one sentence, all at once."""

import inspect

import pytest

import fe_shaft.model as fs
from fe_shaft.errors import ModelError
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.refusal import sentence_of
from tests.model.told import only, told

RADIAL = {"at": "10 mm", "holds": ["radial"]}


def test_the_name_comes_first_or_as_a_word() -> None:
    assert fs.Segment("a", length="1 mm", diameter="2 mm") == fs.Segment(name="a", length="1 mm", diameter="2 mm")


def test_too_many_values_without_a_key() -> None:
    place, sentence = only(fs.Pin, "a", "10 mm", holds=["radial"])
    assert (place, sentence) == (
        "Pin",
        "2 values without a key; only name may stand without. Write key = value.",
    )


def test_a_noun_without_a_name_takes_words_only() -> None:
    assert "only nothing may stand without" in only(fs.Couple, "3 N m")[1]


def test_a_word_given_twice() -> None:
    assert only(fs.Pin, "a", name="b", **RADIAL) == ("Pin", "name is given twice. Leave one out.")


def test_nothing_can_be_changed_afterwards() -> None:
    segment = fs.Segment("a", length="1 mm", diameter="2 mm")
    with pytest.raises(ModelError, match=r"^a\.length: a part of a model does not change\. Make a new one\.$"):
        segment.length = "2 mm"
    assert segment.length.text == "1 mm"


def test_all_mistakes_of_a_noun_at_once_also_of_keys_together() -> None:
    sentences = told(
        fs.Segment, "s", length=3, diameter="50 mm", bore="60 mm", fillet="-1 mm", beta="3 deg", lenght="4 mm"
    )
    assert sentences == {
        "s.length": '3 has no unit. Write "3 mm".',
        "s.bore": "60 mm leaves no wall in a diameter of 50 mm. Make it smaller.",
        "s.fillet": '"-1 mm" is negative. Write 0 or a positive value.',
        "s.beta": "beta is not a key here. Keys: name, length, diameter, bore, end_diameter, end_bore, fillet, "
        "fillet_left, fillet_right, material, shear, keyway, spline.",
        "s.lenght": "lenght is not a key here. Nearest: length.",
    }


def test_mistakes_in_nouns_inside_come_along() -> None:
    sentences = told(
        fs.Shaft,
        "s",
        [{"name": "a", "length": "1 mm"}, {"length": "1 mm", "diameter": "2 kg", "d": "2 mm"}],
        axis="X",
    )
    assert sentences == {
        "s.a.diameter": 'diameter is not written. Write diameter = "38 mm".',
        "s.segment_2.diameter": '"2 kg" is a mass, not a length. Write mm, m, cm, um, nm, in, ft or mil.',
        "s.segment_2.d": 'd is not a key here. Write diameter = "38 mm" (d).',
        "s.axis": '"X" is not possible here. Nearest: -X.',
        "s.material": 'material is not written. Write material = "42CrMo4".',
    }


def test_a_missing_key_says_what_to_write() -> None:
    assert only(fs.Pin, "a", at="1 mm") == ("a.holds", 'holds is not written. Write holds = ["radial", "axial"].')


def test_a_misspelled_key_is_not_also_missing() -> None:
    assert only(fs.Pin, "a", at="1 mm", hold=["radial"]) == ("a.hold", "hold is not a key here. Nearest: holds.")


@pytest.mark.parametrize(
    ("noun", "symbol", "meant"),
    [
        (fs.Gear, "beta", 'helix = "15 deg left"'),
        (fs.Gear, "mn", 'normal_module = "2 mm"'),
        (fs.Gear, "m", 'normal_module = "2 mm"'),
        (fs.Gear, "b", 'facewidth = "32 mm"'),
        (fs.Gear, "z", "teeth = 85"),
        (fs.Gear, "d", 'pitch_diameter = "176 mm"'),
        (fs.Gear, "alpha", 'pressure_angle = "20 deg"'),
        (fs.Segment, "D", 'diameter = "38 mm"'),
        (fs.Segment, "d", 'diameter = "38 mm"'),
        (fs.Segment, "L", 'length = "38 mm"'),
        (fs.Segment, "r", 'fillet = "1.5 mm"'),
        (fs.Bearing, "B", 'width = "19 mm"'),
        (fs.Stiffness, "k", 'radial = "~93 N/um"'),
        (fs.Material, "E", 'youngs_modulus = "210 GPa"'),
        (fs.Material, "G", 'shear_modulus = "81 GPa"'),
        (fs.Material, "nu", "poisson_ratio = 0.3"),
        (fs.Material, "rho", 'density = "7850 kg/m^3"'),
        (fs.Case, "P", 'power = "5.5 kW"'),
        (fs.Case, "n", 'speed = "393.7 rpm"'),
        (fs.Case, "T", 'torque = "133 N m"'),
        (fs.Case, "KA", "torque_factor = 2.2"),
        (fs.Force, "Fy", 'up = "1.2 kN"'),
        (fs.Mass, "m", 'mass = "4.1 kg"'),
    ],
)
def test_symbols_of_drawings_and_catalogues(noun: type, symbol: str, meant: str) -> None:
    sentences = told(noun, **{symbol: "1"})
    assert f"{symbol} is not a key here. Write {meant} ({symbol})." in sentences.values()


@pytest.mark.parametrize("symbol", ["C", "C0"])
def test_ratings_of_a_catalogue_are_a_later_matter(symbol: str) -> None:
    sentence = told(fs.Bearing, "x", at="1 mm", holds=["radial"], **{symbol: "20 kN"})[f"x.{symbol}"]
    assert sentence.startswith(f"{symbol} is not a key here, and ")
    assert 'is not known yet in this version. Write the figures of the bearing as stiffness = { radial = "' in sentence


def test_no_wording_of_the_validator_reaches_the_user() -> None:
    assert sentence_of(None, "int_type") == "this cannot be read (int_type)."  # the last resort is ours as well


@pytest.mark.parametrize("noun", [*GROUPS.values(), fs.Stiffness, fs.Matrix], ids=lambda noun: noun.__name__)
def test_words_are_shown_to_editors(noun: type) -> None:
    parameters = inspect.signature(noun).parameters
    assert set(parameters) == set(noun.model_fields)  # type: ignore[attr-defined]


@pytest.mark.parametrize("noun", [*GROUPS.values(), fs.Stiffness, fs.Heading], ids=lambda noun: noun.__name__)
def test_every_key_has_a_description_and_an_example(noun: type) -> None:
    for key, field in noun.model_fields.items():  # type: ignore[attr-defined]
        assert field.description, key
        assert field.description.endswith((".", "`.")), key
        assert field.examples, key


def test_a_slip_of_units_is_switched_off_at_its_place_only() -> None:
    slip = {"radial": "93 N/m"}
    place, sentence = only(fs.Bearing, "b", **RADIAL, stiffness=slip)
    assert place == "b.stiffness.radial"
    assert sentence == (
        '"93 N/m" is 0.000093 N/um; usual: 0.5 to 20000. Meant: N/um? (to keep it: range_check = "off" in this table)'
    )
    loose = {"range_check": "off"}
    for bearing in (
        fs.Bearing("b", **RADIAL, stiffness=slip | loose),
        fs.Bearing("b", **RADIAL, stiffness=slip, **loose),
    ):
        assert bearing.stiffness is not None
        assert bearing.stiffness.radial is not None
        assert bearing.stiffness.radial.si == 93.0
    assert only(fs.Bearing, "b", **RADIAL, stiffness=slip, seat={"radial": "400 N/um"} | loose)[0] == place


def test_an_unusual_value_that_is_no_slip_passes() -> None:
    assert fs.Segment("s", length="38 m", diameter="38 mm").length.si == 38.0
