"""What `check` understands, held against statics by hand and against the words of the model."""

import json
import math

import pytest

import fe_shaft as fs
from fe_shaft.analysis.check import Check

FLOW = {"enters": "wheel", "leaves": "pinion"}


def layshaft(*, holds=("radial", "axial"), cases=None, gravity="down", shaft=None, **more) -> fs.Model:
    """An invented layshaft: two helical gears between two bearings, an overhung mass."""
    segments = [
        fs.Segment("left_journal", length="19 mm", diameter="30 mm"),
        fs.Segment("wheel_seat", length="38 mm", diameter="38 mm"),
        fs.Segment("pinion_body", length="70 mm", diameter="51 mm"),
        fs.Segment("right_journal", length="19 mm", diameter="30 mm"),
        fs.Segment("stub", length="45 mm", diameter="24 mm"),
    ]
    give = {"radial": "~93 N/um", "tilt": "~5 N m/mrad"}
    right = give | ({"axial": "~60 N/um"} if "axial" in holds else {})
    parts = [
        fs.Shaft("layshaft", segments, material="42CrMo4", **(shaft or {})),
        fs.Bearing("lay_left", at="left_journal", holds=["radial"], stiffness=give),
        fs.Bearing("lay_right", at="right_journal", holds=list(holds), stiffness=right),
        fs.Gear(
            "wheel", at="wheel_seat", teeth=85, normal_module="2 mm", helix="15 deg left", facewidth="32 mm",
            mate="9 o'clock",
        ),
        fs.Gear(
            "pinion", at="pinion_body", teeth=19, normal_module="3 mm", helix="12 deg left", facewidth="50 mm",
            mate="3 o'clock",
        ),
        fs.Mass("handwheel", at="stub", mass="4.1 kg", cg_at="stub.right"),
    ]  # fmt: skip
    running = fs.Case("running", **FLOW, power="5.5 kW", speed="393.7 rpm", turns="clockwise from left")
    return fs.Model("Layshaft", parts, cases or [running], gravity=gravity, **more)


def plain_shaft(*parts, cases=(), gravity=None, **shaft) -> fs.Model:
    segments = [fs.Segment("all", length="400 mm", diameter="40 mm")]
    return fs.Model("Plain", [fs.Shaft("plain", segments, material="C45", **shaft), *parts], cases, gravity=gravity)


PINS = (fs.Pin("a", at="20 mm", holds=["radial", "axial"]), fs.Pin("b", at="380 mm", holds=["radial"]))


# ---- forces and thrust


def test_tooth_forces_and_thrust_follow_statics():
    """Involute gears without friction: F_t = 2 T / d, F_r = F_t tan(alpha) / cos(beta), F_a = F_t tan(beta).

    Geometry of ISO 21771, d = z m_n / cos(beta); statics.
    """
    case = fs.check(layshaft()).cases[0]
    torque = 5500 / (393.7 * 2 * math.pi / 60)
    left = {"wheel": (85, 2e-3, 15, 1), "pinion": (19, 3e-3, 12, -1)}
    thrust = 0.0
    for load in case.loads:
        teeth, module, helix, way = left[load.part]
        beta = math.radians(helix)
        tangential = 2 * torque * math.cos(beta) / (teeth * module)
        assert load.up == pytest.approx(tangential)
        assert load.front == pytest.approx(way * tangential * math.tan(math.radians(20)) / math.cos(beta))
        assert load.axial == pytest.approx(way * tangential * math.tan(beta))
        thrust += load.axial
    assert [load.role for load in case.loads] == ["driven", "drives"]
    balance = case.balances[0]
    assert balance.thrust == pytest.approx(thrust)
    assert balance.thrust_held_by == {"lay_right": pytest.approx(-thrust)}
    assert balance.torque_in == balance.torque_out == pytest.approx(torque)
    assert balance.words[0] == "Thrust left over: 567 N to the left, held by lay_right"
    assert case.torque == pytest.approx(torque)


