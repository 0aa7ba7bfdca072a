"""Contours in the solution: the same as their segments, however finely a straight line is pointed out or an arc cut."""

import math
from itertools import pairwise

import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.analysis.shouldering import contour_of
from fe_shaft.fem.shoulders import shoulder_lumps
from fe_shaft.io.contour.chains import half_contour
from fe_shaft.io.contour.drawing import Drawing
from fe_shaft.io.contour.edges import Edge
from fe_shaft.io.contour.outline import CHORD, corners
from fe_shaft.io.contour.points import points


def solved(shaft, shoulders="on"):
    """Movement at the end of a clamped shaft under forces, couples and a torque there."""
    clamp = fs.Pin("clamp", at="0 mm", holds=["radial", "axial", "tilt", "spin"])
    end = f"{1e3 * float(shaft.ends[-1])!r} mm"
    couple = {"axial": "50 N m", "front": "40 N m"}
    tip = fs.Force("tip", at=end, up="-1 kN", axial="2 kN", couple=couple)
    results = fs.solve(fs.Model("contour", [shaft, clamp, tip], shoulders=shoulders))
    assert results.proof.worst < 1e-12
    return results["tip"].u[..., [0, 1, 3, 5]].ravel()


def shaft(contour):
    return fs.Shaft("shaft", contour=contour, material="42CrMo4")


def cone(cuts):
    """A cone from 30 to 40 mm between cylinders, with a bore that narrows, its line pointed out so many times."""
    share = [k / cuts for k in range(cuts + 1)]
    slope = [[f"{40 + 20 * s!r} mm", f"{30 + 10 * s!r} mm", f"{12 - 4 * s!r} mm"] for s in share]
    return [["0 mm", "30 mm", "12 mm"], *slope, ["100 mm", "40 mm", "8 mm"]]


CONE = [
    fs.Segment(length="40 mm", diameter="30 mm", bore="12 mm"),
    fs.Segment(length="20 mm", diameter="30 mm", end_diameter="40 mm", bore="12 mm", end_bore="8 mm"),
    fs.Segment(length="40 mm", diameter="40 mm", bore="8 mm"),
]


@pytest.mark.parametrize("shoulders", ["on", "off"])
@pytest.mark.parametrize("cuts", [1, 2, 19])
def test_a_cone_of_2_or_20_points_is_the_cone(cuts, shoulders):
    wanted = solved(fs.Shaft("shaft", CONE, material="42CrMo4"), shoulders)
    np.testing.assert_allclose(solved(shaft(cone(cuts)), shoulders), wanted, rtol=1e-11)


@pytest.mark.parametrize("shoulders", ["on", "off"])
def test_a_chamfer_and_a_fillet_are_those_of_the_segments(shoulders):
    contour = [
        ["0 mm", "40 mm"], ["58 mm", "40 mm"], ["60 mm", "36 mm"],
        {"x": "60 mm", "diameter": "30 mm", "fillet": "1.5 mm"}, ["119 mm", "30 mm"], ["120 mm", "28 mm"],
    ]  # fmt: skip
    segments = [
        fs.Segment("seat", length="58 mm", diameter="40 mm"),
        fs.Segment("rim", length="2 mm", diameter="40 mm", end_diameter="36 mm"),
        fs.Segment("journal", length="59 mm", diameter="30 mm", fillet="1.5 mm"),
        fs.Segment("chamfer", length="1 mm", diameter="30 mm", end_diameter="28 mm"),
    ]
    np.testing.assert_allclose(
        solved(shaft(contour), shoulders),
        solved(fs.Shaft("shaft", segments, material="42CrMo4"), shoulders),
        rtol=1e-12,
    )


def test_points_in_one_line_add_no_shoulder():
    """The rule sees one segment where points only mark places on a line."""
    plain, pointed = (fs.Model("m", [shaft(c)]).segment_arrays["shaft"] for c in (cone(1), cone(19)))
    assert len(pointed.length) == 21
    one, other = (shoulder_lumps(contour_of(arrays)) for arrays in (plain, pointed))
    for name in ("bending", "torsion", "axial", "shear"):
        assert getattr(other, name).sum() == pytest.approx(getattr(one, name).sum(), rel=1e-10)
        assert np.count_nonzero(getattr(other, name)) <= np.count_nonzero(getattr(one, name))


# ---- arcs


def arc(start, end, radius, side):
    """The shorter arc between two places, its centre below (1) or above (-1)."""
    (x, y), (x_end, y_end) = start, end
    half = math.hypot(x_end - x, y_end - y) / 2
    away = side * math.sqrt(radius**2 - half**2) / (2 * half)
    centre = ((x + x_end) / 2 + away * (y_end - y), (y + y_end) / 2 - away * (x_end - x))
    return Edge(start, end, "arc", centre, radius, side)


def straight(*places):
    return [Edge(one, other, "line") for one, other in pairwise(places)]


DRAWN = {
    "a neck and a crown, half of the shaft": [
        *straight((0.0, 20.0), (40.0, 20.0)),
        arc((40.0, 20.0), (80.0, 20.0), 36.0, -1),
        *straight((80.0, 20.0), (100.0, 20.0)),
        arc((100.0, 20.0), (140.0, 20.0), 36.0, 1),
        *straight((140.0, 20.0), (160.0, 20.0)),
    ],
    "a long slope between two cylinders": [
        *straight((0.0, 15.0), (40.0, 15.0)),
        arc((40.0, 15.0), (80.0, 27.0), 75.0, -1),
        *straight((80.0, 27.0), (120.0, 27.0)),
    ],
    "fillets and a rounded rim, all as chords": [
        *straight((0.0, 20.0), (60.0, 20.0), (60.0, 18.0)),
        arc((60.0, 18.0), (63.0, 15.0), 3.0, -1),
        *straight((63.0, 15.0), (98.5, 15.0)),
        arc((98.5, 15.0), (100.0, 16.5), 1.5, -1),
        arc((100.0, 16.5), (103.0, 19.5), 3.0, 1),
        *straight((103.0, 19.5), (140.0, 19.5)),
    ],
    "three small grooves": [
        *straight((0.0, 15.0), (10.0, 15.0)),
        *(
            edge
            for x in (10.0, 40.0, 70.0)
            for edge in (arc((x, 15.0), (x + 2.0, 15.0), 1.01, -1), *straight((x + 2.0, 15.0), (x + 30.0, 15.0)))
        ),
    ],
    "a round groove": [
        *straight((0.0, 20.0), (60.0, 20.0)),
        arc((60.0, 20.0), (70.0, 20.0), 5.0001, -1),
        *straight((70.0, 20.0), (120.0, 20.0)),
    ],
}


@pytest.mark.parametrize("name", DRAWN)
def test_halving_the_chords_changes_nothing(name, capsys):
    """Deflection, slope, twist and extension change by less than 1e-4 with shoulders, by less than 2e-5 without."""
    drawn = Drawing(DRAWN[name], "mm", 1e-3)
    outer = half_contour(drawn, ValueError).outer
    fine, finer = (shaft(points(corners(outer, chord), [], "mm")) for chord in (CHORD, CHORD / 2))
    for shoulders, least in (("on", 1e-4), ("off", 2e-5)):
        change = np.abs(solved(finer, shoulders) / solved(fine, shoulders) - 1).max()
        with capsys.disabled():
            print(f"\n{name}, shoulders {shoulders}: {len(fine.segments)} segments, finer changes {change:.1e}", end="")
        assert change < least
