"""The whole model: look-up, frames, names, what is frozen, and going back to words."""

import hashlib
import json
from typing import Any

import numpy as np
import pytest

import fe_shaft.model as fs
from fe_shaft.errors import ModelError
from fe_shaft.units import STANDARD_GRAVITY
from tests.model.small import bearing, model, parts, shaft
from tests.model.told import only, told


def test_parts_by_kind_and_name() -> None:
    made = model()
    assert [each.name for each in made.shafts] == ["layshaft"]
    assert [each.name for each in made.supports] == ["lay_left", "lay_right"]
    assert [each.name for each in made.gears] == ["wheel", "pinion"]
    assert [each.name for each in made.forces] == ["pull"]
    assert [each.name for each in made.masses] == ["disc"]
    assert (made.couplings, made.pulleys, made.sprockets) == ((), (), ())
    assert made["wheel"] is made.gears[0]
    assert "wheel" in made
    assert "weel" not in made
    assert list(made) == ["layshaft", "lay_left", "lay_right", "wheel", "pinion", "pull", "disc"]
    assert len(made) == 7
    assert repr(made) == 'Model("A small shaft", 1 shafts, 6 parts)'
    assert dict(made.source_lines) == {}


def test_unknown_names_raise_with_the_nearest() -> None:
    made = model()
    with pytest.raises(ModelError, match=r'^no part is called "weel"\. Nearest: wheel\.$'):
        made["weel"]
    with pytest.raises(ModelError, match=r'^no case is called "runing"\. Nearest: running\.$'):
        made.case("runing")


def test_nothing_can_be_changed_afterwards() -> None:
    made = model()
    with pytest.raises(ModelError, match=r"a model does not change\. Write model\.change"):
        made.title = "other"  # type: ignore[misc]
    with pytest.raises(ModelError, match="a model does not change"):
        del made.parts


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        (
            {"parts": fs.Pin("p", at="1 mm", holds=["radial"])},
            "parts",
            '"Pin" is something else, not a list. Write parts = [...] of: '
            "Shaft, Pin, Bearing, Gear, Coupling, Sprocket, Pulley, Mass, Force.",
        ),
        (
            {"parts": [shaft(), 3]},
            "parts",
            "number 2 does not belong here: it is a number (int). Give "
            "Shaft, Pin, Bearing, Gear, Coupling, Sprocket, Pulley, Mass, Force.",
        ),
        (
            {"parts": [shaft(), fs.Case("running")]},
            "parts",
            'number 2 does not belong here: "running" is a Case. Give it in cases.',
        ),
        (
            {"parts": [shaft()], "cases": [bearing("b", at="1 mm")]},
            "cases",
            'number 1 does not belong here: "b" is a Bearing. Give it in parts.',
        ),
        ({"parts": []}, "shafts", "the model has no shaft. Write [shafts.layshaft] with its segments."),
        (
            {"gravity": "up"},
            "gravity",
            '"up" is text, not a list of three. Write "down" or ["0 m/s^2", "0 m/s^2", "12 m/s^2"].',
        ),
        ({"gravity": [0, 0, 0]}, "gravity", '0 has no unit. Write "0 m/s^2".'),
        ({"title": 3}, "title", '3 is a number, not text. Write it in quotes: "...".'),
        ({"format": 2}, "format", "2 is not possible here. Write 1."),
        (
            {"colour": "red"},
            "colour",
            "colour is not a key here. Keys: format, title, question, gravity, units, housing, shoulders, estimates.",
        ),
        (
            {"units": {"length": "parsec"}},
            "units.length",
            '"parsec" is not possible here. Write "m" or "mm" or "cm" or "um" or "nm" or "in" or "ft" or "mil".',
        ),
        (
            {"housing": {"matrix": "h.mtx"}},
            "housing.matrix",
            'matrix is not known yet in this version. Write seat = { radial = "..." } here or at each bearing.',
        ),
        (
            {"estimates": {"together": "yes"}},
            "estimates.together",
            '"yes" is text, not yes or no. Write true or false, without quotes.',
        ),
    ],
)
def test_models_that_cannot_be(words: dict[str, Any], place: str, sentence: str) -> None:
    assert only(fs.Model, **({"title": "x", "parts": [shaft()]} | words)) == (place, sentence)


@pytest.mark.parametrize(
    ("extra", "place", "sentence"),
    [
        (bearing("wheel", at="1 mm"), "wheel", '"wheel" is the name of a bearing already. Choose another name.'),
        (
            bearing("seat", at="1 mm"),
            "layshaft.seat.name",
            '"seat" is the name of a bearing already. Choose another name.',
        ),
        (bearing("layshaft", at="1 mm"), "layshaft", '"layshaft" is the name of a shaft already. Choose another name.'),
        (bearing("housing", at="1 mm"), "housing", '"housing" is a key of the model itself. Choose another name.'),
        (bearing("gears", at="1 mm"), "gears", '"gears" is a key of the model itself. Choose another name.'),
    ],
)
def test_names_that_are_taken(extra: Any, place: str, sentence: str) -> None:
    if extra.name == "wheel":
        made = [*parts()[:1], extra, *parts()[1:]]
        assert only(lambda: fs.Model("x", made)) == (place, sentence)
    else:
        assert only(lambda: model([extra])) == (place, sentence)


