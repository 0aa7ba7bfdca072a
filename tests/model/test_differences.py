"""What differs between two models, address by address."""

import fe_shaft as fs
from fe_shaft.model.differences import differences

KEY = {"width": "10 mm", "depth": "5 mm"}


def model(**words):
    seat = fs.Segment("seat", length="38 mm", diameter="38 mm", **words)
    held = fs.Pin("held", at="0 mm", holds=["radial", "axial", "tilt"])
    return fs.Model("m", [fs.Shaft("s", [seat], material="C45"), held])


def test_a_keyway_is_told_key_by_key():
    deeper = KEY | {"depth": "6 mm", "count": 2}
    assert differences(model(keyway=KEY), model(keyway=deeper)) == (
        "s.seat.keyway.depth: 5 mm -> 6 mm",
        "s.seat.keyway.count: not written -> 2",
    )
    assert differences(model(), model(keyway=KEY)) == (
        "s.seat.keyway.width: not written -> 10 mm",
        "s.seat.keyway.depth: not written -> 5 mm",
    )
