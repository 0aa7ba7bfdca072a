"""-o and --picture: what is written, and what is said about it."""

import csv
import json

import pytest

PNG = b"\x89PNG\r\n\x1a\n"


@pytest.mark.parametrize(("line", "more"), [("solve kind.toml", set()), ("compare kind.toml", {"comparison.csv"})])
def test_everything_into_a_folder(run, folder, line, more):
    done = run(*line.split(), "-o", "out/deep")
    assert done.code == 0
    names = {path.name for path in (folder / "out" / "deep").iterdir()}
    assert names >= {"movement.csv", "forces.csv", "stations.csv", "results.json", "model.toml"} | more
    assert done.err == f"{len(names)} files written to out/deep.\n"
    assert done.out == run(*line.split()).out
    record = json.loads((folder / "out/deep/results.json").read_text())
    assert record == json.loads(run("solve", "kind.toml", "--json").out)
    rows = list(csv.DictReader((folder / "out/deep/movement.csv").read_text().splitlines()))
    assert len(rows) == 3 * 5
    assert run("solve", "out/deep/model.toml").out == run("solve", "kind.toml").out


def test_a_file_in_the_way_of_the_folder(run, folder):
    done = run("solve", "kind.toml", "-o", "layshaft.toml")
    assert (done.code, done.out) == (6, "")
    assert "layshaft.toml" in done.err


def test_a_failed_limit_writes_all_the_same(run, folder):
    assert run("solve", "layshaft.toml", "-o", "out").code == 1
    assert (folder / "out" / "results.json").exists()


@pytest.mark.parametrize("command", ["view", "solve", "compare"])
def test_picture(run, folder, command):
    done = run(command, "kind.toml", "--picture", "bent.png", "--case", "starting")
    assert done.code == 0
    assert done.err == "bent.png written.\n"
    assert (folder / "bent.png").read_bytes().startswith(PNG)


def test_picture_of_a_model_without_bearings(run, folder):
    """A model without bearings has one half only, and nothing is said about pins."""
    text = (folder / "kind.toml").read_text()
    rows = [row for row in text.splitlines() if not row.startswith("stiffness =")]
    (folder / "pins.toml").write_text(
        "\n".join(rows).replace("[bearings.", "[pins.").replace("every bearing", "every pin")
    )
    assert run("view", "pins.toml", "--picture", "pins.png").err == "pins.png written.\n"
    assert (folder / "pins.png").read_bytes().startswith(PNG)


def test_no_pins_beside_bearings_is_said(run, folder):
    """Held by the tilt stiffness of one bearing alone: pins cannot do that, the picture shows the bearings only."""
    text = (folder / "kind.toml").read_text()
    one = text[: text.index("[bearings.lay_left]")] + text[text.index("[bearings.lay_right]") :]
    (folder / "one.toml").write_text(one.replace("~5 N m/mrad", "~500 N m/mrad"))
    done = run("view", "one.toml", "--picture", "one.png")
    assert done.code == 0
    first, second = done.err.splitlines()
    assert first.startswith("No pins beside the bearings: on rigid pins, ")
    assert "can swing" in first
    assert second == "one.png written."


def test_a_window_needs_a_display(run, monkeypatch):
    monkeypatch.delenv("DISPLAY", raising=False)
    done = run("view", "kind.toml")
    assert (done.code, done.out) == (2, "")
    assert "--picture" in done.err
