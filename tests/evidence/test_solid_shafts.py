"""Whole stepped shafts against three-dimensional elasticity, through the public model: plain beam and with shoulders.

Source: own computations for this project with axisymmetric finite elements (quadratic triangles, harmonics 0 and 1,
E = 210 GPa, Poisson's ratio 0.3); how each shaft is loaded and measured stands under `about` in the files.
`solid_shafts.json` (three meshes, their error under 1e-4): 8 stepped shafts, 4 uniform ones that show the floor of beam
theory under these loads, and 2 with a thin disc, where no beam rule holds. `solid_shafts_random.json` (one mesh): 20
random ones, solid and hollow in turn, their load 1.6 mm beside a shoulder. The rule was fitted to single steps only.

Loads and reactions over a slab are forces spread over it, and movements there are means over it. The left end is held
in every shaft: a cantilever's is its clamp, and one on two slabs gets its reactions from statics as spread forces, so
that the clamp carries nothing; its movements count from the line through the means of the two slabs.

`pytest -rP` on this file prints the table of errors.
"""

from __future__ import annotations

import json
from collections.abc import Sequence
from functools import cache
from pathlib import Path
from typing import Any

import numpy as np
import pytest
from numpy.typing import NDArray

import fe_shaft as fs
from tests.evidence.published import text

Array = NDArray[np.float64]
Shaft = dict[str, Any]
Slab = Sequence[float]

STEEL = fs.Material("solid_steel", youngs_modulus="210 GPa", poisson_ratio=0.3)
#: Gauss points of the mean over a slab: many, as slopes jump where a shoulder's bending sits, in the thinner side;
#: 3000 change no measure by more than 0.05 % of itself.
POINTS, WEIGHTS = np.polynomial.legendre.leggauss(400)
MM, UP, TWIST, SLOPE = 1e-3, 1, 3, 5

#: Measure: what it is, its case, its place, its component, and SI in units of the file (mm, N, N mm).
MEASURES = {
    "defl_load_per_F_load": ("deflection at the load, per force there", "load", "load", UP, 1e3),
    "slope_load_per_F_load": ("slope at the load, per force there", "load", "load", SLOPE, 1.0),
    "slope_tip_per_F_load": ("slope of the tip, per force at the load", "load", "tip", SLOPE, 1.0),
    "defl_load_per_M_tip": ("deflection at the load, per moment at tip", "tip_moment", "load", UP, 1.0),
    "slope_tip_per_M_tip": ("slope of the tip, per moment there", "tip_moment", "tip", SLOPE, 1e-3),
    "defl_tip_per_M_tip": ("deflection of the tip, per moment there", "tip_moment", "tip", UP, 1.0),
    "defl_tip_per_F_tip": ("deflection of the tip, per force there", "tip_force", "tip", UP, 1e3),
    "twist_per_T": ("twist, per torque", "torque", "tip", TWIST, 1e-3),
    "extension_per_N": ("extension, per axial force", "pull", "tip", 0, 1e3),
}


def read(name: str) -> dict[str, Shaft]:
    rows = json.loads(Path(__file__).with_name(name).read_text(encoding="utf-8"))["shafts"]
    return {row["name"]: row for row in rows}


WHOLE, RANDOM = read("solid_shafts.json"), read("solid_shafts_random.json")
SHAFTS = WHOLE | RANDOM
DISCS = ["X02", "S13"]
UNIFORM = [name for name, shaft in WHOLE.items() if len(shaft["segments"]) == 1]
STEPPED = [name for name in WHOLE if name not in (*DISCS, *UNIFORM)]
SETS = {
    f"{len(STEPPED)} stepped shafts": STEPPED,
    f"{len(RANDOM)} random stepped shafts, loaded beside a shoulder": list(RANDOM),
    f"{len(UNIFORM)} uniform shafts: the floor of beam theory": UNIFORM,
    f"{len(DISCS)} shafts with a thin disc: out of the rule's range": DISCS,
}


def text_mm(value: float) -> str:
    return text(value, "mm")


def middle(slab: Slab) -> float:
    return (slab[0] + slab[1]) / 2


def segments(shaft: Shaft) -> list[fs.Segment]:
    fillets = [0.0, *shaft["fillet_radius_at_shoulders"], 0.0]
    made = []
    for row, left, right in zip(shaft["segments"], fillets[:-1], fillets[1:], strict=True):
        words = {"bore": row["bore_d"], "fillet_left": left, "fillet_right": right}
        given = {key: text_mm(value) for key, value in words.items() if value}
        made.append(fs.Segment(length=text_mm(row["length"]), diameter=text_mm(row["outer_d"]), **given))
    return made


