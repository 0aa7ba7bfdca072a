"""The picture without a window: what it says, where things are on it, and that they are drawn."""

from __future__ import annotations

from io import BytesIO

import numpy as np
import pytest
from PIL import Image

import fe_shaft.model as fs
from fe_shaft.analysis.solve import solve
from fe_shaft.errors import UsageError
from fe_shaft.views.quantities import COLOURINGS
from fe_shaft.views.scene import Scene
from tests.views.demo import layshaft, many, pinned, solved

SIZE = (1200, 700)


@pytest.fixture
def scene():
    made = Scene(solved(), pinned(), size=SIZE)
    yield made
    made.close()


def texts(scene):
    scene.refresh()
    return [half.overlay.texts() for half in scene.halves]


def pixels(scene):
    return np.asarray(Image.open(BytesIO(scene.png())).convert("RGB"))


def test_each_half_says_what_it_shows_and_how_far_it_is_exaggerated(scene):
    left, right = texts(scene)
    assert (left["heading"], right["heading"]) == ("rigid pins", "bearings as given")
    assert left["title"] == right["title"] == "Layshaft of an invented drive"
    assert left["case"] == right["case"] == "case running"
    case = solved().case("running")
    largest = max(case[part].deflection_um for part in ("wheel", "pinion", "lay_left", "lay_right", "barring_wheel"))
    assert right["factor"].startswith(f"drawn x {scene.factor:.0f}; true: {largest:.3g} um at ")
    assert case[right["factor"].rpartition(" ")[2]].deflection_um == largest
    assert "bar name" not in left
    assert right["bar name"] == "deflection"
    assert right["bar unit"] == "[um], true"


def test_each_half_says_what_the_shoulders_make_and_whether_they_leave_their_rule(scene):
    for half, results in zip(texts(scene), (pinned(), solved()), strict=True):
        part = half["factor"].rpartition(" ")[2]
        if part in results.parts:
            made = results.by_shoulders(f"{part}.deflection", case="running")
            assert half["made"] == f"of it by shoulders: {made:.3g} um"
        assert "doubt" not in half
    assert any(half["factor"].rpartition(" ")[2] in solved().parts for half in texts(scene))
    rim = [fs.Segment("thin", length="60 mm", diameter="40 mm"), fs.Segment("rim", length="4 mm", diameter="140 mm")]
    held = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])
    flanged = fs.Model("m", [fs.Shaft("s", rim, material="C45"), held, fs.Force("f", at="60 mm", up="1 kN")])
    other = Scene(solve(flanged), size=SIZE)
    assert texts(other)[0]["doubt"] == "beyond their rule: see notes"
    other.close()


def test_place_without_a_name_is_told_when_it_moves_clearly_farther(scene):
    """On pins the free end of the stub moves farthest."""
    line = pinned().lines["layshaft"]
    assert int(np.argmax(line.deflection[0])) == len(line.x) - 1
    left, _ = texts(scene)
    assert left["factor"].endswith(f"true: {line.deflection[0, -1] * 1e6:.3g} um at layshaft.right")


def test_factor_follows_and_never_leaves(scene):
    for factor in (1.0, 37.0, 5000.0):
        scene.exaggerate(factor)
        assert all(half["factor"].startswith(f"drawn x {factor:.0f};") for half in texts(scene))


def test_everything_drawn_is_rest_plus_factor_times_movement(scene):
    points = {}
    for factor in (1.0, 100.0, 300.0):
        scene.exaggerate(factor)
        points[factor] = [
            np.array(actor.mapper.dataset.points)
            for half in scene.halves
            for actor in half.renderer.actors.values()
            if "ghost" not in str(actor)
        ]
    moving = 0
    for one, hundred, more in zip(*points.values(), strict=True):
        if one.shape == hundred.shape == more.shape:
            np.testing.assert_allclose(more - hundred, (hundred - one) * 200 / 99, atol=2e-7)  # float32 on the screen
            moving += bool(np.abs(hundred - one).max() > 1e-6)
    assert moving >= 6


def test_shaft_is_drawn_where_the_results_say(scene):
    """The rim of the left end, 12 o'clock: rest plus factor times u + theta x r."""
    scene.exaggerate(200.0)
    u = solved().lines["layshaft"].u[0, 0]
    expected = np.array([0, 0.015, 0]) + 200.0 * (u[:3] + np.cross(u[3:], [0, 0.015, 0]))
    skin = scene.halves[1]._skins[0].mesh
    assert np.linalg.norm(np.asarray(skin.points) - expected, axis=1).min() < 1e-8


