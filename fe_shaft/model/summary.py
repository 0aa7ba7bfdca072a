"""A model at a glance: what stands where, what is computed. `check` says what it all means."""

from __future__ import annotations

from html import escape
from typing import TYPE_CHECKING

from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.system import Model


def summary(model: Model) -> str:
    """Lines of plain text: shafts, their parts from left to right, cases and limits."""
    lines = [model.title or "Model without a title"]
    for shaft in model.shafts:
        number = shaft.numbers
        widest = max(number["diameter_left"].max(), number["diameter_right"].max())
        count = len(shaft.segments)
        lines.append(
            f"{shaft.name}: {show(float(shaft.ends[-1]), 'mm')} long, {count} segment{'s' if count > 1 else ''}, "
            f"up to {show(float(widest), 'mm')} in diameter"
        )
        here = [(place.x, name) for name, place in model.places.items() if place.shaft == shaft.name]
        lines += [f"  at {show(x, 'mm'):>9}  {name} ({type(model[name]).__name__.lower()})" for x, name in sorted(here)]
    lines.append("cases: " + ", ".join(case.name for case in model.cases))
    if model.limits:
        lines.append("limits: " + ", ".join(limit.name for limit in model.limits))
    return "\n".join(lines)


def summary_html(model: Model) -> str:
    """The same for a notebook."""
    return f"<pre>{escape(summary(model))}</pre>"
