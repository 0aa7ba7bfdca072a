"""Inside of roller bearings: cylindrical, needle, tapered and spherical.

C and C0 see number and length of the rollers nearly alike, so only their product comes out of C0 and C is not used at
all; makers raise it by 15 %. Number and length are then shared by filling and by how long rollers are. The stiffness
hardly feels that share. Proportions: common practice, no source.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, replace

import numpy as np

from fe_shaft.rolling import dynamic_rating, static_rating
from fe_shaft.rolling.arrays import Array
from fe_shaft.rolling.inside import Band, Catalogue, Estimate, Inside
from fe_shaft.rolling.kinds import Kind
from fe_shaft.rolling.refusal import impossible, mm


@dataclass(frozen=True)
class Proportions:
    """Of one type: roller over section, pitch over mean diameter, filling, length over roller, all rows over width.

    Then the length over a roller that is taken without C0, and bm.
    """

    section: float
    pitch: float
    filling: float
    length: tuple[float, float]
    of_width: tuple[float, float]
    usual_length: float
    material: float = 1.1


CYLINDRICAL = Proportions(0.275, 1.01, 0.83, (0.85, 1.05), (0.48, 0.58), 0.95)
NEEDLE = Proportions(0.33, 1.0, 0.88, (2.0, 7.0), (0.55, 0.85), 4.0)
TAPERED = Proportions(0.243, 1.0, 0.90, (1.0, 2.4), (0.70, 0.84), 1.5)
SPHERICAL = Proportions(
    0.26, 1.01, 0.86, (0.70, 1.15), (0.66, 0.84), 0.90, dynamic_rating.MATERIAL[Kind.SPHERICAL_ROLLER]
)
#: How sharply filling (absolute), length over roller and length over width (shares) hold the number.
FILLING_SPREAD, LENGTH_SPREAD, WIDTH_SPREAD = 0.04, 0.05, 0.05
#: Numbers of rollers looked at, and the filling they keep below.
FEWEST, MOST, FULL = 5.0, 120.0, 0.98
#: Where lengths without C0 come from: the share of the cup's or the whole width.
CUP_OF_WIDTH = 0.80
USUAL_ANGLE = {Kind.TAPERED_ROLLER: math.radians(14.0), Kind.SPHERICAL_ROLLER: math.radians(10.0)}

EXACT = Band(2, 0.01, 0.01, 0.005, 0.15, 0.08, 0.04, 0.04, 0.12)
ONE_RACEWAY = Band(2, 0.08, 0.08, 0.02, 0.20, 0.10, 0.08, 0.08, 0.14)
FROM_STATIC = Band(3, 0.12, 0.12, 0.02, 0.25, 0.15, 0.10, 0.10, 0.15)
TAPERED_BAND = Band(3, 0.12, 0.12, 0.03, 0.25, 0.18, 0.10, 0.15, 0.20)
WIDE = Band(5, 0.20, 0.20, 0.04, 0.40, 0.40, 0.25, 0.30, 0.30)


def cylindrical(catalogue: Catalogue) -> Estimate:
    """Inside of one row (or two) of cylindrical rollers; raceway diameters F, E make it sharp."""
    diameter, pitch, band, method = _from_raceways(catalogue)
    return _share(catalogue, CYLINDRICAL, diameter, pitch, 0.0, band, method)


def needle(catalogue: Catalogue) -> Estimate:
    """Inside of needle roller bearings with rings or a drawn cup; without an inner ring `bore` is the shaft's F."""
    inner = catalogue.inner_raceway
    if inner is None and catalogue.outer_raceway is None:
        raise impossible(
            "inner_raceway",
            "a needle roller bearing needs the diameter F of its inner raceway. Take Fw of the catalogue.",
        )
    if inner is not None and catalogue.outer_raceway is not None:
        diameter, pitch, band, method = _from_raceways(catalogue)
        return _share(catalogue, NEEDLE, diameter, pitch, 0.0, replace(band, length=0.25), method)
    if inner is None:
        raceway = catalogue.outer_raceway or 0.0
        diameter = NEEDLE.section * (raceway - catalogue.bore)
        return _share(catalogue, NEEDLE, diameter, raceway - diameter, 0.0, WIDE, "outer raceway and proportions")
    diameter = NEEDLE.section * (catalogue.outer - inner)
    return _share(catalogue, NEEDLE, diameter, inner + diameter, 0.0, WIDE, "inner raceway and proportions")


