"""Contour files in models: tables and drawings beside the model, for solving, changing and writing."""

import sys
import tomllib
from pathlib import Path

import jsonschema
import pytest

import fe_shaft as fs
from fe_shaft.cli import main
from fe_shaft.io.model_file import write_text
from fe_shaft.model.schema import json_schema
from tests.io.contour.drawings import document, saved

POINTS = '[["0 mm", "30 mm"], ["19 mm", "30 mm"], ["19 mm", "38 mm"], ["60 mm", "38 mm"]]'
REST = """
[pins.a]
at = "10 mm"
holds = ["radial", "axial"]
[pins.b]
at = "50 mm"
holds = ["radial"]
[forces.f]
at = "30 mm"
up = "-1 kN"
"""
CSV = "x mm;diameter [mm];bore;fillet mm\n0;30;;\n19;30;;1\n19;38;;\n60;38;;\n"


@pytest.fixture(autouse=True)
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    monkeypatch.chdir(tmp_path)
    return tmp_path


def model(keys: str) -> Path:
    Path("m.toml").write_text(f'[shafts.s]\nmaterial = "steel"\n{keys}\n{REST}', encoding="utf-8")
    return Path("m.toml")


def problems(keys: str) -> list[str]:
    with pytest.raises(fs.ModelError) as caught:
        fs.read(model(keys))
    return [str(each) for each in caught.value.problems]


# ---- in the model file


def test_points_in_the_model_file() -> None:
    made = fs.read(model(f"contour = {POINTS}"))
    assert made["s"].ends.tolist() == [0, 0.019, 0.06]
    assert fs.solve(made).proof.worst < 1e-12
    again = fs.Model.from_tables(tomllib.loads(write_text(made)))[0]
    assert again.digest == made.digest
    assert '  ["19 mm", "38 mm"],\n' in write_text(made)


def test_a_wrong_point_is_told_with_its_line() -> None:
    keys = 'contour = [\n  ["0 mm", "30 mm"],\n  ["19 mm", "30"],\n]'
    assert problems(keys) == ['m.toml:5 s.contour.point_2.diameter: "30" has no unit. Write "30 mm".']


def test_one_shape_for_a_shaft() -> None:
    both = f'contour = {POINTS}\nsegments = [{{ length = "60 mm", diameter = "9 mm" }}]'
    assert problems(both) == ["m.toml:3 s.contour: contour stands beside segments. Write one of them."]
    beside = "Write one of them."
    assert problems(f'contour = {POINTS}\ncontour_file = "s.csv"') == [
        f"m.toml:4 s.contour_file: contour_file stands beside contour. {beside}"
    ]
    assert problems('contour_file = "s.csv"\nsegments_file = "s.csv"') == [
        f"m.toml:4 s.segments_file: segments_file stands beside contour_file. {beside}"
    ]
    assert problems(f'contour = {POINTS}\ncontour_unit = "mm"') == [
        "m.toml:4 s.contour_unit: contour_unit belongs to a contour_file, and none is read here. Write both, or "
        "neither."
    ]


def test_a_shape_is_needed() -> None:
    assert problems("")[0].startswith("m.toml:1 s.segments: segments is not written. Write segments = [")


def test_set_and_variants_change_the_contour(capsys: pytest.CaptureFixture[str]) -> None:
    path = model(f"contour = {POINTS}")
    wider = '[["0 mm", "30 mm"], ["60 mm", "40 mm"]]'
    assert main(["solve", str(path), "--set", f"s.contour={wider}", "--ignore-limits"]) == 0
    capsys.readouterr()
    Path("v.toml").write_text(f'extends = "m.toml"\n[change]\ns.contour = {wider}\n', encoding="utf-8")
    assert main(["write", "v.toml"]) == 0
    written = tomllib.loads(capsys.readouterr().out)["shafts"]["s"]
    assert written == {"material": "steel", "contour": [["0 mm", "30 mm"], ["60 mm", "40 mm"]]}
    wrong = wider.replace('"40 mm"', "40")
    Path("v.toml").write_text(f'extends = "m.toml"\n[change]\ns.contour = {wrong}\n', encoding="utf-8")
    with pytest.raises(fs.ModelError) as caught:
        fs.read("v.toml")
    assert str(caught.value) == 'v.toml:3 s.contour.point_2.diameter: 40 has no unit. Write "40 mm".'


def test_a_variant_brings_a_contour_where_segments_were() -> None:
    model('segments = [{ name = "a", length = "60 mm", diameter = "30 mm" }]')
    Path("s.csv").write_text(CSV, encoding="utf-8")
    Path("v.toml").write_text('extends = "m.toml"\n[change]\ns.contour_file = "s.csv"\n', encoding="utf-8")
    assert len(fs.read("v.toml")["s"].segments) == 2
    Path("w.toml").write_text('extends = "v.toml"\nremove = ["s.a"]\n', encoding="utf-8")
    with pytest.raises(fs.ModelError, match="segments of s come from its contour and have no names"):
        fs.read("w.toml")


def test_the_schema_knows_contours() -> None:
    validator = jsonschema.Draft202012Validator(json_schema())

    def valid(shaft: str) -> bool:
        return bool(validator.is_valid(tomllib.loads(f"[shafts.s]\n{shaft}")))

    assert valid(f"contour = {POINTS}")
    assert valid('contour = [["0 mm", "30 mm"], { x = "9 mm", diameter = "30 mm", fillet = "1 mm" }]')
    assert valid('contour_file = "s.dxf"\ncontour_layer = "0"\ncontour_unit = "in"')
    assert not valid(f'contour = {POINTS}\ncontour_file = "s.dxf"')
    assert not valid('contour = [["0 mm"], ["9 mm"]]')
    assert not valid('contour = [[0, 30], ["9 mm", "30 mm"]]')
    assert not valid('contour_file = "s.dxf"\ncontour_unit = "feet"')


