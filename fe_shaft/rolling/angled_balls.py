"""Inside of angular-contact and self-aligning ball bearings.

Their rings go together without Conrad's limit, so the share of the pitch circle that the balls fill takes the place of
the assembly angle. Proportions: common practice, no source.
"""

from __future__ import annotations

import math
from dataclasses import replace

from fe_shaft.rolling import dynamic_rating, static_rating
from fe_shaft.rolling.deep_groove import UNSURE, like, unlike
from fe_shaft.rolling.inside import Band, Catalogue, Estimate, Inside
from fe_shaft.rolling.refusal import impossible
from fe_shaft.rolling.weighing import BallType, Priors, ratios, touching, weigh

PLAIN = BallType()
SELF_ALIGNING = BallType(dynamic_rating.self_aligning_factor, static_rating.printed_self_aligning_factor)

#: From this angle on a general-purpose bearing (40 deg was looked at), below it one of a spindle (15 and 25 deg).
STEEP = math.radians(29.9)
GENERAL = Priors(0.31, 0.06, touching, 0.88, 0.04, 0.06, 0.0, 0.05)
SPINDLE = Priors(0.29, 0.06, touching, 0.80, 0.08, 0.10, 0.0, 0.25)
#: Set on two sizes whose inside and ratings are from memory.
ALIGNING = Priors(0.256, 0.08, touching, 0.74, 0.05, 0.06, 0.0, 0.05)

GENERAL_BAND = Band(1, 0.07, 0.14, 0.02, 0.0, 0.10, 0.10, 0.10, 0.15)
GENERAL_PRACTICE_BAND = Band(2, 0.10, 0.16, 0.02, 0.0, 0.18, 0.12, 0.12, 0.18)
SPINDLE_BAND = Band(4, 0.12, 0.12, 0.02, 0.0, 0.13, 0.15, 0.15, 0.20)
SPINDLE_PRACTICE_BAND = Band(6, 0.25, 0.25, 0.02, 0.0, 0.45, 0.25, 0.25, 0.28)
ALIGNING_BAND = Band(2, 0.08, 0.12, 0.03, 0.0, 0.15, 0.15, 0.20, 0.20)
ALIGNING_PRACTICE_BAND = Band(3, 0.15, 0.20, 0.03, 0.0, 0.30, 0.25, 0.30, 0.28)

#: Ratings that count as those of the standards, C and C0.
GENERAL_LIKE = (0.90, 1.20), (0.90, 1.10)
SPINDLE_LIKE = (0.95, 1.20), (0.90, 1.15)
#: Contact angle of self-aligning ball bearings where nothing tells it.
USUAL_ALIGNING = math.radians(10)


def angular_contact(catalogue: Catalogue) -> Estimate:
    """Inside of one row (or two alike) of angular-contact balls; the contact angle must be given."""
    if catalogue.contact_angle is None:
        raise impossible(
            "contact_angle", "an angular contact ball bearing needs its contact angle. Take it from the catalogue."
        )
    if catalogue.contact_angle >= STEEP:
        return _estimate(catalogue, GENERAL, PLAIN, GENERAL_LIKE, (GENERAL_BAND, GENERAL_PRACTICE_BAND))
    bands = SPINDLE_BAND, SPINDLE_PRACTICE_BAND
    found = _estimate(catalogue, SPINDLE, PLAIN, SPINDLE_LIKE, bands)
    return replace(found, notes=(*found.notes, "The number of balls of spindle bearings is seldom met exactly."))


def self_aligning(catalogue: Catalogue) -> Estimate:
    """Inside of two rows of self-aligning balls."""
    angle = catalogue.contact_angle
    told: tuple[str, ...] = ()
    if angle is None and catalogue.e is not None:
        angle = math.atan(catalogue.e / 1.5)
    if angle is None:
        angle, told = USUAL_ALIGNING, ("The contact angle was taken as 10 deg; e of the catalogue would tell it.",)
    two_rows = replace(catalogue, contact_angle=angle, rows=2)
    found = _estimate(two_rows, ALIGNING, SELF_ALIGNING, GENERAL_LIKE, (ALIGNING_BAND, ALIGNING_PRACTICE_BAND))
    return replace(found, notes=(*told, *found.notes))


def _estimate(
    catalogue: Catalogue,
    priors: Priors,
    ball_type: BallType,
    limits: tuple[tuple[float, float], tuple[float, float]],
    bands: tuple[Band, Band],
) -> Estimate:
    """Weighed where ratings are given and fit, else by proportions; bands of either."""
    if catalogue.static is None and catalogue.dynamic is None:
        return _by_practice(catalogue, priors, ball_type, bands[1], ())
    weighed = weigh(catalogue, priors, ball_type)
    inside = _inside(catalogue, int(weighed.number[weighed.best]), float(weighed.diameter[weighed.best]))
    dynamic, static = ratios(catalogue, ball_type, inside)
    if not (like(dynamic, limits[0]) and like(static, limits[1])):
        return _by_practice(catalogue, priors, ball_type, bands[1], (unlike(dynamic, static),))
    near = weighed.neighbours()
    doubt = f"The number of balls is unsure: its weight is {near[0].weight:.2f}."
    method, notes = "ratings and filling weighed together", (doubt,) if near[0].weight < UNSURE else ()
    return Estimate(inside, method, bands[0], dynamic, static, inside.spread, near, notes)


def _by_practice(
    catalogue: Catalogue, priors: Priors, ball_type: BallType, band: Band, notes: tuple[str, ...]
) -> Estimate:
    diameter = priors.section * catalogue.section
    number = max(round(priors.filling_mean * math.pi / math.asin(diameter / catalogue.mean)), 3)
    inside = _inside(catalogue, number, diameter)
    dynamic, static = ratios(catalogue, ball_type, inside)
    return Estimate(inside, "common proportions of d and D", band, dynamic, static, inside.spread, (), notes)


def _inside(catalogue: Catalogue, number: int, diameter: float) -> Inside:
    angle = catalogue.contact_angle or 0.0
    return Inside(number, diameter, catalogue.mean, 0.0, angle, catalogue.rows)
