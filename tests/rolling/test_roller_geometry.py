"""Geometry of roller bearings: profiles, laminae, padding, and the sentences for what cannot be."""

from __future__ import annotations

from typing import Any

import numpy as np
import pytest

from fe_shaft.rolling.roller_geometry import RollerGeometry, lamina_places
from fe_shaft.rolling.roller_profile import Tabulated, cylindrical, logarithmic

GIVEN: dict[str, Any] = {
    "number": 14, "roller_diameter": 0.01, "length": 0.0096, "pitch_diameter": 0.065,
}  # fmt: skip


def test_reference_profile() -> None:
    """ISO/TS 16281, from memory, written out for a short and a long roller in mm."""
    x = np.array([[-4.0, 0.0, 3.0], [-19.0, 2.0, 15.0]]) / 1e3
    drop = logarithmic(x, np.array([0.010, 0.040]), np.array([0.008, 0.010]))
    short = [0.00035 * 8 * np.log(1 / (1 - (2 * at / 10) ** 2)) for at in (4, 0, 3)]
    straight = 40 - 25
    long = [0.0005 * 10 * np.log(1 / (1 - ((2 * at - straight) / 25) ** 2)) for at in (19, 15)]
    np.testing.assert_allclose(1e3 * drop[0], short, rtol=1e-12)
    np.testing.assert_allclose(1e3 * drop[1], [long[0], 0, long[1]], rtol=1e-12)


def test_table_between_and_beyond() -> None:
    table = Tabulated(np.array([-0.005, 0, 0.005]), np.array([1e-5, 0, 2e-5]))
    x = np.array([[-0.0025, 0.001]])
    np.testing.assert_allclose(table(x, np.array([0.006]), np.array([0.006])), [[5e-6, 4e-6]])
    with pytest.raises(ValueError, match=r"from -0\.005 m to 0\.005 m, but laminae lie up to 0\.006 m"):
        table(np.array([[0.006]]), np.array([0.02]), np.array([0.006]))
    with pytest.raises(ValueError, match="rising"):
        Tabulated(np.array([0.0, 0.0]), np.array([0.0, 0.0]))


def test_laminae_fill_the_roller() -> None:
    places = lamina_places(np.array([0.031, 0.033]), np.array([31, 33]))
    np.testing.assert_allclose(np.diff(places[0, :31]), 0.001)
    np.testing.assert_allclose(places[1, [0, 16, 32]], [-0.016, 0, 0.016], atol=1e-18)
    assert not places[0, 31:].any()


def test_stacked_keeps_every_bearing() -> None:
    several = [
        RollerGeometry.of(**GIVEN | {"laminae": n}, profile=p) for n, p in ((31, logarithmic), (41, cylindrical))
    ]
    stacked = RollerGeometry.stacked(several)
    np.testing.assert_array_equal(stacked.profile[0, :31], several[0].profile[0])
    assert np.isinf(stacked.profile[0, 31:]).all()
    assert not stacked.profile[1].any()
    assert stacked.laminae.tolist() == [31, 41]
    assert stacked.pick([0]).profile.shape == (1, 31)


def test_effective_centre() -> None:
    given = GIVEN | {"contact_angle": np.array([0.3, 0.3, 0.0, np.pi / 2]), "side": [1, -1, 1, -1]}
    want = [-0.0325 * np.tan(0.3), 0.0325 * np.tan(0.3), 0, np.inf]
    np.testing.assert_allclose(RollerGeometry.of(**given).effective_centre, want, atol=1e-18)
    assert RollerGeometry.of(**GIVEN | {"contact_angle": 0.2}, both_sides=True, free_tilt=True).effective_centre == 0


def test_rows_turn_their_profiles() -> None:
    table = Tabulated(np.array([-0.005, 0.005]), np.array([0, 1e-5]))
    both = RollerGeometry.stacked([RollerGeometry.of(**GIVEN | {"laminae": n}, profile=table) for n in (31, 33)])
    rows = both.in_rows((1, -1))
    assert rows.side.tolist() == [1, -1, 1, -1]
    assert rows.laminae.tolist() == [31, 31, 33, 33]
    np.testing.assert_array_equal(rows.profile[1, :31], rows.profile[0, 30::-1])
    np.testing.assert_array_equal(rows.profile[3], rows.profile[2, ::-1])
    assert np.isinf(rows.profile[:2, 31:]).all()


@pytest.mark.parametrize(
    ("change", "words"),
    [
        ({"number": 1}, "number is 1. Give at least 2"),
        ({"number": 21}, "number is 21. That many rollers overlap"),
        ({"roller_diameter": 0.0}, "roller_diameter is 0. Give a positive length"),
        ({"length": np.nan}, "length is nan. Give a positive length"),
        ({"pitch_diameter": 0.01}, "pitch_diameter is 0.01. Give more"),
        ({"contact_angle": 15.0}, "contact_angle is 15. Give 0 to pi/2 rad"),
        ({"contact_angle": np.pi / 2, "free_tilt": True}, "needs less than pi/2"),
        ({"contact_angle": np.pi / 2, "clearance": 1e-5}, "clearance is 1e-05. Thrust rollers have no radial"),
        ({"laminae": 29}, "laminae is 29. Give at least 31"),
        ({"laminae": 32}, "laminae is 32. Give an odd number"),
        ({"side": 0.0}, "side is 0. Give 1 or -1"),
        ({"youngs": 0.0}, "youngs is 0. Give a positive modulus"),
        ({"poisson": 0.7}, "poisson is 0.7. Give 0 to 0.5"),
        ({"clearance": np.inf}, "clearance is inf. Give a number"),
    ],
)
def test_what_cannot_be(change: dict[str, Any], words: str) -> None:
    with pytest.raises(ValueError, match=r"roller bearing 0: ") as error:
        RollerGeometry.of(**GIVEN | change)
    assert words in str(error.value)
