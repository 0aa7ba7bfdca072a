"""Free motions in words: the shaft, the motion, why nothing holds it, and what to write.

Such as: "layshaft can slide along its axis: no support holds it axially; 567 N push it left."
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.free_space import FRONT, NOISE, SLIDE, SPIN, UP, FreeSpace
from fe_shaft.analysis.remedies import best, let_hold, names_of, says, told
from fe_shaft.fem.dofs import RX, RY, RZ, UX, UY, UZ
from fe_shaft.model.support import Bearing, Pin
from fe_shaft.results.words.wording import clock_hours, is_level, listed
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.support import Support
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]

#: Supports that hold in one point within this share of the shaft's length swing about that point.
SAME_PLACE = 1e-6
#: A component below this share of a mixed motion is not worth a word.
WORTH_A_WORD = 0.02
#: An axial load below this share of all loads is the rounding of thrusts that cancel.
NO_PUSH = 1e-9


def sentences_of(model: Model, shaft: str, free: FreeSpace, push: int, cases: NDArray[np.intp]) -> Iterator[str]:
    """One sentence with its remedy for every way in which a shaft can move; free spin is none.

    Parameters
    ----------
    push : sense of the axial load in these cases, -1 to the left, +1 to the right, 0 both or none
    cases : their numbers
    """
    words = _Words(model, shaft, free)
    if not words.supports:
        yield words.told("can move every way: it stands on no support.", _NO_SUPPORT)
        return
    planes = [free.within(plane) for plane in (UP, FRONT)]
    slide = free.within(SLIDE)
    if len(slide):
        yield words.told(*_slide(words, push, cases))
    yield from (words.told(*each) for each in _across(words, planes))
    rest = free.beyond(np.concatenate([slide, free.within(SPIN), *planes]))
    if len(rest):
        yield words.told(*_mixed(words, rest[0]))


_NO_SUPPORT = "Put it on two pins or bearings that hold radial; let one of them hold axial as well."


class _Words:
    """A shaft and its supports, as the sentences need them."""

    def __init__(self, model: Model, shaft: str, free: FreeSpace) -> None:
        self.model, self.shaft, self.free = model, shaft, free
        self.supports: list[Support] = [s for s in model.supports if model.places[s.name].shaft == shaft]
        self.supports.sort(key=lambda support: model.places[support.name].x)

    def told(self, fact: str, remedy: str) -> str:
        """The sentence, with file and line where they are known, and the remedy below."""
        file, line = self.model.source_lines.get(self.shaft, ("", None))
        where = f"{file}:{line} {self.shaft}" if file else self.shaft
        return told(f"{where} {fact}", remedy)

    def saying(self, *held: str) -> list[Support]:
        """Supports whose `holds` has one of these words."""
        return [support for support in self.supports if set(held) & set(support.holds)]

    def place(self, support: Support) -> float:
        """Load centre of a support [m] from the left end."""
        table = self.model.support_table
        return float(table.load_place[table.names.index(support.name)])

    def resisting(self, dofs: Sequence[int]) -> list[Support]:
        """Supports that really resist one of these displacements, at least in part, their seats included."""
        return [s for s in self.supports if np.abs(self._directions(s)[:, dofs]).max(initial=0.0) > NOISE]

    def _directions(self, support: Support) -> Array:
        table = self.model.support_table
        k = table.names.index(support.name)
        return table.own_directions(k, table.held[k], table.law[k])

    @property
    def matrices(self) -> list[Support]:
        """Bearings that give by a full matrix, or stand in a seat that does."""
        return [s for s in self.supports if isinstance(s, Bearing) and _by_matrix(s)]

    def directions(self) -> tuple[str, str]:
        """Both directions across the shaft: by the world where the shaft lies level, else by the clock."""
        if is_level(self.model, self.shaft):
            return "up and down", "to the front and back"
        return "towards 12 and 6 o'clock", "towards 3 and 9 o'clock"


def _by_matrix(bearing: Bearing) -> bool:
    return bearing.matrix is not None or (bearing.seat is not None and bearing.seat.matrix is not None)


# ---- along the axis


def _slide(words: _Words, push: int, cases: NDArray[np.intp]) -> tuple[str, str]:
    pushed = _pushes(words, cases)
    stops = words.saying("stops_left", "stops_right")
    empty = words.saying("axial")
    if push and stops:
        way, kept = ("right", "left") if push > 0 else ("left", "right")
        keep = "keeps" if len(stops) == 1 else "keep"
        fact = f"can slide to the {way}: {names_of(stops)} {keep} it only from moving {kept}"
        return f"{fact}{pushed}.", let_hold(stops[-1], "axial")
    if empty:
        fact = f'can slide along its axis: {names_of(empty)} {says(empty)} "axial" without a stiffness there'
        return f"{fact}{pushed}.", f"Give the matrix of {empty[-1].name} (or of its seat) an axial stiffness, at ux."
    remedy = let_hold(best(words.supports, "radial"), "axial")
    hint = _one_way_hint(words, cases)
    return f"can slide along its axis: no support holds it axially{pushed}.", remedy + (f"\n  {hint}" if hint else "")


def _axial(words: _Words, cases: NDArray[np.intp]) -> tuple[Array, list[str]]:
    """Axial load in each case [N], and the names of the cases; none where the model names none."""
    statics = words.model.statics[words.shaft]
    loads = statics.resultant[UX, cases]
    loads = np.where(np.abs(loads) > NO_PUSH * statics.size[cases], loads, 0.0)
    names = [words.model.cases[k].name for k in cases] if words.model.written_cases else []
    return loads, names


def _pushes(words: _Words, cases: NDArray[np.intp]) -> str:
    loads, names = _axial(words, cases)
    k = int(np.abs(loads).argmax())
    if not loads[k]:
        return ""
    where = f" in case {names[k]}" if len(words.model.written_cases) > 1 else ""
    return f"; {show(abs(float(loads[k])), 'N')} push it {'left' if loads[k] < 0 else 'right'}{where}"


def _one_way_hint(words: _Words, cases: NDArray[np.intp]) -> str:
    """Whether a one-way stop would do."""
    loads, names = _axial(words, cases)
    largest = loads[np.abs(loads).argmax()]
    if not largest:
        return ""
    way, other = ("left", "right") if largest < 0 else ("right", "left")
    against = [name for name, load in zip(names, loads, strict=False) if load * largest < 0]
    if not against:
        return f"(stops_{way} instead of axial is enough: nothing pushes it {other}.)"
    if len(against) > 3 or 2 * len(against) >= len(loads):
        return ""
    which = "which pushes" if len(against) == 1 else "which push"
    return f"(stops_{way} instead of axial is enough except in {listed(against)}, {which} it {other}.)"


# ---- across the axis


def _across(words: _Words, planes: list[Array]) -> Iterator[tuple[str, str]]:
    """Facts and remedies about motions in the planes of 12 and of 3 o'clock; one for both where they are alike."""
    counts = [len(plane) for plane in planes]
    if counts[0] == counts[1] and counts[0]:
        pivots = [words.free.pivot(plane[0]) if len(plane) == 1 else None for plane in planes]
        if _alike(pivots, words.free.length):
            yield _in_plane(words, "across its axis", planes[0], [UY, UZ])
            return
    for plane, direction, dof in zip(planes, words.directions(), (UY, UZ), strict=True):
        if len(plane):
            yield _in_plane(words, direction, plane, [dof])


