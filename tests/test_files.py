"""Files are old or new, never torn, whatever fails while they are written."""

import errno
import os
import stat
import threading
from pathlib import Path

import pytest

from fe_shaft.errors import FileError
from fe_shaft.files import whole, write_many, write_whole

OLD = b"old content\n"


@pytest.fixture
def target(tmp_path: Path) -> Path:
    path = tmp_path / "result.csv"
    path.write_bytes(OLD)
    return path


@pytest.mark.parametrize(
    ("content", "stored"),
    [
        (b"\x00\xff\r\n", b"\x00\xff\r\n"),
        ("", b""),
        ("a\nb\n", b"a\nb\n"),
        ("a\r\nb\r\n", b"a\nb\n"),
        ("\N{MICRO SIGN}m\n", b"\xc2\xb5m\n"),
    ],
)
def test_bytes_as_they_are_and_text_as_utf8(tmp_path: Path, content: bytes | str, stored: bytes) -> None:
    write_whole(tmp_path / "new.txt", content)
    assert (tmp_path / "new.txt").read_bytes() == stored
    assert [each.name for each in tmp_path.iterdir()] == ["new.txt"]


def test_an_existing_file_is_replaced_and_keeps_its_rights(target: Path) -> None:
    target.chmod(0o640)
    write_whole(str(target), "new\n")
    assert target.read_text() == "new\n"
    assert stat.S_IMODE(target.stat().st_mode) == 0o640


def test_a_new_file_has_the_rights_of_any_new_file(tmp_path: Path) -> None:
    (tmp_path / "plain").write_text("x")
    write_whole(tmp_path / "ours", "x")
    assert (tmp_path / "ours").stat().st_mode == (tmp_path / "plain").stat().st_mode


def test_a_link_stays_a_link(tmp_path: Path, target: Path) -> None:
    link = tmp_path / "link.csv"
    link.symlink_to(target)
    write_whole(link, "new\n")
    assert link.is_symlink()
    assert target.read_text() == "new\n"


