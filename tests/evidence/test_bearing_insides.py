"""What is inside a bearing, estimated from its catalogue, against bearings whose inside is published or well known.

bearing_insides.toml: sizes with ratings of several makers, told apart by letters, read in catalogue texts unless
`ratings_from_memory`; insides read or, where `geometry_from_memory`, from memory. The spreads of the estimate were set
on these deep-groove bearings, so that they agree is no surprise; that no figure leaves its printed band is the test.
Stiffness at a given load goes as (Z^2 D)^(1/3) of balls, from Hertz's law.
"""

from __future__ import annotations

import math
import tomllib
from pathlib import Path
from typing import Any

import pytest

from fe_shaft.rolling.estimate import estimate
from fe_shaft.rolling.inside import Catalogue, Estimate
from fe_shaft.rolling.kinds import Kind

HERE = Path(__file__).parent
BEARINGS = tomllib.loads((HERE / "bearing_insides.toml").read_text(encoding="utf-8"))["bearing"]
#: Three sizes of which maker B builds another inside, as its C, C0 and f0 say together (note of the file): Z, D [mm].
OTHER_DESIGN = {"6209": (10, 11.906), "6305": (8, 10.319), "6306": (8, 11.906)}

Row = tuple[dict[str, Any], str]


def rows(kind: str) -> list[Row]:
    """Bearings of a type with each set of ratings."""
    return [(b, s) for b in BEARINGS if b["type"].startswith(kind) for s in ("", "_A", "_B") if f"C{s}" in b]


def name(row: Any) -> str:
    return f"{row[0]['id']}{row[1]}" if isinstance(row, tuple) else str(row)


def catalogue(row: Row, *left_out: str, **more: float) -> Catalogue:
    """Figures of a row in SI, less some."""
    b, s = row
    sizes = {
        "width": b.get("B", b.get("T")), "cup_width": b.get("C_cup_width"),
        "inner_raceway": b.get("F"), "outer_raceway": b.get("E"),
    }  # fmt: skip
    given = {key: 1e-3 * value for key, value in sizes.items() if value is not None}
    given |= {"dynamic": b[f"C{s}"], "static": b[f"C0{s}"]}
    if "e" in b:
        given["e"] = b["e"]
    if b.get("alpha"):
        given["contact_angle"] = math.radians(b["alpha"])
    given |= more
    return Catalogue(1e-3 * b["d"], 1e-3 * b["D"], **{k: v for k, v in given.items() if k not in left_out})


def truth(row: Row) -> tuple[int, float, float]:
    """Number, diameter and pitch diameter [m]."""
    b, s = row
    number, ball = OTHER_DESIGN.get(b["id"], (b["Z"], b["Dw"])) if s == "_B" else (b["Z"], b["Dw"])
    return number, 1e-3 * ball, 1e-3 * b.get("dpw", b.get("dpw_assumed"))


def in_band(found: Estimate, row: Row) -> None:
    """Number, diameter, pitch diameter, capacity Z^(2/3) D^1.8 and radial stiffness within the estimate's band."""
    z, ball, pitch = truth(row)
    inside, band = found.inside, found.band
    assert abs(inside.number - z) <= band.number
    off = abs(inside.diameter / ball - 1)
    assert off <= (band.diameter if inside.number == z else band.diameter_if_off)
    assert abs(inside.pitch_diameter / pitch - 1) <= band.pitch + 1e-3
    assert abs((inside.number / z) ** (2 / 3) * (inside.diameter / ball) ** 1.8 - 1) <= band.capacity
    assert abs((inside.number / z) ** (2 / 3) * (inside.diameter / ball) ** (1 / 3) - 1) <= band.radial


@pytest.mark.parametrize("row", rows("deep groove"), ids=name)
def test_deep_groove_from_its_ratings(row: Row) -> None:
    in_band(estimate(Kind.DEEP_GROOVE_BALL, catalogue(row)), row)
    if "f0_B" in row[0] and row[1] == "_B":
        in_band(estimate(Kind.DEEP_GROOVE_BALL, catalogue(row, f0=row[0]["f0_B"])), row)


@pytest.mark.parametrize("row", rows("deep groove"), ids=name)
def test_deep_groove_from_its_static_rating(row: Row) -> None:
    in_band(estimate(Kind.DEEP_GROOVE_BALL, catalogue(row, "dynamic")), row)


