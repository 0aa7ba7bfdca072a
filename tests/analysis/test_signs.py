"""One test for each sign: which way is positive, and whose force it is.

The shaft's frame: x to the right, 12 o'clock is up (+y), 3 o'clock is the front (+z); seen from the left end along x,
clockwise is positive. Turns by the right hand. Section forces act on the face that looks to the right. Reactions act ON
the shaft. Sources stand beside the tests; where none stands, it is the convention itself that is held.
"""

from __future__ import annotations

import math

import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.model.actions import actions
from tests.models import bar, layshaft, matrix

TORQUE = {"torque": "100 N m", "turns": "clockwise from left"}
CLAMP = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])


def cantilever(*parts, **heading):
    """Clamped at its left end, loaded at its right one: (tip movement, section force in the middle)."""
    results = fs.solve(fs.Model("", [bar(), CLAMP, *parts], **heading))
    station = results.case()["shaft"].at("100 mm")
    return results.case()["shaft"].at("200 mm").u, station.section_force


def tip(**words):
    return fs.Force("tip", at="200 mm", **words)


def load_of(model, part):
    """Wrench of a part's own loads on the shaft's axis in the first case."""
    return fs.solve(model)[part].load[0]


# ---- movements and section forces, by common statics of a cantilever


def test_up_is_twelve_and_bends_it_about_three():
    u, force = cantilever(tip(up="1 kN"))
    assert u[1] > 0  # uy
    assert u[5] > 0  # rz: dv/dx = theta_z
    np.testing.assert_allclose(force, [0, 1000, 0, 0, 0, 1000 * 0.1], atol=1e-9)


def test_front_is_three_and_bends_it_the_other_way_about_twelve():
    u, force = cantilever(tip(front="1 kN"))
    assert u[2] > 0  # uz
    assert u[4] < 0  # ry: dw/dx = -theta_y
    np.testing.assert_allclose(force, [0, 0, 1000, 0, -1000 * 0.1, 0], atol=1e-9)


def test_axial_is_to_the_right_and_tension_is_positive():
    u, force = cantilever(tip(axial="1 kN"))
    assert u[0] > 0
    np.testing.assert_allclose(force, [1000, 0, 0, 0, 0, 0], atol=1e-9)


def test_couples_turn_by_the_right_hand():
    u, force = cantilever(tip(couple={"axial": "10 N m", "up": "20 N m", "front": "30 N m"}))
    assert u[3] > 0
    assert u[4] > 0
    assert u[5] > 0
    assert u[1] > 0  # about 3 o'clock: the right end rises
    assert u[2] < 0  # about 12 o'clock: the right end goes to the back
    np.testing.assert_allclose(force, [0, 0, 0, 10, 20, 30], atol=1e-9)


@pytest.mark.parametrize(
    ("words", "couple"),
    [
        ({"up": "1 kN", "angle": "3 o'clock"}, (-50, 0, 0)),  # at the front, up: counterclockwise from the left
        ({"up": "1 kN", "angle": "9 o'clock"}, (50, 0, 0)),
        ({"front": "1 kN", "angle": "12 o'clock"}, (50, 0, 0)),  # on top, to the front: clockwise
        ({"axial": "1 kN", "angle": "12 o'clock"}, (0, 0, -50)),  # on top, to the right: the right end goes down
        ({"axial": "1 kN", "angle": "3 o'clock"}, (0, 50, 0)),
    ],
)
def test_a_force_beside_the_axis_turns_it(words, couple):
    _, force = cantilever(tip(radius="50 mm", **words))
    moment = force[3:].copy()
    moment[1] += force[2] * 0.1  # seen from the tip: what the lever to the middle adds is taken off
    moment[2] -= force[1] * 0.1
    np.testing.assert_allclose(moment, couple, atol=1e-9)


def test_gravity_down_is_six_oclock_and_an_off_axis_mass_turns_the_shaft():
    crank = fs.Mass("crank", at="200 mm", mass="10 kg", cg_radius="40 mm", cg_angle="9 o'clock")
    u, force = cantilever(crank, gravity="down")
    assert u[1] < 0
    # weight of the mass times its arm; at 9 o'clock it turns the shaft counterclockwise seen from the left
    assert force[3] == pytest.approx(-10 * 9.80665 * 0.04, rel=1e-12)


