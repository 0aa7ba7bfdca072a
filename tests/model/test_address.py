"""Addresses: names instead of numbers in brackets."""

import pytest

from fe_shaft.model.address import address
from tests.model.small import model

TABLES = {"shafts": {"s": {"segments": [{"name": "a"}, {}, 3]}, "t": 3}}


@pytest.mark.parametrize(
    ("path", "text"),
    [
        (("title",), "title"),
        (("housing", "seat", "radial"), "housing.seat.radial"),
        (("gears", "wheel", "helix"), "wheel.helix"),
        (("cases", "running", "power"), "running.power"),
        (("gears",), "gears"),
        (("shafts", "s", "segments", 0, "length"), "s.a.length"),
        (("shafts", "s", "segments", 1, "length"), "s.segment_2.length"),
        (("shafts", "s", "segments", 2), "s.segment_3"),
        (("shafts", "s", "segments"), "s.segments"),
        (("shafts", "t", "segments", 4, "length"), "t.segment_5.length"),
        ((), ""),
    ],
)
def test_paths_in_tables(path: tuple[str | int, ...], text: str) -> None:
    assert address(path, TABLES) == text


def test_segments_of_a_model() -> None:
    assert address(("shafts", "layshaft", "segments", 1, "bore"), model().parts) == "layshaft.seat.bore"
