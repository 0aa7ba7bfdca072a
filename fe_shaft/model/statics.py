"""Statics of each shaft before any solution: the resultant of all that acts on it, its own weight included."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.model.actions import case_names, gravity_in_shaft, shaft_mass

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]


@dataclass(frozen=True)
class Statics:
    """What acts on one shaft.

    Attributes
    ----------
    resultant : (6, n_cases) [N, N m]
        Force and moment about the shaft's left end.
    size : (n_cases,) [N]
        Sum of the sizes of all forces and of all couples over the shaft's length: the measure for rounding.
    arm : [m]
        The longest lever: the shaft's length or the farthest point where a force attacks.
    turning : (n_cases,) [N m]
        Sum of the sizes of all torques about the axis, a force at a lever counted as if it attacked across it: a mass
        at 6 o'clock pulls at 1e-16 of its lever, which is rounding and no torque.
    """

    resultant: Array
    size: Array
    arm: float
    turning: Array


def statics(model: Model) -> dict[str, Statics]:
    """Add up the actions and the weight of every shaft."""
    return {shaft.name: _of(model, shaft.name) for shaft in model.shafts}


def _of(model: Model, shaft: str) -> Statics:
    n_cases = len(case_names(model))
    length = float(model.segment_arrays[shaft].length.sum())
    resultant, size, turning, arm = np.zeros((6, n_cases)), np.zeros(n_cases), np.zeros(n_cases), length
    for action in model.actions:
        if action.shaft == shaft:
            resultant += _about_left_end(action.wrench.T, action.x)
            size += np.abs(action.force).sum(axis=1) + np.abs(action.couple).sum(axis=1) / length
            lever = float(np.hypot(action.arm[1], action.arm[2]))
            turning += np.abs(action.couple[:, 0]) + lever * np.hypot(action.force[:, 1], action.force[:, 2])
            arm = max(arm, action.reach)
    if model.gravity_vector.any():
        mass, centre = shaft_mass(model, shaft)
        weight = mass * gravity_in_shaft(model, shaft)
        resultant += _about_left_end(np.array([*weight, 0.0, 0.0, 0.0])[:, None], centre)
        size += np.abs(weight).sum()
    return Statics(resultant, size, arm, turning)


def _about_left_end(wrench: Array, x: float) -> Array:
    moved = wrench.copy()
    moved[4] -= x * wrench[2]
    moved[5] += x * wrench[1]
    return moved
