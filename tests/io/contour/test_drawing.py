"""Drawings: which entities, layers and units are read, and what is said of the others."""

import re
import sys
from pathlib import Path

import ezdxf
import pytest

import fe_shaft as fs
from tests.io.contour.drawings import QUARTER, arc, document, line, numbers, polyline, saved

STEPPED = [(0, 15), (19, 15), (19, 19), (60, 19)]
POINTS = [(0, 30), (19, 30), (19, 38), (60, 38)]


@pytest.fixture(autouse=True)
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    monkeypatch.chdir(tmp_path)
    return tmp_path


def refused(made: object, **words: str) -> str:
    """What is said of a drawing."""
    with pytest.raises(fs.ModelError) as caught:
        fs.read_contour(saved(made), **words)
    return str(caught.value)


# ---- entities


def test_lines_and_arcs_in_any_order_and_direction() -> None:
    made = document()
    line(made, (60, 19), (19, 19))
    line(made, (0, 15), (18, 15))
    arc(made, (18, 16), 1, 270, 360)
    line(made, (19, 19), (19, 16))
    points = fs.read_contour(saved(made))
    assert points == [
        ["0 mm", "30 mm"],
        {"x": "19 mm", "diameter": "30 mm", "fillet": "1 mm"},
        ["19 mm", "38 mm"],
        ["60 mm", "38 mm"],
    ]
    shaft = fs.Shaft("s", contour=points, material="steel")
    assert shaft.segments[0].fillet_right.si == 0.001


@pytest.mark.parametrize("version", ["R12", "R2000", "R2010", "R2018"])
def test_versions_of_the_format(version: str) -> None:
    made = document(units=0, version=version)
    made.modelspace().add_polyline2d(STEPPED, dxfattribs={"layer": "contour"})
    assert numbers(fs.read_contour(saved(made), unit="mm")) == POINTS


def test_a_binary_drawing() -> None:
    document(STEPPED).saveas("shaft.dxf", fmt="bin")
    assert numbers(fs.read_contour("shaft.dxf")) == POINTS


def test_bulges_are_arcs() -> None:
    made = document([(0, 15), (18, 15, QUARTER), (19, 16), (19, 19), (60, 19)])
    assert fs.read_contour(saved(made))[1] == {"x": "19 mm", "diameter": "30 mm", "fillet": "1 mm"}


def test_entities_that_were_mirrored() -> None:
    """CAD mirrors arcs and polylines by an extrusion towards -z: x in the file is minus x in the drawing."""
    made = document()
    polyline(made, [(-60, 19), (-19, 19)], extrusion=(0, 0, -1))
    line(made, (19, 19), (19, 16))
    arc(made, (-18, 16), 1, 180, 270, extrusion=(0, 0, -1))
    line(made, (0, 15), (18, 15))
    assert numbers(fs.read_contour(saved(made))) == [(0, 30), (19, 30, 1), (19, 38), (60, 38)]


def test_remarks_on_the_layer_are_passed_over() -> None:
    made = document(STEPPED)
    space = made.modelspace()
    space.add_text("layshaft", dxfattribs={"layer": "contour"})
    space.add_point((5, 40), dxfattribs={"layer": "contour"})
    space.add_hatch(dxfattribs={"layer": "contour"})
    assert numbers(fs.read_contour(saved(made))) == POINTS


def test_what_is_not_read_is_named_with_handle_and_layer() -> None:
    made = document(STEPPED)
    spline = made.modelspace().add_spline([(0, 3), (1, 4), (2, 3)], dxfattribs={"layer": "contour"})
    told = f"shaft.dxf: SPLINE (handle {spline.dxf.handle}, layer contour) is not read. Explode it to lines and arcs."
    assert refused(made) == told
    made = document(STEPPED)
    made.blocks.new("B").add_line((0, 0), (1, 1))
    made.modelspace().add_blockref("B", (0, 0), dxfattribs={"layer": "CONTOUR"})
    assert re.fullmatch(r"shaft.dxf: INSERT \(handle \w+, layer CONTOUR\) is not read. Explode .*", refused(made))


def test_a_drawing_of_blocks_alone_names_the_block() -> None:
    made = document([])
    made.blocks.new("B").add_line((0, 0), (1, 1))
    made.modelspace().add_blockref("B", (0, 0), dxfattribs={"layer": "OUTLINE"})
    assert re.fullmatch(r"shaft.dxf: INSERT \(handle \w+, layer OUTLINE\) is not read. Explode .*", refused(made))


def test_curves_through_points_and_lines_in_space() -> None:
    made = document(STEPPED)
    made.modelspace().add_polyline3d([(0, 0, 0), (1, 1, 1)], dxfattribs={"layer": "contour"})
    assert re.search(r"POLYLINE \(handle \w+, layer contour\) is a curve through its points or in space", refused(made))
    made = document()
    line(made, (0, 15, 0), (60, 15, 3))
    assert re.search(r"LINE \(handle \w+, layer contour\) leaves the plane of the drawing. Draw", refused(made))
    made = document()
    arc(made, (18, 16), 1, 270, 360, extrusion=(0, 1, 0))
    assert re.search(r"ARC \(handle \w+, layer contour\) leaves the plane of the drawing. Draw", refused(made))


# ---- layers


def test_the_axis_is_no_contour() -> None:
    made = document([(0, 0), *STEPPED, (60, 0)])
    line(made, (-5, 0), (70, 0), layer="centre")
    line(made, (-5, 0), (70, 0))
    assert numbers(fs.read_contour(saved(made))) == POINTS


