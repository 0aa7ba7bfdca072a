"""Energy stored in bars under spread loads, part by part.

Clapeyron: U = integral of M^2 / (2 E I), M_x^2 / (2 G J), N^2 / (2 E A) along the bar (Timoshenko, Strength of
Materials, part I, chapter on strain energy; from memory), worked out here for a constant load.
"""

import math

import numpy as np
import pytest

import fe_shaft as fs

E, G, LENGTH, DIAMETER, LOAD = 210e9, 80e9, 0.8, 0.03, 1500.0
INERTIA, AREA = math.pi / 64 * DIAMETER**4, math.pi / 4 * DIAMETER**2
CLAMP = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
PINS = (fs.Pin("first", at="0 mm", holds=["radial", "axial", "spin"]), fs.Pin("second", at="800 mm", holds=["radial"]))


def stored(supports, gravity=None, **load):
    steel = fs.Material("bar_steel", youngs_modulus="210 GPa", shear_modulus="80 GPa", density="7850 kg/m^3")
    shaft = fs.Shaft("bar", [fs.Segment(length="800 mm", diameter="30 mm")], material="bar_steel", shear="none")
    loads = [fs.Force("load", at="400 mm", spread="800 mm", **load)] if load else []
    model = fs.Model("bar", [shaft, *supports, *loads], materials=[steel], gravity=gravity)
    return fs.solve(model).proof.stored["bar"]


@pytest.mark.parametrize(
    ("supports", "load", "energy"),
    [
        ([CLAMP], {"up": "-1500 N"}, LOAD**2 * LENGTH**3 / (40 * E * INERTIA)),
        (PINS, {"front": "1500 N"}, LOAD**2 * LENGTH**3 / (240 * E * INERTIA)),
        ([CLAMP], {"axial": "1500 N"}, LOAD**2 * LENGTH / (6 * E * AREA)),
        ([CLAMP], {"couple": {"axial": "1500 N m"}}, LOAD**2 * LENGTH / (6 * G * 2 * INERTIA)),
        ([CLAMP], {"couple": {"up": "1500 N m"}}, LOAD**2 * LENGTH / (6 * E * INERTIA)),
    ],
)
def test_a_spread_load(supports, load, energy):
    np.testing.assert_allclose(stored(supports, **load), energy, rtol=1e-12)


def test_own_weight():
    weight = 7850 * AREA * LENGTH * 9.80665
    np.testing.assert_allclose(stored([CLAMP], "down"), weight**2 * LENGTH**3 / (40 * E * INERTIA), rtol=1e-12)
