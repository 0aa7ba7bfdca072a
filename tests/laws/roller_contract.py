"""What every force law must keep, whatever it is a law of: functions that take a law and random states.

States u (m, b, 6) are inner ring less outer ring in the shaft's frame. `length` is a lever of the bearings [m], so that
rotations compare with displacements. `clear` (m, b) marks states where no contact is within `REACH` of touching.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Any, Protocol

import numpy as np

Array = np.ndarray[Any, Any]

#: Step of the differences [m] and how far from touching they need contacts to be, three steps being taken.
STEP, REACH = 1e-9, 1e-8
#: Sixth-order central differences: weights of f(x + k h) - f(x - k h), over h.
WEIGHTS = {1: 3 / 4, 2: -3 / 20, 3: 1 / 60}
TIGHT = 1e-7


class Law(Protocol):
    """Displacement in; energy, load and tangent out."""

    def respond(self, u: Array) -> Any: ...


def scales(length: float) -> Array:
    """What one of each component counts as [m or m of movement per rad]."""
    return np.array([1.0, 1.0, 1.0, length, length, length])


def slopes(function: Callable[[Array], Array], u: Array, length: float) -> Array:
    """Derivatives of a function of u by the scaled components of u, last axis, by sixth-order differences."""
    of = scales(length)

    def along(i: int) -> Array:
        step = np.zeros(6)
        step[i] = STEP / of[i]
        gaps = (w * (function(u + k * step) - function(u - k * step)) for k, w in WEIGHTS.items())
        return np.asarray(sum(gaps)) / STEP

    return np.stack([along(i) for i in range(6)], axis=-1)


def force_is_gradient(law: Law, u: Array, clear: Array, length: float) -> None:
    """The load is the slope of the energy."""
    force = law.respond(u).force / scales(length)
    gap = slopes(lambda at: law.respond(at).energy, u, length) - force
    worst = np.abs(gap).max(axis=-1) / _largest(force, 1)
    assert worst[clear].max() < TIGHT


def tangent_is_hessian(law: Law, u: Array, clear: Array, length: float) -> None:
    """The tangent is the slope of the load, and symmetric; turning about the shaft's axis costs nothing."""
    of = scales(length)
    tangent = law.respond(u).tangent / of[:, None] / of
    gap = slopes(lambda at: law.respond(at).force / of, u, length) - tangent
    worst = np.abs(gap).max(axis=(-1, -2)) / _largest(tangent, 2)
    assert worst[clear].max() < TIGHT
    symmetric(law, u, length)


def symmetric(law: Law, u: Array, length: float) -> None:
    """Tangent equal to its transpose to rounding, row and column of rx exactly 0."""
    of = scales(length)
    tangent = law.respond(u).tangent / of[:, None] / of
    assert (np.abs(tangent - tangent.swapaxes(-1, -2)).max(axis=(-1, -2)) <= 1e-13 * _largest(tangent, 2)).all()
    assert not tangent[..., 3, :].any()
    assert not law.respond(u).force[..., 3].any()


def turned(law: Law, u: Array, angle: Array, length: float) -> None:
    """Turning a state about x by `angle` (b,), whole pitches, turns the answer."""
    _same_but(law, law, u, _turns(np.asarray(angle)), length)


def mirrored(law: Law, other: Law, u: Array, length: float) -> None:
    """What `other`, the same bearing seen in a mirror left to right, answers to the mirrored state, is mirrored."""
    _same_but(law, other, u, np.diag([-1.0, 1, 1, 1, -1, -1]), length)


def work_is_energy(law: Law, u: Array, steps: int = 400) -> None:
    """The energy is the work done on the way from rest, by Gauss points in many parts of the way."""
    points, weights = np.polynomial.legendre.leggauss(4)
    share = ((np.arange(steps)[:, None] + (points + 1) / 2) / steps).ravel()
    force = law.respond(share[:, None, None, None] * u).force
    work = np.einsum("s,smbi,mbi->mb", np.tile(weights / (2 * steps), steps), force, u)
    energy = law.respond(u).energy - law.respond(np.zeros_like(u)).energy
    assert (energy >= 0).all()
    assert np.abs(work - energy).max() < 1e-6 * np.abs(energy).max()


def finite_everywhere(law: Law, u: Array, apart: Array) -> None:
    """Numbers at rest, at next to nothing and far beyond reason; nothing at all in the states `apart`."""
    for state in (np.zeros_like(u), 1e-300 * u, 1e5 * u, -1e5 * u, 1e12 * u):
        assert all(np.isfinite(part).all() for part in law.respond(state))
    assert not any(part.any() for part in law.respond(apart))


def one_by_one(law: Law, single: Callable[[int], Law], u: Array) -> None:
    """All at once, with leading axes of any number, is each bearing by itself."""
    whole = law.respond(u)
    for i in range(u.shape[1]):
        alone = single(i).respond(u[:, i : i + 1])
        for part, of in zip(whole, alone, strict=True):
            np.testing.assert_allclose(part[:, i], of[:, 0], rtol=1e-12, atol=1e-12 * np.abs(of).max(initial=0))
    half = u[: len(u) // 2 * 2].reshape(2, -1, *u.shape[1:])
    for part, of in zip(law.respond(half), whole, strict=True):
        np.testing.assert_allclose(part.reshape(-1, *of.shape[1:]), of[: len(u) // 2 * 2], rtol=1e-12, atol=1e-9)
    for part, of in zip(law.respond(u[0]), whole, strict=True):
        np.testing.assert_allclose(part, of[0], rtol=1e-12, atol=1e-9)


def _turns(angle: Array) -> Array:
    """Rotations of displacements about x (b, 6, 6)."""
    turn = np.zeros((*angle.shape, 6, 6))
    for first in (0, 3):
        turn[..., first, first] = 1
        turn[..., first + 1, first + 1] = turn[..., first + 2, first + 2] = np.cos(angle)
        turn[..., first + 2, first + 1] = np.sin(angle)
        turn[..., first + 1, first + 2] = -np.sin(angle)
    return turn


def _same_but(law: Law, other: Law, u: Array, turn: Array, length: float) -> None:
    of = scales(length)
    here, there = law.respond(u), other.respond((turn @ u[..., None])[..., 0])
    force = (turn @ here.force[..., None])[..., 0]
    tangent = turn @ here.tangent @ np.swapaxes(turn, -1, -2)
    assert np.abs(there.energy - here.energy).max() < 1e-11 * here.energy.max()
    assert np.abs((there.force - force) / of).max() < 1e-11 * np.abs(force / of).max()
    # A contact that only just touches has a stiffness that rounding alone can make or unmake.
    gap = (np.abs(there.tangent - tangent) / of[:, None] / of).max(axis=(-1, -2))
    assert np.quantile(gap / _largest(tangent / of[:, None] / of, 2), 0.99) < 1e-8


def _largest(values: Array, axes: int) -> Array:
    """Largest absolute number over the last axes, never 0."""
    return np.maximum(np.abs(values).max(axis=tuple(range(-axes, 0))), 1e-12)