def _alike(pivots: list[float | None], length: float) -> bool:
    one, other = pivots
    return one is other or (one is not None and other is not None and abs(one - other) < SAME_PLACE * length)


def _in_plane(words: _Words, direction: str, plane: Array, dofs: list[int]) -> tuple[str, str]:
    there = "" if len(dofs) == 2 else " in that direction"
    radial = words.resisting(dofs)
    if len(plane) == 2:
        return f"can move and tilt {direction}: no support holds it radially{there}.", _two_radial(words)
    pivot = words.free.pivot(plane[0])
    if pivot is not None:
        return _swing(words, direction, pivot, radial, there)
    firm = words.resisting([RY, RZ])
    fact = f"can shift {direction}: {names_of(firm)} {says(firm)} it only against tilting{there}."
    return fact, let_hold(best(firm, "tilt"), "radial")


def _swing(words: _Words, direction: str, pivot: float, radial: list[Support], there: str) -> tuple[str, str]:
    at = [s for s in radial if abs(words.place(s) - pivot) <= SAME_PLACE * words.free.length]
    spot = f"{show(pivot, 'mm', 4)} from the shaft's left end"
    if not at or len(at) < len(radial):
        return f"can swing {direction} about the point {spot}: nothing resists that.", _full_rank(words, radial)
    off_ring = any(support.load_centre is not None for support in at)
    remedy = _second_radial(words, [s for s in words.supports if s not in radial], at[-1])
    if len(at) == 1:
        centre = f" (its load centre, {spot})" if off_ring else ""
        return f"can swing {direction} about {at[0].name}{centre}: no other support holds it radially{there}.", remedy
    where = f"where their load centres meet, {spot}" if off_ring else spot
    return f"can swing {direction} about {names_of(at)}: they hold it radially in one place, {where}.", remedy


