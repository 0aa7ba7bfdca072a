"""One stepped shaft of n segments on three springs with two loads off its axis: as our model and as plain numbers."""

from __future__ import annotations

import numpy as np

import fe_shaft as fs
from benchmarks.others import Problem

E, G, NU = 210e9, 81e9, 0.3
KAPPA = 6 * (1 + NU) / (7 + 6 * NU)  # Cowper (1966), solid round
STEEL = fs.Material(
    "bench_steel",
    youngs_modulus="210 GPa",
    shear_modulus="81 GPa",
    poisson_ratio=NU,
    density="7850 kg/m^3",
    source="bench",
)
PLACES = {"first_bearing": 0.1, "second_bearing": 0.5, "third_bearing": 0.9}
STIFFNESS = {"first_bearing": (1e8, 1e8), "second_bearing": (0.0, 2e8), "third_bearing": (0.0, 1e8)}


def diameters(n: int) -> list[float]:
    """Seven diameters in turn, 30 to 47 mm [m]."""
    return [round(0.030 + 0.0028 * (k % 7), 6) for k in range(n)]


def our_model(n: int, *, shear: str | float = "cowper") -> fs.Model:
    """A plain beam, as others know no shoulders, of 1 m in n segments; n a multiple of 10.

    It is longer where its segments would be thinner than 0.12 mm.
    """
    step = max(1000 / n, 0.12)
    long = step * n / 1000
    segments = [fs.Segment(length=f"{step!r} mm", diameter=f"{d!r} m") for d in diameters(n)]
    shaft = fs.Shaft("shaft", segments, material="bench_steel", shear=shear)
    bearings = [
        fs.Bearing(
            name,
            at=f"{x * long!r} m",
            holds=["radial", "axial"] if STIFFNESS[name][0] else ["radial"],
            stiffness={"radial": f"{STIFFNESS[name][1] / 1e6} N/um"}
            | ({"axial": f"{STIFFNESS[name][0] / 1e6} N/um"} if STIFFNESS[name][0] else {}),
        )
        for name, x in PLACES.items()
    ]
    loads = [
        fs.Force("first", at=f"{0.3 * long!r} m", up="1 kN", front="300 N", radius="50 mm", angle="3 o'clock"),
        fs.Force("second", at=f"{0.7 * long!r} m", up="-1 kN", front="800 N", radius="50 mm", angle="3 o'clock"),
    ]
    return fs.Model("benchmark", [shaft, *bearings, *loads], materials=[STEEL], shoulders="off")


def their_problem(n: int, *, shear: bool = True) -> Problem:
    """The same in plain numbers."""

    def node(x: float) -> int:
        return round(x * n)

    return Problem(
        x=np.linspace(0.0, 1.0, n + 1),
        diameter=np.array(diameters(n)),
        e=E,
        g=G,
        kappa=KAPPA if shear else np.inf,
        supports={node(PLACES[name]): (axial, radial, 0.0) for name, (axial, radial) in STIFFNESS.items()},
        spin_node=0,
        loads={
            node(0.3): (0.0, 1000.0, 300.0, -50.0, 0.0, 0.0),
            node(0.7): (0.0, -1000.0, 800.0, 50.0, 0.0, 0.0),
        },
    )
