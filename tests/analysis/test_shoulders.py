"""Shoulders in the solution: on and off, where they sit, what is said of them."""

import json

import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.analysis.recovery import solve_once
from fe_shaft.fem.shoulders import Contour, shoulder_lumps
from fe_shaft.results.table import shoulder_table

E, G = 210e9, 81e9  # 42CrMo4 of the built-in list


def cantilever(segments, loads, **words):
    clamp = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
    shaft = fs.Shaft("shaft", segments, material="42CrMo4")
    return fs.Model("cantilever", [shaft, clamp, *loads], **words)


STEPPED = [
    fs.Segment("thick", length="60 mm", diameter="50 mm"),
    fs.Segment("thin", length="80 mm", diameter="30 mm", fillet="2 mm"),
]
TIP = fs.Force("tip", at="140 mm", couple={"front": "100 N m", "axial": "50 N m"}, axial="2 kN")


def test_shoulders_count_unless_switched_off_and_the_notes_say_which():
    model = cantilever(STEPPED, [TIP])
    assert model.shoulders == "on"
    assert any("make the shafts softer" in note.sentence for note in model.notes)
    assert any("carry to their rims" in note.sentence for note in cantilever(STEPPED, [TIP], shoulders="off").notes)
    smooth = cantilever([fs.Segment("one", length="140 mm", diameter="30 mm")], [TIP])
    assert not any(note.key == "shoulders" for note in smooth.notes)


def test_a_shoulder_adds_exactly_its_lumps():
    """Under pure moment, torque and axial force a cantilever's tip moves by the lumps times the load (unit load)."""
    off = fs.solve(cantilever(STEPPED, [TIP], shoulders="off")).case()["tip"]
    on = fs.solve(cantilever(STEPPED, [TIP])).case()["tip"]
    lumps = shoulder_lumps(Contour.of([0.06, 0.08], [0.05, 0.03], fillet_left=[0, 0.002], fillet_right=[0, 0.002]))
    assert on.u[5] - off.u[5] == pytest.approx(100 * lumps.bending.sum() / E, rel=1e-9)
    assert on.u[3] - off.u[3] == pytest.approx(50 * lumps.torsion.sum() / G, rel=1e-9)
    assert on.u[0] - off.u[0] == pytest.approx(2000 * lumps.axial.sum() / E, rel=1e-9)
    levers = 0.140 - lumps.bending_place
    assert on.u[1] - off.u[1] == pytest.approx(100 * (lumps.bending * levers).sum() / E, rel=1e-9)


def test_cutting_a_segment_or_adding_stations_changes_nothing():
    cut = [
        fs.Segment("thick", length="60 mm", diameter="50 mm"),
        fs.Segment("thin", length="1 mm", diameter="30 mm", fillet="2 mm"),
        fs.Segment("rest", length="79 mm", diameter="30 mm", fillet="2 mm"),
    ]
    loads = [TIP, fs.Force("spread", at="70 mm", up="-3 kN", front="1 kN", spread="40 mm")]
    one = fs.solve(cantilever(STEPPED, loads, gravity="down"))
    two = fs.solve(cantilever(cut, loads, gravity="down"))
    marks = [fs.Force(f"mark_{x}", at=f"{x} mm", up="0 N") for x in (58, 60, 61, 62, 64, 100)]
    three = fs.solve(cantilever(STEPPED, [*loads, *marks], gravity="down"))
    for other in (two, three):
        np.testing.assert_allclose(other["tip"].u, one["tip"].u, rtol=1e-11)
    for mark in marks:
        u, _ = one.lines["shaft"].at(three.model.places[mark.name].x)
        np.testing.assert_allclose(three[mark.name].u, u[:, 0], rtol=1e-9, atol=1e-18)
    assert max(r.proof.worst for r in (one, two, three)) < 1e-13


def test_without_shear_there_is_no_shear_lump():
    force = fs.Force("tip", at="140 mm", up="1 kN")
    segments = [fs.Segment(s.name, length=s.length.text, diameter=s.diameter.text, shear="none") for s in STEPPED]
    lumps = shoulder_lumps(Contour.of([0.06, 0.08], [0.05, 0.03]))
    off = fs.solve(cantilever(segments, [force], shoulders="off")).case()["tip"].up
    on = fs.solve(cantilever(segments, [force])).case()["tip"].up
    levers = 0.140 - lumps.bending_place
    assert on - off == pytest.approx(1000 * (lumps.bending * levers**2).sum() / E, rel=1e-9)


