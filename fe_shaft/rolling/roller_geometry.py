"""What roller bearings are inside, many at once: rollers, pitch circle, angle, clearance, laminae and profile."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, fields, replace
from typing import Any, Self

import numpy as np
from numpy.typing import ArrayLike, NDArray

from fe_shaft.rolling.roller_profile import Profile, logarithmic

Array = NDArray[np.float64]
Ints = NDArray[np.int64]
Bools = NDArray[np.bool_]

#: ISO/TS 16281 asks for at least 30 laminae (from memory); an odd number has one in the middle.
FEWEST_LAMINAE = 31
#: A contact angle within this of 90 deg [rad] is a thrust bearing: its rollers do not feel radial motion.
RIGHT_ANGLE = 1e-9
#: Bearing steel as ISO/TS 16281 takes it (from memory).
YOUNGS_MODULUS, POISSONS_RATIO = 207e9, 0.3


@dataclass(frozen=True, eq=False)
class RollerGeometry:
    """Roller bearings, or single rows of them; every field is an array (b,) unless said. Make it with `of`.

    Attributes
    ----------
    number : rollers of a row
    roller_diameter, length : in the roller's middle, and the length that touches [m]
    pitch_diameter : of the circle of the rollers' middles [m]
    contact_angle :
        From the radial plane [rad]: 0 cylindrical and needle rollers, pi/2 thrust rollers. One angle stands for both
        races of tapered rollers.
    clearance : radial internal clearance, the whole play [m]; negative is interference; 0 for thrust rollers
    side : +1 closed by pushing the inner ring to the right, -1 by pushing it to the left; no matter at 0 degrees
    both_sides : a second row of `number` rollers, mirrored left-right, acts at the same centre
    free_tilt :
        One raceway is a sphere about the bearing's centre, so tilting costs nothing: with both sides a spherical roller
        bearing, whose rows lie at +-dm/2 tan(contact angle) from its centre.
    laminae : slices of a roller, odd, at least 31
    profile : (b, n) drop of the roller on each side in the middle of its laminae [m]; infinite behind the last one
    youngs, poisson : of rings and rollers [Pa, -]; they enter the pressures, not the spring constant
    first : angle of the first roller, from 12 o'clock clockwise seen from the left [rad]
    """

    number: Ints
    roller_diameter: Array
    length: Array
    pitch_diameter: Array
    contact_angle: Array
    clearance: Array
    side: Array
    both_sides: Bools
    free_tilt: Bools
    laminae: Ints
    profile: Array
    youngs: Array
    poisson: Array
    first: Array

    def __post_init__(self) -> None:
        for name, wrong, remedy in self._doubts():
            if (bearings := np.flatnonzero(wrong)).size:
                value = np.ravel(getattr(self, name))[bearings[0]]
                raise ValueError(f"roller bearing {bearings[0]}: {name} is {value:g}. {remedy}")

    def _doubts(self) -> list[tuple[str, Bools, str]]:
        across, circle = self.roller_diameter, self.pitch_diameter
        share = np.divide(across, circle, out=np.ones_like(across), where=circle > 0)
        taken = self.number * np.arcsin(np.clip(share, 0, 1))
        angle = self.contact_angle
        return [
            ("number", self.number < 2, "Give at least 2 rollers."),
            ("roller_diameter", ~(across > 0), "Give a positive length."),
            ("length", ~(self.length > 0), "Give a positive length."),
            ("pitch_diameter", ~(circle > across), "Give more than the rollers' diameter."),
            ("number", taken > np.pi * (1 + 1e-9), "That many rollers overlap on their pitch circle."),
            ("contact_angle", ~((angle >= 0) & (angle <= np.pi / 2 + RIGHT_ANGLE)), "Give 0 to pi/2 rad."),
            ("contact_angle", self.free_tilt & self.thrust, "A spherical raceway needs less than pi/2 rad."),
            ("clearance", ~np.isfinite(self.clearance), "Give a number."),
            ("clearance", self.thrust & (self.clearance != 0), "Thrust rollers have no radial clearance: give 0."),
            ("side", np.abs(self.side) != 1, "Give 1 or -1."),
            ("laminae", self.laminae < FEWEST_LAMINAE, f"Give at least {FEWEST_LAMINAE}."),
            ("laminae", self.laminae % 2 == 0, "Give an odd number."),
            ("youngs", ~(self.youngs > 0), "Give a positive modulus."),
            ("poisson", ~((self.poisson >= 0) & (self.poisson <= 0.5)), "Give 0 to 0.5."),
        ]

    @property
    def count(self) -> int:
        """How many bearings, b."""
        return len(self.number)

    @property
    def thrust(self) -> Bools:
        """Whether the rollers stand across the shaft's axis."""
        return np.asarray(np.abs(self.contact_angle - np.pi / 2) <= RIGHT_ANGLE)

    @property
    def cosine(self) -> Array:
        """Of the contact angle, exactly 0 for thrust rollers."""
        return np.where(self.thrust, 0.0, np.cos(self.contact_angle))

    @property
    def places(self) -> Array:
        """Middles of the laminae (b, n), from the middle of the roller to the right [m]; 0 behind the last one."""
        return lamina_places(self.length, self.laminae)

    @property
    def effective_centre(self) -> Array:
        """Where the lines of contact meet the axis, from the plane of the pitch circle to the right [m].

        -dm/2 tan(a) times the side: to the left for bearings that close to the right. 0 for bearings that act on both
        sides, infinite for thrust bearings.
        """
        tangent = np.where(self.thrust, np.inf, np.tan(np.where(self.thrust, 0.0, self.contact_angle)))
        return np.where(self.both_sides, 0.0, -self.side * self.pitch_diameter / 2 * tangent)

    @classmethod
    def of(
        cls,
        number: ArrayLike,
        roller_diameter: ArrayLike,
        length: ArrayLike,
        pitch_diameter: ArrayLike,
        *,
        contact_angle: ArrayLike = 0.0,
        clearance: ArrayLike = 0.0,
        side: ArrayLike = 1.0,
        both_sides: ArrayLike = False,
        free_tilt: ArrayLike = False,
        laminae: ArrayLike = FEWEST_LAMINAE,
        profile: Profile = logarithmic,
        youngs: ArrayLike = YOUNGS_MODULUS,
        poisson: ArrayLike = POISSONS_RATIO,
        first: ArrayLike = 0.0,
    ) -> Self:
        """Bearings of one profile out of numbers or arrays (b,); a number holds for all. Others: see `stacked`.

        Raises
        ------
        ValueError
            What cannot be, with the index of the bearing.
        """
        given = (
            number, roller_diameter, length, pitch_diameter, contact_angle, clearance, side, both_sides, free_tilt,
            laminae, laminae, youngs, poisson, first,
        )  # fmt: skip
        kinds = {"number": np.int64, "laminae": np.int64, "both_sides": np.bool_, "free_tilt": np.bool_}
        spread = np.broadcast_arrays(*(np.atleast_1d(np.asarray(each)) for each in given))
        told: dict[str, NDArray[Any]]
        told = {f.name: each.astype(kinds.get(f.name, float)) for f, each in zip(fields(cls), spread, strict=True)}
        slices = told["laminae"]
        with np.errstate(all="ignore"):  # sizes that cannot be are told when the geometry is born
            drop = np.array(profile(lamina_places(told["length"], slices), told["length"], told["roller_diameter"]))
        drop[np.arange(drop.shape[1]) >= slices[:, None]] = np.inf
        return cls(**told | {"profile": drop})

    @classmethod
    def stacked(cls, several: Sequence[Self]) -> Self:
        """The bearings of several, one behind another; laminae are filled up to the largest number."""
        widest = max(one.profile.shape[1] for one in several)

        def joined(name: str) -> NDArray[Any]:
            return np.concatenate([_filled(getattr(one, name), widest) for one in several])

        return cls(*(joined(field.name) for field in fields(cls)))

    def pick(self, which: ArrayLike) -> Self:
        """Some of the bearings, in the order given (indices or a mask)."""
        index = np.asarray(which)
        widest = int(self.laminae[index].max(initial=0))
        told = {field.name: getattr(self, field.name)[index] for field in fields(self)}
        return type(self)(**told | {"profile": told["profile"][:, :widest]})

    def in_rows(self, sides: Sequence[float]) -> Self:
        """Each bearing as several rows (b * rows,), row by row of a bearing from left to right.

        Parameters
        ----------
        sides : (rows,)
            By which the side of each bearing is multiplied; a profile turns with its row.
        """
        turns = np.tile(sides, self.count)
        rows = self.pick(np.repeat(np.arange(self.count), len(sides)))
        return replace(rows, side=rows.side * turns, profile=_turned(rows.profile, rows.laminae, turns))


def lamina_places(length: Array, laminae: Ints) -> Array:
    """Middles of equal slices (b, n) of lengths (b,), from the middle to the right; 0 behind the last one."""
    slice_ = np.arange(int(laminae.max(initial=0)))
    place = length[:, None] * ((slice_ + 0.5) / laminae[:, None] - 0.5)
    return np.where(slice_ < laminae[:, None], place, 0.0)


def _turned(profile: Array, laminae: Ints, turns: Array) -> Array:
    """Profiles (b, n), those that turn (-1) from right to left."""
    n = np.arange(profile.shape[1])
    back = np.where(n < laminae[:, None], laminae[:, None] - 1 - n, n)
    return np.where(turns[:, None] < 0, np.take_along_axis(profile, back, axis=1), profile)


def _filled(values: NDArray[Any], widest: int) -> NDArray[Any]:
    """Profiles (b, n) with infinite drops behind their last lamina; anything else as it is."""
    if values.ndim == 1:
        return values
    return np.pad(values, ((0, 0), (0, widest - values.shape[1])), constant_values=np.inf)
