"""Clearance groups and limits of tilt: the tables as tables, and what lies beyond them."""

from __future__ import annotations

import itertools

import pytest

from fe_shaft.errors import ModelError
from fe_shaft.rolling.clearance import GROUPS, SET_AT_MOUNTING, _tables, clearance_group
from fe_shaft.rolling.kinds import Kind
from fe_shaft.rolling.misalignment import tilt_limit

TABLES = [kind for kind in Kind if kind not in SET_AT_MOUNTING]


@pytest.mark.parametrize("kind", TABLES)
def test_tables_have_no_gap_and_groups_overlap_in_order(kind: Kind) -> None:
    lines = _tables()[kind].lines
    assert all(a[1] == b[0] for a, b in itertools.pairwise(lines))
    for line in lines:
        groups = line[2:]
        assert all(low < high for low, high in groups)
        assert all(a[0] < b[0] <= a[1] < b[1] for a, b in itertools.pairwise(groups)), line


@pytest.mark.parametrize("kind", TABLES)
def test_larger_bores_have_more_play(kind: Kind) -> None:
    lines = _tables()[kind].lines
    for a, b in itertools.pairwise(lines):
        assert all(x <= y for one, two in zip(a[2:], b[2:], strict=True) for x, y in zip(one, two, strict=True))


def test_a_bore_on_a_border_belongs_to_the_smaller_range() -> None:
    """ISO 5753-1 says over .. including."""
    at, over = (clearance_group(Kind.DEEP_GROOVE_BALL, bore) for bore in (50e-3, 50.001e-3))
    assert (at.least, at.largest) == pytest.approx((6e-6, 23e-6))
    assert (over.least, over.largest) == pytest.approx((8e-6, 28e-6))
    assert clearance_group(Kind.DEEP_GROOVE_BALL, 0.05 * (1 + 1e-15)) == at


def test_sources_are_told() -> None:
    assert clearance_group(Kind.DEEP_GROOVE_BALL, 40e-3, "C3").source == "read"
    assert clearance_group(Kind.CYLINDRICAL_ROLLER, 40e-3, "C3").source == "read"
    assert clearance_group(Kind.CYLINDRICAL_ROLLER, 40e-3, "C4").source == "from memory"
    assert clearance_group(Kind.SPHERICAL_ROLLER, 40e-3).source == "from memory"
    assert clearance_group(Kind.DEEP_GROOVE_BALL, 40e-3).mean == pytest.approx(13e-6)


@pytest.mark.parametrize(
    ("kind", "bore", "group", "place", "sentence"),
    [
        (
            Kind.TAPERED_ROLLER, 40e-3, "CN", "clearance",
            "tapered roller bearings get theirs when they are mounted. Write the value.",
        ),
        (Kind.DEEP_GROOVE_BALL, 40e-3, "C0", "clearance", '"C0" is no group. Write one of C2, CN, C3, C4, C5.'),
        (
            Kind.DEEP_GROOVE_BALL, 0.4, "CN", "bore",
            "400 mm is outside of the clearance table of deep groove ball bearings, over 0 to 200 mm. "
            "Write the clearance.",
        ),
        (
            Kind.CYLINDRICAL_ROLLER, 40e-3, "C5", "clearance",
            "C5 of cylindrical roller bearings is not in the table. Write the clearance.",
        ),
    ],
)  # fmt: skip
def test_what_is_not_in_the_table(kind: Kind, bore: float, group: str, place: str, sentence: str) -> None:
    with pytest.raises(ModelError) as caught:
        clearance_group(kind, bore, group)
    (problem,) = caught.value.problems
    assert (problem.place, problem.sentence) == (place, sentence)
    assert GROUPS[1] == "CN"


@pytest.mark.parametrize("kind", list(Kind))
def test_limits_of_tilt_span_what_was_found(kind: Kind) -> None:
    limit = tilt_limit(kind)
    assert 0 < limit.warn < limit.fail < 0.06
    assert limit.found or "no source" in limit.note
    assert all(said.low <= said.high and said.source for said in limit.found)
    if limit.found:
        # A warning comes at the latest at the largest value anyone allows, a failure not before the smallest.
        assert limit.warn <= max(said.high for said in limit.found)
        assert limit.fail >= min(said.low for said in limit.found)
