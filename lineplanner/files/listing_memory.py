"""Rows of the list of loads kept between two runs, taken up again only for the same program and the same files."""

import functools
import importlib.util
import json
import os
import stat
import sys
from collections.abc import Mapping
from pathlib import Path as DiskPath
from typing import Any

import lineplanner
from lineplanner.files.content import LARGEST, digest_of
from lineplanner.files.memory import site_key, write_whole
from lineplanner.files.site import FOLDERS, SiteFolder

_MOST = 8_000_000  # bytes; a file that is larger is not ours
_LIBRARIES = ("numpy", "shapely", "pint", "pydantic_core")  # that a row is computed with

Rows = Mapping[str, Any]
"""What is kept of each load by its name: plain texts in lists and tables."""


def program_stamp() -> str | None:
    """A fingerprint of the program as it is on disk: its version, its code, the libraries it computes with.

    None if that cannot be told.
    """
    try:
        code = [
            _dated(name, one.stat()) for name, one in _files(DiskPath(lineplanner.__file__).parent, ".py")
        ]
        libraries = [_dated(name, DiskPath(_origin(name)).stat()) for name in _LIBRARIES]
    except (OSError, ImportError, ValueError):
        return None
    return _fingerprint([lineplanner.__version__, sys.version, code, libraries])


def site_stamp(site: SiteFolder) -> str | None:
    """A fingerprint of every TOML file of a site by name and content. None if one of them cannot be read."""
    try:
        return _fingerprint(
            [
                (folder, name, digest_of(_content(one.path)))
                for folder in FOLDERS
                for name, one in _files(site.path / folder, ".toml")
            ]
        )
    except (OSError, ValueError):
        return None


def remembered_rows(folder: DiskPath, site: SiteFolder, stamp: str) -> Rows:
    """The rows kept under exactly this stamp; none if there are no such or the file is not whole."""
    try:
        with _path(folder, site).open("rb") as file:
            seal, _, body = file.read(_MOST).partition(b"\n")
        if seal.decode("ascii") != digest_of(body):
            return {}
        found = json.loads(body)
        rows = found["rows"] if found["stamp"] == stamp else {}
    except (OSError, ValueError, LookupError, TypeError, RecursionError):
        return {}
    return rows if isinstance(rows, dict) else {}


def remember_rows(folder: DiskPath, site: SiteFolder, stamp: str, rows: Rows) -> None:
    """Keep rows under a stamp, whole or not at all. A disk that takes nothing is no error here."""
    body = json.dumps({"stamp": stamp, "rows": rows}).encode("ascii")
    write_whole(_path(folder, site), digest_of(body).encode("ascii") + b"\n" + body)


def _path(folder: DiskPath, site: SiteFolder) -> DiskPath:
    return folder / f"{site_key(site)}.rows"


def _fingerprint(parts: list[Any]) -> str:
    return digest_of(json.dumps(parts).encode("ascii"))


def _files(folder: DiskPath, suffix: str) -> list[tuple[str, os.DirEntry[str]]]:
    """Files below a folder by relative name, in order; hidden ones are not looked at, as in the library."""
    found: list[tuple[str, os.DirEntry[str]]] = []
    waiting = [("", os.fspath(folder))]
    while waiting:
        front, here = waiting.pop()
        with os.scandir(here) as entries:
            for one in entries:
                if one.name.startswith("."):
                    continue
                if one.is_dir(follow_symlinks=False):
                    waiting.append((f"{front}{one.name}/", one.path))
                elif one.name.lower().endswith(suffix):
                    found.append((front + one.name, one))
    return sorted(found, key=lambda pair: pair[0])


def _content(path: str) -> bytes:
    """The bytes of an ordinary file. A pipe may never end: it is not opened."""
    found = os.stat(path)  # noqa: PTH116 - this runs before the first frame
    if not stat.S_ISREG(found.st_mode) or found.st_size > LARGEST:
        raise OSError(path)
    with open(path, "rb", buffering=0) as file:  # noqa: PTH123 - the same
        return file.read()


def _dated(name: str, found: os.stat_result) -> tuple[str, int, int]:
    return name, found.st_mtime_ns, found.st_size


@functools.cache
def _origin(library: str) -> str:
    """Where a library lies, without loading it."""
    found = importlib.util.find_spec(library)
    if found is None or found.origin is None:
        raise ImportError(library)
    return found.origin
