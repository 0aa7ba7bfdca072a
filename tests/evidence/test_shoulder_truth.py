"""Steps of round bars computed again as solids with scikit-fem, against the rows the shoulder rule was fitted to.

solid_step_rows.csv (source in its head) holds some of them: sharp and filleted shoulders, collars, grooves, staircases
and steps of the bore, solid and hollow. The rule rests on numbers of one program; here other elements and meshes, with
an open finite element library, must find the same ones. Beside it stands what is known without either: uniform bars,
and the bracket of the shaft on a half-space.

Elements that fit together make a solid too stiff, never too soft, so a coarse mesh errs to the low side.
"""

from __future__ import annotations

import csv
from functools import cache
from pathlib import Path

import numpy as np
import pytest
from skfem import Functional

from tests.evidence.axisymmetric_solid import MODES, added_length, flexibility, meridian_basis
from tests.evidence.meridian import Bar, Fineness, Segment

#: A share of the added length itself, not of the bar's flexibility; the coarse meshes here reach 0.2 % nearly always.
TOLERANCE = 5e-3
#: Diameters of the weakest section; rows whose added length is so small that a share of it says nothing.
ALMOST_NOTHING, ABSOLUTE = 5e-3, 5e-5


@cache
def rows() -> dict[str, dict[str, str]]:
    lines = Path(__file__).with_name("solid_step_rows.csv").read_text(encoding="utf-8").splitlines()
    return {row["id"]: row for row in csv.DictReader(line for line in lines if not line.startswith("#"))}


def bar_of(key: str, fineness: Fineness | None = None) -> Bar:
    row = rows()[key]
    segments = tuple(Segment(*map(float, part.split("/"))) for part in row["segments"].split())
    return Bar(segments, tuple(map(float, row["fillets"].split())), fineness or Fineness())


def test_the_rows_are_spread() -> None:
    assert {row["kind"] for row in rows().values()} == {"shoulder", "collar", "groove", "borestep", "stair"}
    clear = [row for row in rows().values() if all(abs(float(row[mode])) > ALMOST_NOTHING for mode in MODES)]
    assert len(clear) >= 25


@pytest.mark.parametrize("key", rows())
def test_added_length(key: str) -> None:
    bar = bar_of(key)
    for mode in MODES:
        expected = float(rows()[key][mode])
        within = TOLERANCE * abs(expected) if abs(expected) > ALMOST_NOTHING else ABSOLUTE
        assert added_length(bar, mode) == pytest.approx(expected, rel=0, abs=within), mode


@pytest.mark.parametrize("mode", MODES)
@pytest.mark.parametrize("bore", [0.0, 0.6, 0.95])
def test_a_uniform_bar_is_exact(mode: str, bore: float) -> None:
    """L / E A, L / G I_p, L / E I (Saint-Venant), on a mesh as if there were a step in the middle."""
    bar = Bar((Segment(0.4, 1.0, bore), Segment(0.3, 1.0, bore)), (0.0,))
    rule = MODES[mode]
    exact = 0.7 / (rule.modulus * rule.section(bar.segments[0]))
    assert flexibility(bar, rule) == pytest.approx(exact, rel=1e-9)
    assert abs(added_length(bar, mode)) < 1e-6


def test_a_reversed_bar_is_the_same() -> None:
    bar = bar_of("141")
    back = Bar(bar.segments[::-1], bar.fillets[::-1])
    for mode in MODES:
        assert added_length(back, mode) == pytest.approx(added_length(bar, mode), rel=1e-6)


@pytest.mark.parametrize("key", ["90", "361"])
@pytest.mark.parametrize("mode", MODES)
def test_finer_meshes_close_in_from_below(key: str, mode: str) -> None:
    expected = float(rows()[key][mode])
    coarse = added_length(bar_of(key, Fineness(corner=8e-3, growth=1.0, largest=0.5, per_fillet=4)), mode)
    default = added_length(bar_of(key), mode)
    fine = added_length(bar_of(key, Fineness(corner=2e-4, growth=0.5, largest=0.25, per_fillet=12)), mode)
    assert coarse < default < fine
    assert fine == pytest.approx(expected, rel=4e-4)


@pytest.mark.parametrize("radius", [0.05, 0.1])
def test_volume_of_a_fillet(radius: float) -> None:
    """The ring between the foot of the step and the arc, by Pappus: an area r^2 (1 - pi / 4), turned about the axis."""
    bar = Bar((Segment(1.0, 1.0), Segment(1.0, 1.5)), (radius,))
    volume = Functional(lambda w: 2 * np.pi * w.x[1]).assemble(meridian_basis(bar, MODES["torsion"]))
    cylinders = np.pi / 4 * (1.0 + 1.5**2)
    ring = 2 * np.pi * (0.5 * radius**2 * (1 - np.pi / 4) + radius**3 * (5 / 6 - np.pi / 4))
    assert volume - cylinders == pytest.approx(ring, rel=1e-4)


def test_twist_of_a_shaft_on_a_half_space_lies_in_its_bracket() -> None:
    """Added length of a shaft on a body without end, in its diameters: between 3 pi / 64 and 8 / (15 pi).

    Below: its end section as a rigid disc, phi = 3 T / (16 G a^3) (E. Reissner, H. F. Sagoci, Forced Torsional
    Oscillations of an Elastic Half-Space I, J. Appl. Phys. 15 (1944) 652; formula from memory); the shaft's sections
    stay rigid in uniform torsion, so holding one rigid can only stiffen. Above: the shaft's stresses T r / I_p kept up
    to the plane, in equilibrium, so too soft: with the Hankel transform a J_2(k a) / k of r / a on the disc, their work
    on the half-space is 2 pi a^3 / G times int (J_2(x) / x)^2 dx = 4 / (15 pi). D / d = 10 stands for no end.
    """
    bar = Bar((Segment(2.0, 1.0), Segment(10.0, 10.0)), (0.0,))
    twist = added_length(bar, "torsion")
    assert 3 * np.pi / 64 < twist < 8 / (15 * np.pi)