def test_the_printed_forces_are_those_of_the_record():
    text = str(fs.check(layshaft()))
    assert "wheel   driven  tooth force  1516 N up,  571 N to the front, 406 N to the right" in text
    assert "pinion  drives  tooth force  4579 N up, 1704 N to the back,  973 N to the left" in text
    assert "5.5 kW at 393.7 rpm is 133 N m; clockwise from left (counterclockwise from right)" in text
    assert "Torque in = out: 133.4 N m." in text


def test_the_other_sense_turns_the_thrust_and_coasting_the_roles():
    flow = FLOW | {"torque": "133 N m", "speed": "400 rpm"}
    cases = [
        fs.Case("forward", **flow, turns="clockwise from left"),
        fs.Case("backward", **flow, turns="clockwise from right"),
        fs.Case("coasting", **flow, turns="clockwise from left", coasts=True),
    ]
    forward, backward, coasting = fs.check(layshaft(cases=cases)).cases
    assert forward.balances[0].thrust == pytest.approx(-backward.balances[0].thrust)
    assert coasting.balances[0].thrust == pytest.approx(backward.balances[0].thrust)
    assert [load.role for load in forward.loads] == [load.role for load in backward.loads] == ["driven", "drives"]
    assert [load.role for load in coasting.loads] == ["drives", "driven"]
    assert "coasts" in coasting.power


def test_cases_that_are_multiples_say_so():
    flow = FLOW | {"torque": "133 N m", "speed": "400 rpm", "turns": "clockwise from left"}
    cases = [
        fs.Case("one", **flow),
        fs.Case("two", like="one", torque_factor=2.2),
        fs.Case("back", like="one", turns="clockwise from right"),
        fs.Case("again", like="back"),
    ]
    found = fs.check(layshaft(cases=cases))
    assert [(case.like, round(case.factor, 12)) for case in found.cases] == [
        ("", 1),
        ("one", 2.2),
        ("", 1),
        ("back", 1),
    ]
    assert "forces as in one, all 2.2 times as large" in str(found)
    assert "forces as in back\n" in str(found)
    assert "133 N m at 400 rpm is 5.57 kW, times 2.2 is 293 N m" in str(found)


def test_thrust_shared_by_two_supports_is_told_with_its_amounts():
    """Two equal axial springs on a nearly rigid shaft share a central push in halves (statics of two springs)."""
    spring = {"radial": "100 N/um", "axial": "1 N/um"}
    model = plain_shaft(
        fs.Bearing("a", at="20 mm", holds=["radial", "axial"], stiffness=spring),
        fs.Bearing("b", at="380 mm", holds=["radial", "axial"], stiffness=spring),
        fs.Force("push", at="200 mm", axial="1 kN"),
    )
    balance = fs.check(model).cases[0].balances[0]
    assert balance.thrust == 1000
    assert balance.thrust_held_by == {"a": pytest.approx(-500, rel=1e-3), "b": pytest.approx(-500, rel=1e-3)}
    assert balance.words == ("Thrust left over: 1000 N to the right, held by a (500 N) and b (500 N)", "No torque")


def test_weight_of_a_vertical_shaft_is_thrust():
    """A cylinder of 400 mm x 40 mm and steel of 7850 kg/m^3, standing, and 2 kg on it; g = 9.80665 m/s^2."""
    lump = fs.Mass("lump", at="200 mm", mass="2 kg")
    check = fs.check(plain_shaft(*PINS, lump, gravity="down", axis="+Y", twelve="+Z"))
    mass = 7850 * math.pi / 4 * 0.04**2 * 0.4
    assert check.shafts[0].mass == pytest.approx(mass)
    assert check.cases[0].balances[0].thrust == pytest.approx(-(mass + 2) * 9.80665)
    assert check.cases[0].balances[0].thrust_held_by == {"a": pytest.approx((mass + 2) * 9.80665)}


