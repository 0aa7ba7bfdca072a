"""PyNiteFEA (D. C. Brinker, open source, version 2 or later), a general-purpose library for frames in three dimensions.

200 random shafts in space against it: three to six solid or hollow segments, two to four supports (rigid, moved, or
springs of their own in both planes, with or without tilt springs), loads at a radius and an angle, couples, loads
spread over a segment. PyNite's members are slender (no shear), so shear = "none" here. It gets one member per segment,
or more where a part stands on one; loads beside the axis are handed to it as force and couple at the axis, worked out
here by the vector product.

How exact is PyNite itself? It assembles one stiffness matrix and solves it once, so it loses digits with the matrix's
condition number, which for a bar of n members grows like n^4 (short members are stiff against moving their ends across
as n^3, and the whole bar stays soft). On a straight bar with a known answer and 1 to 64 members the first test measures
some 1e-16 n^4. The random shafts are mild (L/D 0.5 to 3, neighbouring diameters within 1.6, at most 15 members, springs
of the order of the shaft's own stiffness). Solved by PyNite once more with every member halved, where the exact answer
is the same, its own answer moves by up to 1.3e-9 (second test; median 2e-12); half the members have 2^4 times less of
it, so what PyNite says of a shaft as drawn is good to some 1e-10. Hence both programs have to agree within 1e-9 of the
largest movement (turns: of the largest turn) and reaction, a margin of ten for other processors. Found: movements 5e-11
(median 2e-13), reactions 3e-10, worst on the shafts on which PyNite disagrees most with itself.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

import numpy as np
import pytest
from numpy.typing import NDArray
from Pynite import FEModel3D

import fe_shaft as fs
from tests.evidence.mild_shafts import Drawn, E, G, Load, Support, draw
from tests.evidence.published import text

Array = NDArray[np.float64]
SHAFTS = 200
CLOSE = 1e-9
MOVES = ("DX", "DY", "DZ", "RX", "RY", "RZ")
FORCES = ("FX", "FY", "FZ", "MX", "MY", "MZ")


# ---- the same in both programs


def by_fe_shaft(drawn: Drawn) -> Any:
    rows = zip(drawn.length, drawn.d, drawn.bore, strict=True)
    segments = [
        fs.Segment(length=text(length, "m"), diameter=text(d, "m"), **({"bore": text(bore, "m")} if bore else {}))
        for length, d, bore in rows
    ]
    material = fs.Material("given", youngs_modulus=text(E, "Pa"), shear_modulus=text(G, "Pa"))
    shaft = fs.Shaft("shaft", segments, material="given", shear="none")
    parts = [*(_fs_support(each) for each in drawn.supports), *(_fs_load(each) for each in drawn.loads)]
    return fs.solve(fs.Model("random shaft", [shaft, *parts], materials=[material], shoulders="off"))


def _fs_support(support: Support) -> fs.Pin | fs.Bearing:
    words = {"axial": support.k[0], "radial": support.k[1], "spin": support.k[3], "tilt": support.k[4]}
    at = text(support.x, "m")
    if math.isinf(max(support.k)):
        moved = {"offset": text(support.moved, "m"), "offset_angle": text(support.angle, "deg")}
        holds = [word for word, k in words.items() if k]
        return fs.Pin(support.name, at=at, holds=holds, **(moved if support.moved else {}))
    axial, up, front, _, tilt_up, tilt_front = support.k
    across = {"axial": axial, "up": up, "front": front}
    about = {"tilt_up": tilt_up, "tilt_front": tilt_front}
    stiffness = {key: text(k, "N/m") for key, k in across.items() if k}
    stiffness |= {key: text(k, "N m/rad") for key, k in about.items() if k}
    holds = ["radial", *(["axial"] * (support.k[0] > 0))]
    return fs.Bearing(support.name, at=at, holds=holds, stiffness=stiffness | {"range_check": "off"})


def _fs_load(load: Load) -> fs.Force:
    axial, up, front = (text(f, "N") for f in load.force)
    about_x, about_y, about_z = (text(m, "N m") for m in load.couple)
    beside = {"radius": text(load.radius, "m"), "angle": text(load.angle, "deg")} if load.radius else {}
    spread = {"spread": text(load.width, "m")} if load.width else {}
    couple = {"couple": {"axial": about_x, "up": about_y, "front": about_z}} if any(load.couple) else {}
    return fs.Force(load.name, at=text(load.x, "m"), axial=axial, up=up, front=front, **couple, **beside, **spread)


@dataclass(frozen=True)
class Framed:
    """PyNite's solution: nodes at x, their displacements, and the reactions by support."""

    x: Array
    u: Array
    reactions: dict[str, Array]


