"""One load case in words: who moves where, and how large it gets along each shaft; its tables beneath."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np

from fe_shaft.results.extremes import largest_along
from fe_shaft.results.movement import GearMovement
from fe_shaft.results.words.hand import hand_check, hand_sentence
from fe_shaft.results.words.layout import paragraph
from fe_shaft.results.words.page import WORTH, Page, featured
from fe_shaft.results.words.tables import forces, movement, noise, rolling, seats
from fe_shaft.results.words.wording import called, clock_hours, is_level
from fe_shaft.units import show

MOST_SENTENCES = 8
SMALL = 1e-3  # of the largest component of a movement: not worth words
ALIGNED = 1 - 1e-9  # cosine of a mate's direction that stands on 12, 3, 6 or 9 o'clock


def case_lines(page: Page, k: int) -> list[str]:
    """Everything about one case."""
    lines = sentences(page, k)
    for shaft in page.on:
        lines += along(page, shaft, k)
    for shaft in page.on:
        lines += ["", *movement(page, shaft, k)]
    for shaft in page.on:
        lines += ["", *forces(page, shaft, k)]
        lines += _spaced(rolling(page, shaft, k))
        lines += _spaced(seats(page, shaft, k))
    return lines


def _spaced(lines: list[str]) -> list[str]:
    return ["", *lines] if lines else []


# ---- sentences


def sentences(page: Page, k: int) -> list[str]:
    """Such as "Case running: the wheel moves 35.8 um up, 7 um towards its mate, 9.5 um to the left."."""
    names, case = page.names(40), page.results.cases[k]
    head = f"{page.heading(case)}: "
    sizes = {name: float(np.hypot(*page.results.parts[name].u[k, 1:3])) for name in featured(page)}
    worth = [name for name, size in sizes.items() if size >= WORTH * max(sizes.values())]
    told = [f"{called(page.results, name, names[name])} {_moves(page, name, k)}." for name in worth]
    if not told:
        return []
    lines = paragraph(told[0], " " * min(len(head), 20), first=head)
    for sentence in told[1:MOST_SENTENCES]:
        lines += paragraph(sentence, " " * min(len(head), 20))
    return lines


def _moves(page: Page, name: str, k: int) -> str:
    """Where a part moves, in words."""
    part = page.results.parts[name].in_case(k)
    shaft = page.results.model.places[name].shaft
    ways = list(_across(part, is_level(page.results.model, shaft)))
    level = is_level(page.results.model, shaft)
    ways.append(
        (part.axial, "to the right" if level else "to its right end", "to the left" if level else "to its left end")
    )
    largest = max(abs(value) for value, _, _ in ways)
    told = [(v, plus if v > 0 else minus) for v, plus, minus in ways if abs(v) > SMALL * largest]
    if not told:
        return "does not move"
    return "moves " + ", ".join(f"{show(abs(value), page.shown.length)} {word}" for value, word in told)


def _across(part: object, level: bool) -> Iterator[tuple[float, str, str]]:
    """Movements across the shaft: value, words where it is positive and where it is negative."""
    up, front = ("up", "down"), ("to the front", "to the back")
    y, z = part.up, part.front  # type: ignore[attr-defined]
    if not isinstance(part, GearMovement):
        if level:
            yield y, *up
            yield z, *front
        else:
            clock = f"towards {clock_hours(y, z)}"
            yield float(np.hypot(y, z)), clock, clock
        return
    _, mate_y, mate_z = part.towards_mate
    if level and abs(mate_z) > ALIGNED:
        yield y, *up
    elif level and abs(mate_y) > ALIGNED:
        yield z, *front
    elif part.sense:
        yield part.tangential, "along the pitch circle with the turning", "along the pitch circle against the turning"
    else:
        beside = float(part.u[:3] @ np.array(part.along))
        clock = f"towards {clock_hours(*(np.sign(beside) * np.array(part.along[1:])))}"
        yield abs(beside), clock, clock
    yield part.separation, "away from its mate", "towards its mate"


def along(page: Page, shaft: str, k: int) -> list[str]:
    """The largest values along a shaft, and where."""
    line, shown, told = page.results.lines[shaft], page.shown, []
    quiet = noise(page, shaft, k)
    for quantity, dimension in (
        ("deflection", "length"), ("slope", "angle"), ("bending_moment", "moment"), ("torque", "moment")
    ):  # fmt: skip
        value, x = (float(found[k]) for found in largest_along(line, quantity))
        if value > quiet[dimension]:
            place = (
                "" if quantity == "torque" else f" at {show(x, shown.along)}"
            )  # a torque is the same along a stretch
            told.append(f"{quantity.replace('_', ' ')} {show(value, getattr(shown, dimension))}{place}")
    if not told:
        return []
    return paragraph(f"Largest along {page.names(40)[shaft]}: {', '.join(told)}.", "  ")


# ---- by hand


def by_hand(page: Page, k: int) -> list[str]:
    """The line that can be checked by hand, for each shaft where statics decides."""
    lines: list[str] = []
    head = f"By hand ({page.shown.force}, {page.shown.along}): "
    for shaft in page.on:
        check = hand_check(page.results, shaft, k)
        if check is not None:
            where = f"{page.names(24)[shaft]}, " if page.several else ""
            sentence = hand_sentence(page.results, check, page.shown, page.names(24))
            lines += paragraph(where + sentence, "        ", first=head)
    return lines