def test_forces_with_a_lever_turn_the_shaft():
    """1 kN down at 60 mm towards 3 o'clock turns clockwise with 60 N m (lever times force)."""
    brake = fs.Pin("b", at="380 mm", holds=["radial", "spin"])
    kick = fs.Force("kick", at="200 mm", up="-1 kN", radius="60 mm", angle="3 o'clock")
    case = fs.check(plain_shaft(PINS[0], brake, kick)).cases[0]
    assert case.loads[0].torque == pytest.approx(60)
    assert case.loads[0].words[-1] == "60 N m turning it clockwise"
    assert case.balances[0].torque_held_by == {"b": pytest.approx(-60)}
    assert case.balances[0].words[1] == "Torque 60 N m, held by b"


def test_switched_forces():
    push = fs.Force("push", at="200 mm", up="1 kN")
    cases = [fs.Case("on"), fs.Case("off", forces=[]), fs.Case("more", forces={"push": 1.5})]
    on, off, more = fs.check(plain_shaft(*PINS, push, cases=cases)).cases
    assert (on.loads[0].up, off.loads[0].up, more.loads[0].up) == (1000, 0, 1500)
    assert off.loads[0].words == ("switched off",)
    assert "all forces switched off" in off.power
    assert "forces switched on: push x 1.5" in more.power
    assert (more.like, more.factor) == ("on", pytest.approx(1.5))


def test_pulls_are_told_by_the_clock():
    """Parallel runs of 900 N and 300 N pull with 1200 N (sum of two parallel forces)."""
    belt = fs.Pulley(
        "belt", at="300 mm", diameter="160 mm", belt_pull={"tight": "900 N", "slack": "300 N"},
        pulls_towards="7:30 o'clock",
    )  # fmt: skip
    load = fs.check(plain_shaft(*PINS, belt)).cases[0].loads[0]
    assert load.words == ("1200 N towards 7:30 o'clock",)
    assert math.hypot(load.up, load.front) == pytest.approx(1200)


# ---- directions


def test_up_and_front_are_said_of_level_shafts_only():
    assert "1516 N up" in str(fs.check(layshaft()))
    assert "mate 9 o'clock (behind)" in str(fs.check(layshaft()))
    standing = str(fs.check(layshaft(shaft={"axis": "+Y", "twelve": "+Z"})))
    assert "1516 N towards 12 o'clock" in standing
    assert "(behind)" not in standing
    assert "1516 N towards 12 o'clock" in str(fs.check(layshaft(gravity=None)))


# ---- parts


def test_what_a_support_holds_gives_and_leaves_free():
    left, _, _, right, _ = fs.check(layshaft()).shafts[0].parts
    assert left.words == ("holds radial ~93 N/um", "resists tilt ~5 N m/mrad", "free: axial")
    assert right.words == ("holds radial ~93 N/um, axial ~60 N/um", "resists tilt ~5 N m/mrad")
    pins = fs.check(plain_shaft(*PINS)).shafts[0].parts
    assert pins[0].words == ("holds radial, axial, rigid", "free: tilt")
    assert pins[1].words == ("holds radial, rigid", "free: axial, tilt")


def test_seats_stops_offsets_and_matrices():
    rows = [[0.0] * 6 for _ in range(6)]
    for k, size in enumerate((60e3, 93e3, 93e3, 0.0, 5e6, 5e6)):
        rows[k][k] = size
    units = {"force": "N", "length": "mm", "angle": "rad"}
    model = plain_shaft(
        fs.Bearing(
            "stop", at="20 mm", holds=["radial", "stops_left"], load_centre="-3 mm",
            stiffness={"up": "90 N/um", "front": "80 N/um", "axial": "50 N/um"}, seat={"radial": "400 N/um"},
        ),
        fs.Bearing("whole", at="200 mm", holds=["radial"], matrix={"rows": rows, "units": units}),
        fs.Pin("fixed", at="380 mm", holds=["radial", "stops_right"], offset="20 um", offset_angle="4:30 o'clock"),
    )  # fmt: skip
    stop, whole, fixed = fs.check(model).shafts[0].parts
    assert stop.words[0] == "holds radial 90 N/um up and 80 N/um front, axial (left only) 50 N/um"
    assert "seat radial 400 N/um, axial rigid, tilt rigid" in stop.words
    assert "load centre 3 mm to the left of its middle" in stop.words
    assert whole.words[0] == "holds radial, by its 6 x 6 matrix"
    assert fixed.words[-1] == "bore 20 um out of line towards 4:30 o'clock"


