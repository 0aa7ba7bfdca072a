"""Wrong use: one sentence with the nearest right word, exit code 2, nothing on stdout."""

import pytest

SENTENCES = {
    "": "which command? One of new, check, solve",
    "slove a.toml": 'no command is called "slove". Nearest: solve.',
    "zzzz": 'no command is called "zzzz". Known: new, check',
    "layshaft.toml": "Write fe-shaft solve layshaft.toml",
    "--json solve layshaft.toml": '"--json" stands before the command. Write fe-shaft solve FILE --json.',
    "--fast": '"--fast" stands before the command.',
    "help wirte": "Nearest: write.",
    "solve": "solve of which file?",
    "compare": "compare of which file?",
    "solve a.toml b.toml": 'solve takes one file; "b.toml" is too many.',
    "compare a.toml b.toml c.toml": 'compare takes two files at most; "c.toml" is too many.',
    "schema a.toml": "schema takes no file",
    "solve a.toml --jsn": 'solve has no option "--jsn". Nearest: --json.',
    "solve a.toml --zzzz": 'solve has no option "--zzzz". Known: --set, --case',
    "solve a.toml --case": "--case needs a value. Write --case running.",
    "solve a.toml -o": "-o needs a value. Write -o results.",
    "solve a.toml --json=yes": "--json takes no value. Write --json alone.",
    "check a.toml --picture b.png": "check has no option --picture; solve, compare, view have it.",
    "new a.toml --strict": "new has no option --strict; solve has it.",
    "solve a.toml --strict --ignore-limits": "exclude each other",
    "solve layshaft.toml --case runing": 'no case is called "runing". Nearest: running.',
    "check layshaft.toml --case runing": 'no case is called "runing". Nearest: running.',
    "compare layshaft.toml --case runing": 'no case is called "runing". Nearest: running.',
    "view layshaft.toml --case runing --picture a.png": 'no case is called "runing". Nearest: running.',
    "solve layshaft.toml --set wheel.teeth": "no address and value",
    "solve layshaft.toml --set wheel.teeth=84 --set wheel.teeth=85": "stands twice",
    "solve layshaft.toml --picture a.jpg": "pictures are written as PNG only",
    "view layshaft.toml --picture a.png --quantity slpe": "slope",
    "explain defelction": 'nothing is known about "defelction". Nearest: deflection.',
}


@pytest.mark.parametrize("line", SENTENCES)
def test_sentence(run, line):
    done = run(*line.split())
    assert done.code == 2
    assert done.out == ""
    assert SENTENCES[line] in done.err
    assert done.err.count("\n") == 1
    assert "Traceback" not in done.err


def test_files_may_stand_around_options(run):
    between = run("compare", "layshaft.toml", "--case", "running", "stiffer.toml")
    behind = run("compare", "layshaft.toml", "stiffer.toml", "--case=running")
    assert between.code == 0
    assert between.out == behind.out


def test_a_file_that_looks_like_an_option(run, folder):
    (folder / "--odd.toml").write_text((folder / "layshaft.toml").read_text())
    assert run("check", "--", "--odd.toml").code == 0
