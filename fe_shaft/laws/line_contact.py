"""Line contact of steel on steel, slice by slice: load of a lamina, its energy and stiffness; pressure and half-width.

A lamina carries q = cs d^(10/9) at an approach d of the two rings; both contacts of the roller are in the constant.
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

#: Exponent of the law; its energy goes with EXPONENT + 1.
EXPONENT = 10 / 9
#: ISO/TS 16281 (from memory): a roller of length L carries 35948 L^(8/9) d^(10/9) [N, mm], both contacts in series.
#: The exponents add up to 2, so the constant is a stress and stands here in Pa.
SPRING_STRESS = 35948e6
#: Share by which any line-contact stiffness is uncertain. Of the laws in R. Teutsch and B. Sauer, J. Tribology 126
#: (2004), DOI 10.1115/1.1739244, the half-space ones (Dinnik, Tripp ...) are up to 11 % softer than this
#: one at loads up to 300 N/mm, at 1000 N/mm up to 13 %; Palmgren's is 3 to 4 % stiffer.
LINE_CONTACT_BAND = 0.10


def lamina_constant(length: Array, laminae: NDArray[np.int64]) -> Array:
    """Constant cs of each of the equal laminae of a roller [N / m^(10/9)], in N and mm 35948 L^(8/9) / n."""
    return np.asarray(SPRING_STRESS * length ** (8 / 9) / laminae)


class Sums(NamedTuple):
    """Over the laminae of rollers (r,): energies; loads times 1, x; stiffnesses times 1, x, x^2; of constants 1."""

    energy: Array
    load: Array
    load_x: Array
    stiffness: Array
    stiffness_x: Array
    stiffness_xx: Array


#: What the sums of `lamina_sums` lack: d^(19/9), d^(10/9) and d^(1/9) are the powers of energy, load and stiffness.
ENERGY, LOAD, STIFFNESS = 1 / (EXPONENT + 1), 1.0, EXPONENT


def lamina_sums(approach: Array, x: Array) -> Array:
    """Powers of approaches, times places, summed over the laminae: (6, r) in the order of `Sums`; 0 out of contact.

    The stiffness grows with an infinite slope where a lamina begins to touch, but from 0: every number here is finite.

    Parameters
    ----------
    approach : (n, r)
        d [m]; what is negative is overwritten by 0.
    x : (n, r)
        Places along the roller [m].
    """
    d = np.maximum(approach, 0, out=approach)
    terms = np.empty((len(Sums._fields), *d.shape))
    energy, load, load_x, stiffness, stiffness_x, stiffness_xx = terms
    np.power(d, EXPONENT - 1, out=stiffness)
    np.multiply(stiffness, d, out=load)
    np.multiply(load, d, out=energy)
    np.multiply(load, x, out=load_x)
    np.multiply(stiffness, x, out=stiffness_x)
    np.multiply(stiffness_x, x, out=stiffness_xx)
    return np.asarray(terms.sum(axis=1))


def lamina_load(approach: Array) -> Array:
    """d^(10/9) of approaches of any shape, 0 where nothing touches."""
    return np.asarray(np.maximum(approach, 0) ** EXPONENT)


def curvature_sums(diameter: Array, pitch_diameter: Array, cosine: Array) -> tuple[Array, Array]:
    """Curvature sums across the roller, of roller and inner, roller and outer race [1/m]; geometry alone.

    2/D / (1 - g) and 2/D / (1 + g), with g = D cos(a) / dm.
    """
    g = diameter * cosine / pitch_diameter
    return 2 / diameter / (1 - g), 2 / diameter / (1 + g)


def half_width(line_load: Array, curvature: Array, youngs: Array, poisson: Array) -> Array:
    """Half-width of a line contact of equal materials [m].

    sqrt(8 q (1 - nu^2) / (pi E S)), q in N/m, S the curvature sum in 1/m (Hertz, from memory).
    """
    return np.asarray(np.sqrt(8 * line_load * (1 - poisson**2) / (np.pi * youngs * curvature)))


def pressure(line_load: Array, curvature: Array, youngs: Array, poisson: Array) -> Array:
    """Largest pressure of a line contact [Pa]: 2 q / (pi b) = sqrt(q S E / (2 pi (1 - nu^2))) (Hertz, from memory)."""
    return np.asarray(np.sqrt(line_load * curvature * youngs / (2 * np.pi * (1 - poisson**2))))
