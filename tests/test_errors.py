"""Error tree, exit codes and the text a terminal shows."""

import pickle

import pytest

from fe_shaft import errors
from fe_shaft.errors import ModelError, Problem, ShaftError, nearest, quote


@pytest.mark.parametrize(
    ("name", "code"),
    [
        ("UsageError", 2),
        ("ModelError", 3),
        ("FreeMotionError", 4),
        ("LoadError", 4),
        ("SolutionError", 5),
        ("FileError", 6),
    ],
)
def test_exit_codes_and_one_base(name: str, code: int) -> None:
    kind = getattr(errors, name)
    assert issubclass(kind, ShaftError)
    assert kind.exit_code == code
    assert f"{name} " in (errors.__doc__ or ""), "the tree at the top of the module names every class"


def test_one_problem_is_one_line() -> None:
    problem = Problem("input.seal_land.bore", "60 mm leaves no wall. Make it smaller.", "drive.toml", 31)
    assert str(ModelError(problem)) == "drive.toml:31 input.seal_land.bore: 60 mm leaves no wall. Make it smaller."
    assert ModelError(problem).problems == (problem,)


@pytest.mark.parametrize(
    ("problem", "text"),
    [
        (Problem("wheel.beta", "No."), "wheel.beta: No."),
        (Problem("wheel.beta", "No.", "a.toml"), "a.toml wheel.beta: No."),
        (Problem("", "No.", "a.toml", 3), "a.toml:3: No."),
        (Problem("", "No."), "No."),
    ],
)
def test_what_is_unknown_is_left_out(problem: Problem, text: str) -> None:
    assert str(problem) == str(ModelError([problem])) == text


def test_several_problems_are_aligned_and_in_the_order_of_the_file() -> None:
    slip = '"93 N/m" is 0.000093 N/um; usual: 5 to 5000. Meant: N/um? (to keep it: range_check = "off" in this table)'
    error = ModelError(
        [
            Problem("wheel_deflection.of", 'no part is called "weel". Nearest: wheel.', "slips.toml", 58),
            Problem("layshaft.wheel_seat.length", '38 has no unit. Write "38 mm".', "slips.toml", 9),
            Problem("lay_left.stiffness.radial", slip, "slips.toml", 22),
        ]
    )
    assert (
        str(error)
        == """\
slips.toml: 3 errors, nothing solved.
  :9   layshaft.wheel_seat.length    38 has no unit. Write "38 mm".
  :22  lay_left.stiffness.radial     "93 N/m" is 0.000093 N/um; usual: 5 to 5000. Meant: N/um?
                                     (to keep it: range_check = "off" in this table)
  :58  wheel_deflection.of           no part is called "weel". Nearest: wheel."""
    )


def test_script_has_no_lines_to_tell() -> None:
    error = ModelError([Problem("wheel.helix", "a."), Problem("lay_left.at", "b.")])
    assert str(error) == "2 errors, nothing solved.\n  wheel.helix    a.\n  lay_left.at    b."


def test_several_files_are_named_on_each_line() -> None:
    error = ModelError([Problem("x", "a.", "b.toml", 2), Problem("y", "b.", "a.toml", 10)])
    assert str(error) == "2 errors, nothing solved.\n  a.toml:10  y    b.\n  b.toml:2   x    a."


def test_lines_keep_to_100_columns_and_lose_no_word() -> None:
    sentence = " ".join(f"word{number}" for number in range(60))
    error = ModelError([Problem("short", sentence, "a.toml", 1), Problem("p" * 60, sentence, "a.toml", 2)])
    lines = str(error).splitlines()
    assert max(map(len, lines)) <= 100
    assert str(error).split().count("word59") == 2


def test_very_many_problems_are_counted_not_printed() -> None:
    text = str(ModelError(Problem(f"segment_{number}", "bad.") for number in range(1000)))
    assert len(text.splitlines()) == 52
    assert text.endswith("and 950 more.")


def test_model_error_without_a_problem_is_a_fault() -> None:
    with pytest.raises(ValueError, match="at least one"):
        ModelError([])


def test_errors_cross_processes() -> None:
    error = ModelError([Problem("a", "b.", "c.toml", 1), Problem("d", "e.")])
    copy = pickle.loads(pickle.dumps(error))
    assert copy.problems == error.problems
    assert str(copy) == str(error)


@pytest.mark.parametrize(
    ("word", "known", "hint"),
    [
        ("weel", ["wheel", "pinion"], "Nearest: wheel."),
        ("WHEEL", ["Wheel"], "Nearest: Wheel."),
        ("xyz", ["wheel", "pinion"], "Known: wheel, pinion."),
        ("xyz", [f"part{number:04}" for number in range(9)], ""),
        ("xyz", [], ""),
    ],
)
def test_nearest(word: str, known: list[str], hint: str) -> None:
    assert nearest(word, known) == hint


def test_nearest_of_a_huge_word_is_quick_and_harmless() -> None:
    assert nearest("w" * 10**6, [f"wheel_number_{number}" for number in range(100)]) == ""


@pytest.mark.parametrize(
    ("text", "shown"),
    [("weel", '"weel"'), ("a\x1b[31m\n", '"a\\x1b[31m\\n"'), ("x" * 50, f'"{"x" * 37}..."')],
)
def test_quote_is_fit_to_print(text: str, shown: str) -> None:
    assert quote(text) == shown
