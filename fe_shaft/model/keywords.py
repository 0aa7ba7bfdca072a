"""The words of every noun as types, so that editors complete them and type checkers know them.

Made by ``python -m tests.model.keywords_text`` from the nouns themselves; a test holds it against them.
"""

from collections.abc import Mapping, Sequence
from typing import Any, Literal, Protocol, Required, TypedDict

from fe_shaft.model.helix import Helix
from fe_shaft.model.position import Position
from fe_shaft.units import Value


class HasUnits(Protocol):
    """A quantity of pint, from any registry."""

    @property
    def magnitude(self) -> Any:
        """Its number."""

    @property
    def units(self) -> Any:
        """Its unit."""

    def to(self, *units: Any, **options: Any) -> Any:
        """The same in another unit."""


Number = str | Value | Mapping[str, Any] | HasUnits
Table = Mapping[str, Any]


class HeadingWords(TypedDict, total=False):
    """Words of `Heading`."""

    range_check: Literal["off"]
    source: str
    format: int
    question: str
    gravity: Literal["down"] | Sequence[Number]
    units: Any
    housing: Any
    shoulders: Literal["on", "off"]
    estimates: Any


class SegmentWords(TypedDict, total=False):
    """Words of `Segment`."""

    range_check: Literal["off"]
    source: str
    length: Required[Number]
    diameter: Required[Number]
    bore: Number
    end_diameter: Number
    end_bore: Number
    fillet: Number
    fillet_left: Number
    fillet_right: Number
    material: str
    shear: Literal["cowper", "none"] | float
    keyway: Any
    spline: Any


class KeywayWords(TypedDict, total=False):
    """Words of `Keyway`."""

    range_check: Literal["off"]
    source: str
    effective_diameter: Number
    width: Required[Number]
    depth: Required[Number]
    count: int


class SplineWords(TypedDict, total=False):
    """Words of `Spline`."""

    range_check: Literal["off"]
    source: str
    effective_diameter: Number
    root_diameter: Required[Number]


class BodyWords(TypedDict, total=False):
    """Words of `Body`."""

    range_check: Literal["off"]
    source: str
    radial: Number
    tilt: Number


class GeometryWords(TypedDict, total=False):
    """Words of `Geometry`."""

    range_check: Literal["off"]
    source: str
    elements: Required[int]
    element_diameter: Required[Number]
    pitch_diameter: Required[Number]
    groove: Any
    roller_length: Number
    profile: Literal["logarithmic", "cylindrical"]


class GrooveWords(TypedDict, total=False):
    """Words of `Groove`."""

    range_check: Literal["off"]
    source: str
    inner: float
    outer: float


class ShaftWords(TypedDict, total=False):
    """Words of `Shaft`."""

    range_check: Literal["off"]
    source: str
    contour: Sequence[Sequence[Number | None] | Table]
    material: str
    shear: Literal["cowper", "none"] | float
    left_end: Sequence[Number]
    axis: Literal["+X", "-X", "+Y", "-Y", "+Z", "-Z"]
    twelve: Literal["+X", "-X", "+Y", "-Y", "+Z", "-Z"]
    segments_file: str
    contour_file: str
    contour_layer: str
    contour_unit: Literal["m", "mm", "cm", "um", "nm", "in", "ft", "mil"]
    label: str


class PinWords(TypedDict, total=False):
    """Words of `Pin`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    holds: Required[Sequence[Literal["radial", "axial", "stops_left", "stops_right", "tilt", "spin"]]]
    load_centre: Number
    offset: Number
    offset_angle: Number
    bore_tilt: Number
    bore_tilt_angle: Number
    width: Number


class BearingWords(TypedDict, total=False):
    """Words of `Bearing`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    holds: Required[Sequence[Literal["radial", "axial", "stops_left", "stops_right", "tilt", "spin"]]]
    load_centre: Number
    offset: Number
    offset_angle: Number
    bore_tilt: Number
    bore_tilt_angle: Number
    width: Number
    stiffness: Any
    matrix: Any
    kind: Literal[
        "deep groove ball bearing",
        "four-point-contact ball bearing",
        "self-aligning ball bearing",
        "cylindrical roller bearing",
        "needle roller bearing",
        "spherical roller bearing",
    ]
    geometry: Any
    contact_angle: Number
    radial_clearance: Number
    seat: Any


class GearWords(TypedDict, total=False):
    """Words of `Gear`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    mass: Number
    cg_at: Number | Position
    cg_radius: Number
    cg_angle: Number
    hub: Literal["none", "one piece"] | float
    hub_diameter: Number
    hub_length: Number
    teeth: int
    normal_module: Number
    pitch_diameter: Number
    pressure_angle: Number
    helix: str | Helix
    facewidth: Number
    mate: Number
    spread: Number
    form: Literal["cylindrical", "bevel"]
    pitch_cone_angle: Number
    apex: Literal["left", "right"]
    mean_diameter: Number
    body: Any


class CouplingWords(TypedDict, total=False):
    """Words of `Coupling`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    mass: Number
    cg_at: Number | Position
    cg_radius: Number
    cg_angle: Number
    hub: Literal["none", "one piece"] | float
    hub_diameter: Number
    hub_length: Number
    spread: Number


