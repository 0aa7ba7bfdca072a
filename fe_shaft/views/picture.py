"""A picture as a PNG file, without a display and without a graphics card."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from fe_shaft.errors import UsageError
from fe_shaft.files import write_whole
from fe_shaft.views.halves import halves
from fe_shaft.views.scene import Scene

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Comparison
    from fe_shaft.results.results import Results

SIZE = (1600, 900)
SMALLEST, LARGEST = 320, 8000  # pixels


def picture(
    results: Results | Comparison,
    path: str | Path,
    *,
    case: str | None = None,
    pins: Results | None = None,
    quantity: str = "deflection",
    size: tuple[int, int] = SIZE,
) -> Path:
    """Write a picture of the bent shafts as PNG; see `fe_shaft.views.view` for what it shows.

    Parameters
    ----------
    results : Results or Comparison
        Drawn on the right, or alone; a comparison with rigid pins brings both halves.
    path : path
        Ends in .png.
    case : str or None
        Name of the case; the first one if None.
    pins : Results or None
        Of the same model on rigid pins, drawn as the left half with the same exaggeration and colours.
    quantity : str
        What the shafts are coloured by: "deflection", "slope", "axial movement", "twist", "bending moment",
        "shear force", "torque", "axial force".
    size : (width, height) [px]
        Of the picture; letters grow with the height.

    Returns
    -------
    Path
        The file, written whole or not at all.

    Raises
    ------
    UsageError
        Unknown case or quantity, a size or a kind of file that cannot be made, no way to draw on this machine.
    FileError
        The file cannot be written.
    """
    target = Path(path)
    if target.suffix.lower() != ".png":
        raise UsageError(f"{target}: pictures are written as PNG only. Write {target.with_suffix('.png').name}.")
    if not all(SMALLEST <= side <= LARGEST for side in size):
        raise UsageError(f"a picture of {size[0]} x {size[1]} pixels: each side takes {SMALLEST} to {LARGEST}.")
    right, left = halves(results, pins)
    scene = Scene(right, left, case=case, quantity=quantity, size=size)
    try:
        content = scene.png()
    finally:
        scene.close()
    write_whole(target, content)
    return target
