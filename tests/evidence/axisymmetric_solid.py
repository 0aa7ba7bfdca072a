r"""Axisymmetric solids of stepped round bars with scikit-fem, and what the steps add to the flexibility of the beam.

Coordinates (r, theta, z), z along the bar; the meridian is meshed in the plane (z, r). Displacements are one Fourier
harmonic in theta, so each mode is a problem in two dimensions:

    axial    (harmonic 0)   u_r = U            u_z = W
    torsion  (harmonic 0)   u_theta = V
    bending  (harmonic 1)   u_r = U cos theta  u_z = W cos theta  u_theta = V sin theta

Strains in cylindrical coordinates, gamma the engineering shear strain (S. P. Timoshenko, J. N. Goodier, Theory of
Elasticity, 3rd ed. 1970; formulas from memory):

    eps_r = u_r,r                                    gamma_rz     = u_r,z + u_z,r
    eps_t = u_r / r + u_theta,t / r                  gamma_rtheta = u_r,t / r + u_theta,r - u_theta / r
    eps_z = u_z,z                                    gamma_ztheta = u_theta,z + u_z,t / r

With harmonic 1 this is, with the factor cos theta or sin theta of each:

    cos:  eps_r = U,r    eps_t = (U + V) / r    eps_z = W,z    gamma_rz = U,z + W,r
    sin:  gamma_rtheta = V,r - (U + V) / r      gamma_ztheta = V,z - W / r

The integral over theta of cos^2 and of sin^2 is pi (of 1 in harmonic 0: 2 pi), so the weak form of every mode is

    c int [ lambda tr(eps) tr(eps*) + 2 mu eps . eps* + mu gamma . gamma* ] r dr dz = work of the end tractions on *,
    c = 2 pi or pi,   lambda = E nu / ((1 + nu)(1 - 2 nu)),   mu = E / (2 (1 + nu)),   * = test function.

Unknowns of harmonic 1 are P = U + V, Q = U - V and W: energy stays finite where the axis is in the solid if P = W = 0
there, while Q (the axis moves sideways) is free. Harmonic 0 has U = 0 or V = 0 on the axis.

Ends: each end carries the tractions which a section has far from any disturbance, those of both in equilibrium:
sigma_z = N / A, tau_ztheta = T r / I_p, sigma_z = (M / I) r cos theta. Nothing is held but the rigid motions, at a node
or two which get no reaction. So a uniform bar is exact, as Saint-Venant's fields, up to a factor,
    axial U = -nu r, W = z;   torsion V = z r;   bending P = -nu r^2, Q = -z^2, W = z r
are polynomials of the element. What a step disturbs dies out towards the ends, 1.5 diameters or more away.

Measure: the movement of the ends that does work with the load, a mean over the section weighted by the tractions. In
bending it is the rotation
    phi = 1 / M . pi int (M r / I) W r dr,   right end less left end,
likewise the twist and the extension; each equals twice the strain energy divided by the load. The flexibility is phi
per load, f . u for the unit load's vector f. From it the plain beam is taken off:

    dL = (flexibility - sum L_i / S_i) S_w,   S = E A, G I_p or E I;   w: the segment with the smallest S,

so dL is an extra length of the weakest section. It depends on nu but not on E.

Elements: quadratic quadrilaterals on the mesh of `meridian`. They fit together, so they make a solid too stiff and
never too soft: every flexibility comes out below the exact one.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Any, NamedTuple

import numpy as np
from numpy.typing import NDArray
from scipy.sparse.linalg import splu
from skfem import Basis, BilinearForm, ElementQuad2, ElementVector, FacetBasis, LinearForm, condense
from skfem.element import Element
from skfem.helpers import grad

from tests.evidence.meridian import Bar, Segment

E, NU = 210e9, 0.3
MU = E / (2 * (1 + NU))
LAMBDA = E * NU / ((1 + NU) * (1 - 2 * NU))


class Mode(NamedTuple):
    """What tells axial, torsion and bending apart. Components: U, W; V; P, Q, W."""

    components: int
    strains: Callable[[Any, Any], tuple[tuple[Any, ...], tuple[Any, ...]]]  # normal and shear strains
    along: int  # the component the end tractions work on
    power: int  # the tractions grow as r to this power
    circle: float  # integral of cos^2, sin^2 or 1 over theta
    on_axis: tuple[int, ...]  # components that vanish on the axis
    modulus: float
    section: Callable[[Segment], float]  # A, I_p or I

    @property
    def element(self) -> Element:  # scikit-fem 12 loses the edge nodes of a vector with one component
        return ElementVector(ElementQuad2(), self.components) if self.components > 1 else ElementQuad2()


def area(s: Segment) -> float:
    return np.pi / 4 * (s.diameter**2 - s.bore**2)


def second_moment(s: Segment) -> float:
    return np.pi / 64 * (s.diameter**4 - s.bore**4)


def polar_moment(s: Segment) -> float:
    return 2 * second_moment(s)


def axial_strains(u: Any, r: Any) -> tuple[tuple[Any, ...], tuple[Any, ...]]:
    (U, _), ((U_z, U_r), (W_z, W_r)) = u, grad(u)
    return (U_r, U / r, W_z), (U_z + W_r,)


def torsion_strains(u: Any, r: Any) -> tuple[tuple[Any, ...], tuple[Any, ...]]:
    V, (V_z, V_r) = u, grad(u)
    return (), (V_r - V / r, V_z)


def bending_strains(u: Any, r: Any) -> tuple[tuple[Any, ...], tuple[Any, ...]]:
    (P, _, W), ((P_z, P_r), (Q_z, Q_r), (W_z, W_r)) = u, grad(u)
    normal = (P_r + Q_r) / 2, P / r, W_z
    return normal, ((P_z + Q_z) / 2 + W_r, (P_r - Q_r) / 2 - P / r, (P_z - Q_z) / 2 - W / r)


MODES = {
    "bending": Mode(3, bending_strains, 2, 1, np.pi, (0, 2), E, second_moment),
    "torsion": Mode(1, torsion_strains, 0, 1, 2 * np.pi, (0,), MU, polar_moment),
    "axial": Mode(2, axial_strains, 1, 0, 2 * np.pi, (0,), E, area),
}


@BilinearForm
def strain_energy(u: Any, v: Any, w: Any) -> Any:
    r = w.x[1]
    (eps, gamma), (eps_v, gamma_v) = w.mode.strains(u, r), w.mode.strains(v, r)
    shear = MU * sum(a * b for a, b in zip(gamma, gamma_v, strict=True))
    stretch = 2 * MU * sum(a * b for a, b in zip(eps, eps_v, strict=True))
    return w.mode.circle * r * (LAMBDA * sum(eps) * sum(eps_v) + stretch + shear)


@LinearForm
def end_tractions(v: Any, w: Any) -> Any:
    moved = v[w.mode.along] if w.mode.components > 1 else v
    return w.mode.circle * w.sign * w.x[1] ** (w.mode.power + 1) / w.section * moved


def meridian_basis(bar: Bar, mode: Mode) -> Basis:
    return Basis(bar.mesh, mode.element, intorder=5)


def flexibility(bar: Bar, mode: Mode) -> float:
    """Movement of the ends against each other per unit load: m/N, or rad per N m."""
    basis = meridian_basis(bar, mode)
    load = np.zeros(basis.N)
    for z, sign, segment in ((0.0, -1, bar.segments[0]), (bar.planes[-1], 1, bar.segments[-1])):
        face = bar.mesh.facets_satisfying(lambda x, z=z: np.isclose(x[0], z))
        end = FacetBasis(bar.mesh, basis.elem, facets=face, intorder=5)
        load += end_tractions.assemble(end, mode=mode, sign=sign, section=mode.section(segment))
    stiffness = strain_energy.assemble(basis, mode=mode)
    K, f = condense(stiffness, load, D=held(bar, basis, mode), expand=False)
    # The matrix is symmetric and positive: no pivoting, and the order of a symmetric pattern.
    factors = splu(K.tocsc(), permc_spec="MMD_AT_PLUS_A", diag_pivot_thresh=0.0, options={"SymmetricMode": True})
    return float(f @ factors.solve(f))


def held(bar: Bar, basis: Basis, mode: Mode) -> NDArray[np.intp]:
    """Degrees of freedom that are 0: on the axis by symmetry, and as many at the left end as rigid motions."""
    (z, r), first = basis.doflocs, bar.segments[0]
    rim, inside = ((z == 0) & np.isclose(r, x / 2) for x in (first.diameter, first.bore))
    places = [(r == 0, component) for component in mode.on_axis]
    places.append((rim, mode.along))  # against shift, twist or tilt
    if mode.components == 3:
        places.append((inside, 1))  # Q, against moving sideways
    of = basis.split_indices()
    return np.unique(np.concatenate([of[component][where[of[component]]] for where, component in places]))


def added_length(bar: Bar, name: str) -> float:
    """What the steps add to the plain beam, as a length of the weakest section."""
    mode = MODES[name]
    stiffness = mode.modulus * np.array([mode.section(s) for s in bar.segments])
    plain = np.sum([s.length for s in bar.segments] / stiffness)
    return float((flexibility(bar, mode) - plain) * stiffness.min())
