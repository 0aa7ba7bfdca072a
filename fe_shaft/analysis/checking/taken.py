"""What is not written and so taken, what is only estimated, what is limited, and where figures come from."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import TYPE_CHECKING, Any

from fe_shaft.model.estimates import estimates_of
from fe_shaft.model.notes import Note
from fe_shaft.model.words import Words
from fe_shaft.results.words.verdicts import band_words
from fe_shaft.results.words.wording import listed
from fe_shaft.units import Value

if TYPE_CHECKING:
    from fe_shaft.model.limit import Limit
    from fe_shaft.model.system import Model

_ESTIMATES = "estimates"  # key of the note that the block of estimates says in full


def taken_and_notes(model: Model, balances: Sequence[Note]) -> tuple[tuple[Note, ...], tuple[Note, ...]]:
    """Notes on what is not written, and all other notes."""
    told = [*twist_notes(model), *(note for note in model.notes if note.key != _ESTIMATES), *balances]
    doubts = [note for note in balances if note.key == "shoulders"]  # the switch itself is among the model's notes
    taken = tuple(note for note in told if note not in doubts and not _is_written(model, note.key))
    return taken, tuple(note for note in told if note not in taken)


def twist_notes(model: Model) -> Iterator[Note]:
    """From where twist is counted on each shaft that is free to turn."""
    several = len(model.shafts) > 1
    for shaft in model.shafts:
        on = [part for part in model.supports if model.places[part.name].shaft == shaft.name]
        if any("spin" in part.holds for part in on):
            continue
        leaves = dict.fromkeys(
            name for case in model.cases for name in case.leaves_shares if model.places[name].shaft == shaft.name
        )
        whose = f" of {shaft.name}" if several else ""
        if leaves:
            yield Note("twist", f"twist{whose} counted from {' or '.join(leaves)}, where power leaves")
        else:
            yield Note("twist", f"twist{whose} counted from the left end")


def _is_written(model: Model, key: str) -> bool:
    """Whether the model states the value at an address."""
    head, *rest = key.split(".")
    if not rest:
        return head in model.heading.given
    if head in model:
        owner: Words = model[head]
    elif head in {case.name for case in model.cases}:
        owner = model.case(head)
    else:
        owner = model.heading
        rest = [head, *rest]
    for step in rest:
        if step not in type(owner).model_fields:
            return True  # a segment, whose notes are all about what is written
        if step not in owner.given:
            return False
        inside = getattr(owner, step)
        if not isinstance(inside, Words):
            return True
        owner = inside
    return True


# ---- estimates


def estimates_in_words(model: Model) -> tuple[str, ...]:
    """What is estimated, by band: "radial, tilt of lay_left; radial of lay_right: half to twice"."""
    bands: dict[str, dict[str, list[str]]] = {}
    for each in estimates_of(model):
        words = band_words(each) if each.usual else f"{each.value}, {band_words(each)}"
        bands.setdefault(words, {}).setdefault(each.thing, []).append(each.key)
    return tuple(
        "; ".join(", ".join(keys) + f" of {thing}" for thing, keys in things.items()) + f": {words}"
        for words, things in bands.items()
    )


# ---- limits and sources


def limits_in_words(model: Model) -> tuple[str, ...]:
    """One line for each limit: "wheel_deflection: deflection of wheel at most 20 um; running"."""
    return tuple(_limit(model, limit) for limit in model.limits)


def _limit(model: Model, limit: Limit) -> str:
    targets = model.targets(limit.name)
    what = listed(targets) if len(targets) <= 4 else str(limit.of)
    bounds = []
    if limit.min is not None:
        bounds.append(f"at least {limit.min.text}")
    if limit.max is not None:
        bounds.append(f"at most {limit.max.text}")
    cases = f"; {', '.join(limit.cases)}" if limit.cases else ""
    return f"{limit.name}: {limit.quantity} of {what} {' and '.join(bounds)}{cases}"


def sources_of(model: Model) -> dict[str, str]:
    """Every source that the model or a built-in material states, by address."""
    nouns: list[Any] = [*model.parts, *model.written_cases, *model.written_limits]
    found = {}
    if model.heading.source:
        found["model"] = model.heading.source
    for noun in nouns:
        found |= dict(_sources(noun, noun.name))
    if model.housing is not None:
        found |= dict(_sources(model.housing, "housing"))
    for name, material in model.materials.items():
        if material.source:
            found[name] = material.source
    return found


def _sources(noun: Words, place: str) -> Iterator[tuple[str, str]]:
    if noun.source:
        yield place, noun.source
    for key in type(noun).model_fields:
        value = getattr(noun, key)
        if isinstance(value, Value) and value.source:
            yield f"{place}.{key}", value.source
        elif isinstance(value, Words):
            yield from _sources(value, f"{place}.{key}")
        elif isinstance(value, tuple):
            for number, each in enumerate(value, 1):
                if isinstance(each, Words):
                    yield from _sources(each, f"{place}.{getattr(each, 'name', None) or f'segment_{number}'}")
