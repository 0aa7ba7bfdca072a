"""A display for the tests of the window: the one there is, or a virtual one started for them."""

from __future__ import annotations

import os
import shutil
import subprocess
from collections.abc import Iterator

import pytest


@pytest.fixture(scope="session")
def display() -> Iterator[str]:
    """Name of a display; the test is skipped where there is none and none can be started."""
    if os.environ.get("DISPLAY"):
        yield os.environ["DISPLAY"]
        return
    server = shutil.which("Xvfb")
    if server is None:
        pytest.skip("the window is not tested: there is no display, and Xvfb is not installed (apt install xvfb)")
    reading, writing = os.pipe()
    command = [server, "-displayfd", str(writing), "-screen", "0", "1920x1080x24", "-nolisten", "tcp"]
    process = subprocess.Popen(command, pass_fds=[writing], stderr=subprocess.DEVNULL)
    os.close(writing)
    try:
        with os.fdopen(reading) as answer:
            number = answer.readline().strip()
        if not number:
            pytest.skip("the window is not tested: Xvfb is installed, but did not start")
        yield f":{number}"
    finally:
        process.terminate()
        process.wait(timeout=10)
