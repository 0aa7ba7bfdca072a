"""The shear coefficient that a solution really used, read off a very short cantilever."""

from __future__ import annotations

import math

import fe_shaft as fs
from tests.evidence.plane import Plane, area, clamp, rod
from tests.evidence.published import text

L, D, P, E = 0.02, 0.1, 1e5, 200e9


def used(nu: float, bore: float = 0.0, shear: float | str | None = None, conical: bool = False) -> float:
    """kappa = P L / (G A y_shear), y_shear being what the tip moves more than without shear.

    L = D / 5, so that shear makes most of the movement and the difference keeps its digits.
    """
    material = fs.Material("given", youngs_modulus=text(E, "Pa"), poisson_ratio=nu)
    plane = Plane(20.0)
    wide = {"end_diameter": text(D, "m")} if conical else {}
    moved = []
    for choice in ({} if shear is None else {"shear": shear}), {"shear": "none"}:
        shaft = fs.Shaft("shaft", [rod(L, D, bore, **wide)], material="given", **choice)
        model = fs.Model("short", [shaft, clamp("wall", 0), plane.force(L, P)], materials=[material])
        moved.append(fs.solve(model).case()["load"].deflection)
    return P * L / (E / (2 * (1 + nu)) * area(D, bore) * (moved[0] - moved[1]))


def half_unit(number: float, digits: int) -> float:
    """Half a unit of the last of so many significant digits."""
    return 0.5 * 10.0 ** (math.floor(math.log10(abs(number))) + 1 - digits)
