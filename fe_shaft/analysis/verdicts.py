"""Limits held against results."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING, NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.results.comparison import Mixes
from fe_shaft.results.verdict import Band, Verdict, use

if TYPE_CHECKING:
    from fe_shaft.model.limit import Limit
    from fe_shaft.results.results import Results

Array = NDArray[np.float64]


class Beside(NamedTuple):
    """What limits are held against besides the results themselves.

    Attributes
    ----------
    pins : on rigid pins, None where they cannot hold the shaft
    mixes : at the ends of all estimates, None where nothing is estimated
    hubs : with no hub carrying, and with all in one piece with their shafts; None without hubs
    """

    pins: Results | None
    mixes: Mixes | None
    hubs: tuple[Results, Results] | None


def judge(results: Results, beside: Beside) -> tuple[Verdict, ...]:
    """Hold all limits of a model against its results."""
    return tuple(_judge(limit, results, beside) for limit in results.model.limits)


def _judge(limit: Limit, results: Results, beside: Beside) -> Verdict:
    model = results.model
    parts = list(model.targets(limit.name))
    cases = [results.case_number(name) for name in model.limit_cases(limit.name)]
    bounds = _Bounds(limit)
    values = bounds.values(results, parts, cases)
    used = bounds.use(values)
    part, case = (int(k) for k in np.unravel_index(used.argmax(), used.shape))

    def at(other: Results) -> float:
        return float(bounds.values(other, parts, cases)[part, case])

    plain, pins, hubs = results.plain, beside.pins, beside.hubs
    return Verdict(
        limit=limit.name,
        part=parts[part],
        quantity=limit.quantity,
        case=results.cases[cases[case]],
        value=float(values[part, case]),
        least=bounds.least,
        most=bounds.most,
        use=float(used[part, case]),
        per_case={results.cases[c]: float(used[:, k].max()) for k, c in enumerate(cases)},
        source=limit.source or "",
        counting=limit.counting,
        band=None if beside.mixes is None else _band(bounds, beside.mixes, parts, cases),
        shaft_alone=None if pins is None else at(pins),
        by_shoulders=None if plain is None else float(values[part, case]) - at(plain),
        hubs=None if hubs is None else (at(hubs[0]), at(hubs[1])),
    )


class _Bounds:
    """What a limit allows: a largest size, a least size, or a range."""

    def __init__(self, limit: Limit) -> None:
        self.quantity = limit.quantity
        self.most = None if limit.max is None else limit.max.si
        self.least = None if limit.min is None else limit.min.si

    def values(self, results: Results, parts: Sequence[str], cases: list[int]) -> Array:
        """What is held against the bounds, (n_parts, n_cases)."""
        values = np.array([np.asarray(results.parts[name].value(self.quantity)) for name in parts])[:, cases]
        return values if self.most is not None and self.least is not None else np.abs(values)

    def use(self, values: Array) -> Array:
        """Above 1 where the limit is exceeded."""
        return use(values, self.least, self.most)


def _band(bounds: _Bounds, mixes: Mixes, parts: Sequence[str], cases: list[int]) -> Band:
    def governing(results: Results) -> tuple[float, float]:
        values = bounds.values(results, parts, cases)
        used = bounds.use(values)
        return float(values.flat[used.argmax()]), float(used.max())

    each = [governing(mix.results) for mix in mixes.corners]
    worst = max(range(len(each)), key=lambda k: each[k][1])
    return Band(
        all_low=governing(mixes.low.results)[0],
        all_high=governing(mixes.high.results)[0],
        worst=each[worst][0],
        worst_use=each[worst][1],
        mix=mixes.corners[worst].words,
    )
