"""Streams, pipes, colour, width."""

import os
import pty
import subprocess
import sys

import pytest

from fe_shaft.cli.output import coloured


class Terminal:
    """A stream that says it is a terminal."""

    def isatty(self):
        return True


@pytest.mark.parametrize(
    "line", ["check two.toml --case all --sources", "solve two.toml --case all", "compare two.toml"]
)
def test_text_is_plain_and_fits(run, folder, line):
    text = (folder / "layshaft.toml").read_text().replace("Layshaft of", "L\N{LATIN SMALL LETTER A WITH DIAERESIS}uft")
    (folder / "two.toml").write_text(text.replace("barring_wheel", "handwheel_with_a_name_too_long_for_its_column"))
    done = run(*line.split())
    assert done.out.isascii()
    assert max(map(len, done.out.splitlines())) <= 100
    assert not any(row.endswith(" ") for row in done.out.splitlines())
    assert "\x1b" not in done.out


def test_a_reader_that_goes_away_is_no_error(real, folder):
    with subprocess.Popen(["true"], stdin=subprocess.PIPE) as reader:
        reader.wait()
        done = real("solve", "kind.toml", capture_output=False, stdout=reader.stdin, stderr=subprocess.PIPE)
    assert (done.returncode, done.stderr) == (0, "")


def test_a_reader_that_goes_away_does_not_hide_a_failed_limit(real):
    with subprocess.Popen(["true"], stdin=subprocess.PIPE) as reader:
        reader.wait()
        done = real("solve", "layshaft.toml", capture_output=False, stdout=reader.stdin, stderr=subprocess.PIPE)
    assert done.returncode == 1


def test_only_verdict_words_are_coloured_and_only_on_terminals(monkeypatch):
    for name in ("NO_COLOR", "TERM"):
        monkeypatch.delenv(name, raising=False)
    text = "FAIL and unsure; others pass as given  pass\nFAILURE"
    assert coloured(text, sys.stdout) == text
    shown = coloured(text, Terminal())
    assert (
        shown == "\x1b[1;31mFAIL\x1b[0m and \x1b[33munsure\x1b[0m; others pass as given  \x1b[32mpass\x1b[0m\nFAILURE"
    )
    monkeypatch.setenv("NO_COLOR", "1")
    assert coloured(text, Terminal()) == text
    monkeypatch.delenv("NO_COLOR")
    monkeypatch.setenv("TERM", "dumb")
    assert coloured(text, Terminal()) == text


@pytest.mark.skipif(sys.platform == "win32", reason="needs a pseudo-terminal")
def test_a_real_terminal_sees_colour(real):
    ours, theirs = pty.openpty()
    done = real(
        "solve", "layshaft.toml", capture_output=False, stdout=theirs, stderr=subprocess.PIPE,
        env={"TERM": "xterm", "NO_COLOR": ""},
    )  # fmt: skip
    os.close(theirs)
    seen = os.read(ours, 400)
    os.close(ours)
    assert done.returncode == 1
    assert b"\x1b[1;31mFAIL\x1b[0m" in seen


def test_python_m_and_the_function_say_the_same(real, run):
    done = real("check", "layshaft.toml")
    assert (done.returncode, done.stderr) == (0, "")
    assert done.stdout == run("check", "layshaft.toml").out


def test_control_characters_of_file_names_do_no_harm(run):
    done = run("solve", "a\x1b[31mb.toml")
    assert done.code == 6
    assert "\x1b" not in done.err


def test_an_ascii_terminal_gets_a_model_file_as_utf_8(real, folder):
    text = (folder / "layshaft.toml").read_text().replace("Layshaft of", "\N{GREEK CAPITAL LETTER OMEGA} of")
    (folder / "omega.toml").write_text(text, encoding="utf-8")
    done = real("write", "omega.toml", text=False, env={"PYTHONIOENCODING": "ascii"})
    assert done.returncode == 0
    assert "\N{GREEK CAPITAL LETTER OMEGA} of" in done.stdout.decode("utf-8")
