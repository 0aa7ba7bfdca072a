"""VTK files: read back by two libraries, equal to the results they came from."""

from __future__ import annotations

import xml.etree.ElementTree as ElementTree

import meshio
import numpy as np
import pytest
import pyvista
from hypothesis import given
from hypothesis import strategies as st

from fe_shaft.analysis.solve import solve
from fe_shaft.errors import FileError
from fe_shaft.io.vtk_files import case_list, file_stems, write_vtk
from tests.views.demo import many, solved


@pytest.fixture(scope="module")
def written(tmp_path_factory):
    folder = tmp_path_factory.mktemp("vtk") / "made" / "anew"
    return folder, write_vtk(solved(), folder)


@pytest.fixture(scope="module")
def two_shafts(tmp_path_factory):
    results = solve(many())
    folder = tmp_path_factory.mktemp("two")
    write_vtk(results, folder)
    return results, folder


def both(path):
    """The file as pyvista and as meshio read it."""
    return pyvista.read(path), meshio.read(path)


def test_one_line_and_one_surface_for_every_case_and_a_list_of_each(written):
    folder, paths = written
    expected = [f"{kind}_{case}.vtu" for kind in ("line", "surface") for case in solved().cases]
    assert sorted(path.name for path in paths) == sorted([*expected, "line_cases.pvd", "surface_cases.pvd"])
    assert sorted(path.name for path in folder.iterdir()) == sorted(path.name for path in paths)


@pytest.mark.parametrize("case", [0, 1, 2])
def test_line_holds_every_station_and_its_values(written, case):
    folder, _ = written
    results = solved()
    line = results.lines["layshaft"]
    grid, mesh = both(folder / f"line_{results.cases[case]}.vtu")
    n = len(line.x)
    assert grid.n_points == len(mesh.points) == n
    assert grid.n_cells == len(mesh.cells[0].data) == n - 1
    assert mesh.cells[0].type == "line"
    np.testing.assert_array_equal(mesh.cells[0].data, np.stack([np.arange(n - 1), np.arange(1, n)], axis=1))
    expected = {
        "displacement [m]": line.u[case, :, :3],
        "rotation [rad]": line.u[case, :, 3:],
        "deflection [m]": line.deflection[case],
        "slope [rad]": line.slope[case],
        "axial movement [m]": line.u[case, :, 0],
        "twist [rad]": line.u[case, :, 3],
        "displacement by shoulders [m]": (line.u - results.plain.lines["layshaft"].u)[case, :, :3],
        "section force left [N]": line.force_left[case, :, :3],
        "section force right [N]": line.force_right[case, :, :3],
        "section moment left [N m]": line.force_left[case, :, 3:],
        "section moment right [N m]": line.force_right[case, :, 3:],
        "diameter left [m]": line.diameter_left,
        "diameter right [m]": line.diameter_right,
        "bore left [m]": line.bore_left,
        "bore right [m]": line.bore_right,
        "shaft": np.zeros(n),
    }
    assert set(mesh.point_data) == set(expected)
    for name, values in expected.items():
        np.testing.assert_array_equal(mesh.point_data[name], values, err_msg=name)
        np.testing.assert_array_equal(grid.point_data[name], values, err_msg=name)
    np.testing.assert_array_equal(grid.points[:, 0], line.x)


def test_surface_has_the_shafts_extent_and_moves_with_its_stations(written):
    folder, _ = written
    results = solved()
    line = results.lines["layshaft"]
    grid, mesh = both(folder / "surface_running.vtu")
    assert grid.n_points == len(mesh.points)
    assert grid.n_cells == sum(len(block.data) for block in mesh.cells)
    assert {block.type for block in mesh.cells} == {"quad", "triangle"}
    np.testing.assert_allclose(grid.bounds, (0, 0.191, -0.0255, 0.0255, -0.0255, 0.0255), atol=1e-12)
    for name in mesh.point_data:
        np.testing.assert_array_equal(mesh.point_data[name], grid.point_data[name], err_msg=name)
    for k, x in enumerate(line.x):
        ring = np.flatnonzero(np.abs(mesh.points[:, 0] - x) < 1e-12)
        assert len(ring) > 0
        arm = mesh.points[ring] - [x, 0, 0]
        u = line.u[0, k]
        np.testing.assert_allclose(mesh.point_data["displacement [m]"][ring], u[:3] + np.cross(u[3:], arm), atol=1e-18)
        made = (line.u - results.plain.lines["layshaft"].u)[0, k]
        by = made[:3] + np.cross(made[3:], arm)
        assert np.abs(by[:, 1:]).max() > 1e-9
        np.testing.assert_allclose(mesh.point_data["displacement by shoulders [m]"][ring], by, atol=1e-18)
        np.testing.assert_allclose(mesh.point_data["deflection [m]"][ring], line.deflection[0, k], rtol=1e-12)
        np.testing.assert_allclose(mesh.point_data["slope [rad]"][ring], line.slope[0, k], rtol=1e-12)