def test_one_of_several_layers() -> None:
    made = document(STEPPED)
    line(made, (0, 40), (60, 40), layer="FRAME")
    assert refused(made) == 'shaft.dxf: lines stand on 2 layers: contour, FRAME. Write contour_layer = "contour".'
    assert numbers(fs.read_contour(saved(made), layer="Contour")) == POINTS  # capitals do not matter in DXF
    assert refused(made, layer="kontur") == 'shaft.dxf: nothing stands on a layer "kontur". Nearest: contour.'


def test_a_drawing_without_lines() -> None:
    draw = "Draw the half contour above y = 0."
    assert refused(document()) == f"shaft.dxf: the drawing has no line, arc or polyline. {draw}"
    made = document()
    made.modelspace().add_text("x", dxfattribs={"layer": "notes"})
    told = f'shaft.dxf: layer "notes" has no line, arc or polyline. {draw}'
    assert refused(made, layer="notes") == told


# ---- units


@pytest.mark.parametrize(
    ("code", "unit"), [(1, "in"), (2, "ft"), (4, "mm"), (5, "cm"), (6, "m"), (9, "mil"), (12, "nm"), (13, "um")]
)
def test_the_unit_of_the_drawing_is_obeyed(code: int, unit: str) -> None:
    """Codes: DXF reference, header variable $INSUNITS (here those of ezdxf, which names them)."""
    names = {"in": "Inches", "ft": "Feet", "mm": "Millimeters", "cm": "Centimeters", "m": "Meters", "mil": "Mils"}
    names |= {"nm": "Nanometers", "um": "Microns"}
    assert ezdxf.units.unit_name(code).lower() == names[unit].lower()
    points = fs.read_contour(saved(document([(0, 1500), (4000, 1500)], units=code)))
    assert points == [[f"0 {unit}", f"3000 {unit}"], [f"4000 {unit}", f"3000 {unit}"]]


def test_inches_are_inches() -> None:
    points = fs.read_contour(saved(document([(0, 0.6), (0.75, 0.6), (0.75, 0.8), (2.5, 0.8)], units=1)))
    shaft = fs.Shaft("s", contour=points, material="steel")
    assert shaft.ends[-1] == pytest.approx(2.5 * 0.0254, rel=1e-15)
    assert shaft.numbers["diameter_left"].tolist() == pytest.approx([1.2 * 0.0254, 1.6 * 0.0254], rel=1e-15)


def test_a_unit_is_needed_once() -> None:
    silent = document(STEPPED, units=0)
    assert refused(silent) == 'shaft.dxf: the drawing states no unit ($INSUNITS). Write contour_unit = "mm".'
    assert fs.read_contour(saved(silent), unit="cm")[0] == ["0 cm", "30 cm"]
    assert refused(silent, unit="feet").startswith('shaft.dxf: "feet" is not a unit of a drawing. Write one of: in, ft')
    stated = document(STEPPED)
    assert numbers(fs.read_contour(saved(stated), unit="mm")) == POINTS
    assert refused(stated, unit="in") == (
        "shaft.dxf: the drawing states mm ($INSUNITS = 4), contour_unit says in. Leave contour_unit out, or correct "
        "the drawing."
    )
    assert refused(document(STEPPED, units=3)) == (
        "shaft.dxf: the unit of the drawing ($INSUNITS = 3) is not known. Save it in mm."
    )


# ---- files


def test_files_that_are_no_drawings() -> None:
    def told(name: str, content: bytes) -> str:
        Path(name).write_bytes(content)
        with pytest.raises(fs.ModelError) as caught:
            fs.read_contour(name)
        return str(caught.value)

    no = "the file is not a DXF. Save the drawing as DXF, or name a table (CSV)."
    assert told("a.dxf", b"x,diameter\n") == f"a.dxf: {no}"
    assert told("a.dxf", b"") == f"a.dxf: {no}"
    assert told("a.DXF", b"\0\1\2" * 3000) == f"a.DXF: {no}"
    assert told("a.dwg", b"AC1032") == "a.dwg: DWG is not read. Save the drawing as DXF."
    whole = saved(document(STEPPED)).read_bytes()
    assert told("a.dxf", whole[: len(whole) // 2]).startswith("a.dxf: the drawing is damaged (")
    assert told("a.dxf", b"0\nSECTION\n" + b"x" * 8_000_000).startswith(
        "a.dxf: the drawing has more than 8 MB; no more"
    )


def test_files_that_cannot_be_read() -> None:
    with pytest.raises(fs.FileError, match=re.escape("none.dxf does not exist. Check its name and folder.")):
        fs.read_contour("none.dxf")
    Path("folder.dxf").mkdir()
    with pytest.raises(fs.FileError, match=re.escape("folder.dxf is a folder. Name a file in it.")):
        fs.read_contour("folder.dxf")


def test_without_the_extra(monkeypatch: pytest.MonkeyPatch) -> None:
    path = saved(document(STEPPED))
    monkeypatch.setitem(sys.modules, "ezdxf", None)
    with pytest.raises(fs.UsageError) as caught:
        fs.read_contour(path)
    assert str(caught.value) == (
        'shaft.dxf: DXF needs ezdxf, which is not installed. Run   pip install "fe_shaft[dxf]"'
    )
    assert caught.value.exit_code == 2


def test_the_door_to_ezdxf_is_one_file() -> None:
    package = Path(fs.__file__).parent
    own = [path for path in package.rglob("*.py") if re.search(r"^\s*(import|from) ezdxf", path.read_text(), re.M)]
    assert [path.relative_to(package).as_posix() for path in own] == ["io/contour/drawing.py"]
