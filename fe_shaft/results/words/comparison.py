"""Two results side by side in words: pins against bearings, or one model against another."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.model.support import Bearing
from fe_shaft.results.of_shoulders import of_shoulders
from fe_shaft.results.words.band import cares, holds
from fe_shaft.results.words.layout import Column, fitting, on_the_point, paragraph, shortened, table
from fe_shaft.results.words.page import Page
from fe_shaft.results.words.verdicts import usual_bands
from fe_shaft.results.words.view import WORDS, View, change, percent
from fe_shaft.results.words.wording import NOTHING, called, number, plain

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Comparison, Row

Array = NDArray[np.float64]

MOST_CHANGES = 20


def comparison_lines(comparison: Comparison, k: int) -> list[list[str]]:
    """Blocks of lines for one case."""
    view = View(comparison, Page.of(comparison.right), k)
    if not comparison.is_pins:
        return [_changes(comparison), [*_moved(view), *_shoulders(view)], _table(view), _verdicts(view)]
    if not any(isinstance(support, Bearing) for support in comparison.right.model.supports):
        return [
            ["Every support is a rigid pin already: there is nothing to compare.", *_shoulders(view, one=True)],
            paragraph(holds(view), "  ", first=""),
        ]
    answer = [*paragraph(_answer(view)), *_shoulders(view)]
    return [answer, _table(view), [*paragraph(holds(view), "  ", first=""), *cares(view)]]


# ---- the first sentence


def _answer(view: View) -> str:
    model = view.comparison.right.model
    give = [s for s in model.supports if isinstance(s, Bearing)]
    who = "bearings and seats" if any(bearing.seat is not None for bearing in give) else "bearings"
    rows = [row for row in view.main_rows() if row.right[view.k]]
    head = f"Rigid pins against your {who}: "
    if not rows:
        return f"{head}nothing moves across its axis, on either."
    names = view.page.names(40)
    more = [row for row in rows if row.share[view.k] >= 0]
    told = [
        f"{percent(row.share[view.k])} of the {names[row.part]}'s {'movement' * (n == 0)}".rstrip()
        for n, row in enumerate(more)
    ]
    subjects = {row.part: called(view.page.results, row.part, names[row.part]) for row in rows}
    less = [
        f"{subjects[row.part]} moves {percent(-change(row, view.k))} less than on pins"
        for row in rows
        if row not in more
    ]
    makes = [f"{who} make {', '.join(told)}"] if told else []
    return f"{head}{'; '.join([*makes, *less])}."


def _shoulders(view: View, *, one: bool = False) -> list[str]:
    """What of the main movements the shoulders make, on either side; `one`: both are the same."""
    names, told = view.page.names(40), []
    both = (view.comparison.left, view.comparison.right)
    sides = [side for side in both[int(one) :] if side.plain is not None]
    if not sides:
        return []
    where, between = (" on pins and on bearings:", " and ") if view.comparison.is_pins and not one else ("", ", then ")
    if len(sides) == 1 and not one:
        where = f" in the {view.title(int(view.comparison.left.plain is None))} model"
    for row in view.main_rows():
        made = [float(of_shoulders(side, row.part)["deflection"][view.k]) for side in sides]
        wholes = [float(side.parts[row.part].deflection[view.k]) for side in sides]
        shares = [
            f"{view.value(row, part)} ({percent(part / whole)})" if whole else "0"
            for part, whole in zip(made, wholes, strict=True)
        ]
        if any(wholes):
            told.append(f"{between.join(shares)} of the {names[row.part]}'s movement")
    return paragraph(f"Shoulders make{where} {'; '.join(told)}.") if told else []


# ---- the table


def _table(view: View) -> list[str]:
    rows = view.rows
    page, k = view.page, view.k
    if not rows:
        return ["Nothing differs in three digits."]
    heads: list[tuple[str, list[str]]] = [
        (view.title(0), [_cell(view, row, row.left) for row in rows]),
        (view.title(1), [_cell(view, row, row.right) for row in rows]),
        ("difference", [_cell(view, row, row.difference, sign=True) for row in rows]),
        ("ratio", ["" if np.isnan(row.ratio[k]) else number(float(row.ratio[k]), "", digits=2) for row in rows]),
    ]
    if view.comparison.mixes is not None:
        low, high = ("all half", "all twice") if usual_bands(page.results.model) else ("all soft", "all stiff")
        heads += [
            (low, [_cell(view, row, row.low) for row in rows]),
            (high, [_cell(view, row, row.high) for row in rows]),
        ]
        if len(view.comparison.mixes.corners) > 2:
            heads.append(("worst mix", [_cell(view, row, row.worst) for row in rows]))
    groups = [row.quantity for row in rows]

    def make(width: int, gap: int) -> list[str]:
        names = page.names(width)
        columns = [
            Column(page.heading(page.results.cases[k]), "", tuple(names[row.part] for row in rows), "left"),
            Column("", "", tuple(WORDS[row.quantity] for row in rows), "left"),
            Column("", "", tuple(page.shown.unit(row.quantity) for row in rows), "left"),
        ]
        return table(
            [*columns, *(Column(head, "", _by_group(cells, groups), "right") for head, cells in heads)], gap=gap
        )

    return shortened(fitting(make), len(rows), 1)


def _cell(view: View, row: Row, values: Array | None, *, sign: bool = False) -> str:
    if values is None:
        return ""
    value = float(values[view.k])
    quiet = abs(value) <= NOTHING * max(abs(float(row.left[view.k])), abs(float(row.right[view.k])))
    return (
        "0"
        if quiet
        else number(
            value, view.page.shown.unit(row.quantity), sign=sign or row.quantity in ("axial", "axial_force", "twist")
        )
    )


def _by_group(cells: Sequence[str], groups: Sequence[str]) -> tuple[str, ...]:
    """Numbers of one quantity with their decimal points in one column."""
    out: list[str] = []
    for group in dict.fromkeys(groups):
        out += on_the_point([cell for cell, own in zip(cells, groups, strict=True) if own == group])
    return tuple(out)


# ---- two models


def _changes(comparison: Comparison) -> list[str]:
    """What differs between two models, first of all."""
    lines = []
    named = [results.model.title for results in (comparison.left, comparison.right)]
    if named[0] != named[1]:
        for title, name in zip(comparison.titles, named, strict=True):
            lines += paragraph(f"{plain(title)}: {plain(name) or 'without a title'}", "    ", first="")
    if not comparison.changes:
        return [*lines, "Nothing that is written differs."]
    lines.append("What differs:")
    for difference in comparison.changes[:MOST_CHANGES]:
        lines += paragraph(plain(difference), "      ", first="  ")
    rest = len(comparison.changes) - MOST_CHANGES
    return [*lines, f"  and {rest} more"] if rest > 0 else lines


def _moved(view: View) -> list[str]:
    """How the main movements change."""
    names, told = view.page.names(40), []
    for row in view.main_rows():
        left, right = float(row.left[view.k]), float(row.right[view.k])
        by = f" ({_signed_percent(change(row, view.k))})" if left else ""
        who = called(view.comparison.right, row.part, names[row.part])
        told.append(f"{who} moves {view.value(row, left)}, then {view.value(row, right)}{by}")
    if not told:
        return []
    return paragraph(f"{view.page.heading(view.page.results.cases[view.k])}: {'; '.join(told)}.")


def _signed_percent(by: float) -> str:
    return f"{'+' if by > 0 else ''}{percent(by)}"


def _verdicts(view: View) -> list[str]:
    """Limits that both models have, before and after."""
    left = {v.limit: v for v in view.comparison.left.verdicts}
    pairs = [(left[v.limit], v) for v in view.comparison.right.verdicts if v.limit in left]
    if not pairs:
        return []

    def make(width: int, gap: int) -> list[str]:
        names = view.page.names(width)
        columns = [Column("Verdicts", "", tuple(names[v.limit] for _, v in pairs), "left")]
        for side in (0, 1):
            columns += [
                Column(f"use, {view.title(side)}", "", tuple(number(pair[side].use, "") for pair in pairs)),
                Column("", "", tuple(pair[side].word for pair in pairs), "left"),
            ]
        return table(columns, gap=gap)

    return fitting(make)
