"""Every case of beams.toml is held against fe_shaft by a test of this folder, and what was recalled is marked there."""

from __future__ import annotations

import re
import tomllib
from pathlib import Path

import pytest

HERE = Path(__file__).parent
OTHERS = [path for path in HERE.glob("test_*.py") if path.name != Path(__file__).name]
TESTS = {path.name: path.read_text(encoding="utf-8") for path in OTHERS}
ROWS = tomllib.loads((HERE / "beams.toml").read_text(encoding="utf-8"))["case"]


def users(name: str) -> list[str]:
    """The tests that name a case."""
    return [text for text in TESTS.values() if re.search(rf'"{re.escape(name)}"', text)]


@pytest.mark.parametrize("row", ROWS, ids=[row["id"] for row in ROWS])
def test_used_and_marked(row: dict[str, object]) -> None:
    name = str(row["id"])
    assert users(name), f"no test uses {name}"
    if row["from_memory"] or row.get("recalled_parts"):
        assert all("from memory" in text for text in users(name)), f"a test of {name} does not say 'from memory'"


def test_every_case_has_a_source() -> None:
    assert all(row["source"] and "from_memory" in row for row in ROWS)
    assert len({row["id"] for row in ROWS}) == len(ROWS)
