"""Loads and means on the solids of `calculix_solid`, as weights of their nodes.

A mean over an end face or over a slab, weighted as the load there is spread, is a sum of nodal movements times weights
(n, 3); the same weights times a load are the consistent nodal forces of that load. So every measure does work with its
load exactly, and the flexibility between any two is weights . movements, symmetric by Maxwell and Betti.

    deflection of a slab or face   mean of u_y
    slope of a slab or face        mean of -y u_x by y^2: d(deflection)/dx of a beam whose sections stay plane
    twist of a face                mean of y u_z - z u_y by r^2, about x
    extension of a face            mean of u_x

Each is counted from where the shaft is held: from the left face, or from the line through the means of two slabs. As a
load that adds the reactions, so nothing but rigid motion is left to be held by nodes, which then carry nothing.

Shape functions: the serendipity polynomials of the elements (O. C. Zienkiewicz, R. L. Taylor, The Finite Element
Method, vol. 1, 5th ed. 2000, ch. 8; spaces from memory), found from their values 0 and 1 at the nodes.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from itertools import product

import numpy as np
from numpy.typing import NDArray

from tests.evidence.calculix_solid import Cells, Shaft, Solid

Array = NDArray[np.float64]
Powers = list[tuple[int, ...]]


@dataclass(frozen=True)
class Shape:
    """An element's shape functions and a quadrature over it."""

    nodes: Array  # (n, d)
    powers: Powers  # n, of the monomials that span them
    points: Array  # (g, d)
    weights: Array  # (g,)

    def monomials(self, at: Array, along: int | None = None) -> Array:
        """All monomials at points, or their derivatives along one coordinate, (points, n)."""
        out = np.ones((len(at), len(self.powers)))
        for axis, power in enumerate(np.array(self.powers).T):
            x = at[:, axis, None]
            out *= x**power if axis != along else power * x ** np.maximum(power - 1, 0)
        return out

    @cached_property
    def values(self) -> Array:
        return np.linalg.solve(self.monomials(self.nodes).T, self.monomials(self.points).T).T

    @cached_property
    def slopes(self) -> Array:
        """(d, g, n)"""
        each = self.monomials(self.nodes).T
        axes = range(self.nodes.shape[1])
        return np.array([np.linalg.solve(each, self.monomials(self.points, axis).T).T for axis in axes])

    def integrals(self, cells: Cells, nodes: Array, among: int) -> Array:
        """Of each node's function times 1, y and z, over cells in the space of `nodes`' last d columns; (3, among)."""
        corners = nodes[cells]  # (cells, n, 3)
        d = self.nodes.shape[1]
        jacobian = np.einsum("dgn,cni->cgdi", self.slopes, corners[..., 3 - d :])
        size = np.abs(np.linalg.det(jacobian)) * self.weights if len(cells) else np.zeros((0, len(self.weights)))
        at = np.einsum("gn,cni->cgi", self.values, corners)
        factors = np.stack([np.ones_like(size), at[..., 1], at[..., 2]])
        each = np.einsum("fcg,cg,gn->fcn", factors, size, self.values)
        return np.array([np.bincount(cells.ravel(), of.ravel(), among) for of in each])


def middles(corners: Array, edges: list[tuple[int, int]]) -> Array:
    return np.vstack([corners, [(corners[a] + corners[b]) / 2 for a, b in edges]])


def ring(first: int, count: int) -> list[tuple[int, int]]:
    return [(first + k, first + (k + 1) % count) for k in range(count)]


def serendipity(dimensions: int) -> Powers:
    """At most quadratic, powers of 1 not counted."""
    powers = product(range(3), repeat=dimensions)
    return [each for each in powers if sum(power for power in each if power > 1) <= 2]


LINE, LINE_WEIGHTS = np.polynomial.legendre.leggauss(4)
SQUARE = np.array([[-1, -1], [1, -1], [1, 1], [-1, 1]], dtype=float)
TRIANGLE = np.array([[0, 0], [1, 0], [0, 1]], dtype=float)
PLANE = np.array(list(product(LINE, repeat=2)))
PLANE_WEIGHTS = np.outer(LINE_WEIGHTS, LINE_WEIGHTS).ravel()
HALF = (PLANE + 1) / 2
IN_TRIANGLE = np.column_stack([HALF[:, 0], HALF[:, 1] * (1 - HALF[:, 0])])
TRIANGLE_WEIGHTS = PLANE_WEIGHTS / 4 * (1 - HALF[:, 0])
QUADRATIC: Powers = [(0, 0), (1, 0), (0, 1), (2, 0), (1, 1), (0, 2)]


