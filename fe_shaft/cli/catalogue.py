"""The commands and options in words: what each needs, may have and does, with an example."""

from __future__ import annotations

import argparse
from dataclasses import dataclass
from typing import Any


@dataclass(frozen=True)
class Option:
    """One option: its flags, what argparse makes of it, and an example of its use."""

    flags: tuple[str, ...]
    help: str
    metavar: str = ""
    example: str = ""
    many: bool = False
    name: str = ""

    def add_to(self, group: argparse._ArgumentGroup) -> None:
        """Tell a parser's group of it."""
        keys: dict[str, Any] = {"help": self.help}
        if self.name:
            keys["dest"] = self.name
        if not self.metavar:
            keys["action"] = "store_true"
        else:
            keys |= {"metavar": self.metavar, "action": "append" if self.many else "store"}
        group.add_argument(*self.flags, **keys)


OPTIONS = {
    "set": Option(
        ("--set",),
        "another value at an address, without changing the file; may be repeated",
        "ADDRESS=VALUE",
        '--set "layshaft.wheel_seat.diameter=44 mm"',
        many=True,
        name="settings",
    ),
    "case": Option(
        ("--case",), "load case to show; may be repeated; `all` shows every one", "NAME", "--case running", many=True,
        name="cases",
    ),
    "view_case": Option(("--case",), "load case to begin with", "NAME", "--case running", many=True, name="cases"),
    "sources": Option(("--sources",), "say where figures and limits come from"),
    "json": Option(("--json",), "the same as JSON, numbers in SI"),
    "folder": Option(
        ("-o", "--output"), "write tables, VTK files, results.json and the model into a folder", "DIR", "-o results"
    ),
    "file": Option(("-o", "--output"), "write to a file instead of the terminal", "FILE", "-o whole.toml"),
    "picture": Option(
        ("--picture",), "write a picture as PNG; needs no display", "FILE", "--picture bent.png"
    ),
    "strict": Option(("--strict",), "exit with 1 also when a limit is unsure"),
    "ignore": Option(("--ignore-limits",), "exit with 0 also when a limit is exceeded"),
    "quantity": Option(
        ("--quantity",), "what colours the shaft: deflection, slope, bending moment, ...", "NAME", "--quantity slope"
    ),
    "force": Option(("--force",), "write over a file that is there"),
}  # fmt: skip


@dataclass(frozen=True)
class Command:
    """One command: what it needs, what it may have, what it does, and an example."""

    needs: str
    options: tuple[str, ...]
    line: str
    about: str
    example: str
    most: int = 1
    least: int = 1


COMMANDS = {
    "new": Command(
        "FILE", ("force",), "write a commented starter model",
        "Write a commented model of an invented gear shaft: replace its figures by your own.",
        "fe-shaft new shaft.toml",
    ),
    "check": Command(
        "FILE", ("set", "case", "sources", "json"), "say what was understood, and whether it can be solved",
        "Read a model and say what was understood: parts and places, forces in words, thrust left over and who\n"
        "holds it, torque in and out, defaults taken, estimates.",
        "fe-shaft check layshaft.toml --case all",
    ),
    "solve": Command(
        "FILE", ("set", "case", "sources", "json", "folder", "picture", "strict", "ignore"),
        "movements, forces, verdicts and their proof",
        "Solve a model in all its load cases: verdicts on its limits, movement of every part, forces on the\n"
        "shaft, and the proof that it is in equilibrium. Exits with 1 when a limit is exceeded.",
        "fe-shaft solve layshaft.toml --case running -o results",
    ),
    "compare": Command(
        "FILE [FILE]", ("set", "case", "json", "folder", "picture"),
        "rigid pins beside your bearings; or two models",
        "With one file: every bearing and seat as a rigid pin, beside the bearings as given. With two files: one\n"
        "beside the other, what differs first; --set then changes the second one. Always exits with 0.",
        "fe-shaft compare layshaft.toml",
        most=2,
    ),
    "view": Command(
        "FILE", ("set", "view_case", "picture", "quantity"), "the bent shafts in a window, or as a picture",
        "Open a window with the bent shafts, pins beside bearings; `h` in it lists the keys. --picture FILE\n"
        "writes a PNG instead and needs no display.",
        "fe-shaft view layshaft.toml --picture bent.png",
    ),
    "write": Command(
        "FILE", ("set", "file"), "the whole model that a variant stands for",
        "Write the whole model that a file stands for, variants and --set carried out, values as they were\n"
        "written. Comments are not kept.",
        "fe-shaft write variant.toml -o whole.toml",
    ),
    "schema": Command(
        "", ("file",), "JSON Schema of the model file, for editors",
        "Print the JSON Schema of the model file: editors then complete keys and mark mistakes.",
        "fe-shaft schema -o fe_shaft.schema.json",
        most=0, least=0,
    ),
    "explain": Command(
        "[WORD]", (), "the page of one key, quantity, sign, unit or message",
        "Explain a key of the model file, a quantity or sign of the results, a unit, a material, an address, or a\n"
        "message in quotes. Without a word: what can be explained.",
        "fe-shaft explain holds",
        most=20, least=0,
    ),
}  # fmt: skip
