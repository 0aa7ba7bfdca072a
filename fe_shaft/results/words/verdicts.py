"""Verdicts in words and as a table: the first sentence of every printed result."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import TYPE_CHECKING

import numpy as np

from fe_shaft.model.estimates import Estimate, estimates_of
from fe_shaft.model.gear import Gear
from fe_shaft.model.hub import NONE, ONE_PIECE
from fe_shaft.results.extremes import largest_along
from fe_shaft.results.words.layout import Column, fitting, labelled, paragraph, table
from fe_shaft.results.words.wording import listed, number, plain
from fe_shaft.units import Value, show

if TYPE_CHECKING:
    from fe_shaft.model.system import Model
    from fe_shaft.results.verdict import Verdict
    from fe_shaft.results.words.page import Page

#: Verb and what follows the value, by quantity.
_VERB = {
    "deflection": ("deflects", ""),
    "up": ("moves", " up or down (12 or 6 o'clock)"),
    "front": ("moves", " to the front or back (3 or 9 o'clock)"),
    "axial": ("moves", " along the shaft"),
    "separation": ("moves", " from or towards its mate"),
    "tangential": ("moves", " along its pitch circle"),
    "slope": ("slopes", ""),
    "twist": ("twists", ""),
    "tilt": ("tilts", ""),
    "force": ("carries", ""),
}
SAME = 5e-4  # relative: no difference in three digits
_UNJUDGED = "No limit is written, so nothing is judged."


def usual_bands(model: Model) -> bool:
    """Whether every estimate reaches from half to twice."""
    return all(each.usual for each in estimates_of(model))


def estimates(model: Model) -> list[tuple[str, list[str]]]:
    """What is estimated, with its band, and the things for which it is: ("radial ~93 N/um", ["lay_left"])."""
    found: dict[str, list[str]] = {}
    for each in estimates_of(model):
        found.setdefault(plain(f"{each.key} {each.value} ({band_words(each)})"), []).append(each.thing)
    return list(found.items())


def band_words(each: Estimate) -> str:
    """The band of an estimate: "half to twice", "33 to 38 mm", "none to one piece"."""
    if each.usual:
        return "half to twice"
    if each.ends:
        return each.ends
    low, high = each.value.low or 0.0, each.value.high or 0.0
    return f"{number(low, each.unit)} to {show(high, each.unit)}"


# ---- the first sentence


def answer(page: Page) -> list[str]:
    """What the reader wants to know first."""
    verdicts = page.results.verdicts
    if not verdicts:
        return paragraph(f"{_largest(page)} {_UNJUDGED}")
    fails = sorted((v for v in verdicts if v.word == "FAIL"), key=lambda v: -v.use)
    unsure = [v for v in verdicts if v.word == "unsure"]
    passes = [v for v in verdicts if v.word == "pass"]
    if fails:
        told = [f"{_fact(page, fails[0])}: FAIL."]
        if len(fails) > 1:
            told.append(f"{len(fails)} of {len(verdicts)} limits fail.")
    elif unsure:
        worst = max(unsure, key=lambda v: v.band.worst_use if v.band else 0.0)
        told = [f"{_fact(page, worst)}: passes as given, but not over the band of what is estimated: unsure."]
        unsure = [v for v in unsure if v is not worst]
    else:
        nearest = max(passes, key=lambda v: v.use)
        if len(passes) == 1:
            return paragraph(f"{_fact(page, nearest)}: pass.")
        every = "Both limits pass" if len(passes) == 2 else f"All {len(passes)} limits pass"
        return paragraph(f"{every}; nearest to its limit: {_fact(page, nearest)}.")
    others = len(verdicts) > 1
    if unsure:
        told.append(f"{_count(len(unsure), others)} as given, but {_hang(len(unsure))} on what is estimated: unsure.")
    if passes:
        told.append(f"{_count(len(passes), others)}.")
    return paragraph("  ".join(told))


def _count(n: int, others: bool) -> str:
    return f"{n} {'other ' * others}limit{'s' * (n > 1)} {'pass' if n > 1 else 'passes'}"


def _hang(n: int) -> str:
    return "hang" if n > 1 else "hangs"


def _fact(page: Page, verdict: Verdict) -> str:
    """Such as "wheel deflects 36.2 um in case running; 20 um is allowed"."""
    unit = page.shown.unit(verdict.quantity)
    part, case, value = page.names(40)[verdict.part], page.in_case(verdict.case), show(verdict.value, unit)
    if verdict.most is not None and verdict.least is not None:  # here the sign counts
        return f"{part}.{verdict.quantity} is {value}{case}; {_bounds(verdict, unit)} is allowed"
    verb, rest = _VERB[verdict.quantity]
    if verdict.most is not None:
        return f"{part} {verb} {value}{rest}{case}; {show(verdict.most, unit)} is allowed"
    return f"{part} {verb} {value}{rest}{case}; at least {show(verdict.least or 0.0, unit)} is asked for"


def _largest(page: Page) -> str:
    """The largest movement of a part, else of a shaft, where nothing is judged."""
    results, names = page.results, page.names(40)
    found = {name: np.asarray(results.parts[name].deflection) for of in page.on.values() for name in of}
    name = max(found, key=lambda each: float(found[each].max()), default="")
    if name and found[name].any():
        k = int(found[name].argmax())
        most = ", the most of all parts" if len(found) > 1 else ""
        moved = show(float(found[name][k]), page.shown.length)
        return f"{names[name]} deflects {moved}{page.in_case(results.cases[k])}{most}."
    along = {shaft: largest_along(line, "deflection") for shaft, line in results.lines.items()}
    shaft = max(along, key=lambda each: float(along[each][0].max()))
    values, places = along[shaft]
    k = int(values.argmax())
    if values[k] == 0.0:
        return "Nothing moves across its axis."
    moved, place = show(float(values[k]), page.shown.length), show(float(places[k]), page.shown.along)
    return f"{names[shaft]} deflects {moved} at {place} from its left end{page.in_case(results.cases[k])}."


# ---- the table


def verdict_table(page: Page) -> list[str]:
    """One row a limit; beneath it what the shaft alone would do, and who is soft and who stiff in the worst mix."""
    verdicts = page.results.verdicts
    if not verdicts:
        return []
    lines = fitting(lambda width, gap: _with_alone(page, verdicts, table(_columns(page, verdicts, width), gap=gap)))
    return lines + _mixes(page, verdicts)


def _columns(page: Page, verdicts: Sequence[Verdict], width: int) -> list[Column]:
    names = page.names(width)
    units = [page.shown.unit(v.quantity) for v in verdicts]
    columns = [
        Column("Verdicts", "", tuple(names[v.limit] for v in verdicts), "left"),
        Column("", "", tuple(names[v.part] for v in verdicts), "left"),
        Column("value", "", tuple(show(v.value, unit) for v, unit in zip(verdicts, units, strict=True)), "right"),
        Column("limit", "", tuple(_bounds(v, unit) for v, unit in zip(verdicts, units, strict=True)), "right"),
        Column("use", "", tuple(number(v.use, "") for v in verdicts)),
    ]
    if len(page.results.cases) > 1:
        columns.append(Column("case", "", tuple(names[v.case] for v in verdicts), "left"))
    if any(verdict.band is not None for verdict in verdicts):
        head = "half..twice" if usual_bands(page.results.model) else "low..high"
        bands = list(zip([verdict.band for verdict in verdicts], units, strict=True))
        ends = ["" if b is None else f"{number(b.all_low, u)}..{number(b.all_high, u)}" for b, u in bands]
        worst = ["" if b is None else number(b.worst, u) for b, u in bands]
        columns += [Column(head, "", tuple(ends), "left"), Column("worst mix", "", tuple(worst), "left")]
    columns.append(Column("", "", tuple(v.word for v in verdicts), "left"))
    return columns


def _bounds(verdict: Verdict, unit: str) -> str:
    if verdict.most is None:
        return f">= {show(verdict.least or 0.0, unit)}"
    if verdict.least is None:
        return show(verdict.most, unit)
    return f"{number(verdict.least, unit)} to {show(verdict.most, unit)}"


def _with_alone(page: Page, verdicts: Sequence[Verdict], lines: list[str]) -> list[str]:
    """The rows of a table with a line beneath each verdict that hangs on its bearings."""
    out = lines[:1]
    for verdict, line in zip(verdicts, lines[1:], strict=True):
        out.append(line)
        part = page.results.model[verdict.part]
        alone = "shaft and gear body alone" if isinstance(part, Gear) and part.body is not None else "shaft alone"
        told = list(_parts_of(verdict, page.shown.unit(verdict.quantity), alone))
        if told:
            out += labelled("  ", [f"counting {verdict.counting}", *told], between="; ")
    return out


def _parts_of(verdict: Verdict, unit: str, what: str) -> Iterator[str]:
    """What of a value is the shaft's and what the shoulders', where either differs in three digits."""
    alone, shoulders = verdict.shaft_alone, verdict.by_shoulders
    if alone is not None and abs(alone - verdict.value) > SAME * abs(verdict.value):
        yield f"{what} (rigid pins): {show(alone, unit)}, use {number(verdict.use_of(alone), '')}"
    if shoulders is not None and abs(shoulders) > SAME * abs(verdict.value):
        yield f"shoulders: {number(shoulders, unit, sign=True)} {unit}"
    if verdict.hubs is not None and abs(verdict.hubs[0] - verdict.hubs[1]) > SAME * abs(verdict.value):
        none, one_piece = verdict.hubs
        yield f"hubs {NONE} to {ONE_PIECE}: {number(none, unit)} to {show(one_piece, unit)}"


def _mixes(page: Page, verdicts: Sequence[Verdict]) -> list[str]:
    """Who is soft and who is stiff in the worst mix of each limit."""
    told: dict[str, list[str]] = {}
    for verdict in verdicts:
        if verdict.band is not None:
            told.setdefault(mix_words(page, verdict.band.mix), []).append(page.names(24)[verdict.limit])
    if not told:
        return []
    if len(told) == 1:
        return paragraph(f"worst mix: {next(iter(told))}", "    ", first="  ")
    return [
        line for mix, of in told.items() for line in paragraph(f"worst mix of {listed(of)}: {mix}", "    ", first="  ")
    ]


def mix_words(page: Page, mix: str) -> str:
    """A mix such as "lay_left stiff, lay_right soft", shorter where all are at the same end."""
    ends = [each.rsplit(" ", 1) for each in mix.split(", ")]
    words = {end for _, end in ends}
    if len(words) == 1:
        return f"all {words.pop()}" if len(ends) > 1 else mix
    fewer = min(words, key=lambda word: sum(end == word for _, end in ends))
    if len(ends) > 4:
        alone = [page.names(24)[name] for name, end in ends if end == fewer]
        return f"{listed(alone)} {fewer}, all others {(words - {fewer}).pop()}"
    return ", ".join(f"{page.names(24)[name]} {end}" for name, end in ends)


def sources(page: Page) -> list[str]:
    """Where limits, stiffnesses, materials and parts come from, as the model says."""
    rows = list(_sources(page))
    if not rows:
        return ["Sources", "  none is written in the model"]
    return ["Sources", *(line for place, text in rows for line in paragraph(f"{place}: {text}", "      ", first="  "))]


def _sources(page: Page) -> list[tuple[str, str]]:
    model, names = page.results.model, page.names(40)
    found: list[tuple[str, str]] = [(names[v.limit], v.source) for v in page.results.verdicts if v.source]
    for part in (*model.shafts, *model.parts_on_shafts):
        found += [(names[part.name], part.source)] if part.source else []
        for key in ("stiffness", "matrix", "seat"):
            inner = getattr(part, key, None)
            if inner is None:
                continue
            found += [(f"{names[part.name]}.{key}", inner.source)] if inner.source else []
            found += [
                (f"{names[part.name]}.{key}.{field}", value.source)
                for field, value in vars(inner).items()
                if isinstance(value, Value) and value.source
            ]
    found += [(f"material {plain(name)}", one.source) for name, one in model.materials.items() if one.source]
    return [(place, plain(text)) for place, text in found]
