"""From the engineer's words to wrenches: tooth forces, belt and chain pulls, weights, torques and plain forces.

Every action is attached by a rigid link from its own point to the shaft's axis and is kept as one wrench per case at
the axis. Signs: a torque about +x is clockwise seen from the shaft's left end.

A gear with its mate in direction c (unit vector from its own axis to the mate's), driven by a torque T from its mate,
takes at its pitch point r c

    tangential  (T / r) t            with t = x cross c, the way the pitch point moves when the gear turns clockwise
    radial      -|T| / r tan(alpha_n) / cos(beta) c      away from the mate, whatever the sense
    axial       -+ (T / r) tan(beta) x                   minus for a right-hand, plus for a left-hand gear

(ISO 21771 geometry; common statics of involute gears without friction). A straight bevel gear takes
|T| / r_m tan(alpha) cos(delta) radially and |T| / r_m tan(alpha) sin(delta) along its axis, away from its apex.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.model.gear import Gear
from fe_shaft.model.helix import Helix
from fe_shaft.model.loads import BeltPull, Coupling, Force, Pulley, Sprocket
from fe_shaft.model.part import Heavy, Spread

if TYPE_CHECKING:
    from fe_shaft.model.case import Case
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]
X_AXIS = np.array([1.0, 0.0, 0.0])


@dataclass(frozen=True)
class Action:
    """What one part does to its shaft, in every case.

    Attributes
    ----------
    part, shaft, kind : names; kind is "tooth force", "pull", "torque", "force" or "weight"
    x : [m], place on the axis from the shaft's left end
    spread : [m], width over which the load is spread evenly; 0 for a point
    arm : (3,) [m], from the axis at x to the point where the force attacks
    force : (n_cases, 3) [N], at that point
    couple : (n_cases, 3) [N m]
    wrench : (n_cases, 6) [N, N m], the same at the axis
    reach : [m], largest component of the arm
    """

    part: str
    shaft: str
    kind: str
    x: float
    spread: float
    arm: Array
    force: Array
    couple: Array
    wrench: Array
    reach: float


def clock(angle: float) -> Array:
    """Unit vector of a clock angle [rad], clockwise from 12 o'clock seen from the left end."""
    return np.array([0.0, math.cos(angle), math.sin(angle)])


def case_names(model: Model) -> tuple[str, ...]:
    """Names of the load cases; a model that writes none has one all the same."""
    return tuple(case.name for case in model.cases)


def actions(model: Model) -> tuple[Action, ...]:
    """All actions of a model, part by part, every case in one array."""
    torques = _torques(model)
    out: list[Action] = []
    for gear in model.gears:
        if gear.name in torques:
            out.append(tooth_force(model, gear, torques[gear.name]))
    for coupling in model.couplings:
        if coupling.name in torques:
            out.append(_torque(model, coupling, torques[coupling.name]))
    wheels: list[Pulley | Sprocket] = [*model.pulleys, *model.sprockets]
    for wheel in wheels:
        action = _pull(model, wheel, torques.get(wheel.name))
        if action is not None:
            out.append(action)
    out.extend(_force(model, force) for force in model.forces)
    out.extend(_weights(model))
    return tuple(out)


def case_torque(case: Case) -> float:
    """Torque [N m] that enters in a case, positive clockwise from the left end of its shaft."""
    return case.sense * case.torque_si * (-1.0 if case.coasts else 1.0)


def _torques(model: Model) -> dict[str, Array]:
    """Torque about +x that each part brings to its shaft, (n_cases,) by part."""
    out: dict[str, Array] = {}
    n = len(case_names(model))
    for k, case in enumerate(model.cases):
        torque = case_torque(case)
        for shares, sign in ((case.enters_shares, 1.0), (case.leaves_shares, -1.0)):
            for name, share in shares.items():
                out.setdefault(name, np.zeros(n))[k] += sign * share * torque
    return out


def tooth_force(model: Model, gear: Gear, torque: Array) -> Action:
    """Tooth forces on a gear whose mate turns it with a torque (n_cases,) about +x."""
    if gear.mate is None:
        raise AssertionError(f"gear {gear.name} carries torque without a mate")
    towards_mate = clock(gear.mate.si)
    tangent = np.cross(X_AXIS, towards_mate)
    radius = gear.reference_diameter / 2
    tangential = (torque / radius)[:, None]
    across, along = _tooth_ratios(gear)
    size = np.abs(tangential)
    force = tangential * tangent - size * across * towards_mate
    force = force + (size if gear.form == "bevel" else tangential) * along * X_AXIS
    return _act(model, gear, "tooth force", radius * towards_mate, force)


def _tooth_ratios(gear: Gear) -> tuple[float, float]:
    """Radial and axial over tangential force; the axial one signed for a positive torque (bevel: for any)."""
    tan_alpha = math.tan(gear.pressure_angle.si)
    if gear.form == "bevel":
        if gear.pitch_cone_angle is None:
            raise AssertionError(f"bevel gear {gear.name} has no pitch_cone_angle")
        delta = gear.pitch_cone_angle.si
        away = 1.0 if gear.apex == "left" else -1.0
        return tan_alpha * math.cos(delta), away * tan_alpha * math.sin(delta)
    if not isinstance(gear.helix, Helix):
        return tan_alpha, 0.0
    beta = gear.helix_angle
    hand = -1.0 if gear.helix.hand == "right" else 1.0
    return tan_alpha / math.cos(beta), hand * math.tan(beta)


