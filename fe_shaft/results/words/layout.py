"""Tables and paragraphs of fixed-width text, at most 100 columns wide."""

from __future__ import annotations

import re
import textwrap
from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass
from typing import Literal

from fe_shaft.errors import WIDTH

MOST_ROWS = 60  # of one printed table; files hold all
NARROWEST = 8  # columns that a cut name keeps at least
_TIE = "\N{NO-BREAK SPACE}"
_GLUE = re.compile(r"(?<=\d) (?=[A-Za-z%])|(?<=N) (?=m\b)|(?<=\blbf) (?=in\b|ft\b)")  # no number without its unit


@dataclass(frozen=True)
class Column:
    """One column: two lines of heading and its cells.

    Attributes
    ----------
    align : on the decimal points, to the left or to the right
    """

    head: str
    sub: str
    cells: tuple[str, ...]
    align: Literal["point", "left", "right"] = "point"

    @property
    def says_something(self) -> bool:
        """Whether any cell is more than nothing."""
        return any(cell not in ("", "0") for cell in self.cells)


def table(columns: Sequence[Column], *, gap: int = 2, indent: int = 2) -> list[str]:
    """Lines of a table. The first column's heading is the table's title; its cells are indented."""
    first = columns[0]
    inner = [" " * indent + cell for cell in first.cells]
    blocks = [_block(Column(first.head, " " * indent * bool(first.sub) + first.sub, tuple(inner), "left"))]
    blocks += [_block(column) for column in columns[1:]]
    heads = 2 if any(column.sub for column in columns) else 1
    gaps = _gaps([len(block[0]) for block in blocks], gap)
    lines = ["".join(map("".join, zip(gaps, row, strict=True))).rstrip() for row in zip(*blocks, strict=True)]
    return lines[:1] + lines[2:] if heads == 1 else lines


def _gaps(widths: Sequence[int], gap: int) -> list[str]:
    """What stands before each column; columns that are left over in the width make narrow gaps wider."""
    gaps = [0] + [gap] * (len(widths) - 1)
    spare = WIDTH - sum(widths) - sum(gaps)
    for k in range(1, len(gaps)):
        if gap < 2 and spare > 0:
            gaps[k], spare = gaps[k] + 1, spare - 1
    return [" " * each for each in gaps]


def _block(column: Column) -> list[str]:
    """Heading and cells of a column, all equally wide."""
    cells = on_the_point(column.cells) if column.align == "point" else list(column.cells)
    width = max(map(len, (column.head, column.sub, *cells)))
    if column.align == "left":
        return [text.ljust(width) for text in (column.head, column.sub, *cells)]
    return [text.rjust(width) for text in (column.head, column.sub, *cells)]


def on_the_point(cells: Iterable[str]) -> list[str]:
    """Numbers with their decimal points in one column."""
    parts = [cell.partition(".") for cell in cells]
    right = max((len(point + rest) for _, point, rest in parts), default=0)
    return [f"{whole}{(point + rest).ljust(right)}" if whole or point else "" for whole, point, rest in parts]


def fitting(make: Callable[[int, int], list[str]], widest: int = 24) -> list[str]:
    """Lines of a table that is made for a width of its names and a gap; the widest of both that fit."""
    lines: list[str] = []
    for gap, narrowest in ((2, 16), (1, NARROWEST)):
        for width in range(widest, narrowest - 1, -1):
            lines = make(width, gap)
            if max(map(len, lines), default=0) <= WIDTH:
                return lines
    return [line[:WIDTH] for line in lines]


def shortened(lines: list[str], rows: int, heads: int) -> list[str]:
    """A long table cut off, with the number of rows that are left out."""
    if rows <= MOST_ROWS:
        return lines
    return [*lines[: heads + MOST_ROWS], f"  and {rows - MOST_ROWS} more: -o FOLDER, to_csv()"]


def paragraph(text: str, hang: str = "", *, first: str | None = None) -> list[str]:
    """Text wrapped to the width; `first` stands before the first line, `hang` before the others."""
    head = hang if first is None else first
    wrapped = textwrap.wrap(
        _GLUE.sub(_TIE, text),
        WIDTH,
        initial_indent=head,
        subsequent_indent=hang,
        break_on_hyphens=False,
        break_long_words=True,
    )
    return [line.replace(_TIE, " ").rstrip() for line in wrapped] or [head.rstrip()]


def labelled(label: str, items: Sequence[str], *, between: str = " | ") -> list[str]:
    """A labelled block: the items side by side, wrapped, none torn if a line holds it."""
    indent = " " * (len(label) + 2)
    room = WIDTH - len(indent)
    rows: list[str] = []
    for item in items:
        if rows and len(rows[-1]) + len(between) + len(item) <= room:
            rows[-1] += between + item
        else:
            rows += textwrap.wrap(item, room, break_on_hyphens=False) or [""]
    return [f"{label}  {row}" if k == 0 else indent + row for k, row in enumerate(rows)]
