"""What is drawn left and right, from what the user hands over."""

from __future__ import annotations

from fe_shaft.errors import UsageError, wrong_kind
from fe_shaft.results.comparison import Comparison
from fe_shaft.results.results import Results


def halves(shown: Results | Comparison, pins: Results | None) -> tuple[Results, Results | None]:
    """Results to draw, and the same on rigid pins; a comparison with pins brings both."""
    if isinstance(shown, Results):
        return shown, pins
    if not isinstance(shown, Comparison):
        raise wrong_kind("a picture", "results or a comparison", shown, "Hand over solve(model) or compare(model).")
    if not shown.is_pins:
        raise UsageError("a comparison of two models is not drawn; hand over one of its results (.left or .right).")
    return shown.right, shown.left
