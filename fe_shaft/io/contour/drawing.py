"""A drawing (DXF) to the lines and arcs of its contour's layer, and its unit; the only door to ezdxf."""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import Any, NamedTuple

from fe_shaft.errors import ModelError, UsageError, nearest, quote
from fe_shaft.io.contour.edges import Edge, arc_edges, distance
from fe_shaft.io.model_source import MOST_BYTES, Source
from fe_shaft.model.kinds import shown, thing
from fe_shaft.units import FACTORS

#: Places closer than this [m] are one: no turned shaft is drawn, or made, to a thousandth of a millimetre.
SAME = 1e-6
LINES = ("LINE", "ARC", "LWPOLYLINE", "POLYLINE")
#: What may stand on the contour's layer without being part of it.
REMARKS = frozenset((
    "TEXT", "MTEXT", "DIMENSION", "ARC_DIMENSION", "LARGE_RADIAL_DIMENSION", "LEADER", "MULTILEADER", "TOLERANCE",
    "HATCH", "POINT", "VIEWPORT", "ATTDEF", "ATTRIB", "IMAGE", "WIPEOUT",
))  # fmt: skip
#: Codes of $INSUNITS (DXF reference, header variables) that are units of this program.
UNITS = {1: "in", 2: "ft", 4: "mm", 5: "cm", 6: "m", 9: "mil", 12: "nm", 13: "um"}


class Drawing(NamedTuple):
    """What is drawn.

    Attributes
    ----------
    edges : straight lines and arcs, in units of the drawing, none of them on the axis
    unit : of the drawing
    same : places closer than this are one [unit]
    """

    edges: list[Edge]
    unit: str
    same: float


def drawing(source: Source, layer: object = None, unit: object = None) -> Drawing:
    """Read the half contour out of a DXF file.

    Parameters
    ----------
    source : Source
    layer : str, optional
        Its layer; may be left out if one layer alone has lines off the axis.
    unit : str, optional
        Unit of a drawing that states none.

    Raises
    ------
    ModelError
        Naming file, entity and what to do.
    UsageError
        If ezdxf is not installed.
    """
    ezdxf = _ezdxf(source)
    document = _document(source, ezdxf)
    try:
        own = _unit(source, int(document.header.get("$INSUNITS", 0)), unit)
        same = SAME / FACTORS["length"][own]
        entities = _layer(source, list(document.modelspace()), layer, same)
        edges = [edge for entity in entities for edge in _edges(source, entity, same)]
    except ezdxf.DXFError as error:  # an entity lacks what it needs
        raise _damaged(source, error) from None
    return Drawing([edge for edge in edges if not _is_nothing(edge, same)], own, same)


def _ezdxf(source: Source) -> Any:
    if source.path.suffix.lower() == ".dwg":
        raise source.error(None, "DWG is not read. Save the drawing as DXF.")
    try:
        import ezdxf
    except ImportError:
        install = 'pip install "fe_shaft[dxf]"'
        raise UsageError(f"{source.shown}: DXF needs ezdxf, which is not installed. Run   {install}") from None
    return ezdxf


def _document(source: Source, ezdxf: Any) -> Any:
    if source.path.is_file() and source.path.stat().st_size > MOST_BYTES:
        most = f"more than {MOST_BYTES // 1_000_000} MB; no more is read"
        raise source.error(None, f"the drawing has {most}. Save the contour alone.")
    data = source.data
    if not data.startswith(b"AutoCAD Binary DXF") and b"SECTION" not in data[:4000].upper():
        raise source.error(None, "the file is not a DXF. Save the drawing as DXF, or name a table (CSV).")
    try:
        return ezdxf.readfile(source.path)
    except Exception as error:  # a parser of others, on a file of others, stops in many ways
        raise _damaged(source, error) from None


def _damaged(source: Source, error: Exception) -> ModelError:
    reason = " ".join(str(error).split())[:80] or type(error).__name__
    reason = "".join(sign if sign.isprintable() else "?" for sign in reason)
    return source.error(None, f"the drawing is damaged ({reason}). Save it again as DXF.")


def _unit(source: Source, code: int, unit: object) -> str:
    """The unit of the drawing, by itself or else by the user."""
    if unit is not None and unit not in UNITS.values():
        raise source.error(
            None, f"{shown(unit)} is not a unit of a drawing. Write one of: {', '.join(UNITS.values())}."
        )
    if code == 0 and unit is None:
        raise source.error(None, 'the drawing states no unit ($INSUNITS). Write contour_unit = "mm".')
    if code == 0:
        return str(unit)
    if code not in UNITS:
        raise source.error(None, f"the unit of the drawing ($INSUNITS = {code}) is not known. Save it in mm.")
    own = UNITS[code]
    if unit is not None and unit != own:
        both = f"the drawing states {own} ($INSUNITS = {code}), contour_unit says {unit}"
        raise source.error(None, f"{both}. Leave contour_unit out, or correct the drawing.")
    return own


# ---- layers


