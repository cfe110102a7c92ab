"""Saving a file whole or not at all, and never over one that is not the one that was read."""

import contextlib
import os
import secrets
import shutil
import tempfile
from pathlib import Path as DiskPath

from lineplanner.files.content import digest_of
from lineplanner.files.document import Stamp, failed
from lineplanner.files.problems import FileChangedError, FileProblem, FilesError
from lineplanner.files.reading import read_entry


def save(path: DiskPath, text: str, expected: Stamp | None) -> Stamp:
    """Write a text, atomically. expected is the stamp of the file when it was read, None for a new file.

    Raises FileChangedError if the file on disk is another one by now, FilesError if it cannot be written. What
    was there before is there afterwards, whatever goes wrong.
    """
    content = text.encode("utf-8")
    try:
        target = path.resolve()
        _unchanged(path, target, expected)
        target.parent.mkdir(parents=True, exist_ok=True)
        temporary = _written_beside(target, content)
        try:
            _unchanged(path, target, expected)
            _moved(path, temporary, target, new=expected is None)
        except BaseException:
            with contextlib.suppress(OSError):
                temporary.unlink()
            raise
        _sync_folder(target.parent)
        return Stamp(target.stat().st_mtime_ns, len(content), digest_of(content))
    except OSError as error:
        raise failed(path, "file.not_written", why=error.strerror or type(error).__name__) from error


def save_checked(path: DiskPath, text: str, expected: Stamp | None, kind: str) -> Stamp:
    """Save a text that is first seen to read without a problem. Raises FilesError with the problems if not."""
    with tempfile.TemporaryDirectory() as folder:
        trial = DiskPath(folder) / path.name
        trial.write_bytes(text.encode("utf-8"))
        try:
            read_entry(trial, kind)
        except FilesError as error:
            found = [FileProblem(path, one.line, one.key_path, one.key, one.facts) for one in error.problems]
            raise FilesError(found) from error
    return save(path, text, expected)


def _unchanged(path: DiskPath, target: DiskPath, expected: Stamp | None) -> None:
    """Whether the file is still the one that was read; a new file must not be there."""
    if expected is None:
        if os.path.lexists(target):
            raise FileChangedError([FileProblem(path, None, (), "file.exists")])
        return
    try:
        content = target.read_bytes()
    except OSError as error:
        raise FileChangedError([FileProblem(path, None, (), "file.changed")]) from error
    if digest_of(content) != expected.digest:
        raise FileChangedError([FileProblem(path, None, (), "file.changed")])


def _written_beside(target: DiskPath, content: bytes) -> DiskPath:
    """A temporary file in the same folder, on disk for certain; hidden, so that no listing takes it for a file."""
    temporary = target.with_name(f".{target.name}.{secrets.token_hex(4)}.part")
    try:
        with temporary.open("xb") as file:
            file.write(content)
            file.flush()
            os.fsync(file.fileno())
        if target.exists():
            shutil.copymode(target, temporary)
    except BaseException:
        with contextlib.suppress(OSError):
            temporary.unlink()
        raise
    return temporary


def _moved(path: DiskPath, temporary: DiskPath, target: DiskPath, *, new: bool) -> None:
    """Put the temporary file in its place. A new file never replaces one that appeared meanwhile."""
    if not new:
        temporary.replace(target)
        return
    try:
        os.link(temporary, target)
    except FileExistsError as error:
        raise FileChangedError([FileProblem(path, None, (), "file.exists")]) from error
    except OSError:  # a disk without hard links
        temporary.replace(target)
        return
    temporary.unlink()


def _sync_folder(folder: DiskPath) -> None:
    """Make the new name last through a power cut, where the system can."""
    if not hasattr(os, "O_DIRECTORY"):
        return
    with contextlib.suppress(OSError):
        handle = os.open(folder, os.O_RDONLY | os.O_DIRECTORY)
        try:
            os.fsync(handle)
        finally:
            os.close(handle)
