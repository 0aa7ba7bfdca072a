"""Quarters of stepped round shafts as solids of CalculiX: their meridians turned about the axis.

Coordinates (x, y, z) [mm], x along the axis, y = r cos theta, z = r sin theta. The quarter 0 <= theta <= 90 degrees is
enough, as the shaft is its own mirror image in the planes z = 0 and y = 0 and every load is even or odd in each.

A quadrilateral of the meridian becomes a hexahedron C3D20 between two angles; one with an edge on the axis becomes a
wedge C3D15, its triangle across the axis. Nodes of both in the order of the CalculiX CrunchiX user's manual (as in
Abaqus): corners, middles of the edges at the first angle, at the last, then between the two.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import Any, NamedTuple

import numpy as np
from numpy.typing import NDArray

from tests.evidence.meridian import Bar, Fineness, Segment

Array = NDArray[np.float64]
Cells = NDArray[np.intp]
Shaft = dict[str, Any]


class Mesh(NamedTuple):
    """How fine: in the meridian, in thinnest diameters of the shaft, and how many elements stand over 90 degrees."""

    corner: float  # size at an inner corner
    growth: float  # of the size, per length away from there
    largest: float
    per_fillet: int
    around: int


COARSE = Mesh(0.08, 1.0, 0.4, 3, 3)
MIDDLE = Mesh(0.02, 0.7, 0.3, 4, 4)
FINE = Mesh(0.005, 0.6, 0.25, 6, 6)


@dataclass(frozen=True)
class Solid:
    """A quarter of a shaft. Faces: at each end, quadrilaterals of 8 nodes and triangles of 6."""

    nodes: Array  # (n, 3) [mm]
    hexes: Cells  # (h, 20)
    wedges: Cells  # (w, 15)
    faces: dict[str, tuple[Cells, Cells]]  # left, right

    @cached_property
    def length(self) -> float:
        return float(self.nodes[:, 0].max())

    def within(self, slab: tuple[float, float]) -> tuple[Cells, Cells]:
        """Hexahedra and wedges between two planes."""
        middles = (self.nodes[cells, 0].mean(axis=1) for cells in (self.hexes, self.wedges))
        inside = [(slab[0] < x) & (x < slab[1]) for x in middles]
        return self.hexes[inside[0]], self.wedges[inside[1]]


def taper(shaft: Shaft) -> tuple[Array, Array]:
    """Planes, and there the radius as a multiple of the one in a shaft whose cones are cylinders."""
    lengths = [row["length"] for row in shaft["segments"]]
    grown = [row.get("end_d", row["outer_d"]) / row["outer_d"] for row in shaft["segments"]]
    return np.cumsum([0.0, *lengths]), np.cumprod([1.0, *grown])


def bar(shaft: Shaft, mesh: Mesh) -> Bar:
    """The shaft with its cones as cylinders, and all to the right of one scaled to fit."""
    scale = taper(shaft)[1]
    fillets = tuple(shaft["fillet_radius_at_shoulders"])
    assert not any(radius for radius, by in zip(fillets, scale[1:], strict=False) if by != 1), "no fillet after a cone"
    segments = tuple(
        Segment(row["length"], row["outer_d"] / by, row["bore_d"] / by)
        for row, by in zip(shaft["segments"], scale, strict=False)
    )
    thin = min(each.diameter for each in segments)
    fineness = Fineness(mesh.corner * thin, mesh.growth, mesh.largest * thin, mesh.per_fillet)
    slabs = [shaft["load_slab_z"], *(shaft["support_slabs_z"] or [])]
    return Bar(segments, fillets, fineness, tuple(float(x) for slab in slabs for x in slab))


def solid(shaft: Shaft, mesh: Mesh) -> Solid:
    """The quarter of a shaft, meshed."""
    flat = bar(shaft, mesh).mesh
    x, r = flat.doflocs
    quads = anticlockwise(flat.dofs.element_dofs[:8].T, x, r)
    turned = Turned(x, r * np.interp(x, *taper(shaft)), quads, mesh.around)
    cells = [turned.hexes(), turned.wedges(), *turned.faces(0.0), *turned.faces(float(x.max()))]
    used = np.unique(np.concatenate([each.ravel() for each in cells]))
    hexes, wedges, *faces = (np.searchsorted(used, each) for each in cells)
    ends = {"left": (faces[0], faces[1]), "right": (faces[2], faces[3])}
    return Solid(turned.points()[used], hexes, wedges, ends)


def anticlockwise(quads: Cells, x: Array, r: Array) -> Cells:
    """Quadrilaterals of 8 nodes, each turned over where its corners stand clockwise."""
    (dx, ex), (dr, er) = ((of[quads[:, [2, 3]]] - of[quads[:, [0, 1]]]).T for of in (x, r))
    clockwise = dx * er - ex * dr < 0
    quads = quads.copy()
    quads[clockwise] = quads[clockwise][:, [0, 3, 2, 1, 7, 6, 5, 4]]
    return quads


@dataclass(frozen=True)
class Turned:
    """Quadrilaterals of 8 nodes (corners, then middles of the edges from each to the next), turned about the axis.

    Angle number 2 k is between elements, 2 k + 1 in the middle of one. Nodes on the axis are there once.
    """

    x: Array
    r: Array
    quads: Cells  # (q, 8), corners anticlockwise in the plane (x, r)
    around: int

    @property
    def on_axis(self) -> NDArray[np.bool_]:
        return self.r < 1e-9 * self.r.max()

    def points(self) -> Array:
        """All nodes at all angles, (nodes of the meridian * angles, 3); not all are used."""
        angle = np.linspace(0, np.pi / 2, 2 * self.around + 1)
        cos, sin = np.cos(angle), np.sin(angle)
        cos[-1] = 0.0
        y, z = self.r[:, None] * cos, self.r[:, None] * sin
        return np.stack(np.broadcast_arrays(self.x[:, None], y, z), axis=-1).reshape(-1, 3)

    def at(self, nodes: Cells, angle: int) -> Cells:
        return nodes * (2 * self.around + 1) + np.where(self.on_axis[nodes], 0, angle)

    def swept(self, cells: list[list[Cells]]) -> Cells:
        """For lists of (nodes of the meridian, shift of the angle), the cells at all angles."""
        rows = []
        for k in range(self.around):
            rows.append(np.stack([self.at(nodes, 2 * k + int(shift)) for nodes, shift in cells], axis=1))
        return np.concatenate(rows)

    def hexes(self) -> Cells:
        a = self.quads[~self.on_axis[self.quads[:, :4]].any(axis=1)].T
        order = [(0, slice(0, 4)), (2, slice(0, 4)), (0, slice(4, 8)), (2, slice(4, 8)), (1, slice(0, 4))]
        return self.swept([(nodes, shift) for shift, part in order for nodes in a[part]])

    def wedges(self) -> Cells:
        touching = self.quads[self.on_axis[self.quads[:, :4]].sum(axis=1) == 2]
        # Turn each so that its first edge is on the axis.
        first = np.argmax(self.on_axis[touching[:, :4]] & self.on_axis[np.roll(touching[:, :4], -1, axis=1)], axis=1)
        turn = (first[:, None] + np.arange(4)) % 4
        a, b, c, d, ab, bc, cd, da = np.take_along_axis(touching, np.hstack([turn, turn + 4]), axis=1).T
        corners = [(a, 0), (d, 0), (d, 2), (b, 0), (c, 0), (c, 2)]
        middles = [(da, 0), (d, 1), (da, 2), (bc, 0), (c, 1), (bc, 2), (ab, 0), (cd, 0), (cd, 2)]
        return self.swept(corners + middles)

    def faces(self, plane: float) -> tuple[Cells, Cells]:
        """Quadrilaterals and triangles of the section at an end."""
        near = np.isclose(self.x, plane, atol=1e-9 * self.x.max())
        edges = []
        for one, other, middle in ((0, 1, 4), (1, 2, 5), (2, 3, 6), (3, 0, 7)):
            edges.append(self.quads[near[self.quads[:, [one, other]]].all(axis=1)][:, [one, other, middle]])
        p, q, m = np.concatenate(edges).T
        p, q = np.where(self.r[p] < self.r[q], [p, q], [q, p])
        off, on = ~self.on_axis[p], self.on_axis[p]
        quads = [(p, 0), (q, 0), (q, 2), (p, 2), (m, 0), (q, 1), (m, 2), (p, 1)]
        triangles = [(p, 0), (q, 0), (q, 2), (m, 0), (q, 1), (m, 2)]
        return (
            self.swept([(nodes[off], shift) for nodes, shift in quads]),
            self.swept([(nodes[on], shift) for nodes, shift in triangles]),
        )


def volume(shaft: Shaft) -> float:
    """Of the whole shaft without its fillets, by its drawing [mm^3]."""
    total = 0.0
    for row in shaft["segments"]:
        d, end, bore = row["outer_d"], row.get("end_d", row["outer_d"]), row["bore_d"]
        total += np.pi / 12 * row["length"] * (d * d + d * end + end * end - 3 * bore * bore)
    return float(total)
