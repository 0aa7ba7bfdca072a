"""Results by the engineer's names: look-up, stations between stations, seats, verdicts, comparison, estimates."""

from __future__ import annotations

import math
from dataclasses import replace

import numpy as np
import pytest

import fe_shaft as fs
from tests.analysis.moves import roll
from tests.analysis.statics import scales, station
from tests.models import bar, layshaft, matrix, to_model
from tests.oracle.shaft_spec import ForceSpec, truth
from tests.random_shafts import HARD, random_shaft

UX, UY, UZ, RX, RY, RZ = range(6)


@pytest.fixture(scope="module")
def results():
    return fs.solve(layshaft())


@pytest.fixture(scope="module")
def comparison():
    return fs.compare(layshaft())


# ---- look-up


def test_names_of_parts_and_shafts_are_there(results):
    names = ["lay_left", "lay_right", "wheel", "pinion", "barring_wheel", "layshaft"]
    assert sorted(results) == sorted(names)
    assert len(results) == len(results.case("running")) == 6
    assert "wheel" in results
    assert "wheel" in results.case("running")
    assert "weel" not in results
    assert results.cases == ("running", "starting", "reversed_jam")
    assert results.case("starting").name == "starting"


@pytest.mark.parametrize("name", ["lay_left", "lay_right", "wheel", "pinion", "barring_wheel"])
def test_arrays_over_all_cases_and_floats_in_one(results, name):
    part = results[name]
    for quantity in part.quantities():
        values = part.value(quantity)
        assert values.shape == (3,)
        for k, case in enumerate(results.cases):
            one = results.case(case)[name].value(quantity)
            assert type(one) is float
            assert one == values[k]
    assert part.u.shape == part.load.shape == (3, 6)


def test_each_quantity_has_its_si_value_and_one_trade_unit(results):
    wheel = results.case("running")["wheel"]
    assert wheel.deflection_um == pytest.approx(wheel.deflection * 1e6, rel=1e-15)
    assert wheel.slope_mrad == pytest.approx(wheel.slope * 1e3, rel=1e-15)
    right = results.case("running")["lay_right"]
    assert right.radial_force_N == right.radial_force
    assert right.tilt_moment_Nm == right.tilt_moment
    assert right.force == pytest.approx(math.hypot(right.radial_force, right.axial_force), rel=1e-12)


def test_the_parts_of_a_movement_fit_together(results):
    for part in (results[name] for name in results.parts):
        np.testing.assert_allclose(part.deflection, np.hypot(part.up, part.front), rtol=1e-12)
        np.testing.assert_allclose(part.slope, np.hypot(part.u[:, RY], part.u[:, RZ]), rtol=1e-12)
        np.testing.assert_array_equal(part.axial, part.u[:, UX])
        np.testing.assert_array_equal(part.twist, part.u[:, RX])


def test_the_pitch_point_moves_with_the_gear(results):
    wheel = results.case("running")["wheel"]
    r = 85 * 2e-3 / math.cos(math.radians(15)) / 2
    u = wheel.u
    # rigid: u + theta x (0, 0, -r)
    np.testing.assert_allclose(wheel.at_point, [u[UX] - r * u[RY], u[UY] + r * u[RX], u[UZ]], rtol=1e-12)


def test_value_in_another_unit(results):
    microns = results["wheel"].deflection_um
    np.testing.assert_allclose(results.value("wheel.deflection"), microns, rtol=1e-15)
    np.testing.assert_allclose(results.value("wheel.deflection", unit="mm"), microns / 1e3, rtol=1e-12)
    assert results.value("wheel.deflection", case="running", unit="mil") == pytest.approx(microns[0] / 25.4, rel=1e-12)
    assert results.value("lay_left.force", case="running", unit="lbf") == pytest.approx(
        results["lay_left"].force[0] / 4.4482216152605, rel=1e-12
    )
    assert results.value("layshaft.deflection").shape == (3,)


