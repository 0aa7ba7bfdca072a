"""The same shaft in two general-purpose frame libraries: one beam element a segment, springs for bearings.

PyNiteFEA (Euler-Bernoulli beams) and OpenSeesPy (Timoshenko beams) are general-purpose open-source libraries; both are
used through their ordinary interfaces. Units: N, m.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]


@dataclass(frozen=True)
class Problem:
    """A straight chain: nodes, sections, springs and loads as plain numbers."""

    x: Array  # (n + 1,)
    diameter: Array  # (n,)
    e: float
    g: float
    kappa: float  # infinite: no shear deformation
    supports: dict[int, tuple[float, float, float]]  # node: axial, radial, tilt stiffness
    spin_node: int
    loads: dict[int, tuple[float, ...]]  # node: six components


def sections(problem: Problem) -> tuple[Array, Array]:
    """Area and second moment of each segment."""
    area = np.pi / 4 * problem.diameter**2
    return area, area * problem.diameter**2 / 16


def run_opensees(problem: Problem) -> Array:
    """Displacements (n + 1, 6) by OpenSeesPy; Timoshenko beams, banded solver."""
    import openseespy.opensees as ops

    ops.wipe()
    ops.model("basic", "-ndm", 3, "-ndf", 6)
    for k, x in enumerate(problem.x.tolist()):
        ops.node(k, x, 0.0, 0.0)
    ops.geomTransf("Linear", 1, 0.0, 0.0, 1.0)
    area, inertia = sections(problem)
    shear = problem.kappa * area
    rows = zip(area.tolist(), inertia.tolist(), shear.tolist(), strict=True)
    for k, (a, i, s) in enumerate(rows):
        ops.element("ElasticTimoshenkoBeam", k, k, k + 1, problem.e, problem.g, a, 2 * i, i, i, s, s, 1)
    _opensees_springs(ops, problem)
    ops.timeSeries("Linear", 1)
    ops.pattern("Plain", 1, 1)
    for node, load in problem.loads.items():
        ops.load(node, *load)
    ops.constraints("Plain")
    ops.numberer("Plain")
    ops.system("BandGeneral")
    ops.algorithm("Linear")
    ops.integrator("LoadControl", 1.0)
    ops.analysis("Static", "-noWarnings")
    ops.analyze(1)
    return np.array([ops.nodeDisp(k) for k in range(len(problem.x))])


def _opensees_springs(ops: object, problem: Problem) -> None:
    n, ground = len(problem.x), len(problem.x)
    for number, (node, (axial, radial, tilt)) in enumerate(problem.supports.items()):
        ops.node(ground + number, float(problem.x[node]), 0.0, 0.0)  # type: ignore[attr-defined]
        ops.fix(ground + number, *[1] * 6)  # type: ignore[attr-defined]
        tags, dofs = [], []
        for dof, k in zip((1, 2, 3, 5, 6), (axial, radial, radial, tilt, tilt), strict=True):
            if k:
                tag = 10 * number + dof
                ops.uniaxialMaterial("Elastic", tag, k)  # type: ignore[attr-defined]
                tags.append(tag)
                dofs.append(dof)
        ops.element("zeroLength", n + number, ground + number, node, "-mat", *tags, "-dir", *dofs)  # type: ignore[attr-defined]
    ops.fix(problem.spin_node, 0, 0, 0, 1, 0, 0)  # type: ignore[attr-defined]


def run_pynite(problem: Problem) -> Array:
    """Displacements (n + 1, 6) by PyNiteFEA; Euler-Bernoulli beams, so `kappa` must be infinite."""
    from Pynite import FEModel3D

    model = FEModel3D()
    model.add_material("steel", problem.e, problem.g, 0.3, 7850.0)
    for k, x in enumerate(problem.x.tolist()):
        model.add_node(f"N{k}", x, 0.0, 0.0)
    area, inertia = sections(problem)
    seen: dict[float, str] = {}
    for k, diameter in enumerate(problem.diameter.tolist()):
        if diameter not in seen:
            seen[diameter] = f"S{len(seen)}"
            model.add_section(
                seen[diameter], float(area[k]), float(inertia[k]), float(inertia[k]), float(2 * inertia[k])
            )
        model.add_member(f"M{k}", f"N{k}", f"N{k + 1}", "steel", seen[diameter])
    for node, (axial, radial, tilt) in problem.supports.items():
        for dof, k in zip(("DX", "DY", "DZ", "RY", "RZ"), (axial, radial, radial, tilt, tilt), strict=True):
            if k:
                model.def_support_spring(f"N{node}", dof, k)
    model.def_support(f"N{problem.spin_node}", support_RX=True)
    for node, load in problem.loads.items():
        for direction, value in zip(("FX", "FY", "FZ", "MX", "MY", "MZ"), load, strict=True):
            if value:
                model.add_node_load(f"N{node}", direction, value)
    model.analyze_linear(check_stability=False, sparse=True)
    out = [(n.DX, n.DY, n.DZ, n.RX, n.RY, n.RZ) for n in model.nodes.values()]
    return np.array([[d["Combo 1"] for d in node] for node in out])