def test_both_halves_share_one_range_of_true_values(scene):
    for quantity in COLOURINGS:
        scene.colour_by(quantity)
        limits = [half.shown.limits for half in scene.halves]
        assert limits[0] == limits[1]
        for half in scene.halves:
            values = np.asarray(half._skins[0].mesh.point_data["value"])
            assert limits[0][0] <= values.min()
            assert values.max() <= limits[0][1]
            assert half._skin_actors[0].mapper.scalar_range == limits[0]
    scene.colour_by("deflection")
    top = solved().lines["layshaft"].deflection[0].max() * 1e6
    assert scene.halves[0].shown.limits[1] == pytest.approx(top, rel=0.01)  # a little more between two stations
    before = np.array(scene.halves[1]._skins[0].mesh.point_data["value"])
    scene.exaggerate(5000.0)
    np.testing.assert_array_equal(scene.halves[1]._skins[0].mesh.point_data["value"], before)


def test_labels_carry_the_results_numbers(scene):
    _, right = texts(scene)
    labels = [text for key, text in right.items() if key.startswith("label ")]
    case = solved().case("running")
    for name in ("wheel", "pinion", "lay_left", "lay_right", "barring_wheel"):
        assert f"{name} {case[name].deflection_um:.3g} um" in labels
    assert f"{case['lay_left'].force / 1000:.3g} kN" in labels
    scene.colour_by("slope")
    _, right = texts(scene)
    assert f"wheel {case['wheel'].slope_mrad:.3g} mrad" in right.values()


def test_labels_do_not_cover_each_other(scene):
    scene.refresh()
    for half in scene.halves:
        boxes = []
        for key, actor in half.overlay._texts.items():
            if key.startswith(("label ", "title", "heading", "case", "factor")) and actor.GetVisibility():
                x, y = actor.GetPosition()
                width, height = half.overlay.size(actor.GetInput(), bold=key in ("heading", "factor"))
                boxes.append((key, x, y, x + width, y + height))
        assert len(boxes) >= 10
        for k, (_, left, bottom, right, top) in enumerate(boxes):
            assert left >= 0
            assert right <= SIZE[0] / 2
            for _, other_left, other_bottom, other_right, other_top in boxes[k + 1 :]:
                apart = left >= other_right or other_left >= right or bottom >= other_top or other_bottom >= top
                assert apart


def test_at_most_eight_parts_are_labelled():
    results = solve(many())
    scene = Scene(results, size=SIZE)
    (only,) = texts(scene)
    names = [part.name for part in results.model.parts_on_shafts]
    labels = [text for key, text in only.items() if key.startswith("label ")]
    assert sum(any(text.startswith(f"{name} ") for name in names) for text in labels) <= 8
    assert len(names) > 8
    scene.close()


def test_forces_labels_and_ghost_can_be_taken_away(scene):
    full = pixels(scene).astype(int)
    for what in ("forces", "labels", "ghost"):
        scene.toggle(what)
        less = pixels(scene).astype(int)
        assert np.abs(full - less).sum() > 0
        scene.toggle(what)
    np.testing.assert_array_equal(pixels(scene), full)
    scene.toggle("forces")
    scene.toggle("labels")
    assert not [key for half in texts(scene) for key in half if key.startswith("label ")]


def test_the_eye_agrees_with_the_graphics_library(scene):
    scene.png()
    eye = scene.eye()
    for half in scene.halves:
        corner = np.array(half.renderer.GetViewport()[:2]) * SIZE
        for point in ([0, 0, 0], [0.191, 0.02, -0.05]):
            half.renderer.SetWorldPoint(*point, 1.0)
            half.renderer.WorldToDisplay()
            seen = np.array(half.renderer.GetDisplayPoint()[:2]) - corner
            np.testing.assert_allclose(seen, eye.pixels(np.array(point), half.size()), atol=0.1)


def test_both_halves_are_under_one_eye(scene):
    scene.refresh()
    before = scene.halves[1].overlay._texts["hour 0 3"].GetPosition()
    scene.halves[0].renderer.camera.azimuth += 30
    assert scene.halves[1].renderer.camera.position == scene.halves[0].renderer.camera.position
    scene.refresh()
    assert scene.halves[1].overlay._texts["hour 0 3"].GetPosition() != before


def test_scale_line_has_the_length_it_says(scene):
    scene.exaggerate(200.0)
    scene.refresh()
    half = scene.halves[1]
    text = half.overlay.texts()["scale"]
    number, unit, *rest = text.split()
    assert (unit, rest) == ("um", ["at", "this", "exaggeration"])
    flat = np.asarray(half.overlay._drawn["scale"].GetMapper().GetInput().points)
    assert np.ptp(flat[:, 0]) == pytest.approx(
        float(number) * 1e-6 * 200.0 * scene.eye().pixels_per_metre(half.size()), rel=1e-5
    )