def test_reactions_act_on_the_shaft():
    pins = [
        fs.Pin("lay_left", at="0 mm", holds=["radial", "axial"]),
        fs.Pin("lay_right", at="200 mm", holds=["radial"]),
    ]
    load = fs.Force("load", at="150 mm", up="1 kN", front="-400 N", axial="-200 N")
    results = fs.solve(fs.Model("", [bar(), *pins, load])).case()
    # lever rule: three quarters of the load at the right pin
    np.testing.assert_allclose(results["lay_left"].wrench[:3], [200, -250, 100], rtol=1e-12)
    np.testing.assert_allclose(results["lay_right"].wrench[:3], [0, -750, 300], rtol=1e-12, atol=1e-12)
    assert (results["lay_left"].up_force_N, results["lay_right"].front_force_N) == (
        pytest.approx(-250),
        pytest.approx(300),
    )


# ---- supports


def beam(middle, *loads):
    ends = [
        fs.Pin("lay_left", at="0 mm", holds=["radial", "axial"]),
        fs.Pin("lay_right", at="200 mm", holds=["radial"]),
    ]
    return fs.solve(fs.Model("", [bar(), *ends, middle, *loads])).case()


@pytest.mark.parametrize(
    ("angle", "up", "front"), [("12 o'clock", 20, 0), ("3 o'clock", 0, 20), ("7:30 o'clock", -14.142136, -14.142136)]
)
@pytest.mark.parametrize("kind", ["pin", "bearing"])
def test_a_bore_out_of_line_takes_the_shaft_with_it(kind, angle, up, front):
    place = {"at": "100 mm", "holds": ["radial"], "offset": "20 um", "offset_angle": angle}
    stiff = {"stiffness": {"radial": "1e15 N/m", "range_check": "off"}}
    middle = fs.Pin("mid", **place) if kind == "pin" else fs.Bearing("mid", **place, **stiff)
    results = beam(middle)
    assert results["mid"].up_um == pytest.approx(up, abs=1e-5)
    assert results["mid"].front_um == pytest.approx(front, abs=1e-5)
    # the bore pulls the shaft its way, the other pins pull it back
    assert results["mid"].wrench[1:3] @ [up, front] > 0
    assert results["lay_left"].wrench[1:3] @ [up, front] < 0


@pytest.mark.parametrize(
    ("angle", "dof", "sign"), [("12 o'clock", 1, 1), ("6 o'clock", 1, -1), ("3 o'clock", 2, 1), ("9 o'clock", 2, -1)]
)
def test_a_leaning_bore_moves_the_right_end_its_way(angle, dof, sign):
    clamp = fs.Pin(
        "clamp", at="50 mm", holds=["radial", "axial", "tilt", "spin"], bore_tilt="1 mrad", bore_tilt_angle=angle
    )
    results = fs.solve(fs.Model("", [bar(), clamp])).case()
    assert results["shaft"].at("200 mm").u[dof] == pytest.approx(sign * 1e-3 * 0.150, rel=1e-12)
    assert results["shaft"].at("0 mm").u[dof] == pytest.approx(-sign * 1e-3 * 0.050, rel=1e-12)


def test_the_bore_leans_about_the_middle_of_the_ring_not_about_the_load_centre():
    clamp = fs.Pin(
        "clamp", at="50 mm", holds=["radial", "axial", "tilt", "spin"], load_centre="30 mm",
        bore_tilt="1 mrad", bore_tilt_angle="12 o'clock", offset="5 um", offset_angle="12 o'clock",
    )  # fmt: skip
    results = fs.solve(fs.Model("", [bar(), clamp])).case()
    assert results["shaft"].at("50 mm").u[1] == pytest.approx(5e-6, rel=1e-9)


