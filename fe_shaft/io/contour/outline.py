"""A chain of lines and arcs to corners: fillets by their radius, all other arcs as chords."""

from __future__ import annotations

import math
from collections.abc import Sequence
from typing import NamedTuple

from fe_shaft.io.contour.edges import Edge, Place

#: How far chords may lie beside their arc, as a share of the shaft's radius there.
CHORD = 1.5e-4
#: An arc that meets its cylinder, or its face, at less than this angle [rad] is tangent to it.
TANGENT = 0.01
#: An arc tangent to its cylinder that turns by this much [rad] before a face or the rim cuts it off is a fillet; what
#: turns less is a slope, and chords say better what it is.
LEAST_TURN = math.radians(60)


class Corner(NamedTuple):
    """A point of an outline; `fillet` is the radius at a shoulder whose thinner side ends here, else 0."""

    x: float
    y: float
    fillet: float = 0.0


def with_fillets(run: Sequence[Edge], same: float) -> list[Edge]:
    """The same edges, marked where an arc is the fillet between a cylinder and a shoulder's face.

    It is concave and tangent to a cylinder beside it; at its other end it is tangent to the face, or it meets a face or
    the thicker cylinder after a turn of `LEAST_TURN` at least.
    """
    edges = list(run)
    for k, edge in enumerate(run):
        if edge.side >= 0 or edge.centre is None:
            continue
        rising = edge.end[1] > edge.start[1]
        foot, top = (edge.start, edge.end) if rising else (edge.end, edge.start)
        beside, beyond = (k - 1, k + 1) if rising else (k + 1, k - 1)
        there = run[k + 1 :] if rising else run[:k]
        shoulder = _is_cylinder(run, beside, same) and any(_is_wide(each, same) for each in there)
        if shoulder and _is_fillet(edge, foot, top, _ends_arc(run, beyond, same)):
            edges[k] = edge._replace(fillet=True)
    return edges


def _is_fillet(edge: Edge, foot: Place, top: Place, cut: bool) -> bool:
    assert edge.centre is not None
    if abs(foot[0] - edge.centre[0]) > TANGENT * edge.radius:
        return False
    turn = math.asin(min(1.0, abs(top[0] - edge.centre[0]) / edge.radius))
    return turn > math.pi / 2 - TANGENT or (cut and turn > LEAST_TURN - TANGENT)


def _is_cylinder(run: Sequence[Edge], k: int, same: float) -> bool:
    if not 0 <= k < len(run) or run[k].centre is not None:
        return False
    return abs(run[k].end[1] - run[k].start[1]) <= same and _is_wide(run[k], same)


def _ends_arc(run: Sequence[Edge], k: int, same: float) -> bool:
    """Whether a face or a cylinder cuts the arc off."""
    if not 0 <= k < len(run) or run[k].centre is not None:
        return False
    return not _is_wide(run[k], same) or _is_cylinder(run, k, same)


def _is_wide(edge: Edge, same: float) -> bool:
    return abs(edge.end[0] - edge.start[0]) > same


def corners(run: Sequence[Edge], chord: float = CHORD) -> list[Corner]:
    """The corners of a chain from left to right.

    Parameters
    ----------
    run : edges from left to right
    chord : float
        How far chords may lie beside their arcs, as a share of the shaft's radius.
    """
    out = [Corner(*run[0].start)]
    for edge in run:
        if edge.fillet and edge.end[1] > edge.start[1]:  # the cylinder goes on to the plane of the face
            out[-1] = Corner(edge.end[0], edge.start[1], edge.radius)
            out.append(Corner(*edge.end))
        elif edge.fillet:
            out.append(Corner(edge.start[0], edge.end[1], edge.radius))
        elif edge.centre is None:
            out.append(Corner(*edge.end))
        else:
            out += [Corner(*place) for place in _chords(edge, chord)]
    return out


def _chords(edge: Edge, chord: float) -> list[Place]:
    """The ends of the chords of an arc; each encloses the same area as its arc, so that no error adds up.

    Chords of the angle d between points on a circle of r + 2/3 sagitta lie as much outside the arc as inside. The
    first and the last, which end on the arc itself, do so with an angle of d / sqrt(2).
    """
    assert edge.centre is not None
    first, last = edge.angles()
    sweep, deviation = abs(last - first), chord * edge.lowest[1]
    widest = 2 * math.acos(max(-1.0, 1 - 1.5 * deviation / edge.radius))
    inner = max(0, math.ceil(sweep / widest - math.sqrt(2)))
    step = math.copysign(sweep / (inner + math.sqrt(2)), last - first)
    (x, y), r = edge.centre, edge.radius * (1 + 2 / 3 * (1 - math.cos(step / 2)))
    angles = (first + step * (math.sqrt(0.5) + k) for k in range(inner + 1))
    return [*((x + r * math.cos(angle), y + r * math.sin(angle)) for angle in angles), edge.end]
