"""Statics of a drawn shaft, from its plain data alone, and the sizes with which results are compared.

Everything to the left of a cut (loads, weights, reactions as reported) and the section force on the cut must cancel.
Wrenches are carried about the shaft's left end and weighed by the forces they are summed from.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from tests.oracle.shaft_spec import ForceSpec, SegmentSpec, ShaftSpec

Array = NDArray[np.float64]
#: What lies across the axis is one kind (12 and 3 o'clock are only where the viewer stands): ux | uy, uz | rx | ry, rz
#: and N | V | M_x | M_y, M_z. A kind that is smaller than this share of its family (shifts, turns, forces, moments), or
#: a torque smaller than this share of the torques it is the difference of, is compared with that share.
SMALL, SMALL_TORQUE = 1e-4, 1e-3
GAUSS = np.polynomial.legendre.leggauss(3)  # areas of cones are quadratic, their moments cubic: exact


@dataclass(frozen=True)
class Cuts:
    """What is left over at every cut: forces (n_cases, n, 6) on its left and right side, and their sizes (n_cases,)."""

    left: Array
    right: Array
    force_size: Array
    moment_size: Array

    @property
    def worst(self) -> float:
        """Largest imbalance, relative to the sum of all forces (moments: to that times their arms)."""
        both = np.abs(np.concatenate([self.left, self.right], axis=1)).max(axis=1)
        forces, moments = both[:, :3].max(axis=1), both[:, 3:].max(axis=1)
        return float(max((forces / self.force_size).max(), (moments / self.moment_size).max()))

    @property
    def worst_step(self) -> float:
        """Largest imbalance of a node by itself: the step of the section force against what acts there."""
        step = np.abs(self.right - self.left).max(axis=1)
        forces, moments = step[:, :3].max(axis=1), step[:, 3:].max(axis=1)
        return float(max((forces / self.force_size).max(), (moments / self.moment_size).max()))


def wrench_of(force: ForceSpec) -> Array:
    """Force and couple of a load at its place on the axis, (6,)."""
    angle = np.radians(force.angle)
    y, z = force.radius * np.cos(angle), force.radius * np.sin(angle)
    couple = [
        force.couple_axial + y * force.front - z * force.up,
        force.couple_up + z * force.axial,
        force.couple_front - y * force.axial,
    ]
    return np.array([force.axial, force.up, force.front, *couple])


def torque_size(spec: ShaftSpec) -> float:
    """Sum of the sizes of the torques that the loads are made of; rounding of any torque is a share of it."""
    return sum(abs(f.couple_axial) + f.radius * (abs(f.up) + abs(f.front)) for f in spec.forces)


def torsional_flexibility(spec: ShaftSpec) -> float:
    """Twist of the whole shaft under a torque of 1 N m, every segment as soft as at its softer end [rad/(N m)]."""
    shear_modulus = spec.youngs_modulus / (2 * (1 + spec.poisson_ratio))
    total = 0.0
    for s in spec.segments:
        ends = [s.diameter**4 - s.bore**4]
        outer, bore = (s.end_diameter or s.diameter), (s.bore if s.end_bore is None else s.end_bore)
        ends.append(outer**4 - bore**4)
        total += s.length / (shear_modulus * np.pi / 32 * min(ends))
    return total


def about_left_end(wrench: Array, x: Array | float) -> Array:
    """A wrench (..., 6) that acts at x on the axis, seen from the left end."""
    moved = np.array(wrench, dtype=float)
    moved[..., 4] -= x * moved[..., 2]
    moved[..., 5] += x * moved[..., 1]
    return moved


def cuts(
    spec: ShaftSpec, x: Array, force_left: Array, force_right: Array, reactions: list[tuple[float, Array]]
) -> Cuts:
    """Weigh a result.

    Parameters
    ----------
    x : (n,) stations [m]
    force_left, force_right : (n_cases, n, 6) section forces beside each station
    reactions : place of the node, and wrench (n_cases, 6) at the left end's point of view, of each support
    """
    n_cases = len(spec.cases)
    at = np.zeros((n_cases, len(x), 6))
    between = np.zeros((n_cases, len(x) - 1, 6))
    size, couples = np.zeros(n_cases), np.zeros(n_cases)
    for force in spec.forces:
        factor = np.array([case.factors.get(force.name, 0.0) for case in spec.cases])
        wrench = factor[:, None] * wrench_of(force)
        size += np.abs(wrench[:, :3]).sum(axis=1)
        couples += np.abs(wrench[:, 3:]).sum(axis=1) + np.abs(factor) * (
            force.radius * np.abs(wrench_of(force)[:3]).sum()
        )
        _put(force, wrench, x, at, between)
    for place, wrench in reactions:
        at[:, station(x, place)] += wrench
        size += np.abs(wrench[:, :3]).sum(axis=1)
    weight = _weights(spec, x)
    between += weight
    size += np.abs(weight[:, :3]).sum()
    to_the_left = np.concatenate([np.zeros((n_cases, 1, 6)), np.cumsum(at[:, :-1] + between, axis=1)], axis=1)
    left = to_the_left + about_left_end(force_left, x)
    right = to_the_left + at + about_left_end(force_right, x)
    left[:, 0], right[:, -1] = 0.0, 0.0
    end = (to_the_left + at)[:, -1]
    right[:, -1] = end  # overall: nothing is left over beyond the right end
    return Cuts(left, right, size, size * x[-1] + couples)


def station(x: Array, place: float) -> int:
    """Number of the station at a place."""
    k = int(np.abs(x - place).argmin())
    assert abs(x[k] - place) <= 1e-12 * x[-1], "the line has no station there"
    return k


def _put(force: ForceSpec, wrench: Array, x: Array, at: Array, between: Array) -> None:
    if not force.spread:
        at[:, station(x, force.x)] += about_left_end(wrench, force.x)
        return
    first, last = (station(x, force.x + side * force.spread / 2) for side in (-1, 1))
    share = np.diff(x)[first:last] / force.spread
    middle = (x[first:last] + x[first + 1 : last + 1]) / 2
    between[:, first:last] += about_left_end(wrench[:, None] * share[:, None], middle)


def _weights(spec: ShaftSpec, x: Array) -> Array:
    """Weight of the shaft between neighbouring stations about the left end, (n - 1, 6)."""
    ends = np.concatenate([[0.0], np.cumsum([segment.length for segment in spec.segments])])
    middle = (x[:-1] + x[1:]) / 2
    number = np.clip(np.searchsorted(ends, middle) - 1, 0, len(spec.segments) - 1)
    out = np.zeros((len(x) - 1, 6))
    for k, segment in enumerate(number):
        for node, part in zip((GAUSS[0] + 1) / 2, GAUSS[1] / 2, strict=True):
            place = x[k] + node * (x[k + 1] - x[k])
            mass = part * (x[k + 1] - x[k]) * spec.density * _area(spec.segments[segment], place - ends[segment])
            out[k] += about_left_end(np.array([*(mass * np.array(spec.gravity)), 0.0, 0.0, 0.0]), place)
    return out


def _area(segment: SegmentSpec, at: float) -> float:
    share = at / segment.length
    outer, bore = segment.diameter, segment.bore
    if segment.end_diameter is not None:
        outer += share * (segment.end_diameter - outer)
    if segment.end_bore is not None:
        bore += share * (segment.end_bore - bore)
    return np.pi / 4 * (outer**2 - bore**2)


def scales(spec: ShaftSpec, u: Array, *forces: Array) -> tuple[Array, Array]:
    """Largest displacement of each kind and largest section force of each kind, (n_cases, 1, 6)."""
    size_u, size_f = (np.abs(values).max(axis=1, keepdims=True) for values in (u, np.concatenate(forces, axis=1)))
    torque = SMALL_TORQUE * torque_size(spec)
    size_f[..., 3] = np.maximum(size_f[..., 3], torque)
    size_u[..., 3] = np.maximum(size_u[..., 3], torque * torsional_flexibility(spec))
    for size in (size_u, size_f):
        for family in (size[..., :3], size[..., 3:]):
            family[..., 1:] = family[..., 1:].max(axis=-1, keepdims=True)
            np.maximum(family, SMALL * family.max(axis=-1, keepdims=True), out=family)
    return size_u, size_f


def common_stations(x: Array, fine: Array) -> tuple[NDArray[np.intp], NDArray[np.intp]]:
    """Numbers of the stations that both lines have."""
    near = np.clip(np.searchsorted(fine, x), 1, len(fine) - 1)
    near -= x - fine[near - 1] < fine[near] - x
    both = np.abs(fine[near] - x) <= 1e-12 * x[-1]
    assert both.sum() >= 3
    return np.flatnonzero(both), near[both]
