"""Cross-sections solved as plane problems with scikit-fem: torsion constant and second moments of area.

Saint-Venant's torsion by Prandtl's stress function phi, lap(phi) = -2 in the section and phi = 0 on its edge; the
torsion constant is 2 int phi (S. P. Timoshenko, J. N. Goodier, Theory of Elasticity, 3rd ed. 1970; from memory). A
circle has pi d^4 / 32. A bored section is solved for its warping w instead, lap(w) = 0 with dw/dn = y n_x - x n_y,
which asks nothing of the hole; the torsion constant is int (x^2 + y^2 + x dw/dy - y dw/dx) (the same source). The
section is a polygon, with a round bore or none, meshed by Delaunay's triangles over points on its edge and a regular
pattern inside.
"""

from __future__ import annotations

from typing import Any, NamedTuple

import numpy as np
from matplotlib.path import Path
from numpy.typing import NDArray
from scipy.spatial import Delaunay, KDTree
from skfem import Basis, BilinearForm, ElementTriP2, Functional, LinearForm, MeshTri, condense, solve
from skfem.helpers import dot, grad

Array = NDArray[np.float64]


class Section(NamedTuple):
    """Torsion constant, and second moments of area about the two axes through the centroid [length^4]."""

    torsion: float
    about_x: float
    about_y: float

    @property
    def mean(self) -> float:
        """Second moment of area on the mean over a turn."""
        return (self.about_x + self.about_y) / 2


@BilinearForm
def stiffness(u: Any, v: Any, w: Any) -> Any:
    return dot(grad(u), grad(v))


@LinearForm
def two(v: Any, w: Any) -> Any:
    return 2 * v


@LinearForm
def edgewise(v: Any, w: Any) -> Any:
    return w.x[1] * v.grad[0] - w.x[0] * v.grad[1]


@Functional
def given(w: Any) -> Any:
    return w.value


def section(edge: Array, step: float, bore: float = 0.0) -> Section:
    """Solve a section whose edge is a polygon (n, 2), bored or not, with triangles of a size."""
    basis = Basis(_mesh(edge, step, bore), ElementTriP2())
    x, y = np.asarray(basis.global_coordinates())

    def total(values: Array) -> float:
        return float(given.assemble(basis, value=values))

    area = total(np.ones_like(x))
    centre = total(x) / area, total(y) / area
    torsion = total(_twisting(basis, x, y) if bore else _stress_function(basis))
    return Section(torsion, total((y - centre[1]) ** 2), total((x - centre[0]) ** 2))


def _stress_function(basis: Basis) -> Array:
    phi = solve(*condense(stiffness.assemble(basis), two.assemble(basis), D=basis.get_dofs()))
    return 2 * np.asarray(basis.interpolate(phi))


def _twisting(basis: Basis, x: Array, y: Array) -> Array:
    warping = solve(*condense(stiffness.assemble(basis), edgewise.assemble(basis), D=np.array([0])))
    slope = basis.interpolate(warping).grad
    return np.asarray(x**2 + y**2 + x * slope[1] - y * slope[0])


def _mesh(edge: Array, step: float, bore: float) -> MeshTri:
    on_edge = np.concatenate(
        [
            a + (b - a) * np.arange(n)[:, None] / n
            for a, b in zip(edge, np.roll(edge, -1, axis=0), strict=True)
            for n in [max(1, int(np.ceil(np.hypot(*(b - a)) / step)))]
        ]
    )
    around = max(3, int(np.pi * bore / step)) if bore else 0
    on_edge = np.concatenate([on_edge, arc(bore, 0, 2 * np.pi, around + 1)[:-1]]) if bore else on_edge
    inside_bore = bore / 2 * np.cos(np.pi / around) if bore else 0.0
    half = np.abs(edge).max()
    x, y = np.meshgrid(np.arange(-half, half, step), np.arange(-half, half, step * np.sqrt(3) / 2))
    inner = np.column_stack([(x + (np.arange(len(x)) % 2)[:, None] * step / 2).ravel(), y.ravel()])
    outline = Path(edge)
    inner = inner[outline.contains_points(inner) & (np.hypot(*inner.T) >= bore / 2)]
    inner = inner[KDTree(on_edge).query(inner)[0] > 0.6 * step]
    points = np.concatenate([on_edge, inner])
    triangles = Delaunay(points).simplices
    middles = points[triangles].mean(axis=1)
    triangles = triangles[outline.contains_points(middles) & (np.hypot(*middles.T) >= inside_bore)]
    (ax, ay), (bx, by) = ((points[triangles[:, k]] - points[triangles[:, 0]]).T for k in (1, 2))
    triangles = triangles[np.abs(ax * by - ay * bx) > 1e-6 * step**2]
    used, triangles = np.unique(triangles, return_inverse=True)
    return MeshTri(np.ascontiguousarray(points[used].T), np.ascontiguousarray(triangles.reshape(-1, 3).T))


def arc(diameter: float, first: float, last: float, points: int) -> Array:
    """Points on a circle between two angles, (points, 2)."""
    angle = np.linspace(first, last, points)
    return diameter / 2 * np.column_stack([np.cos(angle), np.sin(angle)])


def keyed(diameter: float, width: float, depth: float, count: int) -> Array:
    """A circle with keyways of parallel flanks, evenly around it, (n, 2)."""
    half, pitch = np.arcsin(width / diameter), 2 * np.pi / count
    bottom = diameter / 2 - depth
    parts = []
    for middle in pitch * np.arange(count):
        out, across = np.array([np.cos(middle), np.sin(middle)]), np.array([-np.sin(middle), np.cos(middle)])
        parts.append(np.array([bottom * out - width / 2 * across, bottom * out + width / 2 * across]))
        parts.append(arc(diameter, middle + half, middle + pitch - half, 720 // count))
    return np.concatenate(parts)


def splined(root: float, tip: float, width: float, count: int) -> Array:
    """Straight-sided splines, (n, 2)."""
    pitch, at_root, at_tip = 2 * np.pi / count, np.arcsin(width / root), np.arcsin(width / tip)
    parts = []
    for middle in pitch * np.arange(count):
        parts.append(arc(tip, middle - at_tip, middle + at_tip, 8))
        parts.append(arc(root, middle + at_root, middle + pitch - at_root, 12))
    return np.concatenate(parts)
