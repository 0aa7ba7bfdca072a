"""Movements by the engineer's names, and the largest along a shaft."""

import numpy as np
import pytest

import fe_shaft as fs
from tests.models import bar


def gear_on_a_bar(*cases):
    """A gear whose mate stands at 3 o'clock, pushed to 6 o'clock: the way its pitch point goes when it turns clockwise
    from the left."""
    parts = [
        bar(),
        fs.Pin("first", at="20 mm", holds=["radial", "axial", "spin"]),
        fs.Pin("second", at="180 mm", holds=["radial"]),
        fs.Gear("gear", at="100 mm", teeth=20, normal_module="3 mm", facewidth="20 mm", mate="3 o'clock"),
        fs.Force("push", at="100 mm", up="-1 kN"),
    ]
    return fs.solve(fs.Model("bar", parts, cases))["gear"]


def test_tangential_follows_the_turning():
    flow = {"enters": "gear", "torque": "1 N mm", "speed": "100 rpm"}
    gear = gear_on_a_bar(
        fs.Case("with", **flow, turns="clockwise from left"), fs.Case("against", **flow, turns="clockwise from right")
    )
    np.testing.assert_allclose(gear.tangential, [-gear.up[0], gear.up[1]])
    assert (gear.up < 0).all()


def test_tangential_is_clockwise_from_left_where_nothing_turns():
    for gear in (gear_on_a_bar(), gear_on_a_bar(fs.Case("pushed", forces=["push"]))):
        assert gear.tangential[0] == pytest.approx(-gear.up[0])
        assert gear.tangential[0] > 1e-6


@pytest.mark.parametrize("quantity", ["x", "twist", "diameter_left", "deflectoin"])
def test_an_unknown_largest_is_told(quantity):
    results = fs.solve(fs.Model("bar", [bar(), fs.Pin("pin", at="20 mm", holds=["radial", "axial", "tilt"])]))
    with pytest.raises(fs.UsageError, match=f'no largest "{quantity}"'):
        results["shaft"].largest(quantity)
