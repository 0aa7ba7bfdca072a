"""Which rigid motions are free: textbook sets, any length, and rows that lean on each other.

Random sets against exact ranks are in tests/analysis/test_free_motions.py.
"""

import numpy as np
import pytest

from fe_shaft.fem.frames import rigid_link
from fe_shaft.fem.rigid_motion import free_motions

UX, UY, UZ, RX, RY, RZ = range(6)


def held(*points):
    """Rows of supports: place and the displacements held there."""
    return np.concatenate([np.zeros((0, 6)), *(rigid_link((x, 0, 0))[list(dofs)] for x, dofs in points)])


RADIAL = (UY, UZ)


@pytest.mark.parametrize("length", [1e-3, 1.0, 100.0])
@pytest.mark.parametrize(
    ("points", "free"),
    [
        ([], 6),
        ([(0.1, RADIAL)], 4),
        ([(0.1, (*RADIAL, UX))], 3),
        ([(0.1, RADIAL), (0.9, RADIAL)], 2),
        ([(0.1, (*RADIAL, UX)), (0.9, RADIAL)], 1),
        ([(0.1, (*RADIAL, UX, RX)), (0.9, RADIAL)], 0),
        ([(0.1, (*RADIAL, UX)), (0.1, RADIAL)], 3),
        ([(0.5, (*RADIAL, RY, RZ, UX))], 1),
        ([(0.5, range(6))], 0),
        ([(0.5, (RY, RZ))], 4),
        ([(0.1, (UY,)), (0.9, (UY,)), (0.4, (UZ,)), (0.4, (UX,))], 2),
    ],
)
def test_textbook_sets(points, free, length):
    rows = held(*[(x * length, dofs) for x, dofs in points])
    found = free_motions(rows, length)
    assert found.shape == (free, 6)
    np.testing.assert_allclose(rows @ found.T, 0, atol=1e-12)
    weighed = found * np.array([1, 1, 1, length, length, length])
    np.testing.assert_allclose(weighed @ weighed.T, np.eye(free), atol=1e-12)


def test_the_usual_drive_can_only_spin():
    found = free_motions(held((0.1, (*RADIAL, UX)), (0.9, RADIAL)), 1.0)
    np.testing.assert_allclose(np.abs(found), [[0, 0, 0, 1, 0, 0]], atol=1e-15)


def test_a_swing_stands_still_at_its_support():
    (swing, other) = free_motions(held((0.3, (*RADIAL, UX, RX))), 1.0)
    for motion in (swing, other):
        np.testing.assert_allclose(rigid_link((0.3, 0, 0)) @ motion * [1, 1, 1, 1, 0, 0], 0, atol=1e-15)
        assert np.abs(motion[[RY, RZ]]).max() > 0.1


@pytest.mark.parametrize("apart", [2e-3, 2e-4])
def test_supports_close_together_on_a_long_shaft_hold(apart):
    rows = held((5.0, (*RADIAL, UX)), (5.0 + apart, RADIAL))
    assert len(free_motions(rows, 10.0)) == 1


def test_supports_apart_by_rounding_do_not_hold():
    rows = held((5.0, (*RADIAL, UX)), (5.0 * (1 + 1e-15), RADIAL))
    assert len(free_motions(rows, 10.0)) == 3


def test_a_combination_of_all_six_counts_once():
    rng = np.random.default_rng(5)
    rows = rng.normal(size=(3, 6))
    assert len(free_motions(np.concatenate([rows, rows[:1] + rows[1:2], 2 * rows[2:]]), 0.5)) == 3


def test_the_quick_answer_for_the_usual_drive_agrees_with_the_long_way():
    """A row for spin makes the program take the long way; without that row spin is free as well."""
    rng = np.random.default_rng(6)
    for _ in range(200):
        length = float(rng.uniform(0.05, 10))
        points = [(float(rng.uniform(0, length)), RADIAL) for _ in range(int(rng.integers(1, 4)))]
        rows = held(*points, (0.0, (UX,)))
        spun = np.concatenate([rows, np.eye(6)[[RX]]])
        assert len(free_motions(rows, length)) == len(free_motions(spun, length)) + 1
