"""Loads on a free overhang gather from its right end: the same result, and exact digits near the end."""

from dataclasses import replace

import numpy as np
import pytest

from fe_shaft.fem.spread import end_loads, gather_mass, gather_uniform
from tests.fem.chains import RHO, chain
from tests.fem.test_span import cantilever

CONES = {"right": [0.03, 0.055, 0.024, 0.08], "bores": [0, 0.01, 0.01, 0.02]}
LOADS = [(gather_uniform, [3e3, -2e3, 5e3, 40, 25, -30]), (gather_mass, [9.81, -5.0, 2.0, 0, 0, 0])]


@pytest.fixture(params=[{}, CONES], ids=["cylinders", "cones"])
def pieces(request):
    return chain([0.1, 0.02, 0.2, 0.05], [0.03, 0.06, 0.02, 0.08], **request.param)


@pytest.mark.parametrize(("load", "density"), LOADS)
def test_gathered_from_the_right_it_is_the_same_cantilever(pieces, load, density):
    tip = [1e3, -200, 300, 20, 10, -5]
    found, end = cantilever(pieces, load, density, tip=tip)
    hung, hung_end = cantilever(replace(pieces, hanging=(0,)), load, density, tip=tip)
    np.testing.assert_allclose(hung_end, end, rtol=1e-12)
    np.testing.assert_allclose(hung.u_right, found.u_right, rtol=1e-10, atol=1e-18)
    np.testing.assert_allclose(hung.force_left, found.force_left, rtol=1e-12, atol=1e-9)


@pytest.mark.parametrize(("load", "density"), LOADS)
def test_nothing_is_left_at_the_free_end(pieces, load, density):
    hung, _ = cantilever(replace(pieces, hanging=(0,)), load, density)
    np.testing.assert_array_equal(hung.force_right[:, 0, -1], 0.0)


@pytest.mark.parametrize(("load", "density"), LOADS)
def test_the_whole_load_goes_to_the_left_node(pieces, load, density):
    """Both ways hand over the same resultant: at the left node as it is, at the right node with the other lever."""
    hung, length = replace(pieces, hanging=(0,)), pieces.length.sum()
    at_left, at_right = (ends[0] @ np.array(density) for ends in end_loads(load(pieces), pieces))
    hung_left, hung_right = (ends[0] @ np.array(density) for ends in end_loads(load(hung), hung))
    np.testing.assert_array_equal(at_left, 0.0)
    np.testing.assert_array_equal(hung_right, 0.0)
    moved = at_right.copy()
    moved[4] -= length * at_right[2]
    moved[5] += length * at_right[1]
    np.testing.assert_allclose(hung_left, moved, rtol=1e-12)


def test_the_own_weight_is_the_mass():
    pieces = replace(chain([0.3], [0.05]), hanging=(0,))
    assert gather_mass(pieces).mu_left[0] == pytest.approx(-RHO * np.pi / 4 * 0.05**2 * 0.3, rel=1e-14)
