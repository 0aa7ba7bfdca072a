"""A shaft as plain data, and its way to the independent solution.

Every float counts as the shortest decimal that reads back to it, so that stations written with few digits
meet segment ends exactly.

Shaft frame: x from the left end, y (up) at 12 o'clock, z (front) at 3 o'clock; angles clockwise seen from
the left end; directions (cos a, sin a) in y, z. SI units, angles in degrees.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from decimal import Decimal, localcontext
from typing import Literal

from tests.oracle.digits import Number, cos_sin
from tests.oracle.element_frame import Case, Chain, Element, Solution, Support, diagonal, solve_chain

Six = tuple[float, float, float, float, float, float]

DIRECTIONS = {
    "radial": (1, 2),
    "up": (1,),
    "front": (2,),
    "axial": (0,),
    "spin": (3,),
    "tilt": (4, 5),
    "tilt_up": (4,),
    "tilt_front": (5,),
}
"""Components of ux uy uz rx ry rz; tilt_up turns about the 12 o'clock axis."""


@dataclass(frozen=True, slots=True)
class SegmentSpec:
    """A cylinder, or a cone where an end is given [m]."""

    length: float
    diameter: float
    end_diameter: float | None = None
    bore: float = 0.0
    end_bore: float | None = None


@dataclass(frozen=True, slots=True)
class SupportSpec:
    """What holds the shaft at x [m]; exactly one of stiffness and matrix for a bearing, none for a pin.

    Seat directions that are not given are rigid. `load_centre` is counted from x, + to the right.
    """

    name: str
    x: float
    holds: tuple[str, ...]
    stiffness: Mapping[str, float] | None = None
    matrix: tuple[Six, ...] | None = None
    seat: Mapping[str, float] | None = None
    load_centre: float = 0.0
    offset: float = 0.0
    offset_angle: float = 0.0
    bore_tilt: float = 0.0
    bore_tilt_angle: float = 0.0

    @property
    def is_pin(self) -> bool:
        """Whether nothing gives way here."""
        return self.stiffness is None and self.matrix is None


@dataclass(frozen=True, slots=True)
class ForceSpec:
    """A force at a radius and an angle and a couple, spread evenly over a width about x [m, N, N m, degrees]."""

    name: str
    x: float
    up: float = 0.0
    front: float = 0.0
    axial: float = 0.0
    couple_up: float = 0.0
    couple_front: float = 0.0
    couple_axial: float = 0.0
    radius: float = 0.0
    angle: float = 0.0
    spread: float = 0.0


@dataclass(frozen=True, slots=True)
class CaseSpec:
    """A load case: which forces act, and how often."""

    name: str
    factors: Mapping[str, float]


@dataclass(frozen=True, slots=True)
class ShaftSpec:
    """A shaft with everything on it. `shear`: "cowper", "none" or a number; `gravity`: in the shaft's frame."""

    seed: int
    segments: tuple[SegmentSpec, ...]
    youngs_modulus: float
    poisson_ratio: float
    density: float
    shear: float | Literal["cowper", "none"]
    supports: tuple[SupportSpec, ...]
    forces: tuple[ForceSpec, ...]
    cases: tuple[CaseSpec, ...]
    gravity: tuple[float, float, float] = (0.0, 0.0, 0.0)

    @property
    def spin_is_held(self) -> bool:
        """Whether a support holds the turning; if not, every case is balanced in torque."""
        return any("spin" in support.holds for support in self.supports)


@dataclass(frozen=True, slots=True)
class Truth:
    """What `to_oracle` makes: the chain and where everything of the shaft stands in it.

    Supports stand in the chain's order; one more stands last where the spin is free: it holds the turning
    of the left end, so rx is counted from there (its reaction is the rounding of the balancing couple).
    """

    chain: Chain
    x: tuple[Decimal, ...]

    def node(self, x: float) -> int:
        """Give the node at a station."""
        return self.x.index(exact(x))


def exact(value: float) -> Decimal:
    """Take a float as the shortest decimal that reads back to it."""
    return Decimal(repr(value))


def wrench(force: ForceSpec) -> list[Decimal]:
    """Give a force's six components on the axis, at its x."""
    with localcontext() as context:
        context.prec = 80
        c, s = cos_sin(exact(force.angle))
        y, z = exact(force.radius) * c, exact(force.radius) * s
        fx, fy, fz = exact(force.axial), exact(force.up), exact(force.front)
        return [
            fx,
            fy,
            fz,
            exact(force.couple_axial) + y * fz - z * fy,
            exact(force.couple_up) + z * fx,
            exact(force.couple_front) - y * fx,
        ]


