"""The kinds of file: which record each describes and in which folder of a site it lives."""

from collections.abc import Mapping
from dataclasses import dataclass, make_dataclass
from functools import cache
from pathlib import PurePosixPath
from typing import Any, get_type_hints

from lineplanner.files.folders import FOLDERS, STANDARDS
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.cautions import CautionTexts
from lineplanner.inputs.declared import Shape, declared, shape_of
from lineplanner.inputs.line import Line
from lineplanner.inputs.load import Load
from lineplanner.inputs.material import Material
from lineplanner.inputs.part import Part
from lineplanner.inputs.rack import Rack
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.site import Site
from lineplanner.inputs.tables import Tables

VERSION = 1


@dataclass(frozen=True, slots=True)
class FileKind:
    """One kind of file.

    table is the field of Tables that it fills, None for all that is no standards table; rows says that the
    file holds rows of that table and not the whole of it.
    """

    name: str
    record: Any
    folder: PurePosixPath
    table: str | None = None
    rows: bool = False


_RECORDS: Mapping[str, Any] = {
    "site": Site,
    "line": Line,
    "bath": Bath,
    "recipe": Recipe,
    "material": Material,
    "cautions": CautionTexts,
    "rack": Rack,
    "part": Part,
    "load": Load,
}
# kind of file -> field of Tables
_TABLES = {
    "alloys": "alloys",
    "substrates": "substrates",
    "processes": "processes",
    "growth": "growth",
    "chrome-baths": "chrome",
    "cell-voltage": "cell",
    "conductors": "conductors",
    "limits": "limits",
    "uncertainty": "uncertainty",
    "conductivity": "conductivity",
}


@cache
def kinds() -> Mapping[str, FileKind]:
    """All kinds of file by name."""
    found = {name: FileKind(name, record, FOLDERS[name]) for name, record in _RECORDS.items()}
    for name, field in _TABLES.items():
        record = _table_record(field)
        found[name] = FileKind(name, record, STANDARDS, field, rows=field in _names(record))
    return found


def _names(record: type) -> set[str]:
    return {one.name for one in declared(record).values()}


def _table_record(name: str) -> type:
    """The record of a standards file: the table's own, or for a table of rows one that holds the rows."""
    one = next(one for one in declared(Tables).values() if one.name == name)
    if shape_of(one.type)[0] is Shape.RECORD:
        return one.type  # type: ignore[no-any-return]
    hint = get_type_hints(Tables, include_extras=True)[name]
    return make_dataclass(name.title(), [(name, hint)], frozen=True, slots=True, kw_only=True)


def format_line(kind: str) -> str:
    """The value of the key `format` in a file of a kind."""
    return f"lineplanner {kind} {VERSION}"
