"""Results that the assumptions of the calculation no longer carry, said beside the answer."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

from fe_shaft.results.words.layout import labelled
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.results.words.page import Page

LARGE_SLOPE = 0.1  # rad: sine and angle differ by 0.2 %, cosine and 1 by 0.5 %
LARGE_DEFLECTION = 0.1  # of the shaft's length


def doubts(page: Page) -> list[str]:
    """Shafts that move too far, in any case, for small movements to be assumed; nothing for all others."""
    found = list(_too_far(page))
    return labelled("Doubt    ", found) if found else []


def _too_far(page: Page) -> Iterator[str]:
    for shaft, line in page.results.lines.items():
        slope, deflection = float(line.slope.max()), float(line.deflection.max())
        if slope > LARGE_SLOPE:
            moved = f"slopes {show(slope, page.shown.angle)}"
        elif deflection > LARGE_DEFLECTION * line.length:
            moved = f"deflects {show(deflection, page.shown.length)}"
        else:
            continue
        name = page.names(40)[shaft]
        yield f"{name} {moved}: too far for small movements, which are assumed. Look at its supports and loads."