def frame(
    ends: Array, d: tuple[float, ...], bore: tuple[float, ...], stations: list[float], parts: int
) -> tuple[Any, Array]:
    """Nodes at all stations, members between them cut into equal parts, sections of the segments they lie in."""
    model = FEModel3D()
    model.add_material("steel", E, G, 0.3, 7850.0)
    for k, (outer, inner) in enumerate(zip(d, bore, strict=True)):
        inertia = math.pi / 64 * (outer**4 - inner**4)
        model.add_section(f"S{k}", math.pi / 4 * (outer**2 - inner**2), inertia, inertia, 2 * inertia)
    wanted = np.sort(np.array([*ends, *stations]))
    wanted = wanted[np.append(True, np.diff(wanted) > 1e-9)]
    x = np.interp(np.arange((len(wanted) - 1) * parts + 1) / parts, np.arange(len(wanted)), wanted)
    for k, place in enumerate(x.tolist()):
        model.add_node(f"N{k}", place, 0.0, 0.0)
    for k, middle in enumerate(((x[1:] + x[:-1]) / 2).tolist()):
        segment = int(np.searchsorted(ends, middle)) - 1
        model.add_member(f"M{k}", f"N{k}", f"N{k + 1}", "steel", f"S{segment}")
    return model, x


def by_pynite(drawn: Drawn, parts: int = 1) -> Framed:
    stations = [each.x for each in (*drawn.supports, *drawn.loads)]
    model, x = frame(drawn.ends, drawn.d, drawn.bore, stations, parts)
    near = {each.name: int(np.abs(x - each.x).argmin()) for each in (*drawn.supports, *drawn.loads)}
    rigid: dict[int, set[str]] = {}
    for support in drawn.supports:
        _hold(model, support, near[support.name], rigid)
    for node, dofs in rigid.items():
        model.def_support(f"N{node}", **{f"support_{dof}": True for dof in dofs})
    for load in drawn.loads:
        if load.width:
            under = np.flatnonzero(np.abs((x[1:] + x[:-1]) / 2 - load.x) < load.width / 2)
            for member in under.tolist():
                for key, size in zip(FORCES, load.force, strict=False):
                    model.add_member_dist_load(f"M{member}", key, size / load.width, size / load.width)
        else:
            for key, size in zip(FORCES, load.wrench.tolist(), strict=True):
                model.add_node_load(f"N{near[load.name]}", key, size)
    model.analyze_linear(check_stability=False, sparse=True)
    return _read(model, drawn, x, near)


def _hold(model: Any, support: Support, node: int, rigid: dict[int, set[str]]) -> None:
    for dof, k in zip(MOVES, support.k, strict=True):
        if math.isinf(k):
            rigid.setdefault(node, set()).add(dof)
        elif k:
            model.def_support_spring(f"N{node}", dof, k)
    if support.moved:
        a = math.radians(support.angle)
        model.def_node_disp(f"N{node}", "DY", support.moved * math.cos(a))
        model.def_node_disp(f"N{node}", "DZ", support.moved * math.sin(a))