@pytest.mark.parametrize("row", rows("deep groove"), ids=name)
def test_deep_groove_from_its_size_alone(row: Row) -> None:
    found = estimate(Kind.DEEP_GROOVE_BALL, catalogue(row, "dynamic", "static"))
    assert found.method == "common proportions of d and D"
    in_band(found, row)


def test_most_numbers_of_balls_are_met() -> None:
    """With ratings at most 2 of 24 miss; from d and D alone at most 5, by one each."""
    given = rows("deep groove")
    by_ratings = sum(estimate(Kind.DEEP_GROOVE_BALL, catalogue(r)).inside.number != truth(r)[0] for r in given)
    by_size = sum(
        estimate(Kind.DEEP_GROOVE_BALL, catalogue(r, "dynamic", "static")).inside.number != truth(r)[0] for r in given
    )
    assert len(given) == 24
    assert by_ratings <= 2
    assert by_size <= 5


@pytest.mark.parametrize("size", ["6203", "6205"])
@pytest.mark.parametrize("maker", ["_A", "_B"])
def test_measured_balls_are_met_to_a_thousandth(size: str, maker: str) -> None:
    """The two sizes whose balls were read: 0.2656 in and 0.3126 in, inch sizes of the standard."""
    (row,) = [r for r in rows("deep groove") if r[0]["id"] == size and r[1] == maker]
    found = estimate(Kind.DEEP_GROOVE_BALL, catalogue(row))
    assert found.method == "balls of a standard size"
    assert found.inside.number == row[0]["Z"]
    assert found.inside.diameter == pytest.approx(1e-3 * row[0]["Dw"], rel=1e-3)


@pytest.mark.parametrize("above", [1.0, 1.05, 1.10, 1.15])
@pytest.mark.parametrize("row", [r for r in rows("deep groove") if r[1] == "_B"], ids=name)
def test_a_rating_raised_by_its_maker_does_no_harm(row: Row, above: float) -> None:
    """Solving C and C0 for number and diameter would miss up to five balls; weighing keeps one, stiffness 6 %."""
    found = estimate(Kind.DEEP_GROOVE_BALL, catalogue(row, dynamic=above * row[0]["C_B"]))
    z, ball, _ = truth(row)
    assert abs(found.inside.number - z) <= 1
    assert (found.inside.number**2 * found.inside.diameter / (z**2 * ball)) ** (1 / 3) == pytest.approx(1, abs=0.06)


@pytest.mark.parametrize("row", rows("angular contact"), ids=name)
def test_angular_contact(row: Row) -> None:
    """Sizes of 15 and 25 deg read in two makers' texts; 40 deg of one size, from memory."""
    in_band(estimate(Kind.ANGULAR_CONTACT_BALL, catalogue(row)), row)
    in_band(estimate(Kind.ANGULAR_CONTACT_BALL, catalogue(row, "dynamic", "static")), row)


def test_ratings_on_another_basis_are_not_believed() -> None:
    """A maker whose C0 is 1.3 times, and whose light series 0.6 times, that of ISO 76: proportions, with a note."""
    for row in rows("angular contact"):
        found = estimate(Kind.ANGULAR_CONTACT_BALL, catalogue(row))
        believed = "maker D" not in row[0]["id"] and row[0]["id"] not in ("spindle bearing 19", "spindle bearing 20")
        if "maker D" in row[0]["id"]:
            assert found.method == "common proportions of d and D"
            assert found.notes[0].startswith("The ratings are not those of ISO 281 and ISO 76")
        assert believed == (found.method == "ratings and filling weighed together")


@pytest.mark.parametrize("row", [r for r in rows("cylindrical") if "F" in r[0]], ids=name)
def test_cylindrical_with_both_raceways(row: Row) -> None:
    """Diameters follow exactly; C, of which nothing was used, then is that of ISO 281 or 13 to 16 % above it."""
    found = estimate(Kind.CYLINDRICAL_ROLLER, catalogue(row))
    assert found.inside.diameter == pytest.approx(1e-3 * row[0]["Dw"], rel=1e-9)
    assert found.inside.pitch_diameter == pytest.approx(1e-3 * row[0]["dpw"], rel=1e-9)
    upgraded = found.dynamic_ratio > 1.05
    assert found.dynamic_ratio == pytest.approx(1.145 if upgraded else 1.0, abs=0.02)
    assert not found.notes


