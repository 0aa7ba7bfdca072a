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

from collections.abc import Callable, Sequence
from functools import cached_property
from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.pieces import Lumps, Pieces, Points, stretch, sums_before, sums_in_spans

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


def _with_lumps(plain: Flexibility, lumps: Lumps) -> Flexibility:
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


class Gathered(NamedTuple):
    """A distributed load of unit size: what has gathered up to a place, seen from the span's left node.

    mu is the load itself, nu its moment about that place; at the points (q, m) and at both ends of each piece (m,).
    In spans that hang it gathers from the right end, with mu below 0, so that the forces near a free end keep their
    digits.
    """

    mu: Array
    nu: Array
    mu_left: Array
    nu_left: Array
    mu_right: Array
    nu_right: Array


Inside = Callable[[Array], tuple[Array, Array]]


def gather_uniform(pieces: Pieces) -> Gathered:
    """A load of 1 per length along each span."""
    return _gather(pieces, lambda h: (h, h * h / 2))


def gather_mass(pieces: Pieces) -> Gathered:
    """The mass of the pieces themselves [kg] and its moment [kg m]: what gravity acts on.

    The area of a cone is a quadratic along it, so mu is a cubic and nu a quartic, both exact.
    """
    c0, c1, c2 = pieces.mass_per_length
    return _gather(
        pieces,
        lambda h: (h * (c0 + h * (c1 / 2 + h * c2 / 3)), h * h * (c0 / 2 + h * (c1 / 6 + h * c2 / 12))),
    )


def _gather(pieces: Pieces, inside: Inside) -> Gathered:
    """Gather a load of which `inside` gives the amount in the first h of each piece, and its moment about h."""
    own, own_moment = inside(pieces.length)
    mu_left, mu_right = _run(own, pieces)
    nu_left, nu_right = _run(mu_left * pieces.length + own_moment, pieces)
    for span in pieces.hanging:
        at = slice(pieces.starts[span], pieces.starts[span] + pieces.counts[span])
        mu_left[at], mu_right[at] = _run_back(own[at])
        nu_left[at], nu_right[at] = _run_back(mu_left[at] * pieces.length[at] + own_moment[at])
    mu, nu = inside(pieces.points.eta)
    return Gathered(mu + mu_left, nu + nu_left + mu_left * pieces.points.eta, mu_left, nu_left, mu_right, nu_right)


def _run(steps: Array, pieces: Pieces) -> tuple[Array, Array]:
    """Running sums that start anew in each span: value left and right of each piece."""
    before = sums_in_spans(steps, pieces)
    return before, before + steps


def _run_back(steps: Array) -> tuple[Array, Array]:
    """Running sums that end in 0 at the right end: value left and right of each piece."""
    left = -steps[::-1].cumsum()[::-1]
    return left, np.append(left[1:], 0.0)


def load_deformation(pieces: Pieces, spans: Spans, load: Gathered) -> Array:
    """Deformations e_load of each span under its load's own part.

    Returns
    -------
    (n_spans, 6, 6)
        Times a wrench density (force and couple) it is e_load.
    """
    points = pieces.points

    def total(values: Array) -> Array:
        return np.add.reduceat(values.sum(axis=0), pieces.starts)

    arm = stretch(spans.centre, pieces) - pieces.left - points.eta
    g_mu, g_nu = points.bending * load.mu, points.bending * load.nu
    out = np.zeros((len(spans.length), NDOF, NDOF))
    out[:, 0, 0] = -total(points.axial * load.mu)
    out[:, 3, 3] = -total(points.torsion * load.mu)
    out[:, 5, 1] = total(g_nu)
    out[:, 4, 2] = -out[:, 5, 1]
    out[:, 5, 5] = out[:, 4, 4] = -total(g_mu)
    out[:, 1, 1] = out[:, 2, 2] = total(g_nu * arm - points.shear * load.mu)
    out[:, 2, 4] = total(g_mu * arm)
    out[:, 1, 5] = -out[:, 2, 4]
    return out


def loaded_energy(
    pieces: Pieces, centre: Array, s: Array, loads: Sequence[tuple[Gathered, Array]]
) -> tuple[Array, Array]:
    """Twice the energy of each span, and the part of it that the forces do on the loads' own deformation.

    From the section forces themselves: the integrals of their square and of them times the loads' own part, each over
    the stiffness. Sums of the stored forces' energy and the loads' would cancel.

    Parameters
    ----------
    centre, s : (n_spans,), (n_spans, 6, n_cases)
        Elastic centres and stored forces.
    loads : pairs of a unit load and its wrench density (n_spans, 6, n_cases or 1)

    Returns
    -------
    two (n_spans, n_cases)
    """
    points = pieces.points
    load_part: Array | int = 0
    for load, density in loads:
        load_part = load_part + _load_forces(load.mu, load.nu, _by_component(density, pieces)[:, :, None])
    offset = stretch(centre, pieces) - pieces.left - points.eta
    of_points = np.repeat(_by_component(s, pieces)[:, :, None], len(points.eta), axis=2)
    force = _own_forces(of_points, offset) + load_part
    give = np.array((points.axial, points.shear, points.shear, points.torsion, points.bending, points.bending))
    weighed = give[:, None] * force
    both = ((weighed * part).sum(axis=(0, 2)) for part in (force, load_part))
    stored, mixed = (np.add.reduceat(per_piece, pieces.starts, axis=-1).T for per_piece in both)
    return stored, mixed


