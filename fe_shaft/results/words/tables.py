"""Tables of one case and one shaft: movements, forces, seats."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from fe_shaft.model.actions import gravity_in_shaft, shaft_mass
from fe_shaft.model.case import ONLY_CASE
from fe_shaft.model.groups import noun
from fe_shaft.model.support import Bearing
from fe_shaft.results.movement import GearMovement, SupportMovement
from fe_shaft.results.of_shoulders import of_shoulders
from fe_shaft.results.words.layout import Column, fitting, shortened, table
from fe_shaft.results.words.page import Page
from fe_shaft.results.words.wording import NOTHING, clock_hours, is_level, number
from fe_shaft.units import show

Array = NDArray[np.float64]


def noise(page: Page, shaft: str, k: int) -> dict[str, float]:
    """Below these sizes a value of a case is rounding, by dimension."""
    results, line = page.results, page.results.lines[shaft]
    movement = max((float(np.abs(results.parts[name].u[k, :3]).max()) for name in page.on[shaft]), default=0.0)
    angle = max((float(np.abs(results.parts[name].u[k, 3:]).max()) for name in page.on[shaft]), default=0.0)
    force = max(
        [float(np.abs(a.wrench[k, :3]).max()) for a in results.actions if a.shaft == shaft]
        + [float(np.abs(s.wrench[k, :3]).max()) for s in _supports(page, shaft)],
        default=0.0,
    )
    moment = max(
        [float(np.abs(a.wrench[k, 3:]).max()) for a in results.actions if a.shaft == shaft]
        + [float(np.abs(s.wrench[k, 3:]).max()) for s in _supports(page, shaft)],
        default=0.0,
    )
    length = line.length
    return {
        "length": NOTHING * max(movement, angle * length),
        "angle": NOTHING * max(angle, movement / length),
        "force": NOTHING * max(force, moment / length),
        "moment": NOTHING * max(moment, force * length),
    }


def _supports(page: Page, shaft: str) -> list[SupportMovement[Array]]:
    parts = (page.results.parts[name] for name in page.on[shaft])
    return [part for part in parts if isinstance(part, SupportMovement)]


def _directions(page: Page, shaft: str) -> tuple[str, str]:
    return ("up(12)", "front(3)") if is_level(page.results.model, shaft) else ("to 12", "to 3")


class Cells:
    """Cells of numbers with their rounding left out."""

    def __init__(self, page: Page, shaft: str, k: int) -> None:
        self._noise, self._shown = noise(page, shaft, k), page.shown

    def column(
        self, head: str, dimension: str, values: Sequence[float | None], *, sign: bool = False, digits: int = 3
    ) -> Column:
        """A column of values [SI]; None stays empty."""
        unit: str = getattr(self._shown, dimension)
        noise = self._noise.get(dimension, 0.0)
        loud = [None if value is None else value * (abs(value) > noise) for value in values]
        return Column(head, unit, tuple("" if v is None else number(v, unit, sign=sign, digits=digits) for v in loud))


def movement(page: Page, shaft: str, k: int) -> list[str]:
    """Table of the movements of all parts of a shaft."""
    parts = [page.results.parts[name].in_case(k) for name in page.on[shaft]]
    cells, (up, front) = Cells(page, shaft, k), _directions(page, shaft)
    tilts = [part.tilt if isinstance(part, SupportMovement) else None for part in parts]
    columns = [
        cells.column("at", "along", [page.results.model.places[name].x for name in page.on[shaft]], digits=4),
        cells.column("radial", "length", [part.deflection for part in parts]),
        cells.column(up, "length", [part.up for part in parts], sign=True),
        cells.column(front, "length", [part.front for part in parts], sign=True),
        cells.column("axial", "length", [part.axial for part in parts], sign=True),
        cells.column("slope", "angle", [part.slope for part in parts]),
        cells.column("twist", "angle", [part.twist for part in parts], sign=True),
        cells.column("tilt", "angle", tilts),
        *_by_shoulders(page, shaft, k, cells),
    ]
    moving = [n for n in range(len(parts)) if any(column.cells[n] not in ("", "0") for column in columns[1:])]
    if not moving:
        return [f"Nothing moves on {page.names(40)[shaft]}."]
    columns = [replace(column, cells=tuple(column.cells[n] for n in moving)) for column in columns]
    lines = _drawn(page, "Movement", shaft, k, [page.on[shaft][n] for n in moving], columns)
    return [*lines, *_bodies(page, shaft, k)]


def _bodies(page: Page, shaft: str, k: int) -> list[str]:
    """What of the movement of gears their bodies make."""
    gears = [page.results.parts[name] for name in page.on[shaft]]
    return [
        f"  of it {page.names(24)[gear.name]}'s body: {show(gear.body_movement[k], page.shown.length)}, "
        f"{show(gear.body_tilt[k], page.shown.angle)}"
        for gear in gears
        if isinstance(gear, GearMovement) and gear.body[k].any()
    ]


def _by_shoulders(page: Page, shaft: str, k: int, cells: Cells) -> list[Column]:
    """How much of the radial movement and of the slope is the shoulders' doing; nothing where none counts."""
    if page.results.plain is None:
        return []
    made = [of_shoulders(page.results, name) for name in page.on[shaft]]
    return [
        cells.column("shoulders", "length", [float(of["deflection"][k]) for of in made], sign=True),
        cells.column("add", "angle", [float(of["slope"][k]) for of in made], sign=True),
    ]


