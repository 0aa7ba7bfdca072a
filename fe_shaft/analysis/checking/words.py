"""Directions, forces and torques in words, as `check` says them.

Words such as up and front hold where the shaft lies level and its 12 o'clock is really up
(`fe_shaft.results.words.wording.is_level`); elsewhere the hours of the clock speak.
"""

from __future__ import annotations

import math

import numpy as np
from numpy.typing import NDArray

from fe_shaft.units import Value, show

Array = NDArray[np.float64]

#: A component below this share of a force is rounding, or too small to be read beside it.
UNSEEN = 5e-4

_WAYS = {  # axis: (towards +, towards -) in words, and by the clock
    "axial": (("to the right", "to the left"), ("to the right", "to the left")),
    "up": (("up", "down"), ("towards 12 o'clock", "towards 6 o'clock")),
    "front": (("to the front", "to the back"), ("towards 3 o'clock", "towards 9 o'clock")),
}
_SIDES = {12.0: "above", 3.0: "in front", 6.0: "below", 9.0: "behind"}


def force_in_words(force: Array, unit: str, *, level: bool) -> tuple[str, ...]:
    """A force (3,) [N] in the shaft's frame: ("1516 N up", "571 N to the front", "406 N to the right")."""
    largest = float(np.abs(force).max(initial=0.0))
    out = []
    for axis, size in (("up", force[1]), ("front", force[2]), ("axial", force[0])):
        if abs(size) > UNSEEN * largest:
            out.append(f"{show(abs(float(size)), unit)} {way(axis, float(size), level=level)}")
    return tuple(out)


def way(axis: str, size: float, *, level: bool) -> str:
    """The direction of a component: "to the left"."""
    return _WAYS[axis][0 if level else 1][0 if size >= 0 else 1]


def couple_in_words(couple: Array, unit: str) -> tuple[str, ...]:
    """A couple (3,) [N m] in the shaft's frame, said in a unit; the torque first."""
    largest = float(np.abs(couple).max(initial=0.0))
    out = []
    axes = ("turning it {}", "about 12 o'clock, {}", "about 3 o'clock, {}")
    for phrase, size in zip(axes, couple, strict=True):
        if abs(size) > UNSEEN * largest:
            out.append(f"{show(abs(float(size)), unit)} {phrase.format(turning(float(size)))}")
    return tuple(out)


def turning(torque: float) -> str:
    """The sense of a torque, seen from the left end."""
    return "clockwise" if torque >= 0 else "counterclockwise"


def side(direction: Value, *, level: bool) -> str:
    """A direction on the clock as written, with a word where there is one: "9 o'clock (behind)"."""
    hours = math.degrees(direction.si) / 30.0 % 12.0
    for hour, word in _SIDES.items():
        if level and abs((hours - hour + 6.0) % 12.0 - 6.0) < 1e-6:
            return f"{direction.text} ({word})"
    return direction.text


def plural(number: int, word: str) -> str:
    """A count with its noun: "2 bearings"."""
    if number == 1:
        return f"1 {word}"
    return f"{number} {word}{'es' if word.endswith('s') else 's'}"
