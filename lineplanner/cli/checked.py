"""Files read for their problems, and the schema of a kind of file."""

import json
from collections.abc import Iterable, Iterator
from dataclasses import replace
from pathlib import Path

from lineplanner.cli.opened import Options
from lineplanner.errors import InputError
from lineplanner.files.checking import check_in_site
from lineplanner.files.kinds import kinds
from lineplanner.files.library import open_library
from lineplanner.files.problems import FileProblem, FilesError, shown_path
from lineplanner.files.reading import read_entry
from lineplanner.files.schema import schema
from lineplanner.inputs.recipe import Recipe
from lineplanner.report.layout import typed
from lineplanner.report.plan_text import changed_since_approval


def problems_of(paths: Iterable[Path], options: Options) -> tuple[int, list[FileProblem], list[str]]:
    """How many files were read, every problem of them, and which recipes were changed since they were approved.

    A folder stands for the files in it.
    """
    files = [file for path in paths for file in (_files_in(path) if path.is_dir() else [path])]
    found: list[FileProblem] = []
    for file in files:
        found += [one for one in _problems(file, options) if one not in found]
    return len(files), found, [line for file in files for line in _changed(file)]


def _changed(file: Path) -> Iterator[str]:
    """What is to be said of a recipe with other values than those that were approved: it counts as a draft."""
    try:
        recipe = read_entry(file).record
    except FilesError:
        return
    if isinstance(recipe, Recipe) and changed_since_approval(recipe):
        yield (
            f"{shown_path(file)}: changed since {recipe.approved_by or 'somebody'} approved it, so it counts as a "
            f"draft. Approve it again: `lineplanner approve {typed(shown_path(file))} --by NAME`"
        )


def _files_in(folder: Path) -> list[Path]:
    return sorted(path for path in folder.rglob("*.toml") if not path.name.startswith("."))


def _problems(file: Path, options: Options) -> list[FileProblem]:
    """The problems of a file in its site: its own, and those of what it refers to."""
    try:
        read_entry(file)
        library = open_library(options.site, file.absolute().parent)
    except FilesError as error:
        return [_begun(one) for one in error.problems]
    return check_in_site(library, file)


def _begun(problem: FileProblem) -> FileProblem:
    """Of an empty file: the first line that goes with the folder it lies in."""
    if problem.key != "file.empty" or problem.path is None:
        return problem
    folders = {kind.folder.name: name for name, kind in kinds().items() if kind.table is None}
    around = [folder.name for folder in problem.path.absolute().parents]
    kind = next((folders[name] for name in around if name in folders and name != "configs"), "KIND")
    if around[:1] == ["configs"]:
        kind = "site"
    return replace(problem, key="format.missing", facts={"kind": kind})


def schema_text(kind: str) -> str:
    """The JSON schema of a kind of file. Raises InputError for a kind that is none."""
    if kind not in kinds():
        raise InputError("schema.unknown", kind=kind, kinds=", ".join(f"`{name}`" for name in kinds()))
    return json.dumps(schema(kind), indent=2)
