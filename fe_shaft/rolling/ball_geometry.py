"""What a ball bearing is inside.

Deep-groove, angular-contact, four-point contact, thrust and self-aligning ball bearings differ in figures only: the
nominal contact angle, the clearance, whether each ball has a second contact pair on the other side of the groove, and
whether the outer raceway is a sphere about the bearing's centre.

Nothing is checked here: whoever takes figures from a user checks them (conformities above 0.5, pitch above ball
diameter, balls that fit into the circle, contact angle from 0 to 90 degrees).
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, fields
from typing import Self

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]

#: Groove radius over ball diameter, both rings: what ISO 76 and ISO 281 rate radial bearings with (from memory).
#: Makers seldom print theirs; 0.515 makes a bearing about 7 % stiffer, 0.53 about 9 % softer.
CONFORMITY = 0.52
#: Bearing steel as ISO/TS 16281 takes it (from memory).
YOUNGS_MODULUS, POISSONS_RATIO = 207e9, 0.3
#: Nominal angle from which the bottom of the groove faces along the shaft: thrust bearings.
THRUST = np.deg2rad(89.9)


@dataclass(frozen=True)
class BallGeometry:
    """Ball bearings, or single rows of them; every field is an array (b,). Make it with `BallGeometry.of`.

    Attributes
    ----------
    number : balls of the row
    ball_diameter, pitch_diameter : D and dm [m]
    inner_conformity, outer_conformity : groove radius over ball diameter
    contact_angle : nominal, from the radial plane [rad]; 0 deep groove, pi/2 thrust
    clearance : diametral, of the free bearing [m]; negative is interference. Zero means that at the nominal contact
        angle the rings just touch the balls. It means nothing to a thrust bearing: leave it at 0 there
    side : +1 closed by pushing the inner ring to the right, -1 by pushing it to the left
    both_sides : each ball has a second contact pair, mirrored left-right (four-point contact; the second row of a
        self-aligning bearing)
    free_tilt : the outer raceway is a sphere about the bearing's centre, so tilting costs nothing
    youngs, poisson, ball_youngs, ball_poisson : rings and balls [Pa, -]
    shoulder_angle : how far from its bottom the groove reaches, seen from the ball's centre [rad]; infinite if unknown
    first : angle of the first ball, from 12 o'clock clockwise seen from the left [rad]
    """

    number: NDArray[np.int64]
    ball_diameter: Array
    pitch_diameter: Array
    inner_conformity: Array
    outer_conformity: Array
    contact_angle: Array
    clearance: Array
    side: Array
    both_sides: NDArray[np.bool_]
    free_tilt: NDArray[np.bool_]
    youngs: Array
    poisson: Array
    ball_youngs: Array
    ball_poisson: Array
    shoulder_angle: Array
    first: Array

    @classmethod
    def of(
        cls,
        number: ArrayLike,
        ball_diameter: ArrayLike,
        pitch_diameter: ArrayLike,
        *,
        inner_conformity: ArrayLike = CONFORMITY,
        outer_conformity: ArrayLike = CONFORMITY,
        contact_angle: ArrayLike = 0.0,
        clearance: ArrayLike = 0.0,
        side: ArrayLike = 1.0,
        both_sides: ArrayLike = False,
        free_tilt: ArrayLike = False,
        youngs: ArrayLike = YOUNGS_MODULUS,
        poisson: ArrayLike = POISSONS_RATIO,
        ball_youngs: ArrayLike | None = None,
        ball_poisson: ArrayLike | None = None,
        shoulder_angle: ArrayLike = np.inf,
        first: ArrayLike = 0.0,
    ) -> Self:
        """Bearings out of numbers or arrays (b,); a number holds for all. Balls are of the rings' steel if not told."""
        given = (
            number, ball_diameter, pitch_diameter, inner_conformity, outer_conformity, contact_angle, clearance, side,
            both_sides, free_tilt, youngs, poisson, youngs if ball_youngs is None else ball_youngs,
            poisson if ball_poisson is None else ball_poisson, shoulder_angle, first,
        )  # fmt: skip
        kinds = {"number": np.int64, "both_sides": np.bool_, "free_tilt": np.bool_}
        spread = np.broadcast_arrays(*(np.atleast_1d(np.asarray(each)) for each in given))
        pairs = zip(fields(cls), spread, strict=True)
        return cls(*(each.astype(kinds.get(field.name, float)) for field, each in pairs))

    @property
    def count(self) -> int:
        """How many bearings, b."""
        return len(self.number)

    @property
    def gamma(self) -> Array:
        """Ball diameter times cos(contact angle) over pitch diameter, (b,)."""
        return np.asarray(self.ball_diameter * np.cos(self.contact_angle) / self.pitch_diameter)

    @property
    def centre_distance(self) -> Array:
        """Distance A of the groove centres when the ball just touches [m], (b,)."""
        return np.asarray((self.inner_conformity + self.outer_conformity - 1) * self.ball_diameter)

    @property
    def free_angle(self) -> Array:
        """Contact angle to which the rings can be pushed along the shaft before a ball is pressed [rad], (b,)."""
        cosine = np.cos(self.contact_angle) - self.clearance / (2 * self.centre_distance)
        return np.arccos(np.clip(cosine, -1.0, 1.0))

    @property
    def groove_bottom(self) -> Array:
        """Angle of the deepest point of the grooves, from the radial plane [rad], (b,)."""
        return np.where(self.contact_angle > THRUST, np.pi / 2, 0.0)

    def pick(self, which: ArrayLike) -> Self:
        """Some of the bearings, in the order given (indices or a mask)."""
        index = np.asarray(which)
        return type(self)(*(getattr(self, field.name)[index] for field in fields(self)))

    def in_rows(self, sides: Sequence[float]) -> Self:
        """Each bearing as several rows (b * rows,), row by row of a bearing from left to right.

        Parameters
        ----------
        sides : (rows,)
            By which the side of each bearing is multiplied; see `fe_shaft.laws.rows`.
        """
        told = {field.name: np.repeat(getattr(self, field.name), len(sides)) for field in fields(self)}
        told["side"] = told["side"] * np.tile(sides, self.count)
        return type(self)(**told)


