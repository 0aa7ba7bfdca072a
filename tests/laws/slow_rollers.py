"""Roller bearings in three dimensions, contact by contact: places, normals and cross products; no sums rearranged."""

from __future__ import annotations

from typing import Any, NamedTuple

import numpy as np

from fe_shaft.rolling.roller_geometry import RollerGeometry

Array = np.ndarray[Any, Any]


class Slow(NamedTuple):
    """Energy (m,), load on the inner ring (m, 6), depths and loads of all laminae (m, z, n)."""

    energy: Array
    force: Array
    depth: Array
    load: Array


def slow(geometry: RollerGeometry, i: int, u: Array) -> Slow:
    """The i-th bearing at states u (m, 6)."""
    n, pitch_radius = int(geometry.laminae[i]), geometry.pitch_diameter[i] / 2
    x, drop = geometry.places[i, :n], geometry.profile[i, :n]
    # ISO/TS 16281 (from memory), in N and mm.
    constant = 35948 * (1e3 * geometry.length[i]) ** (8 / 9) / n
    energy, force, depths, loads = np.zeros(len(u)), np.zeros((len(u), 6)), [], []
    for angle, offset in _rows(geometry, i):
        for j in range(int(geometry.number[i])):
            phi = geometry.first[i] + 2 * np.pi * j / geometry.number[i]
            outwards = np.array([0, np.cos(phi), np.sin(phi)])
            axis = np.cos(angle) * np.array([1, 0, 0]) - np.sin(angle) * outwards
            normal = np.sin(angle) * np.array([1, 0, 0]) + np.cos(angle) * outwards
            middle = np.array([offset, 0, 0]) + pitch_radius * outwards
            at = middle + np.outer(np.zeros(n) if geometry.free_tilt[i] else x, axis)
            moved = u[:, None, :3] + np.cross(u[:, None, 3:], at)
            depth = moved @ normal - np.cos(angle) * geometry.clearance[i] / 2 - 2 * drop
            load = constant * np.maximum(1e3 * depth, 0) ** (10 / 9)
            energy += (9 / 19 * load * np.maximum(depth, 0)).sum(axis=1)
            force[:, :3] += load.sum(axis=1)[:, None] * normal
            force[:, 3:] += load @ np.cross(at, normal)
            depths.append(depth)
            loads.append(load)
    return Slow(energy, force, np.stack(depths, axis=1), np.stack(loads, axis=1))


def _rows(geometry: RollerGeometry, i: int) -> list[tuple[float, float]]:
    """Contact angle and axial offset of each row."""
    angle = float(geometry.side[i] * geometry.contact_angle[i])
    if not geometry.both_sides[i]:
        return [(angle, 0.0)]
    offset = float(geometry.pitch_diameter[i] / 2 * np.tan(angle)) if geometry.free_tilt[i] else 0.0
    return [(angle, offset), (-angle, -offset)]
