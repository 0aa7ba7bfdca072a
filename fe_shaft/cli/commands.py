"""The commands: each reads, calls one verb, and hands back what is to be written."""

from __future__ import annotations

import json
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING, Any

from fe_shaft.cli.arguments import Request
from fe_shaft.errors import FileError, FreeMotionError, LoadError, UsageError, nearest, quote

if TYPE_CHECKING:
    from fe_shaft.model.system import Model
    from fe_shaft.results.comparison import Comparison
    from fe_shaft.results.results import Results
    from fe_shaft.results.verdict import Verdict

EVERY = "all"  # --case all
STARTER = Path(__file__).parents[1] / "io" / "starter.toml"


@dataclass(frozen=True)
class Outcome:
    """What a command has to say.

    Attributes
    ----------
    text : to stdout
    said : sentences to stderr
    code : exit code
    exact : whether the text is data, to be written sign by sign
    """

    text: str = ""
    said: tuple[str, ...] = ()
    code: int = 0
    exact: bool = False


def new(request: Request) -> Outcome:
    """Write the starter model."""
    from fe_shaft.files import write_whole

    target = Path(request.words[0])
    if target.exists() and not request.force:
        raise FileError(f"{target} is there already; nothing was written. Choose another name, or add --force.")
    write_whole(target, STARTER.read_text(encoding="utf-8").replace("FILE", target.name))
    name = str(target)
    shown = f'"{name}"' if " " in name else name
    return Outcome(said=(f"{name} written. Next: fe-shaft check {shown}, then fe-shaft compare {shown}",))


def check(request: Request) -> Outcome:
    """Say what was understood."""
    from fe_shaft.analysis.check import check as verb

    found = verb(_read(request))
    cases = _cases(request, [case.name for case in found.cases])
    name = request.words[0]
    said = () if found.ok else (f"{name}: it cannot be solved as it is. Exit code {found.exit_code}.",)
    if request.json:
        return Outcome(found.to_json(), said, found.exit_code, exact=True)
    return Outcome(found.text(name, cases=cases, sources=request.sources), said, found.exit_code)


def solve(request: Request) -> Outcome:
    """Solve, judge, print."""
    from fe_shaft.analysis.solve import solve as verb
    from fe_shaft.results.text import results_text

    results = verb(_read(request))
    cases = _cases(request, results.cases)
    said = [*_export(request, results), *_picture(request, results)]
    code, sentence = _judged(results.verdicts, request)
    if request.json:
        return Outcome(results.to_json(), (*said, *sentence), code, exact=True)
    text = results_text(results, cases=cases, sources=request.sources)
    return Outcome(text, (*said, *sentence), code)


def compare(request: Request) -> Outcome:
    """Hold a model against itself on rigid pins, or against another one."""
    from fe_shaft.analysis.solve import compare as verb
    from fe_shaft.results.text import comparison_text

    if len(request.words) == 1:
        comparison = verb(_read(request))
    else:
        comparison = verb(_read(request, 0, changed=False), _read(request, 1))
    cases = _cases(request, comparison.cases)
    said = [*_export(request, comparison.right, comparison)]
    said += _picture(request, comparison.right, comparison.left if comparison.is_pins else None)
    if request.json:
        return Outcome(comparison.to_json(), tuple(said), exact=True)
    shown: Sequence[str | None] = cases or [None]
    texts = [comparison_text(comparison, case) for case in shown]
    return Outcome("\n\n".join(texts), tuple(said))


def view(request: Request) -> Outcome:
    """Show the bent shafts in a window, or write a picture of them."""
    from fe_shaft.analysis.recovery import solve_once

    results = solve_once(_read(request))
    if request.picture is not None:
        return Outcome(said=tuple(_picture(request, results)))
    from fe_shaft.views import view as window

    pins, said = _pins(results)
    window(results, case=_first_case(request, results), pins=pins, quantity=request.quantity or "deflection")
    return Outcome(said=said)


def write(request: Request) -> Outcome:
    """Print or write the whole model."""
    from fe_shaft.io.model_file import write_text

    return _data(request, write_text(_read(request)))