def test_worst_is_the_largest_size_with_its_case(results):
    worst = results.worst("lay_right.axial_force")
    assert (worst.case, worst.unit) == ("reversed_jam", "N")
    assert worst.value == float(worst) == results["lay_right"].axial_force[2] < 0
    assert results.worst("wheel.deflection", unit="in").value == pytest.approx(
        results["wheel"].deflection.max() / 0.0254, rel=1e-12
    )


def test_the_worst_of_a_shaft_lies_between_its_parts(results):
    shaft = results["layshaft"]
    value, x = shaft.largest("deflection")
    fine = np.hypot(*shaft.line.at(np.linspace(0, 0.191, 2001))[0][:, :, 1:3].transpose(2, 0, 1))
    np.testing.assert_allclose(value, fine.max(axis=1), rtol=1e-5)
    assert ((x >= 0) & (x <= 0.191)).all()
    assert results.case("running")["layshaft"].largest("deflection") == (value[0], x[0])


@pytest.mark.parametrize(
    ("ask", "sentence"),
    [
        (lambda r: r["weel"], 'no part or shaft is called "weel". Nearest: wheel.'),
        (lambda r: r.case("runing"), 'no case is called "runing". Nearest: running.'),
        (lambda r: r.case(), "which case? One of running, starting, reversed_jam."),
        (lambda r: r.value("wheel.deflecton"), 'wheel has no quantity "deflecton". Nearest: deflection.'),
        (lambda r: r.value("wheel.tilt"), 'wheel has no quantity "tilt".'),
        (lambda r: r.value("weel.slope"), 'no part or shaft is called "weel". Nearest: wheel.'),
        (lambda r: r.worst("layshaft.force"), 'layshaft has no quantity "force".'),
        (lambda r: r.case("running")["pinon"], 'no part or shaft is called "pinon". Nearest: pinion.'),
    ],
)
def test_unknown_names_are_refused_with_the_nearest(results, ask, sentence):
    with pytest.raises(fs.UsageError) as refused:
        ask(results)
    assert str(refused.value).startswith(sentence)


def test_an_unknown_unit_is_refused_in_words(results):
    with pytest.raises((fs.ShaftError, ValueError)) as refused:
        results.value("wheel.deflection", unit="furlong")
    assert "furlong" in str(refused.value)


def test_an_unknown_place_is_refused_in_words(results):
    with pytest.raises(fs.ModelError, match="weel"):
        results["layshaft"].at("weel + 2 mm")
    with pytest.raises(fs.UsageError) as refused:
        results["layshaft"].at("pinion + 200 mm")
    assert str(refused.value) == (
        '"pinion + 200 mm" is 293 mm, off the shaft: layshaft is 191 mm long. Write 0 mm to 191 mm.'
    )
    assert results["layshaft"].at("layshaft.right").x == pytest.approx(0.191, rel=1e-15)


def test_the_only_case_needs_no_name():
    only = fs.solve(fs.Model("", [bar(), fs.Pin("p", at="0 mm", holds=["radial", "axial", "tilt"])], gravity="down"))
    assert only.cases == ("as_loaded",)
    assert only.case()["p"].up_force == pytest.approx(7850 * math.pi / 4 * 0.03**2 * 0.2 * 9.80665, rel=1e-12)


# ---- stations between stations


def test_at_takes_anchors(results):
    running = results.case("running")
    np.testing.assert_allclose(running["layshaft"].at("wheel").u, running["wheel"].u, rtol=1e-15)
    there = running["layshaft"].at("wheel + 12 mm")
    assert there.x == pytest.approx(0.050, rel=1e-12)
    np.testing.assert_array_equal(there.u, running["layshaft"].at("50 mm").u)
    assert there.bending_moment == pytest.approx(float(np.hypot(*there.section_force[4:])), rel=1e-15)
    assert there.torque == there.section_force[3]
    assert there.shear_force == pytest.approx(float(np.hypot(*there.section_force[1:3])), rel=1e-15)


