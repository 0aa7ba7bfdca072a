"""The contract of force laws, kept by ball bearings: derivatives, frames, batches, and the free state."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest

from fe_shaft.laws.ball import BallLaw
from fe_shaft.laws.rows import BACK_TO_BACK, Rows
from fe_shaft.rolling.ball_geometry import BallGeometry
from tests.laws import contract
from tests.laws.balls import ARM, random_balls, random_states

GEOMETRY = random_balls(np.random.default_rng(20), 5000)
LAW = BallLaw.of(GEOMETRY)
U = random_states(np.random.default_rng(21), GEOMETRY)


def overlaps(law: BallLaw, u: np.ndarray) -> np.ndarray:
    return np.where(law.balls[1], law.overlap(u), np.nan)


def test_derivatives_on_5000_random_states() -> None:
    step, judged = contract.steps(overlaps(LAW, U))
    assert judged.sum() > 4000  # the others are too close to touching
    assert contract.gradient_error(LAW, U, step, ARM)[judged].max() < 1e-7
    assert contract.hessian_error(LAW, U, step, ARM)[judged].max() < 1e-7


def pairs_of(geometry: BallGeometry) -> Rows[BallLaw]:
    """Back-to-back pairs, 40 mm apart, pressed together by 40 um."""
    rows, row = geometry.in_rows(BACK_TO_BACK), np.arange(2 * geometry.count)
    return Rows.of(BallLaw.of(rows), row // 2, np.where(row % 2, 0.02, -0.02), rows.side * 20e-6)


def test_derivatives_of_preloaded_rows() -> None:
    geometry, u = GEOMETRY.pick(np.arange(400)), U[:400]
    pairs = pairs_of(geometry)
    overlap = overlaps(pairs.law, pairs.row_movement(u)).reshape(400, -1)
    step, judged = contract.steps(overlap)
    assert judged.sum() > 250
    assert contract.gradient_error(pairs, u, step, ARM)[judged].max() < 1e-7
    assert contract.hessian_error(pairs, u, step, ARM)[judged].max() < 1e-7
    contract.symmetric(pairs, u)


def test_work_of_preloaded_rows() -> None:
    contract.consistent_along_a_path(pairs_of(GEOMETRY.pick(np.arange(60))), U[:60], 1e-5)


def test_rows_as_a_batch() -> None:
    few = GEOMETRY.pick(np.arange(20))
    contract.one_by_one(pairs_of(few), lambda i: pairs_of(few.pick([i])), U[:20])


def test_symmetry_and_path() -> None:
    contract.symmetric(LAW, U)
    few = GEOMETRY.pick(np.arange(200))
    contract.consistent_along_a_path(BallLaw.of(few), U[:200], 1e-5, panels=20)


def test_turned_by_a_pitch() -> None:
    for pitches in (1, 4):
        contract.covariant(LAW, LAW, U, contract.turning(2 * np.pi * pitches / GEOMETRY.number), 1e-10)


def test_turned_by_any_angle_with_its_cage() -> None:
    angle = np.random.default_rng(24).uniform(0, 7, GEOMETRY.count)
    turned = BallLaw.of(replace(GEOMETRY, first=GEOMETRY.first + angle))
    contract.covariant(LAW, turned, U, contract.turning(angle), 1e-10)


def test_left_and_right_exchanged() -> None:
    mirrored = BallLaw.of(replace(GEOMETRY, side=-GEOMETRY.side))
    contract.covariant(LAW, mirrored, U, contract.MIRROR, 1e-12)


def test_finite_everywhere() -> None:
    rng = np.random.default_rng(25)
    onto_centre = np.zeros_like(U)  # the groove centres of the first ball coincide
    onto_centre[:, 0] = -GEOMETRY.side * GEOMETRY.centre_distance * np.sin(GEOMETRY.contact_angle)
    onto_centre[:, 1] = GEOMETRY.clearance / 2 - GEOMETRY.centre_distance * np.cos(GEOMETRY.contact_angle)
    huge = [size * rng.normal(size=U.shape) for size in (1e-3, 1.0, 1e6)]
    contract.finite(LAW, [np.zeros_like(U), onto_centre, *huge])
    for u in (np.zeros_like(U), onto_centre, *huge):
        LAW.elements(u)


def test_nothing_where_nothing_touches() -> None:
    free = random_balls(np.random.default_rng(26), 200, clearance=20e-6)
    free = free.pick(np.flatnonzero(free.contact_angle < 1.5))
    contract.free(BallLaw.of(free), np.zeros((free.count, 6)))
    told = BallLaw.of(free).elements(np.zeros((free.count, 6)))
    assert not any(np.any(each) for each in told)


def test_batch_is_one_by_one() -> None:
    few = 60
    contract.one_by_one(BallLaw.of(GEOMETRY.pick(np.arange(few))), lambda i: BallLaw.of(GEOMETRY.pick([i])), U[:few])


def test_leading_axes() -> None:
    geometry = random_balls(np.random.default_rng(27), 7)
    law, u = BallLaw.of(geometry), np.random.default_rng(28).normal(size=(3, 2, 7, 6)) * 1e-5
    whole, told = law.respond(u), law.elements(u)
    assert told.load.shape == (3, 2, 7, law.balls[0].shape[1])
    for i in range(3):
        for j in range(2):
            for got, want in zip(law.respond(u[i, j]), whole, strict=True):
                np.testing.assert_allclose(want[i, j], got, rtol=1e-13, atol=1e-12 * np.abs(got).max())


def test_a_wrong_tangent_is_seen() -> None:
    """A diagonal that is off by 1e-5 fails the comparison."""
    step, judged = contract.steps(overlaps(LAW, U))

    class Off:
        def respond(self, u: np.ndarray) -> object:
            told = LAW.respond(u)
            return told._replace(tangent=told.tangent * (1 + 1e-5 * np.eye(6)))

    assert contract.hessian_error(Off(), U, step, ARM)[judged].min() > 1e-6


@pytest.mark.parametrize("name", ["energy", "force", "tangent"])
def test_shapes(name: str) -> None:
    shape = {"energy": (), "force": (6,), "tangent": (6, 6)}[name]
    assert getattr(LAW.respond(U), name).shape == (5000, *shape)