def test_places_masses_and_sizes():
    check = fs.check(layshaft())
    shaft = check.shafts[0]
    assert [part.name for part in shaft.parts] == ["lay_left", "wheel", "pinion", "lay_right", "handwheel"]
    assert [part.x for part in shaft.parts] == pytest.approx([0.0095, 0.038, 0.092, 0.1365, 0.1685])
    assert (shaft.length, shaft.thinnest, shaft.thickest) == pytest.approx((0.191, 0.024, 0.051))
    assert shaft.parts[-1].words == ("4.1 kg, its centre of gravity at 191 mm",)
    assert check.counts == ("1 shaft", "2 bearings", "2 gears", "1 mass", "1 case")
    assert "\n   168.5  handwheel  mass " in str(check)


# ---- what is taken, estimated, limited


def test_defaults_are_told_with_their_keys_and_only_if_taken():
    taken = {note.key for note in fs.check(layshaft()).taken}
    assert taken >= {
        "housing.seat",
        "layshaft.shear",
        "wheel.pressure_angle",
        "wheel.hub",
        "wheel.body",
        "mate",
        "wheel.mass",
    }
    other = fs.check(layshaft(shaft={"shear": "none"}, housing={"seat": {"radial": "400 N/um"}}))
    assert not {"housing.seat", "layshaft.shear"} & {note.key for note in other.taken}


def test_what_is_written_but_doubtful_is_a_note_and_not_a_default():
    cases = [fs.Case("running", **FLOW, power="5 kW", speed="400 rpm", turns="clockwise from left", torque_factor=2)]
    check = fs.check(layshaft(cases=cases))
    assert {note.key for note in check.notes} == {"running.torque_factor"}
    assert "running.torque_factor" not in {note.key for note in check.taken}


def test_from_where_twist_is_counted():
    assert "twist counted from pinion, where power leaves" in str(fs.check(layshaft()))
    assert "twist counted from the left end" in str(fs.check(plain_shaft(*PINS)))
    braked = plain_shaft(PINS[0], fs.Pin("b", at="380 mm", holds=["radial", "spin"]))
    assert "twist" not in str(fs.check(braked))


def test_estimates_with_their_bands():
    given = "radial, tilt of lay_left; radial, axial, tilt of lay_right: half to twice"
    assert fs.check(layshaft()).estimates == (given,)
    banded = {"value": "60 N/um", "low": "50 N/um", "high": "90 N/um", "source": "bench"}
    model = plain_shaft(
        fs.Bearing("a", at="20 mm", holds=["radial", "axial"], stiffness={"radial": "90 N/um", "axial": banded}),
        fs.Bearing("b", at="380 mm", holds=["radial"], stiffness={"radial": "90 N/um"}, seat={"radial": "~400 N/um"}),
    )
    check = fs.check(model)
    assert check.estimates == ("axial of a: ~60 N/um, 50 to 90 N/um", "seat radial of b: half to twice")
    assert check.sources["a.stiffness.axial"] == "bench"
    assert "C45" in check.sources
    assert "bench" not in str(check)
    assert "a.stiffness.axial: bench" in check.text(sources=True)
    assert not fs.check(plain_shaft(*PINS)).estimates


def test_the_housings_estimate_counts_only_where_a_bearing_stands_in_it():
    seat = {"seat": {"radial": "~400 N/um"}}
    assert fs.check(layshaft(housing=seat)).estimates[0].endswith("seat radial of housing: half to twice")
    rigid = {"radial": "900 N/um"}
    supports = [
        fs.Bearing("a", at="20 mm", holds=["radial", "axial"], stiffness=rigid | {"axial": "90 N/um"}, seat=rigid),
        fs.Bearing("b", at="380 mm", holds=["radial"], stiffness=rigid, seat=rigid),
    ]
    shaft = plain_shaft(*supports).parts
    assert fs.check(fs.Model("Own seats", shaft, housing=seat)).estimates == ()


