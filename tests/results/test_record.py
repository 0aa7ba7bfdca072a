"""Records: strict JSON, SI, and every number the result's own."""

from __future__ import annotations

import json
import math
import re

import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.results.record import comparison_record, results_record, to_json
from tests.results.shafts import EVERY, beam, layshaft


def strict(text: str) -> dict:
    """JSON as RFC 8259 has it: no NaN, no Infinity."""

    def refuse(word: str) -> None:
        raise AssertionError(f"{word} is not JSON")

    return json.loads(text, parse_constant=refuse)


@pytest.fixture(scope="module")
def results() -> fs.Results:
    return fs.solve(layshaft())


@pytest.fixture(scope="module")
def record(results) -> dict:
    return strict(results.to_json())


@pytest.mark.parametrize("name", EVERY)
def test_every_model_gives_strict_json(name):
    model = EVERY[name]()
    text = fs.solve(model).to_json()
    assert text.isascii()
    assert strict(text)["cases"]
    assert not re.search(r"-0\.0\b(?!\d)", text)  # no minus zero
    assert strict(fs.compare(model).to_json())["rows"]


def test_keys_are_stable(record):
    """A change here breaks readers of results.json: raise the version with it."""
    keys = (
        "format version program units model cases parts by_shoulders rolling shafts loads verdicts doubts notes proof"
    )
    assert list(record) == keys.split()
    assert record["format"] == "fe_shaft results"
    assert record["version"] == 1
    assert record["units"] == {"length": "m", "angle": "rad", "force": "N", "moment": "N m", "energy": "J"}
    keys = (
        "limit word part quantity dimension case value min max use use_per_case counting shaft_alone by_shoulders hubs"
    )
    assert list(record["verdicts"][0]) == [*keys.split(), "source", "band"]


def test_parts_are_the_results_in_si(results, record):
    for name, part in results.parts.items():
        told = record["parts"][name]
        for quantity in part.quantities():
            assert told[quantity] == list(part.value(quantity))
    assert record["parts"]["wheel"]["kind"] == "gear"
    assert record["parts"]["wheel"]["shaft"] == "layshaft"
    assert record["parts"]["wheel"]["x"] == pytest.approx(0.038)


def test_stations_are_the_line_in_si(results, record):
    line, told = results.lines["layshaft"], record["shafts"]["layshaft"]
    np.testing.assert_array_equal(told["x"], line.x)
    np.testing.assert_array_equal(told["displacements"], line.u)
    np.testing.assert_array_equal(told["forces_left"], line.force_left)
    np.testing.assert_array_equal(told["forces_right"], line.force_right)
    assert told["columns"]["displacements"] == ["ux", "uy", "uz", "rx", "ry", "rz"]


def test_verdicts_notes_and_proof(results, record):
    verdict, told = results.verdicts[0], record["verdicts"][0]
    assert (told["limit"], told["word"], told["max"], told["min"]) == ("wheel_deflection", "FAIL", 2e-5, None)
    assert told["value"] == verdict.value
    assert told["band"]["worst"] == verdict.band.worst
    assert [note["key"] for note in record["notes"]] == [note.key for note in results.notes]
    assert max(record["proof"]["forces"]) == float(results.proof.forces.max())
    assert set(record["proof"]["stored_energy"]) == set(results.proof.stored)


def test_the_model_is_in_the_record_as_written(results, record):
    assert record["model"]["as_written"]["gears"]["wheel"]["helix"] == "15 deg left"
    assert record["model"]["sha256"] == results.model.digest


def test_loads_are_told(results, record):
    weight = next(load for load in record["loads"] if load["part"] == "barring_wheel")
    assert weight["kind"] == "weight"
    assert weight["force"][0][1] == pytest.approx(-4.1 * 9.80665)
    assert weight["arm"][0] == pytest.approx(0.0225)


def test_what_is_no_number_is_null():
    limit = fs.Limit("a", of="load", quantity="deflection", min="1 um")
    results = fs.solve(beam(fs.Force("load", at="100 mm", up="0 N"), limits=[limit]))
    assert math.isinf(results.verdicts[0].use)
    assert strict(results.to_json())["verdicts"][0]["use"] is None
    assert results_record(results)["verdicts"][0]["use"] == math.inf
    assert strict(to_json({"x": [math.nan, {"y": (math.inf, -0.0)}]})) == {"x": [None, {"y": [None, 0.0]}]}


def test_comparison_record():
    comparison = fs.compare(layshaft())
    record = strict(comparison.to_json())
    assert record == strict(to_json(comparison_record(comparison)))
    assert record["titles"] == ["pins", "bearings"]
    row = next(r for r in record["rows"] if (r["part"], r["quantity"]) == ("wheel", "slope"))
    own = comparison.row("wheel.slope")
    assert row["left"] == list(own.left)
    assert row["worst"] == list(own.worst)
    assert row["worst_mix"] == list(own.worst_mix)
    assert record["mixes"]["all_corners_solved"] is True
    assert {"lay_left": "low", "lay_right": "high"} in record["mixes"]["solved"]
    assert record["left"]["parts"]["wheel"]["deflection"] == row_of(record, "wheel", "deflection")["left"]
    ratio = row_of(record, "lay_left", "deflection")["ratio"]
    assert ratio == [None, None, None]  # a pin gives nothing way


def row_of(record: dict, part: str, quantity: str) -> dict:
    return next(row for row in record["rows"] if (row["part"], row["quantity"]) == (part, quantity))


def test_doubts_are_in_the_record_too():
    """A cantilever far too soft for small movements."""
    shaft = fs.Shaft("rod", [fs.Segment(length="1 m", diameter="5 mm")], material="steel")
    clamp = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
    model = fs.Model("soft", [shaft, clamp, fs.Force("load", at="1 m", up="100 N")])
    (doubt,) = results_record(fs.solve(model))["doubts"]
    assert doubt.startswith("rod slopes ")
    assert "too far for small movements" in doubt