def _torque(model: Model, coupling: Coupling, torque: Array) -> Action:
    return _act(model, coupling, "torque", np.zeros(3), np.zeros((len(torque), 3)), torque[:, None] * X_AXIS)


def _pull(model: Model, wheel: Pulley | Sprocket, torque: Array | None) -> Action | None:
    """Belt or chain pull on a shaft, and the torque it goes with.

    Where both strands of a belt are given they pull as vectors (`_strands`); else the shaft load is pull_factor times
    the effective pull T / r, towards the other wheel (common practice, no source).
    """
    turning = np.zeros(len(case_names(model))) if torque is None else torque
    towards = clock(wheel.pulls_towards.si)
    if isinstance(wheel, Pulley) and wheel.belt_pull is not None:
        force = _strands(wheel, wheel.belt_pull, towards, turning)
    elif torque is None:
        return None
    else:
        factor = 1.0 if wheel.pull_factor is None else wheel.pull_factor
        force = (factor * np.abs(turning) / (wheel.reference_diameter / 2))[:, None] * towards
    return _act(model, wheel, "pull", np.zeros(3), force, turning[:, None] * X_AXIS)


def _strands(pulley: Pulley, belt: BeltPull, towards: Array, turning: Array) -> Array:
    """Both strands of a belt as vectors, (n_cases, 3).

    Each strand leaves at an angle of (180 deg - wrap) / 2 to the line towards the other pulley; the tight one on the
    side from which it turns the pulley the way it turns. Without a torque nothing says which side that is, and only
    the part along that line counts.
    """
    tight, slack, lean = belt.tight.si, belt.slack.si, (math.pi - pulley.wrap.si) / 2
    aside = -np.sign(turning)[:, None] * np.cross(X_AXIS, towards)
    return (tight + slack) * math.cos(lean) * towards + (tight - slack) * math.sin(lean) * aside


def _force(model: Model, force: Force) -> Action:
    arm = np.zeros(3) if force.radius is None or force.angle is None else force.radius.si * clock(force.angle.si)
    factor = np.array([case.force_factor(force.name) for case in model.cases])[:, None]
    couple = np.zeros(3) if force.couple is None else np.array(force.couple.si)
    return _act(model, force, "force", arm, factor * np.array(force.force_si), factor * couple)


def _weights(model: Model) -> list[Action]:
    if not model.gravity_vector.any():
        return []
    n, out = len(case_names(model)), []
    for part in (*model.gears, *model.couplings, *model.pulleys, *model.sprockets, *model.masses):
        if part.mass is not None:
            pull = part.mass.si * gravity_in_shaft(model, model.places[part.name].shaft)
            out.append(_act(model, part, "weight", cg_arm(model, part.name), np.tile(pull, (n, 1))))
    return out


def gravity_in_shaft(model: Model, shaft: str) -> Array:
    """Gravity (3,) [m/s^2] in the frame of a shaft."""
    return np.asarray(model.gravity_vector @ model.frames[shaft].rotation)


def shaft_mass(model: Model, shaft: str) -> tuple[float, float]:
    """Mass of a shaft [kg] and its centre of gravity from the left end [m], by the formula of a truncated cone."""
    arrays = model.segment_arrays[shaft]
    start = np.concatenate([[0.0], np.cumsum(arrays.length)[:-1]])
    mass = moment = 0.0
    for first, last, sign in (
        (arrays.diameter_left, arrays.diameter_right, 1.0),
        (arrays.bore_left, arrays.bore_right, -1.0),
    ):
        squares = first**2 + first * last + last**2
        own = sign * arrays.density * np.pi / 12 * arrays.length * squares
        with np.errstate(invalid="ignore", divide="ignore"):
            centre = arrays.length / 4 * (first**2 + 2 * first * last + 3 * last**2) / squares
        centre = np.nan_to_num(centre, nan=0.0, posinf=0.0)
        mass += float(own.sum())
        moment += float((own * (start + centre)).sum())
    return mass, moment / mass


def cg_arm(model: Model, name: str) -> Array:
    """From a part's place on the axis to its centre of gravity, (3,) [m]."""
    x, y, z = model.cg(name)
    return np.array([x - model.places[name].x, y, z])


def _act(
    model: Model, part: Heavy | Spread, kind: str, arm: Array, force: Array, couple: Array | None = None
) -> Action:
    place = model.places[part.name]
    wrench = np.zeros((len(force), 6))
    wrench[:, :3] = force
    if couple is not None:
        wrench[:, 3:] = couple
    if arm.any():
        wrench[:, 3] += arm[1] * force[:, 2] - arm[2] * force[:, 1]
        wrench[:, 4] += arm[2] * force[:, 0] - arm[0] * force[:, 2]
        wrench[:, 5] += arm[0] * force[:, 1] - arm[1] * force[:, 0]
    own_couple = np.zeros_like(force) if couple is None else couple
    return Action(
        part.name, place.shaft, kind, place.x, part.spread_si, arm, force, own_couple, wrench, float(np.abs(arm).max())
    )
