"""Draws a result: knows where each part sits, how it looks and how it moves.

Sizes that a model does not state (the rings of a bearing known by its stiffness alone, a pin, a mass) are symbols of a
plausible size; nothing is read from them.
"""

from __future__ import annotations

from collections.abc import Iterator
from math import cos, pi, sin
from typing import TYPE_CHECKING, Any

import numpy as np

from fe_shaft.model.support import Pin
from fe_shaft.results.body import line_fields, revolve, section_movement
from fe_shaft.views import shapes
from fe_shaft.views.drawing import Arrow, Clock, Drawing, Floats, Mark, Movement, Piece, ShaftSkin, Stance
from fe_shaft.views.shapes import Shape
from fe_shaft.views.symbols import clock

if TYPE_CHECKING:
    from fe_shaft.results.results import Results

OPEN_FROM, OPEN_SWEEP = np.deg2rad(35.0), np.deg2rad(110.0)  # the sector left out of a bearing's rings, towards the eye
TOOTH_LINES_AT = np.deg2rad(65.0)  # middle of the tooth lines: where the eye sees them
RINGS = {"inner": (1.0, 1.3), "outer": (1.85, 2.2)}  # radii of a bearing's rings over the journal's
BEARING = 2.2  # outer radius of a bearing, or of a pin's triangles, over the journal's
COUPLING = 1.6  # outer radius of a coupling over the journal's
RING_WIDTH = 0.6  # of the journal's diameter, where no width is known
STEEL_DENSITY = 7850.0  # kg/m^3, for the ball that stands for a mass
AROUND = 64
CONTOUR_POINTS = 600