def tapered(catalogue: Catalogue) -> Estimate:
    """Inside of tapered rollers; diameter and pitch circle are those in the roller's middle."""
    angle, notes = contact_angle(catalogue, Kind.TAPERED_ROLLER)
    width = catalogue.cup_width
    if width is None and catalogue.width is not None:
        width = CUP_OF_WIDTH * catalogue.width
    diameter = TAPERED.section * catalogue.section
    given = replace(catalogue, width=width)
    found = _share(given, TAPERED, diameter, TAPERED.pitch * catalogue.mean, angle, TAPERED_BAND, "static rating")
    unchecked = "Proportions of tapered rollers were not held against a published number of rollers."
    return replace(found, notes=(*notes, *found.notes, unchecked))


def spherical(catalogue: Catalogue) -> Estimate:
    """Inside of two rows of barrel rollers."""
    angle, notes = contact_angle(catalogue, Kind.SPHERICAL_ROLLER)
    diameter = SPHERICAL.section * catalogue.section
    two_rows = replace(catalogue, rows=2)
    found = _share(two_rows, SPHERICAL, diameter, SPHERICAL.pitch * catalogue.mean, angle, WIDE, "static rating")
    unchecked = "Proportions of spherical rollers were not held against a published geometry."
    return replace(found, notes=(*notes, *found.notes, unchecked))


def contact_angle(catalogue: Catalogue, kind: Kind) -> tuple[float, tuple[str, ...]]:
    """Contact angle [rad] as given, or atan(e / 1.5), or out of Y, or the usual one with a note that says so.

    e to two digits leaves 0.2 deg; Y of one row is 0.4 cot(angle), of two rows Y1 is 0.45 cot(angle).
    """
    if catalogue.contact_angle is not None:
        return catalogue.contact_angle, ()
    if catalogue.e is not None:
        return math.atan(catalogue.e / 1.5), ()
    if catalogue.axial_factor is not None:
        return math.atan((0.4 if kind is Kind.TAPERED_ROLLER else 0.45) / catalogue.axial_factor), ()
    usual = USUAL_ANGLE[kind]
    told = f"The contact angle was taken as {math.degrees(usual):g} deg; e or Y of the catalogue would tell it."
    return usual, (told,)


def _from_raceways(catalogue: Catalogue) -> tuple[float, float, Band, str]:
    """Roller diameter, pitch diameter [m], band and method from F and E, from one of them, or from d and D."""
    f, e = catalogue.inner_raceway, catalogue.outer_raceway
    rule, pitch = CYLINDRICAL.section * catalogue.section, CYLINDRICAL.pitch * catalogue.mean
    if f is not None and e is not None:
        if e <= f:
            raise impossible(
                "outer_raceway", f"{mm(e)} is not larger than the inner raceway of {mm(f)}. Give E over F."
            )
        return (e - f) / 2, (e + f) / 2, EXACT, "both raceways"
    if f is None and e is None:
        return rule, pitch, FROM_STATIC, "common proportions of d and D"
    distance = pitch - f if f is not None else (e or 0.0) - pitch
    diameter = (rule + distance) / 2 if distance > 0 else rule
    return diameter, (f + diameter if f is not None else (e or 0.0) - diameter), ONE_RACEWAY, "one raceway"