@pytest.mark.parametrize("seed", range(70_000, 70_060))
def test_between_stations_as_a_model_with_a_station_there(seed):
    """Exact field between the stations: cones, bores, spread loads, weight; against another grid, and 40 digits."""
    spec = random_shaft(seed, HARD)
    length = sum(segment.length for segment in spec.segments)
    rng = np.random.default_rng(seed)
    places = sorted({round(float(x), 6) for x in rng.uniform(0, length, 7)})
    line = fs.solve(to_model(spec)).lines["shaft"]
    marks = tuple(ForceSpec(f"mark_{k}", x) for k, x in enumerate(places))
    marked = fs.solve(to_model(replace(spec, forces=(*spec.forces, *marks)))).lines["shaft"]
    u, force = line.at(places)
    at = [station(marked.x, x) for x in places]
    u_size, f_size = scales(spec, marked.u, marked.force_left, marked.force_right)
    # another grid condenses other spans: rounding of the hard range, see test_hard_range.py
    assert np.abs((u - marked.u[:, at]) / u_size).max() < 1e-11
    assert np.abs((force - marked.force_right[:, at]) / f_size).max() < 1e-11
    if seed % 6 == 0:
        made, solution = truth(spec, more_stations=places)
        known = solution.floats()
        nodes = [made.node(x) for x in places]
        assert np.abs((u - known["u"][:, nodes]) / u_size).max() < 1e-11
        assert np.abs((force - known["force_right"][:, nodes]) / f_size).max() < 1e-11


def test_between_stations_of_a_mild_shaft_to_rounding(results):
    """The layshaft itself: 1e-12 of the largest, at 200 places one by one and all together."""
    line = results.lines["layshaft"]
    places = np.linspace(0, 0.191, 200)
    u, force = line.at(places)
    u_size, f_size = np.abs(line.u).max(axis=1), np.abs(line.force_right).max(axis=1)
    for k in range(0, 200, 9):
        x = float(places[k])
        mark = fs.Force("mark", at=f"{x!r} m", up="0 N", range_check="off")
        there = fs.solve(layshaft((), mark))["layshaft"].at(f"{x!r} m")
        assert (np.abs(there.u - u[:, k]) <= 1e-12 * u_size).all()
        assert (np.abs(there.section_force - force[:, k]) <= 1e-12 * f_size + 1e-12).all()
        alone_u, alone_force = line.at(x)
        np.testing.assert_allclose(alone_u[:, 0], u[:, k], rtol=1e-15, atol=1e-22)
        np.testing.assert_allclose(alone_force[:, 0], force[:, k], rtol=1e-15, atol=1e-12)


def test_at_a_station_it_is_the_station(results):
    line = results.lines["layshaft"]
    u, force = line.at(line.x)
    np.testing.assert_allclose(u, line.u, atol=1e-12 * np.abs(line.u).max())
    np.testing.assert_allclose(force, line.force_right, atol=1e-12 * np.abs(line.force_right).max())


def test_the_line_knows_its_contour(results):
    line = results.lines["layshaft"]
    assert (np.diff(line.x) > 0).all()
    assert line.x[0] == 0
    assert line.length == line.x[-1] == pytest.approx(0.191, rel=1e-15)
    step = station(line.x, 0.019)
    assert (line.diameter_left[step], line.diameter_right[step]) == (0.030, 0.038)


# ---- seats


def on_springs(seat=None, stiffness=None, housing=None, holds=("radial", "axial"), **words):
    """A short stiff stub in one bearing that holds everything but spin, pushed every way: what gives is the bearing."""
    give = {"radial": "100 N/um", "axial": "50 N/um", "tilt": "5 N m/mrad"} if stiffness is None else stiffness
    held = fs.Bearing("held", at="0.5 mm", holds=list(holds), stiffness=give, seat=seat, **words)
    push = fs.Force(
        "push", at="0.5 mm", up="1 kN", front="-300 N", axial="200 N", couple={"up": "2 N m", "front": "3 N m"}
    )
    stub = fs.Shaft("stub", [fs.Segment(length="1 mm", diameter="90 mm")], material="42CrMo4")
    return fs.solve(fs.Model("", [stub, held, push], housing=housing)).case()["held"]


