"""The contour in pieces: sections of segments, cylinders and cones between grid stations, their Gauss points."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from fe_shaft.fem.section import area, cowper, cowper_solid

Array = NDArray[np.float64]
Ints = NDArray[np.intp]

#: A cone is cut until its diameters differ by no more than this ratio; eight Gauss points are then exact to rounding.
CONE_RATIO = 1.2
#: Exact to the fifth power: the energy of a spread load goes with the square of a moment that grows with the square.
GAUSS_CYLINDER = np.polynomial.legendre.leggauss(3)
GAUSS_CONE = np.polynomial.legendre.leggauss(8)


class Outline(NamedTuple):
    """Diameters and bores at both ends of every segment, (n,) each [m]."""

    diameter_left: Array
    diameter_right: Array
    bore_left: Array
    bore_right: Array


@dataclass(frozen=True)
class Sections:
    """Segments of all shafts, one after the other, (n,) each; material figures may be (1,) where all are the same.

    Attributes
    ----------
    diameter_left, diameter_right, bore_left, bore_right : [m]
    youngs_modulus, shear_modulus : [Pa]
    poisson_ratio, density : [-], [kg/m^3]
    shear_coefficient : [-]
        NaN: Cowper's of the section; infinite: no shear deformation.
    drawn : Outline, optional
        What weighs and is drawn, where the segments work by other diameters.
    """

    diameter_left: Array
    diameter_right: Array
    bore_left: Array
    bore_right: Array
    youngs_modulus: Array
    shear_modulus: Array
    poisson_ratio: Array
    density: Array
    shear_coefficient: Array
    drawn: Outline | None = None

    @cached_property
    def flexibility_rates(self) -> Array:
        """Axial, torsional, shear and bending flexibility per length at the left ends, (4, n)."""
        return _rates(
            self.diameter_left,
            self.bore_left,
            self.youngs_modulus,
            self.shear_modulus,
            self.poisson_ratio,
            self.shear_coefficient,
        )


def _rates(diameter: Array, bore: Array, e: Array, g: Array, nu: Array, kappa: Array) -> Array:
    hollow = bool(bore.any())
    squares = diameter * diameter + bore * bore if hollow else diameter * diameter
    stiffness = e * (area(diameter, bore) if hollow else (np.pi / 4) * squares)
    rates = np.empty((4, *stiffness.shape))
    np.divide(1.0, stiffness, out=rates[0])
    rates[3] = rates[0] * (16 / squares)
    ratio = e / g
    rates[1] = rates[3] * (ratio / 2)
    by_cowper = np.isnan(kappa)
    if by_cowper.any():
        own = cowper(diameter, bore, nu) if hollow else cowper_solid(nu)
        kappa = own if by_cowper.all() else np.where(by_cowper, own, kappa)
    rates[2] = rates[0] * (ratio / kappa)
    return rates


class Points(NamedTuple):
    """Flexibility that sits at points of the pieces, (q, m) each: Gauss points of their sections, or shoulders.

    Attributes
    ----------
    eta : [m], from the piece's left end
    axial, torsion, shear, bending : [m/N, rad/(N m), m/N, rad/(N m)]
    """

    eta: Array
    axial: Array
    torsion: Array
    shear: Array
    bending: Array

    def cut(self, pieces: Ints, length: Array) -> Points:
        """Of pieces that are cut at a distance from their left ends: what lies before the cut.

        Cut at the left end itself, a piece has none: there a place lies before the shoulder.
        """
        before = (self.eta[:, pieces] < length) & (length > np.finfo(float).tiny)
        return Points(self.eta[:, pieces], *(of[:, pieces] * before for of in self[1:]))


@dataclass(frozen=True)
class Pieces:
    """Cylinders and cones between neighbouring grid stations, span after span, left to right.

    Attributes
    ----------
    starts, counts : (n_spans,)
        First piece of each span, and number of its pieces.
    left, length : (m,) [m]
        Distance of the piece from its span's left node, and its length.
    segment : (m,)
        The segment each piece was cut from.
    share_left, share_right : (m,) or None
        Where in its segment a piece begins and ends, 0 to 1; None without cones.
    chains : first piece of each further chain of spans (a model's other shafts)
    hanging : spans beyond their chain's last support: loads gather from their free right ends
    lumps : of the shoulders, None without any
    """

    starts: Ints
    counts: Ints
    left: Array
    length: Array
    segment: Ints
    sections: Sections
    share_left: Array | None = None
    share_right: Array | None = None
    chains: tuple[int, ...] = ()
    hanging: tuple[int, ...] = ()
    lumps: Points | None = None

    @property
    def tapered(self) -> bool:
        """Whether any piece is a cone."""
        return self.share_left is not None

    @cached_property
    def span(self) -> Ints:
        """The span each piece belongs to, ascending, (m,)."""
        return np.arange(len(self.starts)).repeat(self.counts)

    @property
    def last(self) -> Ints:
        """Last piece of each span."""
        return self.starts + self.counts - 1

    def _of_segment(self, values: Array) -> Array:
        return values if len(values) == 1 else values[self.segment]

    def _along(self, first: Array, last: Array, share: Array | None) -> Array:
        begin = first[self.segment]
        return begin if share is None else begin + (last[self.segment] - begin) * share

    @cached_property
    def diameter_left(self) -> Array:
        """(m,) [m]."""
        return self._along(self.sections.diameter_left, self.sections.diameter_right, self.share_left)

    @cached_property
    def diameter_right(self) -> Array:
        """(m,) [m]."""
        return self._along(self.sections.diameter_left, self.sections.diameter_right, self.share_right)

    @cached_property
    def bore_left(self) -> Array:
        """(m,) [m]."""
        return self._along(self.sections.bore_left, self.sections.bore_right, self.share_left)

    @cached_property
    def bore_right(self) -> Array:
        """(m,) [m]."""
        return self._along(self.sections.bore_left, self.sections.bore_right, self.share_right)

    @cached_property
    def drawn(self) -> Outline:
        """Outline of the pieces themselves as drawn, (m,) each [m]."""
        if self.sections.drawn is None:
            return Outline(self.diameter_left, self.diameter_right, self.bore_left, self.bore_right)
        of = self.sections.drawn
        sides = (self.share_left, self.share_right if self.tapered else None)
        return Outline(
            *(self._along(of.diameter_left, of.diameter_right, share) for share in sides),
            *(self._along(of.bore_left, of.bore_right, share) for share in sides),
        )

    @cached_property
    def mass_per_length(self) -> tuple[Array, Array, Array]:
        """Coefficients of 1, eta, eta^2 of the mass per length, (m,) each [kg/m, kg/m^2, kg/m^3]."""
        scale = self._of_segment(self.sections.density) * (np.pi / 4)
        d, d_right, b, b_right = self.drawn
        c0 = scale * (d - b) * (d + b)
        if not self.tapered:
            return c0, np.zeros_like(c0), np.zeros_like(c0)
        grow_d, grow_b = (d_right - d) / self.length, (b_right - b) / self.length
        return c0, 2 * scale * (d * grow_d - b * grow_b), scale * (grow_d**2 - grow_b**2)

    @cached_property
    def points(self) -> Points:
        """Three Gauss points a cylinder, eight a cone."""
        nodes, weights = GAUSS_CONE if self.tapered else GAUSS_CYLINDER
        share = ((nodes + 1) / 2)[:, None]
        eta, weight = share * self.length, (weights / 2)[:, None] * self.length
        if not self.tapered:
            rates = self.sections.flexibility_rates[:, None, self.segment]
        else:
            diameter = self.diameter_left + share * (self.diameter_right - self.diameter_left)
            bore = self.bore_left + share * (self.bore_right - self.bore_left)
            of = self.sections
            per_segment = (of.youngs_modulus, of.shear_modulus, of.poisson_ratio, of.shear_coefficient)
            rates = _rates(diameter, bore, *(self._of_segment(values) for values in per_segment))
        own = Points(eta, *(rates * weight))
        if self.lumps is None:
            return own
        return Points(*(np.concatenate(pair) for pair in zip(own, self.lumps, strict=True)))


def stretch(of_spans: Array, pieces: Pieces) -> Array:
    """Values of the spans, (..., n_spans), repeated for their pieces, (..., m)."""
    return of_spans.repeat(pieces.counts, axis=-1)


def sums_before(steps: Array, pieces: Pieces, out: Array | None = None) -> Array:
    """Sums of the steps of the pieces to the left, (..., m), of which only differences within a span mean something.

    They start anew in each chain, so that large movements of one shaft do not round off small ones of another.
    """
    before = np.empty_like(steps) if out is None else out
    if len(pieces.starts) == steps.shape[-1]:  # every piece is a span of its own
        before.fill(0.0)
        return before
    ends = (*pieces.chains, steps.shape[-1])
    for first, last in zip((0, *pieces.chains), ends, strict=True):
        before[..., first] = 0.0
        np.add.accumulate(steps[..., first : last - 1], axis=-1, out=before[..., first + 1 : last])
    return before


def sums_in_spans(steps: Array, pieces: Pieces) -> Array:
    """Sums of the steps to the left of each piece within its span, (m,), to the rounding of each sum itself.

    One running sum over everything, with its rounding errors beside it, so that the difference of two large sums keeps
    the digits of a small one ("Sum2" of Ogita, Rump and Oishi, 2005, SIAM J. Sci. Comput. 26).
    """
    sums = np.concatenate([[0.0], np.cumsum(steps)])
    before, after = sums[:-1], sums[1:]
    added = after - before
    missed = np.concatenate([[0.0], np.cumsum((before - (after - added)) + (steps - added))[:-1]])
    large, small = (part - stretch(part[pieces.starts], pieces) for part in (before, missed))
    return large + small
