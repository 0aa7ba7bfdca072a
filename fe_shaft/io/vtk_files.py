"""Results as VTK files: the shaft's line and its surface, one ``.vtu`` per case, and a ``.pvd`` over the cases.

The only door to meshio, which writes the ``.vtu``; it knows no series, so the ``.pvd`` (a small XML list) is written
here. All shafts lie in the model's coordinates, with nothing exaggerated. SI throughout; the unit stands in the name of
each field. Components of vectors named ``section ...`` are those of the shaft's own frame (N Vy Vz, Mx My Mz, on the
face whose outward normal is +x); every other vector is in the model's coordinates. ``left`` and ``right`` are just left
and just right of a station, where a load or a support makes a jump.
"""

from __future__ import annotations

import re
import unicodedata
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING, Any
from xml.sax.saxutils import quoteattr

import numpy as np
from numpy.typing import NDArray

from fe_shaft.errors import FileError
from fe_shaft.files import whole, write_whole
from fe_shaft.results.body import line_fields, revolve
from fe_shaft.results.of_shoulders import along_of_shoulders

if TYPE_CHECKING:
    from fe_shaft.results.line import Line
    from fe_shaft.results.results import Results

Floats = NDArray[np.float64]
Fields = dict[str, NDArray[Any]]

AROUND = 48  # points on a ring of the surface
LONGEST_NAME = 60  # characters of a case's name that go into a file's name
_RESERVED = {"con", "prn", "aux", "nul", *(f"{port}{k}" for port in ("com", "lpt") for k in range(10))}


def write_vtk(results: Results, folder: str | Path) -> tuple[Path, ...]:
    """Write line and surface of every case into a folder, which is made if it does not exist.

    ``line_CASE.vtu``, ``surface_CASE.vtu``, ``line_cases.pvd``, ``surface_cases.pvd``; signs that a file's name cannot
    hold become ``_``, the true name of the case stands in the ``.pvd``.

    Parameters
    ----------
    results : Results
        Of a solved model, all its cases.
    folder : path
        Files of the same names in it are replaced.

    Returns
    -------
    tuple of Path
        The files, in the order they were written. Each is written whole or not at all.

    Raises
    ------
    FileError
        Names the path and the reason.
    """
    target = Path(folder)
    _make(target)
    stems = file_stems(results.cases)
    written: list[Path] = []
    for kind, shape in (("line", _Lines(results)), ("surface", _Surfaces(results))):
        names = [f"{kind}_{stem}.vtu" for stem in stems]
        for case, name in enumerate(names):
            _write_vtu(target / name, shape.points, shape.cells, shape.fields(case))
            written.append(target / name)
        listing = target / f"{kind}_cases.pvd"
        write_whole(listing, case_list(results.cases, names))
        written.append(listing)
    return tuple(written)


def file_stems(cases: Iterable[str]) -> tuple[str, ...]:
    """A safe and short file name for each case, none alike (capitals make no difference on some systems)."""
    taken: set[str] = set()
    stems = []
    for case in cases:
        plain = unicodedata.normalize("NFKD", case).encode("ascii", "ignore").decode()
        stem = re.sub(r"[^A-Za-z0-9-]+", "_", plain).strip("_-")[:LONGEST_NAME] or "case"
        if stem.lower() in _RESERVED:
            stem = f"{stem}_case"
        unique, number = stem, 2
        while unique.lower() in taken:
            unique, number = f"{stem}_{number}", number + 1
        taken.add(unique.lower())
        stems.append(unique)
    return tuple(stems)


def case_list(cases: Sequence[str], files: Sequence[str]) -> str:
    """Text of a ``.pvd``: the files of the cases, case number as time, with the case's true name."""
    rows = [
        f'    <DataSet timestep="{number}" part="0" name={quoteattr(_xml_text(case))} file={quoteattr(file)}/>'
        for number, (case, file) in enumerate(zip(cases, files, strict=True))
    ]
    head = ['<?xml version="1.0" encoding="utf-8"?>', '<VTKFile type="Collection" version="0.1">', "  <Collection>"]
    return "\n".join([*head, *rows, "  </Collection>", "</VTKFile>", ""])


@dataclass(frozen=True)
class _Shaft:
    """One shaft in the model's coordinates.

    Attributes
    ----------
    by_shoulders : (n_cases, n, 6) [m, rad], what of its movement the shoulders make
    """

    line: Line
    by_shoulders: Floats
    origin: Floats
    rotation: Floats

    def to_model(self, vectors: Floats) -> Floats:
        return vectors @ self.rotation.T


def _shafts(results: Results) -> list[_Shaft]:
    frames = results.model.frames
    return [
        _Shaft(line, along_of_shoulders(results, name), frames[name].origin, frames[name].rotation)
        for name, line in results.lines.items()
    ]


