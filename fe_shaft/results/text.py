"""What `print(results)` and the terminal show: words, then numbers, then proof."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING

from fe_shaft.results.words.case import by_hand, case_lines
from fe_shaft.results.words.comparison import comparison_lines
from fe_shaft.results.words.doubts import doubts
from fe_shaft.results.words.envelope import envelope
from fe_shaft.results.words.layout import labelled
from fe_shaft.results.words.page import Page
from fe_shaft.results.words.verdicts import answer, estimates, sources, verdict_table
from fe_shaft.results.words.wording import plain
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.notes import Note
    from fe_shaft.results.comparison import Comparison
    from fe_shaft.results.results import Results

_MOST_CASES_NAMED = 12
_MOST_ALIKE = 2  # notes on the same key


def results_text(results: Results, cases: Sequence[str] | None = None, *, sources: bool = False) -> str:
    """Results as text of at most 100 columns, plain ASCII.

    Parameters
    ----------
    results : Results
    cases : names of the cases whose tables are shown; None: the governing one, or the first without limits. The
        verdicts are over all cases in any case.
    sources : whether the sources of limits and figures are listed

    Raises
    ------
    UsageError
        An unknown case.
    """
    page = Page.of(results)
    chosen = [results.case_number(name) for name in _wanted(results, cases)]
    blocks = [answer(page), doubts(page), _verdicts(page, listed=sources)]
    if len(results.cases) > 1:
        blocks.append(envelope(page))
    blocks += [case_lines(page, k) for k in chosen]
    blocks.append(other_cases(results, chosen))
    blocks.append(_last(page, chosen[0]))
    return "\n".join("\n".join(lines) + "\n" for lines in blocks if lines).rstrip()


def comparison_text(comparison: Comparison, case: str | None = None) -> str:
    """A comparison as text of at most 100 columns, plain ASCII.

    Parameters
    ----------
    comparison : Comparison
    case : name of the case that is shown; None: the governing one, or the first without limits

    Raises
    ------
    UsageError
        An unknown case.
    """
    results = comparison.right
    k = results.case_number(case if case is not None else governing_case(results))
    first, *others = comparison_lines(comparison, k)
    blocks = [first, doubts(Page.of(results)), *others, other_cases(results, [k])]
    return "\n".join("\n".join(lines) + "\n" for lines in blocks if lines).rstrip()


def governing_case(results: Results) -> str:
    """The case in which a limit is used most; the first one without limits."""
    if not results.verdicts:
        return results.cases[0]
    return max(results.verdicts, key=lambda verdict: verdict.use).case


def _wanted(results: Results, cases: Sequence[str] | None) -> Sequence[str]:
    if not cases:
        return [governing_case(results)]
    return [cases] if isinstance(cases, str) else list(dict.fromkeys(cases))


def _verdicts(page: Page, *, listed: bool) -> list[str]:
    lines = verdict_table(page)
    if listed:
        return [*lines, *sources(page)]
    if any(verdict.source for verdict in page.results.verdicts):
        lines.append("  sources: fe-shaft solve --sources")
    return lines


def other_cases(results: Results, chosen: Sequence[int]) -> list[str]:
    """How to see the cases that are not shown."""
    others = [plain(name) for k, name in enumerate(results.cases) if k not in chosen]
    if not others:
        return []
    named = [f"--case {name}" for name in others[:_MOST_CASES_NAMED]]
    if len(others) > _MOST_CASES_NAMED:
        named.append(f"and {len(others) - _MOST_CASES_NAMED} more")
    return labelled("Other cases:", [*named, "--case all"], between=", ")


def _last(page: Page, k: int) -> list[str]:
    """Notes, balanced torques, estimates, proof, and the line to check by hand."""
    results = page.results
    estimated = [f"{what}: {', '.join(page.names(24)[name] for name in of)}" for what, of in estimates(results.model)]
    taken = [note for note in results.model.notes if note.key != "estimates"]
    balanced = [note for note in results.balances if note not in results.beyond_range]
    lines: list[str] = []
    if estimated:
        lines += labelled("Estimated", estimated)
    for label, told in (("Notes    ", _told(taken)), ("Balanced ", _told(balanced))):
        if told:
            lines += labelled(label, told)
    lines += labelled("Proof    ", [results.proof.sentence(), *_settled(results)])
    return lines + by_hand(page, k)


def _settled(results: Results) -> list[str]:
    """In how many steps the computed bearings came to rest."""
    steps = [int(each.steps.max()) for each in results.rolling.values()]
    if not steps:
        return []
    held = max(float(each.held.max()) for each in results.rolling.values())
    return [f"bearings at rest after {max(steps)} steps, floating rings held by {show(held, 'N', 1)} at most"]


def _told(notes: Sequence[Note]) -> list[str]:
    """Notes in words; of many that speak of the same key, the first ones and how many there are."""
    alike: dict[str, list[Note]] = {}
    for note in notes:
        alike.setdefault(note.key.rpartition(".")[2], []).append(note)
    told = []
    for key, group in alike.items():
        few = group if len(group) <= _MOST_ALIKE + 1 else group[:_MOST_ALIKE]
        told += [plain(str(note)) for note in few]
        if len(group) > len(few):
            told.append(f"and {len(group) - len(few)} more like this ({key})")
    return told
