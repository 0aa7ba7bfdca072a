"""The JSON Schema of the model file, for editors: made from the nouns themselves."""

from __future__ import annotations

from typing import Any

from pydantic.json_schema import models_json_schema

from fe_shaft.model.groups import GROUPS
from fe_shaft.model.heading import Heading
from fe_shaft.model.shaft import SHAPES

DIALECT = "https://json-schema.org/draft/2020-12/schema"


def json_schema() -> dict[str, Any]:
    """A JSON Schema (2020-12) of a whole model file, variants included.

    Returns
    -------
    dict
        Ready for ``json.dumps``. It describes form; names, positions and what keys mean together are checked later.
    """
    nouns: Any = [(noun, "validation") for noun in (Heading, *GROUPS.values())]
    _, made = models_json_schema(nouns, ref_template="#/$defs/{model}")
    definitions = {name: _plain(schema) for name, schema in made["$defs"].items()}
    heading = definitions.pop(Heading.__name__)
    groups = {group: _group(noun.__name__, definitions) for group, noun in GROUPS.items()}
    return {
        "$schema": DIALECT,
        "title": "Model file of fe_shaft",
        "type": "object",
        "properties": {**heading["properties"], **groups, **_file_keys(groups)},
        "additionalProperties": False,
        "$defs": definitions,
    }


def _group(noun: str, definitions: dict[str, Any]) -> dict[str, Any]:
    """One group: tables by name; the name stands in the heading, so not inside."""
    schema = definitions[noun]
    schema["properties"].pop("name", None)
    schema["required"] = [key for key in schema.get("required", []) if key != "name"]
    if noun == "Shaft":
        schema["required"] = []
        schema["oneOf"] = [{"required": [key]} for key in sorted(SHAPES)]
    return {
        "type": "object",
        "description": schema.get("description", ""),
        "additionalProperties": {"$ref": f"#/$defs/{noun}"},
    }


def _file_keys(groups: dict[str, Any]) -> dict[str, Any]:
    """Keys that bring files together."""
    names = {"type": "array", "items": {"type": "string"}}
    return {
        "include": {**names, "description": "Files whose materials and limits are taken over."},
        "extends": {"type": "string", "description": "File of which this one is a variant."},
        "change": {"type": "object", "description": "In a variant: new values by address."},
        "add": {"type": "object", "properties": groups, "additionalProperties": False},
        "remove": {**names, "description": "In a variant: names of what goes."},
    }


def _plain(schema: Any) -> Any:
    """A schema without titles, nulls and defaults that a file cannot write."""
    if isinstance(schema, list):
        return [_plain(each) for each in schema]
    if not isinstance(schema, dict):
        return schema
    kept = {key: _plain(each) for key, each in schema.items() if key != "default" and not _is_title(key, each)}
    arms = kept.get("anyOf")
    if isinstance(arms, list) and {"type": "null"} in arms:
        rest = [arm for arm in arms if arm != {"type": "null"}]
        del kept["anyOf"]
        kept = {**(rest[0] if len(rest) == 1 else {"anyOf": rest}), **kept}
    return kept


def _is_title(key: str, each: Any) -> bool:
    return key == "title" and isinstance(each, str)
