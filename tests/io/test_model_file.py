"""Model files: read with file and line in every sentence, all mistakes at once; written and read back."""

import os
import random
import re
import subprocess
import sys
import time
import tomllib
from collections.abc import Callable
from pathlib import Path
from typing import Any

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

import fe_shaft.model as fs
from fe_shaft.errors import FileError, ModelError, ShaftError, UsageError
from fe_shaft.io.model_file import parse_setting, read, write, write_text
from fe_shaft.io.toml_text import to_toml
from tests.model.small import model

LAYSHAFT = Path(__file__).with_name("layshaft.toml")
TEXT = LAYSHAFT.read_text(encoding="utf-8")
PLAIN = """[shafts.s]
material = "steel"
segments = [
  { name = "a", length = "20 mm", diameter = "30 mm" },
  { name = "b", length = "40 mm", diameter = "40 mm" },
]
[pins.p]
at = "a"
holds = ["radial", "axial"]
"""


@pytest.fixture
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    """An own folder to write models in, and to name them in short."""
    home = tmp_path / "models"
    home.mkdir()
    monkeypatch.chdir(home)
    return home


def problems(text: str | bytes, **files: str) -> list[str]:
    """Everything that is told about a model file; other files beside it by name (dots as __)."""
    for name, content in files.items():
        Path(name.replace("__", ".")).write_text(content, encoding="utf-8")
    Path("m.toml").write_bytes(text if isinstance(text, bytes) else text.encode())
    with pytest.raises(ModelError) as caught:
        read("m.toml")
    return [str(each) for each in caught.value.problems]


# ---- reading


def test_the_layshaft_is_read() -> None:
    made = read(LAYSHAFT)
    assert made.title == "Layshaft of the compost drum drive"
    assert [case.name for case in made.cases] == ["running", "starting", "reversed_jam"]
    assert made.places["barring_wheel"].x == pytest.approx(0.1685)
    assert made.cg("barring_wheel")[0] == pytest.approx(0.191)
    assert made.estimated == ("lay_left", "lay_right")
    assert made.targets("gear_slope") == ("wheel", "pinion")


def test_a_script_says_the_same_in_the_same_words() -> None:
    again = fs.Model.from_tables(tomllib.loads(TEXT))[0]
    assert again.digest == read(LAYSHAFT).digest


def test_every_address_has_its_file_and_line() -> None:
    made = read(LAYSHAFT)
    lines = TEXT.split("\n")
    for place, (file, line) in made.source_lines.items():
        assert file == str(LAYSHAFT)
        key = place.split(".")[-1]
        assert key in lines[line - 1] or key.startswith("segment_") or key.isdigit(), place
    assert made.source_lines["layshaft.wheel_seat.diameter"][1] == next(
        number for number, line in enumerate(lines, 1) if "wheel_seat" in line
    )
    assert len(made.source_lines) > 80
    assert "layshaft.wheel_seat" in made.source_lines


def test_strings_and_lists_over_several_lines_do_not_shift_lines(folder: Path) -> None:
    text = (
        'question = """\nseveral = "lines"\n[shafts.x]\n# no comment\n"""\n'
        "source = '''\n\\'''\n"
        + PLAIN.replace('holds = ["radial", "axial"]', 'holds = [ # [ "\n  "radial",\n  "axail",\n]')
    )
    assert problems(text) == ['m.toml:16 p.holds: "axail" is not possible here. Nearest: axial.']


@pytest.mark.parametrize("ending", ["\n", "\r\n"])
def test_line_ends_of_any_system(folder: Path, ending: str) -> None:
    text = PLAIN.replace('"40 mm", d', "40, d").replace("\n", ending)
    assert problems(text) == ['m.toml:5 s.b.length: 40 has no unit. Write "40 mm".']


def test_a_byte_order_mark_is_passed_over(folder: Path) -> None:
    Path("m.toml").write_bytes(b"\xef\xbb\xbf" + PLAIN.encode())
    assert read("m.toml")["p"].holds == ("radial", "axial")


def test_all_mistakes_at_once_in_the_order_of_the_file(folder: Path) -> None:
    """The slips that the terminal's page on errors shows, in one file."""
    text = """[shafts.layshaft]
material = "42CrMo4"
segments = [
  { name = "wheel_seat", length = 38, diameter = "38 mm" },
  { name = "collar", length = "10 mm", diameter = "46,5 mm" },
]
[bearings.lay_left]
at = "wheel_seat"
holds = ["radial"]
stiffness = { radial = "93 N/m" }
[gears.wheel]
at = "wheel_seat"
teeth = 85
normal_module = "2 mm"
facewidth = "32 mm"
mate = "9 o'clock"
beta = "15 deg"
[cases.running]
enters = "wheel"
torque = "133 N m"
turns = "clockwise"
[limits.wheel_deflection]
of = "weel"
quantity = "deflection"
max = "20 um"
"""
    assert problems(text) == [
        'm.toml:4 layshaft.wheel_seat.length: 38 has no unit. Write "38 mm".',
        'm.toml:5 layshaft.collar.diameter: "46,5 mm" has a decimal comma. Write "46.5 mm".',
        'm.toml:10 lay_left.stiffness.radial: "93 N/m" is 0.000093 N/um; usual: 0.5 to 20000. Meant: N/um? '
        '(to keep it: range_check = "off" in this table)',
        'm.toml:17 wheel.beta: beta is not a key here. Write helix = "15 deg left" (beta).',
        'm.toml:21 running.turns: "clockwise": from which end? Write "clockwise from left" or "clockwise from right".',
        'm.toml:23 wheel_deflection.of: no part is called "weel". Nearest: wheel.',
    ]