def _full_disk(path: Path, data: bytes) -> int:
    """Half of the data reaches the disk, then it is full."""
    with open(path, "wb") as file:  # noqa: PTH123
        file.write(data[: len(data) // 2])
    raise OSError(errno.ENOSPC, "No space left on device")


def _fails(*_arguments: object, **_options: object) -> None:
    raise OSError(errno.EIO, "Input/output error")


def _break(monkeypatch: pytest.MonkeyPatch, step: str) -> None:
    if step == "write":
        monkeypatch.setattr(Path, "write_bytes", _full_disk)
    elif step == "create":
        monkeypatch.setattr(os, "open", _fails)
    else:
        monkeypatch.setattr(os, step, _fails)


@pytest.mark.parametrize("step", ["create", "write", "fsync", "replace"])
@pytest.mark.parametrize("exists", [True, False])
def test_failure_at_any_step_leaves_the_old_file_alone(
    target: Path, monkeypatch: pytest.MonkeyPatch, step: str, exists: bool
) -> None:
    if not exists:
        target.unlink()
    with monkeypatch.context() as patch:
        _break(patch, step)
        with pytest.raises(FileError) as caught:
            write_whole(target, "new content, much longer than the old one\n")
    assert str(caught.value).startswith(f"{target}: cannot be written: ")
    assert str(caught.value).count("\n") == 0
    assert isinstance(caught.value.__cause__, OSError)
    assert [each.name for each in target.parent.iterdir()] == ([target.name] if exists else [])
    assert not exists or target.read_bytes() == OLD


@pytest.mark.parametrize("step", ["write", "fsync", "replace"])
def test_interruption_leaves_no_rubbish(target: Path, monkeypatch: pytest.MonkeyPatch, step: str) -> None:
    def interrupted(*_arguments: object) -> None:
        raise KeyboardInterrupt

    with monkeypatch.context() as patch:
        patch.setattr(*((Path, "write_bytes", interrupted) if step == "write" else (os, step, interrupted)))
        with pytest.raises(KeyboardInterrupt):
            write_whole(target, "new\n")
    assert target.read_bytes() == OLD
    assert [each.name for each in target.parent.iterdir()] == [target.name]


def test_a_folder_that_cannot_be_forced_to_disk_is_no_failure(target: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    true_fsync = os.fsync

    def only_files(handle: int) -> None:
        if stat.S_ISDIR(os.fstat(handle).st_mode):
            raise OSError(errno.EINVAL, "Invalid argument")
        true_fsync(handle)

    monkeypatch.setattr(os, "fsync", only_files)
    write_whole(target, "new\n")
    assert target.read_text() == "new\n"


def test_content_is_on_the_disk_before_the_name_changes(target: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    steps: list[str] = []
    true_fsync, true_replace = os.fsync, os.replace

    def fsync(handle: int) -> None:
        steps.append("folder" if stat.S_ISDIR(os.fstat(handle).st_mode) else "content")
        true_fsync(handle)

    def replace(source: Path, destination: Path) -> None:
        steps.append("rename")
        true_replace(source, destination)

    monkeypatch.setattr(os, "fsync", fsync)
    monkeypatch.setattr(os, "replace", replace)
    write_whole(target, "new\n")
    assert steps[0] == "content"
    assert steps[-2:] == ["rename", "folder"]


def test_a_reader_never_sees_half_a_file(target: Path) -> None:
    contents = [bytes([65 + number]) * 200_000 for number in range(4)]
    write_whole(target, contents[0])
    done = threading.Event()

    def keep_writing() -> None:
        for round_ in range(40):
            write_whole(target, contents[round_ % 4])
        done.set()

    writer = threading.Thread(target=keep_writing)
    writer.start()
    reads = 0
    while not done.is_set() or reads == 0:
        assert target.read_bytes() in contents
        reads += 1
    writer.join()


@pytest.mark.parametrize(
    ("name", "reason"),
    [
        ("no_such_folder/x.csv", "does not exist"),
        ("", "it is a folder"),
        ("x" * 300, "File name too long"),
        ("zero\0.csv", "zero character"),
    ],
)
def test_impossible_paths_are_one_sentence(tmp_path: Path, name: str, reason: str) -> None:
    with pytest.raises(FileError, match=reason):
        write_whole(tmp_path / name, "x")
    assert list(tmp_path.iterdir()) == []


def test_text_that_is_no_text(target: Path) -> None:
    with pytest.raises(FileError, match=r"holds \\ud800"):
        write_whole(target, "half a pair: \ud800")
    assert target.read_bytes() == OLD


def test_a_device_is_written_to_and_not_replaced() -> None:
    null = Path(os.devnull)
    write_whole(null, "x")
    assert stat.S_ISCHR(null.stat().st_mode)


def test_many_files_or_none(tmp_path: Path, target: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    second = tmp_path / "second.csv"
    with pytest.raises(FileError, match="missing"):
        write_many({target: "new\n", second: "new\n", tmp_path / "missing" / "third.csv": "new\n"})
    assert target.read_bytes() == OLD
    assert not second.exists()
    write_many({target: "new\n", second: b"also new\n"})
    assert (target.read_text(), second.read_text()) == ("new\n", "also new\n")
    assert len(list(tmp_path.iterdir())) == 2


def test_a_library_writes_to_the_temporary_path(target: Path) -> None:
    with whole(target) as temporary:
        assert temporary.parent == target.parent
        assert temporary.suffix == ".csv"
        temporary.write_text("by a library\n")
        assert target.read_bytes() == OLD
    assert target.read_text() == "by a library\n"


def test_a_library_that_fails_changes_nothing(target: Path) -> None:
    def gives_up(path: Path) -> None:
        path.write_text("half")
        raise RuntimeError("the library gave up")

    with pytest.raises(RuntimeError, match="library"), whole(target) as temporary:
        gives_up(temporary)
    assert target.read_bytes() == OLD
    assert len(list(target.parent.iterdir())) == 1


def test_a_library_that_removes_its_file_is_reported(target: Path) -> None:
    with pytest.raises(FileError, match="cannot be written"), whole(target) as temporary:
        temporary.unlink()
    assert target.read_bytes() == OLD
