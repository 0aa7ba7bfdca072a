"""Every example is solved, proven and compared; they are invented and say so."""

import subprocess
import sys
from pathlib import Path

import pytest

import fe_shaft as fs

EXAMPLES = Path(__file__).resolve().parent.parent / "examples"
MODELS = sorted(EXAMPLES.glob("*.toml"))


@pytest.mark.parametrize("path", MODELS, ids=lambda path: path.stem)
def test_example_is_solved_and_compared(path):
    comparison = fs.compare(fs.read(path))
    assert comparison.right.proof.worst < 1e-12
    assert comparison.left.proof.worst < 1e-12
    assert "Invented" in path.read_text(encoding="utf-8").split("format", 1)[0]


def test_the_demo_fails_one_limit_and_is_unsure_of_two():
    results = fs.solve(fs.read(EXAMPLES / "layshaft.toml"))
    assert [verdict.word for verdict in results.verdicts] == ["FAIL", "unsure", "unsure"]


def test_the_demo_script_says_what_the_demo_file_says(tmp_path):
    script = EXAMPLES / "layshaft.py"
    assert len(script.read_text(encoding="utf-8").splitlines()) < 40
    run = subprocess.run([sys.executable, script], cwd=tmp_path, capture_output=True, text=True, check=True)
    assert run.stderr == ""
    assert (tmp_path / "layshaft.png").stat().st_size > 10_000
    by_file = str(fs.compare(fs.read(EXAMPLES / "layshaft.toml")))
    table = by_file[by_file.index("Case running") : by_file.index("Pins hold")]
    assert table in run.stdout


def test_three_bearings_tell_which_reactions_can_be_trusted():
    text = str(fs.compare(fs.read(EXAMPLES / "three_bearings.toml")))
    assert "statically indeterminate" in text
