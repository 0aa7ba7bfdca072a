"""The window: one or two halves under one eye, a slider for the exaggeration, the list of cases, and keys."""

from __future__ import annotations

import os
import sys
from collections.abc import Callable
from math import log10
from pathlib import Path
from typing import TYPE_CHECKING

import numpy as np

from fe_shaft.errors import FileError, UsageError
from fe_shaft.files import write_whole
from fe_shaft.views.captions import LINE_HEIGHT, called_cases, part_labels
from fe_shaft.views.graphics import on_screen, quiet
from fe_shaft.views.halves import halves
from fe_shaft.views.labels import shorten
from fe_shaft.views.overlay import Overlay
from fe_shaft.views.quantities import COLOURINGS, FACTORS, factor_text
from fe_shaft.views.scene import Scene

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Comparison
    from fe_shaft.results.results import Results

SIZE = (1600, 900)
STRIP = 84.0  # pixels for the slider
NEAR = 45.0  # pixels from a part at which the mouse shows its label
INSTEAD = "Write a picture instead: --picture FILE.png, or fs.picture(results, FILE) in a script."
WHITE = np.full((1, 3), 255, dtype=np.uint8)
KEYS = (
    ("1-9", "case"),
    ("p", "rigid pins on and off"),
    ("g", "straight shaft on and off"),
    ("f", "forces on and off"),
    ("l", "labels on and off"),
    ("q", "next quantity"),
    ("r", "first view again"),
    ("s", "save the picture"),
    ("h", "these keys on and off"),
    ("Esc", "close"),
)


def view(
    results: Results | Comparison,
    *,
    case: str | None = None,
    pins: Results | None = None,
    quantity: str = "deflection",
    size: tuple[int, int] = SIZE,
) -> None:
    """Open a window with the bent shafts and wait until it is closed.

    Left rigid pins, right the bearings as given, if the results with pins are given too; both turn together. Every
    number shown is a true one; how far the movement is exaggerated is always written at the top. The key ``h`` lists
    all keys.

    Parameters
    ----------
    results : Results or Comparison
        Drawn on the right, or alone; a comparison with rigid pins brings both halves.
    case : str or None
        Name of the case to begin with; the first one if None.
    pins : Results or None
        Of the same model on rigid pins.
    quantity : str
        What the shafts are coloured by; see `fe_shaft.views.picture`.
    size : (width, height) [px]
        Of the window.

    Raises
    ------
    UsageError
        Unknown case or quantity, or no display.
    """
    right, left = halves(results, pins)
    Window(right, left, case=case, quantity=quantity, size=size).open()