def test_limits_in_words():
    limits = [
        fs.Limit("deflection", of="wheel", quantity="deflection", max="20 um", source="own rule"),
        fs.Limit("tilt", of="every bearing", quantity="tilt", max="1 mrad", cases=["running"]),
        fs.Limit("range", of="pinion", quantity="up", min="-5 um", max="9 um"),
    ]
    check = fs.check(layshaft(limits=limits))
    assert check.limits == (
        "deflection: deflection of wheel at most 20 um",
        "tilt: tilt of lay_left and lay_right at most 1 mrad; running",
        "range: up of pinion at least -5 um and at most 9 um",
    )
    assert check.sources["deflection"] == "own rule"


# ---- what cannot be solved


def test_a_free_motion_is_a_finding_and_all_else_is_told():
    check = fs.check(layshaft(holds=("radial",)))
    assert not check.ok
    assert check.exit_code == 4
    assert "layshaft can slide along its axis" in check.obstacle
    assert check.cases[0].balances[0].words[0] == "Thrust left over: 567 N to the left"
    assert check.cases[0].balances[0].thrust_held_by == {}
    assert str(check).splitlines()[0].startswith("Layshaft: its words are valid, but it cannot be solved. 1 shaft")
    assert check.obstacle in str(check)


def test_torque_that_nothing_takes_out():
    cases = [fs.Case("running", enters="wheel", torque="50 N m", speed="400 rpm", turns="clockwise from left")]
    check = fs.check(layshaft(cases=cases))
    assert (check.ok, check.exit_code) == (False, 4)
    assert "nothing takes" in check.obstacle


def test_torque_left_over_is_taken_out_where_power_leaves():
    couple = fs.Force("couple", at="100 mm", couple={"axial": "10 N m"})
    wheel = fs.Gear("gear", at="200 mm", pitch_diameter="100 mm", facewidth="20 mm", mate="9 o'clock")
    out = fs.Coupling("out", at="350 mm")
    case = fs.Case(
        "running", enters="gear", leaves="out", torque="50 N m", speed="400 rpm", turns="clockwise from left"
    )
    check = fs.check(plain_shaft(*PINS, couple, wheel, out, cases=[case]))
    balance = check.cases[0].balances[0]
    assert (balance.torque_in, balance.torque_out) == pytest.approx((60, 50))
    assert balance.torque_held_by == {"out": pytest.approx(-10)}
    assert balance.words[1] == "Torque in 60 N m, out 50 N m; 10 N m taken out at out"
    assert any("taken out at out" in note.sentence for note in check.notes)


def test_one_way_stops_hold_the_thrust_that_comes_their_way():
    """A push to the left is held by what stops it there, a push to the right by the other."""
    supports = [
        fs.Pin("a", at="20 mm", holds=["radial", "stops_left"]),
        fs.Pin("b", at="380 mm", holds=["radial", "stops_right"]),
    ]
    push = fs.Force("push", at="200 mm", axial="1 kN", up="1 kN")
    cases = [fs.Case("to_right"), fs.Case("to_left", forces={"push": -1.0})]
    right, left = fs.check(plain_shaft(*supports, push, cases=cases)).cases
    assert right.balances[0].thrust_held_by == {"b": pytest.approx(-1000)}
    assert left.balances[0].thrust_held_by == {"a": pytest.approx(1000)}


def test_stops_without_thrust_in_one_case():
    """A push one way in one case and none in the next: other stops act, all cases stand in one result."""
    supports = [
        fs.Pin("a", at="20 mm", holds=["radial", "stops_left"]),
        fs.Pin("b", at="380 mm", holds=["radial", "stops_right"]),
    ]
    push = fs.Force("push", at="200 mm", axial="1 kN")
    cases = [fs.Case("pushed"), fs.Case("idle", forces=[])]
    pushed, idle = fs.check(plain_shaft(*supports, push, cases=cases)).cases
    assert pushed.balances[0].thrust_held_by == {"b": pytest.approx(-1000)}
    assert idle.balances[0].thrust_held_by == {}
    assert idle.balances[0].words[0] == "No thrust left over"


