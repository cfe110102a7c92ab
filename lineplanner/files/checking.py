"""Checking one file as part of its site: its own problems, its name, and what it refers to."""

from collections.abc import Iterator
from pathlib import Path as DiskPath
from typing import Any

from lineplanner.errors import Problem
from lineplanner.files.cases import open_case
from lineplanner.files.library import Library
from lineplanner.files.problems import FileProblem, FilesError
from lineplanner.files.reading import Entry
from lineplanner.inputs.declared import Path, Shape, declared, described, file_path, shape_of
from lineplanner.inputs.line import Line
from lineplanner.inputs.load import Load
from lineplanner.inputs.material import Material
from lineplanner.inputs.rack import Rack
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.recipe_rules import recipe_table_problems
from lineplanner.inputs.rules import table_problems
from lineplanner.inputs.tables import Tables


def check_in_site(library: Library, path: DiskPath | str) -> list[FileProblem]:
    """Every problem of a file in its site. Of a load also those of all files it needs."""
    path = DiskPath(path)
    try:
        entry = library.open(path)
    except FilesError as error:
        return error.problems
    found = _of_name(library, entry)
    if isinstance(entry.record, Load):
        try:
            open_case(library, path)
        except FilesError as error:
            found += error.problems
        return found
    return found + _of_references(library, entry) + _of_tables(library, entry)


def _of_name(library: Library, entry: Entry) -> list[FileProblem]:
    """Whether the file's name, if it lies in the library, can be referred to."""
    path = entry.document.path.absolute()
    problems = library.listing_problems(entry.kind.name)
    return [one for one in problems if one.path is not None and one.path.absolute() == path]


def _of_references(library: Library, entry: Entry) -> list[FileProblem]:
    found = []
    for path, kind, name in references(entry.record):
        if name not in library.stems(kind):
            problem = library.unknown(kind, name)
            key_path = file_path(type(entry.record), path)
            found.append(entry.document.problem(key_path, problem.key, **problem.facts))
    return found


def _of_tables(library: Library, entry: Entry) -> list[FileProblem]:
    """Names that the standards tables do not have; nothing if those cannot be read, which is another file's problem."""
    try:
        tables = library.tables()
    except FilesError:
        return []
    return [entry.problem(problem) for problem in _table_problems(entry.record, tables)]


def _table_problems(record: Any, tables: Tables) -> list[Problem]:
    if isinstance(record, Recipe):
        return recipe_table_problems(record, tables)
    return table_problems(record, tables) if isinstance(record, Rack | Line | Material) else []


def references(record: Any, path: Path = ()) -> Iterator[tuple[Path, str, str]]:
    """Where a record refers to another file, of which kind, by which name."""
    kind: type = type(record)
    for one in declared(kind).values():
        value = getattr(record, one.name)
        shape, inside = shape_of(one.type)
        if one.field is not None and one.field.ref is not None and isinstance(value, str):
            yield (*path, one.name), one.field.ref, value
        elif shape is Shape.RECORD and value is not None:
            yield from references(value, (*path, one.name))
        elif shape is Shape.MANY and shape_of(described(inside[0])[0])[0] is Shape.RECORD:
            for index, item in enumerate(value):
                yield from references(item, (*path, one.name, index))