@pytest.mark.parametrize("left_out", [("outer_raceway",), ("inner_raceway",), ("inner_raceway", "outer_raceway")])
@pytest.mark.parametrize("row", [r for r in rows("cylindrical") if "F" in r[0]], ids=name)
def test_cylindrical_with_less(row: Row, left_out: tuple[str, ...]) -> None:
    """Against the same bearing with both raceways: diameter, pitch circle and the product of number and length."""
    full = estimate(Kind.CYLINDRICAL_ROLLER, catalogue(row)).inside
    found = estimate(Kind.CYLINDRICAL_ROLLER, catalogue(row, *left_out))
    inside, band = found.inside, found.band
    assert abs(inside.number - full.number) <= band.number
    assert abs(inside.diameter / full.diameter - 1) <= band.diameter
    assert abs(inside.pitch_diameter / full.pitch_diameter - 1) <= band.pitch
    assert abs(inside.number * inside.length / (full.number * full.length) - 1) <= band.capacity


def test_rollers_of_todays_cylindrical_bearings() -> None:
    """F and E read for seven sizes: rollers are 0.275 (D - d) in the mean, none 6 % off."""
    sizes = [b for b in BEARINGS if b["type"].startswith("cyl") and "F" in b]
    found = [estimate(Kind.CYLINDRICAL_ROLLER, Catalogue(1e-3 * b["d"], 1e-3 * b["D"])).inside for b in sizes]
    off = [1e3 * inside.diameter / b["Dw"] - 1 for inside, b in zip(found, sizes, strict=True)]
    assert len(off) == 7
    assert abs(sum(off) / 7) < 0.01
    assert max(map(abs, off)) < 0.06


@pytest.mark.parametrize("left_out", [(), ("outer_raceway",)])
def test_cylindrical_of_an_older_design(left_out: tuple[str, ...]) -> None:
    """Harris, Rolling Bearing Analysis, 209 roller bearing: 14 rollers 10 x 9.6 mm on 65 mm (from memory)."""
    (row,) = [r for r in rows("cylindrical") if "Z" in r[0]]
    found = estimate(Kind.CYLINDRICAL_ROLLER, catalogue(row, *left_out))
    inside, band = found.inside, found.band
    assert abs(inside.number - 14) <= band.number
    assert abs(inside.diameter / 10e-3 - 1) <= band.diameter
    assert abs(inside.pitch_diameter / 65e-3 - 1) <= band.pitch
    assert abs(inside.length / 9.6e-3 - 1) <= band.length
    assert abs(inside.number * inside.length / (14 * 9.6e-3) - 1) <= band.capacity


@pytest.mark.parametrize("row", rows("tapered"), ids=name)
def test_tapered(row: Row) -> None:
    """No published number of rollers. The angle follows from e or Y; C, not used, is that of ISO 281 to 2 %."""
    b = row[0]
    found = estimate(Kind.TAPERED_ROLLER, catalogue(row))
    assert math.degrees(found.inside.contact_angle) == pytest.approx(b["alpha_from_e"], abs=0.005)
    by_y = estimate(Kind.TAPERED_ROLLER, catalogue(row, "e", axial_factor=b["Y"]))
    assert math.degrees(by_y.inside.contact_angle) == pytest.approx(b["alpha_from_Y"], abs=0.005)
    assert found.dynamic_ratio == pytest.approx(1.0, abs=0.02)
    bare = estimate(Kind.TAPERED_ROLLER, catalogue(row, "static", "dynamic", "e")).inside
    assert abs(bare.number * bare.length / (found.inside.number * found.inside.length) - 1) <= 0.30


@pytest.mark.parametrize(
    ("bore", "outer", "dynamic", "static", "e"),
    [(25, 52, 12100, 3300, 0.27), (30, 62, 15600, 4650, 0.25), (40, 80, 19000, 6550, 0.22)],
)
def test_self_aligning(bore: float, outer: float, dynamic: float, static: float, e: float) -> None:
    """Sizes 1205, 1206, 1208, ratings from memory, no published inside: one meets C to 6 %, C0 to 3 %."""
    found = estimate(Kind.SELF_ALIGNING_BALL, Catalogue(1e-3 * bore, 1e-3 * outer, None, dynamic, static, e=e))
    assert found.dynamic_ratio == pytest.approx(1, abs=0.06)
    assert found.static_ratio == pytest.approx(1, abs=0.03)
    assert found.inside.rows == 2
