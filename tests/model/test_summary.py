"""A model at a glance."""

from pathlib import Path

import fe_shaft as fs

EXAMPLE = Path(__file__).resolve().parents[2] / "examples" / "layshaft.toml"


def test_summary_lists_parts_from_left_to_right_and_escapes_names():
    model = fs.read(EXAMPLE)
    lines = str(model).splitlines()
    assert lines[1] == "layshaft: 191 mm long, 7 segments, up to 51 mm in diameter"
    assert [line.split()[3] for line in lines[2:7]] == ["lay_left", "wheel", "pinion", "lay_right", "barring_wheel"]
    hostile = model.change({"title": "<script>alert(1)</script>"})
    assert "<script>" not in hostile._repr_html_()
    assert "&lt;script&gt;" in hostile._repr_html_()
