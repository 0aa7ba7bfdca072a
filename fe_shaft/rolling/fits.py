"""What fits and temperatures take from the clearance of a bearing: thick rings by Lame, hollow shafts, housings.

G. Lame and B. P. E. Clapeyron (1833); as in S. Timoshenko, Strength of Materials II, art. 41 (from memory). A ring is
a plain tube from its seat to the diameter of its raceway. With interference w on the seat's diameter s:

    p = (w / s) / [ flexibility of what is inside + of what is outside ]
    inside, tube t = hole / outer diameter:     (1 / E) ((1 + t^2) / (1 - t^2) - nu)
    outside, tube t = inner / outer diameter:   (1 / E) ((1 + t^2) / (1 - t^2) + nu)
    free edge of a tube under p on its other edge moves by  D_edge (p / E) 2 t^2 / (1 - t^2)  outwards from within,
    by  D_edge (p / E) 2 / (1 - t^2)  inwards from without.

A loose fit (w <= 0) has no pressure and moves nothing. All arguments broadcast; lengths in m, stress in Pa.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import NamedTuple

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.rolling.arrays import Array, floats
from fe_shaft.rolling.refusal import impossible, within

#: What peaks of roughness lose when a ring is pressed on: w d / (d + this) [m], by the seat's finish (read in a maker's
#: catalogue text).
GROUND, TURNED = 2e-3, 3e-3
#: Thermal expansion of bearing steel [1/K] (common practice, no source).
EXPANSION = 12.5e-6


@dataclass(frozen=True)
class Elastic:
    """Modulus [Pa], Poisson's ratio and thermal expansion [1/K] of a shaft, ring or housing."""

    youngs: float = 207e9
    poisson: float = 0.3
    expansion: float = EXPANSION


STEEL = Elastic()


class Press(NamedTuple):
    """What a fit does: pressure on the seat [Pa], clearance that it takes [m], both 0 or more."""

    pressure: Array
    loss: Array


def effective_interference(interference: ArrayLike, seat: ArrayLike, finish: float = GROUND) -> Array:
    """What is left of a measured interference [m] when the peaks are pressed flat; seat diameter [m]."""
    seat = floats(seat)
    return np.asarray(floats(interference) * seat / (seat + finish))


def loosening(bore: ArrayLike, width: ArrayLike, radial: ArrayLike) -> Array:
    """Interference [m] that a radial load Fr [N] takes from an inner ring: 0.08 sqrt(d Fr / B) um (from memory)."""
    return np.asarray(0.08e-6 * np.sqrt(floats(bore) / floats(width) * np.abs(floats(radial))))


def warmed(
    interference: ArrayLike,
    seat: ArrayLike,
    inner_rise: ArrayLike,
    outer_rise: ArrayLike,
    inner: Elastic = STEEL,
    outer: Elastic = STEEL,
) -> Array:
    """Interference [m] when what is inside (shaft, or ring) and outside (ring, or housing) are warmer by [K]."""
    grown = inner.expansion * floats(inner_rise) - outer.expansion * floats(outer_rise)
    return np.asarray(floats(interference) + floats(seat) * grown)


def press_inner(
    interference: ArrayLike,
    bore: ArrayLike,
    raceway: ArrayLike,
    shaft_bore: ArrayLike = 0.0,
    shaft: Elastic = STEEL,
    ring: Elastic = STEEL,
) -> Press:
    """Inner ring on a shaft.

    Parameters
    ----------
    interference : effective, on the diameter; negative is loose
    bore, raceway : inner and outer diameter of the ring
    shaft_bore : hole in the shaft, 0 is solid

    Raises
    ------
    ModelError
        Where the shaft's hole is not smaller than the bore or the bore not smaller than the raceway.
    """
    q = within(
        "shaft_bore",
        floats(shaft_bore) / floats(bore),
        0.0,
        1.0,
        "Give a hole smaller than the bearing's bore.",
        " bores",
    )
    k = within("bore", floats(bore) / floats(raceway), 0.0, 1.0, "Give a raceway larger than the bore.", " raceways")
    give = _inside(q, shaft) + _outside(k, ring)
    pressure = np.maximum(floats(interference) / floats(bore), 0.0) / give
    return Press(pressure, np.asarray(floats(raceway) * pressure / ring.youngs * 2 * k**2 / (1 - k**2)))


def press_outer(
    interference: ArrayLike,
    outer: ArrayLike,
    raceway: ArrayLike,
    housing_outer: ArrayLike = np.inf,
    housing: Elastic = STEEL,
    ring: Elastic = STEEL,
) -> Press:
    """Outer ring in a housing.

    Parameters
    ----------
    interference : effective, on the diameter; negative is loose
    outer, raceway : outer and inner diameter of the ring
    housing_outer : outer diameter of the housing taken as a tube; infinite is very thick

    Raises
    ------
    ModelError
        Where the housing is not larger than the ring or the raceway not smaller than it.
    """
    h = within(
        "raceway",
        floats(raceway) / floats(outer),
        0.0,
        1.0,
        "Give a raceway smaller than the outside.",
        " outside diameters",
    )
    h0 = within(
        "housing_outer",
        floats(outer) / floats(housing_outer),
        0.0,
        1.0,
        "Give a housing larger than the ring.",
        " housing diameters",
    )
    give = _outside(h0, housing) + _inside(h, ring)
    pressure = np.maximum(floats(interference) / floats(outer), 0.0) / give
    return Press(pressure, np.asarray(floats(raceway) * pressure / ring.youngs * 2 / (1 - h**2)))


def _inside(t: Array, part: Elastic) -> Array:
    return np.asarray(((1 + t**2) / (1 - t**2) - part.poisson) / part.youngs)


def _outside(t: Array, part: Elastic) -> Array:
    return np.asarray(((1 + t**2) / (1 - t**2) + part.poisson) / part.youngs)


def thermal_loss(
    inner_raceway: ArrayLike,
    outer_raceway: ArrayLike,
    inner_rise: ArrayLike,
    outer_rise: ArrayLike,
    element_rise: ArrayLike | None = None,
    ring: Elastic = STEEL,
) -> Array:
    """Radial clearance [m] that temperatures take; negative where the outer ring is the warmer one.

    Parameters
    ----------
    inner_raceway, outer_raceway : diameters [m]; half their difference is an element
    inner_rise, outer_rise : of the rings, above where the clearance was measured [K]
    element_rise : of balls or rollers [K]; without it as warm as the inner ring
    """
    inside, outside = floats(inner_raceway), floats(outer_raceway)
    if (outside <= inside).any():
        raise impossible("outer_raceway", "the outer raceway is not larger than the inner one. Give it in m.")
    elements = floats(inner_rise if element_rise is None else element_rise)
    grown = inside * floats(inner_rise) + (outside - inside) * elements - outside * floats(outer_rise)
    return np.asarray(ring.expansion * grown)


def usual_raceways(bore: ArrayLike, outer: ArrayLike, rollers: bool = False) -> tuple[Array, Array]:
    """Raceway diameters [m] where only d and D are known: the outer (4 D + d) / 5, of rollers (3 D + d) / 4.

    The inner one lies as far inside the mean circle. Common practice, no source.
    """
    d, large = floats(bore), floats(outer)
    outside = (3 * large + d) / 4 if rollers else (4 * large + d) / 5
    return d + large - outside, outside
