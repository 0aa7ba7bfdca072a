"""Distributed loads of spans: what has gathered up to a place, and what it does to forces, deformations and energy.

The load's own part is statically determinate; its signs stand in `span`. It leaves the left end free, in spans that
hang beyond the last support the right end.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.dofs import NDOF
from fe_shaft.fem.pieces import Pieces, Points, stretch, sums_in_spans
from fe_shaft.fem.span import Spans

Array = NDArray[np.float64]

#: Signs of both planes in one array: M_z, -M_y.
TURN_SIGNS = np.array([1.0, -1.0])[:, None, None]
_ONES = np.eye(NDOF)


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
        load_part = load_part + load_forces(load.mu, load.nu, by_component(density, pieces)[:, :, None])
    offset = stretch(centre, pieces) - pieces.left - points.eta
    of_points = np.repeat(by_component(s, pieces)[:, :, None], len(points.eta), axis=2)
    force = own_forces(of_points, offset) + load_part
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


def by_component(of_spans: Array, pieces: Pieces) -> Array:
    """(n_spans, 6, n_cases) to the pieces, (6, n_cases, m)."""
    return stretch(of_spans.transpose(1, 2, 0), pieces)


def load_forces(mu: Array, nu: Array, density: Array) -> Array:
    """Section forces of a load's own part; density (6, n_cases, ...)."""
    force = -mu * density
    force[4] -= nu * density[2]
    force[5] += nu * density[1]
    return force


def own_forces(s: Array, offset: Array) -> Array:
    """Section forces at a distance to the left of the elastic centre, the load's own part left out."""
    force = s.copy()
    force[4] -= s[2] * offset
    force[5] += s[1] * offset
    return force


def load_steps(points: Points, length: Array, load: Gathered, density: Array) -> tuple[Array, Array, Array, Array]:
    """What a load's own part adds in each piece: along, across (2, ...), twist, turn (2, ...)."""
    g_mu, g_nu, far = points.bending * load.mu, points.bending * load.nu, length - points.eta
    force, couple = density[1:3], density[:3:-1] * TURN_SIGNS
    shift = (g_nu * far - points.shear * load.mu).sum(axis=0)
    return (
        -(points.axial * load.mu).sum(axis=0) * density[0],
        shift * force - (g_mu * far).sum(axis=0) * couple,
        -(points.torsion * load.mu).sum(axis=0) * density[3],
        g_nu.sum(axis=0) * force - g_mu.sum(axis=0) * couple,
    )
