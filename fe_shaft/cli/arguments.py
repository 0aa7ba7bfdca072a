"""From the words of a command line to a request: help, and the sentence about anything that is not understood.

Nothing heavy is imported here, so that help comes at once.
"""

from __future__ import annotations

import argparse
import re
import textwrap
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, NoReturn

from fe_shaft.cli.catalogue import COMMANDS, OPTIONS
from fe_shaft.errors import WIDTH, UsageError, nearest, quote

CODES = """exit codes
  0 done   1 a limit is exceeded   2 wrong use   3 the model has errors   4 something can move freely
  or a load cannot be carried   5 no trustworthy solution   6 a file cannot be read or written
  70 a fault of the program   130 interrupted"""
CAUTION = """Results support, and do not replace, the judgement of a qualified engineer; local codes and licensed
practice come first."""


@dataclass(frozen=True)
class Request:
    """A command line, understood."""

    command: str
    words: tuple[str, ...] = ()
    settings: tuple[str, ...] = ()
    cases: tuple[str, ...] = ()
    output: str | None = None
    picture: str | None = None
    quantity: str | None = None
    json: bool = False
    sources: bool = False
    strict: bool = False
    ignore_limits: bool = False
    force: bool = False
    help: str = ""


def understand(argv: Sequence[str]) -> Request:
    """Read a command line.

    Returns
    -------
    Request
        Its `help` holds the text if help or the version was asked for.

    Raises
    ------
    UsageError
        With the nearest right word.
    """
    first, *rest = argv or [""]
    if first in ("-h", "--help", "help", "--version"):
        if first == "help" and rest:
            return Request("help", help=_parser(_command(rest[0])).format_help())
        return Request("help", help=_version() if first == "--version" else root_help())
    name = _command(first)
    parser = _parser(name)
    end = rest.index("--") if "--" in rest else len(rest)
    found, strange = parser.parse_known_intermixed_args(rest[:end])
    for word in strange:
        raise UsageError(_strange(name, word))
    found.words += rest[end + 1 :]
    request = _request(name, vars(found))
    if not request.help:
        _count(name, request.words)
        if request.strict and request.ignore_limits:
            raise UsageError("--strict and --ignore-limits exclude each other. Leave one out.")
    return request


def _request(name: str, found: dict[str, Any]) -> Request:
    """What a parser found; options that the command does not have stay as they are left out."""
    given: dict[str, Any] = {key: value for key, value in found.items() if value is not None}
    given |= {key: tuple(value) for key, value in given.items() if isinstance(value, list)}
    return Request(name, **given)


def root_help() -> str:
    """Help without a command."""
    wide = max(len(f"{name} {command.needs}") for name, command in COMMANDS.items())
    rows = [f"  {f'{name} {command.needs}':<{wide}}  {command.line}" for name, command in COMMANDS.items()]
    return "\n".join([
        "usage: fe-shaft COMMAND [FILE] [options]",
        "",
        "How far shafts, gears and bearings move under their loads.",
        "",
        "commands",
        *rows,
        "",
        "  fe-shaft COMMAND --help   the options of one command",
        "  fe-shaft --version",
        "",
        "to begin",
        "  fe-shaft new shaft.toml",
        "  fe-shaft check shaft.toml",
        "  fe-shaft compare shaft.toml",
        "",
        CODES,
        "",
        CAUTION,
    ])  # fmt: skip


def _version() -> str:
    from fe_shaft.version import VERSION

    return f"fe_shaft {VERSION}"


def _command(word: str) -> str:
    """The command, or the sentence about a word that is none."""
    if word in COMMANDS:
        return word
    if not word:
        raise UsageError(f"which command? One of {', '.join(COMMANDS)}. `fe-shaft --help` says more.")
    if word.startswith("-"):
        known = {flag for option in OPTIONS.values() for flag in option.flags}
        hint = "fe-shaft solve FILE" if word.split("=")[0] not in known else f"fe-shaft solve FILE {word}"
        raise UsageError(f"{quote(word)} stands before the command. Write {hint}.")
    if word.endswith(".toml"):
        raise UsageError(f"what about {quote(word)}? Write fe-shaft solve {word}, or check, compare, view.")
    raise UsageError(f"no command is called {quote(word)}. {_near(word, COMMANDS)}")


def _near(word: str, known: Sequence[str] | dict[str, Any]) -> str:
    """The nearest right word, or all of them."""
    hint = nearest(word, known)
    return hint or f"Known: {', '.join(known)}."


class _Parser(argparse.ArgumentParser):
    """A parser that raises and says its own sentences."""

    def error(self, message: str) -> NoReturn:
        raise UsageError(_said(message))


class _Formatter(argparse.RawDescriptionHelpFormatter):
    """Wide enough for the longest option, within 100 columns."""

    def __init__(self, prog: str) -> None:
        super().__init__(prog, max_help_position=28, width=WIDTH)


class _Help(argparse.Action):
    """``--help`` as a value, so that it is written like every other result."""

    def __call__(self, parser: argparse.ArgumentParser, namespace: argparse.Namespace, *_: Any) -> None:
        namespace.help = parser.format_help()


def _parser(name: str) -> _Parser:
    """The parser of one command."""
    command = COMMANDS[name]
    parser = _Parser(
        prog=f"fe-shaft {name}",
        usage=f"fe-shaft {f'{name} {command.needs}'.rstrip()} [options]",
        description="\n".join(textwrap.wrap(" ".join(command.about.split()), WIDTH)),
        epilog=f"example\n  {command.example}",
        formatter_class=_Formatter,
        allow_abbrev=False,
        add_help=False,
    )
    parser.add_argument("words", nargs="*", help=argparse.SUPPRESS)
    options = parser.add_argument_group("options")
    for key in command.options:
        OPTIONS[key].add_to(options)
    options.add_argument("-h", "--help", action=_Help, nargs=0, default="", help="show this")
    return parser


def _said(message: str) -> str:
    """A finding of argparse in our words."""
    match = re.fullmatch(r"argument (\S+?)(?:/\S+)?: expected one argument", message)
    if match:
        option = next(option for option in OPTIONS.values() if match[1] in option.flags)
        return f"{match[1]} needs a value. Write {option.example}."
    match = re.fullmatch(r"argument (\S+?)(?:/\S+)?: ignored explicit argument (.*)", message)
    if match:
        return f"{match[1]} takes no value. Write {match[1]} alone."
    return f"{message}. `fe-shaft --help` says more."


def _strange(name: str, word: str) -> str:
    """The sentence about a word that is left over."""
    flag = word.split("=")[0]
    own = [each for key in COMMANDS[name].options for each in OPTIONS[key].flags if each.startswith("--")]
    if any(flag in option.flags for option in OPTIONS.values()):
        where = [each for each, command in COMMANDS.items() if any(flag in OPTIONS[k].flags for k in command.options)]
        return f"{name} has no option {flag}; {', '.join(where)} {'have' if len(where) > 1 else 'has'} it."
    return f"{name} has no option {quote(flag)}. {_near(flag, [*own, '--help'])}"


def _count(name: str, words: tuple[str, ...]) -> None:
    """Too few or too many files."""
    command = COMMANDS[name]
    if len(words) < command.least:
        raise UsageError(f"{name} of which file? Write {command.example}.")
    if len(words) > command.most:
        extra = words[command.most]
        what = "two files at most" if command.most == 2 else "one file" if command.most == 1 else "no file"
        raise UsageError(f"{name} takes {what}; {quote(extra)} is too many. Write {command.example}.")
