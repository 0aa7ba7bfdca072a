"""The public verbs: solve a model, compare it with rigid pins or with another model."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from fe_shaft.analysis.bands import solve_mixes
from fe_shaft.analysis.recovery import solve_once
from fe_shaft.analysis.verdicts import Beside, judge
from fe_shaft.errors import FreeMotionError, LoadError, SolutionError, UsageError, wrong_kind
from fe_shaft.model.differences import differences
from fe_shaft.model.hub import NONE, ONE_PIECE
from fe_shaft.results.comparison import Comparison, common_rows

if TYPE_CHECKING:
    from fe_shaft.model.system import Model
    from fe_shaft.results.results import Results


def solve(model: Model) -> Results:
    """Solve a model in all its load cases.

    Limits are judged as given and over the band of all estimates.

    Raises
    ------
    FreeMotionError, LoadError
        Something can move freely, or a load cannot be carried.
    SolutionError
        The proof failed; no numbers are returned.
    UsageError
        What is given is no model.
    """
    _require_model("solve", model)
    results = solve_once(model)
    if not model.limits:
        return results
    return replace(results, verdicts=judge(results, Beside(_on_pins(model), solve_mixes(model), _hubs(model))))


def _hubs(model: Model) -> tuple[Results, Results] | None:
    """The model with no hub carrying, and with all of them in one piece with their shafts."""
    if not (model.hubs and model.limits):
        return None
    return solve_once(model.with_hubs(NONE)), solve_once(model.with_hubs(ONE_PIECE))


def _require_model(verb: str, given: object) -> None:
    from fe_shaft.model.system import Model

    if not isinstance(given, Model):
        raise wrong_kind(verb, "a Model", given, 'Read one from a file with read("layshaft.toml").')


def _on_pins(model: Model) -> Results | None:
    try:
        return solve_once(model.pinned())
    except (FreeMotionError, LoadError, SolutionError):
        return None


def compare(model: Model, other: Model | None = None) -> Comparison:
    """Hold a model against itself on rigid pins, or against another model.

    Every flexible bearing and seat is replaced by a rigid pin that holds the same directions.

    Raises
    ------
    UsageError
        Two models without a common case, or what is given is no model.
    """
    _require_model("compare", model)
    if other is not None:
        _require_model("compare", other)
        return _compare_models(model, other)
    results = solve_once(model)
    try:
        left = solve_once(model.pinned())
    except (FreeMotionError, LoadError) as error:
        raise type(error)(
            f'on rigid pins, {error}\n  (A pin holds what "holds" says; a stiffness that is not held is none there.)'
        ) from None
    mixes = solve_mixes(model)
    results = replace(results, verdicts=judge(results, Beside(left, mixes, _hubs(model))))
    return Comparison(left, results, ("pins", "bearings"), common_rows(left, results, mixes), mixes)


def _compare_models(model: Model, other: Model) -> Comparison:
    left, right = solve(model), solve(other)
    if left.cases != right.cases:
        raise UsageError(
            f"the two models have different cases ({', '.join(left.cases)} against {', '.join(right.cases)}); "
            "give both the same."
        )
    titles = ("first", "second")
    return Comparison(left, right, titles, common_rows(left, right, None), None, differences(model, other))
