"""Cones whose bores open the same way, the other way and down to a thin wall, against the exact integral."""

import math

import numpy as np
import pytest

import fe_shaft as fs

E, LENGTH, PULL = 210e9, 0.1, 1e4


def stretch(outer, bore):
    """Pull times the integral of dx / (E A): A = pi / 4 (D - b)(D + b), both factors linear (partial fractions)."""
    wall, both = (outer[0] - bore[0], outer[1] - bore[1]), (outer[0] + bore[0], outer[1] + bore[1])
    cross = wall[1] * both[0] - both[1] * wall[0]
    integral = math.log(wall[1] * both[0] / (both[1] * wall[0])) / cross
    return PULL * LENGTH * 4 / (math.pi * E) * integral


@pytest.mark.parametrize(
    ("outer", "bore"),
    [
        ((0.050, 0.100), (0.040, 0.099)),
        ((0.050, 0.100), (0.0495, 0.020)),
        ((0.100, 0.050), (0.010, 0.049)),
        ((0.060, 0.040), (0.0005, 0.039)),
        ((0.050, 0.060), (0.040, 0.0599)),
        ((0.050, 0.055), (0.045, 0.010)),
    ],
)
def test_a_bored_cone_under_a_pull(outer, bore):
    text = [f"{1e3 * value!r} mm" for value in (*outer, *bore)]
    cone = fs.Segment(length="100 mm", diameter=text[0], end_diameter=text[1], bore=text[2], end_bore=text[3])
    steel = fs.Material("cone_steel", youngs_modulus="210 GPa", poisson_ratio=0.3)
    clamp = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
    pull = fs.Force("pull", at="100 mm", axial="10 kN")
    model = fs.Model("cone", [fs.Shaft("cone", [cone], material="cone_steel"), clamp, pull], materials=[steel])
    # the wall, a difference of diameters, is only known to 1e-16 over its own share of them
    np.testing.assert_allclose(fs.solve(model)["pull"].axial, stretch(outer, bore), rtol=1e-12)
