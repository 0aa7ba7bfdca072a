"""The types of rolling bearings that have rules here."""

from __future__ import annotations

from enum import StrEnum


class Kind(StrEnum):
    """A type of bearing, by the word of the trade."""

    DEEP_GROOVE_BALL = "deep groove ball"
    ANGULAR_CONTACT_BALL = "angular contact ball"
    SELF_ALIGNING_BALL = "self-aligning ball"
    CYLINDRICAL_ROLLER = "cylindrical roller"
    NEEDLE_ROLLER = "needle roller"
    TAPERED_ROLLER = "tapered roller"
    SPHERICAL_ROLLER = "spherical roller"


#: Types whose rolling elements are balls.
BALLS = frozenset({Kind.DEEP_GROOVE_BALL, Kind.ANGULAR_CONTACT_BALL, Kind.SELF_ALIGNING_BALL})
