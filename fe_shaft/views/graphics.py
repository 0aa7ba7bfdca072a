"""The door to the graphics library: a plotter with or without a display, and no remarks of its own on the terminal."""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from typing import Any

from fe_shaft.errors import UsageError

ROOM = 0.93  # of the screen, for a window without its frame


def new_plotter(size: tuple[int, int], off_screen: bool, *, halves: int, strip: float) -> Any:
    """Plotter with one or two halves beside each other and, above the lower edge, a strip for the slider."""
    with quiet():
        import pyvista as pv

        kinds: dict[str, Any] = {"shape": (1, halves)}
        if strip:
            share = strip / size[1]
            kinds = {"shape": (2, halves), "row_weights": [1 - share, share], "groups": [(1, slice(None))]}
        plotter: Any = pv.Plotter(off_screen=off_screen, window_size=list(size), border=False, **kinds)
        _refuse_no_graphics(plotter)
        plotter.set_background("white", all_renderers=True)
        if off_screen:
            plotter.enable_anti_aliasing("ssaa", all_renderers=True)
        else:  # one sample: the slider answers more than twice as fast where there is no graphics card
            plotter.enable_anti_aliasing("msaa", multi_samples=1, all_renderers=True)
    return plotter


def on_screen(size: tuple[int, int]) -> tuple[int, int]:
    """A window's size, made smaller in proportion where the screen is smaller; its frame needs some room as well."""
    with quiet():
        import vtkmodules.vtkRenderingOpenGL2
        from vtkmodules.vtkRenderingCore import vtkRenderWindow

        assert vtkmodules.vtkRenderingOpenGL2  # brings the window of this machine
        screen = vtkRenderWindow().GetScreenSize()
    share = min(1.0, *(ROOM * most / side for most, side in zip(screen, size, strict=True)))
    return (round(share * size[0]), round(share * size[1])) if share > 0.0 else size


def _refuse_no_graphics(plotter: Any) -> None:
    """The library's last resort is OSMesa, and without it the process would crash at the first drawing."""
    from ctypes.util import find_library

    if "OSOpenGL" in type(plotter.render_window).__name__ and find_library("OSMesa") is None:
        raise UsageError(
            "nothing can be drawn here: neither a display nor EGL nor OSMesa was found. "
            "Install one of them (Debian: apt install libegl1), or run under xvfb-run."
        )


@contextmanager
def quiet() -> Iterator[None]:
    """Keep the graphics library's remarks off the terminal: without a display it tries one way after the other."""
    from vtkmodules.vtkCommonCore import vtkLogger, vtkObject

    shown, warned = vtkLogger.GetCurrentVerbosityCutoff(), vtkObject.GetGlobalWarningDisplay()
    vtkLogger.SetStderrVerbosity(vtkLogger.VERBOSITY_OFF)
    vtkObject.GlobalWarningDisplayOff()
    try:
        yield
    finally:
        vtkLogger.SetStderrVerbosity(shown)
        vtkObject.SetGlobalWarningDisplay(warned)
