"""How a refusal before the solution reads: a sentence no wider than the terminal, and below it what to write."""

from __future__ import annotations

import re
import textwrap
from collections.abc import Sequence
from typing import TYPE_CHECKING, Any

from fe_shaft.errors import WIDTH, quote
from fe_shaft.model.support import HOLDS, Bearing
from fe_shaft.results.words.wording import listed

if TYPE_CHECKING:
    from fe_shaft.model.support import Support

NO_BREAK = "\N{NO-BREAK SPACE}"
_EXAMPLES = {"radial": "93 N/um", "axial": "60 N/um", "tilt": "50 N m/mrad"}


def told(fact: str, remedy: str) -> str:
    """The sentence, and the remedy indented below it, no wider than the terminal."""
    return "\n".join(_wrapped(line) for line in (fact, *(f"  {line.strip()}" for line in remedy.split("\n"))))


def _wrapped(line: str) -> str:
    """Broken between words, but not between a number and its unit."""
    tied = re.sub(r"(?<=\d) (?=\S)", NO_BREAK, line)
    return textwrap.fill(tied, WIDTH, subsequent_indent="    ", break_long_words=False).replace(NO_BREAK, " ")


def names_of(supports: Sequence[Support]) -> str:
    """Such as "lay_left and lay_right"."""
    return listed([support.name for support in supports])


def says(supports: Sequence[Support]) -> str:
    """The verb to `names_of`."""
    return "holds" if len(supports) == 1 else "hold"


def best(supports: Sequence[Support], word: str) -> Support:
    """The support to change: the last that holds a word already, else the last."""
    with_it = [support for support in supports if word in support.holds]
    return (with_it or list(supports))[-1]


def let_hold(support: Support, word: str) -> str:
    """What to write so that a support holds more; a bearing needs a stiffness as well."""
    kept = {each for each in support.holds if not (word == "axial" and each.startswith("stops_"))}
    holds = ", ".join(quote(each) for each in HOLDS if each in kept | {word})
    return f"Write in {support.name}   holds = [{holds}]{_missing_stiffness(support, word)}"


def _missing_stiffness(support: Any, word: str) -> str:
    if not isinstance(support, Bearing) or support.stiffness is None:
        return ""
    keys = {"radial": {"radial", "up"}, "axial": {"axial"}, "tilt": {"tilt", "tilt_up"}}[word]
    return "" if support.stiffness.given & keys else f' and its stiffness.{word}, such as "{_EXAMPLES[word]}"'
