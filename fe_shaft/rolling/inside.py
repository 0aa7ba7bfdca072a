"""What an estimate starts from and what it answers: catalogue figures in, inner geometry with its doubts out."""

from __future__ import annotations

import math
from dataclasses import dataclass, fields

from fe_shaft.rolling.refusal import impossible, mm


@dataclass(frozen=True)
class Catalogue:
    """What a catalogue prints about one bearing; None is not given.

    Attributes
    ----------
    bore, outer, width : boundary dimensions d, D, B (tapered: T) [m]
    dynamic, static : ratings C, C0 [N]
    contact_angle : [rad]
    e, axial_factor : e and Y of the equivalent load
    f0 : factor of the static rating, where the catalogue prints it
    inner_raceway, outer_raceway : diameters F and E of cylindrical and needle roller bearings [m]
    cup_width : width C of a tapered bearing's outer ring [m]
    rows : 1 or 2

    Raises
    ------
    ModelError
        Where a figure cannot be.
    """

    bore: float
    outer: float
    width: float | None = None
    dynamic: float | None = None
    static: float | None = None
    contact_angle: float | None = None
    e: float | None = None
    axial_factor: float | None = None
    f0: float | None = None
    inner_raceway: float | None = None
    outer_raceway: float | None = None
    cup_width: float | None = None
    rows: int = 1

    def __post_init__(self) -> None:
        for field in fields(self):
            value = getattr(self, field.name)
            if value is not None and not (math.isfinite(value) and value > 0):
                raise impossible(field.name, f"{value:g} cannot be. Give a positive number, or leave it out.")
        if self.bore >= self.outer:
            raise impossible(
                "outer", f"{mm(self.outer)} is not larger than the bore of {mm(self.bore)}. Give D larger than d."
            )
        for name in ("inner_raceway", "outer_raceway"):
            raceway = getattr(self, name)
            if raceway is not None and not self.bore < raceway < self.outer:
                raise impossible(name, f"{mm(raceway)} lies outside of {mm(self.bore)} to {mm(self.outer)}. Check it.")
        if self.contact_angle is not None and self.contact_angle >= math.pi / 2:
            raise impossible(
                "contact_angle", f"{math.degrees(self.contact_angle):g} deg is a thrust bearing. No rule for it here."
            )
        if self.rows not in (1, 2):
            raise impossible("rows", f"{self.rows} cannot be. Write 1 or 2.")

    @property
    def section(self) -> float:
        """D - d [m]."""
        return self.outer - self.bore

    @property
    def mean(self) -> float:
        """(d + D) / 2 [m]."""
        return (self.bore + self.outer) / 2


@dataclass(frozen=True)
class Inside:
    """What is inside: elements of one row, diameters [m], length that touches [m] (balls: 0), contact angle [rad]."""

    number: int
    diameter: float
    pitch_diameter: float
    length: float = 0.0
    contact_angle: float = 0.0
    rows: int = 1

    @property
    def inner_raceway(self) -> float:
        """Diameter of the inner raceway where the elements touch it [m]."""
        return self.pitch_diameter - self.diameter * math.cos(self.contact_angle)

    @property
    def outer_raceway(self) -> float:
        """Diameter of the outer raceway [m]."""
        return self.pitch_diameter + self.diameter * math.cos(self.contact_angle)

    @property
    def spread(self) -> float:
        """Share of the pitch circle that the elements fill, 1 where they touch each other."""
        return self.number * math.asin(self.diameter / self.pitch_diameter) / math.pi


@dataclass(frozen=True)
class Band:
    """How far an estimate may be off, as shares (0.05 is 5 %) unless said; 95 % by judgement, no statistics.

    Attributes
    ----------
    number : elements more or less
    diameter : of the elements if their number is right; `diameter_if_off` if it is one off
    pitch : pitch diameter
    length : of rollers, at this number
    capacity : product Z^(2/3) D^1.8 of balls, Z L of rollers
    radial, axial : stiffness from geometry alone
    total : radial stiffness with conformity or the law of line contact, but without clearance
    """

    number: int
    diameter: float
    diameter_if_off: float
    pitch: float
    length: float
    capacity: float
    radial: float
    axial: float
    total: float


@dataclass(frozen=True)
class Neighbour:
    """Another number that the catalogue would bear: its weight among all, its radial stiffness over ours."""

    number: int
    diameter: float
    weight: float
    stiffness: float


@dataclass(frozen=True)
class Estimate:
    """Inner geometry as estimated; never a maker's data.

    Attributes
    ----------
    inside : the best geometry
    method : how it was found, in words
    band : how far it may be off
    dynamic_ratio, static_ratio : catalogue's rating over that of ISO 281 and ISO 76 for `inside`; nan if not given
    filling : share of the pitch circle filled
    neighbours : all numbers of elements with a weight of 1 % or more, ours first; empty where nothing was weighed
    notes : doubts, a sentence each
    """

    inside: Inside
    method: str
    band: Band
    dynamic_ratio: float
    static_ratio: float
    filling: float
    neighbours: tuple[Neighbour, ...] = ()
    notes: tuple[str, ...] = ()

    @property
    def certainty(self) -> float:
        """Weight of the number of elements among all that were weighed, 1 where nothing was."""
        return self.neighbours[0].weight if self.neighbours else 1.0