def spherical_conformity(ball: Array, pitch: Array, angle: Array) -> Array:
    """Radius of a spherical outer raceway about the bearing's centre over the ball's diameter, (b,)."""
    return np.asarray(pitch / (2 * np.cos(angle) * ball) + 0.5)


def self_aligning(
    number: ArrayLike,
    ball_diameter: ArrayLike,
    pitch_diameter: ArrayLike,
    contact_angle: ArrayLike,
    *,
    inner_conformity: ArrayLike = CONFORMITY,
    clearance: ArrayLike = 0.0,
    youngs: ArrayLike = YOUNGS_MODULUS,
    poisson: ArrayLike = POISSONS_RATIO,
    first: ArrayLike = 0.0,
) -> BallGeometry:
    """Self-aligning ball bearings: two rows that share a spherical outer raceway about the bearing's centre.

    Parameters
    ----------
    number : (b,)
        Balls of one row; both rows stand at the same angles.
    pitch_diameter : (b,) [m]
        Of the ball centres; the sphere's radius is pitch / (2 cos contact angle) + D / 2.
    """
    ball, pitch, angle = (np.asarray(each, dtype=float) for each in (ball_diameter, pitch_diameter, contact_angle))
    return BallGeometry.of(
        number, ball, pitch, inner_conformity=inner_conformity,
        outer_conformity=spherical_conformity(ball, pitch, angle), contact_angle=angle,
        clearance=clearance, both_sides=True, free_tilt=True, youngs=youngs, poisson=poisson, first=first,
    )  # fmt: skip