def test_surface_colours_hold_the_section_forces(written):
    folder, _ = written
    line = solved().lines["layshaft"]
    mesh = meshio.read(folder / "surface_running.vtu")
    for name, part, components in (("torque [N m]", slice(3, 4), 1), ("bending moment [N m]", slice(4, 6), 2)):
        drawn = mesh.point_data[name]
        for k, x in enumerate(line.x):
            ring = np.flatnonzero(np.abs(mesh.points[:, 0] - x) < 1e-12)
            sides = [side[0, k, part] for side in (line.force_left, line.force_right)]
            sides = [np.hypot(*side) if components == 2 else side[0] for side in sides]
            nearest = np.min(np.abs(drawn[ring, None] - sides), axis=1)
            assert np.max(nearest) < 1e-9 * np.abs(drawn).max()
    assert mesh.point_data["bending moment [N m]"].max() >= line.bending_moment[0].max() * (1 - 1e-12)


def test_shafts_stand_in_the_model_and_are_numbered(two_shafts):
    results, folder = two_shafts
    _, mesh = both(folder / "line_only.vtu")
    number = mesh.point_data["shaft"]
    for k, (name, line) in enumerate(results.lines.items()):
        frame = results.model.frames[name]
        own = number == k
        along = frame.origin + line.x[:, None] * frame.rotation[:, 0]
        np.testing.assert_allclose(mesh.points[own], along, atol=1e-15)
        moved = mesh.point_data["displacement [m]"][own]
        np.testing.assert_allclose(moved, line.u[0, :, :3] @ frame.rotation.T, rtol=1e-12, atol=1e-20)
        np.testing.assert_array_equal(mesh.point_data["section force left [N]"][own], line.force_left[0, :, :3])
    joined = number[mesh.cells[0].data]
    assert np.all(joined[:, 0] == joined[:, 1])


def test_surface_of_an_upright_hollow_shaft(two_shafts):
    results, folder = two_shafts
    grid, mesh = both(folder / "surface_only.vtu")
    own = mesh.point_data["shaft"] == list(results.lines).index("tube")
    points = mesh.points[own] - [-0.2, 0, 0]
    radius = np.hypot(points[:, 0], points[:, 2])
    assert points[:, 1].min() == pytest.approx(0.0, abs=1e-12)
    assert points[:, 1].max() == pytest.approx(0.46)
    assert radius.min() == pytest.approx(0.015)
    assert radius.max() == pytest.approx(0.04)
    assert grid.n_points == len(own)


def test_case_lists_lead_to_the_files(written):
    folder, _ = written
    results = solved()
    reader = pyvista.get_reader(folder / "surface_cases.pvd")
    assert reader.time_values == [0.0, 1.0, 2.0]
    for number in range(3):
        reader.set_active_time_value(float(number))
        block = reader.read()[0]
        direct = meshio.read(folder / f"surface_{results.cases[number]}.vtu")
        np.testing.assert_array_equal(block.point_data["deflection [m]"], direct.point_data["deflection [m]"])


def test_writing_again_replaces_and_leaves_nothing_beside(tmp_path):
    first = write_vtk(solved(), tmp_path)
    before = {path.name: path.read_bytes() for path in first}
    write_vtk(solved(), tmp_path)
    assert {path.name: path.read_bytes() for path in tmp_path.iterdir()} == before


def test_a_folder_that_cannot_be_made_is_named(tmp_path):
    (tmp_path / "taken").write_text("a file")
    with pytest.raises(FileError, match="taken"):
        write_vtk(solved(), tmp_path / "taken")


HOSTILE = [
    "../../etc/passwd",
    "a/b\\c",
    "con",
    "NUL",
    "",
    ".",
    "..",
    "x" * 300,
    "case\n1\0",
    "löpande drift",
    "负载",
    "a<b>&\"c'",
    "Running",
    "running",
    "RUNNING",
    "-o",
]


def test_case_names_become_safe_and_different_file_names():
    stems = file_stems(HOSTILE)
    assert len({stem.lower() for stem in stems}) == len(HOSTILE)
    for stem in stems:
        assert stem.isascii()
        assert all(sign.isalnum() or sign in "_-" for sign in stem)
        assert stem[0] not in "-."
        assert 0 < len(stem) <= 70
        assert stem.lower() not in ("con", "nul")


@given(st.lists(st.text(max_size=80), max_size=12))
def test_any_case_names_give_different_safe_stems_and_well_formed_lists(cases):
    stems = file_stems(cases)
    assert len({stem.lower() for stem in stems}) == len(cases)
    assert all(stem.isascii() and stem.replace("_", "").replace("-", "").isalnum() for stem in stems)
    tree = ElementTree.fromstring(case_list(cases, [f"{stem}.vtu" for stem in stems]))
    assert [row.get("file") for row in tree.iter("DataSet")] == [f"{stem}.vtu" for stem in stems]


def test_case_list_keeps_the_true_name():
    (row,) = ElementTree.fromstring(case_list(['a<b>&"c'], ["x.vtu"])).iter("DataSet")
    assert row.get("name") == 'a<b>&"c'
