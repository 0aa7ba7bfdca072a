"""The body of revolution: closed, of the right volume, and moved as the sections move."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.interpolate import interp1d

import fe_shaft.model as fs
from fe_shaft.analysis.solve import solve
from fe_shaft.results.body import (
    Body,
    Places,
    line_fields,
    place_x,
    revolve,
    section_movement,
)


@dataclass(frozen=True)
class StationLine:
    """A line of plain arrays, straight between its stations unless it is given a field of its own."""

    x: Any
    diameter_left: Any
    diameter_right: Any
    bore_left: Any
    bore_right: Any
    u: Any
    force_left: Any
    force_right: Any
    field: Any = None

    def at(self, places):
        if self.field is not None:
            return self.field(places)
        return tuple(interp1d(self.x, values, axis=1)(places) for values in (self.u, self.force_right))


def line_of(lengths, ends, bores=None, cases=1, seed=0, **fields) -> Any:
    """Line of segments with (left, right) diameters and bores, with random movements and forces unless given."""
    ends = np.asarray(ends, dtype=float)
    bores = np.zeros_like(ends) if bores is None else np.asarray(bores, dtype=float)
    x = np.concatenate([[0.0], np.cumsum(lengths)])
    u, force_left, force_right = np.random.default_rng(seed).normal(size=(3, cases, len(x), 6))
    sides = {
        f"{name}_{side}": np.concatenate(
            [pairs[:1, 0], pairs[:, 1]] if side == "left" else [pairs[:, 0], pairs[-1:, 1]]
        )
        for name, pairs in (("diameter", ends), ("bore", bores))
        for side in ("left", "right")
    }
    return StationLine(x=x, **sides, **({"u": u, "force_left": force_left, "force_right": force_right} | fields))


def all_triangles(body: Body):
    quads = body.quads
    return np.concatenate([quads[:, [0, 1, 2]], quads[:, [0, 2, 3]], body.triangles])


def volume(points, triangles) -> float:
    a, b, c = (points[triangles[:, k]] for k in range(3))
    return float(np.einsum("ij,ij->", a, np.cross(b, c)) / 6)


def frustum(length, d1, d2, around):
    """Volume of a cone's frustum with a regular polygon for a circle (closed form, elementary geometry)."""
    area = around / 2 * np.sin(2 * np.pi / around)
    return length * area * (d1 * d1 + d1 * d2 + d2 * d2) / 12


def edges_met_twice(body: Body) -> bool:
    sides = [np.stack([body.quads[:, k], body.quads[:, (k + 1) % 4]], axis=1) for k in range(4)]
    sides += [np.stack([body.triangles[:, k], body.triangles[:, (k + 1) % 3]], axis=1) for k in range(3)]
    directed = np.concatenate(sides)
    there, number = np.unique(directed, axis=0, return_counts=True)
    back = np.unique(directed[:, ::-1], axis=0)
    return bool(np.all(number == 1) and np.array_equal(there, back))


SHAPES = {
    "solid steps": ([0.1, 0.2, 0.1], [[0.03, 0.03], [0.05, 0.05], [0.02, 0.02]], None),
    "through bore": ([0.1, 0.2], [[0.03, 0.03], [0.05, 0.05]], [[0.01, 0.01], [0.02, 0.02]]),
    "cone and tapered bore": ([0.1, 0.2], [[0.03, 0.05], [0.05, 0.02]], [[0.01, 0.02], [0.01, 0.01]]),
    "blind bores from both ends": (
        [0.1, 0.2, 0.1],
        [[0.03, 0.03], [0.05, 0.05], [0.04, 0.04]],
        [[0.01, 0.01], [0.0, 0.0], [0.02, 0.02]],
    ),
    "closed cavity": ([0.1, 0.2, 0.1], [[0.05, 0.05]] * 3, [[0.0, 0.0], [0.02, 0.02], [0.0, 0.0]]),
    "bore that ends in a point": ([0.1, 0.2], [[0.05, 0.05]] * 2, [[0.02, 0.0], [0.0, 0.0]]),
}


@pytest.mark.parametrize("name", SHAPES)
@pytest.mark.parametrize("sharp", [False, True])
def test_volume_is_the_sum_of_frustums_and_faces_look_outward(name, sharp):
    lengths, ends, bores = SHAPES[name]
    line = line_of(lengths, ends, bores)
    body = revolve(line, around=24, sharp=sharp)
    expected = sum(frustum(h, *d, 24) for h, d in zip(lengths, ends, strict=True))
    if bores is not None:
        expected -= sum(frustum(h, *d, 24) for h, d in zip(lengths, bores, strict=True))
    assert volume(body.points, all_triangles(body)) == pytest.approx(expected, rel=1e-12)


