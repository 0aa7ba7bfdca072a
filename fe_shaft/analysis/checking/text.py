"""The printed text of a check: plain ASCII, at most 100 columns."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import TYPE_CHECKING

from fe_shaft.errors import WIDTH
from fe_shaft.model.case import ONLY_CASE
from fe_shaft.results.words.layout import labelled, paragraph
from fe_shaft.results.words.wording import Names, listed, plain
from fe_shaft.units import convert, show

if TYPE_CHECKING:
    from fe_shaft.analysis.check import BalanceCheck, CaseCheck, Check, LoadCheck, ShaftCheck
    from fe_shaft.model.notes import Note

HEAD = 22  # columns of the labels of the blocks at the end


def check_text(check: Check, name: str, full: Sequence[str], sources: bool) -> str:
    """All of it; `full` names the cases that are shown with every force."""
    parts = [part.name for shaft in check.shafts for part in shaft.parts]
    names = Names([*parts, *(case.name for case in check.cases)])
    lines = [*_headline(check, name)]
    for shaft in check.shafts:
        lines += ["", *_shaft(shaft, names, check.along)]
    for case in check.cases:
        lines += ["", *_case(case, names, case.name in full)]
    others = [case.name for case in check.cases if case.name not in full and not case.like]
    if others:
        shown = [plain(f"--case {other}") for other in others[:3]]
        lines += ["", *paragraph(f"Every force of the other cases: {', '.join([*shown, '--case all'])}", "  ")]
    lines.append("")
    lines += _rows("Limits", check.limits)
    if check.taken:
        lines += labelled(f"{'Not written, so taken':<{HEAD}}", [_said(note) for note in check.taken])
    lines += _rows("Estimated (~)", check.estimates)
    lines += _rows("Notes", [_said(note) for note in check.notes])
    if sources:
        lines += _rows("Sources", [f"{place}: {source}" for place, source in check.sources.items()] or ["none stated"])
    if check.obstacle:
        lines += ["", *check.obstacle.splitlines()]
    return "\n".join(line.rstrip() for line in lines).rstrip()


def _headline(check: Check, name: str) -> Iterator[str]:
    found = "valid" if check.ok else "its words are valid, but it cannot be solved"
    yield from paragraph(f"{plain(name)}: {found}. {', '.join(check.counts)}.")
    if check.title and check.title != name:
        yield from paragraph(plain(check.title))


def _shaft(shaft: ShaftCheck, names: Names, unit: str) -> Iterator[str]:
    ends = [show(each, unit).removesuffix(f" {unit}") for each in (shaft.thinnest, shaft.thickest)]
    what = [f"{show(shaft.length, unit, 4)} long"]
    what.append(f"diameter {ends[0] if ends[0] == ends[1] else ' to '.join(ends)} {unit}")
    if shaft.widest_bore:
        what.append(f"bored up to {show(shaft.widest_bore, unit)}")
    what.append(f"{shaft.segments} segment{'s' if shaft.segments > 1 else ''}")
    what.append(plain(listed(shaft.materials)))
    if shaft.mass:
        what.append(show(shaft.mass, "kg"))
    yield from paragraph(f"{', '.join(what)}", "    ", first=f"{plain(shaft.name)}  ")
    if not shaft.parts:
        yield "    nothing is on it"
        return
    wide = max(len("what"), *(len(names[part.name]) for part in shaft.parts))
    kinds = max(len("kind"), *(len(part.kind) for part in shaft.parts))
    yield f"{f'x {unit}':>8}  {'what':<{wide}}  {'kind':<{kinds}}  is"
    for part in shaft.parts:
        x = f"{convert(part.x, unit):8.{1 if unit in ('mm', 'um') else 3}f}"
        head = f"{x}  {names[part.name]:<{wide}}  {part.kind:<{kinds}}"
        yield from labelled(head, [plain(word) for word in part.words] or [""], between="; ")


def _case(case: CaseCheck, names: Names, full: bool) -> Iterator[str]:
    head = "As loaded" if case.name == ONLY_CASE else f"Case {names[case.name]}"
    yield from paragraph(plain(case.power), "    ", first=f"{head}  ")
    if case.like:
        times = "" if abs(case.factor - 1.0) < 1e-9 else f", all {case.factor:.4g} times as large"
        yield f"    forces as in {names[case.like]}{times}"
    elif full:
        yield from _loads(case.loads, names)
    several = len(case.balances) > 1
    for balance in case.balances:
        if not several or balance.thrust or balance.torque_in:
            yield from _balance(balance, several=several)


def _balance(balance: BalanceCheck, *, several: bool) -> list[str]:
    words = "  ".join(f"{word}." for word in balance.words if word)
    return paragraph(words, "    ", first=f"    {plain(balance.shaft)}: " if several else None)


def _loads(loads: Sequence[LoadCheck], names: Names) -> Iterator[str]:
    """Every load, the components of like ones in columns so that numbers stand under each other."""
    if not loads:
        yield "    nothing acts but weights"
        return
    heads = [(names[load.part], load.role, load.what) for load in loads]
    wide = [max(len(head[column]) for head in heads) for column in range(3)]
    for head, load in zip(heads, loads, strict=True):
        first = "  ".join(text.ljust(width) for text, width in zip(head, wide, strict=True) if width)
        words = _in_columns(load.words, [each.words for each in loads if each.what == load.what])
        line = f"    {first}  {' '.join(words)}".rstrip()
        if len(line) <= WIDTH:
            yield line
        else:
            yield from labelled(f"    {first}", [" ".join(word.split()) for word in words], between=" ")


def _in_columns(words: Sequence[str], like: Sequence[Sequence[str]]) -> list[str]:
    """Phrases with commas between them, each as wide as its column is in the rows `like` it, numbers to the right."""
    cells = []
    for column, (size, rest) in enumerate(_commas(words)):
        others = [_commas(row)[column] for row in like if column < len(row)]
        number, width = (max(len(other[part]) for other in others) for part in (0, 1))
        cells.append(f"{size:>{number}} {rest:<{width}}")
    return cells


def _commas(words: Sequence[str]) -> list[tuple[str, str]]:
    """Number and rest of each phrase, commas between them."""
    split = [word.partition(" ") for word in words]
    return [(size, rest + ("," if k < len(split) - 1 else "")) for k, (size, _, rest) in enumerate(split)]


def _rows(label: str, entries: Sequence[str]) -> Iterator[str]:
    """A labelled block, one entry a line."""
    for number, entry in enumerate(entries):
        head = f"{label if number == 0 else '':<{HEAD}}  "
        yield from paragraph(plain(entry), " " * len(head), first=head)


def _said(note: Note) -> str:
    """A note with its key, unless its sentence says that already."""
    said = note.key in note.sentence.replace(",", "").split() or (note.key == "mate" and "mates" in note.sentence)
    return plain(note.sentence if said else str(note))