SEAT = {"radial": "400 N/um", "axial": "150 N/um", "tilt": "40 N m/mrad"}


def test_a_seat_gives_in_series():
    """1/k = 1/k_bearing + 1/k_seat in each direction."""
    held = on_springs(SEAT)
    k = np.array([1 / (1 / 50e6 + 1 / 150e6), *[1 / (1 / 100e6 + 1 / 400e6)] * 2, *[1 / (1 / 5e3 + 1 / 40e3)] * 2])
    np.testing.assert_allclose(held.u[[UX, UY, UZ, RY, RZ]], np.array([200, 1000, -300, 2, 3]) / k, rtol=1e-9)
    np.testing.assert_allclose(held.wrench, [-200, -1000, 300, 0, -2, -3], rtol=1e-9, atol=1e-9)


def test_what_gives_is_told_apart():
    held = on_springs(SEAT)
    assert held.give == pytest.approx(math.hypot(1000, 300) / 100e6, rel=1e-9)
    assert held.seat_movement == pytest.approx(math.hypot(1000, 300) / 400e6, rel=1e-9)
    assert held.deflection == pytest.approx(held.give + held.seat_movement, rel=1e-9)
    assert held.tilt == pytest.approx(math.hypot(2, 3) / 5e3, rel=1e-9)


def test_a_seat_is_rigid_where_nothing_is_written():
    held = on_springs({"radial": "400 N/um"})
    assert held.u[UX] == pytest.approx(200 / 50e6, rel=1e-9)
    assert held.u[RZ] == pytest.approx(3 / 5e3, rel=1e-9)


def test_the_housing_is_the_seat_of_those_without_one():
    np.testing.assert_array_equal(on_springs(housing={"seat": SEAT}).u, on_springs(SEAT).u)
    own = {"radial": "800 N/um"}
    np.testing.assert_array_equal(on_springs(own, housing={"seat": SEAT}).u, on_springs(own).u)


def test_a_seat_by_matrix_is_the_seat_by_words():
    full = {"matrix": matrix(np.diag([150e6, 400e6, 400e6, 1e9, 40e3, 40e3]).tolist())}
    np.testing.assert_allclose(on_springs(full).u, on_springs(SEAT).u, rtol=1e-12)


@pytest.mark.parametrize("tilt", [{}, {"tilt": "5 N m/mrad"}])
def test_a_seat_matrix_without_rotations_is_no_free_motion_where_two_bearings_stand(tilt):
    """Three springs of a housing in a 6 x 6: the outer rings may turn freely, the shaft is held by both of them."""
    seat = {"matrix": matrix(np.diag([150e6, 400e6, 400e6, 0, 0, 0]).tolist())}

    def moved(seat, tilt):
        give = {"radial": "100 N/um", "axial": "50 N/um"} | tilt
        ends = [
            fs.Bearing("one", at="20 mm", holds=["radial", "axial"], stiffness=give, seat=seat),
            fs.Bearing("two", at="180 mm", holds=["radial"], stiffness=give, seat=seat),
        ]
        return fs.solve(fs.Model("", [bar(), *ends, fs.Force("f", at="90 mm", up="1 kN", axial="50 N")]))

    found, known = moved(seat, tilt), moved({"radial": "400 N/um", "axial": "150 N/um"}, {})
    np.testing.assert_allclose(found.lines["shaft"].u, known.lines["shaft"].u, rtol=1e-9, atol=1e-18)
    np.testing.assert_allclose(found["one"].wrench[:, 3:], 0, atol=1e-9)