def _two_radial(words: _Words) -> str:
    if words.saying("radial"):
        return _full_rank(words, words.saying("radial"))
    if len(words.supports) == 1:
        return f"{let_hold(words.supports[0], 'radial')}, and add a second support that does."
    return f"{let_hold(words.supports[0], 'radial')}\n  {let_hold(words.supports[-1], 'radial')}"


def _second_radial(words: _Words, others: list[Support], pivot: Support) -> str:
    tilt = f'let {pivot.name} hold "tilt"' if isinstance(pivot, Pin) else f"give {pivot.name} a tilt stiffness"
    if not others:
        return f"Add a second support that holds radial, or {tilt}."
    weak = [support for support in others if "radial" in support.holds]
    add = f"Give {names_of(weak)} a stiffness in that direction too" if weak else let_hold(others[-1], "radial")
    return f"{add}, or {tilt}."


# ---- mixed motions, which only full matrices make


def _mixed(words: _Words, motion: Array) -> tuple[str, str]:
    motion = np.where(np.abs(motion) > WORTH_A_WORD * np.abs(motion).max(), motion, 0.0)
    first, *more = _verbs(motion)
    fact = f"can {first[0]}"
    if more:
        fact += f" while it {listed([second for _, second in more])}"
    culprits = words.matrices
    reason = f"the stiffness of {names_of(culprits)} does not resist that" if culprits else "no support resists that"
    return f"{fact}: {reason}.", _full_rank(words, culprits)


def _verbs(motion: Array) -> Iterator[tuple[str, str]]:
    """What the motion is made of, largest first: "slide along its axis", and the same in the third person."""
    along, spin = abs(motion[UX]), abs(motion[RX])
    shift, turn = np.hypot(motion[UY], motion[UZ]), np.hypot(motion[RY], motion[RZ])
    sizes = {"slide": along, "spin": spin, "move": shift, "tilt": turn}
    after = {
        "slide": " along its axis",
        "spin": "",
        "move": f" across its axis towards {clock_hours(motion[UY], motion[UZ])} and back",
        "tilt": "",
    }
    for verb in sorted(sizes, key=lambda name: -sizes[name]):
        if sizes[verb]:
            yield verb + after[verb], verb + "s" + after[verb]


def _full_rank(words: _Words, supports: Sequence[Support]) -> str:
    """Those of the supports that give by a matrix shall resist more."""
    culprits = [support for support in supports if support in words.matrices]
    if not culprits:
        return "Add a support that holds it there."
    return f"Give {names_of(culprits)} a stiffness in that direction too, or add a support that holds it there."
