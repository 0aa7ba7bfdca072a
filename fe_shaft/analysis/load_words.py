"""What cannot be carried, in words: torque that nothing takes out, stops that would pull, pins that do not fit."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from typing import TYPE_CHECKING

from fe_shaft.analysis.remedies import let_hold, told
from fe_shaft.errors import quote
from fe_shaft.model.groups import CARRIERS
from fe_shaft.results.words.wording import listed
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.support import Support
    from fe_shaft.model.system import Model


def spin_sentence(model: Model, shaft: str, torques: Mapping[int, float]) -> str:
    """A shaft that can spin, the torque left over in each case (by number) and the remedy."""
    k = max(torques, key=lambda number: abs(torques[number]))
    way = "clockwise" if torques[k] > 0 else "counterclockwise"
    named = len(model.written_cases) > 1
    where = f" in case {model.cases[k].name}" if named else ""
    others = [model.cases[number].name for number in torques if number != k]
    likewise = f" (likewise in {_short_list(others)})" if others else ""
    fact = f"{shaft} can spin: {show(abs(torques[k]), 'N m')} turn it {way}, seen from its left end,{where}"
    return told(f"{fact.rstrip(',')}, and nothing takes them out{likewise}.", _take_out(model, shaft, k))


def _short_list(names: Sequence[str]) -> str:
    return listed(names if len(names) <= 4 else [*names[:3], f"{len(names) - 3} more"])


def _take_out(model: Model, shaft: str, k: int) -> str:
    """Where power enters, it can be said where it leaves; a torque of forces and weights needs a hold."""
    hold = 'let a pin hold "spin".'
    case = model.cases[k]
    if not case.enters_shares or case.leaves_shares:
        return f"Balance it by a couple.axial, or {hold}"
    here = [part for part in model.parts_on_shafts if model.places[part.name].shaft == shaft]
    free = [part.name for part in here if isinstance(part, CARRIERS) and part.name not in case.enters_shares]
    return f"Write in case {case.name}   leaves = {quote(free[0] if free else '...')}   or {hold}"


def pulled_stop_sentence(model: Model, stop: Support, pull: float, k: int) -> str:
    """A one-way stop that the shaft moves away from, the force [N] it would have to pull with, and the remedy."""
    shaft, kept = model.places[stop.name].shaft, "left" if "stops_left" in stop.holds else "right"
    where = f" in case {model.cases[k].name}" if len(model.written_cases) > 1 else ""
    fact = f"{shaft} pulls away from {stop.name} with {show(pull, 'N')}{where}"
    return told(
        f"{fact}, but {stop.name} only keeps it from moving {kept}.",
        f"{let_hold(stop, 'axial')}, or take its stop out.",
    )


def misfit_sentence(shaft: str, pins: Sequence[str]) -> str:
    """Pins in one place whose bores lie apart, and the remedy."""
    fact = f"{shaft} does not fit {listed(pins)}: they hold it rigidly in one place, but their bores lie apart."
    return told(fact, "Give them the same offset and bore_tilt, or let one of them be a bearing that gives way.")