class Draughtsman:
    """Draws one result: knows where each part sits and how it moves."""

    def __init__(self, results: Results) -> None:
        self.results = results
        self.model: Any = results.model
        frames = self.model.frames
        self.frames = {name: Stance(frames[name].origin, frames[name].rotation) for name in results.lines}

    def draw(self) -> Drawing:
        """The whole drawing."""
        skins = tuple(self._skins())
        clocks = tuple(self._clocks())
        rings = [Piece("clock", each.frame.shape(clock(each.x, each.radius)[0])) for each in clocks]
        pieces = (*self._supports(), *self._gears(), *self._wheels(), *self._masses(), *rings)
        length = max(float(line.x[-1]) for line in self.results.lines.values())
        return Drawing(skins, pieces, tuple(self._arrows()), tuple(self._marks()), clocks, length)

    # ---- places

    def radius_at(self, shaft: str, x: float) -> float:
        """Outer radius of a shaft at a place, the larger one at a step [m]."""
        line = self.results.lines[shaft]
        k = int(np.clip(np.searchsorted(line.x, x, side="right") - 1, 0, len(line.x) - 2))
        share = (x - line.x[k]) / (line.x[k + 1] - line.x[k])
        here = (1 - share) * line.diameter_right[k] + share * line.diameter_left[k + 1]
        return float(max(here, line.diameter_left[k] if share <= 0 else 0.0)) / 2

    def _carried(self, name: str, points: Floats, moved_as: str = "part") -> Movement:
        """Movement in the model of points of the shaft's frame: with a part on its shaft, or with a support's seat."""
        place, frame = self.model.places[name], self.frames[self.model.places[name].shaft]
        if moved_as == "seat":
            u, x = self.results[name].seat, place.x + load_centre(self.model[name])
        else:
            u, x = self.results[name].u, place.x
        arm = points - np.array([x, 0.0, 0.0])

        def movement(case: int) -> Floats:
            return frame.vector(section_movement(u[case], arm))

        return movement

    def _on(self, name: str, style: str, shape: Shape, *, moved_as: str = "part") -> Piece:
        frame = self.frames[self.model.places[name].shaft]
        return Piece(style, frame.shape(shape), self._carried(name, shape.points, moved_as))

    # ---- shafts

    def _skins(self) -> Iterator[ShaftSkin]:
        for name, line in self.results.lines.items():
            body = revolve(line, around=AROUND, rings=CONTOUR_POINTS, smooth=80, sharp=True)
            yield ShaftSkin(name, self.frames[name], line, body, *line_fields(line, body.places))

    def _clocks(self) -> Iterator[Clock]:
        for name, line in self.results.lines.items():
            radius = max(0.6 * float(line.diameter_right.max()), 0.08 * float(line.x[-1]))
            x = -0.09 * float(line.x[-1]) - 0.55 * radius
            frame = self.frames[name]
            senses = tuple(self._sense(name, case) for case in range(len(self.results.cases)))
            yield Clock(frame, x, radius, frame.point(clock(x, radius)[1]), senses)

    def _sense(self, shaft: str, case: int) -> int:
        """How a shaft turns, or is pushed, in a case; 0 where no power passes through it."""
        if not self.model.cases:
            return 0
        entry = self.model.cases[case]
        on_it = any(self.model.places[end].shaft == shaft for end in (*entry.enters_shares, *entry.leaves_shares))
        return int(entry.sense) if on_it else 0

    # ---- supports

    def _supports(self) -> Iterator[Piece]:
        for support in self.model.supports:
            yield from self._pin(support) if isinstance(support, Pin) else self._bearing(support)

    def _extent(self, part: Any, share: float) -> tuple[float, float]:
        """Left and right face of a part; `share` of the journal's diameter wide where the model states no width."""
        place = self.model.places[part.name]
        if place.right > place.left:
            return place.left, place.right
        half = share * self.radius_at(place.shaft, place.x)
        return place.x - half, place.x + half

    def _bearing(self, bearing: Any) -> Iterator[Piece]:
        place = self.model.places[bearing.name]
        journal = self.radius_at(place.shaft, place.x)
        left, right = self._extent(bearing, RING_WIDTH)
        kept = {"start": OPEN_FROM + OPEN_SWEEP, "sweep": 2 * pi - OPEN_SWEEP}
        for ring, (inner, outer) in RINGS.items():
            size = (left, right, inner * journal, outer * journal)
            moved_as = "part" if ring == "inner" else "seat"
            yield self._on(bearing.name, "ring", shapes.cut_ring(*size, **kept), moved_as=moved_as)
            yield self._on(bearing.name, "ink", shapes.ring_edges(*size, **kept), moved_as=moved_as)

    def _pin(self, pin: Any) -> Iterator[Piece]:
        place = self.model.places[pin.name]
        journal = self.radius_at(place.shaft, place.x)
        for side in (1.0, -1.0):
            tip, foot = np.array([place.x, side * journal, 0.0]), np.array([place.x, side * BEARING * journal, 0.0])
            yield self._on(pin.name, "pin", shapes.cone(tip, foot, 0.6 * journal), moved_as="seat")

    # ---- wheels and masses

    def _gears(self) -> Iterator[Piece]:
        for gear in self.model.gears:
            left, right, first, last = self._pitch_surface(gear)
            helix = 0.0 if gear.helix is None else gear.helix.angle.si * gear.helix.sign
            yield self._on(gear.name, "glass", shapes.wall(left, right, first, last))
            lines = shapes.tooth_lines(left, right, first, last, helix, middle=TOOTH_LINES_AT)
            yield self._on(gear.name, "ink", lines + shapes.circle(left, first) + shapes.circle(right, last))

    def _pitch_surface(self, gear: Any) -> tuple[float, float, float, float]:
        """Left and right end of a pitch cylinder or cone, and its radius there [m]."""
        left, right = self._extent(gear, RING_WIDTH)
        radius = gear.reference_diameter / 2
        if gear.form != "bevel":
            return left, right, radius, radius
        middle, half, delta = (left + right) / 2, (right - left) / 2, gear.pitch_cone_angle.si
        along, out = half * cos(delta), half * sin(delta) * (1 if gear.apex == "left" else -1)
        return middle - along, middle + along, max(radius - out, 0.0), max(radius + out, 0.0)

    def _wheels(self) -> Iterator[Piece]:
        for wheel in (*self.model.pulleys, *self.model.sprockets):
            left, right = self._extent(wheel, RING_WIDTH)
            radius = wheel.reference_diameter / 2
            yield self._on(wheel.name, "glass", shapes.wall(left, right, radius, radius))
            yield self._on(wheel.name, "ink", shapes.circle(left, radius) + shapes.circle(right, radius))
        for coupling in self.model.couplings:
            place = self.model.places[coupling.name]
            journal = self.radius_at(place.shaft, place.x)
            left, right = self._extent(coupling, 1.0)
            rim = COUPLING * journal
            profile = [(left, rim), (right, rim), (right, journal), (left, journal)]
            yield self._on(coupling.name, "steel", shapes.turned(profile))

    def _masses(self) -> Iterator[Piece]:
        for mass in self.model.masses:
            place, centre = self.model.places[mass.name], np.array(self.model.cg(mass.name))
            seat = np.array([place.x, 0.0, 0.0])
            ball = self._ball(mass, place.shaft)
            yield self._on(mass.name, "steel", shapes.ball(centre, ball))
            if np.linalg.norm(centre - seat) > 0.0:
                yield self._on(mass.name, "ink", shapes.polyline([seat, centre]))
                yield self._on(mass.name, "steel", shapes.rod(seat, centre, 0.15 * ball))

    def _ball(self, mass: Any, shaft: str) -> float:
        """Radius of the ball of steel that has the mass, kept in sight and out of the way [m]."""
        length = float(self.results.lines[shaft].x[-1])
        widest = 0.4 * float(self.results.lines[shaft].diameter_right.max())
        return float(
            np.clip((3 * mass.mass.si / (4 * pi * STEEL_DENSITY)) ** (1 / 3), 0.02 * length, max(widest, 0.03 * length))
        )

    # ---- forces and names

    def _arrows(self) -> Iterator[Arrow]:
        lone = {mass.name for mass in self.model.masses}
        for action in self.results.actions:
            frame = self.frames[action.shaft]
            point = np.array([action.x, 0.0, 0.0]) + action.arm
            on_axis = not action.arm[1:].any()
            clear = self.radius_at(action.shaft, action.x) if on_axis and action.part not in lone else 0.0
            if action.part in lone:
                clear = self._ball(self.model[action.part], action.shaft)
            force, couple = frame.vector(action.force), frame.vector(action.couple)
            around = self._outer(self.model[action.part])
            moved, axis = self._carried(action.part, point), frame.rotation[:, 0]
            yield Arrow(action.part, False, frame.point(point), moved, force, couple, clear, around, axis)
        for support in self.model.supports:
            yield self._reaction(support)

    def _reaction(self, support: Any) -> Arrow:
        place = self.model.places[support.name]
        frame = self.frames[place.shaft]
        wrench = self.results[support.name].wrench
        point = np.array([place.x + load_centre(support), 0.0, 0.0])
        clear = BEARING * self.radius_at(place.shaft, place.x)
        moved, force = self._carried(support.name, point), frame.vector(wrench[:, :3])
        no_couple, axis = np.zeros_like(force), frame.rotation[:, 0]
        return Arrow(support.name, True, frame.point(point), moved, force, no_couple, clear, clear, axis)

    def _marks(self) -> Iterator[Mark]:
        for part in self._named():
            place = self.model.places[part.name]
            point = np.array([place.x, self._outline(part), 0.0])
            at = self.frames[place.shaft].point(point)
            yield Mark(part.name, part.label or part.name, at, self._carried(part.name, point))

    def _named(self) -> list[Any]:
        model = self.model
        groups = (model.gears, model.supports, model.pulleys, model.sprockets, model.couplings, model.masses)
        return [part for group in (*groups, model.forces) for part in group]

    def _outer(self, part: Any) -> float:
        """Radius of what is drawn of a part close to the shaft: a coupling, else the shaft itself."""
        place = self.model.places[part.name]
        return (COUPLING if part in self.model.couplings else 1.0) * self.radius_at(place.shaft, place.x)

    def _outline(self, part: Any) -> float:
        """Radius at which a part's label points."""
        journal = self.radius_at(self.model.places[part.name].shaft, self.model.places[part.name].x)
        if part in (*self.model.gears, *self.model.pulleys, *self.model.sprockets):
            return float(max(part.reference_diameter / 2, journal))
        return RINGS["inner"][1] * journal if part in self.model.supports else journal


def load_centre(support: Any) -> float:
    """Distance of a support's load centre to the right of its ring's middle [m]."""
    return 0.0 if support.load_centre is None else float(support.load_centre.si)