@pytest.mark.parametrize("words", [{}, {"load_centre": "10 mm"}])
def test_pins_in_one_place_with_bores_apart_are_refused(words):
    """Nothing gives way, so no shaft fits both; it must not come out as a compromise."""
    one = fs.Pin("one", at="180 mm", holds=["radial", "tilt"])
    two = fs.Pin("two", at="180 mm", holds=["radial"], offset="10 um", offset_angle="12 o'clock", **words)
    end = fs.Pin("end", at="20 mm", holds=["radial", "axial"])
    with pytest.raises(fs.LoadError) as refused:
        fs.solve(fs.Model("", [bar(), end, one, two]))
    assert str(refused.value).splitlines() == [
        "shaft does not fit one and two: they hold it rigidly in one place, but their bores lie apart.",
        "  Give them the same offset and bore_tilt, or let one of them be a bearing that gives way.",
    ]


def test_pins_in_one_place_with_the_same_bore_share_the_load():
    same = {"at": "180 mm", "holds": ["radial"], "offset": "10 um", "offset_angle": "12 o'clock"}
    end = fs.Pin("end", at="20 mm", holds=["radial", "axial"])
    load = fs.Force("load", at="100 mm", up="1 kN")
    results = fs.solve(fs.Model("", [bar(), end, fs.Pin("one", **same), fs.Pin("two", **same), load])).case()
    np.testing.assert_allclose(results["one"].wrench, [0, -250, 0, 0, 0, 0], atol=1e-9)
    np.testing.assert_allclose(results["two"].wrench, results["one"].wrench, atol=1e-9)
    assert results["one"].up_um == pytest.approx(10, rel=1e-12)


@pytest.mark.parametrize("kind", ["pin", "bearing"])
def test_a_load_centre_lies_to_the_right_of_the_ring(kind):
    """Reactions are those of a beam on its load centres (lever rule), and act there."""
    give = {} if kind == "pin" else {"stiffness": {"radial": "100 N/um", "axial": "100 N/um"}}
    make = fs.Pin if kind == "pin" else fs.Bearing
    left = make("lay_left", at="20 mm", holds=["radial", "axial"], load_centre="20 mm", **give)
    right = make("lay_right", at="180 mm", holds=["radial"], load_centre="-40 mm", **give)
    load = fs.Force("load", at="65 mm", up="-1 kN")
    results = fs.solve(fs.Model("", [bar(), left, right, load])).case()
    # load centres at 40 and 140 mm: a quarter of the load on the right one
    assert results["lay_left"].up_force_N == pytest.approx(750, rel=1e-12)
    assert results["lay_right"].up_force_N == pytest.approx(250, rel=1e-12)
    np.testing.assert_allclose(results["lay_right"].wrench[3:], 0, atol=1e-9)
    np.testing.assert_allclose(results["lay_left"].wrench[3:], 0, atol=1e-9)


@pytest.mark.parametrize(
    ("push", "holder", "idle"), [("-100 N", "lay_left", "lay_right"), ("100 N", "lay_right", "lay_left")]
)
@pytest.mark.parametrize("kind", ["pin", "bearing"])
def test_stops_left_keeps_it_from_moving_left(kind, push, holder, idle):
    give = {} if kind == "pin" else {"stiffness": {"radial": "100 N/um", "axial": "50 N/um"}}
    make = fs.Pin if kind == "pin" else fs.Bearing
    left = make("lay_left", at="20 mm", holds=["radial", "stops_left"], **give)
    right = make("lay_right", at="180 mm", holds=["radial", "stops_right"], **give)
    results = fs.solve(fs.Model("", [bar(), left, right, fs.Force("push", at="100 mm", axial=push)])).case()
    assert results[holder].axial_force_N == pytest.approx(-float(push.split()[0]), rel=1e-12)
    assert results[idle].axial_force_N == 0
    assert np.sign(results[holder].axial_um) == (0 if kind == "pin" else np.sign(float(push.split()[0])))


