"""Slips of units: caught where they cannot be meant, silent on models that are."""

import random

import pytest

import fe_shaft.model as fs
from fe_shaft.model.words import Words
from tests.model.told import only

AT = {"at": "10 mm"}
HELD = AT | {"holds": ["radial"]}
GEAR = AT | {"teeth": 20, "normal_module": "2 mm", "facewidth": "20 mm"}
SEGMENT = {"length": "38 mm", "diameter": "38 mm"}
STEEL = {"youngs_modulus": "210 GPa", "poisson_ratio": 0.3}
OFFSET = HELD | {"offset_angle": "3 o'clock"}
TILT = HELD | {"bore_tilt_angle": "3 o'clock"}
LIMIT = {"of": "wheel", "quantity": "deflection"}


@pytest.mark.parametrize(
    ("noun", "base", "key", "text"),
    [
        (fs.Segment, SEGMENT, "length", "250 m"),
        (fs.Segment, SEGMENT, "length", "5 um"),
        (fs.Segment, SEGMENT, "diameter", "38 m"),
        (fs.Segment, SEGMENT, "diameter", "250 m"),
        (fs.Segment, SEGMENT, "diameter", "0.038 mm"),
        (fs.Segment, SEGMENT, "diameter", "38 um"),
        (fs.Segment, SEGMENT, "fillet", "1.5 m"),
        (fs.Stiffness, {}, "radial", "93 N/m"),
        (fs.Stiffness, {}, "radial", "93 MN/um"),
        (fs.Stiffness, {}, "axial", "0.00006 N/um"),
        (fs.Stiffness, {}, "tilt", "5000000 N m/mrad"),
        (fs.Stiffness, {}, "tilt", "5 N mm/rad"),
        (fs.Seat, {}, "radial", "400 N/m"),
        (fs.Pin, OFFSET, "offset", "20 mm"),
        (fs.Pin, OFFSET, "offset", "20 m"),
        (fs.Pin, TILT, "bore_tilt", "0.5 rad"),
        (fs.Pin, HELD, "width", "19 m"),
        (fs.Gear, GEAR, "normal_module", "2 m"),
        (fs.Gear, GEAR, "normal_module", "0.002 mm"),
        (fs.Gear, GEAR, "facewidth", "20 m"),
        (fs.Gear, GEAR, "pressure_angle", "20 rad"),
        (fs.Gear, GEAR, "pressure_angle", "0.35 deg"),
        (fs.Mass, AT, "mass", "4100 t"),
        (fs.Case, {}, "power", "5500000000 W"),
        (fs.Case, {}, "power", "5500000 kW"),
        (fs.Material, STEEL, "youngs_modulus", "210 MPa"),
        (fs.Material, STEEL, "youngs_modulus", "210 kPa"),
        (fs.Material, STEEL, "youngs_modulus", "210000 GPa"),
        (fs.Material, STEEL, "density", "7.85 kg/m^3"),
        (fs.Material, STEEL, "density", "7850 g/cm^3"),
        (fs.Material, STEEL, "thermal_expansion", "11.5 1/K"),
        (fs.Limit, LIMIT, "max", "20 m"),
        (fs.Limit, LIMIT | {"quantity": "slope"}, "max", "500 rad"),
    ],
)
def test_values_that_cannot_be_meant(noun: type[Words], base: dict[str, object], key: str, text: str) -> None:
    words = ({"name": "x"} if "name" in noun.model_fields else {}) | base | {key: text}
    place, sentence = only(noun, **words)
    assert place.endswith(f".{key}")
    assert sentence.startswith(f'"{text}" is ')
    assert sentence.endswith('? (to keep it: range_check = "off" in this table)')
    noun(**words, range_check="off")


def test_silence_on_sane_models() -> None:
    """200 shafts of the sizes that machines have, from watch-like to mill-like: no slip, nothing unusual."""
    r = random.Random(7)
    for _ in range(200):
        size = 10 ** r.uniform(-0.3, 2.3)  # mm, the diameter of the shaft
        rows = [
            fs.Segment(
                f"s{index}",
                length=f"{size * r.uniform(0.3, 4):.3g} mm",
                diameter=f"{max(1.0, size * r.uniform(0.8, 1.5)):.3g} mm",
                fillet=f"{max(0.05, size / 40):.2g} mm",
            )
            for index in range(5)
        ]
        give = {"radial": f"~{max(1.0, 3 * size):.3g} N/um", "tilt": f"~{max(2e-3, 1e-4 * size**3):.3g} N m/mrad"}
        wheel = fs.Gear(
            "wheel", at="s2", teeth=r.randint(12, 120), mate="9 o'clock", normal_module=f"{max(0.2, size / 15):.2g} mm",
            facewidth=f"{max(0.6, size / 2):.2g} mm", mass=f"{max(1e-3, 1e-5 * size**3):.2g} kg",
        )  # fmt: skip
        parts = [
            fs.Shaft("shaft", rows, material="steel"),
            fs.Bearing("a", at="s0", holds=["radial"], stiffness=give),
            fs.Bearing("b", at="s4", holds=["radial"], stiffness=give),
            wheel,
            fs.Coupling("hub", at="s3"),
        ]
        power, speed = 10 ** r.uniform(-2, 3), 10 ** r.uniform(1, 4)
        case = fs.Case(
            "running", enters="wheel", leaves="hub", power=f"{power:.3g} kW", speed=f"{speed:.3g} rpm",
            turns="clockwise from left",
        )  # fmt: skip
        notes = fs.Model("sane", parts, [case], gravity="down").notes
        assert not [note for note in notes if "unusual" in note.sentence]
