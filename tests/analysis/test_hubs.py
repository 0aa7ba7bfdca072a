"""Hubs, keyways, splines and gear bodies in the solution: each against the same shaft written another way."""

import numpy as np
import pytest

import fe_shaft as fs

CLAMP = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
TIP = fs.Force("tip", at="200 mm", up="3 kN", couple={"axial": "80 N m"}, axial="2 kN")
PLAIN = [fs.Segment("root", length="60 mm", diameter="50 mm"), fs.Segment("seat", length="140 mm", diameter="40 mm")]


def solved(segments, *parts, **words):
    shaft = fs.Shaft("shaft", segments, material="42CrMo4")
    return fs.solve(fs.Model("hubs", [shaft, CLAMP, TIP, *parts], gravity="down", **words))


def ring(**words):
    return fs.Mass("ring", at="120 mm", mass="0 kg", hub_diameter="70 mm", hub_length="30 mm", **words)


def collar(diameter):
    return [
        PLAIN[0],
        fs.Segment(length="45 mm", diameter="40 mm"),
        fs.Segment(length="30 mm", diameter=f"{diameter!r} mm"),
        fs.Segment(length="65 mm", diameter="40 mm"),
    ]


def tip_of(results):
    return results["tip"].u[0]


def own_weight(results):
    """What the shaft's own weight puts on the clamp, without the load at the tip [N]."""
    return -results["clamp"].up_force[0] - 3000


@pytest.mark.parametrize("shoulders", ["on", "off"])
def test_a_hub_in_one_piece_is_a_collar_without_its_weight(shoulders):
    hub = solved(PLAIN, ring(hub="one piece"), shoulders=shoulders)
    steel = fs.Material("light", youngs_modulus="210 GPa", shear_modulus="81 GPa", density="7850 kg/m^3")
    drawn = solved(PLAIN, shoulders=shoulders)
    assert own_weight(hub) == pytest.approx(own_weight(drawn), rel=1e-9)
    segments, weightless = collar(70.0), {"shoulders": shoulders}
    one = fs.Model("a", [fs.Shaft("shaft", segments, material="light"), CLAMP, TIP], materials=[steel], **weightless)
    other = fs.Model(
        "b", [fs.Shaft("shaft", PLAIN, material="light"), CLAMP, TIP, ring(hub="one piece")],
        materials=[steel], **weightless,
    )  # fmt: skip
    np.testing.assert_allclose(tip_of(fs.solve(other)), tip_of(fs.solve(one)), rtol=1e-11, atol=1e-18)


def test_a_share_lies_between_none_and_one_piece_and_takes_its_share_of_the_flexibility():
    """Without shoulders and shear, the slope under a pure moment falls by the share."""
    bend = fs.Force("bend", at="200 mm", couple={"front": "100 N m"})

    def slope(**words):
        shaft = fs.Shaft("shaft", PLAIN, material="42CrMo4", shear="none")
        model = fs.Model("hubs", [shaft, CLAMP, bend, ring(**words)], shoulders="off")
        return fs.solve(model)["bend"].u[0, 5]

    none, half, one = slope(hub="none"), slope(hub=0.3), slope(hub="one piece")
    assert none - half == pytest.approx(0.3 * (none - one), rel=1e-9)
    assert slope() == none


def test_weights_of_a_cone_under_a_hub_stay_those_of_the_drawing():
    cone = [PLAIN[0], fs.Segment(length="140 mm", diameter="46 mm", end_diameter="34 mm", bore="10 mm")]
    none, one = (solved(cone, ring(hub=hub)) for hub in ("none", "one piece"))
    assert own_weight(one) == pytest.approx(own_weight(none), rel=1e-12)
    np.testing.assert_allclose(one["clamp"].tilt_moment, none["clamp"].tilt_moment, rtol=1e-12)
    assert one.proof.worst < 1e-12
    assert one["tip"].deflection < none["tip"].deflection


def test_pictures_show_the_drawing_not_the_hub():
    line = solved(PLAIN, ring(hub="one piece")).lines["shaft"]
    assert line.diameter_right.max() == pytest.approx(0.05)


