"""The Timoshenko span: flexibilities summed at the elastic centre, exact loads, exact recovery.

A span is a chain of pieces (cylinders or cones) between two connection nodes. Its flexibility is integrated, so the
element is exact for every contour: each piece has its own axial, torsional, bending and shear flexibility, its own
elastic centre and its own second moment about it. Every term of the sums is positive and nothing cancels.

Deformations of a span with nodes i (left) and j (right), length l, elastic centre a from i, b = l - a:

    e0 = ux_j - ux_i    e1 = uy_j - uy_i - (b rz_j + a rz_i)    e4 = ry_j - ry_i
    e3 = rx_j - rx_i    e2 = uz_j - uz_i + (b ry_j + a ry_i)    e5 = rz_j - rz_i

and e = f s + e_load with six uncoupled flexibilities f, because the cross terms vanish at the elastic centre
(the "elastic centre" of the force method, as in Hardy Cross's column analogy, 1930). Section forces on the face whose
outward normal is +x, at x from i:

    N = s0, V_y = s1, V_z = s2, M_x = s3, M_y = s4 - s2 (a - x), M_z = s5 + s1 (a - x),  plus the load's own part.

The load's own part is the statically determinate one that leaves the left end free: with mu(x) the load gathered so
far and nu(x) its moment about x, a force density f and a couple density m give
N = -f_x mu, V = -f mu, M_x = -m_x mu, M_y = -m_y mu - f_z nu, M_z = -m_z mu + f_y nu.
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.pieces import Pieces, Points, stretch

Array = NDArray[np.float64]
Ints = NDArray[np.intp]


class Flexibility(NamedTuple):
    """What each piece gives, (m,) each.

    Attributes
    ----------
    axial, torsion, shear, bending : [m/N, rad/(N m), m/N, rad/(N m)]
    centre : [m], the piece's elastic centre from its left end
    own : [m/N], second moment of its bending flexibility about that centre
    """

    axial: Array
    torsion: Array
    shear: Array
    bending: Array
    centre: Array
    own: Array


class Spans(NamedTuple):
    """All spans of a grid, condensed.

    Attributes
    ----------
    length, centre : (n,) [m]
    flexibility : (n, 6)
        Of e0 .. e5, each alone.
    """

    length: Array
    centre: Array
    flexibility: Array


def flexibility(pieces: Pieces) -> Flexibility:
    """Integrate the flexibility of every piece: cylinders in closed form, cones at their Gauss points."""
    length = pieces.length
    if pieces.tapered:
        points = pieces.points
        bending = points.bending.sum(axis=0)
        centre = (points.bending * points.eta).sum(axis=0) / bending
        own = (points.bending * (points.eta - centre) ** 2).sum(axis=0)
        axial, torsion, shear = (part.sum(axis=0) for part in (points.axial, points.torsion, points.shear))
        return Flexibility(axial, torsion, shear, bending, centre, own)
    rate = pieces.sections.flexibility_rates.take(pieces.segment, axis=1)
    axial, torsion, shear, bending = rate * length
    plain = Flexibility(axial, torsion, shear, bending, length / 2, bending * (length * length / 12))
    return plain if pieces.lumps is None else _with_lumps(plain, pieces.lumps)


def _with_lumps(plain: Flexibility, lumps: Points) -> Flexibility:
    """Pieces with the shoulders that sit in them: all about their common elastic centres."""
    bending = plain.bending + lumps.bending.sum(axis=0)
    centre = (plain.bending * plain.centre + (lumps.bending * lumps.eta).sum(axis=0)) / bending
    moved = plain.bending * (plain.centre - centre) ** 2 + (lumps.bending * (lumps.eta - centre) ** 2).sum(axis=0)
    return Flexibility(
        axial=plain.axial + lumps.axial.sum(axis=0),
        torsion=plain.torsion + lumps.torsion.sum(axis=0),
        shear=plain.shear + lumps.shear.sum(axis=0),
        bending=bending,
        centre=centre,
        own=plain.own + moved,
    )


def condense(pieces: Pieces, give: Flexibility, length: Array) -> Spans:
    """Sum the flexibilities of each span at its elastic centre.

    Parameters
    ----------
    length : (n_spans,) [m]
        Distance between the connection nodes.
    """
    total = np.add.reduceat
    starts = pieces.starts
    bending = total(give.bending, starts)
    place = pieces.left + give.centre
    centre = total(give.bending * place, starts) / bending
    arm = place - stretch(centre, pieces)
    flexibility = np.empty((len(length), NDOF))
    flexibility[:, 0] = total(give.axial, starts)
    flexibility[:, 1:3] = total(give.bending * (arm * arm) + give.own + give.shear, starts)[:, None]
    flexibility[:, 3] = total(give.torsion, starts)
    flexibility[:, 4:] = bending[:, None]
    return Spans(length, centre, flexibility)


_ONES = np.eye(NDOF)


def deformation_matrices(spans: Spans, more: int = 0) -> tuple[Array, Array]:
    """Matrices of e = b_left u_i + b_right u_j, (n + more, 6, 6) each; the rows beyond the spans are left empty."""
    n = len(spans.length)
    left, right = np.empty((2, n + more, NDOF, NDOF))
    left[:n], right[:n] = -_ONES, _ONES
    left[:n, 1, 5], left[:n, 2, 4] = -spans.centre, spans.centre
    right[:n, 2, 4] = spans.length - spans.centre
    right[:n, 1, 5] = -right[:n, 2, 4]
    return left, right
