"""Model to model: values at addresses, rigid pins, ends of bands."""

from typing import Any

import pytest

import fe_shaft.model as fs
from tests.model.small import bearing, model, shaft
from tests.model.told import only


@pytest.mark.parametrize(
    ("place", "value", "where"),
    [
        ("layshaft.seat.diameter", "44 mm", lambda m: m.segment_arrays["layshaft"].diameter_left[1] == 0.044),
        ("layshaft.material", "steel", lambda m: m["layshaft"].material == "steel"),
        ("lay_left.stiffness.radial", "220 N/um", lambda m: m["lay_left"].diagonal[1] == 220e6),
        ("lay_left.stiffness", {"radial": "220 N/um"}, lambda m: m["lay_left"].diagonal[4] == 0.0),
        ("lay_left.seat.radial", "400 N/um", lambda m: m["lay_left"].seat.radial.si == 4e8),
        ("housing.seat.radial", "400 N/um", lambda m: m["lay_left"].seat.radial.si == 4e8),
        ("wheel.teeth", 86, lambda m: m["wheel"].teeth == 86),
        ("running.power", "7 kW", lambda m: m.case("running").power.si == 7000.0),
        ("running.torque", "90 N m", lambda m: m.case("running").torque_si == 90.0),
        ("lay_left.left_at", "seat.left", None),
        ("x.max", "30 um", lambda m: m.limits[0].max.si == pytest.approx(30e-6)),
        ("own.density", "7000 kg/m^3", lambda m: m.own_materials[0].density.si == 7000.0),
        ("title", "Other", lambda m: m.title == "Other"),
        ("gravity", "down", lambda m: m.gravity_vector[1] < 0),
        ("estimates.together", True, lambda m: m.estimates.together),
        ("pull.couple.up", "3 N m", lambda m: m["pull"].couple.si == (0.0, 3.0, 0.0)),
    ],
)
def test_values_at_addresses(place: str, value: Any, where: Any) -> None:
    own = fs.Material("own", youngs_modulus="200 GPa", poisson_ratio=0.3, density="7800 kg/m^3")
    limit = fs.Limit("x", of="wheel", quantity="deflection", max="20 um")
    made = model(materials=[own], limits=[limit])
    before = made.to_table()
    changes = {place: value} | ({"lay_left.width": "19 mm"} if where is None else {})
    new = made.change(changes)
    assert made.to_table() == before
    if where is None:
        assert new.places["lay_left"].left == pytest.approx(0.02)
        assert new["lay_left"].at is None
    else:
        assert where(new)
    assert new.digest != made.digest


@pytest.mark.parametrize(
    ("place", "sentence"),
    [
        ("weel.teeth", 'nothing is called "weel". Nearest: wheel.'),
        ("wheel.teath", "teath is not a key here. Nearest: teeth."),
        ("wheel", "wheel is a whole table. Name a key in it, or remove and add it."),
        (
            "layshaft.segment_3.length",
            'layshaft.segment_3 has no name, so no address. Name it first: name = "..." in that segment.',
        ),
        ("layshaft.sead.length", 'no segment or key of layshaft is called "sead". Nearest: seat.'),
        ("layshaft.seat", "layshaft.seat is a whole segment. Name a key in it."),
        ("layshaft.axes", "axes is not a key here. Nearest: axis."),
        ("wheel.teeth.number", "teeth has no keys of its own. Write teeth = 85."),
        ("layshaft.seat.diameter.left", 'diameter has no keys of its own. Write diameter = "38 mm".'),
    ],
)
def test_addresses_that_lead_nowhere(place: str, sentence: str) -> None:
    assert only(lambda: model().change({place: "3 mm"}))[1] == sentence


def test_values_at_addresses_are_validated() -> None:
    assert only(lambda: model().change({"layshaft.seat.diameter": 44})) == (
        "layshaft.seat.diameter",
        '44 has no unit. Write "44 mm".',
    )


def test_a_name_of_two_things_is_no_address() -> None:
    made = model(cases=[fs.Case("wheel", forces=["pull"])])
    assert only(lambda: made.change({"wheel.teeth": 3})) == (
        "wheel.teeth",
        '"wheel" is one of gears and one of cases. Rename one of them.',
    )


