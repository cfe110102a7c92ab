"""Reading the declarations: the fields of a record with key, type, kind and default; the one walker of them all."""

from collections.abc import Mapping
from dataclasses import MISSING, dataclass, fields, is_dataclass
from datetime import date
from enum import Enum, StrEnum, auto
from functools import cache
from types import NoneType, UnionType
from typing import Annotated, Any, Literal, Union, get_args, get_origin, get_type_hints

from lineplanner.quantities import Field

Path = tuple[str | int, ...]
"""Where something is in a record or a file: names or keys, list positions from 0."""


class Shape(Enum):
    """What a declared type asks of a file."""

    NUMBER = auto()
    COUNT = auto()
    WORDS = auto()
    YES_NO = auto()
    DATE = auto()
    CHOICE = auto()
    PAIR = auto()
    MANY = auto()
    RECORD = auto()
    FORMS = auto()


@dataclass(frozen=True, slots=True)
class Declared:
    """One declared field: its name in the record, its key in a file, and what it holds."""

    name: str
    key: str
    type: Any
    field: Field | None
    required: bool
    default: object = None


def described(annotation: Any) -> tuple[Any, Field | None]:
    """The bare type of an annotation, with `| None` taken off, and the Field that describes it."""
    found = None
    while True:
        if get_origin(annotation) is Annotated:
            found = found or next((m for m in annotation.__metadata__ if isinstance(m, Field)), None)
            annotation = annotation.__origin__
        elif get_origin(annotation) in (UnionType, Union) and NoneType in get_args(annotation):
            rest = [one for one in get_args(annotation) if one is not NoneType]
            annotation = Union[tuple(rest)]  # noqa: UP007 - made at run time
        else:
            return annotation, found


_PLAIN = {float: Shape.NUMBER, int: Shape.COUNT, str: Shape.WORDS, bool: Shape.YES_NO, date: Shape.DATE}


def shape_of(bare: Any) -> tuple[Shape, tuple[Any, ...]]:
    """The shape of a bare type and what it is made of: choices, item types, records."""
    if bare in _PLAIN:
        return _PLAIN[bare], ()
    origin, inside = get_origin(bare), get_args(bare)
    if origin is Literal:
        return Shape.CHOICE, inside
    if origin is tuple:
        return (Shape.MANY, inside[:1]) if inside[-1] is Ellipsis else (Shape.PAIR, inside)
    if origin in (UnionType, Union):
        return Shape.FORMS, inside
    if isinstance(bare, type) and issubclass(bare, StrEnum):
        return Shape.CHOICE, tuple(bare)
    if is_dataclass(bare):
        return Shape.RECORD, (bare,)
    raise TypeError(bare)


@cache
def declared(record: type) -> Mapping[str, Declared]:
    """The fields of a record by their key in a file, in declared order."""
    hints = get_type_hints(record, include_extras=True)
    found = {}
    for one in fields(record):
        bare, field = described(hints[one.name])
        key = field.key if field and field.key else one.name
        required = one.default is MISSING and one.default_factory is MISSING
        found[key] = Declared(one.name, key, bare, field, required, None if required else one.default)
    return found


@cache
def forms_of(record: Any) -> Mapping[str, type]:
    """The members of a union of records by the word in their `form` field."""
    return {get_args(get_type_hints(one)["form"])[0]: one for one in get_args(record)}


def record_at(record: Any, path: Path, form: str | None = None) -> type | None:
    """The record that the table at a file path is read as; None where the path leaves the declarations."""
    bare = forms_of(record).get(form or "") if shape_of(record)[0] is Shape.FORMS else record
    for step in path:
        shape, inside = shape_of(bare) if bare is not None else (Shape.WORDS, ())
        if shape is Shape.RECORD and step in declared(bare):
            bare = declared(bare)[str(step)].type
        elif shape is Shape.MANY and isinstance(step, int):
            bare, _ = described(inside[0])
        else:
            return None
    return bare if bare is not None and shape_of(bare)[0] is Shape.RECORD else None


def file_path(record: type, path: Path) -> Path:
    """A path of field names as the path of keys in a file."""
    found: list[str | int] = []
    bare: Any = record
    for step in path:
        shape, inside = shape_of(bare) if bare is not None else (Shape.WORDS, ())
        key: str | int = step
        if shape is Shape.RECORD:
            one = next((one for one in declared(bare).values() if one.name == step), None)
            key, bare = (one.key, one.type) if one else (step, None)
        elif shape is Shape.MANY:
            bare, _ = described(inside[0])
        else:
            bare = None
        found.append(key)
    return tuple(found)
