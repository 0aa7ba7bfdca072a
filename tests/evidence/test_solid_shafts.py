"""Whole stepped shafts against three-dimensional elasticity, through the public model: plain beam and with shoulders.

Source: own computations for this project with axisymmetric finite elements (quadratic triangles, harmonics 0 and 1,
E = 210 GPa, Poisson's ratio 0.3); how each shaft is loaded and measured stands under `about` in the files.
`solid_shafts.json` (three meshes, their error under 1e-4): 8 stepped shafts, 4 uniform ones that show the floor of beam
theory under these loads, and 2 with a thin disc, where no beam rule holds. `solid_shafts_random.json` (one mesh): 20
random ones, solid and hollow in turn, their load 1.6 mm beside a shoulder. The rule was fitted to single steps only.

`pytest -rP` on this file prints the table of errors.
"""

from __future__ import annotations

import json
from collections.abc import Sequence
from functools import cache
from pathlib import Path

import numpy as np
import pytest

import fe_shaft as fs
from tests.evidence.whole_shafts import MEASURES, Array, Shaft, counted, measures, solve


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


@cache
def solved(name: str, shoulders: str) -> fs.Results:
    return solve(SHAFTS[name], shoulders)


@cache
def measured(name: str, shoulders: str) -> dict[str, float]:
    """All measures in units of the file."""
    return measures(SHAFTS[name], solved(name, shoulders))


def error(name: str, key: str, shoulders: str) -> float:
    """Of the truth, in percent; negative where the beam is too stiff."""
    return 100 * (measured(name, shoulders)[key] / SHAFTS[name]["truth"][key] - 1)


def errors(names: Sequence[str], shoulders: str, *keys: str) -> Array:
    """Sizes of the errors of some measures, or of all, in percent."""
    wanted = keys or MEASURES
    return np.abs([error(name, key, shoulders) for name in names for key in counted(SHAFTS[name]) if key in wanted])


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
