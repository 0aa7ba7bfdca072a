"""The errors fe_shaft raises, and how they read.

::

    ShaftError            70  base, never raised itself
     |- UsageError         2  a verb was used wrongly, or an extra is missing
     |- ModelError         3  the model is invalid; carries every problem found, not the first only
     |- FreeMotionError    4  something can move freely
     |- LoadError          4  a load cannot be carried, e.g. torque that does not balance
     |- SolutionError      5  no trustworthy solution: not converged, or its proof failed
     `- FileError          6  a file cannot be read or written

The number is the exit code of the command line. A message is one sentence or two: place, fact with number and unit,
remedy.
"""

import difflib
import textwrap
from collections.abc import Iterable, Sequence
from dataclasses import dataclass

WIDTH = 100  # columns of the terminal text
WIDEST_PLACE = 40  # a longer place stands on a line of its own
MOST_SHOWN = 50  # problems printed; the rest is counted


class ShaftError(Exception):
    """Base of all errors of fe_shaft; catch this one to catch them all."""

    exit_code = 70


class UsageError(ShaftError):
    """A verb was used wrongly, or an extra is not installed."""

    exit_code = 2


@dataclass(frozen=True)
class Problem:
    """One thing wrong in a model: where, and what to do about it.

    Parameters
    ----------
    place : str
        Address of the value, e.g. ``layshaft.wheel_seat.length``.
    sentence : str
        Fact and remedy, without the place.
    file : str
        File as the user named it; empty in a script.
    line : int or None
        Line in that file, counted from 1; None if unknown.
    """

    place: str
    sentence: str
    file: str = ""
    line: int | None = None

    def __str__(self) -> str:
        where = self.file if self.line is None else f"{self.file}:{self.line}"
        return f"{f'{where} {self.place}'.strip()}: {self.sentence}" if where or self.place else self.sentence


class ModelError(ShaftError):
    """The model is invalid; ``problems`` holds everything found, in the order of the file.

    Parameters
    ----------
    problems : Problem or iterable of Problem
        At least one.
    """

    exit_code = 3

    def __init__(self, problems: Problem | Iterable[Problem]) -> None:
        found = (problems,) if isinstance(problems, Problem) else tuple(problems)
        if not found:
            raise ValueError("a ModelError needs at least one problem")
        super().__init__(found)
        self.problems: tuple[Problem, ...] = tuple(sorted(found, key=_order))

    def __str__(self) -> str:
        return str(self.problems[0]) if len(self.problems) == 1 else _table(self.problems)


class FreeMotionError(ShaftError):
    """Something can move freely, so that there is no equilibrium to find."""

    exit_code = 4


class LoadError(ShaftError):
    """A load cannot be carried, e.g. torque that does not balance."""

    exit_code = 4


class SolutionError(ShaftError):
    """No trustworthy solution: the iteration did not converge, or the proof failed."""

    exit_code = 5


class FileError(ShaftError):
    """A file cannot be read or written."""

    exit_code = 6


def nearest(word: str, known: Iterable[str]) -> str:
    """The hint that ends a sentence about an unknown word: ``Nearest: wheel.``

    Parameters
    ----------
    word : str
        What was written.
    known : iterable of str
        What could have been written.

    Returns
    -------
    str
        The nearest known word; else, if there are at most eight, all of them (``Known: a, b.``); else empty.
    """
    choices = list(dict.fromkeys(known))
    lowered = {choice.lower(): choice for choice in reversed(choices)}
    close = difflib.get_close_matches(word.lower()[:100], lowered, n=1, cutoff=0.6)
    if close:
        return f"Nearest: {lowered[close[0]]}."
    return f"Known: {', '.join(choices)}." if 0 < len(choices) <= 8 else ""


def wrong_kind(verb: str, wanted: str, given: object, remedy: str) -> UsageError:
    """What to raise when a function is given something else: ``solve takes a Model, not str. Write ...``"""
    return UsageError(f"{verb} takes {wanted}, not {type(given).__name__}. {remedy}")


def quote(text: str, longest: int = 40) -> str:
    """Text of the user in double quotes, fit to be printed: cut, control characters as escapes.

    Parameters
    ----------
    text : str
        Anything.
    longest : int
        Characters shown before the text is cut and ends in ``...``.

    Returns
    -------
    str
        One line, quotes included.
    """
    shown = text if len(text) <= longest else text[: longest - 3] + "..."
    return '"' + "".join(sign if sign.isprintable() else ascii(sign)[1:-1] for sign in shown) + '"'


def _order(problem: Problem) -> tuple[str, float]:
    """Sorting key: by file, then line; problems without a line keep their order behind the others."""
    return problem.file, float("inf") if problem.line is None else problem.line


def _table(problems: Sequence[Problem]) -> str:
    """Several problems as the terminal shows them: a headline, then aligned lines, at most 100 columns."""
    files = {problem.file for problem in problems}
    name = f"{problems[0].file}: " if len(files) == 1 and problems[0].file else ""
    lines = [f"{name}{len(problems)} errors, nothing solved."]
    shown = problems[:MOST_SHOWN]
    marks = [_mark(problem, several_files=len(files) > 1) for problem in shown]
    mark_width = max(map(len, marks))
    place_width = min(WIDEST_PLACE, max(len(problem.place) for problem in shown))
    for mark, problem in zip(marks, shown, strict=True):
        head = f"  {mark:<{mark_width}}  " if mark_width else "  "
        lines += _rows(head, problem, place_width)
    if len(problems) > len(shown):
        lines.append(f"  and {len(problems) - len(shown)} more.")
    return "\n".join(lines)


def _mark(problem: Problem, *, several_files: bool) -> str:
    """File and line before a place: ``:12``, or ``drive.toml:12`` if the problems lie in several files."""
    line = "" if problem.line is None else f":{problem.line}"
    return problem.file + line if several_files else line


def _rows(head: str, problem: Problem, place_width: int) -> list[str]:
    """One problem, wrapped so that its sentence keeps to its own column."""
    indent = " " * (len(head) + place_width + 4)
    sentence = _wrap(problem.sentence, max(30, WIDTH - len(indent)))
    if len(problem.place) > place_width:
        return [head + problem.place, *(indent + row for row in sentence)]
    first = f"{head}{problem.place:<{place_width}}    {sentence[0]}".rstrip()
    return [first, *(indent + row for row in sentence[1:])]


def _wrap(sentence: str, width: int) -> list[str]:
    """Lines of a sentence; a remark in brackets at its end is not torn if it can have a line of its own."""
    fact, bracket, remark = sentence.partition(" (")
    parts = [fact, f"({remark}"] if len(sentence) > width and bracket and remark.endswith(")") else [sentence]
    rows = [row for part in parts for row in textwrap.wrap(part, width, break_on_hyphens=False)]
    return rows or [""]
