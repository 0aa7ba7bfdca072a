"""R. G. Budynas & J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., McGraw-Hill 2011: beams and twist.

Table A-9 (deflection of beams; form of case 6 seen on p. 384) and eq. (7-20), p. 382 (twist of a stepped shaft). What
is from memory is marked beside its check. Tolerance 1e-9; figures of beams.toml half a unit of their ninth digit.
"""

from __future__ import annotations

import math

import fe_shaft as fs
from tests.evidence.plane import E, Plane, both_planes, pin, rod, roller, second_moment
from tests.evidence.published import CASES, NINE_DIGITS, agree, text


@both_planes
def test_cf01_two_supports_load_anywhere(plane: Plane) -> None:
    """Table A-9-6; slopes: Roark Table 8.1, form seen on a web page."""
    case = CASES["CF01_ss_offcentre"]
    d, length, a, p = (case.given(key) for key in ("d", "L", "a", "P"))
    b, ei = length - a, E * second_moment(d)
    agree(E, case.given("E"), rel=0.0)
    agree(second_moment(d), case.given("I"), rel=NINE_DIGITS)
    bent = plane.solve([rod(length, d)], pin("A", 0), roller("B", length), plane.force(a, p))
    agree(bent.y(a), p * a**2 * b**2 / (3 * ei * length))
    agree(bent.slope(0), p * b * (length**2 - b**2) / (6 * ei * length))
    agree(bent.slope(length), -p * a * (length**2 - a**2) / (6 * ei * length))
    agree(bent.moment(a), p * a * b / length)
    for got, key in {bent.y(a): "y_load", bent.slope(0): "theta_A", bent.slope(length): "theta_B"}.items():
        agree(got, case.printed(key), rel=NINE_DIGITS)
    agree(-bent.reaction("A"), case.printed("R_A"))
    agree(-bent.reaction("B"), case.printed("R_B"))
    # Largest in the longer part, at sqrt((L^2 - a^2) / 3) from its support: from memory. The shaft is level there.
    x = length - math.sqrt((length**2 - a**2) / 3)
    agree(x, case.printed("x_max_from_A"), rel=NINE_DIGITS)
    agree(bent.y(x), p * a * (length**2 - a**2) ** 1.5 / (9 * math.sqrt(3) * ei * length))
    agree(bent.y(x), case.printed("y_max"), rel=NINE_DIGITS)
    agree(bent.slope(x), 0.0, within=1e-12)


def test_cf24_twist_of_a_stepped_and_bored_shaft() -> None:
    """Eq. (7-20), p. 382: theta = sum of T l / (G J)."""
    case = CASES["CF24_stepped_torsion"]
    rows = case.inputs["sections_l_D_d"].removesuffix(" m").split("],[")
    sections = [tuple(float(part) for part in row.strip("[]").split(",")) for row in rows]
    material = fs.Material("given", shear_modulus=text(case.given("G"), "Pa"), poisson_ratio=0.3)
    shaft = fs.Shaft("shaft", [rod(*section) for section in sections], material="given")
    held = fs.Pin("held", at="0 m", holds=["radial", "axial", "tilt", "spin"])
    load = fs.Force("torque", at="shaft.right", couple={"axial": text(case.given("T"), "N m")})
    model = fs.Model("stepped shaft", [shaft, held, load], materials=[material], shoulders="off")
    twist = fs.solve(model).case()["torque"].twist
    polar = [math.pi / 32 * (outer**4 - bore**4) for _, outer, bore in sections]
    terms = [length / j for (length, _, _), j in zip(sections, polar, strict=True)]
    agree(twist, case.given("T") / case.given("G") * sum(terms))
    agree(twist, case.printed("theta"), rel=NINE_DIGITS)
    agree(twist, case.printed("theta_deg"), rel=NINE_DIGITS)
