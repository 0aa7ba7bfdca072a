"""Forces, couplings, pulleys, sprockets and masses."""

import math

import pytest

import fe_shaft.model as fs
from tests.model.told import only

AT = {"at": "10 mm"}
PULLEY = AT | {"diameter": "160 mm", "belt_pull": {"tight": "900 N", "slack": "300 N"}, "pulls_towards": "6 o'clock"}
SPROCKET = AT | {"teeth": 17, "chain_pitch": "25.4 mm", "pulls_towards": "1 o'clock"}


def test_components_in_the_order_of_the_axes() -> None:
    force = fs.Force("f", **AT, up="1 kN", front="-2 N", axial="3 N", couple={"up": "4 N m", "axial": "5 N m"})
    assert force.force_si == (3.0, 1000.0, -2.0)
    assert force.couple is not None
    assert force.couple.si == (5.0, 4.0, 0.0)
    assert force.spread_si == 0.0


def test_pitch_diameter_of_a_sprocket() -> None:
    """d = p / sin(180 deg / z): the pitch polygon of a chain wheel; 17 teeth of 1 inch make 138.23 mm."""
    made = fs.Sprocket("s", **SPROCKET)
    assert made.reference_diameter == pytest.approx(0.0254 / math.sin(math.pi / 17))
    assert made.reference_diameter == pytest.approx(0.13823, abs=5e-6)
    assert fs.Sprocket("s", **AT, diameter="138 mm", pulls_towards="1 o'clock").reference_diameter == 0.138


def test_defaults_of_belts_and_chains() -> None:
    assert fs.Pulley("p", **PULLEY).wrap.si == math.pi
    assert fs.Pulley("p", **PULLEY).reference_diameter == 0.16
    assert fs.Sprocket("s", **SPROCKET).pull_factor == 1.0


@pytest.mark.parametrize(
    ("noun", "base", "words", "place", "sentence"),
    [
        (fs.Force, AT, {}, "x.up", 'nothing acts here. Write up = "1.2 kN", front, axial or couple.'),
        (fs.Force, AT, {"up": 100}, "x.up", '100 has no unit. Write "100 N".'),
        (fs.Force, AT, {"couple": {}}, "x.couple", 'the table is empty. Write { up = "40 N m" }.'),
        (
            fs.Force,
            AT,
            {"couple": {"up": "3 N"}},
            "x.couple.up",
            '"3 N" is a force, not a moment. Write N m, N mm, kN m, lbf in or lbf ft.',
        ),
        (
            fs.Force,
            AT,
            {"up": "1 N", "radius": "3 mm"},
            "x.angle",
            "angle is not written, only radius. Write both, or neither.",
        ),
        (
            fs.Force,
            {"left_at": "3 mm"},
            {"up": "1 N"},
            "x.left_at",
            'left_at places a face, but nothing says how wide it is. Write spread = "20 mm" as well, or at.',
        ),
        (
            fs.Coupling,
            AT,
            {"cg_angle": "3 o'clock", "cg_radius": "1 mm"},
            "x.mass",
            'mass is not written, but cg_radius is. Write mass = "4.1 kg".',
        ),
        (fs.Mass, AT, {}, "x.mass", 'mass is not written. Write mass = "4.1 kg".'),
        (fs.Mass, AT, {"cg_at": "3 mm"}, "x.mass", 'mass is not written. Write mass = "4.1 kg".'),
        (fs.Mass, AT, {"mass": "-1 kg"}, "x.mass", '"-1 kg" is negative. Write 0 or a positive value.'),
        (
            fs.Pulley,
            PULLEY,
            {"belt_pull": None},
            "x.belt_pull",
            'belt_pull is not written. Write belt_pull = { tight = "900 N", slack = "300 N" }, or pull_factor.',
        ),
        (
            fs.Pulley,
            PULLEY,
            {"pull_factor": 2.0},
            "x.pull_factor",
            "pull_factor stands beside belt_pull. Write one of them.",
        ),
        (
            fs.Pulley,
            PULLEY | {"belt_pull": None},
            {"pull_factor": 2.0, "wrap": "170 deg"},
            "x.wrap",
            "wrap has no effect beside pull_factor. Leave it out, or write belt_pull.",
        ),
        (
            fs.Pulley,
            PULLEY,
            {"belt_pull": {"tight": "3 N", "slack": "30 N"}},
            "x.belt_pull.slack",
            "30 N is more than tight = 3 N. Exchange them.",
        ),
        (
            fs.Pulley,
            PULLEY,
            {"belt_pull": {"tight": "3 N"}},
            "x.belt_pull.slack",
            'slack is not written. Write slack = "300 N".',
        ),
        (
            fs.Pulley,
            PULLEY,
            {"pulls_towards": None},
            "x.pulls_towards",
            'pulls_towards is not written. Write pulls_towards = "7:30 o\'clock".',
        ),
        (
            fs.Sprocket,
            SPROCKET,
            {"teeth": None},
            "x.teeth",
            "teeth is not written. Write teeth = 17, or diameter alone.",
        ),
        (
            fs.Sprocket,
            SPROCKET,
            {"chain_pitch": None},
            "x.chain_pitch",
            'chain_pitch is not written. Write chain_pitch = "25.4 mm", or diameter alone.',
        ),
        (
            fs.Sprocket,
            SPROCKET,
            {"diameter": "138 mm"},
            "x.diameter",
            "diameter stands beside teeth and chain_pitch. Write diameter, or teeth and chain_pitch.",
        ),
        (
            fs.Sprocket,
            SPROCKET,
            {"pull_factor": 0},
            "x.pull_factor",
            "0 is not possible here. Write a number from 0.5 to 10.",
        ),
    ],
)
def test_loads_that_cannot_be(
    noun: type, base: dict[str, object], words: dict[str, object], place: str, sentence: str
) -> None:
    assert only(noun, "x", **(base | words)) == (place, sentence)
