"""Where the files of a site lie, by kind. Light, for what runs before the first frame."""

from collections.abc import Mapping
from pathlib import Path as DiskPath
from pathlib import PurePosixPath

FOLDERS: Mapping[str, PurePosixPath] = {
    kind: PurePosixPath(folder)
    for kind, folder in (
        ("site", "configs"),
        ("line", "configs/lines"),
        ("bath", "configs/baths"),
        ("recipe", "configs/recipes"),
        ("material", "configs/materials"),
        ("cautions", "configs/cautions"),
        ("rack", "rack_library/racks"),
        ("part", "rack_library/parts"),
        ("load", "rack_library/loads"),
    )
}
STANDARDS = PurePosixPath("configs/standards")  # tables of every kind that is not named above


def paths_of(site: DiskPath, kind: str) -> list[DiskPath]:
    """All files of a kind's folder in a stable order, subfolders included."""
    folder = site / FOLDERS.get(kind, STANDARDS)
    return [folder / "site.toml"] if kind == "site" else toml_files(folder)


def stems_of(site: DiskPath, kind: str) -> dict[str, DiskPath]:
    """The names of a kind with their files; of two files with one name the first."""
    found: dict[str, DiskPath] = {}
    for path in paths_of(site, kind):
        found.setdefault(path.stem, path)
    return found


def toml_files(folder: DiskPath) -> list[DiskPath]:
    """The .toml files below a folder in a stable order; hidden ones (editors' copies) are not looked at."""
    try:
        found = [path for path in folder.rglob("*.toml") if path.is_file()]
    except OSError:
        return []
    return sorted(
        path for path in found if not any(part.startswith(".") for part in path.relative_to(folder).parts)
    )