@pytest.mark.parametrize("angle", [30.0, 45.0, 210.0])
def test_stiffness_matrices_turn_with_the_shaft(angle):
    """Bearing matrix and loads rolled about the axis: the results roll along."""
    spec = next(s for s in map(random_shaft, range(80_000, 90_000)) if any(b.matrix for b in s.supports) and all(
        not (set(b.stiffness or {}) | set(b.seat or {})) & {"up", "front", "tilt_up", "tilt_front"} for b in s.supports
    ))  # fmt: skip
    move = roll(angle)
    one, other = fs.solve(to_model(spec)).lines["shaft"], fs.solve(to_model(move.spec(spec))).lines["shaft"]
    u_size, _ = scales(spec, one.u, one.force_left)
    assert np.abs((move.vectors(one.u) - other.u) / np.roll(u_size, 0)).max() < 1e-9


def test_unlike_springs_up_and_front_are_a_matrix_that_can_be_turned():
    """A bearing of 40 and 160 N/um, rolled by 45 deg: k = R diag R^T couples up with front."""
    diagonal = np.diag([50e6, 40e6, 160e6, 0, 1e3, 2e3])
    six = roll(45).six
    turned = six @ diagonal @ six.T
    load = np.array([0, 1000.0, 0])

    def moved(rows, force):
        ends = [
            fs.Bearing("one", at="20 mm", holds=["radial", "axial"], matrix=matrix(rows.tolist())),
            fs.Bearing("two", at="180 mm", holds=["radial"], matrix=matrix(rows.tolist())),
        ]
        f = fs.Force("f", at="70 mm", up=f"{force[1]!r} N", front=f"{force[2]!r} N")
        return fs.solve(fs.Model("", [bar(), *ends, f])).case()["f"].u

    seen = six @ np.array([*load, 0, 0, 0])
    np.testing.assert_allclose(
        moved(turned, [float(v) for v in seen]), six @ moved(diagonal, load.tolist()), rtol=1e-9, atol=1e-16
    )


# ---- proof and energy


def test_the_energy_of_the_parts_is_the_work_of_the_loads():
    held = [
        fs.Bearing(
            "one", at="0 mm", holds=["radial", "axial"], stiffness={"radial": "100 N/um", "axial": "1 N/um"}, seat=SEAT
        ),
        fs.Bearing("two", at="200 mm", holds=["radial"], stiffness={"radial": "50 N/um"}),
    ]
    results = fs.solve(fs.Model("", [bar(), *held, fs.Force("f", at="80 mm", up="2 kN")]))
    stored = results.proof.stored
    assert set(stored) == {"shaft", "one", "one.seat", "two"}
    assert sum(stored.values()) == pytest.approx(2000 * results["f"].up / 2, rel=1e-12)
    assert stored["two"] == pytest.approx((2000 * 0.4) ** 2 / (2 * 50e6), rel=1e-9)
    assert stored["one.seat"] == pytest.approx((2000 * 0.6) ** 2 / (2 * 400e6), rel=1e-9)
    assert "no digits lost to speak of" in results.proof.sentence()


def test_results_do_not_change(results):
    with pytest.raises(AttributeError):
        results.cases = ()
    with pytest.raises(TypeError):
        results["wheel"] = 1


# ---- verdicts


def judged(quantity="deflection", of="wheel", cases=None, **bounds):
    limit = fs.Limit("limit", of=of, quantity=quantity, cases=cases, **bounds)
    (verdict,) = fs.solve(layshaft([limit])).verdicts
    return verdict


def test_a_largest_value(results):
    verdict = judged(max="20 um", cases=["running"])
    value = results["wheel"].deflection[0]
    assert (verdict.part, verdict.case, verdict.quantity, verdict.unit) == ("wheel", "running", "deflection", "um")
    assert verdict.value == value
    assert verdict.use == pytest.approx(value / 20e-6, rel=1e-12)
    assert verdict.word == "FAIL"
    assert verdict.per_case == {"running": verdict.use}
    assert verdict.shown(value) == pytest.approx(value * 1e6)


def test_the_shaft_alone_is_the_value_on_pins(results):
    verdict = judged(max="20 um", cases=["running"])
    on_pins = fs.solve(layshaft().pinned())
    assert verdict.shaft_alone == on_pins["wheel"].deflection[0] < verdict.value / 5


