"""What every force law must keep, as functions of a law and states u (..., b, 6).

Derivatives are compared with central differences of sixth order. Near a contact that just touches, a law is smooth only
to the order of its own exponent, so each state gets a step that is small against its smallest gap or overlap, and
states with contacts closer to touching than the differences can resolve are left out (`steps`).
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from typing import Any

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

DOFS = (0, 1, 2, 4, 5)
NEAR, WEIGHTS = np.array([1.0, 2.0, 3.0]), np.array([45.0, -9.0, 1.0]) / 60
TINY = np.finfo(float).tiny
LEAST_GAP = 1e-4  # of a state's largest overlap or gap
FRACTION = 0.01  # of the smallest one moved by the differences, at most three times that


def steps(overlap: Array) -> tuple[Array, NDArray[np.bool_]]:
    """Step [m] of each state (..., b), and which states to judge, from overlaps (..., b, z); absent contacts NaN."""
    size = np.abs(overlap)
    least, most = np.nanmin(size, axis=-1), np.nanmax(size, axis=-1)
    return FRACTION * least, (least > LEAST_GAP * most) & np.any(np.nan_to_num(overlap) > 0, axis=-1)


def derivative(value: Callable[[Array], Array], u: Array, step: Array, arm: float) -> Array:
    """Derivatives of value(u) (..., b, ...) by the five displacements, last axis; rotations step by step / arm."""
    out = []
    for dof in DOFS:
        h = step if dof < 3 else step / arm
        total: Any = 0.0
        for n, w in zip(NEAR, WEIGHTS, strict=True):
            moved = np.zeros_like(u)
            moved[..., dof] = n * h
            total = total + w * (value(u + moved) - value(u - moved))
        out.append(total / h.reshape(h.shape + (1,) * (np.ndim(total) - h.ndim)))
    return np.stack(out, axis=-1)


def sizes(arm: float) -> Array:
    """Weights that turn the five components of a load into forces."""
    return np.array([1.0, 1.0, 1.0, 1 / arm, 1 / arm])


def gradient_error(law: Any, u: Array, step: Array, arm: float) -> Array:
    """Largest difference between force and gradient of the energy, relative to the state's largest force; (..., b)."""
    force = law.respond(u).force[..., DOFS] * sizes(arm)
    got = derivative(lambda x: law.respond(x).energy, u, step, arm) * sizes(arm)
    return np.asarray(np.abs(got - force).max(axis=-1) / np.maximum(np.abs(force).max(axis=-1), TINY))


def hessian_error(law: Any, u: Array, step: Array, arm: float) -> Array:
    """Largest difference between tangent and derivatives of the force, relative to the largest entry; (..., b)."""
    w = sizes(arm)
    tangent = law.respond(u).tangent[..., DOFS, :][..., DOFS] * w[:, None] * w
    got = derivative(lambda x: law.respond(x).force[..., DOFS], u, step, arm) * w[:, None] * w
    return np.asarray(np.abs(got - tangent).max(axis=(-2, -1)) / np.maximum(np.abs(tangent).max(axis=(-2, -1)), TINY))


def symmetric(law: Any, u: Array) -> None:
    """The tangent is symmetric to the last bit or two, and rx carries nothing."""
    told = law.respond(u)
    scale = np.abs(told.tangent).max(axis=(-2, -1), keepdims=True)
    assert np.all(np.abs(told.tangent - told.tangent.swapaxes(-1, -2)) <= 1e-15 * scale)
    assert not told.force[..., 3].any()
    assert not told.tangent[..., 3].any()
    assert not told.tangent[..., 3, :].any()


def turning(angle: Array) -> Array:
    """Matrices (..., 6, 6) that turn displacements or loads about x, from y towards z."""
    c, s = np.cos(angle), np.sin(angle)
    out = np.zeros((*np.shape(angle), 6, 6))
    for at in (0, 3):
        out[..., at, at] = 1.0
        out[..., at + 1, at + 1], out[..., at + 1, at + 2] = c, -s
        out[..., at + 2, at + 1], out[..., at + 2, at + 2] = s, c
    return out


#: Left becomes right: a reflection turns the sense of rotations about the axes in its plane.
MIRROR = np.diag([-1.0, 1.0, 1.0, 1.0, -1.0, -1.0])


def covariant(law: Any, other: Any, u: Array, way: Array, within: float) -> None:
    """The other law sees the moved state with moved answers: V(T u) = V(u), f(T u) = T f(u), K(T u) = T K(u) T^T."""
    here, there = law.respond(u), other.respond((way @ u[..., None])[..., 0])
    force = (way @ here.force[..., None])[..., 0]
    tangent = way @ here.tangent @ np.swapaxes(way, -1, -2)
    for got, want in ((there.energy, here.energy), (there.force, force), (there.tangent, tangent)):
        axes = tuple(range(here.energy.ndim, want.ndim))
        assert np.all(np.abs(got - want) <= within * np.abs(want).max(axis=axes, keepdims=True) + 1e-300)


def consistent_along_a_path(law: Any, u: Array, within: float, panels: int = 60) -> None:
    """The energy gained from u = 0 is the work of the force along the straight way (Gauss, 8 points a panel)."""
    x, w = np.polynomial.legendre.leggauss(8)
    at = ((np.arange(panels)[:, None] + (x + 1) / 2) / panels).ravel()
    weight = np.tile(w / 2, panels) / panels
    force = law.respond(at.reshape(-1, *(1,) * u.ndim) * u).force
    work = np.tensordot(weight, np.sum(force * u, axis=-1), axes=1)
    gained = law.respond(u).energy - law.respond(np.zeros_like(u)).energy
    assert np.all(np.abs(work - gained) <= within * np.abs(law.respond(u).energy) + 1e-300)


def finite(law: Any, states: Sequence[Array]) -> None:
    """Finite numbers whatever the displacement (warnings are errors in these tests)."""
    for u in states:
        assert all(np.isfinite(each).all() for each in law.respond(u))


def free(law: Any, u: Array) -> None:
    """Nothing at all is answered where nothing touches."""
    assert not any(each.any() for each in law.respond(u))


def one_by_one(law: Any, alone: Callable[[int], Any], u: Array, within: float = 1e-14) -> None:
    """Bearing i of the batch answers as it does alone; u (..., b, 6). Equal but for the order of the sums."""
    whole = law.respond(u)
    for i in range(u.shape[-2]):
        told = alone(i).respond(u[..., i : i + 1, :])
        for got, want in zip(told, whole, strict=True):
            mine = want[(..., slice(i, i + 1)) + (slice(None),) * (want.ndim - whole.energy.ndim)]
            axes = tuple(range(whole.energy.ndim, want.ndim))
            assert np.all(np.abs(got - mine) <= within * np.abs(mine).max(axis=axes, keepdims=True))
