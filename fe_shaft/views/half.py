"""One half of the picture: one result in one case, exaggerated and coloured."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

import numpy as np

from fe_shaft.results.shown import Shown as Units
from fe_shaft.views import meshes, shapes
from fe_shaft.views.arrows import Arrows, draw_arrows
from fe_shaft.views.camera import Eye
from fe_shaft.views.captions import Captions, Shown
from fe_shaft.views.draughtsman import Draughtsman
from fe_shaft.views.drawing import Floats, Piece
from fe_shaft.views.overlay import Overlay
from fe_shaft.views.quantities import COLOURINGS
from fe_shaft.views.shapes import Shape
from fe_shaft.views.symbols import turning_arrow

if TYPE_CHECKING:
    from fe_shaft.results.results import Results

ARROW_WIDTH = 0.36  # of the font
SLICES = 16  # boxes that keep labels off a shaft


@dataclass
class _Moved:
    """A mesh on the screen, its points at rest, and their movement in the case shown."""

    mesh: Any
    rest: Floats
    movement: Floats


class Half:
    """One renderer's content.

    Parameters
    ----------
    plotter : pyvista's plotter, with the half's renderer active
    results : Results
    heading : what this half shows, ``rigid pins`` or ``bearings as given``
    font : int [px]
    pen : float, factor on the widths of lines in space: 2 where the picture is drawn twice as large and reduced
    """

    def __init__(self, plotter: Any, results: Results, heading: str, font: int, *, pen: float = 1.0) -> None:
        self.results = results
        self.units = Units.of(results.model)
        self.renderer = plotter.renderer
        self.drawing = Draughtsman(results).draw()
        self.overlay = Overlay(self.renderer, font)
        self.captions = Captions(self.overlay, results, self.drawing, heading)
        self.switched = {"ghost": True, "forces": True, "labels": True}
        self.shown = Shown()
        self._skins, self._skin_actors = self._add_skins(plotter)
        self._pieces = self._add_pieces(plotter, pen)
        loose = ("ghost", "paper", "filled", "hollow", "bent", "clock")
        self._loose = {style: meshes.add(plotter, meshes.poly(_DOT), style, pen) for style in loose}
        self._turned: list[Floats] = []

    def _add_skins(self, plotter: Any) -> tuple[list[_Moved], list[Any]]:
        moved, actors = [], []
        for skin in self.drawing.skins:
            mesh = meshes.skin_mesh(skin.body, skin.frame)
            actors.append(meshes.add_skin(plotter, mesh))
            rest = np.array(mesh.points)
            moved.append(_Moved(mesh, rest, np.zeros_like(rest)))
        return moved, actors

    def _add_pieces(self, plotter: Any, pen: float) -> list[tuple[_Moved, list[Piece]]]:
        """One mesh for all pieces of one style."""
        added = []
        for style in ("steel", "ring", "glass", "ink", "pin", "clock"):
            pieces = [piece for piece in self.drawing.pieces if piece.style == style]
            if pieces:
                whole = shapes.merge(piece.shape for piece in pieces)
                mesh = meshes.poly(whole)
                meshes.add(plotter, mesh, style, pen)
                added.append((_Moved(mesh, whole.points, np.zeros_like(whole.points)), pieces))
        return added

    # ---- what is shown

    def show_case(self, case: int) -> None:
        """Take another case."""
        self.shown.case = case
        self._turned = []
        for skin, moved in zip(self.drawing.skins, self._skins, strict=True):
            moved.movement, turned = skin.case(case)
            self._turned.append(turned)
        for moved, pieces in self._pieces:
            moved.movement = np.concatenate([piece.moved(case) for piece in pieces])
        self.exaggerate(self.shown.factor)

    def exaggerate(self, factor: float) -> None:
        """Draw ``rest + factor * movement``: one linear map for everything that moves."""
        self.shown.factor = factor
        for moved in [*self._skins, *(moved for moved, _ in self._pieces)]:
            moved.mesh.points = moved.rest + factor * moved.movement
        for skin, moved, turned in zip(self.drawing.skins, self._skins, self._turned, strict=True):
            meshes.set_normals(moved.mesh, skin.frame.vector(skin.body.normals) + factor * turned)

    def values(self, quantity: str) -> list[Floats]:
        """True values of a quantity on the rings of every shaft, in its unit."""
        case, colouring = self.shown.case, COLOURINGS[quantity]
        return [colouring.values(skin.u[case], skin.force[case], self.units) for skin in self.drawing.skins]

    def colour_by(self, quantity: str, limits: tuple[float, float]) -> None:
        """Colour the shafts by a quantity, over a range that both halves share."""
        self.shown.quantity, self.shown.limits = quantity, limits
        for skin, moved, values in zip(self.drawing.skins, self._skins, self.values(quantity), strict=True):
            moved.mesh.point_data["value"] = values[skin.body.ring]
            moved.mesh.set_active_scalars("value")
        for actor in self._skin_actors:
            actor.mapper.scalar_range = limits

    def largest_movement(self) -> float:
        """Largest movement of any shaft's axis in the case shown [m]."""
        case = self.shown.case
        return max(float(np.linalg.norm(line.u[case, :, :3], axis=1).max()) for line in self.results.lines.values())

    def largest_force(self) -> float:
        """Largest force drawn in the case shown [N]."""
        case = self.shown.case
        return max((float(np.linalg.norm(arrow.force[case])) for arrow in self.drawing.arrows), default=0.0)

    def size(self) -> tuple[float, float]:
        """Width and height of the half [px]."""
        width, height = self.renderer.GetSize()
        return float(width), float(height)

    # ---- what depends on the view

    def refresh(self, eye: Eye, largest_force: float, taken: Sequence[Any]) -> None:
        """Draw anew what turns with the eye (outlines, arrows) and what is written.

        Parameters
        ----------
        eye : Eye
            The present view.
        largest_force : float [N]
            Of both halves, drawn longest.
        taken : boxes [px]
            Places where no label may go.
        """
        size = self.size()
        self._set("ghost", self._ghosts(eye) if self.switched["ghost"] else [])
        self._set("clock", self._turning())
        arrows = self._arrows(eye, largest_force) if self.switched["forces"] else Arrows()
        for style, drawn in arrows.shapes.items():
            self._set(style, drawn)
        boxes = [*taken, self.captions.write_head(self.shown, size)]
        self.captions.write_hours(eye, size)
        boxes += self._in_the_way(eye, arrows)
        self.captions.write_labels(self.shown, eye, size, arrows.tails, boxes, named=self.switched["labels"])

    def _ghosts(self, eye: Eye) -> list[Shape]:
        """Outlines of the straight shafts, as the eye sees them."""
        outlines = []
        for skin in self.drawing.skins:
            towards, line = eye.towards @ skin.frame.rotation, skin.line
            side = np.arctan2(towards[1], -towards[2])
            shape = shapes.outline(line.x, line.diameter_left, line.diameter_right, [side, side + np.pi])
            outlines.append(skin.frame.shape(shape))
        return outlines

    def _turning(self) -> list[Shape]:
        """Arrows on the clocks of the shafts that turn."""
        senses = [(clock, clock.sense(self.shown.case)) for clock in self.drawing.clocks]
        return [clock.frame.shape(turning_arrow(clock.x, clock.radius, sense)) for clock, sense in senses if sense]

    def _arrows(self, eye: Eye, largest: float) -> Arrows:
        width = ARROW_WIDTH * self.overlay.font / eye.pixels_per_metre(self.size())
        return draw_arrows(self.drawing, self.shown.case, self.shown.factor, eye, largest, width, self.units)

    def _set(self, style: str, drawn: Sequence[Shape]) -> None:
        actor, shape = self._loose[style], shapes.merge(drawn)
        actor.SetVisibility(len(shape.points) > 0)
        if len(shape.points):
            actor.mapper.SetInputData(meshes.poly(shape))

    def _in_the_way(self, eye: Eye, arrows: Arrows) -> list[Floats]:
        """Boxes of the screen that labels keep clear of: shafts and arrows as drawn, slice by slice, and clocks."""
        size, font = self.size(), self.overlay.font
        boxes = []
        for moved in self._skins:
            at = eye.pixels(np.asarray(moved.mesh.points), size)
            slices = np.array_split(np.argsort(moved.rest @ eye.right), SLICES)
            boxes += [np.concatenate([at[part].min(axis=0), at[part].max(axis=0)]) for part in slices]
        for clock in self.drawing.clocks:
            at = eye.pixels(clock.hours, size)
            boxes.append(np.concatenate([at.min(axis=0) - 0.7 * font, at.max(axis=0) + 0.7 * font]))
        for path in arrows.paths:
            at = eye.pixels(path, size)
            low, high = np.minimum(at[1:], at[:-1]) - 3, np.maximum(at[1:], at[:-1]) + 3
            boxes += list(np.concatenate([low, high], axis=1))
        return boxes


_DOT = shapes.bare(np.zeros((1, 3)))
