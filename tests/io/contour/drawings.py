"""Small drawings for tests, written with ezdxf."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from pathlib import Path
from typing import Any

import ezdxf
from ezdxf.document import Drawing

MM = 4  # $INSUNITS
QUARTER = math.tan(math.pi / 8)  # bulge of a quarter turn, counterclockwise

Corners = Sequence[Sequence[float]]  # (x, y) or (x, y, bulge of the line that begins there)


def document(*lines: Corners, units: int = MM, layer: str = "contour", version: str = "R2000") -> Drawing:
    """A drawing of polylines on one layer; closed where the last corner is the first."""
    made = ezdxf.new(version)  # type: ignore[attr-defined]
    made.units = units
    for line in lines:
        polyline(made, line, layer=layer)
    return made


def polyline(made: Any, line: Corners, layer: str = "contour", **attributes: Any) -> Any:
    """One more polyline."""
    closed = len(line) > 2 and tuple(line[0][:2]) == tuple(line[-1][:2])
    corners = [(*corner, 0.0)[:3] for corner in (line[:-1] if closed else line)]
    given = {"layer": layer, **attributes}
    return made.modelspace().add_lwpolyline(corners, format="xyb", close=closed, dxfattribs=given)


def line(made: Any, start: Sequence[float], end: Sequence[float], layer: str = "contour") -> Any:
    """One more straight line."""
    return made.modelspace().add_line(start, end, dxfattribs={"layer": layer})


def arc(made: Any, centre: Sequence[float], radius: float, first: float, last: float, **attributes: Any) -> Any:
    """One more arc, counterclockwise, angles in degrees."""
    given = {"layer": "contour", **attributes}
    return made.modelspace().add_arc(centre, radius, first, last, dxfattribs=given)


def saved(made: Any, path: Path | str = "shaft.dxf") -> Path:
    """Write the drawing."""
    made.saveas(path)
    return Path(path)


def numbers(points: Iterable[Any]) -> list[tuple[float, ...]]:
    """Points as bare numbers, fillets last where there is one."""
    values = (point.values() if isinstance(point, dict) else point for point in points)
    return [tuple(float(text.split()[0]) for text in point) for point in values]