def schema(request: Request) -> Outcome:
    """Print or write the JSON Schema of the model file."""
    from fe_shaft.model.schema import json_schema

    return _data(request, json.dumps(json_schema(), indent=2))


def explain(request: Request) -> Outcome:
    """The page of a word."""
    from fe_shaft.cli.explain import index, page

    return Outcome(page(" ".join(request.words)) if request.words else index())


COMMANDS: dict[str, Callable[[Request], Outcome]] = {
    "new": new, "check": check, "solve": solve, "compare": compare, "view": view, "write": write, "schema": schema,
    "explain": explain,
}  # fmt: skip


# ---- what several commands do


def _read(request: Request, number: int = 0, *, changed: bool = True) -> Model:
    """The model of a file, with the values of --set."""
    from fe_shaft.io.model_file import parse_setting, read

    changes: dict[str, Any] = {}
    for setting in request.settings if changed else ():
        place, value = parse_setting(setting)
        if place in changes:
            raise UsageError(f"--set {quote(place)} stands twice. Leave one out.")
        changes[place] = value
    return read(request.words[number], changes)


def _cases(request: Request, known: Sequence[str]) -> list[str] | None:
    """Names of the cases asked for; None if nobody asked."""
    if not request.cases:
        return None
    if EVERY in request.cases and EVERY not in known:
        return list(known)
    for name in request.cases:
        if name not in known:
            raise UsageError(f"no case is called {quote(name)}. {nearest(name, [*known, EVERY])}".rstrip())
    return list(dict.fromkeys(request.cases))


def _first_case(request: Request, results: Results) -> str | None:
    """The one case that a picture shows; None for the first."""
    cases = _cases(request, results.cases)
    return None if not cases or EVERY in request.cases else cases[0]


def _data(request: Request, text: str) -> Outcome:
    """Data to a file, or to stdout."""
    if request.output is None:
        return Outcome(text, exact=True)
    from fe_shaft.files import write_whole

    write_whole(request.output, text.rstrip("\n") + "\n")
    return Outcome(said=(f"{request.output} written.",))


def _export(request: Request, results: Results, comparison: Comparison | None = None) -> list[str]:
    """Everything into a folder, if one is asked for."""
    if request.output is None:
        return []
    from fe_shaft.io.export import export

    written = export(results, request.output, comparison)
    return [f"{len(written)} files written to {request.output}."]


def _picture(request: Request, results: Results, pins: Results | None = None) -> list[str]:
    """A picture, if one is asked for; pins beside bearings where the model has bearings."""
    if request.picture is None:
        return []
    from fe_shaft.views import picture

    said: tuple[str, ...] = ()
    if pins is None:
        pins, said = _pins(results)
    case, quantity = _first_case(request, results), request.quantity or "deflection"
    target = picture(results, request.picture, case=case, pins=pins, quantity=quantity)
    return [*said, f"{target} written."]


def _pins(results: Results) -> tuple[Results | None, tuple[str, ...]]:
    """The same model on rigid pins; None where it has no bearings, or pins cannot hold it."""
    from fe_shaft.analysis.recovery import solve_once
    from fe_shaft.model.support import Bearing

    if not any(isinstance(part, Bearing) for part in results.model.supports):
        return None, ()
    try:
        return solve_once(results.model.pinned()), ()
    except (FreeMotionError, LoadError) as error:
        return None, (f"No pins beside the bearings: on rigid pins, {str(error).splitlines()[0]}",)


def _judged(verdicts: Sequence[Verdict], request: Request) -> tuple[int, tuple[str, ...]]:
    """Exit code by the verdicts, and the sentence that says so."""
    words = [verdict.word for verdict in verdicts]
    failed, unsure = words.count("FAIL"), words.count("unsure")
    if request.ignore_limits or not (failed or (unsure and request.strict)):
        return 0, ()
    total = f"{len(words)} limit{'s' if len(words) > 1 else ''}"
    parts = [f"{failed} of {total} fail{'s' if failed == 1 else ''}"] if failed else []
    if unsure:
        parts.append(f"{unsure} {'is' if unsure == 1 else 'are'} unsure" if failed else f"{unsure} of {total} unsure")
    return 1, (f"{', '.join(parts)}: exit code 1.",)