def test_a_keyway_is_a_segment_of_its_effective_diameter_that_weighs_as_drawn():
    key = {"width": "12 mm", "depth": "5 mm", "effective_diameter": "38 mm"}
    keyed = [PLAIN[0], fs.Segment("seat", length="140 mm", diameter="40 mm", keyway=key)]
    thin = [PLAIN[0], fs.Segment("seat", length="140 mm", diameter="38 mm")]
    assert own_weight(solved(keyed)) == pytest.approx(own_weight(solved(PLAIN)), rel=1e-9)
    for component in (0, 3):  # weight has no part in these
        assert tip_of(solved(keyed))[component] == pytest.approx(tip_of(solved(thin))[component], rel=1e-12)


def test_verdicts_hang_on_keyways_and_assumed_hubs_through_their_ends():
    limit = fs.Limit("stiff", of="tip", quantity="deflection", max="1 mm")
    key = {"width": "12 mm", "depth": "5 mm"}
    keyed = [PLAIN[0], fs.Segment("seat", length="140 mm", diameter="40 mm", keyway=key)]
    results = solved(keyed, ring(hub=0.5), limits=[limit])
    assert results.model.estimated == ("ring", "shaft.seat")

    def tip(diameter, hub):
        other = [PLAIN[0], fs.Segment("seat", length="140 mm", diameter="40 mm", keyway=key | diameter)]
        return solved(other, ring(hub=hub))["tip"].deflection[0]

    band = results.verdicts[0].band
    assert band.all_low == pytest.approx(tip({"effective_diameter": "35 mm"}, "none"), rel=1e-12)
    assert band.all_high == pytest.approx(tip({"effective_diameter": "40 mm"}, "one piece"), rel=1e-12)
    assert band.worst == band.all_low
    assert "ring soft, shaft.seat soft" in band.mix
    none, one = results.verdicts[0].hubs
    assert none == pytest.approx(tip({}, "none"), rel=1e-12)
    assert one == pytest.approx(tip({}, "one piece"), rel=1e-12)
    said = str(results)
    assert "hubs none to one piece" in said
    assert "hub ~0.5 (none to one piece): ring" in said
    assert "keyway ~38" in said


def test_verdicts_show_the_band_of_hubs_that_nothing_is_said_of():
    limit = fs.Limit("stiff", of="tip", quantity="deflection", max="1 mm")
    silent = solved(PLAIN, ring(), limits=[limit])
    assert silent.verdicts[0].band is None
    assert silent.verdicts[0].hubs[0] == silent.verdicts[0].value > silent.verdicts[0].hubs[1]
    assert solved(PLAIN, limits=[limit]).verdicts[0].hubs is None
    assert any(note.key == "ring.hub" for note in silent.notes)


def test_a_gear_needs_no_size_for_its_hub():
    """Root diameter of the basic rack: z m / cos(beta) - 2.5 m (ISO 53 and ISO 21771; from memory)."""
    gear = fs.Gear("gear", at="120 mm", teeth=40, normal_module="2 mm", facewidth="30 mm", hub="one piece")
    size = {"hub_diameter": "75 mm", "hub_length": "30 mm"}
    same = fs.Mass("same", at="120 mm", mass="0 kg", hub="one piece", **size)
    assert solved(PLAIN, gear).model.hubs == ("gear",)
    np.testing.assert_allclose(tip_of(solved(PLAIN, gear)), tip_of(solved(PLAIN, same)), rtol=1e-11, atol=1e-18)


def test_a_hub_on_a_cone_need_only_be_thicker_than_what_lies_in_it():
    cone = [fs.Segment("cone", length="200 mm", diameter="80 mm", end_diameter="40 mm")]  # 65 to 59 mm in the ring
    words = {"at": "90 mm", "mass": "0 kg", "hub": "one piece", "hub_length": "30 mm"}
    carried = solved(cone, fs.Mass("ring", hub_diameter="66 mm", **words))
    assert carried.model.hubs == ("ring",)
    assert tip_of(carried)[1] < tip_of(solved(cone))[1]
    with pytest.raises(fs.ModelError, match="the hub is 64 mm thick and the shaft in it 65 mm"):
        solved(cone, fs.Mass("ring", hub_diameter="64 mm", **words))


