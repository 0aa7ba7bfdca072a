"""The reference of keys, the JSON Schema and the typed words all come from the nouns themselves."""

import json
import tomllib
from pathlib import Path
from typing import Any

import jsonschema
import pytest

import fe_shaft.model as fs
from fe_shaft.model.draft import FILE_KEYS
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.reference import entries, explain, units_of, words
from fe_shaft.model.schema import json_schema
from tests.model.keywords_text import keywords_text
from tests.model.small import model

LAYSHAFT = Path(__file__).parent.parent / "io" / "layshaft.toml"


@pytest.fixture(scope="module")
def validator() -> jsonschema.Draft202012Validator:
    schema = json_schema()
    jsonschema.Draft202012Validator.check_schema(schema)
    return jsonschema.Draft202012Validator(schema)


def test_every_key_is_in_the_reference() -> None:
    listed = {(entry.group, entry.key) for entry in entries()}
    assert len(listed) == len(entries())
    for group, noun in GROUPS.items():
        keys = set(noun.model_fields) - {"name", "range_check", "source"}
        assert {(group, key) for key in keys} <= listed
    assert {("", key) for key in (*fs.Heading.model_fields, *FILE_KEYS)} <= listed


def test_an_entry_tells_kind_unit_range_and_default() -> None:
    (facewidth,) = explain("facewidth")
    assert (facewidth.group, facewidth.kind, facewidth.unit, facewidth.usual) == (
        "gears",
        "length",
        "mm",
        "0.5 mm to 1.5 m",
    )
    assert facewidth.example == 'facewidth = "32 mm"'
    (angle,) = explain("gears.pressure_angle")
    assert (angle.default, angle.required, angle.unit) == ('"20 deg"', False, "deg")
    (holds,) = explain("pins.holds")
    assert holds.required
    assert holds.kind == "list of: radial | axial | stops_left | stops_right | tilt | spin"


def test_explain_finds_keys_and_groups() -> None:
    assert {entry.group for entry in explain("material")} == {"shafts", "shafts.segments"}
    assert {entry.key for entry in explain("materials")} >= {"density", "poisson_ratio"}
    assert explain("nonsense") == ()
    assert {"facewidth", "gears", "bearings.stiffness"} <= set(words())
    assert "mm" in units_of("length")


def test_examples_of_the_reference_can_be_read() -> None:
    """Each example is TOML and passes its own noun's check."""
    for group, noun in GROUPS.items():
        for entry in (entry for entry in entries() if entry.group == group):
            table = tomllib.loads(entry.example)
            _, faults = noun.attempt({"name": "x", **table})
            wrong = [fault for fault in faults if fault.path == (entry.key,) and "is not written" not in fault.sentence]
            allowed = (
                "only a model file reads files",
                "nothing says how wide it is",
                "belongs to bevel gears",
                "belongs to a contour_file",
                "belongs to a bearing that is computed",
            )
            assert all(any(word in fault.sentence for word in allowed) for fault in wrong), (entry, wrong)


def test_a_good_file_passes_the_schema(validator: Any) -> None:
    validator.validate(tomllib.loads(LAYSHAFT.read_text(encoding="utf-8")))
    validator.validate({"format": 1, **model(gravity="down", housing={"seat": {"radial": "4 N/um"}}).to_table()})
    json.dumps(json_schema())


def test_a_variant_passes_the_schema(validator: Any) -> None:
    validator.validate(
        tomllib.loads(
            'extends = "a.toml"\nremove = ["x"]\nchange.a.b = "3 mm"\n[add.masses.disc]\nat = "stub"\nmass = "2 kg"'
        )
    )


@pytest.mark.parametrize(
    "text",
    [
        "colour = 1",
        '[gears.wheel]\nat = "1 mm"\nbeta = "3 deg"',
        '[gears.wheel]\nat = "1 mm"\nteeth = "3"',
        '[pins.p]\nat = "1 mm"\nholds = ["axail"]',
        '[pins.p]\nat = "1 mm"',
        '[cases.c]\nturns = "clockwise"',
        '[shafts.s]\nsegments = [{ length = 3, diameter = "3 mm" }]',
        '[shafts.s]\nmaterial = "steel"',
        '[pins.p]\nname = "p"\nat = "1 mm"\nholds = ["radial"]',
        "[add.sheep.dolly]",
    ],
)
def test_the_schema_refuses_wrong_files(validator: Any, text: str) -> None:
    assert not validator.is_valid(tomllib.loads(text))


def test_typed_words_are_up_to_date() -> None:
    there = (Path(fs.__file__).parent / "keywords.py").read_text(encoding="utf-8")
    assert _plain(there) == _plain(keywords_text()), "run python -m tests.model.keywords_text"


def _plain(text: str) -> str:
    """Text without the line breaks and commas that a formatter adds."""
    return "".join(text.split()).replace(",]", "]")