class Window:
    """A scene in a window that answers.

    Parameters
    ----------
    as for `view`
    """

    def __init__(
        self,
        results: Results,
        pins: Results | None = None,
        *,
        case: str | None = None,
        quantity: str = "deflection",
        size: tuple[int, int] = SIZE,
    ) -> None:
        if sys.platform.startswith("linux") and not os.environ.get("DISPLAY"):
            raise UsageError(f"there is no display for a window here. {INSTEAD}")
        self.results = results
        size = on_screen(size)
        self.scene = Scene(results, pins, case=case, quantity=quantity, size=size, off_screen=False, strip=STRIP)
        self.plotter = self.scene.plotter
        self._refuse_no_window()
        self._with_keys = False
        self._list_width = 0.0
        self._message = ""
        self._add_slider()
        self._listen()
        self._write_cases()

    def open(self, *, wait: bool = True) -> None:
        """Show the window; with ``wait``, until it is closed."""
        self.scene.refresh()
        with quiet():
            self.plotter.show(title=self.results.model.title or "fe_shaft", interactive=wait, auto_close=wait)

    def close(self) -> None:
        """Close the window and free what it holds."""
        self.scene.close()

    def press(self, key: str) -> None:
        """What a key does; keys without a meaning do nothing."""
        if key in "123456789" and len(key) == 1:
            self.show_case(int(key) - 1)
        elif key in self._actions:
            self._actions[key]()
        else:
            return
        self.redraw()

    def show_case(self, number: int) -> None:
        """Show a case by its number, counted from 0; one that does not exist changes nothing."""
        if number < len(self.results.cases):
            self.scene.show_case(number)
            self._write_cases()

    def exaggerate(self, factor: float) -> None:
        """Draw the movement so many times as large; the slider follows."""
        self.scene.exaggerate(factor)
        self._slider.GetRepresentation().SetValue(log10(factor))
        self._write_factor()

    def redraw(self) -> None:
        """Bring everything on the screen up to date."""
        self.scene.refresh()
        self._write_factor()
        with quiet():
            self.plotter.render()

    # ---- inside

    def _refuse_no_window(self) -> None:
        """On a display that cannot be opened the library draws unseen instead, and would wait for ever."""
        if sys.platform.startswith("linux") and "XOpenGL" not in type(self.plotter.render_window).__name__:
            self.scene.close()
            raise UsageError(f"the display {os.environ['DISPLAY']} cannot be opened for a window. {INSTEAD}")

    @property
    def _actions(self) -> dict[str, Callable[[], None]]:
        return {
            "p": self._toggle_pins,
            "g": lambda: self.scene.toggle("ghost"),
            "f": lambda: self.scene.toggle("forces"),
            "l": lambda: self.scene.toggle("labels"),
            "q": self._next_quantity,
            "r": self.scene.first_view,
            "s": self._save,
            "h": self._toggle_keys,
            "Escape": self._leave,
        }

    def _add_slider(self) -> None:
        self.plotter.subplot(1, 0)
        top = max(FACTORS[1], self.scene.factor)
        self._slider = self.plotter.add_slider_widget(
            self._slide,
            rng=(log10(FACTORS[0]), log10(top)),
            value=log10(self.scene.factor),
            pointa=(0.30, 0.62),
            pointb=(0.95, 0.62),
            interaction_event="always",
            slider_width=0.30,
            tube_width=0.04,
            color="black",
        )
        shown = self._slider.GetRepresentation()
        shown.ShowSliderLabelOff()
        shown.SetSliderLength(0.012)
        shown.SetEndCapLength(0.003)
        shown.SetEndCapWidth(0.15)
        shown.GetTubeProperty().SetColor(0.6, 0.6, 0.6)
        shown.SetTitleText("")
        self._strip = Overlay(self.plotter.renderer, self.scene.font)
        self._write_factor()

    def _slide(self, value: float) -> None:
        self.scene.exaggerate(10.0**value)
        if hasattr(self, "_strip"):
            self.scene.refresh()
            self._write_factor()

    def _write_factor(self) -> None:
        font, (width, height) = self.scene.font, self._strip.renderer.GetSize()
        self._strip.write("factor", f"drawn x {factor_text(self.scene.factor)}", (0.9 * font, 0.55 * height), bold=True)
        for mark in (1, 10, 100, 1000, 5000):
            share = log10(mark) / log10(max(FACTORS[1], self.scene.factor))
            at = (0.30 + 0.65 * share) * width
            self._strip.write(f"mark {mark}", str(mark), (at, 0.12 * height), align="middle", scale=0.85)
        self._strip.write("help", self._message or "h: all keys", (0.9 * font, 0.12 * height), scale=0.85)

    def _listen(self) -> None:
        interactor = self.plotter.iren
        interactor.clear_key_event_callbacks()
        style = interactor.interactor.GetInteractorStyle()
        style.AddObserver("CharEvent", lambda *_: None)  # the style's own keys would close, fly or change the drawing
        interactor.add_observer("KeyPressEvent", lambda caller, _: self.press(caller.GetKeySym()))
        interactor.add_observer("MouseMoveEvent", lambda caller, _: self._hover(*caller.GetEventPosition()))
        self.plotter.render_window.AddObserver("StartEvent", lambda *_: self.scene.refresh())

    def _write_cases(self) -> None:
        """List of the cases at the left edge, the present one bold."""
        for half in self.scene.halves:
            half.overlay.remove("case list")
        half, font = self.scene.shown_halves[0], self.scene.font
        height = half.size()[1]
        top = height - 6.2 * font
        widest = 0.0
        rows = called_cases(self.results)[:9]
        for number, name in enumerate(rows):
            present = number == self.scene.case
            text = f"{number + 1}  {shorten(name, 24)}"
            at = (0.9 * font, top - number * LINE_HEIGHT * font)
            half.overlay.write(f"case list {number}", text, at, bold=present, scale=0.9)
            widest = max(widest, half.overlay.size(text, bold=True)[0])
        if len(self.results.cases) > 9:
            more = f"and {len(self.results.cases) - 9} more (--case NAME)"
            half.overlay.write("case list more", more, (0.9 * font, top - 9 * LINE_HEIGHT * font), scale=0.9)
        self._list_width = widest + 2 * font
        bottom = top - (len(rows) + 0.5) * LINE_HEIGHT * font
        self.scene.taken["first"] = [(0.0, bottom, self._list_width, height)]

    def _next_quantity(self) -> None:
        names = list(COLOURINGS)
        self.scene.colour_by(names[(names.index(self.scene.quantity) + 1) % len(names)])

    def _toggle_pins(self) -> None:
        self.scene.toggle_pins()
        self._write_cases()

    def _toggle_keys(self) -> None:
        self._with_keys = not self._with_keys
        half, font = self.scene.halves[-1], self.scene.font
        half.overlay.remove("keys")
        self.scene.taken["last"] = []
        if self._with_keys:
            left = self._list_width if half is self.scene.shown_halves[0] else 0.0
            top = half.size()[1] - 4.6 * font
            rows = [top - (1.6 + number * LINE_HEIGHT) * font for number in range(len(KEYS))]
            panel = (left + 0.4 * font, rows[-1] - 0.6 * font, left + 18 * font, top)
            half.overlay.bands("keys", panel, WHITE)  # first, so that it lies under the text
            for y, (key, meaning) in zip(rows, KEYS, strict=True):
                half.overlay.write(f"keys {key}", key, (left + 0.9 * font, y), bold=True)
                half.overlay.write(f"keys {key} means", meaning, (left + 4.0 * font, y))
            self.scene.taken["last"] = [panel]
        else:
            half.overlay.bands("keys", (0.0, 0.0, 0.0, 0.0), WHITE)
        self.scene.look_again()

    def _save(self) -> None:
        """Write the picture beside where the program was started, under a name that is free."""
        name = self.results.cases[self.scene.case]
        stem = "".join(sign if sign.isalnum() or sign in "-_" else "_" for sign in name)[:40] or "case"
        path = next(path for path in (Path(f"{stem}_{k}.png") for k in range(1, 10_000)) if not path.exists())
        try:
            write_whole(path, self.scene.png())
            self._message = f"saved {path}"
        except FileError as error:
            self._message = str(error)

    def _hover(self, x: float, y: float) -> None:
        """Label of the part under the mouse, for those that found no room on the screen."""
        strip = self._strip.renderer.GetSize()[1]
        left = 0.0
        eye = self.scene.eye()
        for half in self.scene.shown_halves:
            size = half.size()
            here = np.array([x - left, y - strip])
            left += size[0]
            labels = part_labels(half.results, half.drawing, half.shown)
            half.overlay.remove("hover")
            if not labels or not 0 <= here[0] <= size[0]:
                continue
            away = [float(np.linalg.norm(eye.pixels(point, size) - here)) for point, _ in labels]
            nearest = int(np.argmin(away))
            if away[nearest] < NEAR:
                half.overlay.write("hover", labels[nearest][1], (here[0] + 14, here[1] + 8), veil=0.9)
        with quiet():
            self.plotter.render()

    def _leave(self) -> None:
        self.plotter.iren.terminate_app()
