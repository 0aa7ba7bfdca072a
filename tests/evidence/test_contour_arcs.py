"""Fillets drawn as arcs: cut to chords, and told as fillets, against three-dimensional elasticity.

Source: the 20 shoulders with fillets (solid and bored, D/d 1.1 to 3, r/d .05 and .1) of `solid_steps.csv`, own
computations for this project with axisymmetric finite elements (see `test_solid_steps`). Extra length dL/d, as there.
It says why a reader of drawings tells fillets as such: as chords they are as good in bending and in tension, but in
torsion a wedge of cones carries less than the rule's cones believe.
"""

import json
import math

import numpy as np

import fe_shaft as fs
from fe_shaft.fem.shoulders.contour import Contour
from fe_shaft.fem.shoulders.lumps import shoulder_lumps
from fe_shaft.fem.shoulders.rule import SECTION_FACTORS, flexibility
from fe_shaft.io.contour.edges import Edge
from fe_shaft.io.contour.outline import corners, with_fillets
from fe_shaft.io.contour.points import points
from tests.evidence.test_solid_steps import table

MODES = ("dL_bend", "dL_tors", "dL_axial")
SAME = 1e-9


def drawn(row, size=1.0):
    """The half contour of a row: cylinder, arc that ends at the plane of the step, face, cylinder."""
    (length, thin, _), (more, thick, _) = json.loads(row["segs"])
    (r,) = json.loads(row["fil"])
    turn = math.acos(1 - min(1.0, (thick - thin) / 2 / r))
    foot, top = (length - r * math.sin(turn), thin / 2), (length, thin / 2 + r * (1 - math.cos(turn)))
    places = [(0.0, thin / 2), foot, top, (length, thick / 2), (length + more, thick / 2)]
    places = [(x * size, y * size) for x, y in places]
    a, b, c, d, e = places
    arc = Edge(b, c, "arc", (b[0], b[1] + r * size), r * size, -1)
    face = [Edge(c, d, "face")] if d[1] - c[1] > SAME * size else []
    return [Edge(a, b, "thin"), arc, *face, Edge(c if not face else d, e, "thick")]


def extra(run, row):
    """Extra length of a drawn shoulder in each mode (4,): all that it gives beyond two cylinders that meet."""
    (length, thin, bore), (more, thick, _) = json.loads(row["segs"])
    x, y, fillet = np.array(corners(run)).T
    wide = np.diff(x) > SAME
    first, last = np.flatnonzero(wide), np.flatnonzero(wide) + 1
    sizes = x[last] - x[first], 2 * y[first], bore, fillet[first], fillet[last]
    lumps = shoulder_lumps(Contour.of(*sizes, end_diameter=2 * y[last]))
    node, weight = np.polynomial.legendre.leggauss(12)
    diameter = 2 * (y[first] + (y[last] - y[first]) * (node[:, None] + 1) / 2)
    rate = flexibility(diameter[None], np.full_like(diameter, bore)[None], np.full_like(diameter, 0.3))
    beam = (rate * weight[:, None] / 2).sum(axis=1) @ sizes[0]
    one, two = flexibility(np.array([[[thin, thick]]]), np.full((1, 1, 2), bore), np.full((1, 2), 0.3))[:, 0].T
    given = np.array([of.sum() for of in lumps[2:]]) / SECTION_FACTORS
    return (beam + given - length * one - more * two) / one


def shoulders():
    return [row for row in table("solid_steps.csv") if row["kind"] == "shoulder" and any(json.loads(row["fil"]))]


def test_fillets_as_fillets_and_as_chords_against_solids(capsys):
    rows = shoulders()
    assert len(rows) == 20
    truth = np.array([[float(row[mode]) for mode in MODES] for row in rows])
    told = [[extra(run, row)[:3] for row in rows for run in [make(drawn(row))]] for make in (list, marked)]
    as_chords, as_fillets = (np.abs(np.array(found) - truth) for found in told)
    with capsys.disabled():
        print("\nerror in d, mean and worst, of bending, torsion, axial (20 solids)")
        for name, found in (("as chords ", as_chords), ("as fillets", as_fillets)):
            print(f"{name}  {found.mean(axis=0).round(4)}  {found.max(axis=0).round(4)}")
    assert (as_fillets.mean(axis=0) < (0.0021, 0.0015, 0.0013)).all()
    assert (as_fillets.max(axis=0) < (0.0055, 0.0032, 0.0050)).all()
    assert (as_chords.mean(axis=0) < (0.0022, 0.0110, 0.0026)).all()
    assert (as_chords.max(axis=0) < (0.0068, 0.0190, 0.0060)).all()


def marked(run):
    out = with_fillets(run, SAME)
    assert [edge.fillet for edge in out][1]
    return out


def test_both_ways_in_the_results_of_a_shaft(capsys):
    """Against the whole movement both ways agree within .12 % (slope, deflection, extension) and .6 % (twist).

    Against what the shoulder adds the difference is within 5 % in bending and extension, and in torsion 6, 16 and 41 %
    at r/d = .02, .05 and .1, where the shoulder adds little (1 to 2 % of the twist).
    """

    def moved(contour, on):
        clamp = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
        tip = fs.Force("tip", at=contour[-1][0], up="-1 kN", axial="2 kN", couple={"axial": "50 N m"})
        shaft = fs.Shaft("shaft", contour=contour, material="42CrMo4")
        return fs.solve(fs.Model("m", [shaft, clamp, tip], shoulders=on))["tip"].u[..., [0, 1, 5, 3]].ravel()

    words = ("extension", "deflection", "slope", "twist")
    for r, torsion in ((0.6, 0.06), (1.5, 0.165), (3.0, 0.41)):
        row = {"segs": "[[70, 30, 0], [60, 40, 0]]", "fil": f"[{r}]"}
        run = drawn(row)
        run = [edge.reversed for edge in reversed(run)]  # clamped at the thick end: x from there
        run = [edge._replace(**_mirrored(edge)) for edge in run]
        chords, fillet = (points(corners(way), [], "mm") for way in (run, marked_behind(run)))
        one, other, plain = moved(chords, "on"), moved(fillet, "on"), moved(fillet, "off")
        share, whole = (one - other) / (other - plain), np.abs(one / other - 1)
        with capsys.disabled():
            print(
                f"\nr/d = {r / 30:.2f}:", *(f"{w} {s:+.1%} of the shoulder," for w, s in zip(words, share, strict=True))
            )
        assert (np.abs(share) < (0.05, 0.05, 0.05, torsion)).all()
        assert (whole < (0.0012, 0.0013, 0.0012, 0.006)).all()


def marked_behind(run):
    out = with_fillets(run, SAME)
    assert sum(edge.fillet for edge in out) == 1
    return out


def _mirrored(edge):
    return {
        key: None if place is None else (130 - place[0], place[1])
        for key, place in (("start", edge.start), ("end", edge.end), ("centre", edge.centre))
    }
