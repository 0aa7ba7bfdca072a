"""One line that can be checked by hand: moments about one of the two supports of a shaft.

Only where statics decides, that is where a shaft stands on two radial supports of which none holds tilt. What the tilt
stiffness of the bearings carries is the difference to the solved reaction, exactly:
reaction = by hand - (tilt moments of both supports) / distance.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from fe_shaft.model.actions import gravity_in_shaft, shaft_mass
from fe_shaft.results.words.wording import NOTHING, is_level
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.support import Support
    from fe_shaft.results.results import Results
    from fe_shaft.results.shown import Shown
    from fe_shaft.results.words.wording import Names

MOST_TERMS = 10  # a longer sum is no check by hand
SAME = 5e-4  # of the reaction: three digits


@dataclass(frozen=True)
class Lever:
    """A force [N] at a distance [m] from the pivot, or a moment [N m] where there is no force."""

    force: float
    arm: float
    moment: float = 0.0


@dataclass(frozen=True)
class HandCheck:
    """Moments about a support, in one plane.

    Attributes
    ----------
    pivot, at : names of the two supports
    plane : 1 towards 12 o'clock, 2 towards 3
    levers : loads in that plane
    distance : [m] from the pivot to the other support
    by_hand : [N] reaction at the other support
    solved : [N] the same from the solution
    tilt : [N] part that the tilt stiffness carries, in the same sense: solved = by_hand + tilt
    """

    shaft: str
    pivot: str
    at: str
    plane: int
    levers: tuple[Lever, ...]
    distance: float
    by_hand: float
    solved: float
    tilt: float


def two_supports(results: Results, shaft: str) -> tuple[Support, Support] | None:
    """The two supports of a shaft for which statics decides across the axis, left one first; else None."""
    model = results.model
    on = [s for s in model.supports if model.places[s.name].shaft == shaft]
    radial = sorted((s for s in on if "radial" in s.holds), key=lambda s: _centre(results, s))
    if len(radial) != 2 or any("tilt" in s.holds for s in on):
        return None
    others = [results.parts[s.name].wrench for s in on if s not in radial]  # type: ignore[attr-defined]
    if any(np.abs(wrench[:, [1, 2, 4, 5]]).any() for wrench in others):
        return None
    return radial[0], radial[1]


def hand_check(results: Results, shaft: str, k: int) -> HandCheck | None:
    """The check of a shaft in case k, in the plane with the larger reaction; None where it says nothing."""
    pair = two_supports(results, shaft)
    if pair is None:
        return None
    pivot, other = pair
    at = results.parts[other.name].wrench[k]  # type: ignore[attr-defined]
    tilts = results.parts[pivot.name].wrench[k] + at  # type: ignore[attr-defined]
    plane = 1 if abs(at[1]) >= abs(at[2]) else 2
    start, distance = _centre(results, pivot), _centre(results, other) - _centre(results, pivot)
    levers = tuple(_levers(results, shaft, k, plane, start))
    if not levers or len(levers) > MOST_TERMS or distance <= 0:
        return None
    by_hand = -sum(lever.force * lever.arm + lever.moment for lever in levers) / distance
    # moment about the axis that turns the plane: +x * F_y is M_z, +x * F_z is -M_y
    tilt = -(tilts[5] if plane == 1 else -tilts[4]) / distance
    size = max(abs(lever.force * lever.arm) + abs(lever.moment) for lever in levers) / distance
    if abs(by_hand) <= NOTHING * size or abs(by_hand + tilt - at[plane]) > 1e-6 * size:
        return None
    return HandCheck(shaft, pivot.name, other.name, plane, levers, distance, by_hand, float(at[plane]), float(tilt))


def _centre(results: Results, support: Support) -> float:
    shift = 0.0 if support.load_centre is None else support.load_centre.si
    return results.model.places[support.name].x + shift


def _levers(results: Results, shaft: str, k: int, plane: int, start: float) -> Iterator[Lever]:
    """Loads in a plane; a couple is told beside its force only as far as the point of attack does not make it."""
    found = []
    for action in results.actions:
        if action.shaft != shaft:
            continue
        force = action.wrench[k]
        turn = float(force[5] if plane == 1 else -force[4])
        # a force that attacks beside its part's place: the arm along the axis is part of its lever
        beside = float(action.arm[0])
        found.append(Lever(float(force[plane]), action.x + beside - start, turn - beside * float(force[plane])))
    model = results.model
    gravity = gravity_in_shaft(model, shaft)
    if gravity[plane]:
        mass, centre = shaft_mass(model, shaft)
        found.append(Lever(float(mass * gravity[plane]), float(centre) - start))
    largest = max((abs(f.force * f.arm) + abs(f.moment) for f in found), default=0.0)
    for lever in found:
        force = 0.0 if abs(lever.force * lever.arm) <= NOTHING * largest else lever.force
        moment = 0.0 if abs(lever.moment) <= NOTHING * largest else lever.moment
        if force:
            yield Lever(force, lever.arm)
        if moment:
            yield Lever(0.0, 0.0, moment)


def hand_sentence(results: Results, check: HandCheck, shown: Shown, names: Names) -> str:
    """Such as "moments about lay_left, up: (1516*28.5 + 4578*83.5 - 40.2*181.5)/127 = 3293 N down at lay_right"."""
    level = is_level(results.model, check.shaft)
    way, back = (("up", "down"), ("to the front", "to the back"))[check.plane - 1]
    if not level:
        way, back = (("to 12", "to 6"), ("to 3", "to 9"))[check.plane - 1]
        way, back = f"{way} o'clock", f"{back} o'clock"
    result = show(abs(check.by_hand), shown.force, 4)
    towards = way if check.by_hand > 0 else back
    pivot, at = names[check.pivot], names[check.at]
    head = f"moments about {pivot}, forces {way}: {_sum(check, shown)} = {result} {towards} at {at}"
    if abs(check.tilt) <= SAME * abs(check.by_hand):
        return f"{head}; the same here."
    here = show(abs(check.solved), shown.force, 4)
    turned = "" if check.solved * check.by_hand > 0 else f" {way if check.solved > 0 else back}"
    return f"{head}; {here}{turned} here, the difference is what the tilt stiffness carries."


def _sum(check: HandCheck, shown: Shown) -> str:
    """The sum over the distance, with just enough digits that it gives the result that is printed."""
    wanted = show(abs(check.by_hand), shown.force, 4)
    text = ""
    for digits in range(4, 10):
        text, value = _written(check, shown, digits)
        if show(abs(value), shown.force, 4) == wanted:
            break
    return text


def _written(check: HandCheck, shown: Shown, digits: int) -> tuple[str, float]:
    """The sum with numbers of some digits, and what these numbers give [N]."""
    sign = -1.0 if check.by_hand > 0 else 1.0
    newton, metre = shown.factor("force"), shown.factor("along")
    text, total = "", 0.0
    for lever in check.levers:
        if lever.force:
            force, arm = _digits(lever.force / newton, digits), _digits(lever.arm / metre, digits)
            term, size = f"{force}*{arm}", float(force) * float(arm)
            value = size if lever.force * lever.arm > 0 else -size
        else:
            term = _digits(lever.moment / (newton * metre), digits)
            value = float(term) if lever.moment > 0 else -float(term)
        total += value
        minus = sign * value < 0
        text += (" - " if minus else " + ") + term if text else "-" * minus + term
    distance = _digits(check.distance / metre, digits)
    whole = f"({text})" if len(check.levers) > 1 else text
    return f"{whole}/{distance}", -total / float(distance) * newton


def _digits(value: float, digits: int) -> str:
    return show(abs(value), "", digits)
