"""What is said where a model leaves what the shoulder rule was made for."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.shouldering import contour_of
from fe_shaft.fem.shoulders import hollow_shoulders, out_of_range
from fe_shaft.model.notes import Note, some_names

if TYPE_CHECKING:
    from fe_shaft.model.segment_arrays import SegmentArrays
    from fe_shaft.model.shaft import Shaft
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]

#: Said of shoulders beyond the rule's range, by the fields of `OutOfRange`; segments are the thinner ones beside them.
BEYOND = {
    "end_disc": "a thin disc ends the shaft beside {}: up to a third too stiff where it is loaded or held",
    "flange": "a thin flange beside {}: up to a third too stiff where it is loaded or held",
    "hollow_groove": "a narrow groove of a hollow shaft at {}: 5 to 9 % too stiff",
    "large_step": "a step beyond D/d = 3 at {}: outside what the rule was fitted to",
}
#: A load nearer than this to a shoulder of a hollow shaft, in its smaller diameters, is said.
NEAR = 0.3


def shoulder_notes(model: Model) -> Iterator[Note]:
    """Shoulders beyond the range of their rule, and loads beside those of hollow shafts."""
    if model.shoulders == "off":
        return
    for shaft in model.shafts:
        arrays = model.working_arrays[shaft.name]
        for words, numbers in _remarks(arrays).items():
            named = [f"{shaft.name}.{shaft.segments[k].name or f'segment_{k + 1}'}" for k in numbers]
            yield Note("shoulders", words.format(some_names(named)))
        if not (arrays.bore_left.any() or arrays.bore_right.any()):
            continue
        near = [name for name in _loaded(model, shaft) if _beside(arrays, *_stretch(model, name))]
        if near:
            yield Note(
                "shoulders",
                f"{some_names(near)}: within {NEAR} diameters of a shoulder of a hollow shaft; "
                "movement there is off by 2 % as a rule, 12 % at worst",
            )


def _remarks(arrays: SegmentArrays) -> dict[str, list[int]]:
    """What leaves the range of the rule, and at which segments of the drawing; kept with the arrays."""
    if "beyond" not in arrays.memo:
        found = out_of_range(contour_of(arrays))
        drawn = np.arange(len(arrays.length)) if arrays.number is None else arrays.number
        at = {words: getattr(found, field).any(axis=-1) for field, words in BEYOND.items()}
        arrays.memo["beyond"] = {words: np.unique(drawn[where]).tolist() for words, where in at.items() if where.any()}
    remarks: dict[str, list[int]] = arrays.memo["beyond"]
    return remarks


def _loaded(model: Model, shaft: Shaft) -> list[str]:
    """Parts that push on a shaft across its axis, left to right."""
    acting = {action.part for action in model.actions if action.wrench[:, [1, 2, 4, 5]].any()}
    acting |= {support.name for support in model.supports}
    on = [name for name in acting if model.places[name].shaft == shaft.name]
    return sorted(on, key=lambda name: (model.places[name].x, name))


def _stretch(model: Model, name: str) -> tuple[float, float]:
    """Both ends of the width over which a part's load is spread."""
    x, half = model.places[name].x, model[name].spread_si / 2
    return x - half, x + half


def _beside(arrays: SegmentArrays, left: float, right: float) -> bool:
    """Whether half of a load between two places lies near a shoulder of a hollow stretch."""
    if "hollow" not in arrays.memo:
        arrays.memo["hollow"] = hollow_shoulders(contour_of(arrays))
    place, diameter = arrays.memo["hollow"]
    inside = np.minimum(right, place + NEAR * diameter) - np.maximum(left, place - NEAR * diameter)
    return bool((inside >= (right - left) / 2).any())
