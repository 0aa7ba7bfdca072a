"""Tables that stand beside a model file: segments or a contour from a spreadsheet, a stiffness matrix."""

from __future__ import annotations

import csv
import re
from collections.abc import Sequence
from typing import Any

import numpy as np

from fe_shaft.errors import nearest, quote
from fe_shaft.io.model_source import Source
from fe_shaft.model.contour import KINDS
from fe_shaft.model.segment import Segment

_HEAD = re.compile(r"\s*([a-z_]+)\s*(?:\[\s*(.+?)\s*\]|\s(\S.*?))?\s*")
_COLUMNS = [key for key in Segment.model_fields if key not in ("range_check", "source")]


def segments(source: Source) -> tuple[list[dict[str, Any]], list[int]]:
    """The segments in a CSV file, and the line of each.

    The first line names the columns by the keys of a segment, a unit may follow (``length mm``); where a head has no
    unit, every cell has one. Columns are parted by comma, semicolon or tab.
    """
    return _table(source, _COLUMNS, "segments")


def contour_rows(source: Source) -> tuple[list[dict[str, Any]], list[int]]:
    """The points of a contour in a CSV file, and the line of each; columns x, diameter, bore, fillet, as above."""
    return _table(source, list(KINDS), "a contour")


def _table(source: Source, columns: Sequence[str], what: str) -> tuple[list[dict[str, Any]], list[int]]:
    """The rows of a CSV file that are not empty, and the line of each."""
    text = source.text
    first = text.split("\n", 1)[0]
    delimiter = max(";\t,", key=first.count)
    rows = csv.reader(text.splitlines(), delimiter=delimiter)
    try:
        heads = [_head(source, cell, columns, what) for cell in next(rows)]
        table, lines = [], []
        for row in rows:
            if any(cell.strip() for cell in row):
                table.append(_row(source, rows.line_num, heads, row))
                lines.append(rows.line_num)
    except csv.Error as error:
        raise source.error(rows.line_num, f"this line is no row of a table ({error}). Check its quotes.") from None
    names = [head for head, _ in heads]
    if len(set(names)) < len(names):
        raise source.error(1, f"{max(names, key=names.count)} stands twice in the head. Leave one column out.")
    return table, lines


def _head(source: Source, cell: str, columns: Sequence[str], what: str) -> tuple[str, str]:
    match = _HEAD.fullmatch(cell)
    if match is None or match[1] not in columns:
        word = match[1] if match else cell.strip()
        raise source.error(
            1,
            f"{quote(word)} is not a column of {what}. "
            f"{nearest(word, columns) or 'Columns: ' + ', '.join(columns) + '.'}",
        )
    return match[1], match[2] or match[3] or ""


def _row(source: Source, line: int, heads: list[tuple[str, str]], row: list[str]) -> dict[str, Any]:
    if len(row) > len(heads) and any(cell.strip() for cell in row[len(heads) :]):
        raise source.error(line, f"the line has {len(row)} cells, the head {len(heads)}. Decimal commas? Write 1.5.")
    cells = ((key, unit, cell.strip()) for (key, unit), cell in zip(heads, row, strict=False))
    return {key: _cell(key, unit, cell) for key, unit, cell in cells if cell}


def _cell(key: str, unit: str, cell: str) -> Any:
    if key == "shear" and re.fullmatch(r"[\d.]+", cell):
        return float(cell) if cell.count(".") <= 1 and cell != "." else cell
    return f"{cell} {unit}" if unit else cell


def matrix_rows(source: Source) -> list[list[float]]:
    """The rows of a 6 x 6 matrix: six lines of six numbers, or the Matrix Market format."""
    text = source.text
    if text.startswith("%%MatrixMarket"):
        return _matrix_market(source)
    rows = []
    for number, line in enumerate(text.splitlines(), 1):
        words = re.split(r"[\s,;]+", re.split(r"[#%]", line)[0].strip())
        if words == [""]:
            continue
        try:
            rows.append([float(word) for word in words])
        except ValueError:
            raise source.error(number, f"{quote(line.strip())} is not a row of six numbers.") from None
        if len(rows[-1]) != 6:
            raise source.error(number, f"the row has {len(rows[-1])} numbers, not six (ux uy uz rx ry rz).")
    if len(rows) != 6:
        raise source.error(None, f"the file has {len(rows)} rows, not six (ux uy uz rx ry rz).")
    return rows


def _matrix_market(source: Source) -> list[list[float]]:
    from io import StringIO

    from scipy.io import mmread

    try:
        matrix = mmread(StringIO(source.text))
    except (ValueError, TypeError, OverflowError, IndexError) as error:
        raise source.error(
            None, f"the file is no Matrix Market file ({str(error)[:60]}). Write six lines of six numbers."
        ) from None
    if matrix.shape != (6, 6) or np.iscomplexobj(matrix):
        raise source.error(None, f"the matrix is {' x '.join(map(str, matrix.shape))}, not 6 x 6 of real numbers.")
    dense = matrix.toarray() if hasattr(matrix, "toarray") else np.asarray(matrix)
    rows: list[list[float]] = dense.astype(float).tolist()
    return rows