def test_sizes_ends_and_overlaps_of_hubs_that_carry_are_said():
    gear = fs.Gear("gear", at="120 mm", teeth=40, normal_module="2 mm", facewidth="30 mm", hub="one piece")
    over = fs.Mass("over", at="195 mm", mass="0 kg", hub=0.5, hub_diameter="60 mm", hub_length="30 mm")
    said = {note.key: note.sentence for note in solved(PLAIN, gear, over).notes}
    assert said["gear.hub_diameter"] == "hub as thick as the root of its teeth, 75 mm: gear"
    assert said["over.hub_length"] == "the hub of over reaches 10 mm over an end"
    beside = fs.Mass("beside", at="140 mm", mass="0 kg", hub=0.5, hub_diameter="60 mm", hub_length="20 mm")
    assert "gear and beside overlap" in str([note.sentence for note in solved(PLAIN, gear, beside).notes])
    quiet = fs.Mass("beside", at="145 mm", mass="0 kg", hub=0.5, hub_diameter="60 mm", hub_length="20 mm")
    assert not any("hub_length" in note.key for note in solved(PLAIN, gear, quiet).notes)


HELD = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])


def geared(held=HELD, limits=(), **words):
    gear = fs.Gear(
        "gear", at="120 mm", teeth=40, normal_module="2 mm", facewidth="20 mm", helix="15 deg left", mate="9 o'clock",
        **words,
    )  # fmt: skip
    out = fs.Coupling("out", at="0 mm")
    case = fs.Case("run", enters="gear", leaves="out", torque="100 N m", speed="900 rpm", turns="clockwise from left")
    shaft = fs.Shaft("shaft", PLAIN, material="42CrMo4")
    return fs.solve(fs.Model("geared", [shaft, held, gear, out], [case], limits=limits))


def test_what_stands_on_pins_beneath_a_verdict_is_the_shaft_and_the_gears_body():
    limits = [fs.Limit("straight", of="gear", quantity="slope", max="1 mrad")]
    spring = {"radial": "100 N/um", "axial": "100 N/um", "tilt": "5 N m/mrad"}
    held = fs.Bearing("held", at="0 mm", holds=["radial", "axial", "tilt"], stiffness=spring)
    rigid, soft = (geared(held, limits, **body) for body in ({}, {"body": {"tilt": "100 N m/mrad"}}))
    assert "; shaft alone (rigid pins)" in " ".join(str(rigid).split())
    assert "; shaft and gear body alone (rigid pins)" in " ".join(str(soft).split())


def test_a_gear_body_moves_the_rim_by_its_springs_and_the_shaft_not_at_all():
    """Springs in series with the shaft: the rim moves by force over stiffness and tilts by moment over stiffness."""
    rigid, soft = geared(), geared(body={"radial": "500 N/um", "tilt": "~100 N m/mrad"})
    np.testing.assert_array_equal(soft.lines["shaft"].u, rigid.lines["shaft"].u)
    load = rigid["gear"].load[0]
    moved = soft["gear"].u[0] - rigid["gear"].u[0]
    np.testing.assert_allclose(moved, load * np.array([0, 1 / 5e8, 1 / 5e8, 0, 1 / 1e5, 1 / 1e5]), atol=1e-15)
    assert soft["gear"].body_movement[0] == pytest.approx(np.hypot(*load[1:3]) / 5e8, rel=1e-12)
    assert soft["gear"].body_tilt[0] == pytest.approx(np.hypot(*load[4:]) / 1e5, rel=1e-12)
    assert soft.model.estimated == ("gear",)
    low = fs.solve(soft.model.at_band({"gear": "low"}))["gear"]
    assert low.body_tilt[0] == pytest.approx(2 * soft["gear"].body_tilt[0], rel=1e-12)
    assert "of it gear's body" in str(soft)
    assert any(note.key == "gear.body" for note in rigid.notes)
    assert not any(note.key == "gear.body" for note in soft.notes)


def test_check_tells_how_large_a_hub_is():
    shaft = fs.Shaft("shaft", PLAIN, material="42CrMo4")
    told = str(fs.check(fs.Model("hubs", [shaft, CLAMP, TIP, ring(hub=0.5)])))
    assert "hub 0.5 of one piece, assumed: 70 mm thick, 30 mm long" in told
    told = str(fs.check(fs.Model("hubs", [shaft, CLAMP, TIP, ring(hub="one piece")])))
    assert "hub one piece: 70 mm thick, 30 mm long" in told