def _read(model: Any, drawn: Drawn, x: Array, near: dict[str, int]) -> Framed:
    nodes = [model.nodes[f"N{k}"] for k in range(len(x))]
    u = np.array([[getattr(node, dof)["Combo 1"] for dof in MOVES] for node in nodes])
    reactions = {}
    for support in drawn.supports:
        node, own = near[support.name], np.zeros(6)
        for i, k in enumerate(support.k):
            # PyNite states the reactions of rigid directions; a spring's force is -k u.
            own[i] = getattr(nodes[node], f"Rxn{FORCES[i]}")["Combo 1"] if math.isinf(k) else -k * u[node, i]
        reactions[support.name] = own
    return Framed(x, u, reactions)


def apart(one: Array, two: Array) -> float:
    """Largest difference, moves and turns (forces and couples) each as a share of the largest of its kind."""
    share = 0.0
    for kind in (slice(0, 3), slice(3, 6)):
        share = max(share, float(np.abs(one[:, kind] - two[:, kind]).max() / np.abs(two[:, kind]).max()))
    return share


# ---- the checks


def test_accuracy_of_pynite_on_a_straight_bar() -> None:
    """Tip of a cantilever, P L^3 / 3 E I (from memory): its error stays below 1e-15 n^4, and it grows."""
    d, length, force = 0.05, 0.5, 1000.0
    exact = force * length**3 / (3 * E * math.pi / 64 * d**4)
    errors = {}
    for n in (1, 4, 16, 64):
        model, _ = frame(np.array([0.0, length]), (d,), (0.0,), [], n)
        model.def_support("N0", *[True] * 6)
        model.add_node_load(f"N{n}", "FY", force)
        model.analyze_linear(check_stability=False, sparse=True)
        errors[n] = abs(model.nodes[f"N{n}"].DY["Combo 1"] / exact - 1)
        assert errors[n] < 1e-15 * max(n, 2) ** 4
    assert errors[64] > 10 * errors[1]


@pytest.mark.parametrize("seed", range(0, SHAFTS, 4))
def test_accuracy_of_pynite_on_these_shafts(seed: int) -> None:
    """Every member halved: the exact answer stays, PyNite's moves by its own rounding only."""
    drawn = draw(seed)
    whole, halved = by_pynite(drawn), by_pynite(drawn, 2)
    assert apart(halved.u[::2], whole.u) < 16 * CLOSE / 3


@pytest.mark.parametrize("seed", range(SHAFTS))
def test_random_shaft(seed: int) -> None:
    drawn = draw(seed)
    results, framed = by_fe_shaft(drawn), by_pynite(drawn)
    u, _ = results.lines["shaft"].at(framed.x)
    assert apart(u[0], framed.u) < CLOSE
    case = results.case()
    ours = np.array([case[support.name].wrench for support in drawn.supports])
    theirs = np.array([framed.reactions[support.name] for support in drawn.supports])
    share = np.abs(ours - theirs).max(axis=0) / np.abs(theirs[:, :3]).max()
    assert share[:3].max() < CLOSE
    assert share[3:].max() / drawn.ends[-1] < CLOSE
    # What the parts say of themselves is what the line says at their places.
    for part in (*drawn.supports, *drawn.loads):
        there = framed.u[np.abs(framed.x - part.x).argmin()]
        assert np.abs(case[part.name].u - there)[:3].max() < CLOSE * np.abs(framed.u[:, :3]).max()


def test_the_drawn_shafts_are_of_all_kinds() -> None:
    """Solid and hollow, pins and springs, moved pins, tilt held, spread loads, statically determinate and not."""
    drawn = [draw(seed) for seed in range(SHAFTS)]
    supports = [support for shaft in drawn for support in shaft.supports if support.name != "driver"]
    assert 50 < sum(any(shaft.bore) for shaft in drawn) < 195
    assert min(sum(math.isinf(s.k[1]) for s in supports), sum(0 < s.k[1] < math.inf for s in supports)) > 100
    assert sum(s.moved > 0 for s in supports) > 30
    assert sum(math.isinf(s.k[4]) for s in supports) > 10
    assert sum(load.width > 0 for shaft in drawn for load in shaft.loads) > 50
    assert {len(shaft.supports) - 1 for shaft in drawn} == {2, 3, 4}
