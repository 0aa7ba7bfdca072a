"""Files that are no models: one clear sentence each, never a traceback, nothing half-written."""

import pytest

FILES: dict[str, bytes] = {
    "empty": b"",
    "blank": b"  \n\n",
    "binary": bytes(range(256)) * 20,
    "zeros": b"\0" * 1000,
    "utf_16": "format = 1".encode("utf-16"),
    "latin_1": b'title = "L\xe4ufer"\n',
    "no_toml": b"this is not a model\n",
    "unclosed": b'title = "no end\n',
    "twice": b"[gears.a]\n[gears.a]\n",
    "deep": b"x = " + b"[" * 5000 + b"]" * 5000,
    "deep_tables": b"[" + b".".join([b"a"] * 3000) + b"]\n",
    "number": b"title = 1\n",
    "huge_integer": b"format = " + b"9" * 10_000,
    "nan": b'[shafts.s]\nmaterial = "C45"\nsegments = [{ length = nan, diameter = "20 mm" }]\n',
    "infinite": b'[shafts.s]\nmaterial = "C45"\nsegments = [{ length = "inf mm", diameter = "20 mm" }]\n',
    "negative": b'[shafts.s]\nmaterial = "C45"\nsegments = [{ length = "-5 mm", diameter = "20 mm" }]\n',
    "zero": b'[shafts.s]\nmaterial = "C45"\nsegments = [{ length = "0 mm", diameter = "20 mm" }]\n',
    "comma": b'[shafts.s]\nmaterial = "C45"\nsegments = [{ length = "46,5 mm", diameter = "20 mm" }]\n',
    "no_wall": b'[shafts.s]\nmaterial = "C45"\nsegments = [{ length = "5 mm", diameter = "20 mm", bore = "20 mm" }]\n',
    "power": b'[shafts.s]\nmaterial = "C45"\nsegments = [{ length = "9**9**9 mm", diameter = "20 mm" }]\n',
    "shaft_as_text": b'shafts = "all of them"\n',
    "date": b"title = 2024-01-01\n",
    "own_base": b'extends = "own_base.toml"\n',
    "outside": b'extends = "../../etc/passwd"\n',
    "wrong_format": b"format = 99\n",
    "script": b"import fe_shaft\nprint('hello')\n",
}


@pytest.mark.parametrize("command", ["check", "solve", "write"])
@pytest.mark.parametrize("name", FILES)
def test_one_clear_answer(run, folder, name, command):
    (folder / f"{name}.toml").write_bytes(FILES[name])
    before = sorted(folder.iterdir())
    done = run(command, f"{name}.toml")
    assert done.code == 3
    assert done.out == ""
    assert f"{name}.toml" in done.err
    assert "Traceback" not in done.err
    assert "Error" not in done.err
    assert len(done.err) < 2000
    assert all(sign.isprintable() or sign == "\n" for sign in done.err)
    assert sorted(folder.iterdir()) == before


def test_random_bytes_never_break_anything(run, folder):
    """Every byte of a valid file, in turn, made something else."""
    good = (folder / "layshaft.toml").read_bytes()
    for place in range(0, len(good), 97):
        for sign in (b"\x00", b'"', b"[", b"9", b"\xff"):
            (folder / "bad.toml").write_bytes(good[:place] + sign + good[place + 1 :])
            assert run("check", "bad.toml").code in (0, 3, 4)


@pytest.mark.parametrize("setting", ["layshaft.wheel_seat.diameter=1e-300 mm", "layshaft.collar.diameter=1e-200 mm"])
def test_numbers_that_no_computer_holds_end_in_one_sentence(run, folder, setting):
    """Sizes of no machine are refused; kept in writing they fail the proof, with nothing warned of beside it."""
    done = run("solve", "layshaft.toml", "--set", setting)
    assert done.code == 3
    assert "is no size of this world" in done.err
    keep = [f"{setting.split('=')[0].rpartition('.')[0]}.range_check=off"]
    done = run("solve", "layshaft.toml", "--set", setting, "--set", *keep)
    assert done.code == 5
    assert done.out == ""
    assert done.err.startswith("no trustworthy solution: ")
    assert done.err.count("\n") == 1
    assert "nan digits" not in done.err
