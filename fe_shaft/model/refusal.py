"""How a mistake travels through validation: as the sentence the user reads."""

from collections.abc import Mapping
from typing import Any

from pydantic_core import PydanticCustomError


def refuse(sentence: str) -> PydanticCustomError:
    """The exception that carries a sentence through pydantic unchanged."""
    return PydanticCustomError("said", "{sentence}", {"sentence": sentence})


def sentence_of(context: Mapping[str, Any] | None, kind: str) -> str:
    """The sentence inside a validation error."""
    return str((context or {}).get("sentence", f"this cannot be read ({kind})."))
