"""Keyways, splines, hubs and gear bodies in words: what they count as, and a sentence for each mistake."""

import pytest

import fe_shaft as fs

KEY = {"width": "10 mm", "depth": "5 mm"}


def segment(**words):
    return fs.Segment("seat", length="38 mm", diameter="38 mm", **words)


def refused(make, *parts):
    with pytest.raises(fs.ModelError) as told:
        make()
    for part in parts:
        assert part in str(told.value)


def test_what_a_keyway_counts_as():
    """k = 1 + 0.4 w/d + 0.7 t/d of twists (Moore 1909, from memory), so d k^(-1/4); full: the circle that is left."""
    d = 0.038
    one, two = (fs.Keyway(**KEY, count=count).counted(d) for count in (1, 2))
    assert one.effective == pytest.approx(d * (1 + 0.4 * 10 / 38 + 0.7 * 5 / 38) ** -0.25, rel=1e-12)
    assert two.effective == pytest.approx(d * (1 + 0.8 * 10 / 38 + 1.4 * 5 / 38) ** -0.25, rel=1e-12)
    assert (one.full, two.full) == pytest.approx((0.033, 0.028), rel=1e-12)
    assert one.ignored == d
    assert fs.Keyway(**KEY, effective_diameter="36 mm").counted(d).effective == 0.036


def test_what_splines_count_as():
    assert fs.Spline(root_diameter="36 mm").counted(0.040) == pytest.approx((0.036, 0.037, 0.040), rel=1e-12)
    assert fs.Spline(root_diameter="36 mm", effective_diameter="38 mm").counted(0.040).effective == 0.038


def test_they_stand_in_a_model_file_and_come_back(tmp_path):
    shaft = fs.Shaft("shaft", [segment(keyway=KEY), segment().__class__("stub", length="40 mm", diameter="30 mm",
        spline={"root_diameter": "26 mm"})], material="C45")  # fmt: skip
    held = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])
    wheel = fs.Mass("wheel", at="20 mm", mass="1 kg", hub=0.4, hub_diameter="80 mm", hub_length="20 mm")
    path = tmp_path / "m.toml"
    fs.write(fs.Model("m", [shaft, held, wheel]), path)
    again = fs.read(path)
    assert again.estimated == ("wheel", "shaft.seat", "shaft.stub")
    assert again["wheel"].hub == 0.4
    assert again["shaft"].segments[0].keyway.depth.text == "5 mm"
    assert again.change({"wheel.hub": "one piece"}).estimated == ("shaft.seat", "shaft.stub")
    deeper = again.change({"shaft.seat.keyway.depth": "6 mm"})
    assert deeper["shaft"].segments[0].keyway.counted(0.038).full == pytest.approx(0.032)


def test_a_band_written_with_an_effective_diameter_counts():
    key = KEY | {"effective_diameter": {"value": "36 mm", "low": "35 mm", "high": "37 mm"}}
    held = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])
    model = fs.Model("m", [fs.Shaft("shaft", [segment(keyway=key)], material="C45"), held])
    ends = [model.at_band({"shaft.seat": end})["shaft"].segments[0].keyway for end in ("low", "high")]
    assert [end.counted(0.038).effective for end in ends] == pytest.approx([0.035, 0.037], rel=1e-12)
    assert "keyway ~36 mm (35 to 37 mm): shaft.seat" in str(fs.solve(model))


def test_no_segment_takes_the_address_of_another_without_a_name():
    """Its keyway would hide that of the other one."""
    rows = [fs.Segment("segment_2", length="30 mm", diameter="38 mm"), fs.Segment(length="30 mm", diameter="38 mm")]
    refused(lambda: fs.Shaft("shaft", rows, material="C45"), "segment_2", "what segment 2 is called without a name")
    assert fs.Shaft("shaft", rows[::-1], material="C45").segment_index == {"segment_2": 1}


