"""Every exit code, and what is said with it."""

import subprocess
import sys
from pathlib import Path

import pytest

from fe_shaft.errors import SolutionError
from tests.cli.conftest import environment


def test_0_done(run):
    done = run("solve", "kind.toml")
    assert (done.code, done.err) == (0, "")
    assert "pass" in done.out


def test_1_a_limit_is_exceeded(run):
    done = run("solve", "layshaft.toml")
    assert done.code == 1
    assert "FAIL" in done.out
    assert done.err == "1 of 3 limits fails, 2 are unsure: exit code 1.\n"


def test_1_unsure_only_if_strict(run):
    assert run("solve", "unsure.toml").code == 0
    done = run("solve", "unsure.toml", "--strict")
    assert done.code == 1
    assert "unsure: exit code 1" in done.err


def test_limits_can_be_ignored(run):
    done = run("solve", "layshaft.toml", "--ignore-limits")
    assert (done.code, done.err) == (0, "")
    assert "FAIL" in done.out


def test_comparing_and_viewing_never_judge(run):
    assert run("compare", "layshaft.toml").code == 0
    assert run("compare", "layshaft.toml", "stiffer.toml").code == 0
    assert run("check", "layshaft.toml").code == 0


@pytest.mark.parametrize("command", ["check", "solve", "compare", "view", "write"])
def test_3_the_model_has_errors(run, command):
    done = run(command, "slips.toml")
    assert (done.code, done.out) == (3, "")
    assert done.err.startswith("slips.toml: 2 errors, nothing solved.")
    assert ":8   layshaft.left_journal.length" not in done.err
    assert 'Write "38 mm".' in done.err
    assert 'no part is called "weel". Nearest: wheel.' in done.err


def test_3_wrong_setting(run):
    done = run("solve", "layshaft.toml", "--set", "wheel.tooth=84")
    assert (done.code, done.out) == (3, "")
    assert "teeth" in done.err


@pytest.mark.parametrize("command", ["solve", "compare", "view"])
def test_4_something_moves(run, command):
    done = run(command, "loose.toml")
    assert (done.code, done.out) == (4, "")
    assert "layshaft can slide along its axis" in done.err
    assert done.err.endswith("Nothing was solved. Exit code 4.\n")


def test_4_in_check_with_all_that_was_understood(run):
    done = run("check", "loose.toml")
    assert done.code == 4
    assert "but it cannot be solved" in done.out.splitlines()[0]
    assert "can slide along its axis" in done.out
    assert 'holds = ["radial", "axial"]' in done.out
    assert done.err == "loose.toml: it cannot be solved as it is. Exit code 4.\n"


@pytest.mark.parametrize("command", ["check", "solve"])
def test_4_torque_that_nothing_takes_out(run, command):
    done = run(command, "unbalanced.toml")
    assert done.code == 4
    assert "nothing takes" in done.out + done.err


def test_5_no_trustworthy_solution(run, monkeypatch):
    import fe_shaft.analysis.solve

    def refuse(model):
        raise SolutionError("the proof failed: energy 3e-05.")

    monkeypatch.setattr(fe_shaft.analysis.solve, "solve_once", refuse)
    done = run("solve", "layshaft.toml")
    assert (done.code, done.out) == (5, "")
    assert "the proof failed" in done.err


@pytest.mark.parametrize(
    ("line", "said"),
    [
        ("check nowhere.toml", "nowhere.toml does not exist."),
        ("solve .", "is a folder"),
        ("new layshaft.toml", "is there already; nothing was written"),
        ("new nowhere/a.toml", "the folder nowhere does not exist"),
        ("write layshaft.toml -o nowhere/a.toml", "the folder nowhere does not exist"),
        ("schema -o nowhere/a.json", "the folder nowhere does not exist"),
        ("view kind.toml --picture nowhere/a.png", "the folder nowhere does not exist"),
    ],
)
def test_6_files(run, line, said):
    done = run(*line.split())
    assert (done.code, done.out) == (6, "")
    assert said in done.err


@pytest.mark.skipif(sys.platform != "linux", reason="/dev/full is a thing of Linux")
def test_6_full_disk(real):
    with Path("/dev/full").open("w") as full:
        done = real("explain", "holds", capture_output=False, stdout=full, stderr=subprocess.PIPE)
    assert done.returncode == 6
    assert done.stderr == "the results cannot be written: no space left on device.\n"


def test_70_a_fault_of_the_program(run, monkeypatch):
    import fe_shaft.io.model_file

    def break_down(*_):
        return 1 / 0

    monkeypatch.setattr(fe_shaft.io.model_file, "read", break_down)
    done = run("solve", "layshaft.toml")
    assert (done.code, done.out) == (70, "")
    assert done.err.count("\n") == 1
    assert "please report it" in done.err
    assert "ZeroDivisionError at test_exit_codes.py:" in done.err
    monkeypatch.setenv("FE_SHAFT_DEBUG", "1")
    assert "Traceback" in run("solve", "layshaft.toml").err


@pytest.mark.parametrize(("error", "code"), [(KeyboardInterrupt, 130), (MemoryError, 5), (RecursionError, 70)])
def test_other_ends(run, monkeypatch, error, code):
    import fe_shaft.io.model_file

    def end(*_):
        raise error

    monkeypatch.setattr(fe_shaft.io.model_file, "read", end)
    done = run("solve", "layshaft.toml")
    assert (done.code, done.out) == (code, "")
    assert done.err.count("\n") == 1


@pytest.mark.skipif(sys.platform == "win32", reason="signals are a thing of POSIX")
def test_130_ctrl_c(folder):
    """A real signal, sent while the model is read."""
    code = (
        "import os, signal, fe_shaft.io.model_file as m; from fe_shaft.cli import main;"
        "m.read = lambda *_: os.kill(os.getpid(), signal.SIGINT);"
        "raise SystemExit(main(['solve', 'layshaft.toml']))"
    )
    command = [sys.executable, "-c", code]
    done = subprocess.run(command, capture_output=True, text=True, cwd=folder, check=False, env=environment())
    assert (done.returncode, done.stdout, done.stderr) == (130, "", "fe-shaft: interrupted.\n")
