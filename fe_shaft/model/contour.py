"""A shaft's contour as points from left to right: each read, all checked together, made into segments."""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from itertools import pairwise
from typing import Any, NamedTuple

from pydantic import ValidationError, ValidationInfo
from pydantic_core import InitErrorDetails, PydanticCustomError
from typing_extensions import override

from fe_shaft.errors import nearest, quote
from fe_shaft.model.kinds import Kind, shown, thing
from fe_shaft.model.quantity import Quantity
from fe_shaft.model.refusal import refuse
from fe_shaft.model.segment import Segment
from fe_shaft.units import Value, show

EXAMPLE = 'contour = [["0 mm", "30 mm"], ["19 mm", "30 mm"], ["19 mm", "38 mm"], ["57 mm", "38 mm"]]'
POINT = '["19 mm", "38 mm"]'
#: Places along the shaft may lie closer than any segment of a list is long: an arc comes as many short cones.
KINDS: dict[str, Quantity] = {
    "x": Quantity("length", ("0.001 mm", "20 m"), sign="not negative"),
    "diameter": Quantity("length", ("1 mm", "3 m")),
    "bore": Quantity("length", ("0.5 mm", "3 m"), sign="not negative"),
    "fillet": Quantity("length", ("0.05 mm", "100 mm"), sign="not negative"),
}
LISTED = ("x", "diameter", "bore")  # of a point written as a list

Written = tuple[Value, ...] | dict[str, Value]  # a point, read, in the form in which it was written
Told = tuple[tuple[str | int, ...], str]  # path in the contour, sentence


class Point(NamedTuple):
    """One point of a contour; None where nothing was written."""

    x: Value
    diameter: Value
    bore: Value | None = None
    fillet: Value | None = None


class ContourKind(Kind):
    """A list of points, each ``[x, diameter, bore]`` or a table with x, diameter, bore and fillet."""

    caption = "list of points: x, outer diameter, bore"

    @override
    def check_in(self, raw: Any, info: ValidationInfo) -> tuple[Written, ...]:
        return self.read(raw, loose=info.context is not None and info.context["loose"])

    @override
    def check(self, raw: Any) -> tuple[Written, ...]:
        return self.read(raw)

    def read(self, raw: Any, *, loose: bool = False) -> tuple[Written, ...]:
        """The points; every mistake in them at once, each with the path of its point."""
        if not isinstance(raw, list | tuple):
            raise refuse(f"{shown(raw)} is {thing(raw)}, not a list of points. Write {EXAMPLE}.")
        if len(raw) < 2:
            number = "no point" if not raw else "one point"
            raise refuse(f"the contour has {number}; two at least make a shaft. Write {EXAMPLE}.")
        told: list[Told] = []
        read = [_point(each, loose, index, told) for index, each in enumerate(raw)]
        points = [each for each in read if each is not None]
        if not told:
            told += faults(list(map(point_of, points)))
        if told:
            details = [InitErrorDetails(type=refuse(sentence), loc=path, input=None) for path, sentence in told]
            raise ValidationError.from_exception_data("contour", details)
        return tuple(points)

    @override
    def json(self) -> dict[str, Any]:
        listed = {"type": "array", "items": KINDS["diameter"].json(), "minItems": 2, "maxItems": 3}
        keys = {key: kind.json() for key, kind in KINDS.items()}
        table = {"type": "object", "properties": keys, "required": ["x", "diameter"], "additionalProperties": False}
        return {"type": "array", "items": {"anyOf": [listed, table]}, "minItems": 2}


def _point(raw: Any, loose: bool, index: int, told: list[Told]) -> Written | None:
    """One point, or None with the reason told."""
    if isinstance(raw, Mapping):
        named = {key: value for key, value in raw.items() if value is not None}
    elif isinstance(raw, list | tuple) and 2 <= len(raw) <= len(LISTED):
        named = {key: value for key, value in zip(LISTED, raw, strict=False) if value is not None}
    elif isinstance(raw, list | tuple):
        number = len(raw) or "none"
        told.append(((index,), f"two or three numbers make a point (x, diameter, bore), not {number}. Write {POINT}."))
        return None
    else:
        told.append(((index,), f"{shown(raw)} is {thing(raw)}, not a point. Write {POINT}."))
        return None
    before = len(told)
    told += [((index,), _unknown(key)) for key in named if key not in KINDS]
    told += [((index,), f"{key} is not written. Write {POINT}.") for key in ("x", "diameter") if key not in named]
    read: dict[str, Value] = {}
    for key in KINDS.keys() & named.keys():
        try:
            read[key] = _certain(KINDS[key].read(named[key], loose=loose))
        except PydanticCustomError as error:
            told.append(((index, key), error.message()))
    if len(told) > before:
        return None
    ordered = {key: read[key] for key in KINDS if key in read}
    return ordered if isinstance(raw, Mapping) else tuple(ordered.values())


