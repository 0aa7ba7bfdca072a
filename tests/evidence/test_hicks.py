"""T. G. Hicks, Civil Engineering Formulas, McGraw-Hill: continuous beams, Table 2.1, p. 50.

Even load on all spans, all spans equal; the reactions are the sums of the printed shears on both sides of a support.
Exact fractions, so 1e-9; beams.toml writes them with nine digits. Slender theory, shear = "none".
"""

from __future__ import annotations

import pytest

from tests.evidence.plane import Plane, both_planes, pin, rod, roller
from tests.evidence.published import CASES, NINE_DIGITS, agree

CASE = CASES["CF11_continuous_4to7_supports"]
W, SPAN = CASE.given("w"), CASE.given("L_each")
#: Fractions of w L by number of supports, up to the middle of the beam.
EXACT = {
    4: (4 / 10, 11 / 10),
    5: (11 / 28, 32 / 28, 26 / 28),
    6: (15 / 38, 43 / 38, 37 / 38),
    7: (41 / 104, 118 / 104, 100 / 104, 106 / 104),
}


@both_planes
@pytest.mark.parametrize("n", EXACT)
def test_cf11_reactions(n: int, plane: Plane) -> None:
    length = (n - 1) * SPAN
    supports = [pin("R1", 0), *(roller(f"R{k + 1}", k * SPAN) for k in range(1, n))]
    bent = plane.solve([rod(length, 0.05)], *supports, plane.even(0, length, W))
    for k, share in enumerate(EXACT[n], 1):
        agree(-bent.reaction(f"R{k}"), share * W * SPAN)
        agree(-bent.reaction(f"R{k}"), CASE.printed(f"R{k}_of_{n}_supports") * W * SPAN, rel=NINE_DIGITS)
        agree(bent.reaction(f"R{n + 1 - k}"), bent.reaction(f"R{k}"))
