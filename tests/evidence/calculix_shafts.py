"""The file of whole shafts solved by CalculiX, calculix_shafts.json: read, and computed anew where `ccx` is installed.

`python -m tests.evidence.calculix_shafts` solves every shaft of the file on two meshes and writes it again; names of
shafts behind it: only those. Geometry and loads are written by hand in the file and only read here.
"""

from __future__ import annotations

import datetime
import json
import re
import subprocess
import sys
import tempfile
import time
from pathlib import Path
from typing import Any

from tests.evidence.calculix_run import measure
from tests.evidence.calculix_solid import FINE, MIDDLE, Shaft, solid

FILE = Path(__file__).with_name("calculix_shafts.json")
MESHES = {"middle": MIDDLE, "fine": FINE}
DIGITS = 7


def read() -> dict[str, Any]:
    content: dict[str, Any] = json.loads(FILE.read_text(encoding="utf-8"))
    return content


def version() -> str:
    told = subprocess.run(["ccx", "-v"], capture_output=True, text=True, check=False).stdout
    found = re.search(r"Version\s+(\S+)", told)
    return found[1] if found else "unknown"


def computed(shaft: Shaft) -> Shaft:
    """A shaft with what ccx finds on both meshes."""
    found: dict[str, Any] = {}
    for name, mesh in MESHES.items():
        with tempfile.TemporaryDirectory() as folder:
            measures = measure(Path(folder), shaft, mesh, threads=2)
        found[name] = {key: float(f"{value:.{DIGITS}g}") for key, value in measures.items()}
    nodes = [len(solid(shaft, mesh).nodes) for mesh in MESHES.values()]
    signed = {"nodes": nodes, "ccx": version(), "date": datetime.datetime.now(datetime.UTC).date().isoformat()}
    return {**shaft, **signed, "truth_middle_mesh": found["middle"], "truth": found["fine"]}


def text(content: dict[str, Any]) -> str:
    """JSON with one line for each key of a shaft."""
    shafts = []
    for shaft in content["shafts"]:
        rows = [f"   {json.dumps(key)}: {json.dumps(value)}" for key, value in shaft.items()]
        shafts.append("  {\n" + ",\n".join(rows) + "\n  }")
    about = json.dumps(content["about"], indent=1).replace("\n", "\n ")
    return f'{{\n "about": {about},\n "shafts": [\n' + ",\n".join(shafts) + "\n ]\n}\n"


def main(names: list[str]) -> None:
    content = read()
    for k, shaft in enumerate(content["shafts"]):
        if not names or shaft["name"] in names:
            start = time.perf_counter()
            content["shafts"][k] = computed(shaft)
            FILE.write_text(text(content), encoding="utf-8")
            print(shaft["name"], f"{time.perf_counter() - start:.0f} s")


if __name__ == "__main__":
    main(sys.argv[1:])
