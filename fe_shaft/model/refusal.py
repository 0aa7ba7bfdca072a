"""How a mistake travels through validation: as the sentence the user reads."""

from collections.abc import Mapping
from typing import Any

from pydantic_core import PydanticCustomError

from fe_shaft.errors import Problem


def refuse(sentence: str) -> PydanticCustomError:
    """The exception that carries a sentence through pydantic unchanged."""
    return PydanticCustomError("said", "{sentence}", {"sentence": sentence})


def sentence_of(context: Mapping[str, Any] | None, kind: str) -> str:
    """The sentence inside a validation error."""
    return str((context or {}).get("sentence", f"this cannot be read ({kind})."))


def problem(place: str, sentence: str, file: str = "", line: int | None = None) -> Problem:
    """A problem whose place and sentence are fit to be printed, whatever the user wrote into names and keys."""
    return Problem(_printable(place), _printable(sentence), file, line)


def _printable(text: str) -> str:
    return text if text.isprintable() else "".join(sign if sign.isprintable() else ascii(sign)[1:-1] for sign in text)
