"""A contour file to the points that a shaft's `contour` takes."""

from __future__ import annotations

import os
from typing import Any

from fe_shaft.io.model_source import Source
from fe_shaft.io.model_tables import contour_rows

DRAWINGS = (".dxf", ".dwg")


def read_contour(path: str | os.PathLike[str], *, layer: str | None = None, unit: str | None = None) -> list[Any]:
    """Read a shaft's contour out of a table (CSV) or a drawing (DXF).

    Parameters
    ----------
    path : path-like
        A drawing if it ends in ``.dxf``: lines, arcs and polylines of the half contour above the axis y = 0, from left
        to right, with the bore below the outer line. Else a table with the columns x, diameter, bore, fillet.
    layer : str, optional
        Layer of the drawing; may be left out if one layer alone has lines off the axis.
    unit : str, optional
        Unit of a drawing that states none ($INSUNITS), such as ``"mm"``.

    Returns
    -------
    list
        Points as `Shaft` takes them: ``fs.Shaft("layshaft", contour=fs.read_contour("layshaft.dxf"), ...)``.

    Raises
    ------
    ModelError
        If the file holds no contour; its sentence names the entity and the place.
    FileError
        If it cannot be read.
    UsageError
        If a drawing is named and ezdxf is not installed.
    """
    return contour_points(Source.named(path), layer, unit)[0]


def contour_points(source: Source, layer: object = None, unit: object = None) -> tuple[list[Any], list[int] | None]:
    """The points in a contour file, and the line of each; a drawing has none."""
    if source.path.suffix.lower() in DRAWINGS:
        return _drawn(source, layer, unit), None
    for key, word in (("contour_layer", layer), ("contour_unit", unit)):
        if word is not None:
            raise source.error(None, f"{key} is for drawings (DXF), and this is a table. Leave it out.")
    return contour_rows(source)


def _drawn(source: Source, layer: object, unit: object) -> list[Any]:
    """The points of a drawing."""
    from fe_shaft.io.contour.chains import half_contour  # with scipy, which tables do without
    from fe_shaft.io.contour.drawing import drawing
    from fe_shaft.io.contour.outline import corners, with_fillets
    from fe_shaft.io.contour.points import points

    drawn = drawing(source, layer, unit)
    half = half_contour(drawn, lambda sentence: source.error(None, sentence))
    outer = corners(with_fillets(half.outer, drawn.same))
    return points(outer, [corners(bore) for bore in half.bores], drawn.unit)
