"""From a command line to an exit code: every error becomes a sentence and a number."""

from __future__ import annotations

import os
import sys
import traceback
from collections.abc import Sequence
from pathlib import Path

from fe_shaft.cli.arguments import Request, understand
from fe_shaft.cli.output import put, say
from fe_shaft.errors import FreeMotionError, LoadError, ShaftError, UsageError

INTERRUPTED, FAULT, TOO_LARGE = 130, 70, 5


def main(argv: Sequence[str] | None = None) -> int:
    """Run one command.

    Parameters
    ----------
    argv : sequence of str or None
        Without the program's name; None takes those of the process.

    Returns
    -------
    int
        The exit code; results have gone to stdout, all else to stderr.
    """
    words = sys.argv[1:] if argv is None else argv
    try:
        return _run(words)
    except UsageError as error:
        say(f"fe-shaft: {error}")
        return error.exit_code
    except (FreeMotionError, LoadError) as error:
        say(f"{error}\nNothing was solved. Exit code {error.exit_code}.")
        return error.exit_code
    except ShaftError as error:
        say(str(error))
        return error.exit_code
    except KeyboardInterrupt:
        say("fe-shaft: interrupted.")
        return INTERRUPTED
    except MemoryError:
        say("fe-shaft: the memory of this machine is too small for this model. Exit code 5.")
        return TOO_LARGE
    except Exception as error:
        _tell_fault(error)
        return FAULT


def _run(words: Sequence[str]) -> int:
    request: Request = understand(words)
    if request.help:
        put(request.help)
        return 0
    from fe_shaft.cli.commands import COMMANDS

    outcome = COMMANDS[request.command](request)
    if outcome.text:
        put(outcome.text, exact=outcome.exact)
    for sentence in outcome.said:
        say(sentence)
    return outcome.code


def _tell_fault(error: Exception) -> None:
    """One sentence about a fault of the program; everything with FE_SHAFT_DEBUG=1."""
    if os.environ.get("FE_SHAFT_DEBUG") == "1":
        traceback.print_exception(error)
    frames = traceback.extract_tb(error.__traceback__)
    where = frames[-1] if frames else None
    place = f" at {Path(where.filename).name}:{where.lineno}" if where else ""
    say(
        f"fe-shaft: a fault of the program itself, not of your model ({type(error).__name__}{place}); please report it "
        "with the model file and this line. FE_SHAFT_DEBUG=1 shows more. Exit code 70."
    )