def test_the_governing_part_and_case_are_named(results):
    verdict = judged("slope", "every gear", max="10 mrad")
    slopes = {name: results[name].slope for name in ("wheel", "pinion")}
    worst = max(slopes, key=lambda name: slopes[name].max())
    assert verdict.part == worst
    assert verdict.case == results.cases[int(slopes[worst].argmax())]
    for k, case in enumerate(results.cases):
        assert verdict.per_case[case] == pytest.approx(max(s[k] for s in slopes.values()) / 10e-3, rel=1e-12)


def test_one_bound_limits_the_size(results):
    up = results["wheel"].up
    assert up[2] < 0
    verdict = judged("up", max="80 um")
    assert (verdict.case, verdict.value) == ("reversed_jam", abs(up[2]))
    assert verdict.word == "FAIL"


def test_a_least_value(results):
    verdict = judged("deflection", min="40 um")
    least = results["wheel"].deflection.min()
    assert (verdict.case, verdict.value) == ("running", least)
    assert verdict.use == pytest.approx(40e-6 / least, rel=1e-12)
    assert verdict.word == "FAIL"


def test_a_range_is_signed(results):
    up = results["wheel"].up[0]
    inside = judged("up", min="-5 um", max="75 um", cases=["running"])
    assert inside.value == up > 0
    assert inside.use == pytest.approx(abs(up - 35e-6) / 40e-6, rel=1e-12)
    assert inside.use < 1
    outside = judged("up", min="-75 um", max="5 um", cases=["running"])
    assert outside.word == "FAIL"


@pytest.mark.parametrize("bound", [{"max": "-5 um"}, {"min": "-5 um"}, {"max": "0 um"}, {"min": "0 um"}])
def test_one_bound_that_no_size_can_meet_is_refused(bound):
    with pytest.raises(fs.ModelError, match="limits the size, which is never negative"):
        judged("up", **bound)


def test_pass_fail_and_unsure():
    """Between as given and the worst of the band it passes as given and fails in the band: unsure."""
    given = judged(max="1 mm", cases=["running"])
    band = given.band
    assert given.word == "pass"
    assert band.worst == max(band.all_low, band.worst) > given.value
    between = f"{(given.value + band.worst) / 2 * 1e6!r} um"
    assert judged(max=between, cases=["running"]).word == "unsure"
    assert judged(max=f"{given.value * 0.999e6!r} um", cases=["running"]).word == "FAIL"
    assert judged(max=f"{band.worst * 1.001e6!r} um", cases=["running"]).word == "pass"


def test_the_band_is_the_corners_solved():
    """One soft and one stiff bearing tilt the shaft more than both soft."""
    band = judged("tilt", "lay_left", max="1 mrad", cases=["running"]).band
    corners = {}
    for left in ("low", "high"):
        for right in ("low", "high"):
            at = layshaft().at_band({"lay_left": left, "lay_right": right})
            corners[left, right] = fs.solve(at)["lay_left"].tilt[0]
    assert band.all_low == pytest.approx(corners["low", "low"], rel=1e-12)
    assert band.all_high == pytest.approx(corners["high", "high"], rel=1e-12)
    assert band.worst == pytest.approx(max(corners.values()), rel=1e-12)
    assert band.mix == "lay_left stiff, lay_right soft"
    assert band.worst > 2 * max(band.all_low, band.all_high)


def test_verdicts_without_pins_that_hold():
    """Pins cannot hold what tilt stiffness alone holds; then nothing stands beneath the verdict."""
    one = fs.Bearing(
        "one",
        at="0 mm",
        holds=["radial", "axial"],
        stiffness={"radial": "100 N/um", "axial": "1 N/um", "tilt": "50 N m/mrad"},
    )
    limit = fs.Limit("limit", of="f", quantity="deflection", max="1 mm")
    (verdict,) = fs.solve(fs.Model("", [bar(), one, fs.Force("f", at="50 mm", up="1 kN")], limits=[limit])).verdicts
    assert verdict.shaft_alone is None
    assert verdict.band is None
    assert verdict.word == "pass"


