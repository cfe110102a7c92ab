"""Reading a file: its format line decides the kind; the record, or every problem of the file at once."""

import re
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from difflib import get_close_matches
from pathlib import Path as DiskPath
from typing import Any

from lineplanner.errors import Problem
from lineplanner.files.document import Document, open_document
from lineplanner.files.kinds import VERSION, FileKind, kinds
from lineplanner.files.models import build
from lineplanner.files.problems import FileProblem, FilesError, listed
from lineplanner.inputs.adoption import adopted_problems
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.cautions import CautionTexts, text_problems
from lineplanner.inputs.declared import file_path
from lineplanner.inputs.line import Line
from lineplanner.inputs.load import Load
from lineplanner.inputs.load_rules import hang_problems
from lineplanner.inputs.material import Material
from lineplanner.inputs.rack import Rack
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.recipe_rules import recipe_problems
from lineplanner.inputs.rules import bath_problems, line_problems, material_problems, rack_problems, twice
from lineplanner.inputs.site import Site

_FORMAT = re.compile(r"lineplanner +(?P<kind>\S+) +(?P<version>\d{1,9})")
_RULES: dict[type, Callable[[Any], list[Problem]]] = {
    Bath: bath_problems,
    CautionTexts: text_problems,
    Line: line_problems,
    Load: hang_problems,
    Material: material_problems,
    Rack: rack_problems,
    Recipe: recipe_problems,
    Site: adopted_problems,
}


@dataclass(frozen=True, slots=True)
class Entry:
    """A file that was read: its kind, its record, and the document behind it."""

    kind: FileKind
    record: Any
    document: Document

    def problem(self, problem: Problem) -> FileProblem:
        """A problem of the record at its line in the file."""
        path = file_path(type(self.record), problem.path)
        raw: Any = self.document.raw
        for depth, step in enumerate(path):  # a setting given without its range has no inside
            if not isinstance(raw, dict | list):
                path = path[:depth]
                break
            raw = raw.get(step, {}) if isinstance(raw, dict) else _item(raw, step)
        return self.document.problem(path, problem.key, **problem.facts)


def read(path: DiskPath | str, kind: str | None = None) -> Any:
    """The record of a file. Raises FilesError with every problem of it."""
    return read_entry(DiskPath(path), kind).record


def check(path: DiskPath | str, kind: str | None = None) -> list[FileProblem]:
    """Every problem of a file taken alone; what it refers to is not looked at."""
    try:
        read_entry(DiskPath(path), kind)
    except FilesError as error:
        return error.problems
    return []


def read_entry(path: DiskPath, kind: str | None = None) -> Entry:
    """A file with its record and document. Raises FilesError with every problem of it, and nothing else."""
    document = open_document(path)
    found = _kind_of(document, kind)
    raw = {key: value for key, value in document.raw.items() if key != "format"}
    record, problems = build(found.record, raw)
    if problems:
        raise FilesError(_in_order([document.problem(p.path, p.key, **p.facts) for p in problems]))
    entry = Entry(found, record, document)
    broken = [entry.problem(problem) for problem in _rules_of(found, record)]
    if broken:
        raise FilesError(_in_order(broken))
    return entry


def _item(items: list[Any], index: str | int) -> Any:
    return items[index] if isinstance(index, int) and index < len(items) else {}


def _in_order(problems: list[FileProblem]) -> list[FileProblem]:
    return sorted(problems, key=lambda one: (one.key == "file.more", one.line or 0))


def _rules_of(kind: FileKind, record: Any) -> list[Problem]:
    if kind.name == "part":
        from lineplanner.geometry import problems

        return problems(record)
    if kind.rows:
        return row_problems(getattr(record, str(kind.table)), str(kind.table))
    rule = _RULES.get(type(record))
    return rule(record) if rule else []


def row_problems(rows: Sequence[Any], field: str, known: int = 0) -> list[Problem]:
    """Rows of a standards table that are named as one before them; the first `known` are of other files."""
    names = [str(getattr(row, "name", index)) for index, row in enumerate(rows)]
    return [
        Problem((field, int(one.path[1]) - known, "name"), one.key, one.facts)
        for one in twice(names, (field,), "row")
        if int(one.path[1]) >= known
    ]


def _kind_of(document: Document, wanted: str | None) -> FileKind:
    """The kind that the format line names."""
    known = kinds()
    said = document.raw.get("format")
    if said is None:
        raise FilesError([document.problem((), "format.missing", kind=wanted or _guess(document) or "KIND")])
    found = _FORMAT.fullmatch(said) if isinstance(said, str) else None
    if found is None:
        raise FilesError(
            [document.problem(("format",), "format.not_ours", token=str(said), kinds=listed(known, 30))]
        )
    name = found["kind"]
    if name not in known:
        near = get_close_matches(name, known, 1)
        if near:
            raise FilesError([document.problem(("format",), "format.near", token=said, nearest=near[0])])
        raise FilesError(
            [document.problem(("format",), "format.not_ours", token=said, kinds=listed(known, 30))]
        )
    if int(found["version"]) != VERSION:
        raise FilesError([document.problem(("format",), "format.newer", token=said)])
    if wanted is not None and name != wanted:
        raise FilesError([document.problem(("format",), "format.other_kind", token=said, kind=wanted)])
    return known[name]


def _guess(document: Document) -> str | None:
    """The kind that goes with the folder a file lies in."""
    folders = {
        kind.folder.name: name for name, kind in kinds().items() if kind.table is None and name != "site"
    }
    if document.path.absolute().parent.name == "configs":
        return "site"
    return next(
        (folders[part.name] for part in document.path.absolute().parents if part.name in folders), None
    )
