"""The text of ``fe_shaft/model/keywords.py``: the words of every noun as types, from the nouns' own metadata.

Run ``python -m tests.model.keywords_text`` from the top folder after a key of a noun has changed.
"""

from pathlib import Path

from fe_shaft.model.body import Body
from fe_shaft.model.clock import ClockAngle, Turning
from fe_shaft.model.contour import ContourKind
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.heading import Heading
from fe_shaft.model.helix import HelixKind
from fe_shaft.model.housing import Estimates, Housing, OutputUnits
from fe_shaft.model.hub import HubKind
from fe_shaft.model.inside import Geometry, Groove
from fe_shaft.model.kinds import Choice, Count, Factor, Flag, Kind, Name, Reference, Text
from fe_shaft.model.limit import Bound, Of
from fe_shaft.model.lists import Listed, Shares
from fe_shaft.model.loads import BeltPull, Couple
from fe_shaft.model.notes import kind_of
from fe_shaft.model.part import SpreadKind
from fe_shaft.model.position import PositionKind
from fe_shaft.model.quantity import Quantity
from fe_shaft.model.segment import Segment, ShearKind
from fe_shaft.model.shaft import Vector
from fe_shaft.model.stiffness import Matrix, MatrixUnits, Rows, Seat, Stiffness
from fe_shaft.model.weakening import Keyway, Spline
from fe_shaft.model.words import Words, holds_list, inner_noun

NOUNS: tuple[type[Words], ...] = (
    Heading, Segment, Keyway, Spline, Body, Geometry, Groove, *GROUPS.values(), Stiffness, Seat, Matrix, MatrixUnits,
    Couple, BeltPull,
    Housing, Estimates, OutputUnits,
)  # fmt: skip
TARGET = Path("fe_shaft/model/keywords.py")
HEAD = '''"""The words of every noun as types, so that editors complete them and type checkers know them.

Made by ``python -m tests.model.keywords_text`` from the nouns themselves; a test holds it against them.
"""

from collections.abc import Mapping, Sequence
from typing import Any, Literal, Protocol, Required, TypedDict

from fe_shaft.model.helix import Helix
from fe_shaft.model.position import Position
from fe_shaft.units import Value


class HasUnits(Protocol):
    """A quantity of pint, from any registry."""

    @property
    def magnitude(self) -> Any:
        """Its number."""

    @property
    def units(self) -> Any:
        """Its unit."""

    def to(self, *units: Any, **options: Any) -> Any:
        """The same in another unit."""


Number = str | Value | Mapping[str, Any] | HasUnits
Table = Mapping[str, Any]
'''


def keywords_text() -> str:
    """The whole module."""
    return "\n\n".join([HEAD, *map(_noun, NOUNS)]) + "\n"


def _noun(noun: type[Words]) -> str:
    lines = [f"class {noun.__name__}Words(TypedDict, total=False):", f'    """Words of `{noun.__name__}`."""', ""]
    for key, field in noun.model_fields.items():
        if key not in noun.positional and (noun, key) != (Heading, "title"):  # the model's first argument
            text = _type(noun, key)
            lines.append(f"    {key}: {f'Required[{text}]' if field.is_required() else text}")
    return "\n".join(lines) + "\n"


def _type(noun: type[Words], key: str) -> str:
    inner = inner_noun(noun, key)
    if inner is not None:
        return "Sequence[Any]" if holds_list(noun, key) else "Any"
    kind = kind_of(noun, key)
    assert isinstance(kind, Kind), key
    return _of_kind(kind)


def _of_kind(kind: Kind) -> str:
    if isinstance(kind, Choice):
        return f"Literal[{', '.join(map(repr, kind.words))}]".replace("'", '"')
    if isinstance(kind, Turning):
        return _of_kind(Choice(*kind.caption.split(" | ")))
    if isinstance(kind, Listed):
        return f"Sequence[{_of_kind(kind.kind)}]"
    if isinstance(kind, Shares):
        return " | ".join(["str"] * kind.word + ["Sequence[str]"] * kind.lists + ["Mapping[str, float]"])
    if isinstance(kind, Vector):
        vector = f"Sequence[{_of_kind(kind.number)}]"
        return f'Literal["{kind.word}"] | {vector}' if kind.word else vector
    simple: dict[type[Kind] | tuple[type[Kind], ...], str] = {
        (Text, Name, Reference): "str", Count: "int", Factor: "float", Flag: "bool", HelixKind: "str | Helix",
        PositionKind: "Number | Position", (Quantity, ClockAngle, SpreadKind, Bound): "Number",
        Of: "str | Sequence[str]", Rows: "Any", ShearKind: 'Literal["cowper", "none"] | float',
        HubKind: 'Literal["none", "one piece"] | float',
        ContourKind: "Sequence[Sequence[Number | None] | Table]",
    }  # fmt: skip
    return next(text for kinds, text in simple.items() if isinstance(kind, kinds))


if __name__ == "__main__":
    TARGET.write_text(keywords_text(), encoding="utf-8")
