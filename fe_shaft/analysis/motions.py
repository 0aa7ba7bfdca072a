"""Free motions in words: which shaft, which motion, which remedy - before anything is solved.

Free spin is normal for a drive and is not an error here; `torque` decides what is done about it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import FreeMotionError
from fe_shaft.fem.dofs import RX, RY, RZ, UX, UY, UZ
from fe_shaft.fem.rigid_motion import free_motions
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]

#: A component below this share of a motion (angles times shaft length) is rounding, far above 1e-15, far below any
#: motion that a support's place or a stiffness matrix really mixes in.
NOISE = 1e-7


def require_held(model: Model, push: dict[str, int], cases: NDArray[np.intp]) -> set[str]:
    """Refuse a model in which a shaft can move as a rigid body; returns the shafts that can spin.

    Parameters
    ----------
    push : sense of the axial load on each shaft
    cases : numbers of the cases concerned, for the sentence only

    Raises
    ------
    FreeMotionError
        One sentence for every shaft that can move, with the motion and the remedy.
    """
    spinning, sentences = set(), []
    for shaft in model.shafts:
        length = float(shaft.ends[-1])
        free = free_motions(model.support_table.held_directions(shaft.name, push), length)
        if not len(free):
            continue
        if len(free) == 1 and abs(free[0, RX]) * length > 1 - NOISE**2:
            spinning.add(shaft.name)
            continue
        scaled = free * np.array([1, 1, 1, length, length, length])
        if _within(scaled, [RX]):
            spinning.add(shaft.name)
        axial = model.statics[shaft.name].resultant[0, cases]
        sentences += _sentences(model, shaft.name, scaled, length, push[shaft.name], axial)
    if sentences:
        raise FreeMotionError("\n".join(sentences))
    return spinning


def _within(free: Array, dofs: list[int]) -> int:
    """Dimension of the free motions that use only the given displacements."""
    others = [k for k in range(6) if k not in dofs]
    values = np.linalg.svd(free[:, others], compute_uv=False) if len(free) else np.empty(0)
    return len(free) - int((values > NOISE).sum())


def _inside(free: Array, dofs: list[int]) -> Array:
    """Those free motions themselves, (n, len(dofs))."""
    others = [k for k in range(6) if k not in dofs]
    u, values, _ = np.linalg.svd(free[:, others])
    mix = u[:, int((values > NOISE).sum()) :].T
    inside: Array = (mix @ free)[:, dofs]
    return inside


def _sentences(model: Model, shaft: str, free: Array, length: float, push: int, axial: Array) -> list[str]:
    out = []
    where = _where(model, shaft)
    in_planes = _within(free, [UY, RZ]), _within(free, [UZ, RY])
    slide, spin = _within(free, [UX]), _within(free, [RX])
    if slide:
        out.append(f"{where} {_slide(model, shaft, push, axial)}")
    if any(in_planes):
        out.append(f"{where} {_across(model, shaft, free, length, in_planes)}")
    if slide + spin + sum(in_planes) < len(free):
        rest = _mixed(free, length)
        out.append(
            f"{where} can move freely: {rest}. No support resists that combination; "
            "give the stiffness matrix a full rank or add a support."
        )
    return out


def _where(model: Model, shaft: str) -> str:
    file, line = model.source_lines.get(shaft, ("", None))
    return f"{file}:{line} {shaft}" if file else shaft


def _slide(model: Model, shaft: str, push: int, axial: Array) -> str:
    stops = [s.name for s in model.supports if model.places[s.name].shaft == shaft and _stops(s)]
    way = {-1: "to the left", 1: "to the right"}.get(push, "along its axis")
    largest = float(axial[np.abs(axial).argmax()])
    if stops:
        fact = f"can slide {way}: {_and(stops)} stops it only the other way"
    else:
        fact = "can slide along its axis: no support holds it axially"
    if largest:
        fact += f"; {show(abs(largest), 'N')} push it {'left' if largest < 0 else 'right'}"
    names = [s.name for s in model.supports if model.places[s.name].shaft == shaft and s.name not in stops]
    target = names[-1] if names else "one bearing or pin"
    return f'{fact}.\n  Write in {target}   holds = ["radial", "axial"]'


def _stops(support: object) -> bool:
    return any(word.startswith("stops_") for word in support.holds)  # type: ignore[attr-defined]


def _across(model: Model, shaft: str, free: Array, length: float, dims: tuple[int, int]) -> str:
    supports = {s.name: model.places[s.name].x for s in model.supports if model.places[s.name].shaft == shaft}
    if dims == (2, 2):
        return (
            "can move across its axis in every direction: no support holds it radially.\n"
            '  Add two supports with   holds = ["radial"]'
        )
    pivots = []
    for dim, dofs, sign in ((dims[0], [UY, RZ], -1.0), (dims[1], [UZ, RY], 1.0)):
        pivots.append(_pivot(_inside(free, dofs), length, sign) if dim == 1 else None)
    words = {(1, 0): "up and down", (0, 1): "to the front and back"}
    direction = words.get((min(dims[0], 1), min(dims[1], 1)), "up and down, to the front and back")
    if max(dims) == 2:
        return (
            f"can move {direction}: no support holds it there.\n"
            '  Let two supports hold it in that direction (holds = ["radial"], stiffness.up and stiffness.front).'
        )
    pivot = next((p for p in pivots if p is not None), None)
    if pivot is None:
        return f'can shift {direction}: its supports only keep it from tilting.\n  Add   holds = ["radial"]   to one.'
    nearest = min(supports, key=lambda name: abs(supports[name] - pivot)) if supports else ""
    about = nearest if nearest and abs(supports[nearest] - pivot) < 1e-3 * length else show(pivot, "mm")
    return (
        f"can swing {direction} about {about}: only one support holds it radially there.\n"
        f'  Add a second support with holds = ["radial"], or let {nearest or "it"} hold tilt.'
    )


def _pivot(motion: Array, length: float, sign: float) -> float | None:
    """Place [m] on the axis that stands still; None for a pure shift."""
    shift, turn = motion[0]
    return None if abs(turn) < NOISE else float(sign * shift / turn * length)


def _mixed(free: Array, length: float) -> str:
    names = ["along its axis", "up", "to the front", "spin", "tilt about 12 o'clock", "tilt about 3 o'clock"]
    motion = free[np.abs(free).max(axis=1).argmax()]
    parts = [names[k] for k in np.argsort(-np.abs(motion)) if abs(motion[k]) > 0.05]
    return " together with ".join(parts)


def _and(names: list[str]) -> str:
    return names[0] if len(names) == 1 else ", ".join(names[:-1]) + " and " + names[-1]