@pytest.mark.parametrize("name", SHAPES)
def test_surface_is_closed(name):
    assert edges_met_twice(revolve(line_of(*SHAPES[name]), around=12))


@pytest.mark.parametrize("name", SHAPES)
def test_sharp_normals_are_the_normals_of_the_faces(name):
    body = revolve(line_of(*SHAPES[name]), around=96, sharp=True)
    triangles = all_triangles(body)
    a, b, c = (body.points[triangles[:, k]] for k in range(3))
    face = np.cross(b - a, c - a)
    face /= np.linalg.norm(face, axis=1, keepdims=True)
    cosine = np.einsum("tkj,tj->tk", body.normals[triangles], face)
    on_axis = body.radius[body.ring[triangles]] == 0.0
    assert np.all(cosine[~on_axis] > np.cos(2 * np.pi / 96))


def test_rings_start_at_twelve_and_run_by_three():
    body = revolve(line_of(*SHAPES["solid steps"]), around=4)
    first = body.points[body.ring == 0]
    np.testing.assert_allclose(first[:, 1:], 0.015 * np.array([[1, 0], [0, 1], [-1, 0], [0, -1]]), atol=1e-17)


def test_step_has_both_diameters_at_one_place():
    body = revolve(line_of(*SHAPES["solid steps"]), smooth=1)
    at_step = sorted(body.radius[body.x == 0.1])
    assert at_step == pytest.approx([0.015, 0.025], rel=1e-15)


def test_stations_without_a_step_take_one_ring_and_spans_are_divided():
    lengths = [0.1, 0.1, 0.4]
    body = revolve(line_of(lengths, [[0.03, 0.03]] * 3), smooth=6)
    np.testing.assert_allclose(np.unique(body.x), [0.0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6], rtol=1e-14)


def test_movement_is_the_rigid_movement_of_a_rigidly_moved_line():
    """A line moved as one rigid body moves every surface point as that body: u0 + theta x r."""
    line = line_of(*SHAPES["cone and tapered bore"], cases=3)
    random = np.random.default_rng(1)
    shift, turn = random.normal(size=(2, 3, 3))
    centre = np.column_stack([line.x, 0 * line.x, 0 * line.x])
    u = np.concatenate(
        [shift[:, None] + np.cross(turn[:, None], centre), np.broadcast_to(turn[:, None], (3, 3, 3))], axis=-1
    )
    rigid = replace(line, u=u, force_left=0 * u, force_right=0 * u)
    body = revolve(rigid)
    moved = body.movement(line_fields(rigid, body.places)[0])
    expected = shift[:, None] + np.cross(turn[:, None], body.points)
    np.testing.assert_allclose(moved, expected, rtol=0, atol=1e-13 * np.max(np.abs(expected)))


def test_movement_is_linear_in_the_results():
    line = line_of(*SHAPES["through bore"], cases=2)
    body = revolve(line)
    u, _ = line_fields(line, body.places)
    np.testing.assert_allclose(body.movement(3 * u[0] - 2 * u[1]), 3 * body.movement(u[0]) - 2 * body.movement(u[1]),
                               atol=1e-12)  # fmt: skip


def test_section_turned_clockwise_moves_twelve_towards_three():
    u = np.array([0, 0, 0, 1e-3, 0, 0])
    np.testing.assert_allclose(section_movement(u, np.array([0, 1.0, 0])), [0, 0, 1e-3])


def test_places_between_stations_are_asked_of_the_line_and_stations_keep_their_own_values():
    def field(places):
        return np.full((2, len(places), 6), 7.0), np.full((2, len(places), 6), 8.0)

    line = line_of(*SHAPES["solid steps"], cases=2, field=field)
    places = Places(np.array([0, 0, 0, 1, 1, 2]), np.array([0.0, 0.5, 1.0, 0.0, 1.0, 1.0]))
    u, force = line_fields(line, places)
    np.testing.assert_array_equal(u[:, 1], 7.0)
    np.testing.assert_array_equal(force[:, 1], 8.0)
    np.testing.assert_array_equal(u[:, [0, 2, 3, 4, 5]], line.u[:, [0, 1, 1, 2, 3]])
    np.testing.assert_array_equal(force[:, [0, 3]], line.force_right[:, [0, 1]])
    np.testing.assert_array_equal(force[:, [2, 4, 5]], line.force_left[:, [1, 2, 3]])
    np.testing.assert_allclose(place_x(line, places), [0.0, 0.05, 0.1, 0.1, 0.3, 0.4])


