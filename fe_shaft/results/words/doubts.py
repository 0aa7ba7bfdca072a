"""Results that the assumptions of the calculation no longer carry, said beside the answer."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from typing import TYPE_CHECKING

from fe_shaft.results.words.layout import labelled
from fe_shaft.results.words.wording import plain
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.results.results import Results
    from fe_shaft.results.words.page import Page

LARGE_SLOPE = 0.1  # rad: sine and angle differ by 0.2 %, cosine and 1 by 0.5 %
LARGE_DEFLECTION = 0.1  # of the shaft's length
DENTS = {"balls": 4.2e9, "rollers": 4.0e9}  # Pa, pressures of ISO 76 for a lasting dent of 1e-4 diameters; from memory
MOST_DOUBTS = 12  # said in print; files hold all


def doubts(page: Page) -> list[str]:
    """Shafts that move too far, in any case, for small movements to be assumed, and shoulders beyond their rule."""
    names = page.names(40)
    shown = {shaft: names[shaft] for shaft in page.results.lines}
    found = list(too_far(page.results, page.shown.angle, page.shown.length, shown))
    found += pressed_too_hard(page.results)
    found += [f"shoulders: {plain(note.sentence)}" for note in page.results.beyond_range]
    if len(found) > MOST_DOUBTS:
        found[MOST_DOUBTS - 1 :] = [f"and {len(found) - MOST_DOUBTS + 1} more like this"]
    return labelled("Doubt    ", found, between="; ") if found else []


def pressed_too_hard(results: Results) -> Iterator[str]:
    """One sentence a computed bearing whose elements leave dents."""
    for name, each in results.rolling.items():
        most, limit = float(each.peak_pressure.max()), DENTS[each.word]
        if most > limit:
            case = results.cases[int(each.peak_pressure.argmax())]
            yield (
                f"{plain(name)} presses its {each.word} with {show(most, 'MPa')} in case {plain(case)}: above "
                f"{show(limit, 'MPa')} they leave dents (ISO 76)"
            )


def too_far(results: Results, angle: str, length: str, names: Mapping[str, str]) -> Iterator[str]:
    """One sentence a shaft that moves too far, in units of choice; `names` says what shafts are called in print."""
    for shaft, line in results.lines.items():
        slope, deflection = float(line.slope.max()), float(line.deflection.max())
        if slope > LARGE_SLOPE:
            moved = f"slopes {show(slope, angle)}"
        elif deflection > LARGE_DEFLECTION * line.length:
            moved = f"deflects {show(deflection, length)}"
        else:
            continue
        yield f"{names[shaft]} {moved}: too far for small movements, which are assumed. Look at its supports and loads."
