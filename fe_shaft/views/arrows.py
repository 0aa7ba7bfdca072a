"""Forces and torques as arrows: where each stands, how long it is, what is written at its tail. Arrays only."""

from __future__ import annotations

from dataclasses import dataclass, field

import numpy as np

from fe_shaft.results.shown import Shown as Units
from fe_shaft.units import show
from fe_shaft.views.camera import Eye
from fe_shaft.views.drawing import Arrow, Drawing, Floats
from fe_shaft.views.shapes import Shape
from fe_shaft.views.symbols import arrow as flat_arrow
from fe_shaft.views.symbols import bent_arrow

LONGEST = 0.24  # of the shaft's length
SHORTEST = 0.05  # so that a small force is still seen; its number is written beside it
NOTHING = 1e-9  # of the largest force
SIDEWAYS = 0.7  # cosine to the line of sight, below which a bent arrow is a ribbon
ROUND = 0.7  # cosine to the shaft, above which it goes round it
TRADE = Units()


@dataclass(frozen=True)
class Tail:
    """End of an arrow, where its value is written: place (3,), direction out of the arrow (3,), text."""

    point: Floats
    away: Floats
    text: str


@dataclass(frozen=True)
class Arrows:
    """All arrows of one view.

    Parameters
    ----------
    shapes : by style: "filled" loads, "hollow" supports on their "paper", "bent" around a shaft that hides their back
    tails : of every arrow
    paths : (9, 3) points along every straight arrow
    """

    shapes: dict[str, list[Shape]] = field(
        default_factory=lambda: {style: [] for style in ("paper", "filled", "hollow", "bent")}
    )
    tails: list[Tail] = field(default_factory=list)
    paths: list[Floats] = field(default_factory=list)


def draw_arrows(
    drawing: Drawing,
    case: int,
    factor: float,
    eye: Eye,
    largest: float,
    width: float,
    units: Units = TRADE,
) -> Arrows:
    """Arrows of one case: loads filled, supports hollow, torques bent.

    Parameters
    ----------
    drawing : Drawing
        Its arrows.
    case : int
        Number of the case.
    factor : float
        Exaggeration; arrows stand on what has moved.
    eye : Eye
        Straight arrows turn their face to it.
    largest : float [N]
        Force that is drawn longest.
    width : float [m]
        Of an arrow's shaft.
    units : Units
        Of the numbers at their tails.
    """
    drawn = Arrows()
    for each in drawing.arrows:
        point = each.point + factor * each.movement(case)
        _add_force(drawn, each, each.force[case], point, drawing.length, eye, largest, width, units)
        _add_torque(drawn, each, each.couple[case], point, drawing.length, eye, width, units)
    return drawn


def reach(force: Floats, length: float, largest: float) -> float:
    """Length of a force's arrow [m]; 0 for no force."""
    size = float(np.linalg.norm(force))
    return length * max(LONGEST * size / largest, SHORTEST) if size > NOTHING * largest else 0.0


def force_text(size: float, unit: str = "N") -> str:
    """A force with its unit: ``40.2 N``, ``4.98 kN``; in other units as they are."""
    return show(size, "kN" if unit == "N" and size >= 1000.0 else unit)


def _add_force(
    drawn: Arrows,
    arrow: Arrow,
    force: Floats,
    point: Floats,
    length: float,
    eye: Eye,
    largest: float,
    width: float,
    units: Units,
) -> None:
    long = reach(force, length, largest)
    if long == 0.0:
        return
    size = float(np.linalg.norm(force))
    tip = point - arrow.clear * force / size
    tail = tip - long * force / size
    drawn.tails.append(Tail(tail, tail - tip, force_text(size, units.force)))
    drawn.paths.append(np.linspace(tail, tip, 9))
    face = flat_arrow(tail, tip, eye.towards, width, filled=True)
    drawn.shapes["paper" if arrow.support else "filled"].append(face)
    if arrow.support:
        drawn.shapes["hollow"].append(flat_arrow(tail, tip, eye.towards, width, filled=False))


def _add_torque(
    drawn: Arrows, arrow: Arrow, couple: Floats, point: Floats, length: float, eye: Eye, width: float, units: Units
) -> None:
    size = float(np.linalg.norm(couple))
    if size == 0.0:
        return
    radius = max(1.4 * arrow.around, 0.06 * length)
    ribbon = abs(float(couple @ eye.towards)) < SIDEWAYS * size
    shape = bent_arrow(point, couple, radius, width, eye.towards, ribbon=ribbon)
    highest = shape.points[np.argmax(shape.points @ eye.up)]
    drawn.tails.append(Tail(highest, highest - point, show(size, units.moment)))
    round_the_shaft = ribbon and abs(float(couple @ arrow.axis)) > ROUND * size
    drawn.shapes["bent" if round_the_shaft else "filled"].append(shape)