def test_no_limits_no_verdicts(results):
    assert results.verdicts == ()


# ---- comparison


def test_pins_beside_bearings(comparison, results):
    assert comparison.is_pins
    assert comparison.titles == ("pins", "bearings")
    assert comparison.cases == results.cases
    on_pins = fs.solve(layshaft().pinned())
    row = comparison.row("wheel.deflection")
    np.testing.assert_array_equal(row.left, on_pins["wheel"].deflection)
    np.testing.assert_array_equal(row.right, results["wheel"].deflection)
    np.testing.assert_allclose(row.difference, row.right - row.left)
    np.testing.assert_allclose(row.ratio, row.right / row.left)
    np.testing.assert_allclose(row.share, 1 - row.left / row.right)
    assert (row.share > 0.8).all()


def test_every_part_has_its_rows(comparison):
    rows = {(row.part, row.quantity) for row in comparison}
    assert {("wheel", "slope"), ("lay_left", "tilt"), ("lay_right", "axial_force"), ("pinion", "twist")} <= rows
    assert len(rows) == len(comparison.rows)
    assert {part for part, _ in rows} == {"lay_left", "lay_right", "wheel", "pinion", "barring_wheel"}


def test_mixes_of_the_comparison(comparison):
    mixes = comparison.mixes
    assert mixes.complete
    assert [mix.words for mix in mixes.corners] == [
        "lay_left soft, lay_right soft",
        "lay_left stiff, lay_right stiff",
        "lay_left soft, lay_right stiff",
        "lay_left stiff, lay_right soft",
    ]
    row = comparison.row("lay_left.tilt")
    tilts = np.array([mix.results["lay_left"].tilt for mix in mixes.corners])
    np.testing.assert_array_equal(row.low, tilts[0])
    np.testing.assert_array_equal(row.high, tilts[1])
    np.testing.assert_array_equal(row.worst, tilts.max(axis=0))
    assert row.worst_mix == ("lay_left stiff, lay_right soft",) * 3


def test_an_axis_at_rest_has_no_ratio(comparison):
    """The pins hold the wheel's neighbour still: nothing divides."""
    row = comparison.row("lay_left.deflection")
    assert np.isnan(row.ratio).all()
    np.testing.assert_allclose(row.share, 1.0, atol=1e-9)


def test_statics_decides_on_two_supports_without_tilt():
    """Reactions on pins and on springs are the same where statics alone decides."""
    held = [
        fs.Bearing("one", at="0 mm", holds=["radial", "axial"], stiffness={"radial": "100 N/um", "axial": "1 N/um"}),
        fs.Bearing("two", at="200 mm", holds=["radial"], stiffness={"radial": "5 N/um"}),
    ]
    found = fs.compare(fs.Model("", [bar(), *held, fs.Force("f", at="80 mm", up="2 kN", axial="10 N")]))
    for address in ("one.radial_force", "two.radial_force", "one.axial_force"):
        np.testing.assert_allclose(found.row(address).ratio, 1.0, rtol=1e-12)
    assert found.mixes is None
    assert found.row("f.deflection").worst is None


def test_pins_that_cannot_hold_are_told():
    one = fs.Bearing(
        "one",
        at="0 mm",
        holds=["radial", "axial"],
        stiffness={"radial": "100 N/um", "axial": "1 N/um", "tilt": "50 N m/mrad"},
    )
    model = fs.Model("", [bar(), one, fs.Force("f", at="50 mm", up="1 kN")])
    assert fs.solve(model)["f"].deflection > 0
    with pytest.raises(fs.FreeMotionError, match=r"^on rigid pins, shaft can swing across its axis about one"):
        fs.compare(model)


