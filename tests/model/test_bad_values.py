"""Every bad value in every key: one of our sentences, never a traceback, never the validator's wording."""

import datetime
import decimal
from fractions import Fraction
from typing import Any

import numpy as np
import pytest

import fe_shaft.model as fs
from fe_shaft.errors import ModelError
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.words import Words

BAD: list[Any] = [
    True, False, 0, -1, 1, 1e400, float("nan"), -0.0, 10**400, -(10**400), "", " ", "nan mm", "inf mm", "1e400 mm",
    "1e-400 mm", "1,5 mm", "\N{ARABIC-INDIC DIGIT ONE} mm", "-1 mm", "0 mm", "5", "5 parsec", "5 kg", "5 N",
    "9" * 100_000 + " mm", "~5 mm", "~5 N/um", "~-5 N/um", "~0 N/um", [], {}, [[]], {"value": 1}, {"value": "3 mm"},
    {"value": "3 mm", "low": "4 mm", "high": "5 mm"}, {"value": {"value": "3 mm"}}, object(), b"5 mm", (1, 2), {1: 2},
    {"a": None}, [None], ["a", "a"], "a\0b", "x" * 5000, datetime.date(2020, 1, 1), decimal.Decimal(5), Fraction(1, 3),
    np.float64(5), np.array([1, 2]), np.array("5 mm"), float, "5 mm k6", "1_0 mm", "0x5 mm", "13 o'clock", "left",
    "clockwise", "15 deg", "0 deg left", "wheel + ", "+", "-", "a.b.c.d", "to", ".", "a.", "..",
    {"value": "~3 N/um", "low": "1 N/um", "high": "9 N/um", "source": 3}, {"enters": {"a": 0.5}}, {"a": float("nan")},
    {"rows": [[1] * 6] * 6},
]  # fmt: skip
NOUNS = [
    fs.Heading, *GROUPS.values(), fs.Segment, fs.Stiffness, fs.Seat, fs.Matrix, fs.MatrixUnits, fs.Couple,
    fs.BeltPull, fs.Housing, fs.Estimates, fs.OutputUnits,
]  # fmt: skip
THEIRS = ("input should", "pydantic", "valid ", "validation", "extra inputs", "field required", "cannot be read (")


@pytest.mark.parametrize("noun", NOUNS, ids=lambda noun: noun.__name__)
def test_bad_values_in_every_key(noun: type[Words]) -> None:
    for key in (*noun.model_fields, "beta", "zzz", "\x1b[2J"):
        for raw in BAD:
            try:
                noun(**{key: raw})
            except ModelError as error:
                for problem in error.problems:
                    assert problem.sentence.isprintable(), (key, raw)
                    assert problem.place.isprintable(), (key, raw)
                    assert len(problem.sentence) < 500, (key, raw)
                    assert not any(word in problem.sentence.lower() for word in THEIRS), (key, raw, problem)


@pytest.mark.parametrize(
    "raw", ["nan mm", "inf mm", "-1 mm", "0 mm", "1e400 mm", 3, float("nan"), True, [], {}, "5 kg"]
)
@pytest.mark.parametrize("key", ["length", "diameter", "end_diameter"])
def test_sizes_that_are_never_taken(key: str, raw: Any) -> None:
    with pytest.raises(ModelError):
        fs.Segment("s", **({"length": "1 mm", "diameter": "1 mm"} | {key: raw}))
