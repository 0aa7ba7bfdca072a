"""Writing files so that a reader finds the old file or the new one, never a torn one.

The content goes to a temporary file in the same folder, is forced to the disk, and takes the target's name in one
step (``os.replace``, atomic on one file system). Whatever fails, the temporary file is removed and the old file is as
it was.
"""

import contextlib
import errno
import os
import secrets
import stat
from collections.abc import Iterator, Mapping
from pathlib import Path

from fe_shaft.errors import FileError, quote


def write_whole(path: str | os.PathLike[str], content: bytes | str) -> None:
    r"""Write a file, wholly or not at all.

    Parameters
    ----------
    path : path
        Its folder must exist. A symbolic link stays one: the file it points to is replaced. What is not an ordinary
        file (a terminal, a pipe) is written to directly.
    content : bytes or str
        Text is written as UTF-8 with ``\n`` at line ends.

    Raises
    ------
    FileError
        Names the path and the reason.
    """
    write_many({Path(path): content})


def write_many(files: Mapping[Path, bytes | str]) -> None:
    """Write several files; none is touched before all are complete on the disk.

    Parameters
    ----------
    files : mapping of path to bytes or str
        As for `write_whole`.

    Raises
    ------
    FileError
        Names the first path that failed. Each file is old or new; after a failure while names are taken over, some may
        be new already.
    """
    ready = {path: _encoded(path, content) for path, content in files.items()}
    with contextlib.ExitStack() as stack:
        for path, data in ready.items():
            temporary = stack.enter_context(whole(path))
            with _named(path):
                temporary.write_bytes(data)
                _to_disk(temporary)


@contextlib.contextmanager
def whole(path: str | os.PathLike[str]) -> Iterator[Path]:
    """A temporary path beside `path`, for libraries that write files themselves; it takes the name at the end.

    Parameters
    ----------
    path : path
        The final name. The temporary one has the same suffix.

    Yields
    ------
    Path
        An empty file to be overwritten.

    Raises
    ------
    FileError
        Names the path and the reason. If the block raises, the old file is as it was.
    """
    if "\0" in os.fspath(path):
        raise FileError(f"{quote(os.fspath(path))}: cannot be written: no file name holds a zero character.")
    with _named(path):
        target = Path(os.path.realpath(path))
        if target.exists() and not target.is_file() and not target.is_dir():
            yield target
            return
        temporary = _created(target)
        try:
            yield temporary
            _to_disk(temporary)
            os.replace(temporary, target)  # noqa: PTH105 - what the fault injection of the tests takes hold of
        except BaseException:
            with contextlib.suppress(OSError):
                temporary.unlink(missing_ok=True)
            raise
        _folder_to_disk(target.parent)


def _encoded(path: Path, content: bytes | str) -> bytes:
    if isinstance(content, bytes):
        return content
    try:
        return content.replace("\r\n", "\n").encode("utf-8")
    except UnicodeEncodeError as error:
        sign = ascii(content[error.start])[1:-1]
        raise FileError(f"{path}: cannot be written: the text holds {sign}, which is no character.") from None


@contextlib.contextmanager
def _named(path: str | os.PathLike[str]) -> Iterator[None]:
    """An OSError becomes a FileError with the path the user knows."""
    try:
        yield
    except OSError as error:
        folder = Path(path).parent
        reason = error.strerror or str(error)
        if isinstance(error, FileNotFoundError) and not folder.exists():
            reason = f"the folder {folder} does not exist"
        raise FileError(f"{path}: cannot be written: {reason}. Nothing was changed there.") from error


def _created(target: Path) -> Path:
    """An empty file beside the target with the target's rights, or those of any new file."""
    if target.is_dir():
        raise IsADirectoryError(errno.EISDIR, "it is a folder", str(target))
    temporary = target.with_name(f".part-{secrets.token_hex(8)}{target.suffix}")
    os.close(os.open(temporary, os.O_CREAT | os.O_EXCL | os.O_WRONLY, 0o666))
    if target.exists():
        temporary.chmod(stat.S_IMODE(target.stat().st_mode))
    return temporary


def _to_disk(path: Path) -> None:
    """Force a file's content to the disk, so that a power cut after the renaming leaves no empty file."""
    if path.is_file():  # a terminal or a pipe has no disk
        with path.open("rb+") as file:
            os.fsync(file.fileno())


def _folder_to_disk(folder: Path) -> None:
    """Force the renaming itself to the disk; some systems cannot do that, and the file is whole without it."""
    with contextlib.suppress(OSError):
        handle = os.open(folder, os.O_RDONLY)
        try:
            os.fsync(handle)
        finally:
            os.close(handle)