def test_each_case_leans_on_its_own_stop():
    left = fs.Bearing(
        "lay_left", at="20 mm", holds=["radial", "stops_left"], stiffness={"radial": "1 N/um", "axial": "50 N/um"}
    )
    right = fs.Bearing(
        "lay_right", at="180 mm", holds=["radial", "stops_right"], stiffness={"radial": "1 N/um", "axial": "50 N/um"}
    )
    push = fs.Force("push", at="100 mm", axial="100 N")
    factors = {"to_right": 1.0, "to_left": -2.0, "idle": 0.0, "right_again": 3.0}
    cases = [fs.Case(name, forces={"push": factor} if factor else []) for name, factor in factors.items()]
    results = fs.solve(fs.Model("", [bar(), left, right, push], cases))
    np.testing.assert_allclose(results["lay_left"].axial_force_N, [0, 200, 0, 0], atol=1e-9)
    np.testing.assert_allclose(results["lay_right"].axial_force_N, [-100, 0, 0, -300], atol=1e-9)


def test_stiffness_up_is_towards_twelve_and_front_towards_three():
    give = {"up": "10 N/um", "front": "40 N/um", "axial": "5 N/um", "tilt_up": "1 N m/mrad", "tilt_front": "4 N m/mrad"}
    # a short stub: next to rigid, so that the bearing alone gives
    stub = bar(length="1 mm", diameter="100 mm")
    held = fs.Bearing("held", at="0.5 mm", holds=["radial", "axial"], stiffness=give)
    load = fs.Force(
        "load", at="0.5 mm", up="100 N", front="100 N", axial="100 N", couple={"up": "1 N m", "front": "1 N m"}
    )
    u = fs.solve(fs.Model("", [stub, held, load])).case()["held"].u
    np.testing.assert_allclose(u, [100 / 5e6, 100 / 10e6, 100 / 40e6, 0, 1 / 1e3, 1 / 4e3], rtol=1e-12)


def test_a_matrix_has_the_order_of_the_frame():
    """A spring at an arm to the right of the node couples uy with rz by + and uz with ry by - (statics of a lever)."""
    k, arm = 1e8, 0.03
    rows = np.diag([k, k, k, 0, k * arm**2, k * arm**2])
    rows[1, 5] = rows[5, 1] = k * arm
    rows[2, 4] = rows[4, 2] = -k * arm
    other = fs.Bearing("other", at="150 mm", holds=["radial"], stiffness={"radial": "100 N/um"})
    load = fs.Force("load", at="100 mm", up="1 kN", front="300 N", axial="200 N")

    def moved(**gives):
        return fs.solve(
            fs.Model("", [bar(), fs.Bearing("one", at="20 mm", holds=["radial", "axial"], **gives), other, load])
        )

    by_matrix = moved(matrix=matrix(rows.tolist()))
    by_centre = moved(stiffness={"radial": "100 N/um", "axial": "100 N/um"}, load_centre="30 mm")
    np.testing.assert_allclose(by_matrix.lines["shaft"].u, by_centre.lines["shaft"].u, rtol=1e-9, atol=1e-18)


# ---- gears, belts, chains


def test_the_layshaft_of_the_interface():
    """Tooth forces of the invented layshaft as the project's interface prints them, here anew from T, r and angles."""
    results = fs.solve(layshaft(gravity=None)).case("running")
    torque = 5500 / (393.7 * 2 * math.pi / 60)
    for name, hand, z, module, beta, printed in (
        ("wheel", 1, 85, 2e-3, 15, (406, 1516, 571)),
        ("pinion", -1, 19, 3e-3, 12, (-973, 4578, -1704)),
    ):
        radius = z * module / math.cos(math.radians(beta)) / 2
        tangential = torque / radius
        axial = hand * tangential * math.tan(math.radians(beta))
        radial = tangential * math.tan(math.radians(20)) / math.cos(math.radians(beta))
        away = 1 if name == "wheel" else -1  # the wheel's mate is at the back, the pinion's in front
        np.testing.assert_allclose(results[name].load[:3], [axial, tangential, away * radial], rtol=1e-12)
        assert results[name].load[:3] == pytest.approx(printed, abs=0.7)  # the mock-up cuts one of them off
    assert round(results["lay_right"].axial_force_N) == 567  # the thrust of 567 N to the left is held


