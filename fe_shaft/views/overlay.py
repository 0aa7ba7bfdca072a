"""What is written and drawn flat on one half of the picture, in its own pixels from its lower left corner."""

from __future__ import annotations

from collections.abc import Sequence
from functools import cache
from pathlib import Path
from typing import Any

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]
Colour = tuple[float, float, float]

BLACK: Colour = (0.0, 0.0, 0.0)
DARK_GREY: Colour = (0.25, 0.25, 0.25)
LEADER_GREY: Colour = (0.45, 0.45, 0.45)
VTK_FONT_FILE = 4  # the text property's family "from a file"


@cache
def _font_file(bold: bool) -> str:
    """DejaVu Sans, which matplotlib brings: it has the signs of many alphabets."""
    import matplotlib

    return str(Path(matplotlib.get_data_path()) / "fonts" / "ttf" / f"DejaVuSans{'-Bold' if bold else ''}.ttf")


class Overlay:
    """Texts and lines over one renderer. A text is replaced when its key is written again.

    Parameters
    ----------
    renderer : the half's renderer
    font : int [px]
    """

    def __init__(self, renderer: Any, font: int) -> None:
        import vtkmodules.vtkRenderingFreeType  # noqa: F401  registers the text renderer that is asked for below
        from vtkmodules.vtkRenderingCore import vtkTextRenderer

        # Plain text: a "$" or "|" in a name is no formula.
        vtkTextRenderer.GetInstance().SetDefaultBackend(vtkTextRenderer.FreeType)
        self.renderer = renderer
        self.font = font
        self._texts: dict[str, Any] = {}
        self._sizes: dict[tuple[str, bool, int], tuple[float, float]] = {}
        self._drawn: dict[str, Any] = {}

    def write(
        self,
        key: str,
        text: str,
        at: tuple[float, float],
        *,
        bold: bool = False,
        align: str = "left",
        colour: Colour = BLACK,
        scale: float = 1.0,
        veil: float = 0.0,
    ) -> None:
        """Write a text with its lower left, middle or right end at a place; ``veil`` whitens what lies behind it."""
        actor = self._texts.get(key) or self._new_text(key)
        actor.SetInput(text)
        style = actor.GetTextProperty()
        style.SetFontFile(_font_file(bold))
        style.SetFontSize(round(self.font * scale))
        style.SetColor(colour)
        style.SetBackgroundColor(1.0, 1.0, 1.0)
        style.SetBackgroundOpacity(veil)
        width = self.size(text, bold=bold, scale=scale)[0]
        left = at[0] - {"left": 0.0, "middle": 0.5, "right": 1.0}[align] * width
        actor.SetPosition(left, at[1])
        actor.SetVisibility(True)

    def remove(self, prefix: str) -> None:
        """Hide every text whose key begins so."""
        for key, actor in self._texts.items():
            if key.startswith(prefix):
                actor.SetVisibility(False)

    def texts(self) -> dict[str, str]:
        """What can be read, by key."""
        return {key: actor.GetInput() for key, actor in self._texts.items() if actor.GetVisibility()}

    def size(self, text: str, *, bold: bool = False, scale: float = 1.0) -> tuple[float, float]:
        """Width and height of a text [px]."""
        key = (text, bold, round(self.font * scale))
        if key not in self._sizes:
            from vtkmodules.vtkRenderingCore import vtkTextActor

            actor = vtkTextActor()
            actor.SetInput(text)
            actor.GetTextProperty().SetFontFamily(VTK_FONT_FILE)
            actor.GetTextProperty().SetFontFile(_font_file(bold))
            actor.GetTextProperty().SetFontSize(key[2])
            measured = [0.0, 0.0]
            actor.GetSize(self.renderer, measured)
            self._sizes[key] = (measured[0], measured[1])
        return self._sizes[key]

    def lines(self, key: str, segments: Sequence[Any], *, width: float = 1.0, colour: Colour = LEADER_GREY) -> None:
        """Straight lines, (n, 2, 2) [px]; replaces the lines of the same key."""
        import pyvista as pv

        flat = np.zeros((2 * len(segments), 3))
        if len(segments):
            flat[:, :2] = np.asarray(segments, dtype=float).reshape(-1, 2)
        pairs = np.arange(len(flat)).reshape(-1, 2)
        cells = np.column_stack([np.full(len(pairs), 2), pairs]).ravel()
        actor = self._flat(key, pv.PolyData(flat, lines=cells) if len(flat) else pv.PolyData())
        actor.GetProperty().SetLineWidth(width)
        actor.GetProperty().SetColor(colour)

    def bands(self, key: str, box: tuple[float, float, float, float], colours: NDArray[np.uint8]) -> None:
        """Coloured bands stacked from the bottom to the top of a box (left, bottom, right, top) [px]."""
        import pyvista as pv

        left, bottom, right, top = box
        n = len(colours)
        y = bottom + (top - bottom) * np.arange(n + 1) / n
        points = np.stack([np.tile([left, right], n + 1), np.repeat(y, 2), np.zeros(2 * n + 2)], axis=1)
        k = 2 * np.arange(n)
        faces = np.stack([np.full(n, 4), k, k + 1, k + 3, k + 2], axis=1)
        mesh = pv.PolyData(points, faces=faces.ravel())
        mesh.cell_data["colour"] = colours
        self._flat(key, mesh)

    def _flat(self, key: str, mesh: Any) -> Any:
        from vtkmodules.vtkRenderingCore import vtkActor2D, vtkPolyDataMapper2D

        if key not in self._drawn:
            actor = vtkActor2D()
            actor.SetMapper(vtkPolyDataMapper2D())
            self.renderer.AddViewProp(actor)
            self._drawn[key] = actor
        actor = self._drawn[key]
        actor.GetMapper().SetInputData(mesh)
        return actor

    def _new_text(self, key: str) -> Any:
        from vtkmodules.vtkRenderingCore import vtkTextActor

        actor = vtkTextActor()
        actor.GetTextProperty().SetFontFamily(VTK_FONT_FILE)
        actor.GetPositionCoordinate().SetCoordinateSystemToViewport()
        actor.SetLayerNumber(1)
        self.renderer.AddViewProp(actor)
        self._texts[key] = actor
        return actor