# ---- the text and the record


def test_text_is_plain_and_fits():
    mate = {"mate": "9 o'clock", "pitch_diameter": "100 mm", "facewidth": "20 mm"}
    gear = fs.Gear("a_gear_with_a_name_that_is_far_too_long_for_its_column_by", at="200 mm", **mate)
    twin = fs.Gear("a_gear_with_a_name_that_is_far_too_long_for_its_column_in", at="250 mm", **mate)
    omega = "\N{GREEK CAPITAL LETTER OMEGA}"
    case = fs.Case("of", enters=gear.name, leaves=twin.name, torque="5 N m", turns="clockwise from left")
    text = str(fs.check(fs.Model(omega, plain_shaft(*PINS, gear, twin).parts, [case])))
    assert text.isascii()
    assert max(map(len, text.splitlines())) <= 100
    rows = [row.split()[1] for row in text.splitlines() if " gear " in row and "d 100 mm" in row]
    assert len(set(rows)) == 2


def test_cases_shown_in_full():
    flow = FLOW | {"torque": "133 N m", "speed": "400 rpm"}
    cases = [
        fs.Case("forward", **flow, turns="clockwise from left"),
        fs.Case("backward", **flow, turns="clockwise from right"),
    ]
    check = fs.check(layshaft(cases=cases))
    assert check.text().count("tooth force") == 2
    assert "--case backward" in check.text()
    assert check.text(cases=["forward", "backward"]).count("tooth force") == 4
    assert "--case" not in check.text(cases=["forward", "backward"])
    with pytest.raises(fs.UsageError, match="Nearest: backward"):
        check.text(cases=["backwart"])


def test_units_of_the_outputs():
    text = str(fs.check(layshaft(units={"force": "lbf", "length": "in"})))
    assert "341 lbf up" in text  # 1516 N / 4.4482216 N
    assert "5.5 kW at 393.7 rpm is 1181 lbf in" in text  # 133.4 N m / (4.4482216 N 0.0254 m)
    assert "Torque in = out: 1181 lbf in" in text
    assert not [line for line in text.splitlines() if " N m" in line and "N m/mrad" not in line]
    assert "7.52 in long" in text


def test_record_and_notebook():
    check = fs.check(layshaft())
    assert isinstance(check, Check)
    record = json.loads(check.to_json())
    assert record["format"] == "fe_shaft check"
    assert record["ok"] is True
    assert record["cases"][0]["balances"][0]["thrust_held_by"] == check.cases[0].balances[0].thrust_held_by
    assert check._repr_html_().startswith("<pre")


def test_several_shafts_are_told_apart():
    other = fs.Shaft(
        "other", [fs.Segment("all", length="300 mm", diameter="30 mm")], material="C45",
        left_end=["0 mm", "-200 mm", "0 mm"],
    )  # fmt: skip
    first = fs.Shaft("first", [fs.Segment("whole", length="300 mm", diameter="30 mm")], material="C45")
    parts = [first, other]
    for name in ("first", "other"):
        parts.append(fs.Pin(f"{name}_a", on=name, at="10 mm", holds=["radial", "axial"]))
        parts.append(fs.Pin(f"{name}_b", on=name, at="290 mm", holds=["radial"]))
    parts.append(fs.Force("push", on="other", at="100 mm", axial="-70 N"))
    check = fs.check(fs.Model("Two", parts))
    assert [shaft.name for shaft in check.shafts] == ["first", "other"]
    assert [balance.thrust for balance in check.cases[0].balances] == [0, -70]
    assert "    other: Thrust left over: 70 N to the left, held by other_a." in str(check)
    assert "first: No thrust" not in str(check)