def test_untouched_nouns_stay_themselves() -> None:
    made = model()
    new = made.change({"wheel.teeth": 86})
    assert new["layshaft"] is made["layshaft"]
    assert new["pinion"] is made["pinion"]


# ---- pins


def test_pinned_bearings_hold_the_same_in_the_same_place() -> None:
    odd = bearing(
        "odd", at="seat", width="10 mm", load_centre="3 mm", offset="20 um", offset_angle="3 o'clock",
        seat={"radial": "100 N/um"},
    )  # fmt: skip
    made = model([odd], housing={"seat": {"radial": "~400 N/um"}})
    pinned = made.pinned()
    assert all(isinstance(each, fs.Pin) for each in pinned.supports)
    assert [each.holds for each in pinned.supports] == [each.holds for each in made.supports]
    assert dict(pinned.places) == dict(made.places)
    assert pinned["odd"].load_centre.si == 0.003
    assert pinned["odd"].offset.si == pytest.approx(20e-6)
    assert pinned.housing is None
    assert pinned.estimated == ()
    assert pinned.segment_arrays["layshaft"] is made.segment_arrays["layshaft"]
    assert pinned["wheel"] is made["wheel"]


def test_a_pinned_model_can_be_written_and_read() -> None:
    pinned = model(housing={"seat": {"radial": "~400 N/um"}}).pinned()
    again, faults = fs.Model.from_tables(pinned.to_table())
    assert faults == []
    assert again.to_table() == pinned.to_table()
    assert "bearings" not in again.to_table()


# ---- bands


def test_estimated_things_by_name() -> None:
    assert model().estimated == ("lay_left",)
    assert model(housing={"seat": {"radial": "~400 N/um"}}).estimated == ("lay_left", "housing")
    assert model(housing={"seat": {"radial": "400 N/um"}}).estimated == ("lay_left",)
    rough_seat = bearing("b", at="seat", stiffness={"radial": "93 N/um"}, seat={"radial": "~100 N/um"})
    assert model([rough_seat]).estimated == ("lay_left", "b")


def test_a_model_at_the_ends_of_its_bands() -> None:
    made = model(housing={"seat": {"radial": "~400 N/um"}})
    low = made.at_band({"lay_left": "low"})
    assert low["lay_left"].diagonal.tolist() == [0.0, 46.5e6, 46.5e6, 0.0, 2.5e3, 2.5e3]
    assert low["lay_left"].seat.radial.si == 4e8
    assert low.estimated == ("housing",)
    both = made.at_band({"lay_left": "high", "housing": "low"})
    assert both["lay_left"].diagonal[1] == 186e6
    assert both["lay_left"].seat.radial.si == 2e8
    assert both["lay_right"].seat.radial.si == 2e8
    assert both.estimated == ()
    assert made["lay_left"].diagonal[1] == 93e6


def test_a_model_at_its_ends_can_be_written_and_read() -> None:
    low = model().at_band({"lay_left": "low"})
    again, faults = fs.Model.from_tables(low.to_table())
    assert faults == []
    assert again["lay_left"].diagonal.tolist() == low["lay_left"].diagonal.tolist()


def test_nothing_certain_has_a_band() -> None:
    assert only(lambda: model().at_band({"lay_right": "low"})) == (
        "lay_right",
        'nothing about "lay_right" is estimated. Known: lay_left.',
    )


def test_shafts_are_not_computed_anew_for_variants() -> None:
    rows = [fs.Segment(f"s{index}", length="1 mm", diameter="20 mm") for index in range(3000)]
    big = fs.Model("x", [fs.Shaft("big", rows, material="steel"), bearing("b", at="s7")])
    assert big.at_band({"b": "low"}).segment_arrays["big"] is big.segment_arrays["big"]
    assert big.change({"big.s7.diameter": "30 mm"}).segment_arrays["big"].diameter_left[7] == 0.03
    assert shaft().numbers["length"] is not None