def test_what_leaves_the_range_of_the_rule_is_told():
    disc = [*STEPPED, fs.Segment("disc", length="4 mm", diameter="120 mm")]
    results = fs.solve(cantilever(disc, [TIP]))
    told = [note.sentence for note in results.notes if note.key == "shoulders"]
    assert any("shaft.thin" in sentence and "thin disc" in sentence for sentence in told)
    assert any("D/d = 3" in sentence for sentence in told)
    sizes = [(60, 50), (80, 30), (4, 120), (80, 30), (3, 26), (80, 30), (4, 120)]
    bored = [fs.Segment(length=f"{length} mm", diameter=f"{d} mm", bore="20 mm") for length, d in sizes]
    said = " ".join(str(fs.solve(cantilever(bored, [TIP]))).split())
    for kind in (
        "a thin disc ends the shaft beside",
        "a thin flange beside",
        "a narrow groove",
        "a step beyond D/d = 3",
    ):
        assert said.count(kind) == 1, kind
    assert "more like this (shoulders)" not in said
    assert not any("shaft." in note.sentence for note in fs.solve(cantilever(STEPPED, [TIP])).notes)


def test_the_rule_is_worked_out_once_for_all_models_of_one_geometry():
    model = cantilever(STEPPED, [TIP])
    solve_once(model)
    arrays = model.segment_arrays["shaft"]
    assert model.pinned().segment_arrays["shaft"].memo["shoulders"] is arrays.memo["shoulders"]


def test_shoulders_are_reached_from_file_and_command_line(tmp_path, capsys):
    from fe_shaft.cli import main

    path = tmp_path / "shaft.toml"
    fs.write(cantilever(STEPPED, [TIP]), path)
    assert fs.read(path).shoulders == "on"
    assert main(["compare", str(path), str(path), "--set", "shoulders=off"]) == 0
    assert "shoulders: not written -> off" in capsys.readouterr().out


def test_every_result_tells_what_of_it_the_shoulders_make():
    limit = fs.Limit("tip_slope", of="tip", quantity="slope", max="2 mrad")
    on, off = (fs.solve(cantilever(STEPPED, [TIP], limits=[limit], shoulders=each)) for each in ("on", "off"))
    for quantity in ("deflection", "slope", "twist", "axial"):
        made = on.value(f"tip.{quantity}")[0] - off.value(f"tip.{quantity}")[0]
        assert made > 0
        assert on.by_shoulders(f"tip.{quantity}")[0] == pytest.approx(made, rel=1e-12)
    slope = on.by_shoulders("tip.slope", case=on.cases[0], unit="rad")
    assert on.verdicts[0].by_shoulders == pytest.approx(slope, rel=1e-12)
    assert json.loads(on.to_json())["by_shoulders"]["tip"]["slope"] == pytest.approx([slope], rel=1e-12)
    assert shoulder_table(on).column("slope_mrad")[1] == pytest.approx(1e3 * slope, rel=1e-12)
    row = next(row for row in str(on).splitlines() if row.startswith("  tip "))
    assert float(row.split()[-1]) == pytest.approx(1e3 * slope, rel=1e-2)
    assert f"shoulders: +{1e3 * slope:.3g} mrad" in str(on)
    share = 100 * on.by_shoulders("tip.deflection")[0] / on.value("tip.deflection")[0]
    assert f"({share:.2g} %) of the tip's movement" in str(fs.compare(cantilever(STEPPED, [TIP]), on.model))


def test_a_comparison_on_pins_alone_tells_the_shoulders_share():
    results = fs.solve(cantilever(STEPPED, [TIP]))
    made = results.by_shoulders("tip.deflection")[0]
    share = 100 * made / results.value("tip.deflection")[0]
    said = " ".join(str(fs.compare(cantilever(STEPPED, [TIP]))).split())
    assert f"nothing to compare. Shoulders make {made:.3g} um ({share:.2g} %) of the tip's movement." in said


def test_a_shaft_without_shoulders_has_nothing_by_them():
    smooth = [fs.Segment("one", length="140 mm", diameter="30 mm")]
    for results in (fs.solve(cantilever(smooth, [TIP])), fs.solve(cantilever(STEPPED, [TIP], shoulders="off"))):
        assert results.plain is None
        assert results.by_shoulders("tip.deflection")[0] == 0
        assert json.loads(results.to_json())["by_shoulders"] is None
        assert "shoulders add" not in str(results)


def test_a_load_beside_a_shoulder_of_a_hollow_shaft_is_told():
    """Within 0.3 diameters of a step of a bored shaft the rule is off by up to 12 % (`test_solid_shafts.py`)."""
    bored = [
        fs.Segment("thick", length="60 mm", diameter="50 mm", bore="20 mm"),
        fs.Segment("thin", length="80 mm", diameter="30 mm", bore="20 mm"),
    ]

    def told(segments, x, spread="0.2 mm"):
        push = fs.Force("push", at=f"{x} mm", up="1 kN", spread=spread)
        return [note.sentence for note in fs.solve(cantilever(segments, [push])).notes if "push" in note.sentence]

    assert "within 0.3 diameters of a shoulder of a hollow shaft" in told(bored, 68.9)[0]
    assert told(bored, 51.1)
    assert not told(bored, 69.2)
    assert not told(bored, 50.8)
    assert told(bored, 68, "13 mm")  # half of it
    assert not told(bored, 70, "13 mm")
    assert not told(STEPPED, 68)
    found = fs.check(cantilever(bored, [fs.Force("push", at="65 mm", up="1 kN")]))
    assert any("push" in note.sentence for note in found.notes)