def forces(page: Page, shaft: str, k: int) -> list[str]:
    """Table of what the supports and the loads do to a shaft; its columns add up to nothing."""
    results, model = page.results, page.results.model
    supports = [(s.name, noun(model[s.name]), s.wrench[k]) for s in _supports(page, shaft)]
    acts = sorted((a for a in results.actions if a.shaft == shaft and a.wrench[k].any()), key=lambda a: a.x)
    loads = [(a.part, a.kind, a.wrench[k]) for a in acts]
    gravity = gravity_in_shaft(model, shaft)
    if gravity.any():
        loads.append((shaft, "weight", np.append(shaft_mass(model, shaft)[0] * gravity, np.zeros(3))))
    rows = [*supports, *loads]
    cells, (up, front) = Cells(page, shaft, k), _directions(page, shaft)
    wrench = np.array([row[2] for row in rows]).reshape(-1, 6)
    quiet = noise(page, shaft, k)["force"]
    towards = ["" if np.hypot(*w[1:3]) <= quiet else clock_hours(w[1], w[2]) for w in wrench]
    tilts = [float(np.hypot(*row[2][4:])) if k < len(supports) else None for k, row in enumerate(rows)]
    columns = [
        cells.column(up, "force", list(wrench[:, 1]), sign=True),
        cells.column(front, "force", list(wrench[:, 2]), sign=True),
        cells.column("axial", "force", list(wrench[:, 0]), sign=True),
        cells.column("radial", "force", list(np.hypot(wrench[:, 1], wrench[:, 2]))),
        Column("towards", "", tuple(towards), "left"),
        cells.column("torque", "moment", list(wrench[:, 3]), sign=True),
        cells.column("moment", "moment", tilts),
    ]
    return _drawn(
        page, "Forces on the shaft", shaft, k, [row[0] for row in rows], columns, kinds=[row[1] for row in rows]
    )


def rolling(page: Page, shaft: str, k: int) -> list[str]:
    """Table of what the balls and rollers of computed bearings bear; nothing without any."""
    found = [page.results.rolling[name] for name in page.on[shaft] if name in page.results.rolling]
    if not found:
        return []
    cells = Cells(page, shaft, k)
    names = [each.name for each in found]
    columns = [
        Column("carry", "", tuple(f"{each.carrying[k]} of {each.number} {each.word}" for each in found), "left"),
        cells.column("most", "force", [float(each.most[k]) for each in found]),
        Column("pressure", "MPa", tuple(number(float(each.peak_pressure[k]), "MPa") for each in found)),
        Column("contact", "deg", tuple(number(float(each.steepest[k]), "deg", digits=2) for each in found)),
        Column("tangent", "N/um", tuple(_stiffness(each.tangent_stiffness[k]) for each in found)),
        Column("secant", "N/um", tuple(_stiffness(each.secant_stiffness[k]) for each in found)),
    ]
    return _drawn(page, "Rolling elements", shaft, k, names, columns)


def _stiffness(value: float) -> str:
    return "-" if np.isnan(value) else number(float(value), "N/um")


def seats(page: Page, shaft: str, k: int) -> list[str]:
    """Table of what the seats do, bores out of line included; nothing where they stand still."""
    moved = [
        part.in_case(k)
        for part in _supports(page, shaft)
        if part.seat[k].any() and (_has_seat(page, part.name) or part.seat[k, [1, 2, 4, 5]].any())
    ]
    if not moved:
        return []
    cells, (up, front) = Cells(page, shaft, k), _directions(page, shaft)
    seat = np.array([part.seat for part in moved])
    columns = [
        cells.column("radial", "length", list(np.hypot(seat[:, 1], seat[:, 2]))),
        cells.column(up, "length", list(seat[:, 1]), sign=True),
        cells.column(front, "length", list(seat[:, 2]), sign=True),
        cells.column("axial", "length", list(seat[:, 0]), sign=True),
        cells.column("tilt", "angle", list(np.hypot(seat[:, 4], seat[:, 5]))),
    ]
    lines = _drawn(page, "Movement of the seats", shaft, k, [part.name for part in moved], columns)
    out_of_line = any(page.results.model[part.name].offset or page.results.model[part.name].bore_tilt for part in moved)
    return [*lines, "  (bores out of line are part of it)"] if out_of_line else lines


def _has_seat(page: Page, name: str) -> bool:
    support = page.results.model[name]
    return isinstance(support, Bearing) and support.seat is not None


def _drawn(
    page: Page,
    what: str,
    shaft: str,
    k: int,
    rows: Sequence[str],
    columns: Sequence[Column],
    kinds: Sequence[str] | None = None,
) -> list[str]:
    """A table of named rows, with what each is; columns that say nothing are left out."""
    used = [column for column in columns if column.says_something]
    case = page.results.cases[k]

    def make(width: int, gap: int) -> list[str]:
        names = page.names(width)
        cells = [names[row] for row in rows]
        if kinds is not None:
            widest = max(map(len, cells), default=0)
            cells = [f"{cell:<{widest}}  {kind}" for cell, kind in zip(cells, kinds, strict=True)]
        title = page.title(what, shaft, width)
        return table([Column(title, "" if case == ONLY_CASE else names[case], tuple(cells), "left"), *used], gap=gap)

    return shortened(fitting(make), len(rows), 2)
