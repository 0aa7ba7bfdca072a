"""What a wrong model tells: place and sentence of every problem."""

from collections.abc import Callable
from typing import Any

import pytest

from fe_shaft.errors import ModelError


def told(make: Callable[..., Any], *args: Any, **words: Any) -> dict[str, str]:
    """Make something wrong; the sentences by their places (several at one place joined)."""
    with pytest.raises(ModelError) as caught:
        make(*args, **words)
    sentences: dict[str, str] = {}
    for problem in caught.value.problems:
        before = f"{sentences[problem.place]} | " if problem.place in sentences else ""
        sentences[problem.place] = before + problem.sentence
    return sentences


def only(make: Callable[..., Any], *args: Any, **words: Any) -> tuple[str, str]:
    """The same where exactly one thing is wrong: its place and sentence."""
    sentences = told(make, *args, **words)
    assert len(sentences) == 1, sentences
    return next(iter(sentences.items()))
