"""R. L. Norton, Machine Design: An Integrated Approach, 4th ed., Prentice Hall, Example 10-3 (listing on a web page).

Twist of a stepped shaft under 146 lbf in; the listing prints two digits. The twist of the example is a sum over three
pieces; the printed polar moments are checked through the twist of each piece, theta = T l / (G J).
"""

from __future__ import annotations

import fe_shaft as fs
from tests.evidence.published import CASES, SI, agree, text

CASE = CASES["TB07_norton_10_3_twist"]
T, G = CASE.given("T"), CASE.given("G")


def inches(key: str) -> list[float]:
    return [float(part) * SI["in"] for part in CASE.inputs[key].removesuffix(" in").split(",")]


def test_tb07_twist() -> None:
    lengths, diameters = inches("l"), inches("d")
    names = ["AB", "BC", "CD"]
    segments = [
        fs.Segment(name, length=text(length, "m"), diameter=text(d, "m"))
        for name, length, d in zip(names, lengths, diameters, strict=True)
    ]
    steel = fs.Material("steel_of_the_example", shear_modulus=text(G, "Pa"), poisson_ratio=0.3)
    held = fs.Pin("held", at="0 m", holds=["radial", "axial", "tilt", "spin"])
    load = fs.Force("torque", at="shaft.right", couple={"axial": text(T, "N m")})
    shaft = fs.Shaft("shaft", segments, material="steel_of_the_example")
    results = fs.solve(fs.Model("stepped shaft", [shaft, held, load], materials=[steel], shoulders="off"))
    agree(results.case()["torque"].twist, CASE.printed("theta"), within=0.005 * SI["deg"])
    before = 0.0
    for name, length in zip(names, lengths, strict=True):
        twist = results.case()["shaft"].at(f"{name}.right").twist
        printed = CASE.printed(f"J_{name}")
        agree(T * length / (G * (twist - before)), printed, within=0.0005 * SI["in4"])
        before = twist
