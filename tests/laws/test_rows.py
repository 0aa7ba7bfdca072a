"""Rows of bearings: where a pair's moments come from, what preload does, and derived figures of pairs.

The lift-off loads are derived figures, computed once by another program with the same model: they guard, they prove
nothing. That a pair of constant contact angle lifts off at 2^1.5 = 2.83 times its preload is common practice.
"""

from __future__ import annotations

import numpy as np
import pytest

from fe_shaft.errors import SolutionError
from fe_shaft.laws.ball import BallLaw
from fe_shaft.laws.preload import preset_for
from fe_shaft.laws.rows import BACK_TO_BACK, FACE_TO_FACE, TANDEM, Rows
from fe_shaft.rolling.ball_geometry import BallGeometry

APART = 0.03


def angular(degrees: float = 40.0) -> BallGeometry:
    return BallGeometry.of(
        16, 0.022225, 0.12526, inner_conformity=0.5232, outer_conformity=0.5232, contact_angle=np.deg2rad(degrees),
        youngs=206.843e9,
    )  # fmt: skip


def pair(sides: tuple[float, float], preload: float = 0.0, degrees: float = 40.0) -> Rows[BallLaw]:
    rows = angular(degrees).in_rows(sides)
    law = BallLaw.of(rows)
    return Rows.of(law, [0, 0], [-APART / 2, APART / 2], preset_for(law, rows.side, [preload, preload]))


def push(**movement: float) -> np.ndarray:
    u = np.zeros((1, 6))
    for name, value in movement.items():
        u[0, ("ux", "uy", "uz", "rx", "ry", "rz").index(name)] = value
    return u


def test_a_lone_row_in_its_place_is_the_law_itself() -> None:
    law, u = BallLaw.of(angular()), push(ux=2e-5, uy=1e-5, ry=1e-4)
    for got, want in zip(Rows.of(law, [0], 0.0).respond(u), law.respond(u), strict=True):
        np.testing.assert_array_equal(got, want)


def test_a_row_elsewhere_on_a_rigid_ring() -> None:
    """Moved by the offset, the bearing is the same one seen from another point: loads are statically equal."""
    law, s = BallLaw.of(angular()), 0.05
    moved = Rows.of(law, [0], s)
    u = push(ux=2e-5, uy=1e-5, uz=-4e-6, ry=1e-4, rz=-2e-4)
    at_row = u + push(uy=s * u[0, 5], uz=-s * u[0, 4])
    f, g = law.respond(at_row).force[0], moved.respond(u).force[0]
    np.testing.assert_allclose(g[:3], f[:3], rtol=1e-14)
    np.testing.assert_allclose(g[3:], f[3:] + np.cross([s, 0, 0], f[:3]), rtol=1e-12, atol=1e-12)


def test_back_to_back_is_stiff_against_tilting_and_face_to_face_is_not() -> None:
    back, front = (pair(sides, 1000.0).respond(push()).tangent[0] for sides in (BACK_TO_BACK, FACE_TO_FACE))
    assert back[0, 0] == pytest.approx(front[0, 0], rel=1e-12)
    assert back[1, 1] == pytest.approx(front[1, 1], rel=1e-12)
    # Lines of contact meet the axis dm/2 tan(angle) beyond the rows, or as far before them.
    reach = 0.12526 / 2 * np.tan(np.deg2rad(40))
    wide, narrow = APART / 2 + reach, APART / 2 - reach
    assert back[4, 4] / front[4, 4] == pytest.approx((wide / narrow) ** 2, rel=0.1)
    assert back[4, 4] > 3 * front[4, 4]


def test_tandem_shares_an_axial_load() -> None:
    law, two = BallLaw.of(angular()), pair(TANDEM)
    u = push(ux=3e-5)
    assert two.respond(u).force[0, 0] == pytest.approx(2 * law.respond(u).force[0, 0], rel=1e-13)
    assert not two.respond(push(ux=-3e-5)).force.any()


def test_a_preloaded_pair_at_rest() -> None:
    told = pair(BACK_TO_BACK, 1000.0)
    rows = told.law.respond(told.row_movement(push()))
    np.testing.assert_allclose(rows.force[:, 0], [1000.0, -1000.0], rtol=1e-12)
    np.testing.assert_allclose(told.respond(push()).force, 0, atol=1e-9)


@pytest.mark.parametrize(
    ("degrees", "preload", "preset_mm", "lift_off", "stiffness"),
    [(15.0, 211.0, 0.0085413652, 627.43974, 76618.598), (40.0, 1000.0, 0.0054428021, 2851.9323, 554246.71)],
)
def test_lift_off(degrees: float, preload: float, preset_mm: float, lift_off: float, stiffness: float) -> None:
    two = pair(BACK_TO_BACK, preload, degrees)
    np.testing.assert_allclose(two.preset, [preset_mm * 1e-3, -preset_mm * 1e-3], rtol=1e-8)
    assert two.respond(push()).tangent[0, 0, 0] == pytest.approx(stiffness * 1e3, rel=1e-8)
    told = two.respond(push(ux=preset_mm * 1e-3))  # the right row is just free, the left one bears all
    assert told.force[0, 0] == pytest.approx(lift_off, rel=1e-7)
    assert lift_off / preload == pytest.approx(2**1.5, rel=0.06)
    assert lift_off / preload > 2**1.5


def test_presets_of_many_rows() -> None:
    rng = np.random.default_rng(5)
    geometry = BallGeometry.of(
        rng.integers(7, 20, 300), 0.0127, 0.065, contact_angle=rng.choice([0.0, 0.26, 0.7, np.pi / 2], 300),
        side=rng.choice([-1.0, 1.0], 300), clearance=0.0,
    )  # fmt: skip
    law, wanted = BallLaw.of(geometry), 10 ** rng.uniform(-1, 4, 300)
    u = np.zeros((300, 6))
    u[:, 0] = preset_for(law, geometry.side, wanted)
    np.testing.assert_allclose(law.respond(u).force[:, 0], geometry.side * wanted, rtol=1e-10)
    assert not preset_for(law, geometry.side, np.zeros(300)).any()


def test_a_preload_that_nothing_bears_is_refused() -> None:
    with pytest.raises(SolutionError, match=r"1e\+40 N is more than a row can bear"):
        preset_for(BallLaw.of(angular()), 1.0, [1e40])


def test_three_rows_and_two_bearings_of_unequal_rows() -> None:
    rows = BallLaw.of(angular().pick([0, 0, 0, 0, 0]))
    mixed = Rows.of(rows, [0, 0, 0, 1, 1], [-0.03, 0.0, 0.03, -0.01, 0.01], 1e-5)
    u = np.vstack([push(uy=1e-5, rz=1e-4), push(uz=2e-5)])
    first = Rows.of(BallLaw.of(angular().pick([0, 0, 0])), [0, 0, 0], [-0.03, 0.0, 0.03], 1e-5)
    second = Rows.of(BallLaw.of(angular().pick([0, 0])), [0, 0], [-0.01, 0.01], 1e-5)
    for i, alone in enumerate((first, second)):
        for got, want in zip(mixed.respond(u), alone.respond(u[i : i + 1]), strict=True):
            np.testing.assert_allclose(got[i], want[0], rtol=1e-13)
    assert mixed.elements(u).load.shape == (5, 16)
