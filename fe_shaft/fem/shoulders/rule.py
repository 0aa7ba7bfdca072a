"""The shoulder rule: its constants, the flexibility of sections, the decaying field, the isolated shoulder.

A rule made for this project from its own solid solutions (axisymmetric finite elements, Poisson's ratio 0.3): a section
is at least nearly as flexible as every other section, the flexibility of the other decayed with the distance. At x in
segment k

    f_eff(x) = (1 - y) f_k + y max_j [f_j g(s_j / l_jk)],    g(u) = (1 + u^p)^(-1/m),    p = m / (1 - m)

with f_j the flexibility of segment j, s_j the distance of x from it (0 inside) and its reach

    l_jk = (a / y) D_j h_j exp(mu_j [(beta + gamma) b_k / D_j - gamma mu_j]),    mu_j = b_j / D_j
    h    = 1 - mu^4 (bending, torsion), 1 - mu^2 (axial), 1 / (1 + 4.5 mu^2) (shear).

The surplus f_eff - f_k, summed over the x at which one end of one segment gives the maximum, is the lump of that end.
For one step between long segments the sum is a d h exp(beta mu^2) f_d (1 - (f_D / f_d)^m)^(1/m).

======== ======= ======= ======= ======= ===================================================================
constant bending torsion axial   shear   meaning
======== ======= ======= ======= ======= ===================================================================
a        .268    .168    .670    .295    surplus length of a step to an infinite section, in thin diameters
m        .635    .635    .590    .590    shape: how the surplus grows with the height of the step
y        .756    .887    .824    .824    share of the field: a collar of no width keeps 1 - y of its stiffening
beta     .53     0       .20     0       reach in a bore that goes on
gamma    0       0       1.1     0       reach where a bore ends or narrows
lambda   .72     1.03    .72     .35     length of a fillet's piece, in radii
nu       1.0     .27     1.0     .70     share of the radius that the piece carries
k_bore   .126    .067    .160    .160    length of a bore end's piece, in diameters of the wider bore
power    4       4       2       2       power with which a bore counts there
======== ======= ======= ======= ======= ===================================================================

Range of the fit: D/d 1.1 to 3 (one step alone 1.01 to 6), width of collars and grooves .05 to 2 d, r/d 0 to .1,
b/d 0 to .85, ends 1.5 to 2 d long. In shear the bore and fillet constants rest on few cases, y and k_bore are axial's.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.fem.section import cowper

Array = NDArray[np.float64]

#: The modes, in the order in which every array has them first.
MODES = ("bending", "torsion", "axial", "shear")


def _of_modes(*values: float) -> Array:
    out = np.array(values)
    out.flags.writeable = False
    return out


A = _of_modes(0.268, 0.168, 0.670, 0.295)
M = _of_modes(0.635, 0.635, 0.590, 0.590)
Y = _of_modes(0.756, 0.887, 0.824, 0.824)
BETA = _of_modes(0.53, 0.0, 0.20, 0.0)
GAMMA = _of_modes(0.0, 0.0, 1.1, 0.0)
LAMBDA = _of_modes(0.72, 1.03, 0.72, 0.35)
NU = _of_modes(1.0, 0.27, 1.0, 0.70)
K_BORE = _of_modes(0.126, 0.067, 0.160, 0.160)
POWER_BORE = _of_modes(4.0, 4.0, 2.0, 2.0)
#: Makes field and isolated shoulder a Legendre pair, so that one shape m serves both.
P = _of_modes(*(M / (1 - M)))
#: Makes sums of 1/(D^4 - b^4) and 1/(D^2 - b^2) flexibilities, once divided by E, G, E, G.
SECTION_FACTORS = _of_modes(64 / np.pi, 32 / np.pi, 4 / np.pi, 4 / np.pi)

#: The piece of a fillet ends within this share of its segment's length, that of a bore's end within the other.
FILLET_LIMIT, BORE_LIMIT = 0.28, 0.20
#: A wider bore counts up to this share of the diameter of the narrower-bored segment.
WIDEST_BORE = 0.9
#: Shear warping of the thick section does not fit the thin one: measure of how far inside a bending lump lies.
OFFSET = 0.030
#: Bore in the reach of shear.
SHEAR_BORE = 4.5


def per_mode(constant: Array, like: Array) -> Array:
    """A constant (4,) against an array with the modes first."""
    return constant.reshape(-1, *(1,) * (like.ndim - 1))


def modes_first(values: Array) -> Array:
    """Repeat an array without modes for all four, as a view; those with the modes first, (4 or 1, ...), likewise."""
    return np.broadcast_to(values, (4, *values.shape[1:]))


def flexibility(diameter: Array, bore: Array, poisson: Array) -> Array:
    """1/(D^4 - b^4) twice, 1/(D^2 - b^2), 1/(kappa (D^2 - b^2)): (4, ...).

    Parameters
    ----------
    diameter, bore : (4 or 1, ...)
    poisson : (...)
    """
    d, b = modes_first(diameter), modes_first(bore)
    out = 1 / ((d - b) * (d + b))
    out[:2] /= d[:2] ** 2 + b[:2] ** 2
    out[3] /= cowper(d[3], b[3], poisson)
    return out


def flexibility_slopes(diameter: Array, bore: Array, poisson: Array) -> tuple[Array, Array]:
    """Derivatives of `flexibility` with respect to diameter and bore, (4, ...) each."""
    d, b = modes_first(diameter), modes_first(bore)
    f = flexibility(d, b, poisson)
    by_d, by_b = -2 * d * f**2, 2 * b * f**2
    by_d[:2] *= 2 * d[:2] ** 2
    by_b[:2] *= 2 * b[:2] ** 2
    kappa = cowper(d[3], b[3], poisson)
    m2 = (b[3] / d[3]) ** 2
    p1 = 1 + m2
    own = 7 + 6 * poisson
    other = 20 + 12 * poisson
    by_m2 = 2 / p1 - (2 * own * p1 + other) / (own * p1**2 + other * m2)  # of ln kappa
    by_d[3] = by_d[3] * kappa + f[3] * by_m2 * 2 * m2 / d[3]
    by_b[3] = by_b[3] * kappa - f[3] * by_m2 * 2 * b[3] / d[3] ** 2
    return by_d, by_b


def thickness(mu: Array) -> Array:
    """How a bore shortens the reach: h of each mode, (4, ...); mu (4, ...)."""
    m2 = mu * mu
    out = 1 - m2
    out[:2] *= 1 + m2[:2]
    out[3] = 1 / (1 + SHEAR_BORE * m2[3])
    return out


def thickness_slope(mu: Array) -> Array:
    """Derivative of ln h by mu, (4, ...)."""
    m2 = mu * mu
    out = -2 * mu / (1 - m2)
    out[:2] *= 2 * m2[:2] / (1 + m2[:2])
    out[3] = -2 * SHEAR_BORE * mu[3] / (1 + SHEAR_BORE * m2[3])
    return out


def isolated_shoulder(thin: ArrayLike, thick: ArrayLike, bore: ArrayLike = 0.0, poisson: ArrayLike = 0.3) -> Array:
    """Lumps of one sharp step between two long segments of one bore, (4, ...), in the units of `shoulder_lumps`."""
    d, big, b, nu = np.broadcast_arrays(*(np.asarray(x, dtype=np.float64) for x in (thin, thick, bore, poisson)))
    f, f_big = flexibility(d[None], b[None], nu), flexibility(big[None], b[None], nu)
    mu = modes_first((b / d)[None])
    m, length = per_mode(M, f), per_mode(A, f) * d * thickness(mu) * np.exp(per_mode(BETA, f) * mu**2)
    return np.asarray(per_mode(SECTION_FACTORS, f) * length * f * (1 - (f_big / f) ** m) ** (1 / m))