def spread(name: str, slab: Slab, force: float) -> fs.Force:
    """A force upwards [N] over a slab."""
    return fs.Force(name, at=text_mm(middle(slab)), spread=text_mm(slab[1] - slab[0]), up=text(force, "N"))


def reactions(shaft: Shaft, load: str, force: float, moment: float) -> list[fs.Force]:
    """What two slabs answer to a force upwards [N] and the moment about the left end [N mm] that turns x upwards."""
    if shaft["type"] == "cant":
        return []
    first, second = shaft["support_slabs_z"]
    right = (moment - force * middle(first)) / (middle(second) - middle(first))
    return [spread(f"{load}_first", first, right - force), spread(f"{load}_second", second, -right)]


def loads(shaft: Shaft) -> dict[str, list[fs.Force]]:
    """The forces of each case; unit loads in SI."""
    slab, length = shaft["load_slab_z"], shaft["length_mm"]

    def tip(name: str, **words: Any) -> fs.Force:
        return fs.Force(name, at=text_mm(length), **words)

    return {
        "load": [spread("at_load", slab, 1.0), *reactions(shaft, "load", 1.0, middle(slab))],
        "tip_force": [tip("at_tip", up="1 N"), *reactions(shaft, "tip_force", 1.0, length)],
        "tip_moment": [tip("bends", couple={"front": "1 N m"}), *reactions(shaft, "tip_moment", 0.0, 1e3)],
        "torque": [tip("twists", couple={"axial": "1 N m"})],
        "pull": [tip("pulls", axial="1 N")],
    }


@cache
def solved(name: str, shoulders: str) -> fs.Results:
    forces = loads(SHAFTS[name])
    bar = fs.Shaft("bar", segments(SHAFTS[name]), material=STEEL.name, shear="cowper")
    clamp = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
    cases = [fs.Case(case, forces=[force.name for force in of]) for case, of in forces.items()]
    parts = [bar, clamp, *(force for of in forces.values() for force in of)]
    return fs.solve(fs.Model("whole shaft", parts, materials=[STEEL], cases=cases, shoulders=shoulders))


def mean(results: fs.Results, slab: Slab) -> Array:
    """Mean movements over a slab, (n_cases, 6) [m, rad]."""
    places = (middle(slab) + (slab[1] - slab[0]) / 2 * POINTS) * MM
    return np.einsum("k,ckd->cd", WEIGHTS / 2, results.lines["bar"].at(places)[0])


def moved(name: str, shoulders: str) -> dict[str, Array]:
    """Movements of the load's slab and of the tip from where the file counts them, (n_cases, 6) [m, rad]."""
    shaft, results = SHAFTS[name], solved(name, shoulders)
    out = {"load": mean(results, shaft["load_slab_z"]), "tip": results.lines["bar"].u[:, -1].copy()}
    if shaft["type"] == "cant":
        return out
    first, second = shaft["support_slabs_z"]
    start, end = (mean(results, slab)[:, UP] for slab in (first, second))
    tilt = (end - start) / ((middle(second) - middle(first)) * MM)
    for key, place in {"load": middle(shaft["load_slab_z"]), "tip": shaft["length_mm"]}.items():
        out[key][:, UP] -= start + tilt * (place - middle(first)) * MM
        out[key][:, SLOPE] -= tilt
    return out


@cache
def measured(name: str, shoulders: str) -> dict[str, float]:
    """All measures in units of the file."""
    places, cases = moved(name, shoulders), solved(name, shoulders).cases
    return {
        key: float(places[place][cases.index(case), component] * units)
        for key, (_, case, place, component, units) in MEASURES.items()
    }


def counted(name: str) -> list[str]:
    """Measures that count: not what the file leaves out, nor a slope at the load of under 5 % of the tip's."""
    shaft, truth = SHAFTS[name], SHAFTS[name]["truth"]
    small = abs(truth["slope_load_per_F_load"]) < 0.05 * abs(truth["slope_tip_per_F_load"])
    left_out = [*shaft.get("ignore_measures", ()), *["slope_load_per_F_load"] * small]
    return [key for key in MEASURES if key not in left_out]


def error(name: str, key: str, shoulders: str) -> float:
    """Of the truth, in percent; negative where the beam is too stiff."""
    return 100 * (measured(name, shoulders)[key] / SHAFTS[name]["truth"][key] - 1)


