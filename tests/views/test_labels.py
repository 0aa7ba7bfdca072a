"""Labels stay inside, keep clear of each other and of what is taken, and near what they name."""

from __future__ import annotations

import numpy as np
from hypothesis import given, settings
from hypothesis import strategies as st

from fe_shaft.views.labels import Wish, leader_end, place, shorten

AREA = (0.0, 0.0, 800.0, 700.0)


def overlap(a, b) -> bool:
    return bool(a[0] < b[2] and b[0] < a[2] and a[1] < b[3] and b[1] < a[3])


@settings(max_examples=60, deadline=None)
@given(
    anchors=st.lists(st.tuples(st.floats(0, 800), st.floats(0, 700)), min_size=1, max_size=14),
    taken=st.lists(st.tuples(st.floats(0, 600), st.floats(0, 500)), max_size=3),
)
def test_no_label_covers_another_or_leaves_the_picture(anchors, taken):
    wishes = [Wish(anchor, (110.0, 18.0)) for anchor in anchors]
    blocked = [(x, y, x + 150, y + 90) for x, y in taken]
    boxes = list(blocked)
    for corner in place(wishes, AREA, blocked):
        if corner is None:
            continue
        box = (*corner, corner[0] + 110, corner[1] + 18)
        assert box[0] >= 0
        assert box[1] >= 0
        assert box[2] <= 800
        assert box[3] <= 700
        assert not any(overlap(box, other) for other in boxes)
        boxes.append(box)


def test_a_lonely_label_goes_where_it_wished():
    (corner,) = place([Wish((400, 300), (100, 20), away=(0, 1), reach=30)], AREA)
    np.testing.assert_allclose(corner, (350, 330))


def test_labels_of_one_place_are_moved_apart_and_stay_near():
    corners = place([Wish((400, 300), (100, 20))] * 8, AREA)
    assert None not in corners
    assert np.max(np.abs(np.array(corners) - (350, 300))) < 250


def test_a_label_without_room_is_left_out():
    assert place([Wish((400, 300), (100, 20))], AREA, [AREA]) == [None]
    assert place([Wish((400, 300), (900, 20))], AREA) == [None]


def test_leader_ends_on_the_labels_edge():
    np.testing.assert_allclose(leader_end((10, 10), (100, 20), (50, 0)), (50, 10))
    np.testing.assert_allclose(leader_end((10, 10), (100, 20), (500, 500)), (110, 30))


def test_long_names_are_cut_in_their_middle_and_stay_apart():
    names = ["a_bearing_with_a_very_long_name_left", "a_bearing_with_a_very_long_name_right"]
    short = [shorten(name, 20) for name in names]
    assert short[0] != short[1]
    assert all(len(name) == 20 and ".." in name for name in short)
    assert shorten("wheel", 20) == "wheel"