def test_pictures_write_the_units_that_the_model_asks_for():
    """In mil and lbf: the values are those of the results over 25.4 um and 4.4482216 N (yard and pound, 1959)."""
    model = many().change({"units": {"force": "lbf", "length": "in", "angle": "deg"}})
    results = solve(model)
    made = Scene(results, size=SIZE)
    try:
        (half,) = texts(made)
        written = " ".join(half.values())
        assert half["bar unit"] == "[mil], true"
        assert half["scale"].split()[1] == "mil"
        assert half["factor"].split("true: ")[1].split()[1] == "mil"
        assert " lbf" in written
        assert not {"um", "N", "kN", "m", "mm", "mrad"} & set(written.split())
        _, high = made.halves[0].shown.limits
        largest = max(line.deflection[0].max() for line in results.lines.values())
        assert high == pytest.approx(largest / 25.4e-6, rel=0.02)
        made.colour_by("slope")
        assert texts(made)[0]["bar unit"] == "[deg], true"
    finally:
        made.close()


def test_picture_shows_dark_pins_and_bright_bearings(scene):
    """Deflection on pins is a sixth of the range, on the bearings nearly all of it: blue on the left, yellow right."""
    picture = pixels(scene).astype(int)
    assert picture.shape == (SIZE[1], SIZE[0], 3)
    left, right = picture[:, : SIZE[0] // 2], picture[:, SIZE[0] // 2 : -100]

    def area(half, test):
        return int(np.count_nonzero(test(half[..., 0], half[..., 2])))

    assert area(left, lambda red, blue: blue > red + 40) > 3000
    assert area(right, lambda red, blue: red > blue + 60) > 3000
    assert area(left, lambda red, blue: red > blue + 60) == 0


def test_one_half_alone_takes_the_whole_width():
    scene = Scene(solved(), size=SIZE)
    (only,) = texts(scene)
    assert only["heading"] == "bearings as given"
    assert scene.halves[0].size() == SIZE
    scene.close()


def test_model_on_pins_alone_is_called_so():
    scene = Scene(pinned(), size=SIZE)
    assert texts(scene)[0]["heading"] == "rigid pins"
    scene.close()


def test_another_case_changes_everything_and_keeps_the_exaggeration(scene):
    factor = scene.factor
    scene.show_case(2)
    left, right = texts(scene)
    assert right["case"] == left["case"] == "case reversed_jam"
    assert scene.factor == factor
    case = solved().case("reversed_jam")
    assert f"wheel {case['wheel'].deflection_um:.3g} um" in right.values()


def test_unknown_case_and_quantity_name_the_nearest():
    with pytest.raises(UsageError, match=r"runing.*running"):
        Scene(solved(), case="runing")
    with pytest.raises(UsageError, match=r"deflexion.*deflection"):
        Scene(solved(), quantity="deflexion")


def test_unloaded_model_is_drawn_at_rest():
    parts = [
        fs.Shaft("bar", [fs.Segment("a", length="200 mm", diameter="20 mm")], material="42CrMo4"),
        fs.Pin("one", at="10 mm", holds=["radial", "axial"]),
        fs.Pin("two", at="190 mm", holds=["radial"]),
    ]
    scene = Scene(solve(fs.Model("Nothing acts", parts)), size=SIZE)
    (only,) = texts(scene)
    assert only["factor"] == "drawn x 1; true: 0 um"
    assert pixels(scene).std() > 0
    scene.close()


def test_every_quantity_and_every_kind_of_part_can_be_drawn():
    scene = Scene(solve(many()), size=SIZE)
    for quantity in COLOURINGS:
        scene.colour_by(quantity)
        assert pixels(scene).std() > 5
    scene.close()


def test_names_with_formula_signs_are_written_as_they_are():
    model = layshaft()
    scene = Scene(solve(type(model)("a$x^2$|b|$", list(model.parts), list(model.cases), gravity="down")), size=SIZE)
    assert texts(scene)[0]["title"] == "a$x^2$|b|$"
    width, height = scene.halves[0].overlay.size("a$x^2$|b|$")
    plain_width, plain_height = scene.halves[0].overlay.size("aSx^2S|b|S")
    assert height == pytest.approx(plain_height, abs=3)
    assert width == pytest.approx(plain_width, rel=0.1)
    scene.close()


def test_labels_of_the_model_are_what_pictures_call_it():
    wheel = fs.Gear("wheel", at="wheel_seat", teeth=85, normal_module="2 mm", helix="15 deg left", facewidth="32 mm",
                    mate="9 o'clock", label="Großes Rad")  # fmt: skip
    scene = Scene(solve(layshaft(wheel=wheel)), size=SIZE)
    (only,) = texts(scene)
    value = scene.results.case("running")["wheel"].deflection_um
    assert f"Großes Rad {value:.3g} um" in only.values()
    scene.close()