def test_two_models_side_by_side():
    stiffer = layshaft().change({"lay_left.stiffness.radial": "220 N/um", "lay_right.stiffness.radial": "220 N/um"})
    found = fs.compare(layshaft(), stiffer)
    assert not found.is_pins
    assert found.mixes is None
    assert (found.row("wheel.deflection").ratio < 0.6).all()
    assert any("lay_left" in change for change in found.changes)


def test_two_models_need_the_same_cases():
    other = layshaft()
    other = fs.Model("", other.parts, other.cases[:1], gravity="down")
    with pytest.raises(fs.UsageError, match="different cases"):
        fs.compare(layshaft(), other)


def test_an_unknown_row_is_refused(comparison):
    with pytest.raises(fs.UsageError, match=r"weel\.deflection"):
        comparison.row("weel.deflection")


# ---- many estimated parts


def many(n, **heading):
    """A long shaft in n bearings of which nobody knows the stiffness."""
    shaft = bar(length="1 m")
    held = [
        fs.Bearing(
            f"b{k}", at=f"{1000 * k / (n - 1)!r} mm", holds=["radial", *(["axial"] if k == 0 else [])],
            stiffness={"radial": "~50 N/um", **({"axial": "20 N/um"} if k == 0 else {})},
        )
        for k in range(n)
    ]  # fmt: skip
    return fs.Model("", [shaft, *held, fs.Force("f", at="430 mm", up="3 kN")], **heading)


@pytest.mark.parametrize("n", [2, 3, 6])
def test_up_to_six_estimated_parts_every_corner_is_solved(n):
    mixes = fs.compare(many(n)).mixes
    assert mixes.complete
    assert len({mix.ends for mix in mixes.corners}) == len(mixes.corners) == 2**n


def test_beyond_six_each_part_alone_stands_at_the_other_end():
    found = fs.compare(many(8))
    mixes = found.mixes
    assert not mixes.complete
    assert len({mix.ends for mix in mixes.corners}) == len(mixes.corners) == 2 + 2 * 8
    odd = [sum(end == "low" for _, end in mix.ends) for mix in mixes.corners]
    assert sorted(odd) == sorted([8, 0, *[1] * 8, *[7] * 8])
    # never milder than both ends
    row = found.row("f.deflection")
    assert (row.worst >= np.maximum(row.low, row.high)).all()


def test_estimates_that_move_together_have_two_corners():
    mixes = fs.compare(many(3, estimates={"together": True})).mixes
    assert [mix.words for mix in mixes.corners] == ["b0 soft, b1 soft, b2 soft", "b0 stiff, b1 stiff, b2 stiff"]
    assert not mixes.complete


def test_a_band_of_ones_own_and_an_estimated_housing():
    give = {
        "radial": {"value": "100 N/um", "low": "80 N/um", "high": "150 N/um"},
        "axial": "10 N/um",
        "tilt": "50 N m/mrad",
    }
    one = fs.Bearing("one", at="0 mm", holds=["radial", "axial"], stiffness=give)
    two = fs.Bearing("two", at="200 mm", holds=["radial"], stiffness={"radial": "100 N/um"})
    model = fs.Model(
        "", [bar(), one, two, fs.Force("f", at="0 mm", up="1 kN")], housing={"seat": {"radial": "~400 N/um"}}
    )
    assert model.estimated == ("one", "housing")
    found = fs.compare(model)
    assert found.mixes.low.words == "one soft, housing soft"
    softer = fs.solve(model.at_band({"one": "low", "housing": "low"}))["one"]
    assert softer.give == pytest.approx(softer.radial_force / 80e6, rel=1e-9)
    assert softer.seat_movement == pytest.approx(softer.radial_force / 200e6, rel=1e-9)


def test_a_spring_that_is_not_used_changes_nothing():
    """A stiffness in an unheld axial direction has no band either way (rule 7 of the interface)."""
    model = layshaft()
    loose = model.change({"lay_left.stiffness.axial": "~60 N/um"})
    np.testing.assert_array_equal(fs.solve(model).lines["layshaft"].u, fs.solve(loose).lines["layshaft"].u)