HELICAL = [
    # hand, turning, state, up, axial of a driven gear whose mate is at 9 o'clock.
    # Hand rule of the trade (common practice, no source): fingers of the hand of the DRIVING gear along its turning,
    # its thrust points along the thumb; the driven gear takes the opposite. The tooth pushes the driven gear the way it
    # turns and holds the driving one back. While coasting the driven gear drives.
    ("left", "clockwise from left", False, 1, 1),
    ("right", "clockwise from left", False, 1, -1),
    ("left", "counterclockwise from left", False, -1, -1),
    ("right", "counterclockwise from left", False, -1, 1),
    ("left", "clockwise from left", True, -1, -1),
    ("right", "clockwise from left", True, -1, 1),
    ("left", "counterclockwise from left", True, 1, 1),
    ("right", "counterclockwise from left", True, 1, -1),
]


def geared(gear, **case):
    out = fs.Coupling("out", at="150 mm")
    pins = [
        fs.Pin("lay_left", at="0 mm", holds=["radial", "axial"]),
        fs.Pin("lay_right", at="200 mm", holds=["radial"]),
    ]
    flow = {"enters": gear.name, "leaves": "out", **TORQUE} | case
    return fs.Model("", [bar(), *pins, gear, out], [fs.Case("case", **flow)])


@pytest.mark.parametrize(("hand", "turns", "coasts", "up", "axial"), HELICAL)
def test_helical_gears(hand, turns, coasts, up, axial):
    gear = fs.Gear(
        "wheel", at="80 mm", pitch_diameter="100 mm", helix=f"20 deg {hand}", spread="point", mate="9 o'clock"
    )
    load = load_of(geared(gear, turns=turns, coasts=coasts), "wheel")
    tangential = 100 / 0.05
    assert load[1] == pytest.approx(up * tangential, rel=1e-12)
    assert load[0] == pytest.approx(axial * tangential * math.tan(math.radians(20)), rel=1e-12)
    # away from the mate, whichever way it turns
    assert load[2] == pytest.approx(tangential * math.tan(math.radians(20)) / math.cos(math.radians(20)), rel=1e-12)


def test_seen_from_the_right_clockwise_is_the_other_way():
    gear = fs.Gear("wheel", at="80 mm", pitch_diameter="100 mm", spread="point", mate="9 o'clock")
    one = load_of(geared(gear, turns="clockwise from right"), "wheel")
    other = load_of(geared(gear, turns="counterclockwise from left"), "wheel")
    np.testing.assert_array_equal(one, other)


def test_where_power_leaves_the_gear_drives():
    """The same gear with power leaving through it takes the opposite tangential and axial force."""
    gear = fs.Gear("wheel", at="80 mm", pitch_diameter="100 mm", helix="20 deg left", spread="point", mate="9 o'clock")
    driven = load_of(geared(gear), "wheel")
    drives = load_of(geared(gear, enters="out", leaves="wheel"), "wheel")
    np.testing.assert_allclose(drives[:3], [-driven[0], -driven[1], driven[2]], rtol=1e-12)
    assert drives[3] == pytest.approx(-100, rel=1e-12)


@pytest.mark.parametrize(("apex", "axial"), [("left", 1), ("right", -1)])
@pytest.mark.parametrize("turns", ["clockwise from left", "counterclockwise from left"])
def test_a_bevel_gear_is_pushed_off_its_apex(apex, axial, turns):
    """F_r = F_t tan(alpha) cos(delta), F_a = F_t tan(alpha) sin(delta) at the mean diameter (any text on gears)."""
    gear = fs.Gear(
        "crown", at="80 mm", form="bevel", mean_diameter="100 mm", pitch_cone_angle="60 deg", apex=apex,
        spread="point", mate="12 o'clock",
    )  # fmt: skip
    load = load_of(geared(gear, turns=turns), "crown")
    tangential, tan = 100 / 0.05, math.tan(math.radians(20))
    assert load[0] == pytest.approx(axial * tangential * tan * math.sin(math.radians(60)), rel=1e-12)
    assert load[1] == pytest.approx(-tangential * tan * math.cos(math.radians(60)), rel=1e-12)
    assert load[2] == pytest.approx((1 if turns.startswith("clock") else -1) * tangential, rel=1e-12)