def _share(
    catalogue: Catalogue, rules: Proportions, diameter: float, pitch: float, angle: float, band: Band, method: str
) -> Estimate:
    """Number and length of rollers: their product from C0 where it is given, else the usual length."""
    if catalogue.static is None:
        usual = rules.usual_length * diameter
        length = usual if catalogue.width is None else sum(rules.of_width) / 2 * catalogue.width / catalogue.rows
        number = max(round(rules.filling * math.pi / math.asin(diameter / pitch)), 3)
        inside = Inside(number, diameter, pitch, length, angle, catalogue.rows)
        return _answer(catalogue, rules, inside, wider(band), f"{method}; usual length")
    number, length = _number_and_length(catalogue, rules, diameter, pitch, angle)
    inside = Inside(number, diameter, pitch, length, angle, catalogue.rows)
    notes = () if _usual(rules, inside, catalogue.width) else (_unusual(inside),)
    told = method if method.endswith("static rating") else f"{method}; static rating"
    return replace(_answer(catalogue, rules, inside, band, told), notes=notes)


def _number_and_length(
    catalogue: Catalogue, rules: Proportions, diameter: float, pitch: float, angle: float
) -> tuple[int, float]:
    """The number whose filling and length are the most usual, all numbers at once."""
    number = np.arange(FEWEST, MOST + 1.0)
    filling = number * math.asin(diameter / pitch) / math.pi
    number, filling = number[filling < FULL], filling[filling < FULL]
    if number.size == 0:
        raise impossible(
            "outer_raceway",
            f"rollers of {mm(diameter)} on a pitch circle of {mm(pitch)} are fewer than {FEWEST:g}. Check E and F.",
        )
    per_length = static_rating.roller_rating_per_length(number, diameter, pitch, angle, catalogue.rows)
    length = np.asarray(catalogue.static) / per_length
    cost = ((filling - rules.filling) / FILLING_SPREAD) ** 2
    cost = cost + (_beyond(length / diameter, rules.length) / LENGTH_SPREAD) ** 2
    if catalogue.width is not None:
        cost = cost + (_beyond(length * catalogue.rows / catalogue.width, rules.of_width) / WIDTH_SPREAD) ** 2
    best = int(np.argmin(cost))
    return int(number[best]), float(length[best])


def _beyond(value: Array, limits: tuple[float, float]) -> Array:
    """By what share a value lies beyond its limits."""
    return np.log(np.maximum(np.maximum(value / limits[1], limits[0] / value), 1.0))


def _usual(rules: Proportions, inside: Inside, width: float | None) -> bool:
    """Whether the length of a roller is within its limits, give or take a tenth."""
    checks = [(inside.length / inside.diameter, rules.length)]
    if width is not None:
        checks.append((inside.length * inside.rows / width, rules.of_width))
    return all(low / 1.1 <= value <= high * 1.1 for value, (low, high) in checks)


def _unusual(inside: Inside) -> str:
    return (
        f"C0 asks for rollers of {mm(round(inside.length, 6))} at a diameter of {mm(round(inside.diameter, 6))}, "
        "which is unusual for the type: its C0 or its size is not a common one."
    )


def wider(band: Band) -> Band:
    """The band where C0 is not known either."""
    return replace(
        band,
        length=max(band.length, 0.30),
        capacity=max(band.capacity, 0.30),
        radial=max(band.radial, 0.25),
        axial=max(band.axial, 0.25),
        total=max(band.total, 0.28),
    )


def _answer(catalogue: Catalogue, rules: Proportions, inside: Inside, band: Band, method: str) -> Estimate:
    geometry = inside.number, inside.diameter, inside.length, inside.pitch_diameter, inside.contact_angle, inside.rows
    c, c0 = dynamic_rating.roller_rating(*geometry, rules.material), static_rating.roller_rating(*geometry)
    dynamic = float("nan") if catalogue.dynamic is None else catalogue.dynamic / float(c)
    static = float("nan") if catalogue.static is None else catalogue.static / float(c0)
    return Estimate(inside, method, band, dynamic, static, inside.spread)