def _certain(value: Value) -> Value:
    if value.estimated:
        raise refuse(f'{quote(value.text)} is an estimate; a contour has one length. Write "38 mm".')
    return value


def _unknown(key: object) -> str:
    return f"{quote(str(key))} is not a key of a point. {nearest(str(key), KINDS)}"


def point_of(written: Written) -> Point:
    """A point by the names of its numbers."""
    return Point(**written) if isinstance(written, Mapping) else Point(*written)


def faults(points: Sequence[Point]) -> Iterator[Told]:
    """What is wrong with points together, each told at its own."""
    first = points[0].x
    if first.si != 0.0:
        yield (0,), f"the contour begins at x = {quote(first.text)}, not at 0. Count x from the left end of the shaft."
    order = list(_order(points))
    yield from order
    if not order:
        yield from _ends(points)
        yield from _bores(points)
        yield from _fillets(points)
    for index, point in enumerate(points):
        if point.bore is not None and point.bore.si >= point.diameter.si:
            wall = f"a bore of {point.bore.text} leaves no wall in a diameter of {point.diameter.text}"
            yield (index,), f"{wall} at x = {point.x.text}. Make it smaller."


def _order(points: Sequence[Point]) -> Iterator[Told]:
    """Points that stand left of the one before, and more than two at one place."""
    for index in range(1, len(points)):
        here, before = points[index].x, points[index - 1].x
        if here.si < before.si:
            where = f"x = {quote(here.text)} is left of point {index} at x = {quote(before.text)}"
            yield (index,), f"{where}. Write the points from left to right."
        elif index > 1 and here.si == before.si == points[index - 2].x.si:
            yield (index,), f"it is the third point at x = {quote(here.text)}; a step has two. Leave one out."


def _ends(points: Sequence[Point]) -> Iterator[Told]:
    """Steps where the shaft begins or ends, which are none."""
    x = [point.x.si for point in points]
    if x[0] == x[-1]:
        yield (), f"the contour has no length: both points stand at x = {quote(points[0].x.text)}. Write {EXAMPLE}."
    elif x[0] == x[1]:
        yield (
            (1,),
            f"it stands at x = {quote(points[1].x.text)} like point 1: no step at an end. Leave one of them out.",
        )
    elif x[-1] == x[-2]:
        before = f"like point {len(x) - 1}"
        yield (len(x) - 1,), f"it stands at x = {quote(points[-1].x.text)} {before}: no step at an end. Leave one out."


def _bores(points: Sequence[Point]) -> Iterator[Told]:
    """A bore written at one end of a piece only: whether it ends or narrows to nothing is not guessed."""
    for index, (left, right) in enumerate(pairwise(points)):
        if left.x.si == right.x.si or (left.bore is None) == (right.bore is None):
            continue
        there, other, missing = (left, index, index + 1) if right.bore is None else (right, index + 1, index)
        if there.bore is not None and there.bore.si > 0.0:
            remedy = f"Write {quote(there.bore.text)}, or two points at one x where the bore ends"
            yield (missing,), f"bore is not written, but point {other + 1} beside it has one. {remedy}."


def _fillets(points: Sequence[Point]) -> Iterator[Told]:
    """Fillets that stand at no shoulder."""
    for index, point in enumerate(points):
        if point.fillet is None or point.fillet.si == 0.0:
            continue
        beside = [points[other] for other in (index - 1, index + 1) if 0 <= other < len(points)]
        if not any(one.x.si == point.x.si and one.diameter.si > point.diameter.si for one in beside):
            what = f"the fillet of {quote(point.fillet.text)} stands at no shoulder"
            yield (
                (index,),
                f"{what}: no larger diameter at x = {point.x.text}. Write it at the thinner point of a step.",
            )


def segments_of(contour: Sequence[Written]) -> tuple[Segment, ...]:
    """The cylinders and cones between the points of a contour, from left to right, without names."""
    points = list(map(point_of, contour))
    return tuple(_segment(left, right) for left, right in pairwise(points) if right.x.si > left.x.si)


def _segment(left: Point, right: Point) -> Segment:
    length = right.x.si - left.x.si
    # The numbers were checked as points; a length is a difference and has no text of its own.
    words: dict[str, Any] = {"length": Value(length, show(length, "mm", 6)), "diameter": left.diameter}
    if right.diameter.si != left.diameter.si:
        words["end_diameter"] = right.diameter
    bores = [0.0 if point.bore is None else point.bore.si for point in (left, right)]
    if any(bores):
        words["bore"] = left.bore
    if bores[0] != bores[1]:
        words["end_bore"] = right.bore
    words |= {key: at.fillet for key, at in (("fillet_left", left), ("fillet_right", right)) if at.fillet}
    return Segment.model_construct(set(words), **words)