def test_surface_of_a_solved_beam_follows_the_exact_bent_line():
    """Simply supported round shaft with a force in the middle, without shear: v = F x (3 L^2 - 4 x^2) / (48 E I) left
    of it (S. P. Timoshenko, Strength of Materials I, 1955); sections stay plane, so the top fibre moves by
    -theta r along the shaft. Numbers invented."""
    segments = [fs.Segment("a", length="400 mm", diameter="30 mm")]
    pins = [fs.Pin("near_end", at="0 mm", holds=["radial", "axial"]), fs.Pin("far_end", at="400 mm", holds=["radial"])]
    steel = fs.Material("own_steel", youngs_modulus="206 GPa", shear_modulus="79 GPa", source="invented")
    shaft = fs.Shaft("beam", segments, material="own_steel", shear="none")
    model = fs.Model("beam", [shaft, *pins, fs.Force("push", at="200 mm", up="900 N")], materials=[steel])
    line = solve(model).lines["beam"]
    body = revolve(line, around=8, smooth=40)
    u, _ = line_fields(line, body.places)
    moved = body.movement(u)[0]
    x, bend = body.points[:, 0], 206e9 * np.pi * 0.03**4 / 64
    near = np.minimum(x, 0.4 - x)
    v = 900.0 * near * (3 * 0.4**2 - 4 * near**2) / (48 * bend)
    theta = np.where(x <= 0.2, 1.0, -1.0) * 900.0 * (0.4**2 - 4 * near**2) / (16 * bend)
    np.testing.assert_allclose(moved[:, 1], v, rtol=0, atol=1e-12 * v.max() + 1e-18)
    np.testing.assert_allclose(moved[:, 0], -theta * body.points[:, 1], rtol=0, atol=1e-12 * v.max())
    assert len(np.unique(np.round(x, 9))) >= 40


def test_line_without_load_and_movement_stays_straight():
    line = line_of(*SHAPES["solid steps"])
    still = replace(line, u=0 * line.u, force_left=0 * line.u, force_right=0 * line.u)
    body = revolve(still)
    assert not line_fields(still, body.places)[0].any()


def test_a_huge_line_keeps_its_extremes_in_few_rings():
    """166 660 spans, as many as a million degrees of freedom have; one thin groove and one thin collar remain."""
    n = 166_660
    d = np.full(n, 0.05)
    d[70_001], d[90_002] = 0.011, 0.093
    line = line_of(np.full(n, 1e-5), np.stack([d, d], axis=1))
    body = revolve(line, around=24, rings=2000)
    assert len(body.x) <= 2002
    assert np.min(body.radius[body.radius > 0]) == pytest.approx(0.0055)
    assert np.max(body.radius) == pytest.approx(0.0465)
    assert body.x.min() == line.x[0]
    assert body.x.max() == line.x[-1]
    assert edges_met_twice(body)


@settings(max_examples=60, deadline=None)
@given(
    segments=st.lists(
        st.tuples(st.floats(1e-3, 0.5), *[st.floats(5e-3, 0.2)] * 2, *[st.sampled_from([0.0, 0.3, 0.9])] * 2),
        min_size=1,
        max_size=8,
    )
)
def test_any_shaft_gives_a_closed_body_of_its_volume(segments):
    lengths = [s[0] for s in segments]
    ends = [[s[1], s[2]] for s in segments]
    bores = [[s[3] * min(s[1:3]), s[4] * min(s[1:3])] for s in segments]
    body = revolve(line_of(lengths, ends, bores), around=8, smooth=3)
    expected = sum(frustum(h, *d, 8) - frustum(h, *b, 8) for h, d, b in zip(lengths, ends, bores, strict=True))
    assert volume(body.points, all_triangles(body)) == pytest.approx(expected, rel=1e-9)
    assert edges_met_twice(body)


@pytest.mark.parametrize("wrong", [{"around": 2}, {"rings": 4}, {"smooth": 0}])
def test_senseless_fineness_is_refused(wrong):
    with pytest.raises(ValueError, match="at least"):
        revolve(line_of(*SHAPES["solid steps"]), **wrong)
