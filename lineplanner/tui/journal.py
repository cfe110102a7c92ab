"""The recovery journal: what is not saved yet, on disk at each edit, and what a program that died left there."""

import contextlib
import json
import os
import secrets
import sys
from collections.abc import Iterator, Mapping
from pathlib import Path as DiskPath
from typing import Any, BinaryIO

_MOST = 4_000_000  # bytes; then it is begun anew with the last line
_SUFFIX = ".journal"


class Journal:
    """One file per site and program. Each line is all that is not saved at that moment; the last whole one counts.

    The file is locked as long as the program runs: the lock ends with the program, however that ends.
    """

    def __init__(self, folder: DiskPath | None, key: str) -> None:
        self._folder, self._key = folder, key
        self._file: BinaryIO | None = None
        self._path = DiskPath()
        self.failed = False

    def write(self, line: Mapping[str, Any]) -> None:
        """Add what is not saved now. A disk that takes nothing is told by `failed`, and stops no edit."""
        if self._folder is None:
            return
        content = json.dumps(line, ensure_ascii=True, default=str).encode("ascii") + b"\n"
        try:
            if self._file is None:
                self._begin(content)
            elif self._file.tell() > _MOST:
                old, path = self._file, self._path
                self._begin(content)
                _remove(old, path)
            else:
                self._file.write(content)
                self._file.flush()
            self.failed = False
        except OSError:
            self.failed = True

    def clear(self) -> None:
        """Nothing is unsaved any more: the file goes."""
        if self._file is not None:
            _remove(self._file, self._path)
            self._file = None

    def close(self) -> None:
        """Leave the file, if there is one, for the next start."""
        if self._file is not None:
            with contextlib.suppress(OSError):
                self._file.close()
            self._file = None

    def _begin(self, content: bytes) -> None:
        """A file with its first line; it takes the place of the one before only when that is written."""
        assert self._folder is not None
        self._folder.mkdir(parents=True, exist_ok=True)
        path = self._folder / f"{self._key}-{os.getpid()}-{secrets.token_hex(4)}{_SUFFIX}"
        file = path.open("xb+")
        try:
            _lock(file)
            file.write(content)
            file.flush()
        except OSError:
            _remove(file, path)
            raise
        self._file, self._path = file, path


class Leftover:
    """A journal of a program that ended without saving. It is ours until it is removed or released."""

    def __init__(self, path: DiskPath, file: BinaryIO, line: Mapping[str, Any]) -> None:
        self._path, self._file = path, file
        self.line = line

    def remove(self) -> None:
        """It is done with."""
        _remove(self._file, self._path)

    def release(self) -> None:
        """Leave it for the next start."""
        with contextlib.suppress(OSError):
            self._file.close()


def leftover(folder: DiskPath | None, key: str) -> Leftover | None:
    """The latest journal of a site whose program runs no more; empty ones are cleared away."""
    for path in _journals(folder, key):
        try:
            file = path.open("rb+")
        except OSError:
            continue
        if not _lock(file) or not path.exists():
            file.close()
            continue
        line = _last_line(file)
        if line:
            return Leftover(path, file, line)
        _remove(file, path)
    return None


def _journals(folder: DiskPath | None, key: str) -> list[DiskPath]:
    """The journals of a site, latest first."""
    found = []
    with contextlib.suppress(OSError):
        for path in folder.glob(f"{key}-*{_SUFFIX}") if folder else ():
            with contextlib.suppress(OSError):
                found.append((path.stat().st_mtime_ns, path))
    return [path for _, path in sorted(found, reverse=True)]


def _last_line(file: BinaryIO) -> Mapping[str, Any]:
    """The last whole line; a program that is killed while it writes leaves half of one."""
    with contextlib.suppress(OSError):
        for line in reversed(list(_whole_lines(file))):
            with contextlib.suppress(ValueError, RecursionError):
                found = json.loads(line)
                if isinstance(found, dict):
                    return found
    return {}


def _whole_lines(file: BinaryIO) -> Iterator[bytes]:
    file.seek(0)
    return (line for line in file.read().splitlines(keepends=True) if line.endswith(b"\n"))


def _remove(file: BinaryIO, path: DiskPath) -> None:
    """Say in it first that nothing is left: another program may have it open already."""
    with contextlib.suppress(OSError):
        file.seek(0, os.SEEK_END)
        file.write(b"{}\n")
        file.flush()
    with contextlib.suppress(OSError):
        path.unlink()  # before the lock ends, where an open file may be removed
    with contextlib.suppress(OSError):
        file.close()
    with contextlib.suppress(OSError):
        path.unlink(missing_ok=True)


def _lock(file: BinaryIO) -> bool:
    """Take the file for this program; False if another one has it. A disk that knows no locks gives every one."""
    try:
        if sys.platform == "win32":
            import msvcrt

            file.seek(1 << 30)  # a byte that is never written, for a locked one cannot be read
            msvcrt.locking(file.fileno(), msvcrt.LK_NBLCK, 1)
            file.seek(0, os.SEEK_END)
        else:
            import fcntl

            fcntl.flock(file, fcntl.LOCK_EX | fcntl.LOCK_NB)
    except (BlockingIOError, PermissionError):
        return False
    except OSError:
        return True
    return True