@pytest.mark.parametrize(
    ("clock", "up", "front"),
    [("12 o'clock", 1, 0), ("3 o'clock", 0, 1), ("7:30 o'clock", -math.sqrt(0.5), -math.sqrt(0.5))],
)
@pytest.mark.parametrize("turns", ["clockwise from left", "counterclockwise from left"])
def test_belts_and_chains_pull_towards_the_clock(clock, up, front, turns):
    pulleys = {
        "belt": fs.Pulley(
            "wheel", at="80 mm", diameter="100 mm", belt_pull={"tight": "900 N", "slack": "300 N"}, pulls_towards=clock
        ),
        "factor": fs.Pulley("wheel", at="80 mm", diameter="100 mm", pull_factor=1.5, pulls_towards=clock),
        "chain": fs.Sprocket("wheel", at="80 mm", diameter="100 mm", pulls_towards=clock),
    }
    for kind, size in (("belt", 1200), ("factor", 3000), ("chain", 2000)):
        load = load_of(geared(pulleys[kind], turns=turns), "wheel")
        np.testing.assert_allclose(load[:3], [0, size * up, size * front], atol=1e-9)
        assert load[3] == (100 if turns.startswith("clock") else -100)


@pytest.mark.parametrize(("turns", "aside"), [("clockwise from left", -1), ("counterclockwise from left", 1)])
def test_belt_strands_add_as_vectors(turns, aside):
    """120 deg of wrap: each strand leans 30 deg outwards, so the sum is sqrt(F1^2 + F2^2 - 2 F1 F2 cos 120 deg).

    Driven clockwise by a belt that comes from above, the rim is pulled up where it turns up: at 9 o'clock, the back.
    """
    pulley = fs.Pulley(
        "wheel", at="80 mm", diameter="100 mm", belt_pull={"tight": "900 N", "slack": "300 N"}, wrap="120 deg",
        pulls_towards="12 o'clock",
    )  # fmt: skip
    load = load_of(geared(pulley, turns=turns), "wheel")
    assert math.hypot(load[1], load[2]) == pytest.approx(math.sqrt(900**2 + 300**2 + 900 * 300), rel=1e-12)
    assert load[2] == pytest.approx(aside * 600 * math.sin(math.radians(30)), rel=1e-12)


def test_separation_is_away_from_the_mate_and_tangential_is_with_the_turning():
    gear = fs.Gear("wheel", at="100 mm", pitch_diameter="100 mm", spread="point", mate="9 o'clock")
    for turns, sense in (("clockwise from left", 1), ("counterclockwise from left", -1)):
        wheel = fs.solve(geared(gear, turns=turns)).case()["wheel"]
        assert wheel.separation == pytest.approx(wheel.front, rel=1e-12)  # the mate is at the back
        assert wheel.separation > 0
        assert wheel.tangential == pytest.approx(sense * wheel.up, rel=1e-12)
        assert wheel.tangential > 0  # a driven gear is pushed along


# ---- torque, spin, twist


def test_torque_that_is_left_over_is_taken_out_where_power_leaves_and_said():
    gear = fs.Gear("wheel", at="80 mm", pitch_diameter="100 mm", spread="point", mate="9 o'clock")
    brake = fs.Force("brake", at="30 mm", couple={"axial": "-40 N m"})
    model = geared(gear)
    model = fs.Model("", [*model.parts, brake], model.cases)
    results = fs.solve(model)
    assert [note.sentence for note in results.balances] == [
        "case case: 40 N m taken out at out so that the torques on shaft balance"
    ]
    assert [note.key for note in results.balances] == ["case.leaves"]
    torque = results.lines["shaft"].force_right[0, :, 3]
    x = results.lines["shaft"].x
    # between brake and wheel -(-40), between wheel and coupling -(100 - 40), beyond nothing
    expected = np.select([x < 0.03 - 1e-9, x < 0.08 - 1e-9, x < 0.15 - 1e-9], [0, 40, -60], 0)
    np.testing.assert_allclose(torque, expected, atol=1e-12)