@pytest.mark.parametrize("word", ["contour", "contour_file", "contour_layer", "contour_unit"])
def test_explain_knows_the_keys(word: str, capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["explain", word]) == 0
    assert "shafts" in capsys.readouterr().out


# ---- tables


@pytest.mark.parametrize("delimiter", [",", ";", "\t"])
def test_a_contour_out_of_a_table(delimiter: str) -> None:
    Path("s.csv").write_text("\ufeff" + CSV.replace(";", delimiter), encoding="utf-8")
    made = fs.read(model('contour_file = "s.csv"'))
    assert made["s"].to_table()["contour"] == [
        {"x": "0 mm", "diameter": "30 mm"},
        {"x": "19 mm", "diameter": "30 mm", "fillet": "1 mm"},
        {"x": "19 mm", "diameter": "38 mm"},
        {"x": "60 mm", "diameter": "38 mm"},
    ]
    assert "contour_file" not in write_text(made)
    assert fs.read_contour("s.csv") == made["s"].to_table()["contour"]


@pytest.mark.parametrize(
    ("table", "told"),
    [
        (
            CSV.replace("60;38", "60;-38"),
            's.csv:5 s.contour.point_4.diameter: "-38 mm" is not greater than 0. Write a po',
        ),
        (CSV.replace("60;38;", "60;38;5"), 's.csv:5 s.contour.point_4.bore: "5" has no unit. Write "5 mm".'),
        (CSV.replace("\n60", "\n18"), 's.csv:5 s.contour.point_4: x = "18 mm" is left of point 3 at x = "19 mm". '),
        (CSV.replace("60;", ";"), 's.csv:5 s.contour.point_4: x is not written. Write ["19 mm", "38 mm"].'),
        (
            CSV.replace("diameter", "dia"),
            's.csv:1: "dia" is not a column of a contour. Known: x, diameter, bore, fillet.',
        ),
        (CSV.replace("bore", "x"), "s.csv:1: x stands twice in the head. Leave one column out."),
        (CSV[: CSV.index("0;30")], "s.csv:1 s.contour: the contour has no point; two at least make a shaft. Write"),
    ],
)
def test_tables_that_cannot_be(table: str, told: str) -> None:
    Path("s.csv").write_text(table, encoding="utf-8")
    assert problems('contour_file = "s.csv"')[0].startswith(told), problems('contour_file = "s.csv"')


def test_a_table_has_no_layer() -> None:
    Path("s.csv").write_text(CSV, encoding="utf-8")
    for key in ("layer", "unit"):
        told = f"s.csv: contour_{key} is for drawings (DXF), and this is a table. Leave it out."
        assert problems(f'contour_file = "s.csv"\ncontour_{key} = "mm"') == [told]


def test_a_file_that_is_not_there() -> None:
    assert problems('contour_file = "s.dxf"') == [
        'm.toml:3 s.contour_file: "s.dxf" does not exist. Check its name and folder.'
    ]
    assert problems("contour_file = 3")[0].startswith("m.toml:3 s.contour_file: this is not the name of a file.")


# ---- drawings


def test_a_contour_out_of_a_drawing() -> None:
    saved(document([(0, 15), (19, 15), (19, 19), (60, 19)], layer="OUTSIDE", units=0), "s.dxf")
    made = fs.read(model('contour_file = "s.dxf"\ncontour_layer = "outside"\ncontour_unit = "mm"'))
    assert made["s"].to_table() == {"material": "steel", "contour": tomllib.loads(f"p = {POINTS}")["p"]}
    assert fs.read_contour("s.dxf", unit="mm") == made["s"].to_table()["contour"]


def test_a_fault_of_a_drawn_point_names_the_drawing() -> None:
    saved(document([(0, 15), (19, 15), (19, 0.002), (60, 0.002)]), "s.dxf")
    assert [each.split(" is ")[0] for each in problems('contour_file = "s.dxf"')] == [
        's.dxf s.contour.point_3.diameter: "0.004 mm"',
        's.dxf s.contour.point_4.diameter: "0.004 mm"',
    ]


@pytest.mark.parametrize(("keys", "told"), [("contour_layer = 3", "contour_layer is a number, not text."),
                                            ("contour_unit = [1]", "this is not a unit of a drawing.")])  # fmt: skip
def test_keys_of_a_drawing_that_are_no_text(keys: str, told: str) -> None:
    saved(document([(0, 15), (60, 15)]), "s.dxf")
    assert problems(f'contour_file = "s.dxf"\n{keys}')[0].startswith(f"s.dxf: {told}")


def test_without_the_extra_the_command_ends_with_2(
    monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    saved(document([(0, 15), (60, 15)]), "s.dxf")
    path = model('contour_file = "s.dxf"')
    monkeypatch.setitem(sys.modules, "ezdxf", None)
    assert main(["solve", str(path)]) == 2
    out, err = capsys.readouterr()
    assert out == ""
    assert err == 'fe-shaft: s.dxf: DXF needs ezdxf, which is not installed. Run   pip install "fe_shaft[dxf]"\n'
