"""Where words go: results to stdout, all else to stderr; pipes that break, disks that are full, colour on terminals."""

from __future__ import annotations

import os
import re
import sys
from typing import TextIO

from fe_shaft.errors import FileError

_COLOURS = {"FAIL": "1;31", "unsure": "33", "pass": "32"}
_WORDS = re.compile(r"\b(?:FAIL|unsure)\b|\bpass$", re.MULTILINE)


def put(text: str, *, exact: bool = False) -> None:
    """Write a result to stdout, with an end of line.

    A reader that has gone away (``| head``) is no error; the rest is dropped.

    Parameters
    ----------
    text : str
    exact : bool
        Whether it is data (a model file, JSON): UTF-8 on every system and never coloured.

    Raises
    ------
    FileError
        It cannot be written.
    """
    stream = sys.stdout
    if stream is None:
        raise FileError("the results cannot be written: the output is closed.")
    if hasattr(stream, "reconfigure"):
        stream.reconfigure(**({"encoding": "utf-8"} if exact else {}), errors="backslashreplace")
    try:
        stream.write((text if exact else coloured(text, stream)).rstrip("\n") + "\n")
        stream.flush()
    except BrokenPipeError:
        _into_nothing(stream)
    except (OSError, ValueError) as error:
        _into_nothing(stream)
        reason = getattr(error, "strerror", None) or str(error)
        raise FileError(f"the results cannot be written: {reason.lower()}.") from None


def say(text: str) -> None:
    """Write a sentence to stderr; control characters of file names as escapes."""
    if sys.stderr is None:
        return
    safe = "".join(sign if sign.isprintable() or sign in "\n" else ascii(sign)[1:-1] for sign in text)
    try:
        sys.stderr.write(f"{safe}\n")
        sys.stderr.flush()
    except (OSError, ValueError):
        _into_nothing(sys.stderr)


def coloured(text: str, stream: TextIO) -> str:
    """The text with its verdict words in colour, on a terminal that wants colour."""
    if os.environ.get("NO_COLOR") or os.environ.get("TERM") == "dumb" or not stream.isatty():
        return text
    return _WORDS.sub(lambda found: f"\x1b[{_COLOURS[found[0]]}m{found[0]}\x1b[0m", text)


def _into_nothing(stream: TextIO) -> None:
    """Let what is still waiting go nowhere, so that the end of the program does not complain again."""
    try:
        nothing = os.open(os.devnull, os.O_WRONLY)
        os.dup2(nothing, stream.fileno())
        os.close(nothing)
    except (OSError, ValueError):
        return
