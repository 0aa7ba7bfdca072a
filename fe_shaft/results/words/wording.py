"""How printed text says names, numbers and directions: plain ASCII, three significant digits.

Names and texts of the user are made harmless here: letters outside ASCII lose their accents or become escapes, control
characters become spaces, and long names are cut in the middle, never two alike.
"""

from __future__ import annotations

import math
import unicodedata
from collections.abc import Iterable, Sequence
from typing import TYPE_CHECKING

from fe_shaft.model.actions import gravity_in_shaft
from fe_shaft.model.loads import Coupling, Force
from fe_shaft.units import show

if TYPE_CHECKING:
    from fe_shaft.model.system import Model
    from fe_shaft.results.results import Results

_SIGNS = str.maketrans({
    "\N{MICRO SIGN}": "u", "\N{GREEK SMALL LETTER MU}": "u", "\N{DEGREE SIGN}": " deg", "\N{MIDDLE DOT}": "*",
    "\N{EN DASH}": "-", "\N{EM DASH}": "-", "\N{MINUS SIGN}": "-", "\N{PLUS-MINUS SIGN}": "+-",
    "\N{LEFT SINGLE QUOTATION MARK}": "'", "\N{RIGHT SINGLE QUOTATION MARK}": "'",
    "\N{LEFT DOUBLE QUOTATION MARK}": '"', "\N{RIGHT DOUBLE QUOTATION MARK}": '"', "\N{MULTIPLICATION SIGN}": "x",
    "\N{LATIN SMALL LETTER SHARP S}": "ss", "\N{LATIN SMALL LETTER AE}": "ae", "\N{LATIN SMALL LETTER O WITH STROKE}":
    "o", "\N{SUPERSCRIPT TWO}": "^2", "\N{SUPERSCRIPT THREE}": "^3",
})  # fmt: skip
NOTHING = 1e-9  # of the largest value of its kind: rounding, shown as 0; results hold at least 1e-11


def plain(text: str) -> str:
    """Text of the user on one line of printable ASCII."""
    if text.isascii() and text.isprintable() and "  " not in text:
        return text.strip()
    return " ".join("".join(_plain_sign(sign) for sign in text.translate(_SIGNS)).split())


def _plain_sign(sign: str) -> str:
    if " " <= sign <= "~":
        return sign
    if unicodedata.category(sign) in ("Cc", "Cf", "Zs", "Zl", "Zp"):
        return " "
    if unicodedata.combining(sign):
        return ""
    bare = unicodedata.normalize("NFKD", sign).encode("ascii", "ignore").decode()
    return bare if bare.strip() else ascii(sign)[1:-1]


class Names:
    """Names as they are printed: ASCII, at most `width` wide, no two alike.

    Parameters
    ----------
    names : all names that may be printed together
    width : longest one printed, at least 6
    """

    def __init__(self, names: Iterable[str], width: int = 24) -> None:
        self._shown: dict[str, str] = {}
        taken: set[str] = set()
        for name in sorted(names, key=lambda each: (len(plain(each)) > width, plain(each) != each)):
            self._shown[name] = _distinct(plain(name) or "?", width, taken)
            taken.add(self._shown[name])

    def __getitem__(self, name: str) -> str:
        return self._shown.get(name) or _cut(plain(name), 24)


def _distinct(name: str, width: int, taken: set[str]) -> str:
    shown, count = _cut(name, width), 2
    while shown in taken:
        mark = f"..{count}"
        shown = f"{name}{mark}" if len(name) + len(mark) <= width else _cut(name, width, f"{mark}..")
        count += 1
    return shown


def _cut(name: str, width: int, mark: str = "..") -> str:
    """A name with its middle cut out, if it is too long or has a mark of its own."""
    if len(name) <= width and mark == "..":
        return name
    keep = max(2, width - len(mark))
    head = (keep + 1) // 2
    return name[:head] + mark + name[-(keep - head) :]


def clock_hours(y: float, z: float) -> str:
    """A direction across the shaft, such as "5:34 o'clock"; y towards 12, z towards 3."""
    minutes = round(math.atan2(z, y) / (2 * math.pi) * 720) % 720
    hour, minute = minutes // 60 or 12, minutes % 60
    return f"{hour}:{minute:02d} o'clock" if minute else f"{hour} o'clock"


def is_level(model: Model, shaft: str) -> bool:
    """Whether 12 o'clock of a shaft is up in the world: gravity acts and points to its 6 o'clock."""
    pull = gravity_in_shaft(model, shaft)
    return bool(pull[1] < 0 and abs(pull[0]) + abs(pull[2]) < 1e-6 * abs(pull[1]))


def number(si: float, unit: str, *, sign: bool = False, digits: int = 3) -> str:
    """A number without its unit; with `sign`, positive ones get a plus."""
    text = show(si, unit, digits).split(" ", 1)[0]
    return f"+{text}" if sign and si > 0 and text != "0" else text


def listed(words: Sequence[str]) -> str:
    """Such as "a, b and c"."""
    return words[0] if len(words) == 1 else f"{', '.join(words[:-1])} and {words[-1]}" if words else ""


def called(results: Results, name: str, shown: str) -> str:
    """A part as the subject of a sentence: "the wheel", but a force or a coupling by its bare name."""
    return shown if isinstance(results.model[name], Force | Coupling) else f"the {shown}"