@pytest.mark.parametrize(
    ("text", "told"),
    [
        ("colour = 1\n" + PLAIN, "m.toml:1 colour: colour is not a key here. Keys: format, title, question, "),
        ("[bearing.x]\n" + PLAIN, "m.toml:1 bearing: bearing is not a key here. Nearest: bearings."),
        ("format = 2\n" + PLAIN, "m.toml:1 format: 2 is not possible here. Write 1."),
        (
            'gears = "none"\n' + PLAIN,
            "m.toml:1 gears: gears is text, not a group of tables. Write [gears.wheel], one table for each.",
        ),
        (
            "[[gears]]\n" + PLAIN,
            "m.toml:1 gears: gears is a list, not a group of tables. Write [gears.wheel], one table for each.",
        ),
        (
            PLAIN + '[gears]\nat = "a"\n',
            'm.toml:11 at: "at" is text, not a table of gears. Write the key under a heading with a name: '
            "[gears.wheel].",
        ),
        (
            PLAIN + "[gears]\nwheel = 3\n",
            'm.toml:11 wheel: "wheel" is a number, not a table of gears. Write [gears.wheel] and its keys below.',
        ),
        (
            PLAIN + '[masses.m]\nname = "m"\nat = "a"\nmass = "1 kg"\n',
            "m.toml:11 m.name: name stands in the heading [masses.m] already. Leave it out.",
        ),
        (
            PLAIN + '[masses."big one"]\nat = "a"\nmass = "1 kg"\n',
            'm.toml:10 big one: "big one" is not a name: a letter first, then letters, digits, _ and -. Write big_one.',
        ),
        (
            PLAIN + "[gear_pairs.stage_1]\n",
            'm.toml:10 gear_pairs: gear_pairs is not known yet in this version. Give each gear its own mate = "9 '
            "o'clock\" and module instead.",
        ),
        (
            PLAIN + "[catalogue.6306]\n",
            "m.toml:10 catalogue: catalogue is not known yet in this version. Write the figures of the bearing as "
            'stiffness = { radial = "...", axial = "..." }.',
        ),
        ('title = "x"\n', "m.toml : the model has no shaft. Write [shafts.layshaft] with its segments."),
        (
            "remove = []\n" + PLAIN,
            'm.toml:1 remove: remove belongs into a variant. Write extends = "..." at the top, or change the file '
            "itself.",
        ),
        (
            PLAIN.replace('"a"\nholds', "1979-05-27\nholds"),
            'm.toml:8 p.at: a value of type date is not a length. Write a number and a unit, as in "12 mm".',
        ),
        (
            PLAIN.replace('"20 mm"', "nan"),
            'm.toml:4 s.a.length: nan is not a finite number. Write a number and a unit, as in "12 mm".',
        ),
        (
            PLAIN.replace('"20 mm"', "inf"),
            'm.toml:4 s.a.length: inf is not a finite number. Write a number and a unit, as in "12 mm".',
        ),
        (
            PLAIN.replace('"a"\nholds', '"70 mm"\nholds'),
            'm.toml:8 p.at: "70 mm" is off the shaft: s is 60 mm long. Write 0 mm to 60 mm.',
        ),
    ],
)
def test_what_a_file_is_told(folder: Path, text: str, told: str) -> None:
    (problem,) = problems(text)
    assert problem.startswith(told.replace(" : ", " shafts: ")), problem


# ---- files that are no TOML


