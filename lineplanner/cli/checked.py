"""Files read for their problems, and the schema of a kind of file."""

import json
from collections.abc import Iterable
from pathlib import Path

from lineplanner.cli.opened import Options
from lineplanner.errors import InputError
from lineplanner.files.checking import check_in_site
from lineplanner.files.kinds import kinds
from lineplanner.files.library import open_library
from lineplanner.files.problems import FileProblem, FilesError
from lineplanner.files.reading import read_entry
from lineplanner.files.schema import schema


def problems_of(paths: Iterable[Path], options: Options) -> tuple[int, list[FileProblem]]:
    """How many files were read, and every problem of them; a folder stands for the files in it."""
    files = [file for path in paths for file in (_files_in(path) if path.is_dir() else [path])]
    found: list[FileProblem] = []
    for file in files:
        found += [one for one in _problems(file, options) if one not in found]
    return len(files), found


def _files_in(folder: Path) -> list[Path]:
    return sorted(path for path in folder.rglob("*.toml") if not path.name.startswith("."))


def _problems(file: Path, options: Options) -> list[FileProblem]:
    """The problems of a file in its site: its own, and those of what it refers to."""
    try:
        read_entry(file)
        library = open_library(options.site, file.absolute().parent)
    except FilesError as error:
        return error.problems
    return check_in_site(library, file)


def schema_text(kind: str) -> str:
    """The JSON schema of a kind of file. Raises InputError for a kind that is none."""
    if kind not in kinds():
        raise InputError("schema.unknown", kind=kind, kinds=", ".join(f"`{name}`" for name in kinds()))
    return json.dumps(schema(kind), indent=2)