@pytest.mark.parametrize(
    ("words", "said"),
    [
        ({"keyway": KEY, "spline": {"root_diameter": "36 mm"}}, "spline stands beside keyway"),
        ({"keyway": KEY, "end_diameter": "36 mm"}, "a cone carries no keyway here"),
        ({"spline": {"root_diameter": "36 mm"}, "end_bore": "6 mm", "bore": "4 mm"}, "a cone carries no spline"),
        ({"keyway": {"width": "10 mm", "depth": "20 mm"}, "bore": "20 mm"}, "no wall. Make it less deep."),
        ({"spline": {"root_diameter": "42 mm"}}, "it is thicker than the segment (38 mm)"),
        ({"keyway": KEY | {"effective_diameter": "30 mm"}}, "30 mm is not between 33 mm (all of it taken away)"),
        ({"spline": {"root_diameter": "36 mm", "effective_diameter": "39 mm"}}, "is not between 36 mm"),
        ({"keyway": {"width": "38 mm", "depth": "5 mm"}}, "one keyway of 38 mm leaves nothing of 38 mm"),
        ({"keyway": {"width": "27 mm", "depth": "5 mm", "count": 4}}, "4 keyways of 27 mm leave nothing of 38 mm"),
        (
            {"keyway": KEY | {"effective_diameter": {"value": "36 mm", "low": "32 mm", "high": "37 mm"}}},
            "36 mm is not between 33 mm",
        ),
        ({"keyway": {"depth": "5 mm"}}, 'width is not written. Write width = "10 mm".'),
        ({"keyway": {"width": 10, "depth": "5 mm"}}, '10 has no unit. Write "10 mm".'),
        ({"keyway": KEY | {"count": 9}}, "9 is not possible here. Write 1 to 4."),
        ({"spline": "36 mm"}, "is text, not a table"),
    ],
)
def test_mistakes_of_segments(words, said):
    refused(lambda: segment(**words), "seat", said)


@pytest.mark.parametrize(
    ("words", "said"),
    [
        (
            {"hub": "one piece", "hub_length": "20 mm"},
            'hub_diameter is not written, but hub is. Write hub_diameter = "60',
        ),
        ({"hub": 0.5, "hub_diameter": "60 mm"}, "hub_length is not written, but hub is."),
        ({"hub": "solid"}, '"solid" says nothing about a hub. Write "none", "one piece", or'),
        ({"hub": 1.5}, "1.5 says nothing about a hub."),
    ],
)
def test_mistakes_of_hubs(words, said):
    refused(lambda: fs.Mass("wheel", at="20 mm", mass="1 kg", **words), "wheel", said)


def test_a_hub_must_reach_out_of_its_shaft():
    shaft = fs.Shaft("shaft", [segment()], material="C45")
    held = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])
    wheel = fs.Mass("wheel", at="20 mm", mass="1 kg", hub="one piece", hub_diameter="38 mm", hub_length="20 mm")
    refused(
        lambda: fs.Model("m", [shaft, held, wheel]), "wheel.hub", "the hub is 38 mm thick and the shaft in it 38 mm"
    )
    assert fs.Model("m", [shaft, held, wheel.with_hub("none")]).hubs == ()


def test_an_empty_gear_body_says_nothing():
    refused(
        lambda: fs.Gear("g", at="20 mm", teeth=40, normal_module="2 mm", facewidth="20 mm", body={}),
        "g.body", "the table is empty. Write { tilt",
    )  # fmt: skip


def test_a_band_that_nothing_reads_is_told():
    wide = {"value": "80 mm", "low": "70 mm", "high": "90 mm"}
    held = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])
    wheel = fs.Mass("wheel", at="20 mm", mass="1 kg", hub=0.5, hub_diameter=wide, hub_length="20 mm")
    thick = fs.Segment("thick", length="30 mm", diameter={"value": "40 mm", "low": "39 mm", "high": "41 mm"})
    shaft = fs.Shaft("shaft", [segment(keyway=KEY), thick], material="C45")
    told = {note.key for note in fs.Model("m", [shaft, held, wheel]).notes if "band is not used" in note.sentence}
    assert told == {"wheel.hub_diameter", "shaft.thick.diameter"}
