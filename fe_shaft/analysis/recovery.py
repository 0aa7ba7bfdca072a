"""Solution to results: all stations, the parts by their names, the proof and the notes."""

from __future__ import annotations

from collections.abc import Iterator
from functools import partial
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.load_words import misfit_sentence, pulled_stop_sentence
from fe_shaft.analysis.proof import prove
from fe_shaft.analysis.reactions import Reactions, reactions
from fe_shaft.analysis.shoulder_notes import shoulder_notes
from fe_shaft.analysis.solution import Solved, counted_twist, solve_model
from fe_shaft.errors import LoadError
from fe_shaft.fem.dofs import NDOF, RX, UX
from fe_shaft.fem.recovery import Recovery
from fe_shaft.model.actions import X_AXIS, case_names, clock, gravity_in_shaft
from fe_shaft.model.gear import Gear
from fe_shaft.model.notes import Note
from fe_shaft.results.line import Line
from fe_shaft.results.movement import GearMovement, Movement, SupportMovement
from fe_shaft.results.parts import PartsFound
from fe_shaft.results.results import Results
from fe_shaft.results.rolling import RollingElements
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]

#: A pull below this share of a stop's own forces is rounding.
PULLED = 1e-9
#: A pin that misses its bore by more than this share of the largest offset does not hold: rounding is 1e-12.
MISFIT = 1e-6


def solve_once(model: Model) -> Results:
    """Solve a model as it stands: displacements, forces, proof; no bands and no verdicts."""
    with np.errstate(all="ignore"):  # numbers that overflow or vanish fail the proof, in one sentence
        solved = solve_model(model)
        carried = reactions(solved)
        proof = prove(solved, carried)
    if solved.table.stops:
        _refuse_pulled_stops(solved, carried)
    if solved.table.gaps and solved.table.pins:
        _refuse_misfits(solved, carried)
    u = counted_twist(solved)
    return Results(
        model=model,
        cases=case_names(model),
        lines=_lines(solved, u),
        parts=PartsFound(tuple(model.places), partial(_part, solved, carried, u)),
        actions=solved.actions,
        proof=proof,
        balances=(*_balance_notes(solved), *shoulder_notes(model)),
        rolling=_rolling(solved),
        solve_plain=None if solved.grid.pieces.lumps is None else lambda: solve_once(model.plain()),
    )


def _part(solved: Solved, carried: Reactions, u: Array, name: str) -> Movement[Array]:
    own = u[solved.grid.node_of[name]].T
    if name in solved.table.names:
        k = solved.table.names.index(name)
        return SupportMovement(
            name, own, np.zeros_like(own), carried.wrench[k].T, carried.relative(k).T, carried.seat(k).T
        )
    load = sum((a.wrench for a in solved.actions if a.part == name), start=np.zeros_like(own))
    part = solved.model[name]
    if not isinstance(part, Gear) or part.mate is None:
        return Movement(name, own, load)
    towards = clock(part.mate.si)
    along = np.cross(X_AXIS, towards)
    point = part.reference_diameter / 2 * towards
    sense = np.array([case.sense or 1.0 for case in solved.model.cases])  # where nothing turns: clockwise from left
    body = _body_give(solved, part)
    return GearMovement(name, own + body, load, body, _triple(point), _triple(towards), _triple(along), sense)


def _body_give(solved: Solved, gear: Gear) -> Array:
    """How far a gear's tooth force moves its rim against its shaft, (n_cases, 6) [m, rad]; its weight does not count.

    The shaft itself does not feel it: it carries the same force, wherever the rim goes.
    """
    forces = (a.wrench for a in solved.actions if a.part == gear.name and a.kind == "tooth force")
    force = sum(forces, start=np.zeros((len(solved.model.cases), NDOF)))
    if gear.body is None:
        return np.zeros_like(force)
    radial, tilt = gear.body.give
    return np.asarray(force * np.array([0.0, radial, radial, 0.0, tilt, tilt]))


def _rolling(solved: Solved) -> dict[str, RollingElements]:
    """What the elements of the computed bearings bear."""
    found = solved.rolled
    if found is None:
        return {}
    out, elements = {}, found.bearings.elements(found.deformation)
    for k, number in enumerate(found.bearings.numbers.tolist()):
        own, name = elements[number], solved.table.names[number]
        kind = found.bearings.kinds[k]
        count = solved.model[name].geometry.elements
        place = np.tile(2 * np.pi * np.arange(count) / count, own.load.shape[1] // count)
        out[name] = RollingElements(
            name=name,
            word="rollers" if kind.rollers else "balls",
            place=place,
            load=own.load,
            angle=own.angle,
            pressure=own.pressure,
            force=found.response.force[:, k],
            movement=found.deformation[:, k],
            tangent=found.response.tangent[:, k],
            steps=found.steps,
            held=found.floating[:, k],
        )
    return out


def _triple(vector: Array) -> tuple[float, float, float]:
    x, y, z = (float(v) for v in vector)
    return x, y, z


def _refuse_pulled_stops(solved: Solved, carried: Reactions) -> None:
    """A one-way stop pushes; a case that would make it pull needs clearances that this solution does not know."""
    sentences = []
    model, table = solved.model, solved.table
    for k in np.flatnonzero(table.one_way):
        pull = table.one_way[k] * carried.wrench[k, UX]
        pull = np.where(pull > PULLED * np.abs(carried.wrench[k, :3]).sum(axis=0), pull, 0.0)
        if pull.any():
            case = int(pull.argmax())
            sentences.append(pulled_stop_sentence(model, model.supports[k], float(pull[case]), case))
    if sentences:
        raise LoadError("\n".join(sentences))


def _refuse_misfits(solved: Solved, carried: Reactions) -> None:
    """Pins in one place whose bores miss each other: nothing gives way, so no shaft fits both."""
    table, node_of = solved.table, solved.grid.node_of
    for k in np.flatnonzero(table.pin).tolist():
        held = table.held[k]
        weigh = np.where(np.arange(NDOF) < RX, 1.0, float(solved.model[table.shafts[k]].ends[-1]))
        missed = np.abs(carried.relative(k)[held] * weigh[held, None]).max(initial=0.0)
        if missed > MISFIT * np.abs(table.gap * weigh).max():
            together = [name for name in table.names if node_of[name] == node_of[table.names[k]]]
            raise LoadError(misfit_sentence(table.shafts[k], together))


def _lines(solved: Solved, u: Array) -> dict[str, Line]:
    grid, loads = solved.grid, solved.loads
    found = Recovery(
        grid.pieces, solved.give, solved.spans.centre, u[grid.left], solved.solution.span_force, loads.spread
    )
    return {
        name: Line(
            found=found,
            own=own.pieces,
            span_left=grid.x[grid.left],
            end=(float(grid.x[own.nodes.stop - 1]), u[own.nodes.stop - 1]),
            density=loads.density,
            gravity=gravity_in_shaft(solved.model, name),
        )
        for name, own in grid.shafts.items()
    }


def _balance_notes(solved: Solved) -> Iterator[Note]:
    names = case_names(solved.model)
    for balance in solved.balances:
        for k in np.flatnonzero(balance.torque):
            torque = show(abs(float(balance.torque[k])), "N m")
            yield Note(
                f"{names[k]}.leaves",
                f"case {names[k]}: {torque} taken out at {balance.part} so that the torques on {balance.shaft} balance",
            )
