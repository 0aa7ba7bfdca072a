"""The window, on a display: keys, slider, list of cases, saving. Run by test_window.py in a process of its own, since
the graphics library chooses once a process whether it draws on a display.
"""

from __future__ import annotations

from math import log10

import numpy as np
import pytest
from PIL import Image

from fe_shaft.views.graphics import on_screen
from fe_shaft.views.quantities import COLOURINGS
from fe_shaft.views.window import KEYS, Window
from tests.views.demo import pinned, solved

SIZE = (1000, 600)


@pytest.fixture
def window(monkeypatch, tmp_path):
    monkeypatch.chdir(tmp_path)
    opened = Window(solved(), pinned(), size=SIZE)
    opened.open(wait=False)
    yield opened
    opened.close()


def key(window, name):
    """Press a key as the window system reports it."""
    interactor = window.plotter.iren.interactor
    interactor.SetKeyEventInformation(0, 0, name if len(name) == 1 else "\0", 0, name)
    interactor.InvokeEvent("KeyPressEvent")
    interactor.InvokeEvent("CharEvent")
    interactor.InvokeEvent("KeyReleaseEvent")


def seen(window):
    window.redraw()
    return np.asarray(window.plotter.screenshot(return_img=True))


def heads(window):
    window.redraw()
    return [half.overlay.texts() for half in window.scene.halves]


def test_opens_on_a_display_with_both_halves(window):
    assert "XOpenGL" in type(window.plotter.render_window).__name__
    picture = seen(window)
    assert picture.shape[:2] == (SIZE[1], SIZE[0])
    assert picture.std() > 5
    assert [texts["heading"] for texts in heads(window)] == ["rigid pins", "bearings as given"]


def test_number_keys_choose_the_case_and_the_list_shows_it(window):
    for number, name in enumerate(solved().cases, start=1):
        key(window, str(number))
        assert all(texts["case"] == f"case {name}" for texts in heads(window))
        assert heads(window)[0][f"case list {number - 1}"] == f"{number}  {name}"
    before = seen(window)
    key(window, "9")
    np.testing.assert_array_equal(seen(window), before)


@pytest.mark.parametrize("name", ["g", "f", "l", "h", "p"])
def test_switches_change_the_picture_and_change_it_back(window, name):
    before = seen(window).astype(int)
    key(window, name)
    assert np.abs(seen(window).astype(int) - before).sum() > 0
    key(window, name)
    np.testing.assert_array_equal(seen(window), before)


def test_without_pins_the_bearings_take_the_whole_width(window):
    key(window, "p")
    assert window.scene.shown_halves == [window.scene.halves[1]]
    assert window.scene.halves[1].size()[0] == SIZE[0]
    assert "case list 0" in heads(window)[1]


def test_q_walks_through_the_quantities_and_does_not_quit(window):
    found = []
    for _ in COLOURINGS:
        found.append(heads(window)[1]["bar name"])
        key(window, "q")
    assert found == list(COLOURINGS)
    assert heads(window)[1]["bar name"] == found[0]
    assert window.plotter.render_window is not None


@pytest.mark.parametrize("name", ["e", "w", "t", "j", "3", "u", "v", "space", "Up"])
def test_keys_without_a_meaning_do_nothing(window, name):
    if name == "3":
        key(window, "3")  # a case here; not the library's switch to stereo
        assert not window.plotter.render_window.GetStereoRender()
        return
    before = seen(window)
    key(window, name)
    np.testing.assert_array_equal(seen(window), before)


def test_every_key_is_listed_and_works(window):
    listed = {name for name, _ in KEYS if name not in ("1-9", "Esc")}
    assert listed | {"Escape"} == set(window._actions)
    key(window, "h")
    written = heads(window)[1]
    assert {name for name, _ in KEYS} <= set(written.values())
    (left, bottom, right, top), font = window.scene.taken["last"][0], window.scene.font
    rows = slice(int(SIZE[1] - 84 - top), int(SIZE[1] - 84 - bottom))
    panel = seen(window)[rows, int(SIZE[0] / 2 + left) : int(SIZE[0] / 2 + right), :3].mean(axis=2)
    assert np.median(panel) == 255
    assert np.count_nonzero(panel < 80) > 2 * font * len(KEYS)


