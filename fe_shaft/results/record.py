"""Results as plain data for JSON: SI throughout, said in the record itself; nothing that is not a number in it.

Keys are stable: `version` changes when one of them changes its meaning.
"""

from __future__ import annotations

import json
import math
from typing import TYPE_CHECKING, Any

import numpy as np

from fe_shaft.model.groups import noun
from fe_shaft.results.of_shoulders import of_shoulders
from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.results.words.doubts import pressed_too_hard, too_far
from fe_shaft.version import VERSION as PROGRAM

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Comparison, Row
    from fe_shaft.results.results import Results
    from fe_shaft.results.rolling import RollingElements
    from fe_shaft.results.verdict import Verdict

VERSION = 1
_UNITS = {"length": "m", "angle": "rad", "force": "N", "moment": "N m", "energy": "J"}
_DISPLACEMENTS = ["ux", "uy", "uz", "rx", "ry", "rz"]
_FORCES = ["N", "Vy", "Vz", "Mx", "My", "Mz"]


def results_record(results: Results) -> dict[str, Any]:
    """Everything that came out, as dicts, lists, text and numbers [SI].

    Parameters
    ----------
    results : Results

    Returns
    -------
    dict
        `cases` gives the order of every list over the cases. `parts`: quantities by name. `shafts`: stations `x`, then
        per case and station `displacements` and section forces `forces_left`, `forces_right`. `by_shoulders`: how much
        of each quantity is the shoulders' doing, None where no shoulder counts. A value that is no finite number (the
        use of a limit against nothing) is None.
    """
    return {
        **_head("results"),
        "model": _model(results),
        "cases": list(results.cases),
        "parts": {name: _part(results, name) for name in results.parts},
        "by_shoulders": _by_shoulders(results),
        "rolling": {name: _rolling(each) for name, each in results.rolling.items()},
        "shafts": {name: _shaft(results, name) for name in results.lines},
        "loads": [_load(action) for action in results.actions],
        "verdicts": [_verdict(verdict) for verdict in results.verdicts],
        "doubts": _doubts(results),
        "notes": [{"key": note.key, "sentence": note.sentence} for note in results.notes],
        "proof": _proof(results),
    }


def comparison_record(comparison: Comparison) -> dict[str, Any]:
    """Two results side by side, as dicts, lists, text and numbers [SI].

    Parameters
    ----------
    comparison : Comparison

    Returns
    -------
    dict
        `rows` has one entry a part and quantity, with lists over `cases`; ratio is None where the left is nothing.
        `left` and `right` are both results in full.
    """
    return {
        **_head("comparison"),
        "titles": list(comparison.titles),
        "cases": list(comparison.cases),
        "changes": list(comparison.changes),
        "rows": [_row(row) for row in comparison.rows],
        "mixes": _mixes(comparison),
        "left": results_record(comparison.left),
        "right": results_record(comparison.right),
    }


def to_json(record: dict[str, Any]) -> str:
    """A record as strict JSON text (RFC 8259), ASCII, without NaN or infinity, one line a key."""
    lines = (f" {json.dumps(key)}: {json.dumps(_finite(value), allow_nan=False)}" for key, value in record.items())
    return "{\n" + ",\n".join(lines) + "\n}\n"


def _head(kind: str) -> dict[str, Any]:
    return {
        "format": f"fe_shaft {kind}",
        "version": VERSION,
        "program": f"fe_shaft {PROGRAM}",
        "units": dict(_UNITS),
    }


def _doubts(results: Results) -> list[str]:
    far = too_far(results, "mrad", "um", {name: name for name in results.lines})
    return [*far, *pressed_too_hard(results), *(f"shoulders: {note.sentence}" for note in results.beyond_range)]


def _model(results: Results) -> dict[str, Any]:
    model = results.model
    return {"title": model.title, "question": model.question, "sha256": model.digest, "as_written": model.to_table()}


def _part(results: Results, name: str) -> dict[str, Any]:
    part, place = results.parts[name], results.model.places[name]
    quantities = {key: _list(np.asarray(part.value(key))) for key in part.quantities()}
    return {"kind": noun(results.model[name]), "shaft": place.shaft, "x": place.x, **quantities}


