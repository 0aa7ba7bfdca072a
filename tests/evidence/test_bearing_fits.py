"""What fits and warmth take from clearance, against a handbook's formula and a maker's words.

Shigley's Mechanical Engineering Design, interference fit of members of one material (from memory):
p = E w / (2 R^3) (ro^2 - R^2)(R^2 - ri^2) / (ro^2 - ri^2), w the radial interference, R the nominal radius.
A maker's catalogue text (read): fits take 70 to 90 % of the effective interference; the outer raceway is about
(4 D + d) / 5 (the divisors from memory); CN with a k6 shaft and a warmer inner ring ends at about zero clearance.
"""

from __future__ import annotations

import pytest

from fe_shaft.rolling.clearance import clearance_group
from fe_shaft.rolling.fits import STEEL, Elastic, effective_interference, press_inner, press_outer, usual_raceways
from fe_shaft.rolling.inside import Inside
from fe_shaft.rolling.kinds import Kind
from fe_shaft.rolling.running import Rings, Seats, Warmth, running_clearance
from tests.evidence.published import agree

#: Size 6208: 40 x 80 mm, nine balls of 11.906 mm on 60 mm (from memory).
INSIDE = Inside(9, 11.906e-3, 60e-3)
BORE, OUTSIDE = 40e-3, 80e-3


@pytest.mark.parametrize("hole", [0.0, 20e-3, 30e-3])
def test_pressure_of_the_handbook(hole: float) -> None:
    seat, rim, w = BORE / 2, INSIDE.inner_raceway / 2, 10e-6
    ri = hole / 2
    want = STEEL.youngs * (w / 2) / (2 * seat**3) * (rim**2 - seat**2) * (seat**2 - ri**2) / (rim**2 - ri**2)
    agree(float(press_inner(w, BORE, INSIDE.inner_raceway, hole).pressure), want, rel=1e-12)


def test_between_70_and_90_percent_of_the_interference() -> None:
    """Solid and half-bored shafts, a thick housing; thin shafts and housings of aluminium take less."""
    solid, bored, thin = (
        float(press_inner(10e-6, BORE, INSIDE.inner_raceway, hole).loss) / 10e-6 for hole in (0.0, 20e-3, 30e-3)
    )
    assert 0.70 <= bored <= solid <= 0.90
    assert thin < 0.70
    thick = float(press_outer(10e-6, OUTSIDE, INSIDE.outer_raceway).loss) / 10e-6
    light = float(press_outer(10e-6, OUTSIDE, INSIDE.outer_raceway, 110e-3, Elastic(70e9, 0.33)).loss) / 10e-6
    assert thick <= 0.90
    assert light < 0.5


def test_the_usual_raceway_is_the_real_one() -> None:
    agree(float(usual_raceways(BORE, OUTSIDE)[1]), INSIDE.outer_raceway, rel=0.005)


def test_a_k6_shaft_and_a_warm_inner_ring_leave_about_nothing() -> None:
    """k6 of 40 mm is +2 to +18 um, the bore 0 to -12 um (ISO 286, ISO 492, from memory): 16 um in the mean."""
    rings = Rings(BORE, INSIDE.inner_raceway, INSIDE.outer_raceway, OUTSIDE)
    seats = Seats(shaft_interference=float(effective_interference(16e-6, BORE)))
    middle = clearance_group(Kind.DEEP_GROOVE_BALL, BORE).mean
    found = running_clearance(middle, rings, seats, Warmth(inner=5.0, elements=5.0))
    agree(float(found.mounted), 0.0, within=1e-6)
    agree(float(found.running), 0.0, within=5e-6)
