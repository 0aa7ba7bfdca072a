"""The folder of results: everything is there, whole, and can be read back."""

from __future__ import annotations

import csv
import json

import meshio
import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.io.export import export
from tests.results.shafts import beam, hostile, layshaft

TABLES = ["movement.csv", "forces.csv", "stations.csv", "shoulders.csv", "notes.csv", "results.json", "model.toml"]


@pytest.fixture(scope="module")
def results() -> fs.Results:
    return fs.solve(layshaft())


def test_everything_is_written_and_named(results, tmp_path):
    folder = tmp_path / "out" / "deep"
    written = export(results, folder, fs.compare(layshaft()))
    assert sorted(written) == sorted(folder.iterdir())  # nothing half-written beside them
    names = [path.name for path in written]
    assert names[-8:] == [*TABLES, "comparison.csv"]
    for case in results.cases:
        assert {f"line_{case}.vtu", f"surface_{case}.vtu"} <= set(names)
    assert {"line_cases.pvd", "surface_cases.pvd"} <= set(names)
    assert all(path.stat().st_size > 0 for path in written)


def test_without_a_comparison_there_is_none(results, tmp_path):
    assert not any(path.name == "comparison.csv" for path in export(results, tmp_path))


def test_the_model_as_solved_gives_the_same_results(results, tmp_path):
    export(results, tmp_path)
    again = fs.solve(fs.read(tmp_path / "model.toml"))
    assert again.cases == results.cases
    for name, part in results.parts.items():
        np.testing.assert_array_equal(again.parts[name].u, part.u)


def test_tables_and_record_are_those_of_the_results(results, tmp_path):
    export(results, tmp_path)
    assert (tmp_path / "movement.csv").read_text(encoding="utf-8") == results.to_csv()
    assert (tmp_path / "results.json").read_text(encoding="utf-8") == results.to_json()
    with (tmp_path / "stations.csv").open(encoding="utf-8", newline="") as file:
        rows = list(csv.DictReader(file))
    assert len(rows) == 3 * len(results.lines["layshaft"].x)
    line = meshio.read(tmp_path / "line_running.vtu")
    up = [float(row["up_um"]) for row in rows if row["case"] == "running"]
    np.testing.assert_allclose(line.point_data["displacement [m]"][:, 1] * 1e6, up, rtol=1e-12)


def test_notes_tell_what_leaves_the_range_of_the_shoulders_rule(tmp_path):
    rim = [fs.Segment(length="60 mm", diameter="40 mm"), fs.Segment("rim", length="4 mm", diameter="140 mm")]
    held = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])
    results = fs.solve(fs.Model("m", [fs.Shaft("s", rim, material="C45"), held, fs.Force("f", at="s.right", up="1 N")]))
    export(results, tmp_path)
    with (tmp_path / "notes.csv").open(encoding="utf-8", newline="") as file:
        rows = [tuple(row.values()) for row in csv.DictReader(file)]
    assert rows == [(note.key, note.sentence) for note in results.notes]
    assert any("D/d = 3" in sentence for _, sentence in rows)


def test_hostile_names_stay_inside_the_folder(tmp_path):
    results = fs.solve(hostile())
    written = export(results, tmp_path)
    assert {path.parent for path in written} == {tmp_path}
    assert json.loads((tmp_path / "results.json").read_text(encoding="utf-8"))["cases"] == list(results.cases)
    text = (tmp_path / "movement.csv").read_text(encoding="utf-8")
    assert "\u30dc\u30fc\u30eb\u8ef8\u53d7" in text


def test_writing_again_replaces_and_leaves_other_files_alone(results, tmp_path):
    (tmp_path / "notes.txt").write_text("mine", encoding="utf-8")
    (tmp_path / "forces.csv").write_text("old", encoding="utf-8")
    first = export(results, tmp_path)
    before = {path.name: path.read_bytes() for path in first}
    assert {path.name: path.read_bytes() for path in export(results, tmp_path)} == before
    assert (tmp_path / "notes.txt").read_text(encoding="utf-8") == "mine"
    assert before["forces.csv"] != b"old"


def test_a_file_in_place_of_the_folder_is_told(results, tmp_path):
    (tmp_path / "out").write_text("a file", encoding="utf-8")
    with pytest.raises(fs.FileError, match=r"out: the folder cannot be made: "):
        export(results, tmp_path / "out")
    assert (tmp_path / "out").read_text(encoding="utf-8") == "a file"


def test_a_table_that_cannot_be_written_leaves_the_old_ones_whole(results, tmp_path):
    (tmp_path / "stations.csv").mkdir()
    (tmp_path / "movement.csv").write_text("old", encoding="utf-8")
    with pytest.raises(fs.FileError, match=r"stations\.csv: cannot be written"):
        export(results, tmp_path)
    assert (tmp_path / "movement.csv").read_text(encoding="utf-8") == "old"
    assert not [path for path in tmp_path.iterdir() if path.name.startswith(".part")]


def test_a_model_without_cases_is_exported(tmp_path):
    results = fs.solve(beam(fs.Force("load", at="100 mm", up="-1 kN")))
    assert (tmp_path / "line_as_loaded.vtu") in export(results, tmp_path)
