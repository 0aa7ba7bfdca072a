"""Clearance as a bearing runs: what it had on the shelf less what its fits and its warmth take."""

from __future__ import annotations

from dataclasses import dataclass
from typing import NamedTuple

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.rolling.arrays import Array, floats
from fe_shaft.rolling.fits import STEEL, Elastic, Press, press_inner, press_outer, thermal_loss, warmed


@dataclass(frozen=True)
class Rings:
    """Diameters of a bearing's rings [m]: bore, inner raceway, outer raceway, outside; numbers or arrays alike."""

    bore: ArrayLike
    inner_raceway: ArrayLike
    outer_raceway: ArrayLike
    outer: ArrayLike


@dataclass(frozen=True)
class Seats:
    """How a bearing sits.

    Attributes
    ----------
    shaft_interference, housing_interference : effective, cold, on the diameter; negative is loose [m]
    shaft_bore, housing_outer : hole of the shaft, outside of the housing as a tube [m]
    shaft, housing : what they are made of
    """

    shaft_interference: ArrayLike = 0.0
    housing_interference: ArrayLike = 0.0
    shaft_bore: ArrayLike = 0.0
    housing_outer: ArrayLike = np.inf
    shaft: Elastic = STEEL
    housing: Elastic = STEEL


@dataclass(frozen=True)
class Warmth:
    """Rises of temperature above where clearance and fits were measured [K]; None is as warm as the ring it touches."""

    inner: ArrayLike = 0.0
    outer: ArrayLike = 0.0
    elements: ArrayLike | None = None
    shaft: ArrayLike | None = None
    housing: ArrayLike | None = None


class Running(NamedTuple):
    """Clearance [m] mounted and running (negative is interference); what took it [m]; the fits' pressures [Pa]."""

    mounted: Array
    running: Array
    by_shaft: Array
    by_housing: Array
    by_warmth: Array
    shaft_pressure: Array
    housing_pressure: Array


def running_clearance(
    unmounted: ArrayLike, rings: Rings, seats: Seats | None = None, warmth: Warmth | None = None, ring: Elastic = STEEL
) -> Running:
    """Radial internal clearance from the shelf to the running machine.

    `mounted` is cold, `running` warm; what the fits take is told warm. The fits change with warmth where shaft,
    housing and rings differ in temperature or expansion.

    Raises
    ------
    ModelError
        Where diameters do not follow each other from the shaft's hole to the housing.
    """
    seats, warm = seats or Seats(), warmth or Warmth()
    cold = _fits(rings, seats, Warmth(), ring)
    hot = _fits(rings, seats, warm, ring)
    lost = thermal_loss(rings.inner_raceway, rings.outer_raceway, warm.inner, warm.outer, warm.elements, ring)
    mounted = np.asarray(floats(unmounted) - cold[0].loss - cold[1].loss)
    after = np.asarray(floats(unmounted) - hot[0].loss - hot[1].loss - lost)
    return Running(mounted, after, hot[0].loss, hot[1].loss, lost, hot[0].pressure, hot[1].pressure)


def _fits(rings: Rings, seats: Seats, warm: Warmth, ring: Elastic) -> tuple[Press, Press]:
    shaft_rise = warm.inner if warm.shaft is None else warm.shaft
    housing_rise = warm.outer if warm.housing is None else warm.housing
    on_shaft = warmed(seats.shaft_interference, rings.bore, shaft_rise, warm.inner, seats.shaft, ring)
    in_housing = warmed(seats.housing_interference, rings.outer, warm.outer, housing_rise, ring, seats.housing)
    return (
        press_inner(on_shaft, rings.bore, rings.inner_raceway, seats.shaft_bore, seats.shaft, ring),
        press_outer(in_housing, rings.outer, rings.outer_raceway, seats.housing_outer, seats.housing, ring),
    )
