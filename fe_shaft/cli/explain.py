"""Pages of `fe-shaft explain`: keys from their own descriptions, quantities, units, materials, and a glossary."""

from __future__ import annotations

import tomllib
from collections.abc import Iterable, Iterator
from functools import cache
from pathlib import Path
from typing import Any

from fe_shaft.cli.catalogue import COMMANDS
from fe_shaft.cli.explain_keys import LABEL, group_page, group_words, joined, key_page, key_words, value_page
from fe_shaft.errors import UsageError, nearest, quote
from fe_shaft.model.material import BUILT_IN_NAMES, built_in
from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.results.words.layout import paragraph
from fe_shaft.units import FACTORS

GLOSSARY = Path(__file__).with_name("glossary.toml")
_OF = {"place": "every part", "gear": "gears with a mate", "support": "bearings and pins"}


def page(word: str) -> str:
    """Everything there is to say about a word or a message.

    Raises
    ------
    UsageError
        Nothing is known about it; with the nearest word that is.
    """
    word = " ".join(word.split())
    if not word:
        raise UsageError("explain which word? `fe-shaft explain` lists what is known.")
    found = list(_pages(word)) or list(value_page(word)) or list(_by_message(word)) or list(_by_address(word))
    if not found:
        hint = nearest(word, _known()) or "`fe-shaft explain` lists what is known."
        raise UsageError(f"nothing is known about {quote(word)}. {hint}")
    return "\n\n".join("\n".join(lines) for lines in found)


def index() -> str:
    """What can be explained, in one list."""
    lines = ["fe-shaft explain WORD: one of these, an address, or a message in quotes."]
    glossary = dict.fromkeys(entry["words"][0] for entry in _glossary())
    blocks = {
        "Commands": COMMANDS,
        "Groups": group_words(),
        "Keys": key_words(),
        "Quantities": QUANTITIES,
        "Words": glossary,
        "Dimensions": [_dimension(name) for name in FACTORS],
        "Materials": BUILT_IN_NAMES,
    }
    for label, words in blocks.items():
        lines += ["", *joined(f"{label:<{LABEL}}  ", sorted(words, key=str.lower))]
    return "\n".join(lines)


# ---- what a word may be


def _pages(word: str) -> Iterator[list[str]]:
    """All pages of a word taken as it is."""
    yield from group_page(word)
    yield from key_page(word)
    if word in QUANTITIES:
        yield _quantity(word)
    yield from (_entry(entry) for entry in _glossary() if word.lower() in (each.lower() for each in entry["words"]))
    yield from _units(word)
    material = built_in(word)
    if material is not None:
        yield _material(word, material)
    elif word.lower() in ("material", "materials"):
        yield joined(f"{'built in':<{LABEL}}  ", sorted(BUILT_IN_NAMES, key=str.lower))
    if word in COMMANDS:
        command = COMMANDS[word]
        yield [f"{word}   command", *paragraph(" ".join(command.about.split()), "  "), f"  {command.example}"]


def _by_message(word: str) -> Iterator[list[str]]:
    """Pages of the messages that a text holds."""
    text = word.lower()
    for entry in _glossary():
        if any(part in text for part in entry.get("messages", ())):
            yield _entry(entry)


def _by_address(word: str) -> Iterator[list[str]]:
    """Pages of the last steps of an address, such as lay_left.stiffness.radial."""
    steps = word.split(".")
    for first in range(1, len(steps)):
        rest = ".".join(steps[first:])
        found = list(_pages(rest))
        if found:
            yield from found
            return


def _known() -> list[str]:
    words = [word for entry in _glossary() for word in entry["words"]]
    return [*group_words(), *key_words(), *QUANTITIES, *words, *map(_dimension, FACTORS), *BUILT_IN_NAMES, *COMMANDS]


# ---- pages


@cache
def _glossary() -> list[dict[str, Any]]:
    """The pages of the glossary."""
    pages: list[dict[str, Any]] = tomllib.loads(GLOSSARY.read_text(encoding="utf-8"))["page"]
    return pages


def _entry(entry: dict[str, Any]) -> list[str]:
    """One page of the glossary."""
    lines = [entry["title"]]
    for number, block in enumerate(entry["text"].strip("\n").split("\n\n")):
        lines += [""] if number else []
        rows = block.splitlines()
        is_table = sum("   " in row for row in rows) > len(rows) / 2
        lines += [f"  {row}" for row in rows] if is_table else paragraph(" ".join(rows), "  ")
    return [*lines, *_see(entry.get("see", ()))]


def _see(words: Iterable[str]) -> list[str]:
    return joined(f"  {'see':<{LABEL}}", list(words)) if words else []


def _quantity(name: str) -> list[str]:
    """One quantity of the results."""
    from fe_shaft.model.limit import QUANTITIES as LIMITED

    quantity = QUANTITIES[name]
    address = f"{'lay_left' if quantity.of == 'support' else 'wheel'}.{name}"
    rows = {
        "of": _OF[quantity.of],
        "unit": quantity.unit,
        "script": f'{name} in SI, {name}_{quantity.suffix} in {quantity.unit}; results.worst("{address}")',
    }
    if name in LIMITED:
        rows["limit"] = f'quantity = "{name}"'
    meaning = quantity.meaning[0].upper() + quantity.meaning[1:]
    return [f"{name}   quantity of the results", *paragraph(f"{meaning}.", "  "), *_rows(rows)]


def _rows(rows: dict[str, str]) -> Iterator[str]:
    """Labels and what stands beside them."""
    for label, text in rows.items():
        yield from paragraph(text, " " * (LABEL + 2), first=f"  {label:<{LABEL}}")


def _dimension(name: str) -> str:
    return name.replace("_", " ")


def _units(word: str) -> Iterator[list[str]]:
    """The units of a dimension, or the dimensions of a unit."""
    for dimension, units in FACTORS.items():
        if word.lower() == _dimension(dimension) or word == dimension or word in units:
            yield [f"{_dimension(dimension)}   dimension", *joined(f"  {'units':<{LABEL}}", [*map(_unit, units)])]


def _unit(unit: str) -> str:
    return unit or "bare number"


def _material(name: str, material: Any) -> list[str]:
    """A built-in material."""
    figures = {"E": "youngs_modulus", "G": "shear_modulus", "nu": "poisson_ratio", "density": "density"}
    figures["expansion"] = "thermal_expansion"
    values = {label: getattr(material, key) for label, key in figures.items()}
    rows = {label: str(getattr(value, "text", value)) for label, value in values.items() if value is not None}
    return [f"{name}   built-in material", *_rows(rows | {"source": material.source or ""})]
