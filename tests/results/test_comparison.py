"""Two results side by side: rows, ratios and shares as numbers."""

import numpy as np
import pytest

import fe_shaft as fs
from tests.models import bar

GIVE = {"radial": "100 N/um"}


def thrusts(*axial):
    """A bar on two bearings under thrusts at several places."""
    supports = [
        fs.Bearing("first", at="20 mm", holds=["radial", "axial"], stiffness=GIVE | {"axial": "10 N/um"}),
        fs.Bearing("second", at="180 mm", holds=["radial"], stiffness=GIVE),
    ]
    forces = [fs.Force(f"f{k}", at=f"{60 + 30 * k} mm", up="1 kN", axial=value) for k, value in enumerate(axial)]
    return fs.compare(fs.Model("bar", [bar(), *supports, *forces]))


def test_ratio_and_share_are_those_of_both_results():
    row = thrusts("1 kN").row("first.axial")
    assert row.right[0] == pytest.approx(1e-4)  # 1 kN on 10 N/um
    assert np.isnan(row.ratio[0])
    assert row.share[0] == 1.0
    row = thrusts("1 kN").row("f0.deflection")
    assert row.ratio[0] == pytest.approx(row.right[0] / row.left[0])
    assert row.share[0] == pytest.approx(row.difference[0] / row.right[0])


def test_rounding_has_neither_ratio_nor_share():
    """0.1 + 0.2 - 0.3 is 5.6e-17: thrusts that cancel leave rounding at the support, and rounding is no movement."""
    comparison = thrusts("0.1 kN", "0.2 kN", "-0.3 kN")
    for name in ("first.axial", "first.axial_force"):
        row = comparison.row(name)
        assert 0 < np.abs(row.right[0]) < 1e-12
        assert np.isnan(row.ratio[0])
        assert row.share[0] == 0.0


def test_a_row_that_is_not_there_is_told_with_the_nearest():
    with pytest.raises(fs.UsageError, match=r'no row "frst.axial". Nearest: first.axial'):
        thrusts("1 kN").row("frst.axial")
