"""Load cases in words: power and turning, every force, thrust left over and who holds it, torque in and out."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.check import BalanceCheck, CaseCheck, LoadCheck
from fe_shaft.analysis.checking.words import couple_in_words, force_in_words, turning, way
from fe_shaft.fem.dofs import RX, UX
from fe_shaft.model.actions import Action, actions, case_torque, gravity_in_shaft, shaft_mass
from fe_shaft.results.shown import Shown
from fe_shaft.results.words.wording import clock_hours, is_level, listed
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.case import Case
    from fe_shaft.model.system import Model
    from fe_shaft.results.results import Results

Array = NDArray[np.float64]

#: What is left of sums below this share of their terms is rounding.
NOTHING = 1e-9


def check_cases(model: Model, results: Results | None) -> tuple[CaseCheck, ...]:
    """Every case of a model; `results` (None where it cannot be solved) tell who holds what."""
    acts = actions(model) if results is None else results.actions
    reader = _Reader(model, acts, results)
    return tuple(reader.case(k) for k in range(len(model.cases)))


@dataclass(frozen=True)
class _Reader:
    """A model and its actions, read case by case."""

    model: Model
    acts: tuple[Action, ...]
    results: Results | None

    def case(self, k: int) -> CaseCheck:
        case = self.model.cases[k]
        like, factor = self._like(k)
        return CaseCheck(
            name=case.name,
            power=power_in_words(case, Shown.of(self.model).moment),
            torque=case_torque(case),
            loads=tuple(self._loads(case, k)),
            balances=tuple(self._balance(shaft.name, k) for shaft in self.model.shafts),
            like=like,
            factor=factor,
        )

    # ---- loads

    def _loads(self, case: Case, k: int) -> Iterator[LoadCheck]:
        enters, leaves = set(case.enters_shares), set(case.leaves_shares)
        driven, driving = (leaves, enters) if case.coasts else (enters, leaves)
        unit = Shown.of(self.model).moment
        for act in self.acts:
            force, couple = act.force[k], act.couple[k]
            if act.kind == "weight" or (act.kind != "force" and not (force.any() or couple.any())):
                continue
            role = "driven" if act.part in driven else "drives" if act.part in driving else ""
            if act.kind == "force":  # with what its lever adds to the torque
                couple = np.array([act.wrench[k, RX], couple[1], couple[2]])
            words = (*self._force(act, force), *couple_in_words(couple, unit)) or ("switched off",)
            axial, up, front = (float(each) for each in force)
            yield LoadCheck(act.part, role, act.kind, axial, up, front, float(act.wrench[k, RX]), words)

    def _force(self, act: Action, force: Array) -> tuple[str, ...]:
        unit = Shown.of(self.model).force
        if act.kind == "pull" and force.any():
            size = show(float(np.hypot(force[1], force[2])), unit)
            return (f"{size} towards {clock_hours(float(force[1]), float(force[2]))}",)
        return force_in_words(force, unit, level=is_level(self.model, act.shaft))

    def _like(self, k: int) -> tuple[str, float]:
        """An earlier case whose loads are the same, or all so many times as large."""
        loads = [act.wrench for act in self.acts if act.kind != "weight"]
        if not loads:
            return "", 1.0
        table = np.array(loads)
        size = float(np.abs(table[:, k]).max())
        for other in range(k if size else 0):
            largest = float(np.abs(table[:, other]).max())
            factor = size / largest if largest else 0.0
            if factor and np.abs(table[:, k] - factor * table[:, other]).max() <= NOTHING * size:
                return self.model.cases[other].name, factor
        return "", 1.0

    # ---- thrust and torque

    def _balance(self, shaft: str, k: int) -> BalanceCheck:
        pushes = [float(act.force[k, 0]) for act in self.acts if act.shaft == shaft]
        if self.model.gravity_vector.any():
            pushes.append(shaft_mass(self.model, shaft)[0] * float(gravity_in_shaft(self.model, shaft)[0]))
        torques = [float(act.wrench[k, RX]) for act in self.acts if act.shaft == shaft]
        thrust = _sum(pushes)
        held = self._carried(shaft, k, UX)
        one_way = (sum(t for t in torques if t > 0), -sum(t for t in torques if t < 0))
        torque_in, torque_out = max(one_way), min(one_way)
        if torque_in - torque_out < NOTHING * torque_in:
            torque_out = torque_in
        torque_held = self._torque_held(shaft, k, _sum(torques))
        words = (
            self._thrust_in_words(shaft, thrust, held),
            _torque_in_words(
                torque_in, torque_out, torque_held, Shown.of(self.model).moment, free=self._free_to_turn(shaft)
            ),
        )
        return BalanceCheck(shaft, thrust, held, torque_in, torque_out, torque_held, words)

    def _carried(self, shaft: str, k: int, dof: int) -> dict[str, float]:
        """Force or torque on the shaft by the supports that carry any of it."""
        if self.results is None:
            return {}
        wrenches = {
            part.name: self.results.parts[part.name].wrench[k]  # type: ignore[attr-defined]
            for part in self.model.supports
            if self.model.places[part.name].shaft == shaft
        }
        least = NOTHING * max((float(np.abs(w).max()) for w in wrenches.values()), default=0.0)
        return {name: float(w[dof]) for name, w in wrenches.items() if abs(w[dof]) > least}

    def _torque_held(self, shaft: str, k: int, left_over: float) -> dict[str, float]:
        """What holds the torque left over: supports that hold spin, else where power leaves."""
        if not left_over or self.results is None:
            return {}
        held = self._carried(shaft, k, RX)
        leaves = [name for name in self.model.cases[k].leaves_shares if self.model.places[name].shaft == shaft]
        return held or dict.fromkeys(leaves[:1], -left_over)

    def _free_to_turn(self, shaft: str) -> bool:
        on = [part for part in self.model.supports if self.model.places[part.name].shaft == shaft]
        return not any("spin" in part.holds for part in on)

    def _thrust_in_words(self, shaft: str, thrust: float, held: dict[str, float]) -> str:
        unit = Shown.of(self.model).force
        if not thrust:
            return "No thrust left over"
        words = f"Thrust left over: {show(abs(thrust), unit)} {way('axial', thrust, level=is_level(self.model, shaft))}"
        if self.results is None:
            return words
        return f"{words}, held by {_holders(held, unit) or 'nothing'}"


def _holders(held: dict[str, float], unit: str) -> str:
    """Who holds how much; the amounts only where several share."""
    if len(held) == 1:
        return next(iter(held))
    return listed([f"{name} ({show(abs(size), unit)})" for name, size in held.items()])


def _torque_in_words(into: float, out: float, held: dict[str, float], unit: str, *, free: bool) -> str:
    if not into:
        return "No torque" if free else ""
    if into == out:
        return f"Torque in = out: {show(into, unit, 4)}"
    words = f"Torque in {show(into, unit, 4)}, out {show(out, unit, 4)}"
    if not held:
        return words
    what = f"{'taken out at' if free else 'held by'} {listed(tuple(held))}"
    return f"{words}; {show(into - out, unit, 4)} {what}" if out else f"Torque {show(into, unit, 4)}, {what}"


def _sum(terms: list[float]) -> float:
    """A sum without the rounding of terms that cancel."""
    total = sum(terms)
    return total if abs(total) > NOTHING * sum(map(abs, terms)) else 0.0


def power_in_words(case: Case, unit: str) -> str:
    """Power, speed, torque (in a unit) and turning: "5.5 kW at 393.7 rpm is 133 N m; clockwise from left (...)"."""
    if not case.enters_shares and not case.leaves_shares:
        return f"no power; {_forces_of(case) or 'all forces act'}"
    torque = show(case.torque_si / (case.torque_factor or 1.0), unit)
    if case.torque is not None:
        words = f"{case.torque.text}{_speed(case)}"
    elif case.power is not None and case.speed is not None:
        words = f"{case.power.text} at {case.speed.text} is {torque}"
    else:
        words = "no torque"
    if case.torque_factor != 1.0:
        words += f", times {case.torque_factor:g} is {show(case.torque_si, unit)}"
    return "; ".join([words, *_turning(case), *filter(None, [_forces_of(case)])])


def _speed(case: Case) -> str:
    if case.speed is None:
        return ""
    if case.speed.si == 0.0:
        return ", standing still"
    power = case.torque_si / (case.torque_factor or 1.0) * case.speed.si
    return f" at {case.speed.text} is {show(power, 'kW' if power >= 1000.0 else 'W')}"


def _turning(case: Case) -> Iterator[str]:
    if case.turns is None:
        return
    other = {1: "counterclockwise", -1: "clockwise"}[case.sense]
    pushed = "pushed " if case.speed is not None and case.speed.si == 0.0 else ""
    yield f"{pushed}{turning(case.sense)} from left ({other} from right)"
    if case.coasts:
        yield "coasts: the torque acts against the turning"


def _forces_of(case: Case) -> str:
    """Which forces are switched on; empty where the case does not say."""
    if case.forces is None:
        return ""
    acting = [f"{name}{_times(case.force_factor(name))}" for name in case.forces]
    return f"forces switched on: {listed(acting)}" if acting else "all forces switched off"


def _times(factor: float) -> str:
    return "" if factor == 1.0 else f" x {factor:g}"