def to_oracle(
    spec: ShaftSpec,
    more_stations: Sequence[float] = (),
    bore_turns_about: Literal["middle", "load centre"] = "middle",
) -> Truth:
    """Cut a shaft at all its stations and describe it for the independent solution.

    Parameters
    ----------
    spec
        The shaft.
    more_stations
        Further places for nodes [m].
    bore_turns_about
        The point on the axis that a bore's tilt leaves where the offset put it: the support's x, or its
        load centre.
    """
    with localcontext() as context:
        context.prec = 80
        stations = [exact(support.x) for support in spec.supports] + [exact(x) for x in more_stations]
        stations += [edge for force in spec.forces for edge in _edges(force)]
        elements, x = _cut(spec, stations)
        supports = [_support(support, x, bore_turns_about) for support in spec.supports]
        if not spec.spin_is_held:
            supports.append(Support(0, rigid=(3,)))
        return Truth(Chain(elements, supports, [_case(spec, case, x) for case in spec.cases]), tuple(x))


def truth(spec: ShaftSpec, digits: int = 40, more_stations: Sequence[float] = ()) -> tuple[Truth, Solution]:
    """Describe and solve a shaft."""
    made = to_oracle(spec, more_stations)
    return made, solve_chain(made.chain, digits)


def _edges(force: ForceSpec) -> tuple[Decimal, ...]:
    x, half = exact(force.x), exact(force.spread) / 2
    return (x - half, x, x + half) if half else (x,)


def _cut(spec: ShaftSpec, stations: Sequence[Decimal]) -> tuple[list[Element], list[Decimal]]:
    """Give the elements between all stations and segment ends, and the nodes' places."""
    shear = None if spec.shear == "none" else spec.shear if spec.shear == "cowper" else exact(spec.shear)
    e, nu = exact(spec.youngs_modulus), exact(spec.poisson_ratio)
    x, elements = [Decimal(0)], []
    for segment in spec.segments:
        left, length = x[-1], exact(segment.length)
        d1, b1 = exact(segment.diameter), exact(segment.bore)
        d2 = d1 if segment.end_diameter is None else exact(segment.end_diameter)
        b2 = b1 if segment.end_bore is None else exact(segment.end_bore)
        for right in sorted({station for station in stations if left < station < left + length} | {left + length}):
            a, b = (x[-1] - left) / length, (right - left) / length
            elements.append(
                Element(
                    length=right - x[-1],
                    diameter=d1 + a * (d2 - d1),
                    end_diameter=d1 + b * (d2 - d1),
                    bore=b1 + a * (b2 - b1),
                    end_bore=b1 + b * (b2 - b1),
                    youngs_modulus=e,
                    shear_modulus=e / (2 * (1 + nu)),
                    poisson_ratio=nu,
                    density=exact(spec.density),
                    shear=shear,
                )
            )
            x.append(right)
    return elements, x


def _support(spec: SupportSpec, x: Sequence[Decimal], bore_turns_about: str) -> Support:
    held = tuple(i for name in spec.holds for i in DIRECTIONS[name])
    centre = exact(spec.load_centre)
    c, s = cos_sin(exact(spec.offset_angle))
    tilt_c, tilt_s = (exact(spec.bore_tilt) * part for part in cos_sin(exact(spec.bore_tilt_angle)))
    arm = centre if bore_turns_about == "middle" else Decimal(0)
    offset = exact(spec.offset)
    # dv/dx = +theta_z, dw/dx = -theta_y
    ground = (Decimal(0), offset * c + arm * tilt_c, offset * s + arm * tilt_s, Decimal(0), -tilt_s, tilt_c)
    spring: list[list[Number]] | None = None
    if spec.matrix is not None:
        spring = [[exact(value) for value in row] for row in spec.matrix]
    elif spec.stiffness is not None:
        spring = diagonal(*_six(spec.stiffness))
    given = {i for name in spec.seat or () for i in DIRECTIONS[name]}
    return Support(
        node=x.index(exact(spec.x)),
        dx=centre,
        rigid=held if spec.is_pin else tuple(i for i in held if i == 3),
        spring=spring,
        seat=None if spec.seat is None else diagonal(*_six(spec.seat)),
        seat_rigid=tuple(i for i in range(6) if i not in given),
        offset=ground,
    )


def _six(named: Mapping[str, float]) -> list[Decimal]:
    six = [Decimal(0)] * 6
    for name, value in named.items():
        for i in DIRECTIONS[name]:
            six[i] = exact(value)
    return six


def _case(spec: ShaftSpec, case: CaseSpec, x: Sequence[Decimal]) -> Case:
    nodal: dict[int, list[Decimal]] = {}
    spread: dict[int, list[Decimal]] = {}
    for force in spec.forces:
        if force.name not in case.factors:
            continue
        load = [exact(case.factors[force.name]) * part for part in wrench(force)]
        first, last = _edges(force)[0], _edges(force)[-1]
        if first == last:
            places, where = [x.index(first)], nodal
        else:
            places, where = list(range(x.index(first), x.index(last))), spread
            load = [part / (last - first) for part in load]
        for place in places:
            where[place] = [a + b for a, b in zip(where.get(place, [Decimal(0)] * 6), load, strict=True)]
    return Case(nodal, spread, tuple(exact(part) for part in spec.gravity))
