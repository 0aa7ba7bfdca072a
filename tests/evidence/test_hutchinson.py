"""J. R. Hutchinson, Shear Coefficients for Timoshenko Beam Theory, J. Appl. Mech. 68 (2001) 87.

circle 6 (1 + nu)^2 / (7 + 12 nu + 4 nu^2), confirmed by N. G. Stephen's discussion, J. Appl. Mech. 68 (2001) 959; the
hollow circle's formula is from memory. fe_shaft uses Cowper's coefficient unless the user gives his own, so these are
given as the user's own, and the test is that exactly they are used. Also CF27: other values in use, among them the
rectangle's 2/3 of Timoshenko (1921), which Hutchinson's introduction states; the rest of CF27 is from memory.

Tolerance 1e-9; figures of beams.toml half a unit of their ninth digit.
"""

from __future__ import annotations

import pytest

from tests.evidence.published import CASES, NINE_DIGITS, agree
from tests.evidence.shear_coefficient import D, used

CASE, OTHERS = CASES["CF26_kappa_hutchinson"], CASES["CF27_kappa_others"]
NU = 0.3  # at which CF26 states its figures (its inputs)


def solid(nu: float) -> float:
    return 6 * (1 + nu) ** 2 / (7 + 12 * nu + 4 * nu**2)


def hollow(nu: float, m: float) -> float:
    """From memory; a = 1, b = m."""
    b2, b4 = m**2, m**4
    below = 7 + 34 * b2 + 7 * b4 + nu * (12 + 48 * b2 + 12 * b4) + nu**2 * (4 + 16 * b2 + 4 * b4)
    return 6 * (1 + b2) ** 2 * (1 + nu) ** 2 / below


def test_cf26_solid() -> None:
    agree(NU, CASE.given("nu"), rel=0.0)
    agree(used(NU, shear=solid(NU)), CASE.printed("solid"), rel=NINE_DIGITS)
    # The default is Cowper's: lower by 4 % at this Poisson's ratio.
    assert used(NU) < 0.97 * CASE.printed("solid")


@pytest.mark.parametrize("m", [0.2, 0.5, 0.9])
def test_cf26_hollow(m: float) -> None:
    agree(used(NU, m * D, shear=hollow(NU, m)), hollow(NU, m))
    agree(hollow(NU, 0.0), solid(NU))


def test_cf26_hollow_figures() -> None:
    agree(used(NU, 0.5 * D, shear=hollow(NU, 0.5)), 0.6573, within=0.00005)  # note of CF26, from memory
    # m = 0.999: the limit m -> 1 is approached as (1 - m)^2, here 1e-6.
    agree(used(NU, 0.999 * D, shear=hollow(NU, 0.999)), CASE.printed("thin_tube"), rel=2e-6)


@pytest.mark.parametrize("key", OTHERS.expected)
def test_cf27_other_coefficients(key: str) -> None:
    """Whatever the user gives is used, on solid and hollow shafts (values from memory)."""
    kappa = OTHERS.printed(key)
    agree(used(0.3, shear=kappa), kappa)
    agree(used(0.3, 0.6 * D, shear=kappa), kappa)
    agree(used(0.3, 0.6 * D, shear=2 / 3), 2 / 3)
