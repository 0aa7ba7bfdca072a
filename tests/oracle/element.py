"""One cylinder or cone of a chain: its exact flexibility, stiffness and loads, with many digits.

The element is thought clamped at its left node i; the forces at its right node j are the section
forces there. u_j = T u_i + f p_j + u_0 with the flexibility f and the movement u_0 of j under the
loads on the element (principle of virtual forces; Timoshenko's beam, plane sections, round section).
Integrals by Gauss-Legendre. Cones are cut until each piece lies so far from the nearest zero of
d^4 - b^4 that the rule is exact to the working precision.

Order ux uy uz rx ry rz; dv/dx = +theta_z, dw/dx = -theta_y for a slender beam.
"""

from __future__ import annotations

import cmath
from collections.abc import Sequence
from dataclasses import dataclass
from decimal import Decimal, getcontext
from typing import Literal

from tests.oracle.digits import (
    ONE,
    ZERO,
    Matrix,
    Number,
    Vector,
    gauss_points,
    number,
    numbers,
    pi,
    product,
    times,
    transposed,
    zeros,
)

CONE_POINTS = 48
CYLINDER_POINTS = 5
"""Exact up to degree 9; loads on a cylinder make integrands of degree 4 at most."""


@dataclass(frozen=True, slots=True)
class Element:
    """A cylinder or cone, left to right [m, Pa, kg/m^3].

    Parameters
    ----------
    end_diameter, end_bore
        At the right end; None: as at the left end.
    shear
        Shear coefficient kappa; "cowper": from the local bore ratio and `poisson_ratio`; None: no shear.
    """

    length: Number
    diameter: Number
    youngs_modulus: Number
    shear_modulus: Number
    end_diameter: Number | None = None
    bore: Number = 0
    end_bore: Number | None = None
    shear: Number | Literal["cowper"] | None = "cowper"
    poisson_ratio: Number = Decimal("0.3")
    density: Number = 0


@dataclass(frozen=True, slots=True)
class Integrals:
    """What an element's round section adds up to; y is the distance to the right node.

    bend[k] = int y^k/EI, shear[k] = int y^k/kGA, stretch[k] = int y^k/EA, twist[k] = int y^k/GJ;
    own[...]: under a unit acceleration along an axis, with the weight beyond y = first[...].
    """

    bend: Vector
    shear: Vector
    stretch: Vector
    twist: Vector
    own_stretch: Decimal
    own_deflection: Decimal
    own_rotation: Decimal
    mass: Decimal
    moment: Decimal


def integrals(element: Element) -> Integrals:
    """Integrate the section's compliances over an element."""
    length = number(element.length)
    d1, d2, b1, b2 = ends(element)
    e_modulus, g_modulus, density = numbers([element.youngs_modulus, element.shear_modulus, element.density])
    quarter_pi = pi() / 4
    d_slope, b_slope = (d2 - d1) / length, (b2 - b1) / length
    # Area = a0 + a1 y + a2 y^2, so the mass beyond a section and its moment about it are polynomials.
    a0 = density * quarter_pi * (d2 * d2 - b2 * b2)
    a1 = -2 * density * quarter_pi * (d_slope * d2 - b_slope * b2)
    a2 = density * quarter_pi * (d_slope * d_slope - b_slope * b_slope)
    bend, shear, stretch, twist = [ZERO] * 4, [ZERO] * 2, [ZERO] * 2, [ZERO] * 2
    own_stretch = own_deflection = own_rotation = ZERO
    for x, weight in _rule(length, d1, d2, b1, b2):
        y = length - x
        outer, inner = (d1 + d_slope * x) ** 2, (b1 + b_slope * x) ** 2
        area = quarter_pi * (outer - inner)
        inertia = area * (outer + inner) / 16
        a = weight / (e_modulus * area)
        t = weight / (2 * g_modulus * inertia)
        w = weight / (e_modulus * inertia)
        s = weight / (g_modulus * area) * _shear_factor(element, outer, inner)
        mass = y * (a0 + y * (a1 / 2 + y * a2 / 3))
        moment = y * y * (a0 / 2 + y * (a1 / 6 + y * a2 / 12))
        own_stretch += a * mass
        own_deflection += w * y * moment + s * mass
        own_rotation += w * moment
        for k in range(4):
            bend[k] += w
            if k < 2:
                shear[k] += s
                stretch[k] += a
                twist[k] += t
                s, a, t = s * y, a * y, t * y
            w *= y
    return Integrals(
        bend, shear, stretch, twist, own_stretch, own_deflection, own_rotation,
        mass=length * (a0 + length * (a1 / 2 + length * a2 / 3)),
        moment=length * length * (a0 / 2 + length * (a1 / 6 + length * a2 / 12)),
    )  # fmt: skip


def ends(element: Element) -> Vector:
    """Give the diameters left and right and the bores left and right."""
    d2 = element.diameter if element.end_diameter is None else element.end_diameter
    b2 = element.bore if element.end_bore is None else element.end_bore
    return numbers([element.diameter, d2, element.bore, b2])


def _shear_factor(element: Element, outer: Decimal, inner: Decimal) -> Decimal:
    """Give 1/kappa from the squared diameters (Cowper 1966, hollow circle, m = bore/diameter).

    kappa = 6 (1 + nu) (1 + m^2)^2 / ((7 + 6 nu) (1 + m^2)^2 + (20 + 12 nu) m^2)
    """
    if element.shear is None:
        return ZERO
    if element.shear != "cowper":
        return ONE / number(element.shear)
    nu = number(element.poisson_ratio)
    ratio = inner * outer / (outer + inner) ** 2
    return (7 + 6 * nu + (20 + 12 * nu) * ratio) / (6 * (1 + nu))


