"""Following positions to the end: where every part stands on its shaft."""

from __future__ import annotations

from collections.abc import Iterable, Mapping

from fe_shaft.errors import nearest, quote
from fe_shaft.model.kinds import unknown_name
from fe_shaft.model.part import Heavy, Part
from fe_shaft.model.position import Place, Position
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.words import Fault
from fe_shaft.units import show

ROUNDING = 1e-9  # of the shaft's length: what sums of lengths may miss an end by


class Placing:
    """The places of all parts, each found once; what cannot be found is a fault, or rests on one already told.

    Parameters
    ----------
    shafts : mapping
        Shafts by name.
    parts : mapping
        Parts on shafts by name.
    removed : iterable of str
        Names that a variant took away.
    """

    def __init__(self, shafts: Mapping[str, Shaft], parts: Mapping[str, Part], removed: Iterable[str] = ()) -> None:
        self.shafts, self.parts, self.removed = shafts, parts, frozenset(removed)
        self.faults: list[Fault] = []
        self._places: dict[str, Place | None] = {}
        self._waiting: list[str] = []
        self._ends = {name: None if _broken(shaft) else shaft.ends for name, shaft in shafts.items()}

    def all(self) -> dict[str, Place]:
        """Place every part."""
        found = {name: self.place(name) for name in self.parts}
        return {name: place for name, place in found.items() if place is not None}

    def shaft_of(self, part: Part) -> str | None:
        """Name of the shaft a part is on, if that can be told."""
        if part.on is not None:
            return part.on if part.on in self.shafts else None
        return next(iter(self.shafts)) if len(self.shafts) == 1 and "on" not in part.given else None

    def place(self, name: str) -> Place | None:
        """The place of one part, following those it stands on."""
        if name in self._places:
            return self._places[name]
        part = self.parts[name]
        if name in self._waiting:
            chain = [*self._waiting[self._waiting.index(name) :], name]
            steps = " -> ".join(chain)
            self._tell(
                part, part.placed_by or "at", f"positions go round in a circle: {steps}. Give one of them a length."
            )
            return None
        self._waiting.append(name)
        place = self._find(part)
        self._waiting.pop()
        self._places[name] = place
        return place

    def _find(self, part: Part) -> Place | None:
        shaft, key = self.shaft_of(part), part.placed_by
        if shaft is None or key is None or (position := getattr(part, key)) is None:
            return None
        at = self.follow(position, shaft, part, key)
        if at is None:
            return None
        width = self.width(part, shaft)
        x = at + {"at": 0.0, "left_at": 0.5, "right_at": -0.5}[key] * width
        return self._on_shaft(part, key, shaft, x, width)

    def _on_shaft(self, part: Part, key: str, shaft: str, x: float, width: float) -> Place | None:
        ends = self._ends[shaft]
        assert ends is not None
        length = float(ends[-1])
        if not -ROUNDING * length <= x <= length * (1 + ROUNDING):
            self._tell(
                part,
                key,
                f"{self._told(part, key, x)} off the shaft: {shaft} is {show(length, 'mm', 6)} long. Write 0 mm to "
                f"{show(length, 'mm', 6)}.",
            )
            return None
        x = min(max(x, 0.0), length)
        return Place(shaft, x, x - 0.5 * width, x + 0.5 * width)

    @staticmethod
    def _told(part: Part, key: str, x: float) -> str:
        text = quote(getattr(part, key).text)
        where = show(x, "mm", 6)
        return f"{text} is" if key == "at" and text == f'"{where}"' else f"{text} puts its middle at {where},"

    def width(self, part: Part, shaft: str) -> float:
        """How wide a part is [m]: as written, else the segment's length if a support is at a segment's name alone."""
        if part.width_si is not None:
            return part.width_si
        ends, index = self._ends[shaft], None
        if part.width_key == "width" and part.at is not None and part.at.bare_name:
            index = self.shafts[shaft].segment_index.get(part.at.bare_name)
        return 0.0 if index is None or ends is None else float(ends[index + 1] - ends[index])

    def follow(self, position: Position, shaft: str, part: Part | None, key: str) -> float | None:
        """Place x of a position [m] from the left end of a shaft, or None with the reason told."""
        if not position.anchor:
            return None if self._ends[shaft] is None else position.offset.si
        faces = self._anchor(position, shaft, part, key)
        if faces is None:
            return None
        left, right = faces
        return {"left": left, "middle": 0.5 * (left + right), "right": right}[position.side] + position.offset.si

    def _anchor(self, position: Position, shaft: str, part: Part | None, key: str) -> tuple[float, float] | None:
        *owner, name = position.anchor
        ends, index = self._ends[shaft], self.shafts[shaft].segment_index
        if owner and owner[0] != shaft:
            what = (
                f"{owner[0]} is another shaft"
                if owner[0] in self.shafts
                else unknown_name("shaft", owner[0], self.shafts)
            )
            self._tell(
                part,
                key,
                f"{quote(position.text)}: {what.rstrip('.')}. Anchors are segments and parts of {shaft} itself.",
            )
            return None
        if name in index:
            return None if ends is None else (float(ends[index[name]]), float(ends[index[name] + 1]))
        if name == shaft and not owner:
            return None if ends is None else (0.0, float(ends[-1]))
        if name in self.parts and not owner:
            return self._part_anchor(position, shaft, part, key, self.parts[name])
        self._tell(part, key, self._unknown(name, shaft))
        return None

    def _part_anchor(
        self, position: Position, shaft: str, part: Part | None, key: str, other: Part
    ) -> tuple[float, float] | None:
        place = self.place(other.name)
        if place is None:
            return None
        if place.shaft != shaft:
            self._tell(
                part,
                key,
                f"{quote(position.text)}: {other.name} is on {place.shaft}, not on {shaft}. Choose an anchor on "
                f"{shaft}.",
            )
            return None
        return place.left, place.right

    def _unknown(self, name: str, shaft: str) -> str:
        if name in self.removed:
            return gone(name)
        elsewhere = [other for other, one in self.shafts.items() if name in one.segment_index]
        if elsewhere:
            return (
                f"{quote(name)} is a segment of {elsewhere[0]}, not of {shaft}. Anchors are segments and parts of "
                f"{shaft} itself."
            )
        near = {other: one for other, one in self.parts.items() if self.shaft_of(one) == shaft}
        known = [*self.shafts[shaft].segment_index, *near]
        return f"no segment or part on {shaft} is called {quote(name)}. {nearest(name, known)}".rstrip()

    def centre_of_gravity(self, part: Heavy) -> float | None:
        """Place x of a part's centre of gravity [m]; it may lie beyond the shaft's end."""
        shaft, place = self.shaft_of(part), self._places.get(part.name)
        if part.cg_at is not None and shaft is not None:
            return self.follow(part.cg_at, shaft, part, "cg_at")
        return place.x if place else None

    def _tell(self, part: Part | None, key: str, sentence: str) -> None:
        path: tuple[str, ...] = (key,) if part is None else (part.group, part.name, key)
        self.faults.append(Fault(path, sentence))


def gone(name: str) -> str:
    """The sentence about a name that a variant removed."""
    return f"{quote(name)} was removed, but this still stands on it. Remove this too, or change it."


def _broken(shaft: Shaft) -> bool:
    """Whether a length of the shaft could not be read."""
    return not shaft.segments or any(segment.length is None for segment in shaft.segments)
