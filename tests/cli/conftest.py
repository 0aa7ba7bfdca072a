"""Models for the command line, in a folder of their own, and the command itself in this process."""

import os
import subprocess
import sys
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path

import pytest

from fe_shaft.cli import main

MODELS = Path(__file__).with_name("models")
ROOT = Path(__file__).parents[2]


def environment(**more: str) -> dict[str, str]:
    """The environment of a process that finds the package, installed or not."""
    return {**os.environ, "PYTHONPATH": str(ROOT), **more}


@dataclass(frozen=True)
class Ran:
    """What a command did."""

    code: int
    out: str
    err: str


@pytest.fixture
def folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    """The working folder, with the layshaft and some relatives of it."""
    text = (MODELS / "layshaft.toml").read_text(encoding="utf-8")
    (tmp_path / "layshaft.toml").write_text(text, encoding="utf-8")
    kind = text.replace('max = "20 um"', 'max = "200 um"')
    (tmp_path / "kind.toml").write_text(kind.replace('"0.5 mrad"', '"5 mrad"').replace('"1 mrad"', '"9 mrad"'))
    (tmp_path / "unsure.toml").write_text(text.replace('max = "20 um"', 'max = "50 um"'))
    loose = text.replace('holds = ["radial", "axial"]', 'holds = ["radial"]').replace(', axial = "~60 N/um"', "")
    (tmp_path / "loose.toml").write_text(loose)
    (tmp_path / "unbalanced.toml").write_text(text.replace('leaves = "pinion"\n', ""))
    (tmp_path / "stiffer.toml").write_text(
        'extends = "layshaft.toml"\ntitle = "Stiffer"\n[change]\nlay_left.stiffness.radial = "220 N/um"\n'
    )
    (tmp_path / "slips.toml").write_text(text.replace('"38 mm"', "38", 1).replace('of = "wheel"', 'of = "weel"'))
    monkeypatch.chdir(tmp_path)
    monkeypatch.delenv("FE_SHAFT_DEBUG", raising=False)
    return tmp_path


@pytest.fixture
def run(folder: Path, capsys: pytest.CaptureFixture[str]) -> Callable[..., Ran]:
    """The command in this process."""

    def ran(*words: str) -> Ran:
        code = main(words)
        out, err = capsys.readouterr()
        return Ran(code, out, err)

    return ran


@pytest.fixture
def real(folder: Path) -> Callable[..., subprocess.CompletedProcess[str]]:
    """The command as a process of its own."""

    def ran(*words: str, **keys: object) -> subprocess.CompletedProcess[str]:
        env = environment(**keys.pop("env", {}))  # type: ignore[arg-type]
        command = [sys.executable, "-m", "fe_shaft", *words]
        given = {"capture_output": True, "text": True, "timeout": 120, "cwd": folder, "env": env, **keys}
        return subprocess.run(command, check=False, **given)  # type: ignore[call-overload,no-any-return]

    return ran