def test_own_materials() -> None:
    own = fs.Material("own", youngs_modulus="200 GPa", poisson_ratio=0.3, density="7800 kg/m^3")
    made = fs.Model("x", [shaft(material="own")], materials=[own])
    assert made.segment_arrays["layshaft"].youngs_modulus.tolist() == [200e9] * 5
    assert list(made.materials) == ["own"]
    assert only(fs.Model, "x", [shaft(material="onw")], materials=[own])[1].startswith('no material is called "onw".')
    assert only(fs.Model, "x", [shaft(material="42CrMo5")]) == (
        "layshaft.material",
        'no material is called "42CrMo5". Nearest: 42CrMo4.',
    )
    builtin = fs.Material("steel", youngs_modulus="200 GPa", poisson_ratio=0.3)
    assert only(fs.Model, "x", [shaft()], materials=[builtin]) == (
        "steel",
        '"steel" is a built-in material. Choose another name, such as own_steel.',
    )


def test_gravity_needs_densities() -> None:
    light = fs.Material("light", youngs_modulus="200 GPa", poisson_ratio=0.3)
    weightless = fs.Model("x", [shaft(material="light")], materials=[light])
    assert weightless.segment_arrays["layshaft"].density.tolist() == [0.0] * 5
    assert only(fs.Model, "x", [shaft(material="light")], materials=[light], gravity="down") == (
        "light.density",
        'gravity acts, but density is not written. Write density = "7850 kg/m^3".',
    )


def test_gravity_as_a_vector() -> None:
    assert model().gravity_vector.tolist() == [0.0, 0.0, 0.0]
    assert model(gravity="down").gravity_vector.tolist() == [0.0, -STANDARD_GRAVITY, 0.0]
    vector = model(gravity=["1 m/s^2", "0 m/s^2", "-2 m/s^2"]).gravity_vector
    assert vector.tolist() == [1.0, 0.0, -2.0]


@pytest.mark.parametrize(
    ("words", "x", "y", "z"),
    [
        ({}, "+X", "+Y", "+Z"),
        ({"axis": "-X"}, "-X", "+Y", "-Z"),
        ({"axis": "+Z"}, "+Z", "+Y", "-X"),
        ({"axis": "+Y", "twelve": "+Z"}, "+Y", "+Z", "+X"),
        ({"twelve": "-Z"}, "+X", "-Z", "+Y"),
    ],
)
def test_frames_are_right_handed(words: dict[str, str], x: str, y: str, z: str) -> None:
    """Columns of the rotation are x along the shaft, y at 12, z at 3 o'clock; z = x cross y."""
    frame = fs.Model("x", [shaft(**words, left_end=["1 mm", "2 mm", "3 mm"])]).frames["layshaft"]
    units = {f"{sign}{axis}": float(f"{sign}1") * np.eye(3)[index] for index, axis in enumerate("XYZ") for sign in "+-"}
    assert frame.rotation.T.tolist() == [units[axis].tolist() for axis in (x, y, z)]
    assert np.linalg.det(frame.rotation) == pytest.approx(1.0)
    assert frame.origin.tolist() == [0.001, 0.002, 0.003]


def test_seats_come_from_the_housing_unless_a_bearing_has_its_own() -> None:
    own = bearing("own", at="seat", seat={"radial": "100 N/um"})
    made = model([own], housing={"seat": {"radial": "~400 N/um"}})
    seats = {each.name: each.seat for each in made.supports if isinstance(each, fs.Bearing)}
    radial = {name: seat.radial.si for name, seat in seats.items() if seat and seat.radial}
    assert radial == {"lay_left": 4e8, "lay_right": 4e8, "own": 1e8}
    assert made["lay_left"].seat is seats["lay_left"]


def test_every_mistake_of_a_model_at_once() -> None:
    wrong = [
        bearing("a", at="sead"),
        bearing("b", at="200 mm"),
        fs.Mass("c", at="a", mass="1 kg"),
    ]
    case = fs.Case("running", enters="weel", leaves="pinion", torque="3 N m", turns="clockwise from left")
    limit = fs.Limit("x", of="whel", quantity="deflection", max="20 um")
    assert set(told(lambda: model(wrong, [case], limits=[limit]))) == {"a.at", "b.at", "running.enters", "x.of"}


# ---- back to words


def test_tables_state_what_was_written_and_no_defaults() -> None:
    table = model(gravity="down").to_table()
    assert table["bearings"]["lay_left"] == {
        "at": "left_journal",
        "holds": ["radial"],
        "stiffness": {"radial": "~93 N/um", "tilt": "~5 N m/mrad"},
    }
    assert table["shafts"]["layshaft"]["segments"][0] == {
        "name": "left_journal",
        "length": "20 mm",
        "diameter": "30 mm",
    }
    assert table["masses"]["disc"]["cg_angle"] == "3 o'clock"
    assert table["gravity"] == "down"
    assert set(table) == {"title", "gravity", "shafts", "bearings", "gears", "masses", "forces", "cases"}
    json.dumps(table)


