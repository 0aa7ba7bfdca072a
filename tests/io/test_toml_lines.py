"""Lines of keys in TOML texts, held against texts whose every value is its own line number."""

import tomllib
from typing import Any

import pytest

from fe_shaft.io.toml_lines import scan

TEXT = '''a = 1
b.c = 2
"quoted key" = 3
'literal' = 4
"esc\\u0041\\t" = 5

[table]
d = 8
e = [
  10,
  [11, 11],
  { f = 12, g = { h = 12 } },
]
i = """
"" not the end \\"""
# [no.table]
""""
j = 18
k = \'\'\'
\'\' j = 3
\'\'\'\'
l = 22

[table.sub] # comment ] [
m = 25
[[many]]
n = 27
[[many]]
n = 29
[many.inner]
o = 31
[[many.more]]
p = 33
[x.y]
z = 35
'''


def test_every_value_is_its_own_line() -> None:
    lines = scan(TEXT).lines
    for path, value in _leaves(tomllib.loads(TEXT)):
        if isinstance(value, int):
            assert lines[path] == value, path


def test_tables_stand_where_their_heading_is() -> None:
    lines = scan(TEXT).lines
    assert lines["table",] == 7
    assert lines["table", "sub"] == 24
    assert (lines["many", 0], lines["many", 1], lines["many", 1, "more", 0]) == (26, 28, 32)
    assert lines["x", "y"] == 34


def test_what_was_written_with_an_equals_sign() -> None:
    assigned = scan("a.b = 1\nc = { d = 1 }\n[e]\nf.g = 2").assigned
    assert assigned == {("a", "b"), ("c",), ("c", "d"), ("e", "f", "g")}


@pytest.mark.parametrize("text", ["= 1", "a = ?'", 'a = "x'])
def test_only_toml_is_scanned(text: str) -> None:
    if text == "a = ?'":
        assert scan(text).lines == {("a",): 1}  # not judged here: the parser did before
    else:
        with pytest.raises(ValueError, match=r"^no (key|value) at"):
            scan(text)


def _leaves(table: Any, path: tuple[Any, ...] = ()) -> list[tuple[tuple[Any, ...], Any]]:
    pairs = table.items() if isinstance(table, dict) else enumerate(table) if isinstance(table, list) else ()
    found = [leaf for key, value in pairs for leaf in _leaves(value, (*path, key))]
    return found or [(path, table)]
