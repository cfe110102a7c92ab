"""What the program remembers of a site between two runs: a small file of its own, beside no file of a person."""

import contextlib
import os
import tomllib
from collections.abc import Mapping
from pathlib import Path as DiskPath

from lineplanner.files.content import digest_of
from lineplanner.files.site import SiteFolder, user_folder

_MOST = 10_000  # bytes; a file that is larger is not ours
_DIGITS = 16


def memory_folder() -> DiskPath:
    """Where the program keeps what it remembers: in the user's data folder, apart from the files of a site."""
    return user_folder() / "memory"


def site_key(site: SiteFolder) -> str:
    """A file name for a site. The packaged copy and the user's own that is filled from it are one site."""
    folder = user_folder() if site.packaged else site.path
    return digest_of(os.path.normcase(folder.resolve()).encode("utf-8", "surrogateescape"))[:_DIGITS]


def remembered(folder: DiskPath, site: SiteFolder) -> Mapping[str, str]:
    """What is remembered of a site; nothing if there is no such file, or none that can be read."""
    try:
        with _path(folder, site).open("rb") as file:
            found = tomllib.loads(file.read(_MOST).decode("utf-8"))
    except (OSError, ValueError, RecursionError):
        return {}
    return {key: value for key, value in found.items() if isinstance(value, str)}


def remember(folder: DiskPath, site: SiteFolder, values: Mapping[str, str]) -> None:
    """Write what is to be remembered, whole or not at all. A disk that takes nothing is no error here."""
    import tomli_w

    content = tomli_w.dumps({"site": str(site.path), **values}).encode("utf-8")
    write_whole(_path(folder, site), content)


def write_whole(path: DiskPath, content: bytes) -> None:
    """Write a file of the memory, whole or not at all. A disk that takes nothing is no error here."""
    import secrets

    temporary = path.with_name(f".{path.name}.{secrets.token_hex(4)}.part")
    with contextlib.suppress(OSError):
        path.parent.mkdir(parents=True, exist_ok=True)
        try:
            temporary.write_bytes(content)
            temporary.replace(path)
        finally:
            temporary.unlink(missing_ok=True)


def _path(folder: DiskPath, site: SiteFolder) -> DiskPath:
    return folder / f"{site_key(site)}.toml"
