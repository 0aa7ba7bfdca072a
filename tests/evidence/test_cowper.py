"""G. R. Cowper, The Shear Coefficient in Timoshenko's Beam Theory, J. Appl. Mech. 33 (1966) 335.

circle 6 (1 + nu) / (7 + 6 nu); hollow circle 6 (1 + nu)(1 + m^2)^2 / ((7 + 6 nu)(1 + m^2)^2 + (20 + 12 nu) m^2),
m = bore / diameter; thin tube 2 (1 + nu) / (4 + 3 nu): formulas from memory; case CF25 is that of beams.toml.
It is fe_shaft's default. Tolerances: 1e-9 against the formulas, half a unit of the last of three printed digits.
"""

from __future__ import annotations

import pytest

from tests.evidence.published import CASES, agree
from tests.evidence.shear_coefficient import D, half_unit, used

CASE = CASES["CF25_kappa_cowper"]
NU = CASE.given("nu")


@pytest.mark.parametrize("nu", [0.0, 0.21, NU, 0.5])
@pytest.mark.parametrize("conical", [False, True], ids=["cylinder", "written_as_a_cone"])
def test_solid(nu: float, conical: bool) -> None:
    agree(used(nu, conical=conical), 6 * (1 + nu) / (7 + 6 * nu))


@pytest.mark.parametrize("nu", [0.0, NU])
@pytest.mark.parametrize("m", [0.1, 0.5, 0.9, 0.99])
def test_hollow(nu: float, m: float) -> None:
    s = (1 + m**2) ** 2
    agree(used(nu, m * D), 6 * (1 + nu) * s / ((7 + 6 * nu) * s + (20 + 12 * nu) * m**2))


def test_cf25_printed_digits() -> None:
    solid, tube = CASE.printed("solid"), CASE.printed("thin_tube")
    agree(used(NU), solid, within=half_unit(solid, 3))
    agree(used(NU, 0.5 * D), 0.6202, within=half_unit(0.6202, 4))  # note of CF25, computed there from the formula
    # A wall of a thousandth of the diameter; the limit m -> 1 is approached as (1 - m)^2.
    agree(used(NU, 0.998 * D), 2 * (1 + NU) / (4 + 3 * NU), rel=1e-5)
    agree(used(NU, 0.998 * D), tube, within=half_unit(tube, 3))


def test_cf25_rectangle_as_a_user_coefficient() -> None:
    """Shafts are round; who wants the rectangle's 10 (1 + nu) / (12 + 11 nu) writes it as his own coefficient."""
    rectangle = CASE.printed("rectangle")
    agree(used(NU, shear=rectangle), rectangle)
    agree(10 * (1 + NU) / (12 + 11 * NU), rectangle, within=half_unit(rectangle, 3))