@pytest.mark.parametrize("clock", ["12 o'clock", "3 o'clock", "6 o'clock", "9 o'clock", "4:30 o'clock", "217.3 deg"])
def test_a_force_along_its_lever_is_no_torque(clock):
    """Sines of whole hours are 1e-16 and not 0: that must not spin a shaft, nor be taken out and noted."""
    pins = [fs.Pin("one", at="0 mm", holds=["radial", "axial"]), fs.Pin("two", at="200 mm", holds=["radial"])]
    angle = fs.Force("any", at="0 mm", up="1 N", radius="1 mm", angle=clock).angle.si
    up, front = 1000 * math.cos(angle), 1000 * math.sin(angle)
    force = fs.Force(
        "force", at="80 mm", up=f"{up!r} N", front=f"{front!r} N", radius="60 mm", angle=clock, range_check="off"
    )
    results = fs.solve(fs.Model("", [bar(), *pins, force]))
    assert results.balances == ()
    assert abs(results["force"].twist[0]) < 1e-18


@pytest.mark.parametrize("clock", ["12 o'clock", "6 o'clock"])
def test_a_mass_that_hangs_straight_down_is_no_torque(clock):
    pins = [fs.Pin("one", at="0 mm", holds=["radial", "axial"]), fs.Pin("two", at="200 mm", holds=["radial"])]
    mass = fs.Mass("mass", at="80 mm", mass="5 kg", cg_radius="40 mm", cg_angle=clock)
    assert fs.solve(fs.Model("", [bar(), *pins, mass], gravity="down"))["mass"].up[0] < 0


def test_balanced_torques_need_no_note():
    assert fs.solve(layshaft(gravity=None)).balances == ()


def test_a_pin_that_holds_spin_takes_the_torque():
    pins = [
        fs.Pin("lay_left", at="0 mm", holds=["radial", "axial", "spin"]),
        fs.Pin("lay_right", at="200 mm", holds=["radial"]),
    ]
    results = fs.solve(fs.Model("", [bar(), *pins, tip(couple={"axial": "10 N m"})])).case()
    assert results["lay_left"].wrench[3] == pytest.approx(-10, rel=1e-12)
    assert results["lay_left"].twist == 0
    # T L / G J, G of 42CrMo4 81 GPa
    assert results["tip"].twist == pytest.approx(10 * 0.2 / (81e9 * math.pi / 32 * 0.03**4), rel=1e-12)


def test_twist_is_counted_from_where_power_leaves():
    """The shaft between gear and coupling is twisted by T L / G J; the gear runs ahead of the coupling by that."""
    gear = fs.Gear("wheel", at="80 mm", pitch_diameter="100 mm", spread="point", mate="9 o'clock")
    twist = 100 * 0.07 / (81e9 * math.pi / 32 * 0.03**4)
    for turns, sense in (("clockwise from left", 1), ("counterclockwise from left", -1)):
        results = fs.solve(geared(gear, turns=turns)).case()
        assert results["out"].twist == 0
        assert results["wheel"].twist == pytest.approx(sense * twist, rel=1e-12)
        assert results["shaft"].at("0 mm").twist == pytest.approx(sense * twist, rel=1e-12)


def test_each_case_counts_twist_from_its_own_place():
    gear = fs.Gear("wheel", at="80 mm", pitch_diameter="100 mm", spread="point", mate="9 o'clock")
    one = geared(gear)
    back = fs.Case("back", enters="out", leaves="wheel", **TORQUE)
    results = fs.solve(fs.Model("", one.parts, [*one.cases, back]))
    assert results["out"].twist[0] == 0
    assert results["wheel"].twist[1] == 0
    assert results["wheel"].twist[0] == pytest.approx(results["out"].twist[1], rel=1e-12)


def test_actions_attack_at_the_pitch_point():
    """The arrow of a tooth force starts where the teeth touch: from the axis towards the mate."""
    (wheel, pinion) = (act for act in actions(layshaft(gravity=None)) if act.kind == "tooth force")
    assert wheel.arm[2] == pytest.approx(-85 * 2e-3 / math.cos(math.radians(15)) / 2, rel=1e-12)
    assert pinion.arm[2] == pytest.approx(19 * 3e-3 / math.cos(math.radians(12)) / 2, rel=1e-12)
