"""Effective diameters of keyways and splines against their cross-sections, solved as plane problems with scikit-fem.

Sizes: keyways of DIN 6885-1, splines of ISO 14 (both from memory). A keyed section is stiffer or softer in bending as
it turns; the mean over a turn counts. One diameter stands for bending and torsion, so it cannot meet both: it is held
between them, or within 2 % of the diameter.
"""

from __future__ import annotations

import numpy as np
import pytest

import fe_shaft as fs
from tests.evidence.plane_section import arc, keyed, section, splined

KEYWAYS = [(20, 6, 3.5, 1), (30, 8, 4, 1), (38, 10, 5, 1), (50, 14, 5.5, 1), (80, 22, 9, 1), (38, 10, 5, 2)]
#: Diameter, width, depth, number of keyways, bore: more wall than a tenth of the diameter left, then less.
BORED = [(38, 10, 5, 1, 15), (38, 10, 5, 1, 20), (65, 18, 7, 1, 30), (65, 18, 7, 2, 20), (80, 22, 9, 1, 44)]
THIN = [(38, 10, 5, 1, 24), (38, 10, 5, 1, 26), (80, 22, 9, 1, 56)]
SPLINES = [(23, 26, 6, 6), (36, 40, 7, 8), (62, 68, 12, 8), (36, 42, 7, 8)]


def as_diameter(torsion, mean):
    """Diameters of the circles with this torsion constant, and with this second moment of area."""
    return (32 * torsion / np.pi) ** 0.25, (64 * mean / np.pi) ** 0.25


def test_a_circle_is_solved():
    found = section(arc(30, 0, 2 * np.pi, 721)[:-1], 0.5)
    assert as_diameter(found.torsion, found.mean) == pytest.approx((30, 30), rel=2e-5)


@pytest.mark.parametrize(("d", "width", "depth", "count"), KEYWAYS)
def test_keyways(d, width, depth, count):
    found = section(keyed(d, width, depth, count), d / 60)
    torsion, bending = as_diameter(found.torsion, found.mean)
    counted = fs.Keyway(width=f"{width} mm", depth=f"{depth} mm", count=count).counted(d / 1e3)
    print(f"d {d}: solved {torsion:.2f} in torsion, {bending:.2f} in bending; counts as {1e3 * counted.effective:.2f}")
    assert 1e3 * counted.effective == pytest.approx(torsion, rel=0.015)
    assert 1e3 * counted.full < torsion < bending < d  # the band holds both


def bored(d, width, depth, count, bore):
    """Outer diameters by torsion and bending of a bored shaft with keyways, and what it counts as [mm]."""
    found = section(keyed(d, width, depth, count), d / 70, bore)
    torsion, bending = as_diameter(found.torsion + np.pi * bore**4 / 32, found.mean + np.pi * bore**4 / 64)
    counted = fs.Keyway(width=f"{width} mm", depth=f"{depth} mm", count=count).counted(d / 1e3)
    print(f"d {d} bore {bore}: {torsion:.2f} in torsion, {bending:.2f} in bending, as {1e3 * counted.effective:.2f}")
    return torsion, bending, counted


def test_a_ring_is_solved():
    found = section(arc(30, 0, 2 * np.pi, 721)[:-1], 0.5, 20)
    assert found.torsion == pytest.approx(np.pi * (30**4 - 20**4) / 32, rel=2e-3)


@pytest.mark.parametrize("sizes", BORED)
def test_keyways_of_bored_shafts(sizes):
    torsion, bending, counted = bored(*sizes)
    assert 1e3 * counted.effective == pytest.approx(torsion, rel=0.02)
    assert 1e3 * counted.full < torsion < bending < sizes[0]


@pytest.mark.parametrize("sizes", THIN)
def test_where_little_wall_is_left_the_shaft_is_softer_but_within_the_band(sizes):
    torsion, bending, counted = bored(*sizes)
    assert 1e3 * counted.full < torsion < 1e3 * counted.effective < bending


@pytest.mark.parametrize(("root", "tip", "width", "count"), SPLINES)
def test_splines(root, tip, width, count):
    found = section(splined(root, tip, width, count), tip / 60)
    torsion, bending = as_diameter(found.torsion, found.mean)
    counted = fs.Spline(root_diameter=f"{root} mm").counted(tip / 1e3)
    print(f"{root}/{tip}: solved {torsion:.2f} in torsion, {bending:.2f} in bending, as {1e3 * counted.effective:.2f}")
    assert 1e3 * counted.effective == pytest.approx(torsion, rel=0.01)
    assert root < torsion < bending < tip  # the band holds both