@pytest.mark.parametrize(
    ("text", "told"),
    [
        ('a = "x\n', "m.toml:1: "),
        (PLAIN.replace('"20 mm"', "20 mm"), 'm.toml:4: 20 mm stands without quotes. Write length = "20 mm".'),
        (PLAIN.replace('"20 mm"', "20,5 mm"), 'm.toml:4: 20,5 mm stands without quotes. Write length = "20,5 mm".'),
        (PLAIN.replace('"20 mm"', "~20 mm"), 'm.toml:4: ~20 mm stands without quotes. Write length = "~20 mm".'),
        (PLAIN.replace('"steel"', "steel"), 'm.toml:2: steel stands without quotes. Write material = "steel".'),
        (PLAIN.replace('"steel"', "42CrMo4"), 'm.toml:2: 42CrMo4 stands without quotes. Write material = "42CrMo4".'),
        (PLAIN.replace(' "steel"', ""), 'm.toml:2: material has no value. Write material = "...", or leave it out.'),
        (
            PLAIN.replace('material = "steel"', 'material: "steel"'),
            "m.toml:2: material is followed by a colon. Write material = ...",
        ),
        (PLAIN.replace('material = "steel"', "material"), "m.toml:2: a key without =. Write key = value."),
        (
            PLAIN.replace('"30 mm" },', '"30 mm",\n },'),
            "m.toml:4: a table in braces ends in its own line. Write all of { ... } in one line.",
        ),
        (PLAIN.replace('"30 mm" }', '"30 mm", }'), "m.toml:4: a comma stands before }. Leave it out."),
        (
            PLAIN.replace('"30 mm" },\n', '"30 mm" }\n'),
            "m.toml:5: a list is not closed. Put a comma between its entries and ] at its end.",
        ),
        (
            PLAIN.replace('"steel"', '"steel'),
            "m.toml:2: a text has no closing quote. Close it.",
        ),
        (PLAIN + 'holds = ["tilt"]\n', "m.toml:10: a key stands twice in this table. Leave one out."),
        (PLAIN + "[pins.p]\n", "m.toml:10: [pins.p] stands twice. A name is used once; rename one."),
        (PLAIN + "[pins.q\n", "m.toml:10: a heading is not closed. Write [group.name]."),
        (PLAIN + 'source = "C:\\data"\n', "m.toml:10: a backslash in a text. Write / in paths, or \\\\."),
        (PLAIN + "?\n", "m.toml:10: this line is no key and no heading. Write key = value or [group.name]."),
        (PLAIN + "a.b = 1\na.b.c = 2\n", "m.toml:11: a key stands twice in this table. Leave one out."),
        (
            PLAIN + "a = { b = 1 }\na.c = 2\n",
            "m.toml:11: a table in braces cannot be continued. Write all its keys in the braces.",
        ),
        ("a = 1 b = 2\n", "m.toml:1: something follows the value. Put text in quotes, one key in a line."),
        ("a = '''\n", "m.toml:1: a text in three quotes is not closed. Close it with '''."),
        ('a = """\n', "m.toml:1: a text has no closing quote. Close it."),
        ('a = "12 mm\nb = 1\n', "m.toml:1: a text has no closing quote. Close it."),
        ("a = { b = 1, b = 2 }\n", "m.toml:1: a key stands twice in the braces. Leave one out."),
        ('a = "\\uZZZZ"\n', "m.toml:1: a wrong \\u code in a text. Leave it out."),
        ("a = " + "9" * 5000 + "\n", "m.toml:1: a number has too many digits. Shorten it."),
        ("a = " + "[" * 5000 + "]" * 5000, "m.toml: brackets stand too deep in each other. A model needs six levels."),
        ("a = " + "[" * 60 + "]" * 60, "m.toml: tables stand too deep in each other. A model needs six levels."),
        (".".join(["a"] * 1000) + " = 1", "m.toml:1: a key has too many dots. A model needs three steps."),
        ("", "m.toml: the file is empty. `fe-shaft new` writes a starter."),
        (" \n\n", "m.toml: the file is empty. `fe-shaft new` writes a starter."),
        (PLAIN.encode() + b"# \xe4\n", "m.toml:10: byte 0xe4 is not UTF-8. Save the file as UTF-8 text."),
        (PLAIN.encode("utf-16"), "m.toml:1: the file is UTF-16. Save it as UTF-8."),
        (b"\x7fELF\0\0", "m.toml:1: the file is not text: it holds zero bytes. Name a model file."),
        (b"\x89PNG\r\n\x1a\n", "m.toml:1: byte 0x89 is not UTF-8. Save the file as UTF-8 text."),
    ],
)
def test_files_that_are_no_toml(folder: Path, text: str | bytes, told: str) -> None:
    (problem,) = problems(text)
    assert problem.startswith(told), problem


def test_files_that_cannot_be_read(folder: Path) -> None:
    Path("big.toml").write_bytes(b"#" * 8_000_001)
    Path("dir.toml").mkdir()
    os.mkfifo("pipe.toml")
    cases = {
        "missing.toml": "missing.toml does not exist. Check its name and folder.",
        "dir.toml": "dir.toml is a folder. Name a file in it.",
        "pipe.toml": "pipe.toml is not a regular file. Name a model file, such as layshaft.toml.",
        "/dev/zero": "/dev/zero is not a regular file. Name a model file, such as layshaft.toml.",
        "big.toml": "big.toml has more than 8 MB; no more is read. Put long shafts into segments_file.",
        "": '"" is not the name of a file. Name a model file, such as layshaft.toml.',
        "a\0b": '"a\\x00b" is not the name of a file. Name a model file, such as layshaft.toml.',
        "x" * 5000: "file name too long",
    }
    for name, sentence in cases.items():
        with pytest.raises(FileError) as caught:
            read(name)
        assert sentence in str(caught.value), name
        assert caught.value.exit_code == 6


