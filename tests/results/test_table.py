"""Tables: every number is the result's own, every heading says its unit, no cell is a formula."""

from __future__ import annotations

import csv
import io
import sys

import numpy as np
import pytest

import fe_shaft as fs
from fe_shaft.results.quantity import FACTOR, QUANTITIES
from fe_shaft.results.table import Table, comparison_table, force_table, movement_table, station_table
from tests.results.shafts import EVERY, beam, layshaft, three_bearings


@pytest.fixture(scope="module")
def results() -> fs.Results:
    return fs.solve(layshaft())


@pytest.fixture(scope="module")
def comparison() -> fs.Comparison:
    return fs.compare(layshaft())


def read(text: str) -> list[dict[str, str]]:
    return list(csv.DictReader(io.StringIO(text)))


def test_movement_table_holds_every_quantity_of_every_part(results):
    rows = read(movement_table(results).to_csv())
    assert [(row["case"], row["part"]) for row in rows] == [
        (case, part) for case in results.cases for part in results.parts
    ]
    for row in rows:
        part = results.case(row["case"])[row["part"]]
        for name in QUANTITIES:
            heading = f"{name}_{QUANTITIES[name].suffix}"
            if name in part.quantities():
                assert float(row[heading]) == pytest.approx(getattr(part, heading), rel=1e-14, abs=0)
            else:
                assert row[heading] == ""


def test_headings_are_the_attributes_of_the_results(results):
    """`movement_table(r).column("deflection_um")` and `r["wheel"].deflection_um` are one word."""
    table = movement_table(results)
    assert table.columns[:5] == ("case", "part", "kind", "shaft", "x_mm")
    known = {f"{name}_{QUANTITIES[name].suffix}" for name in QUANTITIES}
    assert set(table.columns[5:-3]) <= known
    made = [results.by_shoulders("wheel.slope", case) for case in results.cases]
    parts = table.column("part")
    told = [
        value for part, value in zip(parts, table.column("slope_by_shoulders_mrad"), strict=True) if part == "wheel"
    ]
    assert told == pytest.approx(made)
    assert [type(value) for value in table.column("deflection_um")] == [float] * len(table)


def test_force_table_holds_the_supports(results):
    table = force_table(results)
    assert list(dict.fromkeys(table.column("part"))) == ["lay_left", "lay_right"]
    up = [float(results.case(case)[part].up_force_N) for case in results.cases for part in ("lay_left", "lay_right")]
    assert list(table.column("up_force_N")) == pytest.approx(up)


def test_station_table_holds_both_sides_of_every_station(results):
    table = station_table(results)
    line = results.lines["layshaft"]
    assert len(table) == len(results.cases) * len(line.x)
    own = [k for k, case in enumerate(table.column("case")) if case == "starting"]
    case = results.case_number("starting")
    for heading, values in (
        ("x_mm", line.x * 1e3),
        ("up_um", line.u[case, :, 1] * 1e6),
        ("twist_mrad", line.u[case, :, 3] * 1e3),
        ("axial_force_left_N", line.force_left[case, :, 0]),
        ("shear_front_right_N", line.force_right[case, :, 2]),
        ("moment_front_left_Nm", line.force_left[case, :, 5]),
    ):
        cells = table.column(heading)
        np.testing.assert_allclose([cells[k] for k in own], values, rtol=1e-14)


def test_comparison_table_holds_every_row_and_case(comparison):
    rows = read(comparison_table(comparison).to_csv())
    assert len(rows) == len(comparison.rows) * len(comparison.cases)
    row = next(r for r in rows if (r["part"], r["quantity"], r["case"]) == ("wheel", "deflection", "starting"))
    own = comparison.row("wheel.deflection")
    want = {"pins": own.left, "bearings": own.right, "difference": own.difference, "worst": own.worst}
    assert row["unit"] == "um"
    assert {key: float(row[key]) for key in want} == pytest.approx({key: float(v[1]) * 1e6 for key, v in want.items()})
    assert float(row["ratio"]) == pytest.approx(float(own.ratio[1]))
    assert row["worst_mix"] == own.worst_mix[1]
    left = next(r for r in rows if (r["part"], r["quantity"]) == ("lay_left", "deflection"))
    assert left["ratio"] == ""  # a pin gives nothing way: no ratio


