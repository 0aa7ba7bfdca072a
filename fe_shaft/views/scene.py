"""The whole picture: one half or two (rigid pins, bearings as given) under one eye, with one range of colours."""

from __future__ import annotations

from collections.abc import Sequence
from io import BytesIO
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import UsageError, nearest, quote
from fe_shaft.model.support import Pin
from fe_shaft.views.arrows import reach
from fe_shaft.views.camera import Eye, axes, fit
from fe_shaft.views.graphics import new_plotter, quiet
from fe_shaft.views.half import Half
from fe_shaft.views.quantities import COLOURINGS, common_range, first_factor

if TYPE_CHECKING:
    from fe_shaft.results.results import Results

Floats = NDArray[np.float64]

FONT_OF_HEIGHT = 1 / 52  # font over the picture's height: 17 pixels at 900
SMALLEST_FONT = 11


class Scene:
    """Everything on the screen, without the window around it.

    Parameters
    ----------
    results : Results
    pins : Results or None
        Of the same model with rigid pins; None draws one half only.
    case : str or None, the first case if None
    quantity : str, what the shafts are coloured by
    size : (width, height) [px]
    off_screen : bool
    strip : float [px], height left free at the bottom for a slider
    """

    def __init__(
        self,
        results: Results,
        pins: Results | None = None,
        *,
        case: str | None = None,
        quantity: str = "deflection",
        size: tuple[int, int] = (1600, 900),
        off_screen: bool = True,
        strip: float = 0.0,
    ) -> None:
        self.results = results
        self.quantity = known_quantity(quantity)
        number = 0 if case is None else results.case_number(case)
        self.plotter = new_plotter(size, off_screen, halves=1 if pins is None else 2, strip=strip)
        self.halves: list[Half] = []
        font = max(SMALLEST_FONT, round(size[1] * FONT_OF_HEIGHT))
        pairs = [(each, heading_of(each)) for each in (pins, results) if each is not None]
        for index, (result, heading) in enumerate(pairs):
            self.plotter.subplot(0, index)
            self.halves.append(Half(self.plotter, result, heading, font, pen=2.0 if off_screen else 1.0))
        self.font = font
        self.strip = strip
        self.taken: dict[str, list[Sequence[float]]] = {"first": [], "last": []}
        self.scale_line = strip == 0.0
        self._seen: object = None
        self._drawn = not off_screen
        for half in self.halves:
            half.show_case(number)
        self.exaggerate(first_factor(max(half.largest_movement() for half in self.halves), self._length()))
        self.first_view()
        self._recolour()

    @property
    def case(self) -> int:
        """Number of the case shown."""
        return self.halves[0].shown.case

    @property
    def factor(self) -> float:
        """Exaggeration."""
        return self.halves[0].shown.factor

    def show_case(self, number: int) -> None:
        """Show another case, with the exaggeration as it is."""
        for half in self.halves:
            half.show_case(number)
        self._recolour()

    def exaggerate(self, factor: float) -> None:
        """Draw the movement so many times as large."""
        for half in self.halves:
            half.exaggerate(factor)
        self._seen = None

    def colour_by(self, quantity: str) -> None:
        """Colour the shafts by another quantity."""
        self.quantity = known_quantity(quantity)
        self._recolour()

    def toggle(self, what: str) -> None:
        """Show or hide "ghost", "forces" or "labels"."""
        for half in self.halves:
            half.switched[what] = not half.switched[what]
        self._seen = None

    @property
    def shown_halves(self) -> list[Half]:
        """The halves on the screen, from the left."""
        return [half for half in self.halves if half.renderer.GetDraw()]

    def toggle_pins(self) -> None:
        """Show the half with rigid pins beside the other, or the other one alone over the whole width."""
        if len(self.halves) < 2:
            return
        pins, bearings = (half.renderer for half in self.halves)
        alone = bool(pins.GetDraw())
        pins.SetDraw(not alone)
        _, bottom, _, top = bearings.GetViewport()
        bearings.SetViewport(0.0 if alone else 0.5, bottom, 1.0, top)
        self._recolour()

    def eye(self) -> Eye:
        """The present view, as the camera has it."""
        camera = self.halves[0].renderer.camera
        focus = np.array(camera.focal_point)
        right, up, towards = axes(np.array(camera.position) - focus, np.array(camera.up))
        return Eye(focus, right, up, towards, float(camera.parallel_scale))

    def refresh(self) -> None:
        """Bring what depends on the view up to date; costs nothing when the view is as it was."""
        eye = self.eye()
        seen = (*eye.focus, *eye.up, *eye.towards, eye.half_height, *self.halves[-1].size())
        if seen == self._seen:
            return
        self._seen = seen
        halves = self.shown_halves
        largest = max(half.largest_force() for half in halves)
        for half in halves:
            taken = list(self.taken["first"]) if half is halves[0] else []
            if half is halves[-1]:
                taken += [*self.taken["last"], half.captions.write_bar(half.shown, half.size())]
            if self.scale_line:
                taken.append(half.captions.write_scale(half.shown, eye, half.size()))
            half.refresh(eye, largest, taken)

    def look_again(self) -> None:
        """Write and place everything anew at the next refresh, though the view is as it was."""
        self._seen = None

    def png(self) -> bytes:
        """The picture as it is now, as the content of a PNG file."""
        self.refresh()
        content = BytesIO()
        with quiet():
            if self._drawn:  # the first screenshot draws by itself
                self.plotter.render()
            self._drawn = True
            self.plotter.screenshot(content, return_img=False)
        return content.getvalue()

    def close(self) -> None:
        """Free what the drawing holds."""
        with quiet():
            self.plotter.close()

    # ---- inside

    def _length(self) -> float:
        return max(half.drawing.length for half in self.halves)

    def _recolour(self) -> None:
        values = [each for half in self.shown_halves for each in half.values(self.quantity)]
        limits = common_range(values)
        for half in self.halves:
            half.colour_by(self.quantity, limits)
        self._seen = None

    def first_view(self) -> None:
        """Everything in view, with room for what is written."""
        half = self.halves[-1]
        points = [piece.shape.points for piece in half.drawing.pieces]
        points += [skin.frame.point(skin.body.points) for skin in half.drawing.skins]
        cloud = np.concatenate([*points, *self._arrow_ends(half)])
        font = self.font
        margins = (1.5 * font, 4.0 * font, 6.5 * font, 7.0 * font)
        eye = fit(cloud, half.drawing.skins[0].frame.rotation, half.size(), margins)
        distance = 10 * self._length()
        for each in self.halves:
            camera = each.renderer.camera
            camera.parallel_projection = True
            camera.focal_point = tuple(eye.focus)
            camera.position = tuple(eye.focus + distance * eye.towards)
            camera.up = tuple(eye.up)
            camera.parallel_scale = eye.half_height
        if len(self.halves) > 1:
            self.plotter.link_views([0, 1])
        for each in self.halves:
            each.renderer.reset_camera_clipping_range()
            each.renderer.camera_set = True

    @staticmethod
    def _arrow_ends(half: Half) -> list[Floats]:
        """Tails of the arrows, so that they are in view too, (1, 3) each."""
        case, largest, ends = half.shown.case, half.largest_force(), []
        for arrow in half.drawing.arrows:
            force = arrow.force[case]
            long = reach(force, half.drawing.length, largest)
            if long > 0.0:
                ends.append((arrow.point - (long + arrow.clear) * force / np.linalg.norm(force))[None])
        return ends


def known_quantity(name: str) -> str:
    """The name itself, or a UsageError with the nearest right one."""
    if name not in COLOURINGS:
        raise UsageError(f"{quote(name)} is no quantity to colour by. {nearest(name, COLOURINGS)}")
    return name


def heading_of(results: Results) -> str:
    """What a half shows."""
    rigid = all(isinstance(support, Pin) for support in results.model.supports)
    return "rigid pins" if rigid else "bearings as given"
