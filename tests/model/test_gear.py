"""Gears: diameters by their definitions, and keys that do not fit together."""

import math

import pytest

import fe_shaft.model as fs
from tests.model.told import only

SPUR = {"at": "10 mm", "teeth": 20, "normal_module": "2 mm", "facewidth": "20 mm"}
BEVEL = SPUR | {"form": "bevel", "pitch_cone_angle": "30 deg", "apex": "left"}


def gear(base: dict[str, object] = SPUR, **words: object) -> fs.Gear:
    return fs.Gear("g", **(base | words))  # type: ignore[arg-type]


def test_reference_diameter_of_a_helical_gear() -> None:
    """d = z m_n / cos(beta) (ISO 21771)."""
    made = gear(teeth=85, helix="15 deg left")
    assert made.reference_diameter == pytest.approx(85 * 0.002 / math.cos(math.radians(15)), rel=1e-15)
    assert made.helix_angle == pytest.approx(math.radians(15))
    assert gear().helix_angle == 0.0
    assert gear().reference_diameter == pytest.approx(0.04)


def test_reference_diameter_as_written() -> None:
    assert gear(teeth=None, normal_module=None, pitch_diameter="176 mm").reference_diameter == 0.176


def test_mean_diameter_of_a_bevel_gear() -> None:
    """d_m = d - b sin(delta), from the geometry of the pitch cone."""
    assert gear(BEVEL).reference_diameter == pytest.approx(0.040 - 0.020 * 0.5)
    assert gear(BEVEL, teeth=None, normal_module=None, pitch_diameter="60 mm").reference_diameter == pytest.approx(0.05)
    stated = gear(BEVEL, teeth=None, normal_module=None, mean_diameter="90 mm", facewidth=None, spread="point")
    assert stated.reference_diameter == 0.09


def test_width_over_which_the_tooth_force_is_spread() -> None:
    assert gear().spread_si == 0.02
    assert gear(spread="point").spread_si == 0.0
    assert gear(spread="12 mm").spread_si == 0.012
    assert gear(spread="point", facewidth=None).spread_si == 0.0


def test_pressure_angle_is_that_of_iso_53_unless_written() -> None:
    assert gear().pressure_angle.si == pytest.approx(math.radians(20))
    assert gear(pressure_angle="25 deg").pressure_angle.si == pytest.approx(math.radians(25))


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        ({"teeth": "20"}, "g.teeth", '"20" is not a whole number. Write it without quotes and unit, as in 19.'),
        ({"teeth": 3}, "g.teeth", "3 is not possible here. Write 4 to 10000."),
        (
            {"normal_module": None},
            "g.normal_module",
            'normal_module is not written. Write normal_module = "2 mm" with teeth = 85, or pitch_diameter = "176 mm".',
        ),
        (
            {"teeth": None},
            "g.teeth",
            "teeth is not written. Write teeth = 85, or pitch_diameter instead of normal_module.",
        ),
        (
            {"pitch_diameter": "40 mm"},
            "g.pitch_diameter",
            "normal_module and pitch_diameter state the diameter 2 times. Keep one.",
        ),
        (
            {"facewidth": None},
            "g.facewidth",
            'facewidth is not written. Write facewidth = "32 mm", or spread = "point".',
        ),
        ({"apex": "left"}, "g.apex", 'apex belongs to bevel gears. Write form = "bevel", or leave it out.'),
        (
            {"form": "worm"},
            "g.form",
            '"worm" is not known yet in this version. Only cylindrical and bevel gears are known.',
        ),
        ({"helix": "15 deg"}, "g.helix", '"15 deg": left-hand or right-hand? Write "15 deg left" or "15 deg right".'),
        ({"internal": True}, "g.internal", "internal is not known yet in this version. Only external gears are known."),
        ({"cg_at": "3 mm"}, "g.mass", 'mass is not written, but cg_at is. Write mass = "4.1 kg".'),
        (
            {"mass": "1 kg", "cg_radius": "3 mm"},
            "g.cg_angle",
            "cg_angle is not written, only cg_radius. Write both, or neither.",
        ),
        (
            {"pressure_angle": "20 rad"},
            "g.pressure_angle",
            '"20 rad" is 1146 deg; usual: 10 to 35. Meant: deg? (to keep it: range_check = "off" in this table)',
        ),
    ],
)
def test_gears_that_cannot_be(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(gear, **words) == (place, sentence)


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        ({"apex": None}, "g.apex", 'apex is not written. Write apex = "left".'),
        ({"apex": "top"}, "g.apex", '"top" is not possible here. Write "left" or "right".'),
        (
            {"pitch_cone_angle": None},
            "g.pitch_cone_angle",
            'pitch_cone_angle is not written. Write pitch_cone_angle = "63.4 deg".',
        ),
        (
            {"pitch_cone_angle": "95 deg"},
            "g.pitch_cone_angle",
            "95 deg is more than 90 deg. Write the half angle of the pitch cone.",
        ),
        (
            {"helix": "15 deg left"},
            "g.helix",
            "a bevel gear has no helix, and spiral is not known yet in this version. Leave it out.",
        ),
        ({"facewidth": "41 mm"}, "g.facewidth", "41 mm reaches to the tip of the pitch cone. Make it smaller."),
    ],
)
def test_bevel_gears_that_cannot_be(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(gear, BEVEL, **words) == (place, sentence)


def test_a_bevel_gear_is_as_wide_along_the_shaft_as_its_cone_lets_it() -> None:
    """b cos(delta): plane geometry."""
    bevel = fs.Gear(
        "g", at="50 mm", form="bevel", teeth=20, normal_module="3 mm", facewidth="20 mm", pitch_cone_angle="60 deg",
        apex="left", mate="12 o'clock",
    )  # fmt: skip
    assert bevel.spread_si == pytest.approx(0.010)
    assert bevel.width_si == pytest.approx(0.010)