class SprocketWords(TypedDict, total=False):
    """Words of `Sprocket`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    mass: Number
    cg_at: Number | Position
    cg_radius: Number
    cg_angle: Number
    hub: Literal["none", "one piece"] | float
    hub_diameter: Number
    hub_length: Number
    spread: Number
    teeth: int
    chain_pitch: Number
    diameter: Number
    pull_factor: float
    pulls_towards: Required[Number]


class PulleyWords(TypedDict, total=False):
    """Words of `Pulley`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    mass: Number
    cg_at: Number | Position
    cg_radius: Number
    cg_angle: Number
    hub: Literal["none", "one piece"] | float
    hub_diameter: Number
    hub_length: Number
    spread: Number
    diameter: Required[Number]
    belt_pull: Any
    pull_factor: float
    wrap: Number
    pulls_towards: Required[Number]


class MassWords(TypedDict, total=False):
    """Words of `Mass`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    mass: Required[Number]
    cg_at: Number | Position
    cg_radius: Number
    cg_angle: Number
    hub: Literal["none", "one piece"] | float
    hub_diameter: Number
    hub_length: Number
    spread: Number


class ForceWords(TypedDict, total=False):
    """Words of `Force`."""

    range_check: Literal["off"]
    source: str
    on: str
    at: Number | Position
    left_at: Number | Position
    right_at: Number | Position
    label: str
    spread: Number
    up: Number
    front: Number
    axial: Number
    couple: Any
    radius: Number
    angle: Number


class MaterialWords(TypedDict, total=False):
    """Words of `Material`."""

    range_check: Literal["off"]
    source: str
    youngs_modulus: Number
    shear_modulus: Number
    poisson_ratio: float
    density: Number
    thermal_expansion: Number


class CaseWords(TypedDict, total=False):
    """Words of `Case`."""

    range_check: Literal["off"]
    source: str
    like: str
    enters: str | Mapping[str, float]
    leaves: str | Mapping[str, float]
    power: Number
    torque: Number
    speed: Number
    turns: Literal[
        "clockwise from left", "counterclockwise from left", "clockwise from right", "counterclockwise from right"
    ]
    of_shaft: str
    torque_factor: float
    coasts: bool
    forces: Sequence[str] | Mapping[str, float]
    label: str


class LimitWords(TypedDict, total=False):
    """Words of `Limit`."""

    range_check: Literal["off"]
    source: str
    of: Required[str | Sequence[str]]
    quantity: Required[
        Literal["deflection", "up", "front", "axial", "separation", "tangential", "slope", "tilt", "twist", "force"]
    ]
    max: Number
    min: Number
    counting: Literal["everything"]
    cases: Sequence[str]


class StiffnessWords(TypedDict, total=False):
    """Words of `Stiffness`."""

    range_check: Literal["off"]
    source: str
    radial: Number
    up: Number
    front: Number
    axial: Number
    tilt: Number
    tilt_up: Number
    tilt_front: Number


class SeatWords(TypedDict, total=False):
    """Words of `Seat`."""

    range_check: Literal["off"]
    source: str
    radial: Number
    up: Number
    front: Number
    axial: Number
    tilt: Number
    tilt_up: Number
    tilt_front: Number
    matrix: Any


class MatrixWords(TypedDict, total=False):
    """Words of `Matrix`."""

    range_check: Literal["off"]
    source: str
    rows: Any
    file: str
    units: Required[Any]


class MatrixUnitsWords(TypedDict, total=False):
    """Words of `MatrixUnits`."""

    range_check: Literal["off"]
    source: str
    force: Required[Literal["N", "kN", "MN", "lbf", "kgf"]]
    length: Required[Literal["m", "mm", "cm", "um", "nm", "in", "ft", "mil"]]
    angle: Required[Literal["rad", "mrad", "urad", "deg", "arcmin", "arcsec"]]


class CoupleWords(TypedDict, total=False):
    """Words of `Couple`."""

    range_check: Literal["off"]
    source: str
    up: Number
    front: Number
    axial: Number


class BeltPullWords(TypedDict, total=False):
    """Words of `BeltPull`."""

    range_check: Literal["off"]
    source: str
    tight: Required[Number]
    slack: Required[Number]


class HousingWords(TypedDict, total=False):
    """Words of `Housing`."""

    range_check: Literal["off"]
    source: str
    seat: Any


class EstimatesWords(TypedDict, total=False):
    """Words of `Estimates`."""

    range_check: Literal["off"]
    source: str
    together: bool


class OutputUnitsWords(TypedDict, total=False):
    """Words of `OutputUnits`."""

    range_check: Literal["off"]
    source: str
    force: Literal["N", "kN", "MN", "lbf", "kgf"]
    length: Literal["m", "mm", "cm", "um", "nm", "in", "ft", "mil"]
    angle: Literal["rad", "mrad", "urad", "deg", "arcmin", "arcsec"]
    stress: Literal["Pa", "kPa", "MPa", "GPa", "psi", "ksi"]