def _layer(source: Source, entities: list[Any], layer: object, same: float) -> list[Any]:
    """The entities of the contour's layer, remarks left out."""
    layers = {_layer_of(entity).lower(): _layer_of(entity) for entity in entities}
    if layer is None:
        drawn = (entity for entity in entities if entity.dxftype() in LINES and not _on_axis(entity, same))
        found = list(dict.fromkeys(layers[_layer_of(entity).lower()] for entity in drawn))
        if len(found) > 1:
            told = ", ".join(found[:8]) + (", ..." if len(found) > 8 else "")
            raise source.error(None, f'lines stand on {len(found)} layers: {told}. Write contour_layer = "{found[0]}".')
        if not found:
            _refuse_strange(source, entities)
        name = found[0] if found else ""
    elif not isinstance(layer, str):
        raise source.error(None, f'contour_layer is {thing(layer)}, not text. Write contour_layer = "contour".')
    else:
        name = layer
        if layer.lower() not in layers:
            hint = nearest(layer, layers.values())
            raise source.error(None, f"nothing stands on a layer {quote(layer)}. {hint}".rstrip())
    kept = [each for each in entities if _layer_of(each).lower() == name.lower() and each.dxftype() not in REMARKS]
    _refuse_strange(source, kept)
    if not kept:
        where = f"layer {quote(name)}" if name else "the drawing"
        raise source.error(None, f"{where} has no line, arc or polyline. Draw the half contour above y = 0.")
    return kept


def _refuse_strange(source: Source, entities: list[Any]) -> None:
    """A spline, a block or the like where the contour should be."""
    strange = next((entity for entity in entities if entity.dxftype() not in REMARKS.union(LINES)), None)
    if strange is not None:
        raise source.error(None, f"{name_of(strange)} is not read. Explode it to lines and arcs.")


def _layer_of(entity: Any) -> str:
    return str(entity.dxf.get("layer", "0"))


def name_of(entity: Any) -> str:
    """How messages call an entity: ``ARC (handle 2F, layer CONTOUR)``."""
    layer = "".join(sign if sign.isprintable() else "?" for sign in _layer_of(entity))[:60]
    return f"{entity.dxftype()} (handle {entity.dxf.handle}, layer {layer})"


def _on_axis(entity: Any, same: float) -> bool:
    if entity.dxftype() != "LINE":
        return False
    return max(abs(float(entity.dxf.start.y)), abs(float(entity.dxf.end.y))) <= same


def _is_nothing(edge: Edge, same: float) -> bool:
    """Whether an edge is a point, or a straight line on the axis (a centre line, or the side of a closed profile)."""
    if edge.centre is not None:
        return False
    on_axis = abs(edge.start[1]) <= same and abs(edge.end[1]) <= same
    return on_axis or distance(edge.start, edge.end) <= same


# ---- entities


def _edges(source: Source, entity: Any, same: float) -> Iterator[Edge]:
    """An entity as straight lines and arcs of one half turn at most."""
    name = name_of(entity)
    if entity.dxftype() == "POLYLINE" and (not entity.is_2d_polyline or entity.dxf.flags & 6):
        raise source.error(None, f"{name} is a curve through its points or in space. Explode it to lines and arcs.")
    parts = [entity] if entity.dxftype() in ("LINE", "ARC") else list(entity.virtual_entities())
    for part in parts:
        yield from _line(source, part, name, same) if part.dxftype() == "LINE" else _arc(source, part, name, same)


def _line(source: Source, line: Any, name: str, same: float) -> Iterator[Edge]:
    start, end = line.dxf.start, line.dxf.end
    if abs(start.z - end.z) > same:
        raise source.error(None, f"{name} leaves the plane of the drawing. Draw the contour in x and y.")
    yield _finite(source, Edge((start.x, start.y), (end.x, end.y), name))


def _arc(source: Source, arc: Any, name: str, same: float) -> Iterator[Edge]:
    """An arc, also one that was mirrored (extrusion towards -z: its x and its turning are reversed)."""
    along = arc.dxf.extrusion
    if abs(along.x) > 1e-9 or abs(along.y) > 1e-9:
        raise source.error(None, f"{name} leaves the plane of the drawing. Draw the contour in x and y.")
    centre, radius = arc.dxf.center, float(arc.dxf.radius)
    first, last = math.radians(arc.dxf.start_angle), math.radians(arc.dxf.end_angle)
    middle = (centre.x, centre.y)
    if along.z < 0:
        middle, first, last = (-centre.x, centre.y), math.pi - last, math.pi - first
    if not all(map(math.isfinite, (*middle, radius, first, last))) or radius <= same:
        raise source.error(None, f"{name} has no size. Draw it again.")
    yield from arc_edges(middle, radius, first, last, name, same)


def _finite(source: Source, edge: Edge) -> Edge:
    if not all(map(math.isfinite, (*edge.start, *edge.end))):
        raise source.error(None, f"{edge.name} has no size. Draw it again.")
    return edge
