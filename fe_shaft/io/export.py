"""Results into a folder: VTK files, tables, a record, and the model as solved."""

from __future__ import annotations

import os
from pathlib import Path
from typing import TYPE_CHECKING

from fe_shaft.errors import FileError
from fe_shaft.files import write_many
from fe_shaft.io.model_file import write_text
from fe_shaft.io.vtk_files import write_vtk
from fe_shaft.results.record import results_record, to_json
from fe_shaft.results.table import (
    comparison_table,
    element_table,
    force_table,
    movement_table,
    note_table,
    shoulder_table,
    station_table,
)

if TYPE_CHECKING:
    from fe_shaft.results.comparison import Comparison
    from fe_shaft.results.results import Results


def export(results: Results, folder: str | os.PathLike[str], comparison: Comparison | None = None) -> list[Path]:
    """Write everything that came out into a folder, which is made if it does not exist.

    ``line_CASE.vtu``, ``surface_CASE.vtu``, ``line_cases.pvd``, ``surface_cases.pvd``; ``movement.csv``,
    ``forces.csv``, ``stations.csv`` with their units in the headings, ``shoulders.csv`` with what of every movement and
    force the shoulders make; ``notes.csv``, what was taken and what is doubtful; ``results.json`` in SI;
    ``model.toml``, the whole model as solved; with computed bearings ``elements.csv``, what each ball or roller bears;
    with a comparison ``comparison.csv``. Other files in the folder are left alone.

    Parameters
    ----------
    results : Results
    folder : path
    comparison : Comparison, optional

    Returns
    -------
    list of Path
        The files written, each whole or not at all.

    Raises
    ------
    FileError
        Names the path and the reason.
    """
    target = Path(folder)
    texts = {
        "movement.csv": movement_table(results).to_csv(),
        "forces.csv": force_table(results).to_csv(),
        "stations.csv": station_table(results).to_csv(),
        "shoulders.csv": shoulder_table(results).to_csv(),
        "notes.csv": note_table(results).to_csv(),
        "results.json": to_json(results_record(results)),
        "model.toml": write_text(results.model),
    }
    if results.rolling:
        texts["elements.csv"] = element_table(results).to_csv()
    if comparison is not None:
        texts["comparison.csv"] = comparison_table(comparison).to_csv()
    try:
        target.mkdir(parents=True, exist_ok=True)
    except OSError as error:
        raise FileError(f"{target}: the folder cannot be made: {error.strerror or error}.") from error
    files = {target / name: text for name, text in texts.items()}
    pictures = write_vtk(results, target)
    write_many(files)
    return [*pictures, *files]
