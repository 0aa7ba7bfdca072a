"""A shaft's description reaches the chain as it is meant; small examples worked by hand."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import replace
from decimal import Decimal

import pytest

from tests.oracle.digits import Number
from tests.oracle.shaft_spec import (
    CaseSpec,
    ForceSpec,
    SegmentSpec,
    ShaftSpec,
    SupportSpec,
    exact,
    to_oracle,
    truth,
    wrench,
)

D = Decimal
LEFT = SupportSpec("left", 0.0, ("radial", "axial", "spin"))
RIGHT = SupportSpec("right", 0.2, ("radial",))


def shaft(*supports: SupportSpec, force: ForceSpec | None = None) -> ShaftSpec:
    """Give a cylinder of 200 x 30 mm."""
    forces = () if force is None else (force,)
    case = CaseSpec("only", {} if force is None else {force.name: 2.0})
    return ShaftSpec(0, (SegmentSpec(0.2, 0.03),), 2.1e11, 0.3, 7850.0, "none", supports, forces, (case,))


def alike(found: Sequence[Number], expected: Sequence[float], of: float = 1.0) -> None:
    """Demand double precision."""
    for value, wanted in zip(found, expected, strict=True):
        assert abs(float(value) - wanted) <= 4e-16 * of, (found, expected)


@pytest.mark.parametrize(
    ("force", "expected"),
    [
        # At 12 o'clock, 0.1 m up: a push to the front turns clockwise (+x), a pull to the right turns about -z.
        (ForceSpec("f", 0.1, front=7.0, radius=0.1), [0, 0, 7, 0.7, 0, 0]),
        (ForceSpec("f", 0.1, axial=7.0, radius=0.1), [7, 0, 0, 0, 0, -0.7]),
        # At 3 o'clock, 0.1 m to the front: a push up turns counterclockwise, a pull to the right turns about +y.
        (ForceSpec("f", 0.1, up=7.0, radius=0.1, angle=90.0), [0, 7, 0, -0.7, 0, 0]),
        (ForceSpec("f", 0.1, axial=7.0, radius=0.1, angle=90.0), [7, 0, 0, 0, 0.7, 0]),
        # Towards the axis: no moment.
        (ForceSpec("f", 0.1, up=-3.0, front=-3.0, radius=0.1, angle=45.0), [0, -3, -3, 0, 0, 0]),
        (ForceSpec("f", 0.1, couple_axial=1.0, couple_up=2.0, couple_front=3.0), [0, 0, 0, 1, 2, 3]),
    ],
)
def test_force_at_a_radius(force: ForceSpec, expected: list[float]) -> None:
    """Source: moment = r x F in a right-handed frame."""
    alike(wrench(force), expected)


def test_a_force_acts_as_often_as_its_case_says() -> None:
    """Source: statics."""
    _, solution = truth(shaft(LEFT, RIGHT, force=ForceSpec("f", 0.05, up=4.0, couple_axial=1.0)))
    alike(solution.reactions[0][0], [0, -6, 0, -2, 0, 0], 6)
    alike(solution.reactions[0][1], [0, -2, 0, 0, 0, 0], 6)


def test_a_spread_force_acts_over_its_width_only() -> None:
    """Source: statics; the shear force falls evenly from the left edge to the right one."""
    force = ForceSpec("f", 0.05, up=4.0, spread=0.02)
    made, solution = truth(shaft(LEFT, RIGHT, force=force), more_stations=[0.045])
    assert [float(x) for x in made.x] == [0.0, 0.04, 0.045, 0.05, 0.06, 0.2]
    alike([row[1] for row in solution.start[0]], [6, 6, 4, 2, -2], 6)


@pytest.mark.parametrize(
    ("angle", "up", "front"), [(0.0, 1, 0), (90.0, 0, 1), (180.0, -1, 0), (315.0, 0.5**0.5, -(0.5**0.5))]
)
def test_offset_moves_towards_its_angle(angle: float, up: float, front: float) -> None:
    """Source: the clock: (cos a, sin a) in y, z."""
    moved = SupportSpec("right", 0.2, ("radial",), offset=1e-4, offset_angle=angle)
    _, solution = truth(shaft(LEFT, moved))
    alike(solution.u[0][-1], [0, 1e-4 * up, 1e-4 * front, 0, -front * 5e-4, up * 5e-4], 1e-3)


@pytest.mark.parametrize(("angle", "up", "front"), [(0.0, 1, 0), (90.0, 0, 1), (225.0, -(0.5**0.5), -(0.5**0.5))])
def test_a_tilted_bore_leads_its_right_end_towards_the_angle(angle: float, up: float, front: float) -> None:
    """Source: rigid movement of a shaft in one leaning bore."""
    clamp = SupportSpec(
        "left", 0.0, ("radial", "axial", "spin", "tilt"), bore_tilt=1e-3, bore_tilt_angle=angle, load_centre=0.03
    )
    _, solution = truth(shaft(clamp))
    # About the ring's middle: the line through x = 0.
    alike(solution.u[0][-1][:3], [0, 2e-4 * up, 2e-4 * front], 1e-3)
    about_centre = to_oracle(shaft(clamp), bore_turns_about="load centre").chain.supports[0]
    alike(about_centre.offset, [0, 0, 0, 0, -1e-3 * front, 1e-3 * up], 1e-3)


def test_stiffness_words_reach_their_directions() -> None:
    """Source: tilt_up turns about the 12 o'clock axis (y), tilt_front about the 3 o'clock axis (z)."""
    stiffness = {"up": 1.0, "front": 2.0, "axial": 3.0, "tilt_up": 4.0, "tilt_front": 5.0}
    bearing = SupportSpec("left", 0.0, ("radial", "axial", "spin"), stiffness, seat={"radial": 6.0, "tilt": 7.0})
    support = to_oracle(shaft(bearing, RIGHT)).chain.supports[0]
    assert support.spring is not None
    assert support.seat is not None
    assert [float(support.spring[i][i]) for i in range(6)] == [3, 1, 2, 0, 4, 5]
    assert [float(support.seat[i][i]) for i in range(6)] == [0, 6, 6, 0, 7, 7]
    assert support.seat_rigid == (0, 3)
    assert support.rigid == (3,)


def test_pins_tie_what_they_hold() -> None:
    """Source: the words' meaning."""
    pin = SupportSpec("left", 0.0, ("radial", "axial", "tilt"), load_centre=-0.01)
    first, second, gauge = to_oracle(shaft(pin, RIGHT)).chain.supports
    assert sorted(first.rigid) == [0, 1, 2, 4, 5]
    assert first.dx == D("-0.01")
    assert sorted(second.rigid) == [1, 2]
    assert (gauge.node, gauge.rigid) == (0, (3,))


def test_a_cone_keeps_its_shape_when_cut() -> None:
    """Source: a straight line through the end diameters."""
    spec = shaft(LEFT, RIGHT)
    cone = SegmentSpec(0.2, 0.03, 0.05, 0.01, 0.02)
    made = to_oracle(replace(spec, segments=(cone,)), more_stations=[0.05])
    first, second = made.chain.elements
    assert (first.end_diameter, first.end_bore) == (D("0.035"), D("0.0125"))
    assert (second.diameter, second.bore) == (D("0.035"), D("0.0125"))
    assert (second.end_diameter, second.end_bore) == (D("0.05"), D("0.02"))


def test_a_float_means_its_short_decimal() -> None:
    """Source: repr of a float is the shortest text that reads back to it (Python documentation)."""
    assert exact(0.1) == D("0.1")
    assert exact(0.1) + exact(0.2) == exact(0.3)
    assert not math.isclose(0.1 + 0.2, 0.3, rel_tol=0.0)
