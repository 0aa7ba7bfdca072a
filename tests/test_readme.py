"""The README does what it says: its commands are those of CI, its script runs, its reference is the model's own."""

import re
from pathlib import Path

from tests import readme_shoulders
from tests.readme_reference import README, reference, split

ROOT = README.parent
TEXT = README.read_text(encoding="utf-8")


def blocks(language: str) -> list[str]:
    return re.findall(rf"```{language}\n(.*?)```", TEXT, re.DOTALL)


def test_the_two_commands_are_one_line_each_and_are_what_ci_runs():
    commands = [block.strip() for block in blocks("sh")]
    assert len(commands) == 2
    ci = (ROOT / ".ci" / "run").read_text(encoding="utf-8").splitlines()
    assert all("\n" not in command and command in ci for command in commands)


def test_the_script_runs_and_is_ten_lines(capsys):
    (script,) = blocks("python")
    assert len(script.strip().splitlines()) == 12  # the import, an empty line and ten lines
    exec(compile(script, "README.md", "exec"), {})
    printed = capsys.readouterr().out
    assert "Rigid pins against your bearings" in printed
    assert float(printed.strip().splitlines()[-1]) > 0


def test_the_reference_is_the_models_own():
    _, inside, _ = split(TEXT)
    assert inside == reference(), "run: python -m tests.readme_reference"


def test_the_shoulders_of_its_shaft_are_what_is_computed():
    assert readme_shoulders.split(TEXT)[1] == readme_shoulders.table()


def test_every_file_that_the_readme_names_is_there():
    for target in re.findall(r"\]\(((?!https?:)[^)#]+)\)", TEXT):
        assert (ROOT / target).is_file(), target


def test_exit_codes_are_those_of_the_program():
    from fe_shaft import errors

    told = {int(code) for code in re.findall(r"^\| (\d+) \|", TEXT, re.MULTILINE)}
    classes = [cls for cls in vars(errors).values() if isinstance(cls, type) and issubclass(cls, errors.ShaftError)]
    own = {cls.exit_code for cls in classes}
    assert own <= told
    assert {0, 1, 130} <= told


def test_the_caution_stands_in_the_readme():
    assert "support, and do not replace, the judgement of a qualified engineer" in TEXT.replace("\n> ", " ")


def test_top_level_is_what_it_should_be():
    allowed = {"README.md", "DEVELOPERS.md", "pyproject.toml", "fe_shaft", "tests", "benchmarks", "examples"}
    tracked = {path.name for path in Path(ROOT).iterdir() if not path.name.startswith(".")}
    assert allowed <= tracked