def test_slider_is_logarithmic_and_the_factor_follows_it(window):
    shown = window._slider.GetRepresentation()
    assert shown.GetMinimumValue() == pytest.approx(0.0)
    assert shown.GetMaximumValue() == pytest.approx(log10(5000.0))
    assert shown.GetValue() == pytest.approx(log10(window.scene.factor))
    shown.SetValue(3.0)
    window._slider.InvokeEvent("InteractionEvent")
    assert window.scene.factor == pytest.approx(1000.0)
    assert all(texts["factor"].startswith("drawn x 1000;") for texts in heads(window))
    assert window._strip.texts()["factor"] == "drawn x 1000"
    window.exaggerate(50.0)
    assert shown.GetValue() == pytest.approx(log10(50.0))


def test_turning_the_view_turns_both_halves_and_moves_the_labels(window):
    window.redraw()
    places = window.scene.halves[0].overlay._texts["hour 0 3"].GetPosition()
    window.scene.halves[1].renderer.camera.azimuth += 25
    window.plotter.render()
    assert window.scene.halves[0].overlay._texts["hour 0 3"].GetPosition() != places
    key(window, "r")
    assert window.scene.halves[0].overlay._texts["hour 0 3"].GetPosition() == pytest.approx(places, abs=0.5)


def test_s_saves_pictures_under_free_names(window, tmp_path):
    key(window, "s")
    key(window, "s")
    assert sorted(path.name for path in tmp_path.iterdir()) == ["running_1.png", "running_2.png"]
    with Image.open(tmp_path / "running_1.png") as image:
        assert image.size == SIZE
    assert window._strip.texts()["help"] == "saved running_2.png"


def test_saving_where_nothing_can_be_written_is_said_in_the_window(window, monkeypatch, tmp_path):
    gone = tmp_path / "gone"
    gone.mkdir()
    monkeypatch.chdir(gone)
    gone.rmdir()
    key(window, "s")
    assert "cannot be written" in window._strip.texts()["help"]


def test_hovering_shows_what_found_no_room(window):
    key(window, "l")
    half = window.scene.halves[1]
    assert not [name for name in half.overlay.texts() if name.startswith("label")][8:]
    mark = next(mark for mark in half.drawing.marks if mark.name == "pinion")
    point = mark.point + half.shown.factor * mark.movement(0)
    x, y = window.scene.eye().pixels(point, half.size())
    strip = window._strip.renderer.GetSize()[1]
    interactor = window.plotter.iren.interactor
    interactor.SetEventInformation(int(x + SIZE[0] / 2), int(y + strip), 0, 0, "\0", 0, "")
    interactor.InvokeEvent("MouseMoveEvent")
    value = solved().case("running")["pinion"].deflection_um
    assert half.overlay.texts()["hover"] == f"pinion {value:.3g} um"
    interactor.SetEventInformation(3, 3, 0, 0, "\0", 0, "")
    interactor.InvokeEvent("MouseMoveEvent")
    assert "hover" not in half.overlay.texts()


def test_slider_moves_only_the_geometry(window):
    """A slider's step makes no new mesh for what moves: the same ones get new points."""
    meshes = [moved.mesh for half in window.scene.halves for moved in half._skins]
    window._slide(2.5)
    assert meshes == [moved.mesh for half in window.scene.halves for moved in half._skins]


def test_window_is_no_larger_than_the_screen(window):
    width, height = window.plotter.render_window.GetScreenSize()
    assert on_screen((width // 2, height // 2)) == (width // 2, height // 2)
    wide, high = on_screen((3 * width, 2 * height))
    assert wide < width
    assert high < height
    assert wide / high == pytest.approx(3 * width / (2 * height), rel=0.01)
