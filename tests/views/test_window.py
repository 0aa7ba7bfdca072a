"""The window, each time in a process of its own: its tests, its waiting, and what is said where there is no display."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

import pytest

from fe_shaft.errors import UsageError
from fe_shaft.views.window import view
from tests.views.demo import solved

ROOT = Path(__file__).parents[2]
CHECKS = Path(__file__).with_name("window_checks.py")


def run(display, *arguments):
    environment = os.environ | {"DISPLAY": display}
    return subprocess.run(
        [sys.executable, *arguments], cwd=ROOT, env=environment, capture_output=True, text=True, timeout=300
    )


def test_everything_in_window_checks(display):
    done = run(display, "-m", "pytest", "-q", "-p", "no:cacheprovider", "-p", "no:xdist", str(CHECKS))
    assert done.returncode == 0, done.stdout
    assert " passed" in done.stdout
    assert "skipped" not in done.stdout


ESCAPE = """
from tests.views.demo import pinned, solved
from fe_shaft.views.window import Window
window = Window(solved(), pinned(), size=(800, 500))
interactor = window.plotter.iren.interactor

def leave(*_):
    interactor.SetKeyEventInformation(0, 0, "\\0", 0, "Escape")
    interactor.InvokeEvent("KeyPressEvent")

window.plotter.add_timer_event(max_steps=1, duration=300, callback=leave)
window.open()
print("closed")
"""


def test_window_waits_until_escape_and_says_nothing(display):
    """In a process of its own, so that a window that does not close cannot hold up the others."""
    done = run(display, "-W", "error", "-c", ESCAPE)
    assert (done.returncode, done.stdout, done.stderr) == (0, "closed\n", "")


def test_without_a_display_one_sentence_names_the_remedy(monkeypatch):
    monkeypatch.delenv("DISPLAY", raising=False)
    with pytest.raises(UsageError, match=r"no display.*--picture"):
        view(solved())
    assert "DISPLAY" not in os.environ


NO_SERVER = """
from fe_shaft.errors import UsageError
from fe_shaft.views.window import view
from tests.views.demo import solved
try:
    view(solved())
except UsageError as error:
    print(error)
"""


@pytest.mark.skipif(not sys.platform.startswith("linux"), reason="displays have names on Linux only")
def test_a_display_that_does_not_answer_is_named():
    done = run(":987", "-W", "error", "-c", NO_SERVER)
    assert done.stdout == (
        "the display :987 cannot be opened for a window. Write a picture instead: --picture FILE.png, or "
        "fs.picture(results, FILE) in a script.\n"
    )
    assert (done.returncode, done.stderr) == (0, "")