def end_loads(load: Gathered, pieces: Pieces) -> tuple[Array, Array]:
    """Wrenches that the load's own part hands to the left and right nodes; (n_spans, 6, 6), times a wrench density."""
    at_left, at_right = (
        -_ONES[None] * load.mu_left[pieces.starts, None, None],
        _ONES * load.mu_right[pieces.last, None, None],
    )
    for out, nu in ((at_left, -load.nu_left[pieces.starts]), (at_right, load.nu_right[pieces.last])):
        out[:, 4, 2], out[:, 5, 1] = nu, -nu
    return at_left, at_right


def _by_component(of_spans: Array, pieces: Pieces) -> Array:
    """(n_spans, 6, n_cases) to the pieces, (6, n_cases, m)."""
    return stretch(of_spans.transpose(1, 2, 0), pieces)


def _load_forces(mu: Array, nu: Array, density: Array) -> Array:
    """Section forces of a load's own part; density (6, n_cases, ...)."""
    force = -mu * density
    force[4] -= nu * density[2]
    force[5] += nu * density[1]
    return force


class Recovery:
    """Displacements and section forces at both ends of every piece, worked out when asked for.

    Parameters
    ----------
    u_node, s : (n_spans, 6, n_cases)
        Displacements of the spans' left nodes, stored forces of the spans.
    loads : pairs of a unit load and its wrench density (n_spans, 6, n_cases or 1)
    """

    def __init__(
        self,
        pieces: Pieces,
        give: Flexibility,
        centre: Array,
        u_node: Array,
        s: Array,
        loads: Sequence[tuple[Gathered, Array]] = (),
    ) -> None:
        self.pieces, self._give, self._loads = pieces, give, loads
        self._u_node = u_node.transpose(1, 2, 0)
        self._s = _by_component(s, pieces)
        self._offset = stretch(centre, pieces) - pieces.left

    @cached_property
    def _densities(self) -> list[tuple[Gathered, Array]]:
        return [(load, _by_component(density, self.pieces)) for load, density in self._loads]

    @cached_property
    def force_left(self) -> Array:
        """Section forces just right of each piece's left end, (6, n_cases, m)."""
        force = _own_forces(self._s, self._offset)
        for load, density in self._densities:
            force = force + _load_forces(load.mu_left, load.nu_left, density)
        return force

    @cached_property
    def force_right(self) -> Array:
        """Section forces just left of each piece's right end, (6, n_cases, m)."""
        force = _own_forces(self._s, self._offset - self.pieces.length)
        for load, density in self._densities:
            force = force + _load_forces(load.mu_right, load.nu_right, density)
        return force

    @cached_property
    def u_left(self) -> Array:
        """Displacements at each piece's left end, (6, n_cases, m)."""
        steps, length = self._steps, self.pieces.length
        left = np.empty_like(steps)
        self._sum(slice(3, 6), left)
        steps[1] += left[5] * length
        steps[2] -= left[4] * length
        self._sum(slice(3), left)
        return left

    @cached_property
    def u_right(self) -> Array:
        """Displacements at each piece's right end, (6, n_cases, m)."""
        return self.u_left + self._steps

    def _sum(self, own: slice, left: Array) -> None:
        """Put the running sums of some displacements from the spans' left nodes into `left`."""
        sums = sums_before(self._steps[own], self.pieces, left[own])
        sums += stretch(self._u_node[own] - sums.take(self.pieces.starts, axis=-1), self.pieces)

    @cached_property
    def _steps(self) -> Array:
        """What each piece adds to the displacements; `u_left` adds what comes from the slope at its left end.

        Both planes go together: shear (V_y, V_z) with moment (M_z, -M_y), so that M' = -V in each; the moment is that
        at the piece's own elastic centre, where it only turns the right end and shear only shifts it.
        """
        give, s = self._give, self._s
        shear = s[1:3]
        moment = s[:3:-1] * _TURN_SIGNS + shear * (self._offset - give.centre)
        steps = np.empty_like(s)
        across, turn = steps[1:3], steps[:3:-1]
        np.multiply(give.axial, s[0], out=steps[0])
        np.multiply(give.torsion, s[3], out=steps[3])
        np.multiply(give.bending, moment, out=turn)
        np.multiply(self.pieces.length - give.centre, turn, out=across)
        across += (give.own + give.shear) * shear
        for load, density in self._densities:
            more = _load_steps(self.pieces.points, self.pieces.length, load, density)
            for own, each in zip((steps[0], across, steps[3], turn), more, strict=True):
                own += each
        np.negative(steps[4], out=steps[4])
        return steps


_TURN_SIGNS = np.array([1.0, -1.0])[:, None, None]


def _own_forces(s: Array, offset: Array) -> Array:
    """Section forces at a distance to the left of the elastic centre, the load's own part left out."""
    force = s.copy()
    force[4] -= s[2] * offset
    force[5] += s[1] * offset
    return force


def _load_steps(points: Points, length: Array, load: Gathered, density: Array) -> tuple[Array, Array, Array, Array]:
    """What a load's own part adds in each piece: along, across (2, ...), twist, turn (2, ...)."""
    g_mu, g_nu, far = points.bending * load.mu, points.bending * load.nu, length - points.eta
    force, couple = density[1:3], density[:3:-1] * _TURN_SIGNS
    shift = (g_nu * far - points.shear * load.mu).sum(axis=0)
    return (
        -(points.axial * load.mu).sum(axis=0) * density[0],
        shift * force - (g_mu * far).sum(axis=0) * couple,
        -(points.torsion * load.mu).sum(axis=0) * density[3],
        g_nu.sum(axis=0) * force - g_mu.sum(axis=0) * couple,
    )