def test_comparison_without_estimates_has_no_band():
    assert "worst" not in comparison_table(fs.compare(beam())).columns
    assert "worst" in comparison_table(fs.compare(three_bearings())).columns


@pytest.mark.parametrize("name", EVERY)
def test_no_cell_of_any_model_is_a_formula(name):
    results = fs.solve(EVERY[name]())
    for table in (movement_table(results), force_table(results), station_table(results)):
        for cells in csv.reader(io.StringIO(table.to_csv())):
            assert len(cells) == len(table.columns)
            for cell in cells:
                assert cell[:1] not in ("=", "+", "@")
                assert cell[:1] != "-" or float(cell) < 0  # a number, and not minus zero
                assert cell not in ("nan", "inf")


@pytest.mark.parametrize("word", ["=1+1", "+1", "-1", "@sum", "\tx", "\rx", "=cmd|' /C calc'!A0"])
def test_words_that_would_be_formulas_are_made_harmless(word):
    """What spreadsheets evaluate: = + - @ and a leading tab or return (OWASP, CSV injection; from memory)."""
    cells = list(csv.reader(io.StringIO(Table(("a", "b"), ((word, 1.0),)).to_csv(), newline="")))[1]
    assert cells == ["'" + word.replace("\r", "\n"), "1.0"]


@pytest.mark.parametrize("word", ['a "b", c', "two\nlines", "a;b", "caf\u00e9", "'quoted", ""])
def test_other_words_come_back_as_they_were(word):
    assert list(csv.reader(io.StringIO(Table(("a",), ((word,), ("x",))).to_csv(), newline="")))[1:] in (
        [[word], ["x"]],
        [[], ["x"]],
    )


def test_numbers_come_back_to_the_last_bit():
    value = 1 / 3
    cells = list(csv.reader(io.StringIO(Table(("a", "b", "c"), ((value, None, -0.0),)).to_csv())))[1]
    assert float(cells[0]) == value
    assert cells[1:] == ["", "0.0"]


def test_units_of_the_model_are_in_the_headings():
    results = fs.solve(layshaft(units={"force": "lbf", "length": "in", "angle": "deg"}))
    table = movement_table(results)
    rows = read(table.to_csv())
    wheel = next(row for row in rows if row["part"] == "wheel")
    assert float(wheel["x_in"]) == pytest.approx(38 / 25.4)
    assert float(wheel["deflection_mil"]) == pytest.approx(results.value("wheel.deflection", "running", "mil"))
    assert float(wheel["slope_deg"]) == pytest.approx(results.value("wheel.slope", "running", "deg"))
    left = next(row for row in rows if row["part"] == "lay_left")
    assert float(left["force_lbf"]) == pytest.approx(results.value("lay_left.force", "running", "lbf"))
    assert float(left["tilt_moment_lbfin"]) == pytest.approx(results.value("lay_left.tilt_moment", "running", "lbf in"))


def test_data_frame(results, comparison):
    frame = movement_table(results).to_dataframe()
    assert list(frame.columns) == list(movement_table(results).columns)
    wheel = frame[(frame.case == "running") & (frame.part == "wheel")]
    assert wheel.deflection_um.item() == pytest.approx(results.case("running")["wheel"].deflection_um)
    assert results.to_dataframe().equals(frame)
    assert len(comparison.to_dataframe()) == len(comparison.rows) * 3


def test_without_pandas_the_extra_is_named(results, monkeypatch):
    monkeypatch.setitem(sys.modules, "pandas", None)
    with pytest.raises(fs.UsageError, match=r'pip install "fe_shaft\[table\]"'):
        results.to_dataframe()


def test_an_unknown_column_is_told_with_the_nearest(results):
    with pytest.raises(fs.UsageError, match="Nearest: deflection_um"):
        movement_table(results).column("deflection_mm")


def test_trade_units_have_a_factor():
    assert {quantity.unit for quantity in QUANTITIES.values()} <= set(FACTOR)
