"""A new site: the demo shop copied to a folder that has none."""

import shutil
import tempfile
from pathlib import Path as DiskPath

from lineplanner.files.document import failed
from lineplanner.files.site import FOLDERS, packaged_site


def start(folder: DiskPath | str) -> list[DiskPath]:
    """Copy configs and rack_library of the demo shop; returns the files written. Overwrites nothing."""
    target = DiskPath(folder)
    if target.exists() and not target.is_dir():
        raise failed(target, "start.not_a_folder")
    taken = next((name for name in FOLDERS if (target / name).exists()), None)
    if taken is not None:
        raise failed(target, "start.taken", name=taken)
    try:
        target.mkdir(parents=True, exist_ok=True)
        return _filled(packaged_site(), target)
    except OSError as error:
        raise failed(target, "file.not_written", why=error.strerror or type(error).__name__) from error


def _filled(source: DiskPath, target: DiskPath) -> list[DiskPath]:
    """Copy to a hidden folder first and move the whole then: a half-copied site never has a site's name."""
    hidden = DiskPath(tempfile.mkdtemp(prefix=".start-", dir=target))
    try:
        files = [path for name in FOLDERS for path in _copied(source / name, hidden / name)]
        for name in FOLDERS:
            (hidden / name).rename(target / name)
    finally:
        shutil.rmtree(hidden, ignore_errors=True)
    return [target / path.relative_to(hidden) for path in files]


def _copied(source: DiskPath, target: DiskPath) -> list[DiskPath]:
    """The files of a folder, copied without the rights they have there: an installed copy may be read-only."""
    found = []
    for path in sorted(source.rglob("*")):
        inside = path.relative_to(source)
        if path.is_dir() or any(part.startswith((".", "__")) for part in inside.parts):
            continue
        (target / inside).parent.mkdir(parents=True, exist_ok=True)
        with path.open("rb") as old, (target / inside).open("xb") as new:
            shutil.copyfileobj(old, new)
        found.append(target / inside)
    return found
