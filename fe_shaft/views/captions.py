"""What is written on a half: title, exaggeration with the true movement, labels, hours, scale, colour bar.

Every number comes from the results.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any, NamedTuple

import numpy as np

from fe_shaft.results.of_shoulders import of_shoulders
from fe_shaft.results.shown import Shown as Units
from fe_shaft.units import show, unit_factor
from fe_shaft.views.arrows import Tail
from fe_shaft.views.camera import Eye
from fe_shaft.views.drawing import Drawing, Floats
from fe_shaft.views.labels import MOST, Wish, leader_end, place, shorten
from fe_shaft.views.meshes import COLOURS
from fe_shaft.views.overlay import BLACK, DARK_GREY, Overlay
from fe_shaft.views.quantities import COLOURINGS, factor_text, longest_125, round_values

if TYPE_CHECKING:
    from fe_shaft.results.line import Line
    from fe_shaft.results.results import Results

LINE_HEIGHT = 1.45  # of the font
LONGEST_NAME = 24  # letters of a part's name
CLEARLY = 1.05  # how much farther a place without a name must move to be named instead
SCALE_LINE = 0.22  # of the half's width, at most
BAR_COLOURS = 96

Box = tuple[float, float, float, float]


@dataclass
class Shown:
    """What a half shows at present: number of the case, exaggeration, quantity and range of the colours."""

    case: int = 0
    factor: float = 1.0
    quantity: str = "deflection"
    limits: tuple[float, float] = (0.0, 1.0)


class Captions:
    """The writing of one half.

    Parameters
    ----------
    overlay : where it is written
    results, drawing : what it is about
    heading : ``rigid pins`` or ``bearings as given``
    """

    def __init__(self, overlay: Overlay, results: Results, drawing: Drawing, heading: str) -> None:
        self.overlay = overlay
        self.results = results
        self.units = Units.of(results.model)
        self.drawing = drawing
        self.heading = heading

    def write_head(self, shown: Shown, size: tuple[float, float]) -> Box:
        """Title, what the half shows, case; and always how far the movement is exaggerated. Returns the box taken."""
        font = self.overlay.font
        step, left, top = LINE_HEIGHT * font, 0.9 * font, size[1] - 1.7 * font
        largest = largest_movement(self.results, self.drawing, shown.case)
        factor = f"drawn x {factor_text(shown.factor)}; true: {largest.text}"
        room = size[0] - 3 * left - self.overlay.size(factor, bold=True)[0]
        rows = {
            "title": self._fitting(self.results.model.title or "shaft", room),
            "heading": self.heading,
            "case": f"case {shorten(called_cases(self.results)[shown.case], 40)}",
        }
        for number, (key, text) in enumerate(rows.items()):
            self.overlay.write(key, text, (left, top - number * step), bold=key == "heading")
        self.overlay.write("factor", factor, (size[0] - left, top), bold=True, align="right")
        if self.results.plain is not None:
            made = f"of it by shoulders: {show(largest.by_shoulders, self.units.length)}"
            self.overlay.write("made", made, (size[0] - left, top - step), align="right")
        if self.results.beyond_range:
            self.overlay.write("doubt", "beyond their rule: see notes", (size[0] - left, top - 2 * step), align="right")
        return (0.0, top - 2.4 * step, size[0], size[1])

    def _fitting(self, text: str, room: float) -> str:
        """A text, cut in its middle if it is wider than the room [px]."""
        for longest in range(min(len(text), 200), 8, -1):
            cut = shorten(text, longest)
            if self.overlay.size(cut)[0] <= room:
                return cut
        return shorten(text, 8)

    def write_hours(self, eye: Eye, size: tuple[float, float]) -> None:
        """12, 3, 6 and 9 around every clock."""
        for shaft, clock in enumerate(self.drawing.clocks):
            at = eye.pixels(clock.hours, size)
            for hour, (x, y) in zip((12, 3, 6, 9), at, strict=True):
                where = (float(x), float(y) - 0.4 * self.overlay.font)
                look: dict[str, Any] = {"align": "middle", "colour": DARK_GREY, "bold": True}
                self.overlay.write(f"hour {shaft} {hour}", str(hour), where, **look)

    def write_labels(
        self,
        shown: Shown,
        eye: Eye,
        size: tuple[float, float],
        tails: Sequence[Tail],
        boxes: Sequence[Any],
        *,
        named: bool,
    ) -> None:
        """Labels of arrows and of parts (the largest values first), clear of each other and of the boxes [px]."""
        font = self.overlay.font
        self.overlay.remove("label ")
        wishes: list[tuple[str, Wish]] = []
        for tail in tails:  # first, since a number far from its arrow says little; a part's label has its leader
            (x, y), end = eye.pixels(tail.point, size), eye.pixels(tail.point + tail.away, size)
            wish = Wish((x, y), self.overlay.size(tail.text), (end[0] - x, end[1] - y), reach=0.35 * font)
            wishes.append((tail.text, wish))
        for point, text in part_labels(self.results, self.drawing, shown)[:MOST] if named else ():
            x, y = eye.pixels(point, size)
            wishes.append((text, Wish((x, y), self.overlay.size(text), reach=1.6 * font)))
        edge = 0.5 * font
        corners = place([wish for _, wish in wishes], (edge, edge, size[0] - edge, size[1] - edge), boxes)
        leaders = []
        for number, ((text, wish), corner) in enumerate(zip(wishes, corners, strict=True)):
            if corner is not None:
                self.overlay.write(f"label {number}", text, corner, veil=0.75)
                end = leader_end(corner, wish.size, wish.anchor)
                if number >= len(tails) or np.hypot(*(end - wish.anchor)) > 1.5 * font:
                    leaders.append([end, wish.anchor])
        self.overlay.lines("leaders", leaders)

    def write_scale(self, shown: Shown, eye: Eye, size: tuple[float, float]) -> Box:
        """A line whose length is a round movement at this exaggeration. Returns the box taken."""
        font, per_metre = self.overlay.font, eye.pixels_per_metre(size) * shown.factor
        unit = unit_factor("length", self.units.length)
        movement = longest_125(SCALE_LINE * size[0] / per_metre / unit) * unit
        x, y, long = 1.5 * font, 1.6 * font, movement * per_metre
        ends = [[(end, y - 0.4 * font), (end, y + 0.4 * font)] for end in (x, x + long)]
        self.overlay.lines("scale", [[(x, y), (x + long, y)], *ends], width=2.0, colour=BLACK)
        text = f"{show(movement, self.units.length)} at this exaggeration"
        self.overlay.write("scale", text, (x + long + font, y - 0.4 * font))
        return (0.0, 0.0, x + long + 2 * font + self.overlay.size(text)[0], 2.6 * font)

    def write_bar(self, shown: Shown, size: tuple[float, float]) -> Box:
        """Colours with quantity and unit at the right edge. Returns the box taken."""
        font, (low, high) = self.overlay.font, shown.limits
        colouring = COLOURINGS[shown.quantity]
        left, bottom, right, top = size[0] - 5.2 * font, 0.24 * size[1], size[0] - 4.2 * font, 0.70 * size[1]
        self.overlay.bands("bar", (left, bottom, right, top), _colours(BAR_COLOURS))
        edge = size[0] - 0.6 * font
        self.overlay.write("bar name", colouring.name, (edge, top + 2.2 * font), align="right")
        unit = f"[{colouring.unit_in(self.units)}], true"
        self.overlay.write("bar unit", unit, (edge, top + 0.8 * font), align="right")
        self.overlay.remove("bar tick")
        ticks = []
        for number, value in enumerate(round_values(low, high)):
            y = bottom + (top - bottom) * (value - low) / (high - low)
            ticks.append([(right, y), (right + 0.35 * font, y)])
            self.overlay.write(f"bar tick {number}", f"{value:g}", (right + 0.55 * font, y - 0.4 * font))
        self.overlay.lines("bar ticks", ticks, colour=BLACK)
        widest = max(self.overlay.size(text)[0] for text in (colouring.name, unit))
        return (min(left, edge - widest) - 0.5 * font, bottom - font, size[0], top + 4 * font)


def called_cases(results: Results) -> list[str]:
    """What pictures call the cases: their labels, else their names."""
    labels = {case.name: case.label for case in results.model.cases}
    return [labels.get(name) or name for name in results.cases]


class Largest(NamedTuple):
    """The largest movement of a half: what is said of it, and how much of it the shoulders make [m]."""

    value: float
    text: str
    by_shoulders: float


def largest_movement(results: Results, drawing: Drawing, case: int) -> Largest:
    """The largest movement, as the results have it: ``39.7 um at pinion``; of a place without a name if it is clearly
    larger there.
    """
    units = Units.of(results.model)
    best = Largest(0.0, f"0 {units.length}", 0.0)
    for mark in drawing.marks:
        part = results[mark.name].in_case(case)
        for name, word in (("deflection", ""), ("axial", " axial")):
            value = abs(part.value(name))
            if value > best.value:
                text = f"{show(value, units.length)}{word} at {shorten(mark.called, LONGEST_NAME)}"
                made = float(np.sign(part.value(name)) * of_shoulders(results, mark.name)[name][case])
                best = Largest(value, text, made)
    for name, line in results.lines.items():
        far = int(np.argmax(line.deflection[case]))
        value = float(line.deflection[case, far])
        if value > CLEARLY * best.value:
            plain = value if results.plain is None else float(results.plain.lines[name].deflection[case, far])
            best = Largest(
                value, f"{show(value, units.length)} at {_station(name, line, far, units.along)}", value - plain
            )
    return best


def _station(shaft: str, line: Line, number: int, unit: str) -> str:
    """A station in words: ``layshaft.right``, ``125 mm of layshaft``."""
    name = shorten(shaft, LONGEST_NAME)
    end = {0: f"{name}.left", len(line.x) - 1: f"{name}.right"}
    return end.get(number) or f"{show(float(line.x[number]), unit)} of {name}"


def part_labels(results: Results, drawing: Drawing, shown: Shown) -> list[tuple[Floats, str]]:
    """Where each part is drawn (3,) and what its label says, largest values first."""
    name = COLOURINGS[shown.quantity].part
    unit, rows = Units.of(results.model).unit(name), []
    for mark in drawing.marks:
        value = results[mark.name].in_case(shown.case).value(name)
        point = mark.point + shown.factor * mark.movement(shown.case)
        text = f"{shorten(mark.called, LONGEST_NAME)} {show(value, unit)}"
        rows.append((abs(value), point, text))
    return [(point, text) for _, point, text in sorted(rows, key=lambda row: -row[0])]


def _colours(count: int) -> Any:
    """Colours from the lowest to the highest value, (count, 3) uint8."""
    from matplotlib import colormaps

    return np.round(255 * colormaps[COLOURS](np.linspace(0, 1, count))[:, :3]).astype(np.uint8)