def test_tables_make_the_same_model() -> None:
    made = model(gravity="down", housing={"seat": {"radial": "~400 N/um", "source": "measured"}})
    again, faults = fs.Model.from_tables(made.to_table())
    assert faults == []
    assert again.to_table() == made.to_table()
    assert again.digest == made.digest


def test_the_digest_is_that_of_the_words() -> None:
    made = model()
    assert made.digest == model().digest
    assert len(made.digest) == 64
    assert made.digest != made.change({"layshaft.seat.diameter": "39 mm"}).digest
    table = made.to_table()
    table["shafts"] = list(table["shafts"].items())
    text = json.dumps(table, sort_keys=True, separators=(",", ":"))
    assert made.digest == hashlib.sha256(text.encode()).hexdigest()


def test_the_digest_knows_the_order_of_shafts_but_not_of_keys() -> None:
    ends = {"left_end": ["0 mm", "0 mm", "0 mm"]}
    two = [shaft("a", **ends), shaft("b", **ends)]
    assert fs.Model("x", two).digest != fs.Model("x", two[::-1]).digest
    pins = [fs.Pin(name, on="a", at="1 mm", holds=["radial"]) for name in "pq"]
    assert fs.Model("x", [*two, *pins]).digest == fs.Model("x", [*two, *pins[::-1]]).digest


def test_pint_quantities_are_accepted() -> None:
    import pint

    unit = pint.UnitRegistry()
    segment = fs.Segment("s", length=38 * unit.mm, diameter=1.5 * unit.inch)
    assert (segment.length.si, segment.length.text) == (0.038, "38 mm")
    assert segment.diameter.text == "1.5 in"
    assert model([fs.Pin("p", at=62 * unit.mm, holds=["tilt"])]).places["p"].x == pytest.approx(0.062)
    assert only(fs.Segment, "s", length=38 * unit.kg, diameter="1 mm")[0] == "s.length"


# ---- several shafts


def two_shafts(*extra: Any, **words: Any) -> fs.Model:
    second = shaft("output", left_end=["0 mm", "0 mm", "112 mm"])
    gears = [
        fs.Gear(name, on=on, at="seat", teeth=20, normal_module="2 mm", facewidth="20 mm", mate="3 o'clock")
        for name, on in (("a", "layshaft"), ("b", "output"))
    ]
    hub = fs.Coupling("c", on="layshaft", at="stub")
    return fs.Model("x", [shaft(), second, *gears, hub, *extra], **words)


def flow(**words: Any) -> fs.Case:
    return fs.Case("running", **({"torque": "3 N m", "turns": "clockwise from left"} | words))


def test_power_stays_on_one_shaft() -> None:
    assert two_shafts(cases=[flow(enters="a", leaves="c", of_shaft="layshaft")]).case("running").torque_si == 3.0
    assert only(lambda: two_shafts(cases=[flow(enters="a", leaves="b")])) == (
        "running.leaves",
        "power passes a on layshaft and b on output, but nothing joins these shafts: gear pairs are not known yet in "
        "this version. Write one case for each shaft.",
    )
    assert only(lambda: two_shafts(cases=[flow(enters="a", leaves="c", of_shaft="output")])) == (
        "running.of_shaft",
        "the power passes on layshaft, not on output. Leave of_shaft out.",
    )


def test_which_shaft_a_position_is_asked_of() -> None:
    made = two_shafts()
    assert made.position("seat", "output") == made.position("seat", "layshaft")
    assert only(lambda: made.position("seat")) == ("position", "which shaft? Known: layshaft, output.")


# ---- bounds


def test_counts_are_bounded(monkeypatch: pytest.MonkeyPatch) -> None:
    pins = [fs.Pin("p", at="1 mm", holds=["radial"])] * 10_001
    assert only(fs.Model, "x", [*pins]) == ("parts", "there are 10001 parts; 10000 at most are computed.")
    tables = {"pins": {f"p{index}": {} for index in range(10_001)}}
    assert fs.Model.from_tables(tables)[1][0].sentence == "there are 10001 pins; 10000 at most are computed."
    monkeypatch.setattr("fe_shaft.model.shaft.MOST_SEGMENTS", 4)
    assert only(shaft) == ("layshaft.segments", "5 segments; 4 at most are computed.")


def test_faults_are_bounded() -> None:
    tables = {f"k{index}": 1 for index in range(2000)}
    assert len(fs.Model.from_tables(tables)[1]) == 500


def test_words_of_the_heading() -> None:
    made = model(question="Why?", units={"force": "lbf"}, estimates={"together": True})
    assert made.question == "Why?"
    assert made.units is not None
    assert made.units.force == "lbf"
    assert made.estimates.together
    assert not model().estimates.together
