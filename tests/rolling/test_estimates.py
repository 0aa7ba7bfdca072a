"""Estimates of what is inside: they always fit into the rings, say how they were found, and refuse what cannot be."""

from __future__ import annotations

import math
from typing import Any

import pytest

from fe_shaft.errors import ModelError
from fe_shaft.rolling import dynamic_rating, static_rating
from fe_shaft.rolling.estimate import RULES, estimate
from fe_shaft.rolling.inside import Catalogue, Inside
from fe_shaft.rolling.kinds import BALLS, Kind

#: Bores and outside diameters [mm]; invented, from thin to thick.
SIZES = [(3, 10), (20, 32), (40, 80), (40, 110), (100, 140), (180, 400)]
FORTY = math.radians(40)


def bare(kind: Kind, bore: float, outer: float) -> Catalogue:
    """What a type needs at least."""
    more: dict[str, Any] = {}
    if kind is Kind.ANGULAR_CONTACT_BALL:
        more["contact_angle"] = FORTY
    if kind is Kind.NEEDLE_ROLLER:
        more["inner_raceway"] = 1e-3 * (bore + 0.3 * (outer - bore))
    return Catalogue(1e-3 * bore, 1e-3 * outer, **more)


@pytest.mark.parametrize(("bore", "outer"), SIZES)
@pytest.mark.parametrize("kind", list(Kind))
def test_elements_fit_between_bore_and_outside(kind: Kind, bore: float, outer: float) -> None:
    found = estimate(kind, bare(kind, bore, outer))
    inside = found.inside
    assert inside.number >= 3
    assert bore < 1e3 * inside.inner_raceway < 1e3 * inside.outer_raceway < outer
    assert found.filling == inside.spread < 1
    assert (inside.length == 0) == (kind in BALLS)
    assert math.isnan(found.dynamic_ratio)
    assert math.isnan(found.static_ratio)
    assert found.certainty == 1


@pytest.mark.parametrize("kind", list(Kind))
def test_less_given_means_a_wider_band(kind: Kind) -> None:
    least = bare(kind, 40, 80)
    rough = estimate(kind, least)
    inside = rough.inside
    shape = inside.pitch_diameter, inside.contact_angle, inside.rows
    rate = static_rating.ball_rating(inside.number, inside.diameter, *shape)
    if kind not in BALLS:
        rate = static_rating.roller_rating(inside.number, inside.diameter, inside.length, *shape)
    if kind is Kind.SELF_ALIGNING_BALL:
        rate = rate / 5
    known = {name: getattr(least, name) for name in ("contact_angle", "inner_raceway")}
    sharp = estimate(kind, Catalogue(least.bore, least.outer, static=float(rate), **known))
    assert sharp.band.radial <= rough.band.radial
    assert sharp.band.capacity <= rough.band.capacity
    assert sharp.band.total > sharp.band.radial


def test_every_type_has_its_rule() -> None:
    assert set(RULES) == set(Kind)


def test_what_was_put_in_comes_out() -> None:
    """Ten balls of 12.7 mm on 70 mm, rated by the standards, are found again."""
    made = Inside(10, 12.7e-3, 70e-3)
    shape = made.number, made.diameter, made.pitch_diameter
    c, c0 = float(dynamic_rating.ball_rating(*shape)), float(static_rating.ball_rating(*shape))
    found = estimate(Kind.DEEP_GROOVE_BALL, Catalogue(50e-3, 90e-3, dynamic=c, static=c0))
    assert found.inside.number == 10
    assert found.inside.diameter == pytest.approx(12.7e-3, rel=1e-9)
    assert found.dynamic_ratio == pytest.approx(1, abs=1e-3)
    assert found.static_ratio == pytest.approx(1, abs=5e-3)


def test_balls_of_no_standard_size_are_weighed() -> None:
    """Nine balls of 12.15 mm: no inch or half-millimetre size meets both ratings."""
    shape = 9, 12.15e-3, 60e-3
    c, c0 = float(dynamic_rating.ball_rating(*shape)), float(static_rating.ball_rating(*shape))
    found = estimate(Kind.DEEP_GROOVE_BALL, Catalogue(40e-3, 80e-3, dynamic=c, static=c0))
    assert found.method == "ratings and assembly weighed together"
    assert found.inside.number == 9
    assert found.inside.diameter == pytest.approx(12.15e-3, rel=0.01)


def test_weights_are_shares_and_ours_comes_first() -> None:
    found = estimate(Kind.DEEP_GROOVE_BALL, Catalogue(50e-3, 90e-3, dynamic=35000, static=23200))
    near = found.neighbours
    assert near[0].number == found.inside.number
    assert near[0].diameter == found.inside.diameter
    assert near[0].stiffness == 1
    assert 0.97 < sum(n.weight for n in near) <= 1 + 1e-12
    assert [n.weight for n in near[1:]] == sorted((n.weight for n in near[1:]), reverse=True)
    # One ball more or less at the same C0 is worth about 5 % in stiffness.
    assert all(abs(n.stiffness - 1) < 0.06 for n in near if abs(n.number - near[0].number) == 1)
    assert found.notes == ("11 balls of 11.92 mm would meet the catalogue as well.",)
    assert found.band.radial > 0.06


