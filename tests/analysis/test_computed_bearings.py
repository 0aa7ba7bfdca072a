"""Bearings computed from what is inside them, in the shaft solution: a published example, statics, rest, and words."""

import csv
import json

import numpy as np
import pytest

import fe_shaft as fs

#: T. A. Harris, Rolling Bearing Analysis, the 209 deep-groove example (from memory): inputs.
B209 = {"elements": 9, "element_diameter": "12.7 mm", "pitch_diameter": "65 mm"}
B306 = {"elements": 8, "element_diameter": "12.3 mm", "pitch_diameter": "51 mm"}
ROLLERS = {"elements": 14, "element_diameter": "10 mm", "pitch_diameter": "65 mm", "roller_length": "9.6 mm"}
BARRELS = {"elements": 14, "element_diameter": "11 mm", "pitch_diameter": "66 mm", "roller_length": "9 mm"}


def ball(name, at, holds=("radial",), clearance="15 um", geometry=B209, **words):
    kind = words.pop("kind", "deep groove ball bearing")
    return fs.Bearing(name, at=at, holds=list(holds), kind=kind, geometry=geometry, radial_clearance=clearance, **words)


def model(bearings, *forces, diameter="120 mm", **words):
    shaft = fs.Shaft("shaft", [fs.Segment("body", length="300 mm", diameter=diameter)], material="C45")
    return fs.Model("rolling", [shaft, *bearings, *forces], **words)


def test_harris_209_under_radial_load():
    """Two of them with 8900 N each on a shaft that hardly bends: 60.5 um and 4536 N on the ball in the line of the load
    (Harris, from memory, read from a chart and rounded: 0.5 %)."""
    bearings = [ball("near", "50 mm", ["radial", "axial"]), ball("far", "250 mm")]
    results = fs.solve(model(bearings, fs.Force("load", at="150 mm", up="17.8 kN"), diameter="400 mm"))
    for name in ("near", "far"):
        bearing = results.rolling[name]
        assert bearing.force[0, 1] == pytest.approx(8900, rel=1e-6)
        assert 1e6 * bearing.movement[0, 1] == pytest.approx(60.5, rel=5e-3)
        assert bearing.most[0] == pytest.approx(4536, rel=5e-3)
        np.testing.assert_allclose(bearing.load[0, [1, 8]], 2846, rtol=5e-3)
        assert bearing.carrying[0] == 5
        assert bearing.secant_stiffness[0] == pytest.approx(8900 / 60.5e-6, rel=6e-3)
        assert bearing.tangent_stiffness[0] > 1.4 * bearing.secant_stiffness[0]


def mixed():
    bearings = [
        ball("fixed", "30 mm", ["radial", "axial"], geometry=B306),
        fs.Bearing("rollers", at="150 mm", holds=["radial"], kind="cylindrical roller bearing", geometry=ROLLERS,
                   radial_clearance="20 um"),
        fs.Bearing("barrels", at="270 mm", holds=["radial"], kind="spherical roller bearing", geometry=BARRELS,
                   contact_angle="10 deg", radial_clearance="30 um", seat={"radial": "400 N/um", "axial": "100 N/um"}),
    ]  # fmt: skip
    loads = [
        fs.Force("push", at="90 mm", up="-4 kN", front="1 kN", axial="600 N"),
        fs.Force("pull", at="210 mm", up="3 kN", front="2 kN", spread="20 mm"),
    ]
    cases = [fs.Case("both"), fs.Case("one", forces=["push"]), fs.Case("light", forces={"pull": 0.01})]
    return model(bearings, *loads, diameter="45 mm", cases=cases, gravity="down")


def test_balls_rollers_and_barrels_on_one_shaft():
    results = fs.solve(mixed())
    assert results.proof.worst < 1e-9
    for name in ("fixed", "rollers", "barrels"):
        found = results.rolling[name]
        held = 1.01 * found.held.max()  # the springs that hold floating rings act beside the law
        np.testing.assert_allclose(results[name].wrench[:, :3], -found.force[:, :3], rtol=1e-9, atol=held + 1e-6)
        x, y = np.cos(found.place), np.sin(found.place)
        radial = found.load * np.cos(found.angle)
        np.testing.assert_allclose(radial @ x, found.force[:, 1], rtol=1e-6, atol=1e-3)
        np.testing.assert_allclose(radial @ y, found.force[:, 2], rtol=1e-6, atol=1e-3)
    assert results.rolling["rollers"].word == "rollers"
    assert results.rolling["barrels"].number == 28  # two rows
    assert not np.abs(results.rolling["barrels"].force[:, 4:]).max() > 1e-6  # they do not resist tilting
    assert np.abs(results["barrels"].axial_force).max() < 1e-2  # the outer ring slides
    assert results["fixed"].axial_force[0] == pytest.approx(-600, rel=1e-5)