def test_a_file_without_permission(folder: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def refuse(*_: Any, **__: Any) -> int:
        raise PermissionError(13, "Permission denied")

    Path("m.toml").write_text(PLAIN, encoding="utf-8")
    monkeypatch.setattr(os, "open", refuse)
    with pytest.raises(FileError, match=r"^m\.toml may not be read\. Check its permissions\.$"):
        read("m.toml")


# ---- variants and included files

VARIANT = """extends = "base.toml"
title = "Stiffer"
remove = ["barring_wheel", "layshaft.collar"]
[change]
layshaft.wheel_seat.diameter = "44 mm"
lay_left.stiffness.radial = "220 N/um"
lay_right.stiffness = { radial = "200 N/um", axial = "60 N/um" }
reversed_jam.power = "1 kW"
reversed_jam.speed = "10 rpm"
[add.masses.disc]
at = "stub"
mass = "2 kg"
"""


def test_a_variant_changes_adds_and_removes(folder: Path) -> None:
    Path("base.toml").write_text(TEXT, encoding="utf-8")
    Path("v.toml").write_text(VARIANT, encoding="utf-8")
    base, made = read("base.toml"), read("v.toml")
    assert made.title == "Stiffer"
    assert "barring_wheel" not in made
    assert made["disc"].mass.text == "2 kg"
    assert [row.name for row in made["layshaft"].segments].count("collar") == 0
    assert made.segment_arrays["layshaft"].diameter_left[1] == 0.044
    left, right = made["lay_left"].stiffness, made["lay_right"].stiffness
    assert (left.radial.text, left.tilt.text) == ("220 N/um", "~5 N m/mrad")  # dotted: the other keys stay
    assert right.tilt is None  # in braces: the whole table
    assert made.case("reversed_jam").torque is None
    assert base.digest == read("base.toml").digest != made.digest
    assert made.source_lines["disc.mass"] == ("v.toml", 12)
    assert made.source_lines["layshaft.wheel_seat.diameter"] == ("v.toml", 5)
    line = next(number for number, text in enumerate(TEXT.split("\n"), 1) if '"stub",' in text)
    assert made.source_lines["layshaft.stub.length"] == ("base.toml", line)
    assert not [place for place in made.source_lines if "segment_" in place or ".collar" in place]


def test_a_variant_of_a_variant(folder: Path) -> None:
    Path("base.toml").write_text(TEXT, encoding="utf-8")
    Path("v.toml").write_text(VARIANT, encoding="utf-8")
    Path("w.toml").write_text('extends = "v.toml"\nremove = ["disc"]\nchange.wheel.teeth = 86\n', encoding="utf-8")
    made = read("w.toml")
    assert "disc" not in made
    assert made["wheel"].teeth == 86
    assert made.title == "Stiffer"


def test_the_written_variant_is_the_same_model(folder: Path) -> None:
    Path("base.toml").write_text(TEXT, encoding="utf-8")
    Path("v.toml").write_text(VARIANT, encoding="utf-8")
    made = read("v.toml")
    write(made, "whole.toml")
    again = read("whole.toml")
    assert again.to_table() == made.to_table()
    assert again.digest == made.digest
    assert "extends" not in Path("whole.toml").read_text(encoding="utf-8")


@pytest.mark.parametrize(
    ("text", "told"),
    [
        ("change.foo.bar = 3", 'm.toml:2 foo.bar: nothing is called "foo".'),
        ("change.s.a.length = 3", 'm.toml:2 s.a.length: 3 has no unit. Write "3 mm".'),
        (
            "change.s.segment_3.length = 3",
            'm.toml:2 s.segment_3.length: s.segment_3 has no name, so no address. Name it first: name = "..." in that '
            "segment.",
        ),
        ("change.p.hold = 3", "m.toml:2 p.hold: hold is not a key here. Nearest: holds."),
        ("change = 3", "m.toml:2 change: this is a number, not a table. Write [change], addresses below."),
        ("remove = 3", 'm.toml:2 remove: this is a number, not a list. Write remove = ["barring_wheel"].'),
        ("remove = [3]", 'm.toml:2 remove: this is a number, not a name. Write remove = ["barring_wheel"].'),
        ('remove = ["q"]', 'm.toml:2 remove: nothing is called "q".'),
        ('remove = ["s.c"]', 'm.toml:2 remove: no segment or key of s is called "c".'),
        ("add = 3", "m.toml:2 add: add holds groups of tables. Write [add.masses.disc]."),
        ("add.mases.x = 3", "m.toml:2 mases: mases is not a group of tables. Nearest: masses."),
        ("add.pins.p = { at = 3 }", 'm.toml:2 p: "p" is there already. Write its keys under [change].'),
        ('add.masses.m = { at = "a" }', 'm.toml:2 m.mass: mass is not written. Write mass = "4.1 kg".'),
        (
            'pins.q = { at = "a" }',
            "m.toml:2 pins: pins cannot stand in a variant. Write [add.pins.NAME], or its keys under [change].",
        ),
        ("gravity = 3", "m.toml:2 gravity: gravity cannot stand in a variant. Write it under [change]."),
        ('remove = ["p"]\nchange.p.at = "b"', 'm.toml:3 p.at: "p" was removed.'),
        (
            'remove = ["s.a"]',
            'base.toml:8 p.at: "a" was removed, but this still stands on it. Remove this too, or change it.',
        ),
    ],
)
def test_variants_that_cannot_be(folder: Path, text: str, told: str) -> None:
    (problem,) = problems(f'extends = "base.toml"\n{text}\n', base__toml=PLAIN)
    assert problem.startswith(told), problem


def test_removing_a_part_that_others_stand_on_lists_them(folder: Path) -> None:
    told = problems('extends = "base.toml"\nremove = ["wheel"]\n', base__toml=TEXT)
    assert [line.split(" ")[1].rstrip(":") for line in told] == [
        "running.enters", "reversed_jam.enters", "wheel_deflection.of",
    ]  # fmt: skip
    assert all('"wheel" was removed, but this still stands on it.' in line for line in told)


@pytest.mark.parametrize(
    ("name", "told"),
    [
        ("missing.toml", '"missing.toml" does not exist. Check its name and folder.'),
        ("../outside.toml", '"../outside.toml" leads out of the model\'s folder. Put the file beside the model.'),
        ("link.toml", '"link.toml" leads out of the model\'s folder. Put the file beside the model.'),
        ("/etc/passwd", '"/etc/passwd" is not a path inside the model\'s folder.'),
        ("C:/x.toml", '"C:/x.toml" is not a path inside the model\'s folder.'),
        ("a\\\\b.toml", '"a\\b.toml" is not a path inside the model\'s folder.'),
        ("~/x.toml", '"~/x.toml" is not a path inside the model\'s folder.'),
        ("file:///etc/passwd", '"file:///etc/passwd" is not a path inside the model\'s folder.'),
        ("m.toml", "variants go round in a circle: m.toml -> m.toml. Let one of them stand alone."),
        ("", "this is not the name of a file."),
    ],
)
def test_nothing_is_read_outside_the_folder(folder: Path, name: str, told: str) -> None:
    (folder.parent / "outside.toml").write_text(PLAIN, encoding="utf-8")
    Path("link.toml").symlink_to(folder.parent / "outside.toml")
    (problem,) = problems(f'extends = "{name}"\n')
    assert told in problem
    assert problem.startswith("m.toml:1 extends: ")


def test_a_file_in_a_folder_below_may_come_back_up(folder: Path) -> None:
    Path("sub").mkdir()
    Path("sub/base.toml").write_text(
        'include = ["../own.toml"]\n' + PLAIN.replace('"steel"', '"own"'), encoding="utf-8"
    )
    own = '[materials.own]\nyoungs_modulus = "200 GPa"\npoisson_ratio = 0.3\n'
    Path("own.toml").write_text(own, encoding="utf-8")
    Path("v.toml").write_text('extends = "sub/base.toml"\n', encoding="utf-8")
    made = read("v.toml")
    assert made.materials["own"].elastic[0] == 200e9
    assert made.source_lines["own.youngs_modulus"] == ("sub/../own.toml", 2)


@pytest.mark.parametrize(
    ("included", "told"),
    [
        ("[materials.own]\nE = 3\n", 'own.toml:2 own.E: E is not a key here. Write youngs_modulus = "210 GPa" (E).'),
        (
            "[pins.q]\n",
            "own.toml:1 pins: pins cannot be included; an included file brings materials and limits. Move it into the "
            "model.",
        ),
        ("[catalogue.6306]\n", "own.toml:1 catalogue: catalogue is not known yet in this version. Leave it out."),
        (
            "materials = 3\n",
            "own.toml:1 materials: materials is a number, not a group of tables. Write [materials.NAME].",
        ),
    ],
)
def test_included_files(folder: Path, included: str, told: str) -> None:
    assert any(line.startswith(told) for line in problems('include = ["own.toml"]\n' + PLAIN, own__toml=included))


def test_includes_that_cannot_be(folder: Path) -> None:
    own = '[materials.own]\nyoungs_modulus = "200 GPa"\npoisson_ratio = 0.3\n'
    twice = 'include = ["own.toml"]\n' + PLAIN + own
    assert problems(twice, own__toml=own) == [
        'own.toml:1 own: "own" stands in the model or another included file already. Leave one out.'
    ]
    assert problems("include = 3\n" + PLAIN) == [
        'm.toml:1 include: this is a number, not a list. Write include = ["our_materials.toml"].'
    ]
    assert problems('include = ["../x"]\n' + PLAIN)[0].startswith("m.toml:1 include: ")


# ---- tables beside the model

CSV = "name,length [mm],diameter mm,bore,material,shear\na,20,30,,,\nb,40,40,10 mm,aluminium,0.9\n"
FROM_CSV = PLAIN.replace(PLAIN[PLAIN.index("segments") : PLAIN.index("[pins")], 'segments_file = "s.csv"\n')


@pytest.mark.parametrize("delimiter", [",", ";", "\t"])
def test_segments_out_of_a_spreadsheet(folder: Path, delimiter: str) -> None:
    Path("s.csv").write_text("\ufeff" + CSV.replace(",", delimiter), encoding="utf-8")
    Path("m.toml").write_text(FROM_CSV, encoding="utf-8")
    made = read("m.toml")
    assert made["s"].segments[1].to_table() == {
        "name": "b", "length": "40 mm", "diameter": "40 mm", "bore": "10 mm", "material": "aluminium", "shear": 0.9,
    }  # fmt: skip
    assert made.source_lines["s.b"] == ("s.csv", 3)
    assert read("m.toml", {"s.b.length": "41 mm"})["s"].segments[1].length.text == "41 mm"
    assert "segments_file" not in write_text(made)
    Path("v.toml").write_text('extends = "m.toml"\nremove = ["s.a"]\n[change]\np.at = "b"\n', encoding="utf-8")
    shorter = read("v.toml").source_lines
    assert (shorter["s.b"], shorter["p.at"]) == (("s.csv", 3), ("v.toml", 4))
    assert not [place for place in shorter if place.startswith(("s.a", "s.segment_"))]


@pytest.mark.parametrize(
    ("table", "told"),
    [
        (CSV.replace("40,40", "-40,40"), 's.csv:3 s.b.length: "-40 mm" is not greater than 0. Write a positive value.'),
        (CSV.replace("10 mm", "10"), 's.csv:3 s.b.bore: "10" has no unit. Write "10 mm".'),
        (CSV.replace("length [mm]", "lenght [mm]"), 's.csv:1: "lenght" is not a column of segments. Nearest: length.'),
        (CSV.replace("bore", "D_i?"), 's.csv:1: "D_i?" is not a column of segments. Columns: name, length, diameter, '),
        (
            CSV.replace("a,20,30,,,", "a,20,30,,,,7"),
            "s.csv:2: the line has 7 cells, the head 6. Decimal commas? Write 1.5.",
        ),
        (CSV.replace("bore", "length"), "s.csv:1: length stands twice in the head. Leave one column out."),
        (
            "name\n" + "x" * 200_000,
            "s.csv:2: this line is no row of a table (field larger than field limit (131072)). Check its quotes.",
        ),
        ("", "s.csv: the file is empty."),
        ("length mm\n", "s.csv:1 s.segments: the shaft has no segment."),
    ],
)
def test_spreadsheets_that_cannot_be(folder: Path, table: str, told: str) -> None:
    assert any(line.startswith(told) for line in problems(FROM_CSV, s__csv=table)), problems(FROM_CSV)


def test_segments_come_from_one_place(folder: Path) -> None:
    both = PLAIN.replace("[pins", 'segments_file = "s.csv"\n[pins')
    assert problems(both) == ["m.toml:7 s.segments_file: segments_file stands beside segments. Write one of them."]
    assert problems(FROM_CSV) == ['m.toml:3 s.segments_file: "s.csv" does not exist. Check its name and folder.']
    Path("base.toml").write_text(PLAIN, encoding="utf-8")
    Path("s.csv").write_text(CSV, encoding="utf-8")
    Path("v.toml").write_text('extends = "base.toml"\nchange.s.segments_file = "s.csv"\n', encoding="utf-8")
    assert read("v.toml")["s"].segments[1].material == "aluminium"


WITH_MATRIX = """[bearings.x]
at = "b"
holds = ["radial"]
matrix = { file = "x.mtx", units = { force = "N", length = "mm", angle = "rad" } }
"""
ROWS = "\n".join(" ".join("1e5" if i == j else "0" for j in range(6)) for i in range(6))
MARKET = "%%MatrixMarket matrix coordinate real symmetric\n6 6 3\n1 1 5.0\n2 2 1e5\n5 5 3.0\n"


@pytest.mark.parametrize("content", [ROWS, "# comment\n" + ROWS.replace(" ", ", "), MARKET])
def test_a_matrix_out_of_a_file(folder: Path, content: str) -> None:
    Path("x.mtx").write_text(content, encoding="utf-8")
    Path("m.toml").write_text(PLAIN + WITH_MATRIX, encoding="utf-8")
    made = read("m.toml")
    assert made["x"].matrix_si[1, 1] == pytest.approx(1e8)
    assert np.count_nonzero(made["x"].matrix_si - np.diag(np.diag(made["x"].matrix_si))) == 0
    again = fs.Model.from_tables(tomllib.loads(write_text(made)))[0]
    assert again["x"].matrix_si.tolist() == made["x"].matrix_si.tolist()


@pytest.mark.parametrize(
    ("content", "told"),
    [
        (ROWS.replace("1e5", "1e5 N", 1), 'x.mtx:1: "1e5 N 0 0 0 0 0" is not a row of six numbers.'),
        (ROWS + "\n1 2 3", "x.mtx:7: the row has 3 numbers, not six (ux uy uz rx ry rz)."),
        (ROWS[:40], "x.mtx"),
        ("1 2 3 4 5 6", "x.mtx: the file has 1 rows, not six (ux uy uz rx ry rz)."),
        (MARKET.replace("6 6 3", "6 5 3"), "x.mtx: the matrix is 6 x 5, not 6 x 6 of real numbers."),
        (MARKET.replace("6 6 3", "6 6 x"), "x.mtx: the file is no Matrix Market file"),
        (ROWS.replace("0", "nan", 1), "m.toml:13 x.matrix.rows: row 1: nan is not a finite number."),
    ],
)
def test_matrix_files_that_cannot_be(folder: Path, content: str, told: str) -> None:
    (problem,) = problems(PLAIN + WITH_MATRIX, x__mtx=content)
    assert problem.startswith(told), problem


def test_a_matrix_comes_from_one_place(folder: Path) -> None:
    both = WITH_MATRIX.replace('file = "x.mtx"', 'file = "x.mtx", rows = []')
    assert problems(PLAIN + both)[0] == "m.toml:13 x.matrix.file: file stands beside rows. Write one of them."


# ---- settings of the command line


@pytest.mark.parametrize(
    ("text", "place", "value"),
    [
        ("layshaft.wheel_seat.diameter=44 mm", "layshaft.wheel_seat.diameter", "44 mm"),
        ('a.b = "44 mm"', "a.b", "44 mm"),
        ("wheel.teeth=86", "wheel.teeth", 86),
        ("running.coasts=true", "running.coasts", True),
        ("lay_left.stiffness.radial=~93 N/um", "lay_left.stiffness.radial", "~93 N/um"),
        ('p.holds=["radial"]', "p.holds", ["radial"]),
        ("wheel.mate=9 o'clock", "wheel.mate", "9 o'clock"),
        ("x.at=wheel + 3 mm", "x.at", "wheel + 3 mm"),
        ("x.at=a\nb", "x.at", "a\nb"),
    ],
)
def test_settings(text: str, place: str, value: object) -> None:
    assert parse_setting(text) == (place, value)


@pytest.mark.parametrize("text", ["", "a", "=3", "a=", "a= "])
def test_settings_that_cannot_be(text: str) -> None:
    with pytest.raises(UsageError, match="no address and value"):
        parse_setting(text)


def test_settings_take_the_place_of_the_file() -> None:
    made = read(LAYSHAFT, {"layshaft.wheel_seat.diameter": "44 mm", "lay_left.stiffness.radial": "220 N/um"})
    assert made.segment_arrays["layshaft"].diameter_left[1] == 0.044
    assert made.estimated == ("lay_left", "lay_right")  # the tilt of lay_left is an estimate still


def test_wrong_settings_are_told_with_the_file(folder: Path) -> None:
    Path("m.toml").write_text(PLAIN.replace('"20 mm"', "20"), encoding="utf-8")
    with pytest.raises(ModelError) as caught:
        read("m.toml", {"s.b.length": 40, "q.at": "3 mm"})
    assert [str(each) for each in caught.value.problems] == [
        '--set q.at: nothing is called "q".',
        '--set s.b.length: 40 has no unit. Write "40 mm".',
        'm.toml:4 s.a.length: 20 has no unit. Write "20 mm".',
    ]


# ---- writing


def test_the_layshaft_is_written_and_read_back(folder: Path) -> None:
    made = read(LAYSHAFT)
    write(made, "copy.toml")
    again = read("copy.toml")
    assert again.to_table() == made.to_table()
    assert again.digest == made.digest
    assert write_text(again) == write_text(made)
    assert "~93 N/um" in write_text(made)


def test_a_model_of_a_script_is_written_and_read_back(folder: Path) -> None:
    rows = np.diag([60e3, 93e3, 93e3, 0.0, 3e6, 3e6]).tolist()
    matrix = {"rows": rows, "units": {"force": "N", "length": "mm", "angle": "rad"}}
    extra = [
        fs.Bearing("m", at="seat", holds=["radial"], matrix=matrix),
        fs.Force("f", at="stub", up={"value": "1 kN", "low": "0.5 kN", "high": "2 kN", "source": 'a "guess"\n'}),
        fs.Pin("r\N{GREEK SMALL LETTER ALPHA}", at="seat", holds=["radial"], label="ruhig \u2603 \\ \x09"),
    ]  # fmt: skip
    own = fs.Material("1.4301", youngs_modulus="200 GPa", poisson_ratio=0.3, density="7800 kg/m^3", range_check="off")
    case = fs.Case(
        "x", torque="3 N m", enters={"wheel": 0.25, "pinion": 0.75}, turns="clockwise from left", coasts=True
    )
    made = model(extra, [case], materials=[own], gravity=["0 m/s^2", "0 m/s^2", "-9.81 m/s^2"], units={"force": "lbf"})
    write(made, "m.toml")
    again = read("m.toml")
    assert again.to_table() == made.to_table()
    assert again.digest == made.digest


@given(
    st.dictionaries(
        st.text(max_size=8),
        st.recursive(
            st.one_of(st.booleans(), st.integers(-(2**60), 2**60), st.floats(allow_nan=False), st.text(max_size=12)),
            lambda inner: st.lists(inner, max_size=3) | st.dictionaries(st.text(max_size=5), inner, max_size=3),
            max_leaves=8,
        ),
        max_size=5,
    )
)
def test_whatever_is_written_reads_back(table: dict[str, Any]) -> None:
    """Against the TOML parser of the standard library."""
    assert tomllib.loads(to_toml({"top": table}, {})) == {"top": table}


def test_only_values_that_toml_has_are_written() -> None:
    with pytest.raises(TypeError, match="object has no TOML form"):
        to_toml({"a": object()}, {})


# ---- mutated files

TOKENS = [
    "nan", "inf", "-1", "0", "1e999", "true", "[]", "{}", "[[]]", '""', '"1,5 mm"', '"-3 mm"', '"0 mm"', "1979-05-27",
    '"wheel"', '"layshaft"', '"every bearing"', '"~5 N"', "{ a = 1 }", '"nan mm"', '"1e400 mm"', "9" * 5000,
    '"' + "x" * 500 + '"', '"\N{ARABIC-INDIC DIGIT THREE} mm"', '"3 o\'clock"', '"collar.left + 1 mm"', "[1, 2]",
    '{ value = "3 mm", low = "1 mm", high = "5 mm" }', '"wheel + 1 mm"', '["radial", 3]', '"\\u0000"', "0x10",
    "'''a'''",
]  # fmt: skip
WORDS = [
    "beta",
    "mn",
    "b",
    "z",
    "d",
    "name",
    "x",
    "catalogue",
    "range_check",
    "include",
    "extends",
    "gear_pairs",
    "add",
]


def _bytes(r: random.Random) -> bytes:
    data = bytearray(TEXT.encode())
    for _ in range(r.randrange(1, 6)):
        data[r.randrange(len(data))] = r.randrange(256)
    return bytes(data)


def _cut_or_repeated(r: random.Random) -> bytes:
    data = TEXT.encode()
    start = r.randrange(len(data))
    end = min(len(data), start + r.randrange(1, 120))
    place = r.randrange(len(data))
    return data[:start] + data[end:] if r.random() < 0.5 else data[:place] + data[start:end] + data[place:]


def _values(r: random.Random) -> bytes:
    lines = TEXT.split("\n")
    for _ in range(r.randrange(1, 4)):
        number = r.choice([index for index, line in enumerate(lines) if "=" in line])
        lines[number] = lines[number].partition("=")[0] + "= " + r.choice(TOKENS)
    return "\n".join(lines).encode()


def _token(r: random.Random) -> bytes:
    match = r.choice(list(re.finditer(r'"[^"]*"|\b\d+\b', TEXT)))
    return (TEXT[: match.start()] + r.choice(TOKENS) + TEXT[match.end() :]).encode()


def _structure(r: random.Random) -> bytes:
    lines = TEXT.split("\n")
    first, second = r.randrange(len(lines)), r.randrange(len(lines))
    lines[first], lines[second] = lines[second], lines[first]
    if r.random() < 0.5:
        del lines[r.randrange(len(lines))]
    return "\n".join(lines).encode()


def _word(r: random.Random) -> bytes:
    words = list(re.finditer(r"\b[a-z_]+\b", TEXT))
    match = r.choice(words)
    other = r.choice(words)[0] if r.random() < 0.5 else r.choice(WORDS)
    return (TEXT[: match.start()] + other + TEXT[match.end() :]).encode()


@pytest.mark.parametrize("mutate", [_bytes, _cut_or_repeated, _values, _token, _structure, _word])
def test_mutated_files_are_read_or_told(folder: Path, mutate: Callable[[random.Random], bytes]) -> None:
    """No traceback but a `ShaftError`, no wording of a library, no read over a second."""
    r = random.Random(20)
    for _ in range(100):
        Path("m.toml").write_bytes(mutate(r))
        start = time.perf_counter()
        try:
            made = read("m.toml")
            assert made.digest
            assert made.notes
            assert len(made.source_lines) > 0
        except ShaftError as error:
            text = str(error)
            assert "pydantic" not in text
            assert "Input should" not in text
            assert all(line.isprintable() for line in text.split("\n"))
        assert time.perf_counter() - start < 1.0


def test_reading_loads_no_library_that_it_does_not_need() -> None:
    code = (
        "import sys; from fe_shaft.io.model_file import read; read(sys.argv[1]);"
        "heavy = {'scipy', 'pint', 'vtk', 'pyvista', 'matplotlib', 'pandas', 'meshio'} & set(sys.modules);"
        "assert not heavy, heavy"
    )
    subprocess.run([sys.executable, "-c", code, str(LAYSHAFT)], check=True, cwd=Path(__file__).parents[2])