@pytest.mark.parametrize("wrong", [1e-3, 0.5, 2.0, 1e3])
def test_a_static_rating_of_another_size_is_not_believed(wrong: float) -> None:
    """kN read as N, or a figure of the wrong line: common proportions, and a note that says so."""
    catalogue = Catalogue(40e-3, 80e-3, dynamic=29100, static=17900 * wrong)
    found = estimate(Kind.DEEP_GROOVE_BALL, catalogue)
    assert found.method == "common proportions of d and D"
    assert found.inside.diameter == pytest.approx(12e-3)
    assert found.notes[0].startswith("The ratings are not those of ISO 281 and ISO 76 for this type (C is ")
    rollers = estimate(Kind.CYLINDRICAL_ROLLER, Catalogue(40e-3, 80e-3, width=18e-3, static=53000 * wrong))
    assert "unusual for the type" in rollers.notes[0]


def test_two_rows_share_the_width() -> None:
    one = estimate(Kind.CYLINDRICAL_ROLLER, Catalogue(40e-3, 80e-3, width=18e-3)).inside
    two = estimate(Kind.CYLINDRICAL_ROLLER, Catalogue(40e-3, 80e-3, width=36e-3, rows=2)).inside
    assert two.length == pytest.approx(one.length)
    assert (one.number, one.rows, two.rows) == (two.number, 1, 2)


def test_spherical_rollers_are_rated_with_their_own_factor() -> None:
    """bm 1.15 of ISO 281 (from memory)."""
    found = estimate(Kind.SPHERICAL_ROLLER, Catalogue(50e-3, 90e-3, width=23e-3, dynamic=1e5, static=1e5, e=0.24))
    i = found.inside
    c = dynamic_rating.roller_rating(i.number, i.diameter, i.length, i.pitch_diameter, i.contact_angle, 2, 1.15)
    assert found.dynamic_ratio == pytest.approx(1e5 / float(c))
    assert found.static_ratio == pytest.approx(1)


def test_a_contact_angle_taken_for_granted_is_told() -> None:
    for kind in (Kind.TAPERED_ROLLER, Kind.SPHERICAL_ROLLER, Kind.SELF_ALIGNING_BALL):
        told = [note for note in estimate(kind, Catalogue(40e-3, 80e-3)).notes if "contact angle was taken" in note]
        assert len(told) == 1
        given = estimate(kind, Catalogue(40e-3, 80e-3, e=0.3))
        assert not [note for note in given.notes if "contact angle was taken" in note]
        assert given.inside.contact_angle == pytest.approx(math.atan(0.2))


@pytest.mark.parametrize("angle", [20.0, 25.0, 30.0, 40.0])
def test_angular_contact_keeps_its_angle(angle: float) -> None:
    found = estimate(Kind.ANGULAR_CONTACT_BALL, Catalogue(40e-3, 80e-3, contact_angle=math.radians(angle), rows=2))
    assert found.inside.contact_angle == math.radians(angle)
    assert found.inside.rows == 2


REFUSED = [
    (lambda: Catalogue(80e-3, 40e-3), "outer", "40 mm is not larger than the bore of 80 mm. Give D larger than d."),
    (lambda: Catalogue(40e-3, 80e-3, static=-1.0), "static", "-1 cannot be. Give a positive number, or leave it out."),
    (lambda: Catalogue(math.nan, 80e-3), "bore", "nan cannot be. Give a positive number, or leave it out."),
    (
        lambda: Catalogue(40e-3, 80e-3, inner_raceway=30e-3), "inner_raceway",
        "30 mm lies outside of 40 mm to 80 mm. Check it.",
    ),
    (
        lambda: Catalogue(40e-3, 80e-3, contact_angle=math.pi / 2), "contact_angle",
        "90 deg is a thrust bearing. No rule for it here.",
    ),
    (lambda: Catalogue(40e-3, 80e-3, rows=3), "rows", "3 cannot be. Write 1 or 2."),
    (
        lambda: estimate(Kind.ANGULAR_CONTACT_BALL, Catalogue(40e-3, 80e-3)), "contact_angle",
        "an angular contact ball bearing needs its contact angle. Take it from the catalogue.",
    ),
    (
        lambda: estimate(Kind.NEEDLE_ROLLER, Catalogue(40e-3, 80e-3)), "inner_raceway",
        "a needle roller bearing needs the diameter F of its inner raceway. Take Fw of the catalogue.",
    ),
    (
        lambda: estimate(Kind.DEEP_GROOVE_BALL, Catalogue(40e-3, 80e-3, rows=2)), "rows",
        "there is no rule for two rows of deep-groove balls. Write what is inside.",
    ),
    (
        lambda: estimate(Kind.CYLINDRICAL_ROLLER, Catalogue(40e-3, 80e-3, inner_raceway=70e-3, outer_raceway=50e-3)),
        "outer_raceway", "50 mm is not larger than the inner raceway of 70 mm. Give E over F.",
    ),
    (
        lambda: estimate(
            Kind.CYLINDRICAL_ROLLER,
            Catalogue(10e-3, 80e-3, static=9e4, inner_raceway=12e-3, outer_raceway=78e-3),
        ),
        "outer_raceway", "rollers of 33 mm on a pitch circle of 45 mm are fewer than 5. Check E and F.",
    ),
]  # fmt: skip


@pytest.mark.parametrize(("call", "place", "sentence"), REFUSED)
def test_what_cannot_be_is_said_in_a_sentence(call: Any, place: str, sentence: str) -> None:
    with pytest.raises(ModelError) as caught:
        call()
    (problem,) = caught.value.problems
    assert (problem.place, problem.sentence) == (place, sentence)
    assert caught.value.exit_code == 3