def test_a_case_comes_to_rest_as_it_does_alone():
    whole = mixed()
    together = fs.solve(whole)
    for case in whole.cases:
        alone = fs.solve(fs.Model("alone", whole.parts, [case], gravity="down"))
        assert alone.cases == (case.name,)
        np.testing.assert_allclose(
            alone.case(case.name)["push"].u, together.case(case.name)["push"].u, rtol=1e-9, atol=1e-15
        )


@pytest.mark.parametrize("seed", range(12))
def test_random_shafts_come_to_rest(seed):
    rng = np.random.default_rng(seed)
    bearings = [
        ball(f"b{k}", f"{x} mm", ["radial", "axial"] if k == 0 else ["radial"], f"{rng.uniform(-5, 60):.3f} um")
        for k, x in enumerate(np.linspace(20, 280, rng.integers(2, 5)))
    ]
    forces = [
        fs.Force(f"f{k}", at=f"{rng.uniform(0, 300):.1f} mm", up=f"{u:.3f} N", front=f"{v:.3f} N", axial=f"{a:.3f} N")
        for k, (u, v, a) in enumerate(rng.normal(size=(3, 3)) * 10 ** rng.uniform(0, 4, (3, 1)) * [1, 1, 0.2])
    ]
    results = fs.solve(model(bearings, *forces, diameter=f"{rng.uniform(25, 60):.1f} mm"))
    assert results.rolling["b0"].steps.max() <= 60
    assert results.proof.worst < 1e-9
    total = sum(results[b.name].wrench[0, :3] for b in bearings) + sum(results[f.name].load[0, :3] for f in forces)
    np.testing.assert_allclose(total, 0, atol=1e-9 * max(np.abs(results[f.name].load).max() for f in forces))


def test_less_clearance_is_stiffer_and_pins_are_the_limit():
    def moved(clearance):
        bearings = [ball("near", "50 mm", ["radial", "axial"], clearance), ball("far", "250 mm", clearance=clearance)]
        return fs.solve(model(bearings, fs.Force("load", at="150 mm", up="5 kN")))["load"].deflection[0]

    loose, snug, tight = (moved(clearance) for clearance in ("40 um", "0 um", "-10 um"))
    bearings = [ball("near", "50 mm", ["radial", "axial"]), ball("far", "250 mm")]
    pins = fs.compare(model(bearings, fs.Force("load", at="150 mm", up="5 kN"))).left["load"].deflection[0]
    assert loose > snug + 15e-6 > tight > pins


def test_dents_are_a_doubt():
    """4200 MPa for balls, 4000 MPa for rollers (ISO 76, from memory)."""
    bearings = [ball("near", "50 mm", ["radial", "axial"]), ball("far", "250 mm")]
    for size, told in (("20 kN", False), ("200 kN", True)):
        results = fs.solve(model(bearings, fs.Force("load", at="150 mm", up=size)))
        assert (results.rolling["near"].peak_pressure.max() > 4.2e9) == told
        assert ("near presses its balls with" in str(results)) is told
        assert any("leave dents" in doubt for doubt in json.loads(results.to_json())["doubts"]) is told


def test_every_element_stands_in_a_table(tmp_path):
    results = fs.solve(mixed())
    paths = fs.export(results, tmp_path)
    assert tmp_path / "elements.csv" in paths
    rows = list(csv.DictReader((tmp_path / "elements.csv").read_text(encoding="utf-8").splitlines()))
    assert len(rows) == 3 * (8 + 14 + 28)
    own = [float(row["load_N"]) for row in rows if (row["case"], row["part"]) == ("both", "fixed")]
    np.testing.assert_allclose(own, results.rolling["fixed"].load[0], rtol=1e-12)
    places = [float(row["place_deg"]) for row in rows if (row["case"], row["part"]) == ("both", "fixed")]
    np.testing.assert_allclose(places, 45.0 * np.arange(8))


def test_words_tables_and_files_tell_what_is_carried():
    results = fs.solve(mixed())
    text = str(results)
    fixed = results.rolling["fixed"]
    row = next(line for line in text.splitlines() if "of 8 balls" in line)
    assert row.split()[:4] == ["fixed", str(fixed.carrying[0]), "of", "8"]
    assert float(row.split()[5]) == pytest.approx(fixed.most[0], rel=5e-3)
    assert f"bearings at rest after {fixed.steps.max()} steps" in text
    told = json.loads(results.to_json())["rolling"]["fixed"]
    np.testing.assert_allclose(told["load"], fixed.load)
    check = str(fs.check(mixed()))
    assert "computed: deep groove ball bearing, 8 balls of 12.3 mm on 51 mm" in check
    assert "its outer ring slides" in check
    keys = {note.key for note in results.notes}
    assert {"fixed.geometry.groove", "rollers.geometry"} <= keys
    assert json.loads(fs.compare(mixed()).to_json())["right"]["rolling"]["barrels"]["word"] == "rollers"
