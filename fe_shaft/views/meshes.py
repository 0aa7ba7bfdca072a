"""Shapes as pyvista's meshes, and how each style looks. Only the shafts are coloured, all else is grey or black."""

from __future__ import annotations

from typing import Any

import numpy as np

from fe_shaft.results.body import Body
from fe_shaft.views.drawing import Stance
from fe_shaft.views.shapes import Shape

STYLES: dict[str, dict[str, Any]] = {
    "steel": {"color": (0.66, 0.68, 0.71)},
    "ring": {"color": (0.80, 0.82, 0.84), "ambient": 0.35, "diffuse": 0.7},
    "glass": {"color": (0.55, 0.58, 0.62), "opacity": 0.22},
    "ink": {"color": (0.15, 0.15, 0.15), "line_width": 1.6, "lighting": False},
    "pin": {"color": (0.05, 0.05, 0.05)},
    "clock": {"color": (0.3, 0.3, 0.3), "line_width": 2.0, "lighting": False},
    "ghost": {"color": (0.5, 0.5, 0.5), "line_width": 1.0, "lighting": False},
    "paper": {"color": (1.0, 1.0, 1.0), "lighting": False},
    "filled": {"color": (0.0, 0.0, 0.0), "lighting": False},
    "hollow": {"color": (0.0, 0.0, 0.0), "line_width": 2.0, "lighting": False},
    "bent": {"color": (0.0, 0.0, 0.0), "lighting": False},
}
IN_FRONT = {"paper": 50_000.0, "filled": 60_000.0, "hollow": 66_000.0}  # steps of depth nearer to the eye
COLOURS = "cividis"  # Nunez, Anderton and Renslow 2018: even steps for the colour-blind too (from memory)


def poly(shape: Shape) -> Any:
    """A shape as a mesh."""
    import pyvista as pv

    faces, lines = _counted(shape.triangles), _counted(shape.lines)
    mesh = pv.PolyData(shape.points.copy(), faces=faces if len(faces) else None, lines=lines if len(lines) else None)
    if shape.normals.any():
        set_normals(mesh, shape.normals)
    return mesh


def skin_mesh(body: Body, frame: Stance) -> Any:
    """The surface of a shaft at rest, with a value at every point."""
    import pyvista as pv

    faces = np.concatenate([_counted(body.quads), _counted(body.triangles)])
    mesh = pv.PolyData(frame.point(body.points), faces=faces)
    mesh.point_data["value"] = np.zeros(len(body.points))
    set_normals(mesh, frame.vector(body.normals))
    return mesh


def set_normals(mesh: Any, normals: Any) -> None:
    """Give a mesh its normals, made of length 1."""
    mesh.point_data["Normals"] = normals / np.maximum(np.linalg.norm(normals, axis=1, keepdims=True), 1e-300)
    mesh.point_data.active_normals_name = "Normals"


def add(plotter: Any, mesh: Any, style: str, pen: float) -> Any:
    """Put a mesh into the active renderer in one of the styles; ``pen`` widens lines."""
    look = dict(STYLES[style])
    if "line_width" in look:
        look["line_width"] *= pen
    actor = plotter.add_mesh(mesh, reset_camera=False, show_scalar_bar=False, **look)
    if "Normals" in mesh.point_data:
        actor.prop.interpolation = "Phong"
    if style in IN_FRONT:
        _bring_to_front(actor.mapper, IN_FRONT[style])
    return actor


def add_skin(plotter: Any, mesh: Any) -> Any:
    """Put a shaft's surface into the active renderer, coloured by its value."""
    look = {"scalars": "value", "cmap": COLOURS, "ambient": 0.42, "diffuse": 0.62}
    actor = plotter.add_mesh(mesh, show_scalar_bar=False, reset_camera=False, **look)
    actor.prop.interpolation = "Phong"
    return actor


def _bring_to_front(mapper: Any, units: float) -> None:
    """Draw over everything else: arrows are not hidden by what they act on."""
    mapper.SetResolveCoincidentTopologyToPolygonOffset()
    mapper.SetRelativeCoincidentTopologyPolygonOffsetParameters(0.0, -units)
    mapper.SetRelativeCoincidentTopologyLineOffsetParameters(0.0, -units)


def _counted(cells: Any) -> Any:
    """Cells as the library wants them: each row led by its number of corners."""
    return np.column_stack([np.full(len(cells), cells.shape[1]), cells]).ravel()
