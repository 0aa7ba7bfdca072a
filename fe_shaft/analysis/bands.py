"""What is only estimated, at the ends of its band: all together, and in every mix of low and high.

One soft and one stiff bearing tilt a shaft several times more than two soft ones, so the corners are solved and not
only the two ends. A movement is affine in 1 / (1 + k f) for each spring direction, so its worst value stands at a
corner for one direction and nearly always for several.
"""

from __future__ import annotations

from itertools import product
from typing import TYPE_CHECKING, Literal

from fe_shaft.analysis.recovery import solve_once
from fe_shaft.results.comparison import Mix, Mixes

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

End = Literal["low", "high"]

#: Up to this number of estimated parts every corner is solved.
ALL_CORNERS = 6


def solve_mixes(model: Model) -> Mixes | None:
    """Solve a model at the ends of its estimates; None where nothing is estimated."""
    names = model.estimated
    if not names:
        return None
    choices = _choices(len(names), model.estimates.together)
    corners = tuple(_mix(model, dict(zip(names, ends, strict=True))) for ends in choices)
    complete = len(choices) == 2 ** len(names)
    return Mixes(corners[0], corners[1], corners, complete)


def _choices(n: int, together: bool) -> list[tuple[End, ...]]:
    """Ends to solve: all low and all high first, then the other corners.

    Beyond `ALL_CORNERS` parts: each part alone at the other end.
    """
    both: tuple[End, End] = ("low", "high")
    ends: list[tuple[End, ...]] = [(end,) * n for end in both]
    if together or n == 1:
        return ends
    if n <= ALL_CORNERS:
        return ends + [mix for mix in product(both, repeat=n) if len(set(mix)) == 2]
    for k in range(n):
        for rest, alone in (both, both[::-1]):
            ends.append(tuple(alone if i == k else rest for i in range(n)))
    return ends


def _mix(model: Model, ends: dict[str, End]) -> Mix:
    return Mix(tuple(ends.items()), solve_once(model.at_band(ends)))
