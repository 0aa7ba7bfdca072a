"""Pictures: written without a display, whole or not at all, and quietly."""

from __future__ import annotations

import os
import subprocess
import sys
from ctypes.util import find_library
from pathlib import Path

import pytest
from PIL import Image

from fe_shaft.errors import FileError, UsageError
from fe_shaft.views import picture
from tests.views.demo import pinned, solved

ROOT = Path(__file__).parents[2]
DRAW = """
import sys
from tests.views.demo import pinned, solved
from fe_shaft.views import picture
picture(solved(), sys.argv[1], pins=pinned(), size=(640, 400))
"""


def python(*arguments, **environment):
    """A fresh interpreter without a display."""
    kept = {name: value for name, value in os.environ.items() if name not in ("DISPLAY", "WAYLAND_DISPLAY")}
    command = [sys.executable, *arguments]
    return subprocess.run(command, cwd=ROOT, env=kept | environment, capture_output=True, text=True, timeout=120)


def test_picture_is_a_png_of_the_size_asked_for(tmp_path):
    path = picture(solved(), tmp_path / "shaft.png", pins=pinned(), case="starting", size=(800, 500))
    with Image.open(path) as image:
        assert image.format == "PNG"
        assert image.size == (800, 500)
    assert list(tmp_path.iterdir()) == [path]


def test_without_a_display_it_is_drawn_and_nothing_is_said(tmp_path):
    done = python("-W", "error", "-c", DRAW, str(tmp_path / "shaft.png"))
    assert (done.returncode, done.stdout, done.stderr) == (0, "", "")
    with Image.open(tmp_path / "shaft.png") as image:
        assert len(image.convert("RGB").getcolors(1 << 20)) > 200


def test_importing_the_views_loads_no_graphics():
    heavy = "('pyvista', 'vtkmodules', 'matplotlib', 'pandas', 'PIL', 'meshio')"
    code = f"import sys, fe_shaft.views, fe_shaft.io.vtk_files; print([m for m in {heavy} if m in sys.modules])"
    done = python("-c", code)
    assert (done.stdout.strip(), done.stderr) == ("[]", "")


@pytest.mark.skipif(find_library("OSMesa") is not None, reason="OSMesa is installed, so something can always be drawn")
def test_where_nothing_can_be_drawn_one_sentence_says_so(tmp_path):
    code = DRAW.replace("picture(solved()", "from fe_shaft.errors import UsageError\ntry:\n  picture(solved()")
    code += "except UsageError as error:\n  print(error)\n"
    done = python("-c", code, str(tmp_path / "shaft.png"), VTK_DEFAULT_OPENGL_WINDOW="vtkOSOpenGLRenderWindow")
    assert done.stdout.startswith("nothing can be drawn here: ")
    assert (done.returncode, done.stderr) == (0, "")


@pytest.mark.parametrize("name", ["shaft.jpg", "shaft", "shaft.pdf"])
def test_only_png_is_written(tmp_path, name):
    with pytest.raises(UsageError, match=r"PNG only. Write shaft\.png"):
        picture(solved(), tmp_path / name)


@pytest.mark.parametrize("size", [(100, 100), (1600, 100000), (0, 900)])
def test_senseless_sizes_are_refused(tmp_path, size):
    with pytest.raises(UsageError, match="320 to 8000"):
        picture(solved(), tmp_path / "shaft.png", size=size)


def test_folder_that_does_not_exist_is_named(tmp_path):
    with pytest.raises(FileError, match="nowhere"):
        picture(solved(), tmp_path / "nowhere" / "shaft.png", size=(400, 320))


def test_pictures_of_the_same_results_are_alike(tmp_path):
    paths = [picture(solved(), tmp_path / f"{k}.png", size=(640, 400)) for k in range(2)]
    assert paths[0].read_bytes() == paths[1].read_bytes()


def test_a_comparison_brings_both_halves_and_two_models_are_refused():
    import pytest

    import fe_shaft as fs
    from fe_shaft.views.halves import halves
    from tests.views.demo import layshaft

    model = layshaft()
    comparison = fs.compare(model)
    assert halves(comparison, None) == (comparison.right, comparison.left)
    other = fs.compare(model, model.change({"layshaft.wheel_seat.diameter": "44 mm"}))
    with pytest.raises(fs.UsageError, match="two models is not drawn"):
        halves(other, None)
