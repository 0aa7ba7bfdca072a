"""What pins hold, and which reactions and movements care about what is estimated."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import TYPE_CHECKING

from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.results.words.layout import paragraph
from fe_shaft.results.words.verdicts import mix_words
from fe_shaft.results.words.view import MOST_TOLD, REACTIONS, SAME, WORDS, View, percent
from fe_shaft.results.words.wording import listed, number

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Row

MOST_NAMED = 6  # parts in one sentence
CARES = 0.05  # relative: a reaction that changes less over the estimates hardly cares


def holds(view: View) -> str:
    """Such as "Pins hold: lay_left radial; lay_right radial, axial. No pin holds tilt."."""
    supports = view.comparison.left.model.supports
    names = view.page.names(24)
    told = "; ".join(f"{names[s.name]} {', '.join(s.holds)}" for s in supports)
    return f"Pins hold: {told}.{'' if any('tilt' in s.holds for s in supports) else ' No pin holds tilt.'}"


def cares(view: View) -> list[str]:
    """Which reactions and which movements hang on what is estimated."""
    statics = " ".join([*_indeterminate(view), *_same_reactions(view)])
    if view.comparison.mixes is None:
        return [*paragraph(statics, "  ", first=""), "Nothing is estimated, so there is no band."]
    lines = []
    if len(view.comparison.mixes.corners) > 2:
        lines += [line for sentence in _worst_mixes(view) for line in paragraph(sentence, "  ", first="")]
    lines += paragraph(f"{statics} {_reactions(view)}".strip(), "  ", first="")
    return lines + paragraph(_movements(view), "  ", first="")


def _worst_mixes(view: View) -> Iterator[str]:
    """Which mix is the worst for what."""
    told: dict[str, dict[str, list[str]]] = {}
    for row in view.rows:
        if view.spread(row) > SAME:
            of = told.setdefault(mix_words(view.page, row.worst_mix[view.k]), {})
            of.setdefault(WORDS[row.quantity], []).append(view.page.names(24)[row.part])
    for mix, of in told.items():
        yield f"Worst mix {mix}: {'; '.join(f'{what} of {_few(names)}' for what, names in of.items())}."
    mixes = view.comparison.mixes
    if mixes is not None and not mixes.complete:
        yield f"({len(mixes.corners)} mixes solved: all alike, and each estimate alone against the others.)"


def _few(names: Sequence[str]) -> str:
    """Names in a sentence, the first ones of many."""
    return listed(names if len(names) <= MOST_NAMED else [*names[:MOST_NAMED], f"{len(names) - MOST_NAMED} more"])


def _indeterminate(view: View) -> Iterator[str]:
    """Shafts whose reactions statics alone gives on pins, and those where it does not."""
    model, right, names = view.comparison.left.model, view.comparison.right, view.page.names(24)
    decided: list[str] = []
    tilting = False
    for shaft in view.page.on:
        on = [s for s in model.supports if model.places[s.name].shaft == shaft]
        radial = [s for s in on if "radial" in s.holds]
        clamps = [s for s in on if "tilt" in s.holds]
        if len(radial) + len(clamps) > 2:
            also = f" and {len(clamps)} {'hold' if len(clamps) > 1 else 'holds'} tilt" if clamps else ""
            yield f"{names[shaft]} is statically indeterminate: {len(radial)} supports hold it radially{also}."
        elif len(radial) == 2:
            decided.append(names[shaft])
            tilting |= any(right.parts[s.name].wrench[view.k, 4:].any() for s in on)  # type: ignore[attr-defined]
    if decided:
        rest = ", but for what tilt stiffness carries" if tilting else ""
        yield f"Two supports hold {listed(decided)} radially: statics decides{rest}."


def _same_reactions(view: View) -> Iterator[str]:
    """That no reaction differs, where the table has none."""
    if not any(row.quantity in REACTIONS for row in view.rows):
        yield "Reactions are the same on pins and on bearings."


def _reactions(view: View) -> str:
    """Such as "Reactions do not care about the estimates."."""
    rows = [row for row in view.comparison.rows if row.quantity in ("radial_force", "axial_force")]
    largest = max((abs(float(row.right[view.k])) for row in rows), default=0.0)
    rows = [row for row in rows if abs(row.right[view.k]) > 1e-3 * largest]
    if not rows:
        return "No support carries anything."
    caring = sorted((row for row in rows if view.spread(row) >= CARES), key=view.spread, reverse=True)
    if not caring:
        most = max(map(view.spread, rows))
        if most <= SAME:
            return "Reactions do not care about the estimates."
        return f"Reactions hardly care about the estimates: none changes by more than {percent(most)}."
    return f"Reactions that care about the estimates: {_ranges(view, caring)}."


def _movements(view: View) -> str:
    """Such as "Movements that care most: wheel slope 0.134 mrad (0.106 to 0.519), ..."."""
    rows = [row for row in view.rows if row.quantity not in REACTIONS and row.right[view.k]]
    rows = [row for row in rows if abs(row.right[view.k]) > 1e-3 * view.largest[QUANTITIES[row.quantity].dimension]]
    caring = sorted((row for row in rows if view.spread(row) > SAME), key=view.spread, reverse=True)
    if not caring:
        return "Movements do not care about the estimates."
    chosen = []
    for quantity in dict.fromkeys(row.quantity for row in caring):  # the two that care most of every kind
        chosen += [row for row in caring if row.quantity == quantity][: MOST_TOLD // 2]
    return f"Movements that care most about them: {_ranges(view, chosen[: 2 * MOST_TOLD])}."


def _ranges(view: View, rows: Sequence[Row]) -> str:
    told = []
    for row in rows[: 2 * MOST_TOLD]:
        low, high = view.band(row)
        unit = view.page.shown.unit(row.quantity)
        what = f"{view.page.names(24)[row.part]} {WORDS[row.quantity]}"
        told.append(f"{what} {view.value(row, float(row.right[view.k]))} ({number(low, unit)} to {number(high, unit)})")
    return ", ".join(told)