def upright(plane: Array, height: Array) -> Array:
    """Points of a plane figure at each height."""
    return np.column_stack([np.tile(plane, (len(height), 1)), np.repeat(height, len(plane))])


ENDS = np.array([-1.0, 1.0])
QUAD8 = Shape(middles(SQUARE, ring(0, 4)), serendipity(2), PLANE, PLANE_WEIGHTS)
TRI6 = Shape(middles(TRIANGLE, ring(0, 3)), QUADRATIC, IN_TRIANGLE, TRIANGLE_WEIGHTS)
HEX20 = Shape(
    middles(upright(SQUARE, ENDS), [*ring(0, 4), *ring(4, 4), *((k, k + 4) for k in range(4))]),
    serendipity(3),
    upright(PLANE, LINE),
    np.outer(LINE_WEIGHTS, PLANE_WEIGHTS).ravel(),
)
WEDGE15 = Shape(
    middles(upright(TRIANGLE, ENDS), [*ring(0, 3), *ring(3, 3), *((k, k + 3) for k in range(3))]),
    [(*plane, up) for plane in QUADRATIC for up in range(3) if sum(plane) < 2 or up < 2],
    upright(IN_TRIANGLE, LINE),
    np.outer(LINE_WEIGHTS, TRIANGLE_WEIGHTS).ravel(),
)


def integrals(of: Solid, cells: tuple[Cells, Cells]) -> Array:
    """Of the nodes' functions times 1, y and z over faces or over volumes, (3, n)."""
    shapes = (HEX20, WEDGE15) if cells[0].shape[1] == 20 else (QUAD8, TRI6)
    return sum(
        (shape.integrals(part, of.nodes, len(of.nodes)) for shape, part in zip(shapes, cells, strict=True)),
        np.zeros((3, len(of.nodes))),
    )


def mean(of: Solid, cells: tuple[Cells, Cells], measure: str) -> Array:
    """Weights of a mean, (n, 3)."""
    one, y, z = integrals(of, cells)
    out = np.zeros_like(of.nodes)
    yy, zz = y @ of.nodes[:, 1], z @ of.nodes[:, 2]
    if measure in ("deflection", "extension"):
        out[:, 1 if measure == "deflection" else 0] = one / one.sum()
    elif measure == "slope":
        out[:, 0] = -y / yy
    else:
        out[:, 1:] = np.column_stack([-z, y]) / (yy + zz)
    return out


def rigid(of: Solid) -> Array:
    """The solid moving as a whole in bending, by 1 along y and by 1 rad about the left end; (2, n, 3)."""
    x, y, _ = of.nodes.T
    nothing = np.zeros_like(x)
    return np.array([np.column_stack([nothing, nothing + 1, nothing]), np.column_stack([-y, x, nothing])])


def bending(shaft: Shaft, of: Solid) -> dict[str, Array]:
    """Weights of the deflections and slopes at the load and at the tip, counted from where the shaft is held."""
    left, right, load = of.faces["left"], of.faces["right"], of.within(shaft["load_slab_z"])
    if shaft["type"] == "cant":
        held = [mean(of, left, "deflection"), mean(of, left, "slope")]
    else:
        held = [mean(of, of.within(slab), "deflection") for slab in shaft["support_slabs_z"]]
    whole = rigid(of)
    moved = np.einsum("hni,rni->rh", held, whole)
    out = {}
    for place, cells in (("load", load), ("tip", right)):
        for name, measure in (("defl", "deflection"), ("slope", "slope")):
            weights = mean(of, cells, measure)
            less = np.linalg.solve(moved, np.einsum("ni,rni->r", weights, whole))
            out[f"{name}_{place}"] = weights - np.einsum("h,hni->ni", less, held)
    return out


def along(of: Solid, measure: str) -> Array:
    """Weights of the twist or the extension, right end less left end."""
    return mean(of, of.faces["right"], measure) - mean(of, of.faces["left"], measure)
