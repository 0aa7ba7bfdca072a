"""--json: strict JSON of a known form, in SI."""

import json
import math

import jsonschema
import pytest

from fe_shaft.results.quantity import QUANTITIES

NUMBER = {"type": "number"}
TEXT = {"type": "string"}
OVER_CASES = {"type": "array", "items": {"type": ["number", "null"]}, "minItems": 3, "maxItems": 3}
NOTE = {
    "type": "object",
    "properties": {"key": TEXT, "sentence": TEXT},
    "required": ["key", "sentence"],
    "additionalProperties": False,
}
WORDS = {"type": "array", "items": TEXT}


def head(kind: str) -> dict:
    return {
        "format": {"const": f"fe_shaft {kind}"},
        "version": {"const": 1},
        "program": {"type": "string", "pattern": r"^fe_shaft \d"},
        "units": {"type": "object", "additionalProperties": TEXT, "required": ["length", "force", "moment"]},
    }


def closed(**properties: object) -> dict:
    """An object with exactly these keys."""
    required = list(properties)
    return {"type": "object", "properties": properties, "required": required, "additionalProperties": False}


PART = closed(name=TEXT, kind=TEXT, x=NUMBER, words=WORDS)
LOAD = closed(
    part=TEXT, role={"enum": ["driven", "drives", ""]}, what=TEXT, axial=NUMBER, up=NUMBER, front=NUMBER,
    torque=NUMBER, words=WORDS,
)  # fmt: skip
HELD = {"type": "object", "additionalProperties": NUMBER}
BALANCE = closed(
    shaft=TEXT,
    thrust=NUMBER,
    thrust_held_by=HELD,
    torque_in=NUMBER,
    torque_out=NUMBER,
    torque_held_by=HELD,
    words=WORDS,
)
CASE = closed(
    name=TEXT, power=TEXT, torque=NUMBER, loads={"type": "array", "items": LOAD},
    balances={"type": "array", "items": BALANCE}, like=TEXT, factor=NUMBER,
)  # fmt: skip
SHAFT = closed(
    name=TEXT, length=NUMBER, thinnest=NUMBER, thickest=NUMBER, widest_bore=NUMBER, segments={"type": "integer"},
    materials=WORDS, mass=NUMBER, parts={"type": "array", "items": PART},
)  # fmt: skip
CHECK = closed(
    **head("check"), ok={"type": "boolean"}, title=TEXT, counts=WORDS, shafts={"type": "array", "items": SHAFT},
    cases={"type": "array", "items": CASE}, limits=WORDS, taken={"type": "array", "items": NOTE},
    notes={"type": "array", "items": NOTE}, estimates=WORDS,
    sources={"type": "object", "additionalProperties": TEXT}, obstacle=TEXT, exit_code={"enum": [0, 4, 5]},
)  # fmt: skip
RESULTS = {
    "type": "object",
    "properties": {
        **head("results"),
        "cases": {"const": ["running", "starting", "reversed_jam"]},
        "parts": {
            "type": "object",
            "required": ["wheel", "lay_left"],
            "additionalProperties": {
                "type": "object",
                "properties": {"kind": TEXT, "shaft": TEXT, "x": NUMBER} | dict.fromkeys(QUANTITIES, OVER_CASES),
                "required": ["kind", "shaft", "x", "deflection", "slope", "twist"],
                "additionalProperties": False,
            },
        },
        "verdicts": {
            "type": "array",
            "minItems": 3,
            "items": {
                "type": "object",
                "properties": {"word": {"enum": ["FAIL", "pass", "unsure"]}, "use": NUMBER, "value": NUMBER},
                "required": ["limit", "word", "part", "quantity", "case", "value", "use", "source", "band"],
            },
        },
        "doubts": {"type": "array", "items": {"type": "string"}},
        "notes": {"type": "array", "items": NOTE},
    },
    "required": [
        *head("results"),
        "model",
        "cases",
        "parts",
        "shafts",
        "loads",
        "verdicts",
        "doubts",
        "notes",
        "proof",
    ],
}
COMPARISON = {
    "type": "object",
    "properties": {
        **head("comparison"),
        "titles": {"type": "array", "items": TEXT, "minItems": 2, "maxItems": 2},
        "rows": {
            "type": "array",
            "minItems": 10,
            "items": {
                "type": "object",
                "properties": {"left": OVER_CASES, "right": OVER_CASES, "ratio": OVER_CASES},
                "required": ["part", "quantity", "left", "right", "difference", "ratio"],
            },
        },
    },
    "required": [*head("comparison"), "titles", "cases", "rows", "left", "right", "mixes", "changes"],
}
FORMS = {
    "check layshaft.toml": CHECK,
    "check loose.toml": CHECK,
    "check unbalanced.toml": CHECK,
    "solve layshaft.toml": RESULTS,
    "solve layshaft.toml --case running": RESULTS,
    "compare layshaft.toml": COMPARISON,
    "compare layshaft.toml stiffer.toml": COMPARISON,
}


def strict(text: str) -> dict:
    """JSON as RFC 8259 has it, without NaN and infinity."""

    def refuse(name: str) -> None:
        raise AssertionError(f"{name} is no JSON")

    return json.loads(text, parse_constant=refuse)


@pytest.mark.parametrize("line", FORMS)
def test_form(run, line):
    done = run(*line.split(), "--json")
    jsonschema.validate(strict(done.out), FORMS[line])
    assert done.out.isascii()


def test_exit_codes_stay(run):
    assert run("solve", "layshaft.toml", "--json").code == 1
    assert run("check", "loose.toml", "--json").code == 4
    assert run("compare", "layshaft.toml", "--json").code == 0
    done = run("solve", "slips.toml", "--json")
    assert (done.code, done.out) == (3, "")


def test_numbers_are_si_and_the_same_as_in_the_text(run):
    found = strict(run("solve", "layshaft.toml", "--json").out)
    deflection = found["parts"]["wheel"]["deflection"][0]
    assert f"wheel deflects {deflection * 1e6:.1f} um in case running" in run("solve", "layshaft.toml").out
    checked = strict(run("check", "layshaft.toml", "--json").out)
    assert math.isclose(checked["shafts"][0]["length"], 0.191)
    assert checked["shafts"][0]["parts"][0]["x"] == pytest.approx(0.0095)