def errors(names: Sequence[str], shoulders: str, *keys: str) -> Array:
    """Sizes of the errors of some measures, or of all, in percent."""
    found = [error(name, key, shoulders) for name in names for key in counted(name) if key in (keys or MEASURES)]
    return np.abs(found)


def table() -> str:
    """Mean and worst errors of the plain beam and of the one with shoulders, by measure."""
    lines = [
        f"{'Errors in percent':<58}{'plain beam':>18}{'with shoulders':>18}",
        " " * 58 + f"{'mean   worst':>18}" * 2,
    ]
    for title, names in SETS.items():
        lines.append(title)
        for told, keys in [*((row[0], [key]) for key, row in MEASURES.items()), ("all", [])]:
            plain, soft = errors(names, "off", *keys), errors(names, "on", *keys)
            if len(plain):
                cells = "".join(f"{of.mean():>10.2f}{of.max():>8.2f}" for of in (plain, soft))
                lines.append(f"  {told:<46}{len(plain):>4} values{cells[1:]}")
    return "\n".join(lines)


def test_the_figures() -> None:
    print(table())
    assert errors(STEPPED, "on").mean() < 1.0, table()
    assert errors(list(RANDOM), "on").mean() < 1.8, table()
    assert errors(UNIFORM, "on").mean() < 1.0, table()


@pytest.mark.parametrize("name", [*STEPPED, *UNIFORM, *RANDOM])
def test_tip_slopes_and_twists(name: str) -> None:
    assert abs(error(name, "slope_tip_per_M_tip", "on")) < 2.2
    assert abs(error(name, "twist_per_T", "on")) < 1.0


@pytest.mark.parametrize("name", DISCS)
def test_thin_discs_stay_too_stiff(name: str) -> None:
    """Plates bend; the rule knows shoulders only. Twist has no plate in it."""
    assert abs(error(name, "twist_per_T", "on")) < 1.0
    for key in ("slope_tip_per_M_tip", "defl_tip_per_M_tip", "extension_per_N"):
        assert error(name, key, "off") < error(name, key, "on") < 0


def test_seldom_farther_than_the_plain_beam() -> None:
    """In 7 of the random shafts' values, all by the force beside a shoulder or reciprocal to it."""
    farther = errors(list(RANDOM), "on") > errors(list(RANDOM), "off")
    assert farther.sum() <= 7


@pytest.mark.parametrize("name", WHOLE)
def test_the_plain_beam_is_measured_as_the_file_does(name: str) -> None:
    """The file's own plain beams, from the same formulas: a slip in a load, a slab or a line shows here.

    Of uniform shafts to 1e-7; stepped ones differ by up to 3.2e-4, in extension and twist too, where nothing but the
    lengths and sections counts: the file's are those of a grid that misses the shoulders by a little.
    """
    within = 1e-7 if name in UNIFORM else 5e-4
    given, found = SHAFTS[name]["beam_plain"], measured(name, "off")
    assert given.keys() == found.keys()
    for key, value in given.items():
        scale = abs(given["slope_tip_per_F_load"]) if key == "slope_load_per_F_load" else 0.0
        assert found[key] == pytest.approx(value, rel=within, abs=1e-9 * scale), key


@pytest.mark.parametrize("shoulders", ["off", "on"])
@pytest.mark.parametrize("name", SHAFTS)
def test_reciprocity(name: str, shoulders: str) -> None:
    """Maxwell and Betti: the tip's slope by the load is the load's deflection by the tip's moment."""
    found = measured(name, shoulders)
    assert found["defl_load_per_M_tip"] == pytest.approx(found["slope_tip_per_F_load"], rel=1e-6)


@pytest.mark.parametrize("name", [name for name, shaft in SHAFTS.items() if shaft["type"] == "two"])
def test_the_clamp_carries_nothing(name: str) -> None:
    """On two slabs the reactions are the spread forces; couples in N m beside unit loads."""
    results = solved(name, "on")
    bent = [results.cases.index(case) for case in ("load", "tip_force", "tip_moment")]
    np.testing.assert_allclose(results["clamp"].wrench[bent], 0, atol=1e-12)


@pytest.mark.parametrize("name", SHAFTS)
def test_no_slab_reaches_over_a_shoulder(name: str) -> None:
    """So a mean over its volume is one over its width."""
    shaft = SHAFTS[name]
    planes = np.cumsum([row["length"] for row in shaft["segments"]])[:-1]
    for first, last in [shaft["load_slab_z"], *(shaft["support_slabs_z"] or [])]:
        assert not ((planes > first + 1e-9) & (planes < last - 1e-9)).any()