def _rule(length: Decimal, d1: Decimal, d2: Decimal, b1: Decimal, b2: Decimal) -> list[tuple[Decimal, Decimal]]:
    """Give (x, weight) for an element: a short rule for a cylinder, pieces for a cone."""
    precision = getcontext().prec
    if d1 == d2 and b1 == b2:
        return [(length * x, length * w) for x, w in gauss_points(CYLINDER_POINTS, precision)]
    # The section's compliances are rational in x; their poles are the zeros of d^4 - b^4 = prod (d - i^k b).
    poles = []
    for turn in (1, 1j, -1, -1j):
        value, rise = complex(d1) - turn * complex(b1), complex(d2 - d1) - turn * complex(b2 - b1)
        if rise:
            poles.append(-value / rise)
    # Error of the n-point rule ~ rho^(-2n), rho = sum of the half-axes of the Bernstein ellipse through the
    # nearest pole (Trefethen 2008, theorem 4.5); ten digits more pay for the integrand's size on the ellipse.
    needed = 10 ** ((precision + 10) / (2 * CONE_POINTS))
    rule, pieces = [], [(ZERO, ONE)]
    while pieces:
        start, width = pieces.pop()
        if _ellipse(poles, float(start), float(width)) < needed:
            pieces += [(start, width / 2), (start + width / 2, width / 2)]
        else:
            points = gauss_points(CONE_POINTS, precision)
            rule += [(length * (start + width * x), length * width * w) for x, w in points]
    return rule


def _ellipse(poles: Sequence[complex], start: float, width: float) -> float:
    """Give the sum of half-axes of the smallest Bernstein ellipse of a piece that meets a pole."""
    sizes = [float("inf")]
    for pole in poles:
        z = 2 * (pole - start) / width - 1
        root = cmath.sqrt(z * z - 1)
        sizes.append(max(abs(z + root), abs(z - root)))
    return min(sizes)


class Beam:
    """An element with its stiffness in blocks and its loads."""

    def __init__(self, element: Element) -> None:
        """Build the blocks k11, k12, k21, k22 of the 12 x 12 stiffness."""
        self.length = number(element.length)
        self.sums = sums = integrals(element)
        self.shift = transfer(self.length)
        deflection = sums.bend[2] + sums.shear[0]
        determinant = deflection * sums.bend[0] - sums.bend[1] ** 2
        self.k22 = k22 = zeros(6, 6)
        k22[0][0] = 1 / sums.stretch[0]
        k22[3][3] = 1 / sums.twist[0]
        for v, theta, sign in ((1, 5, 1), (2, 4, -1)):
            k22[v][v] = sums.bend[0] / determinant
            k22[theta][theta] = deflection / determinant
            k22[v][theta] = k22[theta][v] = -sign * sums.bend[1] / determinant
        back = transposed(self.shift)
        self.k12 = [[-value for value in row] for row in product(back, k22)]
        self.k21 = transposed(self.k12)
        self.k11 = product(back, product(k22, self.shift))

    def loaded(self, spread: Sequence[Decimal], acceleration: Sequence[Decimal]) -> tuple[Vector, Vector]:
        """Give the free movement of the right end and the loads' resultant at the left node.

        Parameters
        ----------
        spread
            Uniform loads qx qy qz mx my mz [N/m, N].
        acceleration
            Acceleration that acts on the mass (3 components) [m/s^2].
        """
        i, (qx, qy, qz, mx, my, mz), (gx, gy, gz) = self.sums, spread, acceleration
        free = [
            qx * i.stretch[1] + gx * i.own_stretch,
            qy * (i.bend[3] / 2 + i.shear[1]) + mz * i.bend[2] + gy * i.own_deflection,
            qz * (i.bend[3] / 2 + i.shear[1]) - my * i.bend[2] + gz * i.own_deflection,
            mx * i.twist[1],
            my * i.bend[1] - qz * i.bend[2] / 2 - gz * i.own_rotation,
            mz * i.bend[1] + qy * i.bend[2] / 2 + gy * i.own_rotation,
        ]
        span, half = self.length, self.length * self.length / 2
        resultant = [
            qx * span + gx * i.mass,
            qy * span + gy * i.mass,
            qz * span + gz * i.mass,
            mx * span,
            my * span - qz * half - gz * i.moment,
            mz * span + qy * half + gy * i.moment,
        ]
        return free, resultant

    def equivalent(self, free: Vector, resultant: Vector) -> tuple[Vector, Vector]:
        """Give the loads on the left and the right node that stand for the loads on the element."""
        right = times(self.k22, free)
        back = times(transposed(self.shift), right)
        return [whole - part for whole, part in zip(resultant, back, strict=True)], right

    def sections(self, left: Vector, right: Vector, free: Vector, resultant: Vector) -> tuple[Vector, Vector]:
        """Give the section forces at both ends from the movements of both nodes."""
        carried = times(self.shift, left)
        stretch = [b - a - c for a, b, c in zip(carried, right, free, strict=True)]
        end = times(self.k22, stretch)
        start = times(transposed(self.shift), end)
        return [a + b for a, b in zip(start, resultant, strict=True)], end


def transfer(dx: Decimal) -> Matrix:
    """Give T of a rigid arm along the axis: movement at x + dx = T times movement at x.

    Its transpose brings a force at x + dx to x.
    """
    t = [[ONE if i == j else ZERO for j in range(6)] for i in range(6)]
    t[1][5], t[2][4] = dx, -dx
    return t
