"""new, write, schema, --set: models in and out."""

import json
import tomllib
from pathlib import Path

import jsonschema
import pytest

import fe_shaft
from fe_shaft.io.model_file import read


@pytest.fixture
def starter(run, folder) -> Path:
    assert run("new", "shaft.toml").code == 0
    return folder / "shaft.toml"


def test_the_starter_is_checked_and_solved_without_complaint(run, starter):
    for command in ("check", "solve", "compare"):
        done = run(command, "shaft.toml")
        assert (done.code, done.err) == (0, "")
    assert run("solve", "shaft.toml", "--strict").code == 0
    assert "FAIL" not in run("solve", "shaft.toml").out


def test_the_starter_says_its_own_name_and_what_comes_next(run, folder):
    done = run("new", "my shaft.toml")
    assert (done.code, done.out) == (0, "")
    assert done.err == (
        'my shaft.toml written. Next: fe-shaft check "my shaft.toml", then fe-shaft compare "my shaft.toml"\n'
    )
    assert "fe-shaft solve my shaft.toml" in (folder / "my shaft.toml").read_text()


def test_the_starters_commented_lines_work_too(starter):
    """Uncommenting the parts that are offered gives a valid model."""
    text = starter.read_text()
    for head in ("# seat =", "# [forces.extra]", '# at = "plain_part"', "# up =", "# front ="):
        assert text.count(head) == 1
        text = text.replace(head, head.removeprefix("# "))
    starter.write_text(text)
    model = read(starter)
    assert model["right_bearing"].seat is not None
    assert model["extra"].force_si == (0.0, -1200.0, 300.0)
    pinned = text.replace("[bearings.right_bearing]", "[pins.right_bearing]", 1)
    starter.write_text("\n".join(row for row in pinned.splitlines() if "170 N/um" not in row and "seat =" not in row))
    assert isinstance(read(starter)["right_bearing"], fe_shaft.Pin)


def test_new_keeps_what_is_there_unless_forced(run, starter):
    starter.write_text("mine")
    assert run("new", "shaft.toml").code == 6
    assert starter.read_text() == "mine"
    assert run("new", "shaft.toml", "--force").code == 0
    assert "format = 1" in starter.read_text()


@pytest.mark.parametrize("name", ["layshaft.toml", "stiffer.toml"])
def test_what_is_written_is_the_same_model(run, folder, name):
    done = run("write", name)
    assert done.code == 0
    (folder / "whole.toml").write_text(done.out)
    assert read(folder / "whole.toml").digest == read(folder / name).digest
    assert "extends" not in tomllib.loads(done.out)
    assert run("write", name, "-o", "other.toml").err == "other.toml written.\n"
    assert (folder / "other.toml").read_text() == done.out


def test_settings_change_the_model_and_not_the_file(run, folder):
    before = (folder / "layshaft.toml").read_text()
    done = run("write", "layshaft.toml", "--set", "layshaft.wheel_seat.diameter=44 mm", "--set", "wheel.teeth=84")
    tables = tomllib.loads(done.out)
    assert tables["shafts"]["layshaft"]["segments"][1]["diameter"] == "44 mm"
    assert tables["gears"]["wheel"]["teeth"] == 84
    assert (folder / "layshaft.toml").read_text() == before


def test_settings_reach_the_solution(run):
    stiff = ("--set", "lay_left.stiffness.radial=220 N/um", "--set", "lay_right.stiffness.radial=220 N/um")
    given = json.loads(run("solve", "layshaft.toml", "--json").out)
    changed = json.loads(run("solve", "layshaft.toml", "--json", *stiff).out)
    assert changed != given
    assert run("solve", "layshaft.toml", *stiff).out != run("solve", "layshaft.toml").out


def test_settings_of_a_comparison_change_the_second_model(run):
    done = run("compare", "layshaft.toml", "layshaft.toml", "--set", "layshaft.wheel_seat.diameter=44 mm")
    assert done.code == 0
    assert "44 mm" in done.out
    assert "38 mm" in done.out


def test_schema_holds_for_the_starter_and_finds_mistakes(run, starter):
    schema = json.loads(run("schema").out)
    jsonschema.Draft202012Validator.check_schema(schema)
    tables = tomllib.loads(starter.read_text())
    jsonschema.validate(tables, schema)
    tables["gears"]["gear"]["theeth"] = 3
    with pytest.raises(jsonschema.ValidationError):
        jsonschema.validate(tables, schema)


def test_schema_into_a_file(run, folder):
    done = run("schema", "-o", "schema.json")
    assert (done.code, done.out, done.err) == (0, "", "schema.json written.\n")
    assert json.loads((folder / "schema.json").read_text()) == json.loads(run("schema").out)
