"""Which folder is the site: the one named, the nearest above, the user's own, or the packaged copy."""

import os
import sys
from dataclasses import dataclass
from pathlib import Path as DiskPath

import lineplanner

FOLDERS = ("configs", "rack_library")


@dataclass(frozen=True, slots=True)
class SiteFolder:
    """A site's folder; packaged says that it is the program's own copy, which is never written to."""

    path: DiskPath
    packaged: bool = False


def find_site(named: DiskPath | str | None = None, working: DiskPath | None = None) -> SiteFolder:
    """The site to work with. Raises FilesError if the named folder is none; writes nothing."""
    if named is not None:
        return SiteFolder(_checked(DiskPath(named)))
    start = (working or DiskPath.cwd()).absolute()
    above = next((folder for folder in (start, *start.parents) if is_site(folder)), None)
    if above is not None:
        return SiteFolder(above)
    own = user_folder()
    return SiteFolder(own) if is_site(own) else SiteFolder(packaged_site(), packaged=True)


def writable(site: SiteFolder) -> SiteFolder:
    """The site that a change goes to: in place of the packaged copy the user's own, filled from it at first use."""
    if not site.packaged:
        return site
    own = user_folder()
    if not is_site(own):
        from lineplanner.files.starter import start

        start(own)
    return SiteFolder(own)


def is_site(folder: DiskPath) -> bool:
    """Whether a folder holds both halves of a site."""
    try:
        return all((folder / name).is_dir() for name in FOLDERS)
    except OSError:
        return False


def packaged_site() -> DiskPath:
    """The demo shop that comes with the program: inside the package when installed, beside it in a checkout."""
    package = DiskPath(lineplanner.__file__).parent
    inside = package / "_data"
    return inside if is_site(inside) else package.parent


def user_folder() -> DiskPath:
    """Where a site lives that nobody gave a folder: the platform's place for a program's data."""
    home = DiskPath.home()
    if sys.platform == "win32":
        base = DiskPath(os.environ.get("LOCALAPPDATA") or home / "AppData" / "Local")
    elif sys.platform == "darwin":
        base = home / "Library" / "Application Support"
    else:
        named = DiskPath(os.environ.get("XDG_DATA_HOME", ""))
        base = named if named.is_absolute() else home / ".local" / "share"
    return base / "lineplanner"


def _checked(folder: DiskPath) -> DiskPath:
    from lineplanner.files.document import failed

    try:
        if not folder.is_dir():
            raise failed(folder, "site.no_folder")
    except (OSError, ValueError) as error:
        raise failed(folder, "site.no_folder") from error
    missing = next((name for name in FOLDERS if not (folder / name).is_dir()), None)
    if missing is not None:
        raise failed(folder, "site.not_a_site", missing=missing)
    return folder