def _by_shoulders(results: Results) -> dict[str, Any] | None:
    if results.plain is None:
        return None
    return {
        name: {key: _list(np.asarray(value)) for key, value in of_shoulders(results, name).items()}
        for name in results.parts
    }


def _rolling(each: RollingElements) -> dict[str, Any]:
    return {
        "word": each.word,
        "place": _list(each.place),
        "load": _list(each.load),
        "contact_angle": _list(each.angle),
        "pressure": _list(each.pressure),
        "force": _list(each.force),
        "movement": _list(each.movement),
        "tangent": _list(each.tangent),
        "tangent_stiffness": _list(each.tangent_stiffness),
        "secant_stiffness": _list(each.secant_stiffness),
        "steps": _list(each.steps),
        "held": _list(each.held),
    }


def _shaft(results: Results, name: str) -> dict[str, Any]:
    line = results.lines[name]
    return {
        "x": _list(line.x),
        "columns": {"displacements": _DISPLACEMENTS, "forces": _FORCES},
        "displacements": _list(line.u),
        "forces_left": _list(line.force_left),
        "forces_right": _list(line.force_right),
    }


def _load(action: Any) -> dict[str, Any]:
    return {
        "part": action.part,
        "shaft": action.shaft,
        "kind": action.kind,
        "x": action.x,
        "spread": action.spread,
        "arm": _list(action.arm),
        "force": _list(action.force),
        "couple": _list(action.couple),
    }


def _verdict(verdict: Verdict) -> dict[str, Any]:
    band = verdict.band
    return {
        "limit": verdict.limit,
        "word": verdict.word,
        "part": verdict.part,
        "quantity": verdict.quantity,
        "dimension": QUANTITIES[verdict.quantity].dimension,
        "case": verdict.case,
        "value": verdict.value,
        "min": verdict.least,
        "max": verdict.most,
        "use": verdict.use,
        "use_per_case": dict(verdict.per_case),
        "counting": verdict.counting,
        "shaft_alone": verdict.shaft_alone,
        "by_shoulders": verdict.by_shoulders,
        "hubs": None if verdict.hubs is None else {"none": verdict.hubs[0], "one_piece": verdict.hubs[1]},
        "source": verdict.source,
        "band": None
        if band is None
        else {
            "all_low": band.all_low,
            "all_high": band.all_high,
            "worst": band.worst,
            "worst_use": band.worst_use,
            "worst_mix": band.mix,
        },
    }


def _proof(results: Results) -> dict[str, Any]:
    proof = results.proof
    return {
        "forces": _list(proof.forces),
        "moments": _list(proof.moments),
        "nodes": _list(proof.nodes),
        "energy": _list(proof.energy),
        "digits_lost": _list(proof.digits_lost),
        "stored_energy": {name: _list(np.asarray(energy)) for name, energy in proof.stored.items()},
    }


def _row(row: Row) -> dict[str, Any]:
    band = {} if row.low is None else {"all_low": row.low, "all_high": row.high, "worst": row.worst}
    return {
        "part": row.part,
        "quantity": row.quantity,
        "dimension": QUANTITIES[row.quantity].dimension,
        "left": _list(row.left),
        "right": _list(row.right),
        "difference": _list(row.difference),
        "ratio": _list(row.ratio),
        "share": _list(row.share),
        **{key: _list(np.asarray(value)) for key, value in band.items()},
        **({"worst_mix": list(row.worst_mix)} if row.worst_mix else {}),
    }


def _mixes(comparison: Comparison) -> dict[str, Any] | None:
    mixes = comparison.mixes
    if mixes is None:
        return None
    return {"all_corners_solved": mixes.complete, "solved": [dict(mix.ends) for mix in mixes.corners]}


def _list(array: Any) -> Any:
    return _finite(array.tolist())


def _finite(value: Any) -> Any:
    """The same with None for every number that is not finite."""
    if isinstance(value, float):
        return value + 0.0 if math.isfinite(value) else None  # + 0.0: no minus zero
    if isinstance(value, dict):
        return {key: _finite(each) for key, each in value.items()}
    if isinstance(value, list | tuple):
        return [_finite(each) for each in value]
    return value