class _Lines:
    """Every shaft's stations, joined by lines."""

    def __init__(self, results: Results) -> None:
        self._shafts = _shafts(results)
        sizes = [len(shaft.line.x) for shaft in self._shafts]
        starts = np.cumsum([0, *sizes[:-1]])
        axes = [np.column_stack([s.line.x, np.zeros((len(s.line.x), 2))]) for s in self._shafts]
        self.points = np.concatenate([s.origin + s.to_model(a) for s, a in zip(self._shafts, axes, strict=True)])
        pairs = [
            start + np.arange(size - 1)[:, None] + np.array([0, 1]) for start, size in zip(starts, sizes, strict=True)
        ]
        self.cells = [("line", np.concatenate(pairs))]

    def fields(self, case: int) -> Fields:
        return _join([self._of_shaft(number, shaft, case) for number, shaft in enumerate(self._shafts)])

    @staticmethod
    def _of_shaft(number: int, shaft: _Shaft, case: int) -> Fields:
        line = shaft.line
        left, right = line.force_left[case], line.force_right[case]
        return _movement(shaft, line.u[case], number) | {
            "displacement by shoulders [m]": shaft.to_model(shaft.by_shoulders[case][:, :3]),
            "section force left [N]": left[:, :3],
            "section force right [N]": right[:, :3],
            "section moment left [N m]": left[:, 3:],
            "section moment right [N m]": right[:, 3:],
            "diameter left [m]": line.diameter_left,
            "diameter right [m]": line.diameter_right,
            "bore left [m]": line.bore_left,
            "bore right [m]": line.bore_right,
        }


class _Surfaces:
    """Every shaft's body of revolution."""

    def __init__(self, results: Results) -> None:
        self._shafts = _shafts(results)
        self._bodies = [revolve(shaft.line, around=AROUND) for shaft in self._shafts]
        self._rings = [line_fields(s.line, body.places) for s, body in zip(self._shafts, self._bodies, strict=True)]
        plain = results.plain or results
        bare = [line_fields(of, body.places)[0] for of, body in zip(plain.lines.values(), self._bodies, strict=True)]
        self._by_shoulders = [rings[0] - u for rings, u in zip(self._rings, bare, strict=True)]
        starts = np.cumsum([0, *(len(body.points) for body in self._bodies[:-1])])
        self.points = np.concatenate(
            [s.origin + s.to_model(body.points) for s, body in zip(self._shafts, self._bodies, strict=True)]
        )
        self.cells = [
            (kind, np.concatenate([getattr(body, name) + k for body, k in zip(self._bodies, starts, strict=True)]))
            for kind, name in (("quad", "quads"), ("triangle", "triangles"))
        ]
        self.cells = [(kind, faces) for kind, faces in self.cells if len(faces)]

    def fields(self, case: int) -> Fields:
        return _join([self._of_shaft(number, case) for number in range(len(self._shafts))])

    def _of_shaft(self, number: int, case: int) -> Fields:
        shaft, body = self._shafts[number], self._bodies[number]
        u, force = (field[case] for field in self._rings[number])
        force = force[body.ring]
        fields = _movement(shaft, u[body.ring], number)
        fields["displacement [m]"] = shaft.to_model(body.movement(u))
        made = body.movement(self._by_shoulders[number][case])
        return fields | {
            "displacement by shoulders [m]": shaft.to_model(made),
            "axial force [N]": force[:, 0],
            "shear force [N]": np.hypot(force[:, 1], force[:, 2]),
            "torque [N m]": force[:, 3],
            "bending moment [N m]": np.hypot(force[:, 4], force[:, 5]),
        }


def _movement(shaft: _Shaft, u: Floats, number: int) -> Fields:
    """Fields of a section's movement; ``u`` is (n, 6)."""
    return {
        "displacement [m]": shaft.to_model(u[:, :3]),
        "rotation [rad]": shaft.to_model(u[:, 3:]),
        "deflection [m]": np.hypot(u[:, 1], u[:, 2]),
        "slope [rad]": np.hypot(u[:, 4], u[:, 5]),
        "axial movement [m]": u[:, 0],
        "twist [rad]": u[:, 3],
        "shaft": np.full(len(u), number, dtype=np.int64),
    }


def _join(parts: Sequence[Fields]) -> Fields:
    return {name: np.ascontiguousarray(np.concatenate([part[name] for part in parts])) for name in parts[0]}


def _write_vtu(path: Path, points: Floats, cells: list[tuple[str, NDArray[np.int64]]], fields: Fields) -> None:
    import meshio

    mesh = meshio.Mesh(points, cells, point_data=fields)
    with whole(path) as temporary:
        meshio.vtu.write(str(temporary), mesh, compression="zlib")


def _make(folder: Path) -> None:
    try:
        folder.mkdir(parents=True, exist_ok=True)
    except OSError as error:
        raise FileError(f"{folder}: the folder cannot be made: {error.strerror or error}.") from error


def _xml_text(text: str) -> str:
    """Text without the signs that XML 1.0 does not allow (section 2.2)."""
    return re.sub("[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\U00010000-\U0010ffff]", "\ufffd", text)
