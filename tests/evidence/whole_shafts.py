"""Whole shafts as the files of solids describe them, through the public model: their loads, supports and measures.

How each shaft is loaded and measured stands under `about` in solid_shafts.json. Loads and reactions over a slab are
forces spread over it, and movements there are means over it. The left end is held in every shaft: a cantilever's is its
clamp, and one on two slabs gets its reactions from statics as spread forces, so that the clamp carries nothing; its
movements count from the line through the means of the two slabs.
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import numpy as np
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


def text_mm(value: float) -> str:
    return text(value, "mm")


def middle(slab: Slab) -> float:
    return (slab[0] + slab[1]) / 2


def segments(shaft: Shaft) -> list[fs.Segment]:
    fillets = [0.0, *shaft["fillet_radius_at_shoulders"], 0.0]
    made = []
    for row, left, right in zip(shaft["segments"], fillets[:-1], fillets[1:], strict=True):
        words = {"bore": row["bore_d"], "end_diameter": row.get("end_d"), "fillet_left": left, "fillet_right": right}
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


def solve(shaft: Shaft, shoulders: str) -> fs.Results:
    """The shaft under all its cases."""
    forces = loads(shaft)
    bar = fs.Shaft("bar", segments(shaft), material=STEEL.name, shear="cowper")
    clamp = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
    cases = [fs.Case(case, forces=[force.name for force in of]) for case, of in forces.items()]
    parts = [bar, clamp, *(force for of in forces.values() for force in of)]
    return fs.solve(fs.Model("whole shaft", parts, materials=[STEEL], cases=cases, shoulders=shoulders))


def mean(results: fs.Results, slab: Slab) -> Array:
    """Mean movements over a slab, (n_cases, 6) [m, rad]."""
    places = (middle(slab) + (slab[1] - slab[0]) / 2 * POINTS) * MM
    return np.einsum("k,ckd->cd", WEIGHTS / 2, results.lines["bar"].at(places)[0])


def moved(shaft: Shaft, results: fs.Results) -> dict[str, Array]:
    """Movements of the load's slab and of the tip from where the file counts them, (n_cases, 6) [m, rad]."""
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


def measures(shaft: Shaft, results: fs.Results) -> dict[str, float]:
    """All measures in units of the file."""
    places, cases = moved(shaft, results), results.cases
    return {
        key: float(places[place][cases.index(case), component] * units)
        for key, (_, case, place, component, units) in MEASURES.items()
    }


def counted(shaft: Shaft) -> list[str]:
    """Measures that count: not what the file leaves out, nor a slope at the load of under 5 % of the tip's."""
    truth = shaft["truth"]
    small = abs(truth["slope_load_per_F_load"]) < 0.05 * abs(truth["slope_tip_per_F_load"])
    left_out = [*shaft.get("ignore_measures", ()), *["slope_load_per_F_load"] * small]
    return [key for key in MEASURES if key not in left_out]
